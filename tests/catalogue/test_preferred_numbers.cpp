// SPDX-License-Identifier: MIT
#include <bismar/catalogue/stock.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>
#include <string>
#include <vector>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/temporary_table.hpp"
#include "support/catch.hpp"

using bismar::Code;
using bismar::preferred_numbers;

namespace {

/// The least value of the series that is not below x [mm].
double next_up(const char* series, double millimetres) {
  const double x = millimetres * 1e-3;
  return preferred_numbers(series, x, 10.0 * x).front() * 1e3;
}

}  // namespace

TEST_CASE("the series are those of ISO 3 and ISO 497") {
  // Values listed in ISO 3 (the same in ISO 17 and ISO 497); seen in print, not 10^(i/n).
  CHECK(preferred_numbers("R5", 1.0, 9.99, 1.0) == std::vector{1.0, 1.6, 2.5, 4.0, 6.3});
  CHECK(preferred_numbers("R10", 1.0, 9.99, 1.0) ==
        std::vector{1.0, 1.25, 1.6, 2.0, 2.5, 3.15, 4.0, 5.0, 6.3, 8.0});
  CHECK(preferred_numbers("R40", 1.0, 9.99, 1.0) ==
        std::vector{1.0,  1.06, 1.12, 1.18, 1.25, 1.32, 1.4, 1.5,  1.6, 1.7,
                    1.8,  1.9,  2.0,  2.12, 2.24, 2.36, 2.5, 2.65, 2.8, 3.0,
                    3.15, 3.35, 3.55, 3.75, 4.0,  4.25, 4.5, 4.75, 5.0, 5.3,
                    5.6,  6.0,  6.3,  6.7,  7.1,  7.5,  8.0, 8.5,  9.0, 9.5});
}

TEST_CASE("the series in the code are those of the table") {
  bismar::FaultList faults;
  const std::string path = std::string(BISMAR_TEST_DATA_DIR) + "/preferred_numbers.csv";
  bismar::TableReader table(bismar::read_table_file(path), path, {}, faults);
  const auto series = table.text_column("series", bismar::Presence::required);
  const auto value =
      table.number_column("value", bismar::QuantityKind::ratio, bismar::Presence::required);
  table.finish_columns();
  std::map<std::string, std::vector<double>> listed;
  for (std::size_t row = 0; row < table.rows(); ++row) {
    listed[std::string(table.text(row, series))].push_back(table.required_value(row, value));
  }
  REQUIRE(faults.empty());
  CHECK(listed.size() == 7);  // R5 R10 R20 R40 R'10 R'20 R'40
  for (const auto& [name, values] : listed) {
    INFO(name);
    CHECK(preferred_numbers(name, 1.0, 9.999, 1.0) == values);
  }
}

TEST_CASE("next preferred sizes") {
  // Series from ISO 3; the steps up and down recomputed independently of this code.
  CHECK(next_up("R5", 11.3) == Approx(16).epsilon(1e-12));
  CHECK(next_up("R10", 11.3) == Approx(12.5).epsilon(1e-12));
  CHECK(next_up("R20", 11.3) == Approx(12.5).epsilon(1e-12));
  CHECK(next_up("R40", 11.3) == Approx(11.8).epsilon(1e-12));
  CHECK(next_up("R5", 0.82) == Approx(1.0).epsilon(1e-12));
  CHECK(next_up("R10", 0.82) == Approx(1.0).epsilon(1e-12));
  CHECK(next_up("R20", 0.82) == Approx(0.9).epsilon(1e-12));
  CHECK(next_up("R40", 0.82) == Approx(0.85).epsilon(1e-12));
  CHECK(next_up("R5", 253) == Approx(400).epsilon(1e-12));
  CHECK(next_up("R10", 253) == Approx(315).epsilon(1e-12));
  CHECK(next_up("R20", 253) == Approx(280).epsilon(1e-12));
  CHECK(next_up("R40", 253) == Approx(265).epsilon(1e-12));
  CHECK(preferred_numbers("R10", 0.1e-3, 11.3e-3).back() == 10e-3);
  CHECK(preferred_numbers("R10", 0.1e-3, 0.82e-3).back() == 0.8e-3);
  CHECK(preferred_numbers("R10", 100e-3, 253e-3).back() == 250e-3);
}

TEST_CASE("exact members map to themselves and both ends belong to the range") {
  CHECK(preferred_numbers("R10", 0.063, 0.063) == std::vector{0.063});
  CHECK(preferred_numbers("R5", 0.010, 0.063) == std::vector{0.010, 0.016, 0.025, 0.040, 0.063});
  // Every millimetre size is the double nearest to its decimal text.
  for (const double size : preferred_numbers("R40", 1e-4, 10.0)) {
    const double in_micrometres = std::round(size * 1e6 * 100.0) / 100.0;
    CHECK(size == in_micrometres / 1e6);
  }
}

TEST_CASE("preferred multiples of an inch") {
  CHECK(preferred_numbers("R5", 0.0254, 0.0635, 0.0254) ==
        std::vector{1.0 * 0.0254, 1.6 * 0.0254, 2.5 * 0.0254});
}

TEST_CASE("sizes ascend strictly over many decades") {
  const std::vector<double> sizes = preferred_numbers("R'40", 1e-6, 1e3);
  CHECK(sizes.size() == 9 * 40 + 1);
  CHECK(std::adjacent_find(sizes.begin(), sizes.end(), std::greater_equal<>()) == sizes.end());
}

TEST_CASE("preferred numbers refuse what they cannot answer") {
  const auto faults = [](const char* series, double from, double to, double unit = 1e-3) {
    return test::faults_of([&] { return preferred_numbers(series, from, to, unit); });
  };
  CHECK(
      test::has_fault(faults("R 10", 1, 2), Code::unknown_name, "series", "Did you mean \"R10\"?"));
  CHECK(test::has_fault(faults("R10", 0, 2), Code::out_of_range, "from", "above 0"));
  CHECK(test::has_fault(faults("R10", 1, 1e201), Code::out_of_range, "to", "1e200"));
  CHECK(test::has_fault(faults("R10", 1, 2, -1), Code::out_of_range, "unit", "above 0"));
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(test::has_fault(faults("R10", nan, 2), Code::not_finite, "from", "finite"));
  CHECK(test::has_fault(faults("R10", 2, 1), Code::conflict, "from", "swap"));
  CHECK(test::has_fault(faults("R5", 11e-3, 15e-3), Code::empty, "from", "widen"));
  CHECK(test::has_fault(faults("R40", 1e-200, 1e200), Code::out_of_range, "to", "10,000"));
  CHECK(faults("R11", -1, nan, 0).size() == 4);  // all at once
}
