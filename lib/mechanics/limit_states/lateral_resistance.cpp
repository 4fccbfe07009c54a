// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/lateral_resistance.hpp"

#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/moment_factor.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/aluminium.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <string>
#include <vector>

namespace bismar::mechanics {

namespace {

/// A section as stiff across as in its depth has no weak axis; the margin keeps rounding out.
constexpr double deeper = 1.001;
/// C2 over C1, see the header.
double load_ratio(Support support) {
  switch (support) {
    case Support::pinned_pinned:
      return 0.54;
    case Support::fixed_pinned:
      return 0.65;
    case Support::fixed_fixed:
      return 0.98;
    case Support::cantilever:
      return 1.6;
  }
  throw InternalError("support without a load ratio");
}

/// How strongly the loads twist over how strongly they bend: load_share L / M_0 [-].
double load_over_moment(const MomentShape& moment, double length) {
  if (moment.largest <= 0.0 || moment.load_share <= 0.0 || std::isinf(moment.largest)) {
    return 0.0;
  }
  // The quotient first: loads near the largest number must not overflow in a product.
  return std::min(moment.load_share / moment.largest * length, std::numeric_limits<double>::max());
}

/// C2 over C1 of one term of Ritz's method over load_share L / M_0, set to a central load.
constexpr double one_term = 1.153 / (std::numbers::pi * std::numbers::pi);

/// C2 with C1 = 1 between supports where own mass joins loads whose own ratio is `loads`. Sums of
/// both have at most the sum of the ratios, and where both bend the middle at most the larger ratio
/// of load to moment there.
double ratio_with_own_mass(const LoadEffects& effects, double loads) {
  const double least = load_ratio(effects.support_z);
  if (effects.support_z != Support::pinned_pinned) {
    return std::max(least, loads);
  }
  constexpr double own = 4.0 * one_term;  // of q: load_share q L / 2, M_0 q L^2 / 8
  const MomentShape& moment = effects.moment_y;
  const double middle = std::abs(moment.quarters[1]);
  const double at_middle =
      middle > 0.0 ? loads * (moment.largest / middle) : std::numeric_limits<double>::infinity();
  return std::max(least, std::min(loads + own, std::max(at_middle, own)));
}

/// load_share L / M_0 of own mass on a member with an overhang.
double own_load_over_moment(const LoadEffects& effects, double length) {
  double largest = 0.0;
  for (const Station& station : effects.stations) {
    largest = std::max(largest, station.own.M_y);
  }
  const double span = *effects.second_support;
  const double beyond = length - span;
  return largest > 0.0 ? (span * span / 6.0 + beyond * beyond / 2.0) / largest : 0.0;
}

std::string describe(const LateralShape& shape) {
  using Basis = LateralShape::Basis;
  const std::string C1 = number(shape.factors.C1);
  const std::string C2 = number(shape.factors.C2);
  switch (shape.basis) {
    case Basis::falling_cantilever:
      return "Cantilever, moment falling from the root: k = 1, C1 = " + C1 + ", C2 = " + C2;
    case Basis::cantilever:
      return "Cantilever, moment not falling from the root: k = 2, C1 = " + C1 + ", C2 = " + C2;
    case Basis::overhang:
      return "Overhang: k = 2, C1 = 1, C2 = " + C2 + " on the whole length, on the safe side";
    case Basis::linear:
      return "Moment linear between the ends: C1 = " + C1;
    case Basis::quarters:
      return "By the quarter-point moments C1 = " + C1 + ", C2 = " + C2;
    case Basis::own_mass:
      return "Own mass acts: C1 = " + C1 + ", C2 = " + C2;
  }
  throw InternalError("lateral shape without a description");
}

double lateral_modulus(const MemberMaterial& material) {
  return is_timber(material.column_law) ? needed(material.E_05, Symbol::E_05)
                                        : needed(material.E, Symbol::E);
}

double critical_moment(const CheckInput& input, const LateralShape& shape) {
  const SectionProperties& section = input.section;
  const double E = lateral_modulus(input.material);
  const double G = buckling_shear_modulus(input.material);
  if (section.family == SectionFamily::tee) {
    // The formula's constant holds E/G = 2.6; a lower G counts as a lower E.
    return tee_critical_moment(
        std::min(E, 2.6 * G), section.I_z, section.I_t, section.height, shape.k * input.length);
  }
  return elastic_critical_moment({.youngs_modulus = E,
                                  .shear_modulus = G,
                                  .I_z = section.I_z,
                                  .I_t = section.I_t,
                                  .I_w = section.I_w,
                                  .length = input.length,
                                  .k = shape.k,
                                  .k_w = shape.k,
                                  .factors = shape.factors,
                                  .load_height = section.height / 2.0});
}

/// k_crit made continuous: 1 up to 0.7467, and beyond 1.3733 0.9996 / lambda^2, on the safe side of
/// lateral_buckling_factor() by at most 0.25 %. Its two small jumps would let a larger or stronger
/// beam be the worse one.
double continuous_buckling_factor(double slenderness) {
  if (slenderness < 1.3733) {
    return std::min(1.0, 1.56 - 0.75 * slenderness);
  }
  return std::min(1.56 - 0.75 * 1.3733, 0.9996 / (slenderness * slenderness));
}

bool is_solid(const SectionProperties& section) {
  return section.family == SectionFamily::solid_rectangle ||
         section.family == SectionFamily::solid_ellipse;
}

ColumnCurve lateral_curve(const CheckInput& input) {
  ColumnCurve curve = is_aluminium(input.material.column_law)
                          ? aluminium_lateral_curve(false)
                          : steel_curve(lateral_torsional_curve(input.section));
  if (is_solid(input.section)) {
    // EN 1993-1-1 6.3.2.2(4): no lateral buckling up to 0.4. Its jump there would let a stronger
    // grade be the worse one, so that the plateau ends where the curve begins. The clause is kept
    // to solid bars: curves of thin-walled sections stand for their residual stresses too.
    curve.lambda_0 = std::max(curve.lambda_0, 0.4);
  }
  return curve;
}

}  // namespace

bool may_turn_aside(const SectionProperties& section, const MemberLimits& limits) {
  if (limits.lateral_restraint || !(section.I_y > deeper * section.I_z)) {
    return false;
  }
  switch (section.family) {
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
      return true;
    default:
      return false;
  }
}

LateralShape lateral_shape(const LoadEffects& effects, double length) {
  using Basis = LateralShape::Basis;
  const MomentShape& moment = effects.moment_y;
  const bool own_mass = effects.acceleration_z != 0.0;
  const double loads = load_over_moment(moment, length);
  const auto shape = [](double of_shape, double of_load, double k, Basis basis) {
    const double finite = std::min(of_load, std::numeric_limits<double>::max());
    return LateralShape{.factors = {.C1 = of_shape, .C2 = finite}, .k = k, .basis = basis};
  };
  if (effects.support_z == Support::cantilever) {
    return at_most(moment, 0.75, 0.5, 0.25)
               ? shape(1.0,
                       load_ratio(Support::cantilever) * std::max(1.0, loads),
                       1.0,
                       Basis::falling_cantilever)
               : shape(1.0, 0.5 * (loads + (own_mass ? 1.0 : 0.0)), 2.0, Basis::cantilever);
  }
  if (overhangs(effects, length)) {
    const double own = own_mass ? own_load_over_moment(effects, length) : 0.0;
    return shape(1.0, 0.5 * (loads + own), 2.0, Basis::overhang);
  }
  if (own_mass) {
    return shape(1.0, ratio_with_own_mass(effects, one_term * loads), 1.0, Basis::own_mass);
  }
  if (moment.end_ratio) {
    return shape(linear_moment_factor(*moment.end_ratio), 0.0, 1.0, Basis::linear);
  }
  double C1 = 1.0;
  if (moment.largest > 0.0 && std::isfinite(moment.largest)) {
    const QuarterMoments quarters{.largest = 1.0,
                                  .quarter = moment.quarters[0] / moment.largest,
                                  .middle = moment.quarters[1] / moment.largest,
                                  .three_quarters = moment.quarters[2] / moment.largest};
    C1 = std::clamp(
        std::min(quarter_point_moment_factor(quarters), quadratic_moment_factor(quarters)),
        1.0,
        2.6);
  }
  const double ratio = std::max(load_ratio(effects.support_z), one_term * loads);
  return shape(C1, ratio * C1, 1.0, Basis::quarters);
}

LateralResistance lateral_resistance(const CheckInput& input) {
  LateralResistance r;
  r.shape = lateral_shape(input.effects, input.length);
  r.critical = critical_moment(input, r.shape);
  if (r.critical <= 0.0) {
    return r;  // loads beyond all measure: nothing is carried
  }
  const MemberMaterial& material = input.material;
  const bool timber = is_timber(material.column_law);
  if (!timber && !is_ductile_column(material)) {
    r.load = r.critical;
    return r;
  }
  const double f = strength_in_bending(material);
  const double W = input.section.W_el_y;
  r.slenderness = lateral_torsional_slenderness(W, f / material.strength_factor, r.critical);
  r.factor = timber ? continuous_buckling_factor(r.slenderness)
                    : reduction_factor(lateral_curve(input), r.slenderness);
  r.load = r.factor * W * f * weld_share(input);
  return r;
}

std::vector<Symbol> lateral_symbols(const MemberMaterial& material) {
  const bool timber = is_timber(material.column_law);
  std::vector<Symbol> symbols = {timber ? Symbol::E_05 : Symbol::E};
  if (stability_reads_shear_modulus(material)) {
    symbols.push_back(Symbol::G);
  }
  if (timber || is_ductile_column(material)) {
    add_bending_symbols(material, symbols);
  }
  return symbols;
}

std::vector<std::string> lateral_steps(const CheckInput& input, const LateralResistance& r) {
  const SectionProperties& s = input.section;
  const bool tee = s.family == SectionFamily::tee;
  std::vector<std::string> steps = {
      tee ? "Loads act at the flange; the supports hold against twist. k = " + number(r.shape.k) +
                ", one moment over the length."
          : "Loads act at the top edge, " + millimetres(s.height / 2.0) +
                " above the middle; the supports hold against twist. " + describe(r.shape) + "."};
  steps.push_back(
      (tee ? "M_cr of a T with its stem's tip in compression (AISC 360-16 F9) with L = "
           : "M_cr = C1 pi^2 E I_z / (k L)^2 [root of (I_w / I_z + (k L)^2 G I_t / (pi^2 E I_z) + "
             "(C2 z_g)^2) - C2 z_g] with k L = ") +
      millimetres(r.shape.k * input.length) +
      ", E = " + gigapascals(lateral_modulus(input.material)) + ", G = " +
      buckling_shear_modulus_text(input.material) + ", I_z = " + fourth_millimetres(s.I_z) +
      ", I_t = " + fourth_millimetres(s.I_t) + ": " + newton_metres(r.critical) + ".");
  if (r.slenderness == 0.0) {
    steps.emplace_back("The material has no curve: M_cr itself is the limit.");
    return steps;
  }
  const double f = strength_in_bending(input.material);
  steps.push_back(
      "Relative slenderness = root of W f / M_cr = root of (" + cubic_millimetres(s.W_el_y) +
      " x " + megapascals(f / input.material.strength_factor) + " / " + newton_metres(r.critical) +
      ") = " + number(r.slenderness) + ", reduction factor " + number(r.factor) + ".");
  steps.push_back("M_b = " + number(r.factor) + " x " + cubic_millimetres(s.W_el_y) + " x " +
                  megapascals(f * weld_share(input)) + " = " + newton_metres(r.load) + ".");
  return steps;
}

double strength_in_bending(const MemberMaterial& material) {
  return is_ductile_column(material) ? needed(material.sigma_y, Symbol::sigma_y)
                                     : bending_strength(material);
}

void add_bending_symbols(const MemberMaterial& material, std::vector<Symbol>& symbols) {
  const auto add = [&symbols](Symbol symbol) {
    if (std::find(symbols.begin(), symbols.end(), symbol) == symbols.end()) {
      symbols.push_back(symbol);
    }
  };
  if (is_ductile_column(material)) {
    add(Symbol::sigma_y);
  } else if (!material.flexural && material.tensile && material.compressive) {
    add(Symbol::tensile);
    add(Symbol::compressive);
  } else {
    add(Symbol::flexural);
  }
}

PeakMoments peak_moments(const CheckInput& input) {
  PeakMoments result;
  for (const Station& station : input.effects.stations) {
    const InternalForces forces = acting_forces(input, station);
    result.M_y = std::max(result.M_y, std::abs(forces.M_y));
    result.M_z = std::max(result.M_z, std::abs(forces.M_z));
  }
  return result;
}

}  // namespace bismar::mechanics
