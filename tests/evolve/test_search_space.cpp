// SPDX-License-Identifier: MIT
#include "evolve/search_space.hpp"

#include "evolve/problems.hpp"
#include "support/catch.hpp"

#include <vector>

using namespace bismar;
using test::continuous;
using test::FunctionProblem;
using test::one_of;

namespace {

FunctionProblem three_groups() {
  return FunctionProblem(2,
                         {{{continuous(-1.0, 3.0), one_of({1.0, 10.0, 11.0})}, 0, {}},
                          {{continuous(0.01, 1.0)}, 0, {}},
                          {{continuous(2.0, 2.0)}, 0, {}}});
}

}  // namespace

TEST_CASE("shares reach every value of a set evenly by rank, and both bounds exactly") {
  const auto problem = three_groups();
  const SearchSpace space(problem, {0, 1, 2});
  CHECK(space.numbers() == 3);
  std::vector<double> x;
  CHECK(space.decode(std::vector<double>{0.0, 0.0, 0.0}, x) == 0);
  CHECK(x == std::vector<double>{-1.0, 1.0});
  CHECK(space.decode(std::vector<double>{1.0, 1.0, 0.0}, x) == 0);
  CHECK(x == std::vector<double>{3.0, 11.0});
  CHECK(space.decode(std::vector<double>{0.5, 0.5, 0.0}, x) == 0);
  CHECK(x == std::vector<double>{1.0, 10.0});
  space.decode(std::vector<double>{0.0, 0.333, 0.0}, x);
  CHECK(x[1] == 1.0);
  space.decode(std::vector<double>{0.0, 0.334, 0.0}, x);
  CHECK(x[1] == 10.0);
}

TEST_CASE("a positive variable over more than a decade is searched by ratio") {
  const auto problem = three_groups();
  const SearchSpace space(problem, {0, 1, 2});
  std::vector<double> x;
  CHECK(space.decode(std::vector<double>{0.5, 0.9, 1.0}, x) == 1);
  REQUIRE(x.size() == 1);
  CHECK(x[0] == Approx(0.1).epsilon(1e-14));
  space.decode(std::vector<double>{1.0, 0.0, 1.0}, x);
  CHECK(x[0] == 1.0);
  space.decode(std::vector<double>{0.0, 0.0, 1.0}, x);
  CHECK(x[0] == 0.01);
  CHECK(space.decode(std::vector<double>{0.7, 0.0, 2.0}, x) == 2);
  CHECK(x == std::vector<double>{2.0});
}

TEST_CASE("the last number chooses among the groups asked for, a fraction by its whole part") {
  const auto problem = three_groups();
  const SearchSpace two(problem, {2, 0});
  std::vector<double> x;
  CHECK(two.decode(std::vector<double>{0.0, 0.0, 0.0}, x) == 2);
  CHECK(two.decode(std::vector<double>{0.0, 0.0, 0.99}, x) == 2);
  CHECK(two.decode(std::vector<double>{0.0, 0.0, 1.0}, x) == 0);
  CHECK(two.decode(std::vector<double>{0.0, 0.0, 2.0}, x) == 0);
  const SearchSpace one(problem, {1});
  CHECK(one.numbers() == 1);
  CHECK(one.decode(std::vector<double>{0.0}, x) == 1);
}

TEST_CASE("shares reach every whole number evenly, and only numbers between the bounds") {
  Variable bars;
  bars.kind = Variable::Kind::integer;
  bars.lower = 1.5;
  bars.upper = 4.2;
  const FunctionProblem problem(1, {{{bars}, 0, {}}});
  const SearchSpace space(problem, {0});
  std::vector<double> x;
  std::vector<double> seen;
  for (const double share : {0.0, 0.33, 0.34, 0.66, 0.67, 1.0}) {
    space.decode(std::vector<double>{share}, x);
    seen.push_back(x[0]);
  }
  CHECK(seen == std::vector<double>{2.0, 2.0, 3.0, 3.0, 4.0, 4.0});
}
