// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section_properties.hpp>

#include <cstdint>

namespace bismar {

/// How the corners of a rectangular hollow section are rounded.
enum class Corners : std::uint8_t {
  sharp,     ///< ro = 0 (ri = 0).
  en_10210,  ///< ro = 1.5 t, ri = 1.0 t (EN 10210-2, for calculation).
  en_10219,  ///< EN 10219-2, by wall: to 6 mm 2.0 t, 1.0 t; to 10 mm 2.5 t, 1.5 t; above 3.0 t, 2.0
             ///< t.
};

// Every function below: dimensions in metres, finite and > 0 (radii >= 0), walls less than half the
// smaller side. @throws bismar::Error, all faults at once, the place being the argument's name:
// not_finite, or out_of_range where a dimension is not positive or does not fit the others.
// Properties are those of the stated outline to rounding, except where the text says otherwise.
// Loads act through the shear centre. `wall` and ruling dimension of a solid: its smaller outside
// dimension. Shear areas of the deflection A_s are those of the energy of V S / (I b), which is
// Timoshenko's beam without Poisson's ratio (shear_coefficient.hpp has those with it).

/// Round bar. I = pi d^4 / 64, W = pi d^3 / 32, W_pl = d^3 / 6, I_t = 2 I, A_v = 3 A / 4,
/// A_s = 0.9 A. Exact.
[[nodiscard]] BISMAR_API SectionProperties solid_round(double diameter);

/// Square bar: a rectangle with equal sides.
[[nodiscard]] BISMAR_API SectionProperties solid_square(double side);

/// Flat bar, sawn timber. I = b h^3 / 12, W_pl = b h^2 / 4, A_v = 2 A / 3, A_s = 5 A / 6; I_t and
/// W_t from the St Venant series (torsion.hpp).
[[nodiscard]] BISMAR_API SectionProperties solid_rectangle(double height, double width);

/// Solid ellipse with semi-axes h/2 and b/2. I_t = pi a^3 b^3 / (a^2 + b^2), W_t = pi a b min(a, b)
/// / 2: exact St Venant solution. A_v = 3 A / 4 is V S / (I b) at the neutral axis, A_s = 0.9 A.
/// Source: Roark's Formulas for Stress and Strain, torsion table.
[[nodiscard]] BISMAR_API SectionProperties solid_ellipse(double height, double width);

/// Regular hexagon with two flats horizontal: height d (across flats), width 2 d / sqrt(3) (across
/// corners).
///
///     A = sqrt(3)/2 d^2,  I_y = I_z = 5 sqrt(3)/144 d^4,  W_el,y = 2 I / d,  W_el,z = 5/48 d^3,
///     W_pl,y = d^3 / (3 sqrt(3)),  W_pl,z = 7/36 d^3,  I_t = 0.1150510 d^4,  W_t = 0.1876734 d^3
///
/// I_t and W_t (peak in the middle of a flat) are the St Venant solution to 12 digits: harmonic
/// polynomials and corner functions fitted on the boundary. A_v is V S / (I b) at its largest.
/// Bending stresses of both axes are added, on the safe side (by up to a third) for a hexagon.
/// @param width_across_flats  d [m], > 0.
/// Source: geometry; Timoshenko and Goodier, Theory of Elasticity, torsion (own evaluation).
[[nodiscard]] BISMAR_API SectionProperties solid_hexagon(double width_across_flats);

/// Round tube. Exact; A_v from V S / (I 2t) at the neutral axis. Ruling dimension: the wall.
///
///     A_s = 6 (1 + m^2)^2 / [7 (1 + m^2)^2 + 20 m^2] A,   m = bore / diameter
///
/// Source of A_s: Cowper, Journal of Applied Mechanics 33 (1966), with Poisson's ratio 0.
[[nodiscard]] BISMAR_API SectionProperties round_tube(double diameter,
                                                      double wall,
                                                      Forming forming);

/// Elliptical tube: the outer ellipse h x b less the ellipse (h - 2 t) x (b - 2 t), so that the
/// wall is t at the ends of the axes and a little thinner between (by 1 - 2 sqrt(h b) / (h + b)).
///
///     I_t = t^3 U / 3 + 2 K A_h,  W_t = I_t / (t + K / t),  K = 2 A_h t / U,
///     A_h = pi (h - t)(b - t) / 4,  U = pi/2 (h + b - 2 t) [1 + ((h - b) / (h + b - 2 t))^2 / 4]
///
/// A, I and W are exact for the two ellipses. A_v is V S / (I 2t) at the neutral axis, less where
/// thin-wall shear flow over the true wall peaks beside it; A_s from the energy of that flow. The
/// plate is a round one with d/t = h^2 / (b t), h the longer axis.
/// Source: EN 10210-2:2006 annex (formulas from memory, confirmed by published section tables);
/// equivalent diameter 2 a^2 / b: EN 1993-1-1:2022 and the literature on elliptical tubes (from
/// memory).
[[nodiscard]] BISMAR_API SectionProperties elliptical_tube(double height,
                                                           double width,
                                                           double wall,
                                                           Forming forming);

/// Elliptical tube whose bore is the outer ellipse times q, so that St Venant torsion is exact:
///
///     I_t = pi a^3 b^3 (1 - q^4) / (a^2 + b^2),  W_t = pi/2 a b min(a, b) (1 - q^4)
///
/// with the semi-axes a and b. `wall` is the least one, (1 - q) min(a, b).
/// @param bore_ratio  q [-], 0 < q < 1; place of its faults "bore_ratio".
/// Source: Roark's Formulas for Stress and Strain, torsion table.
[[nodiscard]] BISMAR_API SectionProperties similar_elliptical_tube(double height,
                                                                   double width,
                                                                   double bore_ratio,
                                                                   Forming forming);

/// Rectangular tube with corner radii by the standard. `Corners::en_10219` steps with the wall: at
/// 6 and 10 mm a size that is scaled past the step has a little less material than just before it.
/// Fault on `wall` where the standard's inner radius does not fit (t > b/4 for EN 10210).
[[nodiscard]] BISMAR_API SectionProperties
rectangular_tube(double height, double width, double wall, Corners corners, Forming forming);

/// As above with given corner radii [m], 0 <= inner <= outer <= half the smaller side.
///
///     I_t = t^3 h' / 3 + 2 K A_h,  W_t = I_t / (t + K / t),  K = 2 A_h t / h',
///     h' = 2 [(b - t) + (h - t)] - 2 R_c (4 - pi),  A_h = (b - t)(h - t) - R_c^2 (4 - pi),
///     R_c = (r_o + r_i) / 2
///
/// The torsion constants are those of the standards, made for thin walls; A_s is the energy of the
/// shear flow of the sharp mid-line; the rest is exact.
/// Source: EN 10210-2:2006 and EN 10219-2:2006, annexes (formulas from memory, confirmed by 517
/// rows of published section tables).
[[nodiscard]] BISMAR_API SectionProperties rectangular_tube(double height,
                                                            double width,
                                                            double wall,
                                                            double outer_radius,
                                                            double inner_radius,
                                                            Forming forming);

/// Rolled I or H section, marked hot finished.
///
///     I_t = 2/3 (b - 0.63 t_f) t_f^3 + 1/3 (h - 2 t_f) t_w^3
///           + 2 (t_w / t_f) (0.145 + 0.1 r / t_f) D^4,
///     D = [(r + t_w / 2)^2 + (r + t_f)^2 - r^2] / (2 r + t_f),   W_t = I_t / max(t_f, t_w)
///
/// I_t of published tables differs by up to 4 % among them; W_t leaves out the stress rise in the
/// fillet. A_v,y = 8 I_z / b^2 is on the safe side (by the fillets, up to 7 %). Ruling: the flange.
/// I_w = t_f b^3 (h - t_f)^2 / 24. A_s,z = I^2 / integral of S^2 / b along the depth, without
/// fillets (about h t_w); A_s,y = 5/6 of the flanges.
/// Source: rolled-section tables to EN 10365 (formula from memory, confirmed by the stock tables).
[[nodiscard]] BISMAR_API SectionProperties
i_section(double height, double width, double web, double flange, double root_radius);

/// Channel with parallel flanges (slope 0, square tips) or tapered ones (tips rounded with half the
/// root radius, which is within 0.3 % of the tables' radii), marked hot finished.
///
/// `flange` is the thickness where the standard measures it: at half the width for a slope above
/// 6.5 % (the 8 % flanges up to h = 300 mm), at half the overhang below (the 5 % flanges above).
///
///     I_t = 2/3 b t_f^3 + 1/3 (h - 2 t_f) t_w^3 + 2 alpha D^4 - 0.42 t_f^4,
///     alpha = -0.0908 + 0.2621 t_w/t_f + 0.1231 r/t_f - 0.0752 t_w r/t_f^2 - 0.0945 (t_w/t_f)^2,
///     D = 2 [(3 r + t_w + t_f) - sqrt(2 (2 r + t_w)(2 r + t_f))],   W_t = I_t / max(t_f, t_w)
///
/// with the flange at its nominal thickness. W_el,z is the lesser one (at the tips). The web is on
/// the side of negative y. A_v,y: the flanges at the neutral axis (on the safe side for tapered
/// ones) or the ends of the web, whichever is worse.
///
///     e_0 = t_f b'^2 h'^2 / (4 I_y) outwards from the web's mid-line,
///     I_w = h'^2 / 4 [I_z - A (c - t_w/2)^2 (h'^2 A / (4 I_y) - 1)],  b' = b - t_w/2, h' = h - t_f
///
/// with c the centroid from the web's back. Tapered flanges are taken at their nominal thickness
/// and h' too, an assumption: they carry less at the tip, so that e_0 is then too large by some per
/// cent. A_s,z without fillets as for an I, A_s,y = 5/6 of the flanges. Source: EN 10365
/// dimensions; measuring points confirmed by the stock tables; torsion and shear centre formulas
/// from memory, confirmed by published tables of parallel-flange channels.
[[nodiscard]] BISMAR_API SectionProperties channel(double height,
                                                   double width,
                                                   double web,
                                                   double flange,
                                                   double root_radius,
                                                   double flange_slope);

/// Rolled or cut T, flange up, marked hot finished. Bending about y peaks at the tip of the stem.
///
///     I_t = 1/3 (b - 0.63 t_f) t_f^3 + 1/3 (h - t_f) t_w^3 + (t_w / t_f)(0.145 + 0.1 r / t_f) D^4
///           - 0.105 t_w^4,  D as for an I,   W_t = I_t / max(t_f, t_w)
///     I_w = b^3 t_f^3 / 144 + (h - t_f/2)^3 t_w^3 / 36,   shear centre: flange's mid-line
///
/// I_t: half an I's, less the free end of the stem; published tables within 3 %. The warping
/// constant is that of the walls' own thickness, which is small; the plates alone warp not at all.
/// A_v,z = 2 I_y / e^2 (e from the neutral axis to the stem's tip) is exact where the neutral axis
/// cuts the plain stem, else on the safe side; A_v,y = 8 I_z / b^2 likewise. A_s,z without fillets
/// as for an I, A_s,y = 5/6 of the flange. W_pl,y about the axis that halves the area. Plates: both
/// halves of the flange and the stem, as outstands.
/// Source: as i_section; I_w: thin-wall theory (derived).
[[nodiscard]] BISMAR_API SectionProperties
tee(double height, double width, double web, double flange, double root_radius);

/// Angle with legs along z (height) and y (width) of one thickness, heel at negative y and z (so
/// that I_yz < 0), root fillet, and toe radii at the inner corners of the leg tips; marked hot
/// finished. I_u, I_v and principal_angle() are about the principal axes.
///
///     I_t = [b t^3 + (h - t) t^3] / 3 + (0.07 + 0.076 r/t) D^4 - 0.21 t^4,
///     D = 2 [3 r + 2 t - sqrt(2) (2 r + t)],   W_t = I_t / t
///     I_w = t^3 [(h - t/2)^3 + (b - t/2)^3] / 36,   shear centre: where the legs' mid-lines meet
///
/// Published I_t differ from this by up to 6 %. The warping constant is that of the walls' own
/// thickness. A free angle bends askew: its stresses come from I_y, I_z and I_yz at the fibres
/// (a rounded toe counts as two corners, at most 0.083 r outside it); W_el and W_pl are about y and
/// z as in tables, for bending that is guided along z or y, W_pl about axes that halve the area.
/// A_v is the peak of the shear flow of askew bending, over both legs at full length; A_s = 5/6 of
/// the leg along the load. Plates: both legs as outstands, c without the root radius; the further
/// rule of EN 1993-1-1 Table 5.2 sheet 3, (b + h) / (2 t), is left out.
/// @param root_radius, toe_radius  [m], >= 0; toe <= thickness; both fit on the shorter leg.
/// Source: EN 10056-1 dimensions; I_t from memory, confirmed by published tables; the rest is
/// geometry and thin-wall theory.
[[nodiscard]] BISMAR_API SectionProperties
angle(double height, double width, double thickness, double root_radius, double toe_radius);

}  // namespace bismar
