// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>

#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// In one direction, bending only.
struct Direction {
  double first_order = 0.0;    ///< [m]
  double critical = 0.0;       ///< N_cr in that bending [N].
  double amplification = 1.0;  ///< 1 / (1 - N / N_cr), +infinity at N >= N_cr.
  [[nodiscard]] double deflection() const {
    return first_order > 0.0 ? first_order * amplification : 0.0;
  }
};

Direction direction(const CheckInput& input,
                    double coefficient,
                    double second_moment,
                    double effective_length) {
  const double modulus = needed(input.material.E, Symbol::E);
  Direction result;
  result.first_order = coefficient / (modulus * second_moment);
  if (input.effects.compression > 0.0) {
    const double N = input.factor * input.effects.compression;
    result.critical = euler_critical_load(modulus, second_moment, effective_length);
    result.amplification = N < result.critical ? 1.0 / (1.0 - N / result.critical)
                                               : std::numeric_limits<double>::infinity();
  }
  return result;
}

/// Largest deflections.
struct Deflections {
  Direction z;
  Direction y;
  /// Both peaks taken together [m]: exact where they are at the same place (a cantilever's tip, one
  /// plane), on the safe side elsewhere.
  [[nodiscard]] double together() const {
    const double along_z = z.deflection();
    const double along_y = y.deflection();
    return std::sqrt(along_z * along_z + along_y * along_y);
  }
};

Deflections deflections(const CheckInput& input) {
  return {
      .z = direction(
          input, input.effects.deflection_z, input.section.I_y, input.effects.buckling_length_y),
      .y = direction(
          input, input.effects.deflection_y, input.section.I_z, input.effects.buckling_length_z)};
}

std::string amplification_step(const CheckInput& input,
                               const Direction& direction,
                               std::string_view along) {
  const double N = input.factor * input.effects.compression;
  if (std::isinf(direction.amplification)) {
    return "Along " + std::string(along) + ": the compression " + kilonewtons(N) +
           " reaches N_cr = " + kilonewtons(direction.critical) +
           ": the deflection grows without bound.";
  }
  return "Along " + std::string(along) + " the compression raises it by 1 / (1 - " +
         kilonewtons(N) + " / " + kilonewtons(direction.critical) +
         ") = " + number(direction.amplification) + ", to " + millimetres(direction.deflection()) +
         ".";
}

class Deflection final : public LimitState {
 public:
  std::string_view id() const override { return "deflection"; }
  std::string_view source() const override {
    return "Euler-Bernoulli beam, shear deflection left out; in compression raised by "
           "1 / (1 - N / N_cr): Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., section "
           "1.11 (section from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.deflection && (effects.deflection_z > 0.0 || effects.deflection_y > 0.0);
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override {
    return {Symbol::E};
  }
  /// The rise by compression is exact for a first-order deflection in the shape of the buckled
  /// member. Against the exact solutions near N_cr it is 3.2 % low for one moment over the whole
  /// length, 0.4 % low for a uniform load on two supports and on the safe side for a load at the
  /// tip or at midspan; loads that nearly cancel each other can be further off. Tension gets no
  /// credit. N_cr is taken with the E of bending, as the deflection is, and N with this limit
  /// state's factor.
  double utilisation(const CheckInput& input) const override {
    return input.factor * deflections(input).together() / *input.limits.deflection;
  }
  Explanation explain(const CheckInput& input) const override;
  /// Both second moments rise with the fourth power of the scale, and N_cr with them.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    return symbol == Symbol::E ? Trend::falls : Trend::constant;
  }
};

Explanation Deflection::explain(const CheckInput& input) const {
  const Deflections d = deflections(input);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Deflection: " + millimetres(d.together()) + " against a limit of " +
              millimetres(*input.limits.deflection) + ", factor " + number(input.factor) +
              ": u = " + number(u) + ".";
  text.steps = {"Along z: coefficient " + number(input.effects.deflection_z) +
                    " N m3 over E = " + gigapascals(*input.material.E) +
                    " and I_y = " + fourth_millimetres(input.section.I_y) + " gives " +
                    millimetres(d.z.first_order) + ".",
                "Along y: coefficient " + number(input.effects.deflection_y) +
                    " N m3 over E and I_z = " + fourth_millimetres(input.section.I_z) + " gives " +
                    millimetres(d.y.first_order) + "."};
  if (input.effects.compression > 0.0) {
    if (d.z.first_order > 0.0) {
      text.steps.push_back(amplification_step(input, d.z, "z"));
    }
    if (d.y.first_order > 0.0) {
      text.steps.push_back(amplification_step(input, d.y, "y"));
    }
  }
  text.steps.push_back("Together, root of the sum of squares: " + millimetres(d.together()) + ".");
  text.steps.push_back("u = factor x deflection / limit = " + number(input.factor) + " x " +
                       millimetres(d.together()) + " / " + millimetres(*input.limits.deflection) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& deflection_limit_state() {
  static const Deflection state;
  return state;
}

}  // namespace bismar::mechanics
