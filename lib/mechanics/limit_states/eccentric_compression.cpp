// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/bending_modulus.hpp"
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/text.hpp"

#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Without one that is given the curves stand for imperfections; Euler and Johnson know none. The
/// length of the member is not known to applies(), where only the sign counts.
double eccentricity(const LoadEffects& effects, const MemberLimits& limits, double length) {
  if (effects.eccentricity) {
    return *effects.eccentricity;
  }
  return limits.column_method == ColumnMethod::curves ? 0.0 : length / 500.0;
}

struct Worst {
  ColumnResistance column;
  double modulus = 0.0;
  double stress = 0.0;  ///< [Pa]
};

Worst about(const CheckInput& input, BendingAxis axis, double e) {
  Worst result{.column = column_resistance(input, axis),
               .modulus = bending_modulus(input.section, axis)};
  const double A = input.section.area;
  const double I = result.column.second_moment;
  result.stress = secant_stress({.load = input.factor * input.effects.compression,
                                 .area = A,
                                 .radius_of_gyration = std::sqrt(I / A),
                                 .effective_length = result.column.effective_length,
                                 .youngs_modulus = column_modulus(input.material),
                                 .eccentricity = e,
                                 .fibre_distance = I / result.modulus});
  return result;
}

Worst worst_axis(const CheckInput& input) {
  const double e = eccentricity(input.effects, input.limits, input.length);
  const Worst y = about(input, BendingAxis::y, e);
  const Worst z = about(input, BendingAxis::z, e);
  return z.stress > y.stress ? z : y;
}

double strength(const CheckInput& input) {
  return column_strength(input.material) * weld_share(input);
}

class EccentricCompression final : public LimitState {
 public:
  std::string_view id() const override { return "eccentric compression"; }
  std::string_view source() const override {
    return "secant formula: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., section "
           "1.13 "
           "(section from memory)";
  }
  /// On the load, inside the formula: the stress grows faster than the load.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.compression > 0.0 && eccentricity(effects, limits, 1.0) > 0.0;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial& material) const override {
    return column_symbols(material);
  }
  /// Stress under the factored compression over the yield strength, of other than ductile materials
  /// over the compressive strength; the eccentricity about each axis for itself.
  double utilisation(const CheckInput& input) const override {
    return worst_axis(input).stress / strength(input);
  }
  Explanation explain(const CheckInput& input) const override;
  /// P/A, e c/r^2 and L/r fall.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::E_05:
      case Symbol::sigma_y:
      case Symbol::compressive:
      case Symbol::weld_yield:
        return Trend::falls;
      default:
        return Trend::constant;
    }
  }
};

Explanation EccentricCompression::explain(const CheckInput& input) const {
  const double e = eccentricity(input.effects, input.limits, input.length);
  const Worst worst = worst_axis(input);
  const double u = utilisation(input);
  const double P = input.factor * input.effects.compression;
  const std::string mode(name(worst.column.mode));
  Explanation text;
  text.line = "Eccentric compression " + mode + ": " + megapascals(worst.stress) + " under " +
              number(input.factor) + " x " + kilonewtons(input.effects.compression) + " at " +
              millimetres(e) + " against " + megapascals(strength(input)) + ": u = " + number(u) +
              ".";
  text.steps.push_back(input.effects.eccentricity
                           ? "The eccentricity is given: e = " + millimetres(e) + "."
                           : "No eccentricity is given: e = L / 500 = " + millimetres(e) +
                                 ", as the method knows no imperfections.");
  text.steps.push_back(critical_load_step(input, worst.column));
  text.steps.push_back(
      std::isinf(worst.stress)
          ? "The factored load " + kilonewtons(P) + " reaches it: the stress grows without bound."
          : "sigma = P/A [1 + e A/W sec(pi/2 root of (P / N_cr))] with P = " + kilonewtons(P) +
                ", A = " + square_millimetres(input.section.area) + " and W = " +
                cubic_millimetres(worst.modulus) + ": " + megapascals(worst.stress) + ".");
  text.steps.push_back("u = stress / strength = " + megapascals(worst.stress) + " / " +
                       megapascals(strength(input)) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& eccentric_compression_limit_state() {
  static const EccentricCompression state;
  return state;
}

}  // namespace bismar::mechanics
