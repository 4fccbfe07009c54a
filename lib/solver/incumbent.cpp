// SPDX-License-Identifier: MIT
#include <bismar/solver/certified_front.hpp>

#include <algorithm>
#include <cmath>
#include <mutex>
#include <shared_mutex>
#include <utility>

namespace bismar {

/// Points are kept moved up by the margin, so that `beats` compares only. Moved points are dropped
/// once another one is no worse: the margin grows with the value, so nothing is lost.
struct Incumbent::Implementation {
  Implementation(std::size_t count, double by, std::vector<double> at_least)
      : objectives(count), margin(by), absolute(std::move(at_least)) {}

  std::size_t objectives;
  double margin;
  std::vector<double> absolute;
  mutable std::shared_mutex mutex;
  /// Two objectives: the first ascending, the second strictly descending.
  std::vector<std::pair<double, double>> staircase;
  std::vector<double> rows;  ///< Any other number: [points x objectives].

  [[nodiscard]] double moved(double value, std::size_t j) const {
    return value + std::max(margin * std::abs(value), absolute.empty() ? 0.0 : absolute[j]);
  }

  void add_pair(double first, double second) {
    auto at = std::lower_bound(staircase.begin(), staircase.end(), std::pair(first, second));
    if (at != staircase.begin() && std::prev(at)->second <= second) {
      return;
    }
    auto end = at;
    while (end != staircase.end() && end->second >= second) {
      ++end;
    }
    if (at != end) {
      *at = {first, second};
      staircase.erase(std::next(at), end);
    } else {
      staircase.insert(at, {first, second});
    }
  }

  void add_row(std::span<const double> row) {
    const std::size_t k = objectives;
    const auto no_worse = [k](const double* a, const double* b) {
      for (std::size_t j = 0; j < k; ++j) {
        if (!(a[j] <= b[j])) {
          return false;
        }
      }
      return true;
    };
    for (std::size_t r = 0; r < rows.size(); r += k) {
      if (no_worse(&rows[r], row.data())) {
        return;
      }
    }
    for (std::size_t r = 0; r < rows.size();) {
      if (no_worse(row.data(), &rows[r])) {
        std::copy(rows.end() - static_cast<std::ptrdiff_t>(k),
                  rows.end(),
                  rows.begin() + static_cast<std::ptrdiff_t>(r));
        rows.resize(rows.size() - k);
      } else {
        r += k;
      }
    }
    rows.insert(rows.end(), row.begin(), row.end());
  }
};

Incumbent::Incumbent(std::size_t objectives, double margin, std::vector<double> absolute)
    : implementation_(std::make_unique<Implementation>(objectives, margin, std::move(absolute))) {}

Incumbent::~Incumbent() = default;

void Incumbent::add(std::span<const double> objectives) {
  auto& own = *implementation_;
  if (own.objectives == 2) {
    const double first = own.moved(objectives[0], 0);
    const double second = own.moved(objectives[1], 1);
    const std::unique_lock lock(own.mutex);
    own.add_pair(first, second);
    return;
  }
  std::vector<double> row(own.objectives);
  for (std::size_t j = 0; j < row.size(); ++j) {
    row[j] = own.moved(objectives[j], j);
  }
  const std::unique_lock lock(own.mutex);
  own.add_row(row);
}

bool Incumbent::beats(std::span<const double> lower) const {
  const auto& own = *implementation_;
  const std::shared_lock lock(own.mutex);
  if (own.objectives == 2) {
    // Of the points that are less in the first, the last is the least in the second.
    const auto at = std::lower_bound(
        own.staircase.begin(),
        own.staircase.end(),
        lower[0],
        [](const std::pair<double, double>& point, double value) { return point.first < value; });
    return at != own.staircase.begin() && std::prev(at)->second < lower[1];
  }
  const std::size_t k = own.objectives;
  for (std::size_t r = 0; r < own.rows.size(); r += k) {
    std::size_t j = 0;
    while (j < k && own.rows[r + j] < lower[j]) {
      ++j;
    }
    if (j == k) {
      return true;
    }
  }
  return false;
}

}  // namespace bismar
