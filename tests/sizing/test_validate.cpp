// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <optional>
#include <random>
#include <vector>

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
      {"/member/shapes/0/height_to_width",
       Code::conflict,
       "from high to low",
       [](Part& p, Settings&) { p.body.shapes = {ellipse({.height_to_width = Ratio(2.0, 0.5)})}; }},
      {"/member/shapes/0/height_to_width",
       Code::out_of_range,
       "above zero",
       [](Part& p, Settings&) { p.body.shapes = {ellipse({.height_to_width = Ratio(0.0, 2.0)})}; }},
      {"/member/shapes/0/height_to_width",
       Code::not_finite,
       "finite",
       [&](Part& p, Settings&) {
         p.body.shapes = {ellipse({.height_to_width = Ratio(0.5, nan)})};
       }},
      {"/member/shapes/0/wall_to_height",
       Code::conflict,
       "has no",
       [](Part& p, Settings&) { p.body.shapes = {ellipse({.wall_to_height = Ratio(0.1, 0.2)})}; }},
      {"/member/shapes/0/root_radius_to_height",
       Code::conflict,
       "has no",
       [](Part& p, Settings&) { p.body.shapes = {ellipse({.root_radius_to_height = 0.1})}; }},
      {"/member/shapes/0/wall_to_height",
       Code::out_of_range,
       "no bore",
       [](Part& p, Settings&) {
         p.body.shapes = {round_tube({.wall_to_height = Ratio(0.5, 0.6)})};
       }},
      // At a height of 1 the web is thicker than the widest flange.
      {"/member/shapes/0/web_to_height",
       Code::out_of_range,
       "does not fit the other ratios",
       [](Part& p, Settings&) {
         p.body.shapes = {
             i_section({.height_to_width = Ratio(4.0, 5.0), .web_to_height = Ratio(0.3, 0.4)})};
       }},
      // Widths up to 5 x 0.5 m in steps of 0.02 mm are more than 100,000, heights are not.
      {"/member/shapes/0/sizes/step",
       Code::out_of_range,
       "100,000",
       [](Part& p, Settings&) {
         p.body.shapes = {rectangle({.sizes = Sizes::multiples_of(2e-5)})};
       }},
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
      {"/settings/epsilon",
       Code::out_of_range,
       "at most 0.1",
       [](Part&, Settings& s) { s.epsilon = 0.2; }},
      {"/settings/delta",
       Code::out_of_range,
       "at most 0.01",
       [](Part&, Settings& s) { s.delta = 0.0; }},
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

TEST_CASE("ratios that are ranges or left out are no faults") {
  const std::vector<Shape> shapes = {rectangle({}),
                                     ellipse({.height_to_width = Ratio(0.5, 2.0)}),
                                     round_tube({}),
                                     elliptical_tube({}),
                                     rectangular_tube({.height_to_width = 1.5}),
                                     i_section({}),
                                     channel({.root_radius_to_height = 0.02}),
                                     tee({}),
                                     angle({}),
                                     // Only a part of the range makes a tube.
                                     round_tube({.wall_to_height = Ratio(0.3, 0.9)})};
  CHECK(faults_after([&](Part& p, Settings&) { p.body.shapes = shapes; }).empty());
}

// Oracle: a dense grid over the ranges, each place as a shape of fixed ratios, which the section
// functions judge themselves.
TEST_CASE("a range is refused exactly when no place in it makes a section") {
  struct Family {
    Shape (*make)(const ShapeOptions&);
    bool width;
    bool wall;
    bool flanged;
    bool root;
  };
  const Family families[] = {{round_tube, false, true, false, false},
                             {elliptical_tube, true, true, false, false},
                             {rectangular_tube, true, true, false, false},
                             {i_section, true, false, true, true},
                             {channel, true, false, true, true},
                             {tee, true, false, true, true},
                             {angle, true, true, false, true}};
  std::mt19937 random(20);
  const auto between = [&](double low, double high) {
    return low * std::pow(high / low, static_cast<double>(random() % 1000) / 999.0);
  };
  const auto range = [&](double low, double high) {
    const double from = between(low, high);
    return Ratio(from, std::min(high, from * between(1.01, 3.0)));
  };
  const auto is_sound = [](const Shape& shape) {
    return faults_after([&](Part& p, Settings&) { p.body.shapes = {shape}; }).empty();
  };
  constexpr int places = 5;
  const auto at = [](const Ratio& ratio, int place) {
    return ratio.low + (ratio.high - ratio.low) * place / (places - 1);
  };
  int refused = 0;
  int accepted = 0;
  for (int trial = 0; trial < 40; ++trial) {
    for (const Family& family : families) {
      ShapeOptions free;
      free.height_to_width = family.width ? std::optional(range(0.3, 6.0)) : std::nullopt;
      free.wall_to_height = family.wall ? std::optional(range(0.1, 1.5)) : std::nullopt;
      free.web_to_height = family.flanged ? std::optional(range(0.1, 1.5)) : std::nullopt;
      free.flange_to_height = family.flanged ? std::optional(range(0.1, 1.5)) : std::nullopt;
      if (family.root && trial % 2 == 0) {
        free.root_radius_to_height = between(0.01, 0.3);
      }
      bool any = false;
      for (int a = 0; a < (family.width ? places : 1) && !any; ++a) {
        for (int b = 0; b < places && !any; ++b) {
          for (int c = 0; c < (family.flanged ? places : 1) && !any; ++c) {
            ShapeOptions fixed = free;
            if (family.width) {
              fixed.height_to_width = at(*free.height_to_width, a);
            }
            if (family.wall) {
              fixed.wall_to_height = at(*free.wall_to_height, b);
            } else {
              fixed.web_to_height = at(*free.web_to_height, b);
              fixed.flange_to_height = at(*free.flange_to_height, c);
            }
            any = is_sound(family.make(fixed));
          }
        }
      }
      const Shape shape = family.make(free);
      INFO(name(shape.family) << ", trial " << trial);
      CHECK(is_sound(shape) == any);
      ++(any ? accepted : refused);
    }
  }
  CHECK(accepted > 50);
  CHECK(refused > 50);
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
