// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::report {

/// Columns that a UTF-8 text takes on a terminal: combining marks none, East Asian wide characters
/// two, every other character one. A byte that is not UTF-8 counts as one character.
[[nodiscard]] BISMAR_API std::size_t display_width(std::string_view text);

/// A number for people: at least `significant` digits, trailing zeros kept, the integer part never
/// rounded away ("0.0123", "1.00", "197", "16583"); with an exponent below 1e-4 and from 1e9 in
/// size. Zero of either sign is "0", infinities are "inf" and "-inf", NaN is "nan".
[[nodiscard]] BISMAR_API std::string number(double value, int significant = 3);

/// A number with so many decimals, never "-0.00".
[[nodiscard]] BISMAR_API std::string fixed(double value, int decimals);

/// An amount of money: two decimals; below 0.1 in size two significant digits, so that cheap parts
/// do not become "0.00"; below a millionth "0.00".
[[nodiscard]] BISMAR_API std::string money(double amount);

/// A count, digits grouped by spaces from five digits on: "4212", "165 204".
[[nodiscard]] BISMAR_API std::string count(std::size_t value);

/// The shortest text that reads back as the same double; "inf", "-inf", "nan" likewise.
[[nodiscard]] BISMAR_API std::string exact(double value);

/// Breaks a text into lines of at most `width` columns: at blanks; a word that is longer breaks
/// behind one of "/-+,_" or, failing that, anywhere between characters. Line feeds stay breaks.
/// @param width  At least 1; 0 counts as 1.
[[nodiscard]] BISMAR_API std::vector<std::string> wrap(std::string_view text, std::size_t width);

/// `text` wrapped to `width` columns; every line but the first begins with `hang` blanks.
[[nodiscard]] BISMAR_API std::string paragraph(std::string_view text,
                                               std::size_t width,
                                               std::size_t hang = 0);

enum class Align : std::uint8_t { left, right };

/// A column of a table.
struct Column {
  std::string heading;  ///< May hold line feeds.
  Align align = Align::left;
  bool may_wrap = false;  ///< May become narrower than its widest cell.
};

/// A text table with aligned columns, two blanks between them.
///
/// Where it would be wider than the width given, the columns that may wrap give way, the widest
/// first, down to their longest word, then below it. A table whose other columns alone are too wide
/// stays too wide: no cell is ever cut.
class BISMAR_API Table {
 public:
  explicit Table(std::vector<Column> columns) : columns_(std::move(columns)) {}

  /// @throws bismar::InternalError  another number of cells than columns.
  void add_row(std::vector<std::string> cells);
  [[nodiscard]] std::size_t rows() const noexcept { return rows_.size(); }

  /// Heading, a rule, the rows; every line ends with a line feed and has no trailing blanks.
  /// @param heading_on, heading_off  Put around each heading line (terminal emphasis).
  [[nodiscard]] std::string text(std::size_t width,
                                 std::size_t indent = 0,
                                 std::string_view heading_on = {},
                                 std::string_view heading_off = {}) const;

 private:
  [[nodiscard]] std::vector<std::size_t> widths(std::size_t available) const;
  std::vector<Column> columns_;
  std::vector<std::vector<std::string>> rows_;
};

}  // namespace bismar::report
