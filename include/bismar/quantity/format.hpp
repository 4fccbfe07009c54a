// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/quantity/currency.hpp>

#include <string>
#include <string_view>

namespace bismar {

/// The shortest text that reads back as the same double, the same under every locale: plain digits
/// from 1e-4 up to 1e16 in size, otherwise with an exponent ("1.5e-7"). Minus zero becomes "0".
///
/// @throws bismar::Error  not_finite.
[[nodiscard]] BISMAR_API std::string format_number(double number);

/// A number for a table: at least `digits` significant digits, trailing zeros kept, the integer
/// part never rounded away ("0.0123", "1.00", "197", "16583"). Without an exponent from 1e-4 up to
/// 1e9 in size.
///
/// @param digits  From 1 to 17.
/// @throws bismar::Error  not_finite; out_of_range: digits.
[[nodiscard]] BISMAR_API std::string format_significant(double number, int digits = 3);

/// A value in the stated unit, to be read back: `parse_quantity` of the text gives `value` again,
/// or a double at most two steps away where no double in that unit gives `value` itself. Of the
/// texts that give `value` with 12 to 17 digits the shortest is taken: 0.3 in "mm" is "300 mm".
/// In degC and degF the distance from absolute zero is a difference of larger numbers, so that a
/// value near absolute zero comes back within 1e-13 K only.
///
/// @param value      In SI units and the job's currency.
/// @param unit_text  As for `parse_unit`, repeated as written; empty, "1" or "-" for a plain
/// number.
/// @throws bismar::Error  as `parse_unit`; not_finite: the value, or the number in that unit.
[[nodiscard]] BISMAR_API std::string format_quantity(double value,
                                                     std::string_view unit_text,
                                                     const CurrencyRates* rates = nullptr);

/// A value in the stated unit for a person: `format_significant` and the unit ("197 N.m").
///
/// @throws bismar::Error  as `format_quantity`; out_of_range: digits.
[[nodiscard]] BISMAR_API std::string format_engineering(double value,
                                                        std::string_view unit_text,
                                                        int digits = 3,
                                                        const CurrencyRates* rates = nullptr);

}  // namespace bismar
