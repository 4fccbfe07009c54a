// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

class TorsionalFlexuralBuckling final : public LimitState {
 public:
  std::string_view id() const override { return "torsional-flexural buckling"; }
  std::string_view source() const override {
    return "EN 1993-1-1:2005 6.3.1.4 with the column curve about z; critical load by Timoshenko "
           "and "
           "Gere, Theory of Elastic Stability, 2nd ed., section 5.5 (from memory); other materials "
           "by their own column curve";
  }
  /// On the load.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  /// Open sections. The ends are held against twist, free to warp, L_T is the length; with a free
  /// end twice the length.
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties& section) const override {
    return effects.compression > 0.0 && may_twist(section);
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial& material) const override {
    std::vector<Symbol> symbols = column_symbols(material);
    if (stability_reads_shear_modulus(material)) {
      symbols.push_back(Symbol::G);
    }
    return symbols;
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * input.effects.compression / twisting_resistance(input).load;
  }
  Explanation explain(const CheckInput& input) const override {
    const ColumnResistance r = twisting_resistance(input);
    const double u = utilisation(input);
    Explanation text;
    text.line = "Torsional-flexural buckling: " + number(input.factor) + " x " +
                kilonewtons(input.effects.compression) + " against " + kilonewtons(r.load) +
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
  /// N_cr is the least eigenvalue of diag(N_u, N_v, i_0^2 N_T) against a matrix of the ratio of the
  /// shear centre's offset to i_0, which does not change: it rises with each of the three, which
  /// grow at least with the square of the scale like A; so the slenderness does not rise.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// The twisting load has the polar radius of gyration in it.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::column;
  }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::E_05:
      case Symbol::G:
      case Symbol::sigma_y:
      case Symbol::compressive:
      case Symbol::weld_yield:
        return Trend::falls;
      default:
        return Trend::constant;
    }
  }
};

}  // namespace

const LimitState& torsional_flexural_buckling_limit_state() {
  static const TorsionalFlexuralBuckling state;
  return state;
}

}  // namespace bismar::mechanics
