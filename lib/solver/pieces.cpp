// SPDX-License-Identifier: MIT
#include "solver/pieces.hpp"

#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

}  // namespace

std::size_t count_stretches(const Variable& variable, double lower, double upper) {
  if (variable.kind == Variable::Kind::integer) {
    return lower <= upper ? 1 : 0;
  }
  if (variable.kind == Variable::Kind::ordered_set) {
    const auto from = std::lower_bound(variable.values.begin(), variable.values.end(), lower);
    const auto to = std::upper_bound(from, variable.values.end(), upper);
    return static_cast<std::size_t>(to - from);
  }
  return 1 + static_cast<std::size_t>(std::count_if(
                 variable.breakpoints.begin(), variable.breakpoints.end(), [&](double at) {
                   return at >= lower && at < upper;
                 }));
}

void append_stretches(const Variable& variable,
                      double lower,
                      double upper,
                      std::vector<Stretch>& out) {
  if (variable.kind == Variable::Kind::ordered_set) {
    // Nothing is known between the values of a set: each is a piece of its own.
    for (const double value : variable.values) {
      if (value >= lower && value <= upper) {
        out.push_back({value, value});
      }
    }
    return;
  }
  double from = lower;
  for (const double breakpoint : variable.breakpoints) {
    if (breakpoint >= from && breakpoint < upper) {
      out.push_back({from, breakpoint});
      from = std::nextafter(breakpoint, infinity);
    }
  }
  out.push_back({from, upper});
}

bool has_breakpoint_inside(const Variable& variable, double lower, double upper) {
  return variable.kind == Variable::Kind::continuous &&
         std::any_of(variable.breakpoints.begin(), variable.breakpoints.end(), [&](double at) {
           return at >= lower && at < upper;
         });
}

std::optional<double> least_on_piece(FunctionRef<double(double)> largest_falling,
                                     double from,
                                     double to) {
  if (from > 0.0) {
    return smallest_feasible(largest_falling, from, to).x;
  }
  if (from == to) {
    return largest_falling(to) <= 1.0 ? std::optional<double>(to) : std::nullopt;
  }
  // The root finder works on ratios: where the range reaches zero it is moved to [width, 2 width].
  const double width = to - from;
  const auto at = [&](double t) { return std::clamp(from + (t - width), from, to); };
  const auto bracket =
      smallest_feasible([&](double t) { return largest_falling(at(t)); }, width, 2.0 * width);
  return bracket.x ? std::optional<double>(at(*bracket.x)) : std::nullopt;
}

}  // namespace bismar
