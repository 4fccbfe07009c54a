// SPDX-License-Identifier: MIT
// Problems whose optimum is known in closed form: m = p0 x^a and u_i = c_i / (p_i^k x^n), so that
// x = (c / p^k)^(1/n) and m = p0 (c / p^k)^(a/n).
#include <bismar/solver/sensitivity.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <limits>
#include <vector>

using namespace bismar;

namespace {

const std::vector<double> two = {3.0, 5.0};

double mass(double x, std::span<const double> p) { return p[0] * x * x; }

/// The fault of a call, "code where".
template <class Call>
std::pair<Code, std::string> fault_of(Call call) {
  try {
    call();
  } catch (const Error& error) {
    return {error.faults()[0].code, error.faults()[0].where};
  }
  return {Code::internal, "nothing thrown"};
}

constexpr double exact = 1e-9;

}  // namespace

TEST_CASE("the elasticity of a power law is its exponent") {
  // u = 40 / (p1 x^3): x = (40 / p1)^(1/3) = 2, m = p0 x^2, so d ln m / d ln p1 = -2/3.
  const auto objective = [](double x, std::span<const double> p) { return mass(x, p); };
  const auto limit = [](double x, std::span<const double> p, std::span<double> u) {
    u[0] = 40.0 / (p[1] * x * x * x);
    u[1] = 0.5 / x;  // far from active: it may do what it likes
  };
  const Sensitivity found = sensitivity({objective, limit, 2, 2.0, two});
  REQUIRE(found.active.size() == 1);
  CHECK(found.active[0].constraint == 0);
  // lambda = -(dm/dx) / (du/dx) = 2 p0 x / (3 u / x) = 2 p0 x^2 / 3 = 8.
  CHECK(found.active[0].multiplier.value() == Approx(8.0).epsilon(exact));
  CHECK(found.active[0].relative_multiplier.value() == Approx(2.0 / 3.0).epsilon(exact));
  CHECK_FALSE(found.at_lower);
  CHECK(found.size[0].below.value() == Approx(0.0).margin(exact));
  CHECK(found.size[1].above.value() == Approx(-1.0 / 3.0).epsilon(exact));
  for (const auto& side : {found.objective[0].below, found.objective[0].above}) {
    CHECK(side.value() == Approx(1.0).epsilon(exact));
  }
  for (const auto& side : {found.objective[1].below, found.objective[1].above}) {
    CHECK(side.value() == Approx(-2.0 / 3.0).epsilon(exact));
  }
}

TEST_CASE("the multiplier foretells what a relaxed limit saves") {
  // m = p0 x^2 with u = a / x^3 allowed up to 1 + e: x = (a / (1 + e))^(1/3).
  const std::vector<double> p = {3.0};
  const auto limit = [](double x, std::span<const double> /*p*/, std::span<double> u) {
    u[0] = 8.0 / (x * x * x);
  };
  const Sensitivity found = sensitivity({mass, limit, 1, 2.0, p});
  const double relaxed = std::cbrt(8.0 / (1.0 + 1e-6));
  const double saved = 3.0 * 4.0 - 3.0 * relaxed * relaxed;
  CHECK(found.active[0].multiplier.value() * 1e-6 == Approx(saved).epsilon(1e-5));
}

TEST_CASE("a limit that is no power law has the derivative of its closed form") {
  // u = (1 + p / x) / x <= 1: x^2 = x + p, x = (1 + sqrt(1 + 4 p)) / 2, p = 6: x = 3.
  // dx/dp = 1 / (2 x - 1) = 1/5, d ln x / d ln p = 6 / 15; m = x + x^2 = 12, dm/dx = 7,
  // d ln m / d ln p = 7 / 5 x 6 / 12 = 0.7.
  const std::vector<double> p = {6.0};
  const auto objective = [](double x, std::span<const double>) { return x + x * x; };
  const auto limit = [](double x, std::span<const double> q, std::span<double> u) {
    u[0] = (1.0 + q[0] / x) / x;
  };
  const Sensitivity found = sensitivity({objective, limit, 1, 3.0, p});
  CHECK(found.size[0].below.value() == Approx(0.4).epsilon(exact));
  CHECK(found.size[0].above.value() == Approx(0.4).epsilon(exact));
  CHECK(found.objective[0].above.value() == Approx(0.7).epsilon(exact));
  SECTION("one-sided differences at the end of the range agree to 1e-7") {
    const Sensitivity up = sensitivity({objective, limit, 1, 3.0, p, 2.9999});
    CHECK(up.objective[0].above.value() == Approx(0.7).epsilon(1e-7));
    CHECK_FALSE(up.at_lower);
    const Sensitivity down = sensitivity({objective, limit, 1, 3.0, p, 0.0, 3.0001});
    CHECK(down.objective[0].below.value() == Approx(0.7).epsilon(1e-7));
  }
}

TEST_CASE("where two limits couple the sides differ") {
  // u0 = 8 / (p0 x^3), u1 = 4 / (p1 x^2), both 1 at x = 2 with p = (1, 1), m = x.
  // p0 up: u0 would let x fall as p0^(-1/3), but u1 holds it: 0. p0 down: x rises, -1/3.
  const std::vector<double> p = {1.0, 1.0};
  const auto objective = [](double x, std::span<const double>) { return x; };
  const auto limit = [](double x, std::span<const double> q, std::span<double> u) {
    u[0] = 8.0 / (q[0] * x * x * x);
    u[1] = 4.0 / (q[1] * x * x);
  };
  const Sensitivity found = sensitivity({objective, limit, 2, 2.0, p});
  REQUIRE(found.active.size() == 2);
  CHECK(found.objective[0].below.value() == Approx(-1.0 / 3.0).epsilon(exact));
  CHECK(found.objective[0].above.value() == Approx(0.0).margin(exact));
  CHECK(found.objective[1].below.value() == Approx(-1.0 / 2.0).epsilon(exact));
  CHECK(found.objective[1].above.value() == Approx(0.0).margin(exact));
}

TEST_CASE("at a coupling a shared parameter follows the limit that asks for more") {
  // u0 = p^2 / x, u1 = p / x at x = p = 1: up x = p^2, down x = p.
  const std::vector<double> p = {1.0};
  const auto objective = [](double x, std::span<const double>) { return x; };
  const auto limit = [](double x, std::span<const double> q, std::span<double> u) {
    u[0] = q[0] * q[0] / x;
    u[1] = q[0] / x;
  };
  const Sensitivity found = sensitivity({objective, limit, 2, 1.0, p});
  CHECK(found.size[0].below.value() == Approx(1.0).epsilon(exact));
  CHECK(found.size[0].above.value() == Approx(2.0).epsilon(exact));
}

TEST_CASE("a size at its lower bound stays there") {
  const std::vector<double> p = {3.0};
  const auto slack = [](double x, std::span<const double> q, std::span<double> u) {
    u[0] = 0.5 * q[0] / x;
  };
  SECTION("no limit active: only the direct part of the objective is left") {
    const Sensitivity found = sensitivity({mass, slack, 1, 2.0, p, 2.0});
    CHECK(found.at_lower);
    CHECK(found.active.empty());
    CHECK(found.objective[0].below.value() == Approx(1.0).epsilon(exact));
    CHECK(found.objective[0].above.value() == Approx(1.0).epsilon(exact));
  }
  SECTION("a limit active at the bound: it counts on one side only") {
    const auto objective = [](double x, std::span<const double>) { return x; };
    const auto limit = [](double x, std::span<const double> q, std::span<double> u) {
      u[0] = 2.0 * q[0] / (3.0 * x);
    };
    const Sensitivity found = sensitivity({objective, limit, 1, 2.0, p, 2.0});
    CHECK(found.objective[0].below.value() == Approx(0.0).margin(exact));
    CHECK(found.objective[0].above.value() == Approx(1.0).epsilon(1e-7));
  }
}

TEST_CASE("a side without a feasible size has no value") {
  const std::vector<double> p = {1.0};
  const auto objective = [](double x, std::span<const double>) { return x; };
  const auto limit = [](double x, std::span<const double> q, std::span<double> u) {
    u[0] = 2.0 * q[0] / x;
    u[1] = x / 2.0;  // rises with x and is active too: no room
  };
  const Sensitivity cap = sensitivity({objective, limit, 2, 2.0, p});
  CHECK(cap.objective[0].below.value() == Approx(1.0).epsilon(exact));
  CHECK_FALSE(cap.objective[0].above);
  SECTION("the upper bound acts as such a limit") {
    const auto alone = [](double x, std::span<const double> q, std::span<double> u) {
      u[0] = 2.0 * q[0] / x;
    };
    const Sensitivity bound = sensitivity({objective, alone, 1, 2.0, p, 1.0, 2.0});
    CHECK(bound.at_upper);
    CHECK(bound.objective[0].below.value() == Approx(1.0).epsilon(1e-7));
    CHECK_FALSE(bound.objective[0].above);
  }
  SECTION("a level limit closes the side on which it rises") {
    const auto level = [](double x, std::span<const double> q, std::span<double> u) {
      u[0] = 2.0 / x;
      u[1] = 1.0 / q[0];
    };
    const Sensitivity found = sensitivity({objective, level, 2, 2.0, p});
    CHECK_FALSE(found.objective[0].below);
    CHECK(found.objective[0].above.value() == Approx(0.0).margin(exact));
    CHECK_FALSE(found.active[1].multiplier);
  }
  SECTION("a single size between two bounds that meet") {
    const Sensitivity found = sensitivity({objective, limit, 2, 2.0, p, 2.0, 2.0});
    CHECK(found.at_lower);
    CHECK(found.at_upper);
    CHECK(found.objective[0].below.value() == Approx(0.0).margin(exact));
    CHECK_FALSE(found.objective[0].above);
  }
}

TEST_CASE("what is no optimum is refused") {
  const std::vector<double> p = {1.0};
  const auto up = [](double x, std::span<const double>) { return x; };
  const auto down = [](double x, std::span<const double>) { return 1.0 / x; };
  const auto limit = [](double x, std::span<const double>, std::span<double> u) { u[0] = 2.0 / x; };
  const auto conflict = std::pair<Code, std::string>(Code::conflict, "size");
  CHECK(fault_of([&] { (void)sensitivity({up, limit, 1, 3.0, p}); }) == conflict);    // slack
  CHECK(fault_of([&] { (void)sensitivity({up, limit, 1, 1.0, p}); }) == conflict);    // broken
  CHECK(fault_of([&] { (void)sensitivity({down, limit, 1, 2.0, p}); }) == conflict);  // falls
}

TEST_CASE("arguments outside their ranges are named") {
  const std::vector<double> p = {1.0};
  const std::vector<double> bad = {1.0, -1.0};
  const auto m = [](double x, std::span<const double>) { return x; };
  const auto no_mass = [](double, std::span<const double>) { return 0.0; };
  const auto limit = [](double x, std::span<const double>, std::span<double> u) { u[0] = 2.0 / x; };
  const double nan = std::numeric_limits<double>::quiet_NaN();
  using Fault = std::pair<Code, std::string>;
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, nan, p});
        }) == Fault(Code::not_finite, "size"));
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, 2.0, bad});
        }) == Fault(Code::out_of_range, "parameters/1"));
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, 2.0, p, 3.0});
        }) == Fault(Code::out_of_range, "lower"));
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, 2.0, p, 1.0, 1.5});
        }) == Fault(Code::out_of_range, "upper"));
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, 2.0, p}, {.active = 0.0});
        }) == Fault(Code::out_of_range, "active"));
  CHECK(fault_of([&] {
          (void)sensitivity({m, limit, 1, 2.0, p}, {.step = 1.0});
        }) == Fault(Code::out_of_range, "step"));
  CHECK(fault_of([&] {
          (void)sensitivity({no_mass, limit, 1, 2.0, p});
        }) == Fault(Code::out_of_range, "objective"));
}
