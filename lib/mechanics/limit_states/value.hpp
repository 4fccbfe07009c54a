// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/text.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <algorithm>
#include <cmath>
#include <optional>
#include <string>

namespace bismar::mechanics {

/// The value of a property that needs() has named. Its absence is a defect of the caller inside
/// this library, never a reason for a silent number.
inline double needed(const std::optional<double>& value, Symbol symbol) {
  if (!value) {
    throw InternalError("a limit state was evaluated without " + std::string(name(symbol)));
  }
  return *value;
}

/// The forces of a station with the member's own mass added, adverse: it never relieves a load.
/// Members that feel no acceleration read no density.
inline InternalForces acting_forces(const CheckInput& input, const Station& station) {
  InternalForces forces = station.forces;
  const LoadEffects& effects = input.effects;
  if (effects.acceleration_z == 0.0 && effects.acceleration_y == 0.0) {
    return forces;
  }
  const double mass = needed(input.material.rho, Symbol::rho) * input.section.area;
  const auto add = [mass](double& force, double own, double acceleration) {
    force += std::copysign(mass * std::abs(acceleration * own), force);
  };
  add(forces.V_z, station.own.V_z, effects.acceleration_z);
  add(forces.M_y, station.own.M_y, effects.acceleration_z);
  add(forces.V_y, station.own.V_y, effects.acceleration_y);
  add(forces.M_z, station.own.M_z, effects.acceleration_y);
  return forces;
}

/// Whether the density is read: the member's own mass acts.
inline bool own_mass_acts(const LoadEffects& effects) {
  return effects.acceleration_z != 0.0 || effects.acceleration_y != 0.0;
}

/// Whether stability reads the shear modulus of the table: an isotropic solid without one has at
/// least E / 3 (nu = 1/2), which stands for it on the safe side.
inline bool stability_reads_shear_modulus(const MemberMaterial& material) {
  return material.G.has_value() || material.rule == StressRule::direct_and_shear;
}

/// Shear modulus for stability [Pa].
inline double stability_shear_modulus(const MemberMaterial& material) {
  return stability_reads_shear_modulus(material) ? needed(material.G, Symbol::G)
                                                 : needed(material.E, Symbol::E) / 3.0;
}

/// "80 GPa", with a word where the table has none.
inline std::string stability_shear_modulus_text(const MemberMaterial& material) {
  return gigapascals(stability_shear_modulus(material)) +
         (stability_reads_shear_modulus(material)
              ? ""
              : " (E / 3, the least of any isotropic solid: the table has none)");
}

/// Bending strength of a material that is not held against yield [Pa]; a table without one: the
/// lower of tensile and compressive.
inline double bending_strength(const MemberMaterial& material) {
  return material.flexural ? *material.flexural
                           : std::min(needed(material.tensile, Symbol::tensile),
                                      needed(material.compressive, Symbol::compressive));
}

}  // namespace bismar::mechanics
