// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/stress.hpp>

#include <algorithm>
#include <limits>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// The strengths that a load case is held against; each is there when the load case can reach it.
///
/// Bending is held against the flexural strength (else the lower of tensile and compressive), axial
/// tension and shear against the tensile strength (a bent member without one: the bending strength,
/// as its shear stress is secondary), compression against the compressive strength (a bent member
/// without one: the strength of its tension side).
struct Strengths {
  double bending = 0.0;
  double tension = 0.0;
  double compression = 0.0;
};

bool is_sheared(const LoadEffects& effects) {
  return std::any_of(effects.stations.begin(), effects.stations.end(), [](const Station& station) {
    return station.forces.V_y != 0.0 || station.forces.V_z != 0.0 || station.own.V_y != 0.0 ||
           station.own.V_z != 0.0;
  });
}

std::vector<Symbol> needed_symbols(const LoadEffects& effects, const MemberMaterial& material) {
  std::vector<Symbol> symbols;
  if (effects.bends) {
    if (material.flexural || !(material.tensile && material.compressive)) {
      symbols.push_back(Symbol::flexural);
    } else {
      symbols = {Symbol::tensile, Symbol::compressive};
    }
  }
  const auto add = [&symbols](Symbol symbol) {
    if (std::find(symbols.begin(), symbols.end(), symbol) == symbols.end()) {
      symbols.push_back(symbol);
    }
  };
  if (effects.tension > 0.0 || effects.twists || (!effects.bends && is_sheared(effects))) {
    add(Symbol::tensile);
  }
  if (effects.compression > 0.0) {
    add(Symbol::compressive);
  }
  return symbols;
}

Strengths strengths(const LoadEffects& effects, const MemberMaterial& material) {
  Strengths result;
  if (effects.bends) {
    result.bending = material.flexural
                         ? *material.flexural
                         : std::min(needed(material.tensile, Symbol::tensile),
                                    needed(material.compressive, Symbol::compressive));
    result.tension = material.tensile.value_or(result.bending);
    result.compression = material.compressive.value_or(std::min(result.bending, result.tension));
    return result;
  }
  // What the load case cannot reach stays absent: its stress is zero.
  result.bending = std::numeric_limits<double>::infinity();
  result.tension = material.tensile.value_or(std::numeric_limits<double>::infinity());
  result.compression = material.compressive.value_or(result.tension);
  return result;
}

struct Worst {
  const Station* station = nullptr;
  StressPoint point;
  bool tension_side = true;
  double ratio = 0.0;  ///< Principal stress over strength, before the factor.
};

/// The axial stress as one side of a bent section feels it. Where own mass acts it never relieves:
/// the relief falls with the square of the scale and the bending stress of own mass only with the
/// scale, so that a larger section could be the worse one.
double axial_on_side(double axial, bool tension_side, bool relieves) {
  if (relieves) {
    return axial;
  }
  return tension_side ? std::max(0.0, axial) : std::min(0.0, axial);
}

/// Largest principal stress over strength on one side of a point: each part of the direct stress
/// over its own strength, the shear stress over that of the side.
double side_ratio(const StressPoint& point,
                  const Strengths& strength,
                  bool tension_side,
                  bool relieves) {
  const double axial = axial_on_side(point.axial, tension_side, relieves);
  if (!tension_side) {
    return largest_principal((point.bending - axial) / strength.compression,
                             point.shear / strength.compression);
  }
  // Axial compression relieves bending, but at most all of it: no credit against shear.
  const double direct = axial > 0.0 ? axial / strength.tension + point.bending / strength.bending
                                    : std::max(0.0, point.bending + axial) / strength.bending;
  return largest_principal(direct, point.shear / strength.tension);
}

/// The principal stress itself, for the explanation [Pa].
double side_stress(const StressPoint& point, bool tension_side, bool relieves) {
  const double axial = axial_on_side(point.axial, tension_side, relieves);
  return tension_side ? largest_principal(std::max(0.0, point.bending + axial), point.shear)
                      : largest_principal(point.bending - axial, point.shear);
}

Worst worst_point(const CheckInput& input) {
  const Strengths strength = strengths(input.effects, input.material);
  const bool relieves = !own_mass_acts(input.effects);
  Worst worst;
  worst.ratio = -1.0;
  for (const Station& station : input.effects.stations) {
    const StressPoints points = stress_points(
        input.section, station_stresses(input.section, acting_forces(input, station)));
    for (const StressPoint& point : points) {
      for (const bool tension_side : {true, false}) {
        const double ratio = side_ratio(point, strength, tension_side, relieves);
        if (ratio > worst.ratio) {
          worst = {
              .station = &station, .point = point, .tension_side = tension_side, .ratio = ratio};
        }
      }
    }
  }
  return worst;
}

/// Each side against its own strength. On the tension side bending and axial tension have
/// different ones: with the larger for both, every part of the ratio becomes smaller or stays, and
/// the principal stress rises with its parts.
class BrittleBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 2; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    std::fill(out.begin(), out.end(), 0.0);
    const Strengths one{.bending = 1.0, .tension = 1.0, .compression = 1.0};
    const bool relieves = !own_mass_acts(input.effects);
    for (const Station& station : input.effects.stations) {
      for (const StressPoint& point :
           stress_points(input.section, station_stresses(input.section, station.forces))) {
        out[0] = std::max(out[0], side_ratio(point, one, true, relieves));
        out[1] = std::max(out[1], side_ratio(point, one, false, relieves));
      }
    }
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    const Strengths strength = strengths(input.effects, input.material);
    // Without bending its strength is infinite here, and no stress is held against it.
    out[0] = input.effects.bends ? std::max(strength.tension, strength.bending) : strength.tension;
    out[1] = strength.compression;
  }
  bool exact(const CapacityInput& input) const override {
    return !input.effects.bends && !own_mass_acts(input.effects);
  }
};

class BrittleFracture final : public LimitState {
 public:
  std::string_view id() const override { return "brittle fracture"; }
  std::string_view source() const override {
    return "largest principal stress against the strength for the action; common practice";
  }
  double default_factor(const MemberMaterial& material) const override {
    return material.ceramic ? 5.0 : 3.0;
  }
  bool applies(const LoadEffects&,
               const MemberLimits&,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return material.rule == StressRule::principal;
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override {
    std::vector<Symbol> symbols = needed_symbols(effects, material);
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * std::max(0.0, worst_point(input).ratio);
  }
  Explanation explain(const CheckInput& input) const override;
  /// Times the square of the scale, N/A and V/A_v are constant and M/W and T/W_t fall, whatever the
  /// sign of N; the principal stress rises with both the direct and the shear stress and scales
  /// with them, so that it falls. With own mass no sign of N relieves, and each stress falls or, as
  /// the shear stress of own mass, stays.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// Axial stress of one sense relieves the side that bends the other way.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::relieved;
  }
  /// Each strength only ever divides a stress that is zero or above, or the whole principal stress.
  Trend trend_with(Symbol symbol) const override {
    if (symbol == Symbol::rho) {
      return Trend::rises;
    }
    return symbol == Symbol::tensile || symbol == Symbol::compressive || symbol == Symbol::flexural
               ? Trend::falls
               : Trend::constant;
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  BrittleBound bound_;
};

Explanation BrittleFracture::explain(const CheckInput& input) const {
  const Worst worst = worst_point(input);
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  const Strengths strength = strengths(input.effects, input.material);
  const StressPoint& p = worst.point;
  const double u = utilisation(input);
  const double principal = side_stress(p, worst.tension_side, !own_mass_acts(input.effects));
  const std::string side = worst.tension_side ? "tension" : "compression";
  const double limit = worst.ratio > 0.0    ? principal / worst.ratio
                       : worst.tension_side ? strength.tension
                                            : strength.compression;
  Explanation text;
  text.line = "Brittle fracture: " + number(input.factor) + " x " + megapascals(principal) +
              " principal " + side + " " + std::string(p.place) +
              " at x = " + millimetres(worst.station->x) + " against a strength of " +
              megapascals(limit) + ": u = " + number(u) + ".";
  add_own_mass_step(input, text.steps);
  text.steps.push_back("Axial stress " + megapascals(p.axial) +
                       " (tension positive), bending stress " + megapascals(p.bending) +
                       ", shear stress " + megapascals(p.shear) + ".");
  text.steps.push_back(
      worst.tension_side
          ? "On the tension side bending is held against " + megapascals(strength.bending) +
                ", axial tension and shear against " + megapascals(strength.tension) + "."
          : "On the compression side the strength is " + megapascals(strength.compression) + ".");
  text.steps.push_back(
      "Principal stress sigma/2 plus the root of (sigma/2)^2 + tau^2, each part over "
      "its strength, = " +
      number(worst.ratio) + ".");
  text.steps.push_back("u = factor x that = " + number(input.factor) + " x " + number(worst.ratio) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& brittle_fracture_limit_state() {
  static const BrittleFracture state;
  return state;
}

}  // namespace bismar::mechanics
