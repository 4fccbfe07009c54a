// SPDX-License-Identifier: MIT
// Shapes with several free sizes against a dense grid of shapes whose ratios are fixed: the
// certified search against the exact solution of one size, which was there before it.
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <functional>
#include <string>
#include <vector>

using namespace bismar;

namespace {

struct Grid {
  Shape free;
  std::vector<Shape> fixed;
};

/// `count` values of a ratio over its range, in equal steps of its logarithm.
std::vector<double> values_of(const Ratio& range, int count) {
  std::vector<double> out;
  for (int i = 0; i < count; ++i) {
    out.push_back(range.low * std::pow(range.high / range.low, i / double(count - 1)));
  }
  return out;
}

bool makes_section(const Shape& shape) {
  Part part = test::small_lever();
  part.body.shapes = {shape};
  try {
    validate(part, test::small_catalogue());
    return true;
  } catch (const Error&) {
    return false;
  }
}

/// The proportions that free sizes are searched in (README).
bool is_usual(const Shape& shape) {
  const double width = shape.height_to_width ? 1.0 / shape.height_to_width->low : 1.0;
  const double smaller = std::min(1.0, width);
  if (shape.flange_to_height) {
    const double flange = shape.flange_to_height->low;
    const double web = shape.web_to_height->low;
    return flange <= 0.12 * smaller && web >= 0.07 * flange && web <= 1.5 * flange;
  }
  return shape.family != SectionFamily::angle || shape.wall_to_height->low <= 0.2 * smaller;
}

/// The shape with its free ratios at every place of a grid that makes a section.
Grid grid_of(const Shape& free, int count) {
  Grid out{free, {}};
  const auto ratio = [](Shape& shape, std::string_view name) -> std::optional<Ratio>& {
    return name == "width"  ? shape.height_to_width
           : name == "wall" ? shape.wall_to_height
           : name == "web"  ? shape.web_to_height
                            : shape.flange_to_height;
  };
  std::vector<Shape> all = {free};
  for (const auto& dimension : free_dimensions(free)) {
    std::vector<Shape> next;
    for (const auto& shape : all) {
      for (const double value : values_of(dimension.to_height, count)) {
        Shape one = shape;
        ratio(one, dimension.name) = dimension.name == "width" ? 1.0 / value : value;
        next.push_back(std::move(one));
      }
    }
    all = std::move(next);
  }
  for (const auto& shape : all) {
    if (is_usual(shape) && makes_section(shape)) {
      out.fixed.push_back(shape);
    }
  }
  return out;
}

/// Every design of the grid has a design of the free front that is no heavier and no dearer, but
/// for epsilon.
void check_cover(Part part, const Grid& grid, const Catalogue& catalogue, Settings settings) {
  settings.explain = Explain::full;
  part.body.shapes = {grid.free};
  const Result free = front(part, catalogue, settings);
  part.body.shapes = grid.fixed;
  const Result fixed = front(part, catalogue, settings);
  INFO(name(grid.free.family));
  CHECK(free.epsilon_reached <= settings.epsilon);
  for (const auto& note : free.notes) {
    CHECK(note.find("INTERNAL") == std::string::npos);
  }
  const auto covered = [&](double mass, double cost) {
    const double factor = 1.0 + settings.epsilon;
    return std::any_of(free.designs.begin(), free.designs.end(), [&](const Design& design) {
      return design.mass <= factor * mass && design.cost <= factor * cost;
    });
  };
  for (std::size_t i = 0; i < fixed.front_count; ++i) {
    const Design& design = fixed.designs[i];
    const bool has_margin = std::all_of(design.utilisations.begin(),
                                        design.utilisations.end(),
                                        [&](const auto& u) { return u.value <= 1.0 + 1e-9; });
    CHECK(has_margin);
    CAPTURE(design.id, design.mass, design.cost);
    CHECK(covered(design.mass, design.cost));
  }
  for (const Design& design : free.designs) {
    CAPTURE(design.id);
    part.body.shapes = {grid.free};
    const Design again =
        evaluate(part, catalogue, design.candidate, design.size, design.free_sizes, settings);
    CHECK(again.mass == design.mass);
    CHECK(again.cost == design.cost);
    for (const auto& u : again.utilisations) {
      CHECK(u.value <= 1.0);
    }
  }
  CHECK((fixed.front_count == 0) == (free.front_count == 0));
}

Part lever() {
  Part part = test::small_lever();
  part.limits.deflection = 5e-3;
  part.limits.materials = {"42crmo4-quenched-and-tempered",
                           "s355j2-as-rolled",
                           "en-aw-6082-t6-profile",
                           "en-aw-6082-t651",
                           "s355j2h-hot-finished-hollow-section",
                           "pa66-gf30-conditioned",
                           "c24-12-pct-moisture-graded"};
  return part;
}

}  // namespace

TEST_CASE("a rectangle and an ellipse with a free width beat every fixed width") {
  Part part = lever();
  check_cover(part, grid_of(rectangle({}), 40), test::starter(), {});
  check_cover(
      part, grid_of(ellipse({.height_to_width = Ratio(0.5, 2.0)}), 40), test::starter(), {});
}

TEST_CASE("a round tube with a free wall beats every fixed wall") {
  check_cover(lever(), grid_of(round_tube({}), 60), test::starter(), {});
}

TEST_CASE("tubes with free width and wall beat every fixed pair") {
  check_cover(lever(), grid_of(rectangular_tube({}), 14), test::starter(), {});
  check_cover(lever(), grid_of(elliptical_tube({}), 14), test::starter(), {});
  check_cover(lever(), grid_of(angle({}), 14), test::starter(), {});
}

TEST_CASE("open sections with three free ratios beat every fixed triple") {
  check_cover(lever(), grid_of(i_section({}), 7), test::starter(), {});
  check_cover(lever(), grid_of(channel({}), 7), test::starter(), {});
  check_cover(lever(), grid_of(tee({}), 7), test::starter(), {});
}
