// SPDX-License-Identifier: MIT
#pragma once

#include <string>

namespace bismar::mechanics {

/// A number with `digits` significant digits, trailing zeros dropped; "infinity" for what a
/// utilisation of no resistance gives. Locale-independent.
std::string number(double value, int digits = 4);

// SI values in the units of the trade, with the unit's name.
std::string millimetres(double metres);
std::string square_millimetres(double square_metres);
std::string cubic_millimetres(double cubic_metres);
std::string fourth_millimetres(double metres_to_the_fourth);
std::string megapascals(double pascals);
std::string gigapascals(double pascals);
std::string kilonewtons(double newtons);
std::string newton_metres(double value);
std::string degrees(double radians);

}  // namespace bismar::mechanics
