// SPDX-License-Identifier: MIT
#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/parse.hpp>

#include "quantity/faults.hpp"

#include <limits>

using namespace bismar;
using quantity_test::contains;
using quantity_test::fault_of;

TEST_CASE("Currency codes are those of ISO 4217, in capital letters") {
  for (const char* code :
       {"EUR", "USD", "GBP", "CHF", "SEK", "NOK", "DKK", "PLN", "CZK", "HUF", "JPY",
        "CNY", "INR", "CAD", "AUD", "NZD", "ZAR", "BRL", "KRW", "AED", "ZWL"}) {
    CHECK(is_currency_code(code));
  }
  // XAU is gold, XXX "no currency", DEM long gone.
  for (const char* code :
       {"eur", "Eur", "XYZ", "XAU", "XXX", "DEM", "", "EU", "EURO", "UR ", " EU"}) {
    CHECK_FALSE(is_currency_code(code));
  }
}

TEST_CASE("Money is brought to the currency of the job by the stated rate") {
  CurrencyRates rates("EUR");
  rates.set("USD", 0.5);
  rates.set("GBP", 1.25);
  CHECK(parse_quantity("20 EUR", QuantityKind::money, &rates) == 20.0);
  CHECK(parse_quantity("20 €", QuantityKind::money, &rates) == 20.0);
  CHECK(parse_quantity("20 USD", QuantityKind::money, &rates) == 10.0);
  CHECK(parse_quantity("20 £", QuantityKind::money, &rates) == 25.0);
  CHECK(parse_quantity("3 USD/kg", QuantityKind::price_per_mass, &rates) == 1.5);
  // by hand: 1 USD/lb = 0.5 EUR / 0.45359237 kg
  CHECK(parse_quantity("1 USD/lb", QuantityKind::price_per_mass, &rates) ==
        Approx(0.5 / 0.45359237).epsilon(1e-15));
  CHECK(parse_quantity("2.4 EUR/kg", QuantityKind::price_per_mass, &rates) ==
        parse_quantity("2400 EUR/t", QuantityKind::price_per_mass, &rates));
}

TEST_CASE("A currency without a rate is a fault that names what to give") {
  const CurrencyRates rates("EUR");
  const Fault fault =
      fault_of([&] { return parse_quantity("3 USD/kg", QuantityKind::price_per_mass, &rates); });
  CHECK(fault.code == Code::missing);
  CHECK(fault.found == "3 USD/kg");
  CHECK(contains(fault.message, "\"currency_rates\": { \"USD\": <EUR for 1 USD> }"));
  CHECK(fault_of([] { return parse_quantity("3 EUR", QuantityKind::money); }).code ==
        Code::missing);
}

TEST_CASE("Rates that make no sense are refused") {
  CurrencyRates rates("EUR");
  rates.set("USD", 0.9);
  CHECK(fault_of([] { return CurrencyRates("euro"); }).code == Code::unknown_name);
  const auto set = [&rates](const char* code, double rate) {
    return fault_of([&] {
             rates.set(code, rate);
             return 0;
           })
        .code;
  };
  CHECK(set("usd", 0.9) == Code::unknown_name);
  CHECK(set("EUR", 1.0) == Code::conflict);
  CHECK(set("USD", 0.9) == Code::duplicate);
  CHECK(set("GBP", 0.0) == Code::out_of_range);
  CHECK(set("GBP", -1.0) == Code::out_of_range);
  CHECK(set("GBP", std::numeric_limits<double>::infinity()) == Code::not_finite);
  CHECK(set("GBP", std::numeric_limits<double>::quiet_NaN()) == Code::not_finite);
  CHECK(rates.rate("USD") == 0.9);
  CHECK(rates.rate("EUR") == 1.0);
  CHECK_FALSE(rates.rate("GBP").has_value());
}
