// SPDX-License-Identifier: MIT
#include "mechanics/polygon_wall.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <numbers>
#include <numeric>
#include <queue>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
/// Room for rounding in "is it a right-hand turn" and the like, on unit vectors.
constexpr double slack = 1e-9;

SectionPoint nearest(const SectionPoint& point, const Edge& edge) {
  const double at = std::clamp(dot(point - edge.from, edge.along), 0.0, edge.length);
  return {edge.from.y + at * edge.along.y, edge.from.z + at * edge.along.z};
}

/// Walks over the pairs of places that face each other through material.
class Wall {
 public:
  explicit Wall(std::span<const Edge> edges) : edges_(edges) {}

  [[nodiscard]] double least() {
    for (std::size_t i = 0; i < edges_.size(); ++i) {
      for (std::size_t k = 0; k < edges_.size(); ++k) {
        if (k == i || edges_[k].next == i || edges_[k].previous == i) {
          continue;
        }
        // The least distance of two edges is at an end of one of them: ends of i against k.
        if (dot(edges_[i].outward, edges_[k].outward) < -0.5 - slack) {
          try_opposed(i, edges_[i].from, k);
          try_opposed(i, edges_[i].to, k);
        }
        try_notch(i, k);
      }
    }
    return least_;
  }

 private:
  /// Direction from a to b, or nothing where it cannot be the least.
  void try_opposed(std::size_t i, const SectionPoint& end, std::size_t k) {
    const SectionPoint way = nearest(end, edges_[k]) - end;
    const double length = std::hypot(way.y, way.z);
    if (length < least_ && dot(way, edges_[i].outward) < 0.0 && dot(way, edges_[k].outward) > 0.0) {
      least_ = length;
    }
  }

  /// The re-entrant corner at the start of edge i against edge k.
  void try_notch(std::size_t i, std::size_t k) {
    const Edge& before = edges_[edges_[i].previous];
    if (cross(before.along, edges_[i].along) >= -slack || edges_[i].previous == k ||
        edges_[k].previous == edges_[i].previous) {
      return;
    }
    const SectionPoint foot = nearest(edges_[i].from, edges_[k]);
    const SectionPoint way = foot - edges_[i].from;
    const double length = std::hypot(way.y, way.z);
    if (!(length < least_)) {
      return;
    }
    // Between the two inward normals, and out through the edge at a right angle; an end of the edge
    // counts where it is a re-entrant corner itself, which is its own turn in this walk.
    const bool into =
        dot(way, before.outward) < slack * length && dot(way, edges_[i].outward) < slack * length;
    const bool square = dot(way, edges_[k].outward) > (1.0 - slack) * length;
    if (into && (square || is_notch_end(foot, way, length, k))) {
      least_ = length;
    }
  }

  [[nodiscard]] bool is_notch_end(const SectionPoint& foot,
                                  const SectionPoint& way,
                                  double length,
                                  std::size_t k) const {
    const bool at_start = foot == edges_[k].from;
    const std::size_t corner = at_start ? k : edges_[k].next;
    const SectionPoint to_corner = edges_[corner].from - foot;
    if (std::hypot(to_corner.y, to_corner.z) > slack * length) {
      return false;
    }
    const Edge& after = edges_[corner];
    const Edge& before = edges_[after.previous];
    return cross(before.along, after.along) < -slack &&
           dot(way, before.outward) > -slack * length && dot(way, after.outward) > -slack * length;
  }

  std::span<const Edge> edges_;
  double least_ = infinity;
};

double least_width(std::span<const SectionPoint> hull) {
  double least = infinity;
  for (std::size_t i = 0; i < hull.size(); ++i) {
    const SectionPoint& a = hull[i];
    const SectionPoint side = hull[(i + 1) % hull.size()] - a;
    const double length = std::hypot(side.y, side.z);
    double farthest = 0.0;
    for (const SectionPoint& point : hull) {
      farthest = std::max(farthest, cross(side, point - a) / length);
    }
    least = std::min(least, farthest);
  }
  return least;
}

}  // namespace

std::vector<SectionPoint> convex_hull(std::vector<SectionPoint> points) {
  std::sort(points.begin(), points.end(), [](const SectionPoint& a, const SectionPoint& b) {
    return a.y < b.y || (a.y == b.y && a.z < b.z);
  });
  std::vector<SectionPoint> hull;
  const auto add = [&](const SectionPoint& point, std::size_t base) {
    while (hull.size() >= base + 2) {
      const SectionPoint last = hull.back() - hull[hull.size() - 2];
      const SectionPoint next = point - hull.back();
      // A point within rounding of a side is no corner.
      if (cross(last, next) > slack * std::hypot(last.y, last.z) * std::hypot(next.y, next.z)) {
        break;
      }
      hull.pop_back();
    }
    hull.push_back(point);
  };
  for (const SectionPoint& point : points) {
    add(point, 0);
  }
  const std::size_t lower = hull.size() - 1;
  for (std::size_t i = points.size() - 1; i-- > 0;) {
    add(points[i], lower);
  }
  hull.pop_back();  // the first point again
  return hull;
}

double least_wall(std::span<const Edge> edges, std::span<const SectionPoint> hull) {
  const double wall = Wall(edges).least();
  return std::isinf(wall) ? least_width(hull) : wall;
}

namespace {

/// A square that may hold the centre of the largest circle.
struct Cell {
  SectionPoint middle;
  double half = 0.0;
  double reach = 0.0;             ///< No circle with its centre in the cell has a larger radius.
  std::vector<std::size_t> near;  ///< The edges that can be the nearest to a place in the cell.
  bool operator<(const Cell& other) const { return reach < other.reach; }
};

bool is_in_material(const SectionPoint& point, std::span<const Ring> rings) {
  for (std::size_t r = 1; r < rings.size(); ++r) {
    if (is_inside(point, rings[r])) {
      return false;
    }
  }
  return is_inside(point, rings[0]);
}

}  // namespace

double largest_circle(std::span<const Ring> rings, std::span<const Edge> edges) {
  double best = 0.0;
  std::priority_queue<Cell> cells;
  std::vector<double> distances;
  // Thin rings of many edges make many cells: each looks at the edges near its parent only.
  const auto add = [&](const SectionPoint& middle, double half, std::span<const std::size_t> near) {
    double radius = infinity;
    std::size_t closest = near[0];
    SectionPoint to_closest;
    distances.clear();
    for (const std::size_t e : near) {
      const SectionPoint way = nearest(middle, edges[e]) - middle;
      distances.push_back(std::hypot(way.y, way.z));
      if (distances.back() < radius) {
        radius = distances.back();
        closest = e;
        to_closest = way;
      }
    }
    // Square to the nearest edge, the side of that edge tells; at its ends the whole outline does.
    const double out = dot(to_closest, edges[closest].outward);
    const bool square = std::abs(out) > (1.0 - slack) * radius;
    const bool inside = square ? out > 0.0 : is_in_material(middle, rings);
    const double signed_radius = inside ? radius : -radius;
    best = std::max(best, signed_radius);
    const double diagonal = half * std::numbers::sqrt2;
    const double reach = signed_radius + diagonal;
    constexpr double exact_enough = 1.01;
    if (reach > exact_enough * best) {
      Cell cell{.middle = middle, .half = half, .reach = reach, .near = {}};
      for (std::size_t i = 0; i < near.size(); ++i) {
        if (distances[i] <= (radius + 2.0 * diagonal) * (1.0 + slack)) {
          cell.near.push_back(near[i]);
        }
      }
      cells.push(std::move(cell));
    }
  };
  std::vector<std::size_t> all(edges.size());
  std::iota(all.begin(), all.end(), std::size_t{0});

  SectionPoint low = rings[0][0];
  SectionPoint high = low;
  for (const SectionPoint& point : rings[0]) {
    low = {std::min(low.y, point.y), std::min(low.z, point.z)};
    high = {std::max(high.y, point.y), std::max(high.z, point.z)};
  }
  const double side = std::min(high.y - low.y, high.z - low.z);
  const auto count = [&](double length) {
    return static_cast<int>(std::ceil(length / side - slack));
  };
  for (int column = 0; column < count(high.y - low.y); ++column) {
    for (int row = 0; row < count(high.z - low.z); ++row) {
      add({low.y + (column + 0.5) * side, low.z + (row + 0.5) * side}, side / 2.0, all);
    }
  }
  while (!cells.empty() && cells.top().reach > 1.01 * best) {
    const Cell cell = cells.top();
    cells.pop();
    const double half = cell.half / 2.0;
    for (const double y : {-half, half}) {
      for (const double z : {-half, half}) {
        add({cell.middle.y + y, cell.middle.z + z}, half, cell.near);
      }
    }
  }
  return 2.0 * best;
}

}  // namespace bismar::mechanics
