// SPDX-License-Identifier: MIT
#include "mechanics/stress_points.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::mechanics {

namespace {

/// |force| / resistance, zero for no force even where the section does not know the resistance.
double part(double force, double resistance) {
  return force == 0.0 ? 0.0 : std::abs(force) / resistance;
}

void add_fibre_stresses(const SectionProperties& section,
                        const InternalForces& forces,
                        StationStresses& s) {
  const double determinant = section.I_y * section.I_z - section.I_yz * section.I_yz;
  for (const SectionPoint& fibre : section.fibres) {
    const double of_y =
        std::abs(forces.M_y * (section.I_z * fibre.z - section.I_yz * fibre.y)) / determinant;
    const double of_z =
        std::abs(forces.M_z * (section.I_y * fibre.y - section.I_yz * fibre.z)) / determinant;
    s.bending_y = std::max(s.bending_y, of_y);
    s.bending_z = std::max(s.bending_z, of_z);
    s.bending = std::max(s.bending, of_y + of_z);
  }
}

}  // namespace

StationStresses station_stresses(const SectionProperties& section, const InternalForces& forces) {
  StationStresses s;
  s.axial = forces.N / section.area;
  if (section.fibres.empty()) {
    s.bending_y = std::abs(forces.M_y) / section.W_el_y;
    s.bending_z = std::abs(forces.M_z) / section.W_el_z;
    s.bending = section.smooth_outline
                    ? std::sqrt(s.bending_y * s.bending_y + s.bending_z * s.bending_z)
                    : s.bending_y + s.bending_z;
  } else {
    add_fibre_stresses(section, forces, s);
  }
  s.shear_y = part(forces.V_y, section.A_v_y);
  s.shear_z = part(forces.V_z, section.A_v_z);
  s.torsion = part(forces.T, section.W_t);
  if (section.A_v_flange > 0.0) {
    s.flange_shear = part(forces.V_z, section.A_v_flange);
  }
  if (section.family == SectionFamily::channel) {
    // The tips lie at b - c and govern W_el,z; the back of the web lies at c.
    const double to_tip = section.I_z / section.W_el_z;
    s.web_bending_z = s.bending_z * (section.width - to_tip) / to_tip;
  }
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

bool in_one_plane(const StationStresses& s) {
  return (s.bending_z == 0.0 && s.shear_y == 0.0) || (s.bending_y == 0.0 && s.shear_z == 0.0);
}

StressPoint extreme_fibre(const StationStresses& s, double shear) {
  return {.place = "at the extreme fibre", .axial = s.axial, .bending = s.bending, .shear = shear};
}

StressPoints smooth_points(const SectionProperties& section, const StationStresses& s) {
  // Round: v_z cos + v_y sin along the wall. The flow in an elliptical tube is no cosine: its peaks
  // may add, and it does not fall as in a round one on the way to the extreme fibre.
  const bool elliptical = section.family == SectionFamily::elliptical_tube;
  const double shear =
      elliptical ? s.shear_y + s.shear_z : std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z);
  StressPoints points{};
  points[0] = extreme_fibre(s, s.torsion);
  points[1] = {.place = "at the neutral axis",
               .axial = s.axial,
               .beyond = s.bending,
               .shear = shear + s.torsion};
  if (!in_one_plane(s) || elliptical) {
    // Where the planes of shear force and moment differ the two peaks may meet.
    points[0].shear += shear;
  } else if (section.family == SectionFamily::round_tube) {
    points[0].extra = tube_crest(s.axial, s.bending, shear, s.torsion);
  }
  return points;
}

/// Legs in which the shear stresses of both planes run the same way.
StressPoints askew_points(const SectionProperties& section, const StationStresses& s) {
  const double shear = s.shear_y + s.shear_z;
  StressPoints points{};
  points[0] = extreme_fibre(s, s.torsion);
  points[1] = {.place = "at the neutral axis",
               .axial = s.axial,
               .beyond = s.bending,
               .shear = shear + s.torsion};
  if (!in_one_plane(s) || section.family != SectionFamily::angle) {
    points[0].shear += shear;
  }
  return points;
}

/// Adds to both neutral axes of z loads what lies between them and s^2 = w, where a hexagon's shear
/// stress is still at its peak: (n + m)(n + m w) for (n + m) n.
void widen_hexagon(const StationStresses& s, StressPoints& points) {
  constexpr double w = 0.3007036320765605;
  const double extra = w * s.bending_y * (std::abs(s.axial) + s.bending_y + s.bending_z);
  points[1].extra = points[3].extra = extra;
}

}  // namespace

StressPoints stress_points(const SectionProperties& section, const StationStresses& s) {
  if (section.smooth_outline) {
    return smooth_points(section, s);
  }
  const bool channel = section.family == SectionFamily::channel;
  if (!section.fibres.empty() && !channel && section.family != SectionFamily::tee) {
    return askew_points(section, s);
  }
  // What of a y load's shear and M_z's bending there is in the web: all along a channel's, none of
  // the shear in others.
  const double web_shear_y = channel ? s.shear_y : 0.0;
  const double web_bending = channel ? s.web_bending_z : s.bending_z;
  StressPoints points{};
  points[0] = extreme_fibre(s, s.torsion + s.flange_shear);
  points[1] = {.place = "at the neutral axis of the z loads",
               .axial = s.axial,
               .bending = web_bending,
               .beyond = s.bending_y,
               .shear = s.shear_z + web_shear_y + s.torsion};
  points[2] = {.place = "at the neutral axis of the y loads",
               .axial = s.axial,
               .bending = s.bending_y,
               .beyond = s.bending_z,
               .shear = s.shear_y + s.torsion + s.flange_shear};
  points[3] = {.place = "at the centre",
               .axial = s.axial,
               .beyond = s.bending,
               .shear = std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z) + s.torsion};
  if (section.junction_ratio > 0.0) {
    points[4] = {
        .place = "at the junction of web and flange",
        .axial = s.axial,
        .bending = (channel ? web_bending : s.bending_z) + section.junction_ratio * s.bending_y,
        .shear = s.shear_z * section.A_v_z / section.A_v_junction + web_shear_y + s.torsion};
  }
  if (section.family == SectionFamily::solid_hexagon) {
    widen_hexagon(s, points);
  }
  return points;
}

double equivalent_squared(const StressPoint& point) {
  const double direct = std::abs(point.axial) + point.bending;
  return direct * (direct + point.beyond) + 3.0 * point.shear * point.shear + point.extra;
}

}  // namespace bismar::mechanics
