// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, all faults at
// once, the place being the argument's name (fields: "column.length"), for an argument outside the
// range that is stated beside it.

/// A column that may turn about its own axis.
struct TorsionalColumn {
  double youngs_modulus = 0.0;  ///< E [Pa], > 0.
  double shear_modulus = 0.0;   ///< G [Pa], > 0.
  double length = 0.0;          ///< L_T, between points held against twist, free to warp [m], > 0.
};

/// Shear centre from the centroid along the principal axes u (major) and v [m].
struct ShearCentre {
  double u = 0.0;
  double v = 0.0;
};

/// The shear centre of a section turned to its principal axes.
[[nodiscard]] BISMAR_API ShearCentre principal_shear_centre(const SectionProperties& section);

/// Polar radius of gyration about the shear centre, squared [m^2].
///
///     i_0^2 = (I_u + I_v) / A + y_0^2 + z_0^2
[[nodiscard]] BISMAR_API double polar_radius_squared(const SectionProperties& section);

/// Elastic critical load of torsional buckling [N].
///
///     N_cr,T = (G I_t + pi^2 E I_w / L_T^2) / i_0^2
///
/// @param section  A, I_y, I_z, I_t > 0; I_w >= 0.
/// Source: EN 1993-1-3:2006 (6.33a); Timoshenko and Gere, Theory of Elastic Stability, 2nd ed.,
/// section 5.4 (from memory).
[[nodiscard]] BISMAR_API double torsional_critical_load(const SectionProperties& section,
                                                        const TorsionalColumn& column);

/// Elastic critical load of torsional-flexural buckling [N], the least of all modes.
///
/// The first root of
///
///     i_0^2 (N - N_u)(N - N_v)(N - N_T) - N^2 u_0^2 (N - N_v) - N^2 v_0^2 (N - N_u) = 0
///
/// with N_u, N_v the Euler loads in bending about u and v, N_T torsional_critical_load(). It is
/// at most the least of the three, and that where the shear centre is the centroid. With v_0 = 0 it
/// is min(N_v, N_uT):
///
///     N_uT = (i_0^2 / 2 i_s^2) [N_u + N_T - sqrt((N_u + N_T)^2 - 4 N_u N_T i_s^2 / i_0^2)],
///     i_s^2 = i_0^2 - u_0^2
///
/// otherwise by bisection to rounding.
/// @param major  N_u, bending about u [N], > 0.  @param minor  N_v, bending about v [N], > 0.
/// Source: Timoshenko and Gere, section 5.5 (from memory); EN 1993-1-3:2006 (6.35), AISC 360-16
/// (E4-4) (from memory).
[[nodiscard]] BISMAR_API double torsional_flexural_critical_load(const SectionProperties& section,
                                                                 const TorsionalColumn& column,
                                                                 double major,
                                                                 double minor);

}  // namespace bismar
