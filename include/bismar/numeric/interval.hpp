// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <bit>
#include <cfloat>
#include <cstdint>
#include <limits>

#if defined(__FAST_MATH__) || (defined(__FINITE_MATH_ONLY__) && __FINITE_MATH_ONLY__)
#error \
    "bismar: intervals are not rigorous under -ffast-math or -ffinite-math-only; compile without it"
#endif
#if FLT_EVAL_METHOD != 0
#error "bismar: intervals need double arithmetic in double (on x86: -msse2 -mfpmath=sse)"
#endif

namespace bismar {

/// The next double above x; +infinity stays, -infinity becomes the most negative double. Not for
/// NaN.
[[nodiscard]] constexpr double next_above(double x) noexcept {
  if (x == 0.0) {
    return std::numeric_limits<double>::denorm_min();
  }
  if (x == std::numeric_limits<double>::infinity()) {
    return x;
  }
  const auto bits = std::bit_cast<std::uint64_t>(x);
  return std::bit_cast<double>(x > 0.0 ? bits + 1U : bits - 1U);
}

/// The next double below x; -infinity stays, +infinity becomes the greatest double. Not for NaN.
[[nodiscard]] constexpr double next_below(double x) noexcept { return -next_above(-x); }

/// A closed interval of real numbers that encloses: the result of every function here contains the
/// true result for every choice of members of its arguments.
///
/// How: each end is computed in round to nearest and then moved outward; no rounding mode is
/// switched, so the thread must be in round to nearest with subnormals kept (`FloatingPointGuard`).
/// + - * / sqrt square: one double outward, an end that is exactly zero stays zero. Whole powers:
/// that once per multiplication, which leaves each end within 3 |n| doubles of the true one. cbrt:
/// verified by cubing, no trust in the C library. exp, log, pow with a real exponent: four doubles
/// outward of the C library's value, which must be within three units in the last place (the GNU C
/// Library manual, section Known Maximum Errors in Math Functions, states at most 1 for these three
/// on every listed machine; from memory; the tests compare with MPFR).
///
/// Rules for the edges:
/// - Ends may be infinite; the interval is then unbounded there. Infinity itself is no member, but
///   `contains` accepts it at an infinite end, because a double that overflowed stands for a number
///   beyond the greatest double.
/// - NaN is refused where an interval is made, and no function makes one.
/// - The empty interval: every function of it is empty, `hull` with it is the other one, it
///   intersects and contains nothing.
/// - Members outside a function's domain contribute nothing: sqrt([-1, 4]) holds [0, 2] and
///   sqrt([-2, -1]) is empty.
/// - Functions are found by their argument, so `sqrt(x)` after `using std::sqrt;` serves double and
///   Interval alike.
/// - Division by an interval that contains zero is the whole line, whatever is divided (unless it
/// is
///   empty); so is a negative whole power of one.
class Interval {
 public:
  /// [0, 0].
  constexpr Interval() noexcept = default;

  /// The one number x; an infinite x gives everything beyond the greatest double on that side.
  /// Implicit, because formulas mix numbers and intervals.
  /// @throws bismar::Error  not_finite: x is NaN.
  constexpr Interval(double x) : Interval(x, x) {}  // NOLINT(google-explicit-constructor)

  /// All numbers from lo to hi.
  /// @throws bismar::Error  not_finite: an end is NaN; invalid_argument: lo > hi.
  constexpr Interval(double lo, double hi) : lo_(lo), hi_(hi) {
    if (!(lo <= hi)) {
      refuse(lo, hi);
    }
    // No end may be an infinity of the wrong side: -infinity is never an upper end.
    lo_ = lo == infinity ? std::numeric_limits<double>::max() : lo;
    hi_ = hi == -infinity ? std::numeric_limits<double>::lowest() : hi;
  }

  [[nodiscard]] static constexpr Interval empty() noexcept {
    return from_ends(infinity, -infinity);
  }
  [[nodiscard]] static constexpr Interval whole_line() noexcept {
    return from_ends(-infinity, infinity);
  }

  /// The lower end; +infinity for the empty interval.
  [[nodiscard]] constexpr double lower() const noexcept { return lo_; }
  /// The upper end; -infinity for the empty interval.
  [[nodiscard]] constexpr double upper() const noexcept { return hi_; }
  [[nodiscard]] constexpr bool is_empty() const noexcept { return !(lo_ <= hi_); }
  [[nodiscard]] constexpr bool contains(double x) const noexcept { return lo_ <= x && x <= hi_; }
  /// Whether every member of `other` is a member; true for an empty `other`.
  [[nodiscard]] constexpr bool contains(const Interval& other) const noexcept {
    return other.is_empty() || (lo_ <= other.lo_ && other.hi_ <= hi_);
  }
  [[nodiscard]] constexpr bool intersects(const Interval& other) const noexcept {
    return !is_empty() && !other.is_empty() && lo_ <= other.hi_ && other.lo_ <= hi_;
  }

  /// Equal as sets.
  friend constexpr bool operator==(const Interval& a, const Interval& b) noexcept {
    return (a.is_empty() && b.is_empty()) || (a.lo_ == b.lo_ && a.hi_ == b.hi_);
  }

  /// Exact.
  friend constexpr Interval operator-(const Interval& a) noexcept {
    return from_ends(-a.hi_, -a.lo_);
  }
  friend constexpr Interval operator+(const Interval& a) noexcept { return a; }

  friend constexpr Interval operator+(const Interval& a, const Interval& b) noexcept {
    if (a.is_empty() || b.is_empty()) {
      return empty();
    }
    return from_ends(below(a.lo_ + b.lo_), above(a.hi_ + b.hi_));
  }

  friend constexpr Interval operator-(const Interval& a, const Interval& b) noexcept {
    return a + (-b);
  }

  friend constexpr Interval operator*(const Interval& a, const Interval& b) noexcept {
    if (a.is_empty() || b.is_empty()) {
      return empty();
    }
    if (a.lo_ >= 0.0 && b.lo_ >= 0.0) {
      return from_ends(product_below(a.lo_, b.lo_), product_above(a.hi_, b.hi_));
    }
    return from_ends(least(least(product_below(a.lo_, b.lo_), product_below(a.lo_, b.hi_)),
                           least(product_below(a.hi_, b.lo_), product_below(a.hi_, b.hi_))),
                     greatest(greatest(product_above(a.lo_, b.lo_), product_above(a.lo_, b.hi_)),
                              greatest(product_above(a.hi_, b.lo_), product_above(a.hi_, b.hi_))));
  }

  friend constexpr Interval operator/(const Interval& a, const Interval& b) noexcept {
    if (a.is_empty() || b.is_empty()) {
      return empty();
    }
    if (b.lo_ <= 0.0 && b.hi_ >= 0.0) {
      return whole_line();
    }
    if (b.hi_ < 0.0) {
      return (-a) / (-b);
    }
    // b is positive: the lower end divides by the end that makes it least.
    return from_ends(quotient_below(a.lo_, a.lo_ >= 0.0 ? b.hi_ : b.lo_),
                     quotient_above(a.hi_, a.hi_ >= 0.0 ? b.lo_ : b.hi_));
  }

  Interval& operator+=(const Interval& b) noexcept { return *this = *this + b; }
  Interval& operator-=(const Interval& b) noexcept { return *this = *this - b; }
  Interval& operator*=(const Interval& b) noexcept { return *this = *this * b; }
  Interval& operator/=(const Interval& b) noexcept { return *this = *this / b; }

  /// x^2 of one x: tighter than x * x where x may be of either sign.
  friend constexpr Interval square(const Interval& x) noexcept {
    const Interval magnitude = abs(x);
    return magnitude * magnitude;
  }
  /// Exact.
  friend constexpr Interval abs(const Interval& x) noexcept {
    if (x.is_empty() || x.lo_ >= 0.0) {
      return x;
    }
    if (x.hi_ <= 0.0) {
      return -x;
    }
    return from_ends(0.0, greatest(-x.lo_, x.hi_));
  }
  /// Exact: the least of one member of each.
  friend constexpr Interval min(const Interval& a, const Interval& b) noexcept {
    if (a.is_empty() || b.is_empty()) {
      return empty();
    }
    return from_ends(least(a.lo_, b.lo_), least(a.hi_, b.hi_));
  }
  /// Exact: the greatest of one member of each.
  friend constexpr Interval max(const Interval& a, const Interval& b) noexcept {
    if (a.is_empty() || b.is_empty()) {
      return empty();
    }
    return from_ends(greatest(a.lo_, b.lo_), greatest(a.hi_, b.hi_));
  }
  /// Exact: the smallest interval that contains both.
  friend constexpr Interval hull(const Interval& a, const Interval& b) noexcept {
    return from_ends(least(a.lo_, b.lo_), greatest(a.hi_, b.hi_));
  }
  /// Exact: the members of both; empty when there are none.
  friend constexpr Interval intersection(const Interval& a, const Interval& b) noexcept {
    return a.intersects(b) ? from_ends(greatest(a.lo_, b.lo_), least(a.hi_, b.hi_)) : empty();
  }

  friend BISMAR_API Interval sqrt(const Interval& x) noexcept;
  friend BISMAR_API Interval cbrt(const Interval& x) noexcept;
  friend BISMAR_API Interval exp(const Interval& x) noexcept;
  /// Natural logarithm of the positive members; the lower end is -infinity where x reaches zero.
  friend BISMAR_API Interval log(const Interval& x) noexcept;
  /// x^n; n = 0 gives [1, 1], as std::pow does.
  friend BISMAR_API Interval pow(const Interval& x, int n) noexcept;
  /// x^y of the members x >= 0 (x > 0 for y < 0; the upper end is then +infinity where x reaches
  /// zero); y = 0 gives [1, 1].
  /// @throws bismar::Error  not_finite: y is NaN or infinite.
  friend BISMAR_API Interval pow(const Interval& x, double y);

 private:
  static constexpr double infinity = std::numeric_limits<double>::infinity();

  [[noreturn]] BISMAR_API static void refuse(double lo, double hi);

  static constexpr Interval from_ends(double lo, double hi) noexcept {
    Interval result;
    result.lo_ = lo;
    result.hi_ = hi;
    return result;
  }
  static constexpr double least(double a, double b) noexcept { return b < a ? b : a; }
  static constexpr double greatest(double a, double b) noexcept { return a < b ? b : a; }

  // A sum that is zero in double is exactly zero: sums do not underflow.
  static constexpr double below(double sum) noexcept { return sum == 0.0 ? 0.0 : next_below(sum); }
  static constexpr double above(double sum) noexcept { return sum == 0.0 ? 0.0 : next_above(sum); }

  // A product that is zero in double is zero or has underflowed; its sign is known either way. Zero
  // times an infinite end is zero, since infinity is no member.
  static constexpr double product_below(double a, double b) noexcept {
    if (a == 0.0 || b == 0.0) {
      return 0.0;
    }
    const double p = a * b;
    return p == 0.0 && (a > 0.0) == (b > 0.0) ? 0.0 : next_below(p);
  }
  static constexpr double product_above(double a, double b) noexcept {
    return 0.0 - product_below(-a, b);
  }
  // For b > 0. An infinite b only ever bounds a quotient towards zero.
  static constexpr double quotient_below(double a, double b) noexcept {
    if (a == 0.0 || (b == infinity && a > 0.0)) {
      return 0.0;
    }
    const double q = a / b;
    return q == 0.0 && a > 0.0 ? 0.0 : next_below(q);
  }
  static constexpr double quotient_above(double a, double b) noexcept {
    return 0.0 - quotient_below(-a, b);
  }

  double lo_ = 0.0;
  double hi_ = 0.0;
};

}  // namespace bismar
