// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"

#include <algorithm>
#include <array>

namespace bismar::test {

namespace {

constexpr double MPa = 1e6;
constexpr double GPa = 1e9;
constexpr double hour = 3600.0;

MaterialTableBuilder::Row row(std::string id,
                              std::string material_class,
                              double density,
                              double E,
                              double yield,
                              double price) {
  MaterialTableBuilder::Row out;
  out.info.id = std::move(id);
  out.info.name = out.info.id;
  out.info.material_class = std::move(material_class);
  out.info.group = "test";
  out.info.forms = {"bar", "forging"};
  out.info.processes = {"machining", "sawing", "hot forging", "quench and temper", "painting"};
  out.info.basis = Basis::minimum;
  out.info.corrosion = {{"fresh water", Rating::fair}};
  out.values = {{Property::density, {density, density}},
                {Property::youngs_modulus, {E, E}},
                {Property::shear_modulus, {E / 2.6, E / 2.6}},
                {Property::yield_strength, {yield, yield}},
                {Property::elongation, {0.12, 0.12}},
                {Property::price, {price, price}}};
  return out;
}

Route route(std::string id, std::vector<std::string> takes, std::string word, std::string leaves) {
  Route out;
  out.id = std::move(id);
  out.title = out.id;
  out.classes = {"steel", "aluminium"};
  out.takes = std::move(takes);
  out.process_words = {std::move(word)};
  out.leaves = {std::move(leaves)};
  out.mass_min = 0.001;
  out.mass_max = 1000.0;
  out.section_min = 0.5e-3;
  out.section_max = 0.5;
  out.load_factor = 0.5;
  out.write_off = 5.0 * 8760.0 * hour;
  return out;
}

std::vector<Route> routes() {
  Route forging = route("forging", {"bar"}, "hot forging", "solid");
  forging.tooling_cost = {2000.0, 8000.0};     // geometric mean 4000
  forging.rate = {50.0 / hour, 200.0 / hour};  // geometric mean 100 an hour
  forging.reference_mass = 1.0;
  forging.tooling_mass_exponent = 0.5;
  forging.rate_mass_exponent = 0.5;
  forging.overhead = 90.0 / hour;
  forging.capital = 438000.0;  // over 0.5 x 43,800 h: 20 an hour
  forging.scrap = 0.2;
  forging.setup_cost = 200.0;

  Route machining = route("machining", {"bar"}, "machining", "solid");
  machining.tooling_cost = {100.0, 100.0};
  machining.rate = {4.0 / hour, 9.0 / hour};
  machining.overhead = 60.0 / hour;

  Route sawing = route("sawing", {"bar", "tube"}, "sawing", "stock");
  sawing.rate = {60.0 / hour, 60.0 / hour};
  sawing.overhead = 30.0 / hour;

  Route temper = route("temper", {"bar", "forging"}, "quench and temper", "treatment");
  temper.kind = RouteKind::treatment;
  temper.rate = {100.0 / hour, 100.0 / hour};  // kilograms
  temper.rate_basis = RateBasis::kilogram;
  temper.overhead = 50.0 / hour;
  temper.scrap = 0.02;
  temper.setup_cost = 100.0;
  temper.restores = {"quenched and tempered"};
  return {forging, machining, sawing, temper};
}

StockItem bar(double diameter) {
  StockItem item;
  item.id = "bar-" + std::to_string(static_cast<int>(diameter * 1e3 + 0.5));
  item.designation = "bar " + std::to_string(static_cast<int>(diameter * 1e3 + 0.5));
  item.section = solid_round(diameter);
  item.classes = {"steel", "aluminium"};
  item.forms = {"bar"};
  item.lengths = {3.0, 6.0};
  return item;
}

StockList bars(const std::vector<double>& diameters) {
  StockList list;
  list.id = "bars";
  list.title = "round bars";
  list.family = SectionFamily::solid_round;
  for (const double d : diameters) {
    list.items.push_back(bar(d));
  }
  return list;
}

Finish paint() {
  Finish out;
  out.id = "paint";
  out.title = "paint";
  out.classes = {"steel", "aluminium"};
  out.process_words = {"painting"};
  out.cost_per_area = Range{16.0, 25.0};  // geometric mean 20
  out.minimum_lot = 50.0;
  out.added_mass = Range{0.1, 0.3};
  out.corrosion_after = {{"fresh water", Rating::good}};
  return out;
}

template <class T>
const T& any_of(const std::vector<T>& values, std::mt19937& random) {
  return values[std::uniform_int_distribution<std::size_t>(0, values.size() - 1)(random)];
}

MaterialTable table_of(std::vector<MaterialTableBuilder::Row> rows) {
  MaterialTableBuilder builder("test");
  for (auto& one : rows) {
    builder.add(std::move(one));
  }
  return builder.build();
}

/// The rows that a table was made from, so that it can be made anew in another way.
std::vector<MaterialTableBuilder::Row> rows_of(const MaterialTable& table, double price_factor) {
  std::vector<MaterialTableBuilder::Row> out;
  for (std::size_t m = 0; m < table.size(); ++m) {
    for (const auto& step : table.steps(m)) {
      MaterialTableBuilder::Row one;
      one.info = table.info(m);
      one.above = step.above;
      one.up_to = step.up_to;
      if (!(step.up_to < 1e3)) {
        one.up_to.reset();
      }
      for (const auto& property : properties()) {
        if (auto value = table.value(property.property, step.row)) {
          if (property.property == Property::price) {
            value->low *= price_factor;
            value->high *= price_factor;
          }
          one.values[property.property] = *value;
        }
      }
      out.push_back(std::move(one));
    }
  }
  return out;
}

}  // namespace

Catalogue small_catalogue() {
  Catalogue out;
  auto tempered = row("steel-b", "steel", 7850.0, 210.0 * GPa, 700.0 * MPa, 2.0);
  tempered.info.condition = "quenched and tempered";
  out.materials = table_of({row("steel-a", "steel", 7850.0, 210.0 * GPa, 300.0 * MPa, 1.0),
                            tempered,
                            row("alu-a", "aluminium", 2700.0, 70.0 * GPa, 200.0 * MPa, 4.0)});
  out.routes = routes();
  out.stock = {bars({0.010, 0.012, 0.016, 0.020, 0.025, 0.030, 0.036, 0.040, 0.050})};
  out.finishes = {paint()};
  Operation drill;
  drill.id = "drill";
  drill.title = "drilling a hole";
  drill.unit = "hole";
  drill.classes = {"steel", "aluminium"};
  drill.setup_time = 600.0;
  drill.time = {60.0, 60.0};
  drill.rate = {60.0 / hour, 60.0 / hour};
  drill.consumables = {0.1, 0.1};
  out.operations = {drill};
  return out;
}

Part small_lever() {
  Part part;
  part.name = "lever";
  part.quantity = 1000.0;
  part.body.length = 0.3;
  part.body.shapes = {round()};
  part.body.load_cases = {cantilever({force(655.0, 0.3)})};
  return part;
}

Catalogue random_catalogue(std::mt19937& random, std::size_t materials) {
  Catalogue out = small_catalogue();
  std::vector<MaterialTableBuilder::Row> rows;
  for (std::size_t m = 0; m < materials; ++m) {
    const bool steel = any_of<int>({0, 1}, random) == 1;
    const std::string id = "m" + std::to_string(m);
    const double density = any_of<double>({2700.0, 4500.0, 7850.0}, random);
    const double modulus = any_of<double>({70.0, 110.0, 210.0}, random) * GPa;
    const double yield = any_of<double>({150.0, 300.0, 600.0, 900.0}, random) * MPa;
    const double price = any_of<double>({1.0, 2.0, 4.0, 20.0}, random);
    auto one = row(id, steel ? "steel" : "aluminium", density, modulus, yield, price);
    one.info.condition = any_of<std::string>({"normalised", "quenched and tempered"}, random);
    one.values[Property::elongation] = {0.03, 0.2};
    if (any_of<int>({0, 1, 2}, random) == 0) {
      // Strength that falls, or rises, with the thickness.
      auto thick = one;
      one.up_to = any_of<double>({0.016, 0.025}, random);
      thick.up_to = any_of<double>({0.04, 0.1}, random);
      const double ratio = any_of<double>({0.8, 1.25}, random);
      thick.values[Property::yield_strength] = {yield * ratio, yield * ratio};
      rows.push_back(thick);
    }
    rows.push_back(std::move(one));
  }
  out.materials = table_of(std::move(rows));
  return out;
}

Part random_part(std::mt19937& random) {
  Part part = small_lever();
  part.quantity = any_of<double>({1.0, 30.0, 1000.0, 50000.0}, random);
  part.body.length = any_of<double>({0.1, 0.3, 0.8}, random);
  part.body.shapes = {
      round({.height_max = 0.08}),
      ellipse({.height_to_width = 1.25, .height_max = 0.08}),
      rectangle({.height_to_width = any_of<double>({0.5, 1.0, 2.0}, random), .height_max = 0.1})};
  part.body.stock = {"bars"};
  const double load = any_of<double>({50.0, 500.0, 2000.0}, random);
  switch (any_of<int>({0, 1, 2}, random)) {
    case 0:
      part.body.load_cases = {cantilever({force(load, part.body.length)})};
      break;
    case 1:
      part.body.load_cases = {pinned_pinned({axial(-20.0 * load)})};
      break;
    default:
      part.body.load_cases = {
          cantilever({force(load, part.body.length), torque(0.1 * load, part.body.length)}),
          pinned_pinned({distributed(load, load, 0.0, part.body.length), axial(5.0 * load)},
                        "second")};
  }
  if (any_of<int>({0, 1}, random) == 1) {
    part.limits.deflection = part.body.length / any_of<double>({30.0, 200.0}, random);
  }
  if (any_of<int>({0, 1}, random) == 1) {
    part.limits.mass = any_of<double>({0.2, 1.0, 5.0}, random);
  }
  if (any_of<int>({0, 1}, random) == 1) {
    part.limits.cost = any_of<double>({5.0, 20.0, 200.0}, random);
  }
  part.limits.height = any_of<double>({0.03, 0.06, 0.2}, random);
  part.finishes = {"none", "paint"};
  return part;
}

Catalogue shuffled(const Catalogue& catalogue, std::mt19937& random) {
  Catalogue out = catalogue;
  auto rows = rows_of(catalogue.materials, 1.0);
  std::shuffle(rows.begin(), rows.end(), random);
  out.materials = table_of(std::move(rows));
  std::shuffle(out.routes.begin(), out.routes.end(), random);
  std::shuffle(out.finishes.begin(), out.finishes.end(), random);
  for (auto& list : out.stock) {
    std::shuffle(list.items.begin(), list.items.end(), random);
  }
  return out;
}

Catalogue in_other_currency(const Catalogue& catalogue, double factor) {
  Catalogue out = catalogue;
  out.materials = table_of(rows_of(catalogue.materials, factor));
  const auto times = [factor](Range& range) {
    range.low *= factor;
    range.high *= factor;
  };
  for (auto& route : out.routes) {
    times(route.tooling_cost);
    route.overhead *= factor;
    route.capital *= factor;
    route.setup_cost *= factor;
  }
  for (auto& finish : out.finishes) {
    if (finish.cost_per_area) {
      times(*finish.cost_per_area);
    }
    finish.minimum_lot *= factor;
  }
  for (auto& operation : out.operations) {
    times(operation.rate);
    times(operation.consumables);
  }
  return out;
}

const Catalogue& starter() {
  static const Catalogue catalogue = read_catalogue(BISMAR_TEST_DATA_DIR);
  return catalogue;
}

}  // namespace bismar::test
