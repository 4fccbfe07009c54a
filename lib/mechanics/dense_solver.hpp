// SPDX-License-Identifier: MIT
#pragma once

#include <cstddef>
#include <vector>

namespace bismar::mechanics {

/// A square system of linear equations, row by row.
class DenseSystem {
 public:
  explicit DenseSystem(std::size_t n) : n_(n), a_(n * n, 0.0), b_(n, 0.0) {}

  [[nodiscard]] double& at(std::size_t row, std::size_t column) { return a_[row * n_ + column]; }
  [[nodiscard]] double& right(std::size_t row) { return b_[row]; }

  /// Gauss elimination with row pivots, n^3 / 3 steps; leaves nothing of the system.
  /// @throws bismar::InternalError where the matrix is singular to rounding.
  [[nodiscard]] std::vector<double> solve();

 private:
  /// Eliminates below the pivots of these columns, within these columns only; leaves the factors.
  void eliminate_columns(std::size_t first, std::size_t last);
  /// Takes rows first..last off row `target`, by the factors that stand in it, right of `from`.
  void subtract_rows(std::size_t target, std::size_t first, std::size_t last, std::size_t from);

  std::size_t n_;
  std::vector<double> a_;
  std::vector<double> b_;
};

}  // namespace bismar::mechanics
