// SPDX-License-Identifier: MIT
// The two-objective front of pagmo2 on the same points. Its time grows with the square of the
// front, so that it is asked for small tables only.
#include "inputs.hpp"

#include <pagmo/utils/multi_objective.hpp>

#include <benchmark/benchmark.h>

#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <vector>

namespace bismar::benchmarks {

namespace {

using Points = const std::vector<double>& (*)(std::size_t);

void peer(benchmark::State& state, Points make) {
  const auto n = static_cast<std::size_t>(state.range(0));
  const auto& points = make(n);
  std::vector<std::vector<double>> rows;
  for (std::size_t i = 0; i < n; ++i) {
    rows.push_back({points[2 * i], points[2 * i + 1]});
  }
  std::vector<pagmo::pop_size_t> front;
  for (auto _ : state) {
    front = pagmo::non_dominated_front_2d(rows);
    benchmark::DoNotOptimize(front.data());
  }
  const auto ours = front_2d(points);
  if (!std::equal(front.begin(), front.end(), ours.begin(), ours.end())) {
    state.SkipWithError("the peer gives another front");
  }
  const std::vector<double> values(front.begin(), front.end());
  state.counters["n"] = static_cast<double>(n);
  state.counters["size"] = static_cast<double>(front.size());
  state.counters["checksum"] = checksum(values);
  state.SetItemsProcessed(state.iterations() * state.range(0));
}

BENCHMARK_CAPTURE(peer, random, random_points)
    ->Name("pagmo2_front_2d/random")
    ->Arg(10'000)
    ->Arg(100'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(peer, all_on_front, points_on_a_curve)
    ->Name("pagmo2_front_2d/all_on_front")
    ->Arg(10'000)
    ->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace bismar::benchmarks
