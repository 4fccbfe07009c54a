// SPDX-License-Identifier: MIT
#include <bismar/quantity/unit.hpp>

#include "quantity/faults.hpp"

#include <cfloat>
#include <cmath>
#include <cstdint>
#include <numbers>
#include <set>
#include <string>
#include <vector>

using namespace bismar;
using quantity_test::contains;
using quantity_test::fault_of;

namespace {

struct Spelling {
  const char* text;
  double si;  // of one unit
  Dimension dimension;
};

void check_spelling(const Spelling& spelling) {
  const CurrencyRates rates("EUR");
  INFO(spelling.text);
  const Unit unit = parse_unit(spelling.text, &rates);
  CHECK(unit.dimension == spelling.dimension);
  CHECK(std::abs(unit.to_si(1.0) - spelling.si) <= 4.0 * DBL_EPSILON * spelling.si);
}

}  // namespace

// Definitions. Inch, foot, pound, pound-force, kilogram-force, psi, year: NIST SP 811 (2008),
// appendix B.8, from memory; a general units program confirms each in test_units_program.cpp.
TEST_CASE("The units of the trade have their defined sizes") {
  namespace d = dimension;
  constexpr double inch = 0.0254;                  // exact
  constexpr double pound = 0.45359237;             // exact
  constexpr double pound_force = 4.4482216152605;  // exact: 0.45359237 * 9.80665
  constexpr double psi = 6894.757293168361;        // lbf/in2, rounded
  const std::vector<Spelling> spellings = {
      {"mm", 1e-3, d::length},
      {"cm", 1e-2, d::length},
      {"m", 1.0, d::length},
      {"um", 1e-6, d::length},
      {"µm", 1e-6, d::length},
      {"μm", 1e-6, d::length},
      {"in", inch, d::length},
      {"ft", 0.3048, d::length},
      {"thou", 2.54e-5, d::length},
      {"mm2", 1e-6, d::area},
      {"mm^2", 1e-6, d::area},
      {"mm²", 1e-6, d::area},
      {"in2", 6.4516e-4, d::area},
      {"mm3", 1e-9, d::volume},
      {"cm³", 1e-6, d::volume},
      {"L", 1e-3, d::volume},
      {"in3", 1.6387064e-5, d::volume},
      {"mm4", 1e-12, d::second_moment},
      {"mm⁴", 1e-12, d::second_moment},
      {"cm4", 1e-8, d::second_moment},
      {"cm^4", 1e-8, d::second_moment},
      {"in4", 4.162314256e-7, d::second_moment},
      {"kg", 1.0, d::mass},
      {"g", 1e-3, d::mass},
      {"lb", pound, d::mass},
      {"lbm", pound, d::mass},
      {"t", 1e3, d::mass},
      {"g/cm3", 1e3, d::density},
      {"g cm-3", 1e3, d::density},
      {"g/cm^3", 1e3, d::density},
      {"kg/m3", 1.0, d::density},
      {"kg/m³", 1.0, d::density},
      {"kg/L", 1e3, d::density},
      {"lb/in3", 27679.904710203125, d::density},  // NIST SP 811: 2.767 990 E+04
      {"kg/m", 1.0, d::linear_mass},
      {"lb/ft", 1.4881639435695537, d::linear_mass},  // NIST SP 811: 1.488 164 E+00
      {"g/m2", 1e-3, d::areal_mass},
      {"N", 1.0, d::force},
      {"kN", 1e3, d::force},
      {"MN", 1e6, d::force},
      {"lbf", pound_force, d::force},
      {"kip", 1e3 * pound_force, d::force},
      {"kgf", 9.80665, d::force},
      {"MPa", 1e6, d::stress},
      {"GPa", 1e9, d::stress},
      {"N/mm2", 1e6, d::stress},
      {"N/mm^2", 1e6, d::stress},
      {"N/mm²", 1e6, d::stress},
      {"kgf/mm2", 9806650.0, d::stress},
      {"psi", psi, d::stress},
      {"ksi", 1e3 * psi, d::stress},
      {"kpsi", 1e3 * psi, d::stress},
      {"Msi", 1e6 * psi, d::stress},
      {"bar", 1e5, d::stress},
      {"kN.m", 1e3, d::moment},
      {"kN*m", 1e3, d::moment},
      {"kN·m", 1e3, d::moment},
      {"kN⋅m", 1e3, d::moment},
      {"kN m", 1e3, d::moment},
      {"kNm", 1e3, d::moment},
      {"N·m", 1.0, d::moment},
      {"N.mm", 1e-3, d::moment},
      {"lbf.in", 0.11298482902761670, d::moment},  // NIST SP 811: 1.129 848 E-01
      {"in.lbf", 0.11298482902761670, d::moment},
      {"lbf.ft", 1.3558179483314004, d::moment},  // NIST SP 811: 1.355 818 E+00
      {"N/m", 1.0, d::line_load},
      {"kN/m", 1e3, d::line_load},
      {"N/mm", 1e3, d::line_load},
      {"lbf/in", 175.12683524647636, d::line_load},  // NIST SP 811: 1.751 268 E+02
      {"lbf/ft", 14.593902937206364, d::line_load},  // NIST SP 811: 1.459 390 E+01
      {"MPa.m^0.5", 1e6, d::fracture_toughness},
      {"MPa m^0.5", 1e6, d::fracture_toughness},
      {"MPa.m0.5", 1e6, d::fracture_toughness},
      {"MPa.m^(1/2)", 1e6, d::fracture_toughness},
      {"MPa m½", 1e6, d::fracture_toughness},
      {"MPa√m", 1e6, d::fracture_toughness},
      {"MPa √m", 1e6, d::fracture_toughness},
      {"MPa·√m", 1e6, d::fracture_toughness},
      {"MPa√(m)", 1e6, d::fracture_toughness},
      {"MPa*sqrt(m)", 1e6, d::fracture_toughness},
      {"MPa.sqrt(m)", 1e6, d::fracture_toughness},
      {"MPa.mm^0.5", 1e6 * 0.031622776601683794, d::fracture_toughness},  // 1e6/sqrt(1000)
      {"N/mm^1.5", 31622.776601683792, d::fracture_toughness},
      // psi * sqrt(0.0254), worked by hand: 6 894 757.293 168 361 * 0.159 373 774 505 092 3
      {"ksi.in^0.5", 1098843.4941087548, d::fracture_toughness},
      {"ksi√in", 1098843.4941087548, d::fracture_toughness},
      {"K", 1.0, d::temperature},
      {"delta_degC", 1.0, d::temperature},
      {"delta_degF", 5.0 / 9.0, d::temperature},
      {"1/K", 1.0, d::thermal_expansion},
      {"/K", 1.0, d::thermal_expansion},
      {"K-1", 1.0, d::thermal_expansion},
      {"K^-1", 1.0, d::thermal_expansion},
      {"K⁻¹", 1.0, d::thermal_expansion},
      {"um/m/K", 1e-6, d::thermal_expansion},
      {"µm/m/K", 1e-6, d::thermal_expansion},
      {"µm/(m.K)", 1e-6, d::thermal_expansion},
      {"W/m/K", 1.0, d::thermal_conductivity},
      {"W/(m.K)", 1.0, d::thermal_conductivity},
      {"W/(m·K)", 1.0, d::thermal_conductivity},
      {"W/(m K)", 1.0, d::thermal_conductivity},
      {"W m⁻¹ K⁻¹", 1.0, d::thermal_conductivity},
      {"J/kg/K", 1.0, d::specific_energy / d::temperature},
      {"MJ/kg", 1e6, d::specific_energy},
      {"kWh", 3.6e6, d::moment},
      {"Hz", 1.0, d::frequency},
      {"1/s", 1.0, d::frequency},
      {"rad", 1.0, d::angle},
      {"deg", std::numbers::pi / 180.0, d::angle},
      {"°", std::numbers::pi / 180.0, d::angle},
      {"rpm", 2.0 * std::numbers::pi / 60.0, d::rotational_speed},
      {"rev/min", 2.0 * std::numbers::pi / 60.0, d::rotational_speed},
      {"deg/m", std::numbers::pi / 180.0, d::angle / d::length},
      {"s", 1.0, d::time},
      {"min", 60.0, d::time},
      {"h", 3600.0, d::time},
      {"d", 86400.0, d::time},
      {"a", 3.1536e7, d::time},  // NIST SP 811: year of 365 days
      {"year", 3.1536e7, d::time},
      {"m/s2", 1.0, d::acceleration},
      {"EUR", 1.0, d::currency},
      {"EUR/kg", 1.0, d::price_per_mass},
      {"€/kg", 1.0, d::price_per_mass},
      {"EUR/lb", 1.0 / pound, d::price_per_mass},
      {"EUR/m2", 1.0, d::price_per_area},
      {"EUR/h", 1.0 / 3600.0, d::cost_rate},
      {"EUR/part", 1.0, d::price_per_part},
      {"part/h", 1.0 / 3600.0, d::production_rate},
      {"parts/h", 1.0 / 3600.0, d::production_rate},
      {"m/h", 1.0 / 3600.0, d::length_rate},
      {"kg/h", 1.0 / 3600.0, d::mass_rate},
      {"%", 0.01, d::one},
      {"%/a", 0.01 / 3.1536e7, d::frequency},
      {"kg/kg", 1.0, d::one},
      {"1", 1.0, d::one},
      {"-", 1.0, d::one},
      {" kN.m ", 1e3, d::moment},
      {"cm6", 1e-12, d::length.to_power(6)},
      {"(N/mm2)", 1e6, d::stress},
      {"m^(1/3)", 1.0, d::length.to_power(1, 3)},
      {"dm^(1/3)", 0.46415888336127789, d::length.to_power(1, 3)},  // 10^(-1/3)
  };
  for (const Spelling& spelling : spellings) {
    check_spelling(spelling);
  }
}

TEST_CASE("Units of powers of ten cost one rounding only") {
  CHECK(parse_unit("mm").to_si(300.0) == 0.3);
  CHECK(parse_unit("g/cm3").to_si(7.85) == 7850.0);
  CHECK(parse_unit("mm4").to_si(83600.0) == 83600e-12);
  CHECK(parse_unit("GPa").to_si(210.0) == 210e9);
  CHECK(parse_unit("um/m/K").to_si(12.0) == 12e-6);
  CHECK(parse_unit("kWh/h").to_si(1.5) == 1500.0);
}

TEST_CASE("The scale points of temperature are met") {
  // Ice point 273.15 K, steam point 212 degF = 100 degC (NIST SP 811, from memory).
  CHECK(parse_unit("degC").to_si(0.0) == 273.15);
  CHECK(parse_unit("°C").to_si(20.0) == 293.15);
  CHECK(parse_unit("degF").to_si(32.0) == Approx(273.15).epsilon(1e-15));
  CHECK(parse_unit("°F").to_si(212.0) == Approx(373.15).epsilon(1e-15));
  CHECK(parse_unit("degF").to_si(-459.67) == 0.0);
  CHECK(parse_unit("degC").role == TemperatureRole::absolute);
  CHECK(parse_unit("delta_degC").role == TemperatureRole::difference);
  CHECK(parse_unit("K").role == TemperatureRole::either);
}

TEST_CASE("A unit knows which bases occurred, even where they cancel") {
  CHECK(parse_unit("kg/kg").bases == 1U << static_cast<unsigned>(Base::mass));
  CHECK(parse_unit("%").bases == 0);
  CHECK(parse_unit("mm/m").bases == 1U << static_cast<unsigned>(Base::length));
}

TEST_CASE("Every listed symbol is read, stands once, and in byte order") {
  std::set<std::string_view> seen;
  std::string_view last;
  for (const std::string_view symbol : unit_symbols()) {
    CHECK(parse_unit(symbol).to_si(1.0) > 0.0);
    CHECK(seen.insert(symbol).second);
    CHECK(last < symbol);
    last = symbol;
  }
  CHECK(seen.size() == 70);
}

TEST_CASE("A unit that can be read in two ways is refused") {
  for (const char* text : {"W/m.K", "W/m*K", "W/m·K", "W/m K", "N/mm2.s", "(W/m.K)", "W/mK", "pa",
                           "ct",    "oz",    "'",     "\"",    "ton",     "gal",     "$",    "$/kg",
                           "kr",    "¥",     "lbs",   "mil",   "MPa√m2",  "mN",      "C",    "F"}) {
    INFO(text);
    const CurrencyRates rates("EUR");
    CHECK(fault_of([&] { return parse_unit(text, &rates); }).code == Code::unit_ambiguous);
  }
}

TEST_CASE("An unknown unit is refused, and the nearest word is named") {
  const std::vector<std::pair<const char*, const char*>> cases = {
      {"MPA", "\"MPa\""},      {"mpa", "\"MPa\""},       {"Mpa", "\"MPa\""},
      {"Kg", "\"kg\""},        {"KG", "\"kg\""},         {"Mm", "\"mm\""},
      {"MM", "\"mm\""},        {"kPA", "\"kPa\""},       {"KN.m", "\"kN\""},
      {"eur/kg", "\"EUR\""},   {"Ksi", "\"ksi\""},       {"HZ", "\"Hz\""},
      {"RPM", "\"rpm\""},      {"inch", "\"in\""},       {"tonne", "\"t\""},
      {"hours", "\"h\""},      {"pcs/h", "\"parts\""},   {"CO2", "\"kg/kg\""},
      {"MPam^0.5", "\"MPa\""}, {"ºC", "\"degC\""},       {"kips", "\"kip\""},
      {"EUR per kg", "\"/\""}, {"lbf-ft", "\"lbf.ft\""}, {"degc", "\"degC\""},
      {"nm", "\"N.m\""},       {"thuo", "\"thou\""},     {"L/Mm", "\"mm\""}};
  const CurrencyRates rates("EUR");
  for (const auto& [text, word] : cases) {
    INFO(text);
    const Fault fault = fault_of([&, t = text] { return parse_unit(t, &rates); });
    CHECK(fault.code == Code::unit_unknown);
    CHECK(fault.found == text);
    INFO(fault.message);
    CHECK(contains(fault.message, word));
  }
}

TEST_CASE("A text that is no unit is refused") {
  for (const char* text : {"kEUR",     "XYZ",
                           "foo",      "N//mm2",
                           "N/",       "N.",
                           ".N",       "*N",
                           "N**2",     "mm^",
                           "mm^x",     "mm^0",
                           "mm^0.25",  "mm^0.333",
                           "mm^1.5.5", "mm^(1/4)",
                           "mm^(1/0)", "mm^(1/2",
                           "mm^9999",  "N/mm2)",
                           "(N",       "()",
                           "√",        "√2",
                           "N√",       "mm!",
                           "N@m",      "W/m2K",
                           "sqrt",     "mm\n",
                           "N\x01",    "\xff",
                           "m^--2",    "((((((((((m))))))))))",
                           "m^½½",     "5'",
                           "--"}) {
    INFO(text);
    const CurrencyRates rates("EUR");
    const Code code = fault_of([&] { return parse_unit(text, &rates); }).code;
    const bool refused_as_text = code == Code::unit_unknown || code == Code::number_malformed;
    CHECK(refused_as_text);
  }
  CHECK(fault_of([] { return parse_unit(""); }).code == Code::unit_missing);
  CHECK(fault_of([] { return parse_unit(" \t"); }).code == Code::unit_missing);
  CHECK(fault_of([] { return parse_unit("m1/2"); }).code == Code::number_malformed);
  CHECK(fault_of([] { return parse_unit("10/K"); }).code == Code::number_malformed);
  CHECK(fault_of([] { return parse_unit("mm^13"); }).code == Code::out_of_range);
  CHECK(fault_of([] { return parse_unit("mm²²"); }).code == Code::out_of_range);
  CHECK(fault_of([] { return parse_unit("GPa^12.GPa^12.GPa^12"); }).code == Code::out_of_range);
  CHECK(fault_of([] { return parse_unit(std::string(200, 'm')); }).code == Code::unit_unknown);
  CHECK(fault_of([] { return parse_unit("HB"); }).code == Code::unit_wrong);
}

TEST_CASE("A point on a temperature scale is no part of a compound unit") {
  for (const char* text :
       {"W/m/degC", "1/°C", "um/m/degF", "degC/m", "degC2", "(degC)", "degC.m"}) {
    INFO(text);
    const Fault fault = fault_of([&] { return parse_unit(text); });
    CHECK(fault.code == Code::unit_wrong);
    CHECK(contains(fault.message, "write \"K\""));
  }
}

TEST_CASE("Conversion goes both ways and refuses another dimension") {
  CHECK(convert(1.0, "in", "mm") == Approx(25.4).epsilon(1e-15));
  CHECK(convert(100.0, "degC", "degF") == Approx(212.0).epsilon(1e-14));
  CHECK(convert(20.0, "degC", "K") == 293.15);
  CHECK(convert(9.0, "delta_degF", "K") == 5.0);
  CHECK(fault_of([] { return convert(1.0, "in", "kg"); }).code == Code::unit_wrong);
  CHECK(fault_of([] { return convert(1.0, "rad", "1"); }).code == Code::unit_wrong);
  CHECK(fault_of([] { return convert(1.0, "Hz", "rpm"); }).code == Code::unit_wrong);
  CHECK(fault_of([] { return convert(1.0, "degC", "delta_degC"); }).code == Code::unit_wrong);
  CHECK(fault_of([] { return convert(std::nan(""), "in", "mm"); }).code == Code::not_finite);
  CHECK(fault_of([] { return convert(1e308, "km", "um"); }).code == Code::not_finite);
}
