// SPDX-License-Identifier: MIT
// Fatigue's declared trends against random members, loads, materials and details.
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include "mechanics/random_members.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <limits>
#include <optional>
#include <random>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

namespace {

constexpr double rounding = 1e-12;

double between(std::mt19937& random, double low, double high) {
  return std::exp(std::uniform_real_distribution<double>(std::log(low), std::log(high))(random));
}

bool toss(std::mt19937& random) { return std::uniform_int_distribution<int>(0, 1)(random) == 1; }

MemberDetails random_details(std::mt19937& random) {
  MemberDetails d;
  const auto word = [&](int count) {
    return std::uniform_int_distribution<int>(0, count - 1)(random);
  };
  d.net_area = between(random, 0.3, 1.0);
  d.net_modulus = between(random, 0.3, 1.0);
  d.k_t_axial = between(random, 1.0, 4.0);
  d.k_t_bending = between(random, 1.0, 4.0);
  d.k_t_torsion = between(random, 1.0, 4.0);
  if (toss(random)) {
    d.notch_radius = between(random, 1e-5, 1e-2);
  }
  d.surface = static_cast<SurfaceFinish>(word(5));
  d.reliability = std::uniform_real_distribution<double>(0.5, 0.999999)(random);
  d.criterion = static_cast<FatigueCriterion>(word(3));
  if (word(6) == 0) {
    d.detail_category = between(random, 36e6, 160e6);
  }
  d.welded = word(8) == 0;
  return d;
}

struct Trial {
  test::RandomSection section;
  LoadEffects effects;
  MemberMaterial material;
  MemberLimits limits;
  double height_scale = 1.0;

  explicit Trial(std::mt19937& random) : section(random) {
    LoadCase load_case = test::random_load_case(random, 1.0);
    load_case.fatigue =
        FatigueLoading{.cycles = between(random, 1.0, 1e10),
                       .stress_ratio = std::uniform_real_distribution<double>(-1.0, 1.0)(random)};
    if (toss(random)) {
      load_case.acceleration_z = between(random, 1.0, 1e4);
      load_case.acceleration_y = toss(random) ? between(random, 1.0, 1e3) : 0.0;
    }
    effects = reduce(load_case, 1.0);
    material = test::random_material(random);
    material.steel = toss(random);
    material.cast_iron = !material.steel && toss(random);
    material.sigma_e.reset();
    if (!material.steel || toss(random)) {
      material.sigma_e = between(random, 5e6, 900e6);
      material.endurance_cycles = between(random, 1e3, 1e9);
    }
    limits.details = random_details(random);
    // The borders of the size factor lie between 2.79 and 254 mm; sections begin at 10 mm.
    height_scale = between(random, 0.1, 3.0);
  }

  [[nodiscard]] double u(double scale, const MemberMaterial& with, double factor = 1.5) const {
    const SectionProperties s = section.at(scale * height_scale);
    return limit_state("fatigue")->utilisation({s, with, effects, limits, 1.0, factor});
  }
};

}  // namespace

TEST_CASE("Fatigue falls with the scale of the section, also over the borders of the size factor") {
  std::mt19937 random(101);
  for (int n = 0; n < 6000; ++n) {
    const Trial trial(random);
    double scale = 1.0;
    double before = trial.u(scale, trial.material);
    REQUIRE_FALSE(std::isnan(before));
    REQUIRE(before >= 0.0);
    for (int step = 0; step < 6; ++step) {
      scale *= between(random, 1.0 + 1e-9, 1.3);
      const double after = trial.u(scale, trial.material);
      INFO("trial " << n << " at " << scale << ": " << before << " to " << after);
      CHECK(after <= before * (1.0 + rounding));
      before = after;
    }
  }
}

TEST_CASE("Fatigue falls across each border of the size factor by steps of a millionth") {
  for (const double border : {2.79e-3, 7.62e-3, 51e-3, 254e-3}) {
    LoadCase load_case = cantilever({force(1.0, 1.0)});
    load_case.fatigue = FatigueLoading{};
    load_case.acceleration_z = 10.0;
    const LoadEffects effects = reduce(load_case, 1.0);
    MemberMaterial steel;
    steel.steel = true;
    steel.rho = 7850.0;
    steel.tensile = 600e6;
    steel.sigma_y = 500e6;
    double before = std::numeric_limits<double>::infinity();
    for (int i = -50; i <= 50; ++i) {
      const SectionProperties s = solid_round(border * (1.0 + 1e-6 * i));
      const double u = limit_state("fatigue")->utilisation({s, steel, effects, {}, 1.0, 1.5});
      INFO(border << " m, step " << i);
      CHECK(u < before);
      before = u;
    }
  }
}

TEST_CASE("Fatigue moves with every material value as it declares") {
  const std::vector<std::pair<Symbol, std::optional<double> MemberMaterial::*>> symbols = {
      {Symbol::rho, &MemberMaterial::rho},
      {Symbol::sigma_y, &MemberMaterial::sigma_y},
      {Symbol::sigma_e, &MemberMaterial::sigma_e},
      {Symbol::shear, &MemberMaterial::shear},
      {Symbol::E, &MemberMaterial::E},
      {Symbol::compressive, &MemberMaterial::compressive},
      {Symbol::flexural, &MemberMaterial::flexural}};
  std::mt19937 random(102);
  for (int n = 0; n < 6000; ++n) {
    const Trial trial(random);
    const double before = trial.u(1.0, trial.material);
    for (const auto& [symbol, member] : symbols) {
      if (!(trial.material.*member)) {
        continue;
      }
      MemberMaterial grown = trial.material;
      *(grown.*member) *= between(random, 1.0, 3.0);
      const double after = trial.u(1.0, grown);
      INFO(name(symbol) << " in trial " << n << ": " << before << " to " << after);
      switch (limit_state("fatigue")->trend_with(symbol)) {
        case Trend::constant:
          CHECK(after == before);
          break;
        case Trend::rises:
          CHECK(after >= before * (1.0 - rounding));
          break;
        case Trend::falls:
          CHECK(after <= before * (1.0 + rounding));
          break;
        case Trend::neither:
          FAIL_CHECK("not declared");
      }
    }
  }
}

TEST_CASE(
    "Fatigue is proportional to its factor, in compression at least, and explains its number") {
  std::mt19937 random(103);
  for (int n = 0; n < 2000; ++n) {
    const Trial trial(random);
    const double once = trial.u(1.0, trial.material, 1.0);
    INFO("trial " << n);
    const double twice = trial.u(1.0, trial.material, 2.0);
    if (trial.effects.compression > 0.0) {
      CHECK(twice >= 2.0 * once * (1.0 - rounding));
    } else {
      CHECK(twice == Approx(2.0 * once).epsilon(1e-14));
    }
    const SectionProperties s = trial.section.at(trial.height_scale);
    const Explanation text =
        limit_state("fatigue")->explain({s, trial.material, trial.effects, trial.limits, 1.0, 1.0});
    CHECK(text.line.find("u = ") != std::string::npos);
    CHECK(text.line.find("not a number") == std::string::npos);
    CHECK_FALSE(text.steps.empty());
  }
}

TEST_CASE("More cycles never help") {
  std::mt19937 random(104);
  for (int n = 0; n < 3000; ++n) {
    Trial trial(random);
    const double before = trial.u(1.0, trial.material);
    trial.effects.fatigue->cycles *= between(random, 1.0, 100.0);
    const double longer = trial.u(1.0, trial.material);
    INFO("trial " << n);
    // The size and axial factors are those of longer lives too, so that no term falls.
    CHECK(longer >= before * (1.0 - rounding));
  }
}

}  // namespace bismar
