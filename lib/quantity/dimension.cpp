// SPDX-License-Identifier: MIT
#include <bismar/quantity/dimension.hpp>

#include "text.hpp"

#include <array>
#include <cstdlib>
#include <numeric>
#include <string>
#include <string_view>

namespace bismar {

namespace {

struct TradeName {
  Dimension dimension;
  std::string_view name;
};

// One name for each dimension, whatever the kinds that share it.
constexpr std::array trade_names = {
    TradeName{dimension::one, "plain number"},
    TradeName{dimension::length, "length"},
    TradeName{dimension::mass, "mass"},
    TradeName{dimension::time, "time"},
    TradeName{dimension::temperature, "temperature"},
    TradeName{dimension::currency, "amount of money"},
    TradeName{dimension::angle, "angle"},
    TradeName{dimension::count, "number of parts"},
    TradeName{dimension::area, "area"},
    TradeName{dimension::volume, "volume or section modulus"},
    TradeName{dimension::second_moment, "second moment of area"},
    TradeName{dimension::length.to_power(6), "warping constant"},
    TradeName{dimension::density, "density"},
    TradeName{dimension::linear_mass, "mass per length"},
    TradeName{dimension::areal_mass, "mass per area"},
    TradeName{dimension::frequency, "frequency or rate"},
    TradeName{dimension::rotational_speed, "rotational speed"},
    TradeName{dimension::angle / dimension::length, "twist per length"},
    TradeName{dimension::acceleration, "acceleration"},
    TradeName{dimension::force, "force"},
    TradeName{dimension::moment, "moment, torque or energy"},
    TradeName{dimension::line_load, "distributed load or stiffness"},
    TradeName{dimension::stress, "stress, pressure or modulus"},
    TradeName{dimension::fracture_toughness, "fracture toughness"},
    TradeName{dimension::power, "power"},
    TradeName{dimension::thermal_expansion, "thermal expansion coefficient"},
    TradeName{dimension::thermal_conductivity, "thermal conductivity"},
    TradeName{dimension::specific_energy, "energy per mass"},
    TradeName{dimension::specific_energy / dimension::temperature, "specific heat"},
    TradeName{dimension::price_per_mass, "price per mass"},
    TradeName{dimension::price_per_length, "price per length"},
    TradeName{dimension::price_per_area, "price per area"},
    TradeName{dimension::price_per_volume, "price per volume"},
    TradeName{dimension::price_per_part, "price per part"},
    TradeName{dimension::cost_rate, "cost rate"},
    TradeName{dimension::production_rate, "production rate in parts"},
    TradeName{dimension::length_rate, "velocity or production rate in length"},
    TradeName{dimension::mass_rate, "production rate in mass"},
};

constexpr std::array<std::string_view, base_count> base_names = {
    "length", "mass", "time", "temperature", "currency", "angle", "count"};

/// "^2", "^0.5" or "^(1/3)"; nothing for the first power.
std::string exponent_text(int sixths) {
  if (sixths == 6) {
    return {};
  }
  if (sixths % 6 == 0) {
    return '^' + std::to_string(sixths / 6);
  }
  if (sixths % 3 == 0) {
    return std::string(sixths < 0 ? "^-" : "^") + std::to_string(std::abs(sixths) / 6) + ".5";
  }
  const int common = std::gcd(sixths, 6);
  return "^(" + std::to_string(sixths / common) + '/' + std::to_string(6 / common) + ')';
}

}  // namespace

namespace detail {

void throw_dimension_power(int numerator, int denominator) {
  const std::string power = std::to_string(numerator) + '/' + std::to_string(denominator);
  quantity_text::fail(Code::invalid_argument,
                      power,
                      "a power that leaves whole sixths",
                      "A dimension cannot be raised to the power " + power +
                          ": its exponents must stay whole numbers of sixths.");
}

void throw_dimension_range() {
  quantity_text::fail(Code::out_of_range,
                      {},
                      "exponents from -5000 to 5000",
                      "The exponent of a dimension lies beyond +-5000.");
}

}  // namespace detail

std::string Dimension::text() const {
  std::string text;
  for (std::size_t i = 0; i < base_count; ++i) {
    if (sixths_[i] != 0) {
      if (!text.empty()) {
        text += ' ';
      }
      text += base_names[i];
      text += exponent_text(sixths_[i]);
    }
  }
  return text.empty() ? "1" : text;
}

std::string Dimension::trade_name() const {
  for (const TradeName& row : trade_names) {
    if (row.dimension == *this) {
      return std::string(row.name);
    }
  }
  return text();
}

}  // namespace bismar
