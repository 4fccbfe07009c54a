// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/materials.hpp>

#include <optional>
#include <string>

namespace bismar {

/// Room-temperature values of metals hold up to here [K]: full strength up to 100 C in EN 1993-1-2,
/// table 3.1, and EN 1999-1-2 (from memory).
inline constexpr double room_values_up_to = 373.15;

/// What heat leaves of a metal's values above that, each over its value at 20 C.
struct Derating {
  double strength = 1.0;  ///< Yield, tensile and fatigue strength.
  double modulus = 1.0;
  std::string note;  ///< Where the factors come from and what they leave out.
};

/// The factors where a curve is known, otherwise nothing: then the candidate stays undecided.
///
/// Steel (not stainless, cast, or hardened): k_p and k_E of EN 1993-1-2, up to 370 C; above, creep
/// counts (common practice, no source). Aluminium: k_o of its alloy and temper and E of EN
/// 1999-1-2, for loads of up to two hours.
/// @param temperature  [K], above room_values_up_to.  @param duration  Of the load [s].
[[nodiscard]] std::optional<Derating> derating(const MaterialInfo& material,
                                               double temperature,
                                               double duration);

}  // namespace bismar
