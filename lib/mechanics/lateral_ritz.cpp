// SPDX-License-Identifier: MIT
#include <bismar/mechanics/lateral_torsional.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;
constexpr std::size_t terms = 12;
constexpr int intervals = 240;

using Matrix = std::array<std::array<double, terms>, terms>;

/// Value, first and second derivative by xi of one function of the twist.
struct Shape {
  double value = 0.0;
  double slope = 0.0;
  double curvature = 0.0;
};

Shape shape(LateralEnds ends, std::size_t n, double xi) {
  if (ends == LateralEnds::forks) {
    const double a = static_cast<double>(n + 1) * pi;
    return {std::sin(a * xi), a * std::cos(a * xi), -a * a * std::sin(a * xi)};
  }
  const double a = static_cast<double>(2 * n + 1) * pi / 2.0;
  return {1.0 - std::cos(a * xi), a * std::sin(a * xi), a * a * std::cos(a * xi)};
}

/// The three parts of the energy: stiffness, linear and quadratic in the load factor.
struct Energy {
  Matrix stiffness{};
  Matrix linear{};
  Matrix quadratic{};
};

Energy energy(const LateralTorsionalBeam& beam, LateralEnds ends, const LateralLoading& loading) {
  const double L = beam.length;
  Energy e;
  for (int i = 0; i <= intervals; ++i) {
    const double xi = static_cast<double>(i) / intervals;
    const double simpson = (i == 0 || i == intervals ? 1.0 : i % 2 == 1 ? 4.0 : 2.0) / 3.0;
    const double weight = simpson * L / intervals;
    const double M = loading.moment(xi);
    const double q = loading.load ? loading.load(xi) : 0.0;
    std::array<Shape, terms> shapes;
    for (std::size_t n = 0; n < terms; ++n) {
      shapes[n] = shape(ends, n, xi);
    }
    for (std::size_t r = 0; r < terms; ++r) {
      for (std::size_t c = 0; c <= r; ++c) {
        const double both = shapes[r].value * shapes[c].value;
        e.stiffness[r][c] +=
            weight * (beam.youngs_modulus * beam.I_w * shapes[r].curvature * shapes[c].curvature /
                          (L * L * L * L) +
                      beam.shear_modulus * beam.I_t * shapes[r].slope * shapes[c].slope / (L * L));
        e.linear[r][c] += weight * q * loading.load_height * both;
        e.quadratic[r][c] += weight * M * M * both / (beam.youngs_modulus * beam.I_z);
      }
    }
  }
  for (std::size_t r = 0; r < terms; ++r) {
    for (std::size_t c = 0; c <= r; ++c) {
      e.linear[r][c] += loading.tip_load * loading.load_height * shape(ends, r, 1.0).value *
                        shape(ends, c, 1.0).value;
    }
  }
  return e;
}

/// Whether the energy is positive definite under the load factor: Cholesky's pivots.
bool is_stable(const Energy& e, double factor) {
  Matrix a{};
  for (std::size_t r = 0; r < terms; ++r) {
    for (std::size_t c = 0; c <= r; ++c) {
      a[r][c] = e.stiffness[r][c] - factor * e.linear[r][c] - factor * factor * e.quadratic[r][c];
      for (std::size_t k = 0; k < c; ++k) {
        a[r][c] -= a[r][k] * a[c][k];
      }
      if (r != c) {
        a[r][c] /= a[c][c];
      }
    }
    if (!(a[r][r] > 0.0)) {
      return false;
    }
    a[r][r] = std::sqrt(a[r][r]);
  }
  return true;
}

}  // namespace

double critical_load_factor(const LateralTorsionalBeam& beam,
                            LateralEnds ends,
                            const LateralLoading& loading) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.youngs_modulus", beam.youngs_modulus);
  mechanics::require_positive(faults, "beam.shear_modulus", beam.shear_modulus);
  mechanics::require_positive(faults, "beam.I_z", beam.I_z);
  mechanics::require_positive(faults, "beam.I_t", beam.I_t);
  mechanics::require_not_negative(faults, "beam.I_w", beam.I_w);
  mechanics::require_positive(faults, "beam.length", beam.length);
  mechanics::require_finite(faults, "loading.tip_load", loading.tip_load);
  mechanics::require_finite(faults, "loading.load_height", loading.load_height);
  if (!loading.moment) {
    mechanics::add_out_of_range(faults, "loading", 0.0, "a function of the place");
  }
  faults.throw_if_any();
  const Energy e = energy(beam, ends, loading);
  constexpr double most = 1e12;
  double low = 0.0;
  double high = 1.0;
  while (high < most && is_stable(e, high)) {
    low = high;
    high *= 2.0;
  }
  if (!is_stable(e, 0.0) || high >= most) {
    mechanics::add_out_of_range(
        faults, "loading", high, "finite and such that a factor below 1e12 buckles the beam");
    faults.throw_if_any();
  }
  for (int step = 0; step < 60; ++step) {
    const double middle = low + (high - low) / 2.0;
    (is_stable(e, middle) ? low : high) = middle;
  }
  return low;
}

}  // namespace bismar
