// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/separable.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/vibration.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Vibration in one plane.
struct Plane {
  std::string_view along;
  double second_moment = 0.0;   ///< [m^4]
  double bending = 0.0;         ///< First natural frequency of the slender member [Hz].
  double shear_area = 0.0;      ///< A_s [m^2]; read where shear is asked for.
  std::optional<double> shear;  ///< Lower bound that shear alone would leave [Hz].
  double bare = 0.0;            ///< Both together, without axial force [Hz].
  double critical = 0.0;        ///< N_cr [N]; read in compression only.
  double loss = 1.0;            ///< sqrt(1 - N / N_cr), 0 at N >= N_cr.
  [[nodiscard]] double frequency() const { return bare * loss; }
};

/// A_s along an axis. A section without one gets a lower bound: with no stress above V / A_v the
/// energy of shear is at most that of V / A_v all over A.
double energy_shear_area(double of_energy, double of_peak, double area) {
  return of_energy > 0.0 ? of_energy : of_peak * of_peak / area;
}

double shear_area(const SectionProperties& s, bool along_z) {
  const double z = energy_shear_area(s.A_s_z, s.A_v_z, s.area);
  const double y = energy_shear_area(s.A_s_y, s.A_v_y, s.area);
  if (s.I_yz == 0.0) {
    return along_z ? z : y;
  }
  // In no direction is the flexibility larger than the sum of those along two axes at right angles.
  return z > 0.0 && y > 0.0 ? 1.0 / (1.0 / z + 1.0 / y) : 0.0;
}

/// The shear modulus where shear is asked for: limits.shear_deflection.
std::optional<double> shear_modulus(const CheckInput& input) {
  return input.limits.shear_deflection ? std::optional(stability_shear_modulus(input.material))
                                       : std::nullopt;
}

double bending_frequency(const CheckInput& input, const Plane& plane, Support support) {
  return lowest_natural_frequency(
      {.bending_stiffness = needed(input.material.E, Symbol::E) * plane.second_moment,
       .mass_per_length = needed(input.material.rho, Symbol::rho) * input.section.area,
       .length = input.length},
      support,
      input.limits.details.masses,
      input.effects.second_support);
}

void add_shear(const CheckInput& input, Plane& plane, Support support) {
  const std::optional<double> G = shear_modulus(input);
  plane.bare = plane.bending;
  if (!G) {
    return;
  }
  const double stiffness = *G * plane.shear_area;
  if (!(stiffness > 0.0)) {
    plane.shear = 0.0;
    plane.bare = 0.0;
    return;
  }
  plane.shear = lowest_shear_frequency(
      {.shear_stiffness = stiffness,
       .mass_per_length = needed(input.material.rho, Symbol::rho) * input.section.area,
       .length = input.length},
      support,
      input.limits.details.masses,
      input.effects.second_support);
  plane.bare = plane.bending / std::hypot(1.0, plane.bending / *plane.shear);
}

void add_compression(const CheckInput& input, Plane& plane, double buckling_length) {
  const double N = input.effects.compression;
  if (!(N > 0.0)) {
    return;
  }
  plane.critical = euler_critical_load(
      needed(input.material.E, Symbol::E), plane.second_moment, buckling_length);
  if (const std::optional<double> G = shear_modulus(input)) {
    // 1 / N_cr gains 1 / (G A_s).
    const double stiffness = *G * plane.shear_area;
    plane.critical = plane.critical * stiffness / (plane.critical + stiffness);
  }
  plane.loss = plane.critical > N ? std::sqrt(std::max(0.0, 1.0 - N / plane.critical)) : 0.0;
}

struct Planes {
  Plane z;
  Plane y;
  [[nodiscard]] const Plane& lower() const { return y.frequency() < z.frequency() ? y : z; }
};

Planes planes(const CheckInput& input) {
  const SectionProperties& s = input.section;
  const LoadEffects& effects = input.effects;
  Planes result;
  result.z.along = "z";
  result.y.along = "y";
  // A section without an axis of symmetry vibrates about its principal axes; the weaker one bounds
  // every direction from below and is exact where both planes are held alike.
  result.z.second_moment = s.I_yz != 0.0 ? s.I_v() : s.I_y;
  result.y.second_moment = s.I_yz != 0.0 ? s.I_v() : s.I_z;
  result.z.shear_area = shear_area(s, true);
  result.y.shear_area = shear_area(s, false);
  result.z.bending = bending_frequency(input, result.z, effects.support_z);
  // Held alike, both planes have the same beta.
  result.y.bending =
      effects.support_y == effects.support_z
          ? result.z.bending * std::sqrt(result.y.second_moment / result.z.second_moment)
          : bending_frequency(input, result.y, effects.support_y);
  add_shear(input, result.z, effects.support_z);
  add_shear(input, result.y, effects.support_y);
  add_compression(input, result.z, effects.buckling_length_y);
  add_compression(input, result.y, effects.buckling_length_z);
  return result;
}

std::string hertz(double value) { return number(value) + " Hz"; }

/// The bare slender member against sqrt(E / rho): carried masses, shear and compression only lower
/// the frequency (Rayleigh's quotient gains in the denominator or loses in the numerator).
class FrequencyBound final : public SeparableBound {
 public:
  std::size_t terms() const override { return 1; }
  void demands(const DemandInput& input, std::span<double> out) const override {
    out[0] = 0.0;
    if (!input.limits.frequency) {
      return;
    }
    const SectionProperties& s = input.section;
    const auto add = [&](double second_moment, Support support) {
      const double frequency = lowest_natural_frequency(
          {.bending_stiffness = second_moment, .mass_per_length = s.area, .length = input.length},
          support,
          {},
          input.effects.second_support);
      out[0] = std::max(out[0], *input.limits.frequency / frequency);
    };
    add(s.I_yz != 0.0 ? s.I_v() : s.I_y, input.effects.support_z);
    add(s.I_yz != 0.0 ? s.I_v() : s.I_z, input.effects.support_y);
  }
  void capacities(const CapacityInput& input, std::span<double> out) const override {
    out[0] =
        std::sqrt(needed(input.material.E, Symbol::E) / needed(input.material.rho, Symbol::rho));
  }
  bool exact(const CapacityInput& input) const override {
    return input.limits.details.masses.empty() && !input.limits.shear_deflection &&
           input.effects.compression == 0.0;
  }
};

class NaturalFrequency final : public LimitState {
 public:
  std::string_view id() const override { return "natural frequency"; }
  std::string_view source() const override {
    return "slender member (Euler-Bernoulli beam) with point masses, exact; where the deflection "
           "of "
           "shear is asked for, 1/f^2 = 1/f_b^2 + 1/f_s^2, a lower bound (Dunkerley's rule); in "
           "compression lowered by sqrt(1 - N / N_cr): Timoshenko, Young and Weaver, Vibration "
           "Problems in Engineering, 4th ed., beams with axial force (section from memory)";
  }
  double default_factor(const MemberMaterial&) const override { return 1.0; }
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return limits.frequency.has_value();
  }
  /// The limits are not known here. An anisotropic material without a shear modulus would be wrong
  /// where shear is asked for, and is left undecided at once; an isotropic one without has E / 3.
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial& material) const override {
    std::vector<Symbol> symbols = {Symbol::E, Symbol::rho};
    if (stability_reads_shear_modulus(material)) {
      symbols.push_back(Symbol::G);
    }
    return symbols;
  }
  /// The largest compression is taken over the whole length and as it acts: the factor is one on
  /// the frequency. omega^2 is the least of Rayleigh quotients that are each linear in N, so that
  /// it is concave in N and lies nowhere below the chord from N = 0 to N_cr, where it is zero: the
  /// root of 1 - N / N_cr is on the safe side for every support and any masses, and exact for a
  /// bare slender member pinned at both ends. Tension gets no credit. With shear the frequency
  /// without axial force is a lower bound, see lowest_shear_frequency(), and N_cr is
  /// 1 / (1 / N_cr + 1 / (G A_s)) (Engesser), as in the deflection with shear.
  double utilisation(const CheckInput& input) const override {
    const double frequency = planes(input).lower().frequency();
    return frequency > 0.0 ? input.factor * *input.limits.frequency / frequency
                           : std::numeric_limits<double>::infinity();
  }
  Explanation explain(const CheckInput& input) const override;
  /// omega^2 is the least of the quotients E I (integral of w''^2) / (rho A (integral of w^2) + sum
  /// of M w^2). E I grows with the fourth power of the scale and the mass at most with its square,
  /// so that every quotient rises, and with them the least; N / N_cr falls. 1 / f_s^2 is a mass
  /// over G A_s, constant for the member itself and falling for what it carries.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// What counts is I over the mass.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::swift;
  }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::G:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
  const SeparableBound* separable() const override { return &bound_; }

 private:
  FrequencyBound bound_;
};

Explanation NaturalFrequency::explain(const CheckInput& input) const {
  const Planes both = planes(input);
  const Plane& lower = both.lower();
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
  for (const Plane& p : {both.z, both.y}) {
    text.steps.push_back(
        "Along " + std::string(p.along) + ": E = " + gigapascals(*input.material.E) +
        " and I = " + fourth_millimetres(p.second_moment) + " over " + millimetres(input.length) +
        " give " + hertz(p.bending) +
        (p.shear ? " in bending." : " for the slender member; the limits do not ask for shear."));
    if (p.shear) {
      text.steps.push_back("Shear alone, with G = " + stability_shear_modulus_text(input.material) +
                           " and A_s = " + square_millimetres(p.shear_area) + ", leaves at least " +
                           hertz(*p.shear) + "; 1 / f^2 = 1 / f_b^2 + 1 / f_s^2 gives at least " +
                           hertz(p.bare) + ". Rotary inertia is left out.");
    }
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
