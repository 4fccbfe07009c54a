// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/lateral_torsional.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <cstdint>
#include <string>
#include <vector>

/// What a member carries in bending about y before it turns aside, for the limit states that read
/// it.
namespace bismar::mechanics {

/// Whether a member of this kind may turn aside when it is bent about y: a flat bar, an ellipse, an
/// I, a channel or a T, deeper than stiff across, and not held. Closed sections do not; of an angle
/// and a polygon no formula is at hand.
[[nodiscard]] bool may_turn_aside(const SectionProperties& section, const MemberLimits& limits);

/// C1, C2 and the effective length factor of a load case.
struct LateralShape {
  MomentFactors factors = {};
  double k = 1.0;
  enum class Basis : std::uint8_t {
    falling_cantilever,
    cantilever,
    overhang,
    linear,
    quarters,
    own_mass
  };
  Basis basis = Basis::quarters;
};

/// Of a T, whose loads act at the flange and so at its shear centre, k alone counts (one moment
/// over the length, tip in compression). Of the others:
///
/// The supports hold against twist, turning in plan and warping stay free but for a cantilever's
/// root; the loads act at the top edge, z_g = h / 2.
///
/// - Cantilever whose moment falls from the root at least like that of a tip load: k = 1, C1 = 1,
///   C2 = 1.6. Against critical_load_factor() with the load at the top edge safe by a factor of
///   1.04 to 3 for a tip load, of up to 6 for others. Where the loads alone would bend it more (a
///   moment of the other sense acts too) C2 rises with load_share L / M_0. Any other: k = 2, C1 =
///   1, exact for one moment over the length, C2 = load_share L / (2 M_0): f^2 / f_M^2 + f / f_q =
///   1 with the factors f_M of the moment and f_q of the torques alone is never above f, as the
///   energies add; f_q by St Venant torsion to each load.
/// - With an overhang: k = 2, C1 = 1 on the whole length, C2 likewise, on the safe side.
/// - Linear moment without a load between the supports: C1 of linear_moment_factor(), C2 = 0.
/// - Else the lesser C1 of quarter_point_moment_factor() and quadratic_moment_factor(), at most
///   2.6, and C2 = r C1 with r = 1.153 L load_share / (pi^2 M_0) (Ritz, one term, set to the
///   tabulated 0.630 / 1.348 of a central load), at least 0.54 (pinned_pinned), 0.65
///   (fixed_pinned), 0.98 (fixed_fixed): the largest of one load anywhere and of a uniform load
///   without end moments. Loads that act against each other count with their magnitudes, on the
///   safe side. At most 3 % above critical_load_factor() in the tests.
/// - Where own mass acts across, C1 = 1, as its share is not known before the size; between pins r
///   covers any share of it, with a fixed end it is the larger one of the loads and of own mass.
[[nodiscard]] LateralShape lateral_shape(const LoadEffects& effects, double length);

/// Resistance against turning aside.
struct LateralResistance {
  LateralShape shape;
  double critical = 0.0;     ///< M_cr [N m]
  double slenderness = 0.0;  ///< lambda_LT or lambda_rel,m [-]
  double factor = 1.0;       ///< chi_LT or k_crit [-]
  double load = 0.0;         ///< M_b [N m]
};

/// Of a member that may turn aside. Ductile: chi_LT W_el f_y; timber: k_crit W_el f_m with E_0.05
/// and G_0.05 = E_0.05 / 16 (or G if less); other materials M_cr.
[[nodiscard]] LateralResistance lateral_resistance(const CheckInput& input);

/// Material values of the resistance above.
[[nodiscard]] std::vector<Symbol> lateral_symbols(const MemberMaterial& material);

/// The steps from M_cr to M_b.
[[nodiscard]] std::vector<std::string> lateral_steps(const CheckInput& input,
                                                     const LateralResistance& r);

/// The strength that bending is held against [Pa], without a weld.
[[nodiscard]] double strength_in_bending(const MemberMaterial& material);

/// Adds the symbols of strength_in_bending() that are not in the list yet.
void add_bending_symbols(const MemberMaterial& material, std::vector<Symbol>& symbols);

/// The largest moments along the member, own mass included [N m]. They are taken together wherever
/// each of them is.
struct PeakMoments {
  double M_y = 0.0;
  double M_z = 0.0;
};
[[nodiscard]] PeakMoments peak_moments(const CheckInput& input);

}  // namespace bismar::mechanics
