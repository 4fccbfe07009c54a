// SPDX-License-Identifier: MIT
#include <bismar/mechanics/vibration.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/carried_masses.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// A beam of L = 1. The shear force of a unit force at `a` is that of the slender member; its
/// square, integrated, is the deflection that shear of G A_s = 1 adds under the force.
struct ShearMember {
  Support support = Support::cantilever;
  double second = 1.0;  ///< Where the second support stands.

  [[nodiscard]] double deflection(double a) const {
    if (support == Support::cantilever) {
      return a;
    }
    const double s = second;
    if (a > s) {
      // The moment (a - s) over the pin: reactions of (a - s) / s at both supports, or half as much
      // again where the far end is fixed.
      const double q = a - s;
      return q + support_share() * q * q / s;
    }
    const double x = a / s;
    const double off = redundant(x);
    return s * (x * (1.0 - x) + off * off);
  }

  /// Upper bound of the largest eigenvalue of the bare member's operator: the sum over span and
  /// overhang.
  [[nodiscard]] double largest_eigenvalue() const {
    if (support == Support::cantilever) {
      return 4.0 / (pi * pi);
    }
    const double s = second;
    const double o = 1.0 - s;
    // The part of the redundant reaction is of rank one, redundant() over the span, so that it adds
    // at most its integral of squares; where both ends are fixed it is antisymmetric and its sum
    // with the second eigenvalue, 1 / (2 pi)^2 + 1 / 210, stays below the first.
    const double span = 1.0 / (pi * pi) + (support == Support::fixed_pinned ? 2.0 / 105.0 : 0.0);
    return s * s * span + 4.0 * o * o / (pi * pi) + support_share() * o * o * o / (3.0 * s);
  }

 private:
  [[nodiscard]] double support_share() const {
    return support == Support::fixed_pinned ? 9.0 / 4.0 : 1.0;
  }
  /// What the redundant moments add to the reaction of the simple span, per unit force at x.
  [[nodiscard]] double redundant(double x) const {
    switch (support) {
      case Support::fixed_pinned:
        return x * (1.0 - x) * (2.0 - x) / 2.0;
      case Support::fixed_fixed:
        return x * (1.0 - x) * (1.0 - 2.0 * x);
      case Support::cantilever:
      case Support::pinned_pinned:
        break;
    }
    return 0.0;
  }
};

}  // namespace

double lowest_shear_frequency(const ShearBeam& beam,
                              Support support,
                              std::span<const AttachedMass> masses,
                              std::optional<double> second_support) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.shear_stiffness", beam.shear_stiffness);
  mechanics::require_positive(faults, "beam.mass_per_length", beam.mass_per_length);
  mechanics::require_positive(faults, "beam.length", beam.length);
  mechanics::require_carried(faults, beam.length, support, masses, second_support);
  faults.throw_if_any();
  const double L = beam.length;
  const ShearMember member{.support = support,
                           .second = std::min(1.0, second_support.value_or(L) / L)};
  double sum = beam.mass_per_length * L * member.largest_eigenvalue();
  for (const AttachedMass& mass : masses) {
    sum += mass.mass * member.deflection(std::min(1.0, mass.at / L));
  }
  return std::sqrt(beam.shear_stiffness / (L * sum)) / (2.0 * pi);
}

}  // namespace bismar
