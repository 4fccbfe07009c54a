// SPDX-License-Identifier: MIT
#include "unit_product.hpp"

#include <cmath>
#include <cstddef>
#include <cstdlib>
#include <numeric>

namespace bismar {

namespace {

constexpr double exact_limit = 9007199254740992.0;  // 2^53
constexpr int largest_power_of_ten = 280;

std::uint8_t bases_of(const Dimension& dimension) {
  unsigned bits = 0;
  for (std::size_t i = 0; i < base_count; ++i) {
    if (dimension.sixths(static_cast<Base>(i)) != 0) {
      bits |= 1U << i;
    }
  }
  return static_cast<std::uint8_t>(bits);
}

double whole_power(double x, int n) {
  double power = 1.0;
  for (int i = 0; i < n; ++i) {
    power *= x;
  }
  return power;
}

/// x^(sixths/6) for sixths >= 0. Square roots are taken apart from the rest because they are
/// correctly rounded everywhere, which std::pow is not.
double sixths_power(double x, int sixths) {
  if (x == 1.0) {
    return 1.0;
  }
  if (sixths % 6 == 0) {
    return whole_power(x, sixths / 6);
  }
  if (sixths % 3 == 0) {
    return whole_power(x, sixths / 6) * std::sqrt(x);
  }
  return std::pow(x, sixths / 6.0);
}

double ten_to(int n) {
  constexpr int exact_powers = 22;  // 10^22 is the last power of ten that a double holds exactly
  double power = 1.0;
  while (n > exact_powers) {
    power *= 1e22;
    n -= exact_powers;
  }
  return power * whole_power(10.0, n);
}

bool is_exact_whole(double x) { return x < exact_limit && x == std::floor(x); }

bool is_usable(double x) { return x > 1e-280 && x < 1e280; }

}  // namespace

UnitProduct UnitProduct::of(const UnitSymbol& symbol) {
  return {symbol.numerator,
          symbol.denominator,
          symbol.power_of_ten,
          symbol.dimension,
          bases_of(symbol.dimension)};
}

UnitProduct UnitProduct::of_currency(double rate) {
  return {rate, 1.0, 0, dimension::currency, bases_of(dimension::currency)};
}

void UnitProduct::multiply_by(const UnitProduct& other) {
  numerator *= other.numerator;
  denominator *= other.denominator;
  power_of_ten += other.power_of_ten;
  dimension = dimension * other.dimension;
  bases = static_cast<std::uint8_t>(bases | other.bases);
}

void UnitProduct::divide_by(const UnitProduct& other) {
  numerator *= other.denominator;
  denominator *= other.numerator;
  power_of_ten -= other.power_of_ten;
  dimension = dimension / other.dimension;
  bases = static_cast<std::uint8_t>(bases | other.bases);
}

std::optional<UnitProduct> UnitProduct::to_power(int sixths) const {
  for (std::size_t i = 0; i < base_count; ++i) {
    if (dimension.sixths(static_cast<Base>(i)) * sixths % 6 != 0) {
      return std::nullopt;
    }
  }
  const int size = std::abs(sixths);
  UnitProduct raised;
  raised.numerator = sixths_power(sixths < 0 ? denominator : numerator, size);
  raised.denominator = sixths_power(sixths < 0 ? numerator : denominator, size);
  raised.dimension = dimension.to_power(sixths, 6);
  raised.bases = bases;

  int ten_sixths = power_of_ten * sixths;
  const int rest = ((ten_sixths % 6) + 6) % 6;
  ten_sixths -= rest;  // now a multiple of six
  raised.power_of_ten = ten_sixths / 6;
  raised.numerator *= sixths_power(10.0, rest);
  return raised;
}

std::optional<Unit> UnitProduct::finished() const {
  if (std::abs(power_of_ten) > largest_power_of_ten) {
    return std::nullopt;
  }
  Unit unit;
  unit.multiply = power_of_ten > 0 ? numerator * ten_to(power_of_ten) : numerator;
  unit.divide = power_of_ten < 0 ? denominator * ten_to(-power_of_ten) : denominator;
  unit.dimension = dimension;
  unit.bases = bases;
  if (!is_usable(unit.multiply) || !is_usable(unit.divide)) {
    return std::nullopt;
  }
  const bool both_act = unit.multiply != 1.0 && unit.divide != 1.0;
  if (both_act && is_exact_whole(unit.multiply) && is_exact_whole(unit.divide)) {
    const auto common = static_cast<double>(std::gcd(static_cast<std::uint64_t>(unit.multiply),
                                                     static_cast<std::uint64_t>(unit.divide)));
    unit.multiply /= common;
    unit.divide /= common;
  }
  return unit;
}

}  // namespace bismar
