// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <functional>
#include <limits>
#include <optional>
#include <span>
#include <vector>

namespace bismar {

/// A design of one size x as its sensitivities see it: the least x in [lower, upper] at which every
/// utilisation u_i(x; p) is at most 1, with an objective m(x; p) that rises with x.
///
/// The callables are called near `size` and `parameters` only, never with an x outside
/// [lower, upper], from the calling thread. There they must be positive and smooth; a utilisation
/// that is below 1 may be anything.
struct SizedDesign {
  /// m(x; p), > 0.
  std::function<double(double x, std::span<const double> parameters)> objective;
  /// u(x; p), written to the span of `constraints` values.
  std::function<void(double x, std::span<const double> parameters, std::span<double> utilisations)>
      utilisations;
  std::size_t constraints = 0;
  double size = 0.0;                                  ///< x, the optimum itself, > 0.
  std::vector<double> parameters;                     ///< p, each > 0.
  double lower = 0.0;                                 ///< Least x; a bound where x stands at it.
  double upper = std::numeric_limits<double>::max();  ///< Largest x.
};

/// When a limit counts as active, and how derivatives are taken.
struct SensitivityOptions {
  /// A limit is active where u >= 1 - active, a bound where |x - bound| <= active x. 0 < active
  /// < 1.
  double active = 1e-8;
  /// h, the step of the logarithms that differences are taken over, 1e-6 <= h <= 0.1.
  double step = 1e-3;
};

/// A derivative from both sides of where a parameter stands.
///
/// They differ where two limits are active together (a coupling), or a limit and a bound of x.
/// Absent: on that side of the parameter no size is feasible.
struct SidedValue {
  std::optional<double> below = {};  ///< While the parameter falls.
  std::optional<double> above = {};  ///< While it rises.
  friend bool operator==(const SidedValue&, const SidedValue&) = default;
};

/// One active limit.
struct ActiveLimit {
  std::size_t constraint = 0;  ///< Its index.
  /// lambda = - (dm/dx) / (du/dx) if it alone held the size: what the objective gains a unit of
  /// utilisation that is allowed beyond 1 [unit of m]. Absent for a limit that the size does not
  /// move (level in x).
  std::optional<double> multiplier = {};
  /// The same without unit, d ln m / d ln u = lambda / m: the share by which the objective falls a
  /// share by which the limit is relaxed.
  std::optional<double> relative_multiplier = {};
};

struct Sensitivity {
  std::vector<ActiveLimit> active;  ///< By index.
  bool at_lower = false;            ///< x stands at its lower bound.
  bool at_upper = false;
  std::vector<SidedValue> size;       ///< d ln x / d ln p, one a parameter.
  std::vector<SidedValue> objective;  ///< d ln m / d ln p, one a parameter.
};

/// How an optimum of one size moves with its parameters: elasticities of size and objective.
///
/// With the active limits i (u_i = 1), by the implicit function theorem on u_i(x; p) = 1 and the
/// envelope of the objective,
///
///     dx_i/dp = - (du_i/dp) / (du_i/dx)
///     dm/dp   = (dm/dp at fixed x) + lambda_i (du_i/dp),   lambda_i = - (dm/dx) / (du_i/dx)
///
/// A limit that falls with x, or the lower bound (dx/dp = 0), holds the size from below. The size
/// is the largest of what they ask for, so that the limit with the largest dx_i/dp counts while p
/// rises, and the one with the smallest while p falls. Active limits that rise with x, and the
/// upper bound, hold from above: a side on which what holds from below would pass them has no
/// feasible size. A level limit (|d ln u / d ln x| <= 1e-9) that is active closes the side on which
/// it rises with p by more than that.
///
/// Not for a utilisation with a kink of its own at the optimum (a largest of several stresses that
/// change places just there): give its branches as limits of their own. A difference across a kink
/// is the mean of both sides.
///
/// Derivatives: central differences of the logarithms over h and h/2 with one Richardson step;
/// within 2 h of a bound one-sided over h, h/2 and h/4 with two; over less where the bounds are
/// closer. So a power law is exact to rounding, and a smooth function has a relative error of the
/// order of h^4 (one-sided h^3): at the default step below 1e-9 (one-sided 1e-7) for functions
/// whose own rounding is of the order of 1e-15.
///
/// @param design  See its fields.
/// @throws bismar::Error, all faults of the arguments at once, the place being the field:
///   out_of_range or not_finite: size, parameters, bounds, options, or an objective or active
///   utilisation that is not finite and above zero; conflict at "size": it is no optimum (a limit
///   above 1 + active, nothing active that holds it from below, or an objective that falls with x).
///
/// Source: implicit function theorem and envelope theorem of constrained optimisation, for instance
/// Fiacco, Introduction to Sensitivity and Stability Analysis in Nonlinear Programming, 1983 (from
/// memory); derived above. Richardson extrapolation: Richardson, Phil. Trans. R. Soc. A 226 (1927)
/// 299 (from memory).
[[nodiscard]] BISMAR_API Sensitivity sensitivity(const SizedDesign& design,
                                                 const SensitivityOptions& options = {});

}  // namespace bismar
