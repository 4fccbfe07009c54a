// SPDX-License-Identifier: MIT
#include "inputs.hpp"

#include <benchmark/benchmark.h>

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/mechanics/member.hpp>

#include <algorithm>
#include <map>
#include <random>

namespace bismar::benchmarks {

const Catalogue& starter() {
  static const Catalogue catalogue = read_catalogue(BISMAR_BENCHMARK_DATA);
  return catalogue;
}

Part wide_lever() {
  Part part;
  part.name = "crank lever 300";
  part.quantity = 2000.0;
  part.body.length = 0.3;
  const double heights[] = {8e-3, 80e-3};
  part.body.shapes = {
      round({.height_min = heights[0], .height_max = heights[1]}),
      square({.height_min = heights[0], .height_max = heights[1]}),
      rectangle({.height_to_width = 2.0, .height_min = heights[0], .height_max = heights[1]}),
      ellipse({.height_to_width = 1.25, .height_min = heights[0], .height_max = heights[1]}),
      round_tube({.wall_to_height = 0.1, .height_min = heights[0], .height_max = heights[1]}),
      rectangular_tube({.height_to_width = 1.5,
                        .wall_to_height = 0.08,
                        .height_min = heights[0],
                        .height_max = heights[1]})};
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.limits.deflection = 10e-3;
  return part;
}

Part wide_lever_with_stock() {
  Part part = wide_lever();
  part.body.stock = {"all"};
  return part;
}

namespace {

template <class Make>
const std::vector<double>& made_once(std::map<std::size_t, std::vector<double>>& kept,
                                     std::size_t n,
                                     Make&& make) {
  auto& points = kept[n];
  if (points.empty()) {
    points.reserve(2 * n);
    make(points);
  }
  return points;
}

}  // namespace

const std::vector<double>& random_points(std::size_t n) {
  static std::map<std::size_t, std::vector<double>> kept;
  return made_once(kept, n, [n](std::vector<double>& points) {
    std::mt19937_64 random(1);
    std::uniform_real_distribution<double> share(0.0, 1.0);
    for (std::size_t i = 0; i < 2 * n; ++i) {
      points.push_back(share(random));
    }
  });
}

const std::vector<double>& points_on_a_curve(std::size_t n) {
  static std::map<std::size_t, std::vector<double>> kept;
  return made_once(kept, n, [n](std::vector<double>& points) {
    std::vector<std::size_t> places(n);
    for (std::size_t i = 0; i < n; ++i) {
      places[i] = i;
    }
    std::mt19937_64 random(2);
    std::shuffle(places.begin(), places.end(), random);
    for (const auto place : places) {
      const double f = 1.0 + static_cast<double>(place) / static_cast<double>(n);
      points.insert(points.end(), {f, 1.0 / f});
    }
  });
}

double checksum(std::span<const double> values) {
  double sum = 0.0;
  for (std::size_t i = 0; i < values.size(); ++i) {
    sum += values[i] * static_cast<double>(i % 1000 + 1);
  }
  return sum;
}

}  // namespace bismar::benchmarks

BENCHMARK_MAIN();
