// SPDX-License-Identifier: MIT
// The evolutionary engine as a second opinion on the exact one. It sees the part through the public
// `evaluate` alone: one group a candidate, no trend, no piece, no root.
#include "evolve/problems.hpp"
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/evolve/evolve.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/front.hpp>

#include <algorithm>
#include <limits>
#include <utility>
#include <vector>

using namespace bismar;

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Every combination that no rule excludes, by plain loops.
std::vector<Candidate> candidates_of(const Part& part, const Catalogue& catalogue) {
  std::vector<Candidate> out;
  const auto shapes = static_cast<std::uint32_t>(part.body.shapes.size());
  const auto lists =
      part.body.stock.empty() ? 0U : static_cast<std::uint32_t>(catalogue.stock.size());
  const auto routes = static_cast<std::uint32_t>(catalogue.routes.size());
  for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
    for (std::uint32_t r = 0; r < routes; ++r) {
      for (std::uint32_t t = 0; t <= routes; ++t) {
        for (std::uint32_t s = 0; s < shapes + lists; ++s) {
          for (const auto& finish : part.finishes) {
            Candidate one;
            one.material = m;
            one.route = r;
            one.treatment = t < routes ? t : Candidate::none;
            one.shape = s < shapes ? s : Candidate::none;
            one.stock = s < shapes ? Candidate::none : s - shapes;
            one.finish = finish == "none" ? Candidate::none : 0;
            if (catalogue.routes[r].kind == RouteKind::primary &&
                !first_broken_rule(one, part, catalogue)) {
              out.push_back(one);
            }
          }
        }
      }
    }
  }
  return out;
}

test::FunctionProblem problem_of(const Part& part, const Catalogue& catalogue) {
  std::vector<test::FunctionProblem::Group> groups;
  for (const auto& candidate : candidates_of(part, catalogue)) {
    Variable size;
    if (candidate.stock == Candidate::none) {
      const auto& shape = part.body.shapes[candidate.shape];
      size = test::continuous(shape.height_min, shape.height_max);
    } else {
      std::vector<double> indices(catalogue.stock[candidate.stock].items.size());
      for (std::size_t i = 0; i < indices.size(); ++i) {
        indices[i] = static_cast<double>(i);
      }
      size = test::one_of(indices);
    }
    groups.push_back({{size}, 1, [&part, &catalogue, candidate](auto x, auto f, auto u) {
                        f[0] = f[1] = u[0] = infinity;
                        try {
                          const auto design = evaluate(part, catalogue, candidate, x[0]);
                          f[0] = design.mass;
                          f[1] = design.cost;
                          u[0] = 0.0;
                          for (const auto& one : design.utilisations) {
                            u[0] = std::max(u[0], one.value);
                          }
                        } catch (const Error&) {
                          // Beyond the tabulated thickness or the largest bar: no design there.
                        }
                      }});
  }
  return test::FunctionProblem(2, std::move(groups));
}

/// Area between a front of (mass, cost), by rising mass, and a reference point.
double area(const std::vector<std::pair<double, double>>& front,
            const std::pair<double, double>& reference) {
  double sum = 0.0;
  double floor = reference.second;
  for (const auto& [mass, cost] : front) {
    if (mass < reference.first && cost < floor) {
      sum += (reference.first - mass) * (floor - cost);
      floor = cost;
    }
  }
  return sum;
}

void compare(const Part& part, const Catalogue& catalogue, const EvolveOptions& options) {
  const auto result = front(part, catalogue);
  REQUIRE(result.front_count > 0);
  std::vector<std::pair<double, double>> exact;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    exact.emplace_back(result.designs[i].mass, result.designs[i].cost);
  }

  const auto problem = problem_of(part, catalogue);
  const auto evolved = evolve(problem, options);
  REQUIRE_FALSE(evolved.points.empty());
  std::vector<std::pair<double, double>> found;
  for (const auto& point : evolved.points) {
    const double mass = point.objectives[0];
    const double cost = point.objectives[1];
    found.emplace_back(mass, cost);
    // The exact front covers it: some design is no worse in both by more than 1e-9.
    CHECK(std::any_of(exact.begin(), exact.end(), [&](const auto& design) {
      return design.first <= mass * (1.0 + 1e-9) && design.second <= cost * (1.0 + 1e-9);
    }));
  }

  // From twice the worst corner of the exact front, so that its ends count as well.
  const std::pair<double, double> reference{2.0 * exact.back().first, 2.0 * exact.front().second};
  const double all = area(exact, reference);
  REQUIRE(all > 0.0);
  CHECK(area(found, reference) >= 0.95 * all);
  CHECK(area(found, reference) <= all * (1.0 + 1e-8));
}

}  // namespace

TEST_CASE("on a lever of the small catalogue the search comes to the exact front and not past it") {
  const auto catalogue = test::small_catalogue();
  auto part = test::small_lever();
  part.body.shapes = {round({.height_max = 0.08}),
                      ellipse({.height_to_width = 1.25, .height_max = 0.08})};
  part.body.stock = {"bars"};
  part.limits.deflection = 10e-3;
  compare(part, catalogue, {.population = 40, .generations = 100, .trace_every = 0});
}

TEST_CASE("on random catalogues and parts the search comes to the exact front and not past it") {
  std::mt19937 random(11);
  int compared = 0;
  for (int round = 0; round < 6; ++round) {
    const auto catalogue = test::random_catalogue(random, 4);
    const auto part = test::random_part(random);
    CAPTURE(round);
    if (front(part, catalogue).front_count == 0) {
      continue;
    }
    ++compared;
    compare(part, catalogue, {.population = 100, .generations = 200, .trace_every = 0});
  }
  CHECK(compared >= 3);
}
