// SPDX-License-Identifier: MIT
// Every declaration of every limit state held against random members.
#include <bismar/mechanics/limit_state.hpp>

#include "mechanics/random_members.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <optional>
#include <random>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar {

namespace {

/// Slack for rounding only.
constexpr double rounding = 1e-12;

const std::vector<std::pair<Symbol, std::optional<double> MemberMaterial::*>>& symbols() {
  static const std::vector<std::pair<Symbol, std::optional<double> MemberMaterial::*>> list = {
      {Symbol::rho, &MemberMaterial::rho},
      {Symbol::E, &MemberMaterial::E},
      {Symbol::E_05, &MemberMaterial::E_05},
      {Symbol::G, &MemberMaterial::G},
      {Symbol::sigma_y, &MemberMaterial::sigma_y},
      {Symbol::tensile, &MemberMaterial::tensile},
      {Symbol::compressive, &MemberMaterial::compressive},
      {Symbol::flexural, &MemberMaterial::flexural},
      {Symbol::shear, &MemberMaterial::shear},
      {Symbol::alpha, &MemberMaterial::alpha},
      {Symbol::K_Ic, &MemberMaterial::K_Ic},
      {Symbol::sigma_e, &MemberMaterial::sigma_e}};
  return list;
}

bool holds(Trend trend, double before, double after) {
  switch (trend) {
    case Trend::constant:
      return before == after;
    case Trend::rises:
      return after >= before * (1.0 - rounding);
    case Trend::falls:
      return after <= before * (1.0 + rounding);
    case Trend::neither:
      return true;
  }
  return false;
}

/// Whether compression raises what the limit state looks at.
bool is_amplified(std::string_view id) {
  return id == "deflection" || id == "deflection with shear" || id == "rotation" ||
         id == "compression with bending" || id == "eccentric compression" || id == "fatigue" ||
         id == "crack" || id == "net section";
}

struct Trial {
  test::RandomSection section;
  LoadCase load_case;
  double length;
  LoadEffects effects;
  MemberMaterial material;
  MemberLimits limits;

  explicit Trial(std::mt19937& random)
      : section(random),
        load_case(),
        length(std::uniform_real_distribution<double>(0.1, 5.0)(random)),
        effects(),
        material(test::random_material(random)),
        limits(test::random_limits(random, length)) {
    load_case = test::random_load_case(random, length);
    effects = reduce(load_case, length);
  }

  [[nodiscard]] double u(const LimitState& state,
                         double scale,
                         const MemberMaterial& with,
                         double factor) const {
    const SectionProperties s = section.at(scale);
    return state.utilisation({s, with, effects, limits, length, factor});
  }
};

}  // namespace

TEST_CASE("Every limit state moves with the section's scale as it declares") {
  std::mt19937 random(11);
  std::uniform_real_distribution<double> growth(1.0, 1.6);
  for (int n = 0; n < 4000; ++n) {
    const Trial trial(random);
    const double factor = growth(random);
    const SectionProperties section = trial.section.at(1.0);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(trial.effects, trial.limits, trial.material, section)) {
        continue;
      }
      const double before = trial.u(*state, 1.0, trial.material, factor);
      const double after = trial.u(*state, growth(random), trial.material, factor);
      INFO(state->id() << " of " << name(section.family) << " in trial " << n << ": " << before
                       << " to " << after);
      REQUIRE_FALSE(std::isnan(before));
      REQUIRE(before >= 0.0);
      CHECK(holds(state->trend_with_scale(), before, after));
    }
  }
}

TEST_CASE("Every limit state moves with each material value as it declares") {
  std::mt19937 random(12);
  std::uniform_real_distribution<double> growth(1.0, 3.0);
  for (int n = 0; n < 3000; ++n) {
    Trial trial(random);
    // Some tables have no flexural or tensile strength.
    if (n % 3 == 0) {
      trial.material.flexural.reset();
    }
    const SectionProperties section = trial.section.at(1.0);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(trial.effects, trial.limits, trial.material, section)) {
        continue;
      }
      for (const auto& [symbol, member] : symbols()) {
        if (!(trial.material.*member)) {
          continue;
        }
        MemberMaterial grown = trial.material;
        *(grown.*member) *= growth(random);
        const double before = trial.u(*state, 1.0, trial.material, 1.5);
        const double after = trial.u(*state, 1.0, grown, 1.5);
        INFO(state->id() << " with " << name(symbol) << " in trial " << n << ": " << before
                         << " to " << after);
        CHECK(holds(state->trend_with(symbol), before, after));
      }
    }
  }
}

TEST_CASE(
    "Utilisation is proportional to the factor, but for walls, restraint and bending in "
    "compression, "
    "where it rises") {
  std::mt19937 random(13);
  for (int n = 0; n < 1500; ++n) {
    const Trial trial(random);
    const SectionProperties section = trial.section.at(1.0);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(trial.effects, trial.limits, trial.material, section)) {
        continue;
      }
      const double single = trial.u(*state, 1.0, trial.material, 1.0);
      const double twice = trial.u(*state, 1.0, trial.material, 2.0);
      INFO(state->id() << " in trial " << n);
      const bool amplified = trial.effects.compression > 0.0 && is_amplified(state->id());
      if (amplified) {
        CHECK(twice >= 2.0 * single * (1.0 - rounding));
      } else if (state->id() == "wall slenderness" || state->id() == "thermal restraint") {
        CHECK(twice >= single);
      } else {
        CHECK(twice == Approx(2.0 * single).epsilon(1e-14));
      }
    }
  }
}

TEST_CASE("A limit state needs no value that it does not name, and each that it names") {
  std::mt19937 random(14);
  for (int n = 0; n < 3000; ++n) {
    Trial trial(random);
    if (n % 3 == 0) {
      trial.material.flexural.reset();
    }
    if (n % 4 == 0) {
      trial.material.tensile.reset();
    }
    const SectionProperties section = trial.section.at(1.0);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(trial.effects, trial.limits, trial.material, section)) {
        continue;
      }
      const std::vector<Symbol> needs = state->needs(trial.effects, trial.material);
      bool complete = true;
      MemberMaterial only = trial.material;
      for (const auto& [symbol, member] : symbols()) {
        const bool needed = std::find(needs.begin(), needs.end(), symbol) != needs.end();
        if (needed) {
          complete = complete && (only.*member).has_value();
        } else {
          (only.*member).reset();
        }
      }
      INFO(state->id() << " in trial " << n);
      if (complete) {
        const double u = trial.u(*state, 1.0, only, 1.0);
        CHECK_FALSE(std::isnan(u));
        CHECK(u >= 0.0);
      }
    }
  }
}

TEST_CASE("Every explanation states its utilisation and takes at least one step") {
  std::mt19937 random(15);
  for (int n = 0; n < 1000; ++n) {
    const Trial trial(random);
    const SectionProperties section = trial.section.at(1.0);
    for (const LimitState* state : limit_states()) {
      if (!state->applies(trial.effects, trial.limits, trial.material, section)) {
        continue;
      }
      const CheckInput input{
          section, trial.material, trial.effects, trial.limits, trial.length, 1.5};
      const Explanation text = state->explain(input);
      INFO(text.line);
      CHECK(text.line.find("u = ") != std::string::npos);
      CHECK_FALSE(text.steps.empty());
      CHECK(text.line.find("nan") == std::string::npos);
      CHECK(text.line.find("not a number") == std::string::npos);
    }
  }
}

}  // namespace bismar
