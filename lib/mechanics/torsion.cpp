// SPDX-License-Identifier: MIT
#include <bismar/mechanics/torsion.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <cmath>
#include <numbers>

namespace bismar {

namespace {

/// sum over odd n of 1/n^5 = 31/32 zeta(5).
constexpr double odd_fifth_powers = 31.0 / 32.0 * 1.036927755143369926331365;

}  // namespace

RectangleTorsion rectangle_torsion(double side_ratio) {
  FaultList faults;
  mechanics::require_finite(faults, "side_ratio", side_ratio);
  if (std::isfinite(side_ratio) && side_ratio < 1.0) {
    mechanics::add_out_of_range(
        faults, "side_ratio", side_ratio, "the long side over the short side, 1 or above");
  }
  faults.throw_if_any();

  constexpr double pi = std::numbers::pi;
  double remainder = 0.0;  // sum of (1 - tanh)/n^5
  double shear_sum = 0.0;  // sum of 1/(n^2 cosh)
  for (int n = 1;; n += 2) {
    const double odd = n;
    const double decay = std::exp(-odd * pi * side_ratio / 2.0);
    const double square = odd * odd;
    // 1 - tanh x = 2 e^(-2x) / (1 + e^(-2x)) and 1/cosh x = 2 e^-x / (1 + e^(-2x)): no
    // cancellation.
    remainder += 2.0 * decay * decay / (1.0 + decay * decay) / (square * square * odd);
    const double shear_term = 2.0 * decay / (1.0 + decay * decay) / square;
    shear_sum += shear_term;
    // The slower of the two sums decides; a term below 1e-18 changes neither.
    if (shear_term < 1e-18) {
      break;
    }
  }
  const double pi_fifth = pi * pi * pi * pi * pi;
  RectangleTorsion result;
  result.k2 = (1.0 - 192.0 / pi_fifth / side_ratio * (odd_fifth_powers - remainder)) / 3.0;
  result.k1 = result.k2 / (1.0 - 8.0 / (pi * pi) * shear_sum);
  return result;
}

double bredt_shear_stress(double torque, double enclosed_area, double wall) {
  FaultList faults;
  mechanics::require_finite(faults, "torque", torque);
  mechanics::require_positive(faults, "enclosed_area", enclosed_area);
  mechanics::require_positive(faults, "wall", wall);
  faults.throw_if_any();
  return torque / (2.0 * enclosed_area * wall);
}

double bredt_torsion_constant(double enclosed_area, double wall, double mid_line) {
  FaultList faults;
  mechanics::require_positive(faults, "enclosed_area", enclosed_area);
  mechanics::require_positive(faults, "wall", wall);
  mechanics::require_positive(faults, "mid_line", mid_line);
  faults.throw_if_any();
  return 4.0 * enclosed_area * enclosed_area * wall / mid_line;
}

}  // namespace bismar
