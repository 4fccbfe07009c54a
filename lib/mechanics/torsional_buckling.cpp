// SPDX-License-Identifier: MIT
#include <bismar/mechanics/torsional_buckling.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

void require_section(FaultList& faults, const SectionProperties& section) {
  mechanics::require_positive(faults, "section.area", section.area);
  mechanics::require_positive(faults, "section.I_y", section.I_y);
  mechanics::require_positive(faults, "section.I_z", section.I_z);
}

void require_column(FaultList& faults,
                    const SectionProperties& section,
                    const TorsionalColumn& column) {
  require_section(faults, section);
  mechanics::require_positive(faults, "section.I_t", section.I_t);
  mechanics::require_not_negative(faults, "section.I_w", section.I_w);
  mechanics::require_positive(faults, "column.youngs_modulus", column.youngs_modulus);
  mechanics::require_positive(faults, "column.shear_modulus", column.shear_modulus);
  mechanics::require_positive(faults, "column.length", column.length);
}

/// Bending about one axis, `offset` being the shear centre's distance along that axis, and twist.
double coupled(double bending, double torsion, double offset_squared, double polar_squared) {
  const double share = 1.0 - offset_squared / polar_squared;
  const double sum = bending + torsion;
  // The smaller root of share N^2 - (N_b + N_T) N + N_b N_T = 0, without cancellation.
  const double root = std::sqrt(std::max(0.0, sum * sum - 4.0 * bending * torsion * share));
  return 2.0 * bending * torsion / (sum + root);
}

}  // namespace

ShearCentre principal_shear_centre(const SectionProperties& section) {
  FaultList faults;
  require_section(faults, section);
  faults.throw_if_any();
  const double angle = section.principal_angle();
  return {.u = section.y_shear * std::cos(angle) + section.z_shear * std::sin(angle),
          .v = section.z_shear * std::cos(angle) - section.y_shear * std::sin(angle)};
}

double polar_radius_squared(const SectionProperties& section) {
  FaultList faults;
  require_section(faults, section);
  faults.throw_if_any();
  return (section.I_y + section.I_z) / section.area + section.y_shear * section.y_shear +
         section.z_shear * section.z_shear;
}

double torsional_critical_load(const SectionProperties& section, const TorsionalColumn& column) {
  FaultList faults;
  require_column(faults, section, column);
  faults.throw_if_any();
  const double warping =
      pi * pi * column.youngs_modulus * section.I_w / (column.length * column.length);
  return (column.shear_modulus * section.I_t + warping) / polar_radius_squared(section);
}

double torsional_flexural_critical_load(const SectionProperties& section,
                                        const TorsionalColumn& column,
                                        double major,
                                        double minor) {
  FaultList faults;
  require_column(faults, section, column);
  mechanics::require_positive(faults, "major", major);
  mechanics::require_positive(faults, "minor", minor);
  faults.throw_if_any();
  const double torsion = torsional_critical_load(section, column);
  const double polar = polar_radius_squared(section);
  const ShearCentre centre = principal_shear_centre(section);
  const double along_u = centre.u * centre.u;
  const double along_v = centre.v * centre.v;
  // An axis of symmetry holds the shear centre but for rounding.
  if (along_v <= 1e-18 * polar) {
    return std::min(minor, coupled(major, torsion, along_u, polar));
  }
  if (along_u <= 1e-18 * polar) {
    return std::min(major, coupled(minor, torsion, along_v, polar));
  }
  // Below its first root the cubic is negative. By interlacing the second root is not below the
  // lesser Euler load, and the first one not above any of the three.
  const auto cubic = [&](double N) {
    return polar * (N - major) * (N - minor) * (N - torsion) -
           N * N * (along_u * (N - minor) + along_v * (N - major));
  };
  double low = 0.0;
  double high = std::min({major, minor, torsion});
  for (int step = 0; step < 100 && low < high; ++step) {
    const double middle = low + (high - low) / 2.0;
    if (middle <= low || middle >= high) {
      break;
    }
    (cubic(middle) < 0.0 ? low : high) = middle;
  }
  return low;
}

}  // namespace bismar
