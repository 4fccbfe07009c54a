// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

namespace bismar {

// Hand formulas of shafts and thin tubes beside stress.hpp and torsion.hpp. All functions of this
// header throw bismar::Error with not_finite or out_of_range, the place being the argument's name,
// for an argument outside the range that is stated beside it.

/// Largest shear stress of a direct stress and a shear stress at one point of a member [Pa].
///
///     tau_max = sqrt((sigma / 2)^2 + tau^2)
///
/// Held against half the yield strength it is the maximum shear stress (Tresca) criterion, up to
/// 15 % safer than von Mises.
/// @param sigma  Direct stress [Pa], finite.  @param tau  Shear stress [Pa], finite.
/// Source: Mohr's circle; Shigley's Mechanical Engineering Design, 9th ed., section 5-4 (section
/// from memory).
[[nodiscard]] BISMAR_API double largest_shear_stress(double sigma, double tau);

/// Torque at which a solid rectangle reaches a shear stress, by the closed approximation [N m].
///
///     T = tau b c^2 / (3 + 1.8 c / b)
///
/// Within 4.5 % of the exact series (rectangle_torsion), a square within 0.2 %.
/// @param stress  tau [Pa], > 0.  @param long_side  b [m], > 0.  @param short_side  c [m], > 0, <=
/// b. Source: Shigley's Mechanical Engineering Design, 9th ed., (3-40) (number from memory).
[[nodiscard]] BISMAR_API double rectangle_torque_estimate(double stress,
                                                          double long_side,
                                                          double short_side);

/// The same of a strip so thin that c / b is left out, T = tau b c^2 / 3 [N m]; it overstates a
/// strip of b / c = 8 by 8.5 %.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 3-12, open thin-walled
/// sections.
[[nodiscard]] BISMAR_API double thin_strip_torque(double stress,
                                                  double long_side,
                                                  double short_side);

/// The middle line of the wall of a thin-walled tube, for Bredt's formulas (torsion.hpp).
struct MidLine {
  double enclosed_area = 0.0;  ///< A_m [m^2]
  double length = 0.0;         ///< L_m [m]
};

/// Of a rectangular tube with sharp corners.
/// @param height, width  Outside [m], > 0.  @param wall  [m], > 0, less than either side.
[[nodiscard]] BISMAR_API MidLine rectangular_mid_line(double height, double width, double wall);

/// Of a flat oval tube: two half circles joined by straight walls.
/// @param radius  Of the half circles, to the middle line [m], > 0.
/// @param straight  Length of each straight wall [m], >= 0.
[[nodiscard]] BISMAR_API MidLine flat_oval_mid_line(double radius, double straight);

}  // namespace bismar
