// SPDX-License-Identifier: MIT
#include <bismar/quantity/parse.hpp>

#include "ends.hpp"
#include "reading.hpp"
#include "text.hpp"

#include <cmath>
#include <cstdint>

namespace bismar {

namespace {

using quantity_text::fail;
using quantity_text::quoted;
using quantity_text::trimmed;

/// What a quantity must be: a kind, or a dimension without a kind.
class Expectation {
 public:
  explicit Expectation(QuantityKind kind) : dimension_(dimension_of(kind)), kind_(kind) {}
  explicit Expectation(const Dimension& dimension) : dimension_(dimension) {}

  [[nodiscard]] bool takes_bare_numbers() const {
    return kind_ ? kind_ == QuantityKind::ratio || kind_ == QuantityKind::count
                 : dimension_.is_one();
  }

  /// The words of a message: "a length is needed, such as "300 mm"".
  [[nodiscard]] std::string need() const {
    if (kind_) {
      return std::string(phrase_of(*kind_)) + " is needed, such as " + quoted(example_of(*kind_));
    }
    return "a quantity of dimension " + dimension_.text() + " (" + dimension_.trade_name() +
           ") is needed";
  }

  [[nodiscard]] std::string allowed() const {
    return kind_ ? "a number in " + quantity_text::joined_with_or(usual_units(*kind_))
                 : "a number in a unit of dimension " + dimension_.text();
  }

  void check_unit(const Unit& unit, std::string_view whole) const {
    if (unit.dimension != dimension_) {
      refuse_dimension(unit, whole);
    }
    check_temperature(unit, whole);
    constexpr unsigned mass_only = 1U << static_cast<unsigned>(Base::mass);
    if (kind_ == QuantityKind::co2_per_mass && unit.bases != mass_only) {
      fail(Code::unit_wrong,
           whole,
           allowed(),
           quoted(whole) + " is no mass per mass, but " + need() + '.');
    }
  }

  void check_value(double si, std::string_view whole) const {
    if (kind_ == QuantityKind::temperature && si < 0.0) {
      fail(Code::out_of_range,
           whole,
           "a temperature above absolute zero (-273.15 degC)",
           quoted(whole) + " is below absolute zero.");
    }
    if (kind_ == QuantityKind::count && (si < 0.0 || si != std::floor(si))) {
      fail(Code::out_of_range,
           whole,
           "a whole number, not negative",
           quoted(whole) + " is no count; write a whole number that is not negative.");
    }
  }

  void refuse_bare(std::string_view whole) const {
    fail(Code::unit_missing, whole, allowed(), quoted(whole) + " has no unit: " + need() + '.');
  }

 private:
  void refuse_dimension(const Unit& unit, std::string_view whole) const {
    std::string remedy;
    const bool mass_for_force = unit.dimension * dimension::acceleration == dimension_;
    if (mass_for_force) {
      remedy = " A mass is no force: pound-force is \"lbf\", kilogram-force is \"kgf\".";
    }
    const bool parts_left_out = unit.dimension * dimension::count == dimension_;
    if (parts_left_out) {
      remedy = " Write the parts too, as in \"120 parts/h\".";
    }
    const bool angle_left_out = unit.dimension * dimension::angle == dimension_;
    if (angle_left_out) {
      remedy = " Write the angle too, as in \"rad\", \"deg\" or \"rpm\".";
    }
    fail(Code::unit_wrong,
         whole,
         allowed(),
         "The unit of " + quoted(whole) + " is that of " + unit.dimension.trade_name() + ", but " +
             need() + '.' + remedy);
  }

  void check_temperature(const Unit& unit, std::string_view whole) const {
    if (unit.role == TemperatureRole::absolute && kind_ != QuantityKind::temperature) {
      fail(Code::unit_wrong,
           whole,
           "a number in K",
           quoted(whole) +
               " is a point on a temperature scale; a difference of temperatures is "
               "written in \"K\" (one kelvin is one degree Celsius).");
    }
    if (unit.role == TemperatureRole::difference && kind_ == QuantityKind::temperature) {
      fail(Code::unit_wrong,
           whole,
           allowed(),
           quoted(whole) + " is a difference of temperatures, but " + need() + '.');
    }
  }

  Dimension dimension_;
  std::optional<QuantityKind> kind_;
};

/// A number and the text of its unit, which may be empty.
struct NumberAndUnit {
  double number = 0.0;
  std::string_view unit;
};

NumberAndUnit split_number(std::string_view text, std::string_view whole) {
  std::size_t at = 0;
  const double number = read_number(text, at, whole);
  return {number, trimmed(text.substr(at))};
}

/// The value of a number in the unit text, or of a bare number where the text is empty.
double value_of(double number,
                std::string_view unit_text,
                const Expectation& expected,
                std::string_view whole,
                const CurrencyRates* rates) {
  double value = number;
  if (unit_text.empty()) {
    if (!expected.takes_bare_numbers()) {
      expected.refuse_bare(whole);
    }
  } else {
    const Unit unit = read_unit(unit_text, whole, rates);
    expected.check_unit(unit, whole);
    value = checked_to_si(unit, number, whole);
  }
  expected.check_value(value, whole);
  return value;
}

double quantity(std::string_view text, const Expectation& expected, const CurrencyRates* rates) {
  const std::string_view whole = trimmed(text);
  refuse_range(whole);
  const NumberAndUnit part = split_number(whole, whole);
  return value_of(part.number, part.unit, expected, whole, rates);
}

QuantityRange range(std::string_view text,
                    const Expectation& expected,
                    const CurrencyRates* rates) {
  const std::string_view whole = trimmed(text);
  const std::optional<RangeEnds> ends = split_range(whole);
  if (!ends) {
    const double value = quantity(whole, expected, rates);
    return {value, value};
  }
  const NumberAndUnit low = split_number(ends->low, whole);
  const NumberAndUnit high = split_number(ends->high, whole);
  if (high.unit.empty() && !low.unit.empty()) {
    fail(Code::unit_missing,
         whole,
         R"(a unit behind the second number, as in "8..40 mm")",
         quoted(whole) +
             " has a unit behind its first number only; write it behind the second or "
             "behind both, as in \"8..40 mm\" or \"8 mm..40 mm\".");
  }
  const std::string_view low_unit = low.unit.empty() ? high.unit : low.unit;
  const QuantityRange result{value_of(low.number, low_unit, expected, whole, rates),
                             value_of(high.number, high.unit, expected, whole, rates)};
  check_order(result, whole);
  return result;
}

}  // namespace

std::optional<RangeEnds> split_range(std::string_view text) {
  constexpr std::string_view points = "..";
  constexpr std::string_view one_character = "\u2026";
  std::string_view mark = points;
  std::size_t at = text.find(points);
  if (at == std::string_view::npos) {
    mark = one_character;
    at = text.find(one_character);
  }
  if (at == std::string_view::npos) {
    return std::nullopt;
  }
  const RangeEnds ends{trimmed(text.substr(0, at)), trimmed(text.substr(at + mark.size()))};
  const auto fault = [&](const std::string& what) {
    fail(Code::number_malformed,
         text,
         R"(low..high, as in "8..40 mm")",
         quoted(text) + what + "; write a range as in \"8..40 mm\".");
  };
  if (ends.low.empty() || ends.high.empty()) {
    fault(ends.low.empty() ? " has no lower end" : " has no upper end");
  }
  const bool more_points = text.substr(at + mark.size()).starts_with('.') ||
                           ends.high.find(points) != std::string_view::npos ||
                           ends.high.find(one_character) != std::string_view::npos ||
                           ends.low.find(one_character) != std::string_view::npos;
  if (more_points) {
    fault(" has too many points for a range");
  }
  return ends;
}

void refuse_range(std::string_view whole) {
  if (whole.find("..") != std::string_view::npos ||
      whole.find("\u2026") != std::string_view::npos) {
    fail(Code::number_malformed,
         whole,
         "one value",
         quoted(whole) + " is a range where one value is needed.");
  }
}

void check_order(const QuantityRange& range, std::string_view whole) {
  if (range.low > range.high) {
    fail(Code::conflict,
         whole,
         "low..high",
         quoted(whole) + " runs from high to low; write the smaller end first.");
  }
}

Quantity parse_any_quantity(std::string_view text, const CurrencyRates* rates) {
  const std::string_view whole = trimmed(text);
  refuse_range(whole);
  const NumberAndUnit part = split_number(whole, whole);
  if (part.unit.empty()) {
    return {part.number, std::nullopt};
  }
  const Unit unit = read_unit(part.unit, whole, rates);
  return {checked_to_si(unit, part.number, whole), unit};
}

double parse_quantity(std::string_view text, QuantityKind expected, const CurrencyRates* rates) {
  return quantity(text, Expectation(expected), rates);
}

double parse_quantity(std::string_view text,
                      const Dimension& expected,
                      const CurrencyRates* rates) {
  return quantity(text, Expectation(expected), rates);
}

QuantityRange parse_range(std::string_view text,
                          QuantityKind expected,
                          const CurrencyRates* rates) {
  return range(text, Expectation(expected), rates);
}

QuantityRange parse_range(std::string_view text,
                          const Dimension& expected,
                          const CurrencyRates* rates) {
  return range(text, Expectation(expected), rates);
}

}  // namespace bismar
