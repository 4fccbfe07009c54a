// SPDX-License-Identifier: MIT
#include "unit_exponent.hpp"

#include "text.hpp"

#include <cstdlib>

namespace bismar {

namespace {

using quantity_text::character_at;
using quantity_text::fail;
using quantity_text::is_digit;
using quantity_text::quoted;

constexpr int largest_power = 12 * 6;  // [sixths]

constexpr char32_t one_half_sign = 0xBD;
constexpr char32_t superscript_minus = 0x207B;

/// 0 to 9, or -1 when the character is no superscript digit.
int superscript_digit(char32_t code) {
  switch (code) {
    case 0xB9:
      return 1;
    case 0xB2:
      return 2;
    case 0xB3:
      return 3;
    default:
      return code == 0x2070 || (code >= 0x2074 && code <= 0x2079) ? static_cast<int>(code - 0x2070)
                                                                  : -1;
  }
}

class ExponentReader {
 public:
  ExponentReader(std::string_view text, std::size_t& at, std::string_view whole)
      : text_(text), at_(at), whole_(whole) {}

  /// The exponent at this place in sixths; 6 when there is none.
  int read() {
    int sixths = first_power;
    const char32_t code = next();
    if (code == U'^') {
      advance();
      sixths = next() == U'(' ? read_fraction_exponent() : read_raised_exponent();
    } else if (is_digit(code) || (code == U'-' && is_digit(second()))) {
      sixths = read_decimal_exponent();
    } else if (superscript_digit(code) >= 0 || code == superscript_minus || code == one_half_sign) {
      sixths = read_superscript_exponent();
    }
    if (sixths == 0) {
      refuse_power(whole_);
    }
    if (std::abs(sixths) > largest_power) {
      fail(Code::out_of_range,
           whole_,
           "powers from -12 to 12",
           "A power in " + quoted(whole_) + " is larger than 12.");
    }
    return sixths;
  }

 private:
  [[nodiscard]] char32_t next() const { return character_at(text_, at_).code; }
  [[nodiscard]] char32_t second() const {
    return character_at(text_, at_ + character_at(text_, at_).size).code;
  }
  void advance() { at_ += character_at(text_, at_).size; }

  /// Behind "^".
  int read_raised_exponent() {
    const bool superscript = superscript_digit(next()) >= 0 || next() == one_half_sign;
    return superscript ? read_superscript_exponent() : read_decimal_exponent();
  }

  bool read_minus() {
    if (next() != U'-' && next() != quantity_text::minus_sign) {
      return false;
    }
    advance();
    return true;
  }

  /// One to three digits.
  int read_digits() {
    int number = 0;
    int count = 0;
    while (is_digit(next())) {
      number = number * 10 + static_cast<int>(next() - U'0');
      advance();
      if (++count > 3) {
        refuse_power(whole_);
      }
    }
    if (count == 0) {
      refuse_power(whole_);
    }
    return number;
  }

  /// "2", "-1", "0.5".
  int read_decimal_exponent() {
    const bool negative = read_minus();
    int thousandths = read_digits() * 1000;
    if (next() == U'.' && is_digit(second())) {
      advance();
      const std::size_t begin = at_;
      int decimals = read_digits();
      for (std::size_t places = at_ - begin; places < 3; ++places) {
        decimals *= 10;
      }
      thousandths += decimals;
    }
    if (thousandths * 6 % 1000 != 0) {
      refuse_power(whole_);
    }
    const int sixths = thousandths * 6 / 1000;
    return negative ? -sixths : sixths;
  }

  /// "(1/2)", "(-3/2)", "(2)".
  int read_fraction_exponent() {
    advance();
    const bool negative = read_minus();
    const int above = read_digits();
    int below = 1;
    if (next() == U'/') {
      advance();
      below = read_digits();
    }
    if (next() != U')' || below == 0 || above * 6 % below != 0) {
      refuse_power(whole_);
    }
    advance();
    const int sixths = above * 6 / below;
    return negative ? -sixths : sixths;
  }

  /// "²", "⁻¹", "½".
  int read_superscript_exponent() {
    if (next() == one_half_sign) {
      advance();
      return 3;
    }
    const bool negative = next() == superscript_minus;
    if (negative) {
      advance();
    }
    int number = 0;
    int count = 0;
    for (int digit = superscript_digit(next()); digit >= 0; digit = superscript_digit(next())) {
      number = number * 10 + digit;
      advance();
      if (++count > 2) {
        refuse_power(whole_);
      }
    }
    if (count == 0) {
      refuse_power(whole_);
    }
    return negative ? -number * 6 : number * 6;
  }

  std::string_view text_;
  std::size_t& at_;
  std::string_view whole_;
};

}  // namespace

bool begins_superscript(char32_t code) {
  return superscript_digit(code) >= 0 || code == superscript_minus || code == one_half_sign;
}

int read_exponent(std::string_view text, std::size_t& at, std::string_view whole) {
  return ExponentReader(text, at, whole).read();
}

void refuse_power(std::string_view whole) {
  fail(Code::unit_unknown,
       whole,
       "powers in halves, thirds or sixths, from -12 to 12",
       "A power in " + quoted(whole) +
           " cannot be read; powers are whole, halves (\"m^0.5\"), "
           "thirds or sixths (\"m^(1/3)\").");
}

}  // namespace bismar
