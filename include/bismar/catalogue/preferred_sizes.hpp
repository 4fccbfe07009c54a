// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <string_view>

namespace bismar {

/// The least preferred size of a series that is not below `size` [m]; a size of the series stays
/// what it is. Made of the listed values of `preferred_numbers` (catalogue/stock.hpp).
///
/// @param series  "R5", "R10", "R20", "R40", "R'10", "R'20", "R'40".
/// @param size    [m], > 0.  @param unit  Of which the sizes are preferred multiples [m].
/// @throws bismar::Error  unknown_name at "series"; not_finite or out_of_range at "size" or "unit".
/// Source: ISO 3; ISO 497 for the rounded series.
[[nodiscard]] BISMAR_API double preferred_at_least(std::string_view series,
                                                   double size,
                                                   double unit = 1e-3);

/// The largest preferred size of a series that is not above `size` [m]. All else as above.
[[nodiscard]] BISMAR_API double preferred_at_most(std::string_view series,
                                                  double size,
                                                  double unit = 1e-3);

/// The step of a series, 10^(1/n) [-]: what neighbours would have in common if they were not
/// rounded. The listed values deviate from it by up to 0.95 % (R5, R10) and 1.26 % (R40).
///
/// @throws bismar::Error  unknown_name at "series".
/// Source: ISO 3.
[[nodiscard]] BISMAR_API double preferred_step(std::string_view series);

}  // namespace bismar
