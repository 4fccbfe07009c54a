// SPDX-License-Identifier: MIT
// Beams that turn aside: the critical moment, its factors and its curves.
#include <bismar/mechanics/lateral_torsional.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <numbers>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

LateralTorsionalBeam unit_beam(double warping) {
  return {.youngs_modulus = 1.0,
          .shear_modulus = 1.0,
          .I_z = 1.0,
          .I_t = 1.0,
          .I_w = warping,
          .length = 1.0};
}

double by_energy(double warping, const std::function<double(double)>& moment) {
  return critical_load_factor(unit_beam(warping), LateralEnds::forks, {.moment = moment}) /
         elastic_critical_moment(unit_beam(warping));
}

std::string fault_of(const std::function<void()>& call) {
  try {
    call();
  } catch (const Error& error) {
    return error.faults().front().where;
  }
  return "no fault";
}

/// A brittle material: its limit is M_cr itself.
MemberMaterial brittle() {
  MemberMaterial m;
  m.rule = StressRule::principal;
  m.E = 210e9;
  m.G = 81e9;
  return m;
}

/// The critical moment that the limit state takes for a load case [N m].
double critical_of(const SectionProperties& section, const LoadCase& load_case, double length) {
  const LoadEffects effects = reduce(load_case, length);
  const LimitState& state = *limit_state("lateral-torsional buckling");
  const MemberLimits limits;
  const MemberMaterial material = brittle();
  REQUIRE(state.applies(effects, limits, material, section));
  const double u = state.utilisation({section, material, effects, limits, length, 1.0});
  return effects.moment_y.largest / u;
}

/// A point load as a narrow triangle of the same force.
std::function<double(double)> near(double place, double force, double length) {
  constexpr double half = 5.0 / 240.0;
  return [=](double xi) {
    return std::max(0.0, 1.0 - std::abs(xi - place) / half) * force / (half * length);
  };
}

}  // namespace

TEST_CASE("The moment factors of the energy method are those of the literature") {
  // Uniform moment 1 (exact); uniform load 1.13, central load 1.36, psi = 0 1.83 to 1.85, psi = -1
  // 2.68 to 2.75 (an independent Galerkin solution and handbook tables).
  for (const double warping : {0.02, 0.2, 1.0}) {
    CHECK(by_energy(warping, [](double) { return 1.0; }) == Approx(1.0).epsilon(1e-9));
    CHECK(by_energy(warping, [](double x) { return 4.0 * x * (1.0 - x); }) ==
          Approx(1.13).epsilon(3e-3));
    CHECK(by_energy(warping, [](double x) { return 1.0 - std::abs(2.0 * x - 1.0); }) ==
          Approx(1.36).epsilon(4e-3));
    CHECK(by_energy(warping, [](double x) { return 1.0 - x; }) == Approx(1.84).epsilon(0.02));
    CHECK(by_energy(warping, [](double x) { return 1.0 - 2.0 * x; }) ==
          Approx(2.71).epsilon(0.015));
  }
}

TEST_CASE("A narrow cantilever with a load at its tip buckles at 4.013 root(E I_z G I_t) / L^2") {
  // Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., section 6.3 (from memory). The twist
  // functions have no slope at the root, which a bar without warping stiffness may have: the value
  // comes from above, by 4 % with 12 of them.
  const double found = critical_load_factor(
      unit_beam(0.0), LateralEnds::cantilever, {.moment = [](double x) { return 1.0 - x; }});
  CHECK(found >= 4.013);
  CHECK(found == Approx(4.013).epsilon(0.04));
}

TEST_CASE("A load above the shear centre lowers the critical moment, one below raises it") {
  LateralTorsionalBeam beam = unit_beam(0.2);
  beam.factors = uniform_load_factors();
  for (const double height : {-0.3, -0.1, 0.0, 0.1, 0.3}) {
    beam.load_height = height;
    const double by_ritz = critical_load_factor(beam,
                                                LateralEnds::forks,
                                                {.moment = [](double x) { return 4 * x * (1 - x); },
                                                 .load = [](double) { return 8.0; },
                                                 .load_height = height});
    INFO("z_g = " << height);
    CHECK(elastic_critical_moment(beam) == Approx(by_ritz).epsilon(0.01));
  }
}

TEST_CASE("The tabulated moment factors are on the safe side of the energy method, or near it") {
  for (int i = -10; i <= 10; ++i) {
    const double psi = 0.1 * i;
    const double exact = by_energy(0.2, [psi](double x) { return 1.0 - (1.0 - psi) * x; });
    INFO("psi = " << psi);
    CHECK(linear_moment_factor(psi) <= exact * 1.02);
    CHECK(linear_moment_factor(psi) >= exact * 0.85);
    const auto at = [psi](double x) { return 1.0 - (1.0 - psi) * x; };
    const double quarters = quarter_point_moment_factor(
        {.largest = 1.0, .quarter = at(0.25), .middle = at(0.5), .three_quarters = at(0.75)});
    CHECK(quarters <= exact * 1.02);
    const double squares = quadratic_moment_factor(
        {.largest = 1.0, .quarter = at(0.25), .middle = at(0.5), .three_quarters = at(0.75)});
    CHECK(squares <= exact * 1.005);
    CHECK(squares >= exact * 0.85);
    CHECK(quarters >= exact * 0.75);
  }
  // 12.5 / (2.5 + 3 x 0.75 + 4 + 3 x 0.75) and 12.5 / (2.5 + 1.5 + 4 + 1.5).
  CHECK(quarter_point_moment_factor({1.0, 0.75, 1.0, 0.75}) == Approx(1.13636).epsilon(1e-5));
  // sqrt(35 / (1 + 9 x 0.5625 + 16 + 9 x 0.5625)).
  CHECK(quadratic_moment_factor({1.0, 0.75, 1.0, 0.75}) == Approx(1.13592).epsilon(1e-5));
  CHECK(quarter_point_moment_factor({2.0, -1.0, 2.0, 1.0}) == Approx(1.31579).epsilon(1e-5));
}

TEST_CASE("The limit state's critical moment is on the safe side of the energy method") {
  // Loads at the top edge, ends held as the limit state says; of fixed ends it takes the moments
  // but not the restraint in plan.
  const std::vector<SectionProperties> sections = {i_section(0.3, 0.15, 0.0071, 0.0107, 0.015),
                                                   i_section(0.6, 0.22, 0.012, 0.019, 0.024),
                                                   i_section(0.2, 0.12, 0.004, 0.005, 0.0),
                                                   solid_rectangle(0.1, 0.01)};
  struct Case {
    const char* what;
    LoadCase load_case;
    LateralEnds ends;
    std::function<double(double)> load;  // N/m by xi, L = 1 scaled below
  };
  double least = 10.0;
  double most = 0.0;
  for (const SectionProperties& s : sections) {
    for (const double L : {12.0 * s.height, 30.0 * s.height}) {
      const auto uniform = [](double) { return 1000.0; };
      const std::vector<Case> cases = {
          {"uniform, two supports",
           pinned_pinned({distributed(1e3, 1e3, 0.0, L)}),
           LateralEnds::forks,
           uniform},
          {"midspan", pinned_pinned({force(1e3, L / 2)}), LateralEnds::forks, near(0.5, 1e3, L)},
          {"quarter", pinned_pinned({force(1e3, L / 4)}), LateralEnds::forks, near(0.25, 1e3, L)},
          {"tenth", pinned_pinned({force(1e3, L / 10)}), LateralEnds::forks, near(0.1, 1e3, L)},
          {"uniform, fixed",
           fixed_fixed({distributed(1e3, 1e3, 0.0, L)}),
           LateralEnds::forks,
           uniform},
          {"midspan, fixed",
           fixed_fixed({force(1e3, L / 2)}),
           LateralEnds::forks,
           near(0.5, 1e3, L)},
          {"uniform, propped",
           fixed_pinned({distributed(1e3, 1e3, 0.0, L)}),
           LateralEnds::forks,
           uniform},
          {"midspan, propped",
           fixed_pinned({force(1e3, L / 2)}),
           LateralEnds::forks,
           near(0.5, 1e3, L)},
          {"uniform, cantilever",
           cantilever({distributed(1e3, 1e3, 0.0, L)}),
           LateralEnds::cantilever,
           uniform},
          {"middle of a cantilever",
           cantilever({force(1e3, L / 2)}),
           LateralEnds::cantilever,
           near(0.5, 1e3, L)}};
      for (const Case& c : cases) {
        const LoadEffects effects = reduce(c.load_case, L);
        // The moment between stations by its own beam formula: quarter points are too few.
        const bool uniform_load = std::string(c.what).rfind("uniform", 0) == 0;
        const double place = std::string(c.what) == "quarter" ? 0.25
                             : std::string(c.what) == "tenth" ? 0.1
                                                              : 0.5;
        const double root = [&] {  // moment at x = 0 from the reactions
          switch (effects.support_z) {
            case Support::cantilever:
              return uniform_load ? -1e3 * L * L / 2 : -1e3 * L / 2;
            case Support::fixed_pinned:
              return uniform_load ? -1e3 * L * L / 8 : -1e3 * L * 3 / 16;
            case Support::fixed_fixed:
              return uniform_load ? -1e3 * L * L / 12 : -1e3 * L / 8;
            case Support::pinned_pinned:
              break;
          }
          return 0.0;
        }();
        const double end = effects.support_z == Support::fixed_fixed ? root : 0.0;
        const auto moment = [=](double xi) {
          const double span = uniform_load
                                  ? 1e3 * L * L / 2 * xi * (1 - xi)
                                  : 1e3 * L * (xi < place ? xi * (1 - place) : place * (1 - xi));
          return root + (end - root) * xi + span;
        };
        CHECK(std::abs(moment(0.25)) ==
              Approx(std::abs(effects.moment_y.quarters[0])).margin(1e-6));
        CHECK(std::abs(moment(0.5)) == Approx(std::abs(effects.moment_y.quarters[1])).margin(1e-6));
        const double factor =
            critical_load_factor({.youngs_modulus = 210e9,
                                  .shear_modulus = 81e9,
                                  .I_z = s.I_z,
                                  .I_t = s.I_t,
                                  .I_w = s.I_w,
                                  .length = L},
                                 c.ends,
                                 {.moment = moment, .load = c.load, .load_height = s.height / 2});
        const double ratio = factor * effects.moment_y.largest / critical_of(s, c.load_case, L);
        INFO(c.what << ", h = " << s.height << ", L = " << L << ": " << ratio);
        CHECK(ratio >= 0.98);
        CHECK(ratio <= 6.0);
        least = std::min(least, ratio);
        most = std::max(most, ratio);
      }
      // A load at the tip.
      const double factor =
          critical_load_factor({.youngs_modulus = 210e9,
                                .shear_modulus = 81e9,
                                .I_z = s.I_z,
                                .I_t = s.I_t,
                                .I_w = s.I_w,
                                .length = L},
                               LateralEnds::cantilever,
                               {.moment = [=](double xi) { return 1e3 * L * (1 - xi); },
                                .tip_load = 1e3,
                                .load_height = s.height / 2});
      const double ratio = factor * 1e3 * L / critical_of(s, cantilever({force(1e3, L)}), L);
      INFO("tip, h = " << s.height << ", L = " << L << ": " << ratio);
      CHECK(ratio >= 1.04);
      CHECK(ratio <= 3.0);
    }
  }
  CHECK(least < 1.2);
}

TEST_CASE("One moment over a cantilever is exact with twice the length") {
  const SectionProperties s = solid_rectangle(0.1, 0.01);
  const double exact = pi / (2.0 * 2.0) * std::sqrt(210e9 * s.I_z * 81e9 * s.I_t);
  CHECK(critical_of(s, cantilever({moment(100.0, 2.0)}), 2.0) == Approx(exact));
}

TEST_CASE("The stem of a T in compression buckles before the flange would") {
  // AISC 360-16 F9 by hand: h 100, L 3 m, I_z 0.4e6, I_t 8000 mm4: B = 2.3 x 0.1/3 x root(50) =
  // 0.54212; root(1 + B^2) - B = 0.59537; 1.95 x 200 GPa / 3 m x root(0.4e6 x 8000) mm4 = 7.3539 kN
  // m; x 0.59537 = 4.378 kN m.
  CHECK(tee_critical_moment(200e9, 0.4e-6, 8e-9, 0.1, 3.0) == Approx(4378.3).epsilon(2e-4));
}

TEST_CASE("Curves follow the section, every other section takes curve d") {
  const SectionProperties wide = i_section(0.2, 0.2, 0.009, 0.015, 0.018);
  const SectionProperties twice = i_section(0.4, 0.2, 0.009, 0.015, 0.018);
  const SectionProperties deep = i_section(0.5, 0.2, 0.01, 0.016, 0.021);
  CHECK(lateral_torsional_curve(wide) == BucklingCurve::a);
  CHECK(lateral_torsional_curve(twice) == BucklingCurve::a);
  CHECK(lateral_torsional_curve(deep) == BucklingCurve::b);
  CHECK(rolled_lateral_torsional_curve(twice) == BucklingCurve::b);
  CHECK(rolled_lateral_torsional_curve(deep) == BucklingCurve::c);
  CHECK(lateral_torsional_curve(solid_rectangle(0.1, 0.01)) == BucklingCurve::d);
  CHECK(rolled_lateral_torsional_curve(channel(0.2, 0.075, 0.0085, 0.0115, 0.0115, 0.0)) ==
        BucklingCurve::d);
  SectionProperties welded = wide;
  welded.forming = Forming::unknown;
  CHECK(lateral_torsional_curve(welded) == BucklingCurve::d);
  // No reduction up to 0.4, never above 1 / lambda^2.
  CHECK(rolled_lateral_torsional_factor(BucklingCurve::d, 0.4) == 1.0);
  for (double lambda = 0.0; lambda < 5.0; lambda += 0.07) {
    CHECK(rolled_lateral_torsional_factor(BucklingCurve::b, lambda) * lambda * lambda <= 1 + 1e-12);
  }
  CHECK(moment_shape_correction(1.0) == 1.0);
  CHECK(rolled_moment_divisor(0.75, 3.0) == 1.0);
}

TEST_CASE("Lateral-torsional functions name a wrong argument") {
  CHECK(fault_of([] { (void)linear_moment_factor(1.1); }) == "end_ratio");
  CHECK(fault_of([] { (void)moment_shape_correction(-2.0); }) == "end_ratio");
  CHECK(fault_of([] {
          (void)quarter_point_moment_factor({1.0, 1.1, 0.0, 0.0});
        }) == "moments.quarter");
  CHECK(fault_of([] { (void)quarter_point_moment_factor({}); }) == "moments.largest");
  CHECK(fault_of([] { (void)rolled_lateral_torsional_phi(BucklingCurve::a, -1.0); }) ==
        "slenderness");
  CHECK(fault_of([] { (void)rolled_moment_divisor(1.2, 1.0); }) == "correction");
  CHECK(fault_of([] { (void)lateral_torsional_slenderness(0.0, 1.0, 1.0); }) == "modulus");
  CHECK(fault_of([] { (void)tee_critical_moment(1.0, 1.0, 1.0, 1.0, 0.0); }) == "length");
  CHECK(fault_of([] {
          (void)aisc_flexural_strength({1.0, 1.0, 1.0, 2.0, 1.0}, 0.0);
        }) == "beam.L_r");
  CHECK(fault_of([] {
          (void)aisc_flexural_strength({1.0, 1.0, 1.0, 1.0, 2.0}, 3.0);
        }) == "unbraced_length");
  try {
    (void)elastic_critical_moment({});
  } catch (const Error& error) {
    CHECK(error.faults().size() == 5);
    CHECK(error.faults()[0].where == "beam.youngs_modulus");
  }
  CHECK(fault_of([] {
          (void)critical_load_factor(unit_beam(0.0), LateralEnds::forks, {.moment = {}});
        }) == "loading");
  CHECK(fault_of([] {
          (void)critical_load_factor(
              unit_beam(0.0), LateralEnds::forks, {.moment = [](double) { return 0.0; }});
        }) == "loading");
}

}  // namespace bismar
