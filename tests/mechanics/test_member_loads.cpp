// SPDX-License-Identifier: MIT
// What a load case brings besides loads: supports, own mass, moment shapes, effective lengths.
#include <bismar/mechanics/load_effects.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <vector>

namespace bismar {

namespace {

std::vector<Fault> faults_of(const LoadCase& load_case, double length) {
  try {
    (void)reduce(load_case, length);
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

std::vector<std::string> places(const LoadCase& load_case, double length) {
  std::vector<std::string> found;
  for (const Fault& fault : faults_of(load_case, length)) {
    found.push_back(fault.where);
  }
  return found;
}

LoadCase own_mass_alone(Support support) {
  LoadCase load_case;
  load_case.support_z = load_case.support_y = support;
  load_case.acceleration_z = 9.80665;
  return load_case;
}

}  // namespace

TEST_CASE("Each short form holds both planes alike") {
  CHECK(fixed_pinned({force(1.0, 0.5)}, "a").name == "a");
  CHECK(fixed_pinned({}).support_z == Support::fixed_pinned);
  CHECK(fixed_pinned({}).support_y == Support::fixed_pinned);
  CHECK(fixed_fixed({}).support_z == Support::fixed_fixed);
  CHECK(fixed_fixed({}).support_y == Support::fixed_fixed);
}

TEST_CASE("Effective length factors are those of the theory") {
  CHECK(effective_length_factor(Support::cantilever) == 2.0);
  CHECK(effective_length_factor(Support::pinned_pinned) == 1.0);
  CHECK(effective_length_factor(Support::fixed_pinned) == Approx(0.69915566).epsilon(1e-8));
  CHECK(effective_length_factor(Support::fixed_fixed) == 0.5);
  // tan x = x
  const double x = 3.14159265358979323846 / effective_length_factor(Support::fixed_pinned);
  CHECK(std::tan(x) == Approx(x).epsilon(1e-13));
  CHECK(reduce(fixed_fixed({axial(-1.0)}), 3.0).buckling_length_y == Approx(1.5));
}

TEST_CASE("An overhanging column buckles between its span and a cantilever of its length") {
  const double pi = 3.14159265358979323846;
  // Support at mid-length of two pins: alpha = beta, so that tan x = 2 x, x = 1.165561.
  const double half = effective_length_factor(Support::pinned_pinned, 0.5);
  CHECK(pi / half / 2.0 == Approx(1.16556119).epsilon(1e-8));
  // Fixed and pinned at mid-length: 3/2 sin 2x - 2 sin x - x cos 2x = 0.
  const double y = pi / effective_length_factor(Support::fixed_pinned, 0.5) / 2.0;
  CHECK(std::abs(1.5 * std::sin(2.0 * y) - 2.0 * std::sin(y) - y * std::cos(2.0 * y)) < 1e-12);
  for (const Support support : {Support::pinned_pinned, Support::fixed_pinned}) {
    double before = 2.0;
    for (int i = 1; i <= 2000; ++i) {
      const double K = effective_length_factor(support, i / 2000.0);
      INFO("span " << i / 2000.0);
      CHECK(K <= before);
      before = K;
    }
    CHECK(before == effective_length_factor(support));
    CHECK(effective_length_factor(support, 1e-6) == Approx(2.0).epsilon(1e-5));
    CHECK(effective_length_factor(support, 1.0 - 1e-9) ==
          Approx(effective_length_factor(support)).epsilon(1e-6));
  }
  LoadCase load_case = pinned_pinned({axial(-1.0)});
  load_case.second_support = 0.6;
  CHECK(reduce(load_case, 1.2).buckling_length_y == Approx(1.2 * half));
  CHECK_THROWS_AS(effective_length_factor(Support::pinned_pinned, 0.0), Error);
  CHECK_THROWS_AS(effective_length_factor(Support::pinned_pinned, 1.1), Error);
  CHECK_THROWS_AS(effective_length_factor(Support::cantilever, 0.5), Error);
  CHECK_THROWS_AS(
      effective_length_factor(Support::fixed_fixed, std::numeric_limits<double>::quiet_NaN()),
      Error);
}

TEST_CASE("A load case may consist of its own mass alone") {
  const double L = 2.0;
  struct Row {
    Support support;
    double M, V, deflection, shear, rotation;
  };
  // Beam tables: q L^2 / 2, 8, 8, 12 and q L^4 / 8, 5/384, 1/184.6, 1/384; slopes q L^3 / 6, 24,
  // 48 (at the pin), 72 sqrt 3; shear q L^2 / 2, 8, then as a slender beam's.
  const std::vector<Row> rows = {
      {Support::cantilever, 0.5, 1.0, 0.125, 0.5, 1.0 / 6.0},
      {Support::pinned_pinned, 0.125, 0.5, 5.0 / 384.0, 0.125, 1.0 / 24.0},
      {Support::fixed_pinned, 0.125, 0.625, 0.005416, std::nan(""), 1.0 / 48.0},
      {Support::fixed_fixed, 1.0 / 12.0, 0.5, 1.0 / 384.0, 0.125, 1.0 / (72.0 * std::sqrt(3.0))}};
  for (const Row& row : rows) {
    const LoadEffects effects = reduce(own_mass_alone(row.support), L);
    double M = 0.0;
    double V = 0.0;
    for (const Station& station : effects.stations) {
      CHECK(station.forces.M_y == 0.0);
      CHECK(station.own.M_z == 0.0);
      M = std::max(M, station.own.M_y);
      V = std::max(V, station.own.V_z);
    }
    INFO("support " << static_cast<int>(row.support));
    CHECK(M == Approx(row.M * L * L));
    CHECK(V == Approx(row.V * L));
    CHECK(effects.own_z.deflection == Approx(row.deflection * std::pow(L, 4)).epsilon(1e-4));
    CHECK(effects.own_z.rotation == Approx(row.rotation * std::pow(L, 3)));
    if (!std::isnan(row.shear)) {
      CHECK(effects.own_z.shear_deflection == Approx(row.shear * L * L));
    }
    CHECK(effects.own_y.deflection == effects.own_z.deflection);
    CHECK(effects.bends);
    CHECK(effects.deflection_z == 0.0);
    CHECK(effects.moment_y.largest == 0.0);
    CHECK_FALSE(effects.moment_y.end_ratio.has_value());
  }
}

TEST_CASE("Where own mass and load trade, stations stand for a member of any weight") {
  // Load near the left support of two pins: its moment falls where that of own mass rises.
  LoadCase load_case = pinned_pinned({force(1.0, 0.2)});
  CHECK(reduce(load_case, 1.0).stations.size() == 1);
  load_case.acceleration_z = 9.81;
  const LoadEffects effects = reduce(load_case, 1.0);
  CHECK(effects.stations.size() > 8);
  CHECK(effects.stations.size() < 16);
  for (const double q : {0.0, 0.1, 1.0, 3.0, 10.0, 1000.0}) {
    double largest = 0.0;
    for (const Station& station : effects.stations) {
      largest = std::max(largest, std::abs(station.forces.M_y) + q * station.own.M_y);
    }
    // Peak of 0.2 (1 - x) + q x (1 - x) / 2 on [0.2, 1].
    const double x = std::max(0.2, 0.5 - 0.2 / q);
    const double exact = 0.2 * (1.0 - x) + q * x * (1.0 - x) / 2.0;
    INFO("q " << q);
    CHECK(largest >= exact * (1.0 - 1e-12));
    CHECK(largest <= exact * 1.005);
  }
}

TEST_CASE("A change of temperature alone is a load case with one idle station") {
  LoadCase load_case;
  load_case.temperature_change = -40.0;
  load_case.restrained = true;
  const LoadEffects effects = reduce(load_case, 1.0);
  CHECK(effects.temperature_change == 40.0);
  CHECK(effects.restrained);
  REQUIRE(effects.stations.size() == 1);
  CHECK_FALSE(effects.bends);
}

TEST_CASE("What a load case states is handed on") {
  LoadCase load_case = fixed_pinned({force(1.0, 0.5)});
  load_case.support_y = Support::fixed_fixed;
  load_case.eccentricity = 0.003;
  load_case.acceleration_y = -2.0;
  load_case.fatigue = FatigueLoading{.cycles = 1e5, .stress_ratio = 0.1};
  const LoadEffects effects = reduce(load_case, 1.0);
  CHECK(effects.support_z == Support::fixed_pinned);
  CHECK(effects.support_y == Support::fixed_fixed);
  CHECK(effects.eccentricity == 0.003);
  CHECK(effects.acceleration_y == -2.0);
  CHECK(effects.fatigue->cycles == 1e5);
  CHECK(effects.buckling_length_y == Approx(0.69915566));
  CHECK(effects.buckling_length_z == Approx(0.5));
}

TEST_CASE("The moment shape has the peak, signed quarters and the ratio of linear ends") {
  // Uniform load on two pins: q L^2 / 8 and 3/4 of it beside; moments are negative there.
  MomentShape shape = reduce(pinned_pinned({distributed(8.0, 8.0, 0.0, 1.0)}), 1.0).moment_y;
  CHECK(shape.largest == Approx(1.0));
  CHECK(shape.quarters[0] == Approx(-0.75));
  CHECK(shape.quarters[1] == Approx(-1.0));
  CHECK(shape.quarters[2] == Approx(-0.75));
  CHECK_FALSE(shape.end_ratio.has_value());
  // One end moment: linear to zero.
  shape = reduce(pinned_pinned({moment(2.0, 1.0)}), 1.0).moment_y;
  CHECK(shape.largest == Approx(2.0));
  CHECK(shape.end_ratio == 0.0);
  CHECK(shape.quarters[2] == Approx(1.5));
  // Both ends bent the same way: uniform; opposite ways: -1/2.
  shape = reduce(pinned_pinned({moment(2.0, 1.0), moment(-2.0, 0.0)}), 1.0).moment_y;
  CHECK(*shape.end_ratio == Approx(1.0));
  shape = reduce(pinned_pinned({moment(2.0, 1.0), moment(1.0, 0.0)}), 1.0).moment_y;
  CHECK(*shape.end_ratio == Approx(-0.5));
  // A tip load is linear to zero, a force between is not linear.
  CHECK(reduce(cantilever({force(1.0, 1.0)}), 1.0).moment_y.end_ratio == 0.0);
  CHECK_FALSE(reduce(cantilever({force(1.0, 0.5)}), 1.0).moment_y.end_ratio.has_value());
  CHECK_FALSE(reduce(pinned_pinned({moment(1.0, 0.5)}), 1.0).moment_y.end_ratio.has_value());
  // The moment of a fixed-pinned member under an end moment runs from -1/2.
  CHECK(*reduce(fixed_pinned({moment(1.0, 1.0)}), 1.0).moment_y.end_ratio == Approx(-0.5));
  // Loads of one plane only.
  CHECK(reduce(cantilever({force(1.0, 1.0)}), 1.0).moment_z.largest == 0.0);
}

TEST_CASE("Moments given directly are uniform over the length") {
  LoadCase load_case = pinned_pinned({force(4.0, 0.5)});
  load_case.direct = InternalForces{.M_y = -0.5, .M_z = 3.0};
  const LoadEffects effects = reduce(load_case, 1.0);
  CHECK(effects.moment_y.largest == Approx(1.0));
  // The load of the plane is there still.
  CHECK_FALSE(effects.moment_y.end_ratio.has_value());
  CHECK(effects.moment_y.quarters[0] == effects.moment_y.largest);
  CHECK(effects.moment_z.end_ratio == 1.0);
  CHECK(effects.moment_z.largest == 3.0);
  CHECK(effects.moment_z.quarters[0] == 3.0);
}

TEST_CASE("A second support is for members with a pin there, and stands on the member") {
  using Places = std::vector<std::string>;
  LoadCase load_case = pinned_pinned({force(1.0, 0.5)});
  load_case.second_support = 1.5;
  CHECK(places(load_case, 1.0) == Places{"/second_support"});
  load_case.second_support = 0.0;
  CHECK(places(load_case, 1.0) == Places{"/second_support"});
  load_case.second_support = 1e-7;
  CHECK(places(load_case, 1.0) == Places{"/second_support"});
  load_case.second_support = std::nextafter(1.0, 2.0);
  CHECK(places(load_case, 1.0).empty());
  load_case.second_support = 0.5;
  CHECK(places(load_case, 1.0).empty());
  load_case.support_y = Support::fixed_fixed;
  REQUIRE(places(load_case, 1.0) == Places{"/second_support"});
  CHECK(faults_of(load_case, 1.0)[0].code == Code::conflict);
  load_case.support_z = load_case.support_y = Support::cantilever;
  CHECK(places(load_case, 1.0) == Places{"/second_support"});
}

TEST_CASE("Faults of accelerations, heat and fatigue have their places") {
  using Places = std::vector<std::string>;
  const double nan = std::numeric_limits<double>::quiet_NaN();
  LoadCase load_case = cantilever({force(1.0, 0.5)});
  load_case.acceleration_z = nan;
  load_case.acceleration_y = std::numeric_limits<double>::infinity();
  load_case.eccentricity = -1.0;
  load_case.temperature_change = nan;
  load_case.fatigue = FatigueLoading{.cycles = 0.5, .stress_ratio = 1.5};
  CHECK(places(load_case, 1.0) == Places{"/acceleration_z",
                                         "/acceleration_y",
                                         "/eccentricity",
                                         "/temperature_change",
                                         "/fatigue/cycles",
                                         "/fatigue/stress_ratio"});
  load_case = cantilever({force(1.0, 0.5)});
  load_case.fatigue = FatigueLoading{.cycles = nan, .stress_ratio = nan};
  CHECK(places(load_case, 1.0) == Places{"/fatigue/cycles", "/fatigue/stress_ratio"});
  load_case.fatigue = FatigueLoading{.cycles = 1.0, .stress_ratio = 1.0};
  CHECK(places(load_case, 1.0).empty());
  CHECK(places(LoadCase{}, 1.0) == Places{"/loads"});
}

}  // namespace bismar
