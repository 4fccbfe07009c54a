// SPDX-License-Identifier: MIT
// The cells of a TableReader; its columns are in table_reader.cpp.
#include <bismar/catalogue/table_reader.hpp>

#include <bismar/quantity/parse.hpp>

#include <array>
#include <cmath>
#include <utility>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::folded;
using catalogue::quoted;
using catalogue::trim;

Fault cell_fault(std::string message, std::string allowed) {
  Fault fault;
  fault.code = Code::cell_invalid;
  fault.allowed = std::move(allowed);
  fault.message = std::move(message);
  return fault;
}

}  // namespace

std::string_view TableReader::text(std::size_t row, const Column& column) const {
  return column.index ? trim(document_.cell(row, *column.index)) : std::string_view();
}

std::string_view TableReader::required_text(std::size_t row, const Column& column) {
  const std::string_view found = text(row, column);
  if (found.empty() && column.index) {
    add_fault(row, *column.index, Code::missing, "the cell must not be empty.");
  }
  return found;
}

std::vector<std::string> TableReader::list(std::size_t row, const Column& column) {
  std::vector<std::string> items;
  const char separator = format_.delimiter == ';' ? '|' : ';';
  for (const std::string_view item : catalogue::split(text(row, column), separator)) {
    if (item.empty()) {
      add_cell_fault(row,
                     *column.index,
                     cell_fault("the list has an empty item: remove the separator " +
                                    quoted(std::string(1, separator)) + " too many.",
                                "items between separators"));
      return {};
    }
    items.emplace_back(item);
  }
  return items;
}

std::vector<std::string> TableReader::required_list(std::size_t row, const Column& column) {
  if (required_text(row, column).empty()) {
    return {};
  }
  return list(row, column);
}

std::optional<bool> TableReader::flag(std::size_t row, const Column& column) {
  static constexpr std::array<std::string_view, 6> words = {"yes", "no", "true", "false", "1", "0"};
  const std::optional<std::size_t> found = word(row, column, words);
  return found ? std::optional<bool>(*found % 2 == 0) : std::nullopt;
}

std::optional<std::size_t> TableReader::word(std::size_t row,
                                             const Column& column,
                                             std::span<const std::string_view> words) {
  const std::string_view cell = text(row, column);
  if (cell.empty()) {
    return std::nullopt;
  }
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (cell == words[i]) {
      return i;
    }
  }
  const std::string wanted = folded(cell);
  std::string allowed;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (wanted == folded(words[i])) {
      return i;
    }
    allowed += (i == 0 ? "" : i + 1 == words.size() ? " or " : ", ") + std::string(words[i]);
  }
  add_cell_fault(
      row,
      *column.index,
      cell_fault(quoted(cell) + " is not one of " + allowed + '.' + did_you_mean(cell, words),
                 allowed));
  return std::nullopt;
}

std::optional<Range> TableReader::number(std::size_t row,
                                         const NumberColumn::Part& part,
                                         QuantityKind kind,
                                         bool may_be_range) {
  const std::string_view cell = trim(document_.cell(row, part.index));
  if (cell.empty()) {
    return std::nullopt;
  }
  const auto refuse = [&](const std::string& message, const char* expected) {
    add_cell_fault(row, part.index, cell_fault(message, expected));
    return std::nullopt;
  };
  const char* allowed =
      may_be_range ? "a number, a range min..max, or nothing" : "a number or nothing";
  try {
    const QuantityRange read = parse_number_range(cell, format_.decimal);
    const Range range{part.unit.to_si(read.low), part.unit.to_si(read.high)};
    if (!may_be_range && read.low != read.high) {
      return refuse(quoted(cell) + " is a range; one value is needed here.", allowed);
    }
    if (!std::isfinite(range.low) || !std::isfinite(range.high)) {
      return refuse(quoted(cell) + " is too large for the unit of its column.", allowed);
    }
    if (kind == QuantityKind::temperature && range.low < 0.0) {
      return refuse(quoted(cell) + " is below absolute zero.", "temperatures from absolute zero");
    }
    if (kind == QuantityKind::count && (range.low < 0.0 || range.low != std::floor(range.low) ||
                                        range.high != std::floor(range.high))) {
      return refuse(quoted(cell) + " is no count: it must be whole and not negative.",
                    "whole numbers from 0");
    }
    return range;
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      const std::string message =
          fault.message + " Leave the cell empty where the value is not known.";
      add_cell_fault(
          row, part.index, cell_fault(message, fault.allowed.empty() ? allowed : fault.allowed));
    }
  }
  return std::nullopt;
}

std::optional<Range> TableReader::range(std::size_t row, const NumberColumn& column) {
  if (column.whole) {
    return number(row, *column.whole, column.kind, true);
  }
  if (!column.low) {
    return std::nullopt;
  }
  const std::optional<Range> low = number(row, *column.low, column.kind, false);
  if (!column.high) {
    return low;
  }
  const std::optional<Range> high = number(row, *column.high, column.kind, false);
  if (low && high) {
    if (low->low <= high->low) {
      return Range{low->low, high->low};
    }
    add_cell_fault(row,
                   column.high->index,
                   cell_fault("the upper end is below the lower end in " +
                                  quoted(headers_[column.low->index].name) + '.',
                              "a number not below the lower end"));
    return std::nullopt;
  }
  if (high && trim(document_.cell(row, column.low->index)).empty()) {
    add_cell_fault(row,
                   column.high->index,
                   cell_fault("an upper end without a lower end is no value to count on: fill in " +
                                  quoted(headers_[column.low->index].name) +
                                  ", or move the limit to the notes.",
                              "nothing, or both ends"));
    return std::nullopt;
  }
  return low;
}

std::optional<double> TableReader::value(std::size_t row, const NumberColumn& column) {
  if (column.whole) {
    const std::optional<Range> read = number(row, *column.whole, column.kind, false);
    return read ? std::optional<double>(read->low) : std::nullopt;
  }
  const std::optional<Range> read = range(row, column);
  if (!read || read->low == read->high) {
    return read ? std::optional<double>(read->low) : std::nullopt;
  }
  add_cell_fault(
      row, column.low->index, cell_fault("one value is needed here, not a range.", "a number"));
  return std::nullopt;
}

Range TableReader::required_range(std::size_t row, const NumberColumn& column) {
  const std::size_t before = faults_->size();
  if (const std::optional<Range> read = range(row, column)) {
    return *read;
  }
  if (column.is_present() && faults_->size() == before) {
    add_fault(row, *column.index(), Code::missing, "the cell must not be empty.");
  }
  return {};
}

double TableReader::required_value(std::size_t row, const NumberColumn& column) {
  const std::size_t before = faults_->size();
  if (const std::optional<double> read = value(row, column)) {
    return *read;
  }
  if (column.is_present() && faults_->size() == before) {
    add_fault(row, *column.index(), Code::missing, "the cell must not be empty.");
  }
  return 0.0;
}

void TableReader::add_fault(std::size_t row, std::size_t index, Code code, std::string message) {
  Fault fault;
  fault.code = code;
  fault.message = std::move(message);
  add_cell_fault(row, index, std::move(fault));
}

void TableReader::add_cell_fault(std::size_t row, std::size_t index, Fault fault) {
  fault.where = document_.where(row, index);
  fault.found = std::string(trim(document_.cell(row, index)));
  fault.message = quoted(trim(document_.header(index))) + ": " + fault.message;
  faults_->add(std::move(fault));
}

}  // namespace bismar
