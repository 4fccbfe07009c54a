// SPDX-License-Identifier: MIT
#include <bismar/solver/box_problem.hpp>

#include "solver/pieces.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

using Point = GroupSolution::Point;

/// One group with one variable, evaluated point by point.
class OneVariable {
 public:
  OneVariable(const BoxProblem& problem, std::size_t group, GroupSolution& solution)
      : problem_(problem),
        group_(group),
        solution_(solution),
        variable_(problem.variables(group)[0]),
        objectives_(problem.objectives()),
        utilisations_(problem.constraints(group)),
        least_(utilisations_.size(), infinity),
        closest_x_(variable_.upper) {
    for (std::size_t i = 0; i < utilisations_.size(); ++i) {
      falls_.push_back(problem.utilisation_trend(group, i, 0) == Trend::falls);
    }
  }

  void run() {
    variable_.kind == Variable::Kind::ordered_set ? run_set() : run_pieces();
    if (solution_.points.empty()) {
      explain();
    } else {
      keep_non_dominated();
    }
  }

 private:
  void evaluate(double x) {
    problem_.evaluate(group_, std::span(&x, 1), objectives_, utilisations_);
    ++solution_.evaluations;
    for (std::size_t i = 0; i < least_.size(); ++i) {
      least_[i] = std::min(least_[i], utilisations_[i]);
    }
  }

  [[nodiscard]] bool feasible() const {
    return std::all_of(
        utilisations_.begin(), utilisations_.end(), [](double u) { return u <= 1.0; });
  }

  /// Largest falling utilisation at the point last evaluated; 0 when there is none.
  [[nodiscard]] double largest_falling() const {
    double largest = 0.0;
    for (std::size_t i = 0; i < utilisations_.size(); ++i) {
      if (falls_[i]) {
        largest = std::max(largest, utilisations_[i]);
      }
    }
    return largest;
  }

  void add(double x) { solution_.points.push_back({{x}, objectives_, utilisations_}); }

  void run_set() {
    for (const double x : variable_.values) {
      evaluate(x);
      if (feasible()) {
        add(x);
      } else {
        consider_clash(x);
      }
    }
  }

  /// On a piece objectives rise, so its least feasible size is its only non-dominated point: the
  /// falling utilisations bound the size from below and the rising ones from above, and the least
  /// size that the falling ones allow is feasible, or nothing in the piece is. Between pieces
  /// anything may jump, so each is solved.
  void run_pieces() {
    double from = variable_.lower;
    for (std::size_t p = 0; p <= variable_.breakpoints.size(); ++p) {
      const double to =
          p < variable_.breakpoints.size() ? variable_.breakpoints[p] : variable_.upper;
      if (!cannot_improve(from)) {
        solve_piece(from, to);
      }
      from = std::nextafter(to, infinity);
    }
  }

  /// Whether a point found before is no worse in every objective than the whole piece that begins
  /// here.
  bool cannot_improve(double from) {
    if (solution_.points.empty()) {
      return false;
    }
    evaluate(from);
    return std::any_of(solution_.points.begin(), solution_.points.end(), [&](const Point& point) {
      for (std::size_t i = 0; i < objectives_.size(); ++i) {
        if (point.objectives[i] > objectives_[i]) {
          return false;
        }
      }
      return true;
    });
  }

  void solve_piece(double from, double to) {
    const auto least = least_on_piece(
        [this](double x) {
          evaluate(x);
          return largest_falling();
        },
        from,
        to);
    evaluate(least.value_or(to));
    if (least && feasible()) {
      add(*least);
    } else {
      consider_clash(least.value_or(to));
    }
  }

  /// Remembers the infeasible point that comes closest, to say what clashes there.
  void consider_clash(double x) {
    const double worst = *std::max_element(utilisations_.begin(), utilisations_.end());
    if (worst < closest_) {
      closest_ = worst;
      closest_x_ = x;
    }
  }

  /// The least value of a utilisation lies at an end of some piece.
  void evaluate_ends() {
    if (variable_.kind == Variable::Kind::ordered_set) {
      return;
    }
    evaluate(variable_.lower);
    for (const double breakpoint : variable_.breakpoints) {
      evaluate(breakpoint);
      evaluate(std::nextafter(breakpoint, infinity));
    }
    evaluate(variable_.upper);
  }

  void explain() {
    evaluate_ends();
    for (std::size_t i = 0; i < least_.size(); ++i) {
      if (least_[i] > 1.0) {
        solution_.excluded_by = i;
        solution_.least_utilisation = least_[i];
        return;
      }
    }
    // Each limit alone can be met: name the one that fails at the closest point, and the one that
    // fails first where the former is met.
    evaluate(closest_x_);
    const auto worst = std::max_element(utilisations_.begin(), utilisations_.end());
    const auto first = static_cast<std::size_t>(worst - utilisations_.begin());
    solution_.least_utilisation = *worst;
    std::size_t second = first;
    double least_of_second = infinity;
    const auto candidates = variable_.kind == Variable::Kind::ordered_set
                                ? variable_.values
                                : std::vector<double>{variable_.lower, variable_.upper};
    for (const double x : candidates) {
      evaluate(x);
      if (utilisations_[first] > 1.0) {
        continue;
      }
      const auto other = std::max_element(utilisations_.begin(), utilisations_.end());
      // `<=`: where the other limit is a plain no (infinity) it is still the one that clashes.
      if (*other <= least_of_second) {
        least_of_second = *other;
        second = static_cast<std::size_t>(other - utilisations_.begin());
      }
    }
    solution_.clash_falling = falls_[first] ? first : second;
    solution_.clash_rising = falls_[first] ? second : first;
  }

  void keep_non_dominated() {
    auto& points = solution_.points;
    std::sort(points.begin(), points.end(), [](const Point& a, const Point& b) {
      return a.objectives != b.objectives ? a.objectives < b.objectives : a.x < b.x;
    });
    // After sorting a point can be dominated only by an earlier one; sets have a few hundred
    // values.
    std::vector<Point> kept;
    for (auto& point : points) {
      const bool dominated = std::any_of(kept.begin(), kept.end(), [&](const Point& other) {
        bool no_worse = true;
        for (std::size_t i = 0; i < point.objectives.size(); ++i) {
          no_worse = no_worse && other.objectives[i] <= point.objectives[i];
        }
        return no_worse && other.objectives != point.objectives;
      });
      if (!dominated) {
        kept.push_back(std::move(point));
      }
    }
    points = std::move(kept);
  }

  const BoxProblem& problem_;
  std::size_t group_;
  GroupSolution& solution_;
  const Variable& variable_;
  std::vector<double> objectives_;
  std::vector<double> utilisations_;
  std::vector<double> least_;
  std::vector<bool> falls_;
  double closest_ = infinity;
  double closest_x_;
};

bool solvable(const BoxProblem& problem, std::size_t group) {
  const auto variables = problem.variables(group);
  if (variables.size() != 1) {
    return false;
  }
  if (variables[0].kind != Variable::Kind::continuous) {
    return variables[0].kind == Variable::Kind::ordered_set;
  }
  for (std::size_t i = 0; i < problem.objectives(); ++i) {
    const Trend trend = problem.objective_trend(group, i, 0);
    if (trend != Trend::rises && trend != Trend::constant) {
      return false;
    }
  }
  for (std::size_t i = 0; i < problem.constraints(group); ++i) {
    if (problem.utilisation_trend(group, i, 0) == Trend::neither) {
      return false;
    }
  }
  return true;
}

}  // namespace

GroupSolution solve_exact(const BoxProblem& problem, std::size_t group) {
  GroupSolution solution;
  if (!solvable(problem, group)) {
    solution.solved = false;
    return solution;
  }
  OneVariable(problem, group, solution).run();
  return solution;
}

}  // namespace bismar
