// SPDX-License-Identifier: MIT
#include "mechanics/sections/outline_moments.hpp"

#include "mechanics/fillet.hpp"

#include <numbers>

namespace bismar::mechanics {

void OutlineMoments::add_rectangle(double y_from, double y_to, double z_from, double z_to) {
  const double width = y_to - y_from;
  const double height = z_to - z_from;
  const double a = width * height;
  const double y = (y_from + y_to) / 2.0;
  const double z = (z_from + z_to) / 2.0;
  area += a;
  first_y += a * y;
  first_z += a * z;
  second_yy += a * (y * y + width * width / 12.0);
  second_zz += a * (z * z + height * height / 12.0);
  second_yz += a * y * z;
}

void OutlineMoments::add_spandrel(
    double y, double z, double along_y, double along_z, double radius, double sign) {
  const Spandrel part = spandrel(radius);
  // About both sides of the corner: the square's r^4 / 4 less that of the quarter disc about the
  // opposite corner, (pi/4 - 2/3 + 1/8) r^4.
  const double product = (19.0 / 24.0 - std::numbers::pi / 4.0) * radius * radius * radius * radius;
  area += sign * part.area;
  first_y += sign * (y * part.area + along_y * part.s);
  first_z += sign * (z * part.area + along_z * part.s);
  second_yy += sign * (y * y * part.area + 2.0 * y * along_y * part.s + part.i);
  second_zz += sign * (z * z * part.area + 2.0 * z * along_z * part.s + part.i);
  second_yz += sign * (y * z * part.area + (y * along_z + z * along_y) * part.s +
                       along_y * along_z * product);
}

}  // namespace bismar::mechanics
