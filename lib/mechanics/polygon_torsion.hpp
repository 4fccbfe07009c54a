// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/rings.hpp"

#include <cstddef>
#include <span>

namespace bismar::mechanics {

/// St Venant torsion of an outline.
struct PolygonTorsion {
  double I_t = 0.0;      ///< [m^4]
  double W_t = 0.0;      ///< [m^3], see polygon.hpp for what is left out.
  double settled = 0.0;  ///< Relative change of I_t by the last refinement.
  std::size_t unknowns = 0;
};

/// Rings as edges_of wants them. See polygon.hpp for method and accuracy.
/// @throws bismar::Error  unsupported, place "/outer", where I_t has not settled to 1e-3.
[[nodiscard]] PolygonTorsion polygon_torsion(std::span<const Ring> rings);

}  // namespace bismar::mechanics
