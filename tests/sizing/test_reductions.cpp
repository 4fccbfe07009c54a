// SPDX-License-Identifier: MIT
// What a front must not depend on: reductions, threads, the order of the tables, how much is
// explained. The reference is the same front with every reduction off, and Explain::full, which
// solves every candidate by itself (the definition of the result, front.hpp).
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <optional>
#include <string>
#include <tuple>
#include <utility>
#include <vector>

using namespace bismar;

namespace {

using Stage = FunnelLine::Stage;
using Rows = std::vector<MaterialTableBuilder::Row>;

template <class T>
const T& pick(const std::vector<T>& values, std::mt19937& random) {
  return values[std::uniform_int_distribution<std::size_t>(0, values.size() - 1)(random)];
}

bool chance(double share, std::mt19937& random) {
  return std::uniform_real_distribution<double>(0.0, 1.0)(random) < share;
}

Rows rows_of(const MaterialTable& table) {
  Rows out;
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
        if (const auto value = table.value(property.property, step.row)) {
          one.values[property.property] = *value;
        }
      }
      out.push_back(std::move(one));
    }
  }
  return out;
}

MaterialTable table_of(const Rows& rows) {
  MaterialTableBuilder builder("test");
  for (const auto& one : rows) {
    builder.add(one);
  }
  return builder.build();
}

/// Random materials, some of them equal to another one, some with a value missing or for nothing.
Catalogue hostile_catalogue(std::mt19937& random, std::size_t materials) {
  Catalogue out = test::random_catalogue(random, materials);
  auto rows = rows_of(out.materials);
  Rows twins;
  for (const auto& row : rows) {
    if (row.info.id == "m0" || row.info.id == "m1") {
      twins.push_back(row);
      twins.back().info.id += "-twin";
      twins.back().info.name = twins.back().info.id;
    }
  }
  rows.insert(rows.end(), twins.begin(), twins.end());
  std::map<std::string, std::optional<Property>> gone;
  std::map<std::string, double> service;
  std::map<std::string, bool> gratis;
  for (auto& row : rows) {
    if (!gone.contains(row.info.id)) {
      gone[row.info.id] = std::nullopt;
      if (chance(0.15, random)) {
        gone[row.info.id] = pick<Property>(
            {Property::price, Property::elongation, Property::youngs_modulus}, random);
      }
      gratis[row.info.id] = chance(0.1, random);
      service[row.info.id] = pick<double>({330.0, 360.0, 400.0}, random);
    }
    if (gratis[row.info.id]) {
      row.values[Property::price] = {0.0, 0.0};  // offcuts: the table allows it
    }
    if (const auto property = gone[row.info.id]) {
      row.values.erase(*property);
    }
    const double highest = service[row.info.id];
    row.values[Property::service_temperature_max] = {highest, highest};
    row.values[Property::loaded_temperature_max] = {highest, highest};
  }
  out.materials = table_of(rows);
  return out;
}

/// A part with limits on properties and temperature now and then.
Part hostile_part(std::mt19937& random) {
  Part part = test::random_part(random);
  if (chance(0.3, random)) {
    part.limits.properties.push_back(
        {.property = "yield strength", .at_least = pick<double>({200e6, 500e6}, random)});
  }
  if (chance(0.3, random)) {
    part.limits.properties.push_back({.property = "elongation", .at_least = 0.05});
  }
  if (chance(0.3, random)) {
    part.limits.temperature = 350.0;
  }
  return part;
}

std::map<std::string, std::size_t> lines(const Result& result, Stage stage) {
  std::map<std::string, std::size_t> out;
  for (const auto& line : result.funnel.lines) {
    if (line.stage == stage && line.candidates > 0) {
      out[line.reason] += line.candidates;
    }
  }
  return out;
}

void check_sum(const Result& result) {
  std::size_t sum = 0;
  for (const auto& line : result.funnel.lines) {
    sum += line.candidates;
  }
  CHECK(sum == result.funnel.considered);
}

using Key = std::tuple<std::string, double, FreeSizes, double, double>;
std::vector<Key> keys(const Result& result) {
  std::vector<Key> out;
  for (const auto& one : result.designs) {
    // The place of a stock size in its list is a matter of the table's order.
    out.emplace_back(
        one.id, one.stock_item.empty() ? one.size : 0.0, one.free_sizes, one.mass, one.cost);
  }
  return out;
}

void check_same_counts(const Result& one, const Result& other) {
  CHECK(one.undecided == other.undecided);
  CHECK(one.funnel.considered == other.funnel.considered);
  CHECK(one.funnel.doubtful_sizes == other.funnel.doubtful_sizes);
  CHECK(lines(one, Stage::cannot_exist) == lines(other, Stage::cannot_exist));
  CHECK(lines(one, Stage::undecided) == lines(other, Stage::undecided));
  check_sum(one);
  check_sum(other);
}

void check_same(const Result& one, const Result& other) {
  CHECK(one.front_count == other.front_count);
  CHECK(keys(one) == keys(other));
  CHECK(one.exact == other.exact);
  CHECK(one.notes == other.notes);
  check_same_counts(one, other);
  CHECK(lines(one, Stage::front) == lines(other, Stage::front));
  CHECK(lines(one, Stage::near) == lines(other, Stage::near));
}

bool covers(const Result& one, double mass, double cost, double epsilon) {
  return std::any_of(one.designs.begin(),
                     one.designs.begin() + static_cast<std::ptrdiff_t>(one.front_count),
                     [&](const Design& design) {
                       return design.mass <= (1.0 + epsilon) * mass &&
                              design.cost <= (1.0 + epsilon) * cost;
                     });
}

/// Each front covers the other but for epsilon.
void check_close(const Result& one, const Result& other, double epsilon) {
  const auto covered_by = [&](const Result& a, const Result& b) {
    for (std::size_t i = 0; i < b.front_count; ++i) {
      CAPTURE(b.designs[i].id, b.designs[i].mass, b.designs[i].cost);
      CHECK(covers(a, b.designs[i].mass, b.designs[i].cost, epsilon));
    }
  };
  covered_by(one, other);
  covered_by(other, one);
  check_same_counts(one, other);
}

RunOptions with(Reductions reductions, unsigned threads = 1) {
  RunOptions out;
  out.threads = threads;
  out.reductions = reductions;
  return out;
}

struct Variant {
  std::string name;
  Reductions reductions;
  unsigned threads = 1;
};

/// Those that leave every design as it is, bit for bit.
std::vector<Variant> exact_variants() {
  std::vector<Variant> out = {
      {"no material limits", {.material_limits = false}},
      {"no dominance", {.dominance = false}},
      {"no bounds", {.bounds = false}},
      {"no skipping", {.skipping = false}},
      {"dominance alone", {.material_limits = false, .bounds = false, .skipping = false}},
      {"none of the four",
       {.material_limits = false, .dominance = false, .bounds = false, .skipping = false}}};
  out.push_back({"two threads", {}, 2});
  out.push_back({"five threads", {}, 5});
  return out;
}

/// Everything that the front of a part must not depend on.
void check_all(const Part& part,
               const Catalogue& catalogue,
               const Settings& settings,
               bool free,
               std::mt19937* random) {
  const Result reference = front(part, catalogue, settings);
  for (const auto& variant : exact_variants()) {
    INFO(variant.name);
    check_same(front(part, catalogue, settings, with(variant.reductions, variant.threads)),
               reference);
  }
  Settings full = settings;
  full.explain = Explain::full;
  {
    INFO("explained in full");
    check_same(front(part, catalogue, full), reference);
  }
  if (random != nullptr) {
    INFO("tables in another order");
    check_same(front(part, test::shuffled(catalogue, *random), settings), reference);
  }
  if (free) {
    const std::vector<Variant> loose = {
        {"several points", {.one_point = false}},
        {"all splitting", {.directions = false}},
        {"no reduction", {false, false, false, false, false, false}}};
    for (const auto& variant : loose) {
      INFO(variant.name);
      check_close(
          front(part, catalogue, settings, with(variant.reductions)), reference, settings.epsilon);
    }
  } else {
    INFO("no reduction");
    check_same(front(part, catalogue, settings, with({false, false, false, false, false, false})),
               reference);
  }
}

/// One candidate material beside another that would replace it but for one thing.
struct Pair {
  MaterialTableBuilder::Row better;
  MaterialTableBuilder::Row worse;
  MaterialTableBuilder::Row
      other;  ///< Of another kind and dear: feasible, so that there is a front.
};
Pair pair_of(const Catalogue& catalogue) {
  Pair out;
  for (const auto& row : rows_of(catalogue.materials)) {
    if (row.info.id == "steel-a") {
      out.better = row;
    }
  }
  out.worse = out.better;
  out.better.info.id = out.better.info.name = "better";
  out.worse.info.id = out.worse.info.name = "worse";
  const auto price = out.better.values[Property::price];
  out.worse.values[Property::price] = {1.5 * price.low, 1.5 * price.high};
  out.other = out.better;
  out.other.info.id = out.other.info.name = out.other.info.group = "other";
  for (const Property property :
       {Property::service_temperature_max, Property::loaded_temperature_max}) {
    out.other.values[property] = {400.0, 400.0};
  }
  out.other.values[Property::elongation] = {0.2, 0.2};
  out.other.values[Property::price] = {5.0 * price.low, 5.0 * price.high};
  return out;
}

std::vector<std::string> materials_on(const Result& result) {
  std::vector<std::string> out;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    out.push_back(result.designs[i].material);
  }
  std::sort(out.begin(), out.end());
  out.erase(std::unique(out.begin(), out.end()), out.end());
  return out;
}

}  // namespace

TEST_CASE("fronts of fixed shapes and stock do not depend on reductions or threads or order") {
  std::mt19937 random(4101);
  std::size_t designs = 0;
  std::size_t empty = 0;
  std::size_t undecided = 0;
  for (int turn = 0; turn < 60; ++turn) {
    INFO("round " << turn);
    const auto catalogue = hostile_catalogue(random, 9);
    const auto part = hostile_part(random);
    Settings settings;
    settings.missing = pick<Missing>(
        {Missing::undecided, Missing::undecided, Missing::exclude, Missing::class_median}, random);
    check_all(part, catalogue, settings, false, &random);
    const auto result = front(part, catalogue, settings);
    designs += result.designs.size();
    empty += result.front_count == 0 ? 1U : 0U;
    undecided += result.undecided.size();
  }
  // The rounds must have been of every sort.
  CHECK(designs > 200);
  CHECK(empty > 0);
  CHECK(undecided > 20);
}

TEST_CASE("fronts of free shapes do not depend on reductions or threads or order") {
  // The 25th of these has a bar that is weaker than the next thicker one.
  std::mt19937 random(78);
  std::size_t designs = 0;
  for (int turn = 0; turn < 26; ++turn) {
    INFO("round " << turn);
    const auto catalogue = hostile_catalogue(random, 5);
    auto part = hostile_part(random);
    const double high = 0.08;
    part.body.shapes = pick<std::vector<Shape>>(
        {{rectangle({.height_max = high}), round({.height_max = high})},
         {ellipse({.height_to_width = Ratio(0.5, 2.0), .height_max = high})},
         {rectangle({.height_max = high, .sizes = Sizes::multiples_of(5e-3)})}},
        random);
    check_all(part, catalogue, {.epsilon = 5e-3}, true, &random);
    designs += front(part, catalogue, {.epsilon = 5e-3}).designs.size();
  }
  CHECK(designs > 20);
}

TEST_CASE("fronts from the starter tables do not depend on reductions or threads") {
  Part part = test::small_lever();
  part.limits.deflection = 3e-3;
  part.limits.routes = {
      "extrusion", "machining-from-bar", "laser-cut-plate", "roll-forming", "bar-sawing"};
  part.limits.classes = {"aluminium", "steel"};
  SECTION("fixed shapes") {
    part.body.shapes = {round(),
                        rectangle({.height_to_width = 2.0}),
                        round_tube({.wall_to_height = 0.1}),
                        rectangular_tube({.height_to_width = 1.5, .wall_to_height = 0.05})};
    part.body.stock = {"all"};
    check_all(part, test::starter(), {}, false, nullptr);
  }
  SECTION("free shapes") {
    part.limits.classes = {"aluminium"};
    part.limits.routes = {"extrusion", "laser-cut-plate"};
    part.body.shapes = {round_tube({}), rectangle({})};
    check_all(part, test::starter(), {.epsilon = 1e-2}, true, nullptr);
  }
}

TEST_CASE("a material that fails a limit by itself replaces none that meets it") {
  auto catalogue = test::small_catalogue();
  auto part = test::small_lever();
  auto [better, worse, other] = pair_of(catalogue);
  SECTION("temperature") {
    part.limits.temperature = 350.0;
    for (const Property property :
         {Property::service_temperature_max, Property::loaded_temperature_max}) {
      better.values[property] = {330.0, 330.0};
      worse.values[property] = {400.0, 400.0};
    }
  }
  SECTION("a property") {
    part.limits.properties = {{.property = "elongation", .at_least = 0.15}};
    better.values[Property::elongation] = {0.12, 0.12};
    worse.values[Property::elongation] = {0.2, 0.2};
  }
  catalogue.materials = table_of({better, worse, other});
  for (const auto& variant : exact_variants()) {
    INFO(variant.name);
    const auto result = front(part, catalogue, {}, with(variant.reductions, variant.threads));
    CHECK(materials_on(result) == std::vector<std::string>{"worse"});
  }
}

TEST_CASE(
    "a material that meets a limit in thick pieces alone replaces none that meets it in all") {
  auto catalogue = test::small_catalogue();
  auto part = test::small_lever();
  part.limits.properties = {{.property = "elongation", .at_least = 0.15}};
  auto [better, worse, other] = pair_of(catalogue);
  worse.values[Property::elongation] = {0.2, 0.2};
  better.values[Property::elongation] = {0.12, 0.12};
  better.up_to = worse.up_to = 0.04;
  auto better_thick = better;
  auto worse_thick = worse;
  better_thick.values[Property::elongation] = {0.2, 0.2};
  better_thick.above = worse_thick.above = 0.04;
  better_thick.up_to = worse_thick.up_to = 0.2;
  catalogue.materials = table_of({better, better_thick, worse, worse_thick, other});
  const auto reference =
      front(part, catalogue, {}, with({false, false, false, false, false, false}));
  CHECK(materials_on(reference) == std::vector<std::string>{"worse"});
  for (const auto& variant : exact_variants()) {
    INFO(variant.name);
    check_same(front(part, catalogue, {}, with(variant.reductions, variant.threads)), reference);
  }
}

TEST_CASE("a lighter material that a route makes in no size so light replaces none that it does") {
  // The least mass that the route makes, 0.3 kg: round bars of 7850 kg/m3 and 0.3 m reach it at
  // 13 mm, of 4000 kg/m3 at 18 mm, which the envelope forbids.
  auto catalogue = test::small_catalogue();
  auto part = test::small_lever();
  part.body.load_cases = {cantilever({force(20.0, 0.3)})};
  part.limits.height = 0.015;
  for (auto& route : catalogue.routes) {
    route.mass_min = route.kind == RouteKind::primary ? 0.3 : route.mass_min;
  }
  auto [better, worse, other] = pair_of(catalogue);
  better.values[Property::density] = {4000.0, 4000.0};
  catalogue.materials = table_of({better, worse, other});
  for (const auto& variant : exact_variants()) {
    INFO(variant.name);
    const auto result = front(part, catalogue, {}, with(variant.reductions, variant.threads));
    CHECK(materials_on(result) == std::vector<std::string>{"worse"});
  }
}
