// SPDX-License-Identifier: MIT
#include <bismar/quantity/parse.hpp>

#include "ends.hpp"
#include "reading.hpp"
#include "text.hpp"

#include <algorithm>
#include <cfloat>
#include <charconv>
#include <cmath>
#include <string>
#include <system_error>

namespace bismar {

namespace {

using quantity_text::Character;
using quantity_text::character_at;
using quantity_text::fail;
using quantity_text::is_ascii_letter;
using quantity_text::is_digit;
using quantity_text::quoted;
using quantity_text::skip_spaces;

constexpr std::string_view plain_number = "digits with a decimal point, such as 350.5 or 1.2e-5";

[[noreturn]] void refuse(std::string_view whole, const std::string& message) {
  fail(Code::number_malformed, whole, plain_number, message);
}

bool starts_with_word(std::string_view text, std::string_view word) {
  if (!quantity_text::equal_but_for_case(text.substr(0, word.size()), word)) {
    return false;
  }
  return !is_ascii_letter(character_at(text, word.size()).code);
}

/// Why the text at `rest` is no number.
[[noreturn]] void refuse_start(std::string_view rest, std::string_view whole) {
  if (starts_with_word(rest, "nan") || starts_with_word(rest, "inf") ||
      starts_with_word(rest, "infinity") || character_at(rest, 0).code == 0x221E) {
    fail(Code::not_finite,
         whole,
         "a finite number",
         quoted(whole) + " is not finite; write a finite number or leave the value out.");
  }
  if (whole.empty()) {
    fail(Code::missing, whole, plain_number, "The text is empty where a number is needed.");
  }
  if (rest.empty()) {
    refuse(whole, "A number is missing in " + quoted(whole) + ".");
  }
  if (character_at(rest, 0).code == U',') {
    refuse(whole, quoted(whole) + " begins with a comma; write a decimal point, as in \"0.5\".");
  }
  refuse(whole,
         quoted(whole) +
             " does not begin with a number; write the number first and its unit "
             "behind it, as in \"350 MPa\".");
}

[[noreturn]] void refuse_tiny(std::string_view whole) {
  fail(Code::out_of_range,
       whole,
       "zero, or a number of at least 2.3e-308 in size",
       quoted(whole) + " is too close to zero to compute with.");
}

/// Whether digits that no double can hold are above 1 (from_chars tells only that they do not fit).
bool is_huge(std::string_view digits) {
  const std::size_t e = std::min(digits.find_first_of("eE"), digits.size());
  const std::string_view mantissa = digits.substr(0, e);
  const std::size_t point = std::min(mantissa.find('.'), mantissa.size());
  const std::size_t leading = mantissa.find_first_not_of("0.");
  const auto magnitude = static_cast<std::ptrdiff_t>(point) - static_cast<std::ptrdiff_t>(leading);
  std::string_view exponent_text = digits.substr(std::min(e + 1, digits.size()));
  if (exponent_text.starts_with('+')) {
    exponent_text.remove_prefix(1);
  }
  int exponent = 0;
  const auto read =
      std::from_chars(exponent_text.data(), exponent_text.data() + exponent_text.size(), exponent);
  if (read.ec == std::errc::result_out_of_range) {
    return !exponent_text.starts_with('-');
  }
  return magnitude + exponent > 0;
}

std::string with_point(std::string_view text) {
  std::string changed(text);
  std::replace(changed.begin(), changed.end(), ',', '.');
  return changed;
}

/// Refuses what stands right behind a number and shows that the number was meant to go on.
void check_end(std::string_view text, std::size_t at, std::string_view whole) {
  const Character next = character_at(text, at);
  const char32_t after = character_at(text, at + next.size).code;
  switch (next.code) {
    case U',':
      refuse(whole,
             quoted(whole) +
                 " has a comma in the number: the decimal mark is a point, and "
                 "digits are not grouped" +
                 (std::count(whole.begin(), whole.end(), ',') == 1
                      ? "; write " + quoted(with_point(whole)) + " if it is a decimal comma."
                      : std::string(".")));
    case U'.':
      if (is_digit(after)) {
        refuse(whole, quoted(whole) + " has two decimal points.");
      }
      break;
    case U'-':
    case quantity_text::minus_sign:
    case 0x2013:  // the dash of typesetting
    case 0x2014:
      refuse(whole,
             quoted(whole) +
                 " has a dash behind the number; a range is written with two "
                 "points, as in \"8..40 mm\".");
    case U'_':
    case U'\'':
    case 0x2019:
      if (is_digit(after)) {
        refuse(whole, quoted(whole) + " has digits in groups; write them without a mark between.");
      }
      break;
    case U'/':
      if (is_digit(after)) {
        refuse(whole,
               quoted(whole) +
                   " has a fraction; write it as a decimal number, as in "
                   "\"0.5 in\".");
      }
      break;
    case 0xB1:
      refuse(whole,
             quoted(whole) +
                 " has a tolerance; write one value, or a range where a range is "
                 "allowed.");
    case U'x':
      if (!is_digit(after)) {
        break;
      }
      [[fallthrough]];
    case U'*':
    case U'^':
    case 0xD7:
    case 0xB7:
    case 0x22C5:
      refuse(whole,
             quoted(whole) +
                 " has a product or a power in the number; write one number, powers of ten "
                 "as in \"5e3\".");
    default:
      break;
  }
  const std::size_t behind_spaces = skip_spaces(text, at);
  const Character beyond = character_at(text, behind_spaces);
  if (behind_spaces == at) {
    return;
  }
  if (is_digit(beyond.code)) {
    // "12e-6 1/K" goes on with a unit, "1 000 MPa" and "1 1/2 in" do not.
    const std::size_t slash = skip_spaces(text, behind_spaces + beyond.size);
    const bool reciprocal = beyond.code == U'1' && character_at(text, slash).code == U'/' &&
                            !is_digit(character_at(text, skip_spaces(text, slash + 1)).code);
    if (!reciprocal) {
      refuse(whole,
             quoted(whole) +
                 " has two numbers; write digits without spaces between them and "
                 "fractions as decimals.");
    }
  } else if (beyond.code == 0xB1 || beyond.code == 0xD7 || beyond.code == U'*' ||
             beyond.code == 0x2013 || beyond.code == 0x2014) {
    check_end(text, behind_spaces, whole);  // "5 ± 1", "5 × 10", "8 – 40": as without the space
  }
}

}  // namespace

double read_number(std::string_view text, std::size_t& at, std::string_view whole) {
  at = skip_spaces(text, at);
  bool negative = false;
  const Character sign = character_at(text, at);
  if (sign.code == U'-' || sign.code == quantity_text::minus_sign || sign.code == U'+') {
    negative = sign.code != U'+';
    at += sign.size;
  }
  const char32_t first = character_at(text, at).code;
  const bool has_digit =
      is_digit(first) || (first == U'.' && is_digit(character_at(text, at + 1).code));
  if (!has_digit) {
    refuse_start(text.substr(at), whole);
  }
  const char32_t second = character_at(text, at + 1).code;
  if (first == U'0' && (second == U'x' || second == U'X')) {
    refuse(whole, quoted(whole) + " has a hexadecimal number; write it in decimal digits.");
  }
  double number = 0.0;
  const char* const begin = text.data() + at;
  const auto [end, error] = std::from_chars(begin, text.data() + text.size(), number);
  if (error == std::errc::result_out_of_range) {
    if (is_huge({begin, static_cast<std::size_t>(end - begin)})) {
      fail(Code::not_finite,
           whole,
           "a number below 1.8e308 in size",
           quoted(whole) + " is too large to compute with.");
    }
    refuse_tiny(whole);
  }
  if (error != std::errc()) {
    throw InternalError("a number that begins with a digit was not read");
  }
  if (number != 0.0 && number < DBL_MIN) {
    refuse_tiny(whole);
  }
  at = static_cast<std::size_t>(end - text.data());
  check_end(text, at, whole);
  return negative ? -number : number;
}

namespace {

double whole_number_text(std::string_view text, std::string_view whole) {
  std::size_t at = 0;
  const double number = read_number(text, at, whole);
  at = skip_spaces(text, at);
  if (at < text.size()) {
    refuse(whole,
           quoted(whole) + " has " + quoted(text.substr(at)) +
               " behind the number where only a number is allowed.");
  }
  return number;
}

/// The number with the decimal mark replaced, after the other mark has been refused.
double number_with_mark(std::string_view text, std::string_view whole, char decimal_mark) {
  if (decimal_mark == '.') {
    return whole_number_text(text, whole);
  }
  if (text.find('.') != std::string_view::npos) {
    fail(Code::number_malformed,
         whole,
         "digits with a decimal comma, such as 350,5",
         quoted(whole) +
             " has a point in the number, but the decimal mark of this table is a "
             "comma, and digits are not grouped.");
  }
  const std::string changed = with_point(text);
  return whole_number_text(changed, whole);
}

void check_mark(char decimal_mark) {
  if (decimal_mark != '.' && decimal_mark != ',') {
    fail(Code::invalid_argument,
         std::string_view(&decimal_mark, 1),
         "'.' or ','",
         "The decimal mark must be a point or a comma.");
  }
}

}  // namespace

double parse_number(std::string_view text, char decimal_mark) {
  check_mark(decimal_mark);
  text = quantity_text::trimmed(text);
  refuse_range(text);
  return number_with_mark(text, text, decimal_mark);
}

QuantityRange parse_number_range(std::string_view text, char decimal_mark) {
  check_mark(decimal_mark);
  text = quantity_text::trimmed(text);
  const std::optional<RangeEnds> ends = split_range(text);
  if (!ends) {
    const double number = number_with_mark(text, text, decimal_mark);
    return {number, number};
  }
  const QuantityRange range{number_with_mark(ends->low, text, decimal_mark),
                            number_with_mark(ends->high, text, decimal_mark)};
  check_order(range, text);
  return range;
}

}  // namespace bismar
