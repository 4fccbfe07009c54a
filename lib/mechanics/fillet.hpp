// SPDX-License-Identifier: MIT
#pragma once

#include <numbers>

namespace bismar::mechanics {

/// The region between a right-angled corner and a circular arc of radius r that touches both sides:
/// what a root fillet adds, and what a rounded corner takes away. Exact.
struct Spandrel {
  double area = 0.0;  ///< (1 - pi/4) r^2 [m^2].
  double s = 0.0;     ///< First moment about a side, (5/6 - pi/4) r^3 [m^3].
  double i = 0.0;     ///< Second moment about a side, (1 - 5 pi/16) r^4 [m^4].

  /// First moment about a line parallel to the side at distance d, spandrel between the two.
  [[nodiscard]] double first_moment(double d) const { return d * area - s; }
  /// Second moment about that line.
  [[nodiscard]] double second_moment(double d) const { return i - 2.0 * d * s + d * d * area; }
};

// Square r^2 less the quarter disc about the opposite corner, whose first moment about the side is
// r (pi r^2 / 4) - r^3 / 3 and whose second moment is (5 pi / 16 - 2/3) r^4.
[[nodiscard]] inline Spandrel spandrel(double radius) {
  constexpr double pi = std::numbers::pi;
  const double square = radius * radius;
  return {.area = (1.0 - pi / 4.0) * square,
          .s = (5.0 / 6.0 - pi / 4.0) * square * radius,
          .i = (1.0 - 5.0 * pi / 16.0) * square * square};
}

}  // namespace bismar::mechanics
