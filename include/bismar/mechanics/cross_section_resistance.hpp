// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

namespace bismar {

// Resistances of one cross-section, for hand calculation and checks; the limit states hold elastic
// stresses. All functions throw bismar::Error with not_finite or out_of_range, all faults at once,
// the place being the argument's name, for an argument outside the range that is stated beside it.

/// Bending resistance W f [N m].
/// @param modulus  W, plastic (class 1, 2) or elastic (class 3) [m^3], > 0.
/// @param strength  f [Pa], > 0.  Source: EN 1993-1-1:2005 (6.13), (6.14), gamma_M0 = 1.
[[nodiscard]] BISMAR_API double bending_resistance(double modulus, double strength);

/// Plastic shear resistance [N]: A_v f_y / sqrt(3).
/// @param shear_area  A_v [m^2], > 0.  @param yield_strength  f_y [Pa], > 0.
/// Source: EN 1993-1-1:2005 (6.18), gamma_M0 = 1.
[[nodiscard]] BISMAR_API double plastic_shear_resistance(double shear_area, double yield_strength);

/// Share of the webs in the area [-].
///
///     a = (A - 2 b t_f) / A <= 0.5
///
/// For a rectangular tube a_w with its wall for t_f.
/// @param area  A [m^2], > 0.  @param width  b [m], > 0.  @param flange  t_f [m], > 0; 2 b t_f < A.
/// Source: EN 1993-1-1:2005 6.2.9.1(5).
[[nodiscard]] BISMAR_API double web_share(double area, double width, double flange);

/// Plastic moment about y that an axial force leaves, over M_pl,y [-], of an I or a rectangular
/// tube.
///
///     M_N,y / M_pl,y = (1 - n) / (1 - 0.5 a) <= 1
///
/// For a square tube about z likewise.
/// @param axial  n = N_Ed / N_pl,Rd in [0, 1].  @param web_share  a, in [0, 0.5].
/// Source: EN 1993-1-1:2005 (6.36), (6.39).
[[nodiscard]] BISMAR_API double plastic_moment_share_y(double axial, double web_share);

/// About z, of an I: 1 for n <= a, else 1 - ((n - a) / (1 - a))^2 [-].
/// Source: EN 1993-1-1:2005 (6.37), (6.38).
[[nodiscard]] BISMAR_API double plastic_moment_share_z(double axial, double web_share);

/// Of a round tube: 1 - n^1.7 [-]. Source: EN 1993-1-1:2005 6.2.9.1(5).
[[nodiscard]] BISMAR_API double plastic_moment_share_round(double axial);

/// Exponents of (M_y / M_N,y)^alpha + (M_z / M_N,z)^beta <= 1.
struct BiaxialExponents {
  double alpha = 1.0;
  double beta = 1.0;
};
/// Of an I: alpha = 2, beta = 5 n >= 1. Source: EN 1993-1-1:2005 6.2.9.1(6).
[[nodiscard]] BISMAR_API BiaxialExponents biaxial_exponents_i(double axial);
/// Of a rectangular tube: alpha = beta = 1.66 / (1 - 1.13 n^2) <= 6.
/// Source: EN 1993-1-1:2005 6.2.9.1(6).
[[nodiscard]] BISMAR_API BiaxialExponents biaxial_exponents_tube(double axial);

/// Nominal bending strength of an I about its minor axis with flange local buckling [N m].
///
///     M_p = F_y Z_y <= 1.6 F_y S_y;   lambda_p = 0.38 sqrt(E/F_y), lambda_r = 1.0 sqrt(E/F_y)
///     M_n = M_p - (M_p - 0.7 F_y S_y) (lambda - lambda_p) / (lambda_r - lambda_p)   between them
///     M_n = 0.69 E / lambda^2 S_y                                                   beyond
///
/// A second opinion in checks.
struct AmericanMinorAxis {
  double strength = 0.0;  ///< M_n [N m]
  double lambda_p = 0.0;  ///< Compact up to it [-].
  double lambda_r = 0.0;  ///< Slender beyond it [-].
};
/// @param yield_strength  F_y [Pa], > 0.  @param youngs_modulus  E [Pa], > 0.
/// @param plastic_modulus  Z_y [m^3], > 0.  @param elastic_modulus  S_y [m^3], > 0.
/// @param flange_slenderness  b / (2 t_f) [-], > 0.
/// Source: AISC 360-16 F6 (the limits of Table B4.1b).
[[nodiscard]] BISMAR_API AmericanMinorAxis aisc_minor_axis_strength(double yield_strength,
                                                                    double youngs_modulus,
                                                                    double plastic_modulus,
                                                                    double elastic_modulus,
                                                                    double flange_slenderness);

}  // namespace bismar
