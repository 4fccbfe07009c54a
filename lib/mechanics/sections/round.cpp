// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

}  // namespace

SectionProperties solid_round(double diameter) {
  FaultList faults;
  mechanics::require_positive(faults, "diameter", diameter);
  faults.throw_if_any();

  const double square = diameter * diameter;
  SectionProperties section;
  section.family = SectionFamily::solid_round;
  section.height = section.width = section.wall = section.ruling_dimension = diameter;
  section.perimeter = pi * diameter;
  section.area = pi / 4.0 * square;
  section.I_y = section.I_z = pi / 64.0 * square * square;
  section.W_el_y = section.W_el_z = pi / 32.0 * square * diameter;
  section.W_pl_y = section.W_pl_z = square * diameter / 6.0;
  section.I_t = 2.0 * section.I_y;
  section.W_t = 2.0 * section.W_el_y;
  section.A_v_y = section.A_v_z = 0.75 * section.area;  // tau = 4 V / (3 A)
  section.A_s_y = section.A_s_z = 0.9 * section.area;   // the energy of V S / (I b)
  section.smooth_outline = true;
  return section;
}

SectionProperties round_tube(double diameter, double wall, Forming forming) {
  FaultList faults;
  mechanics::require_positive(faults, "diameter", diameter);
  mechanics::require_positive(faults, "wall", wall);
  if (faults.empty() && wall >= diameter / 2.0) {
    mechanics::add_out_of_range(faults, "wall", wall, "less than half the diameter");
  }
  faults.throw_if_any();

  const double bore = diameter - 2.0 * wall;
  // D^n - d^n in factors, so that a thin wall does not cancel.
  const double difference = 2.0 * wall;
  const double squares = difference * (diameter + bore);
  const double cubes = difference * (diameter * diameter + diameter * bore + bore * bore);
  const double fourths = squares * (diameter * diameter + bore * bore);
  SectionProperties section;
  section.family = SectionFamily::round_tube;
  section.forming = forming;
  section.height = section.width = diameter;
  section.wall = section.ruling_dimension = wall;
  section.perimeter = pi * diameter;
  section.inner_perimeter = pi * bore;
  section.area = pi / 4.0 * squares;
  section.I_y = section.I_z = pi / 64.0 * fourths;
  section.W_el_y = section.W_el_z = 2.0 * section.I_y / diameter;
  section.W_pl_y = section.W_pl_z = cubes / 6.0;
  section.I_t = 2.0 * section.I_y;
  section.W_t = 2.0 * section.W_el_y;
  // tau = V S / (I 2t) at the neutral axis, S = half the plastic modulus.
  section.A_v_y = section.A_v_z = section.I_y * 2.0 * wall / (section.W_pl_y / 2.0);
  const double m = bore / diameter;
  const double sum = (1.0 + m * m) * (1.0 + m * m);
  section.A_s_y = section.A_s_z = 6.0 * sum / (7.0 * sum + 20.0 * m * m) * section.area;
  section.smooth_outline = true;
  section.plates = {{.kind = PlateElement::Kind::round, .ratio = diameter / wall}};
  return section;
}

}  // namespace bismar
