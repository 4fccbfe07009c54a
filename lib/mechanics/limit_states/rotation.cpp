// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/deformation.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

class Rotation final : public LimitState {
 public:
  std::string_view id() const override { return "rotation"; }
  std::string_view source() const override {
    return "Euler-Bernoulli beam: the largest slope of the axis, which is what bearings and gears "
           "on a shaft feel; in compression raised by 1 / (1 - N / N_cr): Timoshenko and Gere, "
           "Theory of Elastic Stability, 2nd ed., section 1.11 (section from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.rotation && is_deformed(effects, Deformation::rotation);
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    std::vector<Symbol> symbols = {Symbol::E};
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  /// Small angles: the slope in radians is taken as the angle. Shear does not turn the sections and
  /// is left out. The rise by compression is on the safe side for the ends of a member on two
  /// supports under a uniform load or end moments and for the tip of a cantilever, where every
  /// buckling mode turns them the same way.
  double utilisation(const CheckInput& input) const override {
    return input.factor * deformations(input, Deformation::rotation).together() /
           *input.limits.rotation;
  }
  Explanation explain(const CheckInput& input) const override {
    const std::string size = degrees(deformations(input, Deformation::rotation).together());
    const double u = utilisation(input);
    Explanation text;
    text.line = "Rotation: " + size + " against a limit of " + degrees(*input.limits.rotation) +
                ", factor " + number(input.factor) + ": u = " + number(u) + ".";
    text.steps = deformation_steps(input, Deformation::rotation);
    text.steps.push_back("u = factor x rotation / limit = " + number(input.factor) + " x " + size +
                         " / " + degrees(*input.limits.rotation) + " = " + number(u) + ".");
    return text;
  }
  /// As for the deflection.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    return symbol == Symbol::E     ? Trend::falls
           : symbol == Symbol::rho ? Trend::rises
                                   : Trend::constant;
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  DeformationBound bound_{DeformationBound::Kind::rotation};
};

}  // namespace

const LimitState& rotation_limit_state() {
  static const Rotation state;
  return state;
}

}  // namespace bismar::mechanics
