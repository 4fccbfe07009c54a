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

/// With or without the part of shear, which alone reads the shear modulus: as one limit state it
/// would leave materials undecided for a value that the plain deflection does not need.
class Deflection final : public LimitState {
 public:
  explicit Deflection(bool with_shear)
      : with_shear_(with_shear),
        kind_(with_shear ? Deformation::deflection_with_shear : Deformation::deflection),
        bound_(with_shear ? DeformationBound::Kind::deflection_with_shear
                          : DeformationBound::Kind::deflection) {}

  std::string_view id() const override {
    return with_shear_ ? "deflection with shear" : "deflection";
  }
  std::string_view source() const override {
    return with_shear_
               ? "Timoshenko beam, shear to first order with the reactions of the slender member; "
                 "in compression raised by 1 / (1 - N / N_cr), N_cr with shear: Timoshenko and "
                 "Gere, Theory of Elastic Stability, 2nd ed., sections 1.11, 2.17 (from memory)"
               : "Euler-Bernoulli beam, shear deflection left out; in compression raised by "
                 "1 / (1 - N / N_cr): Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., "
                 "section 1.11 (section from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.deflection && limits.shear_deflection == with_shear_ &&
           is_deformed(effects, kind_);
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    std::vector<Symbol> symbols = {Symbol::E};
    if (with_shear_) {
      symbols.push_back(Symbol::G);
    }
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  /// The rise by compression is exact for a first-order deflection in the shape of the buckled
  /// member. Against the exact solutions near N_cr it is 3.2 % low for one moment over the whole
  /// length, 0.4 % low for a uniform load on two supports and on the safe side for a load at the
  /// tip or at midspan; loads that nearly cancel each other can be further off. Tension gets no
  /// credit. N_cr is taken with the E of bending, as the deflection is, and N with this limit
  /// state's factor.
  double utilisation(const CheckInput& input) const override {
    return input.factor * deformations(input, kind_).together() / *input.limits.deflection;
  }
  Explanation explain(const CheckInput& input) const override {
    const std::string size = millimetres(deformations(input, kind_).together());
    const double u = utilisation(input);
    Explanation text;
    text.line = std::string(with_shear_ ? "Deflection with shear: " : "Deflection: ") + size +
                " against a limit of " + millimetres(*input.limits.deflection) + ", factor " +
                number(input.factor) + ": u = " + number(u) + ".";
    text.steps = deformation_steps(input, kind_);
    text.steps.push_back("u = factor x deflection / limit = " + number(input.factor) + " x " +
                         size + " / " + millimetres(*input.limits.deflection) + " = " + number(u) +
                         ".");
    return text;
  }
  /// Second moments rise with the fourth power of the scale, and N_cr with them; own mass and the
  /// shear area with its square.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
        return Trend::falls;
      case Symbol::G:
        return with_shear_ ? Trend::falls : Trend::constant;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  bool with_shear_;
  Deformation kind_;
  DeformationBound bound_;
};

}  // namespace

const LimitState& deflection_limit_state() {
  static const Deflection state(false);
  return state;
}

const LimitState& shear_deflection_limit_state() {
  static const Deflection state(true);
  return state;
}

}  // namespace bismar::mechanics
