// SPDX-License-Identifier: MIT
#include <bismar/evolve/evolve.hpp>

#include "evolve/search.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>

#include <algorithm>
#include <cmath>
#include <numeric>
#include <set>
#include <string>

namespace bismar {

namespace {

constexpr std::size_t least_population = 8;
constexpr std::size_t largest_population = 1'000'000;
constexpr std::size_t most_generations = 1'000'000'000;

std::string indexed(const char* name, std::size_t i) {
  return std::string(name) + "[" + std::to_string(i) + "]";
}

void check_variable(const Variable& variable, const std::string& where, FaultList& faults) {
  if (variable.kind == Variable::Kind::ordered_set) {
    if (variable.values.empty()) {
      faults.add(Code::empty, where, "The ordered set has no value. Leave the group out.");
    }
    if (!std::all_of(variable.values.begin(), variable.values.end(), [](double value) {
          return std::isfinite(value);
        })) {
      faults.add(Code::not_finite, where, "A value of the ordered set is not finite.");
    }
    return;
  }
  if (!std::isfinite(variable.lower) || !std::isfinite(variable.upper)) {
    faults.add(Code::not_finite, where, "A bound is not finite. Bound the variable on both sides.");
  } else if (variable.lower > variable.upper) {
    faults.add(Code::out_of_range, where, "The lower bound lies above the upper one.");
  } else if (variable.kind == Variable::Kind::integer &&
             std::ceil(variable.lower) > std::floor(variable.upper)) {
    faults.add(Code::out_of_range, where, "No whole number lies between the bounds.");
  }
}

void check_options(const EvolveOptions& options, std::size_t objectives, FaultList& faults) {
  const auto population = options.population;
  if (population < least_population || population > largest_population || population % 4 != 0) {
    faults.add({Code::out_of_range,
                "population",
                std::to_string(population),
                "a multiple of 4 from 8 to 1000000",
                "The population is " + std::to_string(population) +
                    "; it must be a multiple of 4 from 8 to 1000000."});
  }
  if (options.generations > most_generations) {
    faults.add(
        Code::out_of_range, "generations", "At most 1000000000 generations can be asked for.");
  }
  if (options.reference.empty()) {
    return;
  }
  if (options.reference.size() != objectives) {
    faults.add(Code::conflict,
               "reference",
               "The reference point has " + std::to_string(options.reference.size()) +
                   " coordinates, the problem " + std::to_string(objectives) + " objectives.");
  }
  if (!std::all_of(options.reference.begin(), options.reference.end(), [](double value) {
        return std::isfinite(value);
      })) {
    faults.add(Code::not_finite, "reference", "A coordinate of the reference point is not finite.");
  }
}

/// The groups to search, each checked.
std::vector<std::size_t> checked_groups(const BoxProblem& problem,
                                        const EvolveOptions& options,
                                        FaultList& faults) {
  std::vector<std::size_t> groups = options.groups;
  if (groups.empty()) {
    groups.resize(problem.groups());
    std::iota(groups.begin(), groups.end(), std::size_t{0});
  }
  if (groups.empty()) {
    faults.add(Code::empty, "groups", "The problem has no group: there is nothing to search.");
  }
  std::set<std::size_t> seen;
  for (const auto group : groups) {
    if (group >= problem.groups()) {
      faults.add(Code::out_of_range,
                 "groups",
                 "There is no group " + std::to_string(group) + "; the problem has " +
                     std::to_string(problem.groups()) + ", counted from 0.");
      continue;
    }
    if (!seen.insert(group).second) {
      faults.add(Code::duplicate,
                 "groups",
                 "Group " + std::to_string(group) + " is named more than once.");
      continue;
    }
    const auto where = indexed("groups", group);
    const auto variables = problem.variables(group);
    if (variables.empty()) {
      faults.add(Code::empty, where + ".variables", "The group has no variable.");
    }
    for (std::size_t v = 0; v < variables.size(); ++v) {
      check_variable(variables[v], where + "." + indexed("variables", v), faults);
    }
  }
  return groups;
}

}  // namespace

EvolvedFront evolve(const BoxProblem& problem, const EvolveOptions& options) {
  FaultList faults;
  if (problem.objectives() < 2) {
    faults.add(Code::unsupported,
               "objectives",
               "A front needs two objectives or more; this problem has " +
                   std::to_string(problem.objectives()) + ".");
  }
  check_options(options, problem.objectives(), faults);
  auto groups = checked_groups(problem, options, faults);
  faults.throw_if_any();

  const FloatingPointGuard guard;
  return search(problem, std::move(groups), options);
}

}  // namespace bismar
