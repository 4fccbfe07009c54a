// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/range.hpp>
#include <bismar/export.hpp>
#include <bismar/quantity/kind.hpp>

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <string_view>

namespace bismar {

// NOLINTBEGIN(readability-identifier-naming): symbols of the trade keep their capital.
/// Every numeric property that a material table may carry under a name the library reads. Other
/// numeric columns are kept as extra properties that limits can name.
enum class Property : std::uint8_t {
  density,
  youngs_modulus,
  youngs_modulus_transverse,
  youngs_modulus_axial,  ///< Boards whose in-plane modulus differs from the bending one.
  youngs_modulus_05,     ///< 5 % value of timber.
  poisson_ratio,
  shear_modulus,
  shear_modulus_05,
  shear_modulus_planar,
  yield_strength,
  tensile_strength,
  compressive_strength,
  flexural_strength,
  shear_strength,
  shear_strength_planar,
  tensile_strength_transverse,
  compressive_strength_transverse,
  flexural_strength_transverse,
  endurance_limit,
  fracture_toughness,
  elongation,  ///< At fracture, a ratio (0.05 = 5 %).
  hardness,    ///< Brinell number.
  weibull_modulus,
  service_temperature_min,  ///< [K]
  service_temperature_max,  ///< [K]; for polymers an ageing limit.
  loaded_temperature_max,   ///< [K]; room-temperature values are a fair start up to here.
  thermal_expansion,
  thermal_conductivity,
  price,         ///< [currency/kg]
  embodied_CO2,  ///< [kg/kg]
  recycled_fraction,
  gamma_M,
  k_mod_permanent,
  k_mod_long,
  k_mod_medium,
  k_mod_short,
  k_def_1,
  k_def_2,
  k_cr,
  reference_depth,
  size_exponent,
  size_cap,
  density_05,
  creep_factor_1000h,
  creep_factor_10y,
  long_term_strength_factor_10y,
  orientation_factor,
  weld_yield_factor,    ///< Yield strength in the heat-affected zone of a weld over the parent's.
  weld_tensile_factor,  ///< Likewise tensile strength.
};
// NOLINTEND(readability-identifier-naming)
inline constexpr std::size_t property_count = 49;

/// What the library knows of a property.
///
/// `default_end` is the end of a range that a study uses unless the job says otherwise: the
/// cautious one where a wrong end could hurt (strengths, moduli, elongation and reduction factors
/// low; partial factors, creep coefficients and the lowest service temperature high), the middle
/// where neither end is (density, price, CO2, thermal values). These are our choice, no source.
struct PropertyInfo {
  Property property;
  std::string_view name;  ///< The word in headers, limits and messages: "yield strength".
  std::string_view unit;  ///< The usual unit of the starter table: "MPa"; "" for a plain number.
  RangeEnd default_end;
  bool steps_with_thickness;  ///< May differ between thickness rows of one material.
  QuantityKind kind;          ///< What a header or a limit must state it in.
};
/// All properties in the order of the enumeration.
[[nodiscard]] BISMAR_API std::span<const PropertyInfo> properties();
[[nodiscard]] BISMAR_API const PropertyInfo& info(Property property);
/// The property of that name; letter case and runs of blanks do not count.
[[nodiscard]] BISMAR_API std::optional<Property> property(std::string_view name);

}  // namespace bismar
