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

/// One element with E I = 1; phi = 12 s / l^2 is its shear term.
struct BeamElement {
  double l = 0.0;
  double phi = 0.0;

  /// Stiffness times displacements.
  [[nodiscard]] Element forces_of(const Element& u) const {
    const double l2 = l * l;
    const double scale = 1.0 / (l2 * l * (1.0 + phi));
    return {scale * (12 * u[0] + 6 * l * u[1] - 12 * u[2] + 6 * l * u[3]),
            scale * (6 * l * u[0] + (4 + phi) * l2 * u[1] - 6 * l * u[2] + (2 - phi) * l2 * u[3]),
            scale * (-12 * u[0] - 6 * l * u[1] + 12 * u[2] - 6 * l * u[3]),
            scale * (6 * l * u[0] + (2 - phi) * l2 * u[1] - 6 * l * u[2] + (4 + phi) * l2 * u[3])};
  }

  /// Nodal loads of a load running linearly from qa to qb: integrals of the shape functions.
  [[nodiscard]] Element consistent(double qa, double qb) const {
    const double rise = (qb - qa) / (1.0 + phi);
    return {l * (qa / 2.0 + rise * (3.0 / 20.0 + phi / 6.0)),
            l * l * (qa / 12.0 + rise * (1.0 / 30.0 + phi / 24.0)),
            l * (qa / 2.0 + rise * (7.0 / 20.0 + phi / 3.0)),
            -l * l * (qa / 12.0 + rise * (1.0 / 20.0 + phi / 24.0))};
  }
};

}  // namespace

HermiteBeam::HermiteBeam(
    std::span<const Load> loads, Along along, const BeamHold& hold, double length, int elements) {
  for (int k = 0; k <= elements; ++k) {
    x.push_back(length * k / elements);
  }
  const double second = hold.second_support.value_or(length);
  x.push_back(second);
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
  const auto element = [&](std::size_t e) {
    const double l = x[e + 1] - x[e];
    return BeamElement{.l = l, .phi = 12.0 * hold.shear_flexibility / (l * l)};
  };
  for (std::size_t e = 0; e + 1 < nodes; ++e) {
    for (std::size_t j = 0; j < 4; ++j) {
      Element unit{};
      unit[j] = 1.0;
      const Element column = element(e).forces_of(unit);
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
        const Element nodal = element(e).consistent(qa, qb);
        for (std::size_t i = 0; i < 4; ++i) {
          f[2 * e + i] += nodal[i];
          fixed[e][i] += nodal[i];
        }
      }
    }
  }
  const auto fix = [&](std::size_t dof) {
    std::fill(K[dof].begin(), K[dof].end(), 0.0);
    for (auto& row : K) {
      row[dof] = 0.0;
    }
    K[dof][dof] = 1.0;
    f[dof] = 0.0;
  };
  fix(0);
  if (hold.support != Support::pinned_pinned) {
    fix(1);
  }
  if (hold.support != Support::cantilever) {
    fix(2 * node_at(second));
  }
  if (hold.support == Support::fixed_fixed) {
    fix(2 * node_at(second) + 1);
  }
  const std::vector<double> u = solve(std::move(K), std::move(f));

  deflection.resize(nodes);
  rotation.resize(nodes);
  moment_left.resize(nodes);
  moment_right.resize(nodes);
  shear_left.resize(nodes);
  shear_right.resize(nodes);
  for (std::size_t i = 0; i < nodes; ++i) {
    deflection[i] = u[2 * i];
    rotation[i] = u[2 * i + 1];
  }
  for (std::size_t e = 0; e + 1 < nodes; ++e) {
    const Element end = element(e).forces_of({u[2 * e], u[2 * e + 1], u[2 * e + 2], u[2 * e + 3]});
    // At the left end the force on the element is minus the resultant of what lies beyond.
    shear_right[e] = -(end[0] - fixed[e][0]);
    moment_right[e] = -(end[1] - fixed[e][1]);
    shear_left[e + 1] = end[2] - fixed[e][2];
    moment_left[e + 1] = end[3] - fixed[e][3];
  }
}

std::vector<Load> random_loads(std::mt19937& random, double length) {
  std::uniform_int_distribution<int> fortieths(0, 40);
  const auto place = [&] { return length * fortieths(random) / 40.0; };
  std::uniform_real_distribution<double> size(-1000.0, 1000.0);
  std::uniform_int_distribution<int> kinds(0, 2);
  std::uniform_int_distribution<int> count(1, 4);
  std::vector<Load> loads;
  const int n = count(random);
  for (int i = 0; i < n; ++i) {
    const double a = place();
    const double b = place();
    switch (kinds(random)) {
      case 0:
        loads.push_back(force(size(random), a));
        break;
      case 1:
        loads.push_back(moment(size(random) * length, a));
        break;
      default:
        if (std::abs(a - b) > 0.05 * length) {
          loads.push_back(distributed(size(random), size(random), std::min(a, b), std::max(a, b)));
        } else {
          loads.push_back(distributed(size(random), size(random), 0.0, length));
        }
    }
  }
  return loads;
}

BeamHold random_hold(std::mt19937& random, double length) {
  std::uniform_int_distribution<int> supports(0, 3);
  BeamHold hold;
  hold.support = static_cast<Support>(supports(random));
  const bool may_overhang =
      hold.support == Support::pinned_pinned || hold.support == Support::fixed_pinned;
  if (may_overhang && supports(random) < 2) {
    hold.second_support = length * std::uniform_int_distribution<int>(4, 39)(random) / 40.0;
  }
  return hold;
}

LoadCase held(const BeamHold& hold, std::vector<Load> loads) {
  LoadCase load_case;
  load_case.support_z = load_case.support_y = hold.support;
  load_case.second_support = hold.second_support;
  load_case.loads = std::move(loads);
  return load_case;
}

}  // namespace bismar::test
