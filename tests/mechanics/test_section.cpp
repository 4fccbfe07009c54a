// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/scan_line.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

using test::rounded_width;
using test::ScanLine;

constexpr double pi = std::numbers::pi;

/// Properties for bending about y against the scan along z.
void compare_y(const SectionProperties& s, const ScanLine& scan, double tolerance) {
  CHECK(s.area == Approx(scan.area).epsilon(tolerance));
  CHECK(s.I_y == Approx(scan.second_moment).epsilon(tolerance));
  CHECK(s.W_el_y == Approx(2.0 * scan.second_moment / s.height).epsilon(tolerance));
  CHECK(s.W_pl_y == Approx(2.0 * scan.half_first_moment).epsilon(tolerance));
}

void compare_z(const SectionProperties& s, const ScanLine& scan, double tolerance) {
  CHECK(s.area == Approx(scan.area).epsilon(tolerance));
  CHECK(s.I_z == Approx(scan.second_moment).epsilon(tolerance));
  CHECK(s.W_el_z == Approx(2.0 * scan.second_moment / s.width).epsilon(tolerance));
  CHECK(s.W_pl_z == Approx(2.0 * scan.half_first_moment).epsilon(tolerance));
}

}  // namespace

TEST_CASE("A solid round bar has the closed forms of a circle") {
  const SectionProperties s = solid_round(0.020);
  CHECK(s.area == Approx(314.159265e-6).epsilon(1e-8));
  CHECK(s.I_y == Approx(7853.98163e-12).epsilon(1e-8));
  CHECK(s.W_el_y == Approx(785.398163e-9).epsilon(1e-8));
  CHECK(s.W_pl_y == Approx(8.0e-6 / 6.0).epsilon(1e-12));
  CHECK(s.I_t == Approx(2.0 * s.I_y).epsilon(1e-15));
  CHECK(s.smooth_outline);
  CHECK(s.plates.empty());
  CHECK(s.ruling_dimension == 0.020);
  CHECK(s.perimeter == Approx(pi * 0.020));
  compare_y(s, ScanLine(0.020, [](double z) { return rounded_width(0.02, 0.02, 0.01, z); }), 2e-6);
}

TEST_CASE("The peak elastic shear stress of solids is that of V S / (I b)") {
  const SectionProperties round = solid_round(0.030);
  CHECK(1.0 / round.A_v_z == Approx(4.0 / (3.0 * round.area)).epsilon(1e-12));
  const SectionProperties flat = solid_rectangle(0.05, 0.02);
  CHECK(1.0 / flat.A_v_z == Approx(1.5 / flat.area).epsilon(1e-12));
  CHECK(flat.A_v_y == flat.A_v_z);
  const SectionProperties ellipse = solid_ellipse(0.04, 0.032);
  const ScanLine scan(
      0.04, [](double z) { return 0.032 * std::sqrt(std::max(0.0, 1.0 - z * z / (0.02 * 0.02))); });
  CHECK(1.0 / ellipse.A_v_z == Approx(scan.peak_shear).epsilon(1e-4));
}

TEST_CASE("A solid ellipse of semi-axes 20 and 16 mm over 0.3 m holds about 3.0e-4 m3") {
  // Common practice, no source.
  CHECK(solid_ellipse(0.040, 0.032).area * 0.3 == Approx(3.0e-4).epsilon(0.01));
}

TEST_CASE("The circumference of an ellipse agrees with a fine polygon and with the circle") {
  for (const double b : {0.0401, 0.03, 0.01, 0.001}) {
    const double a = 0.04;
    double length = 0.0;
    constexpr int sides = 200000;
    for (int k = 0; k < sides; ++k) {
      const double from = 2.0 * pi * k / sides;
      const double to = 2.0 * pi * (k + 1) / sides;
      length += std::hypot(a / 2.0 * (std::cos(to) - std::cos(from)),
                           b / 2.0 * (std::sin(to) - std::sin(from)));
    }
    CHECK(solid_ellipse(a, b).perimeter == Approx(length).epsilon(1e-8));
    CHECK(solid_ellipse(b, a).perimeter == Approx(length).epsilon(1e-8));
  }
  CHECK(solid_ellipse(0.04, 0.04).perimeter == Approx(pi * 0.04).epsilon(1e-14));
}

TEST_CASE("An ellipse with equal axes is the round bar, a rectangle with equal sides the square") {
  const SectionProperties e = solid_ellipse(0.025, 0.025);
  const SectionProperties r = solid_round(0.025);
  CHECK(e.I_t == Approx(r.I_t).epsilon(1e-14));
  CHECK(e.W_t == Approx(r.W_t).epsilon(1e-14));
  CHECK(e.W_pl_z == Approx(r.W_pl_z).epsilon(1e-14));
  const SectionProperties q = solid_square(0.025);
  CHECK(q.I_t == solid_rectangle(0.025, 0.025).I_t);
  CHECK(q.family == SectionFamily::solid_square);
}

TEST_CASE("A round tube agrees with a scan, a thick one included") {
  for (const double wall : {0.0005, 0.004, 0.0199}) {
    const double D = 0.04;
    const SectionProperties s = round_tube(D, wall, Forming::hot_finished);
    const double d = D - 2.0 * wall;
    const ScanLine scan(D, [&](double z) {
      return rounded_width(D, D, D / 2.0, z) - rounded_width(d, d, d / 2.0, z);
    });
    compare_y(s, scan, 1e-4);
    CHECK(1.0 / s.A_v_z == Approx(scan.peak_shear).epsilon(1e-3));
    REQUIRE(s.plates.size() == 1);
    CHECK(s.plates[0].ratio == Approx(D / wall));
    CHECK(s.ruling_dimension == wall);
    CHECK(s.inner_perimeter == Approx(pi * d).margin(1e-15));
  }
}

TEST_CASE("Rectangular tubes agree with a scan for every kind of corner") {
  for (const Corners corners : {Corners::sharp, Corners::en_10210, Corners::en_10219}) {
    const double h = 0.100;
    const double b = 0.060;
    const double t = 0.005;
    const SectionProperties s = rectangular_tube(h, b, t, corners, Forming::cold_formed);
    const double ro = corners == Corners::sharp      ? 0.0
                      : corners == Corners::en_10210 ? 0.0075
                                                     : 0.01;
    const double ri = corners == Corners::sharp ? 0.0 : 0.005;
    const ScanLine along_z(h, [&](double z) {
      return rounded_width(h, b, ro, z) - rounded_width(h - 2 * t, b - 2 * t, ri, z);
    });
    const ScanLine along_y(b, [&](double y) {
      return rounded_width(b, h, ro, y) - rounded_width(b - 2 * t, h - 2 * t, ri, y);
    });
    compare_y(s, along_z, 1e-4);
    compare_z(s, along_y, 1e-4);
    CHECK(1.0 / s.A_v_z == Approx(along_z.peak_shear).epsilon(1e-3));
    CHECK(1.0 / s.A_v_y == Approx(along_y.peak_shear).epsilon(1e-3));
    CHECK(s.perimeter == Approx(2 * (h + b) - (8 - 2 * pi) * ro));
    // The shear stress at the junction lies between none and the peak.
    CHECK(s.A_v_junction > s.A_v_z);
    CHECK(s.junction_ratio == Approx(0.9));
    REQUIRE(s.plates.size() == 2);
    CHECK(s.plates[0].ratio == Approx((b - 2 * std::max(ro, t)) / t));
    CHECK(s.plates[1].ratio == Approx((h - 2 * std::max(ro, t)) / t));
  }
}

TEST_CASE("Cold-formed corners follow the wall's steps at 6 and 10 mm") {
  // ro = 2.0 t to 6 mm, 2.5 t to 10 mm, 3.0 t above (EN 10219-2; confirmed by the section tables).
  const auto radius = [](double t) {
    const SectionProperties s = rectangular_tube(0.3, 0.2, t, Corners::en_10219, Forming::unknown);
    return (2 * 0.5 - s.perimeter) / (8 - 2 * pi) / t;
  };
  CHECK(radius(0.006) == Approx(2.0));
  CHECK(radius(0.0061) == Approx(2.5));
  CHECK(radius(0.010) == Approx(2.5));
  CHECK(radius(0.0125) == Approx(3.0));
}

TEST_CASE("A rolled I agrees with a scan in both directions") {
  const double h = 0.300;
  const double b = 0.150;
  const double tw = 0.0071;
  const double tf = 0.0107;
  for (const double r : {0.0, 0.015}) {
    const SectionProperties s = i_section(h, b, tw, tf, r);
    const double clear = h / 2 - tf;
    // Fillets: the rounded void between the flanges on each side of the web.
    const auto width_at = [&](double z) {
      if (z > clear) {
        return b;
      }
      const double into = z - (clear - r);
      const double fillet =
          r > 0 && into > 0 ? r - std::sqrt(std::max(0.0, r * r - into * into)) : 0;
      return tw + 2 * fillet;
    };
    const auto depth_at = [&](double y) {
      if (y < tw / 2) {
        return h;
      }
      const double into = tw / 2 + r - y;
      const double fillet =
          r > 0 && into > 0 ? r - std::sqrt(std::max(0.0, r * r - into * into)) : 0;
      return 2 * (tf + fillet);
    };
    const ScanLine along_z(h, width_at);
    const ScanLine along_y(b, depth_at);
    compare_y(s, along_z, 1e-4);
    compare_z(s, along_y, 1e-4);
    CHECK(1.0 / s.A_v_z == Approx(along_z.peak_shear).epsilon(1e-4));
    // On the safe side, and not by much.
    CHECK(1.0 / s.A_v_y >= along_y.peak_shear);
    CHECK(1.0 / s.A_v_y < 1.08 * along_y.peak_shear);
    CHECK(s.perimeter == Approx(2 * h + 4 * b - 2 * tw - (8 - 2 * pi) * r));
    CHECK(s.ruling_dimension == tf);
    CHECK(s.wall == tw);
  }
}

TEST_CASE("A bare I has the shear and bending of its junction by hand") {
  // 200 x 100, web 6, flange 10 mm: S of a flange = 100 x 10 x 95 = 95000 mm3,
  // I_y = (100 x 200^3 - 94 x 180^3) / 12 = 20.98 e6 mm4.
  const SectionProperties s = i_section(0.2, 0.1, 0.006, 0.01, 0.0);
  const double I = (100.0 * 8e6 - 94.0 * 5.832e6) / 12.0;
  CHECK(s.I_y * 1e12 == Approx(I));
  CHECK(s.A_v_junction * 1e6 == Approx(I * 6.0 / 95000.0));
  CHECK(s.junction_ratio == Approx(0.9));
  CHECK(s.A_v_z * 1e6 == Approx(I * 6.0 / (95000.0 + 6.0 * 90.0 * 45.0)));
}

TEST_CASE("A parallel-flange channel agrees with its rectangles and fillets") {
  const double h = 0.2;
  const double b = 0.08;
  const double tw = 0.006;
  const double tf = 0.011;
  const SectionProperties s = channel(h, b, tw, tf, 0.0, 0.0);
  const double A = 2 * b * tf + (h - 2 * tf) * tw;
  const double c = (2 * b * tf * b / 2 + (h - 2 * tf) * tw * tw / 2) / A;
  const double Iz = 2 * (tf * b * b * b / 12 + b * tf * (b / 2 - c) * (b / 2 - c)) +
                    (h - 2 * tf) * (tw * tw * tw / 12 + tw * (tw / 2 - c) * (tw / 2 - c));
  CHECK(s.area == Approx(A).epsilon(1e-12));
  CHECK(s.I_y == Approx((b * h * h * h - (b - tw) * std::pow(h - 2 * tf, 3)) / 12).epsilon(1e-12));
  CHECK(s.I_z == Approx(Iz).epsilon(1e-12));
  CHECK(s.W_el_z == Approx(Iz / (b - c)).epsilon(1e-12));
  // The halving line: h y = A/2 would lie beyond the web, so it cuts the flanges.
  const double y = tw + (A / 2 - h * tw) / (2 * tf);
  const double W_pl = h * tw * (y - tw / 2) + tf * (y - tw) * (y - tw) + tf * (b - y) * (b - y);
  CHECK(s.W_pl_z == Approx(W_pl).epsilon(1e-9));
  // A y load peaks in the flanges at the neutral axis, or where their flow enters the web.
  const double in_flange = (b - c) * (b - c) / 2;
  const double in_web = (h / 2 - tf) * (c - tw / 2);
  CHECK(in_web > in_flange);
  CHECK(s.A_v_y == Approx(Iz / in_web));
  // Along a flange: the overhang times the mid-line's distance.
  CHECK(s.A_v_flange == Approx(s.I_y / ((b - tw) * (h - tf) / 2)));
  CHECK(s.A_s_y == Approx(2 * b * tf * 5 / 6));
  CHECK(s.z_shear == 0.0);
  REQUIRE(s.fibres.size() == 4);
  // Two fillets add their area and shorten the outline.
  const SectionProperties filleted = channel(h, b, tw, tf, 0.013, 0.0);
  CHECK(filleted.area - s.area == Approx(2 * (1 - pi / 4) * 0.013 * 0.013).epsilon(1e-10));
  CHECK(s.perimeter - filleted.perimeter == Approx((4 - pi) * 0.013).epsilon(1e-10));
}

TEST_CASE("Tapered channels agree with a scan of their outline") {
  struct Row {
    double h, b, tw, tf, slope, measured_at;
  };
  // UPN 100 (8 %, measured at b/2) and UPN 400 (5 %, measured at half the overhang).
  for (const Row& row : {Row{0.100, 0.050, 0.006, 0.0085, 0.08, 0.025},
                         Row{0.400, 0.110, 0.014, 0.018, 0.05, 0.062}}) {
    const SectionProperties s = channel(row.h, row.b, row.tw, row.tf, row.tf, row.slope);
    const double r1 = row.tf;
    const double r2 = row.tf / 2;
    const double cosine = 1 / std::sqrt(1 + row.slope * row.slope);
    const double sine = row.slope * cosine;
    const auto face = [&](double y) {
      return row.h / 2 - row.tf - row.slope * (row.measured_at - y);
    };
    const double y1 = row.tw + r1;
    const double z1 = face(y1) - r1 / cosine;
    const double y2 = row.b - r2;
    const double z2 = face(y2) + r2 / cosine;
    const auto inner_edge = [&](double y) {
      if (y < row.tw) {
        return 0.0;
      }
      if (y < y1 - r1 * sine) {
        return z1 + std::sqrt(std::max(0.0, r1 * r1 - (y - y1) * (y - y1)));
      }
      if (y > y2 + r2 * sine) {
        return z2 - std::sqrt(std::max(0.0, r2 * r2 - (y - y2) * (y - y2)));
      }
      return face(y);
    };
    double A = 0;
    double S = 0;
    double J = 0;
    double I = 0;
    constexpr int strips = 200000;
    const double dy = row.b / strips;
    for (int k = 0; k < strips; ++k) {
      const double y = (k + 0.5) * dy;
      const double z = inner_edge(y);
      const double depth = 2 * (row.h / 2 - z) * dy;
      A += depth;
      S += depth * y;
      J += depth * y * y;
      I += 2 * (std::pow(row.h / 2, 3) - z * z * z) / 3 * dy;
    }
    CHECK(s.area == Approx(A).epsilon(1e-5));
    CHECK(s.I_y == Approx(I).epsilon(1e-5));
    CHECK(s.I_z == Approx(J - S * S / A).epsilon(1e-4));
    CHECK(s.W_el_z == Approx((J - S * S / A) / (row.b - S / A)).epsilon(1e-4));
    // Peak shear of a y load: S(y) / (I b(y)) scanned; ours is on the safe side.
    double beyond = 0;
    double peak = 0;
    for (int k = strips; k-- > 0;) {
      const double y = (k + 0.5) * dy;
      const double depth = 2 * (row.h / 2 - inner_edge(y));
      beyond += depth * (y - S / A) * dy;
      peak = std::max(peak, beyond / ((J - S * S / A) * depth));
    }
    // Below the root fillet the web has the flow of its own height.
    const double in_web = z1 * (S / A - row.tw / 2) / (J - S * S / A);
    peak = std::max(peak, in_web);
    CHECK(1 / s.A_v_y >= peak);
    CHECK(1 / s.A_v_y < 1.35 * peak);
    CHECK(s.junction_ratio == Approx(2 * face(row.tw) / row.h));
    CHECK(s.I_w > 0.0);
    CHECK(s.y_shear < -S / A);  // beyond the web
  }
}

}  // namespace bismar
