// SPDX-License-Identifier: MIT
// Bolts, pairs of metals and the hand formulas of shafts.
#include <bismar/mechanics/bolt.hpp>
#include <bismar/mechanics/corrosion.hpp>
#include <bismar/mechanics/member.hpp>
#include <bismar/mechanics/shaft.hpp>
#include <bismar/mechanics/stress.hpp>
#include <bismar/mechanics/torsion.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <limits>
#include <numbers>
#include <string>

namespace bismar {

namespace {

template <class Call>
std::string places(const Call& call) {
  try {
    call();
  } catch (const Error& error) {
    std::string text;
    for (const Fault& fault : error.faults()) {
      text += fault.where + ";";
    }
    return text;
  }
  return "none";
}

}  // namespace

TEST_CASE("Stress areas are those that the standard prints") {
  // ISO 898-1, coarse threads: M8 36.6, M20 245 mm2.
  CHECK(nominal_stress_area(8e-3, 1.25e-3) == Approx(36.6e-6).epsilon(1e-12));
  CHECK(nominal_stress_area(20e-3, 2.5e-3) == Approx(245e-6).epsilon(1e-12));
  CHECK(thread_stress_area(8e-3, 1.25e-3) == Approx(36.609e-6).epsilon(1e-4));
  CHECK(nominal_stress_area(3e-3, 0.5e-3) == Approx(5.03e-6).epsilon(1e-12));
}

TEST_CASE("Class 8.8 is stronger above 16 mm") {
  CHECK(bolt_strength(BoltClass::c8_8, 16e-3).proof_stress == 580e6);
  CHECK(bolt_strength(BoltClass::c8_8, 0.016000000001).proof_stress == 580e6);
  CHECK(bolt_strength(BoltClass::c8_8, 18e-3).proof_stress == 600e6);
  CHECK(bolt_strength(BoltClass::c8_8, 16e-3).proof == 640e6);
  for (const auto bolt_class : {BoltClass::c8_8, BoltClass::c10_9, BoltClass::c12_9}) {
    for (const double d : {10e-3, 20e-3}) {
      const BoltStrength s = bolt_strength(bolt_class, d);
      CHECK(s.proof_stress < s.proof);
      CHECK(s.proof < s.tensile);
    }
  }
}

TEST_CASE("Torque and preload undo each other") {
  const double F = preload_from_torque(50.0, torque_factor(BoltFinish::zinc_plated), 10e-3);
  CHECK(F == Approx(25e3).epsilon(1e-14));
  CHECK(torque_from_preload(0.2, F, 10e-3) == Approx(50.0).epsilon(1e-14));
  CHECK(bolt_stress(F, 58e-6) == Approx(431.0345e6).epsilon(1e-6));
  CHECK(preload_from_proof(0.75, 58e-6, 580e6) == Approx(25.23e3).epsilon(1e-12));
}

TEST_CASE("A bolt carries its preload and its share of the load until the joint opens") {
  const double C = joint_stiffness_share(1e8, 3e8);
  CHECK(C == 0.25);
  CHECK(joint_bolt_force(30e3, C, 0.0) == 30e3);
  CHECK(joint_bolt_force(30e3, C, 40e3) == 40e3);  // the members are just unloaded
  CHECK(places([C] { return joint_bolt_force(30e3, C, 40.1e3); }) == "outer_load;");
}

TEST_CASE("Bolts refuse what they cannot mean") {
  CHECK(places([] { return thread_stress_area(0.0, 0.0); }) == "diameter;pitch;");
  CHECK(places([] { return thread_stress_area(1e-3, 1e-3); }) == "pitch;");
  CHECK(places([] { return nominal_stress_area(-1.0, 1e-3); }) == "diameter;");
  CHECK(places([] { return designated_strength(0, 10); }) == "first;second;");
  CHECK(places([] { return bolt_strength(BoltClass::c8_8, 0.0); }) == "diameter;");
  CHECK(places([] { return proof_load(BoltClass::c8_8, 5e-3, 6e-3); }) == "pitch;");
  CHECK(places([] { return ultimate_load(BoltClass::c8_8, 5e-3, 6e-3); }) == "pitch;");
  CHECK(places([] { return preload_from_torque(0.0, 0.0, 0.0); }) ==
        "torque;torque_factor;diameter;");
  CHECK(places([] { return bolt_stress(-1.0, 0.0); }) == "force;stress_area;");
  CHECK(places([] { return preload_from_proof(1.1, 0.0, 0.0); }) ==
        "share;stress_area;proof_stress;");
  CHECK(places([] { return joint_stiffness_share(0.0, 0.0); }) ==
        "bolt_stiffness;member_stiffness;");
  CHECK(places([] { return joint_bolt_force(-1.0, 1.1, -1.0); }) == "preload;share;outer_load;");
}

TEST_CASE("Metals whose indices differ by just the limit may touch") {
  // 0.50 - 0.35 is a little more than 0.15 in binary.
  CHECK(0.50 - 0.35 > 0.15);
  CHECK(galvanic_pair_accepted(0.50, 0.35, GalvanicEnvironment::harsh));
  CHECK(galvanic_pair_accepted(0.35, 0.60, GalvanicEnvironment::normal));
  CHECK_FALSE(galvanic_pair_accepted(0.35, 0.61, GalvanicEnvironment::normal));
  CHECK(galvanic_pair_accepted(0.35, 0.85, GalvanicEnvironment::controlled));
  CHECK(places([] {
          const double nan = std::numeric_limits<double>::quiet_NaN();
          return galvanic_pair_accepted(nan, nan, GalvanicEnvironment::harsh);
        }) == "a;b;");
}

TEST_CASE("The groups of metals go from noble to base and say which values were seen") {
  double before = -1.0;
  int verified = 0;
  for (const AnodicGroup& group : anodic_groups()) {
    CHECK(group.index > before);
    before = group.index;
    verified += group.verified ? 1 : 0;
    CHECK(anodic_index(group.metals) == group.index);
  }
  CHECK(anodic_groups().size() == 19);
  CHECK(verified == 12);
  CHECK_FALSE(anodic_index("wood").has_value());
}

TEST_CASE("The largest shear stress is at most 15 % safer than von Mises") {
  CHECK(largest_shear_stress(100e6, 0.0) == 50e6);
  CHECK(largest_shear_stress(0.0, -30e6) == 30e6);
  CHECK(largest_shear_stress(60e6, 40e6) == Approx(50e6).epsilon(1e-14));
  for (const double tau : {0.0, 10e6, 50e6, 1e9}) {
    const double ratio = 2.0 * largest_shear_stress(80e6, tau) / von_mises(80e6, tau);
    CHECK(ratio >= 1.0 - 1e-14);
    CHECK(ratio <= 2.0 / std::sqrt(3.0) + 1e-14);
  }
  CHECK(places([] { return largest_shear_stress(std::numeric_limits<double>::infinity(), 0.0); }) ==
        "sigma;");
}

TEST_CASE("The torque estimate of a rectangle is near the series") {
  for (const double ratio : {1.0, 1.2, 1.5, 2.0, 3.0, 5.0, 10.0, 100.0}) {
    const double series = rectangle_torsion(ratio).k1 * ratio;
    CHECK(rectangle_torque_estimate(1.0, ratio, 1.0) == Approx(series).epsilon(0.045));
    CHECK(thin_strip_torque(1.0, ratio, 1.0) > series);
  }
  CHECK(rectangle_torque_estimate(1.0, 1.0, 1.0) ==
        Approx(rectangle_torsion(1.0).k1).epsilon(2e-3));
  CHECK(thin_strip_torque(1.0, 8.0, 1.0) / (8.0 * rectangle_torsion(8.0).k1) ==
        Approx(1.0855).epsilon(1e-3));
  CHECK(places([] { return thin_strip_torque(0.0, 0.0, 0.0); }) == "stress;long_side;short_side;");
  CHECK(places([] { return rectangle_torque_estimate(1.0, 1.0, 2.0); }) == "short_side;");
}

TEST_CASE("Mid-lines of tubes") {
  const MidLine square = rectangular_mid_line(12e-3, 22e-3, 2e-3);
  CHECK(square.enclosed_area == Approx(200e-6).epsilon(1e-14));
  CHECK(square.length == Approx(60e-3).epsilon(1e-14));
  const MidLine round = flat_oval_mid_line(10e-3, 0.0);
  CHECK(round.enclosed_area == Approx(std::numbers::pi * 1e-4).epsilon(1e-14));
  CHECK(round.length == Approx(2.0 * std::numbers::pi * 1e-2).epsilon(1e-14));
  CHECK(places([] { return rectangular_mid_line(1.0, 1.0, 1.0); }) == "wall;");
  CHECK(places([] { return flat_oval_mid_line(0.0, -1.0); }) == "radius;straight;");
}

}  // namespace bismar
