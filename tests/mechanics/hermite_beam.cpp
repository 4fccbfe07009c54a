// SPDX-License-Identifier: MIT
#include "mechanics/hermite_beam.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <utility>

namespace bismar::test {

namespace {

using Matrix = std::vector<std::vector<double>>;

/// Gaussian elimination with partial pivoting.
std::vector<double> solve(Matrix a, std::vector<double> b) {
  const std::size_t n = b.size();
  for (std::size_t k = 0; k < n; ++k) {
    std::size_t pivot = k;
    for (std::size_t i = k + 1; i < std::min(n, k + 8); ++i) {
      if (std::abs(a[i][k]) > std::abs(a[pivot][k])) {
        pivot = i;
      }
    }
    std::swap(a[k], a[pivot]);
    std::swap(b[k], b[pivot]);
    for (std::size_t i = k + 1; i < std::min(n, k + 8); ++i) {
      const double factor = a[i][k] / a[k][k];
      if (factor != 0.0) {
        for (std::size_t j = k; j < std::min(n, k + 12); ++j) {
          a[i][j] -= factor * a[k][j];
        }
        b[i] -= factor * b[k];
      }
    }
  }
  for (std::size_t k = n; k-- > 0;) {
    for (std::size_t j = k + 1; j < n; ++j) {
      b[k] -= a[k][j] * b[j];
    }
    b[k] /= a[k][k];
  }
  return b;
}

using Element = std::array<double, 4>;

/// Stiffness times displacements of one element with E I = 1.
Element forces_of(const Element& u, double l) {
  const double l2 = l * l;
  const double l3 = l2 * l;
  return {(12 * u[0] + 6 * l * u[1] - 12 * u[2] + 6 * l * u[3]) / l3,
          (6 * l * u[0] + 4 * l2 * u[1] - 6 * l * u[2] + 2 * l2 * u[3]) / l3,
          (-12 * u[0] - 6 * l * u[1] + 12 * u[2] - 6 * l * u[3]) / l3,
          (6 * l * u[0] + 2 * l2 * u[1] - 6 * l * u[2] + 4 * l2 * u[3]) / l3};
}

/// Consistent nodal loads of a load running linearly from qa to qb.
Element consistent(double qa, double qb, double l) {
  return {l * (7 * qa + 3 * qb) / 20.0,
          l * l * (3 * qa + 2 * qb) / 60.0,
          l * (3 * qa + 7 * qb) / 20.0,
          -l * l * (2 * qa + 3 * qb) / 60.0};
}

}  // namespace

HermiteBeam::HermiteBeam(
    std::span<const Load> loads, Along along, Support support, double length, int elements) {
  for (int k = 0; k <= elements; ++k) {
    x.push_back(length * k / elements);
  }
  for (const Load& load : loads) {
    if (load.kind != Load::Kind::axial && load.kind != Load::Kind::torque) {
      x.push_back(load.at);
    }
    if (load.kind == Load::Kind::distributed) {
      x.push_back(load.to);
    }
  }
  std::sort(x.begin(), x.end());
  const auto same = [length](double a, double b) { return b - a < 1e-9 * length; };
  x.erase(std::unique(x.begin(), x.end(), same), x.end());
  const std::size_t nodes = x.size();
  const auto node_at = [&](double at) {
    std::size_t best = 0;
    for (std::size_t i = 0; i < nodes; ++i) {
      if (std::abs(x[i] - at) < std::abs(x[best] - at)) {
        best = i;
      }
    }
    return best;
  };

  Matrix K(2 * nodes, std::vector<double>(2 * nodes, 0.0));
  std::vector<double> f(2 * nodes, 0.0);
  std::vector<Element> fixed(nodes - 1, Element{});
  for (std::size_t e = 0; e + 1 < nodes; ++e) {
    const double l = x[e + 1] - x[e];
    for (std::size_t j = 0; j < 4; ++j) {
      Element unit{};
      unit[j] = 1.0;
      const Element column = forces_of(unit, l);
      for (std::size_t i = 0; i < 4; ++i) {
        K[2 * e + i][2 * e + j] += column[i];
      }
    }
  }
  for (const Load& load : loads) {
    if (load.along != along) {
      continue;
    }
    if (load.kind == Load::Kind::force) {
      f[2 * node_at(load.at)] += load.value;
    } else if (load.kind == Load::Kind::moment) {
      f[2 * node_at(load.at) + 1] +=
          load.value;  // turns w' upwards: moves what lies beyond along +w
    } else if (load.kind == Load::Kind::distributed) {
      const double rate = (load.value_to - load.value) / (load.to - load.at);
      for (std::size_t e = node_at(load.at); e < node_at(load.to); ++e) {
        const double qa = load.value + rate * (x[e] - load.at);
        const double qb = load.value + rate * (x[e + 1] - load.at);
        const Element nodal = consistent(qa, qb, x[e + 1] - x[e]);
        for (std::size_t i = 0; i < 4; ++i) {
          f[2 * e + i] += nodal[i];
          fixed[e][i] += nodal[i];
        }
      }
    }
  }
  const auto hold = [&](std::size_t dof) {
    std::fill(K[dof].begin(), K[dof].end(), 0.0);
    for (auto& row : K) {
      row[dof] = 0.0;
    }
    K[dof][dof] = 1.0;
    f[dof] = 0.0;
  };
  hold(0);
  hold(support == Support::cantilever ? 1 : 2 * (nodes - 1));
  const std::vector<double> u = solve(std::move(K), std::move(f));

  deflection.resize(nodes);
  moment_left.resize(nodes);
  moment_right.resize(nodes);
  shear_left.resize(nodes);
  shear_right.resize(nodes);
  for (std::size_t i = 0; i < nodes; ++i) {
    deflection[i] = u[2 * i];
  }
  for (std::size_t e = 0; e + 1 < nodes; ++e) {
    const Element end =
        forces_of({u[2 * e], u[2 * e + 1], u[2 * e + 2], u[2 * e + 3]}, x[e + 1] - x[e]);
    // At the left end the force on the element is minus the resultant of what lies beyond.
    shear_right[e] = -(end[0] - fixed[e][0]);
    moment_right[e] = -(end[1] - fixed[e][1]);
    shear_left[e + 1] = end[2] - fixed[e][2];
    moment_left[e + 1] = end[3] - fixed[e][3];
  }
}

}  // namespace bismar::test
