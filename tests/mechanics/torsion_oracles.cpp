// SPDX-License-Identifier: MIT
#include "mechanics/torsion_oracles.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <utility>
#include <vector>

namespace bismar::test {

namespace {

constexpr double pi = std::numbers::pi;

/// Least squares by Householder-free means: modified Gram-Schmidt, which is stable enough for the
/// few well scaled columns here.
std::vector<double> least_squares(std::vector<std::vector<double>> columns,
                                  std::vector<double> right) {
  const std::size_t n = columns.size();
  std::vector<std::vector<double>> r(n, std::vector<double>(n, 0.0));
  std::vector<double> projected(n);
  const auto dot = [](const std::vector<double>& a, const std::vector<double>& b) {
    double sum = 0.0;
    for (std::size_t i = 0; i < a.size(); ++i) {
      sum += a[i] * b[i];
    }
    return sum;
  };
  const auto take_off = [](std::vector<double>& a, double factor, const std::vector<double>& b) {
    for (std::size_t i = 0; i < a.size(); ++i) {
      a[i] -= factor * b[i];
    }
  };
  for (std::size_t k = 0; k < n; ++k) {
    r[k][k] = std::sqrt(dot(columns[k], columns[k]));
    for (double& value : columns[k]) {
      value /= r[k][k];
    }
    for (std::size_t j = k + 1; j < n; ++j) {
      r[k][j] = dot(columns[k], columns[j]);
      take_off(columns[j], r[k][j], columns[k]);
    }
    projected[k] = dot(columns[k], right);
    take_off(right, projected[k], columns[k]);
  }
  std::vector<double> x(n);
  for (std::size_t k = n; k-- > 0;) {
    double sum = projected[k];
    for (std::size_t j = k + 1; j < n; ++j) {
      sum -= r[k][j] * x[j];
    }
    x[k] = sum / r[k][k];
  }
  return x;
}

}  // namespace

RegularPolygonTorsion::RegularPolygonTorsion(int corners, std::size_t terms) {
  // psi = sum a_k r^(nk) cos(n k theta) equals r^2 / 2 on the outline; half a side is enough.
  const double n = corners;
  const double half_side = std::tan(pi / n);
  const double corner = 1.0 / std::cos(pi / n);
  const std::size_t points = 40 * terms;
  std::vector<std::vector<double>> columns(terms, std::vector<double>(points));
  std::vector<double> right(points);
  std::vector<double> s(points);
  std::vector<double> weight(points);
  for (std::size_t i = 0; i < points; ++i) {
    // Midpoints of a cosine substitution, dense towards the corner.
    const double u = (static_cast<double>(i) + 0.5) / static_cast<double>(points) * pi / 2.0;
    s[i] = half_side * std::sin(u);
    weight[i] = half_side * std::cos(u) * pi / 2.0 / static_cast<double>(points);
    const double r = std::hypot(1.0, s[i]) / corner;
    const double theta = std::atan(s[i]);
    for (std::size_t k = 0; k < terms; ++k) {
      const double order = n * static_cast<double>(k);
      columns[k][i] = std::pow(r, order) * std::cos(order * theta);
    }
    right[i] = (1.0 + s[i] * s[i]) / 2.0;
  }
  const std::vector<double> a = least_squares(columns, right);
  // I_t = I_p - integral of (r^2 / 2) d psi / dn over the outline.
  const double area = n * half_side;
  const double polar = area * (0.5 + half_side * half_side / 6.0);
  const auto slope = [&](double at) {
    const double r = std::hypot(1.0, at);
    const double theta = std::atan(at);
    double sum = 0.0;
    for (std::size_t k = 1; k < terms; ++k) {
      // d/dx of Re (x + i y)^m at x = 1 is m Re (x + i y)^(m - 1).
      const double m = n * static_cast<double>(k);
      sum += a[k] * m * std::pow(r / corner, m - 1.0) / corner * std::cos((m - 1.0) * theta);
    }
    return sum;
  };
  double flux = 0.0;
  for (std::size_t i = 0; i < points; ++i) {
    flux += 2.0 * n * weight[i] * (1.0 + s[i] * s[i]) / 2.0 * slope(s[i]);
  }
  I_t = polar - flux;
  W_t = I_t / (1.0 - slope(0.0));  // the peak is in the middle of a side
}

double torsion_by_differences(int cells_a_side, int cut_from, int cut_to) {
  const auto n = static_cast<std::size_t>(cells_a_side);
  const auto from = static_cast<std::size_t>(cut_from);
  const auto to = static_cast<std::size_t>(cut_to);
  const bool notch = to >= n;
  const double d = 1.0 / static_cast<double>(n);
  std::vector<double> phi((n + 1) * (n + 1), 0.0);
  const auto at = [&](std::size_t i, std::size_t j) -> double& { return phi[i * (n + 1) + j]; };
  const auto is_cut = [&](std::size_t i, std::size_t j) {
    return i >= from && i <= to && j >= from && j <= to;
  };
  const double relaxation = 2.0 / (1.0 + std::sin(pi * d));
  double constant = 0.0;
  const double cut_side = static_cast<double>(to - from) * d;
  for (int sweep = 0; sweep < 12 * cells_a_side; ++sweep) {
    for (std::size_t i = 1; i < n; ++i) {
      for (std::size_t j = 1; j < n; ++j) {
        if (!is_cut(i, j)) {
          const double mean =
              (at(i - 1, j) + at(i + 1, j) + at(i, j - 1) + at(i, j + 1) + 2.0 * d * d) / 4.0;
          at(i, j) += relaxation * (mean - at(i, j));
        }
      }
    }
    if (!notch) {
      // All nodes of the hole are one: its links outwards balance twice its area.
      double around = 0.0;
      for (std::size_t i = from; i <= to; ++i) {
        around += at(i, from - 1) + at(i, to + 1) + at(from - 1, i) + at(to + 1, i);
      }
      const double links = 4.0 * static_cast<double>(to - from + 1);
      // The merged nodes stand for a square that reaches half a cell beyond the hole.
      const double side = cut_side + d;
      constant += relaxation * ((around + 2.0 * side * side) / links - constant);
      for (std::size_t i = from; i <= to; ++i) {
        for (std::size_t j = from; j <= to; ++j) {
          at(i, j) = constant;
        }
      }
    }
  }
  double sum = 0.0;
  for (const double value : phi) {
    sum += value;
  }
  return 2.0 * sum * d * d;
}

}  // namespace bismar::test
