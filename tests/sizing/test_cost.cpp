// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/cost.hpp>

#include <cmath>

using namespace bismar;

TEST_CASE("the resource cost model gives the four-term values over four decades of quantity") {
  // Checks COST-001, 002, 004, 005. Formula: Esawi and Ashby, Materials and Design 24 (2003)
  // 605-616, from memory; inputs constructed, recomputed independently; no published worked number
  // was found.
  ResourceCost cost{.mass = 0.5,
                    .material_price = 3.0,
                    .scrap = 0.1,
                    .tooling = 20000.0,
                    .quantity = 10.0,
                    .tool_life = 1e5,
                    .rate = 60.0,
                    .capital = 250000.0,
                    .load_factor = 0.5,
                    .write_off = 43800.0,
                    .overhead = 60.0};
  const auto [quantity, tool, part] = GENERATE(table<double, double, double>({
      {10.0, 2000.0, 2002.85693},
      {100.0, 200.0, 202.85693},
      {1e4, 2.0, 4.85693},
      {1e5, 0.2, 3.05693},
  }));
  cost.quantity = quantity;
  CHECK(cost.material_term() == Approx(1.66666667).epsilon(1e-8));
  CHECK(cost.tooling_term() == Approx(tool).epsilon(1e-12));
  CHECK(cost.time_term() == Approx(1.19025875).epsilon(1e-8));
  CHECK(cost.total() == Approx(part).epsilon(1e-5));
}

TEST_CASE("tool sets are counted whole") {
  ResourceCost cost{.tooling = 1000.0, .quantity = 2001.0, .tool_life = 1000.0};
  CHECK(cost.tooling_term() == Approx(3000.0 / 2001.0));
  cost.quantity = 2000.0;
  CHECK(cost.tooling_term() == Approx(1.0));
}

TEST_CASE("a cost with impossible inputs names every one of them") {
  const ResourceCost cost{.mass = -1.0, .scrap = 1.0, .quantity = 0.0, .rate = 0.0};
  try {
    static_cast<void>(cost.total());
    FAIL("no error");
  } catch (const Error& error) {
    CHECK(error.faults().size() == 4);
  }
}

TEST_CASE("break-even quantities agree with worked examples") {
  // Check COST-007: operations management lecture, break-even analysis; seen in print, recomputed.
  CHECK(*break_even_quantity(0.0, 200.0, 80000.0, 75.0) == Approx(640.0).epsilon(1e-9));
  CHECK(*break_even_quantity(80000.0, 75.0, 200000.0, 15.0) == Approx(2000.0).epsilon(1e-9));
  // Check COST-008: machine tooling assignment; seen in print, recomputed. Set-up per batch of 500.
  CHECK(*break_even_quantity(600.0, 3.4 + 100.0 / 500.0, 7500.0, 0.8 + 60.0 / 500.0) ==
        Approx(2574.63).epsilon(1e-5));
  CHECK_FALSE(break_even_quantity(0.0, 1.0, 10.0, 2.0).has_value());
  CHECK_FALSE(break_even_quantity(0.0, 1.0, 10.0, 1.0).has_value());
}

TEST_CASE("pieces out of a bar agree with the published count") {
  // Checks MFC-008 and MFC-010: n = floor((L + k) / (l + k)), geometry, recomputed independently.
  CHECK(pieces_per_bar(6000.0, 240.0, 3.0) == 24);
  CHECK(pieces_per_bar(6000.0, 1500.0, 0.0) == 4);
  CHECK(pieces_per_bar(6.0, 1.5, 0.0) == 4);
  CHECK(pieces_per_bar(6.0, 0.3, 0.0) == 20);  // 6 / 0.3 is 20 but for rounding
  CHECK(pieces_per_bar(1.0, 2.0, 0.003) == 0);
}

TEST_CASE("a batch with a set-up cost agrees with the lecture example") {
  // Check COST-010: production planning lecture notes; seen in print, recomputed: set-up 200, 15
  // minutes at 10 an hour, 20 of material, 200 parts: 23.5 a part.
  Route route;
  route.setup_cost = 200.0;
  route.rate = {4.0 / 3600.0, 4.0 / 3600.0};
  route.overhead = 10.0 / 3600.0;
  const auto cost = process_cost(route, 1.0, 1.0, 200.0, 200.0, RangeEnd::geometric_mid);
  CHECK(20.0 + cost.total() == Approx(23.5).epsilon(1e-12));
}

TEST_CASE("process cost rises with the mass and stays inside the range of the row") {
  for (const auto& route : test::starter().routes) {
    double before = 0.0;
    const auto cheap =
        process_cost(route, 1.0, 0.5, 1000.0, 100.0, RangeEnd::geometric_mid, CostEnd::cheap);
    const auto dear =
        process_cost(route, 1.0, 0.5, 1000.0, 100.0, RangeEnd::geometric_mid, CostEnd::dear);
    INFO(route.id);
    CHECK(cheap.total() <= dear.total());
    for (double mass = 0.001; mass < 1000.0; mass *= 1.3) {
      const auto cost = process_cost(route, mass, 0.5, 1000.0, 100.0, RangeEnd::geometric_mid);
      CHECK(cost.total() >= before * (1.0 - 1e-12));
      CHECK(cost.tooling_each >= route.tooling_cost.low);
      CHECK(cost.tooling_each <= route.tooling_cost.high);
      before = cost.total();
    }
  }
}

TEST_CASE("a treatment costs at least the minimum charge of its batch") {
  Route route;
  route.kind = RouteKind::treatment;
  route.rate_basis = RateBasis::kilogram;
  route.rate = {100.0 / 3600.0, 100.0 / 3600.0};
  route.overhead = 50.0 / 3600.0;
  route.setup_cost = 100.0;
  // Ten parts of a kilogram: time is worth 5, the charge 100.
  CHECK(process_cost(route, 1.0, 1.0, 10.0, 10.0, RangeEnd::mid).total() == Approx(10.0));
  // A thousand parts: time is worth 500 and the charge is covered.
  CHECK(process_cost(route, 1.0, 1.0, 1000.0, 1000.0, RangeEnd::mid).total() == Approx(0.5));
}

TEST_CASE(
    "steel sheet and shaped parts of half a kilogram keep the order of costs known in the trade") {
  // Common practice, no source: one by one a part is machined; forging pays from hundreds to
  // thousands; the most expensive tools only in long runs.
  const auto& catalogue = test::starter();
  const auto cost = [&](const char* id, double quantity) {
    const auto& route = *catalogue.find_route(id);
    return 0.5 * 1.2 / (1.0 - route.scrap) +
           process_cost(route, 0.5, 0.3, quantity, quantity, RangeEnd::geometric_mid).total();
  };
  CHECK(cost("machining-from-bar", 10.0) < cost("hot-forging", 10.0));
  CHECK(cost("hot-forging", 10000.0) < cost("machining-from-bar", 10000.0));
  CHECK(cost("hot-forging", 1000.0) < cost("press-forming", 1000.0));
  CHECK(cost("press-forming", 1e6) < cost("hot-forging", 1e6));
}
