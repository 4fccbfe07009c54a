// SPDX-License-Identifier: MIT
// The points that limit states look at must bound every point of the section.
#include "mechanics/stress_points.hpp"

#include <bismar/mechanics/stress.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <random>

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
