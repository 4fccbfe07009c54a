// SPDX-License-Identifier: MIT
#include <bismar/catalogue/materials.hpp>
#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <utility>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::folded;

/// "damping [%]" -> "damping".
std::string_view without_unit(std::string_view header) {
  return catalogue::trim(header.substr(0, header.find('[')));
}

std::optional<Range> present(const std::vector<Range>& values, std::size_t row) {
  if (row >= values.size() || std::isnan(values[row].low)) {
    return std::nullopt;
  }
  return values[row];
}

std::optional<Basis> basis_word(std::string_view text) {
  const std::string word = folded(text);
  if (word == "minimum") {
    return Basis::minimum;
  }
  if (word == "typical") {
    return Basis::typical;
  }
  if (word == "indicative") {
    return Basis::indicative;
  }
  return std::nullopt;
}

}  // namespace

const ThicknessStep* MaterialTable::step_at(std::size_t material, double thickness) const {
  const std::vector<ThicknessStep>& steps = materials_[material].steps;
  const auto step = std::lower_bound(
      steps.begin(), steps.end(), thickness, [](const ThicknessStep& candidate, double wanted) {
        return candidate.up_to < wanted;
      });
  return step != steps.end() && step->above < thickness ? &*step : nullptr;
}

std::optional<Range> MaterialTable::value(Property property, std::size_t row) const {
  return present(columns_[static_cast<std::size_t>(property)], row);
}

const MaterialTable::ExtraColumn* MaterialTable::find_extra(std::string_view name) const {
  const std::string wanted = folded(name);
  for (const ExtraColumn& column : extras_) {
    if (wanted == folded(column.name) || wanted == folded(without_unit(column.name))) {
      return &column;
    }
  }
  return nullptr;
}

std::optional<Range> MaterialTable::extra(std::string_view name, std::size_t row) const {
  const ExtraColumn* column = find_extra(name);
  return column == nullptr ? std::nullopt : present(column->values, row);
}

std::vector<std::string> MaterialTable::extra_names() const {
  std::vector<std::string> names;
  for (const ExtraColumn& column : extras_) {
    names.push_back(column.name);
  }
  return names;
}

std::string_view MaterialTable::text(std::string_view name, std::size_t row) const {
  const std::string wanted = folded(name);
  for (const TextColumn& column : texts_) {
    if (wanted == folded(column.name)) {
      return column.values[row];
    }
  }
  return {};
}

std::vector<std::string> MaterialTable::text_names() const {
  std::vector<std::string> names;
  for (const TextColumn& column : texts_) {
    names.push_back(column.name);
  }
  return names;
}

Provenance MaterialTable::row_provenance(std::size_t row) const {
  Provenance provenance;
  provenance.table = table_name_;
  provenance.row = rows_[row].line;
  provenance.source = rows_[row].source;
  provenance.basis = rows_[row].basis;
  provenance.evidence = rows_[row].evidence;
  return provenance;
}

Provenance MaterialTable::provenance(Property property, std::size_t row) const {
  Provenance provenance = row_provenance(row);
  provenance.column = headers_[static_cast<std::size_t>(property)];
  const RowInfo& info = rows_[row];
  if (const auto found = info.exceptions.find(property); found != info.exceptions.end()) {
    provenance.evidence = found->second;
  }
  if (const auto found = info.keys.find(property); found != info.keys.end()) {
    provenance.keys = found->second;
  }
  const std::string_view own = text(std::string(bismar::info(property).name) + " basis", row);
  if (const std::optional<Basis> basis = basis_word(own)) {
    provenance.basis = *basis;
  } else if (!own.empty()) {
    provenance.source = std::string(own);
  }
  return provenance;
}

std::optional<Provenance> MaterialTable::extra_provenance(std::string_view name,
                                                          std::size_t row) const {
  const ExtraColumn* column = find_extra(name);
  if (column == nullptr) {
    return std::nullopt;
  }
  Provenance provenance = row_provenance(row);
  provenance.column = column->name;
  return provenance;
}

std::optional<std::size_t> MaterialTable::find(std::string_view id) const {
  const auto found = by_id_.find(id);
  return found == by_id_.end() ? std::nullopt : std::optional<std::size_t>(found->second);
}

MaterialTableBuilder::MaterialTableBuilder(std::string table_name, std::string currency)
    : table_name_(std::move(table_name)), currency_(std::move(currency)) {}

void MaterialTableBuilder::add(Row row) { rows_.push_back(std::move(row)); }

void MaterialTableBuilder::add_columns(std::span<const MaterialInfo> infos,
                                       std::span<const Property> properties,
                                       std::span<const std::span<const double>> values) {
  FaultList faults;
  const std::string place = table_name_ + ": add_columns";
  if (properties.size() != values.size()) {
    faults.add(Code::invalid_argument,
               place,
               std::to_string(properties.size()) + " properties and " +
                   std::to_string(values.size()) +
                   " columns of values: give one column a property.");
  }
  for (std::size_t i = 0; i < std::min(properties.size(), values.size()); ++i) {
    const std::string name(bismar::info(properties[i]).name);
    if (values[i].size() != infos.size()) {
      faults.add(Code::invalid_argument,
                 place,
                 "the column \"" + name + "\" has " + std::to_string(values[i].size()) +
                     " values for " + std::to_string(infos.size()) +
                     " materials: give one each, NaN where it is missing.");
    }
    const auto end = properties.begin() + static_cast<std::ptrdiff_t>(i);
    if (std::find(properties.begin(), end, properties[i]) != end) {
      faults.add(Code::duplicate, place, "the column \"" + name + "\" is there twice: keep one.");
    }
  }
  faults.throw_if_any();
  for (std::size_t material = 0; material < infos.size(); ++material) {
    Row row;
    row.info = infos[material];
    for (std::size_t i = 0; i < properties.size(); ++i) {
      const double value = values[i][material];
      if (!std::isnan(value)) {
        row.values[properties[i]] = {value, value};
      }
    }
    rows_.push_back(std::move(row));
  }
}

void MaterialTableBuilder::set_header(Property property, std::string header, std::size_t column) {
  headers_[property] = {std::move(header), column};
}

}  // namespace bismar
