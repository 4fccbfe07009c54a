// SPDX-License-Identifier: MIT
#include <bismar/mechanics/shear_coefficient.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

namespace bismar {

namespace {

void require_poissons_ratio(FaultList& faults, double nu) {
  mechanics::require_not_negative(faults, "poissons_ratio", nu);
  if (nu > 0.5) {
    mechanics::add_out_of_range(faults, "poissons_ratio", nu, "between 0 and 0.5");
  }
}

void require_poissons_ratio(double nu) {
  FaultList faults;
  require_poissons_ratio(faults, nu);
  faults.throw_if_any();
}

/// What box and I share; the flanges' bending across the load is `across`.
double thin_walled(double m, double nu, double across) {
  const double web = 12.0 + m * (72.0 + m * (150.0 + m * 90.0));
  const double poisson = 11.0 + m * (66.0 + m * (135.0 + m * 90.0));
  return 10.0 * (1.0 + nu) * (1.0 + 3.0 * m) * (1.0 + 3.0 * m) / (web + nu * poisson + across);
}

void require_thin_walled(double m, double n, double nu) {
  FaultList faults;
  mechanics::require_not_negative(faults, "flange_ratio", m);
  mechanics::require_not_negative(faults, "width_ratio", n);
  require_poissons_ratio(faults, nu);
  faults.throw_if_any();
}

}  // namespace

double shear_coefficient_rectangle(double poissons_ratio) {
  require_poissons_ratio(poissons_ratio);
  return 10.0 * (1.0 + poissons_ratio) / (12.0 + 11.0 * poissons_ratio);
}

double shear_coefficient_circle(double poissons_ratio) {
  require_poissons_ratio(poissons_ratio);
  return 6.0 * (1.0 + poissons_ratio) / (7.0 + 6.0 * poissons_ratio);
}

double shear_coefficient_ellipse(double axis_ratio, double poissons_ratio) {
  FaultList faults;
  mechanics::require_positive(faults, "axis_ratio", axis_ratio);
  require_poissons_ratio(faults, poissons_ratio);
  faults.throw_if_any();
  // Over n^4, so that no square leaves the range of double before the answer does.
  const double nu = poissons_ratio;
  const double inverse = 1.0 / (axis_ratio * axis_ratio);
  return 12.0 * (1.0 + nu) * (3.0 + inverse) /
         ((40.0 + 37.0 * nu) + inverse * ((16.0 + 10.0 * nu) + inverse * nu));
}

double shear_coefficient_semicircle(double poissons_ratio) {
  require_poissons_ratio(poissons_ratio);
  return (1.0 + poissons_ratio) / (1.305 + 1.273 * poissons_ratio);
}

double shear_coefficient_round_tube(double radius_ratio, double poissons_ratio) {
  FaultList faults;
  mechanics::require_not_negative(faults, "radius_ratio", radius_ratio);
  if (radius_ratio > 1.0) {
    mechanics::add_out_of_range(faults, "radius_ratio", radius_ratio, "between 0 and 1");
  }
  require_poissons_ratio(faults, poissons_ratio);
  faults.throw_if_any();
  const double nu = poissons_ratio;
  const double m2 = radius_ratio * radius_ratio;
  const double square = (1.0 + m2) * (1.0 + m2);
  return 6.0 * (1.0 + nu) * square / ((7.0 + 6.0 * nu) * square + (20.0 + 12.0 * nu) * m2);
}

double shear_coefficient_thin_round_tube(double poissons_ratio) {
  require_poissons_ratio(poissons_ratio);
  return 2.0 * (1.0 + poissons_ratio) / (4.0 + 3.0 * poissons_ratio);
}

double shear_coefficient_thin_square_tube(double poissons_ratio) {
  require_poissons_ratio(poissons_ratio);
  return 20.0 * (1.0 + poissons_ratio) / (48.0 + 39.0 * poissons_ratio);
}

double shear_coefficient_thin_box(double flange_ratio, double width_ratio, double poissons_ratio) {
  require_thin_walled(flange_ratio, width_ratio, poissons_ratio);
  const double m = flange_ratio;
  const double nu = poissons_ratio;
  return thin_walled(m, nu, 10.0 * width_ratio * width_ratio * ((3.0 + nu) * m + 3.0 * m * m));
}

double shear_coefficient_i_section(double flange_ratio, double width_ratio, double poissons_ratio) {
  require_thin_walled(flange_ratio, width_ratio, poissons_ratio);
  const double m = flange_ratio;
  const double nu = poissons_ratio;
  const double n2 = width_ratio * width_ratio;
  return thin_walled(m, nu, 30.0 * n2 * (m + m * m) + 5.0 * nu * n2 * (8.0 * m + 9.0 * m * m));
}

}  // namespace bismar
