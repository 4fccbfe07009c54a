// SPDX-License-Identifier: MIT
//
// GNU MPFR as the judge: a correctly rounded library for arbitrary precision. Each function is
// computed at the ends and at random members of random intervals with 256 bits; the interval must
// contain the value (compared exactly, not after rounding to double) and its ends must be near the
// true ones. How verified: recomputed by the library at each run of this test.
#include <bismar/numeric/interval.hpp>

#include <mpfr.h>

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <random>

#include "support/catch.hpp"

using bismar::Interval;

namespace {

constexpr int cases = 100'000;

class Real {
 public:
  Real() { mpfr_init2(value_, 256); }
  explicit Real(double x) : Real() { mpfr_set_d(value_, x, MPFR_RNDN); }
  ~Real() { mpfr_clear(value_); }
  Real(const Real&) = delete;
  Real& operator=(const Real&) = delete;

  [[nodiscard]] mpfr_ptr get() { return value_; }
  [[nodiscard]] mpfr_srcptr get() const { return value_; }

 private:
  mpfr_t value_;
};

/// Whether the true value is a member. The judge rounds at 2^-256 relatively; a true value that is
/// a double (4 = 2^2, say) is exact there, and no other value comes that near to a double.
bool contains(const Interval& interval, const Real& value) {
  return mpfr_cmp_d(value.get(), interval.lower()) >= 0 &&
         mpfr_cmp_d(value.get(), interval.upper()) <= 0;
}

/// How many doubles the interval around one point is wide.
double width_in_ulps(const Interval& interval) {
  double steps = 0.0;
  for (double x = interval.lower(); x < interval.upper() && steps < 1000.0;
       x = bismar::next_above(x)) {
    steps += 1.0;
  }
  return steps;
}

class Random {
 public:
  /// Any size that occurs and some that do not; either sign.
  double any() {
    const double magnitude = std::exp2(exponent_(engine_)) * (1.0 + unit_(engine_));
    return (engine_() & 1U) != 0U ? magnitude : -magnitude;
  }
  double unit() { return unit_(engine_); }
  int whole(int least, int greatest) {
    return std::uniform_int_distribution<int>(least, greatest)(engine_);
  }
  Interval interval(double a, double b) { return {std::min(a, b), std::max(a, b)}; }
  /// An end or something between.
  double member(const Interval& x) {
    const int which = whole(0, 3);
    if (which == 0 || which == 1) {
      return which == 0 ? x.lower() : x.upper();
    }
    return std::clamp(x.lower() + unit() * (x.upper() - x.lower()), x.lower(), x.upper());
  }

 private:
  std::mt19937_64 engine_{987654321};
  std::uniform_real_distribution<double> exponent_{-300.0, 300.0};
  std::uniform_real_distribution<double> unit_{0.0, 1.0};
};

using Unary = std::function<Interval(const Interval&)>;
using Judge = std::function<void(mpfr_ptr, mpfr_srcptr)>;

/// `sample` gives the ends of intervals. Wide intervals are checked for enclosure, points for
/// width.
void judge_unary(const Unary& function,
                 const Judge& judge,
                 const std::function<double(Random&)>& sample,
                 double greatest_width) {
  Random random;
  int outside = 0;
  double widest = 0.0;
  for (int i = 0; i < cases; ++i) {
    const double a = sample(random);
    const Interval x = i % 2 == 0 ? Interval(a) : random.interval(a, sample(random));
    const Interval result = function(x);
    Real value;
    judge(value.get(), Real(random.member(x)).get());
    outside += contains(result, value) ? 0 : 1;
    // Near the bottom of the range one step is a large part of the value: no claim on width there.
    if (i % 2 == 0 && std::abs(result.lower()) > 1e-290 && std::isfinite(result.upper())) {
      widest = std::max(widest, width_in_ulps(result));
    }
  }
  CHECK(outside == 0);
  CHECK(widest <= greatest_width);
  CHECK(widest > 0.0);
}

using Binary = std::function<Interval(const Interval&, const Interval&)>;
using BinaryJudge = std::function<int(mpfr_ptr, mpfr_srcptr, mpfr_srcptr, mpfr_rnd_t)>;

void judge_binary(const Binary& function, const BinaryJudge& judge, double greatest_width) {
  Random random;
  int outside = 0;
  double widest = 0.0;
  for (int i = 0; i < cases; ++i) {
    const double a = random.any();
    // Near neighbours too, so that sums cancel.
    const double b = i % 3 == 0 ? -a * (1.0 + 1e-3 * random.unit()) : random.any();
    const bool is_point = i % 2 == 0;
    const Interval x = is_point ? Interval(a) : random.interval(a, a * (1.0 + random.unit()));
    const Interval y = is_point ? Interval(b) : random.interval(b, b * (1.0 + random.unit()));
    const Interval result = function(x, y);
    Real value;
    judge(value.get(), Real(random.member(x)).get(), Real(random.member(y)).get(), MPFR_RNDN);
    outside += contains(result, value) ? 0 : 1;
    if (is_point && std::abs(result.lower()) > 1e-290 && std::isfinite(result.upper())) {
      widest = std::max(widest, width_in_ulps(result));
    }
  }
  CHECK(outside == 0);
  CHECK(widest <= greatest_width);
  CHECK(widest > 0.0);
}

double positive(Random& random) { return std::abs(random.any()); }
double either_sign(Random& random) { return random.any(); }

}  // namespace

TEST_CASE("sums, differences, products and quotients enclose MPFR's") {
  judge_binary([](const Interval& a, const Interval& b) { return a + b; }, mpfr_add, 2.0);
  judge_binary([](const Interval& a, const Interval& b) { return a - b; }, mpfr_sub, 2.0);
  judge_binary([](const Interval& a, const Interval& b) { return a * b; }, mpfr_mul, 2.0);
  judge_binary([](const Interval& a, const Interval& b) { return a / b; }, mpfr_div, 2.0);
}

TEST_CASE("square roots, squares and cube roots enclose MPFR's") {
  judge_unary([](const Interval& x) { return sqrt(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_sqrt(r, x, MPFR_RNDN); },
              positive,
              2.0);
  judge_unary([](const Interval& x) { return square(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_sqr(r, x, MPFR_RNDN); },
              either_sign,
              2.0);
  judge_unary([](const Interval& x) { return cbrt(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_cbrt(r, x, MPFR_RNDN); },
              either_sign,
              12.0);
}

TEST_CASE("exponentials and logarithms enclose MPFR's") {
  judge_unary([](const Interval& x) { return exp(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_exp(r, x, MPFR_RNDN); },
              [](Random& random) { return 1500.0 * random.unit() - 750.0; },
              8.0);
  judge_unary([](const Interval& x) { return exp(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_exp(r, x, MPFR_RNDN); },
              [](Random& random) { return 2.0 * random.unit() - 1.0; },
              8.0);
  judge_unary([](const Interval& x) { return log(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_log(r, x, MPFR_RNDN); },
              positive,
              8.0);
  judge_unary([](const Interval& x) { return log(x); },
              [](mpfr_ptr r, mpfr_srcptr x) { mpfr_log(r, x, MPFR_RNDN); },
              [](Random& random) { return 0.9 + 0.2 * random.unit(); },
              8.0);
}

TEST_CASE("whole powers enclose MPFR's") {
  for (const int n : {-7, -3, -2, -1, 2, 3, 4, 5, 8, 13}) {
    judge_unary([n](const Interval& x) { return pow(x, n); },
                [n](mpfr_ptr r, mpfr_srcptr x) { mpfr_pow_si(r, x, n, MPFR_RNDN); },
                [](Random& random) {
                  const double x = std::exp2(40.0 * random.unit() - 20.0);
                  return random.whole(0, 1) == 0 ? x : -x;
                },
                6.0 * std::abs(n));
  }
}

TEST_CASE("powers with a real exponent enclose MPFR's") {
  Random random;
  int outside = 0;
  double widest = 0.0;
  for (int i = 0; i < cases; ++i) {
    const double a = positive(random);
    const bool is_point = i % 2 == 0;
    const Interval x = is_point ? Interval(a) : random.interval(a, a * (1.0 + random.unit()));
    const double y = i % 5 == 0 ? 8.0 * random.unit() - 4.0
                                : (i % 5 == 1 ? 1.0 / 3.0 : 2.0 * random.unit() - 1.0);
    const Interval result = pow(x, y);
    Real value;
    mpfr_pow(value.get(), Real(random.member(x)).get(), Real(y).get(), MPFR_RNDN);
    outside += contains(result, value) ? 0 : 1;
    if (is_point && result.lower() > 1e-290 && std::isfinite(result.upper())) {
      widest = std::max(widest, width_in_ulps(result));
    }
  }
  CHECK(outside == 0);
  CHECK(widest <= 8.0);
}

TEST_CASE("the cube root encloses MPFR's at the bottom and the top of the range") {
  Random random;
  int outside = 0;
  for (int i = 0; i < cases; ++i) {
    const double x = i % 2 == 0 ? std::exp2(-1074.0 + 174.0 * random.unit())
                                : std::exp2(1000.0 + 23.9 * random.unit());
    Real value;
    mpfr_cbrt(value.get(), Real(x).get(), MPFR_RNDN);
    outside += contains(cbrt(Interval(x)), value) ? 0 : 1;
  }
  CHECK(outside == 0);
}
