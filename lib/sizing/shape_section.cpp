// SPDX-License-Identifier: MIT
#include "sizing/shape_section.hpp"

#include "sizing/words.hpp"

#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include <algorithm>
#include <string_view>

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

/// The corners of a polygon, enlarged so that it is `height` high.
std::vector<SectionPoint> enlarged(const std::vector<SectionPoint>& points, double factor) {
  std::vector<SectionPoint> out;
  out.reserve(points.size());
  for (const SectionPoint& point : points) {
    out.push_back({point.y * factor, point.z * factor});
  }
  return out;
}

/// A polygon at height 1 m.
SectionProperties unit_polygon(const Shape& shape) {
  const auto [low, high] = std::minmax_element(
      shape.outline.begin(), shape.outline.end(), [](const auto& a, const auto& b) {
        return a.z < b.z;
      });
  const double factor = 1.0 / (high->z - low->z);
  std::vector<std::vector<SectionPoint>> holes;
  for (const auto& hole : shape.holes) {
    holes.push_back(enlarged(hole, factor));
  }
  return polygon(enlarged(shape.outline, factor), holes);
}

}  // namespace

ShapeSections::ShapeSections(std::span<const Shape> shapes) : shapes_(shapes) {
  for (const Shape& shape : shapes) {
    polygons_.push_back(shape.family == SectionFamily::polygon ? unit_polygon(shape)
                                                               : SectionProperties{});
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
