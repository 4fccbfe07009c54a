// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/rings.hpp"

#include <span>
#include <vector>

namespace bismar::mechanics {

/// Corners of the convex hull, left-handed, without points on its sides.
[[nodiscard]] std::vector<SectionPoint> convex_hull(std::vector<SectionPoint> points);

/// Least distance across material, see polygon.hpp [m].
[[nodiscard]] double least_wall(std::span<const Edge> edges, std::span<const SectionPoint> hull);

/// Diameter of the largest circle in the material [m]: at most 1 % below it.
[[nodiscard]] double largest_circle(std::span<const Ring> rings, std::span<const Edge> edges);

}  // namespace bismar::mechanics
