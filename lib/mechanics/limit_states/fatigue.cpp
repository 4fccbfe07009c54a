// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/fatigue_resistance.hpp"
#include "mechanics/limit_states/fatigue_severity.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/second_order.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/welded_detail.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

bool is_sheared(const LoadEffects& effects) {
  return effects.twists ||
         std::any_of(effects.stations.begin(), effects.stations.end(), [](const Station& station) {
           return station.forces.V_y != 0.0 || station.forces.V_z != 0.0 ||
                  station.own.V_y != 0.0 || station.own.V_z != 0.0;
         });
}

class Fatigue final : public LimitState {
 public:
  std::string_view id() const override { return "fatigue"; }
  std::string_view source() const override {
    return "stress life: Shigley's Mechanical Engineering Design, 9th ed., chapter 6, surface "
           "factors of the 11th ed.; welds of steel: EN 1993-1-9:2005 7.1";
  }
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.fatigue.has_value();
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override;
  /// Every part of a load case swings together, from its value to stress_ratio times its value.
  /// Amplitude and mean are those of the net section with K_f, also the mean's, as von Mises
  /// stresses; for brittle materials that is on the safe side of the principal stress. Compression
  /// adds to the amplitude but not to the mean, where it neither helps nor harms, and raises the
  /// moments by 1 / (1 - N / N_cr) with this limit state's factor in N. The first cycle
  /// is held against yield, or tensile strength without yield, the notch included.
  ///
  /// Strength: f sigma_u to 1000 cycles, from there a straight line in the logarithms to S_e at the
  /// knee (steel without a table value 1e6, else the cycles of the table value); level beyond it
  /// for steel and cast iron, on along the line for others. The axial factor 0.85 and the size
  /// factor divide their own stresses; a shear force's have none.
  ///
  /// Anisotropic materials: direct and shear stress apart, no size, surface or load factor, K_f =
  /// K_t, tensile strength for the direct stress; in shear the same share of the shear strength is
  /// taken to be left as of the tensile strength, an assumption.
  ///
  /// Welds: the von Mises range on the net section against the curve of the detail category for
  /// varying ranges, and 1.5 f_y; gamma_Mf gamma_Ff is the factor; thickness reduction is left to
  /// the category. The standard is for steel: u of a weld in another material is infinite.
  double utilisation(const CheckInput& input) const override {
    const Amplifications raised = amplifications(input);
    if (raised.unstable) {
      return std::numeric_limits<double>::infinity();
    }
    const FatigueSeverity worst = is_welded_detail(input.limits.details)
                                      ? worst_weld(input, raised)
                                      : worst_of(input, StressLife(input), raised);
    return input.factor * worst.share();
  }
  Explanation explain(const CheckInput& input) const override;
  /// Stresses fall at least with the first power of the scale, those of own mass; a shear force's
  /// may stay. The size factor divides bending and torsion only and falls with the power 0.157 at
  /// most, or jumps up; the rise by compression falls; all else depends on the material and the
  /// notch, which stay.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// The size factor has a jump.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::tired;
  }
  /// A higher tensile strength raises the estimated endurance limit to its cap and lowers the
  /// surface factor, and with it S_e beyond the cap or of a table value; notches are felt more.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::sigma_y:
      case Symbol::sigma_e:
      case Symbol::shear:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      case Symbol::tensile:
        return Trend::neither;
      default:
        return Trend::constant;
    }
  }

 private:
  static Explanation explain_weld(const CheckInput& input, const Amplifications& raised);
  static Explanation explain_life(const CheckInput& input, const Amplifications& raised);
};

std::vector<Symbol> Fatigue::needs(const LoadEffects& effects,
                                   const MemberMaterial& material) const {
  std::vector<Symbol> symbols = {Symbol::tensile};
  if (material.rule == StressRule::von_mises_yield) {
    symbols.push_back(Symbol::sigma_y);
  }
  if (material.rule == StressRule::direct_and_shear && is_sheared(effects)) {
    symbols.push_back(Symbol::shear);
  }
  if (material.sigma_e || !material.steel) {
    symbols.push_back(Symbol::sigma_e);
  }
  if (is_amplified(effects)) {
    symbols.push_back(Symbol::E);
  }
  if (own_mass_acts(effects)) {
    symbols.push_back(Symbol::rho);
  }
  return symbols;
}

/// "50000 cycles", "1.5e7 cycles".
std::string cycles(double count) {
  if (count < 1e6) {
    return number(count) + " cycles";
  }
  int exponent = static_cast<int>(std::floor(std::log10(count)));
  std::string digits = number(count / std::pow(10.0, exponent));
  if (digits == "10") {
    digits = "1";
    ++exponent;
  }
  return digits + "e" + std::to_string(exponent) + " cycles";
}

void add_net_section_step(const MemberDetails& d, std::vector<std::string>& steps) {
  if (d.net_area < 1.0 || d.net_modulus < 1.0) {
    steps.push_back("Net section: " + number(d.net_area) + " of the area, " +
                    number(d.net_modulus) + " of the moduli.");
  }
}

/// What compression does to moments and, where R > 0, to their range.
void add_swing_step(const Amplifications& raised,
                    const CheckInput& input,
                    std::vector<std::string>& steps) {
  add_amplification_step(raised, input, steps);
  const double R = input.effects.fatigue->stress_ratio;
  if (is_amplified(input.effects) && R > 0.0) {
    steps.push_back("Their range rises by 1 / [(1 - n) (1 - R n)], n = N / N_cr: by " +
                    number(raised.y.range_factor(R)) + " for M_y and " +
                    number(raised.z.range_factor(R)) + " for M_z where they act.");
  }
}

std::string forces_step(const InternalForces& f) {
  return "Forces there: N = " + kilonewtons(f.N) + ", M_y = " + newton_metres(f.M_y) +
         ", M_z = " + newton_metres(f.M_z) + ", V_z = " + kilonewtons(f.V_z) +
         ", V_y = " + kilonewtons(f.V_y) + ", T = " + newton_metres(f.T) + ".";
}

Explanation Fatigue::explain(const CheckInput& input) const {
  const Amplifications raised = amplifications(input);
  if (raised.unstable) {
    return unstable_explanation("Fatigue", raised, input);
  }
  return is_welded_detail(input.limits.details) ? explain_weld(input, raised)
                                                : explain_life(input, raised);
}

Explanation Fatigue::explain_weld(const CheckInput& input, const Amplifications& raised) {
  const MemberDetails& d = input.limits.details;
  const FatigueSeverity worst = worst_weld(input, raised);
  const std::string u = number(input.factor * worst.share());
  const std::string place = " at x = " + millimetres(worst.station->x);
  Explanation text;
  if (!input.material.steel && worst.largest > 0.0) {
    text.line = "Fatigue of a weld: " + megapascals(worst.largest) + " stress range" + place +
                "; EN 1993-1-9 is for steel, so this weld is not shown to last: u = " + u + ".";
    text.steps = {
        "The slopes and limits of the standard's curves are those of steel; a detail "
        "category says nothing about other materials."};
    return text;
  }
  const double category = detail_category(d);
  const double N = input.effects.fatigue->cycles;
  const double strength = welded_detail_strength(category, N);
  text.line = "Fatigue of a weld: " + number(input.factor) + " x " + megapascals(worst.largest) +
              " stress range" + place + " against " + megapascals(strength) + " at " + cycles(N) +
              ": u = " + u + ".";
  add_own_mass_step(input, text.steps);
  text.steps.push_back(forces_step(worst.forces));
  add_net_section_step(d, text.steps);
  add_swing_step(raised, input, text.steps);
  text.steps.push_back(
      "Range of the von Mises stress, (1 - R) = " + number(2.0 * amplitude_share(input)) +
      " of the largest, = " + megapascals(worst.largest) + ".");
  text.steps.push_back(
      "EN 1993-1-9, steel: detail category " + megapascals(category) +
      (d.detail_category ? " at 2e6 cycles" : ", the lowest of the tables as none is stated,") +
      " gives " + megapascals(strength) + " at " + cycles(N) +
      " (slope 3 to 5e6 cycles, 5 to 1e8, level beyond).");
  if (input.material.rule == StressRule::von_mises_yield) {
    text.steps.push_back("No range above 1.5 f_y: " + megapascals(worst.largest) + " over " +
                         megapascals(1.5 * needed(input.material.sigma_y, Symbol::sigma_y)) +
                         " = " + number(worst.first) + ".");
  }
  text.steps.push_back("u = factor x the larger of " + number(worst.fatigue) + " and " +
                       number(worst.first) + " = " + u + ".");
  return text;
}

std::string_view name_of(MeanStressLine line) {
  return line == MeanStressLine::goodman  ? "Goodman"
         : line == MeanStressLine::gerber ? "Gerber"
                                          : "Soderberg";
}

void add_strength_steps(const CheckInput& input,
                        const StressLife& life,
                        std::vector<std::string>& steps) {
  const FatigueResistance& r = life.resistance;
  const FatigueNotch& notch = life.notch;
  const double tensile = needed(input.material.tensile, Symbol::tensile);
  steps.push_back("Notch sensitivity q = " + number(notch.q) + ", in torsion " +
                  number(notch.q_torsion) + "; K_f = 1 + q (K_t - 1) = " + number(notch.k_axial) +
                  " axial, " + number(notch.k_bending) + " in bending, " + number(notch.k_torsion) +
                  " in torsion and shear.");
  steps.push_back(
      (r.estimated
           ? "Polished specimens: S_e' = 0.5 sigma_u, at most 700 MPa, = " + megapascals(r.specimen)
           : "Polished specimens, from the table: S_e' = " + megapascals(r.specimen)) +
      " at " + cycles(r.knee) + ".");
  steps.push_back("S_e = k_a k_e S_e' = " + number(r.surface) + " x " + number(r.reliability) +
                  " x " + megapascals(r.specimen) +
                  ", not above f sigma_u = " + number(r.fraction) + " x " + megapascals(tensile) +
                  ": " + megapascals(r.endurance) + ".");
  if (input.material.rule != StressRule::direct_and_shear) {
    steps.push_back("Size factor " + number(r.size) + " at a diameter of " +
                    millimetres(r.diameter) +
                    ", axial factor 0.85: at this life they divide the "
                    "amplitudes by " +
                    number(r.size_at_life) + " in bending and torsion and by " +
                    number(r.axial_at_life) + " axially.");
  }
  steps.push_back("Strength at " + cycles(input.effects.fatigue->cycles) +
                  ": f sigma_u [S_e / (f "
                  "sigma_u)]^" +
                  number(r.place) + " = " + megapascals(r.strength) + ".");
}

Explanation Fatigue::explain_life(const CheckInput& input, const Amplifications& raised) {
  const StressLife life(input);
  const FatigueSeverity worst = worst_of(input, life, raised);
  const MemberMaterial& material = input.material;
  const double tensile = needed(material.tensile, Symbol::tensile);
  const double base = worst.shear ? needed(material.shear, Symbol::shear) : tensile;
  const double strength = life.resistance.strength * (base / tensile);
  const bool ductile = material.rule == StressRule::von_mises_yield;
  const double first_strength = ductile ? needed(material.sigma_y, Symbol::sigma_y) : base;
  const bool soderberg = life.line == MeanStressLine::soderberg;
  const double mean_strength = soderberg ? first_strength : base;
  const std::string kind = worst.shear                                     ? "shear "
                           : material.rule == StressRule::direct_and_shear ? "direct "
                                                                           : "von Mises ";
  const std::string place = " at x = " + millimetres(worst.station->x);
  const std::string u = number(input.factor * worst.share());
  Explanation text;
  if (worst.first > worst.fatigue) {
    text.line = "Fatigue, first cycle: " + number(input.factor) + " x " +
                megapascals(worst.largest) + " " + kind + "stress with its notch" + place +
                " against " + megapascals(first_strength) + ": u = " + u + ".";
  } else {
    text.line = "Fatigue: " + number(input.factor) + " x (" + megapascals(worst.amplitude) +
                " amplitude and " + megapascals(worst.mean) + " mean " + kind + "stress)" + place +
                " against " + megapascals(strength) + " at " +
                cycles(input.effects.fatigue->cycles) + " and " + megapascals(mean_strength) +
                " (" + std::string(name_of(life.line)) + "): u = " + u + ".";
  }
  add_own_mass_step(input, text.steps);
  text.steps.push_back(forces_step(worst.forces));
  add_net_section_step(input.limits.details, text.steps);
  add_swing_step(raised, input, text.steps);
  text.steps.push_back("Stress ratio R = " + number(input.effects.fatigue->stress_ratio) +
                       ": the amplitude is " + number(amplitude_share(input)) +
                       " of the largest stress, "
                       "the mean " +
                       number(mean_share(input)) + ".");
  add_strength_steps(input, life, text.steps);
  text.steps.push_back(std::string(name_of(life.line)) + " with " + megapascals(worst.amplitude) +
                       " over " + megapascals(strength) + " and " + megapascals(worst.mean) +
                       " over " + megapascals(mean_strength) + ": " + number(worst.fatigue) + ".");
  text.steps.push_back("First cycle: " + megapascals(worst.largest) + " over " +
                       megapascals(first_strength) + " = " + number(worst.first) + ".");
  text.steps.push_back("u = factor x the larger of " + number(worst.fatigue) + " and " +
                       number(worst.first) + " = " + u + ".");
  return text;
}

}  // namespace

const LimitState& fatigue_limit_state() {
  static const Fatigue state;
  return state;
}

}  // namespace bismar::mechanics
