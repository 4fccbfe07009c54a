// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <span>

namespace bismar {

// Fatigue of welded details by nominal stress ranges. The range counts, not the mean: residual
// stresses hold welds near yield. The curves are those of steel. All functions of this header throw
// bismar::Error with not_finite or out_of_range, the place being the argument's name, for an
// argument outside the range that is stated beside it.

/// Range of direct stress at 5e6 cycles, below which a range that never changes does no harm [Pa].
///
///     Delta sigma_D = (2/5)^(1/3) Delta sigma_C = 0.737 Delta sigma_C
///
/// @param detail_category  Delta sigma_C, at 2e6 cycles [Pa], > 0: 36 to 160 MPa in the tables.
/// Source: EN 1993-1-9:2005 7.1 (2).
[[nodiscard]] BISMAR_API double constant_amplitude_limit(double detail_category);

/// Range at 1e8 cycles, below which no range does harm [Pa].
///
///     Delta sigma_L = (5/100)^(1/5) Delta sigma_D = 0.549 Delta sigma_D
///
/// Source: EN 1993-1-9:2005 7.1 (3).
[[nodiscard]] BISMAR_API double cut_off_limit(double detail_category);

/// Cycles that a detail lasts under ranges that vary [-]; +infinity below the cut-off.
///
///     N = 2e6 (Delta sigma_C / Delta sigma)^3   to 5e6,
///     N = 5e6 (Delta sigma_D / Delta sigma)^5   to 1e8
///
/// Under a range that never changes the life is infinite from the constant amplitude limit down;
/// this curve is then on the safe side. Ranges above 1.5 f_y are outside the standard.
/// @param stress_range  Delta sigma [Pa], >= 0, the partial factor gamma_Ff in it.
/// @param partial_factor  gamma_Mf, divides the category [-], > 0: 1.0 to 1.35 by consequence and
/// inspection.
/// Source: EN 1993-1-9:2005 7.1 (3), 3 (7), Table 3.1.
[[nodiscard]] BISMAR_API double welded_detail_life(double detail_category,
                                                   double stress_range,
                                                   double partial_factor = 1.0);

/// Range that a detail bears that often, by the same curve [Pa]: the cut-off beyond 1e8 cycles.
/// @param cycles  N, > 0.
[[nodiscard]] BISMAR_API double welded_detail_strength(double detail_category,
                                                       double cycles,
                                                       double partial_factor = 1.0);

/// What the ranges do beyond the knee.
enum class IIWLoading : std::uint8_t {
  constant_amplitude,  ///< Slope 22.
  variable_amplitude,  ///< Slope 5.
};

/// Cycles by the curve of the International Institute of Welding for direct stress [-]; +infinity
/// for no stress.
///
///     N = 2e6 (FAT / Delta sigma)^3 to the knee at 1e7 cycles, then slope 22 or 5
///
/// @param fat_class  FAT, range at 2e6 cycles [Pa], > 0.  @param stress_range  [Pa], >= 0.
/// Source: IIW Recommendations for Fatigue Design of Welded Joints and Components, 2nd ed., 2016,
/// section 3.2 (from memory).
[[nodiscard]] BISMAR_API double iiw_life(double fat_class,
                                         double stress_range,
                                         IIWLoading loading = IIWLoading::constant_amplitude);

/// Range that lasts that many cycles by the same curve [Pa].
/// @param cycles  N, > 0.
[[nodiscard]] BISMAR_API double iiw_strength(double fat_class,
                                             double cycles,
                                             IIWLoading loading = IIWLoading::constant_amplitude);

/// Cycles of one stress range.
struct StressBlock {
  double range = 0.0;   ///< Delta sigma [Pa], >= 0.
  double cycles = 0.0;  ///< n [-], >= 0.
};

/// Damage of blocks by Miner's sum, D = sum n_i / N_i [-]; failure is expected at 1.
/// @param blocks  Any number; places of faults "/0/range", "/0/cycles".
/// Source: EN 1993-1-9:2005 Annex A.5.
[[nodiscard]] BISMAR_API double miner_damage(double detail_category,
                                             std::span<const StressBlock> blocks,
                                             double partial_factor = 1.0);

/// The one range that does the damage of the blocks in as many cycles, where all of them lie on one
/// slope [Pa]; 0 without cycles.
///
///     Delta sigma_E = (sum n_i Delta sigma_i^m / sum n_i)^(1/m)
///
/// @param slope  m [-], > 0: 3 for EN 1993-1-9 up to 5e6 cycles.
/// Source: Miner's sum on a single slope (derived).
[[nodiscard]] BISMAR_API double equivalent_stress_range(std::span<const StressBlock> blocks,
                                                        double slope = 3.0);

}  // namespace bismar
