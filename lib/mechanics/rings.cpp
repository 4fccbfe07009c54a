// SPDX-License-Identifier: MIT
#include "mechanics/rings.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::mechanics {

double signed_area(const Ring& ring) {
  double twice = 0.0;
  for (std::size_t i = 0; i < ring.size(); ++i) {
    // About the first point, so that a far origin does not cancel.
    twice += cross(ring[i] - ring[0], ring[(i + 1) % ring.size()] - ring[0]);
  }
  return twice / 2.0;
}

std::vector<Edge> edges_of(std::span<const Ring> rings) {
  std::vector<Edge> edges;
  for (std::size_t r = 0; r < rings.size(); ++r) {
    const Ring& ring = rings[r];
    const std::size_t first = edges.size();
    const std::size_t n = ring.size();
    for (std::size_t i = 0; i < n; ++i) {
      Edge edge;
      edge.from = ring[i];
      edge.to = ring[(i + 1) % n];
      const SectionPoint step = edge.to - edge.from;
      edge.length = std::hypot(step.y, step.z);
      edge.along = {step.y / edge.length, step.z / edge.length};
      edge.outward = {edge.along.z, -edge.along.y};
      edge.ring = r;
      edge.previous = first + (i + n - 1) % n;
      edge.next = first + (i + 1) % n;
      edges.push_back(edge);
    }
  }
  return edges;
}

double turn_at_start(std::span<const Edge> edges, std::size_t edge) {
  const SectionPoint& before = edges[edges[edge].previous].along;
  const SectionPoint& after = edges[edge].along;
  return std::atan2(cross(before, after), dot(before, after));
}

double distance(const SectionPoint& point, const SectionPoint& a, const SectionPoint& b) {
  const SectionPoint step = b - a;
  const double share = std::clamp(dot(point - a, step) / dot(step, step), 0.0, 1.0);
  return std::hypot(point.y - a.y - share * step.y, point.z - a.z - share * step.z);
}

double distance(const SectionPoint& a,
                const SectionPoint& b,
                const SectionPoint& c,
                const SectionPoint& d) {
  const SectionPoint ab = b - a;
  const SectionPoint cd = d - c;
  const double c_side = cross(ab, c - a);
  const double d_side = cross(ab, d - a);
  const double a_side = cross(cd, a - c);
  const double b_side = cross(cd, b - c);
  const bool apart = (c_side > 0.0) != (d_side > 0.0);
  if (apart && (a_side > 0.0) != (b_side > 0.0)) {
    return 0.0;
  }
  return std::min({distance(a, c, d), distance(b, c, d), distance(c, a, b), distance(d, a, b)});
}

bool is_inside(const SectionPoint& point, const Ring& ring) {
  bool inside = false;
  for (std::size_t i = 0; i < ring.size(); ++i) {
    const SectionPoint& a = ring[i];
    const SectionPoint& b = ring[(i + 1) % ring.size()];
    if ((a.z > point.z) != (b.z > point.z)) {
      // Left or right of the edge, without a division.
      const bool left = cross(b - a, point - a) > 0.0;
      inside = inside != (left == (b.z > a.z));
    }
  }
  return inside;
}

}  // namespace bismar::mechanics
