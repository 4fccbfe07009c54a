// SPDX-License-Identifier: MIT
#include <bismar/sizing/part.hpp>

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
