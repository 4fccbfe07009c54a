// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <vector>

namespace bismar {

/// min g d + d B d / 2 subject to rows a_i d <= b_i, few variables, B positive definite, b >= 0 so
/// that d = 0 is allowed.
struct QuadraticProgram {
  std::size_t variables = 0;
  std::vector<double> matrix;    ///< B, [variables x variables]
  std::vector<double> gradient;  ///< g, [variables]
  std::vector<double> rows;      ///< a, [limits x variables]
  std::vector<double> limits;    ///< b, [limits]
};

struct QuadraticStep {
  std::vector<double> step;         ///< d
  std::vector<double> multipliers;  ///< [limits], >= 0
};

/// Primal active-set method from d = 0 (Nocedal and Wright, Numerical Optimization, 2nd ed., 2006,
/// algorithm 16.3; from memory). Every iterate is allowed, and so is what is returned when the
/// iterations run out, 20 + 4 (variables + limits): then the multipliers are those of the last one.
[[nodiscard]] BISMAR_API QuadraticStep solve_quadratic(const QuadraticProgram& program);

/// Solves a x = b by elimination with partial pivoting; a [n x n] and b are overwritten, b becomes
/// x.
/// @return false: a is singular as computed.
[[nodiscard]] BISMAR_API bool solve_linear(std::vector<double>& a, std::vector<double>& b);

/// Whether a symmetric matrix [n x n] is positive definite, by a margin of `least` in each pivot.
[[nodiscard]] BISMAR_API bool is_positive_definite(std::vector<double> a,
                                                   std::size_t n,
                                                   double least);

}  // namespace bismar
