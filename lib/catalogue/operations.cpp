// SPDX-License-Identifier: MIT
#include <bismar/catalogue/routes.hpp>

#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/checked_cells.hpp"

namespace bismar {

std::vector<Operation> read_operations(const std::string& path, const TableFormat& format) {
  using namespace catalogue;
  FaultList faults;
  TableReader table(read_table_file(path), path, format, faults);
  constexpr Presence needed = Presence::required;
  Ids ids(table.text_column("id", needed));
  const Column title = table.text_column("title");
  const Column unit = table.text_column("unit", needed);
  const Column classes = table.text_column("material classes", needed);
  const NumberColumn setup_time = table.number_column("setup time", QuantityKind::time);
  const NumberColumn time = table.number_column("time", QuantityKind::time, needed);
  const NumberColumn rate = table.number_column("rate", QuantityKind::cost_rate, needed);
  const NumberColumn consumables = table.number_column("consumables", QuantityKind::money);
  const Column time_rule = table.text_column("time rule");
  const Column strength_note = table.text_column("strength note");
  const Column status = table.text_column("status");
  const Column evidence = table.text_column("evidence");
  table.finish_columns();
  refuse_misspelt_headers(table, faults);
  refuse_other_currency(table, format, faults);

  std::vector<Operation> operations;
  operations.reserve(table.rows());
  for (std::size_t row = 0; row < table.rows(); ++row) {
    Operation operation;
    operation.id = ids.read(table, row);
    operation.title = table.text(row, title);
    if (operation.title.empty()) {
      operation.title = operation.id;
    }
    operation.unit = table.required_text(row, unit);
    operation.classes = table.required_list(row, classes);
    operation.setup_time = value_in(table, row, setup_time, not_negative).value_or(0.0);
    operation.time = required_range_in(table, row, time, not_negative);
    operation.rate = required_range_in(table, row, rate, not_negative);
    operation.consumables = range_in(table, row, consumables, not_negative).value_or(Range{});
    operation.time_rule = table.text(row, time_rule);
    operation.strength_note = table.text(row, strength_note);
    operation.status = table.text(row, status);
    operation.evidence = table.text(row, evidence);
    operation.table = path;
    operation.line = table.line(row);
    operations.push_back(std::move(operation));
  }
  faults.throw_if_any();
  return operations;
}

}  // namespace bismar
