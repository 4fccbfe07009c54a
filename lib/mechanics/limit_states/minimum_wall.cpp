// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/text.hpp"

#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

class MinimumWall final : public LimitState {
 public:
  std::string_view id() const override { return "minimum wall"; }
  std::string_view source() const override { return "limits of the job"; }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool reads_loads() const override { return false; }
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.wall.has_value();
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override { return {}; }
  double utilisation(const CheckInput& input) const override {
    return input.factor * *input.limits.wall / input.section.wall;
  }
  Explanation explain(const CheckInput& input) const override {
    const double u = utilisation(input);
    Explanation text;
    text.line = "Minimum wall: " + millimetres(input.section.wall) + " where at least " +
                millimetres(*input.limits.wall) + " is asked for: u = " + number(u) + ".";
    text.steps = {"u = least wall asked for / least wall = " + millimetres(*input.limits.wall) +
                  " / " + millimetres(input.section.wall) + " = " + number(u) + "."};
    return text;
  }
  /// The wall rises with the scale.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol) const override { return Trend::constant; }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  MaterialFreeBound bound_{*this};
};

}  // namespace

const LimitState& minimum_wall_limit_state() {
  static const MinimumWall state;
  return state;
}

}  // namespace bismar::mechanics
