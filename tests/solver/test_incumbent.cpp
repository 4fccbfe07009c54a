// SPDX-License-Identifier: MIT
#include "support/catch.hpp"

#include <bismar/solver/certified_front.hpp>

#include <algorithm>
#include <cmath>
#include <random>
#include <thread>
#include <vector>

using namespace bismar;

namespace {

/// The words of `Incumbent::beats`, point by point.
bool any_beats(const std::vector<std::vector<double>>& points,
               const std::vector<double>& lower,
               double margin,
               const std::vector<double>& absolute) {
  return std::any_of(points.begin(), points.end(), [&](const auto& q) {
    for (std::size_t j = 0; j < q.size(); ++j) {
      const double a = absolute.empty() ? 0.0 : absolute[j];
      if (!(q[j] + std::max(margin * std::abs(q[j]), a) < lower[j])) {
        return false;
      }
    }
    return true;
  });
}

}  // namespace

TEST_CASE("an incumbent beats exactly what one of its points beats, for one to four objectives") {
  std::mt19937 random(11);
  // Few distinct values, so that ties and equal coordinates are common.
  std::uniform_int_distribution<int> value(-4, 12);
  std::size_t beaten = 0;
  std::size_t asked = 0;
  for (int round = 0; round < 400; ++round) {
    const auto k = static_cast<std::size_t>(1 + round % 4);
    const double margin = round % 3 == 0 ? 0.0 : 0.1;
    const auto absolute = round % 5 == 0 ? std::vector<double>(k, 0.5) : std::vector<double>{};
    Incumbent incumbent(k, margin, absolute);
    std::vector<std::vector<double>> points;
    for (int p = 0; p < 30; ++p) {
      std::vector<double> q(k);
      std::vector<double> lower(k);
      for (std::size_t j = 0; j < k; ++j) {
        q[j] = value(random);
        lower[j] = value(random);
      }
      const bool expected = any_beats(points, lower, margin, absolute);
      CHECK(incumbent.beats(lower) == expected);
      beaten += expected ? 1U : 0U;
      ++asked;
      incumbent.add(q);
      points.push_back(q);
    }
  }
  // Both answers occur often, so neither can be hard-wired.
  CHECK(beaten > asked / 10);
  CHECK(beaten < asked - asked / 10);
}

TEST_CASE("an incumbent without points beats nothing, not even infinity") {
  for (std::size_t k = 1; k <= 4; ++k) {
    const Incumbent incumbent(k, 0.1);
    CHECK_FALSE(incumbent.beats(std::vector<double>(k, INFINITY)));
  }
}

TEST_CASE("a point does not beat itself, however small the margin") {
  for (std::size_t k = 1; k <= 3; ++k) {
    Incumbent incumbent(k, 0.0);
    incumbent.add(std::vector<double>(k, 1.0));
    CHECK_FALSE(incumbent.beats(std::vector<double>(k, 1.0)));
    CHECK(incumbent.beats(std::vector<double>(k, std::nextafter(1.0, 2.0))));
  }
}

TEST_CASE("a lower bound that is unknown is never beaten") {
  Incumbent incumbent(2, 0.0);
  incumbent.add(std::vector<double>{1.0, 1.0});
  CHECK_FALSE(incumbent.beats(std::vector<double>{5.0, -INFINITY}));
}

TEST_CASE("points added from several threads are all there afterwards") {
  for (std::size_t k = 1; k <= 3; ++k) {
    Incumbent incumbent(k, 0.0);
    std::vector<std::vector<double>> points;
    std::mt19937 random(3);
    std::uniform_real_distribution<double> at(0.0, 1.0);
    for (int p = 0; p < 400; ++p) {
      std::vector<double> q(k);
      std::generate(q.begin(), q.end(), [&] { return at(random); });
      points.push_back(q);
    }
    {
      std::vector<std::jthread> threads;
      for (std::size_t t = 0; t < 4; ++t) {
        threads.emplace_back([&, t] {
          for (std::size_t p = t; p < points.size(); p += 4) {
            incumbent.add(points[p]);
            (void)incumbent.beats(points[p]);
          }
        });
      }
    }
    for (int draw = 0; draw < 500; ++draw) {
      std::vector<double> lower(k);
      std::generate(lower.begin(), lower.end(), [&] { return at(random); });
      CHECK(incumbent.beats(lower) == any_beats(points, lower, 0.0, {}));
    }
  }
}
