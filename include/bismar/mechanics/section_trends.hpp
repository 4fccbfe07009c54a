// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/numeric/interval.hpp>
#include <bismar/solver/trend.hpp>

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>

namespace bismar {

/// A size of a section that may be free. The height of a round bar or tube is its diameter, of a
/// square its side, of a hexagon its width across flats; the wall of an angle is its thickness.
enum class SizeVariable : std::uint8_t { height, width, wall, web, flange };

/// A number of SectionProperties.
enum class SectionQuantity : std::uint8_t {
  area,
  perimeter,
  inner_perimeter,
  second_moment_y,          ///< I_y
  second_moment_z,          ///< I_z
  torsion_constant,         ///< I_t
  warping_constant,         ///< I_w
  elastic_modulus_y,        ///< W_el_y
  elastic_modulus_z,        ///< W_el_z
  plastic_modulus_y,        ///< W_pl_y
  plastic_modulus_z,        ///< W_pl_z
  torsion_modulus,          ///< W_t
  peak_shear_area_y,        ///< A_v_y
  peak_shear_area_z,        ///< A_v_z
  junction_shear_area,      ///< A_v_junction
  flange_shear_area,        ///< A_v_flange
  deflection_shear_area_y,  ///< A_s_y
  deflection_shear_area_z,  ///< A_s_z
  junction_ratio,
  height,
  width,
  wall,
  ruling_dimension,
  largest_plate_ratio,   ///< Of all plates; 0 without plates.
  radius_of_gyration_y,  ///< i_y
  radius_of_gyration_z,  ///< i_z
};
inline constexpr std::size_t section_quantity_count = 26;

/// What is fixed beside the free sizes. Flanges of channels are parallel.
struct FixedSizes {
  double root_radius = 0.0;          ///< Of I, channel, T, angle [m].
  double toe_radius = 0.0;           ///< Of an angle [m].
  Corners corners = Corners::sharp;  ///< Of a rectangular tube: sharp or EN 10210.
};

/// For which sizes a trend is declared.
enum class Proportions : std::uint8_t {
  any,      ///< All that make a section.
  slender,  ///< Usual walls, see is_slender.
};

/// The free sizes of a family, in the order of all spans here; none of a polygon.
[[nodiscard]] BISMAR_API std::span<const SizeVariable> size_variables(SectionFamily family);

/// The section with these sizes [m]; its forming is unknown where the family has one.
/// @throws bismar::Error  as the section's own function; InternalError for a wrong count of sizes
///   or a polygon.
[[nodiscard]] BISMAR_API SectionProperties section_of(SectionFamily family,
                                                      std::span<const double> sizes,
                                                      const FixedSizes& fixed = {});

[[nodiscard]] BISMAR_API double quantity_of(const SectionProperties& section,
                                            SectionQuantity quantity);

/// Whether the sizes are of usual proportions:
///
///     rectangular, elliptical tube   t <= 0.2 min(h, b)
///     I, channel                     t_f/3 <= t_w <= t_f <= 0.1 min(h, b), b <= h, r <= 1.5 t_f
///     T                              t_f/3 <= t_w <= t_f <= 0.1 min(h, b), h/2 <= b <= 2 h,
///                                    r <= 1.5 t_f
///     angle                          t <= 0.2 min(h, b), h/2 <= b <= 2 h, r <= 1.5 t
///
/// Any size of the other families.
[[nodiscard]] BISMAR_API bool is_slender(SectionFamily family,
                                         std::span<const double> sizes,
                                         const FixedSizes& fixed = {});

/// How the quantity moves when this size alone grows, the others and FixedSizes stay, and both ends
/// are sections (of the stated proportions): `rises` never falls, `falls` never rises, `constant`
/// does neither, `neither` does both somewhere. Corners by EN 10219 jump at 6 and 10 mm of wall and
/// are not covered, nor are radii that grow with the section.
///
/// Observed, not proved: random sections, thousands a family and size, hold every sign to it and
/// show both ways for each `neither`.
///
/// What to do at `neither`: section_bound takes W_el from I and a distance, radii of gyration from
/// I and A, A_v of I and T from its factors. I_y, I_z and W of a tube with EN 10210 corners rise
/// with the wall up to 0.205 of the smaller side (the corner radius grows with the wall), W_t of a
/// sharp or an elliptical tube up to 1/3: the slender proportions.
/// @throws bismar::InternalError  where the family does not have that size.
[[nodiscard]] BISMAR_API Trend section_trend(SectionFamily family,
                                             SectionQuantity quantity,
                                             SizeVariable variable,
                                             Proportions proportions = Proportions::any);

/// An enclosure of the quantity over a box of sizes: from the corners where it is monotone in every
/// size, widened by 1e-12 for rounding; else from its parts, which is wider. Nothing where neither
/// serves (of those, where a corner that is needed makes no section). As sure as the trends are.
/// @param box  One interval for each of size_variables(family) [m].  @param proportions  `slender`
///   promises that only slender sections of the box matter: the enclosure may miss others.
/// @throws bismar::InternalError  wrong count of intervals.
[[nodiscard]] BISMAR_API std::optional<Interval> section_bound(
    SectionFamily family,
    SectionQuantity quantity,
    std::span<const Interval> box,
    const FixedSizes& fixed = {},
    Proportions proportions = Proportions::any);

}  // namespace bismar
