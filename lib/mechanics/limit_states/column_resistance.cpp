// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"

#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
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

}  // namespace

bool is_timber(ColumnLaw law) {
  return law == ColumnLaw::timber_solid || law == ColumnLaw::timber_glued;
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

double column_modulus(const MemberMaterial& material) {
  const double E = is_timber(material.column_law) ? needed(material.E_05, Symbol::E_05)
                                                  : needed(material.E, Symbol::E);
  return material.E_axial ? std::min(E, *material.E_axial) : E;
}

ColumnResistance column_resistance(const CheckInput& input, BendingAxis axis) {
  const bool about_y = axis == BendingAxis::y;
  ColumnResistance r;
  r.axis = axis;
  r.effective_length = about_y ? input.effects.buckling_length_y : input.effects.buckling_length_z;
  r.second_moment = about_y ? input.section.I_y : input.section.I_z;
  r.critical =
      euler_critical_load(column_modulus(input.material), r.second_moment, r.effective_length);
  if (input.limits.column_method == ColumnMethod::euler) {
    r.load = r.critical;
    return r;
  }
  const double f = column_strength(input.material);
  // The curve's slenderness is made of characteristic values; the design factor of timber's
  // strength acts on the resistance only.
  r.slenderness =
      relative_slenderness(input.section.area, f / input.material.strength_factor, r.critical);
  r.factor = reduction_factor(curve(input, axis), r.slenderness);
  r.load = r.factor * input.section.area * f;
  return r;
}

ColumnResistance least_column_resistance(const CheckInput& input) {
  const ColumnResistance about_y = column_resistance(input, BendingAxis::y);
  const ColumnResistance about_z = column_resistance(input, BendingAxis::z);
  return about_z.load < about_y.load ? about_z : about_y;
}

std::string_view name(BendingAxis axis) { return axis == BendingAxis::y ? "y" : "z"; }

std::string critical_load_step(const CheckInput& input, const ColumnResistance& r) {
  return "N_cr about " + std::string(name(r.axis)) + " = pi^2 E I / (K L)^2 = pi^2 x " +
         gigapascals(column_modulus(input.material)) + " x " + fourth_millimetres(r.second_moment) +
         " / (" + millimetres(r.effective_length) + ")^2 = " + kilonewtons(r.critical) + ".";
}

std::vector<std::string> resistance_steps(const CheckInput& input, const ColumnResistance& r) {
  if (input.limits.column_method == ColumnMethod::euler) {
    return {};
  }
  const double f = column_strength(input.material);
  return {"Relative slenderness = root of A f / N_cr = root of (" +
              square_millimetres(input.section.area) + " x " +
              megapascals(f / input.material.strength_factor) + " / " + kilonewtons(r.critical) +
              ") = " + number(r.slenderness) + ".",
          "Reduction factor by " + curve_name(input, r.axis) + ": " + number(r.factor) + ".",
          "N_b = " + number(r.factor) + " x " + square_millimetres(input.section.area) + " x " +
              megapascals(f) + " = " + kilonewtons(r.load) + "."};
}

std::string_view euler_warning() {
  return "Warning: the Euler load alone, as asked for; it knows neither imperfections nor yielding "
         "and overstates what a real column carries.";
}

}  // namespace bismar::mechanics
