// SPDX-License-Identifier: MIT
// Webs that buckle in shear.
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/wall.hpp>

#include "mechanics/fault_places.hpp"
#include "support/catch.hpp"

#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr const char* id = "shear buckling";

MemberMaterial steel(double strength) {
  MemberMaterial m;
  m.E = 210e9;
  m.sigma_y = strength;
  return m;
}

LoadEffects direct(const InternalForces& forces) {
  LoadCase load_case;
  load_case.direct = forces;
  return reduce(load_case, 1.0);
}

double u(const SectionProperties& section,
         const MemberMaterial& material,
         const LoadEffects& effects,
         const MemberLimits& limits = {}) {
  return limit_state(id)->utilisation({section, material, effects, limits, 1.0, 1.0});
}

/// Sharp corners, t = 1 mm.
SectionProperties box(double height, double width) {
  return rectangular_tube(height, width, 0.001, Corners::sharp, Forming::cold_formed);
}

}  // namespace

TEST_CASE("The slenderness of a web in shear is that of the standards") {
  // EN 1993-1-5 5.3: h_w / (86.4 t epsilon) with epsilon = root(235 / f_y), E = 210 GPa.
  CHECK(web_shear_slenderness(WebEdges::both_held, 100.0, 235e6, 210e9) ==
        Approx(100.0 / 86.4).epsilon(2e-3));
  CHECK(web_shear_slenderness(WebEdges::both_held, 100.0, 355e6, 210e9) ==
        Approx(100.0 / (86.4 * 0.8136)).epsilon(2e-3));
  // EN 1999-1-1 6.7.4: 0.35 h_w / t root(f_o / E).
  CHECK(web_shear_slenderness(WebEdges::both_held, 100.0, 250e6, 70e9) ==
        Approx(35.0 * 0.059761).epsilon(0.012));
  CHECK(web_shear_coefficient(WebEdges::one_free) == 1.2);
  CHECK(web_shear_factor(0.0) == 1.0);
  CHECK(web_shear_factor(0.83) == 1.0);
  CHECK(web_shear_factor(1.66) == Approx(0.5));
  using Places = std::vector<std::string>;
  CHECK(test::fault_places([] {
          (void)web_shear_slenderness(WebEdges::both_held, 0.0, -1.0, 0.0);
        }) == Places{"ratio", "strength", "youngs_modulus"});
  CHECK(test::fault_places([] { (void)web_shear_factor(-1.0); }) == Places{"slenderness"});
}

TEST_CASE("A plate girder's thin web buckles in shear, by hand") {
  // I 600 x 300, web 3, flange 20, S355: h_w / t = 560 / 3 = 186.67; tau_cr = 5.34 x 189.80 GPa /
  // 186.67^2 = 29.086 MPa; lambda_w = 0.76 root(355 / 29.086) = 2.6551; chi_w = 0.31260; V_b =
  // 0.31260 x 355 / 1.73205 x 1680 mm2 = 107.64 kN.
  const SectionProperties s = i_section(0.6, 0.3, 0.003, 0.02, 0.0);
  CHECK(u(s, steel(355e6), direct({.V_z = -200e3})) == Approx(200.0 / 107.64).epsilon(1e-3));
  // What a weld leaves of the strength is all that counts of it.
  MemberMaterial welded = steel(355e6);
  welded.weld_yield_factor = 0.5;
  MemberLimits limits;
  limits.details.welded = true;
  CHECK(u(s, welded, direct({.V_z = 200e3}), limits) == Approx(400.0 / 107.64).epsilon(1e-3));
  // A rolled I's web yields: 278.6 x 7.1 mm, S235:
  // 1978.1 mm2 x 135.68 MPa = 268.4 kN.
  CHECK(u(i_section(0.3, 0.15, 0.0071, 0.0107, 0.015), steel(235e6), direct({.V_z = 100e3})) ==
        Approx(100.0 / 268.38).epsilon(1e-4));
  const Explanation text =
      limit_state(id)->explain({s, steel(355e6), direct({.V_z = 200e3}), {}, 1.0, 1.0});
  CHECK(text.line == "Shear buckling: 1 x 200 kN along z against 107.6 kN: u = 1.858.");
}

TEST_CASE("A box shears its walls along the load, a T its free stem") {
  // 100 x 60 x 1 in S235: along z 2 walls of 98 mm, lambda_w = 0.76 x 98 root(235 MPa / (5.34 x
  // 189.80 GPa)) = 1.1341, chi_w = 0.73187, V_b = 0.73187 x 135.68 MPa x 196 mm2 = 19.463 kN; along
  // y 2 of 58 mm: 0.67119, stocky: 135.68 MPa x 116 mm2 = 15.739 kN.
  const SectionProperties s = box(0.1, 0.06);
  const MemberMaterial s235 = steel(235e6);
  CHECK(u(s, s235, direct({.V_z = 10e3})) == Approx(10.0 / 19.463).epsilon(1e-3));
  CHECK(u(s, s235, direct({.V_y = 10e3})) == Approx(10.0 / 15.739).epsilon(1e-3));
  CHECK(u(s, s235, direct({.V_y = 10e3, .V_z = 10e3})) == Approx(10.0 / 15.739).epsilon(1e-3));
  // T 100 x 100, stem 1.5, flange 2: 98 / 1.5 = 65.333; tau_cr = 1.2 x 189.80 GPa / 65.333^2 =
  // 53.359 MPa; lambda_w = 0.76 root(235 / 53.359) = 1.5949; chi_w = 0.52040; V_b = 0.52040 x
  // 135.68 MPa x 147 mm2 = 10.379 kN.
  CHECK(u(tee(0.1, 0.1, 0.0015, 0.002, 0.0), s235, direct({.V_z = 1e3})) ==
        Approx(1.0 / 10.379).epsilon(1e-3));
}

TEST_CASE("Shear buckling is for webs of ductile metals in shear") {
  const LimitState& state = *limit_state(id);
  const MemberMaterial s235 = steel(235e6);
  const SectionProperties i = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  const auto applies = [&](const SectionProperties& s, const InternalForces& forces) {
    return state.applies(direct(forces), {}, s235, s);
  };
  CHECK(applies(i, {.V_z = 1.0}));
  CHECK(applies(channel(0.2, 0.075, 0.0085, 0.0115, 0.0115, 0.0), {.V_z = 1.0}));
  CHECK(applies(tee(0.1, 0.1, 0.01, 0.01, 0.0), {.V_z = 1.0}));
  CHECK(applies(box(0.1, 0.06), {.V_y = 1.0}));
  CHECK_FALSE(applies(i, {.V_y = 1.0}));
  CHECK_FALSE(applies(i, {.N = 1.0, .M_y = 1.0, .T = 1.0}));
  CHECK_FALSE(applies(box(0.1, 0.06), {.T = 1.0}));
  CHECK_FALSE(applies(solid_rectangle(0.1, 0.01), {.V_z = 1.0}));
  CHECK_FALSE(applies(round_tube(0.1, 0.002, Forming::unknown), {.V_z = 1.0}));
  MemberMaterial timber = s235;
  timber.column_law = ColumnLaw::timber_solid;
  MemberMaterial brittle = s235;
  brittle.rule = StressRule::principal;
  CHECK_FALSE(state.applies(direct({.V_z = 1.0}), {}, timber, i));
  CHECK_FALSE(state.applies(direct({.V_z = 1.0}), {}, brittle, i));
  CHECK(state.default_factor(s235) == 1.5);
  using Symbols = std::vector<Symbol>;
  CHECK(state.needs(direct({.V_z = 1.0}), s235) == Symbols{Symbol::E, Symbol::sigma_y});
  // Own mass: 1000 kg/m3 x A x 10 m/s2 x 2 m on a cantilever.
  LoadCase own = cantilever({});
  own.acceleration_z = 10.0;
  const LoadEffects effects = reduce(own, 2.0);
  MemberMaterial heavy = s235;
  heavy.rho = 1000.0;
  REQUIRE(state.applies(effects, {}, heavy, i));
  CHECK(state.needs(effects, heavy) == Symbols{Symbol::E, Symbol::sigma_y, Symbol::rho});
  CHECK(state.utilisation({i, heavy, effects, {}, 2.0, 1.0}) ==
        Approx(1000.0 * i.area * 20.0 / 268.38e3).epsilon(1e-4));
}

}  // namespace bismar
