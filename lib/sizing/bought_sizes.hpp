// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/sizing/part.hpp>

#include <vector>

namespace bismar {

/// Sorts and makes unique, where values closer than a billionth are one.
void tidy(std::vector<double>& values);

/// The sizes asked for in [lower, upper], ascending; empty for continuous ones. A list is returned
/// whole.
[[nodiscard]] std::vector<double> wanted_sizes(const Sizes& sizes, double lower, double upper);

/// Thicknesses of the sheets, plates and boards that a material and route can share, ascending [m].
[[nodiscard]] std::vector<double> sheet_thicknesses(const Catalogue& catalogue,
                                                    const Settings& settings,
                                                    const MaterialInfo& material,
                                                    const Route& route);

}  // namespace bismar
