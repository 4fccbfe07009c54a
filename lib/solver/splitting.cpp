// SPDX-License-Identifier: MIT
#include "solver/splitting.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>

namespace bismar {

namespace {

using Kind = Variable::Kind;

std::ptrdiff_t rank_of(const Variable& variable, double value) {
  return std::lower_bound(variable.values.begin(), variable.values.end(), value) -
         variable.values.begin();
}

double plain_middle(const Variable& variable, double lower, double upper) {
  // Widths below a few thousandths have one middle for all purposes, and no roots to take.
  return variable.lower > 0.0 && upper > 1.01 * lower ? std::sqrt(lower) * std::sqrt(upper)
                                                      : lower + 0.5 * (upper - lower);
}

}  // namespace

Parts whole_range(const Variable& variable) {
  switch (variable.kind) {
    case Kind::integer:
      return {std::ceil(variable.lower), std::floor(variable.upper)};
    case Kind::ordered_set:
      return {variable.values.front(), variable.values.back()};
    case Kind::continuous:
      break;
  }
  return {variable.lower, variable.upper};
}

double middle_of(const Variable& variable, double lower, double upper) {
  switch (variable.kind) {
    case Kind::integer:
      return lower + std::floor(0.5 * (upper - lower));
    case Kind::ordered_set: {
      const auto middle = (rank_of(variable, lower) + rank_of(variable, upper)) / 2;
      return variable.values[static_cast<std::size_t>(middle)];
    }
    case Kind::continuous:
      break;
  }
  return std::clamp(plain_middle(variable, lower, upper), lower, upper);
}

Parts cut_in_two(const Variable& variable, double lower, double upper) {
  const double middle = middle_of(variable, lower, upper);
  if (variable.kind == Kind::integer) {
    return {middle, middle + 1.0};
  }
  if (variable.kind == Kind::ordered_set) {
    return {middle, variable.values[static_cast<std::size_t>(rank_of(variable, middle)) + 1]};
  }
  double nearest = std::numeric_limits<double>::quiet_NaN();
  for (const double at : variable.breakpoints) {
    if (at >= lower && at < upper && !(std::abs(at - middle) >= std::abs(nearest - middle))) {
      nearest = at;
    }
  }
  if (!std::isnan(nearest)) {
    return {nearest, std::nextafter(nearest, std::numeric_limits<double>::infinity())};
  }
  return middle > lower && middle < upper ? Parts{middle, middle} : Parts{lower, upper};
}

double width_of(const Variable& variable, double lower, double upper) {
  if (variable.kind == Kind::ordered_set) {
    return static_cast<double>(rank_of(variable, upper) - rank_of(variable, lower));
  }
  return variable.lower > 0.0 ? std::log(upper / lower) : upper - lower;
}

bool snap_inward(const Variable& variable, double& lower, double& upper) {
  if (variable.kind == Kind::integer) {
    lower = std::ceil(lower);
    upper = std::floor(upper);
  } else if (variable.kind == Kind::ordered_set) {
    const auto& values = variable.values;
    const auto from = std::lower_bound(values.begin(), values.end(), lower);
    const auto to = std::upper_bound(values.begin(), values.end(), upper);
    if (from >= to) {
      return false;
    }
    lower = *from;
    upper = *std::prev(to);
  }
  return lower <= upper;
}

}  // namespace bismar
