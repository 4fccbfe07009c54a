// SPDX-License-Identifier: MIT
#include <bismar/exchange/penalty.hpp>

#include <bismar/error.hpp>

#include <charconv>
#include <cmath>
#include <string>

namespace bismar {
namespace {

double checked(double per_kilogram) {
  if (std::isfinite(per_kilogram) && per_kilogram >= 0.0) {
    return per_kilogram + 0.0;  // -0.0 becomes 0.0
  }
  char buffer[32];
  const auto end = std::to_chars(buffer, buffer + sizeof buffer, per_kilogram).ptr;
  const std::string found(buffer, end);
  throw Error(Fault{std::isfinite(per_kilogram) ? Code::out_of_range : Code::not_finite,
                    "exchange constant",
                    found + " per kg",
                    "finite, 0 or more",
                    "the exchange constant is " + found +
                        " per kg; give a finite number that is not below zero"});
}

}  // namespace

ExchangeConstant ExchangeConstant::per_kilogram(double value) {
  return ExchangeConstant(checked(value));
}

ExchangeConstant ExchangeConstant::per_gram(double value) {
  return ExchangeConstant(checked(value * 1000.0));
}

ExchangeConstant ExchangeConstant::per_pound(double value) {
  return ExchangeConstant(checked(value / 0.45359237));
}

double linear_penalty(ExchangeConstant alpha, const CostAndMass& design) noexcept {
  return design.cost + alpha.value_per_kilogram() * design.mass;
}

}  // namespace bismar
