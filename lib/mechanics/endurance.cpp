// SPDX-License-Identifier: MIT
#include <bismar/mechanics/endurance.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <string_view>

namespace bismar {

namespace {

constexpr double megapascal = 1e6;
constexpr double millimetre = 1e-3;
constexpr double inch = 0.0254;
constexpr double kpsi = 4448.2216152605 / (0.0254 * 0.0254);
/// Sizes and temperatures on a border of a range may be off it by unit conversion.
constexpr double rounding = 1e-9;

void require_positive(std::string_view where, double value) {
  FaultList faults;
  mechanics::require_positive(faults, where, value);
  faults.throw_if_any();
}

void require_within(
    std::string_view where, double value, double low, double high, std::string_view allowed) {
  FaultList faults;
  mechanics::require_finite(faults, where, value);
  if (std::isfinite(value) && (value < low || value > high)) {
    mechanics::add_out_of_range(faults, where, value, allowed);
  }
  faults.throw_if_any();
}

/// z of the standard normal distribution, P(Z < z) = reliability, for at least 0.5.
///
/// Begun with the rational formula of Hastings (Abramowitz and Stegun, Handbook of Mathematical
/// Functions, 26.2.23, error below 4.5e-4; from memory) and bettered by two of Halley's steps on
/// the tail above z, which keeps its digits where the reliability is close to 1. Each step cubes
/// the error, so that two reach the rounding of erfc(); a bisection holds it in the tests.
double normal_deviate(double reliability) {
  const double tail = 1.0 - reliability;
  const double t = std::sqrt(-2.0 * std::log(tail));
  double z = t - (2.515517 + t * (0.802853 + t * 0.010328)) /
                     (1.0 + t * (1.432788 + t * (0.189269 + t * 0.001308)));
  for (int i = 0; i < 2; ++i) {
    const double density = std::exp(-0.5 * z * z) / std::sqrt(2.0 * std::numbers::pi);
    const double newton = (0.5 * std::erfc(z / std::numbers::sqrt2) - tail) / density;
    z += newton / (1.0 - 0.5 * z * newton);
  }
  return std::max(0.0, z);
}

}  // namespace

double tensile_strength_from_brinell(double brinell_hardness, HandbookUnits units) {
  require_positive("brinell_hardness", brinell_hardness);
  return brinell_hardness * (units == HandbookUnits::metric ? 3.4 * megapascal : 0.495 * kpsi);
}

double endurance_limit_estimate(double tensile_strength, HandbookUnits units) {
  require_positive("tensile_strength", tensile_strength);
  const double cap = units == HandbookUnits::metric ? 700.0 * megapascal : 100.0 * kpsi;
  return std::min(0.5 * tensile_strength, cap);
}

double fatigue_strength_fraction(double tensile_strength) {
  require_positive("tensile_strength", tensile_strength);
  const double S = tensile_strength / megapascal;
  if (S < 70.0 * kpsi / megapascal) {
    return 0.9;
  }
  const double held = std::min(S, 200.0 * kpsi / megapascal);
  return 1.06 - 4.1e-4 * held + 1.5e-7 * held * held;
}

SurfaceConstants surface_constants(FatigueSurface surface, SurfaceEdition edition) {
  const bool ninth = edition == SurfaceEdition::ninth;
  switch (surface) {
    case FatigueSurface::ground:
      return ninth ? SurfaceConstants{.a_MPa = 1.58, .a_kpsi = 1.34, .b = -0.085}
                   : SurfaceConstants{.a_MPa = 1.38, .a_kpsi = 1.21, .b = -0.067};
    case FatigueSurface::machined:
      return ninth ? SurfaceConstants{.a_MPa = 4.51, .a_kpsi = 2.70, .b = -0.265}
                   : SurfaceConstants{.a_MPa = 3.04, .a_kpsi = 2.00, .b = -0.217};
    case FatigueSurface::hot_rolled:
      return ninth ? SurfaceConstants{.a_MPa = 57.7, .a_kpsi = 14.4, .b = -0.718}
                   : SurfaceConstants{.a_MPa = 38.6, .a_kpsi = 11.0, .b = -0.650};
    case FatigueSurface::as_forged:
      return ninth ? SurfaceConstants{.a_MPa = 272.0, .a_kpsi = 39.9, .b = -0.995}
                   : SurfaceConstants{.a_MPa = 54.9, .a_kpsi = 12.7, .b = -0.758};
  }
  throw InternalError("surface without constants");
}

double surface_factor(FatigueSurface surface,
                      SurfaceEdition edition,
                      double tensile_strength,
                      HandbookUnits units) {
  require_positive("tensile_strength", tensile_strength);
  const SurfaceConstants c = surface_constants(surface, edition);
  return units == HandbookUnits::metric ? c.a_MPa * std::pow(tensile_strength / megapascal, c.b)
                                        : c.a_kpsi * std::pow(tensile_strength / kpsi, c.b);
}

double size_factor(double diameter, SizeRule rule, HandbookUnits units) {
  if (rule == SizeRule::one_range) {
    require_positive("diameter", diameter);
    require_within(
        "diameter", diameter, 0.0, 0.25 * (1.0 + rounding), "at most 0.25 m with this formula");
    const double d = diameter / millimetre;
    return d <= 8.0 * (1.0 + rounding) ? 1.0 : 1.189 * std::pow(d, -0.097);
  }
  require_within("diameter",
                 diameter,
                 2.79e-3 * (1.0 - rounding),
                 0.254 * (1.0 + rounding),
                 "from 0.00279 m to 0.254 m");
  if (units == HandbookUnits::metric) {
    const double d = diameter / millimetre;
    return d <= 51.0 * (1.0 + rounding) ? 1.24 * std::pow(d, -0.107) : 1.51 * std::pow(d, -0.157);
  }
  const double d = diameter / inch;
  return d <= 2.0 * (1.0 + rounding) ? std::pow(d / 0.3, -0.107) : 0.91 * std::pow(d, -0.157);
}

double equivalent_diameter_of_round(double diameter) {
  require_positive("diameter", diameter);
  return 0.370 * diameter;
}

double equivalent_diameter_of_rectangle(double height, double width) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  faults.throw_if_any();
  return std::sqrt(0.05 / 0.0766 * height * width);
}

double load_factor(FatigueLoad load) {
  switch (load) {
    case FatigueLoad::bending:
      return 1.0;
    case FatigueLoad::axial:
      return 0.85;
    case FatigueLoad::torsion:
      return 0.59;
  }
  throw InternalError("load without a factor");
}

double temperature_factor(double temperature, FatigueTemperatureRule rule) {
  require_positive("temperature", temperature);
  if (rule == FatigueTemperatureRule::plateau) {
    require_within(
        "temperature", temperature, 0.0, 823.15 * (1.0 + rounding), "at most 823.15 K (550 C)");
    return 1.0 - 0.0058 * std::max(0.0, temperature - 723.15);
  }
  require_within(
      "temperature", temperature, 294.26, 810.93, "from 294.26 K to 810.93 K (70 F to 1000 F)");
  const double T = temperature * 1.8 - 459.67;
  return 0.975 + T * (0.432e-3 + T * (-0.115e-5 + T * (0.104e-8 - T * 0.595e-12)));
}

double reliability_factor(double reliability) {
  require_within("reliability", reliability, 0.5, 0.999999 * (1.0 + 1e-12), "from 0.5 to 0.999999");
  return 1.0 - 0.08 * normal_deviate(reliability);
}

std::array<ReliabilityRow, 8> reliability_table() {
  return {{{0.5, 1.0},
           {0.9, 0.897},
           {0.95, 0.868},
           {0.99, 0.814},
           {0.999, 0.753},
           {0.9999, 0.702},
           {0.99999, 0.659},
           {0.999999, 0.620}}};
}

double tabulated_reliability_factor(double reliability) {
  FaultList faults;
  mechanics::require_finite(faults, "reliability", reliability);
  faults.throw_if_any();
  for (const ReliabilityRow& row : reliability_table()) {
    if (std::abs(row.reliability - reliability) <= 1e-9) {
      return row.factor;
    }
  }
  mechanics::add_out_of_range(
      faults,
      "reliability",
      reliability,
      "one of 0.5, 0.9, 0.95, 0.99, 0.999, 0.9999, 0.99999, 0.999999; reliability_factor() takes "
      "any between");
  faults.throw_if_any();
  throw InternalError("unreachable");
}

double endurance_limit(double specimen_limit, const EnduranceFactors& factors) {
  FaultList faults;
  mechanics::require_positive(faults, "specimen_limit", specimen_limit);
  mechanics::require_positive(faults, "surface", factors.surface);
  mechanics::require_positive(faults, "size", factors.size);
  mechanics::require_positive(faults, "load", factors.load);
  mechanics::require_positive(faults, "temperature", factors.temperature);
  mechanics::require_positive(faults, "reliability", factors.reliability);
  faults.throw_if_any();
  return factors.surface * factors.size * factors.load * factors.temperature * factors.reliability *
         specimen_limit;
}

}  // namespace bismar
