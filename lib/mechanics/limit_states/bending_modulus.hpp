// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/stress_points.hpp"

#include <bismar/mechanics/column.hpp>

namespace bismar::mechanics {

/// Elastic modulus that a moment about one axis alone feels [m^3]: W_el, of an angle the one of its
/// askew bending.
inline double bending_modulus(const SectionProperties& section, BendingAxis axis) {
  if (axis == BendingAxis::y) {
    return 1.0 / station_stresses(section, {.M_y = 1.0}).bending_y;
  }
  return 1.0 / station_stresses(section, {.M_z = 1.0}).bending_z;
}

}  // namespace bismar::mechanics
