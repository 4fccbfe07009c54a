// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include <bismar/error.hpp>

#include "mechanics/fault_places.hpp"
#include "mechanics/outline_scan.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <random>
#include <vector>

namespace bismar {

namespace {

using test::add_arc;
using test::Outline;
using test::OutlineScan;

constexpr double pi = std::numbers::pi;

Outline angle_outline(double h, double b, double t, double r, double r2) {
  Outline o = {{.y = 0.0, .z = 0.0}, {.y = b, .z = 0.0}};
  add_arc(o, b - r2, t - r2, r2, 0.0, pi / 2);
  add_arc(o, t + r, t + r, r, 1.5 * pi, pi);
  add_arc(o, t - r2, h - r2, r2, 0.0, pi / 2);
  o.push_back({.y = 0.0, .z = h});
  return o;
}

struct Size {
  double h, b, t, r, r2;
};

Size random_size(std::mt19937& random) {
  std::uniform_real_distribution<double> share(0.0, 1.0);
  const double h = 0.02 + 0.2 * share(random);
  const double b = h * (0.4 + 0.6 * share(random));
  const double t = b * (0.04 + 0.16 * share(random));
  const bool sharp = share(random) < 0.2;
  return {h, b, t, sharp ? 0.0 : 1.5 * t * share(random), sharp ? 0.0 : t * share(random)};
}

/// Peak of the shear flow of a z load over the thickness, by summing the bending stress of strips
/// from the tips of both legs of mid-lines towards the heel.
double scanned_shear(const Size& s, const SectionProperties& p) {
  const double y_heel = p.y_shear;  // the mid-lines meet there
  const double z_heel = p.z_shear;
  const double D = p.I_y * p.I_z - p.I_yz * p.I_yz;
  constexpr int strips = 20000;
  double peak = 0.0;
  for (const bool upright : {true, false}) {
    const double length = (upright ? s.h : s.b) - s.t / 2;
    double flow = 0.0;
    for (int k = strips; k-- > 0;) {
      const double u = length * (k + 0.5) / strips;
      const double y = y_heel + (upright ? 0.0 : u);
      const double z = z_heel + (upright ? u : 0.0);
      flow += (p.I_z * z - p.I_yz * y) / D * length / strips;
      peak = std::max(peak, std::abs(flow));
    }
  }
  return peak;
}

}  // namespace

TEST_CASE("Angles agree with a scan of their outline") {
  std::mt19937 random(31);
  for (int trial = 0; trial < 12; ++trial) {
    const Size d = random_size(random);
    INFO(d.h << " x " << d.b << " x " << d.t << ", " << d.r << ", " << d.r2);
    const SectionProperties s = angle(d.h, d.b, d.t, d.r, d.r2);
    const Outline outline = angle_outline(d.h, d.b, d.t, d.r, d.r2);
    const OutlineScan scan({outline});
    CHECK(s.area == Approx(scan.area).epsilon(1e-6));
    CHECK(s.I_y == Approx(scan.I_y).epsilon(1e-6));
    CHECK(s.I_z == Approx(scan.I_z).epsilon(1e-6));
    CHECK(s.I_yz == Approx(scan.I_yz).epsilon(1e-6));
    CHECK(s.W_pl_y == Approx(scan.W_pl).epsilon(1e-6));
    CHECK(s.W_pl_z == Approx(OutlineScan({test::transposed(outline)}).W_pl).epsilon(1e-6));
    CHECK(s.W_el_y == Approx(scan.I_y / std::max(scan.z, d.h - scan.z)).epsilon(1e-6));
    CHECK(s.W_el_z == Approx(scan.I_z / std::max(scan.y, d.b - scan.y)).epsilon(1e-6));
    CHECK(s.y_shear == Approx(d.t / 2 - scan.y).epsilon(1e-6));
    CHECK(s.z_shear == Approx(d.t / 2 - scan.z).epsilon(1e-6));
    double length = 0.0;
    for (std::size_t i = 0; i < outline.size(); ++i) {
      const SectionPoint& from = outline[i];
      const SectionPoint& to = outline[(i + 1) % outline.size()];
      length += std::hypot(to.y - from.y, to.z - from.z);
    }
    CHECK(s.perimeter == Approx(length).epsilon(1e-6));
  }
}

TEST_CASE("The fibres of an angle enclose it closely") {
  std::mt19937 random(32);
  for (int trial = 0; trial < 20; ++trial) {
    const Size d = random_size(random);
    const SectionProperties s = angle(d.h, d.b, d.t, d.r, d.r2);
    const Outline outline = angle_outline(d.h, d.b, d.t, d.r, d.r2);
    const OutlineScan scan({outline});
    for (int k = 0; k < 180; ++k) {
      const double cosine = std::cos(2 * pi * k / 180);
      const double sine = std::sin(2 * pi * k / 180);
      double fibres = -1.0;
      for (const SectionPoint& f : s.fibres) {
        fibres = std::max(fibres, f.y * cosine + f.z * sine);
      }
      double farthest = -1.0;
      for (const SectionPoint& p : outline) {
        farthest = std::max(farthest, (p.y - scan.y) * cosine + (p.z - scan.z) * sine);
      }
      CHECK(fibres >= farthest - 1e-6 * d.h);
      CHECK(fibres <= farthest + 0.083 * d.r2 + 1e-6 * d.h);
    }
  }
}

TEST_CASE("An equal angle has its principal axes at 45 degrees, a mirrored one the same values") {
  const SectionProperties s = angle(0.1, 0.1, 0.01, 0.012, 0.006);
  CHECK(s.principal_angle() == Approx(pi / 4));
  CHECK(s.I_y == Approx(s.I_z).epsilon(1e-14));
  CHECK(s.I_u() + s.I_v() == Approx(s.I_y + s.I_z).epsilon(1e-14));
  CHECK(s.A_v_y == Approx(s.A_v_z).epsilon(1e-12));
  const SectionProperties upright = angle(0.15, 0.09, 0.01, 0.012, 0.006);
  const SectionProperties flat = angle(0.09, 0.15, 0.01, 0.012, 0.006);
  CHECK(upright.I_y == Approx(flat.I_z).epsilon(1e-14));
  CHECK(upright.W_pl_y == Approx(flat.W_pl_z).epsilon(1e-12));
  CHECK(upright.A_v_y == Approx(flat.A_v_z).epsilon(1e-12));
  CHECK(upright.I_t == Approx(flat.I_t).epsilon(1e-14));
  CHECK(upright.plates.size() == 2);
  CHECK(upright.plates[0].ratio == Approx((150 - 10 - 12) / 10.0));
  CHECK(upright.plates[1].ratio == Approx((90 - 10 - 12) / 10.0));
}

TEST_CASE("A bare angle by hand") {
  // 60 x 40 x 5: A = 5 x 60 + 35 x 5 = 475 mm2; z_s = (300 x 30 + 175 x 2.5) / 475 = 19.8684 mm.
  const SectionProperties s = angle(0.06, 0.04, 0.005, 0.0, 0.0);
  CHECK(s.area * 1e6 == Approx(475.0));
  const double z = (300.0 * 30.0 + 175.0 * 2.5) / 475.0;
  const double y = (300.0 * 2.5 + 175.0 * 22.5) / 475.0;
  CHECK(s.z_shear * 1e3 == Approx(2.5 - z));
  CHECK(s.I_y * 1e12 == Approx(5.0 * 216000.0 / 12 + 300.0 * (30 - z) * (30 - z) +
                               35.0 * 125.0 / 12 + 175.0 * (2.5 - z) * (2.5 - z)));
  CHECK(s.I_yz * 1e12 == Approx(300.0 * (2.5 - y) * (30 - z) + 175.0 * (22.5 - y) * (2.5 - z)));
  // I_w = 5^3 (57.5^3 + 37.5^3) / 36.
  CHECK(s.I_w * 1e18 == Approx(125.0 * (57.5 * 57.5 * 57.5 + 37.5 * 37.5 * 37.5) / 36.0));
  CHECK(s.W_t == Approx(s.I_t / 0.005));
}

TEST_CASE("The peak shear stress of an angle is that of its shear flow, on the safe side") {
  std::mt19937 random(33);
  for (int trial = 0; trial < 20; ++trial) {
    Size d = random_size(random);
    d.r = d.r2 = 0.0;
    const SectionProperties s = angle(d.h, d.b, d.t, 0.0, 0.0);
    const double scanned = scanned_shear(d, s);
    INFO(d.h << " x " << d.b << " x " << d.t);
    CHECK(1.0 / s.A_v_z >= scanned * (1 - 1e-9));
    CHECK(1.0 / s.A_v_z <= scanned * 1.15);
    // More than the same leg without the askew bending has: V over 2/3 of the leg.
    CHECK(s.A_v_z < d.h * d.t);
  }
}

TEST_CASE("Wrong dimensions of an angle are named") {
  using Places = std::vector<std::string>;
  CHECK(test::fault_places([] { (void)angle(0.0, -1.0, INFINITY, -1.0, -1.0); }) ==
        Places{"height", "width", "thickness", "root_radius", "toe_radius"});
  CHECK(test::fault_places([] { (void)angle(0.1, 0.05, 0.05, 0.0, 0.0); }) == Places{"thickness"});
  CHECK(test::fault_places([] { (void)angle(0.1, 0.05, 0.005, 0.04, 0.006); }) ==
        Places{"toe_radius", "root_radius"});
}

}  // namespace bismar
