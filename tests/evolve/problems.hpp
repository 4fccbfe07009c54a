// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/box_problem.hpp>

#include <cmath>
#include <cstddef>
#include <functional>
#include <span>
#include <utility>
#include <vector>

namespace bismar::test {

[[nodiscard]] inline Variable continuous(double lower, double upper) {
  Variable out;
  out.lower = lower;
  out.upper = upper;
  return out;
}

[[nodiscard]] inline Variable one_of(std::vector<double> values) {
  Variable out;
  out.kind = Variable::Kind::ordered_set;
  out.lower = values.empty() ? 0.0 : values.front();
  out.upper = values.empty() ? 0.0 : values.back();
  out.values = std::move(values);
  return out;
}

/// A problem out of functions. The evolutionary engine must not ask for trends, so none is
/// declared.
class FunctionProblem : public BoxProblem {
 public:
  struct Group {
    std::vector<Variable> variables;
    std::size_t constraints = 0;
    std::function<void(std::span<const double> x, std::span<double> f, std::span<double> u)>
        evaluate;
  };
  FunctionProblem(std::size_t objectives, std::vector<Group> groups)
      : objectives_(objectives), groups_(std::move(groups)) {}

  [[nodiscard]] std::size_t groups() const override { return groups_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return objectives_; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t group) const override {
    return groups_.at(group).variables;
  }
  [[nodiscard]] std::size_t constraints(std::size_t group) const override {
    return groups_.at(group).constraints;
  }
  [[nodiscard]] Trend objective_trend(std::size_t, std::size_t, std::size_t) const override {
    return Trend::neither;
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t, std::size_t, std::size_t) const override {
    return Trend::neither;
  }
  void evaluate(std::size_t group,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    groups_.at(group).evaluate(x, objectives, utilisations);
  }

 private:
  std::size_t objectives_;
  std::vector<Group> groups_;
};

/// Two groups with different numbers and kinds of variables, whose front is known.
///
/// Group 0, x in [0.1, 10], y in [0, 1]: f = (x + y, 1/x + y), feasible for x >= 0.5. Its front is
/// y = 0, so f_2 = 1 / f_1.
/// Group 1, s one of 1, 2, 4: f = (s, 0.6 / s), feasible for s <= 3. Its points (1, 0.6) and (2,
/// 0.3) cut the stretches 1 <= f_1 < 1/0.6 and 2 <= f_1 < 1/0.3 out of that curve.
[[nodiscard]] inline FunctionProblem curve_and_two_points() {
  return FunctionProblem(2,
                         {{{continuous(0.1, 10.0), continuous(0.0, 1.0)},
                           1,
                           [](auto x, auto f, auto u) {
                             f[0] = x[0] + x[1];
                             f[1] = 1.0 / x[0] + x[1];
                             u[0] = 0.5 / x[0];
                           }},
                          {{one_of({1.0, 2.0, 4.0})}, 1, [](auto x, auto f, auto u) {
                             f[0] = x[0];
                             f[1] = 0.6 / x[0];
                             u[0] = x[0] / 3.0;
                           }}});
}

/// Its hypervolume against (4, 2): the integral of 2 less the front over f_1 in [0.5, 4],
///   7 - [ln 2 + 0.6 (1/0.6 - 1) + ln (2 * 0.6) + 0.3 (1/0.3 - 2) + ln (4 * 0.3)].
[[nodiscard]] inline double curve_and_two_points_hypervolume() {
  return 7.0 - (std::log(2.0) + 0.4 + std::log(1.2) + 0.4 + std::log(1.2));
}

}  // namespace bismar::test
