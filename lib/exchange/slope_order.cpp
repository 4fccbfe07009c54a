// SPDX-License-Identifier: MIT
#include "exchange/slope_order.hpp"

#include <array>
#include <cmath>
#include <cstddef>

namespace bismar::detail {
namespace {

/// An unevaluated sum, |low| at most half a unit in the last place of high.
struct Pair {
  double high;
  double low;
};

// Error-free sum, difference and product: Knuth, The Art of Computer Programming 2, 3rd ed.,
// section 4.2.2, theorem B (from memory); the product by one fused multiply-add.
Pair exact_sum(double a, double b) {
  const double sum = a + b;
  const double b_part = sum - a;
  return {sum, (a - (sum - b_part)) + (b - b_part)};
}

Pair exact_product(double a, double b) {
  const double product = a * b;
  return {product, std::fma(a, b, -product)};
}

/// a - b > 0 as mantissa and exponent: high in [1, 2).
struct Difference {
  Difference(double a, double b) : value(exact_sum(a, -b)), exponent(std::ilogb(value.high)) {
    value.high = std::scalbn(value.high, -exponent);
    value.low = std::scalbn(value.low, -exponent);
    if (std::abs(value.low) < 0x1p-400) {
      value.low = 0.0;  // products of such parts would underflow
    }
  }

  Pair value;
  int exponent;
};

/// A sum of doubles without rounding: parts that do not overlap, the greatest last (Shewchuk,
/// Adaptive Precision Floating-Point Arithmetic, Discrete Comput. Geom. 18 (1997) 305-363, theorem
/// 10; from memory).
class ExactSum {
 public:
  void add(double term) {
    for (std::size_t i = 0; i < size_; ++i) {
      const Pair pair = exact_sum(term, parts_[i]);
      term = pair.high;
      parts_[i] = pair.low;
    }
    parts_[size_++] = term;
  }

  void add_product(const Pair& a, const Pair& b, double factor) {
    for (const double x : {a.high, a.low}) {
      for (const double y : {b.high, b.low}) {
        const Pair product = exact_product(x, y);
        add(factor * product.high);
        add(factor * product.low);
      }
    }
  }

  [[nodiscard]] int sign() const {
    for (std::size_t i = size_; i-- > 0;) {
      if (parts_[i] != 0.0) {
        return parts_[i] > 0.0 ? 1 : -1;
      }
    }
    return 0;
  }

 private:
  std::array<double, 16> parts_{};
  std::size_t size_ = 0;
};

}  // namespace

int compare_exchange(const TradePoint& u, const TradePoint& v, const TradePoint& w) {
  const Difference cost_uv(v.cost, u.cost);
  const Difference cost_vw(w.cost, v.cost);
  const Difference priced_uv(u.priced, v.priced);
  const Difference priced_vw(v.priced, w.priced);

  // The mantissa products are in [1, 4), so exponents more than two apart decide alone.
  const int shift =
      (cost_uv.exponent + priced_vw.exponent) - (cost_vw.exponent + priced_uv.exponent);
  if (shift > 2 || shift < -2) {
    return shift > 0 ? 1 : -1;
  }
  const double factor = std::scalbn(1.0, shift);
  const double left = factor * (cost_uv.value.high * priced_vw.value.high);
  const double right = cost_vw.value.high * priced_uv.value.high;
  // Each side is within 3 * 2^-53 of its exact value, relatively, and the comparison rounds once.
  if (std::abs(left - right) > 0x1p-50 * (left + right)) {
    return left > right ? 1 : -1;
  }
  ExactSum sum;
  sum.add_product(cost_uv.value, priced_vw.value, factor);
  sum.add_product(cost_vw.value, priced_uv.value, -1.0);
  return sum.sign();
}

}  // namespace bismar::detail
