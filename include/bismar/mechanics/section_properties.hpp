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
  solid_hexagon,
  elliptical_tube,
  tee,
  angle,
  polygon,
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

/// A point of a cross-section from its centroid [m].
struct SectionPoint {
  double y = 0.0;
  double z = 0.0;

  friend bool operator==(const SectionPoint&, const SectionPoint&) = default;
};

/// Properties of a cross-section, all SI. Axes y and z run through the centroid.
struct SectionProperties {
  SectionFamily family = SectionFamily::solid_round;
  Forming forming = Forming::unknown;
  double height = 0.0;  ///< h, along z [m].
  double width = 0.0;   ///< b, along y [m].
  double wall = 0.0;    ///< Least wall thickness [m]; of a solid its least outside dimension.
  /// Thickness at which strength steps are read [m]: diameter, side, smaller side; wall of a tube
  /// or an angle; flange of an I, a channel or a T.
  double ruling_dimension = 0.0;
  double perimeter = 0.0;        ///< Outer perimeter [m].
  double inner_perimeter = 0.0;  ///< Perimeter of the bore [m], 0 for a solid.
  double area = 0.0;             ///< A [m^2].
  double I_y = 0.0;              ///< [m^4], bending under z loads.
  double I_z = 0.0;              ///< [m^4].
  double I_yz = 0.0;    ///< Product of inertia, integral of y z [m^4]; 0 with an axis of symmetry.
  double W_el_y = 0.0;  ///< [m^3], the least elastic modulus about y.
  double W_el_z = 0.0;  ///< [m^3].
  double W_pl_y = 0.0;  ///< [m^3].
  double W_pl_z = 0.0;  ///< [m^3].
  double I_t = 0.0;     ///< St Venant torsion constant [m^4].
  double W_t = 0.0;     ///< T / W_t = peak St Venant shear stress [m^3].
  /// Warping constant about the shear centre [m^6]; 0 where warping is left out (solids, tubes).
  double I_w = 0.0;
  double y_shear = 0.0;  ///< Shear centre from the centroid [m].
  double z_shear = 0.0;  ///< Shear centre from the centroid [m].
  double A_v_y = 0.0;    ///< V_y / A_v_y = peak elastic shear stress of a y load [m^2].
  double A_v_z = 0.0;    ///< V_z / A_v_z = peak elastic shear stress of a z load [m^2].
  /// Shear areas of the deflection: gamma = V / (G A_s). 0 = not known for this section.
  double A_s_y = 0.0;  ///< [m^2]
  double A_s_z = 0.0;  ///< [m^2]
  /// Round or elliptical: bending stresses of both axes peak apart and combine as the root of the
  /// sum of squares; otherwise they add.
  bool smooth_outline = false;
  /// Web-flange junction of I, channel and box: bending stress at the flange's inner face over the
  /// extreme fibre's; 0 = none.
  double junction_ratio = 0.0;
  double A_v_junction =
      0.0;  ///< V_z / A_v_junction = web shear stress at the end of the fillet [m^2].
  /// V_z / A_v_flange = shear stress along the flange of an I, a channel or a T beside its web,
  /// where the bending stress is full [m^2]; 0 = none.
  double A_v_flange = 0.0;
  std::vector<PlateElement> plates;  ///< Empty for a solid.
  /// Corners of the convex outline of a section without two axes of symmetry. Where there are any,
  /// the bending stress is taken at them with I_y, I_z and I_yz, not from W_el_y and W_el_z.
  std::vector<SectionPoint> fibres;

  /// Radii of gyration sqrt(I/A) [m].
  [[nodiscard]] BISMAR_API double i_y() const;
  [[nodiscard]] BISMAR_API double i_z() const;
  /// Second moments about the principal axes: major u, minor v [m^4].
  [[nodiscard]] BISMAR_API double I_u() const;
  [[nodiscard]] BISMAR_API double I_v() const;
  /// Angle from y to the major principal axis u, positive from y towards z [rad]; 0 where I_yz is 0
  /// and I_y >= I_z, pi/2 where I_yz is 0 and I_z > I_y.
  [[nodiscard]] BISMAR_API double principal_angle() const;
};

/// The word of a family in jobs, tables and messages ("round tube"), and back.
[[nodiscard]] BISMAR_API std::string_view name(SectionFamily family);
[[nodiscard]] BISMAR_API std::optional<SectionFamily> section_family(std::string_view name);

}  // namespace bismar
