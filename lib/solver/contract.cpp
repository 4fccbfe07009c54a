// SPDX-License-Identifier: MIT
// What the bounds of a problem leave of a box.
#include "solver/pieces.hpp"

#include <bismar/solver/box_problem.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// A cut ends when what it might still win is this share of the box's width.
constexpr double cut_width = 1e-4;
constexpr int most_steps = 24;

/// One box of a batch, and slices of it across the size direction.
class Slices {
 public:
  Slices(const BoxProblem& problem, std::size_t group, double allowed)
      : problem_(problem),
        group_(group),
        allowed_(allowed),
        variables_(problem.variables(group)),
        size_(problem.size_direction(group)),
        lower_(variables_.size()),
        upper_(variables_.size()),
        objective_lower_(problem.objectives()),
        u_lower_(problem.constraints(group)),
        u_upper_(u_lower_.size()) {
    for (std::size_t i = 0; i < u_lower_.size() && size_ != no_index; ++i) {
      trend_.push_back(problem.utilisation_trend(group, i, size_));
    }
  }

  void contract(const ContractBatch& boxes, std::size_t b) {
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      lower_[v] = boxes.lower[v * boxes.count + b];
      upper_[v] = boxes.upper[v * boxes.count + b];
    }
    bound();
    boxes.broken[b] = broken();
    if (boxes.broken[b] == no_index && size_ != no_index && lower_[size_] < upper_[size_] &&
        !has_breakpoint_inside(variables_[size_], lower_[size_], upper_[size_])) {
      boxes.broken[b] = cut(boxes, b);
    }
    for (std::size_t i = 0; i < objective_lower_.size(); ++i) {
      boxes.objective_lower[i * boxes.count + b] = objective_lower_[i];
    }
  }

 private:
  void bound() {
    problem_.bound(group_,
                   {.count = 1, .lower = lower_, .upper = upper_},
                   {.objective_lower = objective_lower_,
                    .utilisation_lower = u_lower_,
                    .utilisation_upper = u_upper_});
  }

  [[nodiscard]] std::uint32_t broken() const {
    for (std::size_t i = 0; i < u_lower_.size(); ++i) {
      if (u_lower_[i] > allowed_) {
        return static_cast<std::uint32_t>(i);
      }
    }
    return no_index;
  }

  /// ln of the largest lower bound, over what is allowed, of the utilisations with this trend in
  /// the slice: a utilisation that falls is at least that everywhere below the slice, one that
  /// rises everywhere above it.
  double slice(double at, Trend trend) {
    lower_[size_] = at;
    upper_[size_] = at;
    bound();
    double largest = 0.0;
    worst_ = no_index;
    for (std::size_t i = 0; i < u_lower_.size(); ++i) {
      if (trend_[i] == trend && u_lower_[i] > largest) {
        largest = u_lower_[i];
        worst_ = static_cast<std::uint32_t>(i);
      }
    }
    return largest > 0.0 ? std::log(largest) - std::log(allowed_) : -infinity;
  }

  /// Moves `from`, where the slice is above what is allowed, towards `to`, where it is not, as far
  /// as it stays above. Secants on logarithms where they exist, otherwise halves.
  double cut_towards(double from, double value_from, double to, double value_to, Trend trend) {
    const bool by_ratio = std::min(from, to) > 0.0;
    const auto coordinate = [&](double x) { return by_ratio ? std::log(x) : x; };
    const double enough = cut_width * std::abs(to - from);
    int same_side = 0;
    bool was_above = false;
    for (int step = 0; step < most_steps && std::abs(to - from) > enough; ++step) {
      const double a = coordinate(from);
      const double b = coordinate(to);
      double share = 0.5;
      if (std::isfinite(value_from) && std::isfinite(value_to) && same_side < 2) {
        // A hair short of the root, so that the cut side is what closes in.
        share = std::clamp(value_from / (value_from - value_to), 1e-4, 1.0 - 1e-4);
        share *= 1.0 - 1e-5;
      }
      const double t = a + share * (b - a);
      const double at =
          std::clamp(by_ratio ? std::exp(t) : t, std::min(from, to), std::max(from, to));
      const double value = slice(at, trend);
      const bool above = value > 0.0;
      same_side = step > 0 && above == was_above ? same_side + 1 : 0;
      was_above = above;
      (above ? from : to) = at;
      (above ? value_from : value_to) = value;
      if (above && value < 1e-5) {
        break;
      }
    }
    return from;
  }

  /// @return A constraint that nothing of the box meets, or no_index.
  std::uint32_t cut(const ContractBatch& boxes, std::size_t b) {
    double low = lower_[size_];
    double high = upper_[size_];
    const double falling_at_high = slice(high, Trend::falls);
    if (falling_at_high > 0.0) {
      return worst_;
    }
    const double falling_at_low = slice(low, Trend::falls);
    const double rising_at_low = slice(low, Trend::rises);
    if (rising_at_low > 0.0) {
      return worst_;
    }
    if (falling_at_low > 0.0) {
      low = cut_towards(low, falling_at_low, high, falling_at_high, Trend::falls);
    }
    const double rising_at_high = slice(high, Trend::rises);
    if (rising_at_high > 0.0) {
      const double rising = slice(low, Trend::rises);
      if (rising > 0.0) {
        return worst_;
      }
      high = cut_towards(high, rising_at_high, low, rising, Trend::rises);
    }
    boxes.lower[size_ * boxes.count + b] = low;
    boxes.upper[size_ * boxes.count + b] = high;
    // Objectives rise with the size, so they are least on the lowest slice.
    slice(low, Trend::falls);
    return no_index;
  }

  const BoxProblem& problem_;
  std::size_t group_;
  double allowed_;
  std::span<const Variable> variables_;
  std::uint32_t size_;
  std::vector<Trend> trend_;
  std::vector<double> lower_;
  std::vector<double> upper_;
  std::vector<double> objective_lower_;
  std::vector<double> u_lower_;
  std::vector<double> u_upper_;
  std::uint32_t worst_ = no_index;
};

}  // namespace

void BoxProblem::contract(std::size_t group, double allowed, ContractBatch boxes) const {
  Slices slices(*this, group, allowed);
  for (std::size_t b = 0; b < boxes.count; ++b) {
    slices.contract(boxes, b);
  }
}

}  // namespace bismar
