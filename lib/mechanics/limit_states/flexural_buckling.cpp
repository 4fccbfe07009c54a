// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>

#include <algorithm>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

bool is_timber(ColumnLaw law) {
  return law == ColumnLaw::timber_solid || law == ColumnLaw::timber_glued;
}

bool is_ductile(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield && !is_timber(material.column_law);
}

Symbol strength_symbol(const MemberMaterial& material) {
  return is_ductile(material) ? Symbol::sigma_y : Symbol::compressive;
}

double strength(const MemberMaterial& material) {
  return is_ductile(material) ? needed(material.sigma_y, Symbol::sigma_y)
                              : needed(material.compressive, Symbol::compressive);
}

/// A column buckles in bending; where the axial modulus is lower it is the safer one.
double modulus(const MemberMaterial& material) {
  const double E = is_timber(material.column_law) ? needed(material.E_05, Symbol::E_05)
                                                  : needed(material.E, Symbol::E);
  return material.E_axial ? std::min(E, *material.E_axial) : E;
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

/// Resistance about one axis.
struct Resistance {
  BendingAxis axis = BendingAxis::y;
  double effective_length = 0.0;
  double second_moment = 0.0;
  double critical = 0.0;     ///< N_cr [N]
  double slenderness = 0.0;  ///< lambda-bar [-]
  double factor = 1.0;       ///< chi [-]
  double load = 0.0;         ///< N_b [N]
};

Resistance resistance(const CheckInput& input, BendingAxis axis) {
  const bool about_y = axis == BendingAxis::y;
  Resistance r;
  r.axis = axis;
  r.effective_length = about_y ? input.effects.buckling_length_y : input.effects.buckling_length_z;
  r.second_moment = about_y ? input.section.I_y : input.section.I_z;
  r.critical = euler_critical_load(modulus(input.material), r.second_moment, r.effective_length);
  if (input.limits.column_method == ColumnMethod::euler) {
    r.load = r.critical;
    return r;
  }
  const double f = strength(input.material);
  // The curve's slenderness is made of characteristic values; the design factor of timber's
  // strength acts on the resistance only.
  r.slenderness =
      relative_slenderness(input.section.area, f / input.material.strength_factor, r.critical);
  r.factor = reduction_factor(curve(input, axis), r.slenderness);
  r.load = r.factor * input.section.area * f;
  return r;
}

Resistance least_resistance(const CheckInput& input) {
  const Resistance about_y = resistance(input, BendingAxis::y);
  const Resistance about_z = resistance(input, BendingAxis::z);
  return about_z.load < about_y.load ? about_z : about_y;
}

class FlexuralBuckling final : public LimitState {
 public:
  std::string_view id() const override { return "flexural buckling"; }
  std::string_view source() const override {
    return "EN 1993-1-1:2005 6.3.1; EN 1999-1-1:2007 6.3.1 (unwelded, kappa = 1); EN 1995-1-1:2004 "
           "6.3.2";
  }
  /// On the load.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.compression > 0.0;
  }
  std::vector<Symbol> needs(const LoadEffects&, const MemberMaterial& material) const override {
    return {is_timber(material.column_law) ? Symbol::E_05 : Symbol::E, strength_symbol(material)};
  }
  double utilisation(const CheckInput& input) const override {
    return input.factor * input.effects.compression / least_resistance(input).load;
  }
  Explanation explain(const CheckInput& input) const override;
  /// With the scale k, A f rises with k^2 and N_cr with k^4, so that the slenderness falls, chi
  /// does not fall and N_b = chi A f rises. The curve of a rolled I can change for the worse where
  /// its flange passes 40 or 100 mm: a step that lies between sizes of a stock list, and a border
  /// between pieces where such a section is scaled.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// E: N_cr rises. Strength: N_b = y N_cr with y = chi lambda^2, and by the curve's own equation
  /// (lambda^2 - y)(1 - y) = alpha (lambda - lambda_0) y the sign of dy/dlambda is that of
  /// 2 lambda (1 - y) - alpha y, which is positive because lambda^2 - 2 lambda_0 lambda + y >= 0.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::E_05:
      case Symbol::sigma_y:
      case Symbol::compressive:
        return Trend::falls;
      default:
        return Trend::constant;
    }
  }
};

Explanation FlexuralBuckling::explain(const CheckInput& input) const {
  const Resistance r = least_resistance(input);
  const double u = utilisation(input);
  const std::string axis = r.axis == BendingAxis::y ? "y" : "z";
  const bool euler = input.limits.column_method == ColumnMethod::euler;
  Explanation text;
  text.line = "Flexural buckling about " + axis + ": " + number(input.factor) + " x " +
              kilonewtons(input.effects.compression) + " against " + kilonewtons(r.load) +
              ": u = " + number(u) + ".";
  text.steps.push_back("N_cr = pi^2 E I / (K L)^2 = pi^2 x " +
                       gigapascals(modulus(input.material)) + " x " +
                       fourth_millimetres(r.second_moment) + " / (" +
                       millimetres(r.effective_length) + ")^2 = " + kilonewtons(r.critical) + ".");
  if (euler) {
    const std::string warning =
        "Warning: the Euler load alone, as asked for; it knows neither imperfections nor yielding "
        "and overstates what a real column carries.";
    text.line += " " + warning;
    text.steps.push_back(warning);
  } else {
    const double f = strength(input.material);
    text.steps.push_back("Relative slenderness = root of A f / N_cr = root of (" +
                         square_millimetres(input.section.area) + " x " +
                         megapascals(f / input.material.strength_factor) + " / " +
                         kilonewtons(r.critical) + ") = " + number(r.slenderness) + ".");
    text.steps.push_back("Reduction factor by " + curve_name(input, r.axis) + ": " +
                         number(r.factor) + ".");
    text.steps.push_back("N_b = " + number(r.factor) + " x " +
                         square_millimetres(input.section.area) + " x " + megapascals(f) + " = " +
                         kilonewtons(r.load) + ".");
  }
  text.steps.push_back("u = factor x load / resistance = " + number(input.factor) + " x " +
                       kilonewtons(input.effects.compression) + " / " + kilonewtons(r.load) +
                       " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& flexural_buckling_limit_state() {
  static const FlexuralBuckling state;
  return state;
}

}  // namespace bismar::mechanics
