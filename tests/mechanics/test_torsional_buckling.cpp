// SPDX-License-Identifier: MIT
// Columns that twist.
#include <bismar/mechanics/torsional_buckling.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr double E = 210e9;
constexpr double G = 81e9;

MemberMaterial steel(double yield) {
  MemberMaterial m;
  m.E = E;
  m.G = G;
  m.sigma_y = yield;
  return m;
}

/// The least root of det(K - N M), by a fine scan from below: K = diag(N_u, N_v, i_0^2 N_T) and M
/// couples the displacements of the shear centre with the twist.
double least_root_by_scan(const SectionProperties& s, double N_u, double N_v, double N_T) {
  const double polar = polar_radius_squared(s);
  const ShearCentre c = principal_shear_centre(s);
  // Bending about u moves along v, and the shear centre's offset along u twists it.
  const auto determinant = [&](double N) {
    const double a = N_u - N;
    const double b = N_v - N;
    const double t = polar * (N_T - N);
    return a * b * t - a * (N * c.v) * (N * c.v) - b * (N * c.u) * (N * c.u);
  };
  const double most = std::min({N_u, N_v, N_T});
  double before = 0.0;
  for (int i = 1; i <= 200000; ++i) {
    const double N = most * i / 200000.0;
    if (determinant(N) <= 0.0) {
      return (before + N) / 2.0;
    }
    before = N;
  }
  return most;
}

}  // namespace

TEST_CASE("An I column twists at (G I_t + pi^2 E I_w / L^2) / i_0^2, by hand") {
  // IPE 300, 6 m: I_t 20.12 cm4, I_w 125.9e9 mm6, I_y 8356, I_z 603.8 cm4, A 53.81 cm2: i_0^2 =
  // 16651 mm2; 16297 + 7248.4 N m2 over it = 1414.1 kN.
  SectionProperties s = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  s.I_t = 20.12e-8;
  s.I_w = 125.9e-9;
  s.I_y = 8356e-8;
  s.I_z = 603.8e-8;
  s.area = 53.81e-4;
  const TorsionalColumn column{.youngs_modulus = E, .shear_modulus = G, .length = 6.0};
  CHECK(torsional_critical_load(s, column) == Approx(1414.1e3).epsilon(1e-3));
  const double about_z = euler_critical_load(E, s.I_z, 6.0);
  CHECK(torsional_flexural_critical_load(s, column, 10.0 * about_z, about_z) == about_z);
  CHECK(torsional_flexural_critical_load(s, column, 1e9, 1e9) ==
        Approx(torsional_critical_load(s, column)));
}

TEST_CASE("The least root is that of the determinant, for channels, T and angles") {
  const std::vector<SectionProperties> sections = {channel(0.2, 0.08, 0.006, 0.011, 0.013, 0.0),
                                                   channel(0.1, 0.05, 0.006, 0.0085, 0.0085, 0.08),
                                                   tee(0.1, 0.1, 0.011, 0.011, 0.011),
                                                   tee(0.06, 0.12, 0.006, 0.006, 0.0),
                                                   angle(0.1, 0.1, 0.01, 0.012, 0.006),
                                                   angle(0.15, 0.075, 0.009, 0.012, 0.006),
                                                   angle(0.05, 0.1, 0.004, 0.0, 0.0)};
  for (const SectionProperties& s : sections) {
    for (const double length : {0.3, 1.0, 4.0}) {
      for (const double stretch : {1.0, 0.5, 2.0}) {
        const TorsionalColumn column{.youngs_modulus = E, .shear_modulus = G, .length = length};
        const double N_u = euler_critical_load(E, s.I_u(), length * stretch);
        const double N_v = euler_critical_load(E, s.I_v(), length);
        const double found = torsional_flexural_critical_load(s, column, N_u, N_v);
        INFO(name(s.family) << " " << s.height << " L = " << length << " stretch " << stretch);
        CHECK(found == Approx(least_root_by_scan(s, N_u, N_v, torsional_critical_load(s, column)))
                           .epsilon(2e-5));
        CHECK(found <= std::min({N_u, N_v, torsional_critical_load(s, column)}));
      }
    }
  }
}

TEST_CASE("The shear centre is turned to the principal axes") {
  // An equal angle: u is the axis of symmetry at 45 degrees, the shear centre lies on it.
  const SectionProperties s = angle(0.1, 0.1, 0.01, 0.012, 0.006);
  const ShearCentre c = principal_shear_centre(s);
  const double distance = std::hypot(s.y_shear, s.z_shear);
  CHECK(std::max(std::abs(c.u), std::abs(c.v)) == Approx(distance));
  CHECK(std::min(std::abs(c.u), std::abs(c.v)) < 1e-12);
}

TEST_CASE("A short thin angle twists before it bends, a long one bends about its weak axis") {
  const LimitState& twisting = *limit_state("torsional-flexural buckling");
  const LimitState& bending = *limit_state("flexural buckling");
  const SectionProperties s = angle(0.1, 0.1, 0.005, 0.006, 0.003);
  const MemberMaterial s235 = steel(235e6);
  const auto both = [&](double length) {
    const LoadEffects effects = reduce(pinned_pinned({axial(-10e3)}), length);
    const MemberLimits limits;
    REQUIRE(twisting.applies(effects, limits, s235, s));
    const CheckInput input{s, s235, effects, limits, length, 1.5};
    return std::pair{twisting.utilisation(input), bending.utilisation(input)};
  };
  CHECK(both(0.5).first > 1.1 * both(0.5).second);
  CHECK(both(5.0).first == Approx(both(5.0).second).epsilon(0.02));
  // About y and z an angle's weak axis counts: i_v, not i_y.
  const LoadEffects effects = reduce(pinned_pinned({axial(-10e3)}), 5.0);
  const CheckInput input{s, s235, effects, {}, 5.0, 1.0};
  CHECK(limit_state("slenderness")->utilisation(input) ==
        Approx(5.0 / std::sqrt(s.I_v() / s.area) / 200.0));
  CHECK(bending.explain(input).line.find("about the weak principal axis") != std::string::npos);
  CHECK(limit_state("slenderness")->explain(input).steps.at(0).find("i_v") != std::string::npos);
}

TEST_CASE("Torsional-flexural buckling by hand: a channel strut") {
  // U 100 x 50 of the check above, 2 m, pinned, S235: the same steps as a column about z with N_cr
  // of the determinant.
  const SectionProperties s = channel(0.1, 0.05, 0.006, 0.0085, 0.0085, 0.0);
  const MemberMaterial s235 = steel(235e6);
  const LoadEffects effects = reduce(pinned_pinned({axial(-50e3)}), 2.0);
  const double N_cr =
      torsional_flexural_critical_load(s,
                                       {.youngs_modulus = E, .shear_modulus = G, .length = 2.0},
                                       euler_critical_load(E, s.I_y, 2.0),
                                       euler_critical_load(E, s.I_z, 2.0));
  const double lambda = std::sqrt(s.area * 235e6 / N_cr);
  const double N_b = reduction_factor(steel_curve(BucklingCurve::c), lambda) * s.area * 235e6;
  const LimitState& state = *limit_state("torsional-flexural buckling");
  CHECK(state.utilisation({s, s235, effects, {}, 2.0, 1.5}) == Approx(75e3 / N_b));
  CHECK(state.needs(effects, s235) == std::vector<Symbol>{Symbol::E, Symbol::sigma_y, Symbol::G});
  CHECK(state.default_factor(s235) == 1.5);
  // Closed and solid sections do not twist.
  CHECK_FALSE(state.applies(effects, {}, s235, solid_round(0.05)));
  CHECK_FALSE(state.applies(
      effects, {}, s235, rectangular_tube(0.1, 0.1, 0.005, Corners::sharp, Forming::unknown)));
  CHECK_FALSE(state.applies(reduce(pinned_pinned({axial(1.0)}), 1.0), {}, s235, s));
}

TEST_CASE("Torsional functions name a wrong argument") {
  const SectionProperties s = channel(0.1, 0.05, 0.006, 0.0085, 0.0085, 0.0);
  const auto places = [](const Error& error) {
    std::vector<std::string> list;
    for (const Fault& fault : error.faults()) {
      list.push_back(fault.where);
    }
    return list;
  };
  try {
    (void)torsional_flexural_critical_load(s, {}, 0.0, std::nan(""));
    FAIL("no fault");
  } catch (const Error& error) {
    CHECK(places(error) ==
          std::vector<std::string>{
              "column.youngs_modulus", "column.shear_modulus", "column.length", "major", "minor"});
  }
  SectionProperties empty;
  CHECK_THROWS_AS(polar_radius_squared(empty), Error);
  CHECK_THROWS_AS(principal_shear_centre(empty), Error);
  empty = s;
  empty.I_t = 0.0;
  CHECK_THROWS_AS(
      torsional_critical_load(empty, {.youngs_modulus = 1, .shear_modulus = 1, .length = 1}),
      Error);
}

}  // namespace bismar
