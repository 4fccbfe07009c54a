// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstdint>
#include <functional>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, all faults at
// once, the place being the argument's name (fields: "beam.length"), for an argument outside the
// range that is stated beside it.

/// How the moment runs along a beam, and what its load does above the shear centre.
struct MomentFactors {
  double C1 = 1.0;  ///< Of the shape of the moment [-], > 0.
  double C2 = 0.0;  ///< Of a load off the shear centre [-], >= 0.
};

/// Uniform moment: C1 = 1, C2 = 0.
[[nodiscard]] BISMAR_API MomentFactors uniform_moment_factors();
/// Uniform load on two supports: C1 = 1.127, C2 = 0.454.
/// Source: access-steel NCCI SN003 (C1, C2 seen in a worked example).
[[nodiscard]] BISMAR_API MomentFactors uniform_load_factors();
/// Load at midspan on two supports: C1 = 1.348, C2 = 0.630. Source: NCCI SN003 (from memory).
[[nodiscard]] BISMAR_API MomentFactors central_load_factors();

/// C1 of a moment that is linear between the ends [-].
///
///     C1 = 1.77 - 1.04 psi + 0.27 psi^2 <= 2.60
///
/// Up to 12 % below the solution of the differential equation for psi <= 0: on the safe side.
/// @param end_ratio  psi, the lesser end moment over the greater, in [-1, 1].
/// Source: Eurocodes: Design of steel buildings with worked examples (2014), part 1.
[[nodiscard]] BISMAR_API double linear_moment_factor(double end_ratio);

/// Moments at the ends of a beam and at its quarters, magnitudes or signed [N m].
struct QuarterMoments {
  double largest = 0.0;         ///< max over the length of |M|, > 0.
  double quarter = 0.0;         ///< At L/4.
  double middle = 0.0;          ///< At L/2.
  double three_quarters = 0.0;  ///< At 3 L/4.
};

/// C1 of any moment diagram between two points held against twist [-].
///
///     C1 = 12.5 M_max / (2.5 M_max + 3 M_A + 4 M_B + 3 M_C)
///
/// Magnitudes. At least 1, at most 5. Not for a free end.
/// @param moments  Quarter moments of at most the largest magnitude.
/// Source: AISC 360-16 (F1-1).
[[nodiscard]] BISMAR_API double quarter_point_moment_factor(const QuarterMoments& moments);

/// Likewise, by the squares of the moments:
///
///     C1 = sqrt(35 M_max^2 / (M_max^2 + 9 M_A^2 + 16 M_B^2 + 9 M_C^2))
///
/// Not above the energy method's value in the tests, where the formula before is 13 % above it for
/// a central load between fixed ends.
/// Source: Serna et al., Journal of Constructional Steel Research 62 (2006) (from memory).
[[nodiscard]] BISMAR_API double quadratic_moment_factor(const QuarterMoments& moments);

/// A beam with a doubly symmetric section or a channel, bent about its strong axis y, held against
/// twist at both ends.
struct LateralTorsionalBeam {
  double youngs_modulus = 0.0;  ///< E [Pa], > 0.
  double shear_modulus = 0.0;   ///< G [Pa], > 0.
  double I_z = 0.0;             ///< Second moment about the weak axis [m^4], > 0.
  double I_t = 0.0;             ///< Torsion constant [m^4], > 0.
  double I_w = 0.0;             ///< Warping constant [m^6], >= 0.
  double length = 0.0;          ///< L between the points held [m], > 0.
  double k = 1.0;               ///< Effective length factor of turning in plan [-], > 0.
  double k_w = 1.0;             ///< Effective length factor of warping [-], > 0.
  MomentFactors factors = {};
  double load_height = 0.0;  ///< z_g, of the load above the shear centre [m]; > 0 is adverse.
};

/// Elastic critical moment [N m].
///
///     M_cr = C1 pi^2 E I_z / (k L)^2 [sqrt((k/k_w)^2 I_w/I_z + (k L)^2 G I_t / (pi^2 E I_z)
///            + (C2 z_g)^2) - C2 z_g]
///
/// Elastic, straight, small displacements before buckling: never itself a check.
/// Source: NCCI SN003 (three-factor formula); Timoshenko and Gere, Theory of Elastic Stability, 2nd
/// ed., chapter 6 (from memory).
[[nodiscard]] BISMAR_API double elastic_critical_moment(const LateralTorsionalBeam& beam);

/// What holds the ends of the beam of critical_load_factor().
enum class LateralEnds : std::uint8_t {
  forks,       ///< Held against twist and lateral displacement, free to turn in plan and to warp.
  cantilever,  ///< Fixed in all at x = 0, free at x = L.
};

/// The load case of critical_load_factor(), as functions of xi = x / L in [0, 1].
struct LateralLoading {
  std::function<double(double)> moment;     ///< M_y [N m].
  std::function<double(double)> load = {};  ///< q_z, positive downwards [N/m]; empty = none.
  double tip_load = 0.0;                    ///< Force at xi = 1 [N]; it counts for a cantilever.
  double load_height = 0.0;                 ///< z_g of `load` and `tip_load` [m].
};

/// The factor on a load case at which a beam buckles sideways, by Ritz's method [-].
///
/// The lateral displacement eliminated by E I_z v'' = -M phi, the energy
///
///     1/2 integral of E I_w phi''^2 + G I_t phi'^2 - (f M)^2 phi^2 / (E I_z) - f q z_g phi^2
///
/// loses definiteness at f. The twist is a sum of 12 sines (forks) or of 12 functions
/// 1 - cos((2 n - 1) pi xi / 2) (cantilever), the integrals by Simpson's rule with 240 intervals:
/// from above, within about 1e-4 for smooth moments. A second opinion for C1, C2 and k; `k`, `k_w`,
/// `factors` and `load_height` of `beam` are not read.
/// @throws bismar::Error  out_of_range, "loading": no factor up to 1e12 buckles it, or it does not
/// return
///   finite values.
/// Source: Timoshenko and Gere, chapter 6 (energy method, from memory); own derivation.
[[nodiscard]] BISMAR_API double critical_load_factor(const LateralTorsionalBeam& beam,
                                                     LateralEnds ends,
                                                     const LateralLoading& loading);

/// Elastic critical moment of a T bent in the plane of its stem [N m], the stem's tip in
/// compression.
///
///     M_cr = 1.95 E / L sqrt(I_z I_t) (B + sqrt(1 + B^2)),  B = -2.3 h / L sqrt(I_z / I_t)
///
/// With the tip in tension B is positive; that side is not offered, as the sign of a moment is not
/// always known. E/G = 2.6 is in the constant.
/// @param youngs_modulus  E [Pa], > 0.  @param second_moment  I_z, about the stem [m^4], > 0.
/// @param torsion_constant  I_t [m^4], > 0.  @param height  h [m], > 0.
/// @param length  L between points held against twist [m], > 0.
/// Source: AISC 360-16 (F9-4), (F9-5) (from memory).
[[nodiscard]] BISMAR_API double tee_critical_moment(double youngs_modulus,
                                                    double second_moment,
                                                    double torsion_constant,
                                                    double height,
                                                    double length);

/// Relative slenderness of a beam lambda_LT = sqrt(W f / M_cr) [-].
/// @param modulus  W, plastic (class 1, 2) or elastic [m^3], > 0.  @param strength  f [Pa], > 0.
/// @param critical_moment  M_cr [N m], > 0.  Source: EN 1993-1-1:2005 6.3.2.2(1).
[[nodiscard]] BISMAR_API double lateral_torsional_slenderness(double modulus,
                                                              double strength,
                                                              double critical_moment);

/// Curve of the general case: reduction_factor(steel_curve(curve), lambda_LT).
///
/// Rolled I: h/b <= 2 a, above b; every other section d.
/// Source: EN 1993-1-1:2005 6.3.2.2, Tables 6.3 and 6.4.
[[nodiscard]] BISMAR_API BucklingCurve lateral_torsional_curve(const SectionProperties& section);

/// Curve of the case for rolled sections: h/b <= 2 b, above c; every other section d.
/// Source: EN 1993-1-1:2005 Table 6.5.
[[nodiscard]] BISMAR_API BucklingCurve
rolled_lateral_torsional_curve(const SectionProperties& section);

/// Phi_LT of the case for rolled and equivalent welded sections [-].
///
///     Phi_LT = 1/2 [1 + alpha (lambda - lambda_0) + beta lambda^2],  lambda_0 = 0.4, beta = 0.75
///
/// @param curve  alpha by steel_curve().  @param slenderness  lambda_LT [-], >= 0.
/// Source: EN 1993-1-1:2005 6.3.2.3(1).
[[nodiscard]] BISMAR_API double rolled_lateral_torsional_phi(BucklingCurve curve,
                                                             double slenderness);

/// Reduction factor of the case for rolled and equivalent welded sections [-].
///
///     chi_LT = 1 / (Phi_LT + sqrt(Phi_LT^2 - beta lambda^2)) <= min(1, 1 / lambda^2)
///
/// Source: EN 1993-1-1:2005 (6.57).
[[nodiscard]] BISMAR_API double rolled_lateral_torsional_factor(BucklingCurve curve,
                                                                double slenderness);

/// k_c of a moment that is linear between the ends: 1 / (1.33 - 0.33 psi) [-].
/// @param end_ratio  psi in [-1, 1].  Source: EN 1993-1-1:2005 Table 6.6.
[[nodiscard]] BISMAR_API double moment_shape_correction(double end_ratio);

/// f, by which chi_LT of rolled sections is divided, the result being at most 1 [-].
///
///     f = 1 - 0.5 (1 - k_c) [1 - 2 (lambda - 0.8)^2] <= 1
///
/// @param correction  k_c [-], > 0 and <= 1.  @param slenderness  lambda_LT [-], >= 0.
/// Source: EN 1993-1-1:2005 6.3.2.3(2).
[[nodiscard]] BISMAR_API double rolled_moment_divisor(double correction, double slenderness);

/// A rolled I for aisc_flexural_strength().
struct AmericanBeam {
  double yield_strength = 0.0;   ///< F_y [Pa], > 0.
  double plastic_modulus = 0.0;  ///< Z_x [m^3], > 0.
  double elastic_modulus = 0.0;  ///< S_x [m^3], > 0.
  double L_p = 0.0;              ///< Largest unbraced length without a loss [m], > 0.
  double L_r = 0.0;              ///< Largest one of inelastic buckling [m], > L_p.
  double C_b = 1.0;              ///< Of the moment's shape [-], >= 1.
};

/// Nominal bending strength of a compact I at an unbraced length up to L_r [N m].
///
///     M_p = F_y Z_x;   M_n = C_b [M_p - (M_p - 0.7 F_y S_x) (L_b - L_p) / (L_r - L_p)] <= M_p
///
/// A second opinion in checks.
/// @param unbraced_length  L_b [m], >= 0 and <= L_r.  Source: AISC 360-16 F2.
[[nodiscard]] BISMAR_API double aisc_flexural_strength(const AmericanBeam& beam,
                                                       double unbraced_length);

}  // namespace bismar
