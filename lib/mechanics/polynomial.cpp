// SPDX-License-Identifier: MIT
#include "mechanics/polynomial.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <vector>

namespace bismar::mechanics {

double Polynomial::operator()(double x) const {
  double value = 0.0;
  for (std::size_t k = terms; k-- > 0;) {
    value = value * x + c[k];
  }
  return value;
}

Polynomial Polynomial::derivative() const {
  Polynomial result;
  for (std::size_t k = 1; k < terms; ++k) {
    result.c[k - 1] = static_cast<double>(k) * c[k];
  }
  return result;
}

Polynomial Polynomial::integral(double constant) const {
  Polynomial result;
  result.c[0] = constant;
  for (std::size_t k = 1; k < terms; ++k) {
    result.c[k] = c[k - 1] / static_cast<double>(k);
  }
  return result;
}

namespace {

double bisect(const Polynomial& p, double low, double high) {
  const bool rising = p(low) < 0.0;
  for (;;) {
    const double middle = low + (high - low) / 2.0;
    if (middle <= low || middle >= high) {
      return middle;
    }
    ((p(middle) < 0.0) == rising ? low : high) = middle;
  }
}

}  // namespace

std::vector<double> sign_changes(const Polynomial& p, double length) {
  std::vector<double> found;
  const bool constant =
      std::all_of(p.c.begin() + 1, p.c.end(), [](double value) { return value == 0.0; });
  if (constant) {
    return found;
  }
  std::vector<double> bounds = sign_changes(p.derivative(), length);
  bounds.insert(bounds.begin(), 0.0);
  bounds.push_back(length);
  double left = p(0.0);
  for (std::size_t k = 0; k + 1 < bounds.size(); ++k) {
    const double right = p(bounds[k + 1]);
    if ((left < 0.0 && right > 0.0) || (left > 0.0 && right < 0.0)) {
      found.push_back(bisect(p, bounds[k], bounds[k + 1]));
    } else if (right == 0.0 && bounds[k + 1] < length) {
      found.push_back(bounds[k + 1]);  // exactly at a stationary point: keep it, it may be a change
    }
    left = right;
  }
  return found;
}

double largest(const Polynomial& p, double length) {
  double value = std::max(std::abs(p(0.0)), std::abs(p(length)));
  for (const double x : sign_changes(p.derivative(), length)) {
    value = std::max(value, std::abs(p(x)));
  }
  return value;
}

}  // namespace bismar::mechanics
