// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/deformation.hpp"

#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

/// One axis of a member: what its loads and 1 N/m of own mass do.
struct Axis {
  double coefficient = 0.0;
  double own_coefficient = 0.0;
  double shear_coefficient = 0.0;
  double own_shear_coefficient = 0.0;
  double acceleration = 0.0;
  double largest_moment = 0.0;
  double buckling_length = 0.0;
};

Axis axis_z(const LoadEffects& e, Deformation kind) {
  const bool turns = kind == Deformation::rotation;
  return {.coefficient = turns ? e.rotation_z : e.deflection_z,
          .own_coefficient = turns ? e.own_z.rotation : e.own_z.deflection,
          .shear_coefficient = e.shear_deflection_z,
          .own_shear_coefficient = e.own_z.shear_deflection,
          .acceleration = std::abs(e.acceleration_z),
          .largest_moment = e.moment_y.largest,
          .buckling_length = e.buckling_length_y};
}

Axis axis_y(const LoadEffects& e, Deformation kind) {
  const bool turns = kind == Deformation::rotation;
  return {.coefficient = turns ? e.rotation_y : e.deflection_y,
          .own_coefficient = turns ? e.own_y.rotation : e.own_y.deflection,
          .shear_coefficient = e.shear_deflection_y,
          .own_shear_coefficient = e.own_y.shear_deflection,
          .acceleration = std::abs(e.acceleration_y),
          .largest_moment = e.moment_z.largest,
          .buckling_length = e.buckling_length_z};
}

double own_line_load(const CheckInput& input, double acceleration) {
  return acceleration > 0.0
             ? needed(input.material.rho, Symbol::rho) * input.section.area * acceleration
             : 0.0;
}

/// What the moments of `other` do along this axis: its own deformation times I_yz / (I_y I_z -
/// I_yz^2) / E.
double coupling_coefficient(const CheckInput& input, const Axis& other, Deformation kind) {
  const double own = own_line_load(input, other.acceleration);
  if (input.effects.support_y == input.effects.support_z) {
    return other.coefficient + own * other.own_coefficient;
  }
  // A moment never above M turns a free length by at most M L and moves it by M L^2 / 2; 1 N/m
  // never bends a member by more than L^2 / 2.
  const double L = input.length;
  const double moment = other.largest_moment + own * L * L / 2.0;
  return kind == Deformation::rotation ? moment * L : moment * L * L / 2.0;
}

DeformationAlong along(const CheckInput& input,
                       Deformation kind,
                       const Axis& axis,
                       const Axis& other,
                       double second_moment,
                       double other_second_moment,
                       double shear_area) {
  const double E = needed(input.material.E, Symbol::E);
  const double I_yz = std::abs(input.section.I_yz);
  // Of the inverse of the inertia tensor; 1 / I where the axes are principal.
  const double determinant = second_moment * other_second_moment - I_yz * I_yz;
  const double effective = I_yz > 0.0 ? determinant / other_second_moment : second_moment;
  DeformationAlong result;
  result.coefficient = axis.coefficient;
  result.own_line_load = own_line_load(input, axis.acceleration);
  result.own_coefficient = result.own_line_load * axis.own_coefficient;
  result.bending = (result.coefficient + result.own_coefficient) / (E * effective);
  if (I_yz > 0.0) {
    result.coupling = coupling_coefficient(input, other, kind) * I_yz / (E * determinant);
  }
  double stiffness = std::numeric_limits<double>::infinity();
  if (kind == Deformation::deflection_with_shear) {
    result.shear_area = shear_area;
    stiffness = needed(input.material.G, Symbol::G) * shear_area;
    const double coefficient =
        axis.shear_coefficient + result.own_line_load * axis.own_shear_coefficient;
    result.shear = coefficient > 0.0 ? coefficient / stiffness : 0.0;
  }
  if (input.effects.compression > 0.0) {
    const double N = input.factor * input.effects.compression;
    const double stable =
        I_yz > 0.0
            ? euler_critical_load(
                  E, input.section.I_v(), std::max(axis.buckling_length, other.buckling_length))
            : euler_critical_load(E, second_moment, axis.buckling_length);
    result.critical = stable / (1.0 + stable / stiffness);
    result.amplification = N < result.critical ? 1.0 / (1.0 - N / result.critical)
                                               : std::numeric_limits<double>::infinity();
  }
  return result;
}

/// The shear area of the deflection. A section without one gets a lower bound: with no stress above
/// V / A_v the strain energy, V^2 / (2 G A_s) a length, is at most that of V / A_v all over A.
double deflection_shear_area(double of_energy, double of_peak, double area) {
  return of_energy > 0.0 ? of_energy : of_peak * of_peak / area;
}

// --- words
// -----------------------------------------------------------------------------------------

std::string size(double value, Deformation kind) {
  return kind == Deformation::rotation ? degrees(value) : millimetres(value);
}

void add_steps(const CheckInput& input,
               Deformation kind,
               const DeformationAlong& d,
               bool along_z,
               std::vector<std::string>& steps) {
  const std::string axis = along_z ? "z" : "y";
  const std::string unit = kind == Deformation::rotation ? " N m2" : " N m3";
  const double I = along_z ? input.section.I_y : input.section.I_z;
  std::string step = "Along " + axis + ": coefficient " + number(d.coefficient) + unit;
  if (d.own_line_load > 0.0) {
    step += " and " + number(d.own_coefficient) + unit + " of own mass (" +
            number(d.own_line_load) + " N/m)";
  }
  step += " over E = " + gigapascals(*input.material.E) + " and I_" + (along_z ? "y" : "z") +
          " = " + fourth_millimetres(I) +
          (input.section.I_yz == 0.0 ? std::string()
                                     : ", less I_yz^2 over the other for I_yz = " +
                                           fourth_millimetres(input.section.I_yz) + ",") +
          " gives " + size(d.bending, kind) + ".";
  steps.push_back(step);
  if (d.coupling > 0.0) {
    steps.push_back("The moment about the other axis adds " + size(d.coupling, kind) + " along " +
                    axis + ", because I_yz is not zero.");
  }
  if (d.shear_area > 0.0 && d.shear > 0.0) {
    steps.push_back("Shear adds " + size(d.shear, kind) +
                    ", with G = " + gigapascals(*input.material.G) + " and a shear area of " +
                    square_millimetres(d.shear_area) + ".");
  }
  if (input.effects.compression <= 0.0 || d.first_order() <= 0.0) {
    return;
  }
  const double N = input.factor * input.effects.compression;
  steps.push_back(std::isinf(d.amplification)
                      ? "Along " + axis + ": the compression " + kilonewtons(N) +
                            " reaches N_cr = " + kilonewtons(d.critical) +
                            ": the deflection grows without bound."
                      : "Along " + axis + " the compression raises it by 1 / (1 - " +
                            kilonewtons(N) + " / " + kilonewtons(d.critical) + ") = " +
                            number(d.amplification) + ", to " + size(d.total(), kind) + ".");
}

}  // namespace

double Deformations::together() const {
  const double along_z = z.total();
  const double along_y = y.total();
  return std::sqrt(along_z * along_z + along_y * along_y);
}

Deformations deformations(const CheckInput& input, Deformation kind) {
  const SectionProperties& s = input.section;
  const Axis z = axis_z(input.effects, kind);
  const Axis y = axis_y(input.effects, kind);
  return {
      .z = along(input, kind, z, y, s.I_y, s.I_z, deflection_shear_area(s.A_s_z, s.A_v_z, s.area)),
      .y = along(input, kind, y, z, s.I_z, s.I_y, deflection_shear_area(s.A_s_y, s.A_v_y, s.area))};
}

bool is_deformed(const LoadEffects& effects, Deformation kind) {
  return own_mass_acts(effects) || axis_z(effects, kind).coefficient > 0.0 ||
         axis_y(effects, kind).coefficient > 0.0;
}

std::vector<std::string> deformation_steps(const CheckInput& input, Deformation kind) {
  const Deformations d = deformations(input, kind);
  std::vector<std::string> steps;
  add_steps(input, kind, d.z, true, steps);
  add_steps(input, kind, d.y, false, steps);
  steps.push_back("Together, root of the sum of squares: " + size(d.together(), kind) + ".");
  return steps;
}

}  // namespace bismar::mechanics
