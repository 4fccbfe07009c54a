// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

namespace bismar {

/// Material factor of the wall limits [-].
///
///     epsilon = sqrt(235 MPa / f . E / 210 GPa)
///
/// For steel the second ratio is 1. A higher strength makes the plain limit stricter.
/// @param strength  f, yield (or compressive) strength [Pa], > 0.  @param youngs_modulus  E [Pa], >
/// 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1993-1-1:2005 Table 5.2; E/210 GPa as EN 1993-1-4:2006 section 5.2.
[[nodiscard]] BISMAR_API double wall_epsilon(double strength, double youngs_modulus);

/// Largest c/t (or d/t) up to which a wall reaches its strength before it buckles: class 3 [-].
///
///     internal part in compression  42 epsilon       outstand      14 epsilon
///     internal part in bending     124 epsilon       round tube    90 epsilon^2
///
/// @param epsilon  Material factor [-], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place "epsilon".
/// Source: EN 1993-1-1:2005 Table 5.2; the tube's limit from memory.
[[nodiscard]] BISMAR_API double class_3_limit(PlateElement::Kind kind, double epsilon);

}  // namespace bismar
