// SPDX-License-Identifier: MIT
#include <bismar/solver/box_problem.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <map>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

double outward(double value, double direction) {
  if (!std::isfinite(value)) {
    return value;
  }
  const double step =
      outward_ulps * std::numeric_limits<double>::epsilon() * std::max(std::abs(value), 1e-300);
  return value + direction * step;
}

/// One stretch of one variable without a breakpoint inside.
struct Stretch {
  double lower;
  double upper;
};

/// The pieces of a box in one variable. A piece is (previous breakpoint, this one], so the next
/// starts at the next double.
std::vector<Stretch> stretches(const Variable& variable, double lower, double upper) {
  std::vector<Stretch> out;
  if (variable.kind == Variable::Kind::ordered_set) {
    // Nothing is known between the values of a set: each is a piece of its own.
    for (const double value : variable.values) {
      if (value >= lower && value <= upper) {
        out.push_back({value, value});
      }
    }
    return out;
  }
  double from = lower;
  for (const double breakpoint : variable.breakpoints) {
    if (breakpoint >= from && breakpoint < upper) {
      out.push_back({from, breakpoint});
      from = std::nextafter(breakpoint, infinity);
    }
  }
  out.push_back({from, upper});
  return out;
}

/// Evaluations at the corners of one piece, each made once.
class Corners {
 public:
  Corners(const BoxProblem& problem, std::size_t group, const std::vector<Stretch>& piece)
      : problem_(problem), group_(group), piece_(piece) {}

  struct Values {
    std::vector<double> objectives;
    std::vector<double> utilisations;
  };

  /// `corner` has one flag a variable: true at its upper end.
  const Values& at(const std::vector<bool>& corner) {
    const auto [entry, added] = made_.try_emplace(corner);
    if (added) {
      std::vector<double> x(piece_.size());
      for (std::size_t v = 0; v < x.size(); ++v) {
        x[v] = corner[v] ? piece_[v].upper : piece_[v].lower;
      }
      entry->second.objectives.resize(problem_.objectives());
      entry->second.utilisations.resize(problem_.constraints(group_));
      problem_.evaluate(group_, x, entry->second.objectives, entry->second.utilisations);
    }
    return entry->second;
  }

 private:
  const BoxProblem& problem_;
  std::size_t group_;
  const std::vector<Stretch>& piece_;
  std::map<std::vector<bool>, Values> made_;
};

/// The corner where an output with these trends is least, or nothing when one is `neither`.
template <class TrendOf>
bool least_corner(std::size_t variables, TrendOf&& trend_of, std::vector<bool>& corner) {
  for (std::size_t v = 0; v < variables; ++v) {
    const Trend trend = trend_of(v);
    if (trend == Trend::neither) {
      return false;
    }
    corner[v] = trend == Trend::falls;
  }
  return true;
}

}  // namespace

BoxProblem::~BoxProblem() = default;

void BoxProblem::bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const {
  const auto all = variables(group);
  const std::size_t count = boxes.count;
  std::fill(bounds.objective_lower.begin(), bounds.objective_lower.end(), infinity);
  std::fill(bounds.utilisation_lower.begin(), bounds.utilisation_lower.end(), infinity);
  std::fill(bounds.utilisation_upper.begin(), bounds.utilisation_upper.end(), -infinity);
  std::vector<bool> corner(all.size());
  std::vector<bool> opposite(all.size());

  for (std::size_t b = 0; b < count; ++b) {
    std::vector<std::vector<Stretch>> per_variable;
    for (std::size_t v = 0; v < all.size(); ++v) {
      per_variable.push_back(
          stretches(all[v], boxes.lower[v * count + b], boxes.upper[v * count + b]));
    }
    std::vector<std::size_t> index(all.size(), 0);
    std::vector<Stretch> piece(all.size());
    bool more = std::none_of(
        per_variable.begin(), per_variable.end(), [](const auto& list) { return list.empty(); });
    while (more) {
      for (std::size_t v = 0; v < all.size(); ++v) {
        piece[v] = per_variable[v][index[v]];
      }
      Corners corners(*this, group, piece);
      for (std::size_t i = 0; i < objectives(); ++i) {
        double& lower = bounds.objective_lower[i * count + b];
        const bool known = least_corner(
            all.size(), [&](std::size_t v) { return objective_trend(group, i, v); }, corner);
        const double least = known ? outward(corners.at(corner).objectives[i], -1.0) : -infinity;
        lower = std::min(lower, least);
      }
      for (std::size_t i = 0; i < constraints(group); ++i) {
        double& lower = bounds.utilisation_lower[i * count + b];
        double& upper = bounds.utilisation_upper[i * count + b];
        if (!least_corner(
                all.size(),
                [&](std::size_t v) { return utilisation_trend(group, i, v); },
                corner)) {
          lower = -infinity;
          upper = infinity;
          continue;
        }
        std::transform(corner.begin(), corner.end(), opposite.begin(), [](bool at) { return !at; });
        lower = std::min(lower, outward(corners.at(corner).utilisations[i], -1.0));
        upper = std::max(upper, outward(corners.at(opposite).utilisations[i], 1.0));
      }
      more = false;
      for (std::size_t v = 0; v < all.size() && !more; ++v) {
        more = ++index[v] < per_variable[v].size();
        if (!more) {
          index[v] = 0;
        }
      }
    }
  }
}

}  // namespace bismar
