// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <algorithm>
#include <optional>
#include <string>

namespace bismar::mechanics {

/// The value of a property that needs() has named. Its absence is a defect of the caller inside
/// this library, never a reason for a silent number.
inline double needed(const std::optional<double>& value, Symbol symbol) {
  if (!value) {
    throw InternalError("a limit state was evaluated without " + std::string(name(symbol)));
  }
  return *value;
}

/// Bending strength of a material that is not held against yield [Pa]; a table without one: the
/// lower of tensile and compressive.
inline double bending_strength(const MemberMaterial& material) {
  return material.flexural ? *material.flexural
                           : std::min(needed(material.tensile, Symbol::tensile),
                                      needed(material.compressive, Symbol::compressive));
}

}  // namespace bismar::mechanics
