// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Largest deflections [m], bending only.
struct Deflections {
  double z = 0.0;
  double y = 0.0;
  /// Both peaks taken together: exact where they are at the same place (a cantilever's tip, one
  /// plane), on the safe side elsewhere.
  [[nodiscard]] double together() const { return std::sqrt(z * z + y * y); }
};

Deflections deflections(const CheckInput& input) {
  const double modulus = needed(input.material.E, Symbol::E);
  return {.z = input.effects.deflection_z / (modulus * input.section.I_y),
          .y = input.effects.deflection_y / (modulus * input.section.I_z)};
}

class Deflection final : public LimitState {
 public:
  std::string_view id() const override { return "deflection"; }
  std::string_view source() const override {
    return "Euler-Bernoulli beam, first order, shear deflection left out";
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
  double utilisation(const CheckInput& input) const override {
    return input.factor * deflections(input).together() / *input.limits.deflection;
  }
  Explanation explain(const CheckInput& input) const override;
  /// Both second moments rise with the fourth power of the scale.
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
                    " N m3 over E = " + gigapascals(*input.material.E) + " and I_y = " +
                    fourth_millimetres(input.section.I_y) + " gives " + millimetres(d.z) + ".",
                "Along y: coefficient " + number(input.effects.deflection_y) +
                    " N m3 over E and I_z = " + fourth_millimetres(input.section.I_z) + " gives " +
                    millimetres(d.y) + ".",
                "Together, root of the sum of squares: " + millimetres(d.together()) + ".",
                "u = factor x deflection / limit = " + number(input.factor) + " x " +
                    millimetres(d.together()) + " / " + millimetres(*input.limits.deflection) +
                    " = " + number(u) + "."};
  return text;
}

}  // namespace

const LimitState& deflection_limit_state() {
  static const Deflection state;
  return state;
}

}  // namespace bismar::mechanics
