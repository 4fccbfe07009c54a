// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <optional>
#include <span>
#include <string_view>

namespace bismar {

/// Where a joint of two metals lives.
enum class GalvanicEnvironment : std::uint8_t {
  harsh,       ///< Outdoors, humid, salt.
  normal,      ///< Indoors without control of temperature and humidity, a store room.
  controlled,  ///< Indoors, temperature and humidity held.
};

/// Largest accepted difference of anodic index of two metals in contact [V]: 0.15, 0.25, 0.50.
/// Source: handbook rule printed with the table of anodic indices.
[[nodiscard]] BISMAR_API double anodic_index_limit(GalvanicEnvironment environment);

/// Whether two metals may touch: |a - b| <= limit, 1e-9 V allowed, as differences of the table lie
/// on the limits. A screening rule; it knows neither the ratio of the areas nor films.
/// @param a, b  Anodic indices [V], volts below gold, finite.
/// @throws bismar::Error  not_finite, place "a" or "b".
[[nodiscard]] BISMAR_API bool galvanic_pair_accepted(double a,
                                                     double b,
                                                     GalvanicEnvironment environment);

/// A group of metals of one anodic index.
struct AnodicGroup {
  std::string_view metals;
  double index = 0.0;     ///< Volts below gold [V].
  bool verified = false;  ///< The value was seen in print; otherwise from memory.
};

/// The groups from gold to beryllium, nobler first. For a salt environment; a ranking aid.
/// Source: handbook table of anodic indices (MIL-STD-889 family); first twelve values seen in
/// print, the others from memory.
[[nodiscard]] BISMAR_API std::span<const AnodicGroup> anodic_groups();

/// The index of the group with exactly this text [V], or nothing.
[[nodiscard]] BISMAR_API std::optional<double> anodic_index(std::string_view metals);

}  // namespace bismar
