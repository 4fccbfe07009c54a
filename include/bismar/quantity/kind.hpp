// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/quantity/dimension.hpp>

#include <cstdint>
#include <string_view>

namespace bismar {

/// What a field of a job or a column of a table holds. A kind says more than its dimension: a
/// temperature may be written in degC and a difference of temperatures may not, though both are
/// kelvin inside.
enum class QuantityKind : std::uint8_t {
  ratio,                   ///< Plain number or %.
  count,                   ///< Whole number, not negative; plain or in parts.
  length,                  ///< [m]
  area,                    ///< [m^2]
  volume,                  ///< [m^3]
  section_modulus,         ///< [m^3]
  second_moment,           ///< [m^4]
  angle,                   ///< [rad]
  mass,                    ///< [kg]
  density,                 ///< [kg/m^3]
  linear_mass,             ///< [kg/m]
  areal_mass,              ///< [kg/m^2]
  force,                   ///< [N]
  moment,                  ///< Bending moment or torque [N m].
  line_load,               ///< Distributed load on a member [N/m].
  stress,                  ///< Stress, strength, pressure or modulus [Pa].
  fracture_toughness,      ///< [Pa m^(1/2)]
  temperature,             ///< Absolute [K], not negative; may be written in degC or degF.
  temperature_difference,  ///< [K]; never written in degC or degF.
  thermal_expansion,       ///< [1/K]
  thermal_conductivity,    ///< [W/(m K)]
  time,                    ///< [s]
  frequency,               ///< [1/s]
  rotational_speed,        ///< [rad/s]
  acceleration,            ///< [m/s^2]
  energy,                  ///< [J]
  power,                   ///< [W]
  specific_energy,         ///< Embodied energy [J/kg].
  co2_per_mass,            ///< Embodied CO2: mass per mass [kg/kg], never a plain number or %.
  money,                   ///< [currency of the job]
  price_per_mass,          ///< [currency/kg]
  price_per_length,        ///< [currency/m]
  price_per_area,          ///< [currency/m^2]
  price_per_volume,        ///< [currency/m^3]
  price_per_part,          ///< [currency/part]
  cost_rate,               ///< [currency/s]
  production_rate,         ///< [parts/s]
  length_rate,             ///< Metres made in a time, or a velocity [m/s].
  mass_rate,               ///< Kilograms made in a time [kg/s].
};

/// The dimension of a kind.
[[nodiscard]] BISMAR_API Dimension dimension_of(QuantityKind kind);

/// The kind in words with its article, such as "a price per mass": for the inside of a sentence.
[[nodiscard]] BISMAR_API std::string_view phrase_of(QuantityKind kind);

/// The units in which a kind is usually written, such as "MPa, GPa, N/mm2, ksi, psi, Msi". Each of
/// them is accepted where the kind is expected. Money is shown in EUR.
[[nodiscard]] BISMAR_API std::string_view usual_units(QuantityKind kind);

/// One correct text of the kind, such as "350 MPa".
[[nodiscard]] BISMAR_API std::string_view example_of(QuantityKind kind);

}  // namespace bismar
