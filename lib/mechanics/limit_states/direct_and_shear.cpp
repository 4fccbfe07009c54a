// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/direct_stress.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

struct Worst {
  const Station* station = nullptr;
  StationStresses stresses;
  bool shear = false;   ///< Whether the shear part is the worse one.
  double ratio = -1.0;  ///< Before the factor.
};

bool is_sheared(const LoadEffects& effects) {
  return effects.twists ||
         std::any_of(effects.stations.begin(), effects.stations.end(), [](const Station& station) {
           return station.forces.V_y != 0.0 || station.forces.V_z != 0.0 ||
                  station.own.V_y != 0.0 || station.own.V_z != 0.0;
         });
}

double shear_ratio(const StationStresses& s, const MemberMaterial& material) {
  const double stress = shear_stress(s, material);
  return stress > 0.0 ? stress / needed(material.shear, Symbol::shear) : 0.0;
}

Worst worst_station(const CheckInput& input) {
  Worst worst;
  for (const Station& station : input.effects.stations) {
    const StationStresses s = station_stresses(input.section, acting_forces(input, station));
    const double direct = direct_ratio(s, input.material);
    const double shear = shear_ratio(s, input.material);
    const double ratio = std::max(direct, shear);
    if (ratio > worst.ratio) {
      worst = {.station = &station, .stresses = s, .shear = shear > direct, .ratio = ratio};
    }
  }
  return worst;
}

/// Each part of the direct stress alone, and the shear stress. Cracks raise the part of the shear
/// force only.
class DirectAndShearBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 5; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    std::fill(out.begin(), out.end(), 0.0);
    for (const Station& station : input.effects.stations) {
      const StationStresses s = station_stresses(input.section, station.forces);
      const double force = std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z);
      out[0] = std::max(out[0], s.bending);
      out[1] = std::max(out[1], s.axial);
      out[2] = std::max(out[2], -s.axial);
      out[3] = std::max(out[3], force);
      out[4] = std::max(out[4], force + s.torsion);
    }
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    constexpr double none = std::numeric_limits<double>::infinity();
    const MemberMaterial& m = input.material;
    out[0] = input.effects.bends ? bending_strength(m) : none;
    out[1] = m.tensile.value_or(none);
    out[2] = m.compressive.value_or(none);
    out[3] = m.shear ? *m.shear * m.k_cr : none;
    out[4] = m.shear ? *m.shear * std::max(1.0, m.k_cr) : none;
  }
  bool exact(const CapacityInput&) const override { return false; }
};

class DirectAndShear final : public LimitState {
 public:
  std::string_view id() const override { return "direct and shear strength"; }
  std::string_view source() const override {
    return "direct and shear stress apart, direct parts added; EN 1995-1-1:2004 6.1.2 to 6.1.8, "
           "6.2.3, 6.2.4 with linear addition";
  }
  /// 1.5 on the load. For timber k_mod and gamma_M are in the strengths already, so that 1.5 stands
  /// for the partial factor of variable loads (EN 1990); other anisotropic materials get the same.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects&,
               const MemberLimits&,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return material.rule == StressRule::direct_and_shear;
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override;
  double utilisation(const CheckInput& input) const override {
    return input.factor * std::max(0.0, worst_station(input).ratio);
  }
  Explanation explain(const CheckInput& input) const override;
  /// Every stress falls with the square or the cube of the scale, that of own mass with the scale
  /// or, in shear, not at all; u rises with each.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::tensile:
      case Symbol::compressive:
      case Symbol::flexural:
      case Symbol::shear:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  DirectAndShearBound bound_;
};

std::vector<Symbol> DirectAndShear::needs(const LoadEffects& effects,
                                          const MemberMaterial& material) const {
  std::vector<Symbol> symbols;
  const bool from_both =
      effects.bends && !material.flexural && material.tensile && material.compressive;
  if (effects.bends && !from_both) {
    symbols.push_back(Symbol::flexural);
  }
  if (effects.tension > 0.0 || from_both) {
    symbols.push_back(Symbol::tensile);
  }
  if (effects.compression > 0.0 || from_both) {
    symbols.push_back(Symbol::compressive);
  }
  if (is_sheared(effects)) {
    symbols.push_back(Symbol::shear);
  }
  if (own_mass_acts(effects)) {
    symbols.push_back(Symbol::rho);
  }
  return symbols;
}

Explanation DirectAndShear::explain(const CheckInput& input) const {
  const Worst worst = worst_station(input);
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  const MemberMaterial& material = input.material;
  const StationStresses& s = worst.stresses;
  const double u = utilisation(input);
  const std::string place = " at x = " + millimetres(worst.station->x);
  Explanation text;
  add_own_mass_step(input, text.steps);
  if (worst.shear) {
    const double stress = shear_stress(s, material);
    text.line = "Shear strength: " + number(input.factor) + " x " + megapascals(stress) +
                " shear stress" + place + " against " +
                megapascals(needed(material.shear, Symbol::shear)) + ": u = " + number(u) + ".";
    text.steps.push_back("Shear stress of bending = root of " + megapascals(s.shear_z) +
                         " squared plus " + megapascals(s.shear_y) + " squared, over k_cr = " +
                         number(material.k_cr) + "; torsion adds " + megapascals(s.torsion) + ".");
  } else {
    text.line = "Direct strength: axial stress " + megapascals(s.axial) + " and bending stress " +
                megapascals(s.bending) + place + ", factor " + number(input.factor) +
                ": u = " + number(u) + ".";
    if (s.axial != 0.0) {
      const bool tie = s.axial > 0.0;
      const double strength = tie ? needed(material.tensile, Symbol::tensile)
                                  : needed(material.compressive, Symbol::compressive);
      text.steps.push_back(std::string(tie ? "Tension " : "Compression ") +
                           megapascals(std::abs(s.axial)) + " over " + megapascals(strength) +
                           " = " + number(std::abs(s.axial) / strength) + ".");
    }
    if (s.bending > 0.0) {
      const double strength = bending_strength(material);
      text.steps.push_back("Bending " + megapascals(s.bending_y) + " about y and " +
                           megapascals(s.bending_z) + " about z, together " +
                           megapascals(s.bending) + ", over " + megapascals(strength) + " = " +
                           number(s.bending / strength) + ".");
    }
  }
  text.steps.push_back("u = factor x ratio = " + number(input.factor) + " x " +
                       number(std::max(0.0, worst.ratio)) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& direct_and_shear_limit_state() {
  static const DirectAndShear state;
  return state;
}

}  // namespace bismar::mechanics
