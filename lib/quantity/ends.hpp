// SPDX-License-Identifier: MIT
// Private to the quantity floor: the two ends of a range.
#pragma once

#include <bismar/quantity/parse.hpp>

#include <optional>
#include <string_view>

namespace bismar {

struct RangeEnds {
  std::string_view low;
  std::string_view high;
};

/// The texts on both sides of ".." or "…"; absent when there is neither.
/// @throws bismar::Error  number_malformed: an empty side, or points that can be read in two ways.
[[nodiscard]] std::optional<RangeEnds> split_range(std::string_view text);

/// @throws bismar::Error  number_malformed: the text holds the mark of a range.
void refuse_range(std::string_view whole);

/// @throws bismar::Error  conflict: low > high.
void check_order(const QuantityRange& range, std::string_view whole);

}  // namespace bismar
