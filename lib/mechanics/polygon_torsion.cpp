// SPDX-License-Identifier: MIT
#include "mechanics/polygon_torsion.hpp"

#include "mechanics/boundary_elements.hpp"
#include "mechanics/dense_solver.hpp"
#include "mechanics/text.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <optional>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

// Prandtl's stress function for G theta = 1: its Laplacian is -2 in the material, it is zero
// outside and C_k / 2 pi in hole k. As a potential it belongs to a charge -2 over the material and
// a charge sigma on the outline, which is the shear stress along it, positive left-handed about the
// material:
//
//     integral sigma ln r ds - 2 integral ln r dA = C of the ring   at every point of the outline,
//     integral sigma ds over a ring = 2 times its signed area       (the warp closes on itself).
//
// With a C for the outer ring too, which comes out as zero, the logarithm's own length scale drops
// out. The potential's energy is least at the solution, so that I_t, taken from it, is in error by
// the square of the error of sigma only; and nothing cancels in a thin wall, where sigma is its
// thickness.

constexpr double pi = std::numbers::pi;
constexpr std::array<double, 4> gauss_8 = {
    0.18343464249564980494, 0.52553240991632898582, 0.79666647741362673959, 0.96028985649753623168};
constexpr std::array<double, 4> gauss_8_weights = {
    0.36268378337836198297, 0.31370664587788728734, 0.22238103445337447054, 0.10122853629037625915};

struct Level {
  ElementGrading grading;
  std::size_t elements_of_step;  ///< On an edge that is a step of a rounded outline.
  std::size_t nodes_of_step;     ///< Of each of them.
};
constexpr std::array<Level, 4> levels = {
    Level{{.reach = 3.0, .at_notch = 1e-1, .at_corner = 1.0}, 1, 1},
    Level{{.reach = 1.6, .at_notch = 1e-2, .at_corner = 0.3}, 1, 3},
    Level{{.reach = 1.0, .at_notch = 2e-3, .at_corner = 0.2}, 2, 3},
    Level{{.reach = 0.6, .at_notch = 5e-4, .at_corner = 0.1}, 3, 3}};
constexpr double settled_enough = 1e-3;
constexpr double peak_settled_enough = 3e-2;
constexpr double settled_at_least = 1e-3;
constexpr std::size_t most_unknowns = 1600;

struct Solution {
  double I_t = 0.0;
  double peak = 0.0;
  std::size_t unknowns = 0;
};

class Torsion {
 public:
  explicit Torsion(std::span<const Ring> rings)
      : edges_(edges_of(rings)), corners_(corner_scales(edges_)) {
    for (const Ring& ring : rings) {
      areas_.push_back(signed_area(ring));
    }
  }

  /// Nothing where the level needs too many unknowns.
  [[nodiscard]] std::optional<Solution> solve(const Level& level) const {
    std::vector<BoundaryElement> elements;
    std::size_t unknowns = 0;
    const auto add = [&](BoundaryElement element, std::size_t nodes) {
      element.nodes = nodes;
      element.first_unknown = unknowns;
      unknowns += nodes;
      elements.push_back(element);
    };
    const std::vector<BoundaryElement> graded = elements_of(edges_, corners_, level.grading);
    for (const BoundaryElement& element : graded) {
      const double length = edges_[element.edge].length;
      if (element.to - element.from < length || graded.size() < 40) {
        add(element, 3);
        continue;
      }
      const double step = length / static_cast<double>(level.elements_of_step);
      for (std::size_t part = 0; part < level.elements_of_step; ++part) {
        const double from = step * static_cast<double>(part);
        add({.edge = element.edge, .from = from, .to = from + step}, level.nodes_of_step);
      }
    }
    if (unknowns > most_unknowns) {
      return std::nullopt;
    }
    const std::vector<double> x = charges(elements, unknowns);
    return Solution{
        .I_t = constant(elements, x, unknowns), .peak = peak(elements, x), .unknowns = unknowns};
  }

 private:
  [[nodiscard]] SectionPoint point(std::size_t edge, double at) const {
    const Edge& e = edges_[edge];
    return {e.from.y + at * e.along.y, e.from.z + at * e.along.z};
  }

  static double node(const BoundaryElement& element, std::size_t k) {
    const double middle = (element.from + element.to) / 2.0;
    return element.nodes == 1 ? middle
                              : middle + element.half() * gauss_3 * (static_cast<double>(k) - 1.0);
  }

  [[nodiscard]] std::vector<double> charges(const std::vector<BoundaryElement>& elements,
                                            std::size_t unknowns) const {
    DenseSystem system(unknowns + areas_.size());
    for (const BoundaryElement& element : elements) {
      const std::size_t ring = unknowns + edges_[element.edge].ring;
      for (std::size_t k = 0; k < element.nodes; ++k) {
        const std::size_t row = element.first_unknown + k;
        const SectionPoint x = point(element.edge, node(element, k));
        for (const BoundaryElement& other : elements) {
          const std::array<double, 3> integrals = log_integrals(edges_[other.edge], other, x);
          for (std::size_t j = 0; j < other.nodes; ++j) {
            system.at(row, other.first_unknown + j) = integrals[j];
          }
        }
        system.at(row, ring) = -1.0;
        system.right(row) = 2.0 * area_potential(edges_, x).f;
        const double weight = element.nodes == 1 ? 2.0 : k == 1 ? 8.0 / 9.0 : 5.0 / 9.0;
        system.at(ring, row) = weight * element.half();
      }
    }
    for (std::size_t r = 0; r < areas_.size(); ++r) {
      system.right(unknowns + r) = 2.0 * areas_[r];
    }
    return system.solve();
  }

  static double value(const BoundaryElement& element, const std::vector<double>& x, double xi) {
    if (element.nodes == 1) {
      return x[element.first_unknown];
    }
    const std::array<double, 3> shape = shape_functions(xi);
    return shape[0] * x[element.first_unknown] + shape[1] * x[element.first_unknown + 1] +
           shape[2] * x[element.first_unknown + 2];
  }

  /// I_t = 2 integral phi dA + 2 sum of phi_k A_k over the holes.
  [[nodiscard]] double constant(const std::vector<BoundaryElement>& elements,
                                const std::vector<double>& x,
                                std::size_t unknowns) const {
    double charge_part = 0.0;  // integral of sigma F
    double area_part = 0.0;    // integral of F over the material
    for (const BoundaryElement& element : elements) {
      const SectionPoint& normal = edges_[element.edge].outward;
      for (std::size_t k = 0; k < 2 * gauss_8.size(); ++k) {
        const double xi = k % 2 == 0 ? gauss_8[k / 2] : -gauss_8[k / 2];
        const double at = (element.from + element.to) / 2.0 + xi * element.half();
        const AreaPotential potential = area_potential(edges_, point(element.edge, at));
        const double weight = gauss_8_weights[k / 2] * element.half();
        charge_part += weight * value(element, x, xi) * potential.f;
        area_part -= weight * dot(normal, potential.g);
      }
    }
    double sum = charge_part - 2.0 * area_part;
    for (std::size_t r = 0; r < areas_.size(); ++r) {
      // Holes have negative areas; the outer constant, zero but for the error, is taken off all.
      sum -= x[unknowns + r] * areas_[r];
    }
    return sum / pi;
  }

  /// What is left out of the peak on both sides of a re-entrant corner.
  [[nodiscard]] double left_out(std::size_t corner, std::size_t edge) const {
    return corners_[corner].turn < 0.0
               ? std::min(corners_[corner].scale / 2.0, edges_[edge].length / 4.0)
               : 0.0;
  }

  [[nodiscard]] double peak(const std::vector<BoundaryElement>& elements,
                            const std::vector<double>& x) const {
    double most = 0.0;
    for (const BoundaryElement& element : elements) {
      const Edge& edge = edges_[element.edge];
      const double low = std::max(element.from, left_out(element.edge, element.edge));
      const double high = std::min(element.to, edge.length - left_out(edge.next, element.edge));
      if (low >= high) {
        continue;
      }
      const double middle = (element.from + element.to) / 2.0;
      const double a = (low - middle) / element.half();
      const double b = (high - middle) / element.half();
      most = std::max({most, std::abs(value(element, x, a)), std::abs(value(element, x, b))});
      const double curvature =
          value(element, x, 1.0) - 2.0 * value(element, x, 0.0) + value(element, x, -1.0);
      const double slope = (value(element, x, 1.0) - value(element, x, -1.0)) / 2.0;
      const double top = -slope / curvature;
      if (curvature != 0.0 && top > a && top < b) {
        most = std::max(most, std::abs(value(element, x, top)));
      }
    }
    return most;
  }

  std::vector<Edge> edges_;
  std::vector<CornerScale> corners_;
  std::vector<double> areas_;
};

}  // namespace

PolygonTorsion polygon_torsion(std::span<const Ring> rings) {
  // The sizes are about one, so that no unit favours a pivot.
  double size = 0.0;
  for (const SectionPoint& point : rings[0]) {
    size = std::max({size, std::abs(point.y - rings[0][0].y), std::abs(point.z - rings[0][0].z)});
  }
  std::vector<Ring> unit(rings.begin(), rings.end());
  for (Ring& ring : unit) {
    for (SectionPoint& point : ring) {
      point = {(point.y - rings[0][0].y) / size, (point.z - rings[0][0].z) / size};
    }
  }
  const Torsion torsion(unit);
  std::optional<Solution> last;
  PolygonTorsion result;
  result.settled = 1.0;
  for (const Level& level : levels) {
    const std::optional<Solution> next = torsion.solve(level);
    if (!next) {
      break;
    }
    double peak_change = 1.0;
    if (last) {
      result.settled = std::abs(next->I_t - last->I_t) / next->I_t;
      peak_change = std::abs(next->peak - last->peak) / next->peak;
    }
    last = next;
    if (result.settled < settled_enough && peak_change < peak_settled_enough) {
      break;
    }
  }
  if (!last || !(result.settled < settled_at_least)) {
    Fault fault;
    fault.code = Code::unsupported;
    fault.where = "/outer";
    fault.message =
        "The torsion of this polygon has not settled to a thousandth. Leave out points "
        "or gaps that are very small beside the whole.";
    throw Error(std::move(fault));
  }
  const double fourth = size * size * size * size;
  result.I_t = last->I_t * fourth;
  result.W_t = last->I_t / last->peak * size * size * size;
  result.unknowns = last->unknowns;
  return result;
}

}  // namespace bismar::mechanics
