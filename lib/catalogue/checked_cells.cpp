// SPDX-License-Identifier: MIT
#include "catalogue/checked_cells.hpp"

#include <utility>

#include <bismar/error.hpp>
#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/parse.hpp>

#include "catalogue/text.hpp"

namespace bismar::catalogue {

namespace {

std::string cell_text(const TableReader& table, std::size_t row, std::size_t index) {
  return quoted(trim(table.document().cell(row, index)));
}

bool is_in(double value, const Bounds& bounds) {
  return value <= bounds.most &&
         (bounds.above_least ? value > bounds.least : value >= bounds.least);
}

bool check(TableReader& table,
           std::size_t row,
           const NumberColumn& column,
           const Range& range,
           const Bounds& bounds) {
  if (is_in(range.low, bounds) && is_in(range.high, bounds)) {
    return true;
  }
  const std::size_t index = column.index().value();
  table.add_fault(row,
                  index,
                  Code::cell_invalid,
                  "the number must be " + std::string(bounds.words) + ", not " +
                      cell_text(table, row, index) + ".");
  return false;
}

/// A number above 0 in the unit of the column, or nothing and a fault.
std::optional<double> positive_number(TableReader& table,
                                      std::size_t row,
                                      const NumberColumn::Part& part,
                                      std::string_view text,
                                      char decimal) {
  try {
    const double value = part.unit.to_si(parse_number(text, decimal));
    if (value > 0.0) {
      return value;
    }
    table.add_fault(row,
                    part.index,
                    Code::cell_invalid,
                    "every number must be above 0, not " + quoted(text) + ".");
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      table.add_fault(row, part.index, Code::cell_invalid, fault.message);
    }
  }
  return std::nullopt;
}

/// Absent column or empty cell; the reader has a fault for either where something must stand.
bool is_empty(const TableReader& table, std::size_t row, const NumberColumn& column) {
  return !column.is_present() || table.text(row, Column{column.index()}).empty();
}

/// Lists have no "min" and "max" columns.
bool is_one_column(TableReader& table, std::size_t row, const NumberColumn& column) {
  if (column.whole || !column.is_present()) {
    return column.whole.has_value();
  }
  table.add_fault(row,
                  column.index().value(),
                  Code::cell_invalid,
                  "a list stands in one column, without min and max.");
  return false;
}

}  // namespace

std::optional<Range> range_in(TableReader& table,
                              std::size_t row,
                              const NumberColumn& column,
                              const Bounds& bounds) {
  const std::optional<Range> range = table.range(row, column);
  if (!range || !check(table, row, column, *range, bounds)) {
    return std::nullopt;
  }
  return range;
}

std::optional<double> value_in(TableReader& table,
                               std::size_t row,
                               const NumberColumn& column,
                               const Bounds& bounds) {
  const std::optional<double> value = table.value(row, column);
  if (!value || !check(table, row, column, {*value, *value}, bounds)) {
    return std::nullopt;
  }
  return value;
}

std::optional<double> needed_value(TableReader& table,
                                   std::size_t row,
                                   const NumberColumn& column) {
  if (is_empty(table, row, column)) {
    static_cast<void>(table.required_value(row, column));  // for its fault
    return std::nullopt;
  }
  return table.value(row, column);
}

Range required_range_in(TableReader& table,
                        std::size_t row,
                        const NumberColumn& column,
                        const Bounds& bounds) {
  if (is_empty(table, row, column)) {
    return table.required_range(row, column);
  }
  return range_in(table, row, column, bounds).value_or(Range{});
}

double required_value_in(TableReader& table,
                         std::size_t row,
                         const NumberColumn& column,
                         const Bounds& bounds) {
  if (is_empty(table, row, column)) {
    return table.required_value(row, column);
  }
  return value_in(table, row, column, bounds).value_or(0.0);
}

std::vector<double> ascending_list(TableReader& table,
                                   std::size_t row,
                                   const NumberColumn& column,
                                   char decimal) {
  std::vector<double> values;
  if (!is_one_column(table, row, column)) {
    return values;
  }
  for (const std::string& item : table.list(row, Column{column.whole->index})) {
    const std::optional<double> value = positive_number(table, row, *column.whole, item, decimal);
    if (!value) {
      continue;
    }
    if (!values.empty() && *value <= values.back()) {
      table.add_fault(
          row,
          column.whole->index,
          Code::conflict,
          "the list must ascend: " + quoted(item) + " stands behind a number that is not smaller.");
      continue;
    }
    values.push_back(*value);
  }
  return values;
}

std::map<std::string, std::string, std::less<>> pairs(TableReader& table,
                                                      std::size_t row,
                                                      const Column& column) {
  std::map<std::string, std::string, std::less<>> result;
  for (const std::string& item : table.list(row, column)) {
    const std::size_t colon = item.rfind(':');
    const std::string_view key = trim(std::string_view(item).substr(0, colon));
    const std::string_view value =
        colon == std::string::npos ? "" : trim(std::string_view(item).substr(colon + 1));
    if (key.empty() || value.empty()) {
      table.add_fault(row,
                      column.index.value(),
                      Code::cell_invalid,
                      quoted(item) + " must be a material class, a colon and what holds for it.");
      continue;
    }
    if (!result.emplace(key, value).second) {
      table.add_fault(row,
                      column.index.value(),
                      Code::duplicate,
                      "the material class " + quoted(key) + " stands twice in this cell.");
    }
  }
  return result;
}

std::map<std::string, double, std::less<>> number_pairs(TableReader& table,
                                                        std::size_t row,
                                                        const NumberColumn& column,
                                                        char decimal) {
  std::map<std::string, double, std::less<>> result;
  if (!is_one_column(table, row, column)) {
    return result;
  }
  for (const auto& [key, text] : pairs(table, row, Column{column.whole->index})) {
    const std::optional<double> value = positive_number(table, row, *column.whole, text, decimal);
    if (value) {
      result.emplace(key, *value);
    }
  }
  return result;
}

std::string Ids::read(TableReader& table, std::size_t row) {
  std::string id(table.required_text(row, column_));
  if (id.empty()) {
    return id;
  }
  const auto [first, is_new] = line_of_.emplace(id, table.line(row));
  if (!is_new) {
    table.add_fault(row,
                    column_.index.value(),
                    Code::duplicate,
                    "the id " + quoted(id) + " is already that of line " +
                        std::to_string(first->second) + ": every row needs its own.");
  }
  return id;
}

void refuse_misspelt_headers(const TableReader& table, FaultList& faults) {
  for (const std::string_view note : table.notes()) {
    for (const TableReader::UnknownColumn& column : table.unknown_columns()) {
      const std::string where = table.document().where_header(column.index);
      if (!note.starts_with(where + ": ")) {
        continue;
      }
      faults.add(Code::unknown_name, where, std::string(note.substr(where.size() + 2)));
    }
  }
}

void refuse_other_currency(const TableReader& table, const TableFormat& format, FaultList& faults) {
  const std::string& expected = format.rates ? format.rates->job_currency() : format.currency;
  if (table.currency() == expected) {
    return;
  }
  faults.add(Code::conflict,
             table.document().name(),
             "the money of the table is in " + table.currency() + ", but " + expected +
                 " is expected: convert the columns, or read the table with that currency in its "
                 "format.");
}

}  // namespace bismar::catalogue
