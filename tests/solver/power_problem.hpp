// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/box_problem.hpp>

#include <cmath>
#include <utility>
#include <vector>

namespace bismar::test {

/// Utilisations (a / x)^p, or (x / a)^p for positive powers; objectives x and x^2. One group a
/// list.
class PowerProblem : public BoxProblem {
 public:
  using Term = std::pair<double, double>;  // a, exponent: negative falls, positive rises

  PowerProblem(std::vector<std::vector<Term>> groups, double lower, double upper)
      : groups_(std::move(groups)) {
    variable_.lower = lower;
    variable_.upper = upper;
  }
  PowerProblem(std::vector<std::vector<Term>> groups, std::vector<double> values)
      : groups_(std::move(groups)) {
    variable_.kind = Variable::Kind::ordered_set;
    variable_.lower = values.front();
    variable_.upper = values.back();
    variable_.values = std::move(values);
  }

  /// Above `at` every falling utilisation is multiplied by `factor`.
  void jump(double at, double factor) {
    variable_.breakpoints = {at};
    factor_ = factor;
  }
  void hide_trends() { hidden_ = true; }

  [[nodiscard]] std::size_t groups() const override { return groups_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return 2; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t /*group*/) const override {
    return {&variable_, 1};
  }
  [[nodiscard]] std::size_t constraints(std::size_t group) const override {
    return groups_[group].size();
  }
  [[nodiscard]] Trend objective_trend(std::size_t /*group*/,
                                      std::size_t /*i*/,
                                      std::size_t /*v*/) const override {
    return Trend::rises;
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t group,
                                        std::size_t i,
                                        std::size_t /*v*/) const override {
    if (hidden_) {
      return Trend::neither;
    }
    return groups_[group][i].second < 0.0 ? Trend::falls : Trend::rises;
  }
  void evaluate(std::size_t group,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    objectives[0] = x[0];
    objectives[1] = x[0] * x[0];
    const bool beyond = !variable_.breakpoints.empty() && x[0] > variable_.breakpoints[0];
    for (std::size_t i = 0; i < groups_[group].size(); ++i) {
      const auto [a, power] = groups_[group][i];
      utilisations[i] = std::pow(x[0] / a, power) * (beyond && power < 0.0 ? factor_ : 1.0);
    }
  }

 private:
  std::vector<std::vector<Term>> groups_;
  Variable variable_;
  double factor_ = 1.0;
  bool hidden_ = false;
};

}  // namespace bismar::test
