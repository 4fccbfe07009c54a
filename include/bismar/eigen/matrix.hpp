// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>

#include <Eigen/Core>

#include <cstddef>
#include <span>
#include <string>
#include <type_traits>
#include <vector>

/// Bridges between Eigen matrices and the row-major spans that the library takes and gives: an n x
/// k matrix of objectives has one design a row and one objective a column. For those who link
/// bismar::eigen; nothing else of the library includes Eigen.
namespace bismar::eigen {

/// The matrix whose memory is laid out as the library lays out n x k values. Use it for objectives
/// that are to be handed over without a copy.
using RowMajorMatrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, Eigen::RowMajor>;

/// The values of `matrix`, row after row, without a copy. The span is valid while `matrix` lives
/// and keeps its size.
[[nodiscard]] inline std::span<const double> as_span(const RowMajorMatrix& matrix) {
  return {matrix.data(), static_cast<std::size_t>(matrix.size())};
}

/// A span of a temporary would dangle.
std::span<const double> as_span(RowMajorMatrix&&) = delete;

/// The values of any matrix or expression of doubles, row after row, in new memory.
template <typename Derived>
[[nodiscard]] std::vector<double> row_major(const Eigen::DenseBase<Derived>& matrix) {
  static_assert(std::is_same_v<typename Derived::Scalar, double>, "The library works in double.");
  std::vector<double> values(static_cast<std::size_t>(matrix.size()));
  Eigen::Map<RowMajorMatrix>(values.data(), matrix.rows(), matrix.cols()) =
      matrix.derived().matrix();
  return values;
}

/// The values `values`, row after row, seen as a matrix of `columns` columns, without a copy. The
/// view is valid while the memory of `values` lives.
///
/// @throws bismar::Error  invalid_argument: `columns` is 0 or does not divide the number of values.
[[nodiscard]] inline Eigen::Map<const RowMajorMatrix> as_matrix(std::span<const double> values,
                                                                std::size_t columns) {
  if (columns == 0 || values.size() % columns != 0) {
    throw Error({.code = Code::invalid_argument,
                 .where = "columns",
                 .found = std::to_string(columns),
                 .allowed = "a divisor of " + std::to_string(values.size()),
                 .message = std::to_string(values.size()) + " values cannot be cut into rows of " +
                            std::to_string(columns) + "."});
  }
  return {values.data(),
          static_cast<Eigen::Index>(values.size() / columns),
          static_cast<Eigen::Index>(columns)};
}

}  // namespace bismar::eigen
