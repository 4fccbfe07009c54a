// SPDX-License-Identifier: MIT
// A lever whose load is changed: a study beside a fresh front of the same part.
#include "inputs.hpp"

#include <benchmark/benchmark.h>

#include <bismar/sizing/study.hpp>

#include <memory>
#include <vector>

namespace bismar::benchmarks {

namespace {

/// The part of the demo job crank_lever.json.
Part demo_lever() {
  Part part;
  part.name = "crank lever 300";
  part.quantity = 10000.0;
  part.body.length = 0.3;
  part.body.shapes = {ellipse({.height_to_width = 1.25, .height_min = 8e-3, .height_max = 60e-3})};
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.body.load_cases[0].factors = {{"yield", 1.5}};
  part.body.load_cases[0].hand_loaded = true;
  part.limits.deflection = 12e-3;
  part.limits.mass = 0.5;
  part.limits.cost = 6.0;
  part.limits.routes = {"hot-forging"};
  return part;
}

/// Loads from 600 N to 710 N, another one each time.
double load_of(std::size_t n) { return 600.0 + static_cast<double>(n % 12) * 10.0; }

void set_load(Part& part, std::size_t n) { part.body.load_cases[0].loads[0].value = load_of(n); }

void report(benchmark::State& state, const Result& result) {
  std::vector<double> costs;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    costs.push_back(result.designs[i].cost);
  }
  state.counters["n"] = static_cast<double>(result.funnel.considered);
  state.counters["size"] = static_cast<double>(result.front_count);
  state.counters["checksum"] = checksum(costs);
}

void study_change(benchmark::State& state, Part (*make)()) {
  Study study(make(), {std::shared_ptr<const Catalogue>(), &starter()});
  study.solve();
  std::size_t n = 0;
  for (auto _ : state) {
    study.change([&](Part& part) { set_load(part, n); });
    benchmark::DoNotOptimize(&study.solve());
    ++n;
  }
  study.change([](Part& part) { set_load(part, 0); });
  report(state, study.solve());
}

void fresh_front(benchmark::State& state, Part (*make)()) {
  Part part = make();
  Result result;
  std::size_t n = 0;
  for (auto _ : state) {
    set_load(part, n);
    result = front(part, starter());
    benchmark::DoNotOptimize(&result);
    ++n;
  }
  set_load(part, 0);
  report(state, front(part, starter()));
}

BENCHMARK_CAPTURE(study_change, demo, demo_lever)
    ->Name("study/change_load_demo")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(fresh_front, demo, demo_lever)
    ->Name("study/fresh_front_demo")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(study_change, six_shapes, wide_lever)
    ->Name("study/change_load_six_shapes")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(fresh_front, six_shapes, wide_lever)
    ->Name("study/fresh_front_six_shapes")
    ->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace bismar::benchmarks
