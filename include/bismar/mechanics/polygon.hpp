// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstddef>
#include <span>
#include <vector>

namespace bismar {

/// The most points that a polygon may have, holes included: the torsion problem is dense.
inline constexpr std::size_t most_polygon_points = 500;

/// A section of any outline with straight edges, holes included.
///
/// Exact to rounding: area, perimeters, I_y, I_z, I_yz (Green's integrals), envelope, W_el (I over
/// the distance of the farther side), W_pl (about the line parallel to the axis that halves the
/// area), A_v, A_s to 1e-9. `fibres` are the corners of the convex hull from the centroid.
///
///     A_v,z = least of t / Q over all cuts z = const,
///     Q = (I_z S_y - I_yz S_z) / (I_y I_z - I_yz^2),   A_s,z = 1 / integral of Q^2 / t dz
///
/// S_y and S_z are first moments of what lies beyond the cut, t is the material's whole width in
/// the cut, so that V Q / t is the mean shear stress over it (V S / (I t) where I_yz = 0); the peak
/// along a cut, and in cuts that run otherwise (the flange of an I), is higher. A_s counts the
/// energy of that mean stress alone, which makes it an upper bound.
///
/// `wall` is the least distance across material: between two edges that are not neighbours and
/// whose outward normals are more than 120 degrees apart, or from a re-entrant corner to an edge or
/// a re-entrant corner that faces it; where there is none (a triangle), the least width of the
/// hull. A sharp tip does not count. The ruling dimension is the diameter of the largest circle in
/// the material, at most 1 % below it.
///
/// I_t and W_t: St Venant torsion of the outline itself by boundary elements for Prandtl's stress
/// function, constant on every hole, the warp closing round it. Elements shorten towards corners
/// and are refined until I_t changes by less than 1e-3 and the peak stress by less than 3 %, or
/// until 1600 unknowns do not suffice (I_t has then settled to 1e-3, or it is a fault). A
/// refinement lowers the error of I_t by about ten times: it was within 1e-4 of series, closed
/// forms and finer divisions for every section tried, W_t within 2 %.
///
/// At a sharp re-entrant corner the elastic stress has no bound. On both sides of it W_t leaves out
/// half the local thickness (half the least of both adjoining edges and the corner's distance from
/// any other edge), at most a quarter of the edge. A fillet there is a notch, whose factor is the
/// caller's. Time, measured on one core of a server: 0.5 to 20 milliseconds for up to a dozen
/// corners, up to 80 where the section is thin (500 : 1), one second for 500 points in a circle, a
/// thin ring or a spiral.
///
/// Not determined: the warping constant and the shear centre (I_w = 0, y_shear = z_shear = 0: loads
/// act through the shear centre, wherever it is), plates (empty: local buckling of a thin part is
/// not checked) and the web-flange junction.
///
/// @param outer  Points in order, either way round, in any origin [m]; at least 3.
/// @param holes  The same for each hole; holes lie inside `outer` and apart from it and each other.
/// @throws bismar::Error  all faults at once; the place is "/outer", "/holes/0", or that with the
///   index of the point or of the edge that begins there ("/outer/3", "/holes/0/2"): missing (fewer
///   than 3 points), not_finite, duplicate (a repeated point), out_of_range (no area; too many
///   points; thin beyond measure: the larger side of the outline's box is more than 2000 times
///   twice the area over the perimeter, holes included, which is the mean thickness), conflict
///   (self-intersection; a hole outside, across or in touch with the outline or another hole; the
///   first place of each). Closer than 1e-9 of the outline's size is in touch. unsupported, place
///   "/outer": torsion did not settle to 1e-3.
/// Source: Timoshenko and Goodier, Theory of Elasticity, 3rd ed., chapter 10 (sections 104 to 116
/// from memory); V S / (I t): any text on strength of materials; unsymmetrical bending: Young and
/// Budynas, Roark's Formulas for Stress and Strain, 7th ed., 8.1 (from memory).
[[nodiscard]] BISMAR_API SectionProperties
polygon(std::span<const SectionPoint> outer, std::span<const std::vector<SectionPoint>> holes = {});

/// The faults of the same points without the section: all that polygon() throws but `unsupported`.
/// Time: proportional to the square of the number of points, 10 milliseconds for 500.
/// @throws bismar::Error  as polygon() for the points.
BISMAR_API void check_polygon(std::span<const SectionPoint> outer,
                              std::span<const std::vector<SectionPoint>> holes = {});

/// Centroid of the same section, in the coordinates of its points [m].
/// @throws bismar::Error  as polygon() for the points.
[[nodiscard]] BISMAR_API SectionPoint polygon_centroid(
    std::span<const SectionPoint> outer, std::span<const std::vector<SectionPoint>> holes = {});

}  // namespace bismar
