// SPDX-License-Identifier: MIT
#include <bismar/mechanics/polygon.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/torsion.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <numbers>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

using Points = std::vector<SectionPoint>;

constexpr double pi = std::numbers::pi;

Points box(double y0, double z0, double y1, double z1) {
  return {{y0, z0}, {y1, z0}, {y1, z1}, {y0, z1}};
}

Points ring(std::size_t corners, double radius) {
  Points points;
  for (std::size_t i = 0; i < corners; ++i) {
    const double angle = 2.0 * pi * static_cast<double>(i) / static_cast<double>(corners);
    points.push_back({radius * std::cos(angle), radius * std::sin(angle)});
  }
  return points;
}

/// An I without fillets: flanges b x tf, clear web between them.
Points i_outline(double h, double b, double tw, double tf) {
  const double w = tw / 2.0;
  return {{-b / 2, 0},
          {b / 2, 0},
          {b / 2, tf},
          {w, tf},
          {w, h - tf},
          {b / 2, h - tf},
          {b / 2, h},
          {-b / 2, h},
          {-b / 2, h - tf},
          {-w, h - tf},
          {-w, tf},
          {-b / 2, tf}};
}

struct Place {
  Code code;
  std::string where;

  friend bool operator==(const Place&, const Place&) = default;
};

std::ostream& operator<<(std::ostream& out, const Place& place) {
  return out << static_cast<int>(place.code) << ' ' << place.where;
}

std::vector<Place> faults(const Points& outer, const std::vector<Points>& holes = {}) {
  std::vector<Place> found;
  try {
    static_cast<void>(polygon_centroid(outer, holes));
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      found.push_back({fault.code, fault.where});
      CHECK_FALSE(fault.message.empty());
    }
  }
  return found;
}

}  // namespace

TEST_CASE("A rectangle of points is the rectangle of the closed forms") {
  const SectionProperties p = polygon(box(0.3, -0.1, 0.34, -0.02));
  const SectionProperties s = solid_rectangle(0.08, 0.04);
  CHECK(p.family == SectionFamily::polygon);
  CHECK(p.area == Approx(s.area).epsilon(1e-12));
  CHECK(p.perimeter == Approx(s.perimeter).epsilon(1e-12));
  CHECK(p.inner_perimeter == 0.0);
  CHECK(p.height == Approx(0.08).epsilon(1e-12));
  CHECK(p.width == Approx(0.04).epsilon(1e-12));
  CHECK(p.wall == Approx(0.04).epsilon(1e-12));
  CHECK(p.ruling_dimension == Approx(0.04).epsilon(1e-12));
  CHECK(p.I_y == Approx(s.I_y).epsilon(1e-12));
  CHECK(p.I_z == Approx(s.I_z).epsilon(1e-12));
  CHECK(p.I_yz == 0.0);
  CHECK(p.W_el_y == Approx(s.W_el_y).epsilon(1e-12));
  CHECK(p.W_el_z == Approx(s.W_el_z).epsilon(1e-12));
  CHECK(p.W_pl_y == Approx(s.W_pl_y).epsilon(1e-12));
  CHECK(p.W_pl_z == Approx(s.W_pl_z).epsilon(1e-12));
  CHECK(p.A_v_y == Approx(s.area / 1.5).epsilon(1e-12));
  CHECK(p.A_v_z == Approx(s.area / 1.5).epsilon(1e-12));
  CHECK(p.A_s_y == Approx(s.area / 1.2).epsilon(1e-12));
  CHECK(p.A_s_z == Approx(s.area / 1.2).epsilon(1e-12));
  CHECK(p.I_t == Approx(s.I_t).epsilon(2e-5));
  CHECK(p.W_t == Approx(s.W_t).epsilon(2e-3));
  CHECK(p.fibres.size() == 4);
  CHECK(p.plates.empty());
}

TEST_CASE("An isosceles triangle has the shear stress of the handbooks") {
  // Peak of V S / (I t) of a triangle: 1.5 V / A at half the height. W_pl = (2 - sqrt 2) / 6 ... of
  // b h^2: hand-worked, the halving line lies h / sqrt 2 below the tip.
  const double b = 0.06;
  const double h = 0.09;
  const SectionProperties p = polygon(Points{{0.0, 0.0}, {b, 0.0}, {b / 2, h}});
  CHECK(p.A_v_z == Approx(b * h / 2.0 / 1.5).epsilon(1e-9));
  CHECK(p.W_el_y == Approx(b * h * h / 24.0).epsilon(1e-12));
  CHECK(p.W_pl_y == Approx((2.0 - std::numbers::sqrt2) / 6.0 * b * h * h).epsilon(1e-9));
  // Integral of Q^2 / t with s from the tip: Q = s^2 (h - s) b / (3 h I), t = b s / h; hence
  // 1 / A_s = (b / (9 h I^2)) integral s^3 (h - s)^2 ds = 6 / (5 A).
  CHECK(p.A_s_z == Approx(b * h / 2.0 / 1.2).epsilon(1e-9));
  // No two edges face each other: the least width of the hull, here over a slanting side.
  const double side = std::hypot(b / 2, h);
  CHECK(p.wall == Approx(b * h / side).epsilon(1e-9));
  // Inscribed circle: 4 A over the perimeter.
  CHECK(p.ruling_dimension <= 2.0 * b * h / (b + 2.0 * side));
  CHECK(p.ruling_dimension >= 0.99 * 2.0 * b * h / (b + 2.0 * side));
}

TEST_CASE("A hollow polygon is the difference of its parts") {
  const Points outer = box(0.0, 0.0, 0.1, 0.06);
  const std::vector<Points> holes = {box(0.01, 0.01, 0.04, 0.05), box(0.06, 0.01, 0.09, 0.05)};
  const SectionProperties p = polygon(outer, holes);
  CHECK(p.area == Approx(0.1 * 0.06 - 2.0 * 0.03 * 0.04).epsilon(1e-12));
  CHECK(p.inner_perimeter == Approx(4.0 * 0.07).epsilon(1e-12));
  CHECK(p.wall == Approx(0.01).epsilon(1e-12));
  const double I_y = (0.1 * std::pow(0.06, 3) - 0.06 * std::pow(0.04, 3)) / 12.0;
  CHECK(p.I_y == Approx(I_y).epsilon(1e-12));
  CHECK(p.W_pl_y == Approx((0.1 * 0.06 * 0.06 - 0.06 * 0.04 * 0.04) / 4.0).epsilon(1e-12));
  // At mid-height all webs together: t = 0.04.
  CHECK(p.A_v_z == Approx(I_y * 0.04 / (p.W_pl_y / 2.0)).epsilon(1e-12));
}

TEST_CASE("An I of points has the web shear, walls and thickness of an I") {
  const SectionProperties p = polygon(i_outline(0.2, 0.1, 0.0056, 0.0085));
  const SectionProperties s = i_section(0.2, 0.1, 0.0056, 0.0085, 0.0);
  CHECK(p.area == Approx(s.area).epsilon(1e-12));
  CHECK(p.I_y == Approx(s.I_y).epsilon(1e-12));
  CHECK(p.W_pl_z == Approx(s.W_pl_z).epsilon(1e-9));
  CHECK(p.A_v_z == Approx(s.A_v_z).epsilon(1e-9));
  CHECK(p.wall == Approx(0.0056).epsilon(1e-9));
  CHECK(p.ruling_dimension > 0.0085);
  CHECK(p.I_t == Approx(s.I_t).epsilon(0.03));
  // The notch at half the flange's thickness keeps W_t below I_t over the thickness, not far.
  CHECK(p.W_t < p.I_t / 0.0085);
  CHECK(p.W_t > 0.88 * p.I_t / 0.0085);
}

TEST_CASE("Unsymmetrical bending enters the shear area of a polygon") {
  // A parallelogram: a rectangle b x h sheared by y += c z. Shear keeps areas, widths and Q along z
  // for a load whose bending stress depends on z alone, which a z load's does not: the stress is
  // (I_z z - I_yz y) / D, and on a cut z the mean of y is c z, so that it is z (I_z - c I_yz) / D.
  const double b = 0.04;
  const double h = 0.06;
  const double c = 0.5;
  const SectionProperties p = polygon(Points{{0, 0}, {b, 0}, {b + c * h, h}, {c * h, h}});
  const double I_y = b * h * h * h / 12.0;
  const double I_z = h * b * b * b / 12.0 + c * c * I_y;
  CHECK(p.I_y == Approx(I_y).epsilon(1e-12));
  CHECK(p.I_z == Approx(I_z).epsilon(1e-12));
  CHECK(p.I_yz == Approx(c * I_y).epsilon(1e-12));
  CHECK(p.A_v_z == Approx(b * h / 1.5).epsilon(1e-12));
  CHECK(p.fibres.size() == 4);
}

TEST_CASE("Rounded outlines tend to the circle and the ring") {
  const SectionProperties p = polygon(ring(96, 0.05));
  const SectionProperties s = solid_round(0.1);
  CHECK(p.area == Approx(s.area).epsilon(1e-3));
  CHECK(p.I_t == Approx(s.I_t).epsilon(2e-3));
  CHECK(p.I_t < s.I_t);
  CHECK(p.W_t == Approx(s.W_t).epsilon(0.02));
  CHECK(p.A_v_z == Approx(s.A_v_z).epsilon(2e-3));
  const SectionProperties tube = polygon(ring(64, 0.05), std::vector<Points>{ring(64, 0.04)});
  const SectionProperties round = round_tube(0.1, 0.01, Forming::unknown);
  CHECK(tube.I_t == Approx(round.I_t).epsilon(4e-3));
  CHECK(tube.W_t == Approx(round.W_t).epsilon(0.03));
  CHECK(tube.wall == Approx(0.01).epsilon(3e-3));
}

TEST_CASE("Where the points come from and which way round they run changes nothing") {
  const Points outer = {{0, 0}, {0.12, 0}, {0.12, 0.04}, {0.08, 0.09}, {0, 0.07}};
  const std::vector<Points> holes = {{{0.03, 0.02}, {0.07, 0.02}, {0.07, 0.05}, {0.03, 0.05}}};
  const SectionProperties a = polygon(outer, holes);
  Points moved;
  for (const SectionPoint& point : outer) {
    moved.push_back({point.y + 0.5, point.z - 0.25});
  }
  std::reverse(moved.begin(), moved.end());
  std::vector<Points> moved_holes(1);
  for (const SectionPoint& point : holes[0]) {
    moved_holes[0].push_back({point.y + 0.5, point.z - 0.25});
  }
  const SectionProperties b = polygon(moved, moved_holes);
  CHECK(b.I_yz == Approx(a.I_yz).epsilon(1e-12));
  CHECK(b.W_pl_z == Approx(a.W_pl_z).epsilon(1e-10));
  CHECK(b.A_v_y == Approx(a.A_v_y).epsilon(1e-10));
  CHECK(b.A_s_y == Approx(a.A_s_y).epsilon(1e-10));
  CHECK(b.wall == Approx(a.wall).epsilon(1e-10));
  CHECK(b.I_t == Approx(a.I_t).epsilon(1e-9));
  CHECK(b.W_t == Approx(a.W_t).epsilon(1e-9));
  const SectionPoint centroid = polygon_centroid(moved, moved_holes);
  CHECK(centroid.y == Approx(0.5 + 0.058974359).epsilon(1e-8));
  CHECK(centroid.z == Approx(-0.25 + 0.038974359).epsilon(1e-8));
}

TEST_CASE("Swapping the axes of a polygon swaps its properties") {
  const Points outer = {{0, 0}, {0.12, 0}, {0.12, 0.04}, {0.08, 0.09}, {0, 0.07}};
  Points swapped;
  for (const SectionPoint& point : outer) {
    swapped.push_back({point.z, point.y});
  }
  const SectionProperties a = polygon(outer);
  const SectionProperties b = polygon(swapped);
  CHECK(a.W_el_y == Approx(b.W_el_z).epsilon(1e-12));
  CHECK(a.W_pl_y == Approx(b.W_pl_z).epsilon(1e-10));
  CHECK(a.A_v_y == Approx(b.A_v_z).epsilon(1e-10));
  CHECK(a.A_s_z == Approx(b.A_s_y).epsilon(1e-10));
  CHECK(a.I_yz == Approx(b.I_yz).epsilon(1e-12));
}

TEST_CASE("The least wall is found between edges, notches and holes") {
  const auto wall = [](const Points& outer, const std::vector<Points>& holes = {}) {
    return polygon(outer, holes).wall;
  };
  // An L: the notch is nearer to the outer sides than anything else.
  CHECK(wall({{0, 0}, {0.1, 0}, {0.1, 0.01}, {0.02, 0.01}, {0.02, 0.1}, {0, 0.1}}) ==
        Approx(0.01).epsilon(1e-9));
  // A hole that stands on its corner over a flat side.
  CHECK(wall(box(0, 0, 0.1, 0.1), {{{0.05, 0.004}, {0.07, 0.05}, {0.05, 0.07}, {0.03, 0.05}}}) ==
        Approx(0.004).epsilon(1e-9));
  // Two notches face each other across a neck.
  CHECK(wall({{0, 0}, {0.1, 0}, {0.053, 0.05}, {0.1, 0.1}, {0, 0.1}, {0.047, 0.05}}) ==
        Approx(0.006).epsilon(1e-9));
  // A chamfer is no wall itself, but takes its millimetre off the one across.
  CHECK(wall({{0.001, 0}, {0.05, 0}, {0.05, 0.03}, {0, 0.03}, {0, 0.001}}) ==
        Approx(0.029).epsilon(1e-9));
  // A hexagon: across flats.
  CHECK(wall(ring(6, 0.02)) == Approx(0.02 * std::numbers::sqrt3).epsilon(1e-9));
}

TEST_CASE("Every fault of a polygon's points has its own place") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  const Points square = box(0, 0, 1, 1);
  CHECK(faults(square).empty());
  CHECK(faults({}) == std::vector<Place>{{Code::missing, "/outer"}});
  CHECK(faults({{0, 0}, {1, 0}}) == std::vector<Place>{{Code::missing, "/outer"}});
  CHECK(faults({{0, 0}, {1, nan}, {1, 1}}) == std::vector<Place>{{Code::not_finite, "/outer/1"}});
  CHECK(faults({{nan, 0}, {1, 0}, {1, 1}}) == std::vector<Place>{{Code::not_finite, "/outer/0"}});
  CHECK(faults({{0, 0}, {1, 0}, {1, 1}, {0, 0}}) ==
        std::vector<Place>{{Code::duplicate, "/outer/3"}});
  CHECK(faults({{0, 0}, {1, 0}, {2, 0}}) == std::vector<Place>{{Code::out_of_range, "/outer"}});
  // A bow tie: the third edge crosses the first.
  CHECK(faults({{0, 0}, {2, 1}, {2, 0}, {0, 1.5}}) ==
        std::vector<Place>{{Code::conflict, "/outer/2"}});
  // A spike that runs back over itself.
  CHECK(faults({{0, 0}, {1, 0}, {1, 1}, {1, 0.5}, {0, 1}}).front() ==
        Place{Code::conflict, "/outer/2"});
  CHECK(faults(square, {box(2, 2, 3, 3)}) == std::vector<Place>{{Code::conflict, "/holes/0"}});
  CHECK(faults(square, {box(0.5, 0.5, 1.5, 0.7)}) ==
        std::vector<Place>{{Code::conflict, "/holes/0/0"}});
  // In touch with the outline at a point.
  CHECK(faults(square, {{{0.5, 0}, {0.6, 0.2}, {0.4, 0.2}}}) ==
        std::vector<Place>{{Code::conflict, "/holes/0/0"}});
  CHECK(faults(square, {box(0.1, 0.1, 0.4, 0.4), box(0.3, 0.3, 0.6, 0.6)}) ==
        std::vector<Place>{{Code::conflict, "/holes/1/0"}});
  // Each is one fault, however many edges meet: a hole that is the outline, a star of five edges.
  CHECK(faults(square, {square}) == std::vector<Place>{{Code::conflict, "/holes/0/0"}});
  CHECK(faults({{0, 10}, {6, -8}, {-9.5, 3}, {9.5, 3.1}, {-6, -8}}).size() == 1);
  CHECK(faults(square, {box(0.1, 0.1, 0.6, 0.6), box(0.2, 0.2, 0.4, 0.4)}) ==
        std::vector<Place>{{Code::conflict, "/holes/1"}});
  CHECK(faults(ring(most_polygon_points + 1, 1.0)) ==
        std::vector<Place>{{Code::out_of_range, "/outer"}});
}

TEST_CASE("A polygon whose torsion would need too many elements says so") {
  // A comb of 120 teeth: every corner is sharp, and each needs its own short elements.
  Points comb = {{0.0, 0.0}, {240.0, 0.0}};
  for (int tooth = 119; tooth >= 0; --tooth) {
    const double y = 2.0 * tooth;
    comb.insert(comb.end(), {{y + 2.0, 10.0}, {y + 1.0, 10.0}, {y + 1.0, 1.0}, {y, 1.0}});
  }
  CHECK(faults(comb).empty());
  try {
    static_cast<void>(polygon(comb));
    FAIL("no fault");
  } catch (const Error& error) {
    REQUIRE(error.faults().size() == 1);
    CHECK(error.faults()[0].code == Code::unsupported);
    CHECK(error.faults()[0].where == "/outer");
  }
}

TEST_CASE("All faults of a polygon come at once") {
  const double infinity = std::numeric_limits<double>::infinity();
  CHECK(faults({{0, 0}, {infinity, 0}, {1, 1}, {0, -infinity}},
               {{{0, 0}}, {{0, 0}, {1, 0}, {1, 1}, {1, 0}}, box(5, 5, 6, 6), box(5, 5, 6, 6)}) ==
        std::vector<Place>{{Code::not_finite, "/outer/1"},
                           {Code::not_finite, "/outer/3"},
                           {Code::missing, "/holes/0"},
                           {Code::duplicate, "/holes/1/3"},
                           {Code::conflict, "/holes/3/0"}});
}

TEST_CASE("An outline that is thin beyond measure is refused at once") {
  const std::vector<Place> thin = {{Code::out_of_range, "/outer"}};
  // A strip of L x t: the mean thickness is L t / (L + t).
  CHECK(faults(box(0, 0, 1.998, 1e-3)).empty());
  CHECK(faults(box(0, 0, 2.0, 1e-3)) == thin);
  CHECK(faults(box(0, 0, 1e3, 1e-3)) == thin);
  // A needle, upright, and one that leans.
  CHECK(faults({{0, 0}, {1.0, 0}, {0.5, 990.0}}).empty());
  CHECK(faults({{0, 0}, {1.0, 0}, {0.5, 1010.0}}) == thin);
  CHECK(faults({{0, 0}, {1e6, 1e6}, {0, 1.0}}) == thin);
  // A ring of 1 m with a wall of 0.4 mm, and one of 4 mm.
  CHECK(faults(box(0, 0, 1, 1), {box(0.0004, 0.0004, 0.9996, 0.9996)}) == thin);
  CHECK(faults(box(0, 0, 1, 1), {box(0.004, 0.004, 0.996, 0.996)}).empty());
  try {
    check_polygon(box(0, 0, 4.0, 1e-3));
    FAIL("no fault");
  } catch (const Error& error) {
    CHECK(error.faults()[0].message.find("4001 times") != std::string::npos);
  }
  // The faults are those of the section, which is not made.
  CHECK_THROWS_AS(polygon(box(0, 0, 1e3, 1e-3)), Error);
}

TEST_CASE("Random star-shaped polygons agree with sums over thin strips") {
  std::mt19937_64 random(20240611);
  std::uniform_real_distribution<double> radius(0.5, 1.5);
  for (int trial = 0; trial < 20; ++trial) {
    INFO("trial " << trial);
    Points points = ring(7, 1.0);
    for (SectionPoint& point : points) {
      const double r = radius(random);
      point = {r * point.y, r * point.z};
    }
    const SectionProperties p = polygon(points);
    const SectionPoint centroid = polygon_centroid(points);
    // Midpoints of a fine grid of strips z = const, cut with the outline by hand.
    constexpr int strips = 4000;
    double area = 0.0;
    double I_y = 0.0;
    double I_yz = 0.0;
    double peak = 0.0;
    double Q = 0.0;
    for (int k = 0; k < strips; ++k) {
      const double z = -1.6 + 3.2 * (k + 0.5) / strips;
      std::vector<double> cuts;
      for (std::size_t i = 0; i < points.size(); ++i) {
        const SectionPoint& a = points[i];
        const SectionPoint& b = points[(i + 1) % points.size()];
        if ((a.z > z) != (b.z > z)) {
          cuts.push_back(a.y + (b.y - a.y) * (z - a.z) / (b.z - a.z));
        }
      }
      std::sort(cuts.begin(), cuts.end());
      double t = 0.0;
      double side = 0.0;
      for (std::size_t i = 0; i + 1 < cuts.size(); i += 2) {
        t += cuts[i + 1] - cuts[i];
        side += (cuts[i + 1] - cuts[i]) * ((cuts[i + 1] + cuts[i]) / 2.0 - centroid.y);
      }
      const double dz = 3.2 / strips;
      area += t * dz;
      I_y += t * (z - centroid.z) * (z - centroid.z) * dz;
      I_yz += side * (z - centroid.z) * dz;
      const double D = p.I_y * p.I_z - p.I_yz * p.I_yz;
      const double rate = (p.I_z * (z - centroid.z) * t - p.I_yz * side) / D * dz;
      if (t > 0.02) {
        peak = std::max(peak, std::abs(Q + rate / 2.0) / t);
      }
      Q += rate;
    }
    CHECK(p.area == Approx(area).epsilon(2e-3));
    CHECK(p.I_y == Approx(I_y).epsilon(2e-3));
    CHECK(p.I_yz == Approx(I_yz).epsilon(5e-3).margin(1e-3));
    CHECK(1.0 / p.A_v_z == Approx(peak).epsilon(5e-3));
    CHECK(p.A_s_z >= p.A_v_z);
    CHECK(p.A_s_z <= p.area);
  }
}

}  // namespace bismar
