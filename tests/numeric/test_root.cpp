// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <random>
#include <string>
#include <vector>

#include "support/catch.hpp"

namespace {

using Function = std::function<double(double)>;

constexpr double infinity = std::numeric_limits<double>::infinity();

/// The bound on evaluations that the header states.
int stated_bound(double lo, double hi, double relative_width) {
  const double width = std::max(relative_width, 0x1p-53);
  return 12 + static_cast<int>(std::ceil(std::log2(std::max(std::log(hi / lo) / width, 1.0))));
}

/// Everything promised about the answer of smallest_feasible, checked by calling g again.
void check_smallest(const Function& g,
                    double lo,
                    double hi,
                    const bismar::LimitBracket& found,
                    double relative_width = 1e-12) {
  REQUIRE(found.x.has_value());
  CHECK(g(*found.x) <= 1.0);
  CHECK(g(*found.x) == found.value);
  CHECK(*found.x >= lo);
  CHECK(*found.x <= hi);
  CHECK(found.evaluations <= stated_bound(lo, hi, relative_width));
  if (found.infeasible) {
    CHECK(g(*found.infeasible) > 1.0);
    CHECK(*found.infeasible < *found.x);
    const bool is_narrow = *found.x - *found.infeasible <= relative_width * *found.x;
    CHECK((is_narrow || std::nextafter(*found.infeasible, infinity) == *found.x));
  } else {
    CHECK(*found.x == lo);
  }
}

/// The places of the faults that a call throws; none when it does not throw.
std::vector<std::string> fault_places(const std::function<void()>& call) {
  std::vector<std::string> places;
  try {
    call();
  } catch (const bismar::Error& error) {
    for (const bismar::Fault& fault : error.faults()) {
      places.push_back(fault.where);
    }
  }
  return places;
}

}  // namespace

TEST_CASE("a power law is solved in a few evaluations, on the feasible side") {
  for (const double exponent : {-0.5, -1.0, -2.0, -3.0, -4.0, -12.0}) {
    for (const double root : {1.7e-3, 0.02, 0.999, 3.0, 250.0}) {
      const auto g = [=](double x) { return std::pow(x / root, exponent); };
      const auto found = bismar::smallest_feasible(g, 1e-6, 1e4);
      check_smallest(g, 1e-6, 1e4, found);
      CHECK(*found.x == Approx(root).epsilon(1e-11));
      CHECK(found.evaluations <= 5);
    }
  }
}

TEST_CASE("utilisations as they occur take at most 14 evaluations") {
  // The greatest of several power laws (what a part's limits look like), sums of them, an offset,
  // and a pole above the lower end.
  const std::vector<Function> functions = {
      [](double x) { return std::max(2e-6 / (x * x * x), 3e-9 / std::pow(x, 4)); },
      [](double x) { return 1e-4 / (x * x) + 2e-6 / (x * x * x); },
      [](double x) { return 0.4 + 1e-4 / (x * x); },
      [](double x) { return std::hypot(1e-6 / (x * x * x), 7e-5 / (x * x)); },
      [](double x) {
        return std::max({1e-3 / x, 1e-5 / (x * x), 1e-7 / (x * x * x)});
      },
      [](double x) { return 1e-3 / (x - 0.9e-4); },
  };
  for (const Function& g : functions) {
    const auto found = bismar::smallest_feasible(g, 1e-4, 1.0);
    check_smallest(g, 1e-4, 1.0, found);
    CHECK(found.evaluations <= 14);
  }
}

TEST_CASE("a strut on a buckling curve, which is no power law, takes at most 12 evaluations") {
  // A round bar on curve c; the curve's formula is from memory (EN 1993-1-1:2005, 6.3.1.2) and only
  // lends its shape here.
  const auto g = [](double d) {
    const double area = 0.785398 * d * d;
    const double slenderness = (1.2 / (0.25 * d)) / (3.14159 * std::sqrt(210e9 / 355e6));
    const double phi =
        0.5 * (1.0 + 0.49 * std::max(0.0, slenderness - 0.2) + slenderness * slenderness);
    const double root = std::sqrt(phi * phi - slenderness * slenderness);
    return 30e3 / (std::min(1.0, 1.0 / (phi + root)) * area * 355e6);
  };
  const auto found = bismar::smallest_feasible(g, 1e-3, 1.0);
  check_smallest(g, 1e-3, 1.0, found);
  CHECK(found.evaluations <= 12);
}

TEST_CASE("jumps are bracketed within the stated number of evaluations") {
  const double jump = 0.123456789;
  const std::vector<Function> functions = {
      [=](double x) { return x < jump ? 7.0 : 0.25; },
      [=](double x) { return x < jump ? infinity : 0.25; },
      [=](double x) { return x < jump ? infinity : 0.0; },
      [=](double x) { return x < jump ? std::nextafter(1.0, 2.0) : 1.0; },
      [=](double x) { return x < jump ? 2.0 : -3.0; },
      [=](double x) { return x < jump ? 1e300 : 1e-300; },
      [=](double x) { return x < jump ? jump / x * 3.0 : jump / x * 0.9; },
      [=](double x) { return x < jump ? 1.0 + 1e-9 * (jump - x) + 1e-15 : 0.5; },
  };
  for (const Function& g : functions) {
    for (const double width : {1e-3, 1e-12, 0.0}) {
      const auto found = bismar::smallest_feasible(g, 1e-3, 1e3, {.relative_width = width});
      check_smallest(g, 1e-3, 1e3, found, width);
      CHECK(*found.x >= jump);
      CHECK(*found.infeasible < jump);
      if (width == 0.0) {
        CHECK(*found.x == jump);
      }
    }
  }
}

TEST_CASE("where g is level at exactly 1 the least x of the level part is found") {
  const auto g = [](double x) { return x < 0.5 ? 0.5 / x : (x < 3.0 ? 1.0 : 3.0 / x); };
  const auto found = bismar::smallest_feasible(g, 1e-2, 1e2);
  check_smallest(g, 1e-2, 1e2, found);
  CHECK(*found.x == Approx(0.5).epsilon(2e-12));
}

TEST_CASE("infinities at the low end are passed over") {
  const auto g = [](double x) { return x <= 0.1 ? infinity : 0.02 / ((x - 0.1) * (x - 0.1)); };
  const auto found = bismar::smallest_feasible(g, 1e-6, 10.0);
  check_smallest(g, 1e-6, 10.0, found);
  CHECK(*found.x == Approx(0.1 + std::sqrt(0.02)).epsilon(1e-11));
}

TEST_CASE("the ends of the range are answers of their own") {
  const auto g = [](double x) { return 1.0 / x; };
  const auto all_feasible = bismar::smallest_feasible(g, 2.0, 8.0);
  CHECK(*all_feasible.x == 2.0);
  CHECK(all_feasible.value == 0.5);
  CHECK_FALSE(all_feasible.infeasible.has_value());
  CHECK(all_feasible.evaluations == 2);

  const auto none_feasible = bismar::smallest_feasible(g, 0.1, 0.5);
  CHECK_FALSE(none_feasible.x.has_value());
  CHECK(none_feasible.value == 2.0);
  CHECK_FALSE(none_feasible.infeasible.has_value());
  CHECK(none_feasible.evaluations == 1);

  const auto just_feasible = bismar::smallest_feasible(g, 0.5, 1.0);
  CHECK(*just_feasible.x == 1.0);
  CHECK(1.0 - *just_feasible.infeasible <= 1e-12);

  const auto one_size = bismar::smallest_feasible(g, 2.0, 2.0);
  CHECK(*one_size.x == 2.0);
  CHECK(one_size.evaluations == 1);

  const auto neighbours = bismar::smallest_feasible(g, std::nextafter(1.0, 0.0), 1.0);
  CHECK(*neighbours.x == 1.0);
  CHECK(*neighbours.infeasible == std::nextafter(1.0, 0.0));
}

TEST_CASE("the largest feasible x of a rising function mirrors the smallest of a falling one") {
  const auto cubic = [](double x) { return std::pow(x / 0.3, 3.0); };
  const auto found = bismar::largest_feasible(cubic, 1e-4, 1e4);
  REQUIRE(found.x.has_value());
  CHECK(cubic(*found.x) <= 1.0);
  CHECK(cubic(*found.infeasible) > 1.0);
  CHECK(*found.infeasible - *found.x <= 1e-12 * *found.infeasible);
  CHECK(*found.x == Approx(0.3).epsilon(1e-11));
  CHECK(found.evaluations <= 5);

  const auto step = [](double x) { return x > 42.0 ? infinity : 0.0; };
  const auto exact = bismar::largest_feasible(step, 1e-4, 1e4, {.relative_width = 0.0});
  CHECK(*exact.x == 42.0);
  CHECK(*exact.infeasible == std::nextafter(42.0, 43.0));
  CHECK(exact.evaluations <= stated_bound(1e-4, 1e4, 0.0));

  CHECK(*bismar::largest_feasible(cubic, 0.1, 0.2).x == 0.2);
  CHECK_FALSE(bismar::largest_feasible(cubic, 0.4, 0.5).x.has_value());
}

TEST_CASE("random monotone functions keep every promise, near 1 and far from it") {
  std::mt19937_64 random(20240611);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  int most = 0;
  for (int trial = 0; trial < 3000; ++trial) {
    const double lo =
        std::pow(10.0, (400.0 * unit(random) - 200.0) * (trial % 3 == 0 ? 1.0 : 0.02));
    const double hi = lo * std::pow(10.0, 1.0 + 5.0 * unit(random));
    struct Term {
      double root;
      double exponent;
    };
    std::vector<Term> terms;
    for (int i = 0; i < 1 + trial % 4; ++i) {
      terms.push_back({lo * std::pow(hi / lo, unit(random)), -0.3 - 6.0 * unit(random)});
    }
    const double jump_at = lo * std::pow(hi / lo, unit(random));
    const double jump = trial % 5 == 0 ? 1.0 + 3.0 * unit(random) : 1.0;
    const auto g = [&](double x) {
      double greatest = 0.0;
      for (const Term& term : terms) {
        greatest = std::max(greatest, std::pow(x / term.root, term.exponent));
      }
      return x < jump_at ? greatest * jump : greatest;
    };
    for (const double width : {1e-12, 0.0}) {
      const auto found = bismar::smallest_feasible(g, lo, hi, {.relative_width = width});
      check_smallest(g, lo, hi, found, width);
      if (jump == 1.0 && width > 0.0) {
        most = std::max(most, found.evaluations);
      }
    }
  }
  // The greatest of up to four power laws: kinks cost some steps, never a bisection.
  CHECK(most <= 24);
}

TEST_CASE("wrong arguments and functions without a value are refused") {
  using Places = std::vector<std::string>;
  const double nan = std::numeric_limits<double>::quiet_NaN();
  const auto g = [](double x) { return 1.0 / x; };
  const auto broken = [nan](double x) { return x < 0.5 ? nan : 0.5; };
  CHECK(fault_places([&] { (void)bismar::smallest_feasible(g, 0.0, 1.0); }) == Places{"lo"});
  CHECK(fault_places([&] { (void)bismar::smallest_feasible(g, 2.0, 1.0); }) == Places{"hi"});
  CHECK(fault_places([&] { (void)bismar::largest_feasible(g, 1.0, infinity); }) == Places{"hi"});
  CHECK(fault_places([&] {
          (void)bismar::smallest_feasible(g, nan, nan, {.relative_width = 1.0});
        }) == Places{"lo", "hi", "relative_width"});
  CHECK(fault_places([&] { (void)bismar::smallest_feasible(broken, 0.1, 1.0); }) == Places{"g"});
}
