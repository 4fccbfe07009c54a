// SPDX-License-Identifier: MIT
#include <bismar/quantity/dimension.hpp>
#include <bismar/quantity/kind.hpp>
#include <bismar/quantity/parse.hpp>

#include "quantity/faults.hpp"

using namespace bismar;
using quantity_test::contains;
using quantity_test::fault_of;

TEST_CASE("A dimension multiplies, divides and takes roots exactly") {
  CHECK(dimension::length * dimension::length == dimension::area);
  CHECK(dimension::force / dimension::area == dimension::stress);
  CHECK(dimension::area.to_power(1, 2) == dimension::length);
  CHECK(dimension::length.to_power(1, 3).to_power(3) == dimension::length);
  CHECK(dimension::length.to_power(1, 2) * dimension::length.to_power(1, 2) == dimension::length);
  CHECK((dimension::length / dimension::length).is_one());
  CHECK(dimension::length.to_power(0).is_one());
  CHECK(dimension::stress.sixths(Base::time) == -12);
}

TEST_CASE("Angle and count are no plain numbers") {
  CHECK_FALSE(dimension::angle.is_one());
  CHECK_FALSE(dimension::count.is_one());
  CHECK(dimension::rotational_speed != dimension::frequency);
  CHECK(dimension::production_rate != dimension::frequency);
}

TEST_CASE("A dimension is written as a product of powers") {
  CHECK(dimension::one.text() == "1");
  CHECK(dimension::area.text() == "length^2");
  CHECK(dimension::stress.text() == "length^-1 mass time^-2");
  CHECK(dimension::length.to_power(1, 2).text() == "length^0.5");
  CHECK(dimension::length.to_power(-3, 2).text() == "length^-1.5");
  CHECK(dimension::mass.to_power(1, 3).text() == "mass^(1/3)");
  CHECK(dimension::mass.to_power(-5, 6).text() == "mass^(-5/6)");
  CHECK(dimension::price_per_mass.text() == "mass^-1 currency");
}

TEST_CASE("A dimension is called by its name in the trade") {
  CHECK(dimension::stress.trade_name() == "stress, pressure or modulus");
  CHECK(dimension::second_moment.trade_name() == "second moment of area");
  CHECK(dimension::price_per_mass.trade_name() == "price per mass");
  CHECK(dimension::fracture_toughness.trade_name() == "fracture toughness");
  CHECK(dimension::length.to_power(5).trade_name() == "length^5");
}

TEST_CASE("A power that leaves no whole sixths is refused") {
  CHECK(fault_of([] { return dimension::length.to_power(1, 4); }).code == Code::invalid_argument);
  CHECK(fault_of([] { return dimension::length.to_power(1, 0); }).code == Code::invalid_argument);
  CHECK(fault_of([] { return dimension::length.to_power(5001); }).code == Code::out_of_range);
  CHECK(dimension::length.to_power(5000).sixths(Base::length) == 30000);
}

TEST_CASE("Every usual unit and example of a kind is accepted for that kind") {
  const CurrencyRates rates("EUR");
  int kinds = 0;
  for (int i = 0; i <= static_cast<int>(QuantityKind::mass_rate); ++i) {
    const auto kind = static_cast<QuantityKind>(i);
    INFO(phrase_of(kind));
    CHECK(parse_quantity(example_of(kind), kind, &rates) > 0.0);
    CHECK(parse_unit(example_of(kind).substr(example_of(kind).find(' ')), &rates).dimension ==
          dimension_of(kind));
    std::string_view list = usual_units(kind);
    while (!list.empty()) {
      const std::size_t comma = list.find(", ");
      const std::string text = "300 " + std::string(list.substr(0, comma));
      INFO(text);
      CHECK(parse_quantity(text, kind, &rates) > 0.0);
      list = comma == std::string_view::npos ? std::string_view() : list.substr(comma + 2);
    }
    ++kinds;
  }
  CHECK(kinds == 39);
}
