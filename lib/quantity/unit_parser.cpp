// SPDX-License-Identifier: MIT
#include "reading.hpp"
#include "text.hpp"
#include "unit_exponent.hpp"
#include "unit_product.hpp"
#include "unit_table.hpp"

#include <cmath>
#include <optional>
#include <string>
#include <vector>

namespace bismar {

namespace {

using quantity_text::character_at;
using quantity_text::fail;
using quantity_text::is_ascii_letter;
using quantity_text::is_digit;
using quantity_text::is_space;
using quantity_text::quoted;
using quantity_text::skip_spaces;

constexpr int deepest_bracket = 8;
constexpr std::size_t longest_unit = 100;  // [bytes]; keeps every sum of exponents small
constexpr std::size_t longest_word_to_guess = 12;

constexpr char32_t root_sign = 0x221A;
constexpr std::string_view some_units = "a unit such as mm, kg, N, MPa, kN.m, EUR/kg";

bool is_product_sign(char32_t code) {
  return code == U'.' || code == U'*' || code == 0xB7 || code == 0x22C5 || code == 0x2219 ||
         code == 0xD7;
}

/// Symbols that end after one character: "5'6" is no word.
bool is_lone_symbol(char32_t code) {
  return code == U'%' || code == U'$' || code == U'\'' || code == U'"';
}

bool is_word_character(char32_t code) {
  if (code < 0x80) {
    return is_ascii_letter(code) || code == U'_';
  }
  const bool acts = is_space(code) || is_product_sign(code) || begins_superscript(code) ||
                    code == root_sign || code == quantity_text::minus_sign ||
                    code == quantity_text::ellipsis || (code >= 0x80 && code < 0xA0);
  return !acts;
}

/// The end of the sentence about a word that is not in the list: what it may have meant.
std::string unknown_word(std::string_view word) {
  std::vector<std::string_view> same_letters;
  for (const std::string_view symbol : unit_symbols()) {
    if (quantity_text::equal_but_for_case(symbol, word)) {
      same_letters.push_back(symbol);
    }
  }
  std::string upper(word);
  for (char& c : upper) {
    c = c >= 'a' && c <= 'z' ? static_cast<char>(c - 'a' + 'A') : c;
  }
  if (is_currency_code(upper)) {
    same_letters.push_back(upper);
  }
  if (!same_letters.empty()) {
    std::string choice;
    for (const std::string_view symbol : same_letters) {
      choice += (choice.empty() ? "" : " or ") + quoted(symbol);
    }
    return " is no known unit (letter case counts). Did you mean " + choice + "?";
  }
  if (word.size() == 3 && word == upper) {
    return " is neither a known unit nor a currency code of ISO 4217.";
  }
  const bool worth_a_guess = word.size() > 3 && word.size() <= longest_word_to_guess;
  if (worth_a_guess) {
    // A guess that begins with another letter helps nobody ("kEUR": "year"?).
    std::vector<std::string_view> same_initial;
    for (const std::string_view symbol : unit_symbols()) {
      if (quantity_text::equal_but_for_case(word.substr(0, 1), symbol.substr(0, 1))) {
        same_initial.push_back(symbol);
      }
    }
    if (const std::optional<std::string> near = nearest_word(word, same_initial)) {
      return " is no known unit. Did you mean " + quoted(*near) + "?";
    }
  }
  return " is no known unit.";
}

class UnitParser {
 public:
  UnitParser(std::string_view text, std::string_view whole, const CurrencyRates* rates)
      : text_(text), whole_(whole), rates_(rates) {}

  Unit parse() {
    if (const UnitSymbol* symbol = find_unit(text_); symbol != nullptr) {
      return alone(*symbol);
    }
    if (text_ == "1" || text_ == "-") {
      return {};
    }
    const UnitProduct product = read_product(0);
    if (at_ < text_.size()) {  // read_product ends early at a closing bracket only
      fail(Code::unit_unknown,
           whole_,
           some_units,
           "A bracket closes that was never opened in " + quoted(whole_) + ".");
    }
    const std::optional<Unit> unit = product.finished();
    if (!unit) {
      fail(Code::out_of_range,
           whole_,
           some_units,
           "The unit in " + quoted(whole_) + " is too large or too small to compute with.");
    }
    return *unit;
  }

 private:
  Unit alone(const UnitSymbol& symbol) const {
    Unit unit = UnitProduct::of(symbol).finished().value();
    unit.offset = symbol.offset;
    unit.role = symbol.role;
    return unit;
  }

  [[nodiscard]] char32_t next() const { return character_at(text_, at_).code; }
  [[nodiscard]] char32_t second() const {
    return character_at(text_, at_ + character_at(text_, at_).size).code;
  }
  void advance() { at_ += character_at(text_, at_).size; }

  /// `"part" in "whole"`, or the whole alone.
  [[nodiscard]] std::string subject(std::string_view part) const {
    return part == whole_ ? quoted(part) : quoted(part) + " in " + quoted(whole_);
  }

  UnitProduct read_product(int depth) {
    UnitProduct product;
    bool divided = false;
    at_ = skip_spaces(text_, at_);
    if (next() == U'/') {
      // "/K" is "1/K"
    } else if (next() == U'1' && leads_a_division()) {
      advance();
    } else {
      product = read_factor(depth);
    }
    for (;;) {
      const std::size_t before = at_;
      at_ = skip_spaces(text_, at_);
      const bool spaced = at_ != before;
      if (at_ >= text_.size() || next() == U')') {
        return product;
      }
      if (next() == U'/') {
        advance();
        divided = true;
        product.divide_by(read_factor(depth));
        continue;
      }
      if (next() == U'*' && second() == U'*') {
        refuse_power(whole_);
      }
      if (is_product_sign(next())) {
        advance();
      } else if (!spaced && !can_follow_unspaced()) {
        refuse_character();
      }
      if (divided) {
        fail(Code::unit_ambiguous,
             whole_,
             "brackets or two divisions",
             "It is not clear what stands under the division in " + quoted(whole_) +
                 ": write brackets as in \"W/(m.K)\", or divide twice as in \"W/m/K\".");
      }
      product.multiply_by(read_factor(depth));
    }
  }

  /// Whether the 1 at this place is that of "1/K".
  [[nodiscard]] bool leads_a_division() const {
    return character_at(text_, skip_spaces(text_, at_ + 1)).code == U'/';
  }

  /// A factor that needs no sign before it: √m, (m.K), sqrt is a word and needs one.
  [[nodiscard]] bool can_follow_unspaced() const { return next() == root_sign || next() == U'('; }

  UnitProduct read_factor(int depth) {
    at_ = skip_spaces(text_, at_);
    const char32_t code = next();
    if (code == root_sign) {
      advance();
      return read_root(depth);
    }
    if (code == U'(') {
      const UnitProduct inside = read_bracket(depth);
      return raised(inside, read_exponent(text_, at_, whole_));
    }
    if (at_ >= text_.size() || code == U'/' || code == U')' || is_product_sign(code)) {
      fail(Code::unit_unknown,
           whole_,
           some_units,
           "A unit symbol is missing in " + quoted(whole_) + missing_place() + ".");
    }
    if (is_digit(code)) {
      fail(Code::number_malformed,
           whole_,
           R"(a unit without numbers, powers as in "m^0.5")",
           "A number stands inside the unit of " + quoted(whole_) +
               ": write fractions as decimals (\"0.5 in\") and broken powers as \"m^0.5\" or "
               "\"m^(1/2)\".");
    }
    const std::string_view word = read_word();
    if (word == "sqrt" && next() == U'(') {
      return read_root(depth);
    }
    const UnitProduct factor = product_of(word);
    return raised(factor, read_exponent(text_, at_, whole_));
  }

  [[nodiscard]] std::string missing_place() const {
    if (at_ >= text_.size()) {
      return " at the end";
    }
    return " before " + quoted(text_.substr(at_, character_at(text_, at_).size));
  }

  UnitProduct read_root(int depth) {
    constexpr int half = 3;  // [sixths]
    UnitProduct inside;
    if (next() == U'(') {
      inside = read_bracket(depth);
    } else {
      if (!is_word_character(next())) {
        fail(Code::unit_unknown,
             whole_,
             some_units,
             "A unit symbol is missing behind the root sign in " + quoted(whole_) + ".");
      }
      inside = product_of(read_word());
    }
    if (read_exponent(text_, at_, whole_) != first_power) {
      fail(Code::unit_ambiguous,
           whole_,
           R"(a power as in "m^0.5")",
           "It is not clear whether the power in " + quoted(whole_) +
               " stands under the root; write one power as in \"m^1.5\".");
    }
    return raised(inside, half);
  }

  UnitProduct read_bracket(int depth) {
    if (depth >= deepest_bracket) {
      fail(Code::unit_unknown,
           whole_,
           some_units,
           "Too many brackets inside each other in " + quoted(whole_) + ".");
    }
    advance();
    const UnitProduct inside = read_product(depth + 1);
    if (next() != U')') {
      fail(Code::unit_unknown,
           whole_,
           some_units,
           "A bracket is not closed in " + quoted(whole_) + ".");
    }
    advance();
    return inside;
  }

  std::string_view read_word() {
    const std::size_t begin = at_;
    if (is_lone_symbol(next())) {
      advance();
      return text_.substr(begin, at_ - begin);
    }
    while (at_ < text_.size() && is_word_character(next())) {
      advance();
    }
    if (at_ == begin) {
      refuse_character();
    }
    return text_.substr(begin, at_ - begin);
  }

  UnitProduct product_of(std::string_view word) const {
    if (const UnitSymbol* symbol = find_unit(word); symbol != nullptr) {
      if (symbol->role == TemperatureRole::absolute) {
        fail(Code::unit_wrong,
             whole_,
             "K",
             subject(word) +
                 " is a point on a temperature scale and cannot be part of a compound "
                 "unit; write \"K\" (one kelvin is one degree Celsius).");
      }
      return UnitProduct::of(*symbol);
    }
    const std::string_view signed_currency = currency_of_sign(word);
    const std::string_view code = signed_currency.empty() ? word : signed_currency;
    if (is_currency_code(code)) {
      return UnitProduct::of_currency(rate_of(code));
    }
    refuse_word(word);
  }

  double rate_of(std::string_view code) const {
    if (rates_ == nullptr) {
      fail(Code::missing,
           whole_,
           "a currency for the job",
           "There is money in " + quoted(whole_) +
               ", but the job has no currency yet; name it "
               "first, for instance \"currency\": " +
               quoted(code) + ".");
    }
    const std::optional<double> rate = rates_->rate(code);
    if (!rate) {
      fail(Code::missing,
           whole_,
           "a rate for " + std::string(code),
           quoted(whole_) + " is in " + std::string(code) + ", the job in " +
               rates_->job_currency() + ", and no rate is given; add \"currency_rates\": { " +
               quoted(code) + ": <" + rates_->job_currency() + " for 1 " + std::string(code) +
               "> }.");
    }
    return *rate;
  }

  [[noreturn]] void refuse_word(std::string_view word) const {
    if (const RefusedWord* refused = find_refused(word); refused != nullptr) {
      fail(refused->code,
           whole_,
           refused->instead,
           subject(word) + ' ' + std::string(refused->reason) + "; write " +
               std::string(refused->instead) + '.');
    }
    fail(Code::unit_unknown, whole_, some_units, subject(word) + unknown_word(word));
  }

  [[noreturn]] void refuse_character() const {
    const std::string_view character = text_.substr(at_, character_at(text_, at_).size);
    if (character == "-") {
      fail(Code::unit_unknown,
           whole_,
           R"(a point between symbols, as in "lbf.ft")",
           "A hyphen joins no units in " + quoted(whole_) + "; write a point, as in \"lbf.ft\".");
    }
    if (is_word_character(next())) {
      fail(Code::unit_unknown,
           whole_,
           "a point or a slash between symbols",
           "A sign is missing before " + quoted(character) + " in " + quoted(whole_) +
               "; write \".\" to multiply or \"/\" to divide.");
    }
    fail(Code::unit_unknown,
         whole_,
         some_units,
         "The character " + quoted(character) + " cannot stand at this place in " + quoted(whole_) +
             "; join symbols by \".\" and \"/\", as in \"kN.m\" or \"EUR/kg\".");
  }

  UnitProduct raised(const UnitProduct& factor, int sixths) const {
    if (sixths == first_power) {
      return factor;
    }
    const std::optional<UnitProduct> product = factor.to_power(sixths);
    if (!product) {
      refuse_power(whole_);
    }
    return *product;
  }

  std::string_view text_;
  std::string_view whole_;
  const CurrencyRates* rates_;
  std::size_t at_ = 0;
};

}  // namespace

Unit read_unit(std::string_view text, std::string_view whole, const CurrencyRates* rates) {
  text = quantity_text::trimmed(text);
  if (text.empty()) {
    fail(Code::unit_missing,
         whole,
         some_units,
         "The unit is empty; write " + std::string(some_units) + ".");
  }
  if (text.size() > longest_unit) {
    fail(Code::unit_unknown, whole, some_units, quoted(text) + " is too long to be a unit.");
  }
  return UnitParser(text, whole, rates).parse();
}

}  // namespace bismar
