// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <string_view>

namespace bismar {

/// Standard tolerance of a grade: how far apart the limits of a size lie [m].
///
/// The listed values of the standard for nominal sizes up to 500 mm, not the formula behind them
/// (10 i to 250 i with i = 0.45 D^(1/3) + 0.001 D), from which they differ by up to 9 % because
/// they are rounded. The end of a range of sizes belongs to the smaller range: 30 mm lies in "above
/// 18 up to 30" (an end counts as reached within 1e-12 of its value).
///
/// @param grade  IT grade, 6 to 13.  @param size  Nominal size [m], above 0 up to 0.5.
/// @throws bismar::Error  out_of_range at "grade" or "size", not_finite at "size"; all at once.
/// Source: ISO 286-1:2010, table 1 (IT6, 7, 9, 10 seen in print, 12 and 13 up to 315 mm; IT8 and
/// IT11 from memory, they agree with the rule that a grade five higher is ten times as wide).
[[nodiscard]] BISMAR_API double standard_tolerance(int grade, double size);

/// Deviations from the nominal size [m]; upper >= lower.
struct SizeLimits {
  double upper = 0.0;
  double lower = 0.0;
};

/// Limits of a shaft, bar or rod of class h: upper 0, lower -IT.
///
/// @param tolerance_class  "h6" to "h13".  @param size  Nominal size [m], above 0 up to 0.5.
/// @throws bismar::Error  unknown_name at "tolerance_class"; out_of_range or not_finite at "size".
/// Source: ISO 286-1:2010 (fundamental deviation of h is 0); bright bar to EN 10278 comes in these
/// classes.
[[nodiscard]] BISMAR_API SizeLimits shaft_limits(std::string_view tolerance_class, double size);

/// The least area of a section whose every dimension is at its lower limit in proportion, over the
/// nominal area [-]: ((d + lower) / d)^2. For a round or square bar this is exact.
///
/// A size that just holds at its nominal dimension is short by this in a tie, by its 3/2 power in
/// the strength of a beam and by its square in stiffness.
/// @param limits  Deviations [m], lower > -size.  @param size  Nominal size d [m], > 0.
/// @throws bismar::Error  out_of_range or not_finite at "size" or "limits.lower".
[[nodiscard]] BISMAR_API double least_area_ratio(const SizeLimits& limits, double size);

}  // namespace bismar
