// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/rings.hpp"

#include <cstdint>
#include <span>

namespace bismar::mechanics {

/// The direction of the load; cuts run across it.
enum class CutDirection : std::uint8_t { y, z };

struct CutMoments {
  double I_y = 0.0;
  double I_z = 0.0;
  double I_yz = 0.0;
};

/// What straight cuts across one direction tell. See polygon.hpp.
struct Cuts {
  double W_pl = 0.0;  ///< About the cut that halves the area [m^3].
  double A_v = 0.0;   ///< Least t / Q [m^2].
  double A_s = 0.0;   ///< 1 / integral of Q^2 / t [m^2].
};

/// Edges about the centroid.
[[nodiscard]] Cuts cuts_across(CutDirection direction,
                               std::span<const Edge> edges,
                               const CutMoments& moments);

}  // namespace bismar::mechanics
