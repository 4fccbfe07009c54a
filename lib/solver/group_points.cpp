// SPDX-License-Identifier: MIT
// The points that a search of one group tries, and the one that it polishes.
#include "solver/group_search.hpp"

#include "solver/pieces.hpp"
#include "solver/splitting.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Share of its range by which points that stand apart differ in some continuous variable.
constexpr double apart = 0.05;

}  // namespace

/// Corners that the trends recommend; an undecided variable stays in its middle.
void GroupSearch::read_trends() {
  const auto common = [](std::size_t count, auto&& trend_of) {
    bool may_fall = true;
    bool may_rise = true;
    for (std::size_t i = 0; i < count; ++i) {
      const Trend trend = trend_of(i);
      may_fall = may_fall && (trend == Trend::falls || trend == Trend::constant);
      may_rise = may_rise && (trend == Trend::rises || trend == Trend::constant);
    }
    return may_rise ? -1 : may_fall ? 1 : 0;
  };
  for (std::size_t v = 0; v < n_; ++v) {
    lean_.push_back(
        common(k_, [&](std::size_t i) { return problem_.objective_trend(group_, i, v); }));
    ease_.push_back(
        common(m_, [&](std::size_t i) { return problem_.utilisation_trend(group_, i, v); }));
  }
}

void GroupSearch::refuse_zero(std::size_t j) const {
  throw Error(Fault{.code = Code::out_of_range,
                    .where = "absolute[" + std::to_string(j) + "]",
                    .found = "0",
                    .allowed = "above 0",
                    .message = "Objective " + std::to_string(j) +
                               " can reach zero or less, where a relative tolerance means "
                               "nothing. Give it an absolute one."});
}

void GroupSearch::evaluate() {
  problem_.evaluate(group_, x_, f_, u_);
  ++evaluations_;
}

bool GroupSearch::try_point() {
  bool feasible = true;
  for (std::size_t i = 0; i < m_; ++i) {
    feasible = feasible && u_[i] <= 1.0;
    least_seen_[i] = std::min(least_seen_[i], u_[i]);
  }
  if (!feasible || !std::all_of(f_.begin(), f_.end(), [](double y) { return std::isfinite(y); })) {
    return false;
  }
  for (std::size_t j = 0; j < k_ && has_continuous_; ++j) {
    if (!(f_[j] > 0.0) && absolute_[j] == 0.0) {
      refuse_zero(j);
    }
  }
  if (one_point_) {
    note_start();
  }
  if (!keep(x_, f_, u_)) {
    return true;
  }
  // A point that is hardly better is polished at the end, if it still is the best then.
  const double worth = 0.25 * options_.epsilon;
  const bool better = polished_.empty() || f_[0] < polished_[0] - worth * std::abs(polished_[0]);
  if (one_point_ && taken_ > polished_after && better) {
    polish_best();
  }
  return true;
}

bool GroupSearch::try_points(std::uint32_t box) {
  if (settled_ != no_index) {
    return try_settled(box);
  }
  const auto lower = open_.lower(box);
  const auto upper = open_.upper(box);
  const auto at = [&](const std::vector<int>* sides) {
    for (std::size_t v = 0; v < n_; ++v) {
      const int side = sides == nullptr ? 0 : (*sides)[v];
      x_[v] = side < 0   ? lower[v]
              : side > 0 ? upper[v]
                         : middle_of(variables_[v], lower[v], upper[v]);
    }
    evaluate();
    return try_point();
  };
  const bool feasible = at(nullptr);
  if (std::equal(lower.begin(), lower.end(), upper.begin())) {
    return true;
  }
  at(feasible ? &lean_ : &ease_);
  return false;
}

bool GroupSearch::try_settled(std::uint32_t box) {
  const auto lower = open_.lower(box);
  const auto upper = open_.upper(box);
  bool single = !has_breakpoint_inside(variables_[settled_], lower[settled_], upper[settled_]);
  for (std::size_t v = 0; v < n_; ++v) {
    x_[v] = middle_of(variables_[v], lower[v], upper[v]);
    single = single && (v == settled_ || lower[v] == upper[v]);
  }
  ++evaluations_;
  if (!problem_.settle(group_, x_, lower[settled_], upper[settled_])) {
    x_[settled_] = upper[settled_];
    evaluate();
    try_point();
    return single;
  }
  if (x_[settled_] == lower[settled_]) {
    // What was cut off below has a margin less than delta: the least size may lie there.
    double least = whole_range(variables_[settled_]).lower_end;
    for (const double at : variables_[settled_].breakpoints) {
      least = at < lower[settled_] ? std::nextafter(at, infinity) : least;
    }
    ++evaluations_;
    if (least < lower[settled_] && !problem_.settle(group_, x_, least, lower[settled_])) {
      x_[settled_] = lower[settled_];
    }
  }
  evaluate();
  try_point();
  return single;
}

void GroupSearch::polish_best() {
  PolishedPoint point{x_, f_, u_};
  origins_.push_back(x_);
  polish(problem_, group_, size_, point, evaluations_);
  keep(point.x, point.objectives, point.utilisations);
  const auto best = front_.objectives(0);
  polished_.assign(best.begin(), best.end());
}

void GroupSearch::polish_found() {
  // No better than rounding is not worth another polish.
  if (front_.empty() || (!polished_.empty() &&
                         front_.objectives(0)[0] >= polished_[0] - 1e-9 * std::abs(polished_[0]))) {
    return;
  }
  std::copy(front_.x(0).begin(), front_.x(0).end(), x_.begin());
  std::copy(front_.objectives(0).begin(), front_.objectives(0).end(), f_.begin());
  std::copy(front_.utilisations(0).begin(), front_.utilisations(0).end(), u_.begin());
  polish_best();
}

bool GroupSearch::same_place(std::span<const double> a, std::span<const double> b) const {
  for (std::size_t v = 0; v < n_; ++v) {
    const double distance = share_of_width(v, std::min(a[v], b[v]), std::max(a[v], b[v]));
    if (v != size_ && distance > (variables_[v].kind == Variable::Kind::continuous ? apart : 0.0)) {
      return false;
    }
  }
  return true;
}

/// Keeps the best points that stand apart: polished, they may end below the best one.
void GroupSearch::note_start() {
  const auto better = [](const PolishedPoint& a, const PolishedPoint& b) {
    return a.objectives < b.objectives;
  };
  const auto same = std::find_if(starts_.begin(), starts_.end(), [&](const PolishedPoint& start) {
    return same_place(start.x, x_);
  });
  if (same != starts_.end()) {
    if (f_ < same->objectives) {
      *same = {x_, f_, u_};
    }
  } else if (starts_.size() < most_starts) {
    starts_.push_back({x_, f_, u_});
  } else if (const auto worst = std::max_element(starts_.begin(), starts_.end(), better);
             f_ < worst->objectives) {
    *worst = {x_, f_, u_};
  }
}

void GroupSearch::polish_starts() {
  for (auto& start : starts_) {
    // Near the best one, or near where a polish began before, it would end where that did.
    const bool known = same_place(start.x, front_.x(0)) ||
                       std::any_of(origins_.begin(), origins_.end(), [&](const auto& origin) {
                         return same_place(start.x, origin);
                       });
    if (!known) {
      polish(problem_, group_, size_, start, evaluations_);
      keep(start.x, start.objectives, start.utilisations);
    }
  }
}

bool GroupSearch::keep(std::span<const double> x,
                       std::span<const double> f,
                       std::span<const double> u) {
  if (!front_.add(x, f, u)) {
    return false;
  }
  if (incumbent_ != nullptr) {
    incumbent_->add(f);
  }
  return true;
}

}  // namespace bismar
