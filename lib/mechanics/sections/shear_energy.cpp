// SPDX-License-Identifier: MIT
#include "mechanics/sections/shear_energy.hpp"

namespace bismar::mechanics {

namespace {

/// Integral of (c^2 - z^2)^2 from 0 to z.
double quartic(double c, double z) {
  const double square = c * c;
  return z * (square * square - 2.0 / 3.0 * square * z * z + z * z * z * z / 5.0);
}

}  // namespace

double energy_shear_area_i(double height, double width, double web, double flange) {
  const double top = height / 2.0;
  const double face = top - flange;
  const double second_moment =
      2.0 / 3.0 * (width * top * top * top - (width - web) * face * face * face);
  // S = b (top^2 - z^2) / 2 in the flange, S_f + t_w (face^2 - z^2) / 2 in the web.
  const double s = width * flange * (top + face) / 2.0;
  const double in_flange = width / 4.0 * (quartic(top, top) - quartic(top, face));
  const double in_web =
      s * s * face / web + 2.0 / 3.0 * s * face * face * face + web / 4.0 * quartic(face, face);
  return second_moment * second_moment / (2.0 * (in_flange + in_web));
}

double energy_shear_area_tee(double height, double width, double web, double flange) {
  const double stem = height - flange;
  const double centroid = (width * flange * flange / 2.0 + stem * web * (flange + stem / 2.0)) /
                          (width * flange + stem * web);
  const double tip = height - centroid;
  const double face = centroid - flange;  // below zero where the neutral axis is in the flange
  const double second_moment = (web * (tip * tip * tip + face * face * face) +
                                width * (centroid * centroid * centroid - face * face * face)) /
                               3.0;
  const double in_stem = web / 4.0 * (quartic(tip, tip) + quartic(tip, face));
  const double in_flange = width / 4.0 * (quartic(centroid, centroid) - quartic(centroid, face));
  return second_moment * second_moment / (in_stem + in_flange);
}

double energy_shear_area_box(double height, double width, double wall) {
  const double h = height - wall;
  const double b = width - wall;
  // Per wall thickness: I, and S / t that grows as (h/2) y along half a flange from its middle,
  // then from p = b h / 4 by (h^2 / 4 - z^2) / 2 along the web.
  const double second_moment = h * h * h / 6.0 + b * h * h / 2.0;
  const double p = b * h / 4.0;
  const double in_flanges = h * h * b * b * b / 24.0;
  const double in_webs = 2.0 * (p * p * h + p * h * h * h / 6.0 + h * h * h * h * h / 120.0);
  return wall * second_moment * second_moment / (in_flanges + in_webs);
}

}  // namespace bismar::mechanics
