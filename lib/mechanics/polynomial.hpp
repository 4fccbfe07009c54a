// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <array>
#include <cstddef>
#include <vector>

namespace bismar::mechanics {

/// A polynomial of degree at most 5 in a local coordinate: coefficients from the constant upwards.
struct BISMAR_API Polynomial {
  static constexpr std::size_t terms = 6;
  std::array<double, terms> c{};

  [[nodiscard]] double operator()(double x) const;
  [[nodiscard]] Polynomial derivative() const;
  /// The antiderivative with the value `constant` at 0; the highest term must be free.
  [[nodiscard]] Polynomial integral(double constant) const;
};

/// The points of the open interval (0, length) at which `p` changes its sign, in order. Between two
/// neighbouring stationary points p is monotone, so that bisection finds each to rounding. Points
/// at which p touches zero without a change of sign are not returned.
[[nodiscard]] BISMAR_API std::vector<double> sign_changes(const Polynomial& p, double length);

/// Largest |p| on [0, length].
[[nodiscard]] BISMAR_API double largest(const Polynomial& p, double length);

}  // namespace bismar::mechanics
