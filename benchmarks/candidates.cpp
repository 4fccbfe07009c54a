// SPDX-License-Identifier: MIT
// What one candidate costs: to compile, to solve, to evaluate at one size.
#include "inputs.hpp"
#include "sizing/study.hpp"

#include <benchmark/benchmark.h>

#include <algorithm>
#include <optional>
#include <vector>

namespace bismar::benchmarks {

namespace {

/// The wide lever with its candidates; the one to look at has a continuous size and a feasible one.
struct Case {
  Part part = wide_lever();
  Settings settings;
  Solved solved = solve_candidates(part, starter(), settings);
  const Outcome* outcome = nullptr;

  Case() {
    outcome = ellipse();
    if (outcome != nullptr) {
      // Of one material the groups are kept.
      solved = solve_candidates(part, starter(), settings, {}, outcome->candidate.material);
      outcome = ellipse();
    }
  }

  [[nodiscard]] const Outcome* ellipse() const {
    const auto found =
        std::find_if(solved.outcomes.begin(), solved.outcomes.end(), [](const Outcome& one) {
          return one.kind == Outcome::Kind::feasible && one.candidate.shape == 3;
        });
    return found == solved.outcomes.end() ? nullptr : &*found;
  }
};

const Case& the_case() {
  static const Case made;
  return made;
}

void solve_one(benchmark::State& state) {
  const auto& one = the_case();
  if (one.outcome == nullptr) {
    state.SkipWithError("no feasible candidate");
    return;
  }
  std::size_t evaluations = 0;
  Outcome outcome;
  for (auto _ : state) {
    outcome = solve_group(*one.solved.problem, one.outcome->group, evaluations);
    benchmark::DoNotOptimize(&outcome);
  }
  state.counters["n"] = static_cast<double>(one.solved.problem->constraints(one.outcome->group));
  state.counters["size"] = static_cast<double>(outcome.points.size());
  state.counters["checksum"] = outcome.points.front().mass;
  state.counters["evaluations"] =
      static_cast<double>(evaluations) / static_cast<double>(state.iterations());
}

void compile_one(benchmark::State& state) {
  const auto& one = the_case();
  if (one.outcome == nullptr) {
    state.SkipWithError("no feasible candidate");
    return;
  }
  std::optional<SizingProblem> problem;
  std::vector<double> ends;
  std::size_t pieces = 0;
  for (auto _ : state) {
    // A problem grows with every candidate, so that it is made anew now and then.
    if (!problem || problem->groups() == 1000) {
      state.PauseTiming();
      problem.emplace(one.part, starter(), one.settings);
      problem->add(one.outcome->candidate);
      state.ResumeTiming();
    }
    pieces = problem->add(one.outcome->candidate).pieces.size();
    benchmark::DoNotOptimize(pieces);
  }
  state.counters["n"] = static_cast<double>(one.solved.problem->constraints(one.outcome->group));
  state.counters["size"] = static_cast<double>(pieces);
  for (const auto& piece : problem->compiled(0).pieces) {
    ends.push_back(piece.upper);
  }
  state.counters["checksum"] = checksum(ends);
}

void evaluate_one(benchmark::State& state) {
  const auto& one = the_case();
  if (one.outcome == nullptr) {
    state.SkipWithError("no feasible candidate");
    return;
  }
  const auto group = one.outcome->group;
  const std::vector<double> x = {one.outcome->points.front().size};
  std::vector<double> objectives(2);
  std::vector<double> utilisations(one.solved.problem->constraints(group));
  for (auto _ : state) {
    one.solved.problem->evaluate(group, x, objectives, utilisations);
    benchmark::DoNotOptimize(utilisations.data());
  }
  state.counters["n"] = static_cast<double>(utilisations.size());
  state.counters["size"] = 2.0;
  state.counters["checksum"] = checksum(utilisations) + objectives[0] + objectives[1];
}

BENCHMARK(compile_one)->Name("candidate/compile");
BENCHMARK(solve_one)->Name("candidate/solve");
BENCHMARK(evaluate_one)->Name("candidate/evaluate");

}  // namespace

}  // namespace bismar::benchmarks
