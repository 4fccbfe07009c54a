// SPDX-License-Identifier: MIT
#include "solver/power_problem.hpp"
#include "support/catch.hpp"

#include <limits>
#include <random>

using namespace bismar;
using bismar::test::PowerProblem;

namespace {

struct Bounds {
  std::vector<double> objective_lower;
  std::vector<double> lower;
  std::vector<double> upper;
};

Bounds bounds_of(const BoxProblem& problem,
                 const std::vector<double>& from,
                 const std::vector<double>& to) {
  const std::size_t count = from.size();
  Bounds out{std::vector<double>(2 * count),
             std::vector<double>(problem.constraints(0) * count),
             std::vector<double>(problem.constraints(0) * count)};
  problem.bound(0, {count, from, to}, {out.objective_lower, out.lower, out.upper});
  return out;
}

}  // namespace

TEST_CASE("bounds over random boxes enclose the evaluations inside them, jumps included") {
  std::mt19937 random(42);
  std::uniform_real_distribution<double> at(0.1, 10.0);
  for (int round = 0; round < 200; ++round) {
    PowerProblem problem({{{at(random), -3.0}, {at(random), -2.0}, {at(random), 1.0}}}, 0.1, 10.0);
    if (round % 2 == 0) {
      problem.jump(at(random), round % 4 == 0 ? 0.3 : 3.0);
    }
    std::vector<double> from;
    std::vector<double> to;
    for (int b = 0; b < 8; ++b) {
      double low = at(random);
      double high = at(random);
      if (low > high) {
        std::swap(low, high);
      }
      from.push_back(low);
      to.push_back(high);
    }
    const auto bounds = bounds_of(problem, from, to);
    std::vector<double> objectives(2);
    std::vector<double> u(3);
    for (std::size_t b = 0; b < from.size(); ++b) {
      std::uniform_real_distribution<double> inside(from[b], to[b]);
      for (int draw = 0; draw < 20; ++draw) {
        const double x = draw == 0 ? from[b] : draw == 1 ? to[b] : inside(random);
        problem.evaluate(0, std::span(&x, 1), objectives, u);
        for (std::size_t i = 0; i < 2; ++i) {
          CHECK(bounds.objective_lower[i * from.size() + b] <= objectives[i]);
        }
        for (std::size_t i = 0; i < 3; ++i) {
          CHECK(bounds.lower[i * from.size() + b] <= u[i]);
          CHECK(bounds.upper[i * from.size() + b] >= u[i]);
        }
      }
    }
  }
}

TEST_CASE("bounds are tight: at most a few units in the last place outside the corners") {
  PowerProblem problem({{{2.0, -3.0}}}, 0.1, 10.0);
  const auto bounds = bounds_of(problem, {1.0}, {4.0});
  CHECK(bounds.lower[0] == Approx(0.125).epsilon(1e-13));
  CHECK(bounds.upper[0] == Approx(8.0).epsilon(1e-13));
}

TEST_CASE("an output without a known trend gets no bound") {
  PowerProblem problem({{{2.0, -3.0}}}, 0.1, 10.0);
  problem.hide_trends();
  const auto bounds = bounds_of(problem, {1.0}, {4.0});
  CHECK(bounds.lower[0] == -std::numeric_limits<double>::infinity());
  CHECK(bounds.upper[0] == std::numeric_limits<double>::infinity());
}

TEST_CASE("a box of an ordered set is bounded by its values alone") {
  PowerProblem problem({{{2.0, -1.0}}}, {1.0, 2.0, 4.0, 8.0});
  const auto bounds = bounds_of(problem, {2.0}, {4.0});
  CHECK(bounds.lower[0] == Approx(0.5));
  CHECK(bounds.upper[0] == Approx(1.0));
}
