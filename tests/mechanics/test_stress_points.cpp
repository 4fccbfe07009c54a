// SPDX-License-Identifier: MIT
// The points that limit states look at must bound every point of the section.
#include "mechanics/stress_points.hpp"

#include <bismar/mechanics/stress.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <random>
#include <utility>

namespace bismar {

namespace {

using mechanics::equivalent_squared;
using mechanics::station_stresses;
using mechanics::StationStresses;
using mechanics::stress_points;
using mechanics::StressPoint;

InternalForces random_forces(std::mt19937& random, const SectionProperties& s, bool two_planes) {
  // Stresses of like size, so that no part hides the others.
  std::uniform_real_distribution<double> stress(-100e6, 100e6);
  std::uniform_int_distribution<int> present(0, 3);
  const auto maybe = [&] { return present(random) == 0 ? 0.0 : stress(random); };
  InternalForces f;
  f.N = maybe() * s.area;
  f.V_z = maybe() * s.A_v_z;
  f.M_y = maybe() * s.W_el_y;
  f.T = maybe() * s.W_t;
  if (two_planes) {
    f.V_y = maybe() * s.A_v_y;
    f.M_z = maybe() * s.W_el_z;
  }
  return f;
}

double bound(const SectionProperties& s, const InternalForces& f) {
  double largest = 0.0;
  for (const StressPoint& point : stress_points(s, station_stresses(s, f))) {
    largest = std::max(largest, equivalent_squared(point));
  }
  return std::sqrt(largest);
}

}  // namespace

TEST_CASE("No point of a rectangle is worse than its stress points") {
  std::mt19937 random(21);
  const SectionProperties s = solid_rectangle(0.05, 0.03);
  double tightest = 1e9;
  for (int trial = 0; trial < 300; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    const StationStresses p = station_stresses(s, f);
    double scanned = 0.0;
    for (int i = -40; i <= 40; ++i) {
      for (int j = -40; j <= 40; ++j) {
        const double eta = i / 40.0;   // along y
        const double zeta = j / 40.0;  // along z
        const double sigma = f.N / s.area + f.M_y / s.W_el_y * zeta + f.M_z / s.W_el_z * eta;
        const double shear = std::hypot(p.shear_z * (1 - zeta * zeta), p.shear_y * (1 - eta * eta));
        scanned = std::max(scanned, von_mises(sigma, shear + p.torsion));
      }
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-12));
    if (scanned > 0.0) {
      tightest = std::min(tightest, bound(s, f) / scanned);
      CHECK(bound(s, f) <= 1.35 * scanned);
    }
  }
  CHECK(tightest == Approx(1.0).epsilon(1e-9));
}

TEST_CASE("No point of a round tube's wall is worse than its stress points") {
  std::mt19937 random(22);
  const SectionProperties s = round_tube(0.05, 0.001, Forming::unknown);
  double tightest = 1e9;
  for (int trial = 0; trial < 600; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    double scanned = 0.0;
    for (int k = 0; k < 720; ++k) {
      const double phi = 2 * std::numbers::pi * k / 720;
      const double sigma =
          f.N / s.area + f.M_y / s.W_el_y * std::sin(phi) + f.M_z / s.W_el_z * std::cos(phi);
      const double shear = f.V_z / s.A_v_z * std::cos(phi) - f.V_y / s.A_v_y * std::sin(phi);
      scanned = std::max(scanned, von_mises(sigma, shear + f.T / s.W_t));
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-12));
    if (scanned > 0.0) {
      tightest = std::min(tightest, bound(s, f) / scanned);
      CHECK(bound(s, f) <= 1.75 * scanned);
    }
  }
  CHECK(tightest == Approx(1.0).epsilon(1e-4));
}

TEST_CASE("No point of an I's web is worse than its stress points") {
  std::mt19937 random(23);
  const SectionProperties s = i_section(0.2, 0.1, 0.006, 0.01, 0.0);
  for (int trial = 0; trial < 300; ++trial) {
    const InternalForces f = random_forces(random, s, false);
    const StationStresses p = station_stresses(s, f);
    double scanned = von_mises(std::abs(p.axial) + p.bending_y, p.torsion);
    for (int j = -100; j <= 100; ++j) {
      const double z = 0.09 * j / 100.0;
      const double moment = 95000e-9 + 0.006 * (0.09 * 0.09 - z * z) / 2;  // S(z)
      const double tau = std::abs(f.V_z) * moment / (s.I_y * 0.006) + p.torsion;
      scanned = std::max(scanned, von_mises(f.N / s.area + f.M_y * z / s.I_y, tau));
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-9));
    CHECK(bound(s, f) <= 1.35 * scanned + 1.0);
  }
}

TEST_CASE("No point of an I, its flanges included, is worse than its stress points") {
  std::mt19937 random(24);
  const double h = 0.2;
  const double b = 0.1;
  const double tw = 0.006;
  const double tf = 0.01;
  const SectionProperties s = i_section(h, b, tw, tf, 0.0);
  for (int trial = 0; trial < 300; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    double scanned = 0.0;
    for (int k = -50; k <= 50; ++k) {
      const double share = k / 50.0;
      const double z = share * (h / 2 - tf);
      const double web = std::abs(f.V_z) *
                         (b * tf * (h - tf) / 2 + tw * ((h / 2 - tf) * (h / 2 - tf) - z * z) / 2) /
                         (s.I_y * tw);
      const double y = share * b / 2;
      const double flange = std::abs(f.V_y) * (b * b / 4 - y * y) / 2 / s.I_z +
                            std::abs(f.V_z) * std::max(0.0, b / 2 - std::max(std::abs(y), tw / 2)) *
                                (h - tf) / 2 / s.I_y;
      for (const double sign : {-1.0, 1.0}) {
        const double sigma_web = f.N / s.area + f.M_y * z / s.I_y + sign * f.M_z * tw / 2 / s.I_z;
        const double sigma_flange = f.N / s.area + sign * f.M_y * h / 2 / s.I_y + f.M_z * y / s.I_z;
        const double torsion = std::abs(f.T) / s.W_t;
        scanned = std::max({scanned,
                            von_mises(sigma_web, web + torsion),
                            von_mises(sigma_flange, flange + torsion)});
      }
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-9));
    CHECK(bound(s, f) <= 1.6 * scanned + 1.0);
  }
}

TEST_CASE("No point of a T is worse than its stress points") {
  std::mt19937 random(25);
  const double h = 0.1;
  const double b = 0.08;
  const double tw = 0.006;
  const double tf = 0.01;
  const SectionProperties s = tee(h, b, tw, tf, 0.0);
  const double top = s.z_shear + tf / 2;  // of the flange, from the centroid
  const double tip = h - top;
  for (int trial = 0; trial < 600; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    const double torsion = std::abs(f.T) / s.W_t;
    double scanned = 0.0;
    for (int k = 0; k <= 100; ++k) {
      const double z = -tip + (h - tf) * k / 100;
      const double stem = std::abs(f.V_z) * (tip * tip - z * z) / 2 / s.I_y;
      const double y = (k - 50) / 50.0 * b / 2;
      const double flange = std::abs(f.V_y) * (b * b / 4 - y * y) / 2 / s.I_z +
                            std::abs(f.V_z) * std::max(0.0, b / 2 - std::max(std::abs(y), tw / 2)) *
                                s.z_shear / s.I_y;
      for (const double sign : {-1.0, 1.0}) {
        const double sigma_stem = f.N / s.area + f.M_y * z / s.I_y + sign * f.M_z * tw / 2 / s.I_z;
        scanned = std::max(scanned, von_mises(sigma_stem, stem + torsion));
        for (const double face : {top, top - tf}) {
          const double sigma = f.N / s.area + sign * f.M_y * face / s.I_y + f.M_z * y / s.I_z;
          scanned = std::max(scanned, von_mises(sigma, flange + torsion));
        }
      }
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-9));
    CHECK(bound(s, f) <= 2.0 * scanned + 1.0);
  }
}

TEST_CASE("No point of a channel is worse than its stress points") {
  std::mt19937 random(26);
  const double h = 0.2;
  const double b = 0.08;
  const double tw = 0.006;
  const double tf = 0.011;
  const SectionProperties s = channel(h, b, tw, tf, 0.0, 0.0);
  const double c = -s.fibres[0].y;  // from the web's back
  for (int trial = 0; trial < 600; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    const double torsion = std::abs(f.T) / s.W_t;
    double scanned = 0.0;
    for (int k = 0; k <= 100; ++k) {
      const double z = (h / 2 - tf) * k / 100;
      const double face = h / 2 - tf;
      const double web = std::abs(f.V_z) *
                             (b * tf * (h - tf) / 2 + tw * (face * face - z * z) / 2) /
                             (s.I_y * tw) +
                         std::abs(f.V_y) * z * (c - tw / 2) / s.I_z;
      const double y = tw - c + (b - tw) * k / 100;  // along the flange
      const double reach = b - c;
      const double flange = std::abs(f.V_y) * std::abs(reach * reach - y * y) / 2 / s.I_z +
                            std::abs(f.V_z) * (reach - y) * (h - tf) / 2 / s.I_y;
      for (const double sign : {-1.0, 1.0}) {
        for (const double at : {-c, tw - c}) {
          const double sigma = f.N / s.area + sign * f.M_y * z / s.I_y + f.M_z * at / s.I_z;
          scanned = std::max(scanned, von_mises(sigma, web + torsion));
        }
        const double sigma = f.N / s.area + sign * f.M_y * h / 2 / s.I_y + f.M_z * y / s.I_z;
        scanned = std::max(scanned, von_mises(sigma, flange + torsion));
      }
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-9));
    CHECK(bound(s, f) <= 1.9 * scanned + 1.0);
  }
}

TEST_CASE("No point of an angle's legs is worse than its stress points") {
  std::mt19937 random(27);
  for (const auto& [h, b, t] : {std::array{0.1, 0.1, 0.002}, std::array{0.15, 0.06, 0.001}}) {
    const SectionProperties s = angle(h, b, t, 0.0, 0.0);
    const double D = s.I_y * s.I_z - s.I_yz * s.I_yz;
    for (int trial = 0; trial < 300; ++trial) {
      InternalForces f = random_forces(random, s, trial % 3 == 2);
      if (trial % 3 == 1) {
        f.V_y = std::exchange(f.V_z, 0.0);
        f.M_z = std::exchange(f.M_y, 0.0);
      }
      const double torsion = std::abs(f.T) / s.W_t;
      double scanned = 0.0;
      constexpr int strips = 200;
      for (const bool upright : {true, false}) {
        const double length = (upright ? h : b) - t / 2;
        double flow_z = 0.0;
        double flow_y = 0.0;
        for (int k = strips; k-- > 0;) {
          const double u = length * (k + 0.5) / strips;
          const double y = s.y_shear + (upright ? 0.0 : u);
          const double z = s.z_shear + (upright ? u : 0.0);
          const double of_y = (s.I_z * z - s.I_yz * y) / D;
          const double of_z = (s.I_y * y - s.I_yz * z) / D;
          flow_z += of_y * length / strips / 2;  // up to the strip's middle
          flow_y += of_z * length / strips / 2;
          for (const double sign : {-1.0, 1.0}) {
            const double sigma = f.N / s.area + f.M_y * of_y + sign * f.M_z * of_z;
            const double shear = std::abs(f.V_z * flow_z + f.V_y * flow_y) + torsion;
            scanned = std::max(scanned, von_mises(sigma, shear));
          }
          flow_z += of_y * length / strips / 2;
          flow_y += of_z * length / strips / 2;
        }
      }
      CHECK(bound(s, f) >= scanned * (1 - 1e-5));
      CHECK(bound(s, f) <= 2.0 * scanned + 1.0);
    }
  }
}

TEST_CASE("An angle bent along one leg bends askew and is worse than its modulus says") {
  const SectionProperties s = angle(0.1, 0.1, 0.01, 0.012, 0.006);
  const InternalForces f{.M_y = 1000.0};
  // About the principal axes at 45 degrees: half of the moment's root two about each.
  const double askew = 1000.0 / std::numbers::sqrt2;
  double expected = 0.0;
  for (const SectionPoint& p : s.fibres) {
    const double v = (p.z - p.y) / std::numbers::sqrt2;  // across u
    const double u = (p.y + p.z) / std::numbers::sqrt2;
    expected = std::max(expected, std::abs(askew * v / s.I_u() + askew * u / s.I_v()));
  }
  const StationStresses p = station_stresses(s, f);
  CHECK(p.bending == Approx(expected));
  CHECK(p.bending > 1.2 * 1000.0 / s.W_el_y);
  // Both moments together, with the signs that are worst: about u or v alone.
  const StationStresses both = station_stresses(s, {.M_y = 1000.0, .M_z = -1000.0});
  CHECK(both.bending == station_stresses(s, {.M_y = 1000.0, .M_z = 1000.0}).bending);
  CHECK(both.bending >= p.bending);
}

TEST_CASE("The tip of a T's stem is its worst fibre for bending in its plane") {
  const SectionProperties s = tee(0.1, 0.08, 0.006, 0.01, 0.007);
  CHECK(station_stresses(s, {.M_y = -500.0}).bending == Approx(500.0 / s.W_el_y));
  CHECK(station_stresses(s, {.M_z = 500.0}).bending == Approx(500.0 / s.W_el_z));
  // The flange's corner is nearer to the axis: less than the sum.
  const StationStresses both = station_stresses(s, {.M_y = 500.0, .M_z = 500.0});
  CHECK(both.bending < both.bending_y + both.bending_z);
}

TEST_CASE("No point of a hexagon is worse than its stress points") {
  std::mt19937 random(28);
  const SectionProperties s = solid_hexagon(0.03);
  const double half = s.width / 2;
  for (int trial = 0; trial < 200; ++trial) {
    const InternalForces f = random_forces(random, s, trial % 2 == 1);
    const double torsion = std::abs(f.T) / s.W_t;
    double scanned = 0.0;
    for (int i = 0; i <= 40; ++i) {
      for (int j = 0; j <= 40; ++j) {
        const double zeta = i / 40.0;
        const double y = j / 40.0 * half * (1 - zeta / 2);
        const double z = zeta * s.height / 2;
        const double eta = y / half;
        // V S / (I b) of both directions: trapezoids above z; beyond y, a rectangle and a triangle.
        const double d = s.height;
        const double g = (1.0 / 3 - zeta * zeta / 2 + zeta * zeta * zeta / 6) / (1 - zeta / 2);
        const double of_z = d * d / 4 * g / s.I_y;
        const double of_y = eta < 0.5 ? (7.0 / 72 * d * d - y * y / 2) / s.I_z
                                      : half * half * (1 - eta) * (1 + 2 * eta) / 6 / s.I_z;
        const double shear = std::hypot(f.V_z * of_z, f.V_y * of_y) + torsion;
        const double bending = std::abs(f.M_y) * z / s.I_y + std::abs(f.M_z) * y / s.I_z;
        scanned = std::max(scanned, von_mises(std::abs(f.N) / s.area + bending, shear));
      }
    }
    CHECK(bound(s, f) >= scanned * (1 - 1e-9));
    CHECK(bound(s, f) <= 1.7 * scanned + 1.0);
  }
}

TEST_CASE("No point of an elliptical tube's wall is worse than its stress points") {
  std::mt19937 random(29);
  for (const double width : {0.025, 0.1}) {
    const SectionProperties s = elliptical_tube(0.05, width, 0.0005, Forming::unknown);
    const double a = 0.05 / 2 - 0.00025;
    const double b = width / 2 - 0.00025;
    const auto flow = [](double along, double across, double cosine) {
      const double c2 = cosine * cosine;
      return cosine * (across + (along - across) * c2 / 3) *
             std::sqrt(along * along * c2 + across * across * (1 - c2)) /
             (along * c2 + across * (1 - c2)) / ((along + 2 * across) / 3);
    };
    for (int trial = 0; trial < 200; ++trial) {
      const InternalForces f = random_forces(random, s, trial % 2 == 1);
      double scanned = 0.0;
      const double v_z = f.V_z * s.W_pl_y / 2 / (s.I_y * 2 * s.wall);
      const double v_y = f.V_y * s.W_pl_z / 2 / (s.I_z * 2 * s.wall);
      for (int k = 0; k < 720; ++k) {
        const double phi = 2 * std::numbers::pi * k / 720;
        const double sigma =
            f.N / s.area + f.M_y / s.W_el_y * std::sin(phi) + f.M_z / s.W_el_z * std::cos(phi);
        const double shear = v_z * flow(a, b, std::cos(phi)) - v_y * flow(b, a, std::sin(phi));
        scanned = std::max(scanned, von_mises(sigma, std::abs(shear) + std::abs(f.T) / s.W_t));
      }
      CHECK(bound(s, f) >= scanned * (1 - 1e-9));
      CHECK(bound(s, f) <= 1.9 * scanned + 1.0);
    }
  }
}

TEST_CASE("Principal and von Mises stress have their special values") {
  CHECK(von_mises(100.0, 0.0) == 100.0);
  CHECK(von_mises(0.0, 100.0) == Approx(100.0 * std::sqrt(3.0)));
  CHECK(largest_principal(100.0, 0.0) == 100.0);
  CHECK(largest_principal(-100.0, 0.0) == 0.0);
  CHECK(largest_principal(0.0, 0.0) == 0.0);
  CHECK(largest_principal(0.0, 40.0) == Approx(40.0));
  // 80 and 30: 40 + root(1600 + 900) = 90; the other principal stress is -10.
  CHECK(largest_principal(80.0, 30.0) == Approx(90.0));
  CHECK(largest_principal(-80.0, 30.0) == Approx(10.0));
  // No cancellation under strong compression: tau^2 / |sigma|.
  CHECK(largest_principal(-1e9, 1.0) == Approx(1e-9).epsilon(1e-12));
}

}  // namespace bismar
