// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/fillet.hpp"
#include "mechanics/sections/shear_energy.hpp"
#include "mechanics/text.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// A full rectangle with four rounded corners, about the axis through its middle.
struct Rounded {
  double area = 0.0;
  double second_moment = 0.0;
  double half_first_moment = 0.0;  ///< Of the half on one side of the axis.

  Rounded(double height, double width, double radius) {
    const mechanics::Spandrel corner = mechanics::spandrel(radius);
    const double d = height / 2.0;
    area = height * width - 4.0 * corner.area;
    second_moment = width * height * height * height / 12.0 - 4.0 * corner.second_moment(d);
    half_first_moment = width * height * height / 8.0 - 2.0 * corner.first_moment(d);
  }
};

double outline(double height, double width, double radius) {
  return 2.0 * (height + width) - (8.0 - 2.0 * pi) * radius;
}

void check(FaultList& faults, double height, double width, double wall) {
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "wall", wall);
  if (faults.empty() && wall >= std::min(height, width) / 2.0) {
    mechanics::add_out_of_range(faults, "wall", wall, "less than half the smaller side");
  }
}

}  // namespace

SectionProperties rectangular_tube(double height,
                                   double width,
                                   double wall,
                                   double outer_radius,
                                   double inner_radius,
                                   Forming forming) {
  FaultList faults;
  check(faults, height, width, wall);
  mechanics::require_not_negative(faults, "outer_radius", outer_radius);
  mechanics::require_not_negative(faults, "inner_radius", inner_radius);
  if (faults.empty()) {
    const double smaller = std::min(height, width);
    if (outer_radius > smaller / 2.0) {
      mechanics::add_out_of_range(
          faults, "outer_radius", outer_radius, "at most half the smaller side");
    }
    if (inner_radius > outer_radius || inner_radius > smaller / 2.0 - wall) {
      mechanics::add_out_of_range(faults,
                                  "inner_radius",
                                  inner_radius,
                                  "at most the outer radius and half the smaller inside dimension");
    }
    // On the diagonal the outer arc lies (sqrt 2 - 1) ro inside the corner, the inner one
    // sqrt 2 t + (sqrt 2 - 1) ri: they must not meet.
    constexpr double root = std::numbers::sqrt2;
    if ((root - 1.0) * (outer_radius - inner_radius) >= root * wall) {
      mechanics::add_out_of_range(
          faults,
          "outer_radius",
          outer_radius,
          "small enough to leave a wall in the corner: the difference of the "
          "radii must be less than 3.41 times the wall");
    }
  }
  faults.throw_if_any();

  const double inner_height = height - 2.0 * wall;
  const double inner_width = width - 2.0 * wall;
  const Rounded outer_y(height, width, outer_radius);
  const Rounded inner_y(inner_height, inner_width, inner_radius);
  const Rounded outer_z(width, height, outer_radius);
  const Rounded inner_z(inner_width, inner_height, inner_radius);
  const double half_moment_y = outer_y.half_first_moment - inner_y.half_first_moment;
  const double half_moment_z = outer_z.half_first_moment - inner_z.half_first_moment;

  SectionProperties section;
  section.family = SectionFamily::rectangular_tube;
  section.forming = forming;
  section.height = height;
  section.width = width;
  section.wall = section.ruling_dimension = wall;
  section.perimeter = outline(height, width, outer_radius);
  section.inner_perimeter = outline(inner_height, inner_width, inner_radius);
  section.area = outer_y.area - inner_y.area;
  section.I_y = outer_y.second_moment - inner_y.second_moment;
  section.I_z = outer_z.second_moment - inner_z.second_moment;
  section.W_el_y = 2.0 * section.I_y / height;
  section.W_el_z = 2.0 * section.I_z / width;
  section.W_pl_y = 2.0 * half_moment_y;
  section.W_pl_z = 2.0 * half_moment_z;

  // Torsion as in EN 10210-2 and EN 10219-2: Bredt's closed cell and the wall's own share.
  const double mean_radius = (outer_radius + inner_radius) / 2.0;
  const double mid_line = 2.0 * ((width - wall) + (height - wall)) - 2.0 * mean_radius * (4.0 - pi);
  const double enclosed = (width - wall) * (height - wall) - mean_radius * mean_radius * (4.0 - pi);
  const double k = 2.0 * enclosed * wall / mid_line;
  section.I_t = wall * wall * wall * mid_line / 3.0 + 2.0 * k * enclosed;
  section.W_t = section.I_t / (wall + k / wall);

  // Both walls carry the shear; the first moment is largest at the neutral axis.
  section.A_v_z = section.I_y * 2.0 * wall / half_moment_y;
  section.A_v_y = section.I_z * 2.0 * wall / half_moment_z;
  section.A_s_z = mechanics::energy_shear_area_box(height, width, wall);
  section.A_s_y = mechanics::energy_shear_area_box(width, height, wall);
  // Where the web meets the flange: stress at the flange's inner face with the shear at the end of
  // the corner arc bounds every point of the corner.
  const double clear = std::min(inner_height / 2.0, height / 2.0 - outer_radius);
  section.junction_ratio = inner_height / height;
  section.A_v_junction = section.I_y * 2.0 * wall / (half_moment_y - wall * clear * clear);

  const double lost = 2.0 * std::max(outer_radius, wall);
  section.plates = {
      {.kind = PlateElement::Kind::internal_compression,
       .ratio = std::max(0.0, width - lost) / wall},
      {.kind = PlateElement::Kind::internal_bending, .ratio = std::max(0.0, height - lost) / wall}};
  return section;
}

SectionProperties rectangular_tube(
    double height, double width, double wall, Corners corners, Forming forming) {
  FaultList faults;
  check(faults, height, width, wall);
  faults.throw_if_any();
  double outer = 0.0;
  double inner = 0.0;
  if (corners == Corners::en_10210) {
    outer = 1.5;
    inner = 1.0;
  } else if (corners == Corners::en_10219) {
    // The standard's steps at 6 and 10 mm; the slack lets 6 mm read from a table stay 6 mm.
    constexpr double slack = 1.0 + 1e-9;
    outer = wall <= 6e-3 * slack ? 2.0 : wall <= 10e-3 * slack ? 2.5 : 3.0;
    inner = outer - 1.0;
  }
  const double smaller = std::min(height, width);
  if (wall * (1.0 + inner) > smaller / 2.0) {
    mechanics::add_out_of_range(
        faults,
        "wall",
        wall,
        "thin enough for the standard's inner corner radius of " + mechanics::number(inner) +
            " times the wall; give smaller radii where the corners are sharper");
  }
  faults.throw_if_any();
  return rectangular_tube(height, width, wall, outer * wall, inner * wall, forming);
}

}  // namespace bismar
