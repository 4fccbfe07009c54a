// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/vibration.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Vibration in one plane.
struct Plane {
  std::string_view along;
  double second_moment = 0.0;  ///< [m^4]
  double bare = 0.0;           ///< First natural frequency without axial force [Hz].
  double critical = 0.0;       ///< N_cr [N]; read in compression only.
  double loss = 1.0;           ///< sqrt(1 - N / N_cr), 0 at N >= N_cr.
  [[nodiscard]] double frequency() const { return bare * loss; }
};

Plane plane(const CheckInput& input, bool along_z) {
  const SectionProperties& s = input.section;
  const double E = needed(input.material.E, Symbol::E);
  Plane result;
  result.along = along_z ? "z" : "y";
  // A section without an axis of symmetry vibrates about its principal axes; the weaker one bounds
  // every direction from below and is exact where both planes are held alike.
  result.second_moment = s.I_yz != 0.0 ? s.I_v() : along_z ? s.I_y : s.I_z;
  result.bare =
      lowest_natural_frequency({.bending_stiffness = E * result.second_moment,
                                .mass_per_length = needed(input.material.rho, Symbol::rho) * s.area,
                                .length = input.length},
                               along_z ? input.effects.support_z : input.effects.support_y,
                               input.limits.details.masses,
                               input.effects.second_support);
  const double N = input.effects.compression;
  if (N > 0.0) {
    result.critical = euler_critical_load(
        E,
        result.second_moment,
        along_z ? input.effects.buckling_length_y : input.effects.buckling_length_z);
    result.loss = std::sqrt(std::max(0.0, 1.0 - N / result.critical));
  }
  return result;
}

Plane lower_plane(const CheckInput& input) {
  const Plane z = plane(input, true);
  const Plane y = plane(input, false);
  return y.frequency() < z.frequency() ? y : z;
}

std::string hertz(double value) { return number(value) + " Hz"; }

class NaturalFrequency final : public LimitState {
 public:
  std::string_view id() const override { return "natural frequency"; }
  std::string_view source() const override {
    return "Euler-Bernoulli beam with point masses, exact; in compression lowered by "
           "sqrt(1 - N / N_cr): Timoshenko, Young and Weaver, Vibration Problems in Engineering, "
           "4th ed., beams with axial force (section from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.frequency.has_value();
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial&) const override {
    return {Symbol::E, Symbol::rho};
  }
  /// The largest compression is taken over the whole length and as it acts: the factor is one on
  /// the frequency. omega^2 is the least of Rayleigh quotients that are each linear in N, so that
  /// it is concave in N and lies nowhere below the chord from N = 0 to N_cr, where it is zero: the
  /// root of 1 - N / N_cr is on the safe side for every support and any masses, and exact for a
  /// bare member pinned at both ends. Tension gets no credit.
  double utilisation(const CheckInput& input) const override {
    const double frequency = lower_plane(input).frequency();
    return frequency > 0.0 ? input.factor * *input.limits.frequency / frequency
                           : std::numeric_limits<double>::infinity();
  }
  Explanation explain(const CheckInput& input) const override;
  /// omega^2 is the least of the quotients E I (integral of w''^2) / (rho A (integral of w^2) + sum
  /// of M w^2). E I grows with the fourth power of the scale and the mass at most with its square,
  /// so that every quotient rises, and with them the least; N / N_cr falls.
  Trend trend_with_scale() const override { return Trend::falls; }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation NaturalFrequency::explain(const CheckInput& input) const {
  const Plane lower = lower_plane(input);
  const double u = utilisation(input);
  Explanation text;
  text.line = "Natural frequency: the first is " + hertz(lower.frequency()) + ", along " +
              std::string(lower.along) + ", against a least of " + hertz(*input.limits.frequency) +
              ", factor " + number(input.factor) + ": u = " + number(u) + ".";
  double carried = 0.0;
  for (const AttachedMass& mass : input.limits.details.masses) {
    carried += mass.mass;
  }
  const double own = *input.material.rho * input.section.area * input.length;
  text.steps.push_back("The member weighs " + number(own) + " kg and carries " + number(carried) +
                       " kg in " + std::to_string(input.limits.details.masses.size()) +
                       " point masses.");
  for (const bool along_z : {true, false}) {
    const Plane p = plane(input, along_z);
    text.steps.push_back("Along " + std::string(p.along) +
                         ": E = " + gigapascals(*input.material.E) +
                         " and I = " + fourth_millimetres(p.second_moment) + " over " +
                         millimetres(input.length) + " give " + hertz(p.bare) + ".");
    if (input.effects.compression > 0.0) {
      const std::string load =
          kilonewtons(input.effects.compression) + " / " + kilonewtons(p.critical);
      text.steps.push_back(
          p.loss > 0.0 ? "The compression lowers it by the root of 1 - " + load + " = " +
                             number(p.loss) + ", to " + hertz(p.frequency()) + "."
                       : "The compression reaches N_cr (" + load + "): no frequency is left.");
    }
  }
  text.steps.push_back("u = factor x least frequency / frequency = " + number(input.factor) +
                       " x " + hertz(*input.limits.frequency) + " / " + hertz(lower.frequency()) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& natural_frequency_limit_state() {
  static const NaturalFrequency state;
  return state;
}

}  // namespace bismar::mechanics
