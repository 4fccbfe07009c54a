// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/bending_plane.hpp"

#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/member.hpp>

#include <vector>

namespace bismar::mechanics {

/// Torque between two neighbouring stations.
struct TorqueSegment {
  double torque = 0.0;
  double twist_at_end = 0.0;  ///< phi G I_t from x = 0.
};

/// A member cut at every station of its loads.
struct CutMember {
  double length = 0.0;
  std::vector<double> stations;
  BendingPlane z;
  BendingPlane y;
  BendingPlane own_z;  ///< Under 1 N/m of own mass.
  BendingPlane own_y;
  bool accelerated_z = false;  ///< Whether own mass acts along z.
  bool accelerated_y = false;
  std::vector<TorqueSegment> torque;
  double axial = 0.0;
  double force_noise = 0.0;   ///< Below this a shear force is rounding.
  double moment_noise = 0.0;  ///< Below this a bending moment is rounding.
};

/// The load case must be free of faults; places beyond the length by rounding are taken as its end.
[[nodiscard]] CutMember cut_member(const LoadCase& load_case, double length);

/// Stations between which nothing is worse, see LoadEffects::stations; covered ones still among
/// them.
[[nodiscard]] std::vector<Station> all_stations(const CutMember& cut);

/// Those that no other covers. Of equal stations the first stays.
[[nodiscard]] std::vector<Station> without_covered(const std::vector<Station>& all);

/// How the moment of one plane runs, own mass left out.
[[nodiscard]] MomentShape moment_shape(const CutMember& cut, const BendingPlane& plane);

}  // namespace bismar::mechanics
