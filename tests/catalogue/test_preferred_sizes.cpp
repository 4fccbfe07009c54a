// SPDX-License-Identifier: MIT
#include <bismar/catalogue/preferred_sizes.hpp>

#include <limits>

#include <bismar/catalogue/stock.hpp>
#include <bismar/error.hpp>

#include "catalogue/temporary_table.hpp"
#include "support/catch.hpp"

using bismar::Code;
using bismar::preferred_at_least;
using bismar::preferred_at_most;
using bismar::preferred_step;

TEST_CASE("preferred sizes go up and down to the neighbours in the series") {
  // ISO 3: ... 10, 12.5 ... of R10, 11.2, 12.5 of R20.
  CHECK(preferred_at_least("R10", 11.3e-3) == 12.5e-3);
  CHECK(preferred_at_most("R10", 11.3e-3) == 10e-3);
  CHECK(preferred_at_most("R20", 11.3e-3) == 11.2e-3);
  CHECK(preferred_at_least("R5", 0.65) == 1.0);
  CHECK(preferred_at_most("R5", 0.99e-3) == 0.63e-3);
  CHECK(preferred_at_least("R5", 0.0255, 0.0254) == 1.6 * 0.0254);
}

TEST_CASE("a preferred size stays what it is") {
  for (const char* series : {"R5", "R10", "R20", "R40", "R'10", "R'20", "R'40"}) {
    for (const double size : bismar::preferred_numbers(series, 1e-3, 1.0)) {
      INFO(series << " " << size);
      CHECK(preferred_at_least(series, size) == size);
      CHECK(preferred_at_most(series, size) == size);
    }
  }
}

TEST_CASE("the step of a series is its root of ten") {
  // ISO 3: 1.58, 1.26, 1.12 and 1.06, rounded.
  CHECK(preferred_step("R5") == Approx(1.58).epsilon(0.005));
  CHECK(preferred_step("R10") == Approx(1.26).epsilon(0.005));
  CHECK(preferred_step("R20") == Approx(1.12).epsilon(0.005));
  CHECK(preferred_step("R40") == Approx(1.06).epsilon(0.005));
}

TEST_CASE("preferred sizes name the argument that they refuse") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  const auto up = [](const char* series, double size, double unit = 1e-3) {
    return test::faults_of([&] { return preferred_at_least(series, size, unit); });
  };
  CHECK(test::has_fault(up("R11", 0.01), Code::unknown_name, "series", "R10"));
  CHECK(test::has_fault(up("R10", 0.0), Code::out_of_range, "size", "above 0"));
  CHECK(test::has_fault(up("R10", nan), Code::not_finite, "size", "finite"));
  CHECK(test::has_fault(up("R10", 0.01, 0.0), Code::out_of_range, "unit", "above 0"));
  CHECK(up("R10", nan, 0.0).size() == 2);
  const auto down = test::faults_of([] { return preferred_at_most("R10", -1.0); });
  CHECK(test::has_fault(down, Code::out_of_range, "size", "above 0"));
  CHECK(test::has_fault(
      test::faults_of([] { return preferred_step("R7"); }), Code::unknown_name, "series", "R5"));
}
