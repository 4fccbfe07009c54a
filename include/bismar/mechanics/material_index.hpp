// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstdint>

namespace bismar {

/// The solid section that a shape factor compares with; its own factors are 1.
///
/// Textbooks changed from the circle (editions of the 1990s) to the square; in bending the two
/// differ by pi / 3 (stiffness), so a factor says nothing without its reference.
enum class ShapeReference : std::uint8_t { solid_circle, solid_square };

/// How much stiffer and stronger a section is than the solid reference of the same area [-].
struct ShapeFactors {
  double bending_stiffness = 0.0;  ///< phi_B^e
  double torsion_stiffness = 0.0;  ///< phi_T^e
  double bending_strength = 0.0;   ///< phi_B^f
  double torsion_strength = 0.0;   ///< phi_T^f
};

/// Elastic shape factor of bending [-].
///
///     circle: 4 pi I / A^2,   square: 12 I / A^2
///
/// At equal bending stiffness a beam of this shape weighs 1 / sqrt(phi_B^e) of the solid reference.
/// @param area  A [m^2], > 0.  @param second_moment  I [m^4], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name; all at once.
/// Source: Ashby, Materials Selection in Mechanical Design, chapter on shape: circle in the 1st
/// edition, square from the 3rd (square forms from memory).
[[nodiscard]] BISMAR_API double bending_shape_factor(double area,
                                                     double second_moment,
                                                     ShapeReference reference);

/// The four shape factors of a section, bending about y.
///
///     circle: 4 pi I / A^2,  2 pi K / A^2,  4 sqrt(pi) Z / A^1.5,  2 sqrt(pi) Q / A^1.5
///     square: 12 I / A^2,    7.14 K / A^2,  6 Z / A^1.5,           4.8 Q / A^1.5
///
/// with I = I_y, K = I_t, Z = W_el,y and Q = W_t of the section. The constants 7.14 and 4.8 are
/// rounded in the source (1/0.1406 = 7.11 and 1/0.2082 = 4.80 of a square by the St Venant series),
/// so that a solid square has 1.004 and 0.999 in torsion.
/// @param section  Its area, I_y, I_t, W_el_y and W_t are read, each > 0.
/// @throws bismar::Error  as above, place is the field's name.
/// Source: as above (strength and square forms from memory).
[[nodiscard]] BISMAR_API ShapeFactors shape_factors(const SectionProperties& section,
                                                    ShapeReference reference);

/// A material index M = P^x / rho: of the materials that meet the same demand, the one with the
/// largest M makes the lightest part [SI: Pa^x m^3/kg].
///
/// The exponent x is 1 for a tie, 1/2 for a beam, shaft or column of fixed shape sized by stiffness
/// (E or G), 2/3 for a beam or shaft sized by strength, 1/3 and 1/2 for a panel. `sensitivity` of
/// the sized mass gives it for any other case: x = -(d ln m / d ln P) / (d ln m / d ln rho).
/// @param property  P [Pa], > 0.  @param exponent  x [-], finite.
/// @param density  rho [kg/m^3], > 0; times a price it gives the index of least cost.
/// @throws bismar::Error  as above.
/// Source: Ashby, Materials Selection in Mechanical Design, appendix of material indices (from
/// memory; the exponents are derived by the checks of this library).
[[nodiscard]] BISMAR_API double material_index(double property, double exponent, double density);

}  // namespace bismar
