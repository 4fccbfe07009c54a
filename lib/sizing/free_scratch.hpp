// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/free_problem.hpp"

#include <array>
#include <cstddef>

namespace bismar {

/// Dimensions of any family, radii and slopes included.
inline constexpr std::size_t max_dimensions = 6;

/// Places of the constraints that a problem of free sizes adds behind those of the candidate.
struct FreeConstraint {
  static constexpr std::size_t thickness_above = 0;
  static constexpr std::size_t thickness_up_to = 1;
  static constexpr std::size_t blank = 2;
  static constexpr std::size_t section = 3;
  static constexpr std::size_t other_blank = 4;  ///< Falls with the size.
  static constexpr std::size_t first_proportion = 5;
};

/// What bounding a box needs, made once for a batch.
struct FreeSizeProblem::Scratch {
  static constexpr std::size_t kinds = 8;  ///< Of best sections, and room for more.

  SectionBox box;
  std::array<SectionProperties, kinds> best;  ///< Of the box, where made ...
  std::array<bool, kinds> made{};             ///< ... for this box.
  SectionProperties scaled;                   ///< A best section at a size.
  SectionProperties lower;                    ///< The least of what mass and cost look at.
  std::array<Interval, max_dimensions> dimensions;
  std::size_t count = 0;              ///< Dimensions of the box, without radii.
  std::vector<MemberMaterial> light;  ///< Per load case, lightened for this box.
  bool enclosed = false;              ///< Else only `rough_area` is known.
  double rough_area = 0.0;            ///< [m^2]
};

}  // namespace bismar
