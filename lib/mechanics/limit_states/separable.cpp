// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/separable.hpp"

#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/deformation.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace bismar {

SeparableBound::~SeparableBound() = default;

}  // namespace bismar

namespace bismar::mechanics {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// A bound from above of chi(lambda) lambda over all lambda > 0. On a step of a grid chi is at most
/// its value at the beginning, since it falls, and lambda at most its value at the end; below the
/// grid chi is at most 1, beyond it at most 1 / lambda^2.
double largest_chi_lambda(const ColumnCurve& curve) {
  constexpr double first = 0.05;
  constexpr double last = 20.0;
  constexpr int steps = 4000;
  const double ratio = std::pow(last / first, 1.0 / steps);
  double largest = std::max(first, 1.0 / last);
  double from = first;
  for (int i = 0; i < steps; ++i) {
    const double to = from * ratio;
    largest = std::max(largest, reduction_factor(curve, from) * to);
    from = to;
  }
  return largest * (1.0 + 1e-12);
}

double steel_chi_lambda(BucklingCurve curve) {
  static const std::array<double, 5> values = {largest_chi_lambda(steel_curve(BucklingCurve::a0)),
                                               largest_chi_lambda(steel_curve(BucklingCurve::a)),
                                               largest_chi_lambda(steel_curve(BucklingCurve::b)),
                                               largest_chi_lambda(steel_curve(BucklingCurve::c)),
                                               largest_chi_lambda(steel_curve(BucklingCurve::d))};
  return values[static_cast<std::size_t>(curve)];
}

/// Of the laws whose curve the material alone decides.
double chi_lambda(ColumnLaw law) {
  static const double class_a = largest_chi_lambda(aluminium_curve(true));
  static const double class_b = largest_chi_lambda(aluminium_curve(false));
  static const double solid = largest_chi_lambda(timber_curve(false));
  static const double glued = largest_chi_lambda(timber_curve(true));
  switch (law) {
    case ColumnLaw::aluminium_class_a:
      return class_a;
    case ColumnLaw::aluminium_class_b:
      return class_b;
    case ColumnLaw::timber_solid:
      return solid;
    case ColumnLaw::timber_glued:
      return glued;
    case ColumnLaw::metal:
      break;
  }
  throw InternalError("the curve of a metal column depends on its section");
}

Deformation kind_of(DeformationBound::Kind kind) {
  switch (kind) {
    case DeformationBound::Kind::deflection:
      return Deformation::deflection;
    case DeformationBound::Kind::deflection_with_shear:
      return Deformation::deflection_with_shear;
    case DeformationBound::Kind::rotation:
      return Deformation::rotation;
  }
  throw InternalError("deformation without a kind");
}

}  // namespace

void MaterialFreeBound::demands(const DemandInput& input, std::span<double> out) const {
  static const MemberMaterial none;
  out[0] = state_.applies(input.effects, input.limits, none, input.section)
               ? state_.utilisation(
                     {input.section, none, input.effects, input.limits, input.length, 1.0})
               : 0.0;
}

void MaterialFreeBound::capacities(const CapacityInput& /*input*/, std::span<double> out) const {
  out[0] = 1.0;
}

double equivalent_stress_of_loads(const DemandInput& input) {
  double largest = 0.0;
  for (const Station& station : input.effects.stations) {
    for (const StressPoint& point :
         stress_points(input.section, station_stresses(input.section, station.forces))) {
      largest = std::max(largest, equivalent_squared(point));
    }
  }
  return std::sqrt(largest);
}

void DeformationBound::demands(const DemandInput& input, std::span<double> out) const {
  std::fill(out.begin(), out.end(), 0.0);
  const Deformation kind = kind_of(kind_);
  const auto& limit =
      kind == Deformation::rotation ? input.limits.rotation : input.limits.deflection;
  const bool shear = kind == Deformation::deflection_with_shear;
  const bool asked =
      limit && (kind == Deformation::rotation || input.limits.shear_deflection == shear);
  if (!asked || !is_deformed(input.effects, kind)) {
    return;
  }
  MemberMaterial unit;
  unit.E = unit.G = unit.rho = 1.0;
  // With the factor 0 the compression raises nothing, but N_cr is there.
  const auto at_unit = [&](Deformation asked_for) {
    return deformations({input.section, unit, input.effects, input.limits, input.length, 0.0},
                        asked_for);
  };
  // N_cr without shear is the higher one, and the demand on E the lower.
  const Deformations bending = at_unit(shear ? Deformation::deflection : kind);
  double loads = 0.0;
  double own = 0.0;
  for (const DeformationAlong& d : {bending.z, bending.y}) {
    // Own mass may also couple the axes; its part there is left out.
    const double both = d.coefficient + d.own_coefficient;
    const double of_loads = both > 0.0 ? d.bending * (d.coefficient / both) : 0.0;
    const double of_own = both > 0.0 ? d.bending * (d.own_coefficient / both) : 0.0;
    const double coupling = own_mass_acts(input.effects) ? 0.0 : d.coupling;
    const double together = (of_loads + coupling) / *limit;
    loads += together * together;
    own += of_own * of_own;
    const double share = d.critical > 0.0 ? input.effects.compression / d.critical : 0.0;
    if (together > 0.0) {
      out[1] = std::max(out[1], together + share);
    }
  }
  out[0] = std::sqrt(loads);
  out[2] = std::sqrt(own) / *limit;
  if (shear) {
    // Own mass is in the shear of this call: without it the coefficient of the loads is left.
    const double area_z = at_unit(kind).z.shear_area;
    const double area_y = at_unit(kind).y.shear_area;
    const double z = input.effects.shear_deflection_z;
    const double y = input.effects.shear_deflection_y;
    out[3] = std::hypot(z > 0.0 ? z / area_z : 0.0, y > 0.0 ? y / area_y : 0.0) / *limit;
  }
}

void DeformationBound::capacities(const CapacityInput& input, std::span<double> out) const {
  const double E = needed(input.material.E, Symbol::E);
  out[0] = out[1] = E;
  out[2] = own_mass_acts(input.effects) ? E / needed(input.material.rho, Symbol::rho) : infinity;
  out[3] = kind_ == Kind::deflection_with_shear ? needed(input.material.G, Symbol::G) : infinity;
}

bool DeformationBound::exact(const CapacityInput& input) const {
  return kind_ != Kind::deflection_with_shear && !own_mass_acts(input.effects) &&
         input.effects.compression == 0.0;
}

void FlexuralBound::demands(const DemandInput& input, std::span<double> out) const {
  std::fill(out.begin(), out.end(), 0.0);
  const double N = input.effects.compression;
  if (!(N > 0.0)) {
    return;
  }
  const SectionProperties& s = input.section;
  const bool askew = s.I_yz != 0.0;
  const double longer = std::max(input.effects.buckling_length_y, input.effects.buckling_length_z);
  out[0] = N / s.area;
  for (const BendingAxis axis : {BendingAxis::y, BendingAxis::z}) {
    const bool about_y = axis == BendingAxis::y;
    const double Z = askew     ? euler_critical_load(1.0, s.I_v(), longer)
                     : about_y ? euler_critical_load(1.0, s.I_y, input.effects.buckling_length_y)
                               : euler_critical_load(1.0, s.I_z, input.effects.buckling_length_z);
    const double middle = N / std::sqrt(s.area * Z);
    out[1] = std::max(out[1], N / Z);
    out[2] = std::max(out[2], middle / steel_chi_lambda(buckling_curve(s, axis)));
    out[3] = std::max(out[3], middle);
  }
}

void FlexuralBound::capacities(const CapacityInput& input, std::span<double> out) const {
  const MemberMaterial& m = input.material;
  // Of column_resistance only the welded share reads more than the material, and no section.
  const double share = input.limits.details.welded ? m.weld_yield_factor.value_or(1.0) : 1.0;
  const double E = column_modulus(m);
  std::fill(out.begin(), out.end(), infinity);
  if (input.limits.column_method == ColumnMethod::euler) {
    out[1] = E;
    return;
  }
  const double f = column_strength(m);
  out[0] = f * share;
  if (input.limits.column_method == ColumnMethod::johnson) {
    out[1] = E;
    return;
  }
  // The slenderness is made of f / strength_factor: N_b = chi A f share and chi lambda^2 <= 1 give
  // N_b <= E Z strength_factor share.
  out[1] = E * m.strength_factor * share;
  const double middle = std::sqrt(E * f * m.strength_factor) * share;
  if (m.column_law == ColumnLaw::metal) {
    out[2] = middle;
  } else {
    out[3] = chi_lambda(m.column_law) * middle;
  }
}

}  // namespace bismar::mechanics
