// SPDX-License-Identifier: MIT
#include "exchange/slope_order.hpp"

#include <cmath>
#include <cstdint>
#include <random>

#include "support/catch.hpp"

namespace {

__extension__ using Wide = __int128;

bismar::detail::TradePoint point(std::int64_t priced, std::int64_t cost) {
  return {static_cast<double>(priced), static_cast<double>(cost)};
}

}  // namespace

TEST_CASE("three points on, below and above a line are told apart by one unit in the last place") {
  using bismar::detail::compare_exchange;
  CHECK(compare_exchange({3.0, 0.0}, {2.0, 1.0}, {1.0, 2.0}) == 0);
  const double above = std::nextafter(1.0, 2.0);
  const double below = std::nextafter(1.0, 0.0);
  CHECK(compare_exchange({3.0, 0.0}, {2.0, above}, {1.0, 2.0}) == 1);
  CHECK(compare_exchange({3.0, 0.0}, {2.0, below}, {1.0, 2.0}) == -1);
  CHECK(compare_exchange({3.0, 0.0}, {std::nextafter(2.0, 3.0), 1.0}, {1.0, 2.0}) == 1);
  // Differences that do not fit in a double: 2^60 + 1 and the like.
  const double big = 0x1p60;
  CHECK(compare_exchange({big, -1.0}, {0.0, big - 256.0}, {-big, 2 * big}) == -1);
  CHECK(compare_exchange({big, -big}, {0.0, 1.0}, {-big, big}) == 1);
  CHECK(compare_exchange({big, -big}, {0.0, -1.0}, {-big, big}) == -1);
  CHECK(compare_exchange({big, -big}, {0.0, 0.0}, {-big, big}) == 0);
}

TEST_CASE("the comparison agrees with integer arithmetic and does not depend on the units") {
  std::mt19937_64 random(301);
  int ties = 0;
  for (int trial = 0; trial < 200'000; ++trial) {
    const std::int64_t size = std::int64_t{1} << (2 + random() % 50);
    const auto draw = [&] {
      return static_cast<std::int64_t>(random() % static_cast<std::uint64_t>(size)) + 1;
    };
    // Steps from w to v and from v to u; every second time nearly in proportion.
    const std::int64_t priced_vw = draw();
    const std::int64_t cost_vw = draw();
    const std::int64_t factor = 1 + static_cast<std::int64_t>(random() % 3);
    const bool is_near = trial % 2 == 0;
    const std::int64_t priced_uv = is_near ? factor * priced_vw : draw();
    const std::int64_t nudge = static_cast<std::int64_t>(random() % 3) - 1;
    const std::int64_t cost_uv = is_near ? factor * cost_vw + nudge : draw();
    if (cost_uv <= 0) {
      continue;
    }
    const Wide left = static_cast<Wide>(cost_uv) * priced_vw;
    const Wide right = static_cast<Wide>(cost_vw) * priced_uv;
    const int expected = left < right ? -1 : (left > right ? 1 : 0);
    ties += expected == 0 ? 1 : 0;

    // All coordinates stay below 2^53 + 2^53, and even ones are exact up to 2^54.
    const auto u = point(priced_uv, -cost_uv);
    const auto v = point(0, 0);
    const auto w = point(-priced_vw, cost_vw);
    REQUIRE(bismar::detail::compare_exchange(u, v, w) == expected);
    for (const int shift : {-400, 300}) {
      const auto scaled = [shift](const bismar::detail::TradePoint& p) {
        return bismar::detail::TradePoint{std::ldexp(p.priced, shift), std::ldexp(p.cost, -shift)};
      };
      REQUIRE(bismar::detail::compare_exchange(scaled(u), scaled(v), scaled(w)) == expected);
    }
  }
  CHECK(ties > 10'000);
}

TEST_CASE("differences that do not fit in a double are compared exactly") {
  std::mt19937_64 random(302);
  int ties = 0;
  for (int trial = 0; trial < 100'000; ++trial) {
    // v = middle of u and w, or one unit beside it, with u and w of very different magnitude: the
    // differences need up to 90 bits.
    const auto large = static_cast<std::int64_t>(random() % (1ULL << 52U)) * 2;
    const auto small = static_cast<std::int64_t>(random() % (1ULL << 20U)) * 2;
    const double scale = std::ldexp(1.0, static_cast<int>(random() % 36));
    const double u_priced = scale * static_cast<double>(large + 4);
    const double w_priced = -scale * static_cast<double>(large);
    const double v_priced = scale * 2.0;
    const double u_cost = -static_cast<double>(small);
    const double w_cost = static_cast<double>(small + 2);
    const int nudge = static_cast<int>(random() % 3) - 1;
    const double v_cost = 1.0 + std::ldexp(nudge, -40);
    ties += nudge == 0 ? 1 : 0;
    if (large == 0) {
      continue;
    }
    REQUIRE(bismar::detail::compare_exchange(
                {u_priced, u_cost}, {v_priced, v_cost}, {w_priced, w_cost}) == nudge);
  }
  CHECK(ties > 10'000);
}
