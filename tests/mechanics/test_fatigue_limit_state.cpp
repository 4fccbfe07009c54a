// SPDX-License-Identifier: MIT
// Fatigue of a member: stress life of parent material, detail category of welds.
#include <bismar/mechanics/endurance.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/welded_detail.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr double megapascal = 1e6;

const LimitState& fatigue() { return *limit_state("fatigue"); }

/// A quenched and tempered steel without a measured endurance limit.
MemberMaterial steel(double tensile, double yield) {
  MemberMaterial m;
  m.steel = true;
  m.tensile = tensile * megapascal;
  m.sigma_y = yield * megapascal;
  return m;
}

MemberMaterial aluminium() {
  MemberMaterial m;
  m.tensile = 300 * megapascal;
  m.sigma_y = 260 * megapascal;
  m.sigma_e = 150 * megapascal;
  m.endurance_cycles = 5e8;
  return m;
}

LoadEffects swinging(const InternalForces& forces, double cycles, double stress_ratio) {
  LoadCase load_case = cantilever({});
  load_case.direct = forces;
  load_case.fatigue = FatigueLoading{.cycles = cycles, .stress_ratio = stress_ratio};
  return reduce(load_case, 1.0);
}

double u(const SectionProperties& section,
         const MemberMaterial& material,
         const LoadEffects& effects,
         const MemberDetails& details = {},
         double factor = 1.5) {
  MemberLimits limits;
  limits.details = details;
  return fatigue().utilisation({section, material, effects, limits, 1.0, factor});
}

const MemberDetails& plain() {
  static const MemberDetails details = [] {
    MemberDetails d;
    d.surface = SurfaceFinish::polished;
    d.reliability = 0.5;
    return d;
  }();
  return details;
}

bool has(const Explanation& text, const std::string& part) {
  return std::any_of(text.steps.begin(), text.steps.end(), [&](const std::string& step) {
    return step.find(part) != std::string::npos;
  });
}

}  // namespace

TEST_CASE("A round bar in reversed bending beyond the knee, by hand") {
  // d 30 mm, M = 200 N m: W = 2650.7 mm3, sigma = 75.451 MPa. Steel of 700 MPa: S_e' = 350,
  // k_a = 3.04 x 700^-0.217 = 0.73365, k_e = 1 - 0.08 x 2.3263 = 0.81389, S_e = 208.99 MPa;
  // k_b = 1.24 x 30^-0.107 = 0.86173. u = 1.5 x 75.451 / (0.86173 x 208.99) = 0.62844.
  const SectionProperties s = solid_round(0.03);
  const LoadEffects effects = swinging({.M_y = 200.0}, 1e7, -1.0);
  CHECK(u(s, steel(700, 550), effects) == Approx(0.62844).epsilon(1e-5));

  const MemberLimits limits;
  const MemberMaterial material = steel(700, 550);
  const Explanation text = fatigue().explain({s, material, effects, limits, 1.0, 1.5});
  CHECK(text.line ==
        "Fatigue: 1.5 x (87.56 MPa amplitude and 0 MPa mean von Mises stress) at x = 0 mm against "
        "209 MPa at 1e7 cycles and 700 MPa (Goodman): u = 0.6284.");
  CHECK(has(text, "S_e' = 0.5 sigma_u, at most 700 MPa, = 350 MPa at 1e6 cycles"));
  CHECK(has(text, "0.7336 x 0.8139 x 350 MPa"));
  CHECK(has(text, "Size factor 0.8617 at a diameter of 30 mm"));
  CHECK(has(text, "u = factor x the larger of 0.419 and 0.1372 = 0.6284."));
}

TEST_CASE("A life below the knee is read from the S-N line, the size factor fading with it") {
  // As above, 1e5 cycles: f = 0.8465, f sigma_u = 592.55, place (5 - 3) / 3,
  // S = 592.55 x (0.86173 x 208.99 / 592.55)^(2/3) = 267.86 MPa, u = 1.5 x 75.451 / 267.86.
  const SectionProperties s = solid_round(0.03);
  const MemberMaterial m = steel(700, 550);
  CHECK(u(s, m, swinging({.M_y = 200.0}, 1e5, -1.0)) == Approx(0.422527).epsilon(1e-5));
  // Below 1000 cycles it is level at f sigma_u; here the size does not count.
  CHECK(u(s, steel(700, 690), swinging({.M_y = 200.0}, 1.0, -1.0)) ==
        Approx(1.5 * 75.4512 / 592.55).epsilon(1e-5));
  // Beyond the knee a steel has an endurance limit.
  CHECK(u(s, m, swinging({.M_y = 200.0}, 1e9, -1.0)) ==
        u(s, m, swinging({.M_y = 200.0}, 1e6, -1.0)));
}

TEST_CASE("Pulsating bending and torsion at a notch after three lines, by hand") {
  // d 30 mm, M = 200 N m, T = 100 N m, K_t 1.65 and 1.35, r 3 mm, steel 690 / 580 MPa: Neuber
  // q = 0.84668, q_s = 0.87912 (Shigley, Example 6-6 has 0.8468, 0.8792), K_f = 1.5503,
  // K_fs = 1.3077; sigma = 75.451, tau = 18.863 MPa; von Mises of the largest = 124.533 MPa.
  // S_e = 345 x 0.73595 x 0.81389 = 206.65; amplitude 62.267 / 0.86173 = 72.258, mean 62.267 MPa.
  const SectionProperties s = solid_round(0.03);
  const LoadEffects effects = swinging({.M_y = 200.0, .T = 100.0}, 1e6, 0.0);
  const MemberMaterial m = steel(690, 580);
  MemberDetails d;
  d.k_t_bending = 1.65;
  d.k_t_torsion = 1.35;
  d.notch_radius = 3e-3;
  CHECK(u(s, m, effects, d) == Approx(0.659865).epsilon(1e-5));
  d.criterion = FatigueCriterion::gerber;
  CHECK(u(s, m, effects, d) == Approx(0.557376).epsilon(1e-5));
  d.criterion = FatigueCriterion::soderberg;
  CHECK(u(s, m, effects, d) == Approx(0.685537).epsilon(1e-5));
  // Without a radius the notch is felt in full.
  MemberDetails full = d;
  full.notch_radius.reset();
  CHECK(u(s, m, effects, full) > u(s, m, effects, d));
  // A net section raises every stress.
  MemberDetails net = d;
  net.net_modulus = 0.8;
  CHECK(u(s, m, effects, net) == Approx(0.685537 / 0.8).epsilon(1e-5));
  // A brittle material has no yield strength: Soderberg's line is Goodman's.
  MemberMaterial brittle = m;
  brittle.rule = StressRule::principal;
  d.criterion = FatigueCriterion::goodman;
  const double goodman = u(s, brittle, effects, d);
  d.criterion = FatigueCriterion::soderberg;
  CHECK(u(s, brittle, effects, d) == goodman);
}

TEST_CASE("Axial loads have the load factor and no size, and compression no mean stress") {
  // d 20 mm, 30 kN: sigma = 95.493 MPa, 0 to full: amplitude 47.746 / 0.85 over 350 MPa, mean
  // 47.746 over 700 MPa: 0.160492 + 0.068209 = 0.228702.
  const SectionProperties s = solid_round(0.02);
  const MemberMaterial m = steel(700, 550);
  CHECK(u(s, m, swinging({.N = 30e3}, 1e6, 0.0), plain(), 1.0) == Approx(0.228702).epsilon(1e-5));
  CHECK(u(s, m, swinging({.N = -30e3}, 1e6, 0.0), plain(), 1.0) == Approx(0.173624).epsilon(1e-5));
  // The first part alone is 0.160492: the first cycle, 95.493 / 550 MPa, is worse.
  MemberMaterial hard = m;
  hard.sigma_y = 690 * megapascal;
  CHECK(u(s, hard, swinging({.N = -30e3}, 1e6, 0.0), plain(), 1.0) ==
        Approx(0.160492).epsilon(1e-5));
}

TEST_CASE("Compression raises the moments that swing, by hand") {
  // 50 x 50, 2 m on two pins, 90 kN and 2.5 kN at midspan: n = N / N_cr = 90 / 269.872 = 0.333492,
  // 36 MPa axial, 60 x 1 / (1 - n) = 90.0216 MPa bending. Polished steel of 700 MPa beyond the
  // knee: axial over 0.85, bending over k_b = 0.83473, 350 MPa.
  const SectionProperties s = solid_square(0.05);
  MemberMaterial m = steel(700, 690);
  m.E = 210e9;
  LoadCase load_case = pinned_pinned({axial(-90e3), force(2500.0, 1.0)});
  MemberLimits limits;
  limits.details = plain();
  const auto used = [&](double R, double factor) {
    load_case.fatigue = FatigueLoading{.cycles = 1e7, .stress_ratio = R};
    const LoadEffects effects = reduce(load_case, 2.0);
    return fatigue().utilisation({s, m, effects, limits, 2.0, factor});
  };
  CHECK(used(-1.0, 1.0) == Approx((36 / 0.85 + 90.0216 / 0.83473) / 350).epsilon(1e-5));
  // R = 0.5: half the range of bending is 60 (1.50036 - 0.5 x 1.200114) / 2 = 27.0091 MPa; the mean
  // counts bending alone.
  const double amplitude = 60 * (1.50036 - 0.5 / (1 - 0.5 * 0.333492)) / 2;
  CHECK(amplitude == Approx(27.0091).epsilon(1e-5));
  CHECK(used(0.5, 1.0) ==
        Approx((9 / 0.85 + amplitude / 0.83473) / 350 + 0.75 * 90.0216 / 700).epsilon(1e-5));
  // A factor of 1.5 is on the compression too: n = 0.500238, 60 x 2.00095 = 120.057 MPa.
  CHECK(used(-1.0, 1.5) == Approx(1.5 * (36 / 0.85 + 120.057 / 0.83473) / 350).epsilon(1e-5));
  CHECK(used(-1.0, 3.0) == std::numeric_limits<double>::infinity());

  const LoadEffects effects = reduce(load_case, 2.0);
  CHECK(fatigue().needs(effects, m) ==
        std::vector<Symbol>{Symbol::tensile, Symbol::sigma_y, Symbol::E});
  CHECK(has(fatigue().explain({s, m, effects, limits, 2.0, 1.0}),
            "raises the moments of first order: M_y by 1 / (1 - 90 kN / 269.9 kN) = 1.5"));
  CHECK(fatigue().explain({s, m, effects, limits, 2.0, 3.0}).line ==
        "Fatigue: the factored compression 270 kN reaches N_cr = 269.9 kN, the deflection grows "
        "without bound: u = infinity.");
  // A weld alike: reversed, twice 126.0216 MPa over category 71 at 1e7 cycles.
  limits.details.detail_category = 71e6;
  CHECK(used(-1.0, 1.0) == Approx(252.0432e6 / welded_detail_strength(71e6, 1e7)).epsilon(1e-5));
}

TEST_CASE("The first cycle may not yield, however few cycles there are") {
  const SectionProperties s = solid_round(0.02);
  const MemberMaterial soft = steel(700, 300);
  const LoadEffects steady = swinging({.N = 30e3}, 1e6, 1.0);
  MemberDetails d;
  d.k_t_axial = 2.0;
  // No amplitude; the mean over 700 MPa is less than the largest stress over 300 MPa.
  CHECK(u(s, soft, steady, d, 1.0) == Approx(2.0 * 95.493 / 300).epsilon(1e-5));
  const MemberLimits limits;
  const Explanation text = fatigue().explain({s, soft, steady, limits, 1.0, 1.0});
  CHECK(text.line ==
        "Fatigue, first cycle: 1 x 95.49 MPa von Mises stress with its notch at x = 0 mm against "
        "300 MPa: u = 0.3183.");
}

TEST_CASE("A material without an endurance limit weakens on along its line") {
  // f sigma_u = 270 at 1000 cycles, 150 MPa at 5e8: 219.67 at 1e5 cycles, 145.41 at 1e9.
  const SectionProperties s = solid_round(0.005);  // below the specimens' 7.62 mm: no size factor
  const double stress = 1.0 / s.W_el_y;
  const auto u_at = [&](double cycles) {
    return u(s, aluminium(), swinging({.M_y = 1.0}, cycles, -1.0), plain(), 1.0);
  };
  CHECK(u_at(5e8) == Approx(stress / 150e6).epsilon(1e-9));
  CHECK(u_at(1e5) == Approx(stress / 219.6738e6).epsilon(1e-6));
  CHECK(u_at(1e9) == Approx(stress / 145.41436e6).epsilon(1e-6));
  MemberMaterial iron = aluminium();
  iron.cast_iron = true;
  CHECK(u(s, iron, swinging({.M_y = 1.0}, 1e9, -1.0), plain(), 1.0) == u_at(5e8));
  // A value measured at next to no cycles does not give a line of no length.
  MemberMaterial odd = aluminium();
  odd.endurance_cycles = 1.0;
  CHECK(u(s, odd, swinging({.M_y = 1.0}, 1e4, -1.0), plain(), 1.0) ==
        Approx(stress / 150e6).epsilon(1e-9));
}

TEST_CASE("Cast iron feels a fifth of a notch and no surface, other metals all of it") {
  const SectionProperties s = solid_round(0.005);
  const LoadEffects effects = swinging({.M_y = 1.0}, 1e7, -1.0);
  MemberDetails notched = plain();
  notched.k_t_bending = 2.5;
  notched.notch_radius = 1e-3;
  notched.surface = SurfaceFinish::as_forged;
  MemberMaterial iron = aluminium();
  iron.cast_iron = true;
  iron.rule = StressRule::principal;
  CHECK(u(s, iron, effects, notched) == Approx(1.3 * u(s, iron, effects, plain())).epsilon(1e-12));
  const double k_a = surface_factor(FatigueSurface::as_forged, SurfaceEdition::eleventh, 300e6);
  const double place = std::log(1e4) / std::log(5e5);
  CHECK(u(s, aluminium(), effects, notched) ==
        Approx(2.5 * u(s, aluminium(), effects, plain()) / std::pow(k_a, place)).epsilon(1e-9));
}

TEST_CASE("Square bars count with the rectangle's equivalent diameter") {
  // 50 mm: d_e = 0.80793 x 50 = 40.396 mm, k_b = 1.24 x 40.396^-0.107 = 0.83473.
  const SectionProperties s = solid_square(0.05);
  const double stress = 1000.0 / s.W_el_y;
  CHECK(u(s, steel(700, 550), swinging({.M_y = 1000.0}, 1e6, -1.0), plain(), 1.0) ==
        Approx(stress / (0.83473 * 350e6)).epsilon(1e-5));
}

TEST_CASE("A member of an anisotropic material bears direct and shear stress apart") {
  MemberMaterial m;
  m.rule = StressRule::direct_and_shear;
  m.tensile = 100 * megapascal;
  m.shear = 10 * megapascal;
  m.sigma_e = 40 * megapascal;
  m.endurance_cycles = 1e7;
  m.k_cr = 0.5;
  const SectionProperties s = solid_rectangle(0.1, 0.05);
  // 20 kN: 4 MPa; amplitude 2 / 40, mean 2 / 100.
  CHECK(u(s, m, swinging({.N = 20e3}, 1e7, 0.0), plain(), 1.0) == Approx(0.07).epsilon(1e-12));
  // 2 kN across: 1.5 x 0.4 MPa / 0.5 = 1.2 MPa; 0.6 over 0.4 x 10 and 0.6 over 10.
  const LoadEffects across = swinging({.V_z = 2e3}, 1e7, 0.0);
  CHECK(u(s, m, across, plain(), 1.0) == Approx(0.21).epsilon(1e-12));
  CHECK(fatigue().needs(across, m) ==
        std::vector<Symbol>{Symbol::tensile, Symbol::shear, Symbol::sigma_e});
  CHECK(fatigue().needs(swinging({.N = 1.0}, 1e7, 0.0), m) ==
        std::vector<Symbol>{Symbol::tensile, Symbol::sigma_e});
  MemberLimits limits;
  limits.details = plain();
  const Explanation text = fatigue().explain({s, m, across, limits, 1.0, 1.0});
  CHECK(text.line ==
        "Fatigue: 1 x (0.6 MPa amplitude and 0.6 MPa mean shear stress) at x = 0 mm against 4 MPa "
        "at 1e7 cycles and 10 MPa (Goodman): u = 0.21.");
}

TEST_CASE("A weld of steel is held against its detail category, whatever the mean") {
  // d 50 mm, 1 kN m: W = 12271.8 mm3, 81.487 MPa. Reversed: range 162.97 MPa. Category 71 at 5e5
  // cycles: 71 x 4^(1/3) = 112.705 MPa.
  const SectionProperties s = solid_round(0.05);
  MemberDetails d;
  d.detail_category = 71 * megapascal;
  const MemberMaterial m = steel(490, 355);
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 5e5, -1.0), d, 1.0) ==
        Approx(162.975 / 112.705).epsilon(1e-5));
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 5e5, 0.5), d, 1.0) ==
        Approx(40.7437 / 112.705).epsilon(1e-5));
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 1e12, -1.0), d, 1.0) ==
        Approx(162.975e6 / cut_off_limit(71e6)).epsilon(1e-5));
  // At few cycles the range is held below 1.5 f_y = 532.5 MPa.
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 1.0, -1.0), d, 1.0) ==
        Approx(162.975 / 532.5).epsilon(1e-5));
  // A weld without a category has the lowest one.
  MemberDetails unnamed;
  unnamed.welded = true;
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 2e6, -1.0), unnamed, 1.0) ==
        Approx(162.975 / 36.0).epsilon(1e-5));
  MemberLimits limits;
  limits.details = unnamed;
  const LoadEffects effects = swinging({.M_y = 1000.0}, 2e6, -1.0);
  const Explanation text = fatigue().explain({s, m, effects, limits, 1.0, 1.0});
  CHECK(text.line ==
        "Fatigue of a weld: 1 x 163 MPa stress range at x = 0 mm against 36 MPa at 2e6 cycles: "
        "u = 4.527.");
  CHECK(has(text, "the lowest of the tables as none is stated"));
}

TEST_CASE("A weld in another material than steel is not shown to last") {
  const SectionProperties s = solid_round(0.05);
  MemberLimits limits;
  limits.details.detail_category = 71 * megapascal;
  const LoadEffects effects = swinging({.M_y = 1000.0}, 5e5, -1.0);
  const MemberMaterial m = aluminium();
  CHECK(u(s, m, effects, limits.details) == std::numeric_limits<double>::infinity());
  const Explanation text = fatigue().explain({s, m, effects, limits, 1.0, 1.5});
  CHECK(text.line.find("EN 1993-1-9 is for steel") != std::string::npos);
  CHECK(text.line.find("u = infinity") != std::string::npos);
  // A steady load is no fatigue.
  CHECK(u(s, m, swinging({.M_y = 1000.0}, 5e5, 1.0), limits.details) == 0.0);
}

TEST_CASE("Fatigue applies where the load case swings and names what it reads") {
  using Symbols = std::vector<Symbol>;
  const SectionProperties s = solid_round(0.05);
  LoadCase still = cantilever({force(1.0, 1.0)});
  CHECK_FALSE(fatigue().applies(reduce(still, 1.0), {}, steel(700, 550), s));
  still.fatigue = FatigueLoading{};
  CHECK(fatigue().applies(reduce(still, 1.0), {}, steel(700, 550), s));
  CHECK(fatigue().default_factor(steel(700, 550)) == 1.5);

  const LoadEffects effects = reduce(still, 1.0);
  CHECK(fatigue().needs(effects, steel(700, 550)) == Symbols{Symbol::tensile, Symbol::sigma_y});
  MemberMaterial measured = steel(700, 550);
  measured.sigma_e = 300 * megapascal;
  CHECK(fatigue().needs(effects, measured) ==
        Symbols{Symbol::tensile, Symbol::sigma_y, Symbol::sigma_e});
  MemberMaterial unknown = aluminium();
  unknown.sigma_e.reset();
  CHECK(fatigue().needs(effects, unknown) ==
        Symbols{Symbol::tensile, Symbol::sigma_y, Symbol::sigma_e});
  unknown.rule = StressRule::principal;
  LoadCase heavy = still;
  heavy.acceleration_z = 9.80665;
  CHECK(fatigue().needs(reduce(heavy, 1.0), unknown) ==
        Symbols{Symbol::tensile, Symbol::sigma_e, Symbol::rho});
}

TEST_CASE("A measured endurance limit of a steel goes before the estimate") {
  const SectionProperties s = solid_round(0.005);
  const LoadEffects effects = swinging({.M_y = 1.0}, 1e8, -1.0);
  MemberMaterial measured = steel(700, 550);
  measured.sigma_e = 300 * megapascal;
  measured.endurance_cycles = 1e7;
  CHECK(u(s, measured, effects, plain()) ==
        Approx(u(s, steel(700, 550), effects, plain()) * 350.0 / 300.0).epsilon(1e-12));
}

TEST_CASE("A higher tensile strength can help and can harm, which is why no trend is declared") {
  const SectionProperties s = solid_round(0.03);
  const LoadEffects effects = swinging({.M_y = 200.0}, 1e7, -1.0);
  CHECK(u(s, steel(900, 550), effects) < u(s, steel(600, 550), effects));
  // Beyond 1400 MPa the limit is level and the surface factor falls on.
  CHECK(u(s, steel(2000, 1550), effects) > u(s, steel(1450, 1550), effects));
  CHECK(fatigue().trend_with(Symbol::tensile) == Trend::neither);
}

}  // namespace bismar
