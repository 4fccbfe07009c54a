// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/text.hpp"

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

class FlexuralBuckling final : public LimitState {
 public:
  std::string_view id() const override { return "flexural buckling"; }
  std::string_view source() const override {
    return "EN 1993-1-1:2005 6.3.1; EN 1999-1-1:2007 6.3.1 (a weld across the member lowers the "
           "strength); EN 1995-1-1:2004 6.3.2; Johnson's parabola on request";
  }
  /// On the load.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.compression > 0.0;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial& material) const override {
    return column_symbols(material);
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * input.effects.compression / least_column_resistance(input).load;
  }
  Explanation explain(const CheckInput& input) const override;
  /// With the scale k, A f rises with k^2 and N_cr with k^4, so that the slenderness falls, chi
  /// does not fall and N_b = chi A f rises. The curve of a rolled I can change for the worse where
  /// its flange passes 40 or 100 mm: a step that lies between sizes of a stock list, and a border
  /// between pieces where such a section is scaled. Johnson's parabola rises with A and falls with
  /// the slenderness.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// E: N_cr rises. Strength: N_b = y N_cr with y = chi lambda^2, and by the curve's own equation
  /// (lambda^2 - y)(1 - y) = alpha (lambda - lambda_0) y the sign of dy/dlambda is that of
  /// 2 lambda (1 - y) - alpha y, which is positive because lambda^2 - 2 lambda_0 lambda + y >= 0.
  /// Johnson: d/dS of S (1 - S s^2 / (4 pi^2 E)) is positive before the parabola's end.
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
  const SeparableBound* separable() const override { return &bound_; }

 private:
  FlexuralBound bound_;
};

Explanation FlexuralBuckling::explain(const CheckInput& input) const {
  const ColumnResistance r = least_column_resistance(input);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Flexural buckling " + std::string(name(r.mode)) + ": " + number(input.factor) +
              " x " + kilonewtons(input.effects.compression) + " against " + kilonewtons(r.load) +
              ": u = " + number(u) + ".";
  text.steps.push_back(critical_load_step(input, r));
  for (std::string& step : resistance_steps(input, r)) {
    text.steps.push_back(std::move(step));
  }
  add_method_warning(input, text);
  text.steps.push_back("u = factor x load / resistance = " + number(input.factor) + " x " +
                       kilonewtons(input.effects.compression) + " / " + kilonewtons(r.load) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& flexural_buckling_limit_state() {
  static const FlexuralBuckling state;
  return state;
}

}  // namespace bismar::mechanics
