// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/box_problem.hpp>

namespace bismar {

/// Ends of the two parts of a stretch of a variable. Parts of a continuous variable share the place
/// where it was cut, unless that is a breakpoint.
struct Parts {
  double lower_end = 0.0;
  double upper_begin = 0.0;
};

/// The whole of a variable: for whole numbers and sets the first and last value.
[[nodiscard]] Parts whole_range(const Variable& variable);

/// A value of the variable near the middle of [lower, upper]: geometric where the whole range is
/// positive.
[[nodiscard]] double middle_of(const Variable& variable, double lower, double upper);

/// Cuts lower < upper in two: at the breakpoint nearest the middle where one lies inside, otherwise
/// in the middle; neighbouring doubles or values become single ones.
[[nodiscard]] Parts cut_in_two(const Variable& variable, double lower, double upper);

/// Width of [lower, upper] as the middle counts: difference of logarithms, or of values; ranks for
/// a set.
[[nodiscard]] double width_of(const Variable& variable, double lower, double upper);

/// Moves the ends inward to values of the variable. @return false: there is none left.
[[nodiscard]] bool snap_inward(const Variable& variable, double& lower, double& upper);

}  // namespace bismar
