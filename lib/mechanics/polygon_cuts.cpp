// SPDX-License-Identifier: MIT
#include "mechanics/polygon_cuts.hpp"

#include "mechanics/polynomial.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <vector>

namespace bismar::mechanics {

namespace {

/// An edge as the sweep sees it: s along the load, x across it. It bounds the material on the
/// greater-x side where `sign` is +1, on the smaller where it is -1.
struct SweptEdge {
  double s_low = 0.0;
  double s_high = 0.0;
  double x_low = 0.0;  ///< x at s_low
  double slope = 0.0;  ///< dx / ds
  double sign = 0.0;
};

/// Between two neighbouring levels of corners: all in u = s - from.
struct Slab {
  double from = 0.0;
  double length = 0.0;
  Polynomial width;  ///< t
  Polynomial area;   ///< Of all below.
  Polynomial first;  ///< First moment of all below, integral of s dA.
  Polynomial flow;   ///< Q of all below.
};

constexpr std::array<double, 4> gauss_8 = {
    0.18343464249564980494, 0.52553240991632898582, 0.79666647741362673959, 0.96028985649753623168};
constexpr std::array<double, 4> gauss_8_weights = {
    0.36268378337836198297, 0.31370664587788728734, 0.22238103445337447054, 0.10122853629037625915};

std::vector<SweptEdge> swept(CutDirection direction, std::span<const Edge> edges) {
  std::vector<SweptEdge> list;
  for (const Edge& edge : edges) {
    const bool along_z = direction == CutDirection::z;
    const double s0 = along_z ? edge.from.z : edge.from.y;
    const double s1 = along_z ? edge.to.z : edge.to.y;
    if (s0 == s1) {
      continue;
    }
    const double x0 = along_z ? edge.from.y : edge.from.z;
    const double x1 = along_z ? edge.to.y : edge.to.z;
    const bool up = s1 > s0;
    // The material is on the left of the edge; swapping the axes mirrors that.
    list.push_back({.s_low = std::min(s0, s1),
                    .s_high = std::max(s0, s1),
                    .x_low = up ? x0 : x1,
                    .slope = (x1 - x0) / (s1 - s0),
                    .sign = up == along_z ? 1.0 : -1.0});
  }
  return list;
}

std::vector<Slab> slabs(const std::vector<SweptEdge>& edges, double across, double product) {
  std::vector<double> levels;
  for (const SweptEdge& edge : edges) {
    levels.push_back(edge.s_low);
    levels.push_back(edge.s_high);
  }
  std::sort(levels.begin(), levels.end());
  levels.erase(std::unique(levels.begin(), levels.end()), levels.end());

  std::vector<Slab> list;
  double area = 0.0;
  double first = 0.0;
  double flow = 0.0;
  for (std::size_t i = 0; i + 1 < levels.size(); ++i) {
    Slab slab;
    slab.from = levels[i];
    slab.length = levels[i + 1] - levels[i];
    Polynomial side;  // integral of x over the cut
    for (const SweptEdge& edge : edges) {
      if (edge.s_low <= slab.from && edge.s_high >= levels[i + 1]) {
        const double x = edge.x_low + edge.slope * (slab.from - edge.s_low);
        slab.width.c[0] += edge.sign * x;
        slab.width.c[1] += edge.sign * edge.slope;
        side.c[0] += edge.sign * x * x / 2.0;
        side.c[1] += edge.sign * x * edge.slope;
        side.c[2] += edge.sign * edge.slope * edge.slope / 2.0;
      }
    }
    const Polynomial lever = {{slab.from * slab.width.c[0],
                               slab.width.c[0] + slab.from * slab.width.c[1],
                               slab.width.c[1]}};
    Polynomial rate;
    for (std::size_t k = 0; k < 3; ++k) {
      rate.c[k] = across * lever.c[k] - product * side.c[k];
    }
    slab.area = slab.width.integral(area);
    slab.first = lever.integral(first);
    slab.flow = rate.integral(flow);
    area = slab.area(slab.length);
    first = slab.first(slab.length);
    flow = slab.flow(slab.length);
    list.push_back(slab);
  }
  return list;
}

double plastic_modulus(const std::vector<Slab>& list) {
  const double half = list.back().area(list.back().length) / 2.0;
  for (const Slab& slab : list) {
    if (slab.area(slab.length) < half) {
      continue;
    }
    double low = 0.0;
    double high = slab.length;
    for (int step = 0; step < 60; ++step) {
      const double u = (low + high) / 2.0;
      (slab.area(u) < half ? low : high) = u;
    }
    // The halves' first moments about the centroid are equal and opposite, and both have the same
    // area, so that the line's own place drops out.
    return 2.0 * std::abs(slab.first((low + high) / 2.0));
  }
  return 0.0;  // not reached: the last slab holds the whole area
}

/// Largest Q / t. In a slab Q is a cubic and t is linear: (Q / t)' has the sign of a cubic.
double peak(const std::vector<Slab>& list, double widest) {
  double most = 0.0;
  for (const Slab& slab : list) {
    const Polynomial& q = slab.flow;
    const Polynomial dq = q.derivative();
    Polynomial sign;
    for (std::size_t k = 0; k < 4; ++k) {
      sign.c[k] = dq.c[k] * slab.width.c[0] + (k > 0 ? dq.c[k - 1] * slab.width.c[1] : 0.0) -
                  q.c[k] * slab.width.c[1];
    }
    std::vector<double> places = sign_changes(sign, slab.length);
    places.push_back(0.0);
    places.push_back(slab.length);
    for (const double u : places) {
      // At a tip Q falls with the square of the distance, t with the distance itself.
      if (slab.width(u) > 1e-9 * widest) {
        most = std::max(most, std::abs(q(u)) / slab.width(u));
      }
    }
  }
  return most;
}

/// Integral of Q^2 / t from a to b. Eight points are exact to 1e-12 where t at most doubles.
double energy(const Slab& slab, double a, double b, int depth) {
  const double ta = std::max(slab.width(a), 0.0);
  const double tb = std::max(slab.width(b), 0.0);
  constexpr int deepest = 14;  // the share of a tip falls with the fourth power of its length
  if (std::max(ta, tb) > 2.0 * std::min(ta, tb) && depth < deepest) {
    const double middle = (a + b) / 2.0;
    return energy(slab, a, middle, depth + 1) + energy(slab, middle, b, depth + 1);
  }
  double sum = 0.0;
  for (std::size_t k = 0; k < 2 * gauss_8.size(); ++k) {
    const double xi = k % 2 == 0 ? gauss_8[k / 2] : -gauss_8[k / 2];
    const double u = (a + b) / 2.0 + xi * (b - a) / 2.0;
    const double t = slab.width(u);
    if (t > 0.0) {
      sum += gauss_8_weights[k / 2] * (b - a) / 2.0 * slab.flow(u) * slab.flow(u) / t;
    }
  }
  return sum;
}

}  // namespace

Cuts cuts_across(CutDirection direction, std::span<const Edge> edges, const CutMoments& moments) {
  const double determinant = moments.I_y * moments.I_z - moments.I_yz * moments.I_yz;
  const double across = direction == CutDirection::z ? moments.I_z : moments.I_y;
  const std::vector<Slab> list =
      slabs(swept(direction, edges), across / determinant, moments.I_yz / determinant);
  double widest = 0.0;
  double sum = 0.0;
  for (const Slab& slab : list) {
    widest = std::max({widest, slab.width(0.0), slab.width(slab.length)});
    sum += energy(slab, 0.0, slab.length, 0);
  }
  return {.W_pl = plastic_modulus(list), .A_v = 1.0 / peak(list, widest), .A_s = 1.0 / sum};
}

}  // namespace bismar::mechanics
