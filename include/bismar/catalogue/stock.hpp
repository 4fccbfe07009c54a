// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/table_format.hpp>
#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstddef>
#include <cstdint>
#include <functional>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// How sure it is that a size can be bought.
enum class Availability : std::uint8_t {
  seen,         ///< Found in a public list of sizes.
  usual,        ///< Common in the trade, from memory; stockists and countries differ.
  unconfirmed,  ///< In none of the public lists that were compared.
  doubtful,     ///< Speaks against a standard, or mixes two families of sizes.
};

/// The word of a table: "seen", "usual", "unconfirmed", "doubtful", and back.
[[nodiscard]] BISMAR_API std::string_view name(Availability availability);
[[nodiscard]] BISMAR_API std::optional<Availability> availability(std::string_view name);

/// One purchasable size. It is made of a material when class, group, standard, form and id all
/// agree
/// (`made_of`); a list that is empty here asks for nothing.
struct StockItem {
  std::string id;
  std::string designation;             ///< As a person says it: "round bar 20", "CHS 60.3 x 5".
  SectionProperties section;           ///< For a sheet: unused, see `thickness`.
  double thickness = 0.0;              ///< Sheet or plate thickness [m]; 0 for a section.
  std::vector<std::string> classes;    ///< Material classes it is made of; never empty.
  std::vector<std::string> groups;     ///< Material groups; empty = every group of the classes.
  std::vector<std::string> standards;  ///< Material standards; empty = any.
  std::vector<std::string> forms;  ///< Forms of the material: bar, tube, section, sawn, sheet ...
  std::vector<std::string> material_ids;  ///< Only these materials; empty = any.
  std::vector<double> lengths;            ///< Stock lengths [m], ascending; empty = to measure.
  std::vector<double> widths;             ///< Sheets: stock widths [m], ascending.
  Availability availability = Availability::usual;
  std::string standard;  ///< Standard of the size for its first class; see `size_standard`.
  /// Where another class of material has another standard for the size; "" = no standard known.
  std::map<std::string, std::string, std::less<>> standard_by_class;
  std::string evidence;  ///< What the size and its availability rest on.
  std::string note;
  std::string table;     ///< File it was read from, empty for one made in memory.
  std::size_t line = 0;  ///< Line of that file, 0 for one made in memory.
};

/// A list of sizes of one shape; the unit that a candidate names.
struct StockList {
  std::string id;      ///< "round-bar": the file name without folder and ending.
  std::string title;   ///< "round bar, EN 10060"
  bool sheet = false;  ///< Thicknesses of sheet and plate: no section of its own.
  SectionFamily family = SectionFamily::solid_round;  ///< Unused for a sheet list.
  std::vector<StockItem> items;                       ///< In the order of the table; never empty.
};

/// Whether the item is made of this material: its class is among the item's classes, and group,
/// standard, one of its forms and its id are among those that the item names, where it names any.
/// Words are compared letter by letter.
[[nodiscard]] BISMAR_API bool made_of(const StockItem& item, const MaterialInfo& material);

/// The standard of the size where it is made of this class of material; "" where none is known. An
/// aluminium bar of a steel bar's diameter follows EN 755-3, not EN 10060.
[[nodiscard]] BISMAR_API std::string_view size_standard(const StockItem& item,
                                                        std::string_view material_class);

/// Reads one list of sizes: one row a size, all rows of one shape. Columns, in any order, with
/// units of the reader's choice in the header:
///
/// | column | meaning |
/// | --- | --- |
/// | id | unique in the list |
/// | list (optional) | title of the list, the same in every row; else its id |
/// | designation (optional) | as a person says it; else the id |
/// | shape | solid round, solid square, solid rectangle, round tube, rectangular tube, I section,
/// channel, or sheet | | forming (optional) | hot finished, cold formed, extruded, sawn; it decides
/// buckling curves | | diameter, side, height, width, wall, web, flange, root radius, flange slope,
/// thickness | the dimensions that the shape needs | | outer radius, inner radius (optional) |
/// corners of a rectangular tube; without them EN 10210-2 for hot finished, EN 10219-2 for cold
/// formed, sharp otherwise | | material classes, material groups, material standards, material
/// forms, materials | lists with `;`; only the classes are required | | stock lengths, stock widths
/// (optional) | lists with `;`, ascending | | size standard, size standards of other classes
/// (optional) | the latter as `class:standard` pairs, `-` for none | | availability (optional) |
/// seen, usual (default), unconfirmed, doubtful | | evidence, note (optional) | text |
///
/// Areas, moments and masses are computed from the dimensions, not read; a table may carry them for
/// its readers, with any other column of its own. A header that looks like one of the above with a
/// slip of the pen is a fault, not a column of its own.
///
/// A flat bar is laid on edge by its row: `height` is the side along the load, so the wide side is
/// given as the height for the strong axis. For use on the flat make a list with the two swapped.
///
/// @throws bismar::Error  every fault with file:row:column: table_unreadable, table_malformed,
///   column_missing, cell_invalid (a word, number or range that the column cannot take), missing (a
///   dimension that the shape needs), conflict (a second shape or title in one list, stock lengths
///   not ascending), duplicate (an id twice), out_of_range (a wall as thick as half the section,
///   and whatever the section itself refuses).
[[nodiscard]] BISMAR_API StockList read_stock(const std::string& path,
                                              const TableFormat& format = {});

/// Preferred numbers: the series "R5", "R10", "R20" and "R40" of ISO 3, and the first rounded
/// series "R'10", "R'20" and "R'40" of ISO 497, which give friendlier sizes in millimetres. The
/// listed values of the standard times powers of ten, not 10^(i/n).
///
/// @param from, to  Ends of the range [m], both inclusive (an end counts as reached within 1e-12 of
///   its value).
/// @param unit      The unit of which the sizes are preferred multiples [m]: 1e-3 for millimetres,
///   0.0254 for inches.
/// @return The values in [from, to], ascending [m].
/// @throws bismar::Error  unknown_name: the series, with the nearest one; not_finite; out_of_range:
///   an argument not above 0 (1e-200..1e200 m), or a range with more than 10,000 values; conflict:
///   `from` above `to`; empty: no value of the series in the range.
[[nodiscard]] BISMAR_API std::vector<double> preferred_numbers(std::string_view series,
                                                               double from,
                                                               double to,
                                                               double unit = 1e-3);

}  // namespace bismar
