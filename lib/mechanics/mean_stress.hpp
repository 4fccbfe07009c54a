// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/mechanics/fatigue.hpp>

#include <cmath>

namespace bismar::mechanics {

/// What a stress uses up of a strength, 1 / n: x = sigma_a / S_e, y = sigma_m over the static
/// strength of the line; both zero or above. It rises with both and is proportional to their scale.
inline double share_used(MeanStressLine line, double x, double y) {
  switch (line) {
    case MeanStressLine::goodman:
    case MeanStressLine::soderberg:
      return x + y;
    case MeanStressLine::gerber:
      // The positive root of (1/n)^2 - x (1/n) - y^2 = 0.
      return 0.5 * (x + std::hypot(x, 2.0 * y));
    case MeanStressLine::asme_elliptic:
      return std::hypot(x, y);
  }
  throw InternalError("mean stress line without a formula");
}

}  // namespace bismar::mechanics
