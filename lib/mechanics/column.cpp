// SPDX-License-Identifier: MIT
#include <bismar/mechanics/column.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// A flange read as 40 mm from a table must stay 40 mm after the unit conversion.
constexpr double slack = 1.0 + 1e-9;

BucklingCurve rolled_i_curve(const SectionProperties& section, BendingAxis axis) {
  const double flange = section.ruling_dimension;
  const bool about_y = axis == BendingAxis::y;
  if (flange > 100e-3 * slack) {
    return BucklingCurve::d;
  }
  if (section.height > 1.2 * section.width && flange <= 40e-3 * slack) {
    return about_y ? BucklingCurve::a : BucklingCurve::b;
  }
  return about_y ? BucklingCurve::b : BucklingCurve::c;
}

}  // namespace

double euler_critical_load(double youngs_modulus, double second_moment, double effective_length) {
  FaultList faults;
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  mechanics::require_positive(faults, "second_moment", second_moment);
  mechanics::require_positive(faults, "effective_length", effective_length);
  faults.throw_if_any();
  return pi * pi * youngs_modulus * second_moment / (effective_length * effective_length);
}

double relative_slenderness(double area, double strength, double critical_load) {
  FaultList faults;
  mechanics::require_positive(faults, "area", area);
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "critical_load", critical_load);
  faults.throw_if_any();
  return std::sqrt(area * strength / critical_load);
}

double reduction_factor(const ColumnCurve& curve, double slenderness) {
  FaultList faults;
  mechanics::require_not_negative(faults, "curve.alpha", curve.alpha);
  mechanics::require_not_negative(faults, "curve.lambda_0", curve.lambda_0);
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  faults.throw_if_any();
  if (slenderness <= curve.lambda_0) {
    return 1.0;
  }
  const double phi =
      0.5 * (1.0 + curve.alpha * (slenderness - curve.lambda_0) + slenderness * slenderness);
  // Phi >= lambda because (1 - lambda)^2 >= 0; the product keeps the difference exact.
  const double root = std::sqrt(std::max(0.0, phi - slenderness) * (phi + slenderness));
  return std::min(1.0, 1.0 / (phi + root));
}

ColumnCurve steel_curve(BucklingCurve curve) {
  switch (curve) {
    case BucklingCurve::a0:
      return {.alpha = 0.13, .lambda_0 = 0.2};
    case BucklingCurve::a:
      return {.alpha = 0.21, .lambda_0 = 0.2};
    case BucklingCurve::b:
      return {.alpha = 0.34, .lambda_0 = 0.2};
    case BucklingCurve::c:
      return {.alpha = 0.49, .lambda_0 = 0.2};
    case BucklingCurve::d:
      return {.alpha = 0.76, .lambda_0 = 0.2};
  }
  throw InternalError("buckling curve without an imperfection factor");
}

ColumnCurve aluminium_curve(bool class_a) {
  return class_a ? ColumnCurve{.alpha = 0.20, .lambda_0 = 0.10}
                 : ColumnCurve{.alpha = 0.32, .lambda_0 = 0.0};
}

ColumnCurve timber_curve(bool glued) { return {.alpha = glued ? 0.1 : 0.2, .lambda_0 = 0.3}; }

BucklingCurve buckling_curve(const SectionProperties& section, BendingAxis axis) {
  switch (section.family) {
    case SectionFamily::i_section:
      return section.forming == Forming::hot_finished ? rolled_i_curve(section, axis)
                                                      : BucklingCurve::c;
    case SectionFamily::round_tube:
    case SectionFamily::elliptical_tube:
    case SectionFamily::rectangular_tube:
      return section.forming == Forming::hot_finished ? BucklingCurve::a : BucklingCurve::c;
    case SectionFamily::solid_round:
    case SectionFamily::solid_square:
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::solid_hexagon:
    case SectionFamily::channel:
    case SectionFamily::tee:
    case SectionFamily::polygon:
      return BucklingCurve::c;
    case SectionFamily::angle:
      return BucklingCurve::b;
  }
  throw InternalError("section family without a buckling curve");
}

double johnson_critical_load(double area,
                             double yield_strength,
                             double youngs_modulus,
                             double slenderness) {
  FaultList faults;
  mechanics::require_positive(faults, "area", area);
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  mechanics::require_positive(faults, "slenderness", slenderness);
  faults.throw_if_any();
  const double transition = std::sqrt(2.0 * pi * pi * youngs_modulus / yield_strength);
  if (slenderness >= transition) {
    return area * pi * pi * youngs_modulus / (slenderness * slenderness);
  }
  const double ratio = slenderness / transition;
  return area * yield_strength * (1.0 - ratio * ratio / 2.0);
}

double secant_stress(const EccentricColumn& column) {
  FaultList faults;
  mechanics::require_positive(faults, "load", column.load);
  mechanics::require_positive(faults, "area", column.area);
  mechanics::require_positive(faults, "radius_of_gyration", column.radius_of_gyration);
  mechanics::require_positive(faults, "effective_length", column.effective_length);
  mechanics::require_positive(faults, "youngs_modulus", column.youngs_modulus);
  mechanics::require_not_negative(faults, "eccentricity", column.eccentricity);
  mechanics::require_positive(faults, "fibre_distance", column.fibre_distance);
  faults.throw_if_any();
  const double r = column.radius_of_gyration;
  const double angle = column.effective_length / (2.0 * r) *
                       std::sqrt(column.load / (column.youngs_modulus * column.area));
  if (angle >= pi / 2.0) {
    return std::numeric_limits<double>::infinity();
  }
  const double magnified = column.eccentricity * column.fibre_distance / (r * r) / std::cos(angle);
  return column.load / column.area * (1.0 + magnified);
}

double aisc_critical_stress(double yield_strength, double youngs_modulus, double slenderness) {
  FaultList faults;
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  mechanics::require_positive(faults, "slenderness", slenderness);
  faults.throw_if_any();
  const double elastic = pi * pi * youngs_modulus / (slenderness * slenderness);
  if (slenderness <= 4.71 * std::sqrt(youngs_modulus / yield_strength)) {
    return std::pow(0.658, yield_strength / elastic) * yield_strength;
  }
  return 0.877 * elastic;
}

}  // namespace bismar
