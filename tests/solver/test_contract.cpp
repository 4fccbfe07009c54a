// SPDX-License-Identifier: MIT
// The defaults that every BoxProblem has: size direction, contraction, settling, whole numbers.
#include "solver/cover.hpp"
#include "solver/power_problem.hpp"
#include "solver/random_posynomials.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <limits>

using namespace bismar;
using namespace bismar::test;

namespace {

struct Contracted {
  std::vector<double> lower;
  std::vector<double> upper;
  std::vector<double> objectives;
  std::uint32_t broken = no_index;
};

Contracted contracted(const BoxProblem& problem,
                      std::vector<double> lower,
                      std::vector<double> upper,
                      double allowed) {
  Contracted out{std::move(lower), std::move(upper), std::vector<double>(problem.objectives())};
  problem.contract(0,
                   allowed,
                   {.count = 1,
                    .lower = out.lower,
                    .upper = out.upper,
                    .objective_lower = out.objectives,
                    .broken = std::span(&out.broken, 1)});
  return out;
}

}  // namespace

TEST_CASE("the size direction is the first variable that objectives rise with and limits follow") {
  PosynomialProblem problem;
  PosynomialProblem::Group group;
  group.variables = {whole(1.0, 3.0), between(1.0, 2.0), between(1.0, 2.0)};
  group.objectives = {{{{1.0, {1.0, -1.0, 1.0}}}}};
  group.utilisations = {{{{1.0, {1.0, 1.0, -1.0}}}}};
  problem.all.push_back(group);
  CHECK(problem.size_direction(0) == 2);  // 0 is no continuous one, with 1 the objective falls
  problem.all[0].utilisations[0].terms.push_back({1.0, {0.0, 0.0, 1.0}});
  CHECK(problem.size_direction(0) == no_index);  // a limit that neither rises nor falls
}

TEST_CASE("what a contraction cuts off has no point that is allowed, and nearly all else is left") {
  PosynomialMaker make(401);
  std::size_t wrong = 0;
  std::size_t cut = 0;
  std::size_t broken = 0;
  for (int round = 0; round < 2000; ++round) {
    const auto n = static_cast<std::size_t>(1 + round % 2);
    PosynomialProblem problem;
    problem.all.push_back(make.group(2, make.continuous(n)));
    problem.bound_by_terms = round % 3 != 0;
    if (round % 4 == 0) {
      make.add_step(problem.all[0]);
    }
    std::vector<double> lower;
    std::vector<double> upper;
    for (std::size_t v = 0; v < n; ++v) {
      lower.push_back(make.real(0.5, 2.0));
      upper.push_back(lower.back() * make.real(1.0, 2.0));
    }
    const double allowed = round % 2 == 0 ? 1.0 : 0.9;
    const auto left = contracted(problem, lower, upper, allowed);
    broken += left.broken != no_index ? 1U : 0U;
    for (std::size_t v = 0; v < n; ++v) {
      wrong += left.lower[v] >= lower[v] && left.upper[v] <= upper[v] ? 0U : 1U;
      cut += left.lower[v] > lower[v] || left.upper[v] < upper[v] ? 1U : 0U;
    }
    std::vector<double> x(n);
    std::vector<double> f(2);
    std::vector<double> u(problem.constraints(0));
    for (int draw = 0; draw < 60; ++draw) {
      bool inside = true;
      for (std::size_t v = 0; v < n; ++v) {
        x[v] = make.real(lower[v], upper[v]);
        inside = inside && x[v] >= left.lower[v] && x[v] <= left.upper[v];
      }
      problem.evaluate(0, x, f, u);
      if (!all_at_most(u, allowed)) {
        continue;
      }
      wrong += left.broken == no_index && inside ? 0U : 1U;
      for (std::size_t i = 0; i < 2; ++i) {
        wrong += left.objectives[i] <= f[i] ? 0U : 1U;
      }
    }
  }
  CHECK(wrong == 0);
  CHECK(cut > 200);
  CHECK(broken > 200);
}

TEST_CASE("a contraction ends within a thousandth of the roots, on their outer sides") {
  // (2 / x)^3 falls, (x / 3)^2 rises: allowed from 2 / 0.9^(1/3) to 3 0.9^(1/2).
  const PowerProblem problem({{{2.0, -3.0}, {3.0, 2.0}}}, 0.1, 10.0);
  const auto left = contracted(problem, {0.1}, {10.0}, 0.9);
  const double least = 2.0 / std::cbrt(0.9);
  const double most = 3.0 * std::sqrt(0.9);
  CHECK(left.lower[0] <= least);
  CHECK(left.lower[0] == Approx(least).epsilon(1e-3));
  CHECK(left.upper[0] >= most);
  CHECK(left.upper[0] == Approx(most).epsilon(1e-3));
  CHECK(left.objectives[0] <= left.lower[0]);
  CHECK(left.objectives[0] == Approx(left.lower[0]).epsilon(1e-12));
  const PowerProblem clash({{{4.0, -3.0}, {3.0, 2.0}}}, 0.1, 10.0);
  CHECK(contracted(clash, {0.1}, {10.0}, 1.0).broken != no_index);
}

TEST_CASE("settling finds the root of the largest falling limit, on the feasible side") {
  const PowerProblem problem({{{2.0, -3.0}, {1.5, -1.0}, {3.0, 1.0}}}, 0.1, 10.0);
  std::vector<double> x = {7.0};
  REQUIRE(problem.settle(0, x, 0.1, 10.0));
  CHECK(x[0] >= 2.0);
  CHECK(x[0] == Approx(2.0).epsilon(1e-12));
  REQUIRE(problem.settle(0, x, 2.5, 10.0));
  CHECK(x[0] == 2.5);
  CHECK_FALSE(problem.settle(0, x, 0.1, 1.9));
  CHECK_FALSE(problem.settle(0, x, 3.5, 10.0));  // the rising limit is above 1 there
  CHECK_FALSE(problem.settle(0, x, 3.0, 2.0));
}

TEST_CASE("settling goes from piece to piece, also where the range begins at zero or below") {
  PowerProblem problem({{{3.0, -1.0}}}, 0.1, 10.0);
  problem.jump(1.0, 0.1);  // beyond 1 a tenth: 0.3 / x
  std::vector<double> x = {5.0};
  REQUIRE(problem.settle(0, x, 0.1, 10.0));
  CHECK(x[0] == std::nextafter(1.0, 2.0));

  class Shifted : public PowerProblem {
   public:
    Shifted() : PowerProblem({{{1.0, -1.0}}}, -2.0, 3.0) {}
    void evaluate(std::size_t /*group*/,
                  std::span<const double> at,
                  std::span<double> objectives,
                  std::span<double> utilisations) const override {
      objectives[0] = objectives[1] = at[0] + 10.0;
      utilisations[0] = 0.5 - at[0];  // <= 1 from -0.5 on
    }
  };
  const Shifted shifted;
  REQUIRE(shifted.settle(0, x, -2.0, 3.0));
  CHECK(x[0] >= -0.5);
  CHECK(x[0] == Approx(-0.5).epsilon(1e-11));
  const auto front = certified_group(shifted, 0);
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].x[0] == Approx(-0.5).epsilon(1e-11));
}

TEST_CASE("trends of a whole number hold over its whole range, so its box has two corners") {
  PosynomialProblem problem;
  PosynomialProblem::Group group;
  group.variables = {whole(1.0, 1e6)};
  group.objectives = {{{{2.0, {1.0}}}}};
  group.utilisations = {{{{30.0, {-1.0}}}}};
  problem.all.push_back(group);
  problem.bound_by_terms = false;
  std::vector<double> f(1);
  std::vector<double> low(1);
  std::vector<double> high(1);
  const std::vector<double> from = {10.0};
  const std::vector<double> to = {60.0};
  problem.bound(0,
                {.count = 1, .lower = from, .upper = to},
                {.objective_lower = f, .utilisation_lower = low, .utilisation_upper = high});
  CHECK(f[0] == Approx(20.0));
  CHECK(low[0] == Approx(0.5));
  CHECK(high[0] == Approx(3.0));
  // A million values, found by halving: 30 is the least allowed.
  const auto front = certified_group(problem, 0, {.epsilon = 0.0});
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].x[0] == 30.0);
  CHECK(front.boxes < 200);
  CHECK_FALSE(solve_exact(problem, 0).solved);
}

TEST_CASE("a variable that cannot move needs no trend") {
  PowerProblem problem({{{2.0, -3.0}}}, 0.1, 10.0);
  problem.hide_trends();
  const auto left = contracted(problem, {4.0}, {4.0}, 1.0);
  CHECK(left.broken == no_index);
  CHECK(left.objectives[1] == Approx(16.0));
  CHECK(contracted(problem, {1.0}, {1.0}, 1.0).broken == 0);
}
