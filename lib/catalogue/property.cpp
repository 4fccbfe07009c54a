// SPDX-License-Identifier: MIT
#include <bismar/catalogue/property.hpp>

#include <algorithm>
#include <array>
#include <limits>
#include <string>

#include "catalogue/property_limits.hpp"
#include "catalogue/text.hpp"

namespace bismar {

namespace {

using P = Property;
using K = QuantityKind;
using E = RangeEnd;

// In the order of Property, which the assertion below holds it to. The last but one column: whether
// thickness rows of one material may differ in it. Stiffness, density and factors may not: rows
// that differ there are different materials.
constexpr std::array<PropertyInfo, property_count> infos = {{
    {P::density, "density", "kg/m3", E::mid, false, K::density},
    {P::youngs_modulus, "Young's modulus", "GPa", E::low, false, K::stress},
    {P::youngs_modulus_transverse, "transverse Young's modulus", "GPa", E::low, false, K::stress},
    {P::youngs_modulus_axial, "axial Young's modulus", "GPa", E::low, false, K::stress},
    {P::youngs_modulus_05, "Young's modulus 5 %", "GPa", E::low, false, K::stress},
    {P::poisson_ratio, "Poisson's ratio", "", E::mid, false, K::ratio},
    {P::shear_modulus, "shear modulus", "GPa", E::low, false, K::stress},
    {P::shear_modulus_05, "shear modulus 5 %", "GPa", E::low, false, K::stress},
    {P::shear_modulus_planar, "planar shear modulus", "GPa", E::low, false, K::stress},
    {P::yield_strength, "yield strength", "MPa", E::low, true, K::stress},
    {P::tensile_strength, "tensile strength", "MPa", E::low, true, K::stress},
    {P::compressive_strength, "compressive strength", "MPa", E::low, true, K::stress},
    {P::flexural_strength, "flexural strength", "MPa", E::low, true, K::stress},
    {P::shear_strength, "shear strength", "MPa", E::low, true, K::stress},
    {P::shear_strength_planar, "planar shear strength", "MPa", E::low, true, K::stress},
    {P::tensile_strength_transverse, "transverse tensile strength", "MPa", E::low, true, K::stress},
    {P::compressive_strength_transverse,
     "transverse compressive strength",
     "MPa",
     E::low,
     true,
     K::stress},
    {P::flexural_strength_transverse,
     "transverse flexural strength",
     "MPa",
     E::low,
     true,
     K::stress},
    {P::endurance_limit, "endurance limit", "MPa", E::low, true, K::stress},
    {P::fracture_toughness, "fracture toughness", "MPa.m^0.5", E::low, true, K::fracture_toughness},
    {P::elongation, "elongation", "%", E::low, true, K::ratio},
    {P::hardness, "Brinell hardness", "", E::mid, true, K::ratio},
    {P::weibull_modulus, "Weibull modulus", "", E::low, false, K::ratio},
    {P::service_temperature_min,
     "minimum service temperature",
     "degC",
     E::high,
     false,
     K::temperature},
    {P::service_temperature_max,
     "maximum service temperature",
     "degC",
     E::low,
     false,
     K::temperature},
    {P::loaded_temperature_max,
     "maximum loaded temperature",
     "degC",
     E::low,
     false,
     K::temperature},
    {P::thermal_expansion, "thermal expansion", "um/m/K", E::mid, false, K::thermal_expansion},
    {P::thermal_conductivity,
     "thermal conductivity",
     "W/m/K",
     E::mid,
     false,
     K::thermal_conductivity},
    {P::price, "price", "EUR/kg", E::mid, true, K::price_per_mass},
    {P::embodied_CO2, "embodied CO2", "kg/kg", E::mid, false, K::co2_per_mass},
    {P::recycled_fraction, "recycled fraction", "", E::mid, false, K::ratio},
    {P::gamma_M, "gamma_M", "", E::high, false, K::ratio},
    {P::k_mod_permanent, "k_mod permanent", "", E::low, false, K::ratio},
    {P::k_mod_long, "k_mod long", "", E::low, false, K::ratio},
    {P::k_mod_medium, "k_mod medium", "", E::low, false, K::ratio},
    {P::k_mod_short, "k_mod short", "", E::low, false, K::ratio},
    {P::k_def_1, "k_def service class 1", "", E::high, false, K::ratio},
    {P::k_def_2, "k_def service class 2", "", E::high, false, K::ratio},
    {P::k_cr, "k_cr", "", E::low, false, K::ratio},
    {P::reference_depth, "reference depth", "mm", E::mid, false, K::length},
    {P::size_exponent, "size exponent", "", E::mid, false, K::ratio},
    {P::size_cap, "size cap", "", E::low, false, K::ratio},
    {P::density_05, "density 5 %", "kg/m3", E::low, false, K::density},
    {P::creep_factor_1000h, "creep factor 1000 h", "", E::low, false, K::ratio},
    {P::creep_factor_10y, "creep factor 10 y", "", E::low, false, K::ratio},
    {P::long_term_strength_factor_10y,
     "long-term strength factor 10 y",
     "",
     E::low,
     false,
     K::ratio},
    {P::orientation_factor, "orientation factor", "", E::low, false, K::ratio},
    {P::weld_yield_factor, "weld zone yield factor", "", E::low, true, K::ratio},
    {P::weld_tensile_factor, "weld zone tensile factor", "", E::low, true, K::ratio},
}};

constexpr double inf = std::numeric_limits<double>::infinity();
constexpr double modulus_above = 1.5e12;  // diamond is about 1.2e12 Pa
constexpr double strength_above = 1e10;   // whiskers; a strength in ksi read as GPa lies above

constexpr catalogue::PropertyLimits positive(P property, double below, double above) {
  return {property, 0.0, true, inf, false, below, above};
}
constexpr catalogue::PropertyLimits between(P property, double least, double greatest) {
  return {property, least, false, greatest, false, least, greatest};
}
constexpr catalogue::PropertyLimits factor(P property) {
  return {property, 0.0, true, 1.0, false, 0.0, 1.0};
}

// The usual ranges are wide enough for every solid that an engineer builds with, from memory; they
// are there to find a wrong unit, not a wrong digit.
constexpr std::array<catalogue::PropertyLimits, property_count> all_limits = {{
    positive(P::density, 5.0, 23000.0),
    positive(P::youngs_modulus, 1e5, modulus_above),
    positive(P::youngs_modulus_transverse, 1e5, modulus_above),
    positive(P::youngs_modulus_axial, 1e5, modulus_above),
    positive(P::youngs_modulus_05, 1e5, modulus_above),
    // Thermodynamics: -1 < nu < 0.5 for an isotropic solid. A laminate may exceed 0.5 in its plane.
    {P::poisson_ratio, -1.0, true, 1.0, false, -1.0, 1.0},
    positive(P::shear_modulus, 1e4, modulus_above),
    positive(P::shear_modulus_05, 1e4, modulus_above),
    positive(P::shear_modulus_planar, 1e4, modulus_above),
    positive(P::yield_strength, 1e4, strength_above),
    positive(P::tensile_strength, 1e4, strength_above),
    positive(P::compressive_strength, 1e4, strength_above),
    positive(P::flexural_strength, 1e4, strength_above),
    positive(P::shear_strength, 1e4, strength_above),
    positive(P::shear_strength_planar, 1e4, strength_above),
    positive(P::tensile_strength_transverse, 1e4, strength_above),
    positive(P::compressive_strength_transverse, 1e4, strength_above),
    positive(P::flexural_strength_transverse, 1e4, strength_above),
    positive(P::endurance_limit, 1e4, strength_above),
    positive(P::fracture_toughness, 1e4, 1e9),
    {P::elongation, 0.0, false, inf, false, 0.0, 15.0},  // rubber reaches 10 (1000 %)
    positive(P::hardness, 0.5, 3000.0),
    positive(P::weibull_modulus, 1.0, 100.0),
    {P::service_temperature_min, 0.0, false, inf, false, 0.0, 400.0},
    {P::service_temperature_max, 0.0, true, inf, false, 200.0, 4500.0},
    {P::loaded_temperature_max, 0.0, true, inf, false, 200.0, 4500.0},
    {P::thermal_expansion, -inf, true, inf, true, -1e-4, 1e-3},
    positive(P::thermal_conductivity, 1e-3, 5000.0),
    {P::price, 0.0, false, inf, true, 0.0, inf},
    {P::embodied_CO2, -inf, true, inf, true, -20.0, 1e4},
    between(P::recycled_fraction, 0.0, 1.0),
    {P::gamma_M, 1.0, false, inf, false, 1.0, 10.0},
    factor(P::k_mod_permanent),
    {P::k_mod_long, 0.0, true, 1.2, false, 0.0, 1.2},
    {P::k_mod_medium, 0.0, true, 1.2, false, 0.0, 1.2},
    {P::k_mod_short, 0.0, true, 1.2, false, 0.0, 1.2},
    {P::k_def_1, 0.0, false, inf, false, 0.0, 10.0},
    {P::k_def_2, 0.0, false, inf, false, 0.0, 10.0},
    factor(P::k_cr),
    positive(P::reference_depth, 1e-3, 10.0),
    {P::size_exponent, 0.0, false, 1.0, false, 0.0, 1.0},
    {P::size_cap, 1.0, false, inf, false, 1.0, 3.0},
    positive(P::density_05, 5.0, 23000.0),
    factor(P::creep_factor_1000h),
    factor(P::creep_factor_10y),
    factor(P::long_term_strength_factor_10y),
    factor(P::orientation_factor),
    factor(P::weld_yield_factor),
    factor(P::weld_tensile_factor),
}};

constexpr bool in_order() {
  for (std::size_t i = 0; i < property_count; ++i) {
    if (static_cast<std::size_t>(infos[i].property) != i) {
      return false;
    }
    if (static_cast<std::size_t>(all_limits[i].property) != i) {
      return false;
    }
  }
  return true;
}
static_assert(in_order());

}  // namespace

std::span<const PropertyInfo> properties() { return infos; }

const PropertyInfo& info(Property property) { return infos.at(static_cast<std::size_t>(property)); }

std::optional<Property> property(std::string_view name) {
  for (const PropertyInfo& known : infos) {
    if (name == known.name) {
      return known.property;
    }
  }
  const std::string wanted = catalogue::folded(name);
  const auto is_same = [](char folded, char known) {
    return folded == (known >= 'A' && known <= 'Z' ? static_cast<char>(known - 'A' + 'a') : known);
  };
  for (const PropertyInfo& known : infos) {
    if (std::equal(wanted.begin(), wanted.end(), known.name.begin(), known.name.end(), is_same)) {
      return known.property;
    }
  }
  return std::nullopt;
}

const catalogue::PropertyLimits& catalogue::limits(Property property) {
  return all_limits.at(static_cast<std::size_t>(property));
}

}  // namespace bismar
