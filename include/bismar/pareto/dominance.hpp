// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <span>

namespace bismar {

/// Whether the objective vector a dominates b (minimisation): a is not above b in any objective and
/// below it in at least one.
///
/// Comparison is exact, with no tolerance. Equal vectors do not dominate each other: they are ties.
/// -0.0 equals 0.0; an infinity is an ordinary worst or best value. A vector with a NaN dominates
/// nothing and is dominated by nothing; the fronts refuse it. Vectors of no objective are equal.
///
/// @param a  Objectives [k].
/// @param b  Objectives [k].
/// @throws bismar::Error  conflict: the lengths differ ("b").
[[nodiscard]] BISMAR_API bool dominates(std::span<const double> a, std::span<const double> b);

}  // namespace bismar
