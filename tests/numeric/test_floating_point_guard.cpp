// SPDX-License-Identifier: MIT
#include <bismar/numeric/floating_point_guard.hpp>

#include <cfenv>
#include <cmath>
#include <limits>
#include <vector>

#include "support/catch.hpp"

#if defined(__SSE2__)
#include <xmmintrin.h>
#endif

namespace {

/// Arithmetic that every mode changes: inexact sums and quotients, subnormals. The compiler can
/// neither fold it nor move it, since its numbers are volatile.
std::vector<double> results_of_this_mode() {
  volatile double third = 1.0 / 3.0;
  volatile double ten = 10.0;
  volatile double smallest_normal = std::numeric_limits<double>::min();
  volatile double subnormal = std::numeric_limits<double>::denorm_min() * 12345.0;
  volatile double sum = 0.0;
  volatile double minus_sum = 0.0;
  for (int i = 0; i < 1000; ++i) {
    sum = sum + third / (ten + static_cast<double>(i));
    minus_sum = minus_sum - third / (ten + static_cast<double>(i));
  }
  return {sum,
          minus_sum,
          smallest_normal / ten,
          subnormal * 2.0,
          subnormal + subnormal,
          std::pow(ten, third),
          std::exp(third),
          std::log(ten)};
}

std::vector<double> guarded_results() {
  const bismar::FloatingPointGuard guard;
  return results_of_this_mode();
}

/// Puts the mode of the test program back, whatever a test does.
class ModeRestorer {
 public:
  ModeRestorer() { std::fegetenv(&environment_); }
  ~ModeRestorer() { std::fesetenv(&environment_); }
  ModeRestorer(const ModeRestorer&) = delete;
  ModeRestorer& operator=(const ModeRestorer&) = delete;

 private:
  std::fenv_t environment_{};
};

}  // namespace

TEST_CASE("results do not depend on the host's rounding mode, and the mode is given back") {
  const ModeRestorer restorer;
  const std::vector<double> expected = results_of_this_mode();
  for (const int mode : {FE_UPWARD, FE_DOWNWARD, FE_TOWARDZERO, FE_TONEAREST}) {
    REQUIRE(std::fesetround(mode) == 0);
    const std::vector<double> unguarded = results_of_this_mode();
    const std::vector<double> guarded = guarded_results();
    const int mode_after = std::fegetround();
    const std::vector<double> unguarded_after = results_of_this_mode();
    std::fesetround(FE_TONEAREST);
    CHECK(guarded == expected);
    CHECK(mode_after == mode);
    CHECK(unguarded_after == unguarded);
    // The arithmetic feels the mode, so the first check can fail.
    CHECK((unguarded == expected) == (mode == FE_TONEAREST));
  }
}

TEST_CASE("exception flags raised inside the guard are not seen outside, and earlier ones stay") {
  const ModeRestorer restorer;
  std::feclearexcept(FE_ALL_EXCEPT);
  std::feraiseexcept(FE_OVERFLOW);
  {
    const bismar::FloatingPointGuard guard;
    CHECK(std::fetestexcept(FE_OVERFLOW) == 0);
    std::feraiseexcept(FE_DIVBYZERO);
  }
  CHECK(std::fetestexcept(FE_DIVBYZERO) == 0);
  CHECK(std::fetestexcept(FE_OVERFLOW) != 0);
}

TEST_CASE("guards nest") {
  const ModeRestorer restorer;
  std::fesetround(FE_UPWARD);
  int between = 0;
  {
    const bismar::FloatingPointGuard outer;
    { const bismar::FloatingPointGuard inner; }
    between = std::fegetround();
  }
  const int after = std::fegetround();
  std::fesetround(FE_TONEAREST);
  CHECK(between == FE_TONEAREST);
  CHECK(after == FE_UPWARD);
}

#if defined(__SSE2__)

TEST_CASE("results do not depend on flush-to-zero modes, and MXCSR is given back") {
  const unsigned before = _mm_getcsr();
  const std::vector<double> expected = results_of_this_mode();
  constexpr unsigned flush_to_zero = 0x8000U;
  constexpr unsigned subnormals_are_zero = 0x0040U;
  constexpr unsigned sticky = 0x003FU;
  for (const unsigned flags :
       {flush_to_zero, subnormals_are_zero, flush_to_zero | subnormals_are_zero}) {
    _mm_setcsr(before | flags);
    const std::vector<double> unguarded = results_of_this_mode();
    const std::vector<double> guarded = guarded_results();
    const unsigned after = _mm_getcsr();
    _mm_setcsr(before);
    CHECK(guarded == expected);
    CHECK(unguarded != expected);
    CHECK((after & ~sticky) == ((before | flags) & ~sticky));
  }
}

TEST_CASE("a host that traps division by zero is not stopped inside the guard and traps after it") {
  const unsigned before = _mm_getcsr();
  constexpr unsigned mask_divide_by_zero = 0x0200U;
  constexpr unsigned sticky = 0x003FU;
  _mm_setcsr(before & ~mask_divide_by_zero & ~sticky);
  double quotient = 0.0;
  {
    const bismar::FloatingPointGuard guard;
    volatile double one = 1.0;
    volatile double zero = 0.0;
    quotient = one / zero;
  }
  const unsigned after = _mm_getcsr();
  _mm_setcsr(before);
  CHECK(quotient == std::numeric_limits<double>::infinity());
  CHECK((after & mask_divide_by_zero) == 0U);
}

#endif
