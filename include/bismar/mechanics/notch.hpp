// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>

namespace bismar {

// Stress concentration at notches: elastic factors K_t, and what of them fatigue feels. All
// functions of this header throw bismar::Error with not_finite or out_of_range, the place being the
// argument's or the field's name, for an argument outside the range that is stated beside it.

enum class NotchLoad : std::uint8_t { tension, bending, torsion };

/// The curve fits in use. Up to 2 h / D = 0.3 they differ by up to 3 % at fillets and 10 % at
/// grooves.
enum class NotchFormula : std::uint8_t {
  roark,   ///< Roark's Formulas for Stress and Strain, 7th ed., Table 17.1.
  pilkey,  ///< Peterson's Stress Concentration Factors, 3rd ed., the charts below.
};

/// A round bar that is thinner at a step or in a groove.
struct RoundNotch {
  double large_diameter = 0.0;  ///< D [m], > d.
  double small_diameter = 0.0;  ///< d, beside the step or in the bottom of the groove [m], > 0.
  double radius = 0.0;          ///< r, of fillet or groove [m], > 0.
};

/// K_t of a stepped round shaft with a shoulder fillet, nominal stress on d [-].
///
///     K_t = C_1 + C_2 x + C_3 x^2 + C_4 x^3,   x = 2 h / D,   h = (D - d) / 2,
///     C_i = a_i + b_i sqrt(h/r) + c_i h/r
///
/// with other constants up to h/r = 2 and beyond. h/r: 0.1 to 20; torsion 0.25 to 4. For torsion
/// both choices give the one set that is known here, that of Peterson's chart 3.12.
/// @throws bismar::Error  place of an h/r outside its range: "radius".
/// Source: as NotchFormula; charts 3.4, 3.10, 3.12 (K_t = 1 at h = D/2, which proves the signs of
/// the constants, is met within 1 % by roark, 4 % by pilkey and in torsion; ranges from memory).
[[nodiscard]] BISMAR_API double shoulder_fillet_factor(const RoundNotch& notch,
                                                       NotchLoad load,
                                                       NotchFormula formula = NotchFormula::roark);

/// K_t of a round bar with a U-shaped groove all round, nominal stress on d [-]. The same form;
/// h/r: roark 0.25 to 50; pilkey 0.1 to 50, torsion 0.25 to 50.
/// Source: as NotchFormula; charts 2.21, 2.43, 2.47 (K_t = 1 at h = D/2 is met within 5 % by
/// roark, 14 % by pilkey; ranges from memory).
[[nodiscard]] BISMAR_API double u_groove_factor(const RoundNotch& notch,
                                                NotchLoad load,
                                                NotchFormula formula = NotchFormula::roark);

/// K_t of a plate in tension with a hole in the middle, nominal stress P / [t (W - d)] [-].
///
///     K_t = 3 - 3.13 x + 3.66 x^2 - 1.53 x^3,   x = d / W
///
/// @param relative_hole  d / W [-], 0 <= d / W < 1.
/// Source: Roark's Formulas for Stress and Strain, 7th ed., Table 17.1.
[[nodiscard]] BISMAR_API double plate_hole_factor(double relative_hole);

/// The same with the nominal stress P / (t W) of the whole width: K_t / (1 - x) [-].
[[nodiscard]] BISMAR_API double plate_hole_gross_factor(double relative_hole);

/// Heywood's formula for the net section, 2 + (1 - d/W)^3 [-].
/// Source: Peterson's Stress Concentration Factors, 3rd ed., chart 4.1 (from memory).
[[nodiscard]] BISMAR_API double plate_hole_heywood_factor(double relative_hole);

/// K_t of a round bar or tube with a hole across, nominal stress on the gross section [-]:
/// 4 P / [pi (D^2 - d^2)], 32 M D / [pi (D^4 - d^4)], 16 T D / [pi (D^4 - d^4)].
///
/// Bending opens the hole at the extreme fibres. In torsion it is the largest direct stress beside
/// the hole over the nominal shear stress (4 for a small hole).
/// @param bore_ratio  d / D, bore over diameter [-], 0 to 0.9.
/// @param hole_ratio  2 r / D, hole over diameter [-], 0 to 0.45; torsion 0 to 0.4.
/// Source: Roark's Formulas for Stress and Strain, 7th ed., Table 17.1 (torsion constants seen in
/// print, tension and bending from memory).
[[nodiscard]] BISMAR_API double radial_hole_factor(double bore_ratio,
                                                   double hole_ratio,
                                                   NotchLoad load);

/// Neuber's constant sqrt(a) of steels [m^0.5].
///
///     bending, tension  0.246 - 3.08e-3 S + 1.51e-5 S^2 - 2.67e-8 S^3   [in^0.5], S in kpsi
///     torsion           0.190 - 2.51e-3 S + 1.35e-5 S^2 - 2.67e-8 S^3
///
/// @param tensile_strength  S [Pa], 50 to 250 kpsi (345 to 1724 MPa), torsion to 220 kpsi.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-35).
[[nodiscard]] BISMAR_API double neuber_constant(double tensile_strength, NotchLoad load);

/// Notch sensitivity of steels after Neuber, q = 1 / (1 + sqrt(a / r)) [-].
/// @param radius  r, of the notch [m], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-34).
[[nodiscard]] BISMAR_API double neuber_sensitivity(double tensile_strength,
                                                   double radius,
                                                   NotchLoad load);

/// Notch sensitivity of steels after Peterson, q = 1 / (1 + a / r) [-].
///
///     a = 0.0254 mm (2070 MPa / S_ut)^1.8;  torsion 0.6 of it
///
/// @param tensile_strength  S_ut [Pa], > 0; meant for 550 MPa and above.  @param radius  [m], > 0.
/// Source: Peterson, in Sines and Waisman, Metal Fatigue, 1959; Mechanical Behavior of Materials,
/// 4th ed., section 10.2 (from memory).
[[nodiscard]] BISMAR_API double peterson_sensitivity(double tensile_strength,
                                                     double radius,
                                                     NotchLoad load);

/// Notch sensitivity of cast irons, all grades: their graphite is a notch already.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 6-10.
inline constexpr double cast_iron_sensitivity = 0.20;

/// Fatigue stress concentration factor, K_f = 1 + q (K_t - 1) [-].
/// @param stress_concentration  K_t [-], >= 1.  @param sensitivity  q [-], 0 to 1.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., (6-32).
[[nodiscard]] BISMAR_API double fatigue_concentration(double stress_concentration,
                                                      double sensitivity);

}  // namespace bismar
