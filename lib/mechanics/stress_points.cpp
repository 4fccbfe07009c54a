// SPDX-License-Identifier: MIT
#include "mechanics/stress_points.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::mechanics {

StationStresses station_stresses(const SectionProperties& section, const InternalForces& forces) {
  StationStresses s;
  s.axial = forces.N / section.area;
  s.bending_y = std::abs(forces.M_y) / section.W_el_y;
  s.bending_z = std::abs(forces.M_z) / section.W_el_z;
  s.bending = section.smooth_outline
                  ? std::sqrt(s.bending_y * s.bending_y + s.bending_z * s.bending_z)
                  : s.bending_y + s.bending_z;
  s.shear_y = std::abs(forces.V_y) / section.A_v_y;
  s.shear_z = std::abs(forces.V_z) / section.A_v_z;
  s.torsion = std::abs(forces.T) / section.W_t;
  return s;
}

namespace {

/// What the wall of a round tube adds between the extreme fibre and the neutral axis: the crest of
///   M^2 - M m c^2 + (sqrt(3) v c + sqrt(3) t)^2, less its value at c = 0.
double tube_crest(double axial, double bending, double shear, double torsion) {
  const double v2 = 3.0 * shear * shear;
  const double slope = 3.0 * shear * torsion;  // half the linear coefficient
  const double fall = (std::abs(axial) + bending) * bending - v2;
  return slope > 0.0 && slope < fall ? slope * slope / fall : 0.0;
}

StressPoints smooth_points(const SectionProperties& section, const StationStresses& s) {
  const double shear = std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z);
  const bool one_plane =
      (s.bending_z == 0.0 && s.shear_y == 0.0) || (s.bending_y == 0.0 && s.shear_z == 0.0);
  StressPoints points{};
  points[0] = {
      .place = "at the extreme fibre", .axial = s.axial, .bending = s.bending, .shear = s.torsion};
  points[1] = {.place = "at the neutral axis",
               .axial = s.axial,
               .beyond = s.bending,
               .shear = shear + s.torsion};
  if (!one_plane) {
    // Where the planes of shear force and moment differ the two peaks may meet.
    points[0].shear += shear;
  } else if (section.family == SectionFamily::round_tube) {
    points[0].extra = tube_crest(s.axial, s.bending, shear, s.torsion);
  }
  return points;
}

}  // namespace

StressPoints stress_points(const SectionProperties& section, const StationStresses& s) {
  if (section.smooth_outline) {
    return smooth_points(section, s);
  }
  StressPoints points{};
  points[0] = {
      .place = "at the extreme fibre", .axial = s.axial, .bending = s.bending, .shear = s.torsion};
  points[1] = {.place = "at the neutral axis of the z loads",
               .axial = s.axial,
               .bending = s.bending_z,
               .beyond = s.bending_y,
               .shear = s.shear_z + s.torsion};
  points[2] = {.place = "at the neutral axis of the y loads",
               .axial = s.axial,
               .bending = s.bending_y,
               .beyond = s.bending_z,
               .shear = s.shear_y + s.torsion};
  points[3] = {.place = "at the centre",
               .axial = s.axial,
               .beyond = s.bending,
               .shear = std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z) + s.torsion};
  if (section.junction_ratio > 0.0) {
    points[4] = {.place = "at the junction of web and flange",
                 .axial = s.axial,
                 .bending = s.bending_z + section.junction_ratio * s.bending_y,
                 .shear = s.shear_z * section.A_v_z / section.A_v_junction + s.torsion};
  }
  return points;
}

double equivalent_squared(const StressPoint& point) {
  const double direct = std::abs(point.axial) + point.bending;
  return direct * (direct + point.beyond) + 3.0 * point.shear * point.shear + point.extra;
}

}  // namespace bismar::mechanics
