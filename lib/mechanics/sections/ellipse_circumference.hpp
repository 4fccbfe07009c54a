// SPDX-License-Identifier: MIT
#pragma once

namespace bismar::mechanics {

/// Circumference of an ellipse by the arithmetic-geometric mean: quadratic convergence, so that the
/// loop ends at rounding after a handful of steps. Source: Abramowitz and Stegun, 17.6 (from
/// memory).
double ellipse_circumference(double semi_axis, double other_semi_axis);

}  // namespace bismar::mechanics
