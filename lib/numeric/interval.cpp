// SPDX-License-Identifier: MIT
#include <bismar/numeric/interval.hpp>

#include <bismar/error.hpp>

#include <charconv>
#include <cmath>
#include <string>

namespace bismar {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
// The C library's value is taken to be within three units in the last place; one more is in hand.
constexpr int library_ulps = 4;

double library_below(double value) {
  for (int i = 0; i < library_ulps; ++i) {
    value = next_below(value);
  }
  return value;
}

double library_above(double value) {
  for (int i = 0; i < library_ulps; ++i) {
    value = next_above(value);
  }
  return value;
}

std::string number_text(double value) {
  char buffer[32];
  const auto result = std::to_chars(buffer, buffer + sizeof buffer, value);
  return {buffer, result.ptr};
}

/// x^n by squaring, for x >= 0 and n >= 1.
Interval whole_power(Interval base, unsigned n) {
  while ((n & 1U) == 0U) {
    base *= base;
    n >>= 1U;
  }
  Interval result = base;
  for (n >>= 1U; n != 0U; n >>= 1U) {
    base *= base;
    if ((n & 1U) != 0U) {
      result *= base;
    }
  }
  return result;
}

/// Cube root of one finite x > 0, enclosed: the ends are cubed as intervals and compared with x.
Interval positive_cube_root(double x) {
  // Cubes of roots near the bottom of the range underflow; these two scalings are exact.
  const bool is_small = x < 0x1p-900;
  const double scaled = is_small ? x * 0x1p600 : x;
  const double root = std::cbrt(scaled);
  const auto cube = [](double r) { return Interval(r) * Interval(r) * Interval(r); };
  double lo = next_below(root);
  while (cube(lo).upper() > scaled) {
    lo = next_below(lo);
  }
  double hi = next_above(root);
  while (cube(hi).lower() < scaled) {
    hi = next_above(hi);
  }
  return is_small ? Interval(lo * 0x1p-200, hi * 0x1p-200) : Interval(lo, hi);
}

double cube_root_below(double x) {
  if (x == 0.0 || std::isinf(x)) {
    return x;
  }
  return x > 0.0 ? positive_cube_root(x).lower() : -positive_cube_root(-x).upper();
}

}  // namespace

void Interval::refuse(double lo, double hi) {
  const std::string ends = "[" + number_text(lo) + ", " + number_text(hi) + "]";
  if (std::isnan(lo) || std::isnan(hi)) {
    throw Error(Fault{Code::not_finite,
                      "interval",
                      ends,
                      "numbers or infinities",
                      "an end of the interval " + ends + " is not a number"});
  }
  throw Error(Fault{Code::invalid_argument,
                    "interval",
                    ends,
                    "lower end <= upper end",
                    "the ends of the interval " + ends + " are the wrong way round; swap them"});
}

Interval sqrt(const Interval& x) noexcept {
  if (x.is_empty() || x.hi_ < 0.0) {
    return Interval::empty();
  }
  const double lo = x.lo_ > 0.0 ? next_below(std::sqrt(x.lo_)) : 0.0;
  const double hi = x.hi_ > 0.0 ? next_above(std::sqrt(x.hi_)) : 0.0;
  return Interval::from_ends(lo, hi);
}

Interval cbrt(const Interval& x) noexcept {
  if (x.is_empty()) {
    return x;
  }
  return Interval::from_ends(cube_root_below(x.lo_), 0.0 - cube_root_below(-x.hi_));
}

Interval exp(const Interval& x) noexcept {
  if (x.is_empty()) {
    return x;
  }
  return Interval::from_ends(Interval::greatest(library_below(std::exp(x.lo_)), 0.0),
                             library_above(std::exp(x.hi_)));
}

Interval log(const Interval& x) noexcept {
  if (x.is_empty() || x.hi_ <= 0.0) {
    return Interval::empty();
  }
  const double lo = x.lo_ > 0.0 ? library_below(std::log(x.lo_)) : -infinity;
  return Interval::from_ends(lo, library_above(std::log(x.hi_)));
}

Interval pow(const Interval& x, int n) noexcept {
  if (x.is_empty() || n == 1) {
    return x;
  }
  if (n == 0) {
    return Interval::from_ends(1.0, 1.0);
  }
  const bool is_odd = (n & 1) != 0;
  // -(n + 1) + 1 is the magnitude of every negative int, the least one included.
  const unsigned magnitude =
      n > 0 ? static_cast<unsigned>(n) : static_cast<unsigned>(-(n + 1)) + 1U;
  if (n < 0 && x.contains(0.0)) {
    return Interval::whole_line();
  }
  Interval power;
  if (!is_odd || x.lo_ >= 0.0) {
    power = whole_power(abs(x), magnitude);
  } else if (x.hi_ <= 0.0) {
    power = -whole_power(-x, magnitude);
  } else {
    const double below = -whole_power(Interval::from_ends(0.0, -x.lo_), magnitude).hi_;
    power = Interval::from_ends(below, whole_power(Interval::from_ends(0.0, x.hi_), magnitude).hi_);
  }
  return n > 0 ? power : Interval::from_ends(1.0, 1.0) / power;
}

Interval pow(const Interval& x, double y) {
  if (!std::isfinite(y)) {
    throw Error(Fault{Code::not_finite,
                      "exponent",
                      number_text(y),
                      "a finite number",
                      "the exponent is " + number_text(y) + "; give a finite number"});
  }
  if (x.is_empty() || x.hi_ < 0.0 || (y < 0.0 && x.hi_ == 0.0)) {
    return Interval::empty();
  }
  if (y == 0.0) {
    return Interval::from_ends(1.0, 1.0);
  }
  // x^y rises with x for y > 0 and falls for y < 0.
  const double at_least = y > 0.0 ? x.lo_ : x.hi_;
  const double at_most = y > 0.0 ? x.hi_ : x.lo_;
  double lo = 0.0;
  if (at_least > 0.0 && !(y < 0.0 && at_least == infinity)) {
    lo = Interval::greatest(library_below(std::pow(at_least, y)), 0.0);
  }
  double hi = y > 0.0 ? 0.0 : infinity;
  if (at_most > 0.0) {
    hi = library_above(std::pow(at_most, y));
  }
  return Interval::from_ends(lo, hi);
}

}  // namespace bismar
