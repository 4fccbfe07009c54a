// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>

#include <array>
#include <cstddef>
#include <string_view>

namespace bismar::mechanics {

/// Elastic stresses that one station's forces cause, each at its own worst point [Pa].
struct StationStresses {
  double axial = 0.0;          ///< N/A, tension positive.
  double bending_y = 0.0;      ///< |M_y| / W_el,y, or |M_y|'s largest at any fibre.
  double bending_z = 0.0;      ///< |M_z| / W_el,z, or |M_z|'s largest at any fibre.
  double bending = 0.0;        ///< Both together at their worst point.
  double shear_y = 0.0;        ///< |V_y| / A_v,y
  double shear_z = 0.0;        ///< |V_z| / A_v,z
  double torsion = 0.0;        ///< |T| / W_t
  double flange_shear = 0.0;   ///< |V_z| / A_v,flange: along a flange, beside the web.
  double web_bending_z = 0.0;  ///< Channel: |M_z|'s stress at the back of the web.
};

/// The stresses of one station.
///
/// Bending of both axes: where the section lists fibres, the askew bending stress
///     sigma = [M_y (I_z z - I_yz y) + M_z (I_y y - I_yz z)] / (I_y I_z - I_yz^2)
/// at each of them, the moments taken with the signs that are worst there; of a smooth outline the
/// root of the sum of squares; otherwise the sum.
[[nodiscard]] BISMAR_API StationStresses station_stresses(const SectionProperties& section,
                                                          const InternalForces& forces);

/// One point of the section: what acts there together.
struct StressPoint {
  std::string_view place;
  double axial = 0.0;    ///< Tension positive.
  double bending = 0.0;  ///< Bending stress at the point, >= 0; it occurs with both signs.
  double beyond = 0.0;   ///< Bending stress that the way from here to the extreme fibre adds.
  double shear = 0.0;    ///< Shear force's and torsion's stress.
  double extra = 0.0;    ///< Square of stress to add, see stress_points().
};
using StressPoints = std::array<StressPoint, 5>;

/// The points that bound the section: extreme fibre, both neutral axes, centre, junction. A section
/// uses as many of them as it needs; the others stay zero.
///
/// The peak torsion stress is taken everywhere, which is exact for round sections and on the safe
/// side for the rest (a rectangle has no torsion stress in its corners).
///
/// `beyond` and `extra` make the square of the von Mises stress a bound on everything between the
/// points: along a depth coordinate s in [0, 1] (0 at the neutral axis) the direct stress n + m s
/// obeys
///     (n + m s)^2 <= (n + m) (n + m s^2)            (Jensen's inequality with weights n and m)
/// and the shear stress of a solid or a web is linear in s^2, so that the bound is convex in s^2
/// and largest at an end. In the wall of a round tube the shear stress is v c with c^2 + s^2 = 1;
/// the bound is then a parabola in c whose crest, where it lies inside, adds `extra` at the extreme
/// fibre.
///
/// Where that argument needs more than the peak stresses:
/// - I, channel, T: the flow along a flange, largest beside the web and taken everywhere in it,
/// joins
///   the full bending stress.
/// - T: the shear stress in the stem is a parabola over the distance from the neutral axis to the
///   tip, up to the flange; so no junction is needed.
/// - Channel: a y load's flow turns into the web and is largest at its ends; it is taken all along
///   the web, with the bending stress that M_z has there.
/// - Angle in one plane of loads: in each leg sigma is linear and tau = k (sigma_tip^2 - sigma^2),
///   so that the bound is convex in sigma^2 and largest at a tip, at a neutral axis, or at the
///   heel, which lies on the curve of the leg that the neutral axis cuts. In two planes the peaks
///   may meet.
/// - Hexagon: z loads have tau <= v and <= v (1 - s^2) / (1 - w), w = 0.3007, with v the peak, so
///   that the bound is largest at s^2 = w or at the end.
/// - Elliptical tube, polygon: peak shear, summed over both planes, with full bending.
[[nodiscard]] BISMAR_API StressPoints stress_points(const SectionProperties& section,
                                                    const StationStresses& stresses);

/// Square of the von Mises stress that bounds the point's part of the section [Pa^2].
[[nodiscard]] BISMAR_API double equivalent_squared(const StressPoint& point);

}  // namespace bismar::mechanics
