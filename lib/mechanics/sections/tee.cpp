// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/fillet.hpp"
#include "mechanics/sections/cut_profile.hpp"
#include "mechanics/sections/outline_moments.hpp"
#include "mechanics/sections/shear_energy.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

/// Half of an I (i_section.cpp), less what the free end of the stem lacks.
double torsion_constant(double height, double width, double web, double flange, double root) {
  const double half = root + web / 2.0;
  const double d =
      (half * half + (root + flange) * (root + flange) - root * root) / (2.0 * root + flange);
  const double alpha = web / flange * (0.145 + 0.1 * root / flange);
  const double cube = web * web * web;
  return (width - 0.63 * flange) * flange * flange * flange / 3.0 + (height - flange) * cube / 3.0 +
         alpha * d * d * d * d - 0.105 * cube * web;
}

void check(
    FaultList& faults, double height, double width, double web, double flange, double root_radius) {
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "web", web);
  mechanics::require_positive(faults, "flange", flange);
  mechanics::require_not_negative(faults, "root_radius", root_radius);
  if (!faults.empty()) {
    return;
  }
  if (flange >= height) {
    mechanics::add_out_of_range(faults, "flange", flange, "less than the height");
  }
  if (web >= width) {
    mechanics::add_out_of_range(faults, "web", web, "less than the width");
  }
  if (faults.empty() && (root_radius > height - flange || root_radius > (width - web) / 2.0)) {
    mechanics::add_out_of_range(faults,
                                "root_radius",
                                root_radius,
                                "at most the clear stem and the flange's overhang on one side");
  }
}

}  // namespace

SectionProperties tee(double height, double width, double web, double flange, double root_radius) {
  FaultList faults;
  check(faults, height, width, web, flange, root_radius);
  faults.throw_if_any();

  // y from the middle of the web, z downwards from the flange's outer face.
  mechanics::OutlineMoments m;
  m.add_rectangle(-width / 2.0, width / 2.0, 0.0, flange);
  m.add_rectangle(-web / 2.0, web / 2.0, flange, height);
  m.add_spandrel(web / 2.0, flange, 1.0, 1.0, root_radius, 1.0);
  m.add_spandrel(-web / 2.0, flange, -1.0, 1.0, root_radius, 1.0);
  mechanics::CutProfile profile;
  profile.add_strip(0.0, flange, width);
  profile.add_strip(flange, height, web);
  profile.add_spandrels(flange, 1.0, root_radius, 2.0);

  const double centroid = m.first_z / m.area;
  const double tip = height - centroid;
  SectionProperties section;
  section.family = SectionFamily::tee;
  section.forming = Forming::hot_finished;
  section.height = height;
  section.width = width;
  section.wall = std::min(web, flange);
  section.ruling_dimension = flange;
  section.perimeter = 2.0 * (height + width) - (4.0 - std::numbers::pi) * root_radius;
  section.area = m.area;
  section.I_y = m.second_zz - centroid * m.first_z;
  section.I_z = m.second_yy;
  // A T of sensible proportions has its centroid in the upper half, but nothing forces it to.
  section.W_el_y = section.I_y / std::max(centroid, tip);
  section.W_el_z = 2.0 * section.I_z / width;
  section.W_pl_y = profile.plastic_modulus();
  const mechanics::Spandrel fillet = mechanics::spandrel(root_radius);
  section.W_pl_z = (flange * width * width + (height - flange) * web * web) / 4.0 +
                   2.0 * (fillet.s + web / 2.0 * fillet.area);
  section.I_t = torsion_constant(height, width, web, flange, root_radius);
  section.W_t = section.I_t / std::max(web, flange);
  const double stem = height - flange / 2.0;
  section.I_w = std::pow(width * flange, 3) / 144.0 + std::pow(stem * web, 3) / 36.0;
  section.z_shear = centroid - flange / 2.0;

  // Below a cut the material is nowhere wider than in it, so S / b <= (e^2 - z^2) / 2.
  section.A_v_z = 2.0 * section.I_y / (tip * tip);
  section.A_v_y = 8.0 * section.I_z / (width * width);
  const double overhang = (width - web) / 2.0;
  const double lever = std::abs(centroid - flange / 2.0);
  section.A_v_flange = lever > 0.0 ? section.I_y / (overhang * lever) : 0.0;
  section.A_s_z = mechanics::energy_shear_area_tee(height, width, web, flange);
  section.A_s_y = width * flange / 1.2;

  section.plates = {
      {.kind = PlateElement::Kind::outstand, .ratio = (overhang - root_radius) / flange},
      {.kind = PlateElement::Kind::outstand, .ratio = (height - flange - root_radius) / web}};
  for (const double side : {-1.0, 1.0}) {
    section.fibres.push_back({.y = side * width / 2.0, .z = centroid});
    section.fibres.push_back({.y = side * width / 2.0, .z = centroid - flange});
    section.fibres.push_back({.y = side * web / 2.0, .z = -tip});
  }
  return section;
}

}  // namespace bismar
