// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/evolve/evolve.hpp>

#include <cstddef>
#include <vector>

namespace bismar {

/// The non-dominated ones of all points added, each once.
class PointArchive {
 public:
  explicit PointArchive(std::size_t objectives) : objectives_(objectives) {}

  /// Takes effect with the next `settle`.
  void add(EvolvedPoint point) { waiting_.push_back(std::move(point)); }
  /// Lets the points added since the last time in, and drops what is dominated.
  void settle();

  /// By (objectives, group, x).
  [[nodiscard]] const std::vector<EvolvedPoint>& points() const { return points_; }
  [[nodiscard]] std::vector<EvolvedPoint> release() { return std::move(points_); }

 private:
  void keep_front_of_two();
  void keep_front_of_more();

  std::size_t objectives_;
  std::vector<EvolvedPoint> points_;
  std::vector<EvolvedPoint> waiting_;
};

}  // namespace bismar
