// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Restrained ends hold the length that heat would change.
bool grows_with_heat(const LoadEffects& effects) {
  return effects.temperature_change != 0.0 && !effects.restrained;
}

double axial_force(const LoadEffects& effects) {
  return std::max(effects.compression, effects.tension);
}

double axial_modulus(const MemberMaterial& material) {
  return material.E_axial ? *material.E_axial : needed(material.E, Symbol::E);
}

/// The two parts of the change of length [m].
struct Parts {
  double heat = 0.0;
  double force = 0.0;
  [[nodiscard]] double sum() const { return heat + force; }
};

Parts parts(const CheckInput& input) {
  Parts result;
  if (grows_with_heat(input.effects)) {
    result.heat =
        std::abs(needed(input.material.alpha, Symbol::alpha) * input.effects.temperature_change) *
        input.length;
  }
  if (axial_force(input.effects) > 0.0) {
    result.force = axial_force(input.effects) * input.length /
                   (axial_modulus(input.material) * input.section.area);
  }
  return result;
}

class Elongation final : public LimitState {
 public:
  std::string_view id() const override { return "elongation"; }
  std::string_view source() const override {
    return "thermal expansion alpha dT L and Hooke's law N L / (E A), first order";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.elongation && (grows_with_heat(effects) || axial_force(effects) > 0.0);
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override {
    std::vector<Symbol> symbols;
    if (grows_with_heat(effects)) {
      symbols.push_back(Symbol::alpha);
    }
    if (axial_force(effects) > 0.0 && !material.E_axial) {
      symbols.push_back(Symbol::E);
    }
    return symbols;
  }
  /// Both parts are taken together whatever their signs, and the largest axial force acts over the
  /// whole length: on the safe side. The sign of the change of temperature is not known.
  double utilisation(const CheckInput& input) const override {
    return input.factor * parts(input).sum() / *input.limits.elongation;
  }
  Explanation explain(const CheckInput& input) const override;
  /// The part of the force falls with the square of the scale; that of heat stays.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
        return Trend::falls;
      case Symbol::alpha:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation Elongation::explain(const CheckInput& input) const {
  const Parts p = parts(input);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Elongation: the length changes by " + millimetres(p.sum()) + " against a limit of " +
              millimetres(*input.limits.elongation) + ", factor " + number(input.factor) +
              ": u = " + number(u) + ".";
  if (grows_with_heat(input.effects)) {
    text.steps.push_back("Heat: alpha dT L = " + number(*input.material.alpha * 1e6) +
                         " um/(m K) x " + number(std::abs(input.effects.temperature_change)) +
                         " K x " + millimetres(input.length) + " = " + millimetres(p.heat) + ".");
  } else if (input.effects.temperature_change != 0.0) {
    text.steps.emplace_back("Heat: nothing, as the ends are restrained.");
  }
  if (axial_force(input.effects) > 0.0) {
    text.steps.push_back(
        "Axial force: N L / (E A) = " + kilonewtons(axial_force(input.effects)) + " x " +
        millimetres(input.length) + " / (" + gigapascals(axial_modulus(input.material)) + " x " +
        square_millimetres(input.section.area) + ") = " + millimetres(p.force) + ".");
  }
  text.steps.push_back("u = factor x change of length / limit = " + number(input.factor) + " x " +
                       millimetres(p.sum()) + " / " + millimetres(*input.limits.elongation) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& elongation_limit_state() {
  static const Elongation state;
  return state;
}

}  // namespace bismar::mechanics
