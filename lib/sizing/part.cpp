// SPDX-License-Identifier: MIT
#include <bismar/sizing/part.hpp>

#include "sizing/shape_section.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include <utility>

namespace bismar {

namespace {

Shape shape(SectionFamily family, const ShapeOptions& options) {
  Shape out;
  out.family = family;
  out.height_to_width = options.height_to_width;
  out.wall_to_height = options.wall_to_height;
  out.web_to_height = options.web_to_height;
  out.flange_to_height = options.flange_to_height;
  out.root_radius_to_height = options.root_radius_to_height;
  out.height_min = options.height_min;
  out.height_max = options.height_max;
  out.sizes = options.sizes;
  return out;
}

}  // namespace

Ratio default_ratio(SectionFamily family, std::string_view key) {
  using Family = SectionFamily;
  if (key == "height_to_width") {
    const bool flanged = family == Family::i_section || family == Family::channel;
    const bool two_legs = family == Family::tee || family == Family::angle;
    return flanged ? Ratio(1.0, 5.0) : two_legs ? Ratio(0.5, 2.0) : Ratio(0.2, 5.0);
  }
  if (key == "wall_to_height") {
    const bool rectangular = family == Family::rectangular_tube;
    return family == Family::angle ? Ratio(0.02, 0.2) : Ratio(0.005, rectangular ? 0.25 : 0.45);
  }
  if (key == "web_to_height") {
    return {0.005, 0.1};
  }
  if (key == "flange_to_height") {
    return {0.005, 0.15};
  }
  throw InternalError("default_ratio: there is no ratio " + std::string(key));
}

std::vector<FreeDimension> free_dimensions(const Shape& shape) {
  std::vector<FreeDimension> out;
  if (shape.family == SectionFamily::polygon) {
    return out;
  }
  for (const auto& dimension : dimensions(shape.family).subspan(1)) {
    if (dimension.optional) {
      continue;
    }
    const Ratio range = ratio_range(shape, dimension.name);
    if (!range.is_fixed()) {
      out.push_back({dimension.name, range});
    }
  }
  return out;
}

Shape round(const ShapeOptions& options) { return shape(SectionFamily::solid_round, options); }
Shape square(const ShapeOptions& options) { return shape(SectionFamily::solid_square, options); }
Shape rectangle(const ShapeOptions& options) {
  return shape(SectionFamily::solid_rectangle, options);
}
Shape ellipse(const ShapeOptions& options) { return shape(SectionFamily::solid_ellipse, options); }
Shape round_tube(const ShapeOptions& options) { return shape(SectionFamily::round_tube, options); }
Shape rectangular_tube(const ShapeOptions& options) {
  return shape(SectionFamily::rectangular_tube, options);
}
Shape hexagon(const ShapeOptions& options) { return shape(SectionFamily::solid_hexagon, options); }
Shape elliptical_tube(const ShapeOptions& options) {
  return shape(SectionFamily::elliptical_tube, options);
}
Shape i_section(const ShapeOptions& options) { return shape(SectionFamily::i_section, options); }
Shape channel(const ShapeOptions& options) { return shape(SectionFamily::channel, options); }
Shape tee(const ShapeOptions& options) { return shape(SectionFamily::tee, options); }
Shape angle(const ShapeOptions& options) { return shape(SectionFamily::angle, options); }
Shape polygon_shape(std::vector<SectionPoint> outline,
                    std::vector<std::vector<SectionPoint>> holes,
                    const ShapeOptions& options) {
  Shape out = shape(SectionFamily::polygon, options);
  out.outline = std::move(outline);
  out.holes = std::move(holes);
  return out;
}

}  // namespace bismar
