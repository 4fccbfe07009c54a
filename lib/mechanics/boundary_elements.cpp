// SPDX-License-Identifier: MIT
#include "mechanics/boundary_elements.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar::mechanics {

namespace {

/// A turn below this (about 15 degrees) is a step of a rounded outline, not a corner.
constexpr double slight_turn = 0.27;

/// Integrals of t^k ln sqrt(t^2 + v^2) from t1 to t2, k = 0, 1, 2.
std::array<double, 3> log_moments(double t1, double t2, double v) {
  const double a1 = t1 * t1 + v * v;
  const double a2 = t2 * t2 + v * v;
  // t ln t tends to zero with t.
  const double log1 = a1 > 0.0 ? std::log(a1) : 0.0;
  const double log2 = a2 > 0.0 ? std::log(a2) : 0.0;
  const double angle = v > 0.0 ? std::atan2(v * (t2 - t1), v * v + t1 * t2) : 0.0;
  const double cubes = (t2 * t2 * t2 - t1 * t1 * t1) / 3.0;
  return {(t2 * log2 - t1 * log1) / 2.0 - (t2 - t1) + v * angle,
          (a2 * (log2 - 1.0) - a1 * (log1 - 1.0)) / 4.0,
          (t2 * t2 * t2 * log2 - t1 * t1 * t1 * log1) / 6.0 -
              (cubes - v * v * (t2 - t1) + v * v * v * angle) / 3.0};
}

class Divider {
 public:
  Divider(std::span<const Edge> edges,
          std::span<const CornerScale> corners,
          const ElementGrading& grading)
      : edges_(edges), corners_(corners) {
    shortest_.reserve(corners.size());
    reach_.reserve(corners.size());
    for (const CornerScale& corner : corners) {
      const bool slight = std::abs(corner.turn) < slight_turn;
      const double share = corner.turn < 0.0 ? grading.at_notch : grading.at_corner;
      reach_.push_back(grading.reach * (corner.turn < 0.0 && !slight ? 0.7 : 1.0));
      shortest_.push_back(slight ? std::numeric_limits<double>::infinity() : share * corner.scale);
    }
  }

  void divide(std::size_t edge, double from, double to) {
    if (too_long(edge, from, to)) {
      const double middle = (from + to) / 2.0;
      divide(edge, from, middle);
      divide(edge, middle, to);
      return;
    }
    elements_.push_back({.edge = edge, .from = from, .to = to});
  }

  std::vector<BoundaryElement> take() { return std::move(elements_); }

 private:
  [[nodiscard]] bool too_long(std::size_t edge, double from, double to) const {
    const Edge& e = edges_[edge];
    const SectionPoint a = {e.from.y + from * e.along.y, e.from.z + from * e.along.z};
    const SectionPoint b = {e.from.y + to * e.along.y, e.from.z + to * e.along.z};
    // A tie must not hang on rounding: the mesh is to be the same wherever the origin lies.
    const double length = (to - from) * (1.0 - 1e-9);
    for (std::size_t k = 0; k < edges_.size(); ++k) {
      if (length > reach_[k] * shortest_[k] &&
          length > reach_[k] * distance(edges_[k].from, a, b)) {
        return true;
      }
    }
    return false;
  }

  std::span<const Edge> edges_;
  std::span<const CornerScale> corners_;
  std::vector<double> reach_;
  std::vector<double> shortest_;
  std::vector<BoundaryElement> elements_;
};

}  // namespace

std::vector<CornerScale> corner_scales(std::span<const Edge> edges) {
  std::vector<CornerScale> corners(edges.size());
  for (std::size_t i = 0; i < edges.size(); ++i) {
    const std::size_t before = edges[i].previous;
    double scale = std::min(edges[i].length, edges[before].length);
    for (std::size_t k = 0; k < edges.size(); ++k) {
      if (k != i && k != before) {
        scale = std::min(scale, distance(edges[i].from, edges[k].from, edges[k].to));
      }
    }
    corners[i] = {.turn = turn_at_start(edges, i), .scale = scale};
  }
  return corners;
}

std::vector<BoundaryElement> elements_of(std::span<const Edge> edges,
                                         std::span<const CornerScale> corners,
                                         const ElementGrading& grading) {
  Divider divider(edges, corners, grading);
  for (std::size_t i = 0; i < edges.size(); ++i) {
    divider.divide(i, 0.0, edges[i].length);
  }
  return divider.take();
}

std::array<double, 3> shape_functions(double xi) {
  const double scaled = xi / gauss_3;
  return {scaled * (scaled - 1.0) / 2.0, 1.0 - scaled * scaled, scaled * (scaled + 1.0) / 2.0};
}

std::array<double, 3> log_integrals(const Edge& edge,
                                    const BoundaryElement& element,
                                    const SectionPoint& x) {
  const double half = element.half();
  const SectionPoint away = x - edge.from;
  const double u = (dot(away, edge.along) - (element.from + element.to) / 2.0) / half;
  const double v = std::abs(dot(away, edge.outward)) / half;
  const double log_half = std::log(half);
  if (element.nodes == 1) {
    const double j0 = log_moments(-1.0 - u, 1.0 - u, v)[0];
    return {half * (j0 + 2.0 * log_half), 0.0, 0.0};
  }
  constexpr double far = 30.0;
  if (u * u + v * v > far * far) {
    // The closed form cancels here, and three points leave less than 1e-10 of the element's share.
    const auto at = [&](double xi) {
      return half * (std::log((u - xi) * (u - xi) + v * v) / 2.0 + log_half);
    };
    return {5.0 / 9.0 * at(-gauss_3), 8.0 / 9.0 * at(0.0), 5.0 / 9.0 * at(gauss_3)};
  }
  const std::array<double, 3> t = log_moments(-1.0 - u, 1.0 - u, v);
  const double j0 = t[0] + 2.0 * log_half;
  const double j1 = t[1] + u * t[0];
  const double j2 = t[2] + 2.0 * u * t[1] + u * u * t[0] + 2.0 / 3.0 * log_half;
  const double square = gauss_3 * gauss_3;
  return {half * (j2 / square - j1 / gauss_3) / 2.0,
          half * (j0 - j2 / square),
          half * (j2 / square + j1 / gauss_3) / 2.0};
}

AreaPotential area_potential(std::span<const Edge> edges, const SectionPoint& x) {
  AreaPotential sum;
  for (const Edge& edge : edges) {
    const SectionPoint from = edge.from - x;
    const double t1 = dot(from, edge.along);
    const double t2 = t1 + edge.length;
    const double d = dot(from, edge.outward);
    const std::array<double, 3> t = log_moments(t1, t2, std::abs(d));
    sum.f += d * (2.0 * t[0] - edge.length) / 4.0;
    const double cubes = (t2 * t2 * t2 - t1 * t1 * t1) / 3.0;
    const double g = (t[2] + d * d * t[0] - (cubes + d * d * edge.length)) / 4.0;
    sum.g.y += g * edge.outward.y;
    sum.g.z += g * edge.outward.z;
  }
  return sum;
}

}  // namespace bismar::mechanics
