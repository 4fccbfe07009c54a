// SPDX-License-Identifier: MIT
#include "sizing/study.hpp"

#include "sizing/stock_solver.hpp"

#include "sizing/words.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// The constraints that exclude a candidate: one that fails everywhere, or two that clash.
std::vector<std::size_t> failed_constraints(const GroupSolution& solution) {
  if (solution.excluded_by != SIZE_MAX) {
    return {solution.excluded_by};
  }
  if (solution.clash_falling == solution.clash_rising) {
    return {solution.clash_falling};
  }
  return {solution.clash_falling, solution.clash_rising};
}

}  // namespace

CandidateNames names(const Candidate& candidate, const Part& part, const Catalogue& catalogue) {
  CandidateNames out;
  out.material = catalogue.materials.info(candidate.material).id;
  out.shape = candidate.stock != Candidate::none
                  ? catalogue.stock[candidate.stock].id
                  : std::string(name(part.body.shapes[candidate.shape].family));
  out.route = catalogue.routes[candidate.route].id;
  out.treatment =
      candidate.treatment == Candidate::none ? "" : catalogue.routes[candidate.treatment].id;
  out.finish =
      candidate.finish == Candidate::none ? "none" : catalogue.finishes[candidate.finish].id;
  return out;
}

std::string missing_text(std::span<const Property> properties,
                         std::span<const std::string> limits) {
  std::string out;
  for (const Property property : properties) {
    out += (out.empty() ? "" : ", ") + std::string(info(property).name);
  }
  for (const auto& limit : limits) {
    out += (out.empty() ? "" : ", ") + limit;
  }
  return out;
}

Outcome solve_group(const SizingProblem& problem, std::size_t group, std::size_t& evaluations) {
  const auto& compiled = problem.compiled(group);
  Outcome out;
  out.candidate = compiled.candidate;
  out.group = group;
  if (!compiled.undecided.empty() || !compiled.undecided_limits.empty()) {
    out.kind = problem.settings().missing == Missing::exclude ? Outcome::Kind::excluded
                                                              : Outcome::Kind::undecided;
    out.reason = missing_text(compiled.undecided, compiled.undecided_limits);
    return out;
  }
  if (compiled.variable.kind == Variable::Kind::ordered_set && compiled.variable.values.empty()) {
    out.reason = "no size in the range asked for";
    out.least_utilisation = infinity;
    return out;
  }
  const auto solution = compiled.candidate.stock == Candidate::none
                            ? solve_exact(problem, group)
                            : problem.stock_solver().solve(group);
  evaluations += solution.evaluations;
  if (!solution.solved) {
    throw InternalError("sizing: a candidate with one size is not solvable exactly");
  }
  if (solution.points.empty()) {
    out.failed = failed_constraints(solution);
    for (const auto constraint : out.failed) {
      out.reason +=
          (out.reason.empty() ? "" : " against ") + compiled.constraints[constraint].label;
    }
    out.least_utilisation = solution.least_utilisation;
    return out;
  }
  std::vector<double> objectives(2);
  std::vector<double> utilisations(compiled.constraints.size());
  for (const auto& point : solution.points) {
    double x = point.x[0];
    // The root lies on the feasible side of the scaled section; the plain path may differ by a
    // rounding.
    double step = 4.0 * std::numeric_limits<double>::epsilon();
    for (int tries = 0; tries < 16; ++tries) {
      problem.evaluate_plain(group, x, objectives, utilisations);
      const double worst = *std::max_element(utilisations.begin(), utilisations.end());
      if (worst <= 1.0 || compiled.variable.kind == Variable::Kind::ordered_set) {
        break;
      }
      x *= 1.0 + step;
      step *= 2.0;
    }
    if (*std::max_element(utilisations.begin(), utilisations.end()) <= 1.0) {
      out.points.push_back({x, {}, objectives[0], objectives[1]});
    } else {
      out.reason = "INTERNAL: the plain path does not confirm it";
    }
  }
  out.kind = out.points.empty() ? Outcome::Kind::infeasible : Outcome::Kind::feasible;
  return out;
}

std::optional<Outcome> solve_candidate(SizingProblem& problem,
                                       const Candidate& candidate,
                                       const RunOptions& run,
                                       Incumbent* incumbent,
                                       bool keep_group,
                                       Solved& solved) {
  if (candidate.shape != Candidate::none &&
      !free_dimensions(problem.part().body.shapes[candidate.shape]).empty()) {
    return solve_free(problem, candidate, run, incumbent, solved);
  }
  const auto& compiled = problem.add(candidate);
  const bool bought_thickness = candidate.shape != Candidate::none &&
                                takes_sheet_thickness(problem.catalogue().routes[candidate.route]);
  if (bought_thickness && compiled.variable.values.empty()) {
    ++solved.cannot_exist[Rule::stock_thickness];
    problem.remove_last();
    return std::nullopt;
  }
  auto outcome = solve_group(problem, problem.groups() - 1, solved.evaluations);
  if (!keep_group) {
    problem.remove_last();
    outcome.group = Outcome::no_group;
  }
  return outcome;
}

void keep_or_count(Outcome outcome, const Part& part, const Catalogue& catalogue, Solved& solved) {
  switch (outcome.kind) {
    case Outcome::Kind::undecided:
      ++solved.undecided[outcome.reason];
      solved.undecided_text.insert(names(outcome.candidate, part, catalogue).material + ": " +
                                   outcome.reason);
      return;
    case Outcome::Kind::excluded:
      ++solved.excluded["value missing: " + outcome.reason];
      return;
    case Outcome::Kind::infeasible:
      ++solved.infeasible[outcome.reason];
      return;
    case Outcome::Kind::skipped:
      ++solved.not_better;
      return;
    case Outcome::Kind::feasible:
      solved.outcomes.push_back(std::move(outcome));
  }
}

Solved solve_candidates(const Part& part,
                        const Catalogue& catalogue,
                        const Settings& settings,
                        const RunOptions& run,
                        std::uint32_t material) {
  Solved solved;
  solved.problem = std::make_unique<SizingProblem>(part, catalogue, settings);
  Enumeration enumeration(part, catalogue);
  Progress progress(run);
  Incumbent* incumbent = nullptr;
  const bool keep_all = material != Candidate::none;
  const auto count = static_cast<std::uint32_t>(catalogue.materials.size());
  const std::uint32_t from = material == Candidate::none ? 0 : material;
  const std::uint32_t to = material == Candidate::none ? count : material + 1;
  for (std::uint32_t m = from; m < to; ++m) {
    if (run.stop.stop_requested()) {
      solved.stopped = true;
      break;
    }
    const auto& kind = enumeration.of(m);
    solved.considered += kind.considered;
    for (const auto& [rule, number] : kind.cannot_exist) {
      solved.cannot_exist[rule] += number;
    }
    for (Candidate candidate : kind.candidates) {
      candidate.material = m;
      if (auto outcome =
              solve_candidate(*solved.problem, candidate, run, incumbent, keep_all, solved)) {
        keep_all ? solved.outcomes.push_back(std::move(*outcome))
                 : keep_or_count(std::move(*outcome), part, catalogue, solved);
      }
    }
    progress.at(static_cast<double>(m - from + 1) / static_cast<double>(to - from));
  }
  solved.doubtful_sizes = doubtful_sizes(part, catalogue, settings);
  return solved;
}

}  // namespace bismar
