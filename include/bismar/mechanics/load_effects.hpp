// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/member.hpp>

#include <array>
#include <optional>
#include <vector>

namespace bismar {

/// Internal forces at one station: what lies beyond x does to the section. V is the resultant along
/// the axis, M its moment (E I w'' = M), so that a cantilever loaded along an axis has V, M > 0.
struct Station {
  double x = 0.0;  ///< [m]
  InternalForces forces = {};
  /// What 1 N/m of the member's own mass along each accelerated axis does here: V and M of the
  /// planes, magnitudes. See acting_forces().
  InternalForces own = {};
};

/// How the bending moment of one plane runs along the member, for equivalent uniform moments.
struct MomentShape {
  double largest = 0.0;              ///< max over x of |M| [N m].
  std::array<double, 3> quarters{};  ///< M at L/4, L/2 and 3L/4, signed [N m].
  std::optional<double> end_ratio =
      {};  ///< psi in [-1, 1], the end moment of lesser magnitude over
           ///< the other, where M is linear over the whole length.
  /// How much of the loads twists a member that turns aside [N], >= 0: integral of w |q| dx, point
  /// loads likewise, with w = sin^2(pi x/L) between supports at both ends, x/L of a cantilever,
  /// and with an overhang x (s - x) / (s L) up to the second support at s, (x - s) / L beyond it.
  double load_share = 0.0;
};

/// What 1 N/m of own mass does to one plane.
struct OwnMassEffects {
  double deflection = 0.0;        ///< As LoadEffects::deflection_z, a N/m [m^4].
  double shear_deflection = 0.0;  ///< a N/m [m^2].
  double rotation = 0.0;          ///< a N/m [m^3].
};

/// First-order load effects of one load case: they depend on the geometry along the length only,
/// so they are reduced once and hold for every section and material.
struct LoadEffects {
  /// Every station not covered by another: equal N and nothing larger in |V_y|, |V_z|, |M_y|,
  /// |M_z|, |T|, of the loads and of own mass alike, so that they hold for a member of any weight.
  /// Interior extremes are included; both sides of a jump are stations. Ordered by x.
  /// Where moments trade against each other (both planes, loads and own mass) and one of them is
  /// curved, so that their weighted sum may peak anywhere between, the stretch is cut in 8 and the
  /// middle of each piece is a station with every component at the tangent or chord above it: on
  /// the safe side, by less than 1 % in random trials. Shear is not looked at there: against the
  /// moment of its own plane it peaks at an end of the stretch unless the member is shorter than
  /// about two heights.
  std::vector<Station> stations;
  double deflection_z = 0.0;                ///< max over x of |w_z| E I_y [N m^3].
  double deflection_y = 0.0;                ///< max over x of |w_y| E I_z [N m^3].
  double shear_deflection_z = 0.0;          ///< max over x of |w_s| G A_s,z, shear part [N m].
  double shear_deflection_y = 0.0;          ///< Likewise along y [N m].
  double rotation_z = 0.0;                  ///< max over x of |w_z'| E I_y [N m^2].
  double rotation_y = 0.0;                  ///< max over x of |w_y'| E I_z [N m^2].
  double twist = 0.0;                       ///< max over x of |phi| G I_t [N m^2].
  double compression = 0.0;                 ///< Largest axial compression [N], >= 0.
  double tension = 0.0;                     ///< Largest axial tension [N], >= 0.
  bool bends = false;                       ///< Any M_y or M_z.
  bool twists = false;                      ///< Any T.
  double buckling_length_y = 0.0;           ///< K L for buckling in bending about y [m].
  double buckling_length_z = 0.0;           ///< K L for buckling in bending about z [m].
  Support support_z = Support::cantilever;  ///< As in the load case.
  Support support_y = Support::cantilever;
  MomentShape moment_y;         ///< M_y, of loads along z, without own mass.
  MomentShape moment_z;         ///< M_z, of loads along y, without own mass.
  double acceleration_z = 0.0;  ///< [m/s^2]; own mass acts with rho A times this.
  double acceleration_y = 0.0;  ///< [m/s^2]
  OwnMassEffects own_z;
  OwnMassEffects own_y;
  std::optional<double> eccentricity = {};     ///< As in the load case [m].
  double temperature_change = 0.0;             ///< [K], >= 0.
  bool restrained = false;                     ///< As in the load case.
  std::optional<FatigueLoading> fatigue = {};  ///< As in the load case.
  std::optional<double> second_support = {};   ///< As in the load case [m].
};

/// Theoretical effective length factor K of a column held as `support` says, compressed over its
/// whole length.
///
///     cantilever 2, pinned_pinned 1, fixed_pinned 0.699156, fixed_fixed 0.5
///
/// With the second support at `span` of the length the part beyond it overhangs with a free end; K
/// is then the first root of the stability equation, K = pi / lambda, with alpha = span lambda and
/// beta = lambda - alpha:
///
///     pinned_pinned   cot beta = 1 / alpha - cot alpha
///     fixed_pinned    cot beta = (2 - 2 cos alpha - alpha sin alpha) / (sin alpha - alpha cos
///                     alpha)
///
/// so that K goes from the value above to 2 as the span vanishes. No allowance for supports that
/// give: textbooks recommend larger factors where ends are not truly fixed.
///
/// @param span  Place of the second support over the length, in (0, 1]; pinned_pinned and
///   fixed_pinned only, the others take 1.
/// @throws bismar::Error  "span": not finite or outside its range.
/// Source: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., chapter 2 (from memory); the
/// fixed-pinned value is pi over the root 4.493409 of tan x = x.
[[nodiscard]] BISMAR_API double effective_length_factor(Support support, double span = 1.0);

/// Reduces the loads of `load_case` on a member of length `length` [m].
///
/// Superposition of exact piecewise polynomials (Euler-Bernoulli, first order); peaks between
/// stations are true extremes: roots of the derivative, not samples. Statically indeterminate
/// planes by the force method with the slender member's reactions, which do not depend on section
/// and material. Effective lengths: effective_length_factor() times the length. Torque is held at x
/// = 0 alone, whatever the supports.
///
/// Shear deflections are exact for statically determinate planes (cantilever, pinned_pinned); for
/// the others they are first-order in E I / (G A_s L^2): safe under a single load, where by the
/// theorem of minimum complementary energy shear adds less and less.
///
/// Internal forces given directly are one more station, at x = 0, with their own N; own mass does
/// not act there, they bring no deflection and no twist, and their moments are taken as uniform
/// over the length; end_ratio is then 1, but empty where other loads act in the plane.
///
/// Accuracy: relative error about 1e-12 of the largest force or moment; values below 1e-13 of the
/// sum of all loads are taken as zero (the ends of a pinned member, loads that cancel).
///
/// @throws bismar::Error  every fault, place "/length", "/loads/2/at" and so on: a length that is
/// not
///   finite and > 0, a load that is not finite, a place outside [0, length] (1e-12 of it allowed
///   for unit conversion), a distributed load that does not end after it begins, a second support
///   before a millionth of the length or beyond it, or on a plane that is neither pinned_pinned nor
///   fixed_pinned (conflict), fewer cycles than 1 or a stress ratio outside [-1, 1], a negative
///   eccentricity, a load case without any load, direct force, acceleration or change of
///   temperature (empty, "/loads").
/// Source: force method on exact integrals (Timoshenko, Strength of Materials, part 1, from
/// memory); formulas checked against Roark's tables (tests/checks).
[[nodiscard]] BISMAR_API LoadEffects reduce(const LoadCase& load_case, double length);

}  // namespace bismar
