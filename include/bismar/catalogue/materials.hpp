// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/property.hpp>
#include <bismar/catalogue/table_format.hpp>
#include <bismar/export.hpp>

#include <cstdint>
#include <map>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

enum class Basis : std::uint8_t {
  minimum,     ///< Specified minimum of a standard, or a characteristic value.
  typical,     ///< Handbook value, not guaranteed: strengths are divided by 1.25 and marked.
  indicative,  ///< Order of magnitude.
};

enum class StructuralUse : std::uint8_t { yes, on_request, no };

/// Resistance in a medium, worst first so that they compare.
enum class Rating : std::uint8_t { poor, fair, good };

/// How far one number can be trusted.
enum class Evidence : std::uint8_t {
  from_memory,  ///< Not compared with any source.
  seen,         ///< Equal to the value in a source that was looked at.
  estimated,    ///< Derived or estimated (see the notes of the table).
  user,         ///< From a user's table: the user answers for it.
};

/// Where a number comes from.
struct Provenance {
  std::string table;    ///< File or table name.
  std::size_t row = 0;  ///< Line of the file (the header is line 1), 0 for an in-memory table.
  std::string column;   ///< Header as written; the property's name for an in-memory table.
  std::string source;   ///< Source text of the row, or that of the value where the table has one.
  Basis basis = Basis::typical;
  Evidence evidence = Evidence::user;
  std::string
      keys;  ///< Which source was looked at and for what: "S1", "S3 (low end)"; see SOURCES.md.
};

/// What is not a number about one material: one grade in one condition.
struct MaterialInfo {
  std::string id;
  std::string name;
  std::string standard;
  std::string condition;
  std::string material_class;  ///< steel, stainless steel, cast iron, aluminium, ... (open list).
  std::string group;
  bool isotropic = true;
  StructuralUse use = StructuralUse::yes;
  std::vector<std::string> forms;      ///< As what it is sold: bar, plate, sheet, tube, ...
  std::vector<std::string> processes;  ///< What may be done with it.
  std::map<std::string, Rating, std::less<>> corrosion;  ///< Medium -> rating ("fresh water").
  Basis basis =
      Basis::typical;  ///< The weakest of its rows; `MaterialTable::basis` has each row's.
  std::string notes;
  /// Isotropic in its plane only (boards, laminates without a main direction); `isotropic` is then
  /// true, and G is not bound to E / (2 (1 + nu)).
  bool in_plane_only = false;
};

/// A stretch of thickness (above, up_to] and the values that hold in it.
struct ThicknessStep {
  double above = 0.0;   ///< [m], exclusive.
  double up_to = 0.0;   ///< [m], inclusive; +infinity where the table states no limit.
  std::size_t row = 0;  ///< Index of the table row that holds its values.
};

/// The materials, by columns. Rows of one id that differ by thickness limit are one material with
/// steps on (previous limit, limit].
///
/// Immutable after building; reading from several threads is safe. Indices are those of materials
/// in the order in which their ids first occur, and of rows in the order of the table; an index out
/// of range is undefined, as for a vector.
class BISMAR_API MaterialTable {
 public:
  /// Number of materials (not of rows).
  [[nodiscard]] std::size_t size() const noexcept { return materials_.size(); }
  [[nodiscard]] std::size_t rows() const noexcept { return row_count_; }
  [[nodiscard]] const MaterialInfo& info(std::size_t material) const {
    return materials_[material].info;
  }
  /// At least one step, ordered by thickness, disjoint.
  [[nodiscard]] std::span<const ThicknessStep> steps(std::size_t material) const {
    return materials_[material].steps;
  }
  /// The step that holds at this thickness [m], or nothing beyond the last limit, in a gap between
  /// steps, and for a thickness that is not above zero.
  [[nodiscard]] const ThicknessStep* step_at(std::size_t material, double thickness) const;
  /// The value in a table row (a step's `row`), or nothing where the cell is empty.
  [[nodiscard]] std::optional<Range> value(Property property, std::size_t row) const;
  /// A numeric column under a name of the user's own, with or without its unit: "damping" or
  /// "damping [%]". In SI; nothing for an unknown name or an empty cell.
  [[nodiscard]] std::optional<Range> extra(std::string_view name, std::size_t row) const;
  /// Names (with units) of the extra numeric columns, in the order of the table.
  [[nodiscard]] std::vector<std::string> extra_names() const;
  /// The text of a column that the library does not read, such as a remark or an order number;
  /// empty for an unknown name or an empty cell.
  [[nodiscard]] std::string_view text(std::string_view name, std::size_t row) const;
  [[nodiscard]] std::vector<std::string> text_names() const;
  /// Where `value(property, row)` comes from; asked for a missing value it still names the row.
  [[nodiscard]] Provenance provenance(Property property, std::size_t row) const;
  /// The same for an extra column; nothing for an unknown name.
  [[nodiscard]] std::optional<Provenance> extra_provenance(std::string_view name,
                                                           std::size_t row) const;
  [[nodiscard]] Basis basis(std::size_t row) const { return rows_[row].basis; }
  /// The material that a table row belongs to.
  [[nodiscard]] std::size_t material_of(std::size_t row) const { return rows_[row].material; }
  [[nodiscard]] std::optional<std::size_t> find(std::string_view id) const;
  [[nodiscard]] const std::string& name() const noexcept { return table_name_; }
  [[nodiscard]] const std::string& currency() const noexcept { return currency_; }
  /// Things that are no faults and yet unlikely: see `MaterialTableBuilder::build`, and headers
  /// that look like a misspelt property. One sentence each, with its place.
  [[nodiscard]] const std::vector<std::string>& warnings() const noexcept { return warnings_; }

 private:
  friend class MaterialAssembly;
  struct Material {
    MaterialInfo info;
    std::vector<ThicknessStep> steps;
  };
  struct RowInfo {
    std::size_t material = 0;
    std::size_t line = 0;
    Basis basis = Basis::typical;
    Evidence evidence = Evidence::user;
    std::string source;
    std::map<Property, Evidence> exceptions;  // where a value's evidence is not the row's
    std::map<Property, std::string> keys;
  };
  struct ExtraColumn {
    std::string name;  // with its unit
    std::vector<Range> values;
  };
  struct TextColumn {
    std::string name;
    std::vector<std::string> values;
  };
  [[nodiscard]] const ExtraColumn* find_extra(std::string_view name) const;
  [[nodiscard]] Provenance row_provenance(std::size_t row) const;

  std::vector<Material> materials_;
  std::size_t row_count_ = 0;
  std::vector<std::vector<Range>> columns_;  // [property][row], NaN = missing; empty = no column
  std::vector<std::string> headers_;         // [property]
  std::vector<ExtraColumn> extras_;
  std::vector<TextColumn> texts_;
  std::vector<RowInfo> rows_;
  std::string table_name_;
  std::string currency_ = "EUR";
  std::map<std::string, std::size_t, std::less<>> by_id_;
  std::vector<std::string> warnings_;
};

/// Builds a table from values in memory, from a reader, or from spans.
class BISMAR_API MaterialTableBuilder {
 public:
  explicit MaterialTableBuilder(std::string table_name, std::string currency = "EUR");
  struct Row {
    MaterialInfo info;
    double above = 0.0;           ///< Thickness, exclusive [m]; 0 = where the step before ends.
    std::optional<double> up_to;  ///< Thickness limit [m], inclusive.
    std::map<Property, Range> values;
    std::map<Property, Evidence> evidence;             ///< Where it differs from the row's.
    std::map<std::string, Range, std::less<>> extras;  ///< "name [unit]" -> value in SI.
    Evidence row_evidence = Evidence::user;
    std::string source;
    std::size_t line = 0;
    /// Columns of text. That named "<property> basis" holds the basis of that property's values
    /// (minimum, typical or indicative) or, in other words, their source.
    std::map<std::string, std::string, std::less<>> texts;
    std::map<Property, std::string> keys;  ///< See Provenance.
  };
  void add(Row row);
  /// Makes room for so many rows.
  void reserve(std::size_t rows) { rows_.reserve(rows); }
  /// Columns at once: `values` has one entry a material, NaN = missing.
  /// @throws bismar::Error  invalid_argument if the lengths differ; duplicate: a property twice.
  /// The
  ///   builder is then unchanged.
  void add_columns(std::span<const MaterialInfo> infos,
                   std::span<const Property> properties,
                   std::span<const std::span<const double>> values);
  /// Names the column that a property was read from: its header, and its number in the file counted
  /// from 1 for the place of faults (0: none).
  void set_header(Property property, std::string header, std::size_t column = 0);
  /// Adds to the warnings of the table.
  void add_warning(std::string warning) { warnings_.push_back(std::move(warning)); }

  /// Joins the rows of each id to one material and checks every value. Afterwards the builder is
  /// empty. Linear in the cells, apart from sorting the steps of each material.
  ///
  /// Faults, each with the place `table:line:column` (in memory: `table: material "id"`): empty: no
  /// row; missing: a row without id or class; duplicate: one id twice with the same thickness
  /// limit; conflict: a range upside down; rows of one id that overlap in thickness or differ in
  /// what may not step (properties without `steps_with_thickness`; name, class, forms, processes
  /// and so on, but neither basis, notes, source nor evidence); yield above tensile strength of an
  /// isotropic row; service temperatures upside down; not_finite; out_of_range: values that cannot
  /// be, such as a modulus, density or strength that is not positive, or a Poisson's ratio of an
  /// isotropic row outside (-1, 0.5); a thickness that is not positive; unknown_name: the currency.
  ///
  /// Warnings: a shear modulus more than 5 % away from E / (2 (1 + nu)) of an isotropic row; a
  /// value that no known material has (wrong unit?); a strength above E with an elongation below
  /// 100 %; a yield strength beside an elongation of 0.
  /// @throws bismar::Error  every fault.
  [[nodiscard]] MaterialTable build();

 private:
  friend class MaterialAssembly;
  std::string table_name_;
  std::string currency_;
  std::vector<Row> rows_;
  struct HeaderPlace {
    std::string header;
    std::size_t column = 0;
  };
  std::map<Property, HeaderPlace> headers_;
  std::vector<std::string> warnings_;
};

/// Reads a material table with units in its headers.
///
/// Columns, in any order, all optional but `class` and one of `id` and `name`: id, name (each
/// stands for the other; without an id column the id is made of name and condition), standard,
/// condition, class, group, isotropic (yes, no, in plane; empty: yes, but no for the classes wood
/// and composite), structural use (yes, on request, no), forms and processes (lists), thickness
/// above [mm], thickness limit [mm], basis (minimum, typical, indicative; empty: typical), source,
/// evidence (from memory, seen, estimated, user; empty: user; that of every number not named in the
/// next two), seen columns
/// ("S1: yield strength min, elongation; S2: density", where "min", "max" and "within" behind a
/// name say that one end of the range, or a value inside it, was seen), estimated columns (list),
/// notes, `corrosion in <medium>` (good, fair, poor), and every property of `properties()` with its
/// unit, as one column of values or ranges `min..max` or as two columns "name min [unit]", "name
/// max [unit]". Any other column is kept: as an extra property when it has a unit or holds numbers
/// only, as text otherwise. A value is `seen` when the end that a study uses by default was seen.
///
/// @throws bismar::Error  every fault with file:row:column; those of TableReader and of
///   MaterialTableBuilder::build.
[[nodiscard]] BISMAR_API MaterialTable read_materials(const std::string& path,
                                                      const TableFormat& format = {});
[[nodiscard]] BISMAR_API MaterialTable read_materials_text(std::string_view text,
                                                           std::string_view table_name,
                                                           const TableFormat& format = {});

}  // namespace bismar
