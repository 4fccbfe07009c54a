// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// The non-dominated rows of a table of two objectives, both minimised (`dominates` states the
/// rule).
///
/// Order of the result: by (f1, f2, row index). Equal rows are ties: all of them are kept, or none.
/// -0.0 equals 0.0. Infinities are ordinary values: (+inf, 1) is on the front only if no row has
/// f2 <= 1 and a lower f1. No row gives an empty result; one row is its own front.
///
/// Time O(n log n) in the worst case (one sort and one scan), memory O(n). Exact: the same set as
/// comparing every pair of rows.
///
/// @param objectives  n x 2, row by row: f1, f2 of row 0, f1, f2 of row 1, ...
/// @return Row indices.
/// @throws bismar::Error  invalid_argument: an odd number of values, or more than 2^32 - 1 rows
///         ("objectives"); not_finite: NaN, a fault for each ("objectives[row][column]").
[[nodiscard]] BISMAR_API std::vector<std::uint32_t> front_2d(std::span<const double> objectives);

/// One front per group.
struct GroupedFronts {
  std::vector<std::uint32_t> groups = {};  ///< The group ids that occur, ascending, each once.
  /// [groups.size() + 1]: the front of groups[k] is rows[starts[k]] up to before rows[starts[k +
  /// 1]].
  std::vector<std::size_t> starts = {0};
  std::vector<std::uint32_t> rows =
      {};  ///< Row indices; inside a group in the order of `front_2d`.

  /// The front of groups[k].
  [[nodiscard]] std::span<const std::uint32_t> front(std::size_t k) const {
    return std::span(rows).subspan(starts.at(k), starts.at(k + 1) - starts.at(k));
  }
};

/// `front_2d` of each group on its own: rows of different groups are not compared.
///
/// Time O(n log n) in the worst case, memory O(n).
///
/// @param objectives  n x 2, as in `front_2d`.
/// @param group_ids   [n]; any numbers, in any order.
/// @throws bismar::Error  as `front_2d`; conflict: the lengths do not fit ("group_ids").
[[nodiscard]] BISMAR_API GroupedFronts grouped_front_2d(std::span<const double> objectives,
                                                        std::span<const std::uint32_t> group_ids);

}  // namespace bismar
