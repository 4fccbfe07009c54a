// SPDX-License-Identifier: MIT
// Properties of the readers and writers on random text and random values; fixed seeds.
#include <bismar/quantity/format.hpp>
#include <bismar/quantity/parse.hpp>

#include "quantity/faults.hpp"

#include <array>
#include <bit>
#include <cfloat>
#include <cmath>
#include <cstdint>
#include <limits>
#include <random>
#include <span>
#include <string>
#include <string_view>
#include <vector>

using namespace bismar;

namespace {

using Random = std::mt19937_64;

// Own draws: the distributions of the standard library differ between its implementations.
std::size_t below(Random& random, std::size_t n) { return static_cast<std::size_t>(random() % n); }

double random_value(Random& random, int decades) {
  const double mantissa = 1.0 + static_cast<double>(random() >> 11U) * 0x1p-53 * 9.0;
  const int exponent =
      static_cast<int>(below(random, static_cast<std::size_t>(2 * decades))) - decades;
  return (random() % 2 == 0 ? 1.0 : -1.0) * mantissa * std::pow(10.0, exponent);
}

std::string_view pick(Random& random, std::span<const std::string_view> list) {
  return list[below(random, list.size())];
}

constexpr std::array<std::string_view, 6> products = {".", "*", "·", " ", " . ", "⋅"};
constexpr std::array<std::string_view, 7> powers = {"2", "^2", "²", "^0.5", "^(1/3)", "⁻¹", "-3"};
constexpr std::array<std::string_view, 4> gaps = {" ", "", "\t", "\u00A0"};

/// A symbol that may stand in a compound unit, half of the time with a power.
std::string random_factor(Random& random) {
  std::string_view symbol = pick(random, unit_symbols());
  while (parse_unit(symbol).role == TemperatureRole::absolute) {
    symbol = pick(random, unit_symbols());
  }
  std::string factor(symbol);
  if (random() % 2 == 0) {
    factor += pick(random, powers);
  }
  return factor;
}

/// One symbol of any sort, or one or two factors and up to two divisions.
std::string random_unit(Random& random) {
  if (random() % 4 == 0) {
    return std::string(pick(random, unit_symbols()));
  }
  std::string unit = random_factor(random);
  if (random() % 2 == 0) {
    unit += pick(random, products);
    unit += random_factor(random);
  }
  for (std::size_t divisions = below(random, 3); divisions > 0; --divisions) {
    unit += '/';
    unit += random_factor(random);
  }
  return unit;
}

/// Whether b is a, or at most two doubles away.
bool within_two_steps(double a, double b) {
  constexpr double infinity = std::numeric_limits<double>::infinity();
  const double low = std::nextafter(std::nextafter(a, -infinity), -infinity);
  const double high = std::nextafter(std::nextafter(a, infinity), infinity);
  return low <= b && b <= high;
}

}  // namespace

TEST_CASE("A value written in a random unit is read back within two steps") {
  Random random(20240607);
  int exact = 0;
  constexpr int trials = 100000;
  for (int i = 0; i < trials; ++i) {
    const std::string unit_text = random_unit(random);
    const Unit unit = parse_unit(unit_text);
    const double value = unit.to_si(std::abs(random_value(random, 12)));
    const std::string text = format_quantity(value, unit_text);
    const double back = parse_any_quantity(text).si;
    if (!within_two_steps(value, back)) {
      CAPTURE(text, value, back);
      FAIL("read back as another value");
    }
    exact += value == back ? 1 : 0;
  }
  // Where the value came from a number in that unit, nearly every text leads back to it.
  CHECK(exact > trials * 99 / 100);
}

TEST_CASE("Any value in any single unit is read back within two steps") {
  Random random(7);
  for (const std::string_view symbol : unit_symbols()) {
    for (int i = 0; i < 500; ++i) {
      const double value = std::abs(random_value(random, 15));
      const std::string text = format_quantity(value, symbol);
      const double back = parse_any_quantity(text).si;
      const bool near_absolute_zero =
          parse_unit(symbol).role == TemperatureRole::absolute && std::abs(back - value) < 1e-13;
      if (!within_two_steps(value, back) && !near_absolute_zero) {
        CAPTURE(text, value, back);
        FAIL("read back as another value");
      }
    }
  }
}

TEST_CASE("A text of up to twelve digits is written again as it was read") {
  Random random(11);
  for (const std::string_view symbol : unit_symbols()) {
    for (int i = 0; i < 300; ++i) {
      const auto digits = static_cast<double>(random() % 1000000);
      const std::string number = format_number(digits / 1000.0);
      const double value = parse_any_quantity(number + " " + std::string(symbol)).si;
      const std::string text = format_quantity(value, symbol);
      CAPTURE(number, symbol);
      REQUIRE(text == number + " " + std::string(symbol));
    }
  }
}

TEST_CASE("Spaces and signs around the parts change nothing") {
  Random random(13);
  for (int i = 0; i < 20000; ++i) {
    const std::string unit_text = random_unit(random);
    const double number = random_value(random, 6);
    const std::string plain = format_number(number);
    const std::string_view gap = pick(random, gaps);
    std::string text(pick(random, gaps));
    text += number > 0.0 && random() % 2 == 0 ? "+" + plain : plain;
    text += gap;
    text += unit_text;
    text += pick(random, gaps);
    CAPTURE(text);
    REQUIRE(parse_any_quantity(text).si == parse_unit(unit_text).to_si(number));
  }
}

TEST_CASE("Every number is read back from its shortest text") {
  Random random(17);
  int tried = 0;
  while (tried < 100000) {
    const double number = std::bit_cast<double>(std::uint64_t{random()});
    if (!std::isfinite(number) || std::abs(number) < DBL_MIN) {
      continue;
    }
    ++tried;
    if (parse_number(format_number(number)) != number) {
      CAPTURE(format_number(number));
      FAIL("read back as another number");
    }
  }
}

TEST_CASE("Random bytes are read as a finite quantity or refused with a message") {
  Random random(19);
  const CurrencyRates rates("EUR");
  // Half of the characters are those of real quantities, so that the grammar is reached.
  constexpr std::string_view likely = "0123456789..--/*^()+,eE% mMPaNkgKinlbfdegCcEUR²³√·°µ€";
  int read = 0;
  int refused = 0;
  constexpr int trials = 200000;
  for (int i = 0; i < trials; ++i) {
    std::string text;
    const std::size_t size = below(random, 24);
    const bool number_first = random() % 2 == 0;
    if (number_first) {
      text = std::to_string(random() % 1000) + ' ';
    }
    for (std::size_t k = 0; k < size; ++k) {
      text += random() % 8 != 0 ? likely[below(random, likely.size())]
                                : static_cast<char>(random() % 256);
    }
    // Plain checks, and an assertion only where one fails: assertions cost more than the reading.
    bool sound = true;
    try {
      const QuantityRange range = parse_range(text, dimension::one, &rates);
      sound = std::isfinite(range.low) && std::isfinite(range.high) && range.low <= range.high;
      ++read;
    } catch (const Error& error) {
      const Fault& fault = error.faults()[0];
      sound = error.faults().size() == 1 && !fault.message.empty() && !fault.allowed.empty() &&
              fault.code != Code::internal;
      ++refused;
    }
    if (i % 4 == 0) {  // the other readers share nearly all of their code
      try {
        sound = sound && std::isfinite(parse_any_quantity(text, &rates).si);
      } catch (const Error&) {
        ++refused;
      }
      try {
        sound = sound && !split_header(text).name.empty();
      } catch (const Error&) {
        ++refused;
      }
    }
    if (!sound) {
      CAPTURE(text);
      FAIL("neither a sound quantity nor a sound message");
    }
  }
  CHECK(read > 100);
  CHECK(refused > trials / 2);
}
