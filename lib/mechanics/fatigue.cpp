// SPDX-License-Identifier: MIT
#include <bismar/mechanics/fatigue.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/mean_stress.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;
constexpr double infinity = std::numeric_limits<double>::infinity();

void require_line(FaultList& faults, const SNLine& line) {
  mechanics::require_positive(faults, "a", line.a);
  mechanics::require_finite(faults, "b", line.b);
  if (line.b >= 0.0) {
    mechanics::add_out_of_range(faults, "b", line.b, "below zero");
  }
}

void require_stress(FaultList& faults, const FatigueStress& stress) {
  mechanics::require_not_negative(faults, "amplitude", stress.amplitude);
  mechanics::require_finite(faults, "mean", stress.mean);
}

bool reads_yield(MeanStressLine line) {
  return line == MeanStressLine::asme_elliptic || line == MeanStressLine::soderberg;
}

void require_strengths(FaultList& faults, MeanStressLine line, const FatigueStrengths& strengths) {
  mechanics::require_positive(faults, "endurance", strengths.endurance);
  if (reads_yield(line)) {
    mechanics::require_positive(faults, "yield", strengths.yield);
  } else {
    mechanics::require_positive(faults, "tensile", strengths.tensile);
  }
}

/// 1 / n, amplitude and mean in the unit of the strengths, or over any common length cubed.
double share_used(MeanStressLine line,
                  double amplitude,
                  double mean,
                  const FatigueStrengths& strengths) {
  return mechanics::share_used(line,
                               amplitude / strengths.endurance,
                               mean / (reads_yield(line) ? strengths.yield : strengths.tensile));
}

void require_loading(FaultList& faults, const ShaftLoading& loading) {
  mechanics::require_not_negative(faults, "alternating_moment", loading.alternating_moment);
  mechanics::require_not_negative(faults, "mean_moment", loading.mean_moment);
  mechanics::require_not_negative(faults, "alternating_torque", loading.alternating_torque);
  mechanics::require_not_negative(faults, "mean_torque", loading.mean_torque);
  const auto at_least_one = [&faults](const char* where, double value) {
    mechanics::require_finite(faults, where, value);
    if (value < 1.0) {
      mechanics::add_out_of_range(faults, where, value, "1 or more");
    }
  };
  at_least_one("k_f", loading.k_f);
  at_least_one("k_fs", loading.k_fs);
}

double distortion_energy_moment(double moment, double torque) {
  return std::sqrt(4.0 * moment * moment + 3.0 * torque * torque);
}

/// Of the first cycle, all loads at their largest together.
double largest_moment(const ShaftLoading& loading) {
  return distortion_energy_moment(
      loading.k_f * (loading.alternating_moment + loading.mean_moment),
      loading.k_fs * (loading.alternating_torque + loading.mean_torque));
}

}  // namespace

SNLine sn_line(double fraction, double tensile_strength, double endurance_limit) {
  FaultList faults;
  mechanics::require_positive(faults, "fraction", fraction);
  if (std::isfinite(fraction) && fraction > 1.0) {
    mechanics::add_out_of_range(faults, "fraction", fraction, "at most 1");
  }
  mechanics::require_positive(faults, "tensile_strength", tensile_strength);
  mechanics::require_positive(faults, "endurance_limit", endurance_limit);
  if (faults.empty() && endurance_limit >= fraction * tensile_strength) {
    mechanics::add_out_of_range(faults,
                                "endurance_limit",
                                endurance_limit,
                                "below the strength at 1000 cycles, fraction x tensile_strength");
  }
  faults.throw_if_any();
  const double at_1000 = fraction * tensile_strength;
  return {.a = at_1000 * at_1000 / endurance_limit,
          .b = -std::log10(at_1000 / endurance_limit) / 3.0};
}

SNLine sn_line_through(double stress_1, double cycles_1, double stress_2, double cycles_2) {
  FaultList faults;
  mechanics::require_positive(faults, "stress_1", stress_1);
  mechanics::require_positive(faults, "cycles_1", cycles_1);
  mechanics::require_positive(faults, "stress_2", stress_2);
  mechanics::require_positive(faults, "cycles_2", cycles_2);
  if (faults.empty() &&
      !(cycles_2 > cycles_1 ? stress_2 < stress_1 : cycles_2 < cycles_1 && stress_2 > stress_1)) {
    mechanics::add_out_of_range(
        faults, "stress_2", stress_2, "lower than stress_1 where its life is longer, else higher");
  }
  faults.throw_if_any();
  const double b = std::log(stress_1 / stress_2) / std::log(cycles_1 / cycles_2);
  return {.a = stress_1 * std::pow(cycles_1, -b), .b = b};
}

SNLine sn_line_of_reversals(double coefficient, double exponent) {
  FaultList faults;
  mechanics::require_positive(faults, "coefficient", coefficient);
  mechanics::require_finite(faults, "exponent", exponent);
  if (exponent >= 0.0) {
    mechanics::add_out_of_range(faults, "exponent", exponent, "below zero");
  }
  faults.throw_if_any();
  return {.a = coefficient * std::exp2(exponent), .b = exponent};
}

double fatigue_strength_coefficient(const SNLine& line) {
  FaultList faults;
  require_line(faults, line);
  faults.throw_if_any();
  return line.a * std::exp2(-line.b);
}

double fatigue_strength(const SNLine& line, double cycles) {
  FaultList faults;
  require_line(faults, line);
  mechanics::require_positive(faults, "cycles", cycles);
  faults.throw_if_any();
  return line.a * std::pow(cycles, line.b);
}

double fatigue_life(const SNLine& line, double reversed_stress) {
  FaultList faults;
  require_line(faults, line);
  mechanics::require_not_negative(faults, "reversed_stress", reversed_stress);
  faults.throw_if_any();
  return std::pow(reversed_stress / line.a, 1.0 / line.b);
}

FatigueStress fatigue_stress(double least, double largest) {
  FaultList faults;
  mechanics::require_finite(faults, "least", least);
  mechanics::require_finite(faults, "largest", largest);
  if (faults.empty() && least > largest) {
    mechanics::add_out_of_range(faults, "least", least, "at most largest");
  }
  faults.throw_if_any();
  return {.amplitude = 0.5 * (largest - least), .mean = 0.5 * (largest + least)};
}

double fatigue_safety_factor(MeanStressLine line,
                             const FatigueStress& stress,
                             const FatigueStrengths& strengths) {
  FaultList faults;
  mechanics::require_not_negative(faults, "amplitude", stress.amplitude);
  mechanics::require_not_negative(faults, "mean", stress.mean);
  require_strengths(faults, line, strengths);
  faults.throw_if_any();
  const double share = share_used(line, stress.amplitude, stress.mean, strengths);
  return share > 0.0 ? 1.0 / share : infinity;
}

double first_cycle_yield_factor(const FatigueStress& stress, double yield_strength) {
  FaultList faults;
  require_stress(faults, stress);
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  faults.throw_if_any();
  const double largest = stress.amplitude + std::abs(stress.mean);
  return largest > 0.0 ? yield_strength / largest : infinity;
}

double morrow_stress(const FatigueStress& stress, double coefficient) {
  FaultList faults;
  require_stress(faults, stress);
  mechanics::require_positive(faults, "coefficient", coefficient);
  if (faults.empty() && stress.mean >= coefficient) {
    mechanics::add_out_of_range(faults, "mean", stress.mean, "below the coefficient");
  }
  faults.throw_if_any();
  return stress.amplitude / (1.0 - stress.mean / coefficient);
}

double swt_stress(const FatigueStress& stress) {
  FaultList faults;
  require_stress(faults, stress);
  faults.throw_if_any();
  return std::sqrt(std::max(0.0, stress.amplitude + stress.mean) * stress.amplitude);
}

double walker_stress(const FatigueStress& stress, double exponent) {
  FaultList faults;
  require_stress(faults, stress);
  mechanics::require_not_negative(faults, "exponent", exponent);
  if (exponent > 1.0) {
    mechanics::add_out_of_range(faults, "exponent", exponent, "between 0 and 1");
  }
  faults.throw_if_any();
  const double largest = stress.amplitude + stress.mean;
  return largest > 0.0 ? std::pow(largest, 1.0 - exponent) * std::pow(stress.amplitude, exponent)
                       : 0.0;
}

double walker_exponent_of_steel(double tensile_strength) {
  FaultList faults;
  mechanics::require_positive(faults, "tensile_strength", tensile_strength);
  faults.throw_if_any();
  return std::max(0.0, 0.8818 - 0.0002 * (tensile_strength * 1e-6));
}

double morrow_amplitude(double coefficient, double exponent, double mean, double cycles) {
  const SNLine line = sn_line_of_reversals(coefficient, exponent);
  FaultList faults;
  mechanics::require_finite(faults, "mean", mean);
  if (mean >= coefficient) {
    mechanics::add_out_of_range(faults, "mean", mean, "below the coefficient");
  }
  faults.throw_if_any();
  return (1.0 - mean / coefficient) * fatigue_strength(line, cycles);
}

ShaftMoments shaft_moments(const ShaftLoading& loading) {
  FaultList faults;
  require_loading(faults, loading);
  faults.throw_if_any();
  return {.alternating = distortion_energy_moment(loading.k_f * loading.alternating_moment,
                                                  loading.k_fs * loading.alternating_torque),
          .mean = distortion_energy_moment(loading.k_f * loading.mean_moment,
                                           loading.k_fs * loading.mean_torque)};
}

double shaft_diameter(MeanStressLine line,
                      const ShaftLoading& loading,
                      const FatigueStrengths& strengths,
                      double safety_factor) {
  FaultList faults;
  require_loading(faults, loading);
  require_strengths(faults, line, strengths);
  mechanics::require_positive(faults, "safety_factor", safety_factor);
  faults.throw_if_any();
  const ShaftMoments moments = shaft_moments(loading);
  return std::cbrt(16.0 * safety_factor / pi *
                   share_used(line, moments.alternating, moments.mean, strengths));
}

double shaft_yield_diameter(const ShaftLoading& loading,
                            double yield_strength,
                            double safety_factor) {
  FaultList faults;
  require_loading(faults, loading);
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  mechanics::require_positive(faults, "safety_factor", safety_factor);
  faults.throw_if_any();
  return std::cbrt(16.0 * safety_factor / (pi * yield_strength) * largest_moment(loading));
}

double shaft_yield_factor(const ShaftLoading& loading, double yield_strength, double diameter) {
  FaultList faults;
  require_loading(faults, loading);
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  mechanics::require_positive(faults, "diameter", diameter);
  faults.throw_if_any();
  const double moment = largest_moment(loading);
  return moment > 0.0 ? pi * diameter * diameter * diameter * yield_strength / (16.0 * moment)
                      : infinity;
}

}  // namespace bismar
