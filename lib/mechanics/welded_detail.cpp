// SPDX-License-Identifier: MIT
#include <bismar/mechanics/welded_detail.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <limits>
#include <string>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr double category_cycles = 2e6;
constexpr double limit_cycles = 5e6;
constexpr double cut_off_cycles = 1e8;
constexpr double iiw_knee = 1e7;

void require_positive(const char* where, double value) {
  FaultList faults;
  mechanics::require_positive(faults, where, value);
  faults.throw_if_any();
}

void require_detail(FaultList& faults, double detail_category, double partial_factor) {
  mechanics::require_positive(faults, "detail_category", detail_category);
  mechanics::require_positive(faults, "partial_factor", partial_factor);
}

void require_blocks(FaultList& faults, std::span<const StressBlock> blocks) {
  for (std::size_t i = 0; i < blocks.size(); ++i) {
    const std::string where = "/" + std::to_string(i);
    mechanics::require_not_negative(faults, where + "/range", blocks[i].range);
    mechanics::require_not_negative(faults, where + "/cycles", blocks[i].cycles);
  }
}

double slope_beyond_knee(IIWLoading loading) {
  return loading == IIWLoading::constant_amplitude ? 22.0 : 5.0;
}

/// Range on a slope: cycles (at / range)^m = N.
double on_slope(double at, double cycles, double life, double slope) {
  return at * std::pow(cycles / life, 1.0 / slope);
}

}  // namespace

double constant_amplitude_limit(double detail_category) {
  require_positive("detail_category", detail_category);
  return on_slope(detail_category, category_cycles, limit_cycles, 3.0);
}

double cut_off_limit(double detail_category) {
  return on_slope(constant_amplitude_limit(detail_category), limit_cycles, cut_off_cycles, 5.0);
}

double welded_detail_life(double detail_category, double stress_range, double partial_factor) {
  FaultList faults;
  require_detail(faults, detail_category, partial_factor);
  mechanics::require_not_negative(faults, "stress_range", stress_range);
  faults.throw_if_any();
  const double C = detail_category / partial_factor;
  const double D = constant_amplitude_limit(C);
  if (stress_range >= D) {
    return category_cycles * std::pow(C / stress_range, 3.0);
  }
  return stress_range < cut_off_limit(C) ? infinity
                                         : limit_cycles * std::pow(D / stress_range, 5.0);
}

double welded_detail_strength(double detail_category, double cycles, double partial_factor) {
  FaultList faults;
  require_detail(faults, detail_category, partial_factor);
  mechanics::require_positive(faults, "cycles", cycles);
  faults.throw_if_any();
  const double C = detail_category / partial_factor;
  if (cycles <= limit_cycles) {
    return on_slope(C, category_cycles, cycles, 3.0);
  }
  return on_slope(constant_amplitude_limit(C), limit_cycles, std::min(cycles, cut_off_cycles), 5.0);
}

double iiw_life(double fat_class, double stress_range, IIWLoading loading) {
  const double at_knee = iiw_strength(fat_class, iiw_knee, loading);
  FaultList faults;
  mechanics::require_not_negative(faults, "stress_range", stress_range);
  faults.throw_if_any();
  return stress_range >= at_knee
             ? category_cycles * std::pow(fat_class / stress_range, 3.0)
             : iiw_knee * std::pow(at_knee / stress_range, slope_beyond_knee(loading));
}

double iiw_strength(double fat_class, double cycles, IIWLoading loading) {
  FaultList faults;
  mechanics::require_positive(faults, "fat_class", fat_class);
  mechanics::require_positive(faults, "cycles", cycles);
  faults.throw_if_any();
  const double to_knee = on_slope(fat_class, category_cycles, std::min(cycles, iiw_knee), 3.0);
  return cycles <= iiw_knee ? to_knee
                            : on_slope(to_knee, iiw_knee, cycles, slope_beyond_knee(loading));
}

double miner_damage(double detail_category,
                    std::span<const StressBlock> blocks,
                    double partial_factor) {
  FaultList faults;
  require_detail(faults, detail_category, partial_factor);
  require_blocks(faults, blocks);
  faults.throw_if_any();
  double damage = 0.0;
  for (const StressBlock& block : blocks) {
    damage += block.cycles / welded_detail_life(detail_category, block.range, partial_factor);
  }
  return damage;
}

double equivalent_stress_range(std::span<const StressBlock> blocks, double slope) {
  FaultList faults;
  mechanics::require_positive(faults, "slope", slope);
  require_blocks(faults, blocks);
  faults.throw_if_any();
  double cycles = 0.0;
  double largest = 0.0;
  for (const StressBlock& block : blocks) {
    cycles += block.cycles;
    largest = std::max(largest, block.range);
  }
  if (cycles == 0.0 || largest == 0.0) {
    return 0.0;
  }
  // Over the largest range, so that no power overflows.
  double sum = 0.0;
  for (const StressBlock& block : blocks) {
    sum += block.cycles * std::pow(block.range / largest, slope);
  }
  return largest * std::pow(sum / cycles, 1.0 / slope);
}

}  // namespace bismar
