// SPDX-License-Identifier: MIT
#include <bismar/mechanics/notch.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <array>
#include <cmath>
#include <string>

namespace bismar {

namespace {

/// Ratios on the border of a range may be off it by the rounding of their lengths.
constexpr double rounding = 1e-9;

/// C_i = a + b sqrt(h/r) + c h/r.
struct Term {
  double a;
  double b;
  double c;
};
using Terms = std::array<Term, 4>;

/// One fit: its constants up to h/r = 2 and beyond, and the h/r that it holds for.
struct Fit {
  Terms shallow;
  Terms deep;
  double least = 0.0;
  double largest = 0.0;
};

constexpr Fit roark_fillet_bending = {
    {{{.927, 1.149, -.086}, {.015, -3.281, .837}, {.847, 1.716, -.506}, {-.790, .417, -.246}}},
    {{{1.225, .831, -.010}, {-3.790, .958, -.257}, {7.374, -4.834, .862}, {-3.809, 3.046, -.595}}},
    0.1,
    20.0};
constexpr Fit roark_fillet_tension = {
    {{{.927, 1.149, -.086}, {.011, -3.029, .948}, {-.304, 3.979, -1.737}, {.366, -2.098, .875}}},
    {{{1.225, .831, -.010}, {-1.831, -.318, -.049}, {2.236, -.522, .176}, {-.630, .009, -.117}}},
    0.1,
    20.0};
constexpr Fit fillet_torsion = {
    {{{.905, .783, -.075}, {-.437, -1.969, .553}, {1.557, 1.073, -.578}, {-1.061, .171, .086}}},
    {{{.905, .783, -.075}, {-.437, -1.969, .553}, {1.557, 1.073, -.578}, {-1.061, .171, .086}}},
    0.25,
    4.0};
constexpr Fit pilkey_fillet_tension = {
    {{{.926, 1.157, -.099}, {.012, -3.036, .961}, {-.302, 3.977, -1.744}, {.365, -2.098, .878}}},
    {{{1.200, .860, -.022}, {-1.805, -.346, -.038}, {2.198, -.486, .165}, {-.593, -.028, -.106}}},
    0.1,
    20.0};
constexpr Fit pilkey_fillet_bending = {
    {{{.947, 1.206, -.131}, {.022, -3.405, .915}, {.869, 1.777, -.555}, {-.810, .422, -.260}}},
    {{{1.232, .832, -.008}, {-3.813, .968, -.260}, {7.423, -4.868, .869}, {-3.839, 3.070, -.600}}},
    0.1,
    20.0};

constexpr Fit roark_groove_tension = {
    {{{.455, 3.354, -.769},
      {3.129, -15.955, 7.404},
      {-6.909, 29.286, -16.104},
      {4.325, -16.685, 9.469}}},
    {{{.935, 1.922, .004}, {.537, -3.708, .040}, {-2.538, 3.438, -.012}, {2.066, -1.652, -.031}}},
    0.25,
    50.0};
constexpr Fit roark_groove_bending = {
    {{{.455, 3.354, -.769},
      {.891, -12.721, 4.593},
      {.286, 15.481, -6.392},
      {-.632, -6.115, 2.568}}},
    {{{.935, 1.922, .004}, {-.552, -5.327, .086}, {.754, 6.281, -.121}, {-.138, -2.876, .031}}},
    0.25,
    50.0};
constexpr Fit roark_groove_torsion = {
    {{{1.245, .264, .491},
      {-3.030, 3.269, -3.633},
      {7.199, -11.286, 8.318},
      {-4.414, 7.753, -5.176}}},
    {{{1.651, .614, .040}, {-4.794, -.314, -.217}, {8.457, -.962, .389}, {-4.314, .662, -.212}}},
    0.25,
    50.0};
constexpr Fit pilkey_groove_tension = {
    {{{.89, 2.208, -.094}, {-.923, -6.678, 1.638}, {2.893, 6.448, -2.516}, {-1.912, -1.944, .963}}},
    {{{1.037, 1.967, .002}, {-2.679, -2.980, -.053}, {3.090, 2.124, .165}, {-.424, -1.153, -.106}}},
    0.1,
    50.0};
constexpr Fit pilkey_groove_bending = {
    {{{.594, 2.958, -.520},
      {.422, -10.545, 2.692},
      {.501, 14.375, -4.486},
      {-.613, -6.573, 2.177}}},
    {{{.965, 1.926, 0.0}, {-2.773, -4.414, -.017}, {4.785, 4.681, .096}, {-1.995, -2.241, -.074}}},
    0.1,
    50.0};
constexpr Fit pilkey_groove_torsion = {
    {{{.966, 1.056, -.022}, {-.192, -4.037, .674}, {.808, 5.321, -1.231}, {-.567, -2.364, .566}}},
    {{{1.089, .924, .018}, {-1.504, -2.141, -.047}, {2.486, 2.289, .091}, {-1.056, -1.104, -.059}}},
    0.25,
    50.0};

const Fit& fillet_fit(NotchLoad load, NotchFormula formula) {
  const bool roark = formula == NotchFormula::roark;
  switch (load) {
    case NotchLoad::tension:
      return roark ? roark_fillet_tension : pilkey_fillet_tension;
    case NotchLoad::bending:
      return roark ? roark_fillet_bending : pilkey_fillet_bending;
    case NotchLoad::torsion:
      return fillet_torsion;
  }
  throw InternalError("notch load without a fit");
}

const Fit& groove_fit(NotchLoad load, NotchFormula formula) {
  const bool roark = formula == NotchFormula::roark;
  switch (load) {
    case NotchLoad::tension:
      return roark ? roark_groove_tension : pilkey_groove_tension;
    case NotchLoad::bending:
      return roark ? roark_groove_bending : pilkey_groove_bending;
    case NotchLoad::torsion:
      return roark ? roark_groove_torsion : pilkey_groove_torsion;
  }
  throw InternalError("notch load without a fit");
}

double factor(const Fit& fit, const RoundNotch& notch) {
  FaultList faults;
  mechanics::require_positive(faults, "large_diameter", notch.large_diameter);
  mechanics::require_positive(faults, "small_diameter", notch.small_diameter);
  mechanics::require_positive(faults, "radius", notch.radius);
  if (faults.empty() && notch.small_diameter >= notch.large_diameter) {
    mechanics::add_out_of_range(
        faults, "small_diameter", notch.small_diameter, "less than the large diameter");
  }
  faults.throw_if_any();
  const double h = 0.5 * (notch.large_diameter - notch.small_diameter);
  const double ratio = h / notch.radius;
  if (ratio < fit.least * (1.0 - rounding) || ratio > fit.largest * (1.0 + rounding)) {
    const auto text = [h](double share) { return std::to_string(h / share); };
    mechanics::add_out_of_range(faults,
                                "radius",
                                notch.radius,
                                "from " + text(fit.largest) + " to " + text(fit.least) +
                                    " m for this step, where the formula holds");
  }
  faults.throw_if_any();
  const Terms& terms = ratio <= 2.0 * (1.0 + rounding) ? fit.shallow : fit.deep;
  const double x = 2.0 * h / notch.large_diameter;
  double sum = 0.0;
  double power = 1.0;
  for (const Term& term : terms) {
    sum += power * (term.a + term.b * std::sqrt(ratio) + term.c * ratio);
    power *= x;
  }
  return sum;
}

void require_relative_hole(double relative_hole) {
  FaultList faults;
  mechanics::require_not_negative(faults, "relative_hole", relative_hole);
  if (std::isfinite(relative_hole) && relative_hole >= 1.0) {
    mechanics::add_out_of_range(faults, "relative_hole", relative_hole, "below 1");
  }
  faults.throw_if_any();
}

constexpr double inch = 0.0254;
constexpr double kpsi = 4448.2216152605 / (inch * inch);

void require_notch(double tensile_strength, double radius) {
  FaultList faults;
  mechanics::require_positive(faults, "tensile_strength", tensile_strength);
  mechanics::require_positive(faults, "radius", radius);
  faults.throw_if_any();
}

}  // namespace

double shoulder_fillet_factor(const RoundNotch& notch, NotchLoad load, NotchFormula formula) {
  return factor(fillet_fit(load, formula), notch);
}

double u_groove_factor(const RoundNotch& notch, NotchLoad load, NotchFormula formula) {
  return factor(groove_fit(load, formula), notch);
}

double plate_hole_factor(double relative_hole) {
  require_relative_hole(relative_hole);
  const double x = relative_hole;
  return 3.0 + x * (-3.13 + x * (3.66 - x * 1.53));
}

double plate_hole_gross_factor(double relative_hole) {
  return plate_hole_factor(relative_hole) / (1.0 - relative_hole);
}

double plate_hole_heywood_factor(double relative_hole) {
  require_relative_hole(relative_hole);
  const double rest = 1.0 - relative_hole;
  return 2.0 + rest * rest * rest;
}

double radial_hole_factor(double bore_ratio, double hole_ratio, NotchLoad load) {
  const double largest = load == NotchLoad::torsion ? 0.4 : 0.45;
  FaultList faults;
  mechanics::require_not_negative(faults, "bore_ratio", bore_ratio);
  if (std::isfinite(bore_ratio) && bore_ratio > 0.9 * (1.0 + rounding)) {
    mechanics::add_out_of_range(faults, "bore_ratio", bore_ratio, "at most 0.9");
  }
  mechanics::require_not_negative(faults, "hole_ratio", hole_ratio);
  if (std::isfinite(hole_ratio) && hole_ratio > largest * (1.0 + rounding)) {
    mechanics::add_out_of_range(faults,
                                "hole_ratio",
                                hole_ratio,
                                load == NotchLoad::torsion ? "at most 0.4" : "at most 0.45");
  }
  faults.throw_if_any();
  const double q = bore_ratio;
  const double x = hole_ratio;
  switch (load) {
    case NotchLoad::tension:
      return 3.0 + x * (2.773 + q * (1.529 - q * 4.379) +
                        x * (-0.421 + q * (-12.782 + q * 22.781) +
                             x * (16.841 + q * (16.678 - q * 40.007))));
    case NotchLoad::bending:
      return 3.0 + x * (-6.690 + q * (-1.620 + q * 4.432) +
                        x * (44.739 + q * (10.724 - q * 19.927) +
                             x * (-53.307 + q * (-25.998 + q * 43.258))));
    case NotchLoad::torsion:
      return 4.0 + x * (-6.793 + q * (1.133 - q * 0.126) +
                        x * (38.382 + q * (-7.242 + q * 6.495) +
                             x * (-44.576 + q * (-7.428 + q * 58.656))));
  }
  throw InternalError("notch load without a formula");
}

double neuber_constant(double tensile_strength, NotchLoad load) {
  const bool torsion = load == NotchLoad::torsion;
  FaultList faults;
  mechanics::require_positive(faults, "tensile_strength", tensile_strength);
  const double S = tensile_strength / kpsi;
  if (faults.empty() &&
      (S < 50.0 * (1.0 - rounding) || S > (torsion ? 220.0 : 250.0) * (1.0 + rounding))) {
    mechanics::add_out_of_range(faults,
                                "tensile_strength",
                                tensile_strength,
                                torsion ? "from 345 MPa to 1517 MPa" : "from 345 MPa to 1724 MPa");
  }
  faults.throw_if_any();
  const double in = torsion ? 0.190 + S * (-2.51e-3 + S * (1.35e-5 - S * 2.67e-8))
                            : 0.246 + S * (-3.08e-3 + S * (1.51e-5 - S * 2.67e-8));
  return in * std::sqrt(inch);
}

double neuber_sensitivity(double tensile_strength, double radius, NotchLoad load) {
  require_notch(tensile_strength, radius);
  return 1.0 / (1.0 + neuber_constant(tensile_strength, load) / std::sqrt(radius));
}

double peterson_sensitivity(double tensile_strength, double radius, NotchLoad load) {
  require_notch(tensile_strength, radius);
  const double a = 0.0254e-3 * std::pow(2070e6 / tensile_strength, 1.8) *
                   (load == NotchLoad::torsion ? 0.6 : 1.0);
  return 1.0 / (1.0 + a / radius);
}

double fatigue_concentration(double stress_concentration, double sensitivity) {
  FaultList faults;
  mechanics::require_finite(faults, "stress_concentration", stress_concentration);
  if (std::isfinite(stress_concentration) && stress_concentration < 1.0) {
    mechanics::add_out_of_range(faults, "stress_concentration", stress_concentration, "1 or more");
  }
  mechanics::require_not_negative(faults, "sensitivity", sensitivity);
  if (std::isfinite(sensitivity) && sensitivity > 1.0) {
    mechanics::add_out_of_range(faults, "sensitivity", sensitivity, "between 0 and 1");
  }
  faults.throw_if_any();
  return 1.0 + sensitivity * (stress_concentration - 1.0);
}

}  // namespace bismar
