// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/mechanics/member.hpp>

#include <span>
#include <vector>

namespace bismar::mechanics {

/// Adds every fault that reduce() documents.
void check_load_case(FaultList& faults, const LoadCase& load_case, double length);

/// Whether the kind holds the member at a second place that may lie before its end.
[[nodiscard]] bool has_second_support(Support support);

// Of a load case without faults:

/// Its loads, places beyond the end by the rounding of unit conversion moved to it.
[[nodiscard]] std::vector<Load> loads_on_member(const LoadCase& load_case, double length);

/// Where the second support stands [m]: L but for an overhang.
[[nodiscard]] double second_support(const LoadCase& load_case, double length);

/// 0, L, the second support and every place at which a load begins, acts or ends, sorted, once.
[[nodiscard]] std::vector<double> load_stations(std::span<const Load> loads,
                                                double length,
                                                double second_support);

}  // namespace bismar::mechanics
