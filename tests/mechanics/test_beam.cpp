// SPDX-License-Identifier: MIT
#include <bismar/mechanics/beam.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include "mechanics/hermite_beam.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

using test::BeamHold;
using test::HermiteBeam;

double largest(const std::vector<double>& values) {
  double value = 0.0;
  for (const double v : values) {
    value = std::max(value, std::abs(v));
  }
  return value;
}

/// Largest difference of the two over `size` or the largest value.
double difference(const std::vector<double>& a, const std::vector<double>& b, double size) {
  double value = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i) {
    value = std::max(value, std::abs(a[i] - b[i]));
  }
  return value / std::max(largest(a), size);
}

/// Sum of the loads as forces.
double load_size(const std::vector<Load>& loads, double length) {
  double size = 0.0;
  for (const Load& load : loads) {
    size += load.kind == Load::Kind::force ? std::abs(load.value)
            : load.kind == Load::Kind::moment
                ? std::abs(load.value) / length
                : (std::abs(load.value) + std::abs(load.value_to)) * (load.to - load.at);
  }
  return size;
}

std::vector<std::string> places(const LoadCase& load_case, double length, BeamStiffness stiffness) {
  std::vector<std::string> found;
  try {
    (void)BeamResponse(load_case, Along::z, length, stiffness);
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      found.push_back(fault.where);
    }
  }
  return found;
}

}  // namespace

TEST_CASE("Every place of a random beam agrees with finite elements, shear flexible or not") {
  std::mt19937 random(91);
  std::uniform_real_distribution<double> shear(0.0, 0.2);
  for (int trial = 0; trial < 200; ++trial) {
    const double length = 0.5 + 0.1 * (trial % 13);
    BeamHold hold = test::random_hold(random, length);
    hold.shear_flexibility = trial % 2 == 0 ? 0.0 : shear(random) * length * length;
    const std::vector<Load> loads = test::random_loads(random, length);
    const HermiteBeam mesh(loads, Along::z, hold, length, 40);
    constexpr double EI = 7.0;
    BeamStiffness stiffness = {.bending = EI};
    if (hold.shear_flexibility > 0.0) {
      stiffness.shear = EI / hold.shear_flexibility;
    }
    const BeamResponse beam(test::held(hold, loads), Along::z, length, stiffness);
    std::vector<double> w;
    std::vector<double> theta;
    std::vector<double> M;
    std::vector<double> Q;
    for (const double place : mesh.x) {
      const double x = std::min(place, length);
      w.push_back(EI * beam.deflection(x));
      theta.push_back(EI * beam.rotation(x));
      M.push_back(beam.moment(x));
      Q.push_back(beam.shear(x));
    }
    // Nodes of the mesh miss the stations by rounding: jumps lie on either side.
    const auto nearer = [](const std::vector<double>& left,
                           const std::vector<double>& right,
                           const std::vector<double>& found) {
      std::vector<double> result = right;
      for (std::size_t i = 1; i < found.size(); ++i) {
        if (std::abs(left[i] - found[i]) < std::abs(right[i] - found[i])) {
          result[i] = left[i];
        }
      }
      return result;
    };
    INFO("trial " << trial << ", support " << static_cast<int>(hold.support));
    const double size = load_size(loads, length);
    CHECK(difference(mesh.deflection, w, 0.0) < 1e-9);
    CHECK(difference(mesh.rotation, theta, 0.0) < 1e-9);
    CHECK(difference(nearer(mesh.moment_left, mesh.moment_right, M), M, size * length) < 1e-9);
    CHECK(difference(nearer(mesh.shear_left, mesh.shear_right, Q), Q, size) < 1e-9);
  }
}

TEST_CASE("Loads and reactions of a random beam are in equilibrium") {
  std::mt19937 random(92);
  for (int trial = 0; trial < 100; ++trial) {
    const double length = 1.0 + 0.1 * (trial % 7);
    const BeamHold hold = test::random_hold(random, length);
    const std::vector<Load> loads = test::random_loads(random, length);
    const BeamResponse beam(test::held(hold, loads), Along::z, length, {.bending = 1.0});
    double force = 0.0;
    double moment = 0.0;  // about x = 0
    const double size = load_size(loads, length);
    for (const Load& load : loads) {
      if (load.kind == Load::Kind::force) {
        force += load.value;
        moment += load.value * load.at;
      } else if (load.kind == Load::Kind::moment) {
        moment += load.value;
      } else {
        const double l = load.to - load.at;
        force += (load.value + load.value_to) / 2.0 * l;
        moment += load.value * l * (load.at + l / 2.0) +
                  (load.value_to - load.value) / 2.0 * l * (load.at + 2.0 * l / 3.0);
      }
    }
    for (const BeamReaction& reaction : beam.reactions()) {
      force += reaction.force;
      moment += reaction.moment + reaction.force * reaction.x;
    }
    INFO("trial " << trial);
    CHECK(beam.reactions().size() == (hold.support == Support::cantilever ? 1 : 2));
    CHECK(std::abs(force) < 1e-11 * size);
    CHECK(std::abs(moment) < 1e-11 * size * length);
    if (hold.support == Support::pinned_pinned) {
      CHECK(beam.reactions()[0].moment == 0.0);
      CHECK(beam.reactions()[1].moment == 0.0);
    }
  }
}

TEST_CASE("Extremes of a beam bound every place and are met") {
  std::mt19937 random(93);
  for (int trial = 0; trial < 60; ++trial) {
    const double length = 1.0;
    const BeamHold hold = test::random_hold(random, length);
    const BeamResponse beam(
        test::held(hold, test::random_loads(random, length)), Along::z, length, {.bending = 1.0});
    const auto holds = [&](const BeamRange& range, auto value) {
      const double slack = 1e-12 * std::abs(range.largest().value);
      for (int i = 0; i <= 400; ++i) {
        const double v = value(i / 400.0);
        if (v > range.greatest.value + slack || v < range.least.value - slack) {
          return false;
        }
      }
      // Continuous quantities: met at their places.
      return true;
    };
    INFO("trial " << trial);
    const BeamRange w = beam.deflections();
    CHECK(holds(w, [&](double x) { return beam.deflection(x); }));
    CHECK(holds(beam.rotations(), [&](double x) { return beam.rotation(x); }));
    CHECK(holds(beam.moments(), [&](double x) { return beam.moment(x); }));
    CHECK(holds(beam.shears(), [&](double x) { return beam.shear(x); }));
    CHECK(beam.deflection(w.greatest.x) == Approx(w.greatest.value).epsilon(1e-12));
    CHECK(beam.deflection(w.least.x) == Approx(w.least.value).epsilon(1e-12));
  }
}

TEST_CASE("The reduction has the extremes of the beam without shear") {
  std::mt19937 random(94);
  for (int trial = 0; trial < 100; ++trial) {
    const double length = 0.4 + 0.1 * (trial % 9);
    const BeamHold hold = test::random_hold(random, length);
    const LoadCase load_case = test::held(hold, test::random_loads(random, length));
    const BeamResponse beam(load_case, Along::z, length, {.bending = 1.0});
    const LoadEffects effects = reduce(load_case, length);
    double M = 0.0;
    double Q = 0.0;
    for (const Station& station : effects.stations) {
      M = std::max(M, std::abs(station.forces.M_y));
      Q = std::max(Q, std::abs(station.forces.V_z));
    }
    INFO("trial " << trial);
    CHECK(effects.deflection_z ==
          Approx(std::abs(beam.deflections().largest().value)).epsilon(1e-12));
    CHECK(effects.rotation_z == Approx(std::abs(beam.rotations().largest().value)).epsilon(1e-12));
    CHECK(effects.moment_y.largest ==
          Approx(std::abs(beam.moments().largest().value)).epsilon(1e-12));
    CHECK(M == Approx(effects.moment_y.largest).epsilon(1e-12));
    CHECK(Q == Approx(std::abs(beam.shears().largest().value)).epsilon(1e-12));
  }
}

TEST_CASE("Shear adds to a determinate beam what the reduction says, to others at most that") {
  std::mt19937 random(95);
  std::uniform_int_distribution<int> fortieths(4, 36);
  for (int trial = 0; trial < 60; ++trial) {
    const double length = 1.0;
    const BeamHold hold = test::random_hold(random, length);
    const double at = fortieths(random) / 40.0;
    const LoadCase load_case = test::held(hold, {force(3.0, at)});
    const LoadEffects effects = reduce(load_case, length);
    const auto added = [&](double s, double x) {
      const BeamResponse stiff(load_case, Along::z, length, {.bending = 1.0});
      const BeamResponse soft(load_case, Along::z, length, {.bending = 1.0, .shear = 1.0 / s});
      return (soft.deflection(x) - stiff.deflection(x)) / s;
    };
    INFO("trial " << trial << ", support " << static_cast<int>(hold.support));
    const bool determinate =
        hold.support == Support::cantilever || hold.support == Support::pinned_pinned;
    const auto peak = [&](double s) {
      double value = 0.0;
      for (int i = 0; i <= 40; ++i) {
        value = std::max(value, std::abs(added(s, i / 40.0)));
      }
      return value;
    };
    // A force: the shear part peaks under it, at the support or at the tip, all on the grid, or in
    // between only on a statically indeterminate beam.
    CHECK(peak(1e-6) == Approx(effects.shear_deflection_z).epsilon(determinate ? 1e-8 : 2e-3));
    if (determinate) {
      CHECK(peak(0.1) == Approx(effects.shear_deflection_z).epsilon(1e-9));
    } else {
      CHECK(added(0.1, at) <= effects.shear_deflection_z * (1.0 + 1e-9));
      CHECK(added(0.1, at) < added(0.001, at));
    }
  }
}

TEST_CASE("An overhang can deflect most against its load") {
  // Load on the span of a beam with a long overhang: the tip rises. P at mid-span of L = 1, c
  // = 1.5: the support turns by P L^2 / 16, the tip rises by that times c, more than P L^3 / 48.
  LoadCase load_case = pinned_pinned({force(1.0, 0.5)});
  load_case.second_support = 1.0;
  const BeamResponse beam(load_case, Along::z, 2.5, {.bending = 1.0});
  const BeamExtreme most = beam.deflections().largest();
  CHECK(most.x == 2.5);
  CHECK(most.value == Approx(-1.5 / 16.0));
  CHECK(beam.deflections().greatest.value == Approx(1.0 / 48.0));
  CHECK(beam.deflections().greatest.x == Approx(0.5));
  CHECK(beam.moment(2.0) == 0.0);
  CHECK(beam.reactions()[1].x == 1.0);
}

TEST_CASE("Beams of the tables are met to rounding, down to a span of a millionth") {
  // Fixed at both ends, P at a: P a^3 b^3 / (3 L^3), P a b^2 / L^2, P a^2 (3 b + a) / L^3.
  const double P = 3.0;
  const double L = 1.7;
  const double a = 0.3;
  const double b = L - a;
  const BeamResponse clamped(fixed_fixed({force(P, a)}), Along::z, L, {.bending = 2.0});
  CHECK(clamped.deflection(a) == Approx(P * std::pow(a * b, 3) / (6.0 * L * L * L)).epsilon(1e-14));
  CHECK(clamped.reactions()[0].moment == Approx(-P * a * b * b / (L * L)).epsilon(1e-14));
  CHECK(clamped.reactions()[1].force ==
        Approx(-P * a * a * (3.0 * b + a) / (L * L * L)).epsilon(1e-14));
  for (const double span : {1e-6, 1e-3, 0.1, 0.5}) {
    const double c = 1.0 - span;
    INFO("span " << span);
    // Uniform load on two pins: tip q c (3 c^3 + 4 c^2 a - a^3) / 24, R = q L^2 / (2 a).
    LoadCase pinned = pinned_pinned({distributed(1.0, 1.0, 0.0, 1.0)});
    pinned.second_support = span;
    const BeamResponse beam(pinned, Along::z, 1.0, {.bending = 1.0});
    CHECK(beam.reactions()[1].force == Approx(-1.0 / (2.0 * span)).epsilon(1e-14));
    CHECK(beam.deflection(1.0) ==
          Approx(c * (3.0 * c * c * c + 4.0 * c * c * span - span * span * span) / 24.0)
              .epsilon(1e-13));
    // Tip load behind a fixed-pinned span: tip c^2 (3 a + 4 c) / 12, half the moment carried over.
    LoadCase propped = fixed_pinned({force(1.0, 1.0)});
    propped.second_support = span;
    const BeamResponse second(propped, Along::z, 1.0, {.bending = 1.0});
    CHECK(second.deflection(1.0) == Approx(c * c * (3.0 * span + 4.0 * c) / 12.0).epsilon(1e-13));
    CHECK(second.moment(0.0) == Approx(-c / 2.0).epsilon(1e-13));
  }
}

TEST_CASE("Both sides of a jump belong to the extremes, values at it are those beyond") {
  const BeamResponse beam(pinned_pinned({force(4.0, 0.5)}), Along::z, 1.0, {.bending = 1.0});
  CHECK(beam.shear(0.25) == Approx(2.0));
  CHECK(beam.shear(0.5) == Approx(-2.0));
  CHECK(beam.shear(1.0) == Approx(-2.0));
  CHECK(beam.shears().greatest.value == Approx(2.0));
  CHECK(beam.shears().least.value == Approx(-2.0));
  CHECK(beam.moments().largest().value == Approx(-1.0));
  CHECK(beam.reactions()[0].force == Approx(-2.0));
}

TEST_CASE("Faults of a beam are reported at once, with their places") {
  using Places = std::vector<std::string>;
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(places(cantilever({force(1.0, 2.0)}), 1.0, {.bending = 0.0, .shear = nan}) ==
        Places{"/loads/0/at", "/stiffness/bending", "/stiffness/shear"});
  const BeamResponse beam(cantilever({force(1.0, 1.0)}), Along::z, 1.0, {.bending = 1.0});
  CHECK_THROWS_AS(beam.deflection(1.5), Error);
  CHECK_THROWS_AS(beam.moment(-0.1), Error);
  CHECK_THROWS_AS(beam.shear(nan), Error);
}

}  // namespace bismar
