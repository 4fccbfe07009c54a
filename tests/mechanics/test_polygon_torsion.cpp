// SPDX-License-Identifier: MIT
#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/torsion.hpp>

#include "mechanics/torsion_oracles.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <cstddef>
#include <numbers>
#include <vector>

namespace bismar {

namespace {

using Points = std::vector<SectionPoint>;

constexpr double pi = std::numbers::pi;

Points box(double y0, double z0, double y1, double z1) {
  return {{y0, z0}, {y1, z0}, {y1, z1}, {y0, z1}};
}

/// Inscribed radius 1.
Points regular(std::size_t corners) {
  const double n = static_cast<double>(corners);
  Points points;
  for (std::size_t i = 0; i < corners; ++i) {
    const double angle = 2.0 * pi * static_cast<double>(i) / n;
    points.push_back({std::cos(angle) / std::cos(pi / n), std::sin(angle) / std::cos(pi / n)});
  }
  return points;
}

}  // namespace

TEST_CASE("The equilateral triangle has its exact torsion constants") {
  // I_t = sqrt(3) / 80 a^4, W_t = a^3 / 20. Source: Roark's Formulas for Stress and Strain.
  const double a = 0.06;
  const SectionProperties p = polygon(Points{{0, 0}, {a, 0}, {a / 2, a * std::sqrt(3.0) / 2.0}});
  CHECK(p.I_t == Approx(std::sqrt(3.0) / 80.0 * a * a * a * a).epsilon(1e-7));
  CHECK(p.W_t == Approx(a * a * a / 20.0).epsilon(1e-7));
}

TEST_CASE("Rectangles from square to a thin strip meet the series") {
  for (const double ratio : {1.0, 1.3, 2.0, 5.0, 20.0, 100.0, 1000.0}) {
    INFO("side ratio " << ratio);
    const RectangleTorsion torsion = rectangle_torsion(ratio);
    const SectionProperties p = polygon(box(0, 0, ratio, 1));
    CHECK(p.I_t == Approx(torsion.k2 * ratio).epsilon(2e-5));
    CHECK(p.W_t == Approx(torsion.k1 * ratio).epsilon(2e-3));
  }
}

TEST_CASE("Regular polygons meet their Fourier series") {
  for (const std::size_t corners : {3U, 4U, 5U, 6U, 8U, 12U}) {
    INFO(corners << " corners");
    const test::RegularPolygonTorsion oracle(static_cast<int>(corners), 24);
    const SectionProperties p = polygon(regular(corners));
    CHECK(p.I_t == Approx(oracle.I_t).epsilon(5e-5));
    CHECK(p.W_t == Approx(oracle.W_t).epsilon(5e-3));
  }
}

TEST_CASE("The Fourier series itself gives the square and the triangle") {
  const test::RegularPolygonTorsion square(4, 24);
  CHECK(square.I_t == Approx(16.0 * rectangle_torsion(1.0).k2).epsilon(1e-6));
  CHECK(square.W_t == Approx(8.0 * rectangle_torsion(1.0).k1).epsilon(1e-4));
  const double a = 2.0 * std::sqrt(3.0);
  const test::RegularPolygonTorsion triangle(3, 6);
  CHECK(triangle.I_t == Approx(std::sqrt(3.0) / 80.0 * a * a * a * a).epsilon(1e-4));
}

TEST_CASE("An L and a thick box agree with finite differences") {
  // The error at a re-entrant corner falls with the 4/3 power of the mesh: extrapolated.
  const auto extrapolated = [](double share_from, double share_to) {
    const auto at = [&](int cells) {
      return test::torsion_by_differences(cells,
                                          static_cast<int>(std::lround(share_from * cells)),
                                          static_cast<int>(std::lround(share_to * cells)));
    };
    const double coarse = at(48);
    const double fine = at(96);
    return fine + (fine - coarse) / (std::pow(2.0, 4.0 / 3.0) - 1.0);
  };
  const Points angle = {{0, 0}, {1, 0}, {1, 0.5}, {0.5, 0.5}, {0.5, 1}, {0, 1}};
  CHECK(polygon(angle).I_t == Approx(extrapolated(0.5, 1.0)).epsilon(1e-3));
  const SectionProperties thick =
      polygon(box(0, 0, 1, 1), std::vector<Points>{box(.25, .25, .75, .75)});
  CHECK(thick.I_t == Approx(extrapolated(0.25, 0.75)).epsilon(1e-3));
}

TEST_CASE("Thin open and closed sections tend to their formulas") {
  SECTION("box, Bredt with the wall's own share") {
    const double t = 0.005;
    const SectionProperties p =
        polygon(box(0, 0, 1, 1), std::vector<Points>{box(t, t, 1 - t, 1 - t)});
    const double side = 1.0 - t;
    CHECK(p.I_t == Approx(side * side * side * t + 4.0 * side * t * t * t / 3.0).epsilon(3e-3));
    // Half a wall from an inner corner the shear is 7 % above the wall's mean.
    CHECK(p.W_t < 2.0 * side * side * t);
    CHECK(p.W_t > 0.91 * 2.0 * side * side * t);
  }
  SECTION("two unequal cells, Bredt for each") {
    const double t = 0.01;
    const double a = 1.0;
    const double b = 0.4;
    const double h = 0.8;
    const double w = t / 2.0;
    const SectionProperties p =
        polygon(box(-w, -w, a + b + w, h + w),
                std::vector<Points>{box(w, w, a - w, h - w), box(a + w, w, a + b - w, h - w)});
    // q1 (2 a + 2 h) - q2 h = 2 a h t and the like for the other cell; T = 2 sum q A.
    const double m11 = 2.0 * (a + h);
    const double m22 = 2.0 * (b + h);
    const double determinant = m11 * m22 - h * h;
    const double q1 = 2.0 * h * t * (a * m22 + b * h) / determinant;
    const double q2 = 2.0 * h * t * (b * m11 + a * h) / determinant;
    CHECK(p.I_t == Approx(2.0 * (q1 * a * h + q2 * b * h)).epsilon(0.01));
  }
  SECTION("thin angle, the sum of its strips") {
    const double t = 0.01;
    const SectionProperties p = polygon(Points{{0, 0}, {1, 0}, {1, t}, {t, t}, {t, 1}, {0, 1}});
    CHECK(p.I_t == Approx((2.0 - t) * t * t * t / 3.0).epsilon(4e-3));
    // Half a thickness from the notch the shear is 5 % above the strip's.
    CHECK(p.W_t == Approx(0.949 * p.I_t / t).epsilon(0.01));
  }
}

TEST_CASE("A slit hole that is hardly there leaves the solid section") {
  const Points outer = box(0, 0, 1, 1);
  const SectionProperties p =
      polygon(outer, std::vector<Points>{box(0.495, 0.4999, 0.505, 0.5001)});
  CHECK(p.I_t == Approx(rectangle_torsion(1.0).k2).epsilon(2e-4));
}

TEST_CASE("Torsion scales with the fourth and the third power of the size") {
  const Points angle = {{0, 0}, {1, 0}, {1, 0.3}, {0.2, 0.3}, {0.2, 1}, {0, 1}};
  Points small;
  for (const SectionPoint& point : angle) {
    small.push_back({1e-3 * point.y, 1e-3 * point.z});
  }
  const SectionProperties a = polygon(angle);
  const SectionProperties b = polygon(small);
  CHECK(b.I_t == Approx(1e-12 * a.I_t).epsilon(1e-9));
  CHECK(b.W_t == Approx(1e-9 * a.W_t).epsilon(1e-9));
}

}  // namespace bismar
