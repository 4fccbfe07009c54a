// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/member.hpp>

#include <cstdint>
#include <optional>
#include <span>

namespace bismar {

// Vibration of uniform beams. Bending is that of Euler and Bernoulli: no shear deformation, no
// rotary inertia, no damping. Shear lowers the frequencies of stubby members (length below about 10
// times the height): lowest_shear_frequency(). Rotary inertia, about a third of what shear does to
// a solid member of metal, is left out everywhere. All functions of this header throw bismar::Error
// with not_finite or out_of_range, the place being the argument's name, for an argument outside the
// range that is stated beside it.

/// How the two ends of a beam are held.
enum class BeamEnds : std::uint8_t {
  fixed_free,
  pinned_pinned,
  fixed_pinned,
  fixed_fixed,
  free_free,  ///< The two rigid-body modes are not counted: it has the roots of fixed_fixed.
};

/// beta_n L of a bare beam [-], the n-th positive root of its characteristic equation.
///
///     fixed-free      cos x cosh x = -1        pinned-pinned   sin x = 0
///     fixed-fixed     cos x cosh x = 1         fixed-pinned    tan x = tanh x
///
/// Accuracy: a few units in the last place.
/// @param mode  n, 1 to 1000.
/// Source: Thomson, Theory of Vibration with Applications, table 9.5-1.
[[nodiscard]] BISMAR_API double characteristic_root(BeamEnds ends, int mode);

/// beta_n L of a cantilever with a point mass at its tip [-].
///
///     1 + cos x cosh x + mu x (cos x sinh x - sin x cosh x) = 0
///
/// @param mass_ratio  mu, tip mass over mass of the beam [-], >= 0.  @param mode  n, 1 to 1000.
/// Source: Thomson, Theory of Vibration with Applications (section from memory).
[[nodiscard]] BISMAR_API double tip_mass_root(double mass_ratio, int mode);

/// A uniform beam.
struct UniformBeam {
  double bending_stiffness = 0.0;  ///< E I [N m^2], > 0.
  double mass_per_length = 0.0;    ///< rho A [kg/m], > 0.
  double length = 0.0;             ///< L [m], > 0.
};

/// Natural frequency to a root beta L [Hz].
///
///     f = (beta L)^2 / (2 pi) sqrt(E I / (rho A L^4))
///
/// @param root  beta L [-], > 0.
[[nodiscard]] BISMAR_API double natural_frequency(const UniformBeam& beam, double root);

/// First natural frequency of a cantilever with a tip mass, by Rayleigh's quotient [Hz].
///
///     f = 1 / (2 pi) sqrt(3 E I / [L^3 (M + 33/140 rho A L)])
///
/// Never below the exact value, and at most 1.5 % above it (the bare beam).
/// @param tip_mass  M [kg], >= 0.
/// Source: Thomson, Theory of Vibration with Applications (section from memory).
[[nodiscard]] BISMAR_API double tip_mass_frequency_estimate(const UniformBeam& beam,
                                                            double tip_mass);

/// Lowest natural frequency of a beam that carries point masses anywhere [Hz].
///
/// Exact for the Euler-Bernoulli beam: the general solution of E I w'''' = rho A omega^2 w is
/// carried from mass to mass with the functions of Krylov; a mass M adds M omega^2 w to the shear
/// force. Over its value at rest, the determinant of the end conditions is the product over all
/// modes of 1 - omega^2 / omega_n^2. Its first root is bracketed from below by Dunkerley's sum,
/// 1/omega^2 <= S = integral of G(x, x) rho A dx + sum of G(x_i, x_i) M_i, with the deflection G
/// under a unit force, and from above by Rayleigh's quotient R^2 of the better of two shapes
/// G(., x). It is the first one: S is the sum of 1/omega_n^2 over all modes, so that S R^2 < 3
/// leaves room for two below R, and a change of sign in the bracket says that their number is odd.
/// Where either fails, secants from rest on approach it from below, which they never pass: the
/// product is convex up to its first root.
///
/// The masses are points: their own rotary inertia is left out. Masses on a support do nothing.
/// Accuracy: relative error about 1e-12 where there is a closed form; within 2e-8 of finite
/// elements whose own error is 4e-9 for random masses and supports (tests). Complexity: the number
/// of masses times about five; no memory is taken for up to 8 masses.
///
/// @param support  How the ends are held; its second support stands at x = L unless said otherwise.
/// @param masses  [n] in any order; mass > 0 and 0 <= at <= L each; places "masses/0/mass", ...
/// @param second_support  For pinned_pinned and fixed_pinned: where the second support stands [m],
///   0 < x <= L; beyond it the member overhangs. @throws with conflict for other supports.
/// Source: Dunkerley and Rayleigh bounds and Krylov's functions: Timoshenko, Young and Weaver,
/// Vibration Problems in Engineering, 4th ed. (sections from memory); derived here.
[[nodiscard]] BISMAR_API double lowest_natural_frequency(
    const UniformBeam& beam,
    Support support,
    std::span<const AttachedMass> masses = {},
    std::optional<double> second_support = std::nullopt);

/// A uniform beam that yields in shear alone.
struct ShearBeam {
  double shear_stiffness = 0.0;  ///< G A_s [N], > 0.
  double mass_per_length = 0.0;  ///< rho A [kg/m], > 0.
  double length = 0.0;           ///< L [m], > 0.
};

/// Lower bound of the first natural frequency that shear alone would leave a member whose reactions
/// are those of the slender member [Hz]; together with that of bending,
///
///     1 / f^2 = 1 / f_b^2 + 1 / f_s^2,
///
/// it is a lower bound of the first frequency of the Timoshenko beam without rotary inertia.
///
///     1 / (2 pi f_s)^2 = (k rho A L^2 + sum of M_i g(x_i)) / (G A_s),   g(a) = integral of V_a^2
///     dx
///
/// V_a is the shear force under a unit force at a. Without overhang k = 4/pi^2 for a cantilever,
/// 1/pi^2 pinned or fixed at both ends (exact), 1/pi^2 + 2/105 fixed and pinned (at most 19 % above
/// the exact one). With the overhang o = L - s beyond the second support,
/// k L^2 = k_span s^2 + 4 o^2 / pi^2 + c o^3 / (3 s), c = 1 pinned, 9/4 fixed and pinned.
///
/// Why it is a bound: the reactions of the slender member are in equilibrium, so that by the least
/// complementary energy the flexibility of the real member is nowhere above that of bending plus
/// that of shear under those reactions; and the largest eigenvalue of a sum is at most the sum of
/// the largest eigenvalues (Dunkerley).
///
/// @param support, masses, second_support  As for lowest_natural_frequency().
/// Source: Dunkerley's rule: Timoshenko, Young and Weaver, Vibration Problems in Engineering, 4th
/// ed. (section from memory); k and the proof derived here.
[[nodiscard]] BISMAR_API double lowest_shear_frequency(
    const ShearBeam& beam,
    Support support,
    std::span<const AttachedMass> masses = {},
    std::optional<double> second_support = std::nullopt);

}  // namespace bismar
