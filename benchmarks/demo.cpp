// SPDX-License-Identifier: MIT
// The demo jobs as a user runs them.
#include <benchmark/benchmark.h>

#include <bismar/job/job.hpp>
#include <bismar/sizing/front.hpp>

#include "inputs.hpp"

#include <string>
#include <vector>

namespace bismar::benchmarks {

namespace {

void report(benchmark::State& state, const Result& result) {
  std::vector<double> costs;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    costs.push_back(result.designs[i].cost);
  }
  state.counters["n"] = static_cast<double>(result.funnel.considered);
  state.counters["size"] = static_cast<double>(result.front_count);
  state.counters["checksum"] = checksum(costs);
}

std::string path_of(const char* name) {
  return std::string(BISMAR_BENCHMARK_DATA) + "/jobs/" + name + ".json";
}

void demo_front(benchmark::State& state, const char* name) {
  const auto job = load_job(path_of(name));
  Result result;
  for (auto _ : state) {
    result = front(job.parts.front(), job.catalogue, job.settings);
    benchmark::DoNotOptimize(&result);
  }
  report(state, result);
}

void demo_from_file(benchmark::State& state, const char* name) {
  Result result;
  for (auto _ : state) {
    const auto job = load_job(path_of(name));
    result = front(job.parts.front(), job.catalogue, job.settings);
    benchmark::DoNotOptimize(&result);
  }
  report(state, result);
}

BENCHMARK_CAPTURE(demo_front, lever, "crank_lever")
    ->Name("demo/crank_lever_front")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(demo_front, stem, "gate_stem")
    ->Name("demo/gate_stem_front")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(demo_from_file, lever, "crank_lever")
    ->Name("demo/crank_lever_file_to_front")
    ->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace bismar::benchmarks
