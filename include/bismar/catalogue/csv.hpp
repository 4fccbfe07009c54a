// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/export.hpp>

#include <cstddef>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// A CSV text taken apart (RFC 4180): a header row and data rows of the same number of cells.
///
/// Cells may be quoted with `"`, then they may hold the delimiter, line ends and doubled quotes.
/// Line ends are LF, CRLF or CR; a UTF-8 byte order mark is passed over. Rows of nothing but blanks
/// and delimiters (spreadsheets leave such rows at the end) are no rows; a quoted cell, even `""`,
/// makes a row. Cells are kept as they stand, with their blanks.
///
/// A plain value; reading from several threads is safe. The cells are views into the document,
/// valid while it lives and is not assigned to.
class BISMAR_API CsvDocument {
 public:
  /// Takes `text` apart; never throws for its content. Time and memory are linear in its length.
  ///
  /// Faults go to `faults`, each with the place `name:line:column`, 1-based, where the column is
  /// the number of the cell: table_malformed for a NUL byte, a byte that is not UTF-8, UTF-16 text
  /// (here the cell is counted by delimiters alone), a quote inside an unquoted cell, text behind a
  /// closing quote, a quote never closed, a row with more or fewer cells than the header; duplicate
  /// for a header that occurs twice (letter case and blanks do not count); empty for a text without
  /// header or without a data row. Rows with a wrong number of cells are left out, so a document
  /// with faults is good only for finding more of them.
  ///
  /// @param text       The whole file, UTF-8.
  /// @param name       Stands for the file in every place.
  /// @param delimiter  Any ASCII character but `"`, CR, LF and NUL; otherwise an invalid_argument
  ///   fault and an empty document.
  [[nodiscard]] static CsvDocument parse(std::string text,
                                         std::string name,
                                         char delimiter,
                                         FaultList& faults);

  [[nodiscard]] const std::string& name() const noexcept { return name_; }
  /// Number of cells of the header, and of every row.
  [[nodiscard]] std::size_t columns() const noexcept { return columns_; }
  /// Number of data rows.
  [[nodiscard]] std::size_t rows() const noexcept { return lines_.size(); }
  [[nodiscard]] std::string_view header(std::size_t column) const { return view(headers_[column]); }
  [[nodiscard]] std::string_view cell(std::size_t row, std::size_t column) const {
    return view(cells_[row * columns_ + column]);
  }
  /// Line of the file on which the row begins, 1-based.
  [[nodiscard]] std::size_t line(std::size_t row) const { return lines_[row]; }
  /// Line of the header.
  [[nodiscard]] std::size_t header_line() const noexcept { return header_line_; }
  /// "name:line:column" of a cell; `column` counts from 0.
  [[nodiscard]] std::string where(std::size_t row, std::size_t column) const;
  /// "name:line:column" of a header cell; `column` counts from 0.
  [[nodiscard]] std::string where_header(std::size_t column) const;

 private:
  struct Piece {
    std::size_t begin = 0;
    std::size_t end = 0;
  };
  friend class CsvParser;
  [[nodiscard]] std::string_view view(Piece piece) const {
    return std::string_view(text_).substr(piece.begin, piece.end - piece.begin);
  }
  std::string name_;
  std::string text_;  // the file, and behind it the cells whose doubled quotes were resolved
  std::size_t columns_ = 0;
  std::size_t header_line_ = 0;
  std::vector<Piece> headers_;
  std::vector<Piece> cells_;  // [row][column]
  std::vector<std::size_t> lines_;
};

/// Writes CSV that CsvDocument reads back cell by cell: cells are quoted where they must be, lines
/// end with LF.
class BISMAR_API CsvWriter {
 public:
  /// @throws bismar::Error  invalid_argument: the delimiter is not an ASCII character, or is `"`,
  /// CR,
  ///   LF or NUL.
  explicit CsvWriter(char delimiter = ',');
  void add_row(std::span<const std::string> cells);
  void add_row(std::span<const std::string_view> cells);
  [[nodiscard]] const std::string& text() const noexcept { return text_; }
  /// Gives the text away and starts anew.
  [[nodiscard]] std::string take();

 private:
  void add_cell(std::string_view cell, bool first);
  char delimiter_;
  std::string text_;
};

/// The whole file, bytes as they are.
/// @throws bismar::Error  table_unreadable: it cannot be opened or read (the reason is in the
///   message), or is a folder.
[[nodiscard]] BISMAR_API std::string read_table_file(const std::string& path);

}  // namespace bismar
