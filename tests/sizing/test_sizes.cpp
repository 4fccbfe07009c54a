// SPDX-License-Identifier: MIT
// Sizes and trends as the solver sees them: private classes, so in static builds only.
#include "sizing/small_catalogue.hpp"
#include "sizing/study.hpp"
#include "support/catch.hpp"

#include <algorithm>

using namespace bismar;

TEST_CASE("a size is the least: a billionth smaller fails a limit") {
  std::mt19937 random(13);
  std::size_t checked = 0;
  const Settings settings;
  for (int round = 0; round < 30; ++round) {
    const auto catalogue = test::random_catalogue(random, 6);
    const auto part = test::random_part(random);
    std::vector<double> objectives(2);
    // One material at a time: the groups are then kept.
    for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
      const auto solved = solve_candidates(part, catalogue, settings, {}, m);
      for (const auto& outcome : solved.outcomes) {
        const auto& compiled = solved.problem->compiled(outcome.group);
        if (compiled.variable.kind != Variable::Kind::continuous || outcome.points.empty()) {
          continue;
        }
        REQUIRE(outcome.points.size() == 1);
        const double x = outcome.points[0].size;
        std::vector<double> u(solved.problem->constraints(outcome.group));
        solved.problem->evaluate_plain(outcome.group, x, objectives, u);
        const auto worst = std::max_element(u.begin(), u.end());
        INFO(compiled.constraints[static_cast<std::size_t>(worst - u.begin())].label << " at "
                                                                                     << x);
        CHECK(*worst <= 1.0);
        const double smaller = x * (1.0 - 1e-9);
        if (smaller > compiled.variable.lower) {
          solved.problem->evaluate_plain(outcome.group, smaller, objectives, u);
          CHECK(*std::max_element(u.begin(), u.end()) > 1.0);
          ++checked;
        }
      }
    }
  }
  CHECK(checked > 200);
}

TEST_CASE("declared trends of a part's utilisations and objectives hold on random sizes") {
  std::mt19937 random(20240711);
  for (int round = 0; round < 40; ++round) {
    const auto catalogue = test::random_catalogue(random, 6);
    const auto part = test::random_part(random);
    const Settings settings;
    SizingProblem problem(part, catalogue, settings);
    Enumeration enumeration(part, catalogue);
    for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
      for (Candidate candidate : enumeration.of(m).candidates) {
        candidate.material = m;
        problem.add(candidate);
      }
    }
    for (std::size_t g = 0; g < problem.groups(); ++g) {
      const auto& variable = problem.compiled(g).variable;
      if (variable.kind != Variable::Kind::continuous) {
        continue;
      }
      std::vector<double> lower_objectives(2);
      std::vector<double> upper_objectives(2);
      std::vector<double> lower(problem.constraints(g));
      std::vector<double> upper(problem.constraints(g));
      std::uniform_real_distribution<double> at(variable.lower, variable.upper);
      for (int draw = 0; draw < 20; ++draw) {
        double a = at(random);
        double b = at(random);
        if (a > b) {
          std::swap(a, b);
        }
        problem.evaluate(g, std::span(&a, 1), lower_objectives, lower);
        problem.evaluate(g, std::span(&b, 1), upper_objectives, upper);
        const double slack = 1.0 + 1e-12;
        const bool same_piece = std::none_of(
            variable.breakpoints.begin(), variable.breakpoints.end(), [&](double breakpoint) {
              return breakpoint >= a && breakpoint < b;
            });
        if (!same_piece) {
          continue;
        }
        CHECK(upper_objectives[0] * slack >= lower_objectives[0]);
        CHECK(upper_objectives[1] * slack >= lower_objectives[1]);
        for (std::size_t i = 0; i < lower.size(); ++i) {
          INFO(problem.compiled(g).constraints[i].label);
          switch (problem.utilisation_trend(g, i, 0)) {
            case Trend::falls:
              CHECK(upper[i] <= lower[i] * slack);
              break;
            case Trend::rises:
              CHECK(upper[i] * slack >= lower[i]);
              break;
            case Trend::constant:
              CHECK((upper[i] == lower[i] || upper[i] == Approx(lower[i]).epsilon(1e-9)));
              break;
            case Trend::neither:
              FAIL("no trend");
              break;
          }
        }
      }
    }
  }
}
