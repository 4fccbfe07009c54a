// SPDX-License-Identifier: MIT
// Private to the quantity floor: the arithmetic of units, kept in whole numbers as long as they
// last.
#pragma once

#include "unit_table.hpp"

#include <bismar/quantity/unit.hpp>

#include <cstdint>
#include <optional>

namespace bismar {

/// numerator * 10^power_of_ten / denominator with its dimension. Powers of ten are added up, not
/// multiplied out, so that g/cm3 becomes 10^3 exactly.
struct UnitProduct {
  double numerator = 1.0;
  double denominator = 1.0;
  int power_of_ten = 0;
  Dimension dimension;
  std::uint8_t bases = 0;

  [[nodiscard]] static UnitProduct of(const UnitSymbol& symbol);
  [[nodiscard]] static UnitProduct of_currency(double rate);

  void multiply_by(const UnitProduct& other);
  void divide_by(const UnitProduct& other);

  /// This product to the power sixths / 6; absent when the dimension does not allow it.
  [[nodiscard]] std::optional<UnitProduct> to_power(int sixths) const;

  /// Multiplied out and reduced; absent when a factor leaves the range of double.
  [[nodiscard]] std::optional<Unit> finished() const;
};

}  // namespace bismar
