// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/rings.hpp"

#include <array>
#include <cstddef>
#include <span>
#include <vector>

namespace bismar::mechanics {

/// A straight element of the boundary. The unknown along it is a parabola through its values at the
/// three Gauss points, or one number on a short element.
struct BoundaryElement {
  std::size_t edge = 0;
  double from = 0.0;  ///< Distance of its ends from the start of the edge.
  double to = 0.0;
  std::size_t nodes = 3;          ///< 1 or 3.
  std::size_t first_unknown = 0;  ///< Index of its first value.

  [[nodiscard]] double half() const { return (to - from) / 2.0; }
};

/// How finely the outline is divided.
struct ElementGrading {
  double reach = 2.0;      ///< Longest element over its distance from the nearest corner; 0.7 of it
                           ///< where the corner is re-entrant.
  double at_notch = 0.02;  ///< Shortest element at a re-entrant corner over the local thickness.
  double at_corner = 0.2;  ///< The same at a corner that sticks out.
};

/// What is needed of a corner, the start of an edge.
struct CornerScale {
  double turn = 0.0;   ///< As turn_at_start.
  double scale = 0.0;  ///< The least of both adjoining edges and the distance to any other edge.
};

[[nodiscard]] std::vector<CornerScale> corner_scales(std::span<const Edge> edges);

/// Elements of all edges, shorter towards every corner they see.
[[nodiscard]] std::vector<BoundaryElement> elements_of(std::span<const Edge> edges,
                                                       std::span<const CornerScale> corners,
                                                       const ElementGrading& grading);

/// Integrals over the element of ln r times the shape function of each of its nodes, r from `x`.
[[nodiscard]] std::array<double, 3> log_integrals(const Edge& edge,
                                                  const BoundaryElement& element,
                                                  const SectionPoint& x);

/// At a point: F = integral of ln r over the material, and the vector of integrals over the outline
/// of g(r) times the outward normal, g = r^2 (ln r - 1) / 4, whose Laplacian is ln r.
struct AreaPotential {
  double f = 0.0;
  SectionPoint g;
};
[[nodiscard]] AreaPotential area_potential(std::span<const Edge> edges, const SectionPoint& x);

/// The three Gauss points on [-1, 1] and the shape functions there.
inline constexpr double gauss_3 = 0.77459666924148337704;
[[nodiscard]] std::array<double, 3> shape_functions(double xi);

}  // namespace bismar::mechanics
