// SPDX-License-Identifier: MIT
// The one point of a group against optima known in closed form.
#include "solver/cover.hpp"
#include "solver/polish.hpp"
#include "solver/quadratic_step.hpp"
#include "solver/random_posynomials.hpp"
#include "support/catch.hpp"

#include <cmath>

using namespace bismar;
using namespace bismar::test;

namespace {

struct Known {
  PosynomialProblem problem;
  std::vector<double> x;
  double optimum = 0.0;
};

double monomial(const std::vector<double>& x, const std::vector<double>& powers) {
  double out = 1.0;
  for (std::size_t v = 0; v < x.size(); ++v) {
    out *= std::pow(x[v], powers[v]);
  }
  return out;
}

std::vector<double> drawn_optimum(PosynomialMaker& make, std::size_t n) {
  std::vector<double> x;
  for (std::size_t v = 0; v < n; ++v) {
    x.push_back(make.real(0.9, 2.2));
  }
  return x;
}

/// Vertex: n utilisations u_i = prod (x_v / x*_v)^-A_iv and f = prod x_v^(sum_i l_i A_iv), l > 0.
/// Then f(x) prod u_i^l_i = f(x*) identically, so u <= 1 gives f >= f(x*), reached at x* (geometric
/// programming with as many terms as its dual has unknowns: Duffin, Peterson and Zener, Geometric
/// Programming, 1967; from memory).
Known vertex(PosynomialMaker& make, std::size_t n) {
  Known out;
  out.x = drawn_optimum(make, n);
  PosynomialProblem::Group group;
  group.variables = make.continuous(n);
  Posynomial::Term objective{1.0, std::vector<double>(n, 0.0)};
  for (std::size_t i = 0; i < n; ++i) {
    Posynomial::Term term{1.0, {}};
    const double weight = make.real(0.2, 1.0);
    for (std::size_t v = 0; v < n; ++v) {
      // The size falls in all; the rest is diagonally dominant, so that the vertex is one point.
      const double power = v == 0   ? make.real(0.8, 2.0)
                           : v == i ? (make.pick(0, 1) == 0 ? -2.0 : 2.0)
                                    : make.real(-0.4, 0.4);
      term.powers.push_back(-power);
      objective.powers[v] += weight * power;
    }
    term.factor = 1.0 / monomial(out.x, term.powers);
    group.utilisations.push_back({{term}});
  }
  out.optimum = monomial(out.x, objective.powers);
  group.objectives.push_back({{objective}});
  out.problem.all.push_back(group);
  return out;
}

/// Smooth: one utilisation u = sum_t w_t M_t(x) / M_t(x*) with weights w that sum to 1, and
/// f = prod M_t^(-w_t). By the inequality of weighted means u >= prod (M_t / M_t*)^w_t = f* / f, so
/// u <= 1 gives f >= f*, reached at x*.
Known smooth(PosynomialMaker& make, std::size_t n) {
  Known out;
  out.x = drawn_optimum(make, n);
  PosynomialProblem::Group group;
  group.variables = make.continuous(n);
  Posynomial::Term objective{1.0, std::vector<double>(n, 0.0)};
  Posynomial u;
  const std::size_t terms = n + 1;
  std::vector<double> weights;
  double total = 0.0;
  for (std::size_t t = 0; t < terms; ++t) {
    weights.push_back(make.real(0.3, 1.0));
    total += weights.back();
  }
  for (std::size_t t = 0; t < terms; ++t) {
    Posynomial::Term term{1.0, {}};
    for (std::size_t v = 0; v < n; ++v) {
      const double power = v == 0 ? make.real(-2.0, -0.8) : v == t ? 2.0 : make.real(-1.0, 0.0);
      term.powers.push_back(power);
      objective.powers[v] -= weights[t] / total * power;
    }
    term.factor = weights[t] / total / monomial(out.x, term.powers);
    u.terms.push_back(term);
  }
  group.utilisations.push_back(u);
  out.optimum = monomial(out.x, objective.powers);
  group.objectives.push_back({{objective}});
  out.problem.all.push_back(group);
  return out;
}

/// The same without a size to settle along.
class Sizeless : public PosynomialProblem {
 public:
  explicit Sizeless(PosynomialProblem from) : PosynomialProblem(std::move(from)) {}
  [[nodiscard]] std::uint32_t size_direction(std::size_t /*group*/) const override {
    return no_index;
  }
};

PolishedPoint feasible_start(const BoxProblem& problem, PosynomialMaker& make) {
  PolishedPoint out{{}, std::vector<double>(1), std::vector<double>(problem.constraints(0))};
  do {
    out.x.clear();
    for (const auto& variable : problem.variables(0)) {
      out.x.push_back(make.real(variable.lower, variable.upper));
    }
    problem.evaluate(0, out.x, out.objectives, out.utilisations);
  } while (!all_at_most(out.utilisations, 1.0));
  return out;
}

}  // namespace

TEST_CASE("the one point of two and three sizes is the known optimum to 1e-9") {
  PosynomialMaker make(201);
  for (int round = 0; round < 60; ++round) {
    const auto n = static_cast<std::size_t>(2 + round % 2);
    const auto known = round % 4 < 2 ? vertex(make, n) : smooth(make, n);
    const auto front = certified_group(known.problem, 0, {.epsilon = 1e-2});
    REQUIRE(front.state == GroupState::solved);
    REQUIRE(front.points.size() == 1);
    CHECK(front.points[0].objectives[0] <= known.optimum * (1.0 + 1e-9));
    CHECK(front.points[0].objectives[0] >= known.optimum * (1.0 - 1e-11));
    CHECK(all_at_most(front.points[0].utilisations, 1.0));
  }
}

TEST_CASE("polishing from anywhere feasible ends at the known optimum, up to five sizes") {
  PosynomialMaker make(202);
  for (int round = 0; round < 400; ++round) {
    const auto n = static_cast<std::size_t>(2 + round % 4);
    const auto known = round % 8 < 4 ? vertex(make, n) : smooth(make, n);
    auto point = feasible_start(known.problem, make);
    std::size_t evaluations = 0;
    polish(known.problem, 0, 0, point, evaluations);
    INFO("round " << round << ", " << n << " sizes, " << evaluations << " evaluations");
    CHECK(point.objectives[0] <= known.optimum * (1.0 + 1e-9));
    CHECK(point.objectives[0] >= known.optimum * (1.0 - 1e-11));
    CHECK(all_at_most(point.utilisations, 1.0));
  }
}

TEST_CASE("polishing needs no size direction") {
  PosynomialMaker make(203);
  for (int round = 0; round < 100; ++round) {
    const auto n = static_cast<std::size_t>(2 + round % 2);
    const auto known = round % 4 < 2 ? vertex(make, n) : smooth(make, n);
    const Sizeless problem(known.problem);
    auto point = feasible_start(problem, make);
    std::size_t evaluations = 0;
    polish(problem, 0, no_index, point, evaluations);
    INFO("round " << round << ", " << n << " sizes");
    CHECK(point.objectives[0] <= known.optimum * (1.0 + 1e-9));
    CHECK(point.objectives[0] >= known.optimum * (1.0 - 1e-11));
  }
}

TEST_CASE("the gravel box costs 100") {
  // min 40 / (x y z) + 40 y z + 20 x z + 10 x y: the classical example of geometric programming
  // (Duffin, Peterson and Zener 1967, from memory). Its dual point is (0.4, 0.2, 0.2, 0.2):
  // 100^0.4 200^0.2 100^0.2 50^0.2 = 100, at (2, 1, 0.5).
  PosynomialProblem::Group group;
  group.variables = {between(0.2, 5.0), between(0.2, 5.0), between(0.2, 5.0)};
  group.objectives = {{{{40.0, {-1.0, -1.0, -1.0}},
                        {40.0, {0.0, 1.0, 1.0}},
                        {20.0, {1.0, 0.0, 1.0}},
                        {10.0, {1.0, 1.0, 0.0}}}}};
  PosynomialProblem problem;
  problem.all.push_back(group);
  const auto front = certified_group(problem, 0, {.epsilon = 1e-2});
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].objectives[0] == Approx(100.0).epsilon(1e-12));
  CHECK(front.points[0].x[0] == Approx(2.0).epsilon(1e-5));
  CHECK(front.points[0].x[1] == Approx(1.0).epsilon(1e-5));
  CHECK(front.points[0].x[2] == Approx(0.5).epsilon(1e-5));
}

TEST_CASE("polishing stays in its piece and at its whole numbers") {
  // f = x (y + 1/y) n, u = 1 / x: least at x = 1, y = 1; a break at y = 1.5 holds a start above it
  // there.
  PosynomialProblem::Group group;
  group.variables = {between(0.5, 4.0), between(0.5, 3.0), whole(1.0, 3.0)};
  group.variables[1].breakpoints = {1.5};
  group.objectives = {{{{1.0, {1.0, 1.0, 1.0}}, {1.0, {1.0, -1.0, 1.0}}}}};
  group.utilisations = {{{{1.0, {-1.0, 0.0, 0.0}}}}};
  PosynomialProblem problem;
  problem.all.push_back(group);
  PolishedPoint point{{2.0, 2.0, 2.0}, std::vector<double>(1), std::vector<double>(1)};
  problem.evaluate(0, point.x, point.objectives, point.utilisations);
  std::size_t evaluations = 0;
  polish(problem, 0, 0, point, evaluations);
  CHECK(point.x[0] == Approx(1.0).epsilon(1e-11));
  CHECK(point.x[1] > 1.5);
  CHECK(point.x[1] == Approx(1.5).epsilon(1e-9));
  CHECK(point.x[2] == 2.0);
}

TEST_CASE("a quadratic step meets the conditions of an optimum") {
  // Stationarity, feasibility, signs and complementarity, written down (Karush, Kuhn, Tucker).
  PosynomialMaker make(204);
  for (int round = 0; round < 500; ++round) {
    const auto n = static_cast<std::size_t>(1 + round % 5);
    QuadraticProgram program;
    program.variables = n;
    std::vector<double> root(n * n);
    for (double& entry : root) {
      entry = make.real(-1.0, 1.0);
    }
    program.matrix.assign(n * n, 0.0);
    for (std::size_t r = 0; r < n; ++r) {
      program.gradient.push_back(make.real(-2.0, 2.0));
      for (std::size_t c = 0; c < n; ++c) {
        for (std::size_t e = 0; e < n; ++e) {
          program.matrix[r * n + c] += root[e * n + r] * root[e * n + c];
        }
      }
      program.matrix[r * n + r] += 0.1;
    }
    const auto limits = static_cast<std::size_t>(make.pick(0, 8));
    for (std::size_t i = 0; i < limits; ++i) {
      for (std::size_t v = 0; v < n; ++v) {
        program.rows.push_back(make.real(-1.0, 1.0));
      }
      program.limits.push_back(make.pick(0, 3) == 0 ? 0.0 : make.real(0.0, 0.5));
    }
    const auto found = solve_quadratic(program);
    for (std::size_t r = 0; r < n; ++r) {
      double stationary = program.gradient[r];
      for (std::size_t c = 0; c < n; ++c) {
        stationary += program.matrix[r * n + c] * found.step[c];
      }
      for (std::size_t i = 0; i < limits; ++i) {
        stationary += found.multipliers[i] * program.rows[i * n + r];
      }
      CHECK(std::abs(stationary) < 1e-9);
    }
    for (std::size_t i = 0; i < limits; ++i) {
      double room = program.limits[i];
      for (std::size_t v = 0; v < n; ++v) {
        room -= program.rows[i * n + v] * found.step[v];
      }
      CHECK(room > -1e-10);
      CHECK(found.multipliers[i] >= 0.0);
      CHECK(std::abs(found.multipliers[i] * room) < 1e-9);
    }
  }
}
