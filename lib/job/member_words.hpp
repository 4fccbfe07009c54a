// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/section.hpp>

#include <span>
#include <string>
#include <string_view>
#include <vector>

/// Words of the job format for members, in one place for the loader, the schema and the writer.
namespace bismar::detail {

/// A ratio of a dimension of a shape to its height.
struct RatioWords {
  std::string_view key;
  /// Its key in Shape and default_ratio(); empty for the root radius, which is never free.
  std::string_view free_key;
  std::string_view about;
};

/// A shape's tag in jobs, its family, the word of its size, and its ratios.
struct ShapeWords {
  std::string_view tag;
  SectionFamily family;
  std::string_view size;
  std::vector<RatioWords> ratios;
};
[[nodiscard]] std::span<const ShapeWords> shape_words();

[[nodiscard]] std::vector<std::string> surface_words();    ///< In the order of SurfaceFinish.
[[nodiscard]] std::vector<std::string> criterion_words();  ///< In the order of FatigueCriterion.

}  // namespace bismar::detail
