// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/torsion.hpp>

#include <algorithm>

namespace bismar {

namespace {

SectionProperties rectangle(double height, double width) {
  const double longer = std::max(height, width);
  const double shorter = std::min(height, width);
  const RectangleTorsion torsion = rectangle_torsion(longer / shorter);
  SectionProperties section;
  section.height = height;
  section.width = width;
  section.wall = section.ruling_dimension = shorter;
  section.perimeter = 2.0 * (height + width);
  section.area = height * width;
  section.I_y = width * height * height * height / 12.0;
  section.I_z = height * width * width * width / 12.0;
  section.W_el_y = width * height * height / 6.0;
  section.W_el_z = height * width * width / 6.0;
  section.W_pl_y = width * height * height / 4.0;
  section.W_pl_z = height * width * width / 4.0;
  section.I_t = torsion.k2 * longer * shorter * shorter * shorter;
  section.W_t = torsion.k1 * longer * shorter * shorter;
  section.A_v_y = section.A_v_z = section.area / 1.5;  // V S / (I b) = 3 V / (2 A)
  section.A_s_y = section.A_s_z = section.area / 1.2;  // the energy of that parabola
  return section;
}

}  // namespace

SectionProperties solid_square(double side) {
  FaultList faults;
  mechanics::require_positive(faults, "side", side);
  faults.throw_if_any();
  SectionProperties section = rectangle(side, side);
  section.family = SectionFamily::solid_square;
  return section;
}

SectionProperties solid_rectangle(double height, double width) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  faults.throw_if_any();
  SectionProperties section = rectangle(height, width);
  section.family = SectionFamily::solid_rectangle;
  return section;
}

}  // namespace bismar
