// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstdint>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, the place being
// the argument's name, for an argument outside the range that is stated beside it.

/// Elastic critical (Euler) load of a column [N].
///
///     N_cr = pi^2 E I / (K L)^2
///
/// Straight, concentrically loaded, elastic: an upper bound on resistance, never itself a check.
/// @param youngs_modulus  E [Pa], > 0.  @param second_moment  I [m^4], > 0.
/// @param effective_length  K L [m], > 0.
/// Source: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., section 2.1 (from memory).
[[nodiscard]] BISMAR_API double euler_critical_load(double youngs_modulus,
                                                    double second_moment,
                                                    double effective_length);

/// Relative slenderness [-].
///
///     lambda-bar = sqrt(A f / N_cr)
///
/// For timber f is the characteristic compressive strength and N_cr is taken with E_0.05, which is
/// lambda_rel = (lambda / pi) sqrt(f_c,0,k / E_0.05) of EN 1995-1-1 (6.21).
/// @param area  A [m^2], > 0.  @param strength  f [Pa], > 0.  @param critical_load  N_cr [N], > 0.
/// Source: EN 1993-1-1:2005 6.3.1.3.
[[nodiscard]] BISMAR_API double relative_slenderness(double area,
                                                     double strength,
                                                     double critical_load);

/// A column curve: how far a member falls below both squash load and Euler load.
struct ColumnCurve {
  double alpha = 0.0;     ///< Imperfection factor [-], >= 0.
  double lambda_0 = 0.0;  ///< No reduction up to this relative slenderness [-], >= 0.
};

/// Reduction factor of a column curve, 0 < chi <= 1 [-].
///
///     chi = 1 / (Phi + sqrt(Phi^2 - lambda^2)),  Phi = 1/2 [1 + alpha (lambda - lambda_0) +
///     lambda^2]
///
/// and 1 for lambda <= lambda_0. One formula serves EN 1993-1-1 (6.49), EN 1999-1-1 (6.50) and, as
/// k_c, EN 1995-1-1 (6.25).
/// @param curve  See the functions below.  @param slenderness  lambda-bar [-], >= 0.
[[nodiscard]] BISMAR_API double reduction_factor(const ColumnCurve& curve, double slenderness);

/// The buckling curves of steel.
enum class BucklingCurve : std::uint8_t { a0, a, b, c, d };

/// alpha 0.13, 0.21, 0.34, 0.49, 0.76; lambda_0 0.2. Source: EN 1993-1-1:2005 Table 6.1.
[[nodiscard]] BISMAR_API ColumnCurve steel_curve(BucklingCurve curve);
/// Class A (heat-treated) alpha 0.20, lambda_0 0.10; class B (others) 0.32, 0. The weld factor
/// kappa is 1: unwelded members. Source: EN 1999-1-1:2007 Table 6.6 (class B from memory).
[[nodiscard]] BISMAR_API ColumnCurve aluminium_curve(bool class_a);
/// alpha = beta_c: 0.2 solid timber, 0.1 glued laminated timber and LVL; lambda_0 0.3.
/// Source: EN 1995-1-1:2004 6.3.2.
[[nodiscard]] BISMAR_API ColumnCurve timber_curve(bool glued);

/// The axis about which a column bends when it buckles.
enum class BendingAxis : std::uint8_t { y, z };

/// The curve of a section for grades up to S420.
///
/// Rolled I or H, h/b > 1.2: flange up to 40 mm y a, z b; up to 100 mm y b, z c. h/b <= 1.2: flange
/// up to 100 mm y b, z c; above 100 mm both d (also for h/b > 1.2, which the table does not list).
/// Hollow: hot finished a, cold formed c. Solid, channel, T: c. Angle: b. Anything whose forming is
/// not known: c. Source: EN 1993-1-1:2005 Table 6.2.
[[nodiscard]] BISMAR_API BucklingCurve buckling_curve(const SectionProperties& section,
                                                      BendingAxis axis);

/// Critical load of a column by Johnson's parabola, Euler's curve beyond it [N].
///
///     P_cr = A S_y [1 - S_y (KL/r)^2 / (4 pi^2 E)]   for KL/r < sqrt(2 pi^2 E / S_y)
///
/// @param area  A [m^2], > 0.  @param yield_strength  S_y [Pa], > 0.  @param youngs_modulus  E
/// [Pa], > 0.
/// @param slenderness  KL/r [-], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 4-13 (section from memory).
[[nodiscard]] BISMAR_API double johnson_critical_load(double area,
                                                      double yield_strength,
                                                      double youngs_modulus,
                                                      double slenderness);

/// An eccentrically loaded, pin-ended column.
struct EccentricColumn {
  double load = 0.0;                ///< P [N], > 0.
  double area = 0.0;                ///< A [m^2], > 0.
  double radius_of_gyration = 0.0;  ///< r [m], > 0.
  double effective_length = 0.0;    ///< K L [m], > 0.
  double youngs_modulus = 0.0;      ///< E [Pa], > 0.
  double eccentricity = 0.0;        ///< e [m], >= 0.
  double fibre_distance = 0.0;      ///< c, from the centroid to the extreme fibre [m], > 0.
};

/// Largest compressive stress by the secant formula [Pa]; +infinity at and beyond the Euler load.
///
///     sigma = P/A [1 + (e c / r^2) sec((L / 2r) sqrt(P / (E A)))]
///
/// Source: Timoshenko and Gere, section 1.13 (section from memory).
[[nodiscard]] BISMAR_API double secant_stress(const EccentricColumn& column);

/// Critical stress of a column without slender elements [Pa].
///
///     F_e = pi^2 E / (KL/r)^2
///     F_cr = 0.658^(F_y/F_e) F_y  for KL/r <= 4.71 sqrt(E/F_y),  0.877 F_e beyond
///
/// @param yield_strength  F_y [Pa], > 0.  @param youngs_modulus  E [Pa], > 0.
/// @param slenderness  KL/r [-], > 0.
/// Source: AISC 360-16 E3. It serves as a second opinion in checks; limit states use the EN curves.
[[nodiscard]] BISMAR_API double aisc_critical_stress(double yield_strength,
                                                     double youngs_modulus,
                                                     double slenderness);

}  // namespace bismar
