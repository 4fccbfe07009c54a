// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/fatigue.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <optional>

namespace bismar::mechanics {

/// Fatigue stress concentration factors of one member.
struct FatigueNotch {
  double q = 1.0;          ///< Notch sensitivity in tension and bending.
  double q_torsion = 1.0;  ///< In torsion and shear.
  double k_axial = 1.0;    ///< K_f
  double k_bending = 1.0;
  double k_torsion = 1.0;
};

/// Steel: Neuber's q of the notch radius, 1 without a radius; cast iron 0.2; others 1. Below the
/// range of Neuber's constants q is that of its end, above it 1: both on the safe side.
[[nodiscard]] FatigueNotch fatigue_notch(const CheckInput& input);

/// What a member without welds bears: reversed stress on its own life, and how it is made.
struct FatigueResistance {
  bool estimated = false;  ///< S_e' is 0.5 sigma_u.
  double specimen = 0.0;   ///< S_e' [Pa]
  double surface = 1.0;
  double reliability = 1.0;
  double size = 1.0;       ///< Of bending and torsion, at the knee.
  double diameter = 0.0;   ///< That the size factor is read at [m].
  double fraction = 0.9;   ///< f: strength at 1000 cycles over sigma_u.
  double endurance = 0.0;  ///< S_e = k_a k_e S_e', not above f sigma_u [Pa].
  double knee = 0.0;       ///< Cycles that S_e belongs to.
  /// Place of the life on the S-N line: 0 at 1000 cycles, 1 at the knee; above 1 beyond it for
  /// materials without an endurance limit.
  double place = 0.0;
  double strength = 0.0;  ///< f sigma_u (S_e / (f sigma_u))^place [Pa]
  // Size and load factors fade with shorter lives as the line does: k^place.
  double size_at_life = 1.0;
  double axial_at_life = 1.0;
};
[[nodiscard]] FatigueResistance fatigue_resistance(const CheckInput& input);

/// Goodman, Gerber or Soderberg; Soderberg's line of a material without yield ends at its tensile
/// strength, which is Goodman's.
[[nodiscard]] MeanStressLine mean_stress_line(const CheckInput& input);

/// Whether the fatigue of a weld is asked for.
[[nodiscard]] bool is_welded_detail(const MemberDetails& details);
/// Its detail category [Pa]; where a weld is there but no category is stated, 36 MPa, the lowest of
/// the standard's tables.
[[nodiscard]] double detail_category(const MemberDetails& details);

}  // namespace bismar::mechanics
