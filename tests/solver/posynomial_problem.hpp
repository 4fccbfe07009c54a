// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/box_problem.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>
#include <utility>
#include <vector>

namespace bismar::test {

/// Sum of terms c x_0^a_0 x_1^a_1 ... on positive variables, plus a shift; c > 0 for bounds by
/// terms.
struct Posynomial {
  struct Term {
    double factor = 1.0;
    std::vector<double> powers;
  };
  std::vector<Term> terms;
  double shift = 0.0;
  /// Beyond the first breakpoint of variable 0 the sum is multiplied by this.
  double jump = 1.0;

  [[nodiscard]] double at(std::span<const double> x, bool beyond) const {
    double sum = 0.0;
    for (const auto& term : terms) {
      double value = term.factor;
      for (std::size_t v = 0; v < x.size(); ++v) {
        if (term.powers[v] != 0.0) {
          value *= std::pow(x[v], term.powers[v]);
        }
      }
      sum += value;
    }
    return (beyond ? jump * sum : sum) + shift;
  }

  [[nodiscard]] Trend trend(std::size_t v) const {
    bool rises = false;
    bool falls = false;
    for (const auto& term : terms) {
      rises = rises || term.factor * term.powers[v] > 0.0;
      falls = falls || term.factor * term.powers[v] < 0.0;
    }
    return rises && falls ? Trend::neither
           : rises        ? Trend::rises
           : falls        ? Trend::falls
                          : Trend::constant;
  }
};

/// Objectives and utilisations are posynomials. Bounds: the defaults, or term by term, which serves
/// sums without a trend as well.
class PosynomialProblem : public BoxProblem {
 public:
  struct Group {
    std::vector<Variable> variables;
    std::vector<Posynomial> objectives;
    std::vector<Posynomial> utilisations;
    bool agree = false;
  };

  std::vector<Group> all;
  bool bound_by_terms = true;

  [[nodiscard]] std::size_t groups() const override { return all.size(); }
  [[nodiscard]] std::size_t objectives() const override { return all[0].objectives.size(); }
  [[nodiscard]] std::span<const Variable> variables(std::size_t group) const override {
    return all[group].variables;
  }
  [[nodiscard]] std::size_t constraints(std::size_t group) const override {
    return all[group].utilisations.size();
  }
  [[nodiscard]] Trend objective_trend(std::size_t group,
                                      std::size_t i,
                                      std::size_t v) const override {
    return all[group].objectives[i].trend(v);
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t group,
                                        std::size_t i,
                                        std::size_t v) const override {
    return all[group].utilisations[i].trend(v);
  }
  [[nodiscard]] bool objectives_agree(std::size_t group) const override {
    return all[group].agree || objectives() == 1;
  }

  void evaluate(std::size_t group,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    const auto& own = all[group];
    const auto& steps = own.variables[0].breakpoints;
    const bool beyond = !steps.empty() && x[0] > steps[0];
    for (std::size_t i = 0; i < objectives.size(); ++i) {
      objectives[i] = own.objectives[i].at(x, beyond);
    }
    for (std::size_t i = 0; i < utilisations.size(); ++i) {
      utilisations[i] = own.utilisations[i].at(x, beyond);
    }
  }

  void bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const override {
    if (!bound_by_terms) {
      BoxProblem::bound(group, boxes, bounds);
      return;
    }
    const auto& own = all[group];
    for (std::size_t b = 0; b < boxes.count; ++b) {
      for (std::size_t i = 0; i < own.objectives.size(); ++i) {
        bounds.objective_lower[i * boxes.count + b] = end(own, own.objectives[i], boxes, b, false);
      }
      for (std::size_t i = 0; i < own.utilisations.size(); ++i) {
        const auto& u = own.utilisations[i];
        bounds.utilisation_lower[i * boxes.count + b] = end(own, u, boxes, b, false);
        bounds.utilisation_upper[i * boxes.count + b] = end(own, u, boxes, b, true);
      }
    }
  }

 private:
  /// Every term is monotone in every variable, so its ends stand in corners; their sum bounds.
  static double end(
      const Group& own, const Posynomial& sum, const BoxBatch& boxes, std::size_t b, bool upper) {
    double out = 0.0;
    for (const auto& term : sum.terms) {
      double value = term.factor;
      for (std::size_t v = 0; v < term.powers.size(); ++v) {
        const bool at_upper = (term.powers[v] > 0.0) == upper;
        value *=
            std::pow((at_upper ? boxes.upper : boxes.lower)[v * boxes.count + b], term.powers[v]);
      }
      out += value;
    }
    const auto& steps = own.variables[0].breakpoints;
    if (!steps.empty()) {
      const bool may_stay = boxes.lower[b] <= steps[0];
      const bool may_jump = boxes.upper[b] > steps[0];
      double factor = may_stay ? 1.0 : sum.jump;
      if (may_stay && may_jump) {
        factor = upper ? std::max(1.0, sum.jump) : std::min(1.0, sum.jump);
      }
      out *= factor;
    }
    // Far more than the few roundings of one sum, far less than any tolerance.
    const double slack = 1e-13 * (std::abs(out) + std::abs(sum.shift));
    return out + sum.shift + (upper ? slack : -slack);
  }
};

[[nodiscard]] inline Variable between(double lower, double upper) {
  Variable out;
  out.lower = lower;
  out.upper = upper;
  return out;
}

[[nodiscard]] inline Variable whole(double lower, double upper) {
  Variable out = between(lower, upper);
  out.kind = Variable::Kind::integer;
  return out;
}

[[nodiscard]] inline Variable one_of_values(std::vector<double> values) {
  Variable out = between(values.front(), values.back());
  out.kind = Variable::Kind::ordered_set;
  out.values = std::move(values);
  return out;
}

}  // namespace bismar::test
