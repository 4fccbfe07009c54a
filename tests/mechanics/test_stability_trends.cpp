// SPDX-License-Identifier: MIT
// What random trials hold of the stability limit states beside their trends.
#include <bismar/mechanics/limit_state.hpp>

#include "mechanics/random_members.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <random>
#include <utility>

namespace bismar {

namespace {

struct Member {
  SectionProperties section;
  double length;
  MemberMaterial material;
  MemberLimits limits;

  explicit Member(std::mt19937& random)
      : section(test::RandomSection(random).at(1.0)),
        length(std::uniform_real_distribution<double>(0.1, 5.0)(random)),
        material(test::random_material(random)),
        limits(test::random_limits(random, length)) {}

  /// 0 where the limit state does not apply.
  [[nodiscard]] double u(const char* id, const LoadEffects& effects) const {
    const LimitState& state = *limit_state(id);
    return state.applies(effects, limits, material, section)
               ? state.utilisation({section, material, effects, limits, length, 1.5})
               : 0.0;
  }
  [[nodiscard]] double under(const char* id, const InternalForces& forces) const {
    LoadCase load_case;
    load_case.direct = forces;
    return u(id, reduce(load_case, length));
  }
};

}  // namespace

TEST_CASE("Compression with bending tends to the column without moments and never below it") {
  std::mt19937 random(21);
  for (int n = 0; n < 2000; ++n) {
    const Member m(random);
    INFO("trial " << n << " of " << name(m.section.family));
    const double column = std::max(m.under("flexural buckling", {.N = -1.0}),
                                   m.under("torsional-flexural buckling", {.N = -1.0}));
    const double N = 0.1 / column;
    const double tiny =
        1e-9 * m.section.W_el_z * std::min(*m.material.sigma_y, *m.material.flexural);
    CHECK(m.under("compression with bending", {.N = -N, .M_z = tiny}) == Approx(0.1).epsilon(1e-6));
    CHECK(m.under("compression with bending", {.N = -N, .M_y = tiny, .M_z = 1e6 * tiny}) >=
          0.1 * (1.0 - 1e-9));
  }
}

TEST_CASE("Compression with bending tends to the bending check without compression") {
  std::mt19937 random(22);
  for (int n = 0; n < 2000; ++n) {
    Member m(random);
    m.limits.details.welded = false;
    const MemberMaterial& material = m.material;
    const bool timber = material.column_law == ColumnLaw::timber_solid ||
                        material.column_law == ColumnLaw::timber_glued;
    const bool ductile = material.rule == StressRule::von_mises_yield && !timber;
    const double strength = ductile ? *material.sigma_y : *material.flexural;
    // About the weak axis alone nothing turns aside, and an angle's modulus is that of its fibres.
    if (m.section.I_yz != 0.0) {
      continue;
    }
    INFO("trial " << n << " of " << name(m.section.family));
    CHECK(m.under("compression with bending",
                  {.N = -1e-12, .M_z = 0.2 * m.section.W_el_z * strength}) ==
          Approx(1.5 * 0.2).epsilon(1e-6));
    // About y it is what lateral-torsional buckling leaves; timber may square it (6.35).
    if (!timber && ductile) {
      const InternalForces bent{.M_y = 0.2 * m.section.W_el_y * strength};
      const double aside = m.under("lateral-torsional buckling", bent);
      CHECK(m.under("compression with bending", {.N = -1e-12, .M_y = bent.M_y}) ==
            Approx(std::max(0.3, aside)).epsilon(1e-6));
    }
  }
}

TEST_CASE("A column that may twist never carries more than it does in bending") {
  // By twisting the curve is that about z, which is the lower one; so only the Euler loads count.
  std::mt19937 random(23);
  int found = 0;
  for (int n = 0; n < 2000; ++n) {
    Member m(random);
    m.limits.column_method = ColumnMethod::euler;
    const double twisting = m.under("torsional-flexural buckling", {.N = -1.0});
    if (twisting > 0.0) {
      ++found;
      INFO("trial " << n << " of " << name(m.section.family));
      CHECK(twisting >= m.under("flexural buckling", {.N = -1.0}) * (1.0 - 1e-9));
    }
  }
  CHECK(found > 300);
}

TEST_CASE("What a weld leaves of the strengths lowers every utilisation that reads it") {
  std::mt19937 random(24);
  for (int n = 0; n < 2000; ++n) {
    Member m(random);
    m.limits.details.welded = true;
    const LoadEffects effects = reduce(test::random_load_case(random, m.length), m.length);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(effects, m.limits, m.material, m.section)) {
        continue;
      }
      const double before =
          state->utilisation({m.section, m.material, effects, m.limits, m.length, 1.5});
      for (const auto& [symbol, factor] :
           {std::pair{Symbol::weld_yield, &MemberMaterial::weld_yield_factor},
            std::pair{Symbol::weld_tensile, &MemberMaterial::weld_tensile_factor}}) {
        MemberMaterial better = m.material;
        *(better.*factor) = std::min(1.0, 1.3 * *(better.*factor));
        const double after =
            state->utilisation({m.section, better, effects, m.limits, m.length, 1.5});
        INFO(state->id() << " with " << name(symbol) << " in trial " << n);
        if (state->trend_with(symbol) == Trend::constant) {
          CHECK(after == before);
        } else {
          CHECK(state->trend_with(symbol) == Trend::falls);
          CHECK(after <= before * (1.0 + 1e-12));
        }
      }
    }
  }
}

}  // namespace bismar
