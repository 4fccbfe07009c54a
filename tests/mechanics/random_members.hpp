// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>

#include <random>

namespace bismar::test {

/// A random section of any family with fixed ratios; `scale` multiplies every dimension.
class RandomSection {
 public:
  explicit RandomSection(std::mt19937& random);
  [[nodiscard]] SectionProperties at(double scale) const;

 private:
  int family_ = 0;
  double height_ = 0.0;
  double width_ratio_ = 1.0;
  double wall_ratio_ = 0.1;
  double slope_ = 0.0;
  Forming forming_ = Forming::unknown;
};

/// Loads of every kind on a member of the given length held in any way, sometimes direct forces
/// alone; now and then with own mass, eccentricity, heat or fatigue.
LoadCase random_load_case(std::mt19937& random, double length);
/// A material of any rule and column law with all values present.
MemberMaterial random_material(std::mt19937& random);
/// Every limit set, details of the making now and then.
MemberLimits random_limits(std::mt19937& random, double length);

}  // namespace bismar::test
