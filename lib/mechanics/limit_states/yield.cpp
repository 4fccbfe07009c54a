// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

struct Worst {
  const Station* station = nullptr;
  InternalForces forces;  ///< There, own mass included.
  StressPoint point;
  double equivalent = 0.0;  ///< [Pa]
};

Worst worst_point(const CheckInput& input) {
  Worst worst;
  double largest = -1.0;
  for (const Station& station : input.effects.stations) {
    const InternalForces forces = acting_forces(input, station);
    const StressPoints points =
        stress_points(input.section, station_stresses(input.section, forces));
    for (const StressPoint& point : points) {
      const double squared = equivalent_squared(point);
      if (squared > largest) {
        largest = squared;
        worst.station = &station;
        worst.forces = forces;
        worst.point = point;
      }
    }
  }
  worst.equivalent = std::sqrt(std::max(0.0, largest));
  return worst;
}

/// The moments and what the bending stress is made of with them.
std::string bending_terms(const SectionProperties& section, const InternalForces& forces) {
  const std::string about_y = "M_y = " + newton_metres(forces.M_y);
  const std::string about_z = "M_z = " + newton_metres(forces.M_z);
  if (section.fibres.empty()) {
    return about_y + ", W_y = " + cubic_millimetres(section.W_el_y) + ", " + about_z +
           ", W_z = " + cubic_millimetres(section.W_el_z);
  }
  return about_y + ", " + about_z + ", I_y = " + fourth_millimetres(section.I_y) +
         ", I_z = " + fourth_millimetres(section.I_z) +
         ", I_yz = " + fourth_millimetres(section.I_yz) + " at the worst corner";
}

/// The von Mises stress of the loads against the yield strength.
class YieldBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 1; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    out[0] = equivalent_stress_of_loads(input);
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    out[0] = needed(input.material.sigma_y, Symbol::sigma_y);
  }
  bool exact(const CapacityInput& input) const override { return !own_mass_acts(input.effects); }
};

class Yield final : public LimitState {
 public:
  std::string_view id() const override { return "yield"; }
  std::string_view source() const override {
    return "von Mises criterion on elastic stresses; EN 1993-1-1:2005 6.2.1(5)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects&,
               const MemberLimits&,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return material.rule == StressRule::von_mises_yield;
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    if (own_mass_acts(effects)) {
      return {Symbol::sigma_y, Symbol::rho};
    }
    return {Symbol::sigma_y};
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * worst_point(input).equivalent /
           needed(input.material.sigma_y, Symbol::sigma_y);
  }
  Explanation explain(const CheckInput& input) const override;
  /// Every stress falls: N/A and V/A_v with the square of the scale, M/W and T/W_t with its cube,
  /// of own mass, which rises with its square, the shear stress stays and the bending stress falls;
  /// the equivalent stress rises with each of their magnitudes.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    return symbol == Symbol::sigma_y ? Trend::falls
           : symbol == Symbol::rho   ? Trend::rises
                                     : Trend::constant;
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  YieldBound bound_;
};

Explanation Yield::explain(const CheckInput& input) const {
  const double strength = needed(input.material.sigma_y, Symbol::sigma_y);
  const Worst worst = worst_point(input);
  const double u = utilisation(input);
  Explanation text;
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  const StressPoint& p = worst.point;
  text.line = "Yield: " + number(input.factor) + " x " + megapascals(worst.equivalent) +
              " von Mises stress " + std::string(p.place) +
              " at x = " + millimetres(worst.station->x) + " against a yield strength of " +
              megapascals(strength) + ": u = " + number(u) + ".";
  add_own_mass_step(input, text.steps);
  const InternalForces& f = worst.forces;
  text.steps.push_back("Axial stress N / A = " + megapascals(p.axial) +
                       ", from N = " + kilonewtons(f.N) +
                       " and A = " + square_millimetres(input.section.area) + ".");
  text.steps.push_back("Bending stress there = " + megapascals(p.bending) + ", from " +
                       bending_terms(input.section, f) + ".");
  text.steps.push_back("Shear stress there = " + megapascals(p.shear) +
                       ", from V_z = " + kilonewtons(f.V_z) + ", V_y = " + kilonewtons(f.V_y) +
                       ", T = " + newton_metres(f.T) + ".");
  text.steps.push_back("Von Mises stress, the square root of sigma^2 + 3 tau^2, = " +
                       megapascals(worst.equivalent) + ".");
  text.steps.push_back("u = factor x stress / yield strength = " + number(input.factor) + " x " +
                       megapascals(worst.equivalent) + " / " + megapascals(strength) + " = " +
                       number(u) + ".");
  return text;
}

}  // namespace

const LimitState& yield_limit_state() {
  static const Yield state;
  return state;
}

}  // namespace bismar::mechanics
