// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/wall.hpp>

#include <cmath>
#include <numbers>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// The plates that carry the shear force along one axis.
struct Webs {
  WebEdges edges = WebEdges::both_held;
  double count = 0.0;   ///< 0: the force has no web that could buckle.
  double height = 0.0;  ///< h_w of one [m].
  double wall = 0.0;    ///< t [m].
};

/// Of an I, a channel or a T whose flange is thinner than its web the least wall stands for the web
/// too, on the safe side.
Webs webs_along(const SectionProperties& section, Along axis) {
  const double flange = section.ruling_dimension;
  switch (section.family) {
    case SectionFamily::i_section:
    case SectionFamily::channel:
      return axis == Along::z
                 ? Webs{.count = 1.0, .height = section.height - 2.0 * flange, .wall = section.wall}
                 : Webs{};
    case SectionFamily::tee:
      return axis == Along::z ? Webs{.edges = WebEdges::one_free,
                                     .count = 1.0,
                                     .height = section.height - flange,
                                     .wall = section.wall}
                              : Webs{};
    case SectionFamily::rectangular_tube:
      return {.count = 2.0,
              .height = (axis == Along::z ? section.height : section.width) - 2.0 * section.wall,
              .wall = section.wall};
    default:
      return {};
  }
}

bool acts_along(const LoadEffects& effects, Along axis) {
  for (const Station& station : effects.stations) {
    const bool acts = axis == Along::z ? station.forces.V_z != 0.0 || station.own.V_z != 0.0
                                       : station.forces.V_y != 0.0 || station.own.V_y != 0.0;
    if (acts) {
      return true;
    }
  }
  return false;
}

/// The webs along one axis against their force.
struct WebCheck {
  Along axis = Along::z;
  Webs webs;
  double force = 0.0;        ///< Without the factor [N].
  double slenderness = 0.0;  ///< lambda_w [-]
  double factor = 1.0;       ///< chi_w [-]
  double load = 0.0;         ///< V_b [N]
  double u = 0.0;
};

WebCheck check_along(const CheckInput& input, Along axis) {
  WebCheck r;
  r.axis = axis;
  r.webs = webs_along(input.section, axis);
  for (const Station& station : input.effects.stations) {
    const InternalForces forces = acting_forces(input, station);
    r.force = std::fmax(r.force, std::abs(axis == Along::z ? forces.V_z : forces.V_y));
  }
  if (r.webs.count == 0.0 || r.force == 0.0) {
    return r;
  }
  const double f = needed(input.material.sigma_y, Symbol::sigma_y);
  r.slenderness = web_shear_slenderness(
      r.webs.edges, r.webs.height / r.webs.wall, f, needed(input.material.E, Symbol::E));
  r.factor = web_shear_factor(r.slenderness);
  r.load = r.factor * f * weld_share(input) / std::numbers::sqrt3 * r.webs.count * r.webs.height *
           r.webs.wall;
  r.u = input.factor * r.force / r.load;
  return r;
}

WebCheck worst_web(const CheckInput& input) {
  const WebCheck along_z = check_along(input, Along::z);
  const WebCheck along_y = check_along(input, Along::y);
  return along_y.u > along_z.u ? along_y : along_z;
}

class ShearBuckling final : public LimitState {
 public:
  std::string_view id() const override { return "shear buckling"; }
  std::string_view source() const override {
    return "EN 1993-1-5:2006 section 5, web without stiffeners, non-rigid end posts, eta = 1, no "
           "part of the flanges; aluminium EN 1999-1-1:2007 6.7.4 likewise; stem of a T AISC "
           "360-16 G3 (all from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  /// Ductile metals; the web of an I, of a channel and of a T under a z load, the walls of a box
  /// along the load.
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial& material,
               const SectionProperties& section) const override {
    const auto acts = [&](Along axis) {
      return webs_along(section, axis).count > 0.0 && acts_along(effects, axis);
    };
    return is_ductile_column(material) && (acts(Along::z) || acts(Along::y));
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    std::vector<Symbol> symbols = {Symbol::E, Symbol::sigma_y};
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  /// The force alone: torsion and direct stress of the web are in the check of wall slenderness.
  double utilisation(const CheckInput& input) const override { return worst_web(input).u; }
  Explanation explain(const CheckInput& input) const override;
  /// h_w / t stays, V_b grows with the square of the scale like the own mass.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// A slender web resists with t^2, a stocky one with h_w t.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::large;
  }
  /// V_b rises with the root of f_y E where the web is slender.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::sigma_y:
      case Symbol::weld_yield:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation ShearBuckling::explain(const CheckInput& input) const {
  const WebCheck r = worst_web(input);
  const std::string axis = r.axis == Along::z ? "z" : "y";
  const double f = needed(input.material.sigma_y, Symbol::sigma_y);
  Explanation text;
  text.line = "Shear buckling: " + number(input.factor) + " x " + kilonewtons(r.force) + " along " +
              axis + " against " + kilonewtons(r.load) + ": u = " + number(r.u) + ".";
  add_own_mass_step(input, text.steps);
  text.steps.push_back(
      "lambda_w = 0.76 root of (f_y / tau_cr), tau_cr = " +
      number(web_shear_coefficient(r.webs.edges)) +
      " pi^2 E / (12 (1 - 0.3^2)) (t / h_w)^2 with h_w / t = " + millimetres(r.webs.height) +
      " / " + millimetres(r.webs.wall) + ", f_y = " + megapascals(f) +
      ", E = " + gigapascals(needed(input.material.E, Symbol::E)) + ": " + number(r.slenderness) +
      "; chi_w = " + number(r.factor) + ".");
  text.steps.push_back("V_b = chi_w f_y / root of 3 x h_w t = " + number(r.factor) + " x " +
                       megapascals(f * weld_share(input)) + " / 1.732 x " + number(r.webs.count) +
                       " x " + square_millimetres(r.webs.height * r.webs.wall) + " = " +
                       kilonewtons(r.load) + ".");
  text.steps.push_back("u = " + number(input.factor) + " x " + kilonewtons(r.force) + " / " +
                       kilonewtons(r.load) + " = " + number(r.u) + ".");
  return text;
}

}  // namespace

const LimitState& shear_buckling_limit_state() {
  static const ShearBuckling state;
  return state;
}

}  // namespace bismar::mechanics
