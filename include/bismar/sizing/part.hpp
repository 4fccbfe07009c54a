// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/export.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/member.hpp>

#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// Which values a free size may take.
struct Sizes {
  enum class Kind : std::uint8_t { continuous, step, series, list };
  Kind kind = Kind::continuous;
  double step = 0.0;                ///< [m], multiples of it.
  std::string series = {};          ///< "R10", "R20", ...: preferred numbers in millimetres.
  std::vector<double> values = {};  ///< [m]

  friend bool operator==(const Sizes&, const Sizes&) = default;
  [[nodiscard]] static Sizes any() { return {}; }
  [[nodiscard]] static Sizes multiples_of(double step) { return {Kind::step, step, {}, {}}; }
  [[nodiscard]] static Sizes preferred(std::string series) {
    return {Kind::series, 0.0, std::move(series), {}};
  }
  [[nodiscard]] static Sizes of(std::vector<double> values) {
    return {Kind::list, 0.0, {}, std::move(values)};
  }
};

/// A ratio of two dimensions of a shape: one number, or a range inside which the sizing is free.
struct Ratio {
  double low = 0.0;
  double high = 0.0;
  // Implicit: a plain number is the usual case.
  constexpr Ratio(double value) : low(value), high(value) {}  // NOLINT(google-explicit-constructor)
  constexpr Ratio(double from, double to) : low(from), high(to) {}
  [[nodiscard]] constexpr bool is_fixed() const { return low == high; }
  friend bool operator==(const Ratio&, const Ratio&) = default;
};

/// A parametric shape. Its height (diameter, side, width across flats) is free; the other
/// dimensions follow by ratios, or are free too: a ratio that is a range is free inside it, and one
/// that is left out where the shape has one is free inside default_ratio(). Radii left out are
/// zero.
struct Shape {
  SectionFamily family = SectionFamily::solid_round;
  std::optional<Ratio> height_to_width = {};         ///< h/b: all but round, square and hexagon.
  std::optional<Ratio> wall_to_height = {};          ///< t/h (t/d): tubes; both legs of an angle.
  std::optional<Ratio> web_to_height = {};           ///< t_w/h: I, channel, T.
  std::optional<Ratio> flange_to_height = {};        ///< t_f/h: I, channel, T.
  std::optional<double> root_radius_to_height = {};  ///< r/h: I, channel, T, angle.
  /// Corners of a polygon and of its holes, any scale and origin: the size is its height along z.
  std::vector<SectionPoint> outline = {};
  std::vector<std::vector<SectionPoint>> holes = {};
  double height_min = 4e-3;  ///< [m]
  double height_max = 0.5;   ///< [m]
  Sizes sizes = {};
  friend bool operator==(const Shape&, const Shape&) = default;
};

/// Options of the short forms below.
struct ShapeOptions {
  std::optional<Ratio> height_to_width = {};
  std::optional<Ratio> wall_to_height = {};
  std::optional<Ratio> web_to_height = {};
  std::optional<Ratio> flange_to_height = {};
  std::optional<double> root_radius_to_height = {};
  double height_min = 4e-3;  ///< [m]
  double height_max = 0.5;   ///< [m]
  Sizes sizes = {};
};
[[nodiscard]] BISMAR_API Shape round(const ShapeOptions& options = {});
[[nodiscard]] BISMAR_API Shape square(const ShapeOptions& options = {});
[[nodiscard]] BISMAR_API Shape rectangle(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape ellipse(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape round_tube(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape rectangular_tube(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape hexagon(const ShapeOptions& options = {});
[[nodiscard]] BISMAR_API Shape elliptical_tube(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape i_section(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape channel(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape tee(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape angle(const ShapeOptions& options);
[[nodiscard]] BISMAR_API Shape polygon_shape(std::vector<SectionPoint> outline,
                                             std::vector<std::vector<SectionPoint>> holes = {},
                                             const ShapeOptions& options = {});

/// A dimension of a shape that the sizing chooses beside the height.
struct FreeDimension {
  std::string_view name;  ///< As dimensions(family) calls it: "width", "wall", "web", "flange".
  Ratio to_height;        ///< Its range over the height.
};
/// The free dimensions of a shape, in the order of dimensions(family); none where every ratio is
/// fixed.
[[nodiscard]] BISMAR_API std::vector<FreeDimension> free_dimensions(const Shape& shape);

/// The range of a ratio that a shape leaves out, by its key ("height_to_width", ...): wide enough
/// for usual sections, engineering defaults from memory.
///
///     height_to_width   0.2 .. 5;  I, channel 1 .. 5;  T, angle 0.5 .. 2
///     wall_to_height    0.005 .. 0.45 (round and elliptical tube), 0.005 .. 0.25 (rectangular),
///                       0.02 .. 0.2 (angle)
///     web_to_height     0.005 .. 0.1;  flange_to_height  0.005 .. 0.15
[[nodiscard]] BISMAR_API Ratio default_ratio(SectionFamily family, std::string_view key);

/// A prismatic member: tie, strut, beam, shaft, or all at once.
struct Member {
  double length = 0.0;             ///< L [m]
  std::vector<Shape> shapes = {};  ///< Parametric shapes to try.
  std::vector<std::string> stock =
      {};  ///< Stock lists to try, by id; "all" for every list of sections.
  std::vector<LoadCase> load_cases = {};
  MemberDetails details = {};  ///< Holes, notches, welds, cracks, surface, carried masses.
};

/// A bound on a property of the material.
struct PropertyLimit {
  std::string property = {};            ///< A property's name, or the name of an extra column.
  std::optional<double> at_least = {};  ///< SI (for an extra column: SI of its own unit).
  std::optional<double> at_most = {};
};

/// What the design must stay within.
struct Limits {
  std::optional<double> deflection = {};  ///< [m]
  bool shear_deflection = false;          ///< Shear counts in deflection and frequency.
  std::optional<double> rotation = {};    ///< Slope of the axis [rad]
  std::optional<double> twist = {};       ///< [rad]
  std::optional<double> frequency = {};   ///< Least first natural frequency [Hz].
  std::optional<double> elongation = {};  ///< Change of length by heat and axial force [m].
  std::optional<double> height = {};      ///< Envelope [m]
  std::optional<double> width = {};       ///< Envelope [m]
  std::optional<double> wall = {};        ///< Least wall [m]
  double slenderness = 200.0;             ///< K L / i of a member in compression.
  ColumnMethod column_method = ColumnMethod::curves;
  bool lateral_restraint = false;        ///< Held across: no lateral-torsional buckling.
  std::optional<double> mass = {};       ///< Cap [kg]
  std::optional<double> cost = {};       ///< Cap [currency]
  std::vector<std::string> routes = {};  ///< Only these routes; empty = every primary route.
  std::vector<std::string> forbidden_routes = {};
  std::vector<std::string> processes =
      {};  ///< Process words that the material must allow, all of them.
  std::vector<std::string> forms = {};  ///< The material must be sold in one of these; empty = any.
  std::vector<std::string> classes = {};              ///< Only these material classes; empty = any.
  std::vector<std::string> materials = {};            ///< Only these materials, by id; empty = any.
  std::vector<std::string> forbidden_materials = {};  ///< Material ids or classes.
  std::vector<PropertyLimit> properties = {};
  std::optional<std::string> medium =
      {};  ///< "fresh water", "sea water": corrosion is checked there ...
  Rating corrosion_at_least = Rating::good;  ///< ... by the material's rating or its finish's.
  std::optional<double> temperature = {};    ///< Service temperature [K].
  bool allow_brittle = false;                ///< Admits rows marked "on request" that are brittle.
  bool allow_hard = false;  ///< Admits rows marked "on request" that are very hard.
};

/// A step that every candidate gets, so many units of it.
struct OperationUse {
  std::string operation = {};  ///< Id in the catalogue.
  double units = 1.0;          ///< Cuts, holes, metres ... a part.
};

/// Climate of timber (EN 1995-1-1, 2.3.1.3).
enum class ServiceClass : std::uint8_t { one = 1, two = 2 };

/// What is to be sized.
struct Part {
  std::string name = "part";
  double quantity = 1.0;             ///< Parts made over the life of the tooling.
  std::optional<double> batch = {};  ///< Parts a batch; absent = the whole quantity at once.
  Member body = {};
  Limits limits = {};
  std::vector<std::string> finishes = {"none"};  ///< Finishes to try, by id.
  std::vector<OperationUse> operations = {};
  ServiceClass service_class = ServiceClass::one;
};

/// What to do where a needed property is missing.
enum class Missing : std::uint8_t {
  undecided,     ///< Name it and leave the candidate undecided (default).
  exclude,       ///< Count the candidate as excluded.
  class_median,  ///< Take the median of the material's class and flag every use.
};

/// How much of what is not on or near the front is examined.
enum class Explain : std::uint8_t {
  front,  ///< What cannot come near the front is skipped: "not better", its feasibility unknown.
  full,   ///< Every candidate is solved.
};

/// How a study reads ranges, what it keeps, and what it shows.
struct Settings {
  Missing missing = Missing::undecided;
  std::map<Property, RangeEnd> range_ends = {};  ///< Overrides of the properties' default ends.
  RangeEnd route_end = RangeEnd::geometric_mid;  ///< Of route, finish and operation ranges.
  /// How far the search of shapes with several free sizes goes, and what is examined (see front()).
  double epsilon = 1e-3;  ///< 0 < epsilon <= 0.1.
  double delta = 1e-6;    ///< 0 < delta <= 0.01.
  Explain explain = Explain::front;
  double near = 0.05;                 ///< beta: designs within this of the front are kept.
  double fold = 0.02;                 ///< Designs this close are shown under one representative.
  bool doubtful_sizes = false;        ///< Offer stock sizes marked doubtful.
  double kerf = 3e-3;                 ///< Saw cut [m].
  double machining_allowance = 2e-3;  ///< Added to each outside dimension of a machined part [m].
  double scrap_credit = 0.0;          ///< Fraction of the price at which scrap metal is sold back.
};

/// Checks a part against a catalogue without solving it.
/// @throws bismar::Error  every fault: names that the catalogue does not have (with the nearest
/// one),
///   impossible numbers, ratios that make no section anywhere, contradictory limits.
BISMAR_API void validate(const Part& part,
                         const Catalogue& catalogue,
                         const Settings& settings = {});

}  // namespace bismar
