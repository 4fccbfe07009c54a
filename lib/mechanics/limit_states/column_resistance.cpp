// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"

#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/torsional_buckling.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

Symbol strength_symbol(const MemberMaterial& material) {
  return is_ductile_column(material) ? Symbol::sigma_y : Symbol::compressive;
}

ColumnCurve curve(const CheckInput& input, BendingAxis axis) {
  switch (input.material.column_law) {
    case ColumnLaw::metal:
      return steel_curve(buckling_curve(input.section, axis));
    case ColumnLaw::aluminium_class_a:
      return aluminium_curve(true);
    case ColumnLaw::aluminium_class_b:
      return aluminium_curve(false);
    case ColumnLaw::timber_solid:
      return timber_curve(false);
    case ColumnLaw::timber_glued:
      return timber_curve(true);
  }
  throw InternalError("column law without a curve");
}

std::string curve_name(const CheckInput& input, BendingAxis axis) {
  switch (input.material.column_law) {
    case ColumnLaw::metal:
      switch (buckling_curve(input.section, axis)) {
        case BucklingCurve::a0:
          return "curve a0";
        case BucklingCurve::a:
          return "curve a";
        case BucklingCurve::b:
          return "curve b";
        case BucklingCurve::c:
          return "curve c";
        case BucklingCurve::d:
          return "curve d";
      }
      break;
    case ColumnLaw::aluminium_class_a:
      return "aluminium class A";
    case ColumnLaw::aluminium_class_b:
      return "aluminium class B";
    case ColumnLaw::timber_solid:
      return "solid timber";
    case ColumnLaw::timber_glued:
      return "glued timber";
  }
  throw InternalError("column law without a name");
}

/// From N_cr to N_b by the method that is asked for.
void complete(const CheckInput& input, BendingAxis curve_axis, ColumnResistance& r) {
  const double f = column_strength(input.material);
  const double A = input.section.area;
  switch (input.limits.column_method) {
    case ColumnMethod::euler:
      r.load = r.critical;
      return;
    case ColumnMethod::johnson: {
      // The slenderness K L / r whose Euler load is N_cr.
      const double E = column_modulus(input.material);
      const double slenderness = std::numbers::pi * std::sqrt(E * A / r.critical);
      r.load = johnson_critical_load(A, f * weld_share(input), E, slenderness);
      return;
    }
    case ColumnMethod::curves:
      break;
  }
  // The curve's slenderness is made of characteristic values; the design factor of timber's
  // strength acts on the resistance only, and so does a weld, which is on the safe side.
  r.slenderness = relative_slenderness(A, f / input.material.strength_factor, r.critical);
  r.factor = reduction_factor(curve(input, curve_axis), r.slenderness);
  r.load = r.factor * A * f * weld_share(input);
}

bool is_askew(const SectionProperties& section) { return section.I_yz != 0.0; }

/// Between points held against twist: the whole length, twice that with a free end.
double torsional_length(const CheckInput& input) {
  return std::max({input.length, input.effects.buckling_length_y, input.effects.buckling_length_z});
}

}  // namespace

bool is_timber(ColumnLaw law) {
  return law == ColumnLaw::timber_solid || law == ColumnLaw::timber_glued;
}

bool is_aluminium(ColumnLaw law) {
  return law == ColumnLaw::aluminium_class_a || law == ColumnLaw::aluminium_class_b;
}

bool is_ductile_column(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield && !is_timber(material.column_law);
}

std::vector<Symbol> column_symbols(const MemberMaterial& material) {
  return {is_timber(material.column_law) ? Symbol::E_05 : Symbol::E, strength_symbol(material)};
}

double column_strength(const MemberMaterial& material) {
  return is_ductile_column(material) ? needed(material.sigma_y, Symbol::sigma_y)
                                     : needed(material.compressive, Symbol::compressive);
}

double weld_share(const CheckInput& input) {
  return input.limits.details.welded ? input.material.weld_yield_factor.value_or(1.0) : 1.0;
}

double column_modulus(const MemberMaterial& material) {
  const double E = is_timber(material.column_law) ? needed(material.E_05, Symbol::E_05)
                                                  : needed(material.E, Symbol::E);
  return material.E_axial ? std::min(E, *material.E_axial) : E;
}

double buckling_shear_modulus(const MemberMaterial& material) {
  const double G = stability_shear_modulus(material);
  return is_timber(material.column_law) ? std::min(G, needed(material.E_05, Symbol::E_05) / 16.0)
                                        : G;
}

std::string buckling_shear_modulus_text(const MemberMaterial& material) {
  return is_timber(material.column_law) ? gigapascals(buckling_shear_modulus(material))
                                        : stability_shear_modulus_text(material);
}

ColumnResistance column_resistance(const CheckInput& input, BendingAxis axis) {
  const bool about_y = axis == BendingAxis::y;
  ColumnResistance r;
  if (is_askew(input.section)) {
    r.mode = ColumnMode::about_v;
    r.effective_length = std::max(input.effects.buckling_length_y, input.effects.buckling_length_z);
    r.second_moment = input.section.I_v();
  } else {
    r.mode = about_y ? ColumnMode::about_y : ColumnMode::about_z;
    r.effective_length =
        about_y ? input.effects.buckling_length_y : input.effects.buckling_length_z;
    r.second_moment = about_y ? input.section.I_y : input.section.I_z;
  }
  r.critical =
      euler_critical_load(column_modulus(input.material), r.second_moment, r.effective_length);
  complete(input, axis, r);
  return r;
}

ColumnResistance least_column_resistance(const CheckInput& input) {
  const ColumnResistance about_y = column_resistance(input, BendingAxis::y);
  const ColumnResistance about_z = column_resistance(input, BendingAxis::z);
  return about_z.load < about_y.load ? about_z : about_y;
}

bool may_twist(const SectionProperties& section) {
  switch (section.family) {
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
    case SectionFamily::angle:
      return true;
    default:
      return false;
  }
}

ColumnResistance twisting_resistance(const CheckInput& input) {
  const SectionProperties& section = input.section;
  const double E = column_modulus(input.material);
  ColumnResistance r;
  r.mode = ColumnMode::twisting;
  r.effective_length = torsional_length(input);
  const double longer = std::max(input.effects.buckling_length_y, input.effects.buckling_length_z);
  const bool y_is_major = section.I_y >= section.I_z;
  const double length_u = is_askew(section) ? longer
                          : y_is_major      ? input.effects.buckling_length_y
                                            : input.effects.buckling_length_z;
  const double length_v = is_askew(section) ? longer
                          : y_is_major      ? input.effects.buckling_length_z
                                            : input.effects.buckling_length_y;
  r.critical =
      torsional_flexural_critical_load(section,
                                       {.youngs_modulus = E,
                                        .shear_modulus = buckling_shear_modulus(input.material),
                                        .length = r.effective_length},
                                       euler_critical_load(E, section.I_u(), length_u),
                                       euler_critical_load(E, section.I_v(), length_v));
  complete(input, BendingAxis::z, r);
  return r;
}

std::string_view name(BendingAxis axis) { return axis == BendingAxis::y ? "y" : "z"; }

std::string_view name(ColumnMode mode) {
  switch (mode) {
    case ColumnMode::about_y:
      return "about y";
    case ColumnMode::about_z:
      return "about z";
    case ColumnMode::about_v:
      return "about the weak principal axis";
    case ColumnMode::twisting:
      return "by twisting";
  }
  throw InternalError("column mode without a name");
}

std::string critical_load_step(const CheckInput& input, const ColumnResistance& r) {
  if (r.mode == ColumnMode::twisting) {
    return "N_cr by twisting = " + kilonewtons(r.critical) +
           ", the least root of the torsional-flexural equation with G I_t = " +
           buckling_shear_modulus_text(input.material) + " x " +
           fourth_millimetres(input.section.I_t) +
           ", pi^2 E I_w / L_T^2 with L_T = " + millimetres(r.effective_length) +
           " and the shear centre at (" + millimetres(input.section.y_shear) + ", " +
           millimetres(input.section.z_shear) + ").";
  }
  return "N_cr " + std::string(name(r.mode)) + " = pi^2 E I / (K L)^2 = pi^2 x " +
         gigapascals(column_modulus(input.material)) + " x " + fourth_millimetres(r.second_moment) +
         " / (" + millimetres(r.effective_length) + ")^2 = " + kilonewtons(r.critical) + ".";
}

std::vector<std::string> resistance_steps(const CheckInput& input, const ColumnResistance& r) {
  const double f = column_strength(input.material);
  const double share = weld_share(input);
  std::vector<std::string> steps;
  if (input.limits.details.welded && input.limits.column_method != ColumnMethod::euler) {
    steps.push_back(input.material.weld_yield_factor
                        ? "A weld leaves " + number(share) + " of the strength."
                        : "The strength beside the weld is not known; the check of the weld zone "
                          "says so.");
  }
  switch (input.limits.column_method) {
    case ColumnMethod::euler:
      return {};
    case ColumnMethod::johnson:
      steps.push_back("Johnson's parabola, Euler's curve beyond it, with S_y = " +
                      megapascals(f * share) + ": N_b = " + kilonewtons(r.load) + ".");
      return steps;
    case ColumnMethod::curves:
      break;
  }
  const BendingAxis axis = r.mode == ColumnMode::about_y ? BendingAxis::y : BendingAxis::z;
  steps.push_back("Relative slenderness = root of A f / N_cr = root of (" +
                  square_millimetres(input.section.area) + " x " +
                  megapascals(f / input.material.strength_factor) + " / " +
                  kilonewtons(r.critical) + ") = " + number(r.slenderness) + ".");
  steps.push_back("Reduction factor by " + curve_name(input, axis) + ": " + number(r.factor) + ".");
  steps.push_back("N_b = " + number(r.factor) + " x " + square_millimetres(input.section.area) +
                  " x " + megapascals(f * share) + " = " + kilonewtons(r.load) + ".");
  return steps;
}

void add_method_warning(const CheckInput& input, Explanation& text) {
  std::string warning;
  switch (input.limits.column_method) {
    case ColumnMethod::curves:
      return;
    case ColumnMethod::euler:
      warning =
          "Warning: the Euler load alone, as asked for; it knows neither imperfections nor "
          "yielding "
          "and overstates what a real column carries.";
      break;
    case ColumnMethod::johnson:
      warning =
          "Warning: Johnson's parabola, as asked for; it knows no imperfections and overstates "
          "what "
          "a real column carries.";
      break;
  }
  text.line += " " + warning;
  text.steps.push_back(warning);
}

}  // namespace bismar::mechanics
