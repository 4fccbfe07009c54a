// SPDX-License-Identifier: MIT
#include <bismar/quantity/kind.hpp>

#include <bismar/error.hpp>

#include <array>
#include <cstddef>

namespace bismar {

namespace {

struct KindRow {
  QuantityKind kind;
  Dimension dimension;
  std::string_view phrase;
  std::string_view units;
  std::string_view example;
};

namespace d = dimension;
using K = QuantityKind;

// In the order of QuantityKind, which the assertion below holds it to.
constexpr std::array kinds = {
    KindRow{K::ratio, d::one, "a ratio", "%", "12 %"},
    KindRow{K::count, d::count, "a count", "parts", "2000 parts"},
    KindRow{K::length, d::length, "a length", "mm, cm, m, um, in, ft, thou", "300 mm"},
    KindRow{K::area, d::area, "an area", "mm2, cm2, m2, in2, ft2", "120 mm2"},
    KindRow{K::volume, d::volume, "a volume", "mm3, cm3, L, m3, in3", "250 cm3"},
    KindRow{K::section_modulus, d::volume, "a section modulus", "mm3, cm3, m3, in3", "12.5 cm3"},
    KindRow{K::second_moment,
            d::second_moment,
            "a second moment of area",
            "mm4, cm4, m4, in4",
            "83.6 cm4"},
    KindRow{K::angle, d::angle, "an angle", "deg, rad, mrad", "2 deg"},
    KindRow{K::mass, d::mass, "a mass", "kg, g, t, lb", "0.5 kg"},
    KindRow{K::density, d::density, "a density", "kg/m3, g/cm3, t/m3, kg/L, lb/in3", "7850 kg/m3"},
    KindRow{K::linear_mass, d::linear_mass, "a mass per length", "kg/m, g/m, lb/ft", "8.1 kg/m"},
    KindRow{K::areal_mass, d::areal_mass, "a mass per area", "g/m2, kg/m2, lb/ft2", "610 g/m2"},
    KindRow{K::force, d::force, "a force", "N, kN, MN, lbf, kip, kgf", "655 N"},
    KindRow{K::moment,
            d::moment,
            "a moment or torque",
            "N.m, kN.m, N.mm, lbf.in, lbf.ft, kip.ft",
            "197 N.m"},
    KindRow{K::line_load,
            d::line_load,
            "a distributed load",
            "N/m, kN/m, N/mm, lbf/in, lbf/ft",
            "1.5 kN/m"},
    KindRow{K::stress,
            d::stress,
            "a stress or modulus",
            "MPa, GPa, N/mm2, kPa, bar, Pa, ksi, psi, Msi",
            "350 MPa"},
    KindRow{K::fracture_toughness,
            d::fracture_toughness,
            "a fracture toughness",
            "MPa.m^0.5, MPa√m, N/mm^1.5, ksi.in^0.5",
            "50 MPa.m^0.5"},
    KindRow{K::temperature, d::temperature, "a temperature", "degC, K, degF", "20 degC"},
    KindRow{K::temperature_difference,
            d::temperature,
            "a difference of temperatures",
            "K, delta_degC, delta_degF",
            "40 K"},
    KindRow{K::thermal_expansion,
            d::thermal_expansion,
            "a thermal expansion coefficient",
            "um/m/K, 1/K",
            "12 um/m/K"},
    KindRow{K::thermal_conductivity,
            d::thermal_conductivity,
            "a thermal conductivity",
            "W/m/K, W/(m.K)",
            "50 W/m/K"},
    KindRow{K::time, d::time, "a time", "s, min, h, d, a", "8 h"},
    KindRow{K::frequency, d::frequency, "a frequency", "Hz, kHz, 1/s", "25 Hz"},
    KindRow{K::rotational_speed,
            d::rotational_speed,
            "a rotational speed",
            "rpm, rad/s, rev/s",
            "1450 rpm"},
    KindRow{K::acceleration, d::acceleration, "an acceleration", "m/s2, ft/s2", "9.81 m/s2"},
    KindRow{K::energy, d::moment, "an energy", "J, kJ, MJ, kWh", "20 MJ"},
    KindRow{K::power, d::power, "a power", "W, kW", "1.5 kW"},
    KindRow{
        K::specific_energy, d::specific_energy, "an energy per mass", "MJ/kg, kWh/kg", "25 MJ/kg"},
    KindRow{K::co2_per_mass, d::one, "a CO2 mass per mass", "kg/kg, g/kg", "1.9 kg/kg"},
    KindRow{K::money, d::currency, "an amount of money", "EUR", "20 EUR"},
    KindRow{K::price_per_mass,
            d::price_per_mass,
            "a price per mass",
            "EUR/kg, EUR/t, EUR/lb",
            "2.4 EUR/kg"},
    KindRow{K::price_per_length,
            d::price_per_length,
            "a price per length",
            "EUR/m, EUR/ft",
            "3.2 EUR/m"},
    KindRow{
        K::price_per_area, d::price_per_area, "a price per area", "EUR/m2, EUR/ft2", "25 EUR/m2"},
    KindRow{K::price_per_volume,
            d::price_per_volume,
            "a price per volume",
            "EUR/m3, EUR/L",
            "900 EUR/m3"},
    KindRow{K::price_per_part, d::price_per_part, "a price per part", "EUR/part", "0.8 EUR/part"},
    KindRow{K::cost_rate, d::cost_rate, "a cost rate", "EUR/h, EUR/min", "60 EUR/h"},
    KindRow{K::production_rate,
            d::production_rate,
            "a production rate in parts",
            "parts/h, parts/min",
            "120 parts/h"},
    KindRow{K::length_rate,
            d::length_rate,
            "a production rate in length",
            "m/h, m/min, m/s, ft/h",
            "90 m/h"},
    KindRow{K::mass_rate,
            d::mass_rate,
            "a production rate in mass",
            "kg/h, t/h, kg/s, lb/h",
            "400 kg/h"},
};

constexpr bool in_order() {
  for (std::size_t i = 0; i < kinds.size(); ++i) {
    if (static_cast<std::size_t>(kinds[i].kind) != i) {
      return false;
    }
  }
  return true;
}
static_assert(in_order());

const KindRow& row_of(QuantityKind kind) {
  const auto index = static_cast<std::size_t>(kind);
  if (index >= kinds.size()) {
    throw InternalError("a QuantityKind that is not in the list");
  }
  return kinds[index];
}

}  // namespace

Dimension dimension_of(QuantityKind kind) { return row_of(kind).dimension; }
std::string_view phrase_of(QuantityKind kind) { return row_of(kind).phrase; }
std::string_view usual_units(QuantityKind kind) { return row_of(kind).units; }
std::string_view example_of(QuantityKind kind) { return row_of(kind).example; }

}  // namespace bismar
