// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>

namespace bismar {

// Stress-life fatigue. The endurance limit of a part: endurance.hpp; welds: welded_detail.hpp. All
// functions of this header throw bismar::Error with not_finite or out_of_range, the place being the
// argument's or the field's name, for an argument outside the range that is stated beside it.

/// A straight line in the logarithms of life and reversed stress.
struct SNLine {
  double a = 0.0;  ///< Stress at one cycle [Pa], > 0.
  double b = 0.0;  ///< Slope [-], < 0.
};

/// The line of a steel from 1e3 to 1e6 cycles.
///
///     S = a N^b,   a = (f S_ut)^2 / S_e,   b = -log10(f S_ut / S_e) / 3
///
/// @param fraction  f, strength at 1000 cycles over S_ut [-], > 0, <= 1.
/// @param tensile_strength  S_ut [Pa], > 0.
/// @param endurance_limit  S_e, at 1e6 cycles [Pa], > 0 and below f S_ut.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-13) to (6-15).
[[nodiscard]] BISMAR_API SNLine sn_line(double fraction,
                                        double tensile_strength,
                                        double endurance_limit);

/// The line through two points, S = A N^B: a = A, b = B.
///
/// @param stress_1, stress_2  [Pa], > 0.  @param cycles_1, cycles_2  [-], > 0; the longer life has
/// the lower stress.
/// Source: Mechanical Behavior of Materials, 4th ed., section 9.2.4 (section from memory).
[[nodiscard]] BISMAR_API SNLine sn_line_through(double stress_1,
                                                double cycles_1,
                                                double stress_2,
                                                double cycles_2);

/// sigma_f' of sigma_a = sigma_f' (2 N)^b [Pa], a = 2^b sigma_f'.
[[nodiscard]] BISMAR_API double fatigue_strength_coefficient(const SNLine& line);

/// Reversed stress that lasts N cycles, a N^b [Pa].
/// @param cycles  N, > 0.
[[nodiscard]] BISMAR_API double fatigue_strength(const SNLine& line, double cycles);

/// Cycles to failure, (sigma / a)^(1/b) [-]; +infinity for a stress of zero. The line knows no
/// endurance limit: hold the stress against it first.
/// @param reversed_stress  sigma [Pa], >= 0.
[[nodiscard]] BISMAR_API double fatigue_life(const SNLine& line, double reversed_stress);

/// Amplitude and mean of a stress that swings.
struct FatigueStress {
  double amplitude = 0.0;  ///< sigma_a [Pa], >= 0.
  double mean = 0.0;       ///< sigma_m [Pa].
};

/// sigma_a = (largest - least) / 2, sigma_m = (largest + least) / 2.
/// @param least, largest  [Pa], finite, least <= largest.
[[nodiscard]] BISMAR_API FatigueStress fatigue_stress(double least, double largest);

/// How amplitude and mean stress are held together.
enum class MeanStressLine : std::uint8_t {
  goodman,        ///< sigma_a / S_e + sigma_m / S_ut = 1 / n
  gerber,         ///< n sigma_a / S_e + (n sigma_m / S_ut)^2 = 1
  asme_elliptic,  ///< (n sigma_a / S_e)^2 + (n sigma_m / S_y)^2 = 1
  soderberg,      ///< sigma_a / S_e + sigma_m / S_y = 1 / n
};

/// What a material bears.
struct FatigueStrengths {
  double endurance = 0.0;  ///< S_e, or the strength at the life wanted [Pa], > 0.
  double tensile = 0.0;    ///< S_ut [Pa], > 0; read by Goodman and Gerber.
  double yield = 0.0;      ///< S_y [Pa], > 0; read by the other two.
};

/// Safety factor n on a stress whose amplitude and mean grow together [-]; +infinity for no stress.
///
/// @param stress  Mean >= 0: a compressive mean is not credited here; put 0 for it.
/// @param strengths  The fields that the line reads.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., Tables 6-6 to 6-8; Soderberg (6-44).
[[nodiscard]] BISMAR_API double fatigue_safety_factor(MeanStressLine line,
                                                      const FatigueStress& stress,
                                                      const FatigueStrengths& strengths);

/// Safety factor against yield in the first cycle, S_y / (sigma_a + |sigma_m|) [-] (Langer line);
/// +infinity for no stress.
/// @param yield_strength  S_y [Pa], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-49).
[[nodiscard]] BISMAR_API double first_cycle_yield_factor(const FatigueStress& stress,
                                                         double yield_strength);

// The reversed stress that is as damaging as an amplitude with a mean, sigma_ar [Pa]. With
// fatigue_life and sigma_f', b of smooth specimens it gives the life.

/// Morrow: sigma_ar = sigma_a / (1 - sigma_m / sigma_f').
/// @param stress  Mean below sigma_f'.  @param coefficient  sigma_f' [Pa], > 0.
/// Source: Mechanical Behavior of Materials, 4th ed., (9.21) (number from memory).
[[nodiscard]] BISMAR_API double morrow_stress(const FatigueStress& stress, double coefficient);

/// Smith, Watson and Topper: sigma_ar = sqrt(sigma_max sigma_a); 0 for sigma_max <= 0.
/// Source: Mechanical Behavior of Materials, 4th ed., (9.18) (number from memory).
[[nodiscard]] BISMAR_API double swt_stress(const FatigueStress& stress);

/// Walker: sigma_ar = sigma_max^(1 - gamma) sigma_a^gamma; 0 for sigma_max <= 0.
/// @param exponent  gamma [-], 0 to 1; 0.5 is SWT.
/// Source: Mechanical Behavior of Materials, 4th ed., (9.19) (number from memory).
[[nodiscard]] BISMAR_API double walker_stress(const FatigueStress& stress, double exponent);

/// gamma of steels, 0.8818 - 0.0002 S_u, S_u in MPa [-], not below 0.
/// @param tensile_strength  S_u [Pa], > 0; the fit is of 300 to 2000 MPa.
/// Source: Dowling, Calhoun and Arcari, Fatigue Fract. Eng. Mater. Struct. 32 (2009) (constants and
/// range from memory).
[[nodiscard]] BISMAR_API double walker_exponent_of_steel(double tensile_strength);

/// The S-N line of sigma_a = sigma_f' (2 N)^b.
/// @param coefficient  sigma_f' [Pa], > 0.  @param exponent  b [-], < 0.
[[nodiscard]] BISMAR_API SNLine sn_line_of_reversals(double coefficient, double exponent);

/// Amplitude that lasts N cycles with a mean stress, Morrow [Pa].
///
///     sigma_a = (sigma_f' - sigma_m) (2 N)^b
///
/// @param mean  sigma_m [Pa], below sigma_f'.  @param cycles  N, > 0.
[[nodiscard]] BISMAR_API double morrow_amplitude(double coefficient,
                                                 double exponent,
                                                 double mean,
                                                 double cycles);

/// Bending and torsion of a solid round shaft at one place, with its notch.
struct ShaftLoading {
  double alternating_moment = 0.0;  ///< M_a [N m], >= 0.
  double mean_moment = 0.0;         ///< M_m [N m], >= 0.
  double alternating_torque = 0.0;  ///< T_a [N m], >= 0.
  double mean_torque = 0.0;         ///< T_m [N m], >= 0.
  double k_f = 1.0;                 ///< K_f, bending [-], >= 1.
  double k_fs = 1.0;                ///< K_fs, torsion [-], >= 1.
};

/// What the loading does as one moment, by the distortion energy: stress = 16 A / (pi d^3).
struct ShaftMoments {
  double alternating = 0.0;  ///< A = sqrt(4 (K_f M_a)^2 + 3 (K_fs T_a)^2) [N m]
  double mean = 0.0;         ///< B = sqrt(4 (K_f M_m)^2 + 3 (K_fs T_m)^2) [N m]
};
[[nodiscard]] BISMAR_API ShaftMoments shaft_moments(const ShaftLoading& loading);

/// Least diameter of a solid round shaft against fatigue [m].
///
///     Goodman        d^3 = 16 n / pi (A / S_e + B / S_ut)
///     Gerber         d^3 = 8 n A / (pi S_e) {1 + sqrt[1 + (2 B S_e / (A S_ut))^2]}
///     ASME-elliptic  d^3 = 16 n / pi sqrt(A^2 / S_e^2 + B^2 / S_y^2)
///     Soderberg      d^3 = 16 n / pi (A / S_e + B / S_y)
///
/// S_e depends on d through the size factor: repeat where that matters. Yield in the first cycle is
/// another check, shaft_yield_diameter().
/// @param safety_factor  n [-], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (7-8), (7-10), (7-12), (7-14).
[[nodiscard]] BISMAR_API double shaft_diameter(MeanStressLine line,
                                               const ShaftLoading& loading,
                                               const FatigueStrengths& strengths,
                                               double safety_factor);

/// Least diameter of a solid round shaft against yield in the first cycle [m].
///
///     d^3 = 16 n / (pi S_y) sqrt{4 [K_f (M_a + M_m)]^2 + 3 [K_fs (T_a + T_m)]^2}
///
/// @param yield_strength  S_y [Pa], > 0.  @param safety_factor  n [-], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (7-15), (7-16).
[[nodiscard]] BISMAR_API double shaft_yield_diameter(const ShaftLoading& loading,
                                                     double yield_strength,
                                                     double safety_factor);

/// Safety factor of that against yield at a diameter [-]; +infinity for no load.
/// @param diameter  d [m], > 0.
[[nodiscard]] BISMAR_API double shaft_yield_factor(const ShaftLoading& loading,
                                                   double yield_strength,
                                                   double diameter);

}  // namespace bismar
