// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>

namespace bismar {

// Tightening torque from preload: torque_from_preload in member.hpp. All functions of this header
// throw bismar::Error with not_finite or out_of_range, the place being the argument's name, for an
// argument outside the range that is stated beside it.

/// Stress area of a metric thread [m^2].
///
///     A_s = pi/4 (d - 0.9382 P)^2
///
/// @param diameter  d, nominal [m], > 0.  @param pitch  P [m], > 0 and below d.
/// Source: ISO 898-1.
[[nodiscard]] BISMAR_API double thread_stress_area(double diameter, double pitch);

/// The same in three significant digits of a square millimetre, as ISO 898-1 prints it and makes
/// its proof and ultimate loads of it [m^2].
[[nodiscard]] BISMAR_API double nominal_stress_area(double diameter, double pitch);

/// The property classes of high-strength steel bolts.
enum class BoltClass : std::uint8_t { c8_8, c10_9, c12_9 };

/// What the two numbers of a designation say [Pa].
struct NominalBoltStrength {
  double tensile = 0.0;  ///< R_m,nom
  double yield = 0.0;    ///< R_e,nom
};

///     R_m,nom = 100 first,   R_e,nom = 10 first second   [MPa]
///
/// so that 8.8 is 800 and 640 MPa.
/// @param first  8, 10, 12 ..., 1 to 20.  @param second  8, 9 ..., 1 to 9.
/// Source: ISO 898-1.
[[nodiscard]] BISMAR_API NominalBoltStrength designated_strength(int first, int second);

/// Least strengths of a property class [Pa].
struct BoltStrength {
  double tensile = 0.0;       ///< R_m,min
  double proof = 0.0;         ///< R_p0.2,min
  double proof_stress = 0.0;  ///< S_p, no lasting stretch under the proof load.
};

/// Strengths of a class at a thread size.
///
/// S_p: 8.8 580 MPa up to d = 16 mm, 600 above; 10.9 830; 12.9 970. R_m,min: 800 and 830; 1040;
/// 1220. R_p0.2,min: 640 and 660; 940; 1100.
/// @param diameter  d, nominal [m], > 0.
/// Source: ISO 898-1 (values seen in public listings; 640 MPa of small 8.8 from memory).
[[nodiscard]] BISMAR_API BoltStrength bolt_strength(BoltClass bolt_class, double diameter);

/// Proof load of the standard, F_p = A_s,nom S_p [N].
[[nodiscard]] BISMAR_API double proof_load(BoltClass bolt_class, double diameter, double pitch);

/// Least ultimate load of the standard, F_m = A_s,nom R_m,min [N].
[[nodiscard]] BISMAR_API double ultimate_load(BoltClass bolt_class, double diameter, double pitch);

/// How a bolt was left, for its torque factor.
enum class BoltFinish : std::uint8_t {
  nonplated_black,
  zinc_plated,
  lubricated,
  cadmium_plated,
  anti_seize,
};

/// Torque factor K of T = K F d [-]: 0.30, 0.20, 0.18, 0.16, 0.12 in the order of BoltFinish. It
/// scatters by a quarter and more; other tables have 0.15 lightly oiled and 0.20 plain dry.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., Table 8-15.
[[nodiscard]] BISMAR_API double torque_factor(BoltFinish finish);

/// Preload that a tightening torque makes, F = T / (K d) [N].
/// @param torque T [N m], > 0.  @param torque_factor K [-], > 0.  @param diameter d [m], > 0.
[[nodiscard]] BISMAR_API double preload_from_torque(double torque,
                                                    double torque_factor,
                                                    double diameter);

/// Stress of a preloaded bolt in its thread [Pa], F / A_s.
/// @param force  F [N], >= 0.  @param stress_area  A_s [m^2], > 0.
[[nodiscard]] BISMAR_API double bolt_stress(double force, double stress_area);

/// Preload that a joint is tightened to: a share of the proof load, 0.75 where it is taken apart
/// again, 0.90 where not [N].
/// @param share  [-], > 0 and at most 1.  @param stress_area  [m^2], > 0.
/// @param proof_stress  S_p [Pa], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 8-9.
[[nodiscard]] BISMAR_API double preload_from_proof(double share,
                                                   double stress_area,
                                                   double proof_stress);

/// Share of an outer load that the bolt of a joint carries, C = k_b / (k_b + k_m) [-].
/// @param bolt_stiffness  k_b [N/m], > 0.  @param member_stiffness  k_m [N/m], > 0.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 8-7.
[[nodiscard]] BISMAR_API double joint_stiffness_share(double bolt_stiffness,
                                                      double member_stiffness);

/// Force in the bolt of a joint that stays closed, F_b = F_i + C P [N].
/// @param preload  F_i [N], >= 0.  @param share  C [-], in [0, 1].
/// @param outer_load  P of one bolt, pulling [N], >= 0.
/// @throws also with out_of_range, place "outer_load", where (1 - C) P exceeds F_i: the joint opens
///   and the formula ends.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 8-7.
[[nodiscard]] BISMAR_API double joint_bolt_force(double preload, double share, double outer_load);

}  // namespace bismar
