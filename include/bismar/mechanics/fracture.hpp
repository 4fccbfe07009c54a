// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/numeric/function_ref.hpp>

#include <array>
#include <cstdint>
#include <optional>

namespace bismar {

// Linear elastic fracture mechanics, opening mode. It holds where the plastic zone is small beside
// crack and ligament; where it is not, yielding of the net section comes first and is another
// check. All functions of this header throw bismar::Error with not_finite or out_of_range, the
// place being the argument's name, for an argument outside the range that is stated beside it.

/// Stress intensity factor [Pa m^0.5].
///
///     K = F sigma sqrt(pi a)
///
/// @param geometry_factor  F [-], > 0: one of the functions below.
/// @param stress  sigma, nominal on the section without the crack [Pa], >= 0 (tension).
/// @param crack_length  a [m], > 0: depth, or half the length of a crack with two tips.
/// Source: Dowling, Mechanical Behavior of Materials, 4th ed., section 8.4 (section from memory).
[[nodiscard]] BISMAR_API double stress_intensity(double geometry_factor,
                                                 double stress,
                                                 double crack_length);

/// The formulas in use for a centre crack.
enum class CentreCrackFormula : std::uint8_t {
  secant,   ///< sqrt(sec(pi alpha / 2)); within 0.3 % of tada to alpha = 0.6.
  dowling,  ///< (1 - 0.5 alpha + 0.326 alpha^2) / sqrt(1 - alpha); within 0.9 % of tada to 0.6.
  tada,     ///< (1 - 0.025 alpha^2 + 0.06 alpha^4) sqrt(sec(pi alpha / 2)); within 0.1 %.
};

/// Centre crack of length 2a in a plate of width 2b in tension, F [-].
/// @param relative_length  alpha = a/b [-], 0 <= alpha < 1.
/// Source: Tada, Paris and Irwin, The Stress Analysis of Cracks Handbook, sheet 2.1; Dowling,
/// Mechanical Behavior of Materials, 4th ed., Fig. 8.12 (formulas from memory, accuracies too).
[[nodiscard]] BISMAR_API double centre_crack_factor(
    double relative_length, CentreCrackFormula formula = CentreCrackFormula::tada);

/// The formulas in use for an edge crack in tension.
enum class EdgeCrackFormula : std::uint8_t {
  /// 1.12 - 0.231 alpha + 10.55 alpha^2 - 21.72 alpha^3 + 30.39 alpha^4; within 0.5 % to 0.6.
  polynomial,
  /// 0.265 (1 - alpha)^4 + (0.857 + 0.265 alpha) / (1 - alpha)^1.5; up to 2.3 % above the
  /// polynomial (near alpha = 0.06), and right in the limit alpha = 1.
  full_range,
  /// sqrt(tan x / x) [0.752 + 2.02 alpha + 0.37 (1 - sin x)^3] / cos x, x = pi alpha / 2; up to
  /// 1.4 % above the polynomial (near alpha = 0.04).
  tada,
};

/// Crack of depth a from one edge of a plate of width b in tension, ends free to turn, F [-].
/// @param relative_depth  alpha = a/b [-], 0 <= alpha < 1.
/// Source: Tada, Paris and Irwin, The Stress Analysis of Cracks Handbook, sheet 2.10 (polynomial
/// seen in print, the others from memory); Dowling, 4th ed., Fig. 8.12. Accuracies: against the
/// integral-equation values of Kaya and Erdogan, 1987 (from memory).
[[nodiscard]] BISMAR_API double edge_crack_factor(
    double relative_depth, EdgeCrackFormula formula = EdgeCrackFormula::polynomial);

/// Crack of depth a from the tension edge of a plate of depth b in pure bending, F [-]; the stress
/// is that of the extreme fibre, 6 M / (t b^2).
///
///     F = 1.122 - 1.40 alpha + 7.33 alpha^2 - 13.08 alpha^3 + 14.0 alpha^4
///
/// Within 0.5 % to alpha = 0.6.
/// @param relative_depth  alpha = a/b [-], 0 <= alpha < 1.
/// Source: Tada, Paris and Irwin, The Stress Analysis of Cracks Handbook, sheet 2.13 (from memory).
[[nodiscard]] BISMAR_API double edge_crack_bending_factor(double relative_depth);

/// Largest alpha at which the polynomials of an edge crack are known to be within 0.5 %.
inline constexpr double edge_crack_polynomial_limit = 0.6;

/// Penny-shaped crack of radius a deep inside a body in tension, F = 2 / pi [-]. Exact.
/// Source: Sneddon, Proc. Roy. Soc. A 187 (1946) (from memory).
[[nodiscard]] BISMAR_API double penny_crack_factor();

/// Elliptical crack deep inside a body in tension; K = F sigma sqrt(pi a), a the minor semi-axis.
struct EmbeddedEllipse {
  double phi_squared = 0.0;  ///< E(k)^2, the complete elliptic integral of the second kind [-].
  double minor_end = 0.0;    ///< F at the ends of the minor axis, 1 / E(k): the largest [-].
  double major_end = 0.0;    ///< F at the ends of the major axis, sqrt(a/c) / E(k) [-].
};

///     F(phi) = [(a/c)^2 cos^2 phi + sin^2 phi]^(1/4) / E(k),   k^2 = 1 - (a/c)^2
///
/// E(k) by the arithmetic-geometric mean, to rounding. Exact solution.
/// @param axis_ratio  a/c [-], 0 < a/c <= 1.
/// Source: Irwin, J. Appl. Mech. 29 (1962) (from memory).
[[nodiscard]] BISMAR_API EmbeddedEllipse embedded_ellipse_factors(double axis_ratio);

/// Newman's approximation of E(k)^2, within 0.3 % [-].
///
///     Q = 1 + 1.464 (a/c)^1.65
///
/// @param axis_ratio  a/c [-], 0 < a/c <= 1.
/// Source: Newman and Raju, Eng. Fract. Mech. 15 (1981) 185-192.
[[nodiscard]] BISMAR_API double crack_shape_parameter(double axis_ratio);

/// A semi-elliptical crack on the surface of a plate, depth a, half-length c.
struct SurfaceCrack {
  double depth_to_half_length = 1.0;  ///< a/c [-], 0 < a/c <= 1.
  double relative_depth = 0.0;        ///< a/t, t the thickness [-], 0 <= a/t <= 0.8.
  double relative_length = 0.0;       ///< c/b, b half the width of the plate [-], 0 <= c/b <= 0.5.
};

/// F of tension at one place of the crack front [-]: K = F sigma sqrt(pi a).
///
///     F = [M1 + M2 (a/t)^2 + M3 (a/t)^4] g f_phi f_w / sqrt(Q)
///     M1 = 1.13 - 0.09 a/c,   M2 = -0.54 + 0.89 / (0.2 + a/c)
///     M3 = 0.5 - 1 / (0.65 + a/c) + 14 (1 - a/c)^24
///     g = 1 + [0.1 + 0.35 (a/t)^2] (1 - sin phi)^2
///     f_phi = [(a/c)^2 cos^2 phi + sin^2 phi]^(1/4),   f_w = sqrt(sec(pi c / 2b sqrt(a/t)))
///
/// Fitted to finite-element results, within 5 % of them for the ranges of SurfaceCrack.
/// @param angle  phi [rad], 0 (surface) <= phi <= pi/2 (deepest point).
/// Source: Newman and Raju, Eng. Fract. Mech. 15 (1981) 185-192 (accuracy and ranges from memory).
[[nodiscard]] BISMAR_API double surface_crack_factor(const SurfaceCrack& crack, double angle);

/// What bending does over what tension of the same surface stress does, H [-]:
/// K = F (sigma_t + H sigma_b) sqrt(pi a).
///
///     H = H1 + (H2 - H1) sin^p phi,   p = 0.2 + a/c + 0.6 a/t
///     H1 = 1 - 0.34 a/t - 0.11 (a/c)(a/t),   H2 = 1 + G1 a/t + G2 (a/t)^2
///     G1 = -1.22 - 0.12 a/c,   G2 = 0.55 - 1.05 (a/c)^0.75 + 0.47 (a/c)^1.5
///
/// @param angle  phi as above.
/// Source: Newman and Raju, Eng. Fract. Mech. 15 (1981) 185-192 (from memory).
[[nodiscard]] BISMAR_API double surface_crack_bending_ratio(const SurfaceCrack& crack,
                                                            double angle);

/// What tension and bending do at one place of a crack front [-]:
/// K = (tension sigma_t + bending sigma_b) sqrt(pi a).
struct FrontFactors {
  double tension = 0.0;  ///< F
  double bending = 0.0;  ///< F H
};

/// Both factors from the surface to the deepest point, every 5 degrees of phi. In deep, long cracks
/// under bending the largest K lies between the two ends.
[[nodiscard]] BISMAR_API std::array<FrontFactors, 19> surface_crack_front(
    const SurfaceCrack& crack);

/// Critical crack length where the geometry factor does not change with it [m].
///
///     a_c = (K_Ic / (F sigma))^2 / pi
///
/// @param toughness  K_Ic [Pa m^0.5], > 0.  @param stress  sigma [Pa], > 0.
/// @param geometry_factor  F [-], > 0.
[[nodiscard]] BISMAR_API double critical_crack_length(double toughness,
                                                      double stress,
                                                      double geometry_factor);

/// Critical crack length where the geometry factor rises with the relative length a/b [m]: the root
/// of F(a/b) sigma sqrt(pi a) = K_Ic, to 1e-12 on the side where K <= K_Ic.
///
/// @param size  b [m], > 0.
/// @param geometry_factor  F(a/b) such that F(alpha) sqrt(alpha) rises; called with 0 < alpha <=
/// `largest`.
/// @param largest  Largest alpha for which F holds, 0 < largest <= 1.
/// @return nothing where not even the crack of relative length `largest` is critical.
[[nodiscard]] BISMAR_API std::optional<double> critical_crack_length(
    double toughness,
    double stress,
    double size,
    FunctionRef<double(double)> geometry_factor,
    double largest);

}  // namespace bismar
