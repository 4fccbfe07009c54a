// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <numbers>

namespace bismar {

namespace {

// St Venant torsion of the hexagon with distance 1 across flats. Prandtl's function was written as
// -r^2/2 plus r^{6k} cos 6k theta and the corner functions Re (1 - z / z_corner)^{3/2 + 3j}, summed
// over the six corners, and fitted on a flat; with five terms of each kind the boundary value is
// met to 2e-18. The gradient in the middle of a flat agrees to 15 digits with that of the conformal
// map onto the disc.
constexpr double torsion_constant = 0.115050994404586537;
constexpr double torsion_modulus = 0.187673367640257059;

// Of z loads, S / b = (d^2/4) g with g(s) = (1/3 - s^2/2 + s^3/6) / (1 - s/2), s = 2 z / d: largest
// at the root s = 0.1936 of s^3 - 4.5 s^2 + 6 s - 1, where it is this times d^2.
constexpr double peak_moment_z = 0.0874120459904299407;
// Energy of g: A_s / A.
constexpr double shear_factor_z = 0.901156493765663766;

}  // namespace

SectionProperties solid_hexagon(double width_across_flats) {
  FaultList faults;
  mechanics::require_positive(faults, "width_across_flats", width_across_flats);
  faults.throw_if_any();

  constexpr double root = std::numbers::sqrt3;
  const double d = width_across_flats;
  const double square = d * d;
  const double cube = square * d;
  SectionProperties section;
  section.family = SectionFamily::solid_hexagon;
  section.height = section.wall = section.ruling_dimension = d;
  section.width = 2.0 / root * d;
  section.perimeter = 2.0 * root * d;
  section.area = root / 2.0 * square;
  section.I_y = section.I_z = 5.0 * root / 144.0 * square * square;
  section.W_el_y = 2.0 * section.I_y / d;
  section.W_el_z = 5.0 / 48.0 * cube;
  section.W_pl_y = cube / (3.0 * root);
  section.W_pl_z = 7.0 / 36.0 * cube;
  section.I_t = torsion_constant * square * square;
  section.W_t = torsion_modulus * cube;
  // S / b = 7/72 d^2 at the axis for y loads.
  section.A_v_y = section.I_z / (7.0 / 72.0 * square);
  section.A_v_z = section.I_y / (peak_moment_z * square);
  section.A_s_y = 0.9 * section.area;
  section.A_s_z = shear_factor_z * section.area;
  return section;
}

}  // namespace bismar
