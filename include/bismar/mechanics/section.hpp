// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

// Axes: the member runs along x; z is up, y is across. Bending under a z load uses I_y; `height` is
// along z, `width` along y, both full outside dimensions.

/// The kind of a cross-section. It decides formulas, buckling curves and what a route can leave.
enum class SectionFamily : std::uint8_t {
  solid_round,
  solid_square,
  solid_rectangle,
  solid_ellipse,
  round_tube,
  rectangular_tube,
  i_section,
  channel,
};

/// How a section got its form; it decides corner radii and the buckling curve.
enum class Forming : std::uint8_t {
  unknown,
  hot_finished,  ///< EN 10210 hollow sections; hot-rolled profiles and bars.
  cold_formed,   ///< EN 10219 hollow sections; roll-formed sections.
  extruded,      ///< Extruded, drawn or pultruded profiles.
  sawn,          ///< Sawn or planed timber, glued laminated timber.
};

/// A flat part of a wall, or the wall of a round tube, for local-buckling limits.
struct PlateElement {
  enum class Kind : std::uint8_t {
    internal_compression,  ///< Supported along both edges, uniform compression (a flange of a box).
    internal_bending,      ///< Supported along both edges, in-plane bending (a web).
    outstand,              ///< Supported along one edge (half a flange of an I).
    round,                 ///< Wall of a round tube: the ratio is d/t.
  };
  Kind kind = Kind::internal_compression;
  double ratio = 0.0;  ///< c/t without root radius, or d/t [-].
};

/// Properties of a cross-section, all SI.
struct SectionProperties {
  SectionFamily family = SectionFamily::solid_round;
  Forming forming = Forming::unknown;
  double height = 0.0;  ///< h, along z [m].
  double width = 0.0;   ///< b, along y [m].
  double wall = 0.0;    ///< Least wall thickness [m]; of a solid its least outside dimension.
  /// Thickness at which strength steps are read [m]: diameter, side, smaller side; wall of a tube;
  /// flange of an I or a channel.
  double ruling_dimension = 0.0;
  double perimeter = 0.0;        ///< Outer perimeter [m].
  double inner_perimeter = 0.0;  ///< Perimeter of the bore [m], 0 for a solid.
  double area = 0.0;             ///< A [m^2].
  double I_y = 0.0;              ///< [m^4], bending under z loads.
  double I_z = 0.0;              ///< [m^4].
  double W_el_y = 0.0;           ///< [m^3], the least elastic modulus about y.
  double W_el_z = 0.0;           ///< [m^3].
  double W_pl_y = 0.0;           ///< [m^3].
  double W_pl_z = 0.0;           ///< [m^3].
  double I_t = 0.0;              ///< St Venant torsion constant [m^4].
  double W_t = 0.0;              ///< T / W_t = peak St Venant shear stress [m^3].
  double A_v_y = 0.0;            ///< V_y / A_v_y = peak elastic shear stress of a y load [m^2].
  double A_v_z = 0.0;            ///< V_z / A_v_z = peak elastic shear stress of a z load [m^2].
  /// Round or elliptical: bending stresses of both axes peak apart and combine as the root of the
  /// sum of squares; otherwise they add.
  bool smooth_outline = false;
  /// Web-flange junction of I, channel and box: bending stress at the flange's inner face over the
  /// extreme fibre's; 0 = none.
  double junction_ratio = 0.0;
  double A_v_junction =
      0.0;  ///< V_z / A_v_junction = web shear stress at the end of the fillet [m^2].
  std::vector<PlateElement> plates;  ///< Empty for a solid.

  /// Radii of gyration sqrt(I/A) [m].
  [[nodiscard]] BISMAR_API double i_y() const;
  [[nodiscard]] BISMAR_API double i_z() const;
};

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
// dimension.

/// Round bar. I = pi d^4 / 64, W = pi d^3 / 32, W_pl = d^3 / 6, I_t = 2 I, A_v = 3 A / 4. Exact.
[[nodiscard]] BISMAR_API SectionProperties solid_round(double diameter);

/// Square bar: a rectangle with equal sides.
[[nodiscard]] BISMAR_API SectionProperties solid_square(double side);

/// Flat bar, sawn timber. I = b h^3 / 12, W_pl = b h^2 / 4, A_v = 2 A / 3; I_t and W_t from the St
/// Venant series (torsion.hpp).
[[nodiscard]] BISMAR_API SectionProperties solid_rectangle(double height, double width);

/// Solid ellipse with semi-axes h/2 and b/2. I_t = pi a^3 b^3 / (a^2 + b^2), W_t = pi a b min(a, b)
/// / 2: exact St Venant solution. A_v = 3 A / 4 is V S / (I b) at the neutral axis. Source: Roark's
/// Formulas for Stress and Strain, torsion table.
[[nodiscard]] BISMAR_API SectionProperties solid_ellipse(double height, double width);

/// Round tube. Exact; A_v from V S / (I 2t) at the neutral axis. Ruling dimension: the wall.
[[nodiscard]] BISMAR_API SectionProperties round_tube(double diameter,
                                                      double wall,
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
/// The torsion constants are those of the standards, made for thin walls; the rest is exact.
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
/// with the flange at its nominal thickness. W_el,z is the lesser one (at the tips). A_v,y =
/// 2 I_z / (b - y_s)^2 is exact for parallel flanges, on the safe side for tapered ones.
/// Source: EN 10365 dimensions; measuring points confirmed by the stock tables; torsion formula
/// from memory, confirmed by them.
[[nodiscard]] BISMAR_API SectionProperties channel(double height,
                                                   double width,
                                                   double web,
                                                   double flange,
                                                   double root_radius,
                                                   double flange_slope);

/// The word of a family in jobs, tables and messages ("round tube"), and back.
[[nodiscard]] BISMAR_API std::string_view name(SectionFamily family);
[[nodiscard]] BISMAR_API std::optional<SectionFamily> section_family(std::string_view name);

}  // namespace bismar
