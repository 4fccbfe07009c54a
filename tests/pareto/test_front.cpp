// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/pareto/dominance.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <cstddef>
#include <cstdint>
#include <limits>
#include <numeric>
#include <random>
#include <span>
#include <string>
#include <tuple>
#include <vector>

#include "support/catch.hpp"

namespace {

using Indices = std::vector<std::uint32_t>;
using Table = std::vector<double>;

constexpr double infinity = std::numeric_limits<double>::infinity();

std::span<const double> row(const Table& table, std::size_t i) {
  return std::span(table).subspan(2 * i, 2);
}

/// Every pair of rows compared, inside groups; then put into the stated order.
Indices brute_force_front(const Table& table, const Indices& groups, std::uint32_t group) {
  Indices result;
  for (std::uint32_t i = 0; i < groups.size(); ++i) {
    bool is_dominated = groups[i] != group;
    for (std::uint32_t j = 0; j < groups.size(); ++j) {
      is_dominated =
          is_dominated || (groups[j] == group && bismar::dominates(row(table, j), row(table, i)));
    }
    if (!is_dominated) {
      result.push_back(i);
    }
  }
  std::sort(result.begin(), result.end(), [&](std::uint32_t a, std::uint32_t b) {
    return std::tuple(row(table, a)[0], row(table, a)[1], a) <
           std::tuple(row(table, b)[0], row(table, b)[1], b);
  });
  return result;
}

Indices brute_force_front(const Table& table) {
  return brute_force_front(table, Indices(table.size() / 2, 0U), 0U);
}

/// Tables of several kinds: coarse grids (many ties), infinities and zeros of both signs, one
/// falling line, continuous values.
Table random_table(std::mt19937_64& random, std::size_t n, int kind) {
  std::uniform_int_distribution<int> grid(0, kind == 0 ? 3 : 20);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  const double special[] = {-infinity, infinity, 0.0, -0.0, 1.0, -1.0};
  Table table;
  for (std::size_t i = 0; i < n; ++i) {
    if (kind <= 1) {
      table.insert(table.end(), {1.0 * grid(random), 1.0 * grid(random)});
    } else if (kind == 2) {
      table.insert(table.end(), {special[random() % 6], special[random() % 6]});
    } else if (kind == 3) {
      const double x = grid(random);
      table.insert(table.end(), {x, 20.0 - x});
    } else {
      table.insert(table.end(), {unit(random), unit(random)});
    }
  }
  return table;
}

}  // namespace

TEST_CASE("the front of a small table, by hand") {
  // Rows: 0 dominated by 2; 1, 2, 4 on the front; 3 equals 1; 5 worse than 4 in f2 only.
  const Table table = {3.0, 5.0, 1.0, 9.0, 3.0, 4.0, 1.0, 9.0, 7.0, 1.0, 7.0, 2.0};
  CHECK(bismar::front_2d(table) == Indices{1, 3, 2, 4});
}

TEST_CASE("no row has no front, one row is its own, equal rows are all kept") {
  CHECK(bismar::front_2d({}).empty());
  CHECK(bismar::front_2d(Table{4.0, 4.0}) == Indices{0});
  CHECK(bismar::front_2d(Table{4.0, 4.0, 4.0, 4.0, 4.0, 4.0}) == Indices{0, 1, 2});
  CHECK(bismar::front_2d(Table{4.0, 1.0, 4.0, 3.0, 4.0, 2.0}) == Indices{0});
  CHECK(bismar::front_2d(Table{2.0, 4.0, 1.0, 4.0, 3.0, 4.0}) == Indices{1});
}

TEST_CASE("zeros of either sign are equal and infinities are ordinary values") {
  CHECK(bismar::front_2d(Table{0.0, -0.0, -0.0, 0.0, 0.0, 0.0}) == Indices{0, 1, 2});
  CHECK(bismar::front_2d(Table{infinity, 1.0, 0.0, 2.0}) == Indices{1, 0});
  CHECK(bismar::front_2d(Table{infinity, infinity}) == Indices{0});
  CHECK(bismar::front_2d(Table{infinity, infinity, 5.0, 5.0}) == Indices{1});
  CHECK(bismar::front_2d(Table{0.0, infinity, -infinity, infinity}) == Indices{1});
}

TEST_CASE("the front equals the comparison of every pair, in the stated order") {
  std::mt19937_64 random(101);
  for (int trial = 0; trial < 500; ++trial) {
    const Table table = random_table(random, 1 + random() % 80, trial % 5);
    REQUIRE(bismar::front_2d(table) == brute_force_front(table));
  }
}

TEST_CASE("shuffling the rows leaves the set of points, doubling a row doubles it on the front") {
  std::mt19937_64 random(102);
  for (int trial = 0; trial < 100; ++trial) {
    const Table table = random_table(random, 50, trial % 5);
    std::vector<std::size_t> order(50);
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::shuffle(order.begin(), order.end(), random);
    Table shuffled;
    Table twice = table;
    for (const std::size_t i : order) {
      shuffled.insert(shuffled.end(), row(table, i).begin(), row(table, i).end());
    }
    twice.insert(twice.end(), table.begin(), table.end());

    const Indices front = bismar::front_2d(table);
    Indices back;
    for (const std::uint32_t i : bismar::front_2d(shuffled)) {
      back.push_back(static_cast<std::uint32_t>(order[i]));
    }
    CHECK(std::is_permutation(front.begin(), front.end(), back.begin(), back.end()));
    CHECK(bismar::front_2d(twice).size() == 2 * front.size());
  }
}

TEST_CASE("grouped fronts are the fronts of the groups, by ascending id") {
  std::mt19937_64 random(103);
  for (int trial = 0; trial < 200; ++trial) {
    const std::size_t n = 1 + random() % 100;
    const Table table = random_table(random, n, trial % 5);
    Indices groups(n);
    for (std::uint32_t& group : groups) {
      group = static_cast<std::uint32_t>(random() % 6) * 700'000'000U;
    }
    Indices distinct = groups;
    std::sort(distinct.begin(), distinct.end());
    distinct.erase(std::unique(distinct.begin(), distinct.end()), distinct.end());

    const bismar::GroupedFronts fronts = bismar::grouped_front_2d(table, groups);
    REQUIRE(fronts.groups == distinct);
    REQUIRE(fronts.starts.size() == distinct.size() + 1);
    CHECK(fronts.starts.front() == 0);
    CHECK(fronts.starts.back() == fronts.rows.size());
    for (std::size_t k = 0; k < distinct.size(); ++k) {
      const auto front = fronts.front(k);
      CHECK(Indices(front.begin(), front.end()) == brute_force_front(table, groups, distinct[k]));
    }
  }
}

TEST_CASE("grouped fronts of no row are empty, and one group is the plain front") {
  const bismar::GroupedFronts none = bismar::grouped_front_2d({}, {});
  CHECK(none.groups.empty());
  CHECK(none.starts == std::vector<std::size_t>{0});
  CHECK(none.rows.empty());

  const Table table = {3.0, 5.0, 1.0, 9.0, 3.0, 4.0};
  CHECK(bismar::grouped_front_2d(table, Indices{8, 8, 8}).rows == bismar::front_2d(table));
}

TEST_CASE("NaN is refused, each with its place, and lengths must fit") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  std::vector<std::string> places;
  try {
    (void)bismar::grouped_front_2d(Table{1.0, nan, 2.0, 2.0, nan, 3.0}, Indices{0, 1});
  } catch (const bismar::Error& error) {
    for (const bismar::Fault& fault : error.faults()) {
      places.push_back(fault.where);
    }
    CHECK(error.faults()[0].code == bismar::Code::not_finite);
    CHECK(error.faults()[2].code == bismar::Code::conflict);
  }
  CHECK(places == std::vector<std::string>{"objectives[0][1]", "objectives[2][0]", "group_ids"});
  CHECK_THROWS_AS(bismar::front_2d(Table{1.0, nan}), bismar::Error);
  CHECK_THROWS_AS(bismar::front_2d(Table{1.0, 2.0, 3.0}), bismar::Error);
}

TEST_CASE("a hundred thousand rows that are all on the front stay all, in order") {
  Table table;
  Indices expected;
  const std::uint32_t n = 100'000;
  for (std::uint32_t i = 0; i < n; ++i) {
    table.insert(table.end(), {static_cast<double>(n - i), static_cast<double>(i)});
    expected.push_back(n - 1 - i);
  }
  CHECK(bismar::front_2d(table) == expected);
}
