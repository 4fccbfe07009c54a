// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"

#include <cmath>

/// Stresses of anisotropic members over their strengths, for the full and for the net section.
namespace bismar::mechanics {

/// Axial and bending stress, each over its own strength, added [-].
inline double direct_ratio(const StationStresses& s, const MemberMaterial& material) {
  double ratio = 0.0;
  if (s.axial > 0.0) {
    ratio += s.axial / needed(material.tensile, Symbol::tensile);
  } else if (s.axial < 0.0) {
    ratio -= s.axial / needed(material.compressive, Symbol::compressive);
  }
  if (s.bending > 0.0) {
    ratio += s.bending / bending_strength(material);
  }
  return ratio;
}

/// Shear stress [Pa]: cracks narrow the section for the shear of bending only.
inline double shear_stress(const StationStresses& s, const MemberMaterial& material) {
  return std::sqrt(s.shear_y * s.shear_y + s.shear_z * s.shear_z) / material.k_cr + s.torsion;
}

}  // namespace bismar::mechanics
