// SPDX-License-Identifier: MIT
// Separable bounds of limit states against the limit states themselves, on random members.
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/separable_bound.hpp>

#include "mechanics/random_members.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <optional>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

struct Trial {
  SectionProperties section;
  double length;
  MemberMaterial material;
  MemberLimits limits;
  LoadEffects effects;

  explicit Trial(std::mt19937& random)
      : section(test::RandomSection(random).at(1.0)),
        length(std::uniform_real_distribution<double>(0.1, 5.0)(random)),
        material(test::random_material(random)),
        limits(test::random_limits(random, length)),
        effects(reduce(test::random_load_case(random, length), length)) {}

  [[nodiscard]] double u(const LimitState& state, double factor) const {
    return state.utilisation({section, material, effects, limits, length, factor});
  }
  [[nodiscard]] std::vector<double> demands(const SeparableBound& bound) const {
    std::vector<double> out(bound.terms(), -1.0);
    bound.demands({section, effects, limits, length}, out);
    return out;
  }
  [[nodiscard]] std::vector<double> capacities(const SeparableBound& bound) const {
    std::vector<double> out(bound.terms(), -1.0);
    bound.capacities({material, effects, limits}, out);
    return out;
  }
};

/// The largest factor at which u <= 1, to a relative 1e-12; nothing where no factor brings u to 1.
std::optional<double> largest_factor(const Trial& trial, const LimitState& state) {
  double low = 1e-30;
  double high = 1e30;
  if (trial.u(state, low) > 1.0 || trial.u(state, high) <= 1.0) {
    return std::nullopt;
  }
  while (high / low > 1.0 + 1e-12) {
    const double middle = std::sqrt(low) * std::sqrt(high);
    (trial.u(state, middle) <= 1.0 ? low : high) = middle;
  }
  return low;
}

double largest_share(const std::vector<double>& demands, const std::vector<double>& capacities) {
  double largest = 0.0;
  for (std::size_t t = 0; t < demands.size(); ++t) {
    largest = std::max(largest, demands[t] / capacities[t]);
  }
  return largest;
}

}  // namespace

// The limit state itself is the oracle: the factor is raised until u = 1, where each condition must
// still hold.
TEST_CASE("A member at its limit meets every separable condition of the limit state") {
  std::mt19937 random(4101);
  std::map<std::string, int> tried;
  std::map<std::string, int> exact;
  for (int n = 0; n < 6000; ++n) {
    const Trial trial(random);
    for (const LimitState* state : limit_states()) {
      const SeparableBound* bound = state->separable();
      if (bound == nullptr ||
          !state->applies(trial.effects, trial.limits, trial.material, trial.section)) {
        continue;
      }
      const auto demands = trial.demands(*bound);
      const auto capacities = trial.capacities(*bound);
      INFO("trial " << n << ", " << state->id() << " of a " << name(trial.section.family));
      for (std::size_t t = 0; t < demands.size(); ++t) {
        REQUIRE(demands[t] >= 0.0);
        REQUIRE(capacities[t] > 0.0);
      }
      // Beyond the limit the largest share is still a lower bound.
      const double given = std::uniform_real_distribution<double>(0.5, 4.0)(random);
      const double share = given * largest_share(demands, capacities);
      if (share > 1.0) {
        REQUIRE(trial.u(*state, given) >= share * (1.0 - 1e-9));
      }
      const auto factor = largest_factor(trial, *state);
      if (!factor) {
        continue;
      }
      ++tried[std::string(state->id())];
      REQUIRE(*factor * largest_share(demands, capacities) <= 1.0 + 1e-9);
      if (bound->exact({trial.material, trial.effects, trial.limits})) {
        ++exact[std::string(state->id())];
        REQUIRE(*factor * largest_share(demands, capacities) == Approx(1.0).epsilon(1e-9));
      }
    }
  }
  for (const LimitState* state : limit_states()) {
    if (state->separable() != nullptr) {
      INFO(state->id());
      CHECK(tried[std::string(state->id())] > 200);
    }
  }
  for (const char* id : {"yield", "deflection", "rotation", "twist", "slenderness", "weld zone"}) {
    INFO(id);
    CHECK(exact[id] > 50);
  }
}

// The reduction factor of the curves lies below 1, C / lambda and 1 / lambda^2 by at most a fifth:
// near lambda = 0.5 and 2, seen in the tables of EN 1993-1-1 figure 6.4.
TEST_CASE("The conditions of a column by the curves leave at most a quarter of the load open") {
  std::mt19937 random(4102);
  const LimitState& state = *limit_state("flexural buckling");
  double widest = 1.0;
  int tried = 0;
  for (int n = 0; n < 6000; ++n) {
    Trial trial(random);
    trial.limits.column_method = ColumnMethod::curves;
    if (!(trial.effects.compression > 0.0)) {
      continue;
    }
    const double share =
        largest_share(trial.demands(*state.separable()), trial.capacities(*state.separable()));
    ++tried;
    widest = std::min(widest, share / trial.u(state, 1.0));
  }
  CHECK(tried > 500);
  CHECK(widest > 0.7);
}

TEST_CASE("No limit state with separable conditions depends on the kind of section to apply") {
  // Users of the conditions take it that what applies to one size of a list applies to all, or asks
  // nothing of the others.
  std::mt19937 random(4103);
  for (int n = 0; n < 4000; ++n) {
    const Trial trial(random);
    const Trial other(random);
    for (const LimitState* state : limit_states()) {
      if (state->separable() == nullptr) {
        continue;
      }
      const bool here = state->applies(trial.effects, trial.limits, trial.material, trial.section);
      const bool there = state->applies(trial.effects, trial.limits, trial.material, other.section);
      INFO("trial " << n << ", " << state->id());
      REQUIRE(here == there);
    }
  }
}

}  // namespace bismar
