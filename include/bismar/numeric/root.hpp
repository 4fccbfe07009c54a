// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/numeric/function_ref.hpp>

#include <optional>

namespace bismar {

/// When a search ends.
struct RootOptions {
  /// w, 0 <= w < 1: done when (larger - smaller) <= w * larger for the two ends of the bracket, or
  /// when no double lies between them. 0 asks for neighbouring doubles.
  double relative_width = 1e-12;
};

/// The two sides of the place where a monotone function crosses 1.
struct LimitBracket {
  /// x on the feasible side: g(x) <= 1 as evaluated. Absent: not even the feasible end of the range
  /// is feasible, so for a monotone g nothing in the range is.
  std::optional<double> x = {};
  double value = 0.0;  ///< g at x as evaluated; without x, g at the feasible end of the range.
  /// The nearest x known to be infeasible: g > 1 as evaluated. Absent: the whole range is feasible,
  /// or nothing in it.
  std::optional<double> infeasible = {};
  int evaluations = 0;  ///< How often g was called.
};

/// The smallest x in [lo, hi] with g(x) <= 1, for a g that falls (or stays level) as x grows: the
/// least size whose utilisation g(x) is not above 1.
///
/// The x returned is on the feasible side: g was evaluated there and was <= 1. For a monotone g the
/// true crossing lies between `infeasible` and `x`, so x is too large by at most the width of
/// RootOptions. Jumps, plateaus and kinks are allowed; g may be +infinity anywhere (infeasible),
/// and zero or negative (feasible). For a g that is not monotone the two evaluated facts still
/// hold, g(x) <= 1 and g(infeasible) > 1, but a smaller feasible x may exist.
///
/// Method: inverse quadratic and secant steps on ln g against ln x, doubled when they stay on one
/// side, so that a power law takes 4 or 5 evaluations; each step is held inside a band that shrinks
/// like bisection of ln x, so that any g ends after at most
///
///     12 + ceil(log2(ln(hi / lo) / max(w, 2^-53)))
///
/// evaluations (57 for hi / lo = 1e6 and w = 1e-12). The projection on that band is the safeguard
/// of Oliveira and Takahashi, An Enhancement of the Bisection Method Average Performance Preserving
/// Minmax Optimality, ACM Trans. Math. Softw. 47 (2021) 5; the test for the inverse quadratic step
/// is that of Chandrupatla, Adv. Eng. Softw. 28 (1997) 145-149. (Both from memory; the bound is
/// held by the tests, not by the citation.)
///
/// @param g   The function; called with x in [lo, hi] only, hi first, then lo.
/// @param lo  0 < lo <= hi.
/// @param hi  Finite.
/// @throws bismar::Error  invalid_argument: the range or the width is not as above ("lo", "hi",
///         "relative_width"); not_finite: g returned NaN ("g"). What g throws passes through.
[[nodiscard]] BISMAR_API LimitBracket smallest_feasible(FunctionRef<double(double)> g,
                                                        double lo,
                                                        double hi,
                                                        const RootOptions& options = {});

/// The largest x in [lo, hi] with g(x) <= 1, for a g that rises (or stays level) as x grows. The
/// mirror of `smallest_feasible`: lo is evaluated first, then hi; x is too small by at most the
/// width of RootOptions. All else as there.
[[nodiscard]] BISMAR_API LimitBracket largest_feasible(FunctionRef<double(double)> g,
                                                       double lo,
                                                       double hi,
                                                       const RootOptions& options = {});

}  // namespace bismar
