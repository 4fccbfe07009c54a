// SPDX-License-Identifier: MIT
#include <bismar/catalogue/routes.hpp>

#include <algorithm>
#include <string>
#include <vector>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/temporary_table.hpp"
#include "support/catch.hpp"

using bismar::Code;
using bismar::Finish;
using bismar::Operation;
using bismar::Range;
using bismar::Rating;
using test::has_fault;
using test::TemporaryTable;

namespace {

std::string data(const char* file) { return std::string(BISMAR_TEST_DATA_DIR) + "/" + file; }

template <class Entry>
const Entry& get(const std::vector<Entry>& entries, const std::string& id) {
  const auto found = std::find_if(
      entries.begin(), entries.end(), [&](const Entry& entry) { return entry.id == id; });
  INFO(id);
  REQUIRE(found != entries.end());
  return *found;
}

}  // namespace

TEST_CASE("the starter finishes are whole and in SI units") {
  const std::vector<Finish> finishes = bismar::read_finishes(data("finishes.csv"));
  CHECK(finishes.size() == 27);  // rows of the starter data as delivered
  for (const Finish& finish : finishes) {
    INFO(finish.id);
    CHECK((finish.per_area ? finish.cost_per_area : finish.cost_per_mass).has_value());
    CHECK(finish.status == "indicative");
    CHECK_FALSE(finish.evidence.empty());
  }
  // Figures of data/finishes.csv in its own units, converted by hand.
  const Finish& zinc = get(finishes, "galvanising");
  CHECK(zinc.standard == "EN ISO 1461");
  CHECK_FALSE(zinc.per_area);
  CHECK(zinc.cost_per_mass == Range{0.35, 0.9});
  CHECK(zinc.cost_per_area == Range{12, 35});
  CHECK(zinc.minimum_lot == 100.0);
  REQUIRE(zinc.thickness.has_value());
  CHECK(zinc.thickness->low == Approx(45e-6).epsilon(1e-14));
  REQUIRE(zinc.added_mass.has_value());
  CHECK(zinc.added_mass->high == Approx(0.7).epsilon(1e-14));
  CHECK(zinc.corrosion_after.at("fresh water") == Rating::good);
  CHECK(zinc.corrosion_after.at("sea water") == Rating::fair);
  REQUIRE(zinc.service_temperature_max.has_value());
  CHECK(*zinc.service_temperature_max == Approx(473.15).epsilon(1e-14));
  CHECK(zinc.fatigue_factor == 0.95);
  CHECK(zinc.process_words == std::vector<std::string>{"galvanising"});

  const Finish& none = get(finishes, "none");
  CHECK(none.per_area);
  CHECK(none.cost_per_area == Range{0, 0});
  CHECK(none.minimum_lot == 0.0);
  CHECK(none.corrosion_after.empty());
  CHECK_FALSE(none.fatigue_factor.has_value());
  CHECK(none.process_words.empty());
  CHECK(none.classes.size() == 13);

  CHECK_FALSE(get(finishes, "wood-impregnation").added_mass.has_value());
  CHECK(get(finishes, "passivation").corrosion_after.at("sea water") == Rating::fair);
  CHECK(get(finishes, "paint-polymer").corrosion_after.empty());
  // A single layer without zinc or primer under it: common practice, no source.
  CHECK(get(finishes, "powder-coat").corrosion_after.at("fresh water") == Rating::fair);
  CHECK(get(finishes, "powder-coat").corrosion_after.at("sea water") == Rating::fair);
}

TEST_CASE("the layer of a galvanised part weighs what its thickness says") {
  // ISO 1461: 7.2 g per um and m2 of zinc; both ends of the table are rounded to 2 figures (5 %).
  const std::vector<Finish> finishes = bismar::read_finishes(data("finishes.csv"));
  for (const char* id : {"galvanising", "galvanising-spun"}) {
    const Finish& finish = get(finishes, id);
    CHECK(finish.added_mass.value().low ==
          Approx(finish.thickness.value().low * 7200).epsilon(0.05));
    CHECK(finish.added_mass.value().high ==
          Approx(finish.thickness.value().high * 7200).epsilon(0.05));
  }
}

TEST_CASE("every fault of a table of finishes is told with its row and column") {
  const TemporaryTable table("finishes.csv",
                             "id,material classes,cost basis,cost per area [EUR/m2],cost per mass "
                             "[EUR/kg],minimum lot [EUR],"
                             "corrosion after: fresh water,fatigue factor\n"
                             "a,steel,square metre,,1,10,good,0.9\n"
                             "a,,kilogram,3,,-10,excellent,0\n"
                             "none,steel,square metre,,,,,\n"
                             "d,steel,litre,5..3,,,,\n");
  const auto faults = test::faults_of([&] { return bismar::read_finishes(table.path()); });
  CHECK(has_fault(faults, Code::missing, table.at(2, 4), "cost per area"));
  CHECK(has_fault(faults, Code::duplicate, table.at(3, 1), "line 2"));
  CHECK(has_fault(faults, Code::missing, table.at(3, 2), "empty"));
  CHECK(has_fault(faults, Code::missing, table.at(3, 5), "cost per mass"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 6), "at least 0"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 7), "good"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 8), "above 0"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(5, 3), "square metre"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(5, 4), "5..3"));
  for (const bismar::Fault& fault : faults) CHECK(fault.where.find(":4:") == std::string::npos);
}

TEST_CASE("the starter operations are whole and cost what their authors computed") {
  const std::vector<Operation> operations = bismar::read_operations(data("operations.csv"));
  CHECK(operations.size() == 40);  // rows of the starter data as delivered

  // The column of unit costs came with the data, rounded to three figures.
  bismar::FaultList faults;
  const std::string path = data("operations.csv");
  bismar::TableReader table(bismar::read_table_file(path), path, {}, faults);
  const auto cost =
      table.number_column("cost per unit", bismar::QuantityKind::money, bismar::Presence::required);
  table.finish_columns();
  REQUIRE(table.rows() == operations.size());
  for (std::size_t row = 0; row < operations.size(); ++row) {
    const Operation& operation = operations[row];
    const Range stated = table.required_range(row, cost);
    INFO(operation.id);
    CHECK(operation.status == "indicative");
    CHECK(operation.time.low * operation.rate.low + operation.consumables.low ==
          Approx(stated.low).epsilon(5.1e-3));
    CHECK(operation.time.high * operation.rate.high + operation.consumables.high ==
          Approx(stated.high).epsilon(5.1e-3));
  }
  CHECK(faults.empty());

  const Operation& cut = get(operations, "saw-cut");
  CHECK(cut.unit == "cut");
  CHECK(cut.setup_time == 600.0);
  CHECK(cut.time == Range{42.0, 300.0});
  CHECK(cut.consumables == Range{0.05, 0.3});
  CHECK(cut.time_rule.find("40 cm2/min") != std::string::npos);
}

TEST_CASE("every fault of a table of operations is told with its row and column") {
  const TemporaryTable table("operations.csv",
                             "id,unit,material classes,time [min],rate [EUR/h],consumables [EUR]\n"
                             ",cut,steel,1,50,\n"
                             "b,,steel,-1,,x\n"
                             "b,cut,,1,50,1\n");
  const auto faults = test::faults_of([&] { return bismar::read_operations(table.path()); });
  CHECK(has_fault(faults, Code::missing, table.at(2, 1), "empty"));
  CHECK(has_fault(faults, Code::missing, table.at(3, 2), "empty"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 4), "at least 0"));
  CHECK(has_fault(faults, Code::missing, table.at(3, 5), "empty"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 6), "x"));
  CHECK(has_fault(faults, Code::duplicate, table.at(4, 1), "line 3"));
  CHECK(has_fault(faults, Code::missing, table.at(4, 3), "empty"));
}
