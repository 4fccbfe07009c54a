// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>

#include <functional>
#include <limits>

using namespace bismar;

namespace {

/// The faults of a lever after one change.
std::vector<Fault> faults_after(const std::function<void(Part&, Settings&)>& change) {
  Part part = test::small_lever();
  Settings settings;
  change(part, settings);
  try {
    validate(part, test::small_catalogue(), settings);
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

}  // namespace

TEST_CASE("a sound part has no faults") {
  CHECK(faults_after([](Part&, Settings&) {}).empty());
}

TEST_CASE("each fault of a part has its code, its place and a remedy") {
  struct Case {
    const char* where;
    Code code;
    const char* says;
    std::function<void(Part&, Settings&)> change;
  };
  const double nan = std::numeric_limits<double>::quiet_NaN();
  const std::vector<Case> cases = {
      {"/member/length",
       Code::out_of_range,
       "above zero",
       [](Part& p, Settings&) { p.body.length = 0.0; }},
      {"/member/length",
       Code::not_finite,
       "finite",
       [&](Part& p, Settings&) { p.body.length = nan; }},
      {"/quantity",
       Code::out_of_range,
       "at least one",
       [](Part& p, Settings&) { p.quantity = 0.0; }},
      {"/batch", Code::out_of_range, "batch", [](Part& p, Settings&) { p.batch = 5000.0; }},
      {"/member/shapes", Code::empty, "neither", [](Part& p, Settings&) { p.body.shapes.clear(); }},
      {"/member/shapes/0",
       Code::unsupported,
       "two or more free sizes",
       [](Part& p, Settings&) { p.body.shapes = {ellipse({})}; }},
      {"/member/shapes/0",
       Code::unsupported,
       "wall_to_height",
       [](Part& p, Settings&) { p.body.shapes = {round_tube({})}; }},
      {"/member/shapes/0/height_to_width",
       Code::conflict,
       "has no",
       [](Part& p, Settings&) { p.body.shapes = {round({.height_to_width = 2.0})}; }},
      {"/member/shapes/0/wall_to_height",
       Code::out_of_range,
       "no bore",
       [](Part& p, Settings&) { p.body.shapes = {round_tube({.wall_to_height = 0.5})}; }},
      {"/member/shapes/0/wall_to_height",
       Code::out_of_range,
       "wall_to_height does not fit the other ratios",
       [](Part& p, Settings&) {
         p.body.shapes = {angle({.height_to_width = 1.0, .wall_to_height = 1.5})};
       }},
      {"/member/shapes/0/root_radius_to_height",
       Code::out_of_range,
       "root_radius_to_height does not fit the other ratios",
       [](Part& p, Settings&) {
         p.body.shapes = {i_section({.height_to_width = 2.0,
                                     .web_to_height = 0.1,
                                     .flange_to_height = 0.1,
                                     .root_radius_to_height = 0.6})};
       }},
      {"/member/shapes/0/outline",
       Code::missing,
       "at least 3",
       [](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 0}, {1, 0}})};
       }},
      {"/member/shapes/0/outline",
       Code::out_of_range,
       "0 high",
       [](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 1}, {1, 1}, {2, 1}})};
       }},
      {"/member/shapes/0/outline",
       Code::out_of_range,
       "mean thickness",
       [](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 0}, {1, 0}, {0, 1e6}})};
       }},
      {"/member/shapes/0/outline/2",
       Code::conflict,
       "must not cross",
       [](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 0}, {2, 1}, {2, 0}, {0, 1.5}})};
       }},
      {"/member/shapes/0/outline/1",
       Code::not_finite,
       "finite",
       [&](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 0}, {1, nan}, {0, 1}})};
       }},
      {"/member/shapes/0/holes/0/0",
       Code::conflict,
       "holes need material",
       [](Part& p, Settings&) {
         p.body.shapes = {polygon_shape({{0, 0}, {1, 0}, {1, 1}}, {{{0, 0}, {1, 0}, {1, 1}}})};
       }},
      {"/member/shapes/0/height",
       Code::conflict,
       "below the largest",
       [](Part& p, Settings&) {
         p.body.shapes = {round({.height_min = 0.1, .height_max = 0.01})};
       }},
      {"/member/shapes/0/sizes",
       Code::empty,
       "empty",
       [](Part& p, Settings&) { p.body.shapes = {round({.sizes = Sizes::of({})})}; }},
      {"/member/shapes/0/sizes",
       Code::conflict,
       "None of the sizes",
       [](Part& p, Settings&) { p.body.shapes = {round({.sizes = Sizes::of({9.0})})}; }},
      {"/member/stock/0",
       Code::unknown_name,
       "Did you mean \"bars\"?",
       [](Part& p, Settings&) { p.body.stock = {"barz"}; }},
      {"/member/load_cases",
       Code::empty,
       "no load case",
       [](Part& p, Settings&) { p.body.load_cases.clear(); }},
      {"/member/load_cases/1/name",
       Code::duplicate,
       "Two load cases",
       [](Part& p, Settings&) { p.body.load_cases.push_back(p.body.load_cases[0]); }},
      {"/member/load_cases/0/factors/yeild",
       Code::unknown_name,
       "Did you mean \"yield\"?",
       [](Part& p, Settings&) { p.body.load_cases[0].factors["yeild"] = 1.5; }},
      {"/member/load_cases/0/duration",
       Code::out_of_range,
       "negative",
       [](Part& p, Settings&) { p.body.load_cases[0].duration = -1.0; }},
      {"/limits/mass",
       Code::out_of_range,
       "mass cap",
       [](Part& p, Settings&) { p.limits.mass = -1.0; }},
      {"/limits/routes/0",
       Code::unknown_name,
       "Did you mean \"forging\"?",
       [](Part& p, Settings&) { p.limits.routes = {"forgin"}; }},
      {"/limits/routes/0",
       Code::unknown_name,
       "primary route",
       [](Part& p, Settings&) { p.limits.routes = {"temper"}; }},
      {"/limits/classes/0",
       Code::unknown_name,
       "steel",
       [](Part& p, Settings&) { p.limits.classes = {"steal"}; }},
      {"/limits/medium",
       Code::unknown_name,
       "fresh water",
       [](Part& p, Settings&) { p.limits.medium = "fresh watr"; }},
      {"/limits/properties/0/property",
       Code::unknown_name,
       "elongation",
       [](Part& p, Settings&) {
         p.limits.properties = {{"elongatoin", 0.1, {}}};
       }},
      {"/limits/properties/0",
       Code::missing,
       "at_least",
       [](Part& p, Settings&) {
         p.limits.properties = {{"elongation", {}, {}}};
       }},
      {"/limits/properties/0",
       Code::conflict,
       "more than at most",
       [](Part& p, Settings&) {
         p.limits.properties = {{"elongation", 0.2, 0.1}};
       }},
      {"/finishes/0",
       Code::unknown_name,
       "paint",
       [](Part& p, Settings&) { p.finishes = {"pant"}; }},
      {"/finishes", Code::empty, "none", [](Part& p, Settings&) { p.finishes.clear(); }},
      {"/operations/0/0",
       Code::unknown_name,
       "drill",
       [](Part& p, Settings&) {
         p.operations = {{"dril", 1.0}};
       }},
      {"/settings/near",
       Code::out_of_range,
       "between 0 and 1",
       [](Part&, Settings& s) { s.near = -0.1; }},
      {"/settings/kerf", Code::out_of_range, "negative", [](Part&, Settings& s) { s.kerf = -1.0; }},
  };
  for (const auto& one : cases) {
    const auto faults = faults_after(one.change);
    INFO(one.where << " " << one.says);
    REQUIRE(faults.size() == 1);
    CHECK(faults[0].where == one.where);
    CHECK(faults[0].code == one.code);
    CHECK(faults[0].message.find(one.says) != std::string::npos);
  }
}

TEST_CASE("a load outside the member is a fault of its load case") {
  const auto faults = faults_after(
      [](Part& p, Settings&) { p.body.load_cases = {cantilever({force(100.0, 0.4)})}; });
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].where.starts_with("/member/load_cases/0/"));
}

TEST_CASE("all faults come at once") {
  const auto faults = faults_after([](Part& p, Settings& s) {
    p.body.length = -1.0;
    p.quantity = 0.0;
    p.limits.routes = {"nowhere"};
    p.limits.deflection = 0.0;
    s.fold = 2.0;
  });
  CHECK(faults.size() == 5);
}

TEST_CASE("front, fronts, why and evaluate refuse a faulty part") {
  Part part = test::small_lever();
  part.quantity = -3.0;
  const auto catalogue = test::small_catalogue();
  CHECK_THROWS_AS(front(part, catalogue), Error);
  CHECK_THROWS_AS(fronts(part, catalogue, GroupBy::material), Error);
  CHECK_THROWS_AS(why("steel-a", part, catalogue), Error);
  CHECK_THROWS_AS(evaluate(part, catalogue, {}, 0.02), Error);
}
