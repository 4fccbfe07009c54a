// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/study.hpp"

namespace bismar {

/// Solves what can be on the front or near it, and no more.
///
/// Materials are screened first: what they fail by themselves, which of them another replaces, and
/// lower bounds of mass and cost of each. Then they are taken in the order of those bounds; what
/// the points found so far beat by more than max(epsilon, near) in both objectives is left out. So
/// the designs that are kept do not depend on the order, on threads, or on which reductions are on.
///
/// Outcomes kept are those that may be on or near the front; the others are counted.
[[nodiscard]] Solved search_front(const Part& part,
                                  const Catalogue& catalogue,
                                  const Settings& settings,
                                  const RunOptions& run);

}  // namespace bismar
