// SPDX-License-Identifier: MIT
// Interaction factors, cross-section resistances, wall classes, timber and aluminium by formula.
#include <bismar/mechanics/aluminium.hpp>
#include <bismar/mechanics/beam_column.hpp>
#include <bismar/mechanics/cross_section_resistance.hpp>
#include <bismar/mechanics/timber.hpp>
#include <bismar/mechanics/wall.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <functional>
#include <string>

namespace bismar {

namespace {

std::string fault_of(const std::function<void()>& call) {
  try {
    call();
  } catch (const Error& error) {
    return error.faults().front().where;
  }
  return "no fault";
}

}  // namespace

TEST_CASE("Elastic interaction factors, by hand, and their caps") {
  BeamColumn m{.kind = BeamColumnKind::elastic,
               .twists = false,
               .lambda_y = 0.5,
               .lambda_z = 2.0,
               .n_y = 0.3,
               .n_z = 0.4,
               .C_my = 0.9,
               .C_mz = 0.6};
  // 0.9 (1 + 0.6 x 0.5 x 0.3) = 0.981; 0.6 (1 + 0.6 x 0.4) = 0.744, the cap.
  const InteractionFactors k = interaction_factors(m);
  CHECK(k.yy == Approx(0.981));
  CHECK(k.zz == Approx(0.744));
  CHECK(k.yz == k.zz);
  CHECK(k.zy == Approx(0.8 * 0.981));
  m.twists = true;  // 1 - 0.05 x 0.4 / 0.75
  CHECK(interaction_factors(m).zy == Approx(1.0 - 0.02 / 0.75));
  m.kind = BeamColumnKind::i_plastic;
  m.lambda_z = 0.3;  // 0.9, below 1 - 0.1 x 0.3 x 0.4 / 0.75 = 0.984
  CHECK(interaction_factors(m).zy == Approx(0.9));
  CHECK(interaction_factors(m).zz == Approx(0.6));  // no rise below lambda 0.3
  m.lambda_y = 0.1;
  CHECK(interaction_factors(m).yy == Approx(0.9));
  // Without compression every factor is C_m, but for twisting.
  m = {.twists = false, .C_my = 0.7, .C_mz = 0.8};
  CHECK(interaction_factors(m).yy == 0.7);
  CHECK(interaction_factors(m).zz == 0.8);
}

TEST_CASE("Cross-sections: special values") {
  CHECK(plastic_moment_share_y(0.0, 0.3) == 1.0);
  CHECK(plastic_moment_share_y(1.0, 0.3) == 0.0);
  CHECK(plastic_moment_share_z(0.2, 0.3) == 1.0);
  CHECK(plastic_moment_share_z(1.0, 0.3) == 0.0);
  CHECK(plastic_moment_share_round(1.0) == 0.0);
  CHECK(biaxial_exponents_tube(0.9).alpha == 6.0);
  CHECK(biaxial_exponents_tube(1.0).alpha == 6.0);
  CHECK(biaxial_exponents_i(0.1).beta == 1.0);
  CHECK(web_share(1.0, 1.0, 0.1) == 0.5);
  // Beyond lambda_r: 0.69 E / lambda^2 S, compact: Z F_y.
  CHECK(aisc_minor_axis_strength(1.0, 1e4, 1.2, 1.0, 200.0).strength == Approx(0.1725));
  CHECK(aisc_minor_axis_strength(1.0, 1e4, 1.2, 1.0, 10.0).strength == 1.2);
  CHECK(aisc_interaction(0.2, 0.45, 0.45) == Approx(aisc_interaction(0.2 - 1e-12, 0.45, 0.45)));
}

TEST_CASE("A wall at its limit is in the better class") {
  using Kind = PlateElement::Kind;
  CHECK(wall_class(Kind::outstand, 9.0, 1.0) == 1);
  CHECK(wall_class(Kind::outstand, 9.001, 1.0) == 2);
  CHECK(wall_class(Kind::outstand, 14.0, 1.0) == 3);
  CHECK(wall_class(Kind::outstand, 14.001, 1.0) == 4);
  CHECK(wall_class(Kind::round, 90.0 * 0.25, 0.5) == 3);
  CHECK(section_class(solid_round(0.1), 1.0, true) == 1);
  CHECK(acting_wall_epsilon(0.8, 355e6, 400e6) == 0.8);
}

TEST_CASE("Timber: size factors are capped and k_crit jumps as the standard's does") {
  CHECK(size_factor(TimberKind::solid, 0.02) == 1.3);
  CHECK(size_factor(TimberKind::glued_laminated, 0.1) == 1.1);
  CHECK(size_factor(TimberKind::solid, 0.3) == 1.0);
  CHECK(lateral_buckling_factor(0.0) == 1.0);
  CHECK(lateral_buckling_factor(0.7501) == Approx(0.9974).epsilon(1e-4));
  CHECK(lateral_buckling_factor(1.4001) == Approx(0.5102).epsilon(1e-3));
  // 0.78 x 50^2 x 7400 / (200 x 3000) = 24.05 MPa.
  CHECK(timber_critical_bending_stress(0.05, 0.2, 7.4e9, 3.0) == Approx(24.05e6));
  CHECK(lateral_length_factor(TimberLoad::uniform_moment) == 1.0);
  CHECK(lateral_length_factor(TimberLoad::uniform_load) == 0.9);
  CHECK(lateral_length_factor(TimberLoad::central_load) == 0.8);
}

TEST_CASE("Aluminium: weld factors and the constants of thin walls, by hand") {
  // Class A, no strength lost: 1 - 0.15 lambda^(1.3 (1 - lambda)): 0.85 at 1, 0.9044 at 0.5.
  CHECK(longitudinal_weld_factor(true, 1.0, 1.0) == Approx(0.85));
  CHECK(longitudinal_weld_factor(true, 0.5, 1.0) == Approx(0.9044).epsilon(1e-4));
  // A_1 / A = 0.7 at 0.5: 1 - 0.3 x 0.3162 - 0.12 x 0.6373 = 0.8287.
  CHECK(longitudinal_weld_factor(true, 0.5, 0.7) == Approx(0.8287).epsilon(1e-4));
  // A stocky welded column keeps A_1 / A.
  CHECK(longitudinal_weld_factor(true, 0.0, 0.7) == Approx(0.7));
  // Class B at 1: 1 + 0.04 / 2 - 0.22 = 0.80; none up to 0.2.
  CHECK(longitudinal_weld_factor(false, 1.0, 1.0) == Approx(0.80));
  CHECK(longitudinal_weld_factor(false, 0.2, 1.0) == 1.0);
  CHECK(aluminium_wall_factor({}, 22.0) == 1.0);
  // 29/25 - 198/625 and 10/8 - 24/64.
  CHECK(aluminium_wall_factor({.class_a = false}, 25.0) == Approx(0.8432));
  CHECK(aluminium_wall_factor({.class_a = true, .welded = true}, 25.0) == Approx(0.8432));
  CHECK(aluminium_wall_factor({.internal = false}, 8.0) == Approx(0.875));
  CHECK(aluminium_lateral_curve(true).lambda_0 == 0.6);
  CHECK(aluminium_lateral_curve(false).alpha == 0.20);
}

TEST_CASE("Functions of beam-columns, sections, timber and aluminium name a wrong argument") {
  CHECK(fault_of([] { (void)equivalent_moment_factor(2.0); }) == "end_ratio");
  CHECK(fault_of([] { (void)interaction_factors({.lambda_y = -1.0}); }) == "member.lambda_y");
  CHECK(fault_of([] { (void)interaction_factors({.C_mLT = 0.25}); }) == "member.C_mLT");
  CHECK(fault_of([] { (void)beam_column_sums({.axial_y = -1.0}, {}); }) == "shares.axial_y");
  CHECK(fault_of([] { (void)aisc_interaction(0.1, -1.0, 0.0); }) == "moment_x");
  CHECK(fault_of([] { (void)bending_resistance(0.0, 1.0); }) == "modulus");
  CHECK(fault_of([] { (void)plastic_shear_resistance(1.0, -1.0); }) == "yield_strength");
  CHECK(fault_of([] { (void)web_share(1.0, 1.0, 0.6); }) == "flange");
  CHECK(fault_of([] { (void)plastic_moment_share_y(1.1, 0.2); }) == "axial");
  CHECK(fault_of([] { (void)plastic_moment_share_z(0.1, 0.6); }) == "web_share");
  CHECK(fault_of([] { (void)plastic_moment_share_round(std::nan("")); }) == "axial");
  CHECK(fault_of([] { (void)biaxial_exponents_tube(-0.1); }) == "axial");
  CHECK(fault_of([] { (void)biaxial_exponents_i(1.1); }) == "axial");
  CHECK(fault_of([] { (void)aisc_minor_axis_strength(1.0, 1.0, 1.0, 1.0, 0.0); }) ==
        "flange_slenderness");
  CHECK(fault_of([] { (void)wall_class_limit(PlateElement::Kind::round, 4, 1.0); }) ==
        "wall_class");
  CHECK(fault_of([] { (void)wall_class(PlateElement::Kind::round, 0.0, 1.0); }) == "ratio");
  CHECK(fault_of([] { (void)section_class(solid_round(0.1), 0.0, true); }) == "epsilon");
  CHECK(fault_of([] { (void)acting_wall_epsilon(1.0, 1.0, 0.0); }) == "stress");
  CHECK(fault_of([] { (void)modification_factor(4, LoadDuration::permanent); }) == "service_class");
  CHECK(fault_of([] { (void)size_factor(TimberKind::solid, 0.0); }) == "depth");
  CHECK(fault_of([] { (void)timber_critical_bending_stress(1.0, 1.0, 0.0, 1.0); }) == "modulus");
  CHECK(fault_of([] { (void)lateral_buckling_factor(-1.0); }) == "slenderness");
  CHECK(fault_of([] { (void)timber_column_sums({}, 0.0); }) == "k_m");
  CHECK(fault_of([] { (void)aluminium_wall_factor({}, 0.0); }) == "ratio");
  CHECK(fault_of([] { (void)longitudinal_weld_factor(true, 1.0, 1.5); }) == "area_share");
  CHECK(fault_of([] { (void)weld_zone_factor(1.0, 0.0); }) == "parent");
}

}  // namespace bismar
