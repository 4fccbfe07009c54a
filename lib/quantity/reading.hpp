// SPDX-License-Identifier: MIT
// Private to the quantity floor: the readers that the public functions are made of. Each takes the
// whole text of the user beside its own part, so that a message can show it.
#pragma once

#include <bismar/quantity/unit.hpp>

#include <cstddef>
#include <string_view>

namespace bismar {

/// Reads the number that begins at byte `at` of `text` and moves `at` behind it. Refuses what only
/// looks like the end of a number (digit groups, decimal comma, fractions, ranges).
[[nodiscard]] double read_number(std::string_view text, std::size_t& at, std::string_view whole);

/// Reads a unit that fills `text`.
[[nodiscard]] Unit read_unit(std::string_view text,
                             std::string_view whole,
                             const CurrencyRates* rates);

/// The value in SI. Refuses a result that is not finite or too close to zero for full precision.
[[nodiscard]] double checked_to_si(const Unit& unit, double number, std::string_view whole);

}  // namespace bismar
