// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/section.hpp>

#include <cstddef>
#include <span>
#include <vector>

namespace bismar::mechanics {

/// A closed line of points; the last one is joined to the first.
using Ring = std::vector<SectionPoint>;

/// A straight piece of the outline, run through with the material on its left.
struct Edge {
  SectionPoint from;
  SectionPoint to;
  SectionPoint along;    ///< Unit vector.
  SectionPoint outward;  ///< Unit normal out of the material.
  double length = 0.0;   ///< [m]
  std::size_t ring = 0;
  std::size_t previous = 0;  ///< Index of the edge that ends where this one begins.
  std::size_t next = 0;
};

[[nodiscard]] inline SectionPoint operator-(const SectionPoint& a, const SectionPoint& b) {
  return {a.y - b.y, a.z - b.z};
}
[[nodiscard]] inline double dot(const SectionPoint& a, const SectionPoint& b) {
  return a.y * b.y + a.z * b.z;
}
/// Positive where b is to the left of a.
[[nodiscard]] inline double cross(const SectionPoint& a, const SectionPoint& b) {
  return a.y * b.z - a.z * b.y;
}

/// Area inside a ring [m^2]: positive where it is run through with the inside on its left.
[[nodiscard]] double signed_area(const Ring& ring);
/// Edges of all rings in order; the outer ring is first and runs left-handed, holes right-handed.
[[nodiscard]] std::vector<Edge> edges_of(std::span<const Ring> rings);
/// Angle by which the outline turns where `edge` begins [rad]: above zero at a corner that sticks
/// out, below zero at a re-entrant one.
[[nodiscard]] double turn_at_start(std::span<const Edge> edges, std::size_t edge);
[[nodiscard]] double distance(const SectionPoint& point,
                              const SectionPoint& a,
                              const SectionPoint& b);
/// Least distance of two straight pieces; zero where they cross.
[[nodiscard]] double distance(const SectionPoint& a,
                              const SectionPoint& b,
                              const SectionPoint& c,
                              const SectionPoint& d);
/// Whether the point is inside the ring, either way round; for points that are not on it.
[[nodiscard]] bool is_inside(const SectionPoint& point, const Ring& ring);

}  // namespace bismar::mechanics
