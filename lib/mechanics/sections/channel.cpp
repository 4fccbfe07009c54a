// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/sections/channel_profile.hpp"
#include "mechanics/sections/shear_energy.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <utility>

namespace bismar {

namespace {

/// Torsion constant with the flange at its nominal thickness: the plates, and at each corner the
/// circle of diameter D that the fillet lets in. Source: see channel in section.hpp.
double torsion_constant(double height, double width, double web, double flange, double root) {
  const double t = web / flange;
  const double r = root / flange;
  const double alpha = -0.0908 + 0.2621 * t + 0.1231 * r - 0.0752 * t * r - 0.0945 * t * t;
  const double d = 2.0 * ((3.0 * root + web + flange) -
                          std::sqrt(2.0 * (2.0 * root + web) * (2.0 * root + flange)));
  const double cube = flange * flange * flange;
  return 2.0 / 3.0 * width * cube + (height - 2.0 * flange) * web * web * web / 3.0 +
         2.0 * alpha * d * d * d * d - 0.42 * cube * flange;
}

void check(FaultList& faults,
           double height,
           double width,
           double web,
           double flange,
           double root_radius,
           double flange_slope) {
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "web", web);
  mechanics::require_positive(faults, "flange", flange);
  mechanics::require_not_negative(faults, "root_radius", root_radius);
  mechanics::require_not_negative(faults, "flange_slope", flange_slope);
  if (!faults.empty()) {
    return;
  }
  if (flange >= height / 2.0) {
    mechanics::add_out_of_range(faults, "flange", flange, "less than half the height");
  }
  if (web >= width) {
    mechanics::add_out_of_range(faults, "web", web, "less than the width");
  }
  if (flange_slope > 0.2) {
    mechanics::add_out_of_range(faults,
                                "flange_slope",
                                flange_slope,
                                "the rise over the run, 0 to 0.2 (0.08 for eight per cent)");
  }
}

}  // namespace

SectionProperties channel(double height,
                          double width,
                          double web,
                          double flange,
                          double root_radius,
                          double flange_slope) {
  FaultList faults;
  check(faults, height, width, web, flange, root_radius, flange_slope);
  faults.throw_if_any();
  const mechanics::ChannelProfile profile({height, width, web, flange, root_radius, flange_slope});
  if (!profile.fits()) {
    mechanics::add_out_of_range(
        faults,
        "root_radius",
        root_radius,
        "small enough that root, taper and toe fit between web, flange tip and mid-height");
  }
  faults.throw_if_any();

  const mechanics::ChannelProfile::Moments m = profile.moments();
  SectionProperties section;
  section.family = SectionFamily::channel;
  section.forming = Forming::hot_finished;
  section.height = height;
  section.width = width;
  section.wall = std::min(web, flange);
  section.ruling_dimension = flange;
  section.perimeter = 2.0 * m.half_outline;
  section.area = 2.0 * m.area;
  const double centroid = m.first_y / m.area;  // from the back of the web
  section.I_y = 2.0 * m.second_z;
  section.I_z = 2.0 * (m.second_y - centroid * m.first_y);
  section.W_el_y = 2.0 * section.I_y / height;
  section.W_el_z = section.I_z / std::max(centroid, width - centroid);
  section.W_pl_y = 2.0 * m.first_z;
  section.W_pl_z = profile.plastic_modulus_z();
  section.I_t = torsion_constant(height, width, web, flange, root_radius);
  section.W_t = section.I_t / std::max(web, flange);

  const double mid_height = height - flange;  // between the flanges' mid-lines
  const double mid_width = width - web / 2.0;
  const double offset = flange * mid_width * mid_width * mid_height * mid_height /
                        (4.0 * section.I_y);  // of the shear centre from the web's mid-line
  section.y_shear = web / 2.0 - offset - centroid;
  const double from_web = centroid - web / 2.0;
  section.I_w =
      mid_height * mid_height / 4.0 *
      (section.I_z - section.area * from_web * from_web *
                         (mid_height * mid_height * section.area / (4.0 * section.I_y) - 1.0));

  section.A_v_z = section.I_y * web / m.first_z;
  // In the flanges S(y) / b(y) <= (b - y_s)^2 / 2 at every cut y, because the depth of material
  // only falls towards the tips. What of it reaches the web is taken up along its height: at the
  // end of the root fillet z (c - t_w/2). Into the fillet z grows and so does the wall, by at least
  // d^2 / (2 r) after d: the ratio rises by no more than r t_w / (2 z^2).
  const double reach = width - centroid;
  const double web_end = profile.web_end();
  const double face = profile.flange_face_at_web();
  const double web_length =
      web_end > 0.0 ? std::min(face, web_end + root_radius * web / (2.0 * web_end)) : face;
  section.A_v_y = section.I_z / std::max(reach * reach / 2.0, web_length * from_web);
  // As for an I: stress at the flange's inner face at the web, shear at the end of the fillet.
  section.junction_ratio = 2.0 * face / height;
  section.A_v_junction = section.I_y * web / (m.first_z - web * web_end * web_end / 2.0);
  // Flow along a flange from its tip; the mid-line is farthest out at the thin tip.
  const double tip_middle = (height / 2.0 + profile.flange_face_at(width)) / 2.0;
  section.A_v_flange = section.I_y / (tip_middle * (width - web));
  section.A_s_z = mechanics::energy_shear_area_i(height, width, web, flange);
  section.A_s_y = 2.0 * width * flange / 1.2;
  for (const double y : {-centroid, reach}) {
    for (const double z : {-height / 2.0, height / 2.0}) {
      section.fibres.push_back({.y = y, .z = z});
    }
  }

  section.plates = {
      {.kind = PlateElement::Kind::outstand, .ratio = (width - web - root_radius) / flange},
      {.kind = PlateElement::Kind::internal_bending, .ratio = 2.0 * web_end / web}};
  return section;
}

}  // namespace bismar
