// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <cmath>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// K L / i about y and z; where these are no principal axes both of the weak one, with the longer
/// effective length.
struct Slendernesses {
  double about_y = 0.0;
  double about_z = 0.0;
};

bool is_askew(const SectionProperties& section) { return section.I_yz != 0.0; }

double weak_radius(const SectionProperties& section) {
  return std::sqrt(section.I_v() / section.area);
}

Slendernesses slendernesses(const CheckInput& input) {
  const LoadEffects& effects = input.effects;
  if (is_askew(input.section)) {
    const double longer = std::max(effects.buckling_length_y, effects.buckling_length_z);
    const double about_v = longer / weak_radius(input.section);
    return {.about_y = about_v, .about_z = about_v};
  }
  return {.about_y = effects.buckling_length_y / input.section.i_y(),
          .about_z = effects.buckling_length_z / input.section.i_z()};
}

double largest_slenderness(const CheckInput& input) {
  const Slendernesses both = slendernesses(input);
  return std::max(both.about_y, both.about_z);
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
    const Slendernesses both = slendernesses(input);
    const double u = utilisation(input);
    Explanation text;
    text.line = "Slenderness: K L / i = " + number(std::max(both.about_y, both.about_z)) +
                " against a cap of " + number(input.limits.slenderness) + ": u = " + number(u) +
                ".";
    if (is_askew(input.section)) {
      text.steps = {
          "About the weak principal axis: " +
          millimetres(std::max(input.effects.buckling_length_y, input.effects.buckling_length_z)) +
          " over i_v = " + millimetres(weak_radius(input.section)) + " = " + number(both.about_y) +
          "."};
      return text;
    }
    text.steps = {
        "About y: " + millimetres(input.effects.buckling_length_y) +
            " over i_y = " + millimetres(input.section.i_y()) + " = " + number(both.about_y) + ".",
        "About z: " + millimetres(input.effects.buckling_length_z) +
            " over i_z = " + millimetres(input.section.i_z()) + " = " + number(both.about_z) + "."};
    return text;
  }
  /// The radii of gyration rise with the scale.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// K L / i grows with A where I stays.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::slim;
  }
  Trend trend_with(Symbol) const override { return Trend::constant; }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  MaterialFreeBound bound_{*this};
};

}  // namespace

const LimitState& slenderness_limit_state() {
  static const Slenderness state;
  return state;
}

}  // namespace bismar::mechanics
