// SPDX-License-Identifier: MIT
#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/load_effects.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

/// First positive root of tan x = x.
constexpr double tangent_root = 4.493409457909064;

/// k E I times the rotation that a unit moment at the second support causes in the compressed span,
/// whose other end is pinned or fixed.
double span_flexibility(Support support, double alpha) {
  // Below this the closed forms lose their digits to cancellation; the next term is of order
  // alpha^5.
  constexpr double short_span = 0.01;
  const double square = alpha * alpha;
  if (support == Support::pinned_pinned) {
    return alpha < short_span ? alpha / 3.0 * (1.0 + square / 15.0)
                              : 1.0 / alpha - std::cos(alpha) / std::sin(alpha);
  }
  return alpha < short_span ? alpha / 4.0 * (1.0 + square / 30.0)
                            : (2.0 - 2.0 * std::cos(alpha) - alpha * std::sin(alpha)) /
                                  (std::sin(alpha) - alpha * std::cos(alpha));
}

/// On (0, high) cot beta falls and the flexibility of the span rises, from +infinity for their
/// difference to -infinity: one root.
double factor_with_overhang(Support support, double span) {
  const double whole = support == Support::pinned_pinned ? std::numbers::pi : tangent_root;
  double low = std::numbers::pi / 2.0;
  double high = std::min(whole / span, std::numbers::pi / (1.0 - span));
  for (;;) {
    const double middle = low + (high - low) / 2.0;
    if (middle <= low || middle >= high) {
      return std::numbers::pi / middle;
    }
    const double beta = middle * (1.0 - span);
    const bool below = std::cos(beta) / std::sin(beta) > span_flexibility(support, middle * span);
    (below ? low : high) = middle;
  }
}

}  // namespace

double effective_length_factor(Support support, double span) {
  const bool may_overhang = support == Support::pinned_pinned || support == Support::fixed_pinned;
  FaultList faults;
  mechanics::require_positive(faults, "span", span);
  if (span > 1.0 || (span < 1.0 && span > 0.0 && !may_overhang)) {
    mechanics::add_out_of_range(
        faults, "span", span, may_overhang ? "at most 1" : "1 for this kind of support");
  }
  faults.throw_if_any();
  if (span < 1.0) {
    return factor_with_overhang(support, span);
  }
  switch (support) {
    case Support::cantilever:
      return 2.0;
    case Support::pinned_pinned:
      return 1.0;
    case Support::fixed_pinned:
      return std::numbers::pi / tangent_root;
    case Support::fixed_fixed:
      return 0.5;
  }
  throw InternalError("support without an effective length");
}

}  // namespace bismar
