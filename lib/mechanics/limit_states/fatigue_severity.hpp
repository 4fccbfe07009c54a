// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/limit_states/fatigue_resistance.hpp"
#include "mechanics/limit_states/second_order.hpp"

#include <bismar/mechanics/fatigue.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include <algorithm>

namespace bismar::mechanics {

/// What is done to the stresses of a station, kind by kind.
struct StressMultipliers {
  double axial = 1.0;
  double bending = 1.0;
  double shear = 1.0;
  double torsion = 1.0;
};

/// The stresses that count at one station and what they use up, before the factor.
struct FatigueSeverity {
  const Station* station = nullptr;
  InternalForces forces;   ///< There, own mass and the rise by compression included.
  bool shear = false;      ///< Anisotropic: the shear part.
  double amplitude = 0.0;  ///< Size and load factors are in it [Pa].
  double mean = 0.0;       ///< Of tension [Pa].
  double largest = 0.0;    ///< In the first cycle, or the range of a weld [Pa].
  double fatigue = 0.0;    ///< 1 / n of the life.
  double first = 0.0;      ///< 1 / n of the first cycle.

  [[nodiscard]] double share() const { return std::max(fatigue, first); }
};

/// Amplitude over the largest stress, (1 - R) / 2, and mean over it, (1 + R) / 2.
[[nodiscard]] double amplitude_share(const CheckInput& input);
[[nodiscard]] double mean_share(const CheckInput& input);

/// Parent material: everything that does not depend on the station.
struct StressLife {
  FatigueNotch notch;
  FatigueResistance resistance;
  MeanStressLine line = MeanStressLine::goodman;
  StressMultipliers peak;       ///< Net section and notch.
  StressMultipliers amplitude;  ///< Besides, size and load factors.

  explicit StressLife(const CheckInput& input);
};

/// The station that uses up most. Of a member that is not unstable.
///
/// The swing is that of the amplified moments between the whole load case and stress_ratio times
/// it; where the other end is in tension as if the rise held there too, on the safe side.
[[nodiscard]] FatigueSeverity worst_of(const CheckInput& input,
                                       const StressLife& life,
                                       const Amplifications& raised);
[[nodiscard]] FatigueSeverity worst_weld(const CheckInput& input, const Amplifications& raised);

}  // namespace bismar::mechanics
