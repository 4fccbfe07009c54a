// SPDX-License-Identifier: MIT
#include <bismar/solver/box_problem.hpp>

#include "solver/pieces.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Pieces of a box beyond which it gets no bound: finding one would cost what trying them does.
constexpr std::size_t most_pieces = 64;

double outward(double value, double direction) {
  if (std::isnan(value)) {
    return direction * infinity;
  }
  if (!std::isfinite(value)) {
    return value;
  }
  const double step =
      outward_ulps * std::numeric_limits<double>::epsilon() * std::max(std::abs(value), 1e-300);
  return value + direction * step;
}

/// Evaluations at the corners of pieces, each corner of a piece made once.
class CornerBounds {
 public:
  CornerBounds(const BoxProblem& problem, std::size_t group)
      : problem_(problem),
        group_(group),
        variables_(problem.variables(group)),
        objectives_(problem.objectives()),
        outputs_(objectives_ + problem.constraints(group)),
        index_(variables_.size()),
        piece_(variables_.size()),
        corner_(variables_.size()),
        x_(variables_.size()) {
    trends_.reserve(outputs_ * variables_.size());
    for (std::size_t i = 0; i < outputs_; ++i) {
      for (std::size_t v = 0; v < variables_.size(); ++v) {
        trends_.push_back(i < objectives_ ? problem.objective_trend(group, i, v)
                                          : problem.utilisation_trend(group, i - objectives_, v));
      }
    }
  }

  void bound(const BoxBatch& boxes, const BoundBatch& bounds, std::size_t b) {
    if (!cut(boxes, b)) {
      for (std::size_t i = 0; i < outputs_; ++i) {
        take(bounds, boxes.count, b, i, -infinity, infinity);
      }
      return;
    }
    bool more = true;
    while (more) {
      bound_piece(bounds, boxes.count, b);
      more = next_piece();
    }
  }

 private:
  /// Cuts the box into pieces; false: there are too many.
  bool cut(const BoxBatch& boxes, std::size_t b) {
    stretches_.clear();
    starts_.assign(1, 0);
    std::size_t pieces = 1;
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      const double lower = boxes.lower[v * boxes.count + b];
      const double upper = boxes.upper[v * boxes.count + b];
      pieces *= count_stretches(variables_[v], lower, upper);
      // A single variable is always cut: its bound is what the pieces are for.
      if (pieces > most_pieces && variables_.size() > 1) {
        return false;
      }
      append_stretches(variables_[v], lower, upper, stretches_);
      starts_.push_back(stretches_.size());
      index_[v] = starts_[v];
    }
    if (pieces == 0) {
      return false;
    }
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      piece_[v] = stretches_[index_[v]];
    }
    return true;
  }

  bool next_piece() {
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      const bool more = ++index_[v] < starts_[v + 1];
      if (!more) {
        index_[v] = starts_[v];
      }
      piece_[v] = stretches_[index_[v]];
      if (more) {
        return true;
      }
    }
    return false;
  }

  void bound_piece(const BoundBatch& bounds, std::size_t count, std::size_t b) {
    made_ = 0;
    for (std::size_t i = 0; i < outputs_; ++i) {
      if (!least_corner(i)) {
        take(bounds, count, b, i, -infinity, infinity);
        continue;
      }
      const double lower = outward(value(i), -1.0);
      double upper = infinity;
      if (i >= objectives_) {
        opposite_corner();
        upper = outward(value(i), 1.0);
      }
      take(bounds, count, b, i, lower, upper);
    }
  }

  void take(const BoundBatch& bounds,
            std::size_t count,
            std::size_t b,
            std::size_t i,
            double lower,
            double upper) const {
    if (i < objectives_) {
      double& least = bounds.objective_lower[i * count + b];
      least = std::min(least, lower);
      return;
    }
    const std::size_t at = (i - objectives_) * count + b;
    bounds.utilisation_lower[at] = std::min(bounds.utilisation_lower[at], lower);
    bounds.utilisation_upper[at] = std::max(bounds.utilisation_upper[at], upper);
  }

  /// The corner where an output is least, or false when nothing is known of it. Along a variable
  /// that cannot move any trend will do.
  bool least_corner(std::size_t i) {
    for (std::size_t v = 0; v < piece_.size(); ++v) {
      const Trend trend = trends_[i * piece_.size() + v];
      if (trend == Trend::neither && piece_[v].lower != piece_[v].upper) {
        return false;
      }
      corner_[v] = trend == Trend::falls ? 1 : 0;
    }
    return true;
  }

  void opposite_corner() {
    for (auto& at_upper : corner_) {
      at_upper = at_upper != 0 ? 0 : 1;
    }
  }

  /// Output i at the corner, evaluated unless it was.
  double value(std::size_t i) {
    for (std::size_t v = 0; v < piece_.size(); ++v) {
      x_[v] = corner_[v] != 0 ? piece_[v].upper : piece_[v].lower;
    }
    const auto same = [&](std::size_t m) {
      return std::equal(
          x_.begin(), x_.end(), corners_.begin() + static_cast<std::ptrdiff_t>(m * x_.size()));
    };
    std::size_t m = 0;
    while (m < made_ && !same(m)) {
      ++m;
    }
    if (m == made_) {
      ++made_;
      corners_.resize(std::max(corners_.size(), made_ * x_.size()));
      values_.resize(std::max(values_.size(), made_ * outputs_));
      std::copy(
          x_.begin(), x_.end(), corners_.begin() + static_cast<std::ptrdiff_t>(m * x_.size()));
      const auto out = std::span(values_).subspan(m * outputs_, outputs_);
      problem_.evaluate(group_, x_, out.first(objectives_), out.subspan(objectives_));
    }
    return values_[m * outputs_ + i];
  }

  const BoxProblem& problem_;
  std::size_t group_;
  std::span<const Variable> variables_;
  std::size_t objectives_;
  std::size_t outputs_;
  std::vector<Trend> trends_;  ///< [outputs x variables]
  std::vector<Stretch> stretches_;
  std::vector<std::size_t> starts_;
  std::vector<std::size_t> index_;
  std::vector<Stretch> piece_;
  std::vector<std::uint8_t> corner_;
  std::vector<double> x_;
  std::size_t made_ = 0;
  std::vector<double> corners_;  ///< [made x variables]
  std::vector<double> values_;   ///< [made x outputs]
};

}  // namespace

BoxProblem::~BoxProblem() = default;

void BoxProblem::bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const {
  std::fill(bounds.objective_lower.begin(), bounds.objective_lower.end(), infinity);
  std::fill(bounds.utilisation_lower.begin(), bounds.utilisation_lower.end(), infinity);
  std::fill(bounds.utilisation_upper.begin(), bounds.utilisation_upper.end(), -infinity);
  CornerBounds corners(*this, group);
  for (std::size_t b = 0; b < boxes.count; ++b) {
    corners.bound(boxes, bounds, b);
  }
}

std::uint32_t BoxProblem::size_direction(std::size_t group) const {
  const auto all = variables(group);
  const auto fits = [&](std::size_t v) {
    for (std::size_t i = 0; i < objectives(); ++i) {
      const Trend trend = objective_trend(group, i, v);
      if (trend != Trend::rises && trend != Trend::constant) {
        return false;
      }
    }
    for (std::size_t i = 0; i < constraints(group); ++i) {
      if (utilisation_trend(group, i, v) == Trend::neither) {
        return false;
      }
    }
    return true;
  };
  for (std::size_t v = 0; v < all.size(); ++v) {
    if (all[v].kind == Variable::Kind::continuous && fits(v)) {
      return static_cast<std::uint32_t>(v);
    }
  }
  return no_index;
}

bool BoxProblem::objectives_agree(std::size_t /*group*/) const { return objectives() == 1; }

bool BoxProblem::settle(std::size_t group, std::span<double> x, double lower, double upper) const {
  const std::uint32_t size = size_direction(group);
  if (size == no_index || !(lower <= upper)) {
    return false;
  }
  std::vector<bool> falls(constraints(group));
  for (std::size_t i = 0; i < falls.size(); ++i) {
    falls[i] = utilisation_trend(group, i, size) == Trend::falls;
  }
  std::vector<double> f(objectives());
  std::vector<double> u(falls.size());
  const auto largest_falling = [&](double at) {
    x[size] = at;
    evaluate(group, x, f, u);
    double largest = 0.0;
    for (std::size_t i = 0; i < u.size(); ++i) {
      // `!(u <= largest)`: not a number is no feasible place.
      if (falls[i] && !(u[i] <= largest)) {
        largest = std::isnan(u[i]) ? infinity : u[i];
      }
    }
    return largest;
  };
  std::vector<Stretch> pieces;
  append_stretches(variables(group)[size], lower, upper, pieces);
  for (const auto& piece : pieces) {
    const auto least = least_on_piece(largest_falling, piece.lower, piece.upper);
    if (!least) {
      continue;
    }
    x[size] = *least;
    evaluate(group, x, f, u);
    if (std::all_of(u.begin(), u.end(), [](double value) { return value <= 1.0; })) {
      return true;
    }
  }
  return false;
}

}  // namespace bismar
