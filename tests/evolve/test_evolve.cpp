// SPDX-License-Identifier: MIT
#include "evolve/problems.hpp"
#include "support/catch.hpp"

#include <bismar/evolve/evolve.hpp>
#include <bismar/pareto/dominance.hpp>

#include <algorithm>
#include <cfenv>
#include <cmath>
#include <limits>

using namespace bismar;
using test::continuous;
using test::FunctionProblem;
using test::one_of;

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Area between the points, sorted by the first of two objectives, and a reference point: a
/// staircase summed step by step, to judge the library's number.
double staircase_area(const std::vector<EvolvedPoint>& points,
                      const std::vector<double>& reference) {
  double area = 0.0;
  double floor = reference[1];
  for (const auto& point : points) {
    if (point.objectives[0] < reference[0] && point.objectives[1] < floor) {
      area += (reference[0] - point.objectives[0]) * (floor - point.objectives[1]);
      floor = point.objectives[1];
    }
  }
  return area;
}

void check_sound(const BoxProblem& problem, const EvolvedFront& front) {
  for (const auto& point : front.points) {
    std::vector<double> objectives(problem.objectives());
    std::vector<double> utilisations(problem.constraints(point.group));
    problem.evaluate(point.group, point.x, objectives, utilisations);
    CHECK(objectives == point.objectives);
    CHECK(utilisations == point.utilisations);
    CHECK(std::all_of(utilisations.begin(), utilisations.end(), [](double u) { return u <= 1.0; }));
    CHECK(std::none_of(front.points.begin(), front.points.end(), [&](const EvolvedPoint& other) {
      return dominates(other.objectives, point.objectives);
    }));
  }
  CHECK(std::is_sorted(front.points.begin(), front.points.end(), [](const auto& a, const auto& b) {
    return std::tie(a.objectives, a.group, a.x) < std::tie(b.objectives, b.group, b.x);
  }));
  for (std::size_t i = 1; i < front.trace.size(); ++i) {
    CHECK(front.trace[i].generation > front.trace[i - 1].generation);
    CHECK(front.trace[i].evaluations > front.trace[i - 1].evaluations);
    CHECK(front.trace[i].hypervolume >= front.trace[i - 1].hypervolume);
  }
}

}  // namespace

TEST_CASE("both algorithms come to the known front of a curve and two points") {
  const auto problem = test::curve_and_two_points();
  const auto algorithm = GENERATE(EvolveAlgorithm::nsga2, EvolveAlgorithm::moead);
  const auto front = evolve(
      problem,
      {.algorithm = algorithm, .population = 40, .generations = 150, .reference = {4.0, 2.0}});
  check_sound(problem, front);
  CHECK_FALSE(front.exact);
  CHECK(front.reference == std::vector<double>{4.0, 2.0});
  CHECK(front.evaluations == 40 * 151);
  CHECK(front.generations == 150);

  // No point lies below the known front, for no feasible point does.
  std::size_t from_set = 0;
  for (const auto& point : front.points) {
    const double m = point.objectives[0];
    if (point.group == 1) {
      ++from_set;
      CHECK((point.x[0] == 1.0 || point.x[0] == 2.0));
    } else {
      CHECK(m * point.objectives[1] >= 1.0 - 1e-15);
      CHECK_FALSE((m >= 1.0 && point.objectives[1] >= 0.6));
      CHECK_FALSE((m >= 2.0 && point.objectives[1] >= 0.3));
    }
  }
  CHECK(from_set == 2);

  const double exact = test::curve_and_two_points_hypervolume();
  const double reached = front.trace.back().hypervolume;
  CHECK(reached <= exact);
  CHECK(reached > 0.99 * exact);
  CHECK(reached == Approx(staircase_area(front.points, front.reference)).epsilon(1e-12));
}

TEST_CASE("the same seed gives the same result and another seed another search") {
  const auto problem = test::curve_and_two_points();
  const auto algorithm = GENERATE(EvolveAlgorithm::nsga2, EvolveAlgorithm::moead);
  const EvolveOptions options{.algorithm = algorithm, .population = 20, .generations = 30};
  const auto first = evolve(problem, options);
  const auto second = evolve(problem, options);
  CHECK(first.points == second.points);
  CHECK(first.trace == second.trace);
  CHECK(first.reference == second.reference);
  auto other = options;
  other.seed = 7;
  CHECK(evolve(problem, other).points != first.points);
}

TEST_CASE("the host's rounding mode does not change the search") {
  const auto problem = test::curve_and_two_points();
  const EvolveOptions options{.population = 20, .generations = 10};
  const auto expected = evolve(problem, options);
  std::fesetround(FE_UPWARD);
  const auto upward = evolve(problem, options);
  CHECK(std::fegetround() == FE_UPWARD);
  std::fesetround(FE_TONEAREST);
  CHECK(upward.points == expected.points);
  CHECK(upward.trace == expected.trace);
}

TEST_CASE("without a reference point the worst feasible values met are stated and used") {
  const auto problem = test::curve_and_two_points();
  const auto front = evolve(problem, {.population = 20, .generations = 25, .trace_every = 10});
  REQUIRE(front.reference.size() == 2);
  for (const auto& point : front.points) {
    CHECK(point.objectives[0] <= front.reference[0]);
    CHECK(point.objectives[1] <= front.reference[1]);
  }
  REQUIRE(front.trace.size() == 4);
  CHECK(front.trace[0].generation == 0);
  CHECK(front.trace[0].evaluations == 20);
  CHECK(front.trace[2].generation == 20);
  CHECK(front.trace[3].generation == 25);
  CHECK(front.trace[3].hypervolume ==
        Approx(staircase_area(front.points, front.reference)).epsilon(1e-12));
}

TEST_CASE("only the groups asked for are searched") {
  const auto problem = test::curve_and_two_points();
  const auto front = evolve(problem, {.population = 8, .generations = 5, .groups = {1}});
  REQUIRE(front.points.size() == 2);
  CHECK(front.points[0] == EvolvedPoint{1, {1.0}, {1.0, 0.6}, {1.0 / 3.0}});
  CHECK(front.points[1] == EvolvedPoint{1, {2.0}, {2.0, 0.3}, {2.0 / 3.0}});
}

TEST_CASE("three objectives and more are searched too") {
  // f = (a, b, 1 - a - b), feasible where the last is not negative: every point is non-dominated
  // and the dominated volume of the whole triangle in the unit cube is 1 - 1/6.
  const FunctionProblem problem(
      3, {{{continuous(0.0, 1.0), continuous(0.0, 1.0)}, 1, [](auto x, auto f, auto u) {
             f[0] = x[0];
             f[1] = x[1];
             f[2] = 1.0 - x[0] - x[1];
             u[0] = x[0] + x[1];
           }}});
  const auto algorithm = GENERATE(EvolveAlgorithm::nsga2, EvolveAlgorithm::moead);
  const auto front = evolve(
      problem,
      {.algorithm = algorithm, .population = 40, .generations = 20, .reference = {1.0, 1.0, 1.0}});
  check_sound(problem, front);
  CHECK(front.trace.back().hypervolume < 1.0 - 1.0 / 6.0);
  CHECK(front.trace.back().hypervolume > 0.9 * (1.0 - 1.0 / 6.0));
}

TEST_CASE("a problem of a single point gives that point once") {
  const auto algorithm = GENERATE(EvolveAlgorithm::nsga2, EvolveAlgorithm::moead);
  const FunctionProblem problem(2, {{{one_of({3.0})}, 0, [](auto x, auto f, auto) {
                                       f[0] = x[0];
                                       f[1] = -x[0];
                                     }}});
  const auto front = evolve(problem, {.algorithm = algorithm, .population = 8, .generations = 10});
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0] == EvolvedPoint{0, {3.0}, {3.0, -3.0}, {}});
  CHECK(front.reference == std::vector<double>{3.0, -3.0});
  CHECK(front.trace.back().hypervolume == 0.0);
}

TEST_CASE("constant objectives are ties and all of them are kept") {
  const auto algorithm = GENERATE(EvolveAlgorithm::nsga2, EvolveAlgorithm::moead);
  const FunctionProblem problem(2, {{{one_of({1.0, 2.0, 3.0})}, 0, [](auto, auto f, auto) {
                                       f[0] = 0.0;
                                       f[1] = 0.0;
                                     }}});
  const auto front = evolve(problem, {.algorithm = algorithm, .population = 40, .generations = 3});
  REQUIRE(front.points.size() == 3);
  CHECK(front.points[2].x == std::vector<double>{3.0});
}

TEST_CASE("where nothing is feasible the answer is empty") {
  const FunctionProblem problem(
      2,
      {{{continuous(0.0, 1.0)},
        1,
        [](auto x, auto f, auto u) {
          f[0] = f[1] = x[0];
          u[0] = x[0] < 0.5 ? infinity : 1.5;
        }},
       // Within its constraint, but no objective is there: no design either.
       {{continuous(0.0, 1.0)}, 1, [](auto, auto f, auto u) {
          f[0] = 1.0;
          f[1] = infinity;
          u[0] = 0.5;
        }}});
  const auto front = evolve(problem, {.population = 8, .generations = 12});
  CHECK(front.points.empty());
  CHECK(front.reference.empty());
  CHECK(front.feasible_evaluations == 0);
  CHECK(front.evaluations == 8 * 13);
  REQUIRE(front.trace.size() == 3);
  CHECK(front.trace.back().hypervolume == 0.0);
}

TEST_CASE("a search that starts without a feasible point finds the small feasible region") {
  // Feasible for |x - 0.37| <= 0.001 and the same of y: 4e-6 of the square.
  const FunctionProblem problem(
      2, {{{continuous(0.0, 1.0), continuous(0.0, 1.0)}, 2, [](auto x, auto f, auto u) {
             f[0] = x[0];
             f[1] = x[1];
             u[0] = std::abs(x[0] - 0.37) / 0.001;
             u[1] = std::abs(x[1] - 0.37) / 0.001;
           }}});
  const auto front = evolve(problem, {.population = 40, .generations = 150});
  check_sound(problem, front);
  REQUIRE_FALSE(front.points.empty());
  CHECK(front.points[0].objectives[0] == Approx(0.369).epsilon(1e-4));
}

TEST_CASE("a search can be watched and stopped") {
  const auto problem = test::curve_and_two_points();
  std::stop_source source;
  std::vector<double> shares;
  const auto front = evolve(problem,
                            {.population = 8,
                             .generations = 10,
                             .progress =
                                 [&](double share) {
                                   shares.push_back(share);
                                   if (shares.size() == 4) {
                                     source.request_stop();
                                   }
                                 },
                             .stop = source.get_token()});
  CHECK(front.stopped);
  CHECK(front.generations == 4);
  CHECK(front.evaluations == 8 * 5);
  CHECK(shares == std::vector<double>{0.0, 0.1, 0.2, 0.3, 0.4});
  CHECK(front.trace.back().generation == 4);
  CHECK_FALSE(evolve(problem, {.population = 8, .generations = 2}).stopped);
}
