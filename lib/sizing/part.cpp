// SPDX-License-Identifier: MIT
#include <bismar/sizing/part.hpp>

namespace bismar {

namespace {

Shape shape(SectionFamily family, const ShapeOptions& options) {
  return {family,
          options.height_to_width,
          options.wall_to_height,
          options.height_min,
          options.height_max,
          options.sizes};
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

}  // namespace bismar
