// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

double twist_angle(const CheckInput& input) {
  return input.effects.twist / (needed(input.material.G, Symbol::G) * input.section.I_t);
}

/// Against G.
class TwistBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 1; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    out[0] = input.limits.twist && input.effects.twist > 0.0
                 ? input.effects.twist / input.section.I_t / *input.limits.twist
                 : 0.0;
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    out[0] = needed(input.material.G, Symbol::G);
  }
  bool exact(const CapacityInput&) const override { return true; }
};

class Twist final : public LimitState {
 public:
  std::string_view id() const override { return "twist"; }
  std::string_view source() const override {
    return "St Venant torsion, warping free (on the safe side for open sections held against "
           "warping)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.twist && effects.twist > 0.0;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override {
    return {Symbol::G};
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * twist_angle(input) / *input.limits.twist;
  }
  Explanation explain(const CheckInput& input) const override {
    const double angle = twist_angle(input);
    const double u = utilisation(input);
    Explanation text;
    text.line = "Twist: " + degrees(angle) + " against a limit of " + degrees(*input.limits.twist) +
                ", factor " + number(input.factor) + ": u = " + number(u) + ".";
    text.steps = {"Coefficient " + number(input.effects.twist) +
                      " N m2 over G = " + gigapascals(*input.material.G) + " and I_t = " +
                      fourth_millimetres(input.section.I_t) + " gives " + degrees(angle) + ".",
                  "u = factor x twist / limit = " + number(input.factor) + " x " + degrees(angle) +
                      " / " + degrees(*input.limits.twist) + " = " + number(u) + "."};
    return text;
  }
  /// The torsion constant rises with the fourth power of the scale.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    return symbol == Symbol::G ? Trend::falls : Trend::constant;
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  TwistBound bound_;
};

}  // namespace

const LimitState& twist_limit_state() {
  static const Twist state;
  return state;
}

}  // namespace bismar::mechanics
