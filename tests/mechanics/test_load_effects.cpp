// SPDX-License-Identifier: MIT
#include <bismar/mechanics/load_effects.hpp>

#include <bismar/error.hpp>

#include "mechanics/hermite_beam.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

using test::BeamHold;
using test::HermiteBeam;

double largest(const LoadEffects& effects, double InternalForces::*component) {
  double value = 0.0;
  for (const Station& station : effects.stations) {
    value = std::max(value, std::abs(station.forces.*component));
  }
  return value;
}

struct Peaks {
  double deflection = 0.0;
  double rotation = 0.0;
  double moment = 0.0;
  double shear = 0.0;
};

Peaks peaks(const HermiteBeam& beam) {
  Peaks p;
  for (std::size_t i = 0; i < beam.x.size(); ++i) {
    p.deflection = std::max(p.deflection, std::abs(beam.deflection[i]));
    p.rotation = std::max(p.rotation, std::abs(beam.rotation[i]));
    p.moment = std::max({p.moment, std::abs(beam.moment_left[i]), std::abs(beam.moment_right[i])});
    p.shear = std::max({p.shear, std::abs(beam.shear_left[i]), std::abs(beam.shear_right[i])});
  }
  return p;
}

std::vector<std::string> places(const LoadCase& load_case, double length) {
  std::vector<std::string> found;
  try {
    (void)reduce(load_case, length);
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      found.push_back(fault.where);
    }
  }
  return found;
}

}  // namespace

TEST_CASE("Random beams agree with cubic finite elements") {
  std::mt19937 random(20240611);
  for (int trial = 0; trial < 60; ++trial) {
    const double length = 0.2 + 0.1 * (trial % 13);
    const BeamHold hold = test::random_hold(random, length);
    const LoadCase load_case = test::held(hold, test::random_loads(random, length));
    const LoadEffects effects = reduce(load_case, length);
    const HermiteBeam beam(load_case.loads, Along::z, hold, length, 120);
    const Peaks p = peaks(beam);
    INFO("trial " << trial << ", support " << static_cast<int>(hold.support));
    // Nodes miss a peak between them by at most a small share; they never exceed it.
    CHECK(effects.deflection_z >= p.deflection * (1.0 - 1e-6));
    CHECK(effects.deflection_z <= p.deflection * 1.002);
    CHECK(effects.rotation_z >= p.rotation * (1.0 - 1e-6));
    CHECK(effects.rotation_z <= p.rotation * 1.002);
    CHECK(largest(effects, &InternalForces::M_y) >= p.moment * (1.0 - 1e-6));
    CHECK(largest(effects, &InternalForces::M_y) <= p.moment * 1.002);
    CHECK(largest(effects, &InternalForces::V_z) == Approx(p.shear).epsilon(5e-3).margin(1e-3));
    CHECK(effects.deflection_y == 0.0);
  }
}

TEST_CASE("No place of a member of any weight, bent in two planes, is worse than its stations") {
  std::mt19937 random(7);
  std::uniform_real_distribution<double> weight(0.1, 10.0);
  std::uniform_real_distribution<double> heavy(0.0, 3000.0);
  for (int trial = 0; trial < 90; ++trial) {
    const double length = 1.0;
    const BeamHold hold_z = test::random_hold(random, length);
    BeamHold hold_y = hold_z;
    if (!hold_z.second_support) {
      hold_y = test::random_hold(random, length);
      hold_y.second_support.reset();
    }
    LoadCase load_case = test::held(hold_z, test::random_loads(random, length));
    load_case.support_y = hold_y.support;
    for (Load load : test::random_loads(random, length)) {
      load.along = Along::y;
      load_case.loads.push_back(load);
    }
    load_case.acceleration_z = trial % 3 == 0 ? 0.0 : 9.81;
    load_case.acceleration_y = trial % 5 == 1 ? -5.0 : 0.0;
    const LoadEffects effects = reduce(load_case, length);
    std::vector<Load> mass = load_case.loads;
    for (Load& load : mass) {
      load.value = load.value_to = 0.0;  // keeps the mesh
    }
    for (const Along along : {Along::z, Along::y}) {
      mass.push_back(distributed(1.0, 1.0, 0.0, length, along));
    }
    const HermiteBeam z(load_case.loads, Along::z, hold_z, length, 120);
    const HermiteBeam y(load_case.loads, Along::y, hold_y, length, 120);
    const HermiteBeam own_z(mass, Along::z, hold_z, length, 120);
    const HermiteBeam own_y(mass, Along::y, hold_y, length, 120);
    REQUIRE(z.x == y.x);
    REQUIRE(z.x == own_z.x);
    for (int combination = 0; combination < 5; ++combination) {
      const double a = weight(random);
      const double b = weight(random);
      const double q = combination == 0 ? 0.0 : heavy(random);
      const double q_z = load_case.acceleration_z == 0.0 ? 0.0 : q;
      const double q_y = load_case.acceleration_y == 0.0 ? 0.0 : q / 2.0;
      for (const bool linear : {true, false}) {
        const auto stress = [&](double My, double Mz, double own_My, double own_Mz) {
          const double y_part = a * (std::abs(My) + q_z * std::abs(own_My));
          const double z_part = b * (std::abs(Mz) + q_y * std::abs(own_Mz));
          return linear ? y_part + z_part : std::hypot(y_part, z_part);
        };
        double by_nodes = 0.0;
        for (std::size_t i = 0; i + 1 < z.x.size(); ++i) {
          by_nodes = std::max({by_nodes,
                               stress(z.moment_right[i],
                                      y.moment_right[i],
                                      own_z.moment_right[i],
                                      own_y.moment_right[i]),
                               stress(z.moment_left[i + 1],
                                      y.moment_left[i + 1],
                                      own_z.moment_left[i + 1],
                                      own_y.moment_left[i + 1])});
        }
        double by_stations = 0.0;
        for (const Station& s : effects.stations) {
          by_stations =
              std::max(by_stations, stress(s.forces.M_y, s.forces.M_z, s.own.M_y, s.own.M_z));
        }
        INFO("trial " << trial << " weights " << a << " " << b << " " << q);
        CHECK(by_stations >= by_nodes * (1.0 - 1e-6));
        CHECK(by_stations <= by_nodes * 1.01);
      }
    }
  }
}

TEST_CASE("A cantilever with a tip load is reduced to its root") {
  const LoadEffects effects = reduce(cantilever({force(655.0, 0.3)}), 0.3);
  REQUIRE(effects.stations.size() == 1);
  CHECK(effects.stations[0].x == 0.0);
  CHECK(effects.stations[0].forces.V_z == Approx(655.0));
  CHECK(effects.stations[0].forces.M_y == Approx(196.5));
  CHECK(effects.deflection_z == Approx(655.0 * 0.3 * 0.3 * 0.3 / 3.0));
  CHECK(effects.bends);
  CHECK_FALSE(effects.twists);
  CHECK(effects.compression == 0.0);
  CHECK(effects.buckling_length_y == Approx(0.6));
}

TEST_CASE("Several loads add up") {
  const Load a = force(100.0, 0.4);
  const Load b = distributed(50.0, 200.0, 0.1, 0.8);
  const double wa = reduce(cantilever({a}), 1.0).deflection_z;
  const double wb = reduce(cantilever({b}), 1.0).deflection_z;
  CHECK(reduce(cantilever({a, b}), 1.0).deflection_z == Approx(wa + wb));
}

TEST_CASE("A moment turns a cantilever's free end along its axis") {
  // M L^2 / 2 of a tip moment adds to F L^3 / 3 of a tip force.
  CHECK(reduce(cantilever({force(3.0, 1.0), moment(2.0, 1.0)}), 1.0).deflection_z ==
        Approx(2.0).epsilon(1e-12));
}

TEST_CASE("Opposite loads that cancel leave an unbent member") {
  const LoadEffects effects =
      reduce(pinned_pinned({force(1.0, 0.3), force(-1.0, 0.3), axial(5.0)}), 1.0);
  CHECK_FALSE(effects.bends);
  CHECK(effects.deflection_z == 0.0);
  REQUIRE(effects.stations.size() == 1);
  CHECK(effects.stations[0].forces.N == 5.0);
  CHECK(effects.tension == 5.0);
}

TEST_CASE("The ends of a pinned member are free of moment to the last bit") {
  const LoadEffects effects = reduce(
      pinned_pinned({force(0.1, 0.1), force(0.7, 0.77), distributed(0.3, 0.9, 0.0, 1.1)}), 1.1);
  for (const Station& station : effects.stations) {
    if (station.x == 0.0 || station.x == 1.1) {
      CHECK(station.forces.M_y == 0.0);
    }
  }
}

TEST_CASE("Torque is held at the root and twist is the largest along the member") {
  // 10 N m at the tip against -30 N m at half length: -20 in the first half, +10 in the second;
  // G I_t phi runs 0, -10, -5.
  const LoadEffects effects = reduce(cantilever({torque(10.0, 1.0), torque(-30.0, 0.5)}), 1.0);
  CHECK(effects.twist == Approx(10.0));
  CHECK(effects.twists);
  CHECK(largest(effects, &InternalForces::T) == Approx(20.0));
  REQUIRE(effects.stations.size() == 1);
}

TEST_CASE("Both sides of a jump are looked at") {
  // A moment at mid-span of a pinned beam: +M/2 and -M/2 beside it.
  const LoadEffects effects = reduce(pinned_pinned({moment(10.0, 0.5)}), 1.0);
  CHECK(largest(effects, &InternalForces::M_y) == Approx(5.0));
}

TEST_CASE("Axial force and each axis have their own supports and lengths") {
  LoadCase load_case = pinned_pinned({axial(-2000.0)});
  load_case.support_y = Support::cantilever;
  const LoadEffects effects = reduce(load_case, 1.5);
  CHECK(effects.compression == 2000.0);
  CHECK(effects.tension == 0.0);
  CHECK(effects.buckling_length_y == Approx(1.5));
  CHECK(effects.buckling_length_z == Approx(3.0));
}

TEST_CASE("Internal forces given directly are one more section") {
  LoadCase load_case;
  load_case.direct = InternalForces{.N = -5.0, .V_z = 1.0, .M_z = 2.0, .T = -3.0};
  LoadEffects effects = reduce(load_case, 1.0);
  REQUIRE(effects.stations.size() == 1);
  CHECK(effects.compression == 5.0);
  CHECK(effects.bends);
  CHECK(effects.twists);
  CHECK(effects.twist == 0.0);
  CHECK(effects.deflection_y == 0.0);
  load_case.loads = {force(1.0, 1.0)};
  effects = reduce(load_case, 1.0);
  CHECK(effects.stations.size() == 2);
}

TEST_CASE("Stations with different axial force are both kept") {
  LoadCase load_case = cantilever({force(1.0, 1.0), axial(1.0)});
  load_case.direct = InternalForces{.N = 2.0, .V_z = 5.0, .M_y = 5.0};
  CHECK(reduce(load_case, 1.0).stations.size() == 2);
}

TEST_CASE("Every fault of a load case is reported at once, with its place") {
  using Places = std::vector<std::string>;
  const double nan = std::numeric_limits<double>::quiet_NaN();
  LoadCase load_case = cantilever({force(nan, 0.1),
                                   force(1.0, 1.1),
                                   distributed(1.0, nan, 0.5, 0.5),
                                   torque(1.0, -0.1),
                                   axial(nan)});
  load_case.direct = InternalForces{.V_y = nan};
  CHECK(places(load_case, 1.0) == Places{"/loads/0/value",
                                         "/loads/1/at",
                                         "/loads/2/value_to",
                                         "/loads/2/to",
                                         "/loads/3/at",
                                         "/loads/4/value",
                                         "/direct/V_y"});
  CHECK(places(cantilever({}), 0.0) == Places{"/length", "/loads"});
  CHECK(places(cantilever({force(1.0, 0.0)}), nan) == Places{"/length"});
  try {
    (void)reduce(cantilever({force(1.0, 2.5)}), 2.0);
  } catch (const Error& error) {
    CHECK(std::string(error.what()) ==
          "/loads/0/at: Found 2.5; it must be a place on the member, between 0 and its length.");
    CHECK(error.faults()[0].code == Code::out_of_range);
  }
}

TEST_CASE("A station may miss the end by rounding") {
  const double length = 0.3;
  const double just_beyond = std::nextafter(length, 1.0);
  CHECK(reduce(cantilever({force(1.0, just_beyond)}), length).deflection_z ==
        Approx(0.009).epsilon(1e-12));
}

TEST_CASE("A preload of 17,400 lbf on a half-inch bolt with K = 0.2 needs about 197 N m") {
  // Common practice, no source: 1,740 lbf in; at 0.3 m about 650 N, with factor 1.5 about 980 N.
  constexpr double pound_force = 4.4482216152605;
  constexpr double inch = 0.0254;
  const double preload = 17400.0 * pound_force;
  const double tightening = torque_from_preload(0.2, preload, 0.5 * inch);
  CHECK(tightening / (pound_force * inch) == Approx(1740.0));
  CHECK(tightening == Approx(197.0).epsilon(0.003));
  const double hand = lever_force_from_preload(0.2, preload, 0.5 * inch, 0.3);
  CHECK(hand == Approx(650.0).epsilon(0.01));
  CHECK(1.5 * hand == Approx(980.0).epsilon(0.01));
  CHECK_THROWS_AS(torque_from_preload(0.0, 1.0, 1.0), Error);
  CHECK_THROWS_AS(lever_force_from_preload(0.2, 1.0, 1.0, -1.0), Error);
}

}  // namespace bismar
