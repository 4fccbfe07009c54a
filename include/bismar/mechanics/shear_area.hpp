// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

namespace bismar {

// Shear areas A_v of EN 1993-1-1 6.2.6(3) for loads along the web: V_pl = A_v f_y / sqrt(3), the
// plastic resistance. They are no elastic shear areas: those of SectionProperties (A_v_y, A_v_z)
// give the peak elastic stress and are smaller.
//
// Dimensions in metres as in section.hpp. @throws bismar::Error as the function of the section
// does. Source: EN 1993-1-1:2005, 6.2.6(3) (from memory; I sections, tubes: confirmed by section
// tables).

/// Rolled I or H: A - 2 b t_f + (t_w + 2 r) t_f, but not less than h_w t_w (eta = 1), h_w = h - 2
/// t_f [m^2].
[[nodiscard]] BISMAR_API double plastic_shear_area_i(
    double height, double width, double web, double flange, double root_radius);

/// Rolled channel with the flange at its nominal thickness: A - 2 b t_f + (t_w + r) t_f [m^2].
[[nodiscard]] BISMAR_API double plastic_shear_area_channel(double height,
                                                           double width,
                                                           double web,
                                                           double flange,
                                                           double root_radius,
                                                           double flange_slope);

/// Rolled T: A - b t_f + (t_w + 2 r) t_f / 2 [m^2].
[[nodiscard]] BISMAR_API double plastic_shear_area_tee(
    double height, double width, double web, double flange, double root_radius);

/// Hollow section with constant wall. Rectangular, load along the height: A h / (b + h); round:
/// 2 A / pi [m^2].
/// @throws bismar::Error  out_of_range, place "section": neither a rectangular nor a round tube.
[[nodiscard]] BISMAR_API double plastic_shear_area_tube(const SectionProperties& section);

}  // namespace bismar
