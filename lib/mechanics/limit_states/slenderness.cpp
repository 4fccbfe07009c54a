// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

double largest_slenderness(const CheckInput& input) {
  return std::max(input.effects.buckling_length_y / input.section.i_y(),
                  input.effects.buckling_length_z / input.section.i_z());
}

class Slenderness final : public LimitState {
 public:
  std::string_view id() const override { return "slenderness"; }
  std::string_view source() const override {
    return "cap on K L / i of members in compression; common practice";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.compression > 0.0;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override { return {}; }
  double utilisation(const CheckInput& input) const override {
    return input.factor * largest_slenderness(input) / input.limits.slenderness;
  }
  Explanation explain(const CheckInput& input) const override {
    const double about_y = input.effects.buckling_length_y / input.section.i_y();
    const double about_z = input.effects.buckling_length_z / input.section.i_z();
    const double u = utilisation(input);
    Explanation text;
    text.line = "Slenderness: K L / i = " + number(std::max(about_y, about_z)) +
                " against a cap of " + number(input.limits.slenderness) + ": u = " + number(u) +
                ".";
    text.steps = {
        "About y: " + millimetres(input.effects.buckling_length_y) +
            " over i_y = " + millimetres(input.section.i_y()) + " = " + number(about_y) + ".",
        "About z: " + millimetres(input.effects.buckling_length_z) +
            " over i_z = " + millimetres(input.section.i_z()) + " = " + number(about_z) + "."};
    return text;
  }
  /// The radii of gyration rise with the scale.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol) const override { return Trend::constant; }
};

}  // namespace

const LimitState& slenderness_limit_state() {
  static const Slenderness state;
  return state;
}

}  // namespace bismar::mechanics
