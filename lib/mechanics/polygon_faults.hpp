// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/rings.hpp"

#include <span>
#include <vector>

namespace bismar::mechanics {

/// Outer ring with the inside on its left, then the holes the other way round, all from the first
/// point of `outer`.
/// @throws bismar::Error  every fault of the points, see polygon.hpp.
[[nodiscard]] std::vector<Ring> checked_rings(std::span<const SectionPoint> outer,
                                              std::span<const std::vector<SectionPoint>> holes);

}  // namespace bismar::mechanics
