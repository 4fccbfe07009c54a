// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <cmath>
#include <string>
#include <vector>

namespace bismar::mechanics {

/// Adds the step that says what own mass does to the forces of an explanation, where it acts.
inline void add_own_mass_step(const CheckInput& input, std::vector<std::string>& steps) {
  if (!own_mass_acts(input.effects)) {
    return;
  }
  const double mass = needed(input.material.rho, Symbol::rho) * input.section.area;
  steps.push_back("Own mass of " + number(mass) + " kg/m, accelerated by " +
                  number(std::abs(input.effects.acceleration_z)) + " m/s2 along z and " +
                  number(std::abs(input.effects.acceleration_y)) +
                  " m/s2 along y, is in the forces, adverse to the loads.");
}

}  // namespace bismar::mechanics
