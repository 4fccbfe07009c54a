// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

namespace bismar {

/// A section with every dimension multiplied by `factor` > 0 and its ratios kept.
///
/// Lengths grow with the factor, A and shear areas with its square, moduli with its cube, second
/// moments and I_t with its fourth power; plate ratios stay. This is why the size of a shape with
/// fixed ratios is the root of monotone utilisations: stresses fall as powers of the factor.
/// Agrees with the section functions to a few units in the last place while the corners scale too.
[[nodiscard]] BISMAR_API SectionProperties scaled(const SectionProperties& section, double factor);
/// The same into a section that is there already, whose memory is used again. Not onto itself.
BISMAR_API void scale_into(const SectionProperties& section,
                           double factor,
                           SectionProperties& out);

}  // namespace bismar
