// SPDX-License-Identifier: MIT
#include "solver/power_problem.hpp"
#include "support/catch.hpp"

using namespace bismar;
using bismar::test::PowerProblem;

TEST_CASE(
    "the least feasible size is the root of the largest falling utilisation, on the feasible "
    "side") {
  // u = (2/x)^3 and (1.5/x)^2: the first rules, x = 2.
  PowerProblem problem({{{2.0, -3.0}, {1.5, -2.0}}}, 0.1, 10.0);
  const auto solution = solve_exact(problem, 0);
  REQUIRE(solution.points.size() == 1);
  CHECK(solution.points[0].x[0] == Approx(2.0).epsilon(1e-12));
  CHECK(solution.points[0].utilisations[0] <= 1.0);
}

TEST_CASE("a size that is feasible at its lower bound stays there") {
  PowerProblem problem({{{0.05, -3.0}}}, 0.1, 10.0);
  const auto solution = solve_exact(problem, 0);
  REQUIRE(solution.points.size() == 1);
  CHECK(solution.points[0].x[0] == 0.1);
}

TEST_CASE("a limit that no size meets is named with its least value") {
  PowerProblem problem({{{5.0, -1.0}, {1.0, -1.0}}}, 0.1, 2.0);
  const auto solution = solve_exact(problem, 0);
  CHECK(solution.points.empty());
  CHECK(solution.excluded_by == 0);
  CHECK(solution.least_utilisation == Approx(2.5));
}

TEST_CASE("limits that clash are named as a pair") {
  // (2/x) wants x >= 2, (x/1) wants x <= 1.
  PowerProblem problem({{{2.0, -1.0}, {1.0, 1.0}}}, 0.1, 10.0);
  const auto solution = solve_exact(problem, 0);
  CHECK(solution.points.empty());
  CHECK(solution.excluded_by == SIZE_MAX);
  CHECK(solution.clash_falling == 0);
  CHECK(solution.clash_rising == 1);
}

TEST_CASE("a rising limit above the least size leaves it feasible") {
  PowerProblem problem({{{2.0, -1.0}, {3.0, 1.0}}}, 0.1, 10.0);
  const auto solution = solve_exact(problem, 0);
  REQUIRE(solution.points.size() == 1);
  CHECK(solution.points[0].x[0] == Approx(2.0).epsilon(1e-12));
}

TEST_CASE("on an ordered set every value is tried and the non-dominated ones are kept") {
  PowerProblem problem({{{2.0, -1.0}}}, {1.0, 2.0, 3.0, 4.0});
  const auto solution = solve_exact(problem, 0);
  REQUIRE(solution.points.size() == 1);
  CHECK(solution.points[0].x[0] == 2.0);
  CHECK(solution.evaluations == 4);
}

TEST_CASE("a jump between pieces is honoured on both of its sides") {
  // Beyond x = 1 the falling limit is a tenth: nothing at or below 1 is feasible, the next double
  // is.
  PowerProblem problem({{{3.0, -1.0}}}, 0.1, 10.0);
  problem.jump(1.0, 0.1);
  const auto solution = solve_exact(problem, 0);
  REQUIRE(solution.points.size() == 1);
  CHECK(solution.points[0].x[0] > 1.0);
  CHECK(solution.points[0].x[0] == Approx(1.0).epsilon(1e-12));
}

TEST_CASE("a problem whose trends are not known is handed back unsolved") {
  PowerProblem problem({{{2.0, -1.0}}}, 0.1, 10.0);
  problem.hide_trends();
  CHECK_FALSE(solve_exact(problem, 0).solved);
}
