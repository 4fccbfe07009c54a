// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>

namespace bismar {

// All functions of this header throw bismar::Error with not_finite or out_of_range, all faults at
// once, the place being the argument's name (fields: "member.lambda_y"), for an argument outside
// the range that is stated beside it.

/// Equivalent uniform moment factor of a moment that is linear between the ends [-].
///
///     C_m = 0.6 + 0.4 psi >= 0.4
///
/// @param end_ratio  psi, the lesser end moment over the greater, in [-1, 1].
/// Source: EN 1993-1-1:2005 Table B.3.
[[nodiscard]] BISMAR_API double equivalent_moment_factor(double end_ratio);

/// How annex B of EN 1993-1-1 treats a member.
enum class BeamColumnKind : std::uint8_t {
  i_plastic,       ///< I or H of class 1 or 2.
  hollow_plastic,  ///< Rectangular or round tube of class 1 or 2.
  elastic,         ///< Class 3 (and 4): elastic moduli.
};

/// What the interaction factors are made of.
struct BeamColumn {
  BeamColumnKind kind = BeamColumnKind::elastic;
  bool twists = true;     ///< Susceptible to torsion (Table B.2); else Table B.1.
  double lambda_y = 0.0;  ///< Relative slenderness about y [-], >= 0.
  double lambda_z = 0.0;  ///< [-], >= 0.
  double n_y = 0.0;       ///< N_Ed / (chi_y N_Rk / gamma_M1) [-], >= 0.
  double n_z = 0.0;       ///< N_Ed / (chi_z N_Rk / gamma_M1) [-], >= 0.
  double C_my = 1.0;      ///< > 0.
  double C_mz = 1.0;      ///< > 0.
  double C_mLT = 1.0;     ///< > 0.25; read where the member twists.
};

/// k of method 2 [-].
struct InteractionFactors {
  double yy = 1.0;
  double yz = 1.0;
  double zy = 1.0;
  double zz = 1.0;
};

/// Interaction factors of method 2.
///
///     plastic  k_yy = C_my [1 + (lambda_y - 0.2) n_y] <= C_my (1 + 0.8 n_y)
///              k_zz = C_mz [1 + (2 lambda_z - 0.6) n_z] <= C_mz (1 + 1.4 n_z)       I
///              k_zz = C_mz [1 + (lambda_z - 0.2) n_z] <= C_mz (1 + 0.8 n_z)         tube
///              k_yz = 0.6 k_zz,   k_zy = 0.6 k_yy
///     elastic  k_yy = C_my (1 + 0.6 lambda_y n_y) <= C_my (1 + 0.6 n_y),  k_zz likewise
///              k_yz = k_zz,   k_zy = 0.8 k_yy
///     twisting k_zy = 1 - c lambda_z n_z / (C_mLT - 0.25) >= 1 - c n_z / (C_mLT - 0.25),
///              c = 0.1 plastic, 0.05 elastic; for lambda_z < 0.4 plastic
///              k_zy = 0.6 + lambda_z <= 1 - 0.1 lambda_z n_z / (C_mLT - 0.25)
///
/// Factors below lambda = 0.2 (I about z: 0.3) are C_m.
/// Source: EN 1993-1-1:2005 annex B, Tables B.1 and B.2 (elastic columns from memory).
[[nodiscard]] BISMAR_API InteractionFactors interaction_factors(const BeamColumn& member);

/// Shares of a member in compression and bending, each demand over resistance [-], >= 0.
struct BeamColumnShares {
  double axial_y = 0.0;   ///< N_Ed / N_b,y,Rd
  double axial_z = 0.0;   ///< N_Ed / N_b,z,Rd
  double moment_y = 0.0;  ///< M_y,Ed / (chi_LT M_y,Rk / gamma_M1)
  double moment_z = 0.0;  ///< M_z,Ed / (M_z,Rk / gamma_M1)
};

/// Left sides of (6.61) and (6.62) [-].
struct BeamColumnSums {
  double about_y = 0.0;  ///< axial_y + k_yy moment_y + k_yz moment_z
  double about_z = 0.0;  ///< axial_z + k_zy moment_y + k_zz moment_z
};
/// Source: EN 1993-1-1:2005 (6.61), (6.62).
[[nodiscard]] BISMAR_API BeamColumnSums beam_column_sums(const BeamColumnShares& shares,
                                                         const InteractionFactors& k);

/// Interaction of axial force and bending on nominal strengths [-].
///
///     P_r/P_c + 8/9 (M_rx/M_cx + M_ry/M_cy)  for P_r/P_c >= 0.2,  P_r/(2 P_c) + sum  below
///
/// A second opinion in checks. All arguments >= 0.
/// Source: AISC 360-16 (H1-1a), (H1-1b).
[[nodiscard]] BISMAR_API double aisc_interaction(double axial, double moment_x, double moment_y);

}  // namespace bismar
