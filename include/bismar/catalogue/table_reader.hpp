// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/range.hpp>
#include <bismar/catalogue/table_format.hpp>
#include <bismar/error.hpp>
#include <bismar/export.hpp>
#include <bismar/quantity/kind.hpp>
#include <bismar/quantity/unit.hpp>

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <unordered_map>
#include <vector>

namespace bismar {

/// Whether a table must have a column.
enum class Presence : std::uint8_t { optional, required };

/// Reads a table by the names of its columns, in any order: `name` or `name [unit]`. Letter case
/// and runs of blanks in names do not count.
///
/// Every fault goes to the fault list with its place `table:line:column` (1-based; the line on
/// which the row begins, the number of the cell) and with the name of the column in its message; a
/// faulty cell then reads as missing. Nothing is thrown for the content of a table: the caller
/// throws the list when the whole table has been read. Codes: those of CsvDocument; duplicate: one
/// name with two units; column_missing; unit_missing, unit_unknown, unit_wrong, unit_ambiguous,
/// missing (currency without a rate) for the unit of a header; conflict: two currencies, or `name`
/// beside `name min`; missing: an empty cell that must hold something; cell_invalid: a cell that
/// its column cannot accept. A bad TableFormat gives invalid_argument or unknown_name with the
/// field as place.
///
/// Use: look up all columns, call `finish_columns`, then read cells. Not safe to share between
/// threads while it reads.
class BISMAR_API TableReader {
 public:
  /// @param text    The whole table.
  /// @param name    Stands for it in every place.
  /// @param faults  Must live as long as the reader.
  TableReader(std::string text, std::string name, const TableFormat& format, FaultList& faults);

  /// A column of text, flags, words or lists. Absent columns read as empty cells.
  struct Column {
    std::optional<std::size_t> index;
    [[nodiscard]] bool is_present() const noexcept { return index.has_value(); }
  };
  /// A column of numbers or ranges with the unit of its header, or a pair "name min", "name max".
  struct NumberColumn {
    struct Part {
      std::size_t index = 0;
      Unit unit;
    };
    QuantityKind kind = QuantityKind::ratio;
    std::optional<Part> whole;
    std::optional<Part> low;   ///< "name min [unit]"
    std::optional<Part> high;  ///< "name max [unit]"; never without `low`.
    [[nodiscard]] bool is_present() const noexcept { return whole || low; }
    /// The column that provenance names: the whole one, otherwise the low end.
    [[nodiscard]] std::optional<std::size_t> index() const noexcept;
  };
  /// A column that nobody looked up.
  struct UnknownColumn {
    std::size_t index = 0;
    std::string name;
    std::optional<std::string> unit;
  };

  [[nodiscard]] bool has_column(std::string_view name) const;
  [[nodiscard]] Column text_column(std::string_view name, Presence presence = Presence::optional);
  /// The header must carry a unit of the kind; only a ratio or a count may go without. A column
  /// with a faulty header reads as absent.
  [[nodiscard]] NumberColumn number_column(std::string_view name,
                                           QuantityKind kind,
                                           Presence presence = Presence::optional);
  /// Every column whose name starts with `prefix`, as "corrosion in fresh water": the rest of its
  /// name, and the column.
  struct PrefixedColumn {
    std::string rest;
    Column column;
  };
  [[nodiscard]] std::vector<PrefixedColumn> text_columns_with_prefix(std::string_view prefix);
  /// Reports the required columns that are missing, with the most likely misspelling among the
  /// headers that nobody asked for; headers near to the name of an absent optional column become
  /// notes.
  void finish_columns();

  [[nodiscard]] const CsvDocument& document() const noexcept { return document_; }
  [[nodiscard]] std::size_t rows() const noexcept { return document_.rows(); }
  [[nodiscard]] std::size_t line(std::size_t row) const { return document_.line(row); }
  /// Currency of the money columns looked up so far; that of the format when there is none.
  [[nodiscard]] const std::string& currency() const noexcept;
  /// Columns left over, in the order of the table; good after `finish_columns`.
  [[nodiscard]] std::span<const UnknownColumn> unknown_columns() const noexcept { return unknown_; }
  /// Things that a user may want to know and that are no faults; good after `finish_columns`.
  [[nodiscard]] std::span<const std::string> notes() const noexcept { return notes_; }
  /// The unknown column as a column of numbers of any dimension (no unit: plain numbers), or
  /// nothing when its header carries no unit and a cell holds no number. A unit that cannot be read
  /// is a fault.
  [[nodiscard]] std::optional<NumberColumn> as_numbers(const UnknownColumn& column);

  /// Without blanks at the ends; empty where there is nothing.
  [[nodiscard]] std::string_view text(std::size_t row, const Column& column) const;
  [[nodiscard]] std::string_view required_text(std::size_t row, const Column& column);
  /// Items between ';' (between '|' when the delimiter of the table is ';'), without blanks at
  /// their ends. An empty item is a fault.
  [[nodiscard]] std::vector<std::string> list(std::size_t row, const Column& column);
  [[nodiscard]] std::vector<std::string> required_list(std::size_t row, const Column& column);
  /// yes, no, true or false in any letter case, 1 or 0.
  [[nodiscard]] std::optional<bool> flag(std::size_t row, const Column& column);
  /// Index of the cell's word among `words`, letter case not counted.
  [[nodiscard]] std::optional<std::size_t> word(std::size_t row,
                                                const Column& column,
                                                std::span<const std::string_view> words);
  /// `value` or `min..max`, in SI units and the currency of the table. In a pair of columns an
  /// empty "max" means that the "min" is the one value; an empty "min" beside a "max" is a fault,
  /// because an upper end alone is no value to count on.
  [[nodiscard]] std::optional<Range> range(std::size_t row, const NumberColumn& column);
  /// One value; a range is a fault.
  [[nodiscard]] std::optional<double> value(std::size_t row, const NumberColumn& column);
  /// After the fault the return value is a harmless 0.
  [[nodiscard]] Range required_range(std::size_t row, const NumberColumn& column);
  [[nodiscard]] double required_value(std::size_t row, const NumberColumn& column);

  /// Adds a fault of the caller's own about a cell; `index` is the column's index.
  void add_fault(std::size_t row, std::size_t index, Code code, std::string message);

 private:
  struct Wanted {
    std::string name;
    QuantityKind kind = QuantityKind::ratio;
    bool is_number = false;
    Presence presence = Presence::optional;
  };
  void check_format();
  void read_headers();
  [[nodiscard]] std::optional<std::size_t> take(std::string_view name);
  [[nodiscard]] std::optional<NumberColumn::Part> part(std::size_t index, QuantityKind kind);
  [[nodiscard]] std::optional<Unit> read_unit(std::size_t index, QuantityKind kind);
  [[nodiscard]] std::optional<std::string> settle_currency(std::size_t index, std::string unit);
  [[nodiscard]] std::optional<Range> number(std::size_t row,
                                            const NumberColumn::Part& part,
                                            QuantityKind kind,
                                            bool may_be_range);
  void add_cell_fault(std::size_t row, std::size_t index, Fault fault);
  void add_header_faults(std::size_t index, const Error& error);
  void report_missing(const Wanted& wanted, std::span<const std::string_view> left_over);

  TableFormat format_;
  FaultList* faults_;
  CsvDocument document_;
  struct HeaderCell {
    std::string name;
    std::optional<std::string> unit;
    bool is_taken = false;
    bool is_faulty = false;
  };
  std::vector<HeaderCell> headers_;
  std::unordered_map<std::string, std::size_t> by_name_;  // folded name -> index
  std::vector<Wanted> absent_;
  std::vector<UnknownColumn> unknown_;
  std::vector<std::string> notes_;
  std::optional<std::string> currency_;  // of the first money column
};

}  // namespace bismar
