// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/routes.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/section_box.hpp>
#include <bismar/sizing/part.hpp>
#include <bismar/sizing/result.hpp>

#include <cstddef>
#include <optional>
#include <span>
#include <string_view>
#include <vector>

namespace bismar {

/// A dimension of a shape's section over its height, by the name that dimensions() gives it; absent
/// where the shape leaves it out or gives a range.
[[nodiscard]] std::optional<double> ratio_of(const Shape& shape, std::string_view dimension);

/// The range of that ratio, the default one where the shape leaves it out; not for radii.
[[nodiscard]] Ratio ratio_range(const Shape& shape, std::string_view dimension);

/// The shape with the ratios of one design in place of its free dimensions.
[[nodiscard]] Shape with_ratios(const Shape& shape, double height, const FreeSizes& free_sizes);

/// Free dimensions in the middle of their ranges at a height of 1 m, or where those make no section
/// at a corner of the ranges that does.
/// @throws InternalError  where none does (validation has refused the shape).
[[nodiscard]] FreeSizes middle_sizes(const Shape& shape);

/// Free dimensions at a height of 1 m at the ends and in the middle of their ranges, where they
/// make a section.
[[nodiscard]] std::vector<FreeSizes> sample_sizes(const Shape& shape);

/// Whether the box may hold sections of usual proportions, in which free sizes are searched:
///
///     rectangular and elliptical tube   b / h from 1/16 to 16
///     I, channel, T                     b / h from 0.12 to 2.5, t_f <= 0.12 min(h, b),
///                                       0.07 t_f <= t_w <= 1.5 t_f, r <= 1.6 t_f
///     angle                             b / h from 0.4 to 2.5, t <= 0.2 min(h, b), r <= t
///
/// and any of the others. They lie inside those of is_enclosable(), so that every box of some
/// smallness that holds one can be enclosed. Of a single section: whether it has them.
[[nodiscard]] bool may_be_usual(const SizesBox& box);

/// Less than the area of any section of the box, whatever its proportions [m^2], > 0.
[[nodiscard]] double rough_area(const SizesBox& box);

/// How the route forms a section.
[[nodiscard]] Forming forming_of(const Route& route);

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
  /// The same with the free dimensions of the shape [m].
  [[nodiscard]] SectionProperties at(std::size_t index,
                                     const Route& route,
                                     double height,
                                     const FreeSizes& free_sizes) const;

 private:
  std::span<const Shape> shapes_;
  std::vector<SectionProperties> polygons_;
};

}  // namespace bismar
