// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/stress.hpp>

#include <algorithm>
#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

bool is_ductile(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield;
}

bool is_weakened(const MemberDetails& details) {
  return details.net_area < 1.0 || details.net_modulus < 1.0;
}

bool concentrates(const MemberDetails& details) {
  return details.k_t_axial > 1.0 || details.k_t_bending > 1.0 || details.k_t_torsion > 1.0;
}

/// Stresses on the net section; where the material does not yield, at the notch.
StationStresses net_stresses(const CheckInput& input, const InternalForces& forces) {
  const MemberDetails& d = input.limits.details;
  const bool peaks = !is_ductile(input.material);
  const double axial = (peaks ? d.k_t_axial : 1.0) / d.net_area;
  const double bending = (peaks ? d.k_t_bending : 1.0) / d.net_modulus;
  const double torsion = (peaks ? d.k_t_torsion : 1.0) / d.net_modulus;
  StationStresses s = station_stresses(input.section, forces);
  s.axial *= axial;
  s.bending_y *= bending;
  s.bending_z *= bending;
  s.bending *= bending;
  s.web_bending_z *= bending;
  s.torsion *= torsion;
  s.shear_y /= d.net_area;
  s.shear_z /= d.net_area;
  s.flange_shear /= d.net_area;
  return s;
}

struct Worst {
  const Station* station = nullptr;
  StressPoint point;
  double stress = 0.0;  ///< Von Mises, or the largest principal tension [Pa].
};

/// Largest principal tension; compression relieves bending only where no own mass acts (see
/// brittle fracture: else a larger section could be the worse one), and never more than all of it.
double principal_tension(const StressPoint& point, bool relieves) {
  const double axial = relieves ? point.axial : std::max(0.0, point.axial);
  return largest_principal(std::max(0.0, point.bending + axial), point.shear);
}

Worst worst_point(const CheckInput& input) {
  const bool relieves = !own_mass_acts(input.effects);
  Worst worst;
  double largest = -1.0;
  for (const Station& station : input.effects.stations) {
    const StressPoints points =
        stress_points(input.section, net_stresses(input, acting_forces(input, station)));
    for (const StressPoint& point : points) {
      const double stress = is_ductile(input.material)
                                ? std::sqrt(std::max(0.0, equivalent_squared(point)))
                                : principal_tension(point, relieves);
      if (stress > largest) {
        largest = stress;
        worst = {.station = &station, .point = point, .stress = stress};
      }
    }
  }
  return worst;
}

/// What the stress is held against [Pa].
double limit_strength(const MemberMaterial& material) {
  const double tensile = needed(material.tensile, Symbol::tensile);
  return is_ductile(material) ? 0.9 * tensile : tensile;
}

class NetSection final : public LimitState {
 public:
  std::string_view id() const override { return "net section"; }
  std::string_view source() const override {
    return "0.9 f_u on the net section: EN 1993-1-1:2005 (6.7), for bending and shear too (von "
           "Mises); materials that do not yield: largest principal tension with K_t against the "
           "tensile strength";
  }
  /// Ductile: 1.5 on the load times gamma_M2 = 1.25. Brittle: as for brittle fracture.
  double default_factor(const MemberMaterial& material) const override {
    switch (material.rule) {
      case StressRule::von_mises_yield:
        return 1.875;
      case StressRule::principal:
        return material.ceramic ? 5.0 : 3.0;
      case StressRule::direct_and_shear:
        return 1.5;
    }
    throw InternalError("stress rule without a factor");
  }
  /// Where the section is weakened; of a material that does not yield also where the stress is
  /// raised. The plain section is the subject of the other limit states.
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return is_weakened(limits.details) || (!is_ductile(material) && concentrates(limits.details));
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    if (own_mass_acts(effects)) {
      return {Symbol::tensile, Symbol::rho};
    }
    return {Symbol::tensile};
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * worst_point(input).stress / limit_strength(input.material);
  }
  Explanation explain(const CheckInput& input) const override;
  /// The stresses are those of yield and brittle fracture times constants.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    return symbol == Symbol::tensile ? Trend::falls
           : symbol == Symbol::rho   ? Trend::rises
                                     : Trend::constant;
  }
};

Explanation NetSection::explain(const CheckInput& input) const {
  const Worst worst = worst_point(input);
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  const MemberDetails& d = input.limits.details;
  const bool ductile = is_ductile(input.material);
  const double limit = limit_strength(input.material);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Net section: " + number(input.factor) + " x " + megapascals(worst.stress) +
              (ductile ? " von Mises stress " : " principal tension ") +
              std::string(worst.point.place) + " at x = " + millimetres(worst.station->x) +
              " against " + megapascals(limit) + ": u = " + number(u) + ".";
  add_own_mass_step(input, text.steps);
  text.steps.push_back("Net over full section: area " + number(d.net_area) + ", moduli " +
                       number(d.net_modulus) + ".");
  if (!ductile) {
    text.steps.push_back("Stress concentration, which the material does not yield away: axial " +
                         number(d.k_t_axial) + ", bending " + number(d.k_t_bending) + ", torsion " +
                         number(d.k_t_torsion) + ".");
  }
  text.steps.push_back("There: axial " + megapascals(worst.point.axial) + ", bending " +
                       megapascals(worst.point.bending) + ", shear " +
                       megapascals(worst.point.shear) + ".");
  if (ductile) {
    text.steps.push_back("Limit: 0.9 f_u = 0.9 x " + megapascals(*input.material.tensile) + " = " +
                         megapascals(limit) + ".");
  }
  text.steps.push_back("u = " + number(input.factor) + " x " + megapascals(worst.stress) + " / " +
                       megapascals(limit) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& net_section_limit_state() {
  static const NetSection state;
  return state;
}

}  // namespace bismar::mechanics
