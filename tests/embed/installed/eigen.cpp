// SPDX-License-Identifier: MIT
// Compiles where the consumer has Eigen.
#include <bismar/eigen/matrix.hpp>

double first_value(const bismar::eigen::RowMajorMatrix& matrix) {
  return bismar::eigen::as_span(matrix).front();
}
