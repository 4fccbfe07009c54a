// SPDX-License-Identifier: MIT
// The declarations of crack, natural frequency, elongation and thermal restraint held against
// random members with cracks, masses, heat and own weight.
#include <bismar/mechanics/limit_state.hpp>

#include "mechanics/random_members.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <optional>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr double rounding = 1e-11;
constexpr std::array<const char*, 4> ids = {
    "crack", "natural frequency", "elongation", "thermal restraint"};

const std::map<Symbol, std::optional<double> MemberMaterial::*>& symbols() {
  static const std::map<Symbol, std::optional<double> MemberMaterial::*> list = {
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
      {Symbol::weld_yield, &MemberMaterial::weld_yield_factor},
      {Symbol::weld_tensile, &MemberMaterial::weld_tensile_factor}};
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

double between(std::mt19937& random, double low, double high) {
  return std::exp(std::uniform_real_distribution<double>(std::log(low), std::log(high))(random));
}

int below(std::mt19937& random, int n) {
  return std::uniform_int_distribution<int>(0, n - 1)(random);
}

struct Trial {
  test::RandomSection section;
  double length;
  LoadEffects effects;
  MemberMaterial material;
  MemberLimits limits;

  explicit Trial(std::mt19937& random)
      : section(random),
        length(std::uniform_real_distribution<double>(0.1, 5.0)(random)),
        effects(),
        material(test::random_material(random)),
        limits(test::random_limits(random, length)) {
    LoadCase load_case = test::random_load_case(random, length);
    if (below(random, 2) == 0) {
      load_case.temperature_change = between(random, 1.0, 200.0);
      load_case.restrained = below(random, 2) == 0;
    }
    if (below(random, 3) == 0) {
      load_case.acceleration_z = between(random, 1.0, 100.0);
    }
    effects = reduce(load_case, length);
    material.alpha = between(random, 1e-6, 1e-4);
    material.K_Ic = between(random, 1e6, 200e6);
    limits.frequency = between(random, 1.0, 1e3);
    limits.elongation = between(random, 1e-5, 1e-2);
    MemberDetails& details = limits.details;
    details.masses.clear();
    for (int k = below(random, 4); k > 0; --k) {
      details.masses.push_back(
          {.mass = between(random, 1e-2, 1e3),
           .at = length * std::uniform_real_distribution<double>(0.0, 1.0)(random)});
    }
    const double depth = between(random, 1e-4, 5e-2);
    details.crack = Crack{.kind = below(random, 2) == 0 ? Crack::Kind::edge : Crack::Kind::surface,
                          .depth = depth,
                          .half_length = depth * between(random, 1.0, 20.0)};
  }

  [[nodiscard]] bool applies(const LimitState& state) const {
    return state.applies(effects, limits, material, section.at(1.0));
  }
  [[nodiscard]] double u(const LimitState& state, double scale, const MemberMaterial& with) const {
    const SectionProperties s = section.at(scale);
    return state.utilisation({s, with, effects, limits, length, 1.5});
  }
};

}  // namespace

TEST_CASE("Service limit states move with the section's scale as they declare") {
  std::mt19937 random(31);
  std::map<std::string, int> finite;
  for (int n = 0; n < 4000; ++n) {
    const Trial trial(random);
    const double scale = std::uniform_real_distribution<double>(1.0, 1.6)(random);
    for (const char* id : ids) {
      const LimitState& state = *limit_state(id);
      if (!trial.applies(state)) {
        continue;
      }
      const double before = trial.u(state, 1.0, trial.material);
      const double after = trial.u(state, scale, trial.material);
      INFO(id << " in trial " << n << ": " << before << " to " << after);
      REQUIRE_FALSE(std::isnan(before));
      REQUIRE(before >= 0.0);
      CHECK(holds(state.trend_with_scale(), before, after));
      finite[id] += std::isfinite(before) ? 1 : 0;
    }
  }
  for (const char* id : ids) {
    INFO(id);
    CHECK(finite[id] > 400);
  }
}

TEST_CASE("Service limit states move with each material value as they declare and read no other") {
  std::mt19937 random(32);
  for (int n = 0; n < 3000; ++n) {
    Trial trial(random);
    if (n % 3 == 0) {
      trial.material.flexural.reset();
    }
    for (const char* id : ids) {
      const LimitState& state = *limit_state(id);
      if (!trial.applies(state)) {
        continue;
      }
      const std::vector<Symbol> needs = state.needs(trial.effects, trial.material);
      const double before = trial.u(state, 1.0, trial.material);
      MemberMaterial only = trial.material;
      for (const auto& [symbol, member] : symbols()) {
        if (std::find(needs.begin(), needs.end(), symbol) == needs.end()) {
          (only.*member).reset();
        }
        if (!(trial.material.*member)) {
          continue;
        }
        MemberMaterial grown = trial.material;
        *(grown.*member) *= std::uniform_real_distribution<double>(1.0, 3.0)(random);
        const double after = trial.u(state, 1.0, grown);
        INFO(id << " with " << name(symbol) << " in trial " << n << ": " << before << " to "
                << after);
        CHECK(holds(state.trend_with(symbol), before, after));
      }
      INFO(id << " in trial " << n);
      const bool complete = std::all_of(needs.begin(), needs.end(), [&](Symbol symbol) {
        return (trial.material.*symbols().at(symbol)).has_value();
      });
      if (complete) {
        CHECK(trial.u(state, 1.0, only) == before);
      }
    }
  }
}

TEST_CASE("Service limit states rise with a deeper crack, more mass and more heat") {
  std::mt19937 random(33);
  for (int n = 0; n < 1500; ++n) {
    const Trial trial(random);
    Trial worse = trial;
    worse.limits.details.crack->depth *= 1.2;
    worse.limits.details.crack->half_length *= 1.2;
    worse.limits.details.masses.push_back({.mass = 10.0, .at = 0.6 * trial.length});
    worse.effects.temperature_change *= 1.2;
    for (const char* id : ids) {
      const LimitState& state = *limit_state(id);
      if (!trial.applies(state)) {
        continue;
      }
      INFO(id << " in trial " << n);
      CHECK(worse.u(state, 1.0, worse.material) >=
            trial.u(state, 1.0, trial.material) * (1.0 - rounding));
    }
  }
}

TEST_CASE("Every explanation of a service limit state gives its utilisation") {
  std::mt19937 random(34);
  for (int n = 0; n < 800; ++n) {
    const Trial trial(random);
    const SectionProperties s = trial.section.at(1.0);
    for (const char* id : ids) {
      const LimitState& state = *limit_state(id);
      if (!trial.applies(state)) {
        continue;
      }
      const Explanation text =
          state.explain({s, trial.material, trial.effects, trial.limits, trial.length, 1.5});
      INFO(text.line);
      CHECK(text.line.find("u = ") != std::string::npos);
      CHECK_FALSE(text.steps.empty());
      CHECK(text.line.find("not a number") == std::string::npos);
    }
  }
}

}  // namespace bismar
