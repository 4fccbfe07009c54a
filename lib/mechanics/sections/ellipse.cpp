// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/sections/ellipse_circumference.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

}  // namespace

namespace mechanics {

double ellipse_circumference(double semi_axis, double other_semi_axis) {
  const double semi_major = std::max(semi_axis, other_semi_axis);
  const double semi_minor = std::min(semi_axis, other_semi_axis);
  double a = semi_major;
  double b = semi_minor;
  double sum = (semi_major * semi_major - semi_minor * semi_minor) / 2.0;
  double weight = 0.5;
  while (a - b > 1e-16 * a) {
    const double c = (a - b) / 2.0;
    const double mean = (a + b) / 2.0;
    b = std::sqrt(a * b);
    a = mean;
    weight *= 2.0;
    sum += weight * c * c;
    if (c < 1e-9 * a) {
      break;  // the next c is c^2 / (4a): below rounding
    }
  }
  return 2.0 * pi / a * (semi_major * semi_major - sum);
}

}  // namespace mechanics

SectionProperties solid_ellipse(double height, double width) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  faults.throw_if_any();

  const double a = height / 2.0;
  const double b = width / 2.0;
  const double least = std::min(a, b);
  SectionProperties section;
  section.family = SectionFamily::solid_ellipse;
  section.height = height;
  section.width = width;
  section.wall = section.ruling_dimension = std::min(height, width);
  section.perimeter = mechanics::ellipse_circumference(a, b);
  section.area = pi * a * b;
  section.I_y = pi / 4.0 * a * a * a * b;
  section.I_z = pi / 4.0 * b * b * b * a;
  section.W_el_y = pi / 4.0 * a * a * b;
  section.W_el_z = pi / 4.0 * b * b * a;
  section.W_pl_y = 4.0 / 3.0 * a * a * b;
  section.W_pl_z = 4.0 / 3.0 * b * b * a;
  // Exact St Venant solution; the peak is at the ends of the minor axis.
  section.I_t = pi * a * a * a * b * b * b / (a * a + b * b);
  section.W_t = pi / 2.0 * a * b * least;
  section.A_v_y = section.A_v_z = 0.75 * section.area;  // V S / (I b) = 4 V / (3 A)
  section.A_s_y = section.A_s_z = 0.9 * section.area;
  section.smooth_outline = true;
  return section;
}

}  // namespace bismar
