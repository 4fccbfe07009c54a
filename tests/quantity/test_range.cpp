// SPDX-License-Identifier: MIT
#include <bismar/quantity/parse.hpp>

#include "quantity/faults.hpp"

using namespace bismar;
using quantity_test::contains;
using quantity_test::fault_of;
using K = QuantityKind;

namespace {

void check_range(const QuantityRange& range, double low, double high) {
  CHECK(range.low == low);
  CHECK(range.high == high);
}

}  // namespace

TEST_CASE("A range is read with one unit or two") {
  const CurrencyRates rates("EUR");
  check_range(parse_range("8 mm..40 mm", K::length), 8e-3, 40e-3);
  check_range(parse_range("8..40 mm", K::length), 8e-3, 40e-3);
  check_range(parse_range("8.5..40.5 mm", K::length), 8.5e-3, 40.5e-3);
  check_range(parse_range(" 8 mm .. 40 mm ", K::length), 8e-3, 40e-3);
  check_range(parse_range("8…40 mm", K::length), 8e-3, 40e-3);
  check_range(parse_range("1 cm..40 mm", K::length), 1e-2, 40e-3);
  check_range(parse_range("0.5 EUR/kg..500 EUR/kg", K::price_per_mass, &rates), 0.5, 500.0);
  check_range(parse_range("10..20 %", K::ratio), 0.1, 0.2);
  check_range(parse_range("0.1..0.2", K::ratio), 0.1, 0.2);
  check_range(parse_range("-5..5 K", K::temperature_difference), -5.0, 5.0);
  check_range(parse_range("0..20 degC", K::temperature), 273.15, 293.15);
  check_range(parse_range("1e-3..1e3 N", K::force), 1e-3, 1e3);
  check_range(parse_range("8..8 mm", dimension::length), 8e-3, 8e-3);
}

TEST_CASE("A single quantity is both ends of a range") {
  check_range(parse_range("12 mm", K::length), 12e-3, 12e-3);
  check_range(parse_range("0.3", dimension::one), 0.3, 0.3);
}

TEST_CASE("A range that is none is refused") {
  CHECK(fault_of([] { return parse_range("40..8 mm", K::length); }).code == Code::conflict);
  CHECK(fault_of([] { return parse_range("8 mm..40", K::length); }).code == Code::unit_missing);
  CHECK(fault_of([] { return parse_range("8..40", K::length); }).code == Code::unit_missing);
  CHECK(fault_of([] { return parse_range("10 %..0.2", K::ratio); }).code == Code::unit_missing);
  CHECK(fault_of([] { return parse_range("8 mm..40 kg", K::length); }).code == Code::unit_wrong);
  CHECK(fault_of([] { return parse_range("8..nan mm", K::length); }).code == Code::not_finite);
  CHECK(fault_of([] { return parse_range("", K::length); }).code == Code::missing);
  for (const char* text : {"8...40 mm",
                           "8..40..50 mm",
                           "..40 mm",
                           "8 mm..",
                           "8..",
                           "..",
                           "…",
                           "8-40 mm",
                           "8–40 mm",
                           "8 to 40 mm",
                           "8,5..9,5 mm",
                           "8….40 mm",
                           "8…..40 mm"}) {
    INFO(text);
    const Code code = fault_of([&] { return parse_range(text, K::length); }).code;
    const bool refused = code == Code::number_malformed || code == Code::unit_unknown;
    CHECK(refused);
  }
}

TEST_CASE("A range of plain numbers is read with either decimal mark") {
  check_range(parse_number_range("200..250"), 200.0, 250.0);
  check_range(parse_number_range("200,5..250,5", ','), 200.5, 250.5);
  check_range(parse_number_range("7"), 7.0, 7.0);
  CHECK(fault_of([] { return parse_number_range("250..200"); }).code == Code::conflict);
  CHECK(fault_of([] { return parse_number_range("200..250 MPa"); }).code == Code::number_malformed);
  CHECK(fault_of([] { return parse_number_range("200.5..250", ','); }).code ==
        Code::number_malformed);
  CHECK(fault_of([] { return parse_number_range(""); }).code == Code::missing);
}
