// SPDX-License-Identifier: MIT
#include "sizing/shape_section.hpp"

#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <utility>

namespace bismar {

std::optional<double> ratio_of(const Shape& shape, std::string_view dimension) {
  if (dimension == "width") {
    return shape.height_to_width ? std::optional(1.0 / *shape.height_to_width) : std::nullopt;
  }
  if (dimension == "wall") {
    return shape.wall_to_height;
  }
  if (dimension == "web") {
    return shape.web_to_height;
  }
  if (dimension == "flange") {
    return shape.flange_to_height;
  }
  return dimension == "root radius" ? shape.root_radius_to_height : std::nullopt;
}

namespace {

Forming forming_of(const Route& route) {
  if (contains_word(route.leaves, "welded tube")) {
    return Forming::cold_formed;
  }
  return contains_word(route.leaves, "tube") ? Forming::extruded : Forming::unknown;
}

std::vector<SectionPoint> enlarged(const std::vector<SectionPoint>& points, double factor) {
  std::vector<SectionPoint> out;
  out.reserve(points.size());
  for (const SectionPoint& point : points) {
    out.push_back({point.y * factor, point.z * factor});
  }
  return out;
}

/// A polygon's points at height 1 m.
struct UnitOutline {
  std::vector<SectionPoint> outer;
  std::vector<std::vector<SectionPoint>> holes;
};

/// Points that have no height cannot be enlarged to one: they are left as they are where they have
/// faults of their own to tell.
UnitOutline unit_outline(const Shape& shape) {
  double low = std::numeric_limits<double>::infinity();
  double high = -low;
  for (const SectionPoint& point : shape.outline) {
    if (std::isfinite(point.z)) {
      low = std::min(low, point.z);
      high = std::max(high, point.z);
    }
  }
  const double height = high - low;  // -infinity where no z is a number
  const bool finite = std::isfinite(height) && std::isfinite(1.0 / height);
  if (height >= 0.0 && !finite && shape.outline.size() >= 3) {
    Fault fault;
    fault.code = Code::out_of_range;
    fault.where = "/outer";
    fault.found = plain(height) + " high";
    fault.allowed = "corners at different z";
    fault.message =
        "The outline is " + plain(height) +
        " high and cannot be enlarged to a size. A corner is [y, z], z along the height.";
    throw Error(std::move(fault));
  }
  const double factor = finite ? 1.0 / height : 1.0;
  UnitOutline unit;
  unit.outer = enlarged(shape.outline, factor);
  for (const auto& hole : shape.holes) {
    unit.holes.push_back(enlarged(hole, factor));
  }
  return unit;
}

/// Runs `f`; its faults get the places of a part.
template <class Function>
auto with_places(const std::string& where, Function f) {
  try {
    return f();
  } catch (const Error& error) {
    constexpr std::string_view outer = "/outer";
    FaultList faults;
    for (Fault fault : error.faults()) {
      if (fault.where.starts_with(outer)) {
        fault.where.replace(0, outer.size(), "/outline");
      }
      fault.where.insert(0, where);
      faults.add(std::move(fault));
    }
    faults.throw_if_any();
    throw;
  }
}

}  // namespace

void check_outline(const Shape& shape) {
  if (shape.family == SectionFamily::polygon) {
    with_places({}, [&] {
      const UnitOutline unit = unit_outline(shape);
      check_polygon(unit.outer, unit.holes);
    });
  }
}

ShapeSections::ShapeSections(std::span<const Shape> shapes) : shapes_(shapes) {
  for (std::size_t i = 0; i < shapes.size(); ++i) {
    polygons_.emplace_back();
    if (shapes[i].family == SectionFamily::polygon) {
      polygons_.back() = with_places("/member/shapes/" + std::to_string(i), [&] {
        const UnitOutline unit = unit_outline(shapes[i]);
        return polygon(unit.outer, unit.holes);
      });
    }
  }
}

SectionProperties ShapeSections::at(std::size_t index, const Route& route, double height) const {
  const Shape& shape = shapes_[index];
  if (shape.family == SectionFamily::polygon) {
    return scaled(polygons_[index], height);
  }
  const auto names = dimensions(shape.family);
  std::vector<std::optional<double>> sizes(names.size());
  sizes[0] = height;
  for (std::size_t i = 1; i < names.size(); ++i) {
    if (const auto ratio = ratio_of(shape, names[i].name)) {
      sizes[i] = *ratio * height;
    }
  }
  return make_section(shape.family, sizes, forming_of(route));
}

}  // namespace bismar
