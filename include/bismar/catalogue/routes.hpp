// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/table_format.hpp>
#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <functional>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

enum class RouteKind : std::uint8_t {
  primary,    ///< Gives the part its shape.
  joining,    ///< Puts parts together; never makes a member by itself.
  treatment,  ///< Sets the strength after shaping.
  surface,    ///< Listed for its figures only: finishes are priced by the table of finishes.
};

/// What the rate of a route counts.
enum class RateBasis : std::uint8_t { part, metre, kilogram, spot, assembly };

/// The words of a table ("primary", "kilogram"), and back.
[[nodiscard]] BISMAR_API std::string_view name(RouteKind kind);
[[nodiscard]] BISMAR_API std::string_view name(RateBasis basis);
[[nodiscard]] BISMAR_API std::optional<RouteKind> route_kind(std::string_view name);
[[nodiscard]] BISMAR_API std::optional<RateBasis> rate_basis(std::string_view name);

/// A primary way of making the part, a treatment, or a joining process, with its cost model and
/// what it takes and leaves.
///
/// Tooling and rate hold at the reference mass m_ref and go with the part's mass m, both clamped to
/// the ends of their range r (g is its geometric mean):
///
///     tooling = clamp(g (m / m_ref)^tooling_mass_exponent, r),  rate = clamp(g (m_ref /
///     m)^rate_mass_exponent, r)
///
/// Indicative figures of textbook order; every field says what was read from the table.
struct Route {
  std::string id;
  std::string title;
  RouteKind kind = RouteKind::primary;
  std::vector<std::string> classes;  ///< Material classes it serves.
  std::vector<std::string> takes;    ///< Forms of material it starts from.
  /// One of these must be among the material's processes; empty = open to its classes and forms.
  std::vector<std::string> process_words;
  /// solid, tube, cored tube, open section, welded tube, flat, rectangle, cup, stock (a bought size
  /// unchanged), join, treatment, finish.
  std::vector<std::string> leaves;
  std::string follows;  ///< Route that must come before, or empty.
  /// Conditions whose strength this step sets anew, so that hot shaping before it loses nothing: a
  /// word holds for every condition that contains it at the start of a word ("T6" for "T6, bar" and
  /// "T651", not for "QT650"); see `restores`. Treatments have them, and the primary routes that
  /// quench or cool in control by themselves.
  std::vector<std::string> restores;
  Range tooling_cost;  ///< [currency] per tool set, at the reference mass.
  Range rate;          ///< [1/s] parts, [m/s] or [kg/s] by basis, at that mass.
  RateBasis rate_basis = RateBasis::part;
  std::optional<double> reference_mass;  ///< [kg], or [kg/m] where the rate is in metres.
  double tooling_mass_exponent = 0.0;
  double rate_mass_exponent = 0.0;
  double overhead = 0.0;            ///< Labour and other overhead [currency/s].
  double capital = 0.0;             ///< [currency]
  double load_factor = 1.0;         ///< Fraction of the calendar time that the equipment is used.
  double write_off = 0.0;           ///< [s] of calendar time: years of 8760 h.
  double scrap = 0.0;               ///< Fraction of the material.
  std::optional<double> tool_life;  ///< Parts per tool set; absent = one set for ever.
  double setup_time = 0.0;          ///< [s] per batch.
  double setup_cost = 0.0;          ///< [currency] per batch; minimum charge for treatments.
  double min_order = 0.0;           ///< [kg], 0 = none.
  double mass_min = 0.0;            ///< Of one part [kg].
  double mass_max = 0.0;            ///< [kg]
  double section_min = 0.0;         ///< Least wall or thickness [m].
  double section_max = 0.0;         ///< Largest [m].
  std::map<std::string, double, std::less<>> min_wall_by_class;  ///< [m], overrides section_min.
  std::map<std::string, double, std::less<>> max_wall_by_class;  ///< [m], overrides section_max.
  Range economic_batch;            ///< Advice: cost counts it already.
  Range tolerance;                 ///< On a dimension [m].
  std::optional<Range> roughness;  ///< Ra [m].
  std::string status;              ///< "indicative" for every figure of the starter table.
  std::string evidence;            ///< What the figures rest on.
  std::string notes;
  std::string table;
  std::size_t line = 0;
};

/// Whether this step sets anew the strength of a material of this class in this condition: the
/// route serves the class, and one of its words stands in the condition, letter by letter, behind
/// no letter or digit (ASCII).
[[nodiscard]] BISMAR_API bool restores(const Route& route,
                                       std::string_view material_class,
                                       std::string_view condition);

/// A coating or plating, costed per area or mass of the part.
struct Finish {
  std::string id;
  std::string title;
  std::string standard;
  std::vector<std::string> classes;
  std::vector<std::string> process_words;  ///< Empty = open to every material of the classes.
  bool per_area = true;                    ///< Cost basis: coated area, otherwise mass of the part.
  std::optional<Range> cost_per_area;      ///< [currency/m^2]; present where the basis is area.
  std::optional<Range> cost_per_mass;      ///< [currency/kg]; present where the basis is mass.
  double minimum_lot = 0.0;                ///< [currency] per batch.
  std::optional<Range> thickness;          ///< Of the layer [m].
  std::optional<Range> added_mass;         ///< [kg/m^2]
  std::map<std::string, Rating, std::less<>>
      corrosion_after;  ///< Medium -> rating; absent = the material's own.
  std::optional<double> service_temperature_max;  ///< [K]
  std::optional<double> fatigue_factor;           ///< On the endurance limit.
  std::string limits;
  std::string notes;
  std::string status;
  std::string evidence;
  std::string table;
  std::size_t line = 0;
};

/// A cutting, drilling, welding or inspection step. Cost of one unit: time x rate + consumables,
/// and the set-up once a batch.
struct Operation {
  std::string id;
  std::string title;
  std::string unit;  ///< cut, hole, m, piece, part, ...
  std::vector<std::string> classes;
  double setup_time = 0.0;    ///< [s] per batch.
  Range time;                 ///< [s] per unit.
  Range rate;                 ///< [currency/s]
  Range consumables;          ///< [currency] per unit.
  std::string time_rule;      ///< How the time goes with size, in words.
  std::string strength_note;  ///< What it does to strength or fatigue, in words.
  std::string status;
  std::string evidence;
  std::string table;
  std::size_t line = 0;
};

// The three readers take units of the table's own choice in the headers, columns in any order, and
// further columns of the table's own; a header that looks like one of theirs with a slip of the pen
// is a fault. data/README.md lists the columns. They throw bismar::Error with every fault of the
// table at file:row:column: table_unreadable, table_malformed, column_missing, cell_invalid,
// duplicate (an id twice) and those named below.

/// Reads primary routes, treatments and joining processes.
/// @throws bismar::Error  also: missing: no rate in the column of its basis; conflict: rates of two
///   bases, labour and other overhead that do not add up to the overhead (0.5 %), a wall of a class
///   that the route does not serve, a largest wall below the least, a route that follows itself;
///   unknown_name: `follows` names no route of the table.
[[nodiscard]] BISMAR_API std::vector<Route> read_routes(const std::string& path,
                                                        const TableFormat& format = {});

/// Reads finishes.
/// @throws bismar::Error  also: missing: no cost in the column of its basis ("none" may leave it
/// out).
[[nodiscard]] BISMAR_API std::vector<Finish> read_finishes(const std::string& path,
                                                           const TableFormat& format = {});

/// Reads operations.
[[nodiscard]] BISMAR_API std::vector<Operation> read_operations(const std::string& path,
                                                                const TableFormat& format = {});

}  // namespace bismar
