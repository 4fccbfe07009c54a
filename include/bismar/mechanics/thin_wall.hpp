// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <span>

namespace bismar {

// Properties of mid-lines, for hand calculation and for checking. The sections of section.hpp do
// not use them: theirs are those of the full outline.
//
// All dimensions in metres, finite and > 0. @throws bismar::Error, all faults at once: not_finite
// or out_of_range, the place being the argument's name.

/// Area of a thin round tube 2 pi r t [m^2]; exact, r being the mean radius.
[[nodiscard]] BISMAR_API double thin_round_tube_area(double mean_radius, double wall);

/// Second moment of area of a thin round tube pi r^3 t [m^4]; too small by (t / 2r)^2. Its torsion
/// constant is twice that (bredt_torsion_constant gives the same).
[[nodiscard]] BISMAR_API double thin_round_tube_second_moment(double mean_radius, double wall);

/// A flat wall of an open section.
struct ThinPlate {
  double length = 0.0;     ///< b [m], > 0.
  double thickness = 0.0;  ///< t [m], > 0.
};

/// Torsion constant of an open section of thin plates [m^4].
///
///     I_t = sum b t^3 / 3
///
/// Without fillets; rolled sections have 5 to 15 % more. Places of its faults "plates[i]/length",
/// "plates[i]/thickness".
/// Source: Timoshenko and Goodier, Theory of Elasticity, torsion of thin strips.
[[nodiscard]] BISMAR_API double thin_open_torsion_constant(std::span<const ThinPlate> plates);

/// The mid-line of a channel: depth between the flanges' mid-lines, flanges from the web's
/// mid-line.
struct ThinChannel {
  double depth = 0.0;         ///< h' [m]
  double flange_width = 0.0;  ///< b' [m]
  double flange = 0.0;        ///< t_f [m]
  double web = 0.0;           ///< t_w [m]
};

/// Distance of the shear centre from the web's mid-line, away from the flanges [m].
///
///     e = 3 b'^2 t_f / (6 b' t_f + h' t_w)
///
/// Source: thin-wall theory; Roark's Formulas for Stress and Strain (from memory).
[[nodiscard]] BISMAR_API double thin_channel_shear_centre(const ThinChannel& channel);

/// Warping constant [m^6], up to 5 % below that of channel() in section.hpp.
///
///     I_w = t_f b'^3 h'^2 / 12 (3 b' t_f + 2 h' t_w) / (6 b' t_f + h' t_w)
///
/// Source: as above.
[[nodiscard]] BISMAR_API double thin_channel_warping_constant(const ThinChannel& channel);

}  // namespace bismar
