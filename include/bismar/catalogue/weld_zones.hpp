// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/table_format.hpp>
#include <bismar/export.hpp>

#include <cstddef>
#include <limits>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// What welding leaves of the strength of one alloy beside the weld: the heat-affected zone.
struct WeldZone {
  std::string id;
  std::string alloy;                 ///< Digits of the grade, as in EN AW-6082: "6082", "6005A".
  std::vector<std::string> tempers;  ///< "T6", "T651", ...: any of them.
  std::vector<std::string> forms;    ///< Product forms, of which a material has one; empty = any.
  double thickness_max = std::numeric_limits<double>::infinity();  ///< [m]
  double yield_factor = 1.0;    ///< rho_o,haz = f_o,haz / f_o, 0 < rho <= 1.
  double tensile_factor = 1.0;  ///< rho_u,haz = f_u,haz / f_u, 0 < rho <= 1.
  std::string source;
  std::string evidence;
  std::string table;
  std::size_t line = 0;
};

/// Reads the table of weld zones: id, alloy, tempers, forms, thickness limit, yield and tensile
/// strength of the parent and of the zone, source, evidence. The factors are zone over parent.
/// @throws bismar::Error  every fault of the table at file:row:column, as the readers of routes do;
///   conflict where a zone is stronger than its parent.
[[nodiscard]] BISMAR_API std::vector<WeldZone> read_weld_zones(const std::string& path,
                                                               const TableFormat& format = {});

/// What is looked up: an alloy in one temper and form, so thick.
struct WeldedProduct {
  std::string_view alloy;              ///< "6082"
  std::string_view temper;             ///< "T6"
  std::span<const std::string> forms;  ///< Any of these; empty = whatever the table has.
  double thickness = 0.0;              ///< [m]; the row with the least sufficient limit counts.
};

/// The row for this product, or null where the table has none.
[[nodiscard]] BISMAR_API const WeldZone* find_weld_zone(std::span<const WeldZone> zones,
                                                        const WeldedProduct& product);

/// The row for a material of the class "aluminium": alloy from its name ("EN AW-6082"), temper from
/// the first word of its condition ("T6, bar"), its forms; null for any other material.
[[nodiscard]] BISMAR_API const WeldZone* find_weld_zone(std::span<const WeldZone> zones,
                                                        const MaterialInfo& material,
                                                        double thickness);

}  // namespace bismar
