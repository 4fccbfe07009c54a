// SPDX-License-Identifier: MIT
#include <bismar/catalogue/table_reader.hpp>

#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/parse.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <utility>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::folded;
using catalogue::quoted;
using catalogue::trim;

constexpr std::string_view min_suffix = " min";
constexpr std::string_view max_suffix = " max";

bool may_go_without_unit(QuantityKind kind) {
  return kind == QuantityKind::ratio || kind == QuantityKind::count;
}

bool is_plain(std::string_view unit) { return unit == "1" || unit == "-"; }

/// The currency code inside a unit such as "EUR/kg".
std::optional<std::string> currency_in(std::string_view unit) {
  const auto is_letter = [](char c) { return (c >= 'A' && c <= 'Z') || (c >= 'a' && c <= 'z'); };
  for (std::size_t i = 0; i < unit.size();) {
    std::size_t end = i;
    while (end < unit.size() && is_letter(unit[end])) {
      ++end;
    }
    if (is_currency_code(unit.substr(i, end - i))) {
      return std::string(unit.substr(i, end - i));
    }
    i = std::max(end, i + 1);
  }
  return std::nullopt;
}

/// The commonest of the usual units.
std::string first_unit(QuantityKind kind) {
  const std::string_view units = usual_units(kind);
  return std::string(units.substr(0, units.find(',')));
}

std::string header_example(std::string_view name, QuantityKind kind) {
  if (may_go_without_unit(kind)) {
    return quoted(name);
  }
  return quoted(std::string(name) + " [" + first_unit(kind) + "]");
}

}  // namespace

std::optional<std::size_t> TableReader::NumberColumn::index() const noexcept {
  if (whole) {
    return whole->index;
  }
  return low ? std::optional<std::size_t>(low->index) : std::nullopt;
}

TableReader::TableReader(std::string text,
                         std::string name,
                         const TableFormat& format,
                         FaultList& faults)
    : format_(format), faults_(&faults) {
  check_format();
  document_ = CsvDocument::parse(std::move(text), std::move(name), format.delimiter, faults);
  read_headers();
}

void TableReader::check_format() {
  if (format_.decimal != '.' && format_.decimal != ',') {
    faults_->add(Code::invalid_argument, "decimal", "The decimal mark must be '.' or ','.");
    format_.decimal = '.';
  }
  if (format_.decimal == format_.delimiter) {
    faults_->add(
        Code::invalid_argument,
        "decimal",
        "The decimal mark and the delimiter are the same character: with a decimal comma the "
        "delimiter must be another one, usually ';'.");
  }
  if (!is_currency_code(format_.currency)) {
    faults_->add(Code::unknown_name,
                 "currency",
                 quoted(format_.currency) + " is no currency code of ISO 4217, such as \"EUR\".");
    format_.currency = "EUR";
  }
}

void TableReader::read_headers() {
  headers_.resize(document_.columns());
  for (std::size_t i = 0; i < headers_.size(); ++i) {
    HeaderCell& header = headers_[i];
    if (trim(document_.header(i)).empty()) {
      header.is_taken = true;
      for (std::size_t row = 0; row < rows(); ++row) {
        if (trim(document_.cell(row, i)).empty()) {
          continue;
        }
        faults_->add(Code::table_malformed,
                     document_.where(row, i),
                     "a cell of a column without header: name the column or empty its cells.");
        break;
      }
      continue;
    }
    try {
      Header parts = split_header(trim(document_.header(i)));
      header.name = std::move(parts.name);
      header.unit = std::move(parts.unit);
    } catch (const Error& error) {
      header.is_taken = true;
      add_header_faults(i, error);
      continue;
    }
    const auto [known, is_new] = by_name_.emplace(folded(header.name), i);
    // The same header twice is reported by CsvDocument; here it is one name with two units.
    if (!is_new && folded(document_.header(known->second)) != folded(document_.header(i))) {
      faults_->add(Code::duplicate,
                   document_.where_header(i),
                   "the column " + quoted(header.name) + " is already there as column " +
                       std::to_string(known->second + 1) + " in another unit: keep one of them.");
      header.is_taken = true;
    }
  }
}

bool TableReader::has_column(std::string_view name) const {
  return by_name_.find(folded(name)) != by_name_.end();
}

std::optional<std::size_t> TableReader::take(std::string_view name) {
  const auto found = by_name_.find(folded(name));
  if (found == by_name_.end()) {
    return std::nullopt;
  }
  headers_[found->second].is_taken = true;
  return found->second;
}

TableReader::Column TableReader::text_column(std::string_view name, Presence presence) {
  const std::optional<std::size_t> index = take(name);
  if (!index) {
    absent_.push_back({std::string(name), QuantityKind::ratio, false, presence});
  }
  return {index};
}

TableReader::NumberColumn TableReader::number_column(std::string_view name,
                                                     QuantityKind kind,
                                                     Presence presence) {
  NumberColumn column;
  column.kind = kind;
  const std::string word(name);
  const std::optional<std::size_t> whole = take(word);
  const std::optional<std::size_t> low = take(word + std::string(min_suffix));
  const std::optional<std::size_t> high = take(word + std::string(max_suffix));
  if (whole && (low || high)) {
    faults_->add(Code::conflict,
                 document_.where_header(low ? *low : *high),
                 quoted(headers_[low ? *low : *high].name) + " stands beside " + quoted(word) +
                     ": keep the one column or the pair.");
  } else if (high && !low) {
    faults_->add(Code::column_missing,
                 document_.where_header(*high),
                 quoted(headers_[*high].name) + " has no partner " +
                     quoted(word + std::string(min_suffix)) + ": an upper end alone is no value.");
  } else if (whole) {
    column.whole = part(*whole, kind);
  } else if (low) {
    column.low = part(*low, kind);
    if (high) {
      column.high = part(*high, kind);
    }
    if (!column.low) {
      column.high.reset();
    }
  } else {
    absent_.push_back({word, kind, true, presence});
  }
  return column;
}

std::vector<TableReader::PrefixedColumn> TableReader::text_columns_with_prefix(
    std::string_view prefix) {
  std::vector<PrefixedColumn> columns;
  const std::string start = folded(prefix) + ' ';
  for (std::size_t i = 0; i < headers_.size(); ++i) {
    const std::string name = folded(headers_[i].name);
    if (headers_[i].is_taken || name.compare(0, start.size(), start) != 0) {
      continue;
    }
    headers_[i].is_taken = true;
    columns.push_back({name.substr(start.size()), Column{i}});
  }
  return columns;
}

std::optional<TableReader::NumberColumn::Part> TableReader::part(std::size_t index,
                                                                 QuantityKind kind) {
  const std::optional<Unit> unit = read_unit(index, kind);
  if (!unit) {
    return std::nullopt;
  }
  return NumberColumn::Part{index, *unit};
}

std::optional<Unit> TableReader::read_unit(std::size_t index, QuantityKind kind) {
  HeaderCell& header = headers_[index];
  if (header.is_faulty) {
    return std::nullopt;
  }
  if ((!header.unit || is_plain(*header.unit)) && may_go_without_unit(kind)) {
    return Unit{};
  }
  try {
    if (!header.unit) {
      Fault fault;
      fault.code = Code::unit_missing;
      fault.allowed = std::string(usual_units(kind));
      fault.message = "the header names no unit: write it behind the name, as " +
                      header_example(header.name, kind) + ".";
      throw Error(std::move(fault));
    }
    std::string text = *header.unit;
    const bool is_money = dimension_of(kind).sixths(Base::currency) != 0;
    std::optional<CurrencyRates> own_rates;
    if (is_money) {
      const std::optional<std::string> settled = settle_currency(index, std::move(text));
      if (!settled) {
        return std::nullopt;
      }
      text = *settled;
      if (format_.rates == nullptr) {
        own_rates.emplace(*currency_);
      }
    }
    const CurrencyRates* rates = own_rates ? &*own_rates : format_.rates;
    // Read once as a quantity: that compares it with the kind.
    static_cast<void>(parse_quantity("1 " + text, kind, rates));
    return parse_unit(text, rates);
  } catch (const Error& error) {
    header.is_faulty = true;
    add_header_faults(index, error);
    return std::nullopt;
  }
}

std::optional<std::string> TableReader::settle_currency(std::size_t index, std::string unit) {
  std::optional<std::string> named = currency_in(unit);
  if (!named) {
    if (unit.substr(0, 2) == "1/") {
      unit.erase(0, 1);
    }
    if (!unit.empty() && unit.front() == '/') {
      unit.insert(0, format_.currency);
    }
    named = format_.currency;
  }
  if (format_.rates != nullptr) {
    currency_ = format_.rates->job_currency();
  } else if (!currency_) {
    currency_ = named;
  } else if (*currency_ != *named) {
    headers_[index].is_faulty = true;
    faults_->add(Code::conflict,
                 document_.where_header(index),
                 "prices in " + *named + " beside prices in " + *currency_ +
                     ": one table has one currency, or the job states a rate.");
    return std::nullopt;
  }
  return unit;
}

void TableReader::finish_columns() {
  unknown_.clear();
  std::vector<std::string_view> left_over;
  for (std::size_t i = 0; i < headers_.size(); ++i) {
    if (headers_[i].is_taken) {
      continue;
    }
    unknown_.push_back({i, headers_[i].name, headers_[i].unit});
    left_over.push_back(headers_[i].name);
  }
  for (const Wanted& wanted : absent_) {
    if (wanted.presence == Presence::required) {
      report_missing(wanted, left_over);
    }
  }
  std::vector<std::string_view> optional_names;
  for (const Wanted& wanted : absent_) {
    if (wanted.presence == Presence::optional) {
      optional_names.push_back(wanted.name);
    }
  }
  for (const UnknownColumn& column : unknown_) {
    if (const auto near = nearest_word(column.name, optional_names)) {
      notes_.push_back(document_.where_header(column.index) + ": the column " +
                       quoted(column.name) + " is not one the library knows. Did you mean " +
                       quoted(*near) + "?");
    }
  }
  absent_.clear();
}

void TableReader::report_missing(const Wanted& wanted,
                                 std::span<const std::string_view> left_over) {
  if (document_.columns() == 0) {
    return;  // an empty table has its own fault
  }
  const std::string example =
      wanted.is_number ? header_example(wanted.name, wanted.kind) : quoted(wanted.name);
  std::string message = "the column " + example + " is missing.";
  const std::string header(document_.header(0));
  if (document_.columns() == 1 && header.find_first_of(",;\t|") != std::string::npos) {
    message += " The header has one column only, so the delimiter is probably another one.";
  } else if (const auto near = nearest_word(wanted.name, left_over)) {
    message += " Did you mean it by " + quoted(*near) + "?";
  }
  Fault fault;
  fault.code = Code::column_missing;
  fault.where = document_.name() + ':' + std::to_string(document_.header_line());
  fault.allowed = example;
  fault.message = std::move(message);
  faults_->add(std::move(fault));
}

const std::string& TableReader::currency() const noexcept {
  return currency_ ? *currency_ : format_.currency;
}

std::optional<TableReader::NumberColumn> TableReader::as_numbers(const UnknownColumn& column) {
  NumberColumn numbers;
  numbers.whole = NumberColumn::Part{column.index, Unit{}};
  if (!column.unit || is_plain(*column.unit)) {
    bool holds_number = false;
    for (std::size_t row = 0; row < rows(); ++row) {
      const std::string_view cell = trim(document_.cell(row, column.index));
      if (cell.empty()) {
        continue;
      }
      try {
        static_cast<void>(parse_number_range(cell, format_.decimal));
        holds_number = true;
      } catch (const Error&) {
        return std::nullopt;  // a column of text
      }
    }
    return holds_number ? std::optional<NumberColumn>(numbers) : std::nullopt;
  }
  try {
    std::string text = *column.unit;
    std::optional<CurrencyRates> own_rates;
    if (currency_in(text)) {
      const std::optional<std::string> settled = settle_currency(column.index, text);
      if (!settled) {
        return std::nullopt;
      }
      if (format_.rates == nullptr) {
        own_rates.emplace(*currency_);
      }
    }
    numbers.whole->unit = parse_unit(text, own_rates ? &*own_rates : format_.rates);
    return numbers;
  } catch (const Error& error) {
    add_header_faults(column.index, error);
    return std::nullopt;
  }
}

void TableReader::add_header_faults(std::size_t index, const Error& error) {
  for (const Fault& fault : error.faults()) {
    Fault placed = fault;
    placed.where = document_.where_header(index);
    placed.found = std::string(trim(document_.header(index)));
    placed.message = quoted(placed.found) + ": " + fault.message;
    faults_->add(std::move(placed));
  }
}

}  // namespace bismar
