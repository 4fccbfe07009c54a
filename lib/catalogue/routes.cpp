// SPDX-License-Identifier: MIT
#include <bismar/catalogue/routes.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/checked_cells.hpp"
#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::quoted;

constexpr std::array<std::string_view, 4> kind_words = {
    "primary", "joining", "treatment", "surface"};
constexpr std::array<std::string_view, 5> basis_words = {
    "part", "metre", "kilogram", "spot", "assembly"};
constexpr std::array<std::string_view, 12> leaves_words = {"solid",
                                                           "tube",
                                                           "cored tube",
                                                           "open section",
                                                           "welded tube",
                                                           "flat",
                                                           "rectangle",
                                                           "cup",
                                                           "stock",
                                                           "join",
                                                           "treatment",
                                                           "finish"};
/// Labour and other overhead make up the overhead, within the rounding of a table.
constexpr double overhead_tolerance = 5e-3;

template <class Enum, std::size_t count>
std::optional<Enum> enum_of(const std::array<std::string_view, count>& words,
                            std::string_view word) {
  const auto found = std::find(words.begin(), words.end(), word);
  if (found == words.end()) {
    return std::nullopt;
  }
  return static_cast<Enum>(found - words.begin());
}

bool is_letter_or_digit(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9');
}

/// Whether the text stands in the condition at the start of a word: "T6" in "T6, bar" and "T651",
/// not in "QT650".
bool starts_a_word(std::string_view condition, std::string_view text) {
  for (std::size_t at = condition.find(text); at != std::string_view::npos;
       at = condition.find(text, at + 1)) {
    if (at == 0 || !is_letter_or_digit(condition[at - 1])) {
      return true;
    }
  }
  return false;
}

class RouteReader {
 public:
  RouteReader(TableReader& table, const TableFormat& format)
      : table_(table), format_(format), ids_(text("id", Presence::required)) {
    table.finish_columns();
  }

  std::vector<Route> read(const std::string& path) {
    std::vector<Route> routes;
    routes.reserve(table_.rows());
    for (std::size_t row = 0; row < table_.rows(); ++row) {
      routes.push_back(route(row, path));
    }
    check_order(routes);
    return routes;
  }

 private:
  catalogue::Column text(std::string_view name, Presence presence = Presence::optional) {
    return table_.text_column(name, presence);
  }
  catalogue::NumberColumn number(std::string_view name,
                                 QuantityKind kind,
                                 Presence presence = Presence::optional) {
    return table_.number_column(name, kind, presence);
  }

  Route route(std::size_t row, const std::string& path) {
    Route route;
    route.id = ids_.read(table_, row);
    route.title = table_.text(row, title_);
    if (route.title.empty()) {
      route.title = route.id;
    }
    route.kind = enum_cell<RouteKind>(row, kind_, kind_words);
    route.rate_basis = enum_cell<RateBasis>(row, basis_, basis_words);
    route.classes = table_.required_list(row, classes_);
    route.takes = table_.required_list(row, takes_);
    route.process_words = table_.list(row, process_words_);
    read_leaves(row, route);
    route.follows = table_.text(row, follows_);
    route.restores = table_.list(row, restores_);
    read_cost(row, route);
    read_rate(row, route);
    read_limits(row, route);
    route.status = table_.text(row, status_);
    route.evidence = table_.text(row, evidence_);
    route.notes = table_.text(row, notes_);
    route.table = path;
    route.line = table_.line(row);
    return route;
  }

  /// The word of a required cell; after a fault the first one.
  template <class Enum, std::size_t count>
  Enum enum_cell(std::size_t row,
                 const catalogue::Column& column,
                 const std::array<std::string_view, count>& words) {
    if (table_.required_text(row, column).empty()) {
      return Enum{};
    }
    return static_cast<Enum>(table_.word(row, column, words).value_or(0));
  }

  void read_leaves(std::size_t row, Route& route) {
    route.leaves = table_.required_list(row, leaves_);
    for (const std::string& word : route.leaves) {
      if (std::find(leaves_words.begin(), leaves_words.end(), word) != leaves_words.end()) {
        continue;
      }
      std::string allowed;
      for (const std::string_view known : leaves_words) {
        allowed += (allowed.empty() ? "" : ", ") + std::string(known);
      }
      table_.add_fault(row,
                       leaves_.index.value(),
                       Code::cell_invalid,
                       "a route cannot leave " + quoted(word) + ": use " + allowed + "." +
                           did_you_mean(word, leaves_words));
    }
  }

  void read_cost(std::size_t row, Route& route) {
    using namespace catalogue;
    route.tooling_cost = required_range_in(table_, row, tooling_cost_, not_negative);
    route.tool_life = value_in(table_, row, tool_life_, positive);
    route.tooling_mass_exponent =
        value_in(table_, row, tooling_exponent_, not_negative).value_or(0.0);
    route.overhead = required_value_in(table_, row, overhead_, not_negative);
    check_overhead(row, route.overhead);
    route.capital = value_in(table_, row, capital_, not_negative).value_or(0.0);
    route.load_factor = value_in(table_, row, load_factor_, positive_fraction).value_or(1.0);
    route.write_off = value_in(table_, row, write_off_, positive).value_or(0.0);
    if (route.capital > 0.0 && route.write_off == 0.0 && capital_.is_present()) {
      table_.add_fault(row,
                       capital_.index().value(),
                       Code::missing,
                       "capital needs the time in which it is written off: fill the column "
                       "\"write-off\".");
    }
    route.scrap = value_in(table_, row, scrap_, below_one).value_or(0.0);
    route.setup_time = value_in(table_, row, setup_time_, not_negative).value_or(0.0);
    route.setup_cost = value_in(table_, row, setup_cost_, not_negative).value_or(0.0);
    route.min_order = value_in(table_, row, least_order_, not_negative).value_or(0.0);
  }

  void check_overhead(std::size_t row, double overhead) {
    const std::optional<double> labour =
        catalogue::value_in(table_, row, labour_, catalogue::not_negative);
    const std::optional<double> other =
        catalogue::value_in(table_, row, other_overhead_, catalogue::not_negative);
    if (!labour || !other) {
      return;
    }
    if (std::abs(*labour + *other - overhead) <= overhead_tolerance * overhead) {
      return;
    }
    table_.add_fault(row,
                     overhead_.index().value_or(0),
                     Code::conflict,
                     "the overhead must be labour and other overhead together: correct one of the "
                     "three.");
  }

  /// The rate stands in the column of its basis, the other two are empty; so does the reference
  /// mass.
  void read_rate(std::size_t row, Route& route) {
    const bool by_metre = route.rate_basis == RateBasis::metre;
    const bool by_mass = route.rate_basis == RateBasis::kilogram;
    const catalogue::NumberColumn& own = by_metre  ? length_rate_
                                         : by_mass ? mass_rate_
                                                   : part_rate_;
    for (const catalogue::NumberColumn* column : {&part_rate_, &length_rate_, &mass_rate_}) {
      if (column != &own) {
        must_be_empty(row, *column);
      }
    }
    if (own.is_present()) {
      route.rate = catalogue::required_range_in(table_, row, own, catalogue::positive);
    } else if (basis_.is_present()) {
      table_.add_fault(row,
                       *basis_.index,
                       Code::missing,
                       "there is no column with a rate of this basis: add " +
                           std::string(by_metre  ? "\"length rate [m/h]\""
                                       : by_mass ? "\"mass rate [kg/h]\""
                                                 : "\"part rate [parts/h]\"") +
                           ".");
    }
    const catalogue::NumberColumn& mass = by_metre ? mass_per_metre_ : reference_mass_;
    must_be_empty(row, by_metre ? reference_mass_ : mass_per_metre_);
    route.reference_mass = catalogue::value_in(table_, row, mass, catalogue::positive);
    route.rate_mass_exponent =
        catalogue::value_in(table_, row, rate_exponent_, catalogue::not_negative).value_or(0.0);
    check_reference(row, route);
  }

  void must_be_empty(std::size_t row, const catalogue::NumberColumn& column) {
    if (!column.is_present() || table_.text(row, {column.index()}).empty()) {
      return;
    }
    table_.add_fault(row,
                     column.index().value(),
                     Code::conflict,
                     "the rate basis " + quoted(table_.text(row, basis_)) +
                         " leaves no room for this column: empty the cell or change the basis.");
  }

  /// A mass exponent says how cost goes with mass, which means nothing without the mass to start
  /// at.
  void check_reference(std::size_t row, const Route& route) {
    if (route.reference_mass) {
      return;
    }
    if (route.tooling_mass_exponent == 0.0 && route.rate_mass_exponent == 0.0) {
      return;
    }
    const auto& exponent = route.tooling_mass_exponent != 0.0 ? tooling_exponent_ : rate_exponent_;
    table_.add_fault(row,
                     exponent.index().value(),
                     Code::missing,
                     "an exponent of the mass needs the reference mass at which the figures hold.");
  }

  void read_limits(std::size_t row, Route& route) {
    using namespace catalogue;
    const Range mass = required_range_in(table_, row, mass_, not_negative);
    route.mass_min = mass.low;
    route.mass_max = mass.high;
    const Range wall = required_range_in(table_, row, wall_, not_negative);
    route.section_min = wall.low;
    route.section_max = wall.high;
    route.min_wall_by_class = wall_by_class(row, least_wall_by_class_, route);
    route.max_wall_by_class = wall_by_class(row, largest_wall_by_class_, route);
    check_walls(row, route);
    route.economic_batch = range_in(table_, row, batch_, not_negative).value_or(Range{});
    route.tolerance = range_in(table_, row, tolerance_, not_negative).value_or(Range{});
    route.roughness = range_in(table_, row, roughness_, not_negative);
  }

  std::map<std::string, double, std::less<>> wall_by_class(std::size_t row,
                                                           const catalogue::NumberColumn& column,
                                                           const Route& route) {
    auto walls = catalogue::number_pairs(table_, row, column, format_.decimal);
    for (const auto& entry : walls) {
      if (std::find(route.classes.begin(), route.classes.end(), entry.first) !=
          route.classes.end()) {
        continue;
      }
      table_.add_fault(row,
                       column.index().value(),
                       Code::conflict,
                       "the route does not serve " + quoted(entry.first) +
                           ": add it to the material classes, or take it out here.");
    }
    return walls;
  }

  /// A class whose largest wall is below its least one would silently lose the route.
  void check_walls(std::size_t row, const Route& route) {
    for (const auto& [material_class, largest] : route.max_wall_by_class) {
      const auto own = route.min_wall_by_class.find(material_class);
      const double least = own == route.min_wall_by_class.end() ? route.section_min : own->second;
      if (largest >= least) {
        continue;
      }
      table_.add_fault(row,
                       largest_wall_by_class_.index().value(),
                       Code::conflict,
                       "the largest wall of " + quoted(material_class) +
                           " is below its least wall: correct one of the two.");
    }
  }

  void check_order(const std::vector<Route>& routes) {
    std::vector<std::string_view> ids;
    ids.reserve(routes.size());
    for (const Route& route : routes) {
      ids.emplace_back(route.id);
    }
    for (std::size_t row = 0; row < routes.size(); ++row) {
      const Route& route = routes[row];
      if (route.follows.empty()) {
        continue;
      }
      if (route.follows == route.id) {
        table_.add_fault(row, *follows_.index, Code::conflict, "a route cannot follow itself.");
      } else if (std::find(ids.begin(), ids.end(), route.follows) == ids.end()) {
        table_.add_fault(row,
                         *follows_.index,
                         Code::unknown_name,
                         "no route of this table has the id " + quoted(route.follows) + "." +
                             did_you_mean(route.follows, ids));
      }
    }
  }

  static constexpr catalogue::Bounds positive_fraction{
      .most = 1.0, .above_least = true, .words = "above 0 and at most 1 (100 %)"};
  // A route whose every part is scrap would need endless material.
  static constexpr catalogue::Bounds below_one{.most = 0.99, .words = "from 0 to 0.99 (99 %)"};

  TableReader& table_;
  const TableFormat& format_;
  catalogue::Ids ids_;
  static constexpr Presence needed = Presence::required;
  catalogue::Column title_ = text("title");
  catalogue::Column kind_ = text("kind", needed);
  catalogue::Column classes_ = text("material classes", needed);
  catalogue::Column takes_ = text("takes forms", needed);
  catalogue::Column process_words_ = text("process words");
  catalogue::Column leaves_ = text("leaves", needed);
  catalogue::Column follows_ = text("follows");
  catalogue::Column restores_ = text("restores");
  catalogue::Column basis_ = text("rate basis", needed);
  catalogue::Column status_ = text("status");
  catalogue::Column evidence_ = text("evidence");
  catalogue::Column notes_ = text("notes");
  using Kind = QuantityKind;
  catalogue::NumberColumn tooling_cost_ = number("tooling cost", Kind::money, needed);
  catalogue::NumberColumn tool_life_ = number("tool life", Kind::count);
  catalogue::NumberColumn part_rate_ = number("part rate", Kind::production_rate);
  catalogue::NumberColumn length_rate_ = number("length rate", Kind::length_rate);
  catalogue::NumberColumn mass_rate_ = number("mass rate", Kind::mass_rate);
  catalogue::NumberColumn reference_mass_ = number("reference mass", Kind::mass);
  catalogue::NumberColumn mass_per_metre_ = number("reference mass per metre", Kind::linear_mass);
  catalogue::NumberColumn tooling_exponent_ = number("tooling mass exponent", Kind::ratio);
  catalogue::NumberColumn rate_exponent_ = number("rate mass exponent", Kind::ratio);
  catalogue::NumberColumn overhead_ = number("overhead", Kind::cost_rate, needed);
  catalogue::NumberColumn labour_ = number("labour", Kind::cost_rate);
  catalogue::NumberColumn other_overhead_ = number("other overhead", Kind::cost_rate);
  catalogue::NumberColumn capital_ = number("capital", Kind::money);
  catalogue::NumberColumn load_factor_ = number("load factor", Kind::ratio);
  catalogue::NumberColumn write_off_ = number("write-off", Kind::time);
  catalogue::NumberColumn scrap_ = number("scrap", Kind::ratio);
  catalogue::NumberColumn setup_time_ = number("setup time", Kind::time);
  catalogue::NumberColumn setup_cost_ = number("setup cost", Kind::money);
  catalogue::NumberColumn least_order_ = number("least order", Kind::mass);
  catalogue::NumberColumn mass_ = number("mass", Kind::mass, needed);
  catalogue::NumberColumn wall_ = number("wall", Kind::length, needed);
  catalogue::NumberColumn least_wall_by_class_ = number("least wall by class", Kind::length);
  catalogue::NumberColumn largest_wall_by_class_ = number("largest wall by class", Kind::length);
  catalogue::NumberColumn tolerance_ = number("tolerance", Kind::length);
  catalogue::NumberColumn roughness_ = number("roughness Ra", Kind::length);
  catalogue::NumberColumn batch_ = number("economic batch", Kind::count);
};

}  // namespace

std::string_view name(RouteKind kind) { return kind_words.at(static_cast<std::size_t>(kind)); }
std::string_view name(RateBasis basis) { return basis_words.at(static_cast<std::size_t>(basis)); }
std::optional<RouteKind> route_kind(std::string_view name) {
  return enum_of<RouteKind>(kind_words, name);
}
std::optional<RateBasis> rate_basis(std::string_view name) {
  return enum_of<RateBasis>(basis_words, name);
}

bool restores(const Route& route, std::string_view material_class, std::string_view condition) {
  if (std::find(route.classes.begin(), route.classes.end(), material_class) ==
      route.classes.end()) {
    return false;
  }
  return std::any_of(route.restores.begin(), route.restores.end(), [&](const std::string& word) {
    return starts_a_word(condition, word);
  });
}

std::vector<Route> read_routes(const std::string& path, const TableFormat& format) {
  FaultList faults;
  TableReader table(read_table_file(path), path, format, faults);
  RouteReader reader(table, format);
  catalogue::refuse_misspelt_headers(table, faults);
  catalogue::refuse_other_currency(table, format, faults);
  std::vector<Route> routes = reader.read(path);
  faults.throw_if_any();
  return routes;
}

}  // namespace bismar
