// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <bismar/export.hpp>

#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// Materials that another one replaces: whatever size of whatever candidate the one can have, the
/// other can have too, no heavier and no dearer.
///
/// `d` replaces `m` where both are of one kind (class, group, standard, condition, forms,
/// processes, use, corrosion, finish bans follow from these; the same thickness steps; none named
/// by a stock list) and in each step and load case the same values are missing, density and price
/// of d are no higher, each material value that a limit state of this job reads is no worse by the
/// declared trends of all of them, and every other value is equal: rule, column law, weld and size
/// factors, and what one limit state wants high and another low (the yield strength of a section
/// with walls). Of equals the one that stands first in the table replaces the others.
///
/// Limits on properties and the service temperature count by whether each step meets them.
struct Dominance {
  static constexpr std::uint32_t none = UINT32_MAX;
  /// Per material of the table: one that is not replaced itself and replaces it, or `none`.
  std::vector<std::uint32_t> by;
  /// Per material: whether that one has a lower density in some step, so that a part of it may be
  /// too light for a route that makes the same part of this one.
  std::vector<char> is_lighter;
  std::size_t replaced = 0;
};

/// @param materials  Those that the job admits.
/// @param walls  Whether sections with walls are among the shapes and stock.
[[nodiscard]] BISMAR_API Dominance find_dominance(SizingProblem& problem,
                                                  std::span<const std::uint32_t> materials,
                                                  bool walls);

}  // namespace bismar
