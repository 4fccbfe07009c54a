// SPDX-License-Identifier: MIT
// Private to the quantity floor: the closed list of units, and the words that are refused by name.
#pragma once

#include <bismar/error.hpp>
#include <bismar/quantity/unit.hpp>

#include <span>
#include <string_view>

namespace bismar {

/// One symbol: SI value = (number + offset) * numerator * 10^power_of_ten / denominator.
struct UnitSymbol {
  std::string_view symbol;
  Dimension dimension;
  double numerator = 1.0;
  double denominator = 1.0;
  int power_of_ten = 0;
  double offset = 0.0;
  TemperatureRole role = TemperatureRole::either;
};

/// A word that a person may well write and that is no symbol of the list.
struct RefusedWord {
  std::string_view word;
  Code code = Code::unit_unknown;
  std::string_view reason;   ///< Continues `"word"`: "may be ... or ...".
  std::string_view instead;  ///< What to write, with quotation marks where it is a unit.
};

/// The symbol in exact case; null when it is not in the list.
[[nodiscard]] const UnitSymbol* find_unit(std::string_view symbol) noexcept;

/// The ISO 4217 code of a currency sign that stands for one currency only; empty otherwise.
[[nodiscard]] std::string_view currency_of_sign(std::string_view sign) noexcept;

[[nodiscard]] const RefusedWord* find_refused(std::string_view word) noexcept;

}  // namespace bismar
