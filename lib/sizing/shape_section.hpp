// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/routes.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/sizing/part.hpp>

#include <cstddef>
#include <optional>
#include <span>
#include <string_view>
#include <vector>

namespace bismar {

/// A dimension of a shape's section over its height, by the name that dimensions() gives it; absent
/// where the shape leaves it out.
[[nodiscard]] std::optional<double> ratio_of(const Shape& shape, std::string_view dimension);

/// Faults of a polygon's points at a height of 1 m, without its section; nothing for other shapes.
/// @throws bismar::Error  all of them; places "/outline", "/outline/2", "/holes/0", "/holes/0/2".
void check_outline(const Shape& shape);

/// The sections of a part's free shapes. The torsion of a polygon is a boundary-value problem, so
/// that each polygon is solved once and scaled.
class ShapeSections {
 public:
  /// Keeps a view of `shapes`.
  /// @throws bismar::Error  where a polygon has no section; places as in a part,
  ///   "/member/shapes/0/outline".
  explicit ShapeSections(std::span<const Shape> shapes);

  /// The section of shape `index` at this height [m]; a rolled tube gets its corners.
  /// @throws bismar::Error  as the section's function does.
  [[nodiscard]] SectionProperties at(std::size_t index, const Route& route, double height) const;

 private:
  std::span<const Shape> shapes_;
  std::vector<SectionProperties> polygons_;
};

}  // namespace bismar
