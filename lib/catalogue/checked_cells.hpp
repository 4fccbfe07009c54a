// SPDX-License-Identifier: MIT
// What the readers of stock, routes, finishes and operations share on top of TableReader: bounds on
// numbers, lists of numbers, pairs, ids that occur once.
#pragma once

#include <bismar/catalogue/range.hpp>
#include <bismar/catalogue/table_reader.hpp>

#include <cstddef>
#include <limits>
#include <map>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

namespace bismar::catalogue {

/// What a number may be, in SI units.
struct Bounds {
  double least = 0.0;
  double most = std::numeric_limits<double>::infinity();
  bool above_least = false;  ///< `least` itself is refused.
  std::string_view words = "at least 0";
};
inline constexpr Bounds not_negative{};
inline constexpr Bounds positive{.above_least = true, .words = "above 0"};
inline constexpr Bounds fraction{.most = 1.0, .words = "from 0 to 1 (100 %)"};

using NumberColumn = TableReader::NumberColumn;
using Column = TableReader::Column;

/// The cell, or nothing where it is empty or outside the bounds (a cell_invalid fault).
[[nodiscard]] std::optional<Range> range_in(TableReader& table,
                                            std::size_t row,
                                            const NumberColumn& column,
                                            const Bounds& bounds);
[[nodiscard]] std::optional<double> value_in(TableReader& table,
                                             std::size_t row,
                                             const NumberColumn& column,
                                             const Bounds& bounds);
/// One value of any size; nothing and a fault where the cell is empty.
[[nodiscard]] std::optional<double> needed_value(TableReader& table,
                                                 std::size_t row,
                                                 const NumberColumn& column);
/// An empty cell is a fault; after a fault the return value is a harmless 0.
[[nodiscard]] Range required_range_in(TableReader& table,
                                      std::size_t row,
                                      const NumberColumn& column,
                                      const Bounds& bounds);
[[nodiscard]] double required_value_in(TableReader& table,
                                       std::size_t row,
                                       const NumberColumn& column,
                                       const Bounds& bounds);

/// Numbers between ';' in the unit of the header, each above the one before and above 0.
[[nodiscard]] std::vector<double> ascending_list(TableReader& table,
                                                 std::size_t row,
                                                 const NumberColumn& column,
                                                 char decimal);

/// "class:text" between ';'. An item without ':' and a class twice are faults.
[[nodiscard]] std::map<std::string, std::string, std::less<>> pairs(TableReader& table,
                                                                    std::size_t row,
                                                                    const Column& column);

/// "class:number" between ';', the numbers in the unit of the header and above 0.
[[nodiscard]] std::map<std::string, double, std::less<>> number_pairs(TableReader& table,
                                                                      std::size_t row,
                                                                      const NumberColumn& column,
                                                                      char decimal);

/// The required id of each row; one that an earlier row has is a fault that names its line.
class Ids {
 public:
  explicit Ids(Column column) : column_(column) {}
  [[nodiscard]] std::string read(TableReader& table, std::size_t row);

 private:
  Column column_;
  std::unordered_map<std::string, std::size_t> line_of_;
};

/// The notes of the reader say that a header looks like one of the optional columns; these tables
/// take that for a slip of the pen, because a column that nobody reads would be lost in silence.
void refuse_misspelt_headers(const TableReader& table, FaultList& faults);

/// A table whose money is not in the currency of the format is refused: its numbers carry no
/// currency with them.
void refuse_other_currency(const TableReader& table, const TableFormat& format, FaultList& faults);

}  // namespace bismar::catalogue
