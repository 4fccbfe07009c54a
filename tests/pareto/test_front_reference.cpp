// SPDX-License-Identifier: MIT
//
// pagmo2's two-objective front as a second opinion, on distinct points. How verified: computed by
// the library at each run of this test.
#include <bismar/pareto/front.hpp>

#include <pagmo/utils/multi_objective.hpp>

#include <algorithm>
#include <cstddef>
#include <cstdint>
#include <random>
#include <set>
#include <vector>

#include "support/catch.hpp"

TEST_CASE("the front of distinct points equals pagmo2's") {
  std::mt19937_64 random(104);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int trial = 0; trial < 200; ++trial) {
    const std::size_t n = 2 + random() % 300;
    std::set<std::vector<double>> distinct;
    while (distinct.size() < n) {
      // Grids give points that share one objective; the others are continuous.
      const double scale = trial % 2 == 0 ? 40.0 : 1e9;
      distinct.insert({static_cast<double>(static_cast<int>(scale * unit(random))),
                       static_cast<double>(static_cast<int>(scale * unit(random)))});
    }
    std::vector<std::vector<double>> points(distinct.begin(), distinct.end());
    std::shuffle(points.begin(), points.end(), random);
    std::vector<double> table;
    for (const std::vector<double>& point : points) {
      table.insert(table.end(), point.begin(), point.end());
    }

    std::vector<std::uint32_t> ours = bismar::front_2d(table);
    std::sort(ours.begin(), ours.end());
    const auto theirs = pagmo::non_dominated_front_2d(points);
    std::vector<std::uint32_t> sorted_theirs(theirs.begin(), theirs.end());
    std::sort(sorted_theirs.begin(), sorted_theirs.end());
    REQUIRE(ours == sorted_theirs);
  }
}
