// SPDX-License-Identifier: MIT
#include "mechanics/dense_solver.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <utility>

namespace bismar::mechanics {

void DenseSystem::eliminate_columns(std::size_t first, std::size_t last) {
  for (std::size_t k = first; k < last; ++k) {
    std::size_t pivot = k;
    for (std::size_t i = k + 1; i < n_; ++i) {
      if (std::abs(at(i, k)) > std::abs(at(pivot, k))) {
        pivot = i;
      }
    }
    if (!(std::abs(at(pivot, k)) > 0.0)) {
      throw InternalError("singular system of the torsion problem");
    }
    if (pivot != k) {
      std::swap_ranges(&at(k, 0), &at(k, 0) + n_, &at(pivot, 0));
      std::swap(b_[k], b_[pivot]);
    }
    const double* const row = &at(k, 0);
    for (std::size_t i = k + 1; i < n_; ++i) {
      double* const other = &at(i, 0);
      const double factor = other[k] / row[k];
      other[k] = factor;
      for (std::size_t j = k + 1; j < last; ++j) {
        other[j] -= factor * row[j];
      }
      b_[i] -= factor * b_[k];
    }
  }
}

void DenseSystem::subtract_rows(std::size_t target,
                                std::size_t first,
                                std::size_t last,
                                std::size_t from) {
  double* const row = &at(target, 0);
  std::size_t k = first;
  for (; k + 4 <= last; k += 4) {
    const double f0 = row[k];
    const double f1 = row[k + 1];
    const double f2 = row[k + 2];
    const double f3 = row[k + 3];
    const double* const r0 = &at(k, 0);
    const double* const r1 = r0 + n_;
    const double* const r2 = r1 + n_;
    const double* const r3 = r2 + n_;
    for (std::size_t j = from; j < n_; ++j) {
      row[j] -= f0 * r0[j] + f1 * r1[j] + f2 * r2[j] + f3 * r3[j];
    }
  }
  for (; k < last; ++k) {
    const double f = row[k];
    const double* const r = &at(k, 0);
    for (std::size_t j = from; j < n_; ++j) {
      row[j] -= f * r[j];
    }
  }
}

std::vector<double> DenseSystem::solve() {
  // Columns in blocks, so that a row to the right is read once for a whole block of pivots.
  constexpr std::size_t block = 32;
  for (std::size_t first = 0; first < n_; first += block) {
    const std::size_t last = std::min(n_, first + block);
    eliminate_columns(first, last);
    for (std::size_t i = first + 1; i < n_; ++i) {
      subtract_rows(i, first, std::min(i, last), last);
    }
  }
  std::vector<double> x(n_);
  for (std::size_t k = n_; k-- > 0;) {
    double sum = b_[k];
    for (std::size_t j = k + 1; j < n_; ++j) {
      sum -= at(k, j) * x[j];
    }
    x[k] = sum / at(k, k);
  }
  return x;
}

}  // namespace bismar::mechanics
