// SPDX-License-Identifier: MIT
// Models of users: published test problems whose fronts are known in closed form, and the example
// of the header.
#include <bismar/error.hpp>
#include <bismar/solver/interval_model.hpp>

#include "solver/cover.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <numbers>
#include <random>

using namespace bismar;
using namespace bismar::test;

namespace {

Variable range(double lower, double upper) {
  Variable out;
  out.lower = lower;
  out.upper = upper;
  return out;
}

/// The example of interval_model.hpp.
struct Laminated {
  std::vector<Variable> variables() const {
    Variable width;
    width.lower = 0.01;
    width.upper = 0.10;
    Variable strips;
    strips.kind = Variable::Kind::integer;
    strips.lower = 1.0;
    strips.upper = 8.0;
    Variable sheet;
    sheet.kind = Variable::Kind::ordered_set;
    sheet.values = {0.002, 0.003, 0.004, 0.006};
    return {width, strips, sheet};
  }
  std::size_t objectives() const { return 2; }
  std::size_t constraints() const { return 1; }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> objectives, std::span<T> u) const {
    const T height = x[1] * x[2];
    objectives[0] = 7850.0 * x[0] * height;
    objectives[1] = 1.2 * objectives[0] + 0.8 * x[1];
    u[0] = 6.0 * 200.0 / (x[0] * height * height) / 235e6;
  }
};

/// Binh and Korn 1997 (from memory): two circles of constraints, front known in closed form.
struct BinhKorn {
  std::vector<Variable> variables() const { return {range(0.0, 5.0), range(0.0, 3.0)}; }
  std::size_t objectives() const { return 2; }
  std::size_t constraints() const { return 2; }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> f, std::span<T> u) const {
    const auto squared = [](const T& a) {
      if constexpr (std::is_same_v<T, double>) {
        return a * a;
      } else {
        return square(a);
      }
    };
    f[0] = 4.0 * squared(x[0]) + 4.0 * squared(x[1]);
    f[1] = squared(x[0] - 5.0) + squared(x[1] - 5.0);
    u[0] = (squared(x[0] - 5.0) + squared(x[1])) / 25.0;
    u[1] = 7.7 / (squared(x[0] - 8.0) + squared(x[1] + 3.0));
  }
};

/// "Constr-Ex" of the literature on constrained evolutionary search (Deb, Multi-Objective
/// Optimization using Evolutionary Algorithms, 2001; from memory).
struct ConstrEx {
  std::vector<Variable> variables() const { return {range(0.1, 1.0), range(0.0, 5.0)}; }
  std::size_t objectives() const { return 2; }
  std::size_t constraints() const { return 2; }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> f, std::span<T> u) const {
    f[0] = x[0];
    f[1] = (1.0 + x[1]) / x[0];
    u[0] = 6.0 / (x[1] + 9.0 * x[0]);
    u[1] = (1.0 + x[1]) / (9.0 * x[0]);
  }
};

/// Tanaka et al. 1995 (from memory): the front is part of a wavy circle. cos(16 atan(x / y)) is the
/// real part of ((y + i x) / r)^16, four squarings, so it needs no arc.
struct Tanaka {
  std::vector<Variable> variables() const {
    return {range(0.0, std::numbers::pi), range(0.0, std::numbers::pi)};
  }
  std::size_t objectives() const { return 2; }
  std::size_t constraints() const { return 2; }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> f, std::span<T> u) const {
    f[0] = x[0];
    f[1] = x[1];
    const T square_of_r = x[0] * x[0] + x[1] * x[1];
    T real = (x[1] * x[1] - x[0] * x[0]) / square_of_r;
    T other = 2.0 * x[0] * x[1] / square_of_r;
    for (int doubling = 0; doubling < 3; ++doubling) {
      const T next = real * real - other * other;
      other = 2.0 * real * other;
      real = next;
    }
    u[0] = (1.0 + 0.1 * real) / square_of_r;
    u[1] = 2.0 * ((x[0] - 0.5) * (x[0] - 0.5) + (x[1] - 0.5) * (x[1] - 0.5));
  }
};

/// Two bars from supports 2 b apart to a load F at height h: volume 2 A sqrt(b^2 + h^2), stress
/// F sqrt(b^2 + h^2) / (2 h A).
struct TwoBars {
  double half_span = 1.0;   // b [m]
  double force = 1e5;       // F [N]
  double strength = 200e6;  // [Pa]
  std::vector<Variable> variables() const { return {range(1e-5, 1e-2), range(0.2, 5.0)}; }
  std::size_t objectives() const { return 1; }
  std::size_t constraints() const { return 1; }
  Trend objective_trend(std::size_t /*i*/, std::size_t /*v*/) const { return Trend::rises; }
  Trend utilisation_trend(std::size_t /*i*/, std::size_t v) const {
    return v == 0 ? Trend::falls : Trend::neither;
  }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> f, std::span<T> u) const {
    using std::sqrt;
    const T length = sqrt(half_span * half_span + x[1] * x[1]);
    f[0] = 2.0 * x[0] * length;
    u[0] = force * length / (2.0 * x[1] * x[0] * strength);
  }
};

/// sqrt(x - 1) has no value below 1.
struct PartOnly {
  std::vector<Variable> variables() const { return {range(0.0, 4.0)}; }
  std::size_t objectives() const { return 1; }
  std::size_t constraints() const { return 1; }
  template <class T>
  void evaluate(std::span<const T> x, std::span<T> f, std::span<T> u) const {
    using std::sqrt;
    f[0] = x[0] + 1.0;
    u[0] = 1.0 / sqrt(x[0] - 1.0);
  }
};

}  // namespace

TEST_CASE("the example of the header trades mass for cost as a dense grid does") {
  const auto problem = make_problem(Laminated{});
  const CertifyOptions options{.epsilon = 1e-3};
  const auto front = certified_front(problem, options);
  REQUIRE(front.complete);
  CHECK(front.points.size() >= 2);
  CHECK(violations(problem, 0, certified_group(problem, 0, options), options, 3000) == 0);
  for (const auto& point : front.points) {
    CHECK(point.x[1] == std::round(point.x[1]));
  }
}

TEST_CASE("the front of Binh and Korn is covered, and nothing lies below it") {
  // x = y = t up to 3, then y = 3: f2 along it is a function of f1.
  const auto below = [](double f1) {
    const double t = std::sqrt(f1 / 8.0);
    const double x = std::sqrt(std::max(0.0, f1 / 4.0 - 9.0));
    return t <= 3.0 ? 2.0 * (t - 5.0) * (t - 5.0) : (x - 5.0) * (x - 5.0) + 4.0;
  };
  const auto problem = make_problem(BinhKorn{});
  const std::vector<double> absolute = {0.2, 0.0};
  const auto front = certified_front(problem, {.epsilon = 1e-2, .absolute = absolute});
  REQUIRE(front.complete);
  for (int i = 0; i <= 1000; ++i) {
    const double f1 = 136.0 * i / 1000.0;
    CHECK(keeps_promise(front.points, std::vector<double>{f1, below(f1)}, 1e-2, absolute));
  }
  for (const auto& point : front.points) {
    CHECK(point.objectives[1] >= below(point.objectives[0]) * (1.0 - 1e-12));
  }
}

TEST_CASE("the front of Constr-Ex is covered, and nothing lies below it") {
  // Down to x = 7/18, where both constraints meet, y = 6 - 9 x; from 2/3 on y = 0.
  const auto below = [](double x) { return x < 2.0 / 3.0 ? (7.0 - 9.0 * x) / x : 1.0 / x; };
  const auto front = certified_front(make_problem(ConstrEx{}), {.epsilon = 2e-3});
  REQUIRE(front.complete);
  for (int i = 1; i <= 1000; ++i) {
    const double x = 7.0 / 18.0 + (1.0 - 7.0 / 18.0) * i / 1000.0;
    CHECK(keeps_promise(front.points, std::vector<double>{x, below(x)}, 2.1e-3));
  }
  for (const auto& point : front.points) {
    CHECK(point.objectives[0] >= 7.0 / 18.0 * (1.0 - 1e-12));
    CHECK(point.objectives[1] >= below(point.objectives[0]) * (1.0 - 1e-12));
  }
}

TEST_CASE("the broken front of Tanaka is covered") {
  const auto problem = make_problem(Tanaka{});
  const std::vector<double> absolute = {0.01, 0.01};
  const auto front = certified_front(problem, {.epsilon = 1e-2, .absolute = absolute});
  REQUIRE(front.complete);
  std::size_t inside = 0;
  for (int i = 0; i <= 2000; ++i) {
    const double angle = 0.5 * std::numbers::pi * i / 2000.0;
    // A hair outside the wavy circle; written with the cosine of the paper.
    const double r = std::sqrt(1.0 + 0.1 * std::cos(16.0 * angle)) * (1.0 + 2e-6);
    const double x = r * std::sin(angle);
    const double y = r * std::cos(angle);
    if ((x - 0.5) * (x - 0.5) + (y - 0.5) * (y - 0.5) <= 0.5 * (1.0 - 2e-6)) {
      ++inside;
      CHECK(keeps_promise(front.points, std::vector<double>{x, y}, 1e-2, absolute));
    }
  }
  CHECK(inside > 1000);
  for (const auto& point : front.points) {
    const double x = point.objectives[0];
    const double y = point.objectives[1];
    CHECK(x * x + y * y >= (1.0 + 0.1 * std::cos(16.0 * std::atan2(x, y))) * (1.0 - 1e-12));
  }
}

TEST_CASE("two bars weigh least at 45 degrees") {
  // With the stress at its limit the volume is F (b^2 + h^2) / (h strength), least at h = b:
  // 2 F b / strength.
  const TwoBars model;
  const auto front = certified_front(make_problem(model), {.epsilon = 1e-3});
  REQUIRE(front.points.size() == 1);
  const double expected = 2.0 * model.force * model.half_span / model.strength;
  CHECK(front.points[0].objectives[0] == Approx(expected).epsilon(1e-9));
  CHECK(front.points[0].x[1] == Approx(model.half_span).epsilon(1e-4));
}

TEST_CASE("several models are groups of one problem") {
  TwoBars shorter;
  shorter.half_span = 0.5;
  const auto problem = make_problem(std::vector<TwoBars>{TwoBars{}, shorter});
  CHECK(problem.groups() == 2);
  const auto front = certified_front(problem, {.epsilon = 1e-3});
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].group == 1);
  CHECK_THROWS_AS(make_problem(std::vector<TwoBars>{}), Error);
}

TEST_CASE("where a formula has no value nothing is feasible") {
  // 1 / sqrt(x - 1) <= 1 from x = 2 on.
  const auto front = certified_front(make_problem(PartOnly{}), {.epsilon = 1e-4});
  REQUIRE(front.complete);
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].objectives[0] >= 3.0);
  CHECK(front.points[0].objectives[0] <= 3.0 * (1.0 + 1e-4));
}

TEST_CASE("bounds of a model enclose what it evaluates inside the box") {
  std::mt19937 random(301);
  const auto check = [&](const BoxProblem& problem) {
    const std::size_t n = problem.variables(0).size();
    const std::size_t k = problem.objectives();
    const std::size_t m = problem.constraints(0);
    for (int round = 0; round < 300; ++round) {
      std::vector<double> lower;
      std::vector<double> upper;
      for (const auto& variable : problem.variables(0)) {
        std::uniform_real_distribution<double> at(variable.lower, variable.upper);
        double a = at(random);
        double b = at(random);
        if (variable.kind != Variable::Kind::continuous) {
          a = variable.lower;
          b = variable.upper;
        }
        lower.push_back(std::min(a, b));
        upper.push_back(std::max(a, b));
      }
      std::vector<double> f_lower(k);
      std::vector<double> u_lower(m);
      std::vector<double> u_upper(m);
      problem.bound(
          0,
          {.count = 1, .lower = lower, .upper = upper},
          {.objective_lower = f_lower, .utilisation_lower = u_lower, .utilisation_upper = u_upper});
      std::vector<double> x(n);
      std::vector<double> f(k);
      std::vector<double> u(m);
      for (int draw = 0; draw < 30; ++draw) {
        for (std::size_t v = 0; v < n; ++v) {
          x[v] = draw == 0   ? lower[v]
                 : draw == 1 ? upper[v]
                             : std::uniform_real_distribution<double>(lower[v], upper[v])(random);
        }
        problem.evaluate(0, x, f, u);
        for (std::size_t i = 0; i < k; ++i) {
          CHECK(f_lower[i] <= f[i]);
        }
        for (std::size_t i = 0; i < m; ++i) {
          CHECK(u_lower[i] <= u[i]);
          CHECK(u[i] <= u_upper[i]);
        }
      }
    }
  };
  check(make_problem(Laminated{}));
  check(make_problem(BinhKorn{}));
  check(make_problem(ConstrEx{}));
  check(make_problem(Tanaka{}));
  check(make_problem(TwoBars{}));
}
