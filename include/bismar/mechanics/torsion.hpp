// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

namespace bismar {

/// St Venant torsion coefficients of a solid rectangle with long side b and short side h.
struct RectangleTorsion {
  double k1 = 0.0;  ///< Peak shear stress tau = T / (k1 b h^2), in the middle of the long side [-].
  double k2 = 0.0;  ///< Torsion constant I_t = k2 b h^3 [-].
};

/// Coefficients of a solid rectangle whose sides have the ratio b/h.
///
///     k2 = 1/3 [1 - 192/pi^5 (h/b) sum_{n odd} tanh(n pi b / 2h) / n^5]
///     k1 = k2 / [1 - 8/pi^2 sum_{n odd} 1 / (n^2 cosh(n pi b / 2h))]
///
/// The first sum is split into its limit 31/32 zeta(5) and a remainder that falls by exp(-pi b/h) a
/// term, so both series are summed until a term no longer changes the sum.
/// Accuracy: relative error below 1e-14 against the series summed term by term.
///
/// @param side_ratio  b/h, long side over short side [-], finite and >= 1.
/// @throws bismar::Error  not_finite or out_of_range, place "side_ratio".
/// Source: Timoshenko and Goodier, Theory of Elasticity, 3rd ed., section 109 (section from
/// memory).
[[nodiscard]] BISMAR_API RectangleTorsion rectangle_torsion(double side_ratio);

/// Peak shear stress in a thin-walled closed tube [Pa].
///
///     tau = T / (2 A_m t)
///
/// Constant over the thickness; the error grows with t over the tube's size (about t/r).
/// @param torque  T [N m], finite.  @param enclosed_area  A_m, inside the mid-line [m^2], > 0.
/// @param wall  t, the least wall [m], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: Bredt's first formula; Timoshenko and Goodier, section 116 (section from memory).
[[nodiscard]] BISMAR_API double bredt_shear_stress(double torque,
                                                   double enclosed_area,
                                                   double wall);

/// Torsion constant of a thin-walled closed tube of constant wall [m^4].
///
///     J = 4 A_m^2 t / U
///
/// @param enclosed_area  A_m [m^2], > 0.  @param wall  t [m], > 0.
/// @param mid_line  U, length of the mid-line [m], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: Bredt's second formula; Timoshenko and Goodier, section 116 (section from memory).
[[nodiscard]] BISMAR_API double bredt_torsion_constant(double enclosed_area,
                                                       double wall,
                                                       double mid_line);

}  // namespace bismar
