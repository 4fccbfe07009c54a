// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/column.hpp>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, all faults at
// once, the place being the argument's name, for an argument outside the range that is stated
// beside it.

/// A flat wall of aluminium, for local buckling.
struct AluminiumWall {
  bool internal = true;  ///< Supported along both edges; false: an outstand, symmetrical.
  bool class_a = true;   ///< Heat-treated tempers; else class B.
  bool welded = false;   ///< A weld runs along it.
};

/// Factor rho_c on the thickness of a wall of class 4 [-].
///
///     rho_c = C1 / (beta/epsilon) - C2 / (beta/epsilon)^2 <= 1
///
///                         internal C1, C2   outstand C1, C2    1 up to beta/epsilon, internal
///                         (outstand)
///     class A, no weld         32, 220           10, 24                     22 (6)
///     class A, weld            29, 198            9, 20                     18 (5)
///     class B, no weld         29, 198            9, 20                     18 (5)
///     class B, weld            25, 150            8, 16                     15 (4)
///
/// @param ratio  beta / epsilon, beta = b/t [-], > 0.
/// Source: EN 1999-1-1:2007 6.1.5, Table 6.3 and Table 6.2 (32, 220 and 22 seen; others from
/// memory).
[[nodiscard]] BISMAR_API double aluminium_wall_factor(const AluminiumWall& wall, double ratio);

/// Factor kappa of longitudinal welds in a column [-].
///
///     class A   kappa = 1 - (1 - A_1/A) 10^-lambda - (0.05 + 0.1 A_1/A) lambda^(1.3 (1 - lambda)),
///               A_1 = A - A_haz (1 - rho_o,haz)
///     class B   kappa = 1 for lambda <= 0.2,
///               else 1 + 0.04 (4 lambda)^(0.5 - lambda) - 0.22 lambda^(1.4 (1 - lambda))
///
/// @param slenderness  lambda-bar [-], >= 0.
/// @param area_share  A_1 / A [-], > 0 and <= 1; read for class A.
/// Source: EN 1999-1-1:2007 Table 6.5 (from memory).
[[nodiscard]] BISMAR_API double longitudinal_weld_factor(bool class_a,
                                                         double slenderness,
                                                         double area_share);

/// Strength in the zone beside a weld over that of the parent, rho_haz [-].
/// @param zone  [Pa], > 0.  @param parent  [Pa], > 0.
/// Source: EN 1999-1-1:2007 6.1.6.2.
[[nodiscard]] BISMAR_API double weld_zone_factor(double zone, double parent);

/// Lateral-torsional buckling curve of aluminium: chi_LT = reduction_factor(curve, lambda_LT).
///
///     class 1, 2: alpha_LT 0.10, lambda_0,LT 0.6;  class 3, 4: 0.20, 0.4
///
/// Source: EN 1999-1-1:2007 6.3.2.2 (from memory).
[[nodiscard]] BISMAR_API ColumnCurve aluminium_lateral_curve(bool compact);

}  // namespace bismar
