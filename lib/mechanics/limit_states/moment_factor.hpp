// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/load_effects.hpp>

namespace bismar::mechanics {

/// Equivalent uniform moment factor C_m of one plane [-], after EN 1993-1-1:2005 Table B.3:
///
/// - moment linear between the ends, no own mass: 0.6 + 0.4 psi >= 0.4;
/// - cantilever, which sways: 0.9 where the moment falls from the root at least like that of a tip
///   load, else 1 (the table has 0.9 for all, which a uniform moment exceeds);
/// - between supports: 0.9 where the quarter-point moments are at most those of a central load,
///   0.95 where at most those of a uniform load, else 1; own mass counts as a uniform load;
/// - with an overhang 1.
///
/// It does not depend on the section, so that it does not move with its scale.
[[nodiscard]] double moment_factor(const MomentShape& moment,
                                   Support support,
                                   bool own_mass,
                                   bool overhang);

/// Whether the quarter-point moments are at most these shares of the largest one, to rounding.
[[nodiscard]] bool at_most(const MomentShape& moment, double first, double second, double third);

/// Whether the second support stands before the end.
[[nodiscard]] bool overhangs(const LoadEffects& effects, double length);

}  // namespace bismar::mechanics
