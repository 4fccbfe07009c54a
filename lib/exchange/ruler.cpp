// SPDX-License-Identifier: MIT
#include <bismar/exchange/ruler.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <limits>
#include <string>
#include <utility>

#include "exchange/slope_order.hpp"

namespace bismar {
namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double greatest_objective = 0x1p1022;  // differences of such objectives do not overflow

struct Row {
  detail::TradePoint point;
  std::uint32_t index;
  std::uint32_t label;
};

bool is_same_point(const Row& a, const Row& b) {
  return a.point.priced == b.point.priced && a.point.cost == b.point.cost;
}

std::string number_text(double value) {
  char buffer[32];
  const auto result = std::to_chars(buffer, buffer + sizeof buffer, value);
  return {buffer, result.ptr};
}

void check_table(std::span<const double> objectives,
                 std::span<const std::uint32_t> labels,
                 FaultList& faults) {
  if (objectives.size() % 2 != 0) {
    faults.add({Code::invalid_argument,
                "objectives",
                std::to_string(objectives.size()) + " values",
                "two values per row",
                "there are " + std::to_string(objectives.size()) +
                    " values, an odd number; give two for each row"});
  }
  const std::size_t n = objectives.size() / 2;
  if (n > std::numeric_limits<std::uint32_t>::max()) {
    faults.add({Code::invalid_argument,
                "objectives",
                std::to_string(n) + " rows",
                "at most 4294967295 rows",
                "there are more rows than a row index can count; split the table"});
  }
  if (labels.size() != n) {
    faults.add({Code::conflict,
                "labels",
                std::to_string(labels.size()) + " labels",
                std::to_string(n) + " labels",
                "there are " + std::to_string(labels.size()) + " labels for " + std::to_string(n) +
                    " rows; give one for each row"});
  }
  for (std::size_t i = 0; i < objectives.size(); ++i) {
    if (std::abs(objectives[i]) <= greatest_objective) {
      continue;
    }
    const bool is_finite = std::isfinite(objectives[i]);
    faults.add({is_finite ? Code::out_of_range : Code::not_finite,
                "objectives[" + std::to_string(i / 2) + "][" + std::to_string(i % 2) + "]",
                number_text(objectives[i]),
                "a finite number of magnitude up to 2^1022",
                "the objective is " + number_text(objectives[i]) +
                    (is_finite ? "; give the column in a larger unit"
                               : "; leave the row out or give a finite number")});
  }
}

void check_range(const RulerOptions& options, FaultList& faults) {
  const auto add = [&](const char* where, double value, const char* allowed) {
    faults.add({std::isfinite(value) ? Code::out_of_range : Code::not_finite,
                where,
                number_text(value),
                allowed,
                std::string("the ") + (where[0] == 'f' ? "lower" : "upper") +
                    " end of the exchange range is " + number_text(value) + "; give " + allowed +
                    ", or leave it out"});
  };
  if (options.from && !(std::isfinite(*options.from) && *options.from >= 0.0)) {
    add("from", *options.from, "a finite number, 0 or more");
  }
  if (options.to &&
      !(std::isfinite(*options.to) && *options.to > std::max(0.0, options.from.value_or(0.0)))) {
    add("to", *options.to, "a finite number above the lower end");
  }
}

/// The alpha at which a gives way to b, which has less m and more C.
double breakpoint(const Row& a, const Row& b) {
  const double alpha = (b.point.cost - a.point.cost) / (a.point.priced - b.point.priced);
  if (!(alpha > 0.0) || !std::isfinite(alpha)) {
    throw Error(Fault{Code::out_of_range,
                      "objectives",
                      "rows " + std::to_string(a.index) + " and " + std::to_string(b.index),
                      "differences whose ratio is a finite double above zero",
                      "the exchange constant between rows " + std::to_string(a.index) + " and " +
                          std::to_string(b.index) +
                          " leaves the range of numbers; give the objectives in other units"});
  }
  return alpha;
}

/// Positions of hull vertices in the sorted rows, by rising alpha, and the breakpoints between
/// them.
struct Chain {
  std::vector<std::size_t> at;
  std::vector<double> breaks;  ///< Strictly rising; one less than `at`.
};

class RulerBuilder {
 public:
  RulerBuilder(std::span<const double> objectives,
               std::span<const std::uint32_t> labels,
               const RulerOptions& options)
      : low_(options.from.value_or(0.0)), high_(options.to.value_or(infinity)) {
    rows_.reserve(labels.size());
    for (std::size_t i = 0; i < labels.size(); ++i) {
      // Adding 0.0 makes -0.0 and 0.0 one value.
      rows_.push_back({{objectives[2 * i] + 0.0, objectives[2 * i + 1] + 0.0},
                       static_cast<std::uint32_t>(i),
                       labels[i]});
    }
    std::sort(rows_.begin(), rows_.end(), [](const Row& a, const Row& b) {
      if (a.point.priced != b.point.priced) {
        return a.point.priced < b.point.priced;
      }
      return a.point.cost != b.point.cost ? a.point.cost < b.point.cost : a.index < b.index;
    });
  }

  Ruler build() {
    Ruler ruler;
    if (rows_.empty()) {
      return ruler;
    }
    hull_ = chain(0, rows_.size(), nullptr);
    std::size_t first = 0;
    while (first < hull_.at.size()) {
      std::size_t last = first;
      while (last + 1 < hull_.at.size() && label(last + 1) == label(first)) {
        ++last;
      }
      if (starts_at(first) < high_ && ends_at(last) > low_) {
        ruler.stretches.push_back(stretch(first, last));
      }
      first = last + 1;
    }
    place_other_front_rows(ruler);
    return ruler;
  }

 private:
  [[nodiscard]] std::uint32_t label(std::size_t vertex) const {
    return rows_[hull_.at[vertex]].label;
  }
  [[nodiscard]] double starts_at(std::size_t vertex) const {
    return vertex == 0 ? 0.0 : hull_.breaks[vertex - 1];
  }
  [[nodiscard]] double ends_at(std::size_t vertex) const {
    return vertex == hull_.breaks.size() ? infinity : hull_.breaks[vertex];
  }
  [[nodiscard]] static std::optional<double> end_or_absent(double alpha) {
    return std::isinf(alpha) ? std::nullopt : std::optional(alpha);
  }

  /// The lower-left hull of the rows [first, last) whose label is not *excluded.
  [[nodiscard]] Chain chain(std::size_t first,
                            std::size_t last,
                            const std::uint32_t* excluded) const {
    std::vector<std::size_t> hull;  // by rising m
    for (std::size_t i = first; i < last; ++i) {
      const Row& row = rows_[i];
      const bool is_excluded = excluded != nullptr && row.label == *excluded;
      // The top of the stack is the last non-dominated row, so it has the least cost so far.
      if (is_excluded || (!hull.empty() && row.point.cost >= rows_[hull.back()].point.cost)) {
        continue;
      }
      while (hull.size() >= 2 &&
             detail::compare_exchange(
                 row.point, rows_[hull.back()].point, rows_[hull[hull.size() - 2]].point) >= 0) {
        hull.pop_back();
      }
      hull.push_back(i);
    }
    // Exact slopes rise strictly; rounded ones may not, and a range that rounds to nothing is none.
    Chain result;
    for (auto i = hull.rbegin(); i != hull.rend(); ++i) {
      while (!result.breaks.empty() &&
             breakpoint(rows_[result.at.back()], rows_[*i]) <= result.breaks.back()) {
        result.at.pop_back();
        result.breaks.pop_back();
      }
      if (!result.at.empty()) {
        result.breaks.push_back(breakpoint(rows_[result.at.back()], rows_[*i]));
      }
      result.at.push_back(*i);
    }
    return result;
  }

  /// Indices of the rows with the objectives of rows_[position], the first of them, whose label is
  /// not *excluded.
  [[nodiscard]] std::vector<std::uint32_t> equal_rows(std::size_t position,
                                                      const std::uint32_t* excluded) const {
    std::vector<std::uint32_t> result;
    for (std::size_t i = position; i < rows_.size() && is_same_point(rows_[i], rows_[position]);
         ++i) {
      if (excluded == nullptr || rows_[i].label != *excluded) {
        result.push_back(rows_[i].index);
      }
    }
    return result;
  }

  [[nodiscard]] double penalty(std::size_t vertex, double alpha) const {
    const detail::TradePoint& p = rows_[hull_.at[vertex]].point;
    return p.cost + alpha * p.priced;
  }

  /// Z of `row` less Z of the hull vertex, never below zero: the vertex is the best there is.
  [[nodiscard]] double regret(const Row& row, std::size_t vertex, double alpha) const {
    const detail::TradePoint& best = rows_[hull_.at[vertex]].point;
    const double cost = row.point.cost - best.cost;
    const double value = cost + alpha * (row.point.priced - best.priced);
    constexpr double rounding = 4.0 * std::numeric_limits<double>::epsilon();
    return value <= rounding * std::abs(cost) ? 0.0 : value;
  }

  /// The stretch of the hull vertices first..last, cut to the range.
  [[nodiscard]] RulerStretch stretch(std::size_t first, std::size_t last) const {
    RulerStretch result;
    result.label = label(first);
    for (std::size_t v = first; v <= last; ++v) {
      const double from = std::max(starts_at(v), low_);
      const double to = std::min(ends_at(v), high_);
      if (from < to) {
        const Row& row = rows_[hull_.at[v]];
        if (result.vertices.empty()) {
          result.from = from;
          result.penalty_from = penalty(v, from);
        }
        result.to = end_or_absent(to);
        result.penalty_to = result.to ? std::optional(penalty(v, to)) : std::nullopt;
        result.vertices.push_back({.rows = equal_rows(hull_.at[v], nullptr),
                                   .priced = row.point.priced,
                                   .cost = row.point.cost,
                                   .from = from,
                                   .to = result.to});
      }
    }
    add_runners_up(first, last, result);
    return result;
  }

  /// Only rows between the neighbouring vertices of other labels can be the runner-up: a row with
  /// more m than the vertex before the stretch is worse than that vertex from the start of the
  /// stretch on, one with less m than the vertex after it is worse up to its end.
  void add_runners_up(std::size_t first, std::size_t last, RulerStretch& result) const {
    const std::size_t low_m = last + 1 < hull_.at.size() ? hull_.at[last + 1] : 0;
    const std::size_t high_m = first > 0 ? hull_.at[first - 1] + 1 : rows_.size();
    const Chain others = chain(low_m, high_m, &result.label);
    std::size_t v = first;
    for (std::size_t k = 0; k < others.at.size(); ++k) {
      const double from = std::max(k == 0 ? 0.0 : others.breaks[k - 1], result.from);
      const double to = std::min(k == others.breaks.size() ? infinity : others.breaks[k],
                                 result.to.value_or(infinity));
      if (!(from < to)) {
        continue;
      }
      const Row& row = rows_[others.at[k]];
      while (v < last && ends_at(v) <= from) {
        ++v;
      }
      RunnerUp runner{.label = row.label,
                      .rows = equal_rows(others.at[k], &result.label),
                      .priced = row.point.priced,
                      .cost = row.point.cost,
                      .from = from,
                      .to = end_or_absent(to)};
      runner.regret_from = regret(row, v, from);
      runner.least_regret = runner.regret_from;
      runner.least_regret_at = from;
      const auto offer = [&runner](double value, double alpha) {
        if (value < runner.least_regret) {
          runner.least_regret = value;
          runner.least_regret_at = alpha;
        }
      };
      for (; v < last && ends_at(v) < to; ++v) {
        offer(regret(row, v, ends_at(v)), ends_at(v));
      }
      if (runner.to) {
        runner.regret_to = regret(row, v, to);
        offer(*runner.regret_to, to);
      }
      result.runners_up.push_back(std::move(runner));
    }
  }

  /// Sorts the non-dominated rows that are no vertices into ties and unsupported rows.
  void place_other_front_rows(Ruler& ruler) const {
    std::vector<std::size_t> front;  // every row of the front, by rising m
    for (std::size_t i = 0; i < rows_.size(); ++i) {
      if (front.empty() || rows_[i].point.cost < rows_[front.back()].point.cost ||
          is_same_point(rows_[i], rows_[front.back()])) {
        front.push_back(i);
      }
    }
    // By falling m, and by index among equal rows.
    std::size_t edge = 0;  // from hull vertex `edge` to `edge` + 1
    for (std::size_t end = front.size(); end > 0;) {
      std::size_t begin = end - 1;
      while (begin > 0 && is_same_point(rows_[front[begin - 1]], rows_[front[end - 1]])) {
        --begin;
      }
      const Row& row = rows_[front[begin]];
      while (edge < hull_.breaks.size() &&
             row.point.priced <= rows_[hull_.at[edge + 1]].point.priced) {
        ++edge;
      }
      if (front[begin] != hull_.at[edge]) {
        const double alpha = hull_.breaks[edge];
        const bool is_tie =
            detail::compare_exchange(
                rows_[hull_.at[edge]].point, row.point, rows_[hull_.at[edge + 1]].point) <= 0;
        for (std::size_t i = begin; i < end; ++i) {
          const Row& equal = rows_[front[i]];
          if (!is_tie) {
            ruler.unsupported.push_back(
                {equal.index, equal.label, regret(equal, edge, alpha), alpha});
          } else if (low_ <= alpha && alpha <= high_) {
            if (ruler.ties.empty() || ruler.ties.back().alpha != alpha) {
              ruler.ties.push_back({alpha, {}});
            }
            ruler.ties.back().rows.push_back(equal.index);
          }
        }
      }
      end = begin;
    }
  }

  double low_;
  double high_;
  std::vector<Row> rows_;  // by (m, C, index)
  Chain hull_;
};

}  // namespace

std::optional<std::size_t> Ruler::stretch_at(double alpha) const {
  if (stretches.empty() || !(alpha >= stretches.front().from)) {
    return std::nullopt;
  }
  const auto found = std::partition_point(
      stretches.begin(), stretches.end(), [alpha](const RulerStretch& stretch) {
        return stretch.to && *stretch.to < alpha;
      });
  if (found == stretches.end()) {
    return std::nullopt;
  }
  return static_cast<std::size_t>(found - stretches.begin());
}

Ruler exchange_ruler(std::span<const double> objectives,
                     std::span<const std::uint32_t> labels,
                     const RulerOptions& options) {
  FaultList faults;
  check_table(objectives, labels, faults);
  check_range(options, faults);
  faults.throw_if_any();
  return RulerBuilder(objectives, labels, options).build();
}

}  // namespace bismar
