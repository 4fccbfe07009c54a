// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

class Envelope final : public LimitState {
 public:
  std::string_view id() const override { return "envelope"; }
  std::string_view source() const override { return "limits of the job"; }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool reads_loads() const override { return false; }
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.height || limits.width;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override { return {}; }
  double utilisation(const CheckInput& input) const override {
    double ratio = 0.0;
    if (input.limits.height) {
      ratio = std::max(ratio, input.section.height / *input.limits.height);
    }
    if (input.limits.width) {
      ratio = std::max(ratio, input.section.width / *input.limits.width);
    }
    return input.factor * ratio;
  }
  Explanation explain(const CheckInput& input) const override {
    const double u = utilisation(input);
    Explanation text;
    if (input.limits.height) {
      text.steps.push_back("Height " + millimetres(input.section.height) + " against " +
                           millimetres(*input.limits.height) + ".");
    }
    if (input.limits.width) {
      text.steps.push_back("Width " + millimetres(input.section.width) + " against " +
                           millimetres(*input.limits.width) + ".");
    }
    text.line = "Envelope: section " + millimetres(input.section.height) + " high and " +
                millimetres(input.section.width) + " wide: u = " + number(u) + ".";
    return text;
  }
  Trend trend_with_scale() const override { return Trend::rises; }
  Trend trend_with(Symbol) const override { return Trend::constant; }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  MaterialFreeBound bound_{*this};
};

}  // namespace

const LimitState& envelope_limit_state() {
  static const Envelope state;
  return state;
}

}  // namespace bismar::mechanics
