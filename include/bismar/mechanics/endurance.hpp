// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <array>
#include <cstdint>

namespace bismar {

// The endurance limit of a steel part: that of a polished specimen times factors for what differs.
//
//     S_e = k_a k_b k_c k_d k_e S_e'
//
// surface, size, load, temperature, reliability. The factors come from tests on steel. All
// functions of this header throw bismar::Error with not_finite or out_of_range, the place being the
// argument's name, for an argument outside the range that is stated beside it.

/// The handbooks print their constants twice, rounded apart; the results differ by up to 2 %. The
/// choice says which print is evaluated. Arguments and results are SI in both.
enum class HandbookUnits : std::uint8_t {
  metric,  ///< Constants for MPa and mm.
  inch,    ///< Constants for kpsi and inches.
};

/// Tensile strength from Brinell hardness [Pa]: 3.4 HB in MPa, 0.495 HB in kpsi.
///
/// @param brinell_hardness  HB, > 0; the relation holds for steels, about 100 to 500.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (2-21).
[[nodiscard]] BISMAR_API double tensile_strength_from_brinell(
    double brinell_hardness, HandbookUnits units = HandbookUnits::metric);

/// Endurance limit of polished rotating-beam specimens of steel [Pa].
///
///     S_e' = 0.5 S_ut, at most 700 MPa (100 kpsi = 689 MPa)
///
/// @param tensile_strength  S_ut [Pa], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-8).
[[nodiscard]] BISMAR_API double endurance_limit_estimate(
    double tensile_strength, HandbookUnits units = HandbookUnits::metric);

/// Fatigue strength at 1000 cycles over the tensile strength of a steel, f [-].
///
///     f = 1.06 - 4.1e-4 S_ut + 1.5e-7 S_ut^2   (MPa, 483 to 1379);  0.9 below, level above
///
/// @param tensile_strength  S_ut [Pa], > 0.
/// Source: Shigley's Mechanical Engineering Design, 11th ed., (6-11), a fit to Fig. 6-23 (formula
/// and numbers from memory; 0.86 at 90 kpsi and 0.82 at 120 kpsi were seen in print).
[[nodiscard]] BISMAR_API double fatigue_strength_fraction(double tensile_strength);

/// Surfaces of the tables; polished has the factor 1.
enum class FatigueSurface : std::uint8_t {
  ground,
  machined,  ///< Or cold drawn.
  hot_rolled,
  as_forged,
};

/// The constants changed between editions: at 1000 MPa the factor of a machined surface is 0.72
/// after the 9th and 0.68 after the 11th, that of an as-forged one 0.28 and 0.29.
enum class SurfaceEdition : std::uint8_t { ninth, eleventh };

/// k_a = a S_ut^b.
struct SurfaceConstants {
  double a_MPa = 0.0;   ///< a for S_ut in MPa.
  double a_kpsi = 0.0;  ///< a for S_ut in kpsi.
  double b = 0.0;       ///< [-], < 0.
};

/// The table.
///
///     9th ed.:  ground 1.58 (1.34), -0.085;  machined 4.51 (2.70), -0.265;
///               hot rolled 57.7 (14.4), -0.718;  as forged 272 (39.9), -0.995
///     11th ed.: ground 1.38 (1.21), -0.067;  machined 3.04 (2.00), -0.217;
///               hot rolled 38.6 (11.0), -0.650;  as forged 54.9 (12.7), -0.758
///
/// Source: Shigley's Mechanical Engineering Design, 9th and 11th ed., Table 6-2 (9th: seen in
/// print, hot rolled confirmed by a printed example; 11th: ground and as forged in MPa seen in
/// print, the rest from memory).
[[nodiscard]] BISMAR_API SurfaceConstants surface_constants(FatigueSurface surface,
                                                            SurfaceEdition edition);

/// Surface factor k_a = a S_ut^b [-]; it may exceed 1 for soft steels, where the formula ends.
/// @param tensile_strength  S_ut [Pa], > 0.
[[nodiscard]] BISMAR_API double surface_factor(FatigueSurface surface,
                                               SurfaceEdition edition,
                                               double tensile_strength,
                                               HandbookUnits units = HandbookUnits::metric);

/// The formulas in use for the size of a round part in bending or torsion.
enum class SizeRule : std::uint8_t {
  /// metric: 1.24 d^-0.107 for 2.79 to 51 mm, 1.51 d^-0.157 to 254 mm (up by 0.04 % at 51 mm);
  /// inch: (d / 0.3 in)^-0.107 for 0.11 to 2 in, 0.91 d^-0.157 to 10 in.
  two_ranges,
  /// 1 to 8 mm, 1.189 d^-0.097 to 250 mm.
  one_range,
};

/// Size factor k_b [-]; axial loads have 1.
///
/// @param diameter  d [m]: 2.79 mm to 254 mm; one_range: above 0 to 250 mm.
/// @param units  For two_ranges only.
/// Source: two_ranges: Shigley's Mechanical Engineering Design, 9th ed., (6-20); one_range: Machine
/// Design: An Integrated Approach, 5th ed., (6.7b) (number from memory).
[[nodiscard]] BISMAR_API double size_factor(double diameter,
                                            SizeRule rule = SizeRule::two_ranges,
                                            HandbookUnits units = HandbookUnits::metric);

// The diameter of a round rotating part with as much material above 95 % of the largest stress,
// d_e = sqrt(A_95 / 0.0766).

/// Of a round that bends without rotating: 0.370 d [m].
/// @param diameter  d [m], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-24).
[[nodiscard]] BISMAR_API double equivalent_diameter_of_round(double diameter);

/// Of a rectangle in bending: sqrt(0.05 h b / 0.0766) = 0.808 sqrt(h b) [m].
/// @param height, width  [m], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-25) and Table 6-3.
[[nodiscard]] BISMAR_API double equivalent_diameter_of_rectangle(double height, double width);

enum class FatigueLoad : std::uint8_t { bending, axial, torsion };

/// Load factor k_c [-]: bending 1, axial 0.85, torsion 0.59 (where the shear stress is held against
/// S_e itself; with the von Mises stress torsion has 1).
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-26).
[[nodiscard]] BISMAR_API double load_factor(FatigueLoad load);

/// The formulas in use for warm steel.
enum class FatigueTemperatureRule : std::uint8_t {
  /// 0.975 + 0.432e-3 T - 0.115e-5 T^2 + 0.104e-8 T^3 - 0.595e-12 T^4, T in F, 70 F to 1000 F.
  polynomial,
  /// 1 to 450 C, 1 - 0.0058 (T - 450) above, to 550 C.
  plateau,
};

/// Temperature factor k_d [-].
///
/// @param temperature  [K]: polynomial 294.26 to 810.93; plateau above 0 to 823.15.
/// Source: polynomial: Shigley's Mechanical Engineering Design, 9th ed., (6-27) (from memory);
/// plateau: Machine Design: An Integrated Approach, 5th ed., (6.7f) (number from memory).
[[nodiscard]] BISMAR_API double temperature_factor(double temperature, FatigueTemperatureRule rule);

/// Reliability factor [-], for a standard deviation of 8 % of the fatigue strength.
///
///     k_e = 1 - 0.08 z,   z = the standard normal deviate of the reliability
///
/// @param reliability  Share of parts that are stronger, 0.5 to 0.999999.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-29).
[[nodiscard]] BISMAR_API double reliability_factor(double reliability);

/// Reliabilities of the printed table and their factors, rounded to three digits.
struct ReliabilityRow {
  double reliability = 0.0;
  double factor = 0.0;
};

/// 0.5 1, 0.9 0.897, 0.95 0.868, 0.99 0.814, 0.999 0.753, 0.9999 0.702, 0.99999 0.659,
/// 0.999999 0.620.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., Table 6-5 (0.897 seen in print, the
/// others from memory; all agree with 1 - 0.08 z).
[[nodiscard]] BISMAR_API std::array<ReliabilityRow, 8> reliability_table();

/// The factor of the printed table [-].
/// @param reliability  One of those of the table, to 1e-9.
[[nodiscard]] BISMAR_API double tabulated_reliability_factor(double reliability);

/// What stands between a specimen and a part; 1 = no difference.
struct EnduranceFactors {
  double surface = 1.0;      ///< k_a [-], > 0.
  double size = 1.0;         ///< k_b [-], > 0.
  double load = 1.0;         ///< k_c [-], > 0.
  double temperature = 1.0;  ///< k_d [-], > 0.
  double reliability = 1.0;  ///< k_e [-], > 0.
};

/// Endurance limit of a part [Pa], S_e = k_a k_b k_c k_d k_e S_e'.
/// @param specimen_limit  S_e' [Pa], > 0.
/// @throws bismar::Error  place of a factor: its field.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-18).
[[nodiscard]] BISMAR_API double endurance_limit(double specimen_limit,
                                                const EnduranceFactors& factors);

}  // namespace bismar
