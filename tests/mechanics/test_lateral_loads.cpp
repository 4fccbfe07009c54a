// SPDX-License-Identifier: MIT
// Loads above the shear centre together with moments that act against them.
#include <bismar/mechanics/lateral_torsional.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <numbers>
#include <vector>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;
constexpr const char* turning = "lateral-torsional buckling";

/// A brittle material: its limit is M_cr itself.
MemberMaterial brittle() {
  MemberMaterial m;
  m.rule = StressRule::principal;
  m.E = 210e9;
  m.G = 81e9;
  m.rho = 1.0;
  return m;
}

double u_of(const SectionProperties& section, const LoadCase& load_case, double length) {
  const MemberMaterial material = brittle();
  const LoadEffects effects = reduce(load_case, length);
  return limit_state(turning)->utilisation({section, material, effects, {}, length, 1.0});
}

/// The factor on the load case by the energy method, loads at the top edge.
double by_energy(const SectionProperties& s,
                 double length,
                 LateralEnds ends,
                 const LateralLoading& loading) {
  return critical_load_factor({.youngs_modulus = 210e9,
                               .shear_modulus = 81e9,
                               .I_z = s.I_z,
                               .I_t = s.I_t,
                               .I_w = s.I_w,
                               .length = length},
                              ends,
                              loading);
}

const std::vector<SectionProperties>& sections() {
  static const std::vector<SectionProperties> list = {i_section(0.3, 0.15, 0.0071, 0.0107, 0.015),
                                                      i_section(0.6, 0.22, 0.012, 0.019, 0.024),
                                                      i_section(0.2, 0.12, 0.004, 0.005, 0.0),
                                                      solid_rectangle(0.1, 0.01)};
  return list;
}

/// A point load as a narrow triangle of the same force.
std::function<double(double)> near(double place, double force, double length) {
  constexpr double half = 5.0 / 240.0;
  return [=](double xi) {
    return std::max(0.0, 1.0 - std::abs(xi - place) / half) * force / (half * length);
  };
}

}  // namespace

TEST_CASE("The share of the loads that twists a member, by hand") {
  // Uniform load: integral of sin^2 is L / 2. Point loads by the sine of their place.
  CHECK(reduce(pinned_pinned({distributed(300.0, 300.0, 0.0, 2.0)}), 2.0).moment_y.load_share ==
        Approx(300.0));
  CHECK(reduce(pinned_pinned({force(100.0, 0.5)}), 2.0).moment_y.load_share == Approx(50.0));
  CHECK(reduce(fixed_fixed({force(-100.0, 1.0)}), 2.0).moment_y.load_share == Approx(100.0));
  // Magnitudes: opposite loads at two places do not cancel, at one place they do.
  CHECK(reduce(pinned_pinned({force(100.0, 0.5), force(-100.0, 1.5)}), 2.0).moment_y.load_share ==
        Approx(100.0));
  CHECK(reduce(pinned_pinned({force(100.0, 0.5), force(-100.0, 0.5), force(1.0, 1.0)}), 2.0)
            .moment_y.load_share == Approx(1.0));
  // A triangular load that changes its sign in the middle: integral of |1 - 2 xi| sin^2(pi xi)
  // = 1/4 - 1/pi^2.
  CHECK(reduce(pinned_pinned({distributed(100.0, -100.0, 0.0, 2.0)}), 2.0).moment_y.load_share ==
        Approx(200.0 * (0.25 - 1.0 / (pi * pi))).epsilon(1e-5));
  // Cantilever: x / L.
  CHECK(reduce(cantilever({distributed(300.0, 300.0, 0.0, 2.0), force(10.0, 2.0)}), 2.0)
            .moment_y.load_share == Approx(310.0));
  // Overhang, second support at 1 of 2 m: x (s - x) / (s L) at 0.5 m and (x - s) / L at 1.5 m;
  // the reaction is no load.
  LoadCase overhang = pinned_pinned({force(80.0, 0.5), force(40.0, 1.5), force(10.0, 2.0)});
  overhang.second_support = 1.0;
  CHECK(reduce(overhang, 2.0).moment_y.load_share == Approx(10.0 + 10.0 + 5.0));
  // Moments and loads of the other plane twist nothing.
  const LoadEffects none =
      reduce(pinned_pinned({moment(5.0, 0.0), force(1.0, 1.0, Along::y)}), 2.0);
  CHECK(none.moment_y.load_share == 0.0);
  CHECK(none.moment_z.load_share == Approx(1.0));
}

TEST_CASE("C2 of a uniform load with end moments, by hand") {
  // M = q L^2 / 16 at both ends and in the middle, q = 1 kN/m, L = 4 m: 1000 N m; quarters 500 N m.
  // C1: 12.5 / (2.5 + 1.5 + 4 + 1.5) = 1.3158 against root(35 / (1 + 2.25 + 16 + 2.25)) = 1.2759.
  // C2 = 1.153 x 1.2759 x 4 m x 2000 N / (pi^2 x 1000 N m) = 1.19246.
  const double L = 4.0;
  const LoadCase load_case =
      pinned_pinned({distributed(-1e3, -1e3, 0.0, L), moment(1e3, 0.0), moment(-1e3, L)});
  const LoadEffects effects = reduce(load_case, L);
  CHECK(effects.moment_y.largest == Approx(1000.0));
  CHECK(std::abs(effects.moment_y.quarters[1]) == Approx(1000.0));
  CHECK(std::abs(effects.moment_y.quarters[0]) == Approx(500.0));
  CHECK(effects.moment_y.load_share == Approx(2000.0));
  const SectionProperties s = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  const double expected = elastic_critical_moment({.youngs_modulus = 210e9,
                                                   .shear_modulus = 81e9,
                                                   .I_z = s.I_z,
                                                   .I_t = s.I_t,
                                                   .I_w = s.I_w,
                                                   .length = L,
                                                   .factors = {.C1 = 1.27588, .C2 = 1.19246},
                                                   .load_height = 0.15});
  CHECK(1000.0 / u_of(s, load_case, L) == Approx(expected).epsilon(1e-4));
}

TEST_CASE("A load on top with end moments stays on the safe side of the energy method") {
  double least = 10.0;
  for (const SectionProperties& s : sections()) {
    for (const double L : {8.0 * s.height, 15.0 * s.height, 30.0 * s.height}) {
      for (const double at_start : {0.0, 0.25, 0.5, 0.75, 1.0, 1.5}) {
        for (const double at_end : {0.0, 0.5, 1.0}) {
          for (const bool point : {false, true}) {
            // End moments in shares of the span's own moment, against it.
            const double span = point ? 1e3 * L / 4.0 : 1e3 * L * L / 8.0;
            const double a = at_start * span;
            const double b = at_end * span;
            LoadCase load_case = pinned_pinned({moment(-a, 0.0), moment(b, L)});
            load_case.loads.push_back(point ? force(1e3, L / 2.0) : distributed(1e3, 1e3, 0.0, L));
            const LoadEffects effects = reduce(load_case, L);
            const auto moment_at = [=](double xi) {
              const double of_load =
                  point ? span * (1.0 - std::abs(2.0 * xi - 1.0)) : 4.0 * span * xi * (1.0 - xi);
              return of_load - a + (a - b) * xi;
            };
            CHECK(std::abs(effects.moment_y.quarters[0]) ==
                  Approx(std::abs(moment_at(0.25))).margin(1e-6 * span));
            CHECK(std::abs(effects.moment_y.quarters[2]) ==
                  Approx(std::abs(moment_at(0.75))).margin(1e-6 * span));
            const double factor =
                by_energy(s,
                          L,
                          LateralEnds::forks,
                          {.moment = moment_at,
                           .load = point ? near(0.5, 1e3, L) : [](double) { return 1e3; },
                           .load_height = s.height / 2.0});
            const double ratio = factor * u_of(s, load_case, L);
            INFO((point ? "point" : "uniform") << ", ends " << at_start << " and " << at_end
                                               << ", h = " << s.height << ", L = " << L);
            CHECK(ratio >= 0.97);
            CHECK(ratio <= 2.1);
            least = std::min(least, ratio);
          }
        }
      }
    }
  }
  CHECK(least < 1.0);
}

TEST_CASE("A cantilever with a moment against its load stays on the safe side") {
  double least = 10.0;
  double most = 0.0;
  for (const SectionProperties& s : sections()) {
    for (const double L : {5.0 * s.height, 10.0 * s.height, 30.0 * s.height}) {
      for (const double share : {0.1, 0.3, 0.4, 0.5, 0.8, 1.2, 2.0}) {
        for (const bool tip : {true, false}) {
          const double root = tip ? 1e3 * L : 1e3 * L * L / 2.0;
          LoadCase load_case = cantilever({moment(-share * root, L)});
          load_case.loads.push_back(tip ? force(1e3, L) : distributed(1e3, 1e3, 0.0, L));
          CHECK(reduce(load_case, L).moment_y.largest ==
                Approx(root * std::max(share, 1.0 - share)));
          LateralLoading loading;
          loading.moment = [=](double xi) {
            return root * (tip ? 1.0 - xi : (1.0 - xi) * (1.0 - xi)) - share * root;
          };
          if (tip) {
            loading.tip_load = 1e3;
          } else {
            loading.load = [](double) { return 1e3; };
          }
          loading.load_height = s.height / 2.0;
          const double ratio =
              by_energy(s, L, LateralEnds::cantilever, loading) * u_of(s, load_case, L);
          INFO("share " << share << ", tip " << tip << ", h = " << s.height << ", L = " << L);
          CHECK(ratio >= 1.0);
          least = std::min(least, ratio);
          most = std::max(most, ratio);
        }
      }
    }
  }
  CHECK(least < 1.1);
  CHECK(most < 5.0);
}

TEST_CASE("With an overhang C2 is half the loads' torques over the largest moment, by hand") {
  // The loads above: 80 N at 0.5 m, 40 N at 1.5 m, 10 N at the tip, supports at 0 and 1 m of 2 m:
  // 30 N m at the support, load_share 25 N: C2 = 25 N x 2 m / (2 x 30 N m) = 0.83333. Own mass: 1/2
  // m2 of moment there, share 1/6 + 1/2 m2 over 2 m: 0.66667 more.
  const SectionProperties s = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  const auto expected = [&](double C2) {
    return elastic_critical_moment({.youngs_modulus = 210e9,
                                    .shear_modulus = 81e9,
                                    .I_z = s.I_z,
                                    .I_t = s.I_t,
                                    .I_w = s.I_w,
                                    .length = 2.0,
                                    .k = 2.0,
                                    .k_w = 2.0,
                                    .factors = {.C1 = 1.0, .C2 = C2},
                                    .load_height = 0.15});
  };
  LoadCase load_case = pinned_pinned({force(80.0, 0.5), force(40.0, 1.5), force(10.0, 2.0)});
  load_case.second_support = 1.0;
  CHECK(30.0 / u_of(s, load_case, 2.0) == Approx(expected(25.0 / 30.0)));
  load_case.acceleration_z = 1e-9;
  CHECK(30.0 / u_of(s, load_case, 2.0) == Approx(expected(1.5)));
}

TEST_CASE("Own mass beside end moments counts with its load") {
  // Own mass of A x 1 kg/m3 x a as a uniform load; the moments as they are taken, added.
  for (const SectionProperties& s : sections()) {
    for (const double L : {8.0 * s.height, 30.0 * s.height}) {
      for (const double at_ends : {0.5, 0.8, 1.0}) {
        for (const double own : {0.2, 1.0, 3.0}) {
          const double span = 1e3 * L * L / 8.0;
          const double a = at_ends * span;
          LoadCase load_case =
              pinned_pinned({moment(-a, 0.0), moment(a, L), distributed(1e3, 1e3, 0.0, L)});
          CHECK(std::abs(reduce(load_case, L).moment_y.quarters[1]) ==
                Approx(span - a).margin(1e-6 * span));
          load_case.acceleration_z = own * 1e3 / s.area;
          const double factor = by_energy(
              s,
              L,
              LateralEnds::forks,
              {.moment = [=](double xi) { return (1.0 + own) * 4.0 * span * xi * (1.0 - xi) - a; },
               .load = [=](double) { return (1.0 + own) * 1e3; },
               .load_height = s.height / 2.0});
          INFO("ends " << at_ends << ", own " << own << ", h = " << s.height << ", L = " << L);
          CHECK(factor * u_of(s, load_case, L) >= 1.0);
        }
      }
    }
  }
}

TEST_CASE("A direct moment leaves the destabilising load in place") {
  const SectionProperties s = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  const double L = 4.0;
  LoadCase load_case = pinned_pinned({distributed(1e3, 1e3, 0.0, L)});
  const double alone = u_of(s, load_case, L);
  load_case.direct = InternalForces{.M_y = 1e-6};
  // C1 = 1 and C2 = 0.54 in place of 1.13 and 0.61.
  CHECK_FALSE(reduce(load_case, L).moment_y.end_ratio.has_value());
  const double expected = elastic_critical_moment({.youngs_modulus = 210e9,
                                                   .shear_modulus = 81e9,
                                                   .I_z = s.I_z,
                                                   .I_t = s.I_t,
                                                   .I_w = s.I_w,
                                                   .length = L,
                                                   .factors = {.C1 = 1.0, .C2 = 0.54},
                                                   .load_height = 0.15});
  CHECK(2000.0 / u_of(s, load_case, L) == Approx(expected).epsilon(1e-9));
  CHECK(u_of(s, load_case, L) > alone);
  // Without another load of its plane it is one moment over the length.
  LoadCase direct = pinned_pinned({force(1.0, 1.0, Along::y)});
  direct.direct = InternalForces{.M_y = 5.0};
  CHECK(reduce(direct, L).moment_y.end_ratio == 1.0);
}

TEST_CASE("Forces beyond all measure give an infinite utilisation, never a fault") {
  MemberMaterial steel;
  steel.E = 210e9;
  steel.G = 81e9;
  steel.sigma_y = 355e6;
  MemberMaterial timber;
  timber.rule = StressRule::direct_and_shear;
  timber.column_law = ColumnLaw::timber_solid;
  timber.E = 11e9;
  timber.E_05 = 7.4e9;
  timber.G = 690e6;
  timber.compressive = 21e6;
  timber.flexural = 24e6;
  MemberMaterial iron = brittle();
  iron.compressive = 700e6;
  iron.flexural = 300e6;
  const double most = std::numeric_limits<double>::max();
  for (const double size : {1e300, most / 4.0}) {
    LoadCase direct;
    direct.direct = InternalForces{.N = -size, .V_z = size, .M_y = size, .M_z = size};
    const LoadCase on_top =
        pinned_pinned({force(size, 0.5), moment(size / 2.0, 0.0), axial(-size)});
    for (const LoadCase& load_case : {direct, on_top}) {
      const LoadEffects effects = reduce(load_case, 1.0);
      for (const SectionProperties& s : {i_section(1e-4, 5e-5, 2e-6, 3e-6, 0.0),
                                         solid_rectangle(1e-4, 5e-5),
                                         solid_square(1e-5)}) {
        for (const MemberMaterial& material : {steel, timber, iron}) {
          for (const char* id : {"lateral-torsional buckling",
                                 "compression with bending",
                                 "torsional-flexural buckling",
                                 "shear buckling"}) {
            const LimitState& state = *limit_state(id);
            if (!state.applies(effects, {}, material, s)) {
              continue;
            }
            INFO(id << " at " << size);
            const double u = state.utilisation({s, material, effects, {}, 1.0, 1.5});
            CHECK(u > 1e290);
            CHECK_FALSE(state.explain({s, material, effects, {}, 1.0, 1.5}).line.empty());
          }
        }
      }
    }
  }
  LoadCase direct;
  direct.direct = InternalForces{.N = -1e300, .M_y = 1e300};
  const SectionProperties s = solid_square(1e-5);
  CHECK(std::isinf(limit_state("compression with bending")
                       ->utilisation({s, steel, reduce(direct, 1.0), {}, 1.0, 1.5})));
}

}  // namespace bismar
