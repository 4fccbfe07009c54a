// SPDX-License-Identifier: MIT
#include "unit_table.hpp"

#include <algorithm>
#include <array>
#include <cstddef>
#include <numbers>

namespace bismar {

namespace {

namespace d = dimension;

// Exact by definition (NIST SP 811, appendix B.8, and the international yard and pound agreement of
// 1959): 1 in = 25.4 mm, 1 ft = 0.3048 m, 1 lb = 0.453 592 37 kg, g_n = 9.806 65 m/s2, hence
// 1 lbf = 4.448 221 615 260 5 N. Numerators are whole and below 2^53, so that they are exact too.
constexpr double pound = 45359237.0;              // [1e-8 kg]
constexpr double pound_force = 44482216152605.0;  // [1e-13 N]
constexpr double square_inch = 64516.0;           // [1e-8 m^2]
constexpr double day = 86400.0;                   // [s]

constexpr UnitSymbol degrees(std::string_view symbol, TemperatureRole role) {
  const double ice_point = role == TemperatureRole::absolute ? 273.15 : 0.0;
  return {symbol, d::temperature, 1.0, 1.0, 0, ice_point, role};
}
constexpr UnitSymbol fahrenheit(std::string_view symbol, TemperatureRole role) {
  const double zero = role == TemperatureRole::absolute ? 459.67 : 0.0;
  return {symbol, d::temperature, 5.0, 9.0, 0, zero, role};
}

constexpr auto absolute = TemperatureRole::absolute;
constexpr auto difference = TemperatureRole::difference;

// The list. A prefix is written out where it is in use; none is ever put together.
constexpr std::array listed_units = {
    // length
    UnitSymbol{"km", d::length, 1, 1, 3},
    UnitSymbol{"m", d::length},
    UnitSymbol{"dm", d::length, 1, 1, -1},
    UnitSymbol{"cm", d::length, 1, 1, -2},
    UnitSymbol{"mm", d::length, 1, 1, -3},
    UnitSymbol{"um", d::length, 1, 1, -6},
    UnitSymbol{"\u00B5m", d::length, 1, 1, -6},  // micro sign
    UnitSymbol{"\u03BCm", d::length, 1, 1, -6},  // Greek mu
    UnitSymbol{"in", d::length, 254, 1, -4},
    UnitSymbol{"ft", d::length, 3048, 1, -4},
    UnitSymbol{"thou", d::length, 254, 1, -7},
    // volume
    UnitSymbol{"L", d::volume, 1, 1, -3},
    // mass
    UnitSymbol{"t", d::mass, 1, 1, 3},
    UnitSymbol{"kg", d::mass},
    UnitSymbol{"g", d::mass, 1, 1, -3},
    UnitSymbol{"lb", d::mass, pound, 1, -8},
    UnitSymbol{"lbm", d::mass, pound, 1, -8},
    // time; the year of 365 d is that of NIST SP 811, appendix B.8
    UnitSymbol{"s", d::time},
    UnitSymbol{"min", d::time, 60},
    UnitSymbol{"h", d::time, 3600},
    UnitSymbol{"d", d::time, day},
    UnitSymbol{"a", d::time, 365 * day},
    UnitSymbol{"year", d::time, 365 * day},
    UnitSymbol{"years", d::time, 365 * day},
    // temperature
    UnitSymbol{"K", d::temperature},
    degrees("degC", absolute),
    degrees("\u00B0C", absolute),
    degrees("\u2103", absolute),  // the one-character form
    fahrenheit("degF", absolute),
    fahrenheit("\u00B0F", absolute),
    fahrenheit("\u2109", absolute),
    degrees("delta_degC", difference),
    fahrenheit("delta_degF", difference),
    // angle and rotation
    UnitSymbol{"rad", d::angle},
    UnitSymbol{"mrad", d::angle, 1, 1, -3},
    UnitSymbol{"deg", d::angle, std::numbers::pi, 180},
    UnitSymbol{"\u00B0", d::angle, std::numbers::pi, 180},
    UnitSymbol{"rev", d::angle, 2 * std::numbers::pi},
    UnitSymbol{"rpm", d::rotational_speed, std::numbers::pi, 30},
    // frequency
    UnitSymbol{"Hz", d::frequency},
    UnitSymbol{"kHz", d::frequency, 1, 1, 3},
    // force
    UnitSymbol{"N", d::force},
    UnitSymbol{"daN", d::force, 1, 1, 1},
    UnitSymbol{"kN", d::force, 1, 1, 3},
    UnitSymbol{"MN", d::force, 1, 1, 6},
    UnitSymbol{"kgf", d::force, 980665, 1, -5},
    UnitSymbol{"lbf", d::force, pound_force, 1, -13},
    UnitSymbol{"kip", d::force, pound_force, 1, -10},
    // moment, where the trade writes it in one word
    UnitSymbol{"Nmm", d::moment, 1, 1, -3},
    UnitSymbol{"Nm", d::moment},
    UnitSymbol{"kNm", d::moment, 1, 1, 3},
    UnitSymbol{"MNm", d::moment, 1, 1, 6},
    // stress
    UnitSymbol{"Pa", d::stress},
    UnitSymbol{"kPa", d::stress, 1, 1, 3},
    UnitSymbol{"MPa", d::stress, 1, 1, 6},
    UnitSymbol{"GPa", d::stress, 1, 1, 9},
    UnitSymbol{"bar", d::stress, 1, 1, 5},
    UnitSymbol{"psi", d::stress, pound_force, square_inch, -5},
    UnitSymbol{"ksi", d::stress, pound_force, square_inch, -2},
    UnitSymbol{"kpsi", d::stress, pound_force, square_inch, -2},
    UnitSymbol{"Msi", d::stress, pound_force, square_inch, 1},
    // energy and power
    UnitSymbol{"J", d::moment},
    UnitSymbol{"kJ", d::moment, 1, 1, 3},
    UnitSymbol{"MJ", d::moment, 1, 1, 6},
    UnitSymbol{"kWh", d::moment, 36, 1, 5},
    UnitSymbol{"W", d::power},
    UnitSymbol{"kW", d::power, 1, 1, 3},
    // counts and ratios
    UnitSymbol{"part", d::count},
    UnitSymbol{"parts", d::count},
    UnitSymbol{"%", d::one, 1, 1, -2},
};

// Sorted at compile time, so that the lists above can stand in the order that a person reads.
constexpr auto units = [] {
  auto sorted = listed_units;
  std::sort(sorted.begin(), sorted.end(), [](const UnitSymbol& a, const UnitSymbol& b) {
    return a.symbol < b.symbol;
  });
  return sorted;
}();

constexpr auto symbols = [] {
  std::array<std::string_view, units.size()> list;
  for (std::size_t i = 0; i < list.size(); ++i) {
    list[i] = units[i].symbol;
  }
  return list;
}();

constexpr bool no_symbol_twice() {
  for (std::size_t i = 1; i < units.size(); ++i) {
    if (units[i - 1].symbol == units[i].symbol) {
      return false;
    }
  }
  return true;
}
static_assert(no_symbol_twice());

}  // namespace

const UnitSymbol* find_unit(std::string_view symbol) noexcept {
  const auto* const found = std::lower_bound(
      units.begin(), units.end(), symbol, [](const UnitSymbol& row, std::string_view wanted) {
        return row.symbol < wanted;
      });
  return found != units.end() && found->symbol == symbol ? found : nullptr;
}

std::string_view currency_of_sign(std::string_view sign) noexcept {
  if (sign == "\u20AC") {
    return "EUR";
  }
  if (sign == "\u00A3") {
    return "GBP";
  }
  return {};
}

std::span<const std::string_view> unit_symbols() noexcept { return symbols; }

}  // namespace bismar
