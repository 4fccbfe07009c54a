// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// What of the points found is kept.
enum class Keep : std::uint8_t {
  exact,    ///< All that are non-dominated, ties too: a box falls only if it is strictly beaten.
  spaced,   ///< Non-dominated; those within a quarter of the tolerance of a kept one are left out.
  best_one  ///< The least in the first objective, then in the next ones.
};

/// The feasible points of one group.
class BISMAR_API OwnFront {
 public:
  /// @param absolute  One an objective; it outlives this.
  OwnFront(std::size_t variables,
           std::size_t objectives,
           std::size_t constraints,
           double epsilon,
           std::span<const double> absolute,
           Keep keep);

  [[nodiscard]] bool empty() const { return order_.empty(); }
  [[nodiscard]] std::size_t size() const { return order_.size(); }
  /// Point p of the front; two objectives: by the first ascending.
  [[nodiscard]] std::span<const double> x(std::size_t p) const;
  [[nodiscard]] std::span<const double> objectives(std::size_t p) const;
  [[nodiscard]] std::span<const double> utilisations(std::size_t p) const;

  /// @return Whether the point was kept; what it dominates is gone then.
  bool add(std::span<const double> x,
           std::span<const double> objectives,
           std::span<const double> utilisations);

  /// Whether a point keeps the promise for all that has these lower bounds; `needed` is then an
  /// epsilon that is enough for it.
  [[nodiscard]] bool covers(std::span<const double> lower, double& needed) const;
  /// The least epsilon at which a point does; infinity where none can.
  [[nodiscard]] double needed(std::span<const double> lower) const;

 private:
  [[nodiscard]] const double* row(std::uint32_t slot) const {
    return &objectives_[slot * n_objectives_];
  }
  [[nodiscard]] double limit(double lower, std::size_t j, double share) const;
  /// Whether the point keeps the promise with `share` of the tolerance.
  [[nodiscard]] bool reaches(const double* point,
                             std::span<const double> lower,
                             double share) const;
  [[nodiscard]] double needed_of(const double* point, std::span<const double> lower) const;
  /// A point that reaches `lower`, as an index into order_; size() where none does.
  [[nodiscard]] std::size_t find(std::span<const double> lower, double share) const;
  [[nodiscard]] bool is_wanted(std::span<const double> x, std::span<const double> objectives) const;
  void drop_dominated(std::span<const double> objectives);

  std::size_t n_variables_;
  std::size_t n_objectives_;
  std::size_t n_constraints_;
  double epsilon_;
  std::span<const double> absolute_;
  Keep keep_;
  std::vector<double> x_;             ///< [slots x variables]
  std::vector<double> objectives_;    ///< [slots x objectives]
  std::vector<double> utilisations_;  ///< [slots x constraints]
  std::vector<std::uint32_t> order_;  ///< Slots in use.
  std::vector<std::uint32_t> free_;
};

}  // namespace bismar
