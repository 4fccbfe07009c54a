// SPDX-License-Identifier: MIT
#include <bismar/mechanics/stress.hpp>

#include <cmath>

namespace bismar {

double von_mises(double sigma, double tau) { return std::sqrt(sigma * sigma + 3.0 * tau * tau); }

double largest_principal(double sigma, double tau) {
  const double half = sigma / 2.0;
  const double radius = std::sqrt(half * half + tau * tau);
  if (half >= 0.0) {
    return half + radius;
  }
  // (half + radius) (radius - half) = tau^2: the same without cancellation under compression.
  return tau * tau / (radius - half);
}

}  // namespace bismar
