// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/dimension.hpp>
#include <bismar/quantity/kind.hpp>
#include <bismar/quantity/unit.hpp>

#include <optional>
#include <string>
#include <string_view>

namespace bismar {

/// A value with the unit that it was written in.
struct Quantity {
  double si = 0.0;           ///< The value in SI units and the job's currency; finite.
  std::optional<Unit> unit;  ///< Absent for a bare number.
};

/// A closed range in SI units; `low <= high`, both finite.
struct QuantityRange {
  double low = 0.0;
  double high = 0.0;
};

/// The two parts of a table heading.
struct Header {
  std::string name;                 ///< "density"; spaces inside are kept, never empty.
  std::optional<std::string> unit;  ///< "kg/m3"; absent without brackets.
};

/// Reads a number, and nothing else, in the same way under every locale: digits with an optional
/// sign, decimal mark and exponent ("-1.5e-3"). The value is the double nearest to the text.
///
/// @param text          Spaces around it ignored.
/// @param decimal_mark  '.' or ','; the other one is refused wherever it stands.
/// @throws bismar::Error  missing: empty text; number_malformed: anything else than a number, also
/// digits in groups
///   ("1 000", "1,000"), fractions and hexadecimal; not_finite: NaN, infinity, or too large for a
///   double; out_of_range: too close to zero for a double of full precision; invalid_argument:
///   another decimal mark.
[[nodiscard]] BISMAR_API double parse_number(std::string_view text, char decimal_mark = '.');

/// Reads "low..high" or one number, which is both ends.
///
/// @throws bismar::Error  as `parse_number`; conflict: low > high.
[[nodiscard]] BISMAR_API QuantityRange parse_number_range(std::string_view text,
                                                          char decimal_mark = '.');

/// Reads a number and, if there is one, its unit, of any dimension ("350 MPa", "12e-6/K").
///
/// @throws bismar::Error  as `parse_number` and `parse_unit`, also for the converted value.
[[nodiscard]] BISMAR_API Quantity parse_any_quantity(std::string_view text,
                                                     const CurrencyRates* rates = nullptr);

/// Reads a quantity of the expected kind: a number with a unit, as `parse_number` (decimal point)
/// and `parse_unit` take them. A bare number is accepted for a ratio and a count only.
///
/// @param text   For instance "350 MPa", "17400 lbf", "2.4 EUR/kg", "20 degC", "12 %".
/// @param rates  The job's currency; needed only where the text contains money.
/// @return The value in SI units and the job's currency; finite.
/// @throws bismar::Error  as `parse_any_quantity`; unit_missing: a bare number; unit_wrong: a unit
/// of
///   another dimension, or degC for a difference; out_of_range: a temperature below absolute zero,
///   a count that is negative or not whole. One fault, without a place; `found` is the whole text.
[[nodiscard]] BISMAR_API double parse_quantity(std::string_view text,
                                               QuantityKind expected,
                                               const CurrencyRates* rates = nullptr);

/// The same for a dimension without a kind. A bare number is accepted for `dimension::one` only;
/// where the dimension is a temperature, degC and degF are refused, because it is not said whether
/// a point or a difference is meant.
[[nodiscard]] BISMAR_API double parse_quantity(std::string_view text,
                                               const Dimension& expected,
                                               const CurrencyRates* rates = nullptr);

/// Reads "8 mm..40 mm", "8..40 mm" (the unit behind counts for both) or one quantity, which is both
/// ends. Between the ends stand two points, or the character "…".
///
/// @throws bismar::Error  as `parse_quantity`; conflict: low > high; unit_missing: a unit behind
/// the
///   first number only.
[[nodiscard]] BISMAR_API QuantityRange parse_range(std::string_view text,
                                                   QuantityKind expected,
                                                   const CurrencyRates* rates = nullptr);
[[nodiscard]] BISMAR_API QuantityRange parse_range(std::string_view text,
                                                   const Dimension& expected,
                                                   const CurrencyRates* rates = nullptr);

/// Splits the heading of a column: "density [kg/m3]" -> {"density", "kg/m3"}. The unit is not read
/// here. Round brackets belong to the name.
///
/// @throws bismar::Error  empty: no name; unit_missing: "[]"; table_malformed: brackets that do not
///   close, come twice, or are not at the end.
[[nodiscard]] BISMAR_API Header split_header(std::string_view text);

}  // namespace bismar
