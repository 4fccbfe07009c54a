// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/numeric/function_ref.hpp>
#include <bismar/solver/box_problem.hpp>

#include <cstddef>
#include <optional>
#include <vector>

namespace bismar {

/// One stretch of one variable without a breakpoint inside.
struct Stretch {
  double lower = 0.0;
  double upper = 0.0;
};

/// How many stretches [lower, upper] of a variable has: a set one a value, a continuous variable
/// one a piece, an integer one, because its trends hold over its whole range.
[[nodiscard]] std::size_t count_stretches(const Variable& variable, double lower, double upper);

/// Appends those stretches, ascending. A piece is (previous breakpoint, this one], so the next
/// starts at the next double.
void append_stretches(const Variable& variable,
                      double lower,
                      double upper,
                      std::vector<Stretch>& out);

/// Whether a breakpoint of the variable splits [lower, upper].
[[nodiscard]] bool has_breakpoint_inside(const Variable& variable, double lower, double upper);

/// The least x in [from, to] at which the largest falling utilisation is at most 1, to adjacent
/// doubles or a relative width of 1e-12 (of x, or of the range where it reaches zero or below), on
/// the feasible side. Nothing: not even `to` is.
[[nodiscard]] std::optional<double> least_on_piece(FunctionRef<double(double)> largest_falling,
                                                   double from,
                                                   double to);

}  // namespace bismar
