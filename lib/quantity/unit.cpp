// SPDX-License-Identifier: MIT
#include <bismar/quantity/unit.hpp>

#include "reading.hpp"
#include "text.hpp"

#include <cfloat>
#include <cmath>

namespace bismar {

using quantity_text::fail;
using quantity_text::quoted;

double Unit::to_si(double number) const noexcept {
  // A multiplication by one and a division by one are exact, so no case needs to be told apart.
  return (number + offset) * multiply / divide;
}

double Unit::from_si(double value) const noexcept { return value * divide / multiply - offset; }

Unit parse_unit(std::string_view text, const CurrencyRates* rates) {
  return read_unit(text, quantity_text::trimmed(text), rates);
}

double checked_to_si(const Unit& unit, double number, std::string_view whole) {
  const double value = unit.to_si(number);
  if (!std::isfinite(value)) {
    fail(Code::not_finite,
         whole,
         "a value that a double can hold",
         quoted(whole) + " is too large to compute with.");
  }
  if (number != 0.0 && std::abs(value) < DBL_MIN && unit.offset == 0.0) {
    fail(Code::out_of_range,
         whole,
         "zero, or a value of at least 2.3e-308 in SI units",
         quoted(whole) + " is too close to zero to compute with.");
  }
  return value;
}

double convert(double number,
               std::string_view from,
               std::string_view to,
               const CurrencyRates* rates) {
  const Unit source = parse_unit(from, rates);
  const Unit target = parse_unit(to, rates);
  if (source.dimension != target.dimension) {
    fail(Code::unit_wrong,
         to,
         "a unit of the same dimension as " + quoted(from),
         quoted(from) + " (" + source.dimension.trade_name() + ") cannot be converted to " +
             quoted(to) + " (" + target.dimension.trade_name() + ").");
  }
  const bool point_to_difference =
      (source.role == TemperatureRole::absolute && target.role == TemperatureRole::difference) ||
      (source.role == TemperatureRole::difference && target.role == TemperatureRole::absolute);
  if (point_to_difference) {
    fail(Code::unit_wrong,
         to,
         "two temperatures or two differences",
         quoted(from) + " and " + quoted(to) +
             " are a temperature and a difference of temperatures and cannot be converted.");
  }
  const double result = target.from_si(source.to_si(number));
  if (!std::isfinite(number) || !std::isfinite(result)) {
    fail(Code::not_finite,
         from,
         "finite numbers",
         "The conversion from " + quoted(from) + " to " + quoted(to) +
             " does not give a finite number.");
  }
  return result;
}

}  // namespace bismar
