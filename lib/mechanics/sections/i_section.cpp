// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/fillet.hpp"
#include "mechanics/sections/shear_energy.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <numbers>

namespace bismar {

namespace {

/// Torsion constant of a rolled I or H: the plates, and at each web-flange junction the circle of
/// diameter D that the fillets let in. Source: see i_section in section.hpp.
double torsion_constant(double height, double width, double web, double flange, double root) {
  const double half = root + web / 2.0;
  const double d =
      (half * half + (root + flange) * (root + flange) - root * root) / (2.0 * root + flange);
  const double alpha = web / flange * (0.145 + 0.1 * root / flange);
  return 2.0 / 3.0 * (width - 0.63 * flange) * flange * flange * flange +
         (height - 2.0 * flange) * web * web * web / 3.0 + 2.0 * alpha * d * d * d * d;
}

}  // namespace

SectionProperties i_section(
    double height, double width, double web, double flange, double root_radius) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "web", web);
  mechanics::require_positive(faults, "flange", flange);
  mechanics::require_not_negative(faults, "root_radius", root_radius);
  if (faults.empty()) {
    if (flange >= height / 2.0) {
      mechanics::add_out_of_range(faults, "flange", flange, "less than half the height");
    } else if (web >= width) {
      mechanics::add_out_of_range(faults, "web", web, "less than the width");
    } else if (root_radius > height / 2.0 - flange || root_radius > (width - web) / 2.0) {
      mechanics::add_out_of_range(faults,
                                  "root_radius",
                                  root_radius,
                                  "at most half the clear web height and the flange's overhang");
    }
  }
  faults.throw_if_any();

  const mechanics::Spandrel fillet = mechanics::spandrel(root_radius);
  const double clear = height - 2.0 * flange;  // between the flanges
  const double overhang = width - web;         // both sides together
  SectionProperties section;
  section.family = SectionFamily::i_section;
  section.forming = Forming::hot_finished;
  section.height = height;
  section.width = width;
  section.wall = std::min(web, flange);
  section.ruling_dimension = flange;
  section.perimeter =
      2.0 * height + 4.0 * width - 2.0 * web - (8.0 - 2.0 * std::numbers::pi) * root_radius;
  section.area = 2.0 * width * flange + clear * web + 4.0 * fillet.area;
  section.I_y = (width * height * height * height - overhang * clear * clear * clear) / 12.0 +
                4.0 * fillet.second_moment(clear / 2.0);
  section.I_z = (2.0 * flange * width * width * width + clear * web * web * web) / 12.0 +
                4.0 * (fillet.i + web * fillet.s + web * web / 4.0 * fillet.area);
  section.W_el_y = 2.0 * section.I_y / height;
  section.W_el_z = 2.0 * section.I_z / width;
  const double half_moment_y = (width * height * height - overhang * clear * clear) / 8.0 +
                               2.0 * fillet.first_moment(clear / 2.0);
  section.W_pl_y = 2.0 * half_moment_y;
  // About z the fillets reach outwards from the web's faces.
  section.W_pl_z = (2.0 * flange * width * width + clear * web * web) / 4.0 +
                   4.0 * (fillet.s + web / 2.0 * fillet.area);
  section.I_t = torsion_constant(height, width, web, flange, root_radius);
  section.W_t = section.I_t / std::max(web, flange);
  const double mid_height = height - flange;  // between the flanges' mid-lines
  section.I_w = flange * width * width * width * mid_height * mid_height / 24.0;

  section.A_v_z = section.I_y * web / half_moment_y;
  // S(y) / b(y) <= (b^2/4 - y^2) / 2 at every cut y, because the thickness only falls outwards: the
  // value at y = 0 is exact for a thin web and on the safe side by (tw/b)^2 and the fillets.
  section.A_v_y = 8.0 * section.I_z / (width * width);
  // Bending stress at the flange's inner face with the shear at the end of the fillet, over the
  // bare web: it bounds every point of the fillet.
  const double web_end = clear / 2.0 - root_radius;
  section.junction_ratio = clear / height;
  section.A_v_junction = section.I_y * web / (half_moment_y - web * web_end * web_end / 2.0);

  // Flow along a flange from its tip: the mid-line's distance times the overhang.
  section.A_v_flange = section.I_y / (mid_height / 2.0 * overhang / 2.0);
  section.A_s_z = mechanics::energy_shear_area_i(height, width, web, flange);
  section.A_s_y = 2.0 * width * flange / 1.2;

  section.plates = {
      {.kind = PlateElement::Kind::outstand, .ratio = (overhang / 2.0 - root_radius) / flange},
      {.kind = PlateElement::Kind::internal_bending, .ratio = (clear - 2.0 * root_radius) / web}};
  return section;
}

}  // namespace bismar
