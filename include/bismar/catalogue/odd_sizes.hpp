// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/stock.hpp>
#include <bismar/export.hpp>

#include <string>
#include <vector>

namespace bismar {

/// Sizes of a list that are no fault and yet unlikely, one sentence each, in the order of the list:
///
/// - an I, H or channel section whose web is thicker than its flanges. Rolled sections have it the
///   other way round, so that web and flange have most likely changed places in the table.
/// - a size with the same dimensions and materials as an earlier one, under another id.
///
/// Sections of a list without either give nothing; so does a list of sheets. The web is read from
/// the section: W_t = I_t / max(t_f, t_w) and the flange as ruling dimension (see `i_section`).
/// Time: quadratic in the number of items at worst.
[[nodiscard]] BISMAR_API std::vector<std::string> odd_sizes(const StockList& list);

}  // namespace bismar
