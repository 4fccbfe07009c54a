// SPDX-License-Identifier: MIT
#include <bismar/mechanics/shaft.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <cmath>
#include <numbers>

namespace bismar {

namespace {

void require_strip(double stress, double long_side, double short_side) {
  FaultList faults;
  mechanics::require_positive(faults, "stress", stress);
  mechanics::require_positive(faults, "long_side", long_side);
  mechanics::require_positive(faults, "short_side", short_side);
  if (faults.empty() && short_side > long_side) {
    mechanics::add_out_of_range(faults, "short_side", short_side, "not greater than the long side");
  }
  faults.throw_if_any();
}

}  // namespace

double largest_shear_stress(double sigma, double tau) {
  FaultList faults;
  mechanics::require_finite(faults, "sigma", sigma);
  mechanics::require_finite(faults, "tau", tau);
  faults.throw_if_any();
  return std::hypot(sigma / 2.0, tau);
}

double rectangle_torque_estimate(double stress, double long_side, double short_side) {
  require_strip(stress, long_side, short_side);
  return stress * long_side * short_side * short_side / (3.0 + 1.8 * short_side / long_side);
}

double thin_strip_torque(double stress, double long_side, double short_side) {
  require_strip(stress, long_side, short_side);
  return stress * long_side * short_side * short_side / 3.0;
}

MidLine rectangular_mid_line(double height, double width, double wall) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "wall", wall);
  if (faults.empty() && (wall >= height || wall >= width)) {
    mechanics::add_out_of_range(faults, "wall", wall, "less than either side");
  }
  faults.throw_if_any();
  const double h = height - wall;
  const double b = width - wall;
  return {.enclosed_area = h * b, .length = 2.0 * (h + b)};
}

MidLine flat_oval_mid_line(double radius, double straight) {
  FaultList faults;
  mechanics::require_positive(faults, "radius", radius);
  mechanics::require_not_negative(faults, "straight", straight);
  faults.throw_if_any();
  const double circle = 2.0 * std::numbers::pi * radius;
  return {.enclosed_area = radius * (circle / 2.0 + 2.0 * straight),
          .length = circle + 2.0 * straight};
}

}  // namespace bismar
