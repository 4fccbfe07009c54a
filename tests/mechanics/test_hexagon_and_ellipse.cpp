// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/fault_places.hpp"
#include "mechanics/outline_scan.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

using test::ellipse;
using test::Outline;
using test::OutlineScan;

constexpr double pi = std::numbers::pi;

void compare(const SectionProperties& s, const std::vector<Outline>& outlines, double tolerance) {
  const OutlineScan scan(outlines);
  std::vector<Outline> other;
  for (const Outline& outline : outlines) {
    other.push_back(test::transposed(outline));
  }
  const OutlineScan across(other);
  CHECK(s.area == Approx(scan.area).epsilon(tolerance));
  CHECK(s.I_y == Approx(scan.I_y).epsilon(tolerance));
  CHECK(s.I_z == Approx(scan.I_z).epsilon(tolerance));
  CHECK(s.W_el_y == Approx(2 * scan.I_y / s.height).epsilon(tolerance));
  CHECK(s.W_el_z == Approx(2 * scan.I_z / s.width).epsilon(tolerance));
  CHECK(s.W_pl_y == Approx(scan.W_pl).epsilon(tolerance));
  CHECK(s.W_pl_z == Approx(across.W_pl).epsilon(tolerance));
  CHECK(s.I_yz == 0.0);
}

/// Largest shear stress of a unit z load over the thickness of the wall between two ellipses, by
/// summing strips along it from the top.
double scanned_flow(const SectionProperties& s, double inner_y, double inner_z) {
  constexpr int strips = 20000;
  const double a = s.height / 2;
  const double b = s.width / 2;
  double S = 0.0;
  double peak = 0.0;
  for (int k = 0; k < strips; ++k) {
    const double from = pi / 2 * k / strips;  // from the top down to the neutral axis
    const double to = pi / 2 * (k + 1) / strips;
    const auto y = [&](double phi, double q) { return (b + q * (inner_y - b)) * std::sin(phi); };
    const auto z = [&](double phi, double q) { return (a + q * (inner_z - a)) * std::cos(phi); };
    // The quadrilateral between both outlines.
    const double area = std::abs((y(to, 0) - y(from, 1)) * (z(from, 0) - z(to, 1)) -
                                 (y(from, 0) - y(to, 1)) * (z(to, 0) - z(from, 1))) /
                        2;
    const double phi = (from + to) / 2;
    S += area * z(phi, 0.5);
    const double t = std::abs((y(phi, 1) - y(phi, 0)) * (z(to, 0.5) - z(from, 0.5)) -
                              (z(phi, 1) - z(phi, 0)) * (y(to, 0.5) - y(from, 0.5))) /
                     std::hypot(y(to, 0.5) - y(from, 0.5), z(to, 0.5) - z(from, 0.5));
    peak = std::max(peak, S / (s.I_y * t));
  }
  return peak;
}

}  // namespace

TEST_CASE("A hexagon agrees with a scan and with its peak and energy of V S / (I b)") {
  for (const double d : {0.019, 0.1}) {
    const double half = d / std::numbers::sqrt3 / 2;
    const Outline outline = {{.y = 2 * half, .z = 0.0},
                             {.y = half, .z = d / 2},
                             {.y = -half, .z = d / 2},
                             {.y = -2 * half, .z = 0.0},
                             {.y = -half, .z = -d / 2},
                             {.y = half, .z = -d / 2}};
    const SectionProperties s = solid_hexagon(d);
    compare(s, {outline}, 1e-12);
    CHECK(s.height == d);
    CHECK(s.perimeter == Approx(12 * half));
    CHECK(s.plates.empty());
    const OutlineScan along_z({outline});
    const OutlineScan along_y({test::transposed(outline)});
    CHECK(1 / s.A_v_z == Approx(along_z.peak_shear).epsilon(1e-3));
    CHECK(1 / s.A_v_y == Approx(along_y.peak_shear).epsilon(1e-3));
    CHECK(s.A_s_z == Approx(1 / along_z.energy).epsilon(2e-3));
    CHECK(s.A_s_y == Approx(1 / along_y.energy).epsilon(2e-3));
  }
}

TEST_CASE("The torsion of a hexagon satisfies St Venant's equation on a grid") {
  // Prandtl's function by relaxation on a triangular grid that fits the hexagon (side 1, n cells),
  // and the limit for fine grids: errors fall with 1/n^2.
  const auto torsion = [](int n) {
    std::vector<double> psi(static_cast<std::size_t>((2 * n + 1) * (2 * n + 1)), 0.0);
    const auto at = [n](int i, int j) {
      return static_cast<std::size_t>((i + n) * (2 * n + 1) + j + n);
    };
    const double h = 1.0 / n;
    const double relax = 2.0 / (1.0 + 2.5 / n);
    for (int sweep = 0; sweep < 40 * n; ++sweep) {
      for (int i = -n + 1; i < n; ++i) {
        for (int j = std::max(-n, -n - i) + 1; j < std::min(n, n - i); ++j) {
          // The mean over the six neighbours is psi + h^2/4 (laplacian), the laplacian -2.
          const double mean = (psi[at(i + 1, j)] + psi[at(i - 1, j)] + psi[at(i, j + 1)] +
                               psi[at(i, j - 1)] + psi[at(i + 1, j - 1)] + psi[at(i - 1, j + 1)]) /
                              6.0;
          psi[at(i, j)] += relax * (mean + h * h / 2.0 - psi[at(i, j)]);
        }
      }
    }
    double sum = 0.0;
    for (const double value : psi) {
      sum += value;
    }
    return 2.0 * sum * h * h * std::numbers::sqrt3 / 2.0;
  };
  const double coarse = torsion(20);
  const double fine = torsion(40);
  const double limit = fine + (fine - coarse) / 3.0;
  const double side = 1.0 / std::numbers::sqrt3;
  CHECK(solid_hexagon(1.0).I_t / std::pow(side, 4) == Approx(limit).epsilon(1e-4));
  // Elasticity tables (from memory): J = 0.1154 d^4, tau = T / (0.188 d^3).
  CHECK(solid_hexagon(1.0).I_t == Approx(0.1154).epsilon(0.005));
  CHECK(solid_hexagon(1.0).W_t == Approx(0.188).epsilon(0.003));
}

TEST_CASE("Elliptical tubes agree with a scan of both outlines") {
  std::mt19937 random(51);
  std::uniform_real_distribution<double> share(0.0, 1.0);
  for (int trial = 0; trial < 4; ++trial) {
    const double h = 0.05 + 0.2 * share(random);
    const double b = h * (0.4 + 1.2 * share(random));
    const double t = std::min(h, b) * (0.02 + 0.2 * share(random));
    const SectionProperties s = elliptical_tube(h, b, t, Forming::hot_finished);
    compare(s, {ellipse(b / 2, h / 2), ellipse(b / 2 - t, h / 2 - t)}, 2e-6);
    const double q = 0.3 + 0.6 * share(random);
    const SectionProperties r = similar_elliptical_tube(h, b, q, Forming::hot_finished);
    compare(r, {ellipse(b / 2, h / 2), ellipse(q * b / 2, q * h / 2)}, 2e-6);
    CHECK(r.wall == Approx((1 - q) * std::min(h, b) / 2));
    CHECK(s.plates.at(0).ratio == Approx(std::pow(std::max(h, b), 2) / (std::min(h, b) * t)));
  }
}

TEST_CASE("Peak shear of elliptical tubes is that of the flow in the wall, in both directions") {
  for (const double ratio : {0.25, 0.5, 0.9, 1.0, 2.0, 4.0}) {
    const double b = 0.1;
    const double h = ratio * b;
    const double t = 0.0005 * std::min(1.0, ratio);
    const SectionProperties s = elliptical_tube(h, b, t, Forming::unknown);
    CHECK(1 / s.A_v_z == Approx(scanned_flow(s, b / 2 - t, h / 2 - t)).epsilon(0.01));
    const SectionProperties r = similar_elliptical_tube(h, b, 0.99, Forming::unknown);
    CHECK(1 / r.A_v_z == Approx(scanned_flow(r, 0.99 * b / 2, 0.99 * h / 2)).epsilon(0.01));
    // A quarter turn exchanges the axes.
    const SectionProperties turned = elliptical_tube(b, h, t, Forming::unknown);
    CHECK(turned.A_v_y == Approx(s.A_v_z).epsilon(1e-12));
    CHECK(turned.A_s_y == Approx(s.A_s_z).epsilon(1e-12));
    CHECK(turned.I_t == Approx(s.I_t).epsilon(1e-12));
  }
}

TEST_CASE("An elliptical tube with equal axes is the round tube") {
  const SectionProperties round = round_tube(0.1, 0.004, Forming::hot_finished);
  for (const SectionProperties& s :
       {elliptical_tube(0.1, 0.1, 0.004, Forming::hot_finished),
        similar_elliptical_tube(0.1, 0.1, 0.92, Forming::hot_finished)}) {
    CHECK(s.area == Approx(round.area).epsilon(1e-12));
    CHECK(s.I_y == Approx(round.I_y).epsilon(1e-12));
    CHECK(s.W_pl_z == Approx(round.W_pl_z).epsilon(1e-12));
    CHECK(s.A_v_z == Approx(round.A_v_z).epsilon(1e-9));
    CHECK(s.A_s_z == Approx(round.area / 2).epsilon(1e-9));
    CHECK(s.I_t == Approx(round.I_t).epsilon(1e-3));
    CHECK(s.W_t == Approx(round.W_t).epsilon(0.05));
    CHECK(s.plates.at(0).ratio == Approx(25.0));
  }
}

TEST_CASE("Wrong dimensions of a hexagon and of elliptical tubes are named") {
  using Places = std::vector<std::string>;
  CHECK(test::fault_places([] { (void)solid_hexagon(0.0); }) == Places{"width_across_flats"});
  CHECK(test::fault_places([] { (void)elliptical_tube(NAN, 0.0, -1.0, Forming::unknown); }) ==
        Places{"height", "width", "wall"});
  CHECK(test::fault_places([] { (void)elliptical_tube(0.1, 0.05, 0.025, Forming::unknown); }) ==
        Places{"wall"});
  CHECK(test::fault_places([] {
          (void)similar_elliptical_tube(0.1, 0.05, 1.0, Forming::unknown);
        }) == Places{"bore_ratio"});
}

}  // namespace bismar
