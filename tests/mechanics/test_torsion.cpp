// SPDX-License-Identifier: MIT
#include <bismar/mechanics/torsion.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/section.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <cstddef>
#include <numbers>
#include <vector>

namespace bismar {

namespace {

/// Torsion constant of a rectangle by finite differences of Prandtl's stress function:
/// phi_yy + phi_zz = -2, phi = 0 on the edge, I_t = 2 times the integral of phi.
double torsion_constant_by_differences(double b, double h, int cells) {
  const auto nx = static_cast<std::size_t>(std::lround(cells * b / h));
  const auto ny = static_cast<std::size_t>(cells);
  const double d = h / cells;
  std::vector<double> phi((nx + 1) * (ny + 1), 0.0);
  const auto at = [&](std::size_t i, std::size_t j) -> double& { return phi[i * (ny + 1) + j]; };
  const double relaxation = 2.0 / (1.0 + std::sin(std::numbers::pi / cells));
  for (int sweep = 0; sweep < 6 * cells; ++sweep) {
    for (std::size_t i = 1; i < nx; ++i) {
      for (std::size_t j = 1; j < ny; ++j) {
        const double mean =
            (at(i - 1, j) + at(i + 1, j) + at(i, j - 1) + at(i, j + 1) + 2.0 * d * d) / 4.0;
        at(i, j) += relaxation * (mean - at(i, j));
      }
    }
  }
  double sum = 0.0;
  for (const double value : phi) {
    sum += value;
  }
  return 2.0 * sum * d * d;
}

}  // namespace

TEST_CASE("The rectangle's torsion constant agrees with finite differences") {
  for (const double ratio : {1.0, 1.5, 3.0}) {
    const double by_differences = torsion_constant_by_differences(ratio, 1.0, 100);
    CHECK(rectangle_torsion(ratio).k2 * ratio == Approx(by_differences).epsilon(5e-4));
  }
}

TEST_CASE("The rectangle's coefficients agree with the series summed term by term") {
  constexpr double pi = std::numbers::pi;
  for (const double ratio : {1.0, 1.01, 2.0, 7.3, 40.0}) {
    double tanh_sum = 0.0;
    double cosh_sum = 0.0;
    // The tail beyond n = 4001 is below 1e-15.
    for (int n = 4001; n >= 1; n -= 2) {
      tanh_sum += std::tanh(n * pi * ratio / 2.0) / std::pow(n, 5);
      cosh_sum += 1.0 / (static_cast<double>(n) * n * std::cosh(n * pi * ratio / 2.0));
    }
    const double k2 = (1.0 - 192.0 / std::pow(pi, 5) / ratio * tanh_sum) / 3.0;
    const RectangleTorsion torsion = rectangle_torsion(ratio);
    CHECK(torsion.k2 == Approx(k2).epsilon(1e-14));
    CHECK(torsion.k1 == Approx(k2 / (1.0 - 8.0 / (pi * pi) * cosh_sum)).epsilon(1e-14));
  }
}

TEST_CASE("A very flat rectangle tends to one third") {
  const RectangleTorsion torsion = rectangle_torsion(1e6);
  CHECK(torsion.k1 == Approx(1.0 / 3.0).epsilon(1e-6));
  CHECK(torsion.k2 == Approx(1.0 / 3.0).epsilon(1e-6));
}

TEST_CASE("Thin tubes tend to Bredt's formulas") {
  constexpr double pi = std::numbers::pi;
  const double t = 1e-5;
  const SectionProperties round = round_tube(0.1, t, Forming::unknown);
  const double r = (0.1 - t) / 2.0;
  CHECK(round.I_t == Approx(bredt_torsion_constant(pi * r * r, t, 2.0 * pi * r)).epsilon(1e-6));
  CHECK(1.0 / round.W_t == Approx(bredt_shear_stress(1.0, pi * r * r, t)).epsilon(3e-4));
  const SectionProperties box = rectangular_tube(0.1, 0.06, t, Corners::sharp, Forming::unknown);
  const double enclosed = (0.1 - t) * (0.06 - t);
  CHECK(box.I_t == Approx(bredt_torsion_constant(enclosed, t, 2 * (0.16 - 2 * t))).epsilon(1e-6));
  CHECK(1.0 / box.W_t == Approx(bredt_shear_stress(1.0, enclosed, t)).epsilon(1e-3));
}

TEST_CASE("Torsion functions name a wrong argument") {
  CHECK_THROWS_AS(rectangle_torsion(0.5), Error);
  CHECK_THROWS_AS(rectangle_torsion(std::nan("")), Error);
  CHECK_THROWS_AS(bredt_shear_stress(1.0, 0.0, 1e-3), Error);
  CHECK_THROWS_AS(bredt_torsion_constant(1e-3, 1e-3, -1.0), Error);
  try {
    (void)bredt_shear_stress(1.0, 0.0, -1.0);
  } catch (const Error& error) {
    REQUIRE(error.faults().size() == 2);
    CHECK(error.faults()[0].where == "enclosed_area");
    CHECK(error.faults()[1].where == "wall");
    CHECK(error.faults()[1].code == Code::out_of_range);
  }
}

}  // namespace bismar
