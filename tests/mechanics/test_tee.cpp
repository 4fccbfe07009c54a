// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/fault_places.hpp"
#include "mechanics/outline_scan.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <numbers>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

using test::add_arc;
using test::Outline;
using test::OutlineScan;

constexpr double pi = std::numbers::pi;

/// z upwards, the flange's outer face at z = 0.
Outline tee_outline(double h, double b, double tw, double tf, double r) {
  Outline o = {{.y = -b / 2, .z = 0.0}, {.y = -b / 2, .z = -tf}};
  add_arc(o, -tw / 2 - r, -tf - r, r, pi / 2, 0.0);
  o.push_back({.y = -tw / 2, .z = -h});
  o.push_back({.y = tw / 2, .z = -h});
  add_arc(o, tw / 2 + r, -tf - r, r, pi, pi / 2);
  o.push_back({.y = b / 2, .z = -tf});
  o.push_back({.y = b / 2, .z = 0.0});
  return o;
}

}  // namespace

TEST_CASE("T sections agree with a scan of their outline") {
  std::mt19937 random(41);
  std::uniform_real_distribution<double> share(0.0, 1.0);
  for (int trial = 0; trial < 12; ++trial) {
    const double h = 0.04 + 0.2 * share(random);
    const double b = h * (0.4 + share(random));
    const double tw = b * (0.03 + 0.1 * share(random));
    const double tf = h * (0.03 + 0.12 * share(random));
    const double r = trial % 4 == 0 ? 0.0 : 1.5 * tw * share(random);
    INFO(h << " x " << b << ", " << tw << ", " << tf << ", " << r);
    const SectionProperties s = tee(h, b, tw, tf, r);
    const Outline outline = tee_outline(h, b, tw, tf, r);
    const OutlineScan scan({outline});
    const OutlineScan across({test::transposed(outline)});
    CHECK(s.area == Approx(scan.area).epsilon(1e-6));
    CHECK(s.I_y == Approx(scan.I_y).epsilon(1e-6));
    CHECK(s.I_z == Approx(scan.I_z).epsilon(1e-6));
    CHECK(s.I_yz == 0.0);
    CHECK(std::abs(scan.I_yz) < 1e-6 * scan.I_y);
    CHECK(s.W_el_y == Approx(scan.I_y / (h + scan.z)).epsilon(1e-6));
    CHECK(s.W_el_z == Approx(scan.I_z / (b / 2)).epsilon(1e-6));
    CHECK(s.W_pl_y == Approx(scan.W_pl).epsilon(1e-6));
    CHECK(s.W_pl_z == Approx(across.W_pl).epsilon(1e-6));
    CHECK(s.z_shear == Approx(-scan.z - tf / 2).epsilon(1e-6));
    CHECK(s.y_shear == 0.0);
    // Safe, exact where the neutral axis cuts the plain stem.
    CHECK(1.0 / s.A_v_z >= scan.peak_shear * (1 - 1e-6));
    if (-scan.z > tf + r) {
      CHECK(1.0 / s.A_v_z == Approx(scan.peak_shear).epsilon(1e-3));
    }
    CHECK(1.0 / s.A_v_y >= across.peak_shear * (1 - 1e-6));
    CHECK(1.0 / s.A_v_y <= across.peak_shear * 1.15);
    if (r == 0.0) {
      CHECK(s.A_s_z == Approx(1.0 / scan.energy).epsilon(1e-3));
    }
    CHECK(s.perimeter == Approx(2 * (h + b) - (4 - pi) * r));
    CHECK(s.plates.size() == 2);
    CHECK(s.plates[0].ratio == Approx(((b - tw) / 2 - r) / tf));
    CHECK(s.plates[1].ratio == Approx((h - tf - r) / tw));
  }
}

TEST_CASE("The torsion constant of a T meets published ones within 3 per cent") {
  // AISC shapes database (v15/16), WT4X9, WT5X15, WT8X25: J = 0.0855, 0.310, 0.760 in4 (values seen
  // in print, in the table of section checks).
  constexpr double inch = 0.0254;
  struct Row {
    double h, b, tw, tf, r, J;
  };
  for (const Row& row : {Row{4.07, 5.25, 0.23, 0.33, 0.3, 0.0855},
                         Row{5.24, 5.81, 0.30, 0.51, 0.3, 0.310},
                         Row{8.13, 7.07, 0.38, 0.63, 0.4, 0.760}}) {
    const SectionProperties s =
        tee(row.h * inch, row.b * inch, row.tw * inch, row.tf * inch, row.r * inch);
    CHECK(s.I_t == Approx(row.J * std::pow(inch, 4)).epsilon(0.03));
    CHECK(s.W_t == Approx(s.I_t / (row.tf * inch)));
  }
}

TEST_CASE("A bare T by hand") {
  // 100 x 80, web 6, flange 10 mm: A = 800 + 540, centroid (800 x 5 + 540 x 55) / 1340 from the
  // top.
  const SectionProperties s = tee(0.1, 0.08, 0.006, 0.01, 0.0);
  const double c = (800.0 * 5.0 + 540.0 * 55.0) / 1340.0;
  const double I = 80.0 * 1000.0 / 12 + 800.0 * (c - 5) * (c - 5) + 6.0 * 729000.0 / 12 +
                   540.0 * (55 - c) * (55 - c);
  CHECK(s.area * 1e6 == Approx(1340.0));
  CHECK(s.I_y * 1e12 == Approx(I));
  CHECK(s.W_el_y * 1e9 == Approx(I / (100.0 - c)));
  CHECK(s.A_v_z * 1e6 == Approx(2.0 * I / ((100.0 - c) * (100.0 - c))));
  CHECK(s.A_v_flange * 1e6 == Approx(I / (37.0 * (c - 5.0))));
  CHECK(s.I_w * 1e18 == Approx(80.0 * 80 * 80 * 1000 / 144 + 95.0 * 95 * 95 * 216 / 36));
  CHECK(s.A_s_y * 1e6 == Approx(800.0 * 5 / 6));
  REQUIRE(s.fibres.size() == 6);
}

TEST_CASE("Wrong dimensions of a T are named") {
  using Places = std::vector<std::string>;
  CHECK(test::fault_places([] { (void)tee(0.0, 0.0, 0.0, NAN, -1.0); }) ==
        Places{"height", "width", "web", "flange", "root_radius"});
  CHECK(test::fault_places([] { (void)tee(0.1, 0.05, 0.05, 0.1, 0.0); }) ==
        Places{"flange", "web"});
  CHECK(test::fault_places([] { (void)tee(0.1, 0.05, 0.005, 0.01, 0.03); }) ==
        Places{"root_radius"});
}

}  // namespace bismar
