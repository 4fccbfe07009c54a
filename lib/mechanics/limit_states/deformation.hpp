// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/limit_state.hpp>

#include <cstdint>
#include <string>
#include <vector>

namespace bismar::mechanics {

/// What the loads do to the axis of a member.
enum class Deformation : std::uint8_t {
  deflection,             ///< By bending [m].
  deflection_with_shear,  ///< By bending and shear [m].
  rotation,               ///< Of the section, by bending [rad].
};

/// Along one axis.
struct DeformationAlong {
  double coefficient = 0.0;      ///< Of the loads, see LoadEffects.
  double own_line_load = 0.0;    ///< Own mass times acceleration [N/m].
  double own_coefficient = 0.0;  ///< The same of own mass.
  double bending = 0.0;          ///< First order, both together over E I.
  double shear_area = 0.0;       ///< A_s, else A_v^2 / A [m^2]; 0 where shear is left out.
  double shear = 0.0;            ///< First order, by shear.
  double coupling = 0.0;         ///< By bending about the other axis, where I_yz is not 0.
  double critical = 0.0;         ///< N_cr in that bending [N].
  double amplification = 1.0;    ///< 1 / (1 - N / N_cr), +infinity at N >= N_cr.
  [[nodiscard]] double first_order() const { return bending + shear + coupling; }
  [[nodiscard]] double total() const {
    return first_order() > 0.0 ? first_order() * amplification : 0.0;
  }
};

/// Along both axes.
struct Deformations {
  DeformationAlong z;
  DeformationAlong y;
  /// Both peaks taken together: exact where they are at the same place (a cantilever's tip, one
  /// plane), on the safe side elsewhere.
  [[nodiscard]] double together() const;
};

/// Peaks of the parts are added: exact where they peak at one place, on the safe side elsewhere.
/// Compression raises the sum by 1 / (1 - N / N_cr), N with the limit state's factor. N_cr is taken
/// with the E of bending; with shear it is N_cr / (1 + N_cr / (G A_s)).
///
/// Where I_yz is not 0 each moment bends both ways: curvatures are those of the inverse of the
/// inertia tensor, and N_cr is that of the weak principal axis with the larger effective length.
/// Planes that are held differently couple through the bound M L^2 / 2 (a slope: M L) with the
/// largest moment.
///
/// Source: Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., sections 1.11 and 2.17
/// (sections from memory).
[[nodiscard]] Deformations deformations(const CheckInput& input, Deformation kind);

/// Whether anything deforms the member that way.
[[nodiscard]] bool is_deformed(const LoadEffects& effects, Deformation kind);

/// The steps of an explanation up to the sum of both axes.
[[nodiscard]] std::vector<std::string> deformation_steps(const CheckInput& input, Deformation kind);

}  // namespace bismar::mechanics
