// SPDX-License-Identifier: MIT
#include <bismar/mechanics/material_index.hpp>

#include "mechanics/arguments.hpp"

#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// What each geometry over its power of the area is multiplied by.
ShapeFactors constants(ShapeReference reference) {
  return reference == ShapeReference::solid_circle
             ? ShapeFactors{4.0 * pi, 2.0 * pi, 4.0 * std::sqrt(pi), 2.0 * std::sqrt(pi)}
             : ShapeFactors{12.0, 7.14, 6.0, 4.8};
}

}  // namespace

double bending_shape_factor(double area, double second_moment, ShapeReference reference) {
  FaultList faults;
  mechanics::require_positive(faults, "area", area);
  mechanics::require_positive(faults, "second_moment", second_moment);
  faults.throw_if_any();
  return constants(reference).bending_stiffness * second_moment / (area * area);
}

ShapeFactors shape_factors(const SectionProperties& section, ShapeReference reference) {
  FaultList faults;
  mechanics::require_positive(faults, "area", section.area);
  mechanics::require_positive(faults, "I_y", section.I_y);
  mechanics::require_positive(faults, "I_t", section.I_t);
  mechanics::require_positive(faults, "W_el_y", section.W_el_y);
  mechanics::require_positive(faults, "W_t", section.W_t);
  faults.throw_if_any();
  const double A = section.area;
  const double A15 = A * std::sqrt(A);
  ShapeFactors phi = constants(reference);
  phi.bending_stiffness *= section.I_y / (A * A);
  phi.torsion_stiffness *= section.I_t / (A * A);
  phi.bending_strength *= section.W_el_y / A15;
  phi.torsion_strength *= section.W_t / A15;
  return phi;
}

double material_index(double property, double exponent, double density) {
  FaultList faults;
  mechanics::require_positive(faults, "property", property);
  mechanics::require_finite(faults, "exponent", exponent);
  mechanics::require_positive(faults, "density", density);
  faults.throw_if_any();
  return std::pow(property, exponent) / density;
}

}  // namespace bismar
