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

/// gamma_M2 over gamma_M1 of EN 1999-1-1: rupture is held with that much more than yielding. (1.25
/// over 1.1 there; 1.25 over 1, as the factor of yield is 1.5 on the load alone.)
constexpr double rupture_over_yield = 1.25;

bool yields(const MemberMaterial& material) { return material.rule == StressRule::von_mises_yield; }

struct Worst {
  const Station* station = nullptr;
  StressPoint point;
  double equivalent = 0.0;  ///< [Pa]
};

Worst worst_point(const CheckInput& input) {
  Worst worst;
  double largest = -1.0;
  for (const Station& station : input.effects.stations) {
    const StressPoints points = stress_points(
        input.section, station_stresses(input.section, acting_forces(input, station)));
    for (const StressPoint& point : points) {
      const double squared = equivalent_squared(point);
      if (squared > largest) {
        largest = squared;
        worst = {.station = &station, .point = point};
      }
    }
  }
  worst.equivalent = std::sqrt(std::max(0.0, largest));
  return worst;
}

/// Strengths beside the weld, the tensile one as it stands against the factor of yield [Pa].
struct ZoneStrengths {
  double yield = 0.0;
  double rupture = 0.0;
  [[nodiscard]] double least() const { return std::min(yield, rupture); }
};

ZoneStrengths strengths(const MemberMaterial& material) {
  const double rupture = needed(material.tensile, Symbol::tensile) *
                         needed(material.weld_tensile_factor, Symbol::weld_tensile) /
                         rupture_over_yield;
  if (!yields(material)) {
    return {.yield = rupture, .rupture = rupture};
  }
  return {.yield = needed(material.sigma_y, Symbol::sigma_y) *
                   needed(material.weld_yield_factor, Symbol::weld_yield),
          .rupture = rupture};
}

/// The von Mises stress of the loads against the lower of both strengths.
class WeldBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 1; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    out[0] = input.limits.details.welded ? equivalent_stress_of_loads(input) : 0.0;
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    out[0] = strengths(input.material).least();
  }
  bool exact(const CapacityInput& input) const override { return !own_mass_acts(input.effects); }
};

class WeldZone final : public LimitState {
 public:
  std::string_view id() const override { return "weld zone"; }
  std::string_view source() const override {
    return "heat-affected zone: EN 1999-1-1:2007 6.1.6, 6.2.3 and Table 3.2 (rho_o,haz on yield, "
           "rho_u,haz on tensile strength), von Mises stress of the full section; rupture with a "
           "further 1.25 (gamma_M2)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.details.welded;
  }
  /// A material whose factors are not in the tables stays undecided.
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override {
    std::vector<Symbol> symbols = {Symbol::tensile, Symbol::weld_tensile};
    if (yields(material)) {
      symbols.push_back(Symbol::sigma_y);
      symbols.push_back(Symbol::weld_yield);
    }
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * worst_point(input).equivalent / strengths(input.material).least();
  }
  Explanation explain(const CheckInput& input) const override;
  /// As for yield.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::sigma_y:
      case Symbol::tensile:
      case Symbol::weld_yield:
      case Symbol::weld_tensile:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  WeldBound bound_;
};

Explanation WeldZone::explain(const CheckInput& input) const {
  const Worst worst = worst_point(input);
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  const MemberMaterial& m = input.material;
  const ZoneStrengths strength = strengths(m);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Weld zone: " + number(input.factor) + " x " + megapascals(worst.equivalent) +
              " von Mises stress " + std::string(worst.point.place) +
              " at x = " + millimetres(worst.station->x) + " against " +
              megapascals(strength.least()) + " beside the weld: u = " + number(u) + ".";
  add_own_mass_step(input, text.steps);
  if (yields(m)) {
    text.steps.push_back("Yielding: " + megapascals(*m.sigma_y) + " x " +
                         number(*m.weld_yield_factor) + " = " + megapascals(strength.yield) + ".");
  }
  text.steps.push_back("Rupture: " + megapascals(*m.tensile) + " x " +
                       number(*m.weld_tensile_factor) + " / " + number(rupture_over_yield) + " = " +
                       megapascals(strength.rupture) + ".");
  text.steps.push_back("u = " + number(input.factor) + " x " + megapascals(worst.equivalent) +
                       " / " + megapascals(strength.least()) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& weld_zone_limit_state() {
  static const WeldZone state;
  return state;
}

}  // namespace bismar::mechanics
