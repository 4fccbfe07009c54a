// SPDX-License-Identifier: MIT
#pragma once

#include <functional>

namespace bismar::test {

/// A section whose material at depth z, measured from mid-height and mirrored about it, is one
/// strip or several of total width width_at(z). Midpoint sums over many thin strips: slow, plain,
/// and independent of the library's closed forms.
struct ScanLine {
  double area = 0.0;
  double second_moment = 0.0;
  double half_first_moment = 0.0;
  double peak_shear = 0.0;  ///< Largest S(z) / (I b(z)): peak shear stress for V = 1.

  ScanLine(double height, const std::function<double(double)>& width_at);
};

/// One or two rounded corners off a full width: width at depth z of a rectangle height x width with
/// corner radius r.
double rounded_width(double height, double width, double radius, double z);

}  // namespace bismar::test
