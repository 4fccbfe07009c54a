// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/numeric/interval.hpp>

#include <cmath>
#include <functional>
#include <limits>
#include <string>

#include "support/catch.hpp"

using bismar::Interval;

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double greatest = std::numeric_limits<double>::max();
constexpr double least_positive = std::numeric_limits<double>::denorm_min();
const Interval empty = Interval::empty();
const Interval whole = Interval::whole_line();

bismar::Code code_of(const std::function<void()>& call) {
  try {
    call();
  } catch (const bismar::Error& error) {
    return error.faults().front().code;
  }
  return bismar::Code::internal;
}

}  // namespace

TEST_CASE("next_above and next_below are nextafter") {
  for (const double x : {0.0,
                         -0.0,
                         1.0,
                         -1.0,
                         least_positive,
                         -least_positive,
                         greatest,
                         -greatest,
                         infinity,
                         -infinity,
                         0x1p-1022,
                         -0x1p-1022,
                         3.7e-310,
                         2.5,
                         -1e300}) {
    CHECK(bismar::next_above(x) == std::nextafter(x, infinity));
    CHECK(bismar::next_below(x) == std::nextafter(x, -infinity));
  }
}

TEST_CASE("an interval is made of ordered ends, and NaN is refused") {
  CHECK(Interval() == Interval(0.0, 0.0));
  CHECK(Interval(2.0).lower() == 2.0);
  CHECK(Interval(2.0).upper() == 2.0);
  CHECK(code_of([] { (void)Interval(std::nan("")); }) == bismar::Code::not_finite);
  CHECK(code_of([] { (void)Interval(0.0, std::nan("")); }) == bismar::Code::not_finite);
  CHECK(code_of([] { (void)Interval(2.0, 1.0); }) == bismar::Code::invalid_argument);
}

TEST_CASE("an infinite end means unbounded, and stands for doubles that overflowed") {
  CHECK(Interval(infinity) == Interval(greatest, infinity));
  CHECK(Interval(-infinity) == Interval(-infinity, -greatest));
  CHECK(Interval(greatest, infinity).contains(infinity));
  CHECK_FALSE(Interval(0.0, greatest).contains(infinity));
  CHECK((Interval(greatest) + Interval(greatest)).contains(infinity));
  CHECK((Interval(greatest) * Interval(2.0)).lower() == greatest);
  CHECK((Interval(-greatest) * Interval(2.0)).upper() == -greatest);
  CHECK(Interval(1.0, infinity) - Interval(1.0, infinity) == whole);
  CHECK((Interval(0.0, infinity) * Interval(0.0, 1.0)) == Interval(0.0, infinity));
  CHECK(Interval(0.0) * whole == Interval(0.0));
  CHECK((Interval(1.0, 2.0) / Interval(1.0, infinity)).lower() == 0.0);
  CHECK((Interval(1.0, infinity) / Interval(1.0, infinity)).lower() == 0.0);
  CHECK((Interval(-2.0, -1.0) / Interval(1.0, infinity)).upper() == 0.0);
}

TEST_CASE("the empty interval stays empty through every function") {
  const Interval x(1.0, 2.0);
  for (const Interval& result : {-empty,
                                 empty + x,
                                 x + empty,
                                 empty - x,
                                 x - empty,
                                 empty * x,
                                 x * empty,
                                 empty / x,
                                 x / empty,
                                 empty / Interval(0.0),
                                 square(empty),
                                 abs(empty),
                                 min(empty, x),
                                 min(x, empty),
                                 max(empty, x),
                                 max(x, empty),
                                 intersection(empty, x),
                                 sqrt(empty),
                                 cbrt(empty),
                                 exp(empty),
                                 log(empty),
                                 pow(empty, 2),
                                 pow(empty, -3),
                                 pow(empty, 0),
                                 pow(empty, 0.5)}) {
    CHECK(result.is_empty());
  }
  CHECK(hull(empty, x) == x);
  CHECK(hull(x, empty) == x);
  CHECK(hull(empty, empty).is_empty());
  CHECK_FALSE(empty.contains(0.0));
  CHECK_FALSE(empty.contains(infinity));
  CHECK_FALSE(empty.intersects(x));
  CHECK_FALSE(x.intersects(empty));
  CHECK(x.contains(empty));
  CHECK_FALSE(empty.contains(x));
}

TEST_CASE("members outside a domain contribute nothing") {
  CHECK(sqrt(Interval(-1.0, 4.0)).lower() == 0.0);
  CHECK(sqrt(Interval(-1.0, 4.0)).upper() == std::nextafter(2.0, 3.0));
  CHECK(sqrt(Interval(-2.0, -1.0)).is_empty());
  CHECK(sqrt(Interval(-1.0, 0.0)) == Interval(0.0));
  CHECK(log(Interval(-1.0, 0.0)).is_empty());
  CHECK(log(Interval(0.0, 1.0)).lower() == -infinity);
  CHECK(log(Interval(0.0, 1.0)).contains(0.0));
  CHECK(pow(Interval(-2.0, -1.0), 0.5).is_empty());
  CHECK(pow(Interval(-1.0, 0.0), -0.5).is_empty());
  CHECK(pow(Interval(-1.0, 0.0), 0.5) == Interval(0.0));
  CHECK(pow(Interval(-1.0, 4.0), 0.5).contains(Interval(0.0, 2.0)));
  CHECK(pow(Interval(0.0, 4.0), -0.5).upper() == infinity);
  CHECK(pow(Interval(0.0, 4.0), -0.5).contains(0.5));
  CHECK(pow(Interval(1.0, infinity), -2.5).lower() == 0.0);
  CHECK(pow(Interval(1.0, infinity), 2.5).upper() == infinity);
  CHECK(pow(Interval(0.0, 5.0), 0.0) == Interval(1.0));
  CHECK(code_of([] { (void)pow(Interval(1.0, 2.0), infinity); }) == bismar::Code::not_finite);
}

TEST_CASE("division by an interval that contains zero is the whole line") {
  for (const Interval& divisor : {Interval(0.0),
                                  Interval(0.0, 1.0),
                                  Interval(-1.0, 0.0),
                                  Interval(-1.0, 1.0),
                                  whole,
                                  Interval(-0.0, 2.0)}) {
    CHECK(Interval(1.0, 2.0) / divisor == whole);
    CHECK(Interval(0.0) / divisor == whole);
    CHECK(pow(divisor, -1) == whole);
    CHECK(pow(divisor, -2) == whole);
  }
}

TEST_CASE("arithmetic moves each end outward by one double and no more") {
  const Interval sum = Interval(1.0, 2.0) + Interval(10.0, 20.0);
  CHECK(sum == Interval(std::nextafter(11.0, 0.0), std::nextafter(22.0, 99.0)));
  const Interval product = Interval(-3.0, 2.0) * Interval(-5.0, 7.0);
  CHECK(product == Interval(std::nextafter(-21.0, -99.0), std::nextafter(15.0, 99.0)));
  const Interval quotient = Interval(-3.0, 2.0) / Interval(-4.0, -2.0);
  CHECK(quotient == Interval(std::nextafter(-1.0, -9.0), std::nextafter(1.5, 9.0)));
  CHECK(sqrt(Interval(4.0, 9.0)) == Interval(std::nextafter(2.0, 0.0), std::nextafter(3.0, 9.0)));
  CHECK(square(Interval(-3.0, 2.0)) == Interval(0.0, std::nextafter(9.0, 99.0)));
}

TEST_CASE("results that cannot be negative have no negative end, even where doubles underflow") {
  const Interval tiny(0.0, least_positive);
  CHECK((tiny * tiny) == Interval(0.0, least_positive));
  CHECK((tiny + tiny).lower() == 0.0);
  CHECK((Interval(least_positive) / Interval(2.0, 4.0)).lower() == 0.0);
  CHECK(square(Interval(-1e-200, 1e-200)) == Interval(0.0, least_positive));
  CHECK(exp(Interval(-1000.0)).lower() == 0.0);
  CHECK(exp(Interval(-1000.0)).upper() > 0.0);
  CHECK(exp(whole) == Interval(0.0, infinity));
  CHECK(pow(tiny, 0.5).lower() == 0.0);
  CHECK(pow(tiny, 3) == Interval(0.0, least_positive));
  // A negative product that underflows must not lose its sign.
  CHECK((Interval(-1e-200) * Interval(1e-200)).lower() == -least_positive);
  CHECK((Interval(-1e-200) * Interval(1e-200)).upper() == 0.0);
}

TEST_CASE("whole powers follow the sign of the base") {
  CHECK(pow(Interval(-3.0, 2.0), 2).lower() == 0.0);
  CHECK(pow(Interval(-3.0, 2.0), 2).contains(9.0));
  CHECK(pow(Interval(-3.0, 2.0), 3).contains(Interval(-27.0, 8.0)));
  CHECK(pow(Interval(-3.0, 2.0), 3).lower() > -27.0001);
  CHECK(pow(Interval(-3.0, 2.0), 3).upper() < 8.0001);
  CHECK(pow(Interval(-3.0, -2.0), 3).contains(Interval(-27.0, -8.0)));
  CHECK(pow(Interval(-3.0, -2.0), 4).contains(Interval(16.0, 81.0)));
  CHECK(pow(Interval(2.0, 4.0), -2).contains(Interval(0.0625, 0.25)));
  CHECK(pow(Interval(-4.0, -2.0), -1).contains(Interval(-0.5, -0.25)));
  CHECK(pow(Interval(-3.0, 2.0), 0) == Interval(1.0));
  CHECK(pow(Interval(-3.0, 2.0), 1) == Interval(-3.0, 2.0));
  CHECK(pow(Interval(2.0), std::numeric_limits<int>::min()).contains(0.0));
  CHECK(pow(Interval(1.0), std::numeric_limits<int>::min()).contains(1.0));
}

TEST_CASE("cube roots take either sign and exact cubes lie inside") {
  CHECK(cbrt(Interval(-27.0, 8.0)).contains(Interval(-3.0, 2.0)));
  CHECK(cbrt(Interval(-27.0, 8.0)).upper() <= 2.0 + 8e-16);
  CHECK(cbrt(Interval(0.0)) == Interval(0.0));
  CHECK(cbrt(whole) == whole);
  CHECK(cbrt(Interval(least_positive)).contains(1.7031839360032603e-108));
  CHECK(cbrt(Interval(greatest)).upper() < 5.65e102);
}

TEST_CASE("least, greatest, magnitude, hull and intersection are exact") {
  const Interval a(1.0, 5.0);
  const Interval b(2.0, 3.0);
  CHECK(min(a, b) == Interval(1.0, 3.0));
  CHECK(max(a, b) == Interval(2.0, 5.0));
  CHECK(abs(Interval(-4.0, 3.0)) == Interval(0.0, 4.0));
  CHECK(abs(Interval(-4.0, -3.0)) == Interval(3.0, 4.0));
  CHECK(hull(Interval(0.0, 1.0), Interval(4.0, 5.0)) == Interval(0.0, 5.0));
  CHECK(intersection(a, b) == b);
  CHECK(intersection(Interval(0.0, 1.0), Interval(4.0, 5.0)).is_empty());
  CHECK(Interval(0.0, 1.0).intersects(Interval(1.0, 2.0)));
  CHECK_FALSE(Interval(0.0, 1.0).intersects(Interval(1.5, 2.0)));
  CHECK(a.contains(b));
  CHECK_FALSE(b.contains(a));
}

TEST_CASE("one formula serves double and Interval") {
  const auto formula = [](auto x) {
    using std::exp;
    using std::max;
    using std::pow;
    using std::sqrt;
    return max(2.0 * sqrt(x) / (1.0 + x), pow(x, 0.3) - exp(-x));
  };
  const Interval enclosure = formula(Interval(0.5, 3.0));
  for (double x = 0.5; x <= 3.0; x += 0.01) {
    CHECK(enclosure.contains(formula(x)));
  }
}
