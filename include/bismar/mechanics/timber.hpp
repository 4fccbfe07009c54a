// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, all faults at
// once, the place being the argument's name, for an argument outside the range that is stated
// beside it.

/// Kinds of timber that rules tell apart.
enum class TimberKind : std::uint8_t { solid, glued_laminated };

/// How long a load lasts in all. Source: EN 1995-1-1:2004 Table 2.1.
enum class LoadDuration : std::uint8_t {
  permanent,      ///< More than 10 years.
  long_term,      ///< 6 months to 10 years.
  medium_term,    ///< 1 week to 6 months.
  short_term,     ///< Less than a week.
  instantaneous,  ///< Impact, gusts.
};

/// Modification factor k_mod of solid timber, glued laminated timber, LVL and plywood for its
/// service class [-].
///
///                       permanent  long  medium  short  instantaneous
///     service class 1        0.60  0.70    0.80   0.90           1.10
///     service class 2        0.60  0.70    0.80   0.90           1.10
///     service class 3        0.50  0.55    0.65   0.70           0.90
///
/// @param service_class  1, 2 or 3.  Source: EN 1995-1-1:2004 Table 3.1.
[[nodiscard]] BISMAR_API double modification_factor(int service_class, LoadDuration duration);

/// Size factor k_h on bending and tensile strength [-].
///
///     solid, rho_k <= 700 kg/m^3   min((150 mm / h)^0.2, 1.3) for h < 150 mm, else 1
///     glued laminated              min((600 mm / h)^0.1, 1.1) for h < 600 mm, else 1
///
/// @param depth  h, depth in bending or width in tension [m], > 0.
/// Source: EN 1995-1-1:2004 3.2(3), 3.3(3).
[[nodiscard]] BISMAR_API double size_factor(TimberKind kind, double depth);

/// Critical bending stress of a rectangle [Pa].
///
///     sigma_m,crit = 0.78 b^2 E_0.05 / (h l_ef)
///
/// Softwood, E_0.05 / G_0.05 = 16.
/// @param width  b [m], > 0.  @param height  h [m], > 0.  @param modulus  E_0.05 [Pa], > 0.
/// @param effective_length  l_ef [m], > 0.
/// Source: EN 1995-1-1:2004 (6.32).
[[nodiscard]] BISMAR_API double timber_critical_bending_stress(double width,
                                                               double height,
                                                               double modulus,
                                                               double effective_length);

/// Factor k_crit of lateral buckling of beams [-].
///
///     1 for lambda <= 0.75,   1.56 - 0.75 lambda up to 1.4,   1 / lambda^2 beyond
///
/// It jumps by 0.25 % at 0.75 and by 0.05 % at 1.4.
/// @param slenderness  lambda_rel,m = sqrt(f_m,k / sigma_m,crit) [-], >= 0.
/// Source: EN 1995-1-1:2004 (6.34).
[[nodiscard]] BISMAR_API double lateral_buckling_factor(double slenderness);

/// The loads of l_ef.
enum class TimberLoad : std::uint8_t { uniform_moment, uniform_load, central_load };
/// l_ef / l of a beam on two supports held against twist: 1, 0.9, 0.8 [-]; 2 h are added to l_ef
/// where the load acts on the compressed edge, 0.5 h taken off where on the other.
/// Source: EN 1995-1-1:2004 Table 6.1.
[[nodiscard]] BISMAR_API double lateral_length_factor(TimberLoad load);

/// Stresses over design strengths of a column with bending [-], each >= 0.
struct TimberShares {
  double axial_y = 0.0;   ///< sigma_c / (k_c,y f_c,d)
  double axial_z = 0.0;   ///< sigma_c / (k_c,z f_c,d)
  double moment_y = 0.0;  ///< sigma_m,y / f_m,y,d
  double moment_z = 0.0;  ///< sigma_m,z / f_m,z,d
};
/// Left sides of (6.23) and (6.24) [-].
struct TimberSums {
  double about_y = 0.0;  ///< axial_y + moment_y + k_m moment_z
  double about_z = 0.0;  ///< axial_z + k_m moment_y + moment_z
};
/// @param k_m  0.7 for rectangles, else 1.
/// Source: EN 1995-1-1:2004 6.3.2(3), 6.1.6(2).
[[nodiscard]] BISMAR_API TimberSums timber_column_sums(const TimberShares& shares, double k_m);

}  // namespace bismar
