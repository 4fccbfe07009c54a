// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/routes.hpp>
#include <bismar/catalogue/stock.hpp>
#include <bismar/catalogue/weld_zones.hpp>
#include <bismar/export.hpp>

#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// Everything a part can be made of and by. A plain value: build it in memory, or read it.
///
/// Reading it from several threads is safe.
struct Catalogue {
  MaterialTable materials;
  std::vector<StockList> stock;
  std::vector<Route> routes;  ///< Primary ways, treatments and joining.
  std::vector<Finish> finishes;
  std::vector<Operation> operations;
  std::vector<WeldZone> weld_zones;  ///< Aluminium beside a weld.
  std::string currency = "EUR";
  /// What is odd but no fault, one sentence each: the warnings of the materials, and every class,
  /// group, standard, form or id that another table names and no material has (`unused_names`).
  std::vector<std::string> warnings;

  /// The entry of this id, or null. Time linear in the number of entries.
  [[nodiscard]] BISMAR_API const StockList* find_stock(std::string_view id) const;
  [[nodiscard]] BISMAR_API const Route* find_route(std::string_view id) const;
  [[nodiscard]] BISMAR_API const Finish* find_finish(std::string_view id) const;
  [[nodiscard]] BISMAR_API const Operation* find_operation(std::string_view id) const;
};

/// What stock, routes, finishes and operations name and no material has, one sentence for each word
/// of a list or row.
[[nodiscard]] BISMAR_API std::vector<std::string> unused_names(const Catalogue& catalogue);

/// Reads the starter tables from a folder laid out like data/ (materials.csv, stock/*.csv,
/// routes.csv, finishes.csv, operations.csv, weld-zones.csv; lists of sizes in the order of their
/// file names). Starter values are indicative where marked and unverified where marked: see
/// data/SOURCES.md.
/// @throws bismar::Error  every fault of every table; table_unreadable also for a missing folder;
///   empty for a stock folder without a list.
[[nodiscard]] BISMAR_API Catalogue read_catalogue(const std::string& folder);

/// The starter tables that came with the library: from its installed data folder, or from the
/// source tree when it runs in its build tree.
/// @throws bismar::Error  table_unreadable naming the folders looked in; otherwise as
/// read_catalogue.
[[nodiscard]] BISMAR_API Catalogue starter_catalogue();

}  // namespace bismar
