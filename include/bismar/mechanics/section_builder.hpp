// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <optional>
#include <span>
#include <string_view>

namespace bismar {

/// One dimension of a section, as tables and shapes name it.
struct SectionDimension {
  std::string_view name;  ///< "height", "diameter", "side", "wall", "root radius", ...
  /// May be left out: a radius or a slope is then zero, and the corners of a rectangular tube are
  /// those of its forming (EN 10210, EN 10219; sharp where it is extruded or unknown).
  bool optional = false;
  bool is_ratio = false;   ///< A slope, not a length.
  bool in_tables = false;  ///< Optional, but a table of bought sizes must have it.
};

/// What a section of this family is made of, its outside size first. A polygon has no dimensions.
[[nodiscard]] BISMAR_API std::span<const SectionDimension> dimensions(SectionFamily family);

/// The section with these dimensions, in the order of dimensions(family) [m]; the optional ones may
/// be absent.
/// @throws bismar::Error  as the section's own function does, or missing, the place the radius that
/// is
///   given, where only one of both is; InternalError for a wrong count, a missing
///   dimension or a polygon.
[[nodiscard]] BISMAR_API SectionProperties make_section(
    SectionFamily family, std::span<const std::optional<double>> dimensions, Forming forming);

}  // namespace bismar
