// SPDX-License-Identifier: MIT
#include <bismar/catalogue/weld_zones.hpp>

#include <algorithm>
#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/checked_cells.hpp"

namespace bismar {

namespace {

bool contains(std::span<const std::string> words, std::string_view word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

bool share(std::span<const std::string> a, std::span<const std::string> b) {
  return std::any_of(
      a.begin(), a.end(), [&](const std::string& word) { return contains(b, word); });
}

std::string_view first_word(std::string_view text) {
  return text.substr(0, text.find_first_of(",/ "));
}

}  // namespace

std::vector<WeldZone> read_weld_zones(const std::string& path, const TableFormat& format) {
  using namespace catalogue;
  FaultList faults;
  TableReader table(read_table_file(path), path, format, faults);
  constexpr Presence needed = Presence::required;
  Ids ids(table.text_column("id", needed));
  const Column alloy = table.text_column("alloy", needed);
  const Column tempers = table.text_column("tempers", needed);
  const Column forms = table.text_column("forms");
  const NumberColumn thickness = table.number_column("thickness limit", QuantityKind::length);
  const auto strength = [&](std::string_view name) {
    return table.number_column(name, QuantityKind::stress, needed);
  };
  const NumberColumn parent_yield = strength("parent yield strength");
  const NumberColumn parent_tensile = strength("parent tensile strength");
  const NumberColumn zone_yield = strength("zone yield strength");
  const NumberColumn zone_tensile = strength("zone tensile strength");
  const Column source = table.text_column("source");
  const Column evidence = table.text_column("evidence");
  table.finish_columns();
  refuse_misspelt_headers(table, faults);

  /// Zone over parent; a faulty cell is a fault already.
  const auto factor = [&](std::size_t row, const NumberColumn& zone, const NumberColumn& parent) {
    const double whole = required_value_in(table, row, parent, positive);
    const double left = required_value_in(table, row, zone, positive);
    if (left > whole && whole > 0.0) {
      table.add_fault(row,
                      zone.index().value(),
                      Code::conflict,
                      "the zone beside a weld cannot be stronger than its parent.");
    }
    return whole > 0.0 ? left / whole : 1.0;
  };
  std::vector<WeldZone> zones;
  zones.reserve(table.rows());
  for (std::size_t row = 0; row < table.rows(); ++row) {
    WeldZone zone;
    zone.id = ids.read(table, row);
    zone.alloy = table.required_text(row, alloy);
    zone.tempers = table.required_list(row, tempers);
    zone.forms = table.list(row, forms);
    if (const auto limit = value_in(table, row, thickness, positive)) {
      zone.thickness_max = *limit;
    }
    zone.yield_factor = factor(row, zone_yield, parent_yield);
    zone.tensile_factor = factor(row, zone_tensile, parent_tensile);
    zone.source = table.text(row, source);
    zone.evidence = table.text(row, evidence);
    zone.table = path;
    zone.line = table.line(row);
    zones.push_back(std::move(zone));
  }
  faults.throw_if_any();
  return zones;
}

const WeldZone* find_weld_zone(std::span<const WeldZone> zones, const WeldedProduct& product) {
  const WeldZone* found = nullptr;
  for (const WeldZone& zone : zones) {
    const bool fits =
        zone.alloy == product.alloy && contains(zone.tempers, product.temper) &&
        (zone.forms.empty() || product.forms.empty() || share(zone.forms, product.forms)) &&
        product.thickness <= zone.thickness_max;
    if (fits && (found == nullptr || zone.thickness_max < found->thickness_max)) {
      found = &zone;
    }
  }
  return found;
}

const WeldZone* find_weld_zone(std::span<const WeldZone> zones,
                               const MaterialInfo& material,
                               double thickness) {
  constexpr std::string_view wrought = "EN AW-";
  const std::string_view name = material.name;
  if (material.material_class != "aluminium" || !name.starts_with(wrought)) {
    return nullptr;
  }
  return find_weld_zone(zones,
                        {.alloy = first_word(name.substr(wrought.size())),
                         .temper = first_word(material.condition),
                         .forms = material.forms,
                         .thickness = thickness});
}

}  // namespace bismar
