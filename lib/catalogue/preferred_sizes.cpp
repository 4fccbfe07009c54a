// SPDX-License-Identifier: MIT
#include <bismar/catalogue/preferred_sizes.hpp>

#include <cmath>

#include <bismar/catalogue/stock.hpp>
#include <bismar/error.hpp>

namespace bismar {

namespace {

// A decade and a little: every range that long holds a value of every series.
constexpr double decade = 10.5;

/// The faults of preferred_numbers name the ends of its range: here that is the size, once.
[[noreturn]] void throw_with_place(const Error& error) {
  FaultList faults;
  bool named = false;
  for (Fault fault : error.faults()) {
    if (fault.where == "from" || fault.where == "to") {
      if (named) {
        continue;
      }
      named = true;
      fault.where = "size";
    }
    faults.add(std::move(fault));
  }
  faults.throw_if_any();
  throw InternalError("an error without a fault");
}

}  // namespace

double preferred_at_least(std::string_view series, double size, double unit) {
  try {
    return preferred_numbers(series, size, decade * size, unit).front();
  } catch (const Error& error) {
    throw_with_place(error);
  }
}

double preferred_at_most(std::string_view series, double size, double unit) {
  try {
    return preferred_numbers(series, size / decade, size, unit).back();
  } catch (const Error& error) {
    throw_with_place(error);
  }
}

double preferred_step(std::string_view series) {
  // The decade [1, 10) holds each value of the series once.
  const auto values = preferred_numbers(series, 1.0, 9.999, 1.0);
  return std::pow(10.0, 1.0 / static_cast<double>(values.size()));
}

}  // namespace bismar
