// SPDX-License-Identifier: MIT
#include <bismar/quantity/format.hpp>

#include "quantity/faults.hpp"

#include <limits>

using namespace bismar;
using quantity_test::fault_of;

TEST_CASE("A number is written in its shortest form") {
  CHECK(format_number(0.0) == "0");
  CHECK(format_number(-0.0) == "0");
  CHECK(format_number(0.1) == "0.1");
  CHECK(format_number(-2.5) == "-2.5");
  CHECK(format_number(100000.0) == "100000");
  CHECK(format_number(0.0001) == "0.0001");
  CHECK(format_number(0.00001) == "1e-5");
  CHECK(format_number(1.5e-7) == "1.5e-7");
  CHECK(format_number(9007199254740993.0) == "9007199254740992");
  CHECK(format_number(1e16) == "1e16");
  CHECK(format_number(1.7976931348623157e308) == "1.7976931348623157e308");
}

TEST_CASE("A number for a table keeps its integer part and its significant digits") {
  CHECK(format_significant(0.0123456) == "0.0123");
  CHECK(format_significant(1.0) == "1.00");
  CHECK(format_significant(197.3) == "197");
  CHECK(format_significant(16583.2) == "16583");
  CHECK(format_significant(9.996) == "10.0");
  CHECK(format_significant(99.96) == "100");
  CHECK(format_significant(999.96) == "1000");
  CHECK(format_significant(0.00123456, 2) == "0.0012");
  CHECK(format_significant(-0.5) == "-0.500");
  CHECK(format_significant(1e-5) == "1.00e-5");
  CHECK(format_significant(1e-4) == "0.000100");
  CHECK(format_significant(2.5e9) == "2.50e9");
  CHECK(format_significant(123456789.0) == "123456789");
  CHECK(format_significant(0.0) == "0");
  CHECK(format_significant(0.1, 17) == "0.10000000000000001");
  CHECK(format_significant(7.0, 1) == "7");
}

TEST_CASE("A value is written in its unit as a person would write it") {
  CurrencyRates rates("EUR");
  rates.set("USD", 0.5);
  CHECK(format_quantity(0.3, "mm") == "300 mm");
  CHECK(format_quantity(0.0007, "mm") == "0.7 mm");
  CHECK(format_quantity(210e9, "GPa") == "210 GPa");
  CHECK(format_quantity(7850.0, "g/cm3") == "7.85 g/cm3");
  CHECK(format_quantity(293.15, "degC") == "20 degC");
  CHECK(format_quantity(274.45, "degC") == "1.3 degC");
  CHECK(format_quantity(12e-6, "um/m/K") == "12 um/m/K");
  CHECK(format_quantity(12e-6, "1/K") == "1.2e-5 1/K");
  CHECK(format_quantity(0.12, "%") == "12 %");
  CHECK(format_quantity(0.12, "") == "0.12");
  CHECK(format_quantity(0.12, "-") == "0.12");
  CHECK(format_quantity(0.12, "1") == "0.12");
  CHECK(format_quantity(0.0127, "in") == "0.5 in");
  CHECK(format_quantity(2.4, "EUR/kg", &rates) == "2.4 EUR/kg");
  CHECK(format_quantity(2.4, "USD/kg", &rates) == "4.8 USD/kg");
  CHECK(format_engineering(196.59, "N.m") == "197 N.m");
  CHECK(format_engineering(0.12, "%", 2) == "12 %");
  CHECK(format_engineering(1.0, "lbf", 5) == "0.22481 lbf");
}

TEST_CASE("What cannot be written is refused") {
  constexpr double infinity = std::numeric_limits<double>::infinity();
  constexpr double nan = std::numeric_limits<double>::quiet_NaN();
  for (const double bad : {infinity, -infinity, nan}) {
    CHECK(fault_of([&] { return format_number(bad); }).code == Code::not_finite);
    CHECK(fault_of([&] { return format_significant(bad); }).code == Code::not_finite);
    CHECK(fault_of([&] { return format_quantity(bad, "mm"); }).code == Code::not_finite);
    CHECK(fault_of([&] { return format_engineering(bad, "mm"); }).code == Code::not_finite);
  }
  CHECK(fault_of([] { return format_quantity(1e308, "mm"); }).code == Code::not_finite);
  CHECK(fault_of([] { return format_quantity(1.0, "mpa"); }).code == Code::unit_unknown);
  CHECK(fault_of([] { return format_quantity(1.0, "EUR"); }).code == Code::missing);
  CHECK(fault_of([] { return format_significant(1.0, 0); }).code == Code::out_of_range);
  CHECK(fault_of([] { return format_significant(1.0, 18); }).code == Code::out_of_range);
}
