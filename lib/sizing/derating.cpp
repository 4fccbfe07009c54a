// SPDX-License-Identifier: MIT
#include "sizing/derating.hpp"

#include "sizing/strength.hpp"

#include <bismar/mechanics/temperature.hpp>
#include <bismar/quantity/format.hpp>

#include <string_view>

namespace bismar {

namespace {

constexpr double creep_free_up_to = 643.15;  // 370 C
constexpr double aluminium_table_holds = 7200.0;
constexpr double aluminium_modulus_at_20 = 70e9;

std::string celsius(double kelvin) { return format_significant(kelvin - 273.15, 4) + " C"; }

}  // namespace

std::optional<Derating> derating(const MaterialInfo& material,
                                 double temperature,
                                 double duration) {
  if (material.material_class == "steel" && !is_cast(material) &&
      !is_hardened(material.condition) && temperature <= creep_free_up_to) {
    const auto curve = steel_reduction(temperature);
    return Derating{curve->k_p,
                    curve->k_E,
                    "at " + celsius(temperature) +
                        ": proportional limit and modulus of EN 1993-1-2, without creep"};
  }
  if (material.material_class == "aluminium" && duration <= aluminium_table_holds) {
    const std::string_view temper =
        std::string_view(material.condition).substr(0, material.condition.find_first_of(",/ "));
    const auto proof = aluminium_proof_ratio(material.name, temper, temperature);
    const auto modulus = aluminium_modulus(temperature);
    if (proof && modulus && *proof > 0.0 && *modulus > 0.0) {
      return Derating{*proof,
                      *modulus / aluminium_modulus_at_20,
                      "at " + celsius(temperature) +
                          " for up to two hours: proof strength and modulus of EN 1999-1-2"};
    }
  }
  return std::nullopt;
}

}  // namespace bismar
