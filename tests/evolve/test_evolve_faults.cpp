// SPDX-License-Identifier: MIT
#include "evolve/problems.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/evolve/evolve.hpp>

#include <limits>
#include <set>
#include <stdexcept>
#include <string>

using namespace bismar;
using test::continuous;
using test::FunctionProblem;
using test::one_of;

namespace {

constexpr double nan_value = std::numeric_limits<double>::quiet_NaN();
constexpr double infinity = std::numeric_limits<double>::infinity();

void nothing(std::span<const double>, std::span<double> f, std::span<double>) {
  std::fill(f.begin(), f.end(), 0.0);
}

std::multiset<std::pair<Code, std::string>> faults_of(const BoxProblem& problem,
                                                      const EvolveOptions& options) {
  std::multiset<std::pair<Code, std::string>> out;
  try {
    (void)evolve(problem, options);
  } catch (const Error& error) {
    for (const auto& fault : error.faults()) {
      CHECK_FALSE(fault.message.empty());
      out.insert({fault.code, fault.where});
    }
  }
  return out;
}

using Faults = std::multiset<std::pair<Code, std::string>>;

}  // namespace

TEST_CASE("all faults of the options are told at once") {
  const auto problem = test::curve_and_two_points();
  CHECK(faults_of(problem,
                  {.population = 30,
                   .generations = 2'000'000'000,
                   .groups = {0, 5, 0},
                   .reference = {1.0, 2.0, infinity}}) ==
        Faults{{Code::out_of_range, "population"},
               {Code::out_of_range, "generations"},
               {Code::out_of_range, "groups"},
               {Code::duplicate, "groups"},
               {Code::conflict, "reference"},
               {Code::not_finite, "reference"}});
}

TEST_CASE("a population is a multiple of 4 within its range") {
  const auto problem = test::curve_and_two_points();
  for (const std::size_t population : {0u, 4u, 9u, 10u, 11u, 1'000'004u}) {
    CAPTURE(population);
    CHECK(faults_of(problem, {.population = population, .generations = 1}) ==
          Faults{{Code::out_of_range, "population"}});
  }
  for (const auto algorithm : {EvolveAlgorithm::nsga2, EvolveAlgorithm::moead}) {
    for (const std::size_t population : {8u, 12u, 64u}) {
      CAPTURE(population);
      CHECK(faults_of(problem, {.algorithm = algorithm, .population = population, .generations = 2})
                .empty());
    }
  }
}

TEST_CASE("faults of the problem name group and variable") {
  const FunctionProblem problem(1,
                                {{{continuous(2.0, 1.0), continuous(0.0, infinity)}, 0, nothing},
                                 {{one_of({}), one_of({1.0, nan_value})}, 0, nothing},
                                 {{}, 0, nothing}});
  CHECK(faults_of(problem, {}) == Faults{{Code::unsupported, "objectives"},
                                         {Code::out_of_range, "groups[0].variables[0]"},
                                         {Code::not_finite, "groups[0].variables[1]"},
                                         {Code::empty, "groups[1].variables[0]"},
                                         {Code::not_finite, "groups[1].variables[1]"},
                                         {Code::empty, "groups[2].variables"}});
  CHECK(faults_of(FunctionProblem(2, {}), {}) == Faults{{Code::empty, "groups"}});
  // What is not searched need not be searchable.
  const FunctionProblem partly(2,
                               {{{one_of({})}, 0, nothing}, {{continuous(0.0, 1.0)}, 0, nothing}});
  CHECK(faults_of(partly, {.population = 8, .generations = 1, .groups = {1}}).empty());
}

TEST_CASE("NaN is refused with the point where it came up") {
  const auto not_a_number = [](bool objective) {
    return FunctionProblem(2, {{{one_of({0.25})}, 1, [objective](auto, auto f, auto u) {
                                  f[0] = 1.0;
                                  f[1] = objective ? nan_value : 1.0;
                                  u[0] = objective ? 0.0 : nan_value;
                                }}});
  };
  const EvolveOptions options{.population = 8, .generations = 1};
  CHECK(faults_of(not_a_number(true), options) == Faults{{Code::not_finite, "groups[0]"}});
  CHECK(faults_of(not_a_number(false), options) == Faults{{Code::not_finite, "groups[0]"}});
  try {
    (void)evolve(not_a_number(true), options);
    FAIL("NaN was accepted");
  } catch (const Error& error) {
    CHECK(std::string(error.what()) ==
          "groups[0]: Objective 1 is NaN at x = (0.25). Give infinity where there is no design.");
  }
}

TEST_CASE("what the problem or the callback throws passes through, in every generation") {
  int calls = 0;
  const FunctionProblem problem(2, {{{continuous(0.0, 1.0)}, 0, [&](auto x, auto f, auto) {
                                       if (++calls == 20) {
                                         throw std::out_of_range("from the model");
                                       }
                                       f[0] = x[0];
                                       f[1] = -x[0];
                                     }}});
  CHECK_THROWS_AS(evolve(problem, {.population = 8, .generations = 9}), std::out_of_range);
  CHECK(calls == 20);
  CHECK_THROWS_AS(
      evolve(problem,
             {.population = 8,
              .generations = 9,
              .progress = [](double) { throw std::domain_error("from the callback"); }}),
      std::domain_error);
}
