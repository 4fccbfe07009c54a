// SPDX-License-Identifier: MIT
#include <bismar/quantity/format.hpp>

#include <bismar/quantity/unit.hpp>

#include "text.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <limits>
#include <optional>
#include <system_error>

namespace bismar {

namespace {

using quantity_text::fail;

constexpr int most_digits = 17;  // these always tell two doubles apart

// Room for the longest fixed form used here: 17 digits, a sign, a point and a few zeros.
using Buffer = std::array<char, 64>;

void require_finite(double number) {
  if (!std::isfinite(number)) {
    fail(Code::not_finite,
         std::isnan(number) ? "NaN" : "infinity",
         "a finite number",
         "A number that is not finite cannot be written.");
  }
}

std::string_view written(const Buffer& buffer, const std::to_chars_result& result) {
  if (result.ec != std::errc()) {
    throw InternalError("a number did not fit its buffer");
  }
  return {buffer.data(), static_cast<std::size_t>(result.ptr - buffer.data())};
}

/// "1.5e-07" -> "1.5e-7", "1e+16" -> "1e16".
std::string short_exponent(std::string_view text) {
  const std::size_t e = text.find('e');
  std::string shortened(text.substr(0, e + 1));
  std::string_view exponent = text.substr(e + 1);
  if (exponent.front() == '-') {
    shortened += '-';
  }
  exponent.remove_prefix(1);  // to_chars always writes the sign
  while (exponent.size() > 1 && exponent.front() == '0') {
    exponent.remove_prefix(1);
  }
  shortened += exponent;
  return shortened;
}

/// 7 for "1.5e+07".
int exponent_of(std::string_view scientific) {
  std::string_view text = scientific.substr(scientific.find('e') + 1);
  if (text.starts_with('+')) {
    text.remove_prefix(1);
  }
  int exponent = 0;
  if (std::from_chars(text.data(), text.data() + text.size(), exponent).ec != std::errc()) {
    throw InternalError("a written number has no exponent");
  }
  return exponent;
}

/// The double nearest to `number` written with so many significant digits.
double rounded_to_digits(double number, int digits) {
  Buffer buffer;
  const std::string_view text = written(buffer,
                                        std::to_chars(buffer.data(),
                                                      buffer.data() + buffer.size(),
                                                      number,
                                                      std::chars_format::scientific,
                                                      digits - 1));
  double rounded = 0.0;
  const auto result = std::from_chars(text.data(), text.data() + text.size(), rounded);
  return result.ec == std::errc() ? rounded : number;
}

/// The number with the fewest digits (12 or more are tried) that becomes `value` in SI.
double number_that_reads_back(double value, const Unit& unit) {
  constexpr int first_digits = 12;
  const double number = unit.from_si(value);
  if (!std::isfinite(number)) {
    return number;
  }
  for (int digits = first_digits; digits <= most_digits; ++digits) {
    const double candidate = rounded_to_digits(number, digits);
    if (unit.to_si(candidate) == value) {
      return candidate;
    }
  }
  // Several roundings lie between the two; the double that leads back is at most two steps away.
  constexpr double infinity = std::numeric_limits<double>::infinity();
  double nearest = number;
  double least = std::abs(unit.to_si(number) - value);
  for (const double towards : {-infinity, infinity}) {
    double candidate = number;
    for (int step = 0; step < 2; ++step) {
      candidate = std::nextafter(candidate, towards);
      const double distance = std::abs(unit.to_si(candidate) - value);
      if (distance < least) {
        least = distance;
        nearest = candidate;
      }
    }
  }
  return nearest;
}

bool means_plain_number(std::string_view unit_text) {
  return unit_text.empty() || unit_text == "1" || unit_text == "-";
}

std::string with_unit(std::string number, std::string_view unit_text) {
  if (!means_plain_number(unit_text)) {
    number += ' ';
    number += unit_text;
  }
  return number;
}

Unit unit_of(std::string_view unit_text, const CurrencyRates* rates) {
  return unit_text.empty() ? Unit() : parse_unit(unit_text, rates);
}

}  // namespace

std::string format_number(double number) {
  require_finite(number);
  const double size = std::abs(number);
  if (size == 0.0) {
    return "0";
  }
  Buffer buffer;
  if (size >= 1e-4 && size < 1e16) {
    return std::string(written(
        buffer,
        std::to_chars(
            buffer.data(), buffer.data() + buffer.size(), number, std::chars_format::fixed)));
  }
  return short_exponent(written(
      buffer,
      std::to_chars(
          buffer.data(), buffer.data() + buffer.size(), number, std::chars_format::scientific)));
}

std::string format_significant(double number, int digits) {
  require_finite(number);
  if (digits < 1 || digits > most_digits) {
    fail(Code::out_of_range,
         std::to_string(digits),
         "1 to 17",
         "The number of significant digits must be from 1 to 17.");
  }
  if (number == 0.0) {
    return "0";
  }
  Buffer buffer;
  char* const end = buffer.data() + buffer.size();
  const std::string_view scientific = written(
      buffer, std::to_chars(buffer.data(), end, number, std::chars_format::scientific, digits - 1));
  // The exponent after rounding decides the decimals: 9.996 with three digits is "10.0".
  const int exponent = exponent_of(scientific);
  if (exponent < -4 || exponent >= 9) {
    return short_exponent(scientific);
  }
  const int decimals = std::max(0, digits - 1 - exponent);
  return std::string(written(
      buffer, std::to_chars(buffer.data(), end, number, std::chars_format::fixed, decimals)));
}

std::string format_quantity(double value, std::string_view unit_text, const CurrencyRates* rates) {
  require_finite(value);
  unit_text = quantity_text::trimmed(unit_text);
  const Unit unit = unit_of(unit_text, rates);
  return with_unit(format_number(number_that_reads_back(value, unit)), unit_text);
}

std::string format_engineering(double value,
                               std::string_view unit_text,
                               int digits,
                               const CurrencyRates* rates) {
  require_finite(value);
  unit_text = quantity_text::trimmed(unit_text);
  const double number = unit_of(unit_text, rates).from_si(value);
  return with_unit(format_significant(number, digits), unit_text);
}

}  // namespace bismar
