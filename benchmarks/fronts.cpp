// SPDX-License-Identifier: MIT
// Fronts and rulers of plain numbers.
#include "inputs.hpp"

#include <benchmark/benchmark.h>

#include <bismar/exchange/ruler.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <cstdint>
#include <limits>
#include <numeric>
#include <vector>

namespace bismar::benchmarks {

namespace {

using Points = const std::vector<double>& (*)(std::size_t);

void report(benchmark::State& state, std::span<const std::uint32_t> front) {
  const auto n = state.range(0);
  state.counters["n"] = static_cast<double>(n);
  state.counters["size"] = static_cast<double>(front.size());
  const std::vector<double> rows(front.begin(), front.end());
  state.counters["checksum"] = checksum(rows);
  state.SetItemsProcessed(state.iterations() * n);
}

void our_front(benchmark::State& state, Points make) {
  const auto& points = make(static_cast<std::size_t>(state.range(0)));
  std::vector<std::uint32_t> front;
  for (auto _ : state) {
    front = front_2d(points);
    benchmark::DoNotOptimize(front.data());
  }
  report(state, front);
}

/// What one would write by hand: sort the indices, then scan.
std::vector<std::uint32_t> sort_and_scan(const std::vector<double>& points) {
  std::vector<std::uint32_t> order(points.size() / 2);
  std::iota(order.begin(), order.end(), 0U);
  std::sort(order.begin(), order.end(), [&](std::uint32_t a, std::uint32_t b) {
    const std::size_t i = 2 * std::size_t{a};
    const std::size_t j = 2 * std::size_t{b};
    if (points[i] != points[j]) {
      return points[i] < points[j];
    }
    return points[i + 1] != points[j + 1] ? points[i + 1] < points[j + 1] : a < b;
  });
  std::vector<std::uint32_t> front;
  double least = std::numeric_limits<double>::infinity();
  double at = 0.0;
  for (const auto row : order) {
    const double f1 = points[2 * std::size_t{row}];
    const double f2 = points[2 * std::size_t{row} + 1];
    if (f2 < least || (f2 == least && f1 == at)) {
      front.push_back(row);
      least = f2;
      at = f1;
    }
  }
  return front;
}

void by_hand(benchmark::State& state, Points make) {
  const auto& points = make(static_cast<std::size_t>(state.range(0)));
  std::vector<std::uint32_t> front;
  for (auto _ : state) {
    front = sort_and_scan(points);
    benchmark::DoNotOptimize(front.data());
  }
  if (front != front_2d(points)) {
    state.SkipWithError("sort and scan gives another front");
  }
  report(state, front);
}

void ruler(benchmark::State& state, Points make) {
  const auto n = static_cast<std::size_t>(state.range(0));
  const auto& points = make(n);
  std::vector<std::uint32_t> labels(n);
  for (std::size_t i = 0; i < n; ++i) {
    labels[i] = static_cast<std::uint32_t>(i % 500);
  }
  Ruler made;
  for (auto _ : state) {
    made = exchange_ruler(points, labels);
    benchmark::DoNotOptimize(made.stretches.data());
  }
  std::vector<double> ends;
  for (const auto& stretch : made.stretches) {
    ends.push_back(stretch.penalty_from);
  }
  state.counters["n"] = static_cast<double>(n);
  state.counters["size"] = static_cast<double>(made.stretches.size());
  state.counters["checksum"] = checksum(ends);
  state.SetItemsProcessed(state.iterations() * state.range(0));
}

BENCHMARK_CAPTURE(our_front, random, random_points)
    ->Name("front_2d/random")
    ->Arg(10'000)
    ->Arg(100'000)
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(by_hand, random, random_points)
    ->Name("sort_and_scan/random")
    ->Arg(10'000)
    ->Arg(100'000)
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(our_front, all_on_front, points_on_a_curve)
    ->Name("front_2d/all_on_front")
    ->Arg(10'000)
    ->Arg(100'000)
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(by_hand, all_on_front, points_on_a_curve)
    ->Name("sort_and_scan/all_on_front")
    ->Arg(10'000)
    ->Arg(100'000)
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(ruler, random, random_points)
    ->Name("exchange_ruler/random")
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);
BENCHMARK_CAPTURE(ruler, all_on_front, points_on_a_curve)
    ->Name("exchange_ruler/all_on_front")
    ->Arg(1'000'000)
    ->Unit(benchmark::kMillisecond);

}  // namespace

}  // namespace bismar::benchmarks
