// SPDX-License-Identifier: MIT
#include "mechanics/scan_line.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::test {

ScanLine::ScanLine(double height, const std::function<double(double)>& width_at) {
  constexpr int strips = 40000;
  const double dz = height / 2.0 / strips;
  for (int k = 0; k < strips; ++k) {
    const double z = (k + 0.5) * dz;
    const double strip = width_at(z) * dz;
    area += 2.0 * strip;
    second_moment += 2.0 * strip * (z * z + dz * dz / 12.0);
    half_first_moment += strip * z;
  }
  double outside = 0.0;  // first moment of what lies beyond z
  for (int k = strips; k-- > 0;) {
    const double z = (k + 0.5) * dz;
    const double width = width_at(z);
    outside += width * z * dz;
    if (width > 0.0) {
      peak_shear = std::max(peak_shear, outside / (second_moment * width));
    }
  }
}

double rounded_width(double height, double width, double radius, double z) {
  if (z > height / 2.0) {
    return 0.0;
  }
  const double into_corner = z - (height / 2.0 - radius);
  if (radius <= 0.0 || into_corner <= 0.0) {
    return width;
  }
  const double half_chord = std::sqrt(std::max(0.0, radius * radius - into_corner * into_corner));
  return width - 2.0 * (radius - half_chord);
}

}  // namespace bismar::test
