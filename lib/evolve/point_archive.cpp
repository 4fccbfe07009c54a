// SPDX-License-Identifier: MIT
#include "evolve/point_archive.hpp"

#include <bismar/pareto/dominance.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <iterator>
#include <tuple>
#include <utility>

namespace bismar {

namespace {

bool before(const EvolvedPoint& a, const EvolvedPoint& b) {
  return std::tie(a.objectives, a.group, a.x) < std::tie(b.objectives, b.group, b.x);
}

bool same(const EvolvedPoint& a, const EvolvedPoint& b) { return a.group == b.group && a.x == b.x; }

}  // namespace

void PointArchive::settle() {
  if (waiting_.empty()) {
    return;
  }
  std::sort(waiting_.begin(), waiting_.end(), before);
  std::vector<EvolvedPoint> all;
  all.reserve(points_.size() + waiting_.size());
  std::merge(std::make_move_iterator(points_.begin()),
             std::make_move_iterator(points_.end()),
             std::make_move_iterator(waiting_.begin()),
             std::make_move_iterator(waiting_.end()),
             std::back_inserter(all),
             before);
  waiting_.clear();
  // One x has one vector of objectives, so that its copies stand side by side.
  all.erase(std::unique(all.begin(), all.end(), same), all.end());
  points_ = std::move(all);
  objectives_ == 2 ? keep_front_of_two() : keep_front_of_more();
}

void PointArchive::keep_front_of_two() {
  std::vector<double> objectives;
  objectives.reserve(2 * points_.size());
  for (const auto& point : points_) {
    objectives.insert(objectives.end(), point.objectives.begin(), point.objectives.end());
  }
  std::vector<EvolvedPoint> front;
  for (const auto row : front_2d(objectives)) {
    front.push_back(std::move(points_[row]));
  }
  points_ = std::move(front);
}

void PointArchive::keep_front_of_more() {
  // In this order a point is dominated by an earlier one only, and by one that is kept.
  std::vector<EvolvedPoint> front;
  for (auto& point : points_) {
    const bool is_dominated = std::any_of(front.begin(), front.end(), [&](const auto& other) {
      return dominates(other.objectives, point.objectives);
    });
    if (!is_dominated) {
      front.push_back(std::move(point));
    }
  }
  points_ = std::move(front);
}

}  // namespace bismar
