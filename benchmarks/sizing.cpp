// SPDX-License-Identifier: MIT
// Reading the starter tables; fronts of a lever over the whole of them.
#include "inputs.hpp"

#include <benchmark/benchmark.h>

#include <bismar/sizing/front.hpp>

#include <vector>

namespace bismar::benchmarks {

namespace {

void load_tables(benchmark::State& state) {
  Catalogue catalogue;
  for (auto _ : state) {
    // Letting go of the tables read before is no part of reading.
    state.PauseTiming();
    catalogue = {};
    state.ResumeTiming();
    catalogue = read_catalogue(BISMAR_BENCHMARK_DATA);
    benchmark::DoNotOptimize(&catalogue);
  }
  std::size_t items = 0;
  std::vector<double> areas;
  for (const auto& list : catalogue.stock) {
    items += list.items.size();
    for (const auto& item : list.items) {
      areas.push_back(item.section.area);
    }
  }
  state.counters["n"] = static_cast<double>(catalogue.materials.size());
  state.counters["size"] = static_cast<double>(items);
  state.counters["checksum"] = checksum(areas);
}

void lever_front(benchmark::State& state, Part (*make)()) {
  const auto& catalogue = starter();
  const auto part = make();
  Result result;
  for (auto _ : state) {
    result = front(part, catalogue);
    benchmark::DoNotOptimize(&result);
  }
  std::vector<double> costs;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    costs.push_back(result.designs[i].cost);
  }
  state.counters["n"] = static_cast<double>(result.funnel.considered);
  state.counters["size"] = static_cast<double>(result.front_count);
  state.counters["checksum"] = checksum(costs);
  state.counters["evaluations"] = static_cast<double>(result.telemetry.evaluations);
  state.counters["per_evaluation"] = benchmark::Counter(
      static_cast<double>(result.telemetry.evaluations),
      benchmark::Counter::kIsIterationInvariantRate | benchmark::Counter::kInvert);
}

void lever_ruler(benchmark::State& state) {
  const auto& catalogue = starter();
  const auto part = wide_lever();
  const auto result = front(part, catalogue);
  ExchangeRuler ruler;
  for (auto _ : state) {
    ruler = exchange_ruler(result, part, catalogue);
    benchmark::DoNotOptimize(&ruler);
  }
  std::vector<double> ends;
  for (const auto& stretch : ruler.stretches) {
    ends.push_back(stretch.penalty_from);
  }
  state.counters["n"] = static_cast<double>(result.designs.size() + result.others.size());
  state.counters["size"] = static_cast<double>(ruler.stretches.size());
  state.counters["checksum"] = checksum(ends);
}

BENCHMARK(load_tables)->Name("starter_tables/load")->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(lever_front, shapes, wide_lever)
    ->Name("front/lever_all_routes_six_shapes")
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(lever_front, stock, wide_lever_with_stock)
    ->Name("front/lever_all_routes_six_shapes_and_stock")
    ->Unit(benchmark::kMillisecond);
BENCHMARK(lever_ruler)->Name("ruler/lever_all_routes_six_shapes")->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace bismar::benchmarks
