// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <array>
#include <span>
#include <string_view>

namespace bismar {

LimitState::~LimitState() = default;

std::string_view name(Symbol symbol) {
  switch (symbol) {
    case Symbol::rho:
      return "density";
    case Symbol::E:
      return "Young's modulus";
    case Symbol::E_05:
      return "5 % modulus";
    case Symbol::G:
      return "shear modulus";
    case Symbol::sigma_y:
      return "yield strength";
    case Symbol::tensile:
      return "tensile strength";
    case Symbol::compressive:
      return "compressive strength";
    case Symbol::flexural:
      return "flexural strength";
    case Symbol::shear:
      return "shear strength";
    case Symbol::alpha:
      return "thermal expansion";
    case Symbol::K_Ic:
      return "fracture toughness";
    case Symbol::sigma_e:
      return "endurance limit";
    case Symbol::weld_yield:
      return "weld zone yield factor";
    case Symbol::weld_tensile:
      return "weld zone tensile factor";
  }
  throw InternalError("material symbol without a name");
}

std::span<const LimitState* const> limit_states() {
  static const std::array list = {&mechanics::yield_limit_state(),
                                  &mechanics::brittle_fracture_limit_state(),
                                  &mechanics::direct_and_shear_limit_state(),
                                  &mechanics::deflection_limit_state(),
                                  &mechanics::shear_deflection_limit_state(),
                                  &mechanics::rotation_limit_state(),
                                  &mechanics::twist_limit_state(),
                                  &mechanics::flexural_buckling_limit_state(),
                                  &mechanics::torsional_flexural_buckling_limit_state(),
                                  &mechanics::lateral_torsional_buckling_limit_state(),
                                  &mechanics::compression_bending_limit_state(),
                                  &mechanics::eccentric_compression_limit_state(),
                                  &mechanics::wall_slenderness_limit_state(),
                                  &mechanics::shear_buckling_limit_state(),
                                  &mechanics::slenderness_limit_state(),
                                  &mechanics::net_section_limit_state(),
                                  &mechanics::weld_zone_limit_state(),
                                  &mechanics::crack_limit_state(),
                                  &mechanics::fatigue_limit_state(),
                                  &mechanics::natural_frequency_limit_state(),
                                  &mechanics::elongation_limit_state(),
                                  &mechanics::restrained_heat_limit_state(),
                                  &mechanics::envelope_limit_state(),
                                  &mechanics::minimum_wall_limit_state()};
  return list;
}

const LimitState* limit_state(std::string_view id) {
  for (const LimitState* state : limit_states()) {
    if (state->id() == id) {
      return state;
    }
  }
  return nullptr;
}

}  // namespace bismar
