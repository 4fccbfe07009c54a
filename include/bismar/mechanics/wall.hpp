// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>

#include <cstdint>

namespace bismar {

/// Material factor of the wall limits [-].
///
///     epsilon = sqrt(235 MPa / f . E / 210 GPa)
///
/// For steel the second ratio is 1. A higher strength makes the plain limit stricter.
/// @param strength  f, yield (or compressive) strength [Pa], > 0.  @param youngs_modulus  E [Pa], >
/// 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1993-1-1:2005 Table 5.2; E/210 GPa as EN 1993-1-4:2006 section 5.2.
[[nodiscard]] BISMAR_API double wall_epsilon(double strength, double youngs_modulus);

/// Largest c/t (or d/t) of a wall in a class [-].
///
///                                   class 1          class 2          class 3
///     internal part in compression  33 epsilon       38 epsilon       42 epsilon
///     internal part in bending      72 epsilon       83 epsilon      124 epsilon
///     outstand                       9 epsilon       10 epsilon       14 epsilon
///     round tube                    50 epsilon^2     70 epsilon^2     90 epsilon^2
///
/// Class 1 may turn as a plastic hinge, class 2 reaches its plastic moment, class 3 its strength
/// before it buckles.
/// @param wall_class  1, 2 or 3.  @param epsilon  Material factor [-], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place "wall_class", "epsilon".
/// Source: EN 1993-1-1:2005 Table 5.2; the tube's limits from memory.
[[nodiscard]] BISMAR_API double wall_class_limit(PlateElement::Kind kind,
                                                 int wall_class,
                                                 double epsilon);

/// wall_class_limit() of class 3.
/// @param epsilon  Material factor [-], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place "epsilon".
[[nodiscard]] BISMAR_API double class_3_limit(PlateElement::Kind kind, double epsilon);

/// Class 1 to 4 of a wall: the least whose limit it meets (to 1e-12), 4 where none.
/// @param ratio  c/t or d/t [-], > 0.  @param epsilon  Material factor [-], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place "ratio", "epsilon".
[[nodiscard]] BISMAR_API int wall_class(PlateElement::Kind kind, double ratio, double epsilon);

/// Class of a section in pure bending about y or in pure compression: that of its worst wall; 1
/// for a solid. In compression the webs count as compressed throughout.
/// @param epsilon  Material factor [-], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place "epsilon".
/// Source: EN 1993-1-1:2005 5.5.2(6).
[[nodiscard]] BISMAR_API int section_class(const SectionProperties& section,
                                           double epsilon,
                                           bool compressed);

/// epsilon, raised where the acting compression is below the strength [-].
///
///     epsilon sqrt(f / sigma_com) for sigma_com < f
///
/// Not where the member's buckling is verified (5.5.2(10)).
/// @param epsilon  Material factor [-], > 0.  @param strength  f [Pa], > 0.
/// @param stress  sigma_com, largest compression in the wall [Pa], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1993-1-1:2005 5.5.2(9).
[[nodiscard]] BISMAR_API double acting_wall_epsilon(double epsilon, double strength, double stress);

/// Material factor of the wall limits of aluminium [-].
///
///     epsilon = sqrt(250 MPa / f_o)
///
/// The modulus of aluminium, 70 GPa, is in the limits below.
/// @param strength  f_o, 0.2 % proof strength [Pa], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1999-1-1:2007 Table 6.2.
[[nodiscard]] BISMAR_API double aluminium_wall_epsilon(double strength);

/// Largest c/t (or d/t) of an unwelded aluminium wall in class 3 [-].
///
///                                                      class A        class B
///     internal part in compression, beta = c/t         22 epsilon     18 epsilon
///     internal part in bending, beta = 0.40 c/t        55 epsilon     45 epsilon
///     outstand, beta = c/t                              6 epsilon      5 epsilon
///     round tube, beta = 3 sqrt(d/t)                 53.8 epsilon^2   36 epsilon^2
///
/// @param epsilon  Material factor [-], > 0.  @param class_a  Heat-treated tempers; else class B.
/// @throws bismar::Error  not_finite or out_of_range, place "epsilon".
/// Source: EN 1999-1-1:2007 6.1.4.3 and Table 6.2 (22 seen in a worked example; all others from
/// memory).
[[nodiscard]] BISMAR_API double aluminium_class_3_limit(PlateElement::Kind kind,
                                                        double epsilon,
                                                        bool class_a);

/// Buckling coefficient k_tau of a long web in shear [-]: supported along both edges (5.34), or a
/// stem with one edge free (1.2).
/// Source: EN 1993-1-5:2006 (A.5) without stiffeners; stem: AISC 360-16 G3 (from memory).
enum class WebEdges : std::uint8_t { both_held, one_free };
[[nodiscard]] BISMAR_API double web_shear_coefficient(WebEdges edges);

/// Relative slenderness of a web in shear [-].
///
///     lambda_w = 0.76 sqrt(f / tau_cr),   tau_cr = k_tau pi^2 E / (12 (1 - nu^2)) (t / h_w)^2
///
/// with nu = 0.3: h_w / (86.4 t epsilon) for steel held along both edges, and within 1 % the 0.35
/// h_w / t sqrt(f_o / E) of aluminium. Long web without stiffeners between its supports.
/// @param edges  How its long edges are held.  @param ratio  h_w / t [-], > 0.
/// @param strength  f, yield or proof strength [Pa], > 0.  @param youngs_modulus  E [Pa], > 0.
/// @throws bismar::Error  not_finite or out_of_range, place is the argument's name.
/// Source: EN 1993-1-5:2006 5.3(3); EN 1999-1-1:2007 6.7.4.1 (both from memory).
[[nodiscard]] BISMAR_API double web_shear_slenderness(WebEdges edges,
                                                      double ratio,
                                                      double strength,
                                                      double youngs_modulus);

/// Contribution of the web to the resistance to shear buckling chi_w [-], non-rigid end posts, eta
/// = 1: 1 up to 0.83, 0.83 / lambda_w beyond.
/// @param slenderness  lambda_w [-], >= 0.
/// @throws bismar::Error  not_finite or out_of_range, place "slenderness".
/// Source: EN 1993-1-5:2006 Table 5.1 (from memory).
[[nodiscard]] BISMAR_API double web_shear_factor(double slenderness);

}  // namespace bismar
