// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

namespace bismar {

// Shear coefficients k of Timoshenko's beam [-]: the mean shear strain of a section is V / (k A G),
// so that k A is a shear area of the deflection. They differ from the energy shear areas of
// SectionProperties (5/6 of a rectangle), to which they come near as Poisson's ratio goes to zero.
//
// All: static bending of a prismatic isotropic bar by a load along an axis of symmetry (the
// semicircle: along its straight side's normal).
// @param poissons_ratio  nu [-], 0 to 0.5.
// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
// Source: Cowper, The Shear Coefficient in Timoshenko's Beam Theory, Journal of Applied Mechanics
// 33 (1966), 335-340 (from memory; the limits agree: tube with no bore, ellipse with equal axes and
// I without flanges are circle, circle and rectangle, a square box is the square tube).

/// 10 (1 + nu) / (12 + 11 nu), whatever the sides.
[[nodiscard]] BISMAR_API double shear_coefficient_rectangle(double poissons_ratio);

/// 6 (1 + nu) / (7 + 6 nu)
[[nodiscard]] BISMAR_API double shear_coefficient_circle(double poissons_ratio);

/// 12 (1 + nu) n^2 (3 n^2 + 1) / [(40 + 37 nu) n^4 + (16 + 10 nu) n^2 + nu]
/// @param axis_ratio  n, the axis along the load over the other [-], > 0.
[[nodiscard]] BISMAR_API double shear_coefficient_ellipse(double axis_ratio, double poissons_ratio);

/// (1 + nu) / (1.305 + 1.273 nu); the source gives four digits.
[[nodiscard]] BISMAR_API double shear_coefficient_semicircle(double poissons_ratio);

/// 6 (1 + nu) (1 + m^2)^2 / [(7 + 6 nu) (1 + m^2)^2 + (20 + 12 nu) m^2]
/// @param radius_ratio  m, inner over outer radius [-], 0 to 1.
[[nodiscard]] BISMAR_API double shear_coefficient_round_tube(double radius_ratio,
                                                             double poissons_ratio);

/// 2 (1 + nu) / (4 + 3 nu): the limit of the tube at m = 1.
[[nodiscard]] BISMAR_API double shear_coefficient_thin_round_tube(double poissons_ratio);

/// 20 (1 + nu) / (48 + 39 nu)
[[nodiscard]] BISMAR_API double shear_coefficient_thin_square_tube(double poissons_ratio);

/// Thin-walled box, load along h:
///
///     10 (1 + nu) (1 + 3m)^2 / [(12 + 72m + 150m^2 + 90m^3) + nu (11 + 66m + 135m^2 + 90m^3)
///         + 10 n^2 ((3 + nu) m + 3 m^2)]
///
/// @param flange_ratio  m = b t_f / (h t_w): one flange's area over one web's [-], >= 0.
/// @param width_ratio  n = b / h [-], >= 0.
[[nodiscard]] BISMAR_API double shear_coefficient_thin_box(double flange_ratio,
                                                           double width_ratio,
                                                           double poissons_ratio);

/// Thin-walled I, load along the web:
///
///     10 (1 + nu) (1 + 3m)^2 / [(12 + 72m + 150m^2 + 90m^3) + nu (11 + 66m + 135m^2 + 90m^3)
///         + 30 n^2 (m + m^2) + 5 nu n^2 (8m + 9m^2)]
///
/// @param flange_ratio  m = 2 b t_f / (h t_w): both flanges' area over the web's [-], >= 0.
/// @param width_ratio  n = b / h [-], >= 0.
[[nodiscard]] BISMAR_API double shear_coefficient_i_section(double flange_ratio,
                                                            double width_ratio,
                                                            double poissons_ratio);

}  // namespace bismar
