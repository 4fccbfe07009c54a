// SPDX-License-Identifier: MIT
// Thousands of random problems against dense grids and against enumeration. What a group front must
// be is written down in cover.hpp from the words of the header, apart from the solver.
#include "solver/cover.hpp"
#include "solver/random_posynomials.hpp"
#include "support/catch.hpp"

#include <set>

using namespace bismar;
using namespace bismar::test;

namespace {

struct Tally {
  std::size_t wrong = 0;
  std::size_t solved = 0;
  std::size_t infeasible = 0;
  std::size_t incomplete = 0;

  void add(const PosynomialProblem& problem, const CertifyOptions& options, std::size_t grid) {
    const auto front = certified_group(problem, 0, options);
    solved += front.state == GroupState::solved ? 1U : 0U;
    infeasible += front.state == GroupState::infeasible ? 1U : 0U;
    if (front.state == GroupState::incomplete) {
      ++incomplete;
      return;
    }
    wrong += violations(problem, 0, front, options, grid);
    wrong += front.epsilon_reached <= options.epsilon ? 0U : 1U;
    // The margin of the words "no design with margin delta" is the grid's to refute.
    wrong += (front.state == GroupState::infeasible) == front.points.empty() ? 0U : 1U;
  }
};

PosynomialProblem problem_of(PosynomialProblem::Group group, bool by_terms = true) {
  PosynomialProblem out;
  out.all.push_back(std::move(group));
  out.bound_by_terms = by_terms;
  return out;
}

using Row = std::pair<std::vector<double>, std::vector<double>>;  // objectives, x

/// Every non-dominated point of a finite group, ties kept, by trying each.
std::set<Row> enumerated(const BoxProblem& problem, std::size_t group) {
  std::vector<Row> feasible;
  for_each_grid_point(problem, group, 0, [&](const auto& x, const auto& f, const auto& u) {
    if (all_at_most(u, 1.0)) {
      feasible.emplace_back(f, x);
    }
  });
  std::set<Row> out;
  for (const auto& row : feasible) {
    if (std::none_of(feasible.begin(), feasible.end(), [&](const Row& other) {
          return dominates_objectives(other.first, row.first);
        })) {
      out.insert(row);
    }
  }
  return out;
}

std::set<Row> rows_of(const GroupFront& front) {
  std::set<Row> out;
  for (const auto& point : front.points) {
    out.insert({point.objectives, point.x});
  }
  return out;
}

/// Whole numbers x, y: f = x + y, u = c + 1 - x - y, with bounds that are not rounded outward,
/// since every sum here is exact. All (x, y) with the least allowed sum c are ties.
class ExactSums : public PosynomialProblem {
 public:
  ExactSums(double most, double least_sum) {
    Group group;
    group.variables = {whole(0.0, most), whole(0.0, most)};
    group.objectives = {{{{1.0, {1.0, 0.0}}, {1.0, {0.0, 1.0}}}}};
    group.utilisations = {{{{-1.0, {1.0, 0.0}}, {-1.0, {0.0, 1.0}}}, least_sum + 1.0}};
    all.push_back(group);
  }
  void bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const override {
    for (std::size_t b = 0; b < boxes.count; ++b) {
      const std::vector<double> low = {boxes.lower[b], boxes.lower[boxes.count + b]};
      const std::vector<double> high = {boxes.upper[b], boxes.upper[boxes.count + b]};
      double ignored = 0.0;
      evaluate(
          group, low, bounds.objective_lower.subspan(b, 1), bounds.utilisation_upper.subspan(b, 1));
      evaluate(group, high, std::span(&ignored, 1), bounds.utilisation_lower.subspan(b, 1));
    }
  }
};

}  // namespace

TEST_CASE("ties are kept where bounds are exact") {
  for (const double sum : {1.0, 4.0, 7.0, 11.0}) {
    const ExactSums problem(9.0, sum);
    const auto front = certified_group(problem, 0, {.epsilon = 0.0, .delta = 0.0});
    CHECK(rows_of(front) == enumerated(problem, 0));
    // The pairs of 0 ... 9 with that sum, counted by hand.
    CHECK(front.points.size() == static_cast<std::size_t>(sum <= 9.0 ? sum + 1.0 : 19.0 - sum));
  }
}

TEST_CASE("no point of a dense grid escapes the front of one size, at three tolerances") {
  PosynomialMaker make(101);
  Tally tally;
  for (int round = 0; round < 1500; ++round) {
    auto group = make.group(static_cast<std::size_t>(1 + round % 4), make.continuous(1));
    if (round % 2 == 0) {
      make.add_step(group);
    }
    const auto problem = problem_of(group, round % 5 != 0);
    CertifyOptions options;
    options.epsilon = round % 3 == 0 ? 1e-2 : round % 3 == 1 ? 1e-3 : 1e-4;
    options.directions = round % 7 != 0;
    tally.add(problem, options, 400);
  }
  CHECK(tally.wrong == 0);
  CHECK(tally.incomplete == 0);
  // Both outcomes are common, or the round proves little.
  CHECK(tally.solved > 500);
  CHECK(tally.infeasible > 100);
}

TEST_CASE("no point of a dense grid escapes the front of two sizes") {
  PosynomialMaker make(102);
  Tally tally;
  for (int round = 0; round < 600; ++round) {
    auto group = make.group(static_cast<std::size_t>(1 + round % 3), make.continuous(2));
    if (round % 3 == 0) {
      make.add_step(group);
    }
    group.agree = false;
    const auto problem = problem_of(group);
    CertifyOptions options;
    options.epsilon = round % 2 == 0 ? 1e-2 : 3e-3;
    options.directions = round % 4 != 1;
    options.one_point = round % 8 < 4;
    tally.add(problem, options, 50);
  }
  CHECK(tally.wrong == 0);
  CHECK(tally.incomplete == 0);
  CHECK(tally.solved > 100);
  CHECK(tally.infeasible > 10);
}

TEST_CASE("no point of a dense grid escapes the front of three sizes") {
  PosynomialMaker make(103);
  Tally tally;
  for (int round = 0; round < 60; ++round) {
    const auto problem =
        problem_of(make.group(static_cast<std::size_t>(1 + round % 2), make.continuous(3)));
    CertifyOptions options;
    options.epsilon = 3e-2;
    tally.add(problem, options, 24);
  }
  CHECK(tally.wrong == 0);
  CHECK(tally.incomplete == 0);
}

TEST_CASE("four objectives of two sizes are covered too") {
  PosynomialMaker make(104);
  Tally tally;
  for (int round = 0; round < 60; ++round) {
    CertifyOptions options;
    options.epsilon = 5e-2;
    tally.add(problem_of(make.group(4, make.continuous(2))), options, 60);
  }
  CHECK(tally.wrong == 0);
  CHECK(tally.incomplete == 0);
}

TEST_CASE("sets and whole numbers are solved exactly, ties kept, as enumeration finds them") {
  PosynomialMaker make(105);
  std::size_t different = 0;
  std::size_t ties = 0;
  std::size_t points = 0;
  for (int round = 0; round < 1200; ++round) {
    const auto variables = static_cast<std::size_t>(1 + round % 3);
    auto group = make.group(static_cast<std::size_t>(1 + round % 4), make.discrete(variables, 9));
    if (round % 4 == 0 && variables > 1) {
      // An output that does not see the last variable makes ties.
      for (auto* list : {&group.objectives, &group.utilisations}) {
        for (auto& sum : *list) {
          for (auto& term : sum.terms) {
            term.powers.back() = 0.0;
          }
        }
      }
    }
    const auto problem = problem_of(group, round % 2 == 0);
    const auto expected = enumerated(problem, 0);
    const auto front =
        certified_group(problem, 0, {.epsilon = 0.0, .delta = round % 5 == 0 ? 0.0 : 1e-9});
    different += rows_of(front) == expected && front.points.size() == expected.size() ? 0U : 1U;
    different +=
        front.state == (expected.empty() ? GroupState::infeasible : GroupState::solved) ? 0U : 1U;
    points += expected.size();
    for (auto row = expected.begin(); row != expected.end(); ++row) {
      ties += row != expected.begin() && std::prev(row)->first == row->first ? 1U : 0U;
    }
  }
  CHECK(different == 0);
  CHECK(points > 2000);
  CHECK(ties > 100);
}

TEST_CASE("whole numbers beside continuous sizes are covered") {
  PosynomialMaker make(106);
  Tally tally;
  for (int round = 0; round < 150; ++round) {
    auto variables = make.continuous(1);
    for (const auto& more : make.discrete(1 + static_cast<std::size_t>(round % 2), 6)) {
      variables.push_back(more);
    }
    const auto problem =
        problem_of(make.group(static_cast<std::size_t>(1 + round % 3), variables), round % 3 != 0);
    tally.add(problem, {.epsilon = 1e-3}, 150);
  }
  CHECK(tally.wrong == 0);
  CHECK(tally.incomplete == 0);
  CHECK(tally.solved > 60);
}

TEST_CASE("on one size the front is that of the exact solver") {
  // The exact solver finds roots piece by piece and knows no boxes.
  PosynomialMaker make(107);
  std::size_t compared = 0;
  for (int round = 0; round < 600; ++round) {
    auto group = make.group(2, make.continuous(1));
    if (round % 2 == 0) {
      make.add_step(group);
    }
    const auto problem = problem_of(group);
    const auto exact = solve_exact(problem, 0);
    const auto front = certified_group(problem, 0, {.epsilon = 1e-4});
    REQUIRE(exact.solved);
    for (const auto& point : exact.points) {
      if (all_at_most(point.utilisations, 1.0 - 1e-6) || !front.points.empty()) {
        CHECK(keeps_promise(front.points, point.objectives, 1.01e-4));
        ++compared;
      }
    }
    for (const auto& point : front.points) {
      CHECK(std::any_of(exact.points.begin(), exact.points.end(), [&](const auto& other) {
        return other.objectives[0] <= point.objectives[0] * (1.0 + 1e-11) &&
               other.objectives[1] <= point.objectives[1] * (1.0 + 1e-11);
      }));
    }
  }
  CHECK(compared > 200);
}

TEST_CASE("a sliver of feasible sizes a thousandth wide is found") {
  // u = (a / x)^2 and (x / (a (1 + w)))^2: feasible from a to a (1 + w), whatever y; f = x (y +
  // 1/y) has its least at y = 1: 2 a. Closed form, written here.
  std::size_t found = 0;
  for (int round = 0; round < 50; ++round) {
    const double a = 1.0 + 0.03 * round;
    const double width = 1e-3;
    PosynomialProblem::Group group;
    group.variables = {between(0.5, 4.0), between(0.3, 3.0)};
    group.objectives = {{.terms = {{1.0, {1.0, 1.0}}, {1.0, {1.0, -1.0}}}}};
    group.utilisations = {{.terms = {{a * a, {-2.0, 0.0}}}},
                          {.terms = {{1.0 / (a * a * (1.0 + width) * (1.0 + width)), {2.0, 0.0}}}}};
    for (const bool directions : {true, false}) {
      const auto front =
          certified_group(problem_of(group), 0, {.epsilon = 1e-3, .directions = directions});
      REQUIRE(front.state == GroupState::solved);
      CHECK(front.points[0].objectives[0] >= 2.0 * a * (1.0 - 1e-12));
      CHECK(front.points[0].objectives[0] <= 2.0 * a * (1.0 + 1e-9));
      ++found;
    }
  }
  CHECK(found == 100);
}
