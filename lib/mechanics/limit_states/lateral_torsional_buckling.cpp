// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/lateral_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

bool bends_about_y(const LoadEffects& effects) {
  return std::any_of(effects.stations.begin(), effects.stations.end(), [](const Station& station) {
    return station.forces.M_y != 0.0 || station.own.M_y != 0.0;
  });
}

/// M_y over M_b: +infinity where nothing is carried.
double share_about_y(const CheckInput& input, double moment) {
  return moment > 0.0 ? input.factor * moment / lateral_resistance(input).load : 0.0;
}

/// What bending about the weak axis takes of the resistance. EN 1995-1-1 6.1.6 lets a rectangle
/// count it with 0.7; a metal counts it whole, as in EN 1993-1-1 (6.61) with N = 0; where M_cr is
/// the limit it is no part of it.
double share_about_z(const CheckInput& input, double moment) {
  const MemberMaterial& material = input.material;
  const bool timber = is_timber(material.column_law);
  if (moment == 0.0 || (!timber && !is_ductile_column(material))) {
    return 0.0;
  }
  const bool rectangle = input.section.family == SectionFamily::solid_rectangle;
  const double weight = timber && rectangle ? 0.7 : 1.0;
  return weight * input.factor * moment /
         (input.section.W_el_z * strength_in_bending(material) * weld_share(input));
}

class LateralTorsionalBuckling final : public LimitState {
 public:
  std::string_view id() const override { return "lateral-torsional buckling"; }
  std::string_view source() const override {
    return "EN 1993-1-1:2005 6.3.2.2 with W_el; EN 1999-1-1:2007 6.3.2 (constants from memory); EN "
           "1995-1-1:2004 6.3.3; M_cr by the three-factor formula of NCCI SN003, of a T by AISC "
           "360-16 F9; C1 by AISC 360-16 (F1-1)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties& section) const override {
    return may_turn_aside(section, limits) && bends_about_y(effects);
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override {
    std::vector<Symbol> symbols = lateral_symbols(material);
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  double utilisation(const CheckInput& input) const override {
    const PeakMoments moments = peak_moments(input);
    return share_about_y(input, moments.M_y) + share_about_z(input, moments.M_z);
  }
  Explanation explain(const CheckInput& input) const override;
  /// M_cr / W = k^4 (a k^2 + b) / (k^3 [sqrt(c k^2 + b) + d k]) with positive constants, a rising
  /// function of the scale k; so the slenderness falls and M_b / W does not fall.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// M_cr rises with both moduli, M_b with the strength as N_b of a column does.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::E_05:
      case Symbol::G:
      case Symbol::sigma_y:
      case Symbol::tensile:
      case Symbol::compressive:
      case Symbol::flexural:
      case Symbol::weld_yield:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation LateralTorsionalBuckling::explain(const CheckInput& input) const {
  const PeakMoments moments = peak_moments(input);
  const LateralResistance r = lateral_resistance(input);
  const double about_z = share_about_z(input, moments.M_z);
  const double about_y = share_about_y(input, moments.M_y);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Lateral-torsional buckling: " + number(input.factor) + " x " +
              newton_metres(moments.M_y) + " against " + newton_metres(r.load) +
              (about_z > 0.0 ? ", with " + number(about_z) + " of bending about z" : "") +
              ": u = " + number(u) + ".";
  add_own_mass_step(input, text.steps);
  for (std::string& step : lateral_steps(input, r)) {
    text.steps.push_back(std::move(step));
  }
  if (about_z > 0.0) {
    text.steps.push_back("Bending about z, " + number(input.factor) + " x " +
                         newton_metres(moments.M_z) + ", takes " + number(about_z) + ".");
  }
  text.steps.push_back("u = " + number(about_y) + " + " + number(about_z) + " = " + number(u) +
                       ".");
  return text;
}

}  // namespace

const LimitState& lateral_torsional_buckling_limit_state() {
  static const LateralTorsionalBuckling state;
  return state;
}

}  // namespace bismar::mechanics
