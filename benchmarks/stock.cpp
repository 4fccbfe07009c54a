// SPDX-License-Identifier: MIT
// Decisions on stock: which sizes of which lists, in which materials, hold under every load case.
#include "inputs.hpp"
#include "sizing/enumeration.hpp"
#include "sizing/stock_solver.hpp"

#include <benchmark/benchmark.h>

#include <bismar/mechanics/separable_bound.hpp>
#include <bismar/solver/separable.hpp>

#include <algorithm>
#include <bit>
#include <cstdint>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace bismar::benchmarks {

namespace {

/// A strut that is also bent, in several load cases: buckling curves, bending with compression,
/// walls, deflection.
Part bent_strut() {
  Part part;
  part.name = "bent strut";
  part.quantity = 60.0;
  part.body.length = 1.8;
  part.body.stock = {"all"};
  part.body.load_cases = {pinned_pinned({axial(-50e3)}, "closing"),
                          pinned_pinned({axial(-20e3), force(-600.0, 0.9)}, "knocked"),
                          pinned_pinned({axial(15e3), force(-900.0, 0.6)}, "lifted"),
                          pinned_pinned({force(-1500.0, 0.9)}, "stood on")};
  part.limits.deflection = 9e-3;
  return part;
}

/// All candidates of a part out of stock that can be decided, made ready.
struct Ready {
  Part part;
  Settings settings;
  SizingProblem problem{part, starter(), settings};
  std::vector<std::size_t> groups;
  std::size_t sizes = 0;

  explicit Ready(Part of) : part(std::move(of)) {
    Enumeration enumeration(part, starter());
    for (std::uint32_t m = 0; m < starter().materials.size(); ++m) {
      for (Candidate candidate : enumeration.of(m).candidates) {
        if (candidate.stock == Candidate::none) {
          continue;
        }
        candidate.material = m;
        const auto& compiled = problem.add(candidate);
        if (compiled.undecided.empty() && compiled.undecided_limits.empty() &&
            !compiled.pieces.empty()) {
          groups.push_back(problem.groups() - 1);
          sizes += compiled.pieces.size();
        } else {
          problem.remove_last();
        }
      }
    }
  }
};

const Ready& bent_struts() {
  static const Ready made(bent_strut());
  return made;
}

const Ready& levers() {
  static const Ready made(wide_lever_with_stock());
  return made;
}

void report(benchmark::State& state, double decisions, std::size_t size, double sum) {
  state.counters["n"] = decisions;
  state.counters["size"] = static_cast<double>(size);
  state.counters["checksum"] = sum;
  state.counters["decisions"] = benchmark::Counter(
      decisions * static_cast<double>(state.iterations()), benchmark::Counter::kIsRate);
}

bool same(const GroupSolution& a, const GroupSolution& b) {
  const auto equal = [](const GroupSolution::Point& p, const GroupSolution::Point& q) {
    return p.x == q.x && p.objectives == q.objectives && p.utilisations == q.utilisations;
  };
  return std::equal(a.points.begin(), a.points.end(), b.points.begin(), b.points.end(), equal) &&
         a.excluded_by == b.excluded_by && a.least_utilisation == b.least_utilisation &&
         a.clash_falling == b.clash_falling && a.clash_rising == b.clash_rising;
}

/// Every candidate, by the walk through every size or by the stock solver, its demands included.
void solve_all(benchmark::State& state, const Ready& (*make)(), bool quick) {
  const Ready& ready = make();
  std::vector<GroupSolution> solutions(ready.groups.size());
  for (auto _ : state) {
    const StockSolver solver(ready.problem);
    for (std::size_t i = 0; i < ready.groups.size(); ++i) {
      solutions[i] =
          quick ? solver.solve(ready.groups[i]) : solve_exact(ready.problem, ready.groups[i]);
    }
    benchmark::DoNotOptimize(solutions.data());
  }
  std::vector<double> masses;
  for (std::size_t i = 0; i < ready.groups.size(); ++i) {
    if (quick && !same(solutions[i], solve_exact(ready.problem, ready.groups[i]))) {
      state.SkipWithError("the stock solver differs from the walk through every size");
      return;
    }
    for (const auto& point : solutions[i].points) {
      masses.push_back(point.objectives[0]);
    }
  }
  report(state,
         static_cast<double>(ready.sizes * ready.part.body.load_cases.size()),
         masses.size(),
         checksum(masses));
}

/// Demands of all stock sizes under eight load cases of a beam, and the capacities of all materials
/// that are held against yield.
struct Separable {
  Part part;
  Settings settings;
  std::vector<const SectionProperties*> sections;
  std::size_t load_cases = 8;
  std::size_t materials = 0;
  DemandTable table{0, 0};
  std::vector<double> capacities;

  Separable() {
    part = wide_lever();
    part.limits.twist = 0.02;
    part.body.load_cases.clear();
    for (std::size_t c = 0; c < load_cases; ++c) {
      const double load = 200.0 * static_cast<double>(c + 1);
      part.body.load_cases.push_back(cantilever({force(load, 0.3), torque(20.0 + load / 50.0, 0.3)},
                                                "case " + std::to_string(c)));
    }
    for (const auto& list : starter().stock) {
      if (list.sheet) {
        continue;
      }
      for (const auto& item : list.items) {
        sections.push_back(&item.section);
      }
    }
    SizingProblem problem(part, starter(), settings);
    const std::vector<const LimitState*> states = {
        limit_state("yield"), limit_state("deflection"), limit_state("twist")};
    table = DemandTable(states.size() * load_cases, sections.size());
    for (std::size_t i = 0; i < states.size(); ++i) {
      for (std::size_t c = 0; c < load_cases; ++c) {
        for (std::size_t s = 0; s < sections.size(); ++s) {
          double demand = 0.0;
          std::vector<double> all(states[i]->separable()->terms());
          states[i]->separable()->demands(
              {*sections[s], problem.effects()[c], problem.member_limits(), part.body.length}, all);
          demand = *std::max_element(all.begin(), all.end());
          table.set(i * load_cases + c, s, demand);
        }
      }
    }
    for (std::size_t m = 0; m < starter().materials.size(); ++m) {
      const auto& member = problem.states(m).front().cases.front().member;
      if (member.rule == StressRule::von_mises_yield && member.sigma_y && member.E && member.G) {
        ++materials;
        for (const double capacity : {*member.sigma_y / 1.5, *member.E, *member.G}) {
          capacities.insert(capacities.end(), load_cases, capacity);
        }
      }
    }
  }
};

const Separable& separable_tables() {
  static const Separable made;
  return made;
}

/// As one would write it: a quotient a condition, until one exceeds 1.
void quotients(const Separable& one, std::vector<std::uint64_t>& words) {
  const std::size_t conditions = one.table.conditions();
  std::fill(words.begin(), words.end(), 0);
  for (std::size_t m = 0; m < one.materials; ++m) {
    for (std::size_t s = 0; s < one.table.sizes(); ++s) {
      const auto block = one.table.demands_of_block(s / DemandTable::block);
      for (std::size_t k = 0; k < conditions; ++k) {
        if (block[k * DemandTable::block + s % DemandTable::block] /
                one.capacities[m * conditions + k] >
            1.0) {
          words[m * one.table.blocks() + s / DemandTable::block] |= std::uint64_t{1}
                                                                    << (s % DemandTable::block);
          break;
        }
      }
    }
  }
}

void decide_separable(benchmark::State& state, std::optional<SimdPath> path, bool plain) {
  const Separable& one = separable_tables();
  std::vector<std::uint64_t> words(one.materials * one.table.blocks());
  if (path) {
    const auto paths = simd_paths();
    if (std::find(paths.begin(), paths.end(), *path) == paths.end()) {
      state.SkipWithError("this processor does not have these instructions");
      return;
    }
  }
  for (auto _ : state) {
    if (plain) {
      quotients(one, words);
    } else {
      mark_exceeding(one.table, one.capacities, words, path);
    }
    benchmark::DoNotOptimize(words.data());
  }
  std::vector<std::uint64_t> wanted(words.size());
  quotients(one, wanted);
  if (words != wanted) {
    state.SkipWithError("comparisons and quotients decide differently");
    return;
  }
  std::size_t feasible = one.materials * one.table.sizes();
  double sum = 0.0;
  for (std::size_t i = 0; i < words.size(); ++i) {
    feasible -= static_cast<std::size_t>(std::popcount(words[i]));
    sum += static_cast<double>(words[i] % 1000003) * static_cast<double>(i % 1000 + 1);
  }
  report(state,
         static_cast<double>(one.materials * one.table.sizes() * one.load_cases),
         feasible,
         sum);
}

BENCHMARK_CAPTURE(solve_all, general, bent_struts, true)
    ->Name("stock/general")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(solve_all, plain, bent_struts, false)
    ->Name("stock/plain")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(solve_all, lever, levers, true)
    ->Name("stock/lever")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(solve_all, lever_plain, levers, false)
    ->Name("stock/lever_plain")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(decide_separable, fastest, std::nullopt, false)
    ->Name("stock/separable")
    ->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(decide_separable, generic, SimdPath::generic, false)
    ->Name("stock/separable_generic")
    ->Unit(benchmark::kMicrosecond);
BENCHMARK_CAPTURE(decide_separable, quotients, std::nullopt, true)
    ->Name("stock/separable_quotients")
    ->Unit(benchmark::kMicrosecond);

}  // namespace

}  // namespace bismar::benchmarks
