// SPDX-License-Identifier: MIT
// The comparison of demands and capacities beside the plain loop, on every path of the processor.
#include <bismar/error.hpp>
#include <bismar/solver/separable.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <limits>
#include <optional>
#include <random>
#include <span>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

struct Tables {
  DemandTable demands;
  std::vector<double> capacities;
  std::size_t materials;
};

/// Numbers of few values, so that most comparisons are of near neighbours or of equals; now and
/// then the next double above or below, 0 or infinity.
Tables random_tables(std::mt19937_64& random,
                     std::size_t conditions,
                     std::size_t sizes,
                     std::size_t materials) {
  const auto number = [&random](bool demand) {
    const auto kind = random() % 40;
    const double value = 0.25 * static_cast<double>(random() % 12 + (demand ? 0 : 4));
    return kind == 0   ? infinity
           : kind == 1 ? std::nextafter(value, infinity)
           : kind == 2 ? std::nextafter(value, 0.0)
           : kind == 3 ? 0.0
                       : value;
  };
  Tables out{DemandTable(conditions, sizes), {}, materials};
  for (std::size_t k = 0; k < conditions; ++k) {
    for (std::size_t s = 0; s < sizes; ++s) {
      out.demands.set(k, s, number(true));
    }
  }
  for (std::size_t i = 0; i < materials * conditions; ++i) {
    out.capacities.push_back(number(false));
  }
  return out;
}

bool exceeds(const Tables& tables, std::size_t material, std::size_t size) {
  for (std::size_t k = 0; k < tables.demands.conditions(); ++k) {
    if (tables.demands.demand(k, size) >
        tables.capacities[material * tables.demands.conditions() + k]) {
      return true;
    }
  }
  return false;
}

std::vector<Tables> many_tables() {
  std::mt19937_64 random(5101);
  std::vector<Tables> out;
  for (const std::size_t sizes : {0U, 1U, 5U, 63U, 64U, 65U, 127U, 128U, 129U, 200U}) {
    for (const std::size_t conditions : {1U, 2U, 3U, 7U, 16U}) {
      for (const std::size_t materials : {0U, 1U, 2U, 63U, 65U, 130U}) {
        out.push_back(random_tables(random, conditions, sizes, materials));
      }
    }
  }
  return out;
}

}  // namespace

TEST_CASE("Marked sizes are those of the plain loop on every path, ties included") {
  std::size_t ties = 0;
  std::size_t marked = 0;
  for (const Tables& tables : many_tables()) {
    const std::size_t blocks = tables.demands.blocks();
    for (const SimdPath path : simd_paths()) {
      // What stood there before must not matter.
      std::vector<std::uint64_t> words(tables.materials * blocks, 0xAAAAAAAAAAAAAAAAU);
      mark_exceeding(tables.demands, tables.capacities, words, path);
      std::vector<std::uint64_t> wanted(words.size(), 0);
      for (std::size_t m = 0; m < tables.materials; ++m) {
        for (std::size_t s = 0; s < tables.demands.sizes(); ++s) {
          if (exceeds(tables, m, s)) {
            wanted[m * blocks + s / 64] |= std::uint64_t{1} << (s % 64);
            ++marked;
          }
          for (std::size_t k = 0; k < tables.demands.conditions(); ++k) {
            ties += tables.demands.demand(k, s) ==
                            tables.capacities[m * tables.demands.conditions() + k]
                        ? 1U
                        : 0U;
          }
        }
        for (std::size_t b = 0; b < blocks; ++b) {
          REQUIRE(exceeding_in_block(
                      tables.demands,
                      b,
                      std::span(tables.capacities)
                          .subspan(m * tables.demands.conditions(), tables.demands.conditions())) ==
                  wanted[m * blocks + b]);
        }
      }
      REQUIRE(words == wanted);
    }
  }
  CHECK(ties > 10000);
  CHECK(marked > 10000);
}

TEST_CASE("The first size within its capacities is that of the plain loop on every path") {
  std::size_t found = 0;
  std::size_t none = 0;
  for (const Tables& tables : many_tables()) {
    for (const SimdPath path : simd_paths()) {
      std::vector<std::optional<std::size_t>> first(tables.materials, 999);
      first_within(tables.demands, tables.capacities, first, path);
      for (std::size_t m = 0; m < tables.materials; ++m) {
        std::optional<std::size_t> wanted;
        for (std::size_t s = 0; s < tables.demands.sizes() && !wanted; ++s) {
          if (!exceeds(tables, m, s)) {
            wanted = s;
          }
        }
        REQUIRE(first[m] == wanted);
        ++(wanted ? found : none);
      }
    }
  }
  CHECK(found > 1000);
  CHECK(none > 1000);
}

TEST_CASE("Without conditions nothing exceeds") {
  const DemandTable table(0, 70);
  std::vector<std::uint64_t> words(2, 1);
  mark_exceeding(table, {}, words);
  CHECK(words == std::vector<std::uint64_t>{0, 0});
  std::vector<std::optional<std::size_t>> first(3);
  first_within(table, {}, first);
  CHECK(first[2] == 0U);
}

TEST_CASE("Demands and capacities that do not belong together are faults") {
  const auto where = [](auto&& call) -> std::pair<Code, std::string> {
    try {
      call();
    } catch (const Error& error) {
      return {error.faults().front().code, error.faults().front().where};
    }
    return {};
  };
  using Found = std::pair<Code, std::string>;
  DemandTable table(2, 3);
  CHECK(where([&] { table.set(2, 0, 1.0); }) == Found{Code::out_of_range, "condition"});
  CHECK(where([&] { table.set(0, 3, 1.0); }) == Found{Code::out_of_range, "size"});
  CHECK(where([&] { table.set(0, 0, std::nan("")); }) == Found{Code::not_finite, "demand"});
  std::vector<std::uint64_t> words(1);
  std::vector<double> capacities = {1.0, 2.0};
  mark_exceeding(table, capacities, words);
  CHECK(where([&] {
          mark_exceeding(table, std::vector{1.0, 2.0, 3.0}, words);
        }) == Found{Code::invalid_argument, "capacities"});
  CHECK(where([&] {
          mark_exceeding(table, std::vector{1.0, 2.0, 3.0, 4.0}, words);
        }) == Found{Code::invalid_argument, "exceeding"});
  CHECK(where([&] {
          mark_exceeding(table, std::vector{1.0, std::nan("")}, words);
        }) == Found{Code::not_finite, "capacities"});
  std::vector<std::optional<std::size_t>> first(2);
  CHECK(where([&] { first_within(table, capacities, first); }) ==
        Found{Code::invalid_argument, "first"});
  for (const SimdPath path : {SimdPath::avx2, SimdPath::avx512}) {
    const auto paths = simd_paths();
    if (std::find(paths.begin(), paths.end(), path) == paths.end()) {
      CHECK(where([&] { mark_exceeding(table, capacities, words, path); }) ==
            Found{Code::unsupported, "path"});
    }
  }
}

}  // namespace bismar
