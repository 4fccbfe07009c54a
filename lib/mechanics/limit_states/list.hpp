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
const LimitState& twist_limit_state();
const LimitState& flexural_buckling_limit_state();
const LimitState& compression_bending_limit_state();
const LimitState& wall_slenderness_limit_state();
const LimitState& slenderness_limit_state();
const LimitState& envelope_limit_state();
const LimitState& minimum_wall_limit_state();

}  // namespace bismar::mechanics
