// SPDX-License-Identifier: MIT
#include <bismar/eigen/matrix.hpp>

#include "support/catch.hpp"

#include <cstddef>
#include <span>
#include <string>
#include <vector>

namespace {

using bismar::eigen::RowMajorMatrix;

/// Three designs with two objectives: the values count up row after row.
Eigen::MatrixXd counting_matrix() {
  Eigen::MatrixXd matrix(3, 2);  // stored column after column
  matrix << 1.0, 2.0, 3.0, 4.0, 5.0, 6.0;
  return matrix;
}

const std::vector<double> counted{1.0, 2.0, 3.0, 4.0, 5.0, 6.0};

}  // namespace

TEST_CASE("A matrix stored by columns is copied out row after row") {
  CHECK(bismar::eigen::row_major(counting_matrix()) == counted);
}

TEST_CASE("An expression and an array are copied out like a matrix") {
  const Eigen::MatrixXd matrix = counting_matrix();
  CHECK(bismar::eigen::row_major(matrix.topRows(1) * 2.0) == std::vector<double>{2.0, 4.0});
  CHECK(bismar::eigen::row_major(matrix.array().bottomRows(1)) == std::vector<double>{5.0, 6.0});
}

TEST_CASE("A row-major matrix is handed over without a copy") {
  const RowMajorMatrix matrix = counting_matrix();
  const std::span<const double> values = bismar::eigen::as_span(matrix);
  CHECK(values.data() == matrix.data());
  CHECK(std::vector<double>(values.begin(), values.end()) == counted);
}

TEST_CASE("Values of the library are seen as a matrix without a copy") {
  const auto matrix = bismar::eigen::as_matrix(counted, 2);
  CHECK(matrix.data() == counted.data());
  CHECK(matrix.rows() == 3);
  CHECK(matrix.cols() == 2);
  CHECK((matrix.array() == counting_matrix().array()).all());
}

TEST_CASE("Values that make no whole rows are refused") {
  for (const std::size_t columns : {std::size_t{0}, std::size_t{4}}) {
    try {
      static_cast<void>(bismar::eigen::as_matrix(counted, columns));
      FAIL("accepted " << columns << " columns");
    } catch (const bismar::Error& error) {
      REQUIRE(error.faults().size() == 1);
      CHECK(error.faults()[0].code == bismar::Code::invalid_argument);
      CHECK(error.faults()[0].where == "columns");
      CHECK(error.faults()[0].found == std::to_string(columns));
    }
  }
}

TEST_CASE("An empty matrix has no values") {
  CHECK(bismar::eigen::row_major(Eigen::MatrixXd(0, 2)).empty());
  const RowMajorMatrix none = bismar::eigen::as_matrix({}, 2);
  CHECK(none.cols() == 2);
  CHECK(bismar::eigen::as_span(none).empty());
}
