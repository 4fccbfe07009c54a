// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/section_trends.hpp>
#include <bismar/numeric/interval.hpp>

#include <span>

namespace bismar {

/// A box of sizes of one family.
struct SizesBox {
  SectionFamily family = SectionFamily::solid_round;
  /// One interval for each of size_variables(family), which are dimensions(family) without radii
  /// and slopes [m], > 0. Flanges of channels are parallel.
  std::span<const Interval> sizes = {};
  Interval root_radius = {};  ///< Of I, channel, T, angle [m], >= 0.
  Interval toe_radius = {};   ///< Of an angle [m], >= 0.
  /// Corner radii of a rectangular tube by the standard of its forming, as make_section has them
  /// (EN 10210, EN 10219, else sharp); of an I its buckling curves.
  Forming forming = Forming::unknown;
  /// What the sizes are multiplied with before they are lengths in metres: the steps of EN 10219 at
  /// 6 and 10 mm of wall are looked for in wall x scale. The enclosure is that of the sizes as they
  /// are.
  Interval scale = 1.0;
};

/// An enclosure of all sections of a box.
///
/// `best` is a made-up section, as a rule no real one: each of its numbers stands at the end of its
/// range where utilisations are least, so that
///
///     u(make_best(box, state.best_section(...))) <= u(any section of the box)
///
/// for every limit state that names a best section, every load case and every material, rounding
/// aside (1e-9), for sections of the same sizes times one scale too. As the box shrinks to a point
/// both meet, but where u jumps (buckling curves that change with
/// h / b: see critical_ratios) and in fatigue, which stays 7e-4 below.
/// Holds where is_enclosable() says so. Limit states on the section alone (envelope, least wall)
/// are bounded likewise.
///
/// How: each number is monotone in each size, or as good as: q x^p rises (or falls) with a small
/// p, so that the number at one corner, times (x_1 / x_0)^p, bounds it. The exponents were
/// observed, not proved: the extreme logarithmic slopes of hundreds of thousands of random sections
/// of the proportions of is_enclosable(), rounded outward; random sections in the tests hold the
/// enclosures to them. I, A and W of every family, and the stiffness of an angle, are monotone as
/// the larger section contains the smaller one.
struct SectionBox {
  /// False: no sizes of the box make a section. True: some do; nothing else is then to be read.
  bool any = false;
  /// For BestSection::stiff. Plastic moduli are infinite (no limit state reads them), A_s and the
  /// rest finite and > 0.
  SectionProperties best;
  Interval area;              ///< [m^2]
  Interval perimeter;         ///< [m]
  Interval inner_perimeter;   ///< [m]
  Interval height;            ///< [m]
  Interval width;             ///< [m]
  Interval wall;              ///< [m]
  Interval ruling_dimension;  ///< As SectionProperties has it [m].

  /// 4 A / U, by which hardened bars that are not round are judged [m].
  [[nodiscard]] Interval ruling_by_surface() const { return Interval(4.0) * area / perimeter; }

  // What turns `best` into the other best sections; see BestSection.
  double twisting_share = 1.0;  ///< >= 1, on I_t and I_w of a column.
  double slim_area = 0.0;       ///< [m^2], so small that no section has larger radii of gyration.
  double large_height = 0.0;    ///< [m]
  double large_width = 0.0;     ///< [m]
  double large_ruling = 0.0;    ///< [m]
};

/// Whether a family has enclosures: all but the polygon.
[[nodiscard]] BISMAR_API bool can_enclose(SectionFamily family);

/// Whether every section of the box has proportions for which enclosures hold: any of solids and of
/// round tubes; a width from 1/20 to 20 heights of rectangular and elliptical tubes; and
///
///     I, channel, T   b / h from 0.1 to 3, t_f <= 0.15 min(h, b), 0.05 t_f <= t_w <= 2 t_f,
///                     r <= 2 t_f
///     angle           b / h from 1/3 to 3, t <= 0.25 min(h, b), r <= 1.2 t, toe <= 0.8 t
///
/// All sizes of such a profile make a section. A part of such a box is one too, so that a search
/// asks for the whole once.
/// @throws bismar::InternalError  wrong count of sizes or a polygon.
[[nodiscard]] BISMAR_API bool is_enclosable(const SizesBox& box);

/// The enclosure, into an object whose memory is used again. No allocation but for the plates and
/// fibres of a first call.
/// @throws bismar::InternalError  wrong count of sizes, an empty interval, a size that is not > 0,
/// a
///   polygon, or a box that is not enclosable.
BISMAR_API void enclose_sections(const SizesBox& box, SectionBox& out);
[[nodiscard]] BISMAR_API SectionBox enclose_sections(const SizesBox& box);

/// The best section of the kind, into a section that is there already, not box.best itself.
BISMAR_API void make_best(const SectionBox& box, BestSection kind, SectionProperties& out);

/// The material as every limit state has to see it beside a best section: density and thermal
/// expansion times A_lower / A_upper, so that mass per length and the force of held ends, which
/// grow with A, are the least of the box. (Elongation by heat alone needs no best section; with
/// this material its bound is only less tight.)
[[nodiscard]] BISMAR_API MemberMaterial lightened(const MemberMaterial& material,
                                                  const SectionBox& box);

/// Ratios h / b at which a buckling curve changes, so that a search that splits there sees no jump
/// inside a box: 1.2 and 2 for I sections, hot-finished; none for other families.
[[nodiscard]] BISMAR_API std::span<const double> critical_ratios(SectionFamily family,
                                                                 Forming forming);

}  // namespace bismar
