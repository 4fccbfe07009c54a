// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/sections/cut_profile.hpp"
#include "mechanics/sections/outline_moments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// The legs and the circle of diameter D that the root fillet lets in. Source: see section.hpp.
double torsion_constant(double height, double width, double thickness, double root) {
  const double t = thickness;
  const double d = 2.0 * ((3.0 * root + 2.0 * t) - std::numbers::sqrt2 * (2.0 * root + t));
  const double cube = t * t * t;
  return (width + height - t) * cube / 3.0 + (0.07 + 0.076 * root / t) * d * d * d * d -
         0.21 * cube * t;
}

/// Largest integral of a linear function from the tip of a leg, where it is `at_tip`, over part of
/// the leg's length to its other end, where it is `at_end`: with the bending stress of V as the
/// function, the peak of the shear stress along the leg.
double peak_flow(double at_tip, double at_end, double length) {
  const double whole = std::abs(at_tip + at_end) / 2.0 * length;
  if (at_tip * at_end >= 0.0) {
    return whole;
  }
  const double to_zero = length * at_tip / (at_tip - at_end);
  return std::max(whole, std::abs(at_tip) / 2.0 * to_zero);
}

struct Leg {
  double tip = 0.0;
  double heel = 0.0;    ///< Outer face.
  double middle = 0.0;  ///< Mid-line, across the leg.
};

/// Second moments for a load: about the axis across it, about the axis along it, and the product.
struct Tensor {
  double along = 0.0;
  double across = 0.0;
  double product = 0.0;
};

/// Peak shear stress for V = 1: in the leg along the load and in the leg across. Coordinates from
/// the centroid.
double peak_shear(const Leg& along, const Leg& across, const Tensor& moment) {
  const double determinant = moment.along * moment.across - moment.product * moment.product;
  const auto stress = [&](double u_along, double u_across) {
    return (moment.across * u_along - moment.product * u_across) / determinant;
  };
  return std::max(peak_flow(stress(along.tip, along.middle),
                            stress(along.heel, along.middle),
                            along.tip - along.heel),
                  peak_flow(stress(across.middle, across.tip),
                            stress(across.middle, across.heel),
                            across.tip - across.heel));
}

void check(FaultList& faults,
           double height,
           double width,
           double thickness,
           double root_radius,
           double toe_radius) {
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "thickness", thickness);
  mechanics::require_not_negative(faults, "root_radius", root_radius);
  mechanics::require_not_negative(faults, "toe_radius", toe_radius);
  if (!faults.empty()) {
    return;
  }
  const double shorter = std::min(height, width);
  if (thickness >= shorter) {
    mechanics::add_out_of_range(faults, "thickness", thickness, "less than the shorter leg");
    return;
  }
  if (toe_radius > thickness) {
    mechanics::add_out_of_range(faults, "toe_radius", toe_radius, "at most the thickness");
  }
  if (root_radius + toe_radius > shorter - thickness) {
    mechanics::add_out_of_range(faults,
                                "root_radius",
                                root_radius,
                                "small enough to leave room for the toe on the shorter leg");
  }
}

/// The convex outline; a rounded toe by the tangents at both its ends and in its middle.
void add_fibres(
    SectionProperties& section, double y_s, double z_s, double thickness, double toe_radius) {
  const double y_tip = section.width - y_s;
  const double z_tip = section.height - z_s;
  // From the corner along each side to the tangent at 45 degrees.
  const double cut = toe_radius * (2.0 - std::numbers::sqrt2);
  section.fibres = {{.y = -y_s, .z = -z_s},
                    {.y = y_tip, .z = -z_s},
                    {.y = y_tip, .z = thickness - cut - z_s},
                    {.y = y_tip - cut, .z = thickness - z_s},
                    {.y = thickness - y_s, .z = z_tip - cut},
                    {.y = thickness - cut - y_s, .z = z_tip},
                    {.y = -y_s, .z = z_tip}};
}

}  // namespace

SectionProperties angle(
    double height, double width, double thickness, double root_radius, double toe_radius) {
  FaultList faults;
  check(faults, height, width, thickness, root_radius, toe_radius);
  faults.throw_if_any();

  // y and z from the outer faces of the heel.
  const double t = thickness;
  mechanics::OutlineMoments m;
  m.add_rectangle(0.0, width, 0.0, t);
  m.add_rectangle(0.0, t, t, height);
  m.add_spandrel(t, t, 1.0, 1.0, root_radius, 1.0);
  m.add_spandrel(width, t, -1.0, -1.0, toe_radius, -1.0);
  m.add_spandrel(t, height, -1.0, -1.0, toe_radius, -1.0);
  const auto plastic_modulus = [&](double along, double across) {
    mechanics::CutProfile profile;
    profile.add_strip(0.0, t, across);
    profile.add_strip(t, along, t);
    profile.add_spandrels(t, 1.0, root_radius, 1.0);
    profile.add_spandrels(t, -1.0, toe_radius, -1.0);
    profile.add_spandrels(along, -1.0, toe_radius, -1.0);
    return profile.plastic_modulus();
  };

  const double y_s = m.first_y / m.area;
  const double z_s = m.first_z / m.area;
  SectionProperties section;
  section.family = SectionFamily::angle;
  section.forming = Forming::hot_finished;
  section.height = height;
  section.width = width;
  section.wall = section.ruling_dimension = t;
  section.perimeter = 2.0 * (height + width) - (2.0 - pi / 2.0) * (root_radius + 2.0 * toe_radius);
  section.area = m.area;
  section.I_y = m.second_zz - z_s * m.first_z;
  section.I_z = m.second_yy - y_s * m.first_y;
  section.I_yz = m.second_yz - y_s * m.first_z;
  section.W_el_y = section.I_y / std::max(z_s, height - z_s);
  section.W_el_z = section.I_z / std::max(y_s, width - y_s);
  section.W_pl_y = plastic_modulus(height, width);
  section.W_pl_z = plastic_modulus(width, height);
  section.I_t = torsion_constant(height, width, t, root_radius);
  section.W_t = section.I_t / t;
  section.I_w = (std::pow((height - t / 2.0) * t, 3) + std::pow((width - t / 2.0) * t, 3)) / 36.0;
  section.y_shear = t / 2.0 - y_s;
  section.z_shear = t / 2.0 - z_s;

  const Leg upright{.tip = height - z_s, .heel = -z_s, .middle = t / 2.0 - y_s};
  const Leg flat{.tip = width - y_s, .heel = -y_s, .middle = t / 2.0 - z_s};
  section.A_v_z =
      1.0 / peak_shear(upright,
                       flat,
                       {.along = section.I_y, .across = section.I_z, .product = section.I_yz});
  section.A_v_y =
      1.0 / peak_shear(flat,
                       upright,
                       {.along = section.I_z, .across = section.I_y, .product = section.I_yz});
  section.A_s_z = height * t / 1.2;
  section.A_s_y = width * t / 1.2;

  for (const double leg : {height, width}) {
    section.plates.push_back(
        {.kind = PlateElement::Kind::outstand, .ratio = (leg - t - root_radius) / t});
  }
  add_fibres(section, y_s, z_s, t, toe_radius);
  return section;
}

}  // namespace bismar
