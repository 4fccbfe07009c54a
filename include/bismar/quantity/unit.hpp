// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/dimension.hpp>

#include <cstdint>
#include <span>
#include <string_view>

namespace bismar {

/// How a unit stands to temperature. Kelvin serves for both and is `either`, like every unit that
/// has nothing to do with temperature.
enum class TemperatureRole : std::uint8_t {
  either,
  absolute,    ///< degC, degF: points on a scale.
  difference,  ///< delta_degC, delta_degF.
};

/// A unit that was read: how its numbers become SI.
///
///     SI value = (number + offset) * multiply / divide
///
/// `multiply` and `divide` are kept as whole numbers, reduced, so that a unit made of powers of ten
/// costs one rounding and inch and pound units two. A factor above 2^53 (lbf.ft), pi, a currency's
/// rate and a root add their own: the relative error stays below 4 * DBL_EPSILON.
struct BISMAR_API Unit {
  double multiply = 1.0;
  double divide = 1.0;
  double offset = 0.0;  ///< Zero but for degC and degF.
  Dimension dimension;
  TemperatureRole role = TemperatureRole::either;
  /// One bit for each Base that occurs in any factor, even where it cancels (kg/kg: mass).
  std::uint8_t bases = 0;

  [[nodiscard]] double to_si(double number) const noexcept;
  [[nodiscard]] double from_si(double value) const noexcept;
};

/// Reads the text of a unit.
///
/// Symbols count letter by letter in exact case, from one closed list (`unit_symbols`) plus the
/// currency codes of ISO 4217. Factors are joined by `.`, `*`, `·` or a space; `/` divides, from
/// left to right ("W/m/K"). A product behind a division ("W/m.K") is ambiguous and refused unless
/// in brackets ("W/(m.K)"). Powers: `mm2`, `mm^2`, `mm²`, `m^0.5`, `m^(1/2)`, `s-1`, in halves,
/// thirds or sixths up to 12; `√m` and `sqrt(m)` are roots. `1/K` is allowed; `1` and `-` alone
/// stand for a plain number. degC and degF stand alone only.
///
/// A year (a) is 365 d, as in NIST SP 811, appendix B.8. No global state; safe from any thread.
///
/// @param text   UTF-8, spaces around it ignored.
/// @param rates  The job's currency; needed only where the unit contains money.
/// @throws bismar::Error  unit_missing: empty text; unit_unknown: a symbol that is not in the list,
///   or a text that does not follow the grammar; unit_ambiguous: text that can be read in two ways;
///   unit_wrong: degC or degF inside a compound; missing: money without `rates`, or a currency
///   without a rate; out_of_range: a power above 12, or a unit too large or small to compute with.
[[nodiscard]] BISMAR_API Unit parse_unit(std::string_view text,
                                         const CurrencyRates* rates = nullptr);

/// Every symbol that `parse_unit` knows, without the currency codes, in byte order.
[[nodiscard]] BISMAR_API std::span<const std::string_view> unit_symbols() noexcept;

/// The same quantity in another unit.
///
/// @throws bismar::Error  as `parse_unit`; unit_wrong: the dimensions differ, or one is a
///   temperature and the other a difference of temperatures; not_finite: the number or the result.
[[nodiscard]] BISMAR_API double convert(double number,
                                        std::string_view from,
                                        std::string_view to,
                                        const CurrencyRates* rates = nullptr);

}  // namespace bismar
