// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/numeric/interval.hpp>
#include <bismar/solver/box_problem.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <span>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

/// A user's own design problem, written once as formulas, for the certified solver.
///
/// A model is a struct with
///
///     std::vector<Variable> variables() const;     // at least one
///     std::size_t objectives() const;              // at least one
///     std::size_t constraints() const;             // may be 0
///     template <class T>
///     void evaluate(std::span<const T> x, std::span<T> objectives, std::span<T> utilisations)
///     const;
///
/// and may have
///
///     Trend objective_trend(std::size_t i, std::size_t v) const;
///     Trend utilisation_trend(std::size_t i, std::size_t v) const;
///     bool objectives_agree() const;
///
/// `evaluate` is compiled for double, which is what is true, and for Interval, which bounds it over
/// boxes. So it computes with + - * / and with sqrt, cbrt, exp, log, pow, square, abs, min, max
/// found by their argument (`using std::sqrt;`), and does not branch on values. Trends, where the
/// model knows them, make the bounds tighter and give the solver a size to solve for; they must
/// hold over whole ranges of the variables (on each piece between breakpoints).
///
/// Where a formula has no value (the root of a negative number) the point is infeasible.
///
/// A complete example, a beam of rectangular tube welded of n strips of sheet; the certified
/// solver finds which designs trade mass for cost:
///
///     struct Laminated {
///       std::vector<Variable> variables() const {
///         Variable width{.lower = 0.01, .upper = 0.10};                          // [m]
///         Variable strips{.kind = Variable::Kind::integer, .lower = 1, .upper = 8};
///         Variable sheet{.kind = Variable::Kind::ordered_set};                   // [m]
///         sheet.values = {0.002, 0.003, 0.004, 0.006};
///         return {width, strips, sheet};
///       }
///       std::size_t objectives() const { return 2; }
///       std::size_t constraints() const { return 1; }
///       template <class T>
///       void evaluate(std::span<const T> x, std::span<T> objectives, std::span<T> u) const {
///         const T height = x[1] * x[2];
///         objectives[0] = 7850.0 * x[0] * height;                          // mass a metre [kg/m]
///         objectives[1] = 1.2 * objectives[0] + 0.8 * x[1];                // cost a metre
///         u[0] = 6.0 * 200.0 / (x[0] * height * height) / 235e6;           // bending, 200 N m
///       }
///     };
///     const auto problem = bismar::make_problem(Laminated{});
///     const auto front = bismar::certified_front(problem, {.epsilon = 1e-3});
///
/// @tparam Model  As above; copied, and not changed while it is solved.
template <class Model>
class IntervalProblem final : public BoxProblem {
 public:
  /// One group a model; all have the same number of objectives.
  /// @throws bismar::Error  empty: no model, or one without a variable or an objective; conflict:
  ///         unlike numbers of objectives. `where` names the model ("models[2]").
  explicit IntervalProblem(std::vector<Model> models) : models_(std::move(models)) {
    FaultList faults;
    if (models_.empty()) {
      faults.add(Code::empty, "models", "There is no model.");
    }
    for (std::size_t g = 0; g < models_.size(); ++g) {
      const std::string where = "models[" + std::to_string(g) + "]";
      variables_.push_back(models_[g].variables());
      for (auto& variable : variables_.back()) {
        if (variable.kind == Variable::Kind::ordered_set && !variable.values.empty()) {
          variable.lower = variable.values.front();
          variable.upper = variable.values.back();
        }
      }
      if (variables_.back().empty() || models_[g].objectives() == 0) {
        faults.add(Code::empty, where, "A model needs a variable and an objective.");
      }
      if (models_[g].objectives() != models_.front().objectives()) {
        faults.add(Code::conflict, where, "All models must have the same number of objectives.");
      }
    }
    faults.throw_if_any();
  }

  [[nodiscard]] const Model& model(std::size_t group) const { return models_[group]; }

  [[nodiscard]] std::size_t groups() const override { return models_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return models_.front().objectives(); }
  [[nodiscard]] std::span<const Variable> variables(std::size_t group) const override {
    return variables_[group];
  }
  [[nodiscard]] std::size_t constraints(std::size_t group) const override {
    return models_[group].constraints();
  }

  [[nodiscard]] Trend objective_trend(std::size_t group,
                                      std::size_t i,
                                      std::size_t v) const override {
    if constexpr (requires { models_[group].objective_trend(i, v); }) {
      return models_[group].objective_trend(i, v);
    } else {
      return Trend::neither;
    }
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t group,
                                        std::size_t i,
                                        std::size_t v) const override {
    if constexpr (requires { models_[group].utilisation_trend(i, v); }) {
      return models_[group].utilisation_trend(i, v);
    } else {
      return Trend::neither;
    }
  }
  [[nodiscard]] bool objectives_agree(std::size_t group) const override {
    if constexpr (requires { models_[group].objectives_agree(); }) {
      return models_[group].objectives_agree();
    } else {
      return BoxProblem::objectives_agree(group);
    }
  }

  void evaluate(std::size_t group,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    models_[group].template evaluate<double>(x, objectives, utilisations);
    for (double& u : utilisations) {
      u = std::isnan(u) ? std::numeric_limits<double>::infinity() : u;
    }
  }

  /// By intervals, and by trends where the model declares some: the narrower of the two.
  void bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const override {
    const Model& model = models_[group];
    const std::size_t n = variables_[group].size();
    const std::size_t count = boxes.count;
    constexpr bool has_trends = requires { model.objective_trend(n, n); }
    || requires { model.utilisation_trend(n, n); };
    if constexpr (has_trends) {
      BoxProblem::bound(group, boxes, bounds);
    } else {
      constexpr double infinity = std::numeric_limits<double>::infinity();
      std::fill(bounds.objective_lower.begin(), bounds.objective_lower.end(), -infinity);
      std::fill(bounds.utilisation_lower.begin(), bounds.utilisation_lower.end(), -infinity);
      std::fill(bounds.utilisation_upper.begin(), bounds.utilisation_upper.end(), infinity);
    }
    std::vector<Interval> x(n);
    std::vector<Interval> objectives(model.objectives());
    std::vector<Interval> utilisations(model.constraints());
    for (std::size_t b = 0; b < count; ++b) {
      for (std::size_t v = 0; v < n; ++v) {
        x[v] = Interval(boxes.lower[v * count + b], boxes.upper[v * count + b]);
      }
      model.template evaluate<Interval>(x, objectives, utilisations);
      // An empty interval: no point of the box has a value, which is beyond every limit.
      for (std::size_t i = 0; i < objectives.size(); ++i) {
        double& lower = bounds.objective_lower[i * count + b];
        lower = std::max(lower, objectives[i].lower());
      }
      for (std::size_t i = 0; i < utilisations.size(); ++i) {
        double& lower = bounds.utilisation_lower[i * count + b];
        double& upper = bounds.utilisation_upper[i * count + b];
        lower = std::max(lower, utilisations[i].lower());
        upper = utilisations[i].is_empty() ? std::numeric_limits<double>::infinity()
                                           : std::min(upper, utilisations[i].upper());
      }
    }
  }

 private:
  std::vector<Model> models_;
  std::vector<std::vector<Variable>> variables_;
};

/// The problem of one model, which is its only group.
template <class Model>
[[nodiscard]] IntervalProblem<Model> make_problem(Model model) {
  return IntervalProblem<Model>({std::move(model)});
}

/// The problem of several models of one kind, one group each.
template <class Model>
[[nodiscard]] IntervalProblem<Model> make_problem(std::vector<Model> models) {
  return IntervalProblem<Model>(std::move(models));
}

}  // namespace bismar
