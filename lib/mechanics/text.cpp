// SPDX-License-Identifier: MIT
#include "mechanics/text.hpp"

#include <bismar/quantity/format.hpp>

#include <cmath>
#include <numbers>
#include <string>

namespace bismar::mechanics {

namespace {

std::string with_unit(double value, const char* unit) { return number(value) + " " + unit; }

}  // namespace

std::string number(double value, int digits) {
  if (!std::isfinite(value)) {
    return std::isnan(value) ? "not a number" : value > 0.0 ? "infinity" : "-infinity";
  }
  std::string text = format_significant(value, digits);
  // Inside a sentence "20 mm" reads better than "20.00 mm".
  if (text.find('.') != std::string::npos && text.find('e') == std::string::npos) {
    text.erase(text.find_last_not_of('0') + 1);
    if (text.back() == '.') {
      text.pop_back();
    }
  }
  return text;
}

std::string millimetres(double metres) { return with_unit(metres * 1e3, "mm"); }
std::string square_millimetres(double square_metres) {
  return with_unit(square_metres * 1e6, "mm2");
}
std::string cubic_millimetres(double cubic_metres) { return with_unit(cubic_metres * 1e9, "mm3"); }
std::string fourth_millimetres(double metres_to_the_fourth) {
  return with_unit(metres_to_the_fourth * 1e12, "mm4");
}
std::string megapascals(double pascals) { return with_unit(pascals * 1e-6, "MPa"); }
std::string gigapascals(double pascals) { return with_unit(pascals * 1e-9, "GPa"); }
std::string kilonewtons(double newtons) { return with_unit(newtons * 1e-3, "kN"); }
std::string newton_metres(double value) { return with_unit(value, "N m"); }
std::string degrees(double radians) {
  const double value = radians * 180.0 / std::numbers::pi;
  return with_unit(value, number(value) == "1" ? "degree" : "degrees");
}

}  // namespace bismar::mechanics
