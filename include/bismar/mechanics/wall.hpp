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

/// Material factor of the wall limits of aluminium [-].
///
///     epsilon = sqrt(250 MPa / f_o)
///
/// The modulus of aluminium, 70 GPa, is in the limits below.
/// @param strength  f_o, 0.2 % proof strength [Pa], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1999-1-1:2007 Table 6.2.
[[nodiscard]] BISMAR_API double aluminium_wall_epsilon(double strength);

/// Largest c/t (or d/t) of an unwelded aluminium wall in class 3 [-].
///
///                                                      class A        class B
///     internal part in compression, beta = c/t         22 epsilon     18 epsilon
///     internal part in bending, beta = 0.40 c/t        55 epsilon     45 epsilon
///     outstand, beta = c/t                              6 epsilon      5 epsilon
///     round tube, beta = 3 sqrt(d/t)                 53.8 epsilon^2   36 epsilon^2
///
/// @param epsilon  Material factor [-], > 0.  @param class_a  Heat-treated tempers; else class B.
/// @throws bismar::Error  not_finite or out_of_range, place "epsilon".
/// Source: EN 1999-1-1:2007 6.1.4.3 and Table 6.2 (22 seen in a worked example; all others from
/// memory).
[[nodiscard]] BISMAR_API double aluminium_class_3_limit(PlateElement::Kind kind,
                                                        double epsilon,
                                                        bool class_a);

}  // namespace bismar
