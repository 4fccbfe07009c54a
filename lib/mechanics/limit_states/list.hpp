// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/limit_state.hpp>

/// The built-in limit states, one function a file. A new one is declared here and added to the list
/// in limit_states.cpp.
namespace bismar::mechanics {

const LimitState& yield_limit_state();
const LimitState& brittle_fracture_limit_state();
const LimitState& direct_and_shear_limit_state();
const LimitState& deflection_limit_state();
const LimitState& shear_deflection_limit_state();
const LimitState& rotation_limit_state();
const LimitState& twist_limit_state();
const LimitState& flexural_buckling_limit_state();
const LimitState& torsional_flexural_buckling_limit_state();
const LimitState& lateral_torsional_buckling_limit_state();
const LimitState& compression_bending_limit_state();
const LimitState& eccentric_compression_limit_state();
const LimitState& wall_slenderness_limit_state();
const LimitState& shear_buckling_limit_state();
const LimitState& slenderness_limit_state();
const LimitState& net_section_limit_state();
const LimitState& weld_zone_limit_state();
const LimitState& crack_limit_state();
const LimitState& fatigue_limit_state();
const LimitState& natural_frequency_limit_state();
const LimitState& elongation_limit_state();
const LimitState& restrained_heat_limit_state();
const LimitState& envelope_limit_state();
const LimitState& minimum_wall_limit_state();

}  // namespace bismar::mechanics
