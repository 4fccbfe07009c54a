// SPDX-License-Identifier: MIT
#include "unit_table.hpp"

#include <array>

namespace bismar {

namespace {

constexpr auto ambiguous = Code::unit_ambiguous;
constexpr auto unknown = Code::unit_unknown;
constexpr auto wrong = Code::unit_wrong;

constexpr std::string_view is_a_name = "is a name and no symbol";
constexpr std::string_view is_no_symbol = "is no symbol of this list";
constexpr std::string_view foot_or_minute = "may be a foot or a minute of arc";
constexpr std::string_view inch_or_second = "may be an inch or a second of arc";
constexpr std::string_view mass_or_force = "may be a mass or a force";
constexpr std::string_view several_tons = "may be 1000 kg, 2000 lb or 2240 lb";
constexpr std::string_view thou_or_mm = "may be a thousandth of an inch or a millimetre";
constexpr std::string_view several_currencies = "is the sign of several currencies";
constexpr std::string_view no_fixed_length = "has no fixed length";
constexpr std::string_view wrong_degree_sign = "has the ordinal sign for the degree sign";
constexpr std::string_view is_hardness = "is a hardness scale and no unit";
constexpr std::string_view is_substance = "names a substance, which is no unit";

constexpr std::string_view lb_or_lbf = "\"lb\" for a mass, \"lbf\" for a force";
constexpr std::string_view t_kg_or_lb = "\"t\", \"kg\" or \"lb\"";
constexpr std::string_view hardness_alone = "the number alone in a hardness column";

// word, code, why it is refused, what to write instead
constexpr std::array refused_words = {
    // two readings
    RefusedWord{"oz", ambiguous, "may be an ounce of mass, force or volume", "\"g\" or \"lb\""},
    RefusedWord{"ton", ambiguous, several_tons, t_kg_or_lb},
    RefusedWord{"tons", ambiguous, several_tons, t_kg_or_lb},
    RefusedWord{"gal", ambiguous, "may be a US or an imperial gallon", "\"L\" or \"m3\""},
    RefusedWord{"ct", ambiguous, "may be a cent, a carat or a count", "\"EUR\" or \"parts\""},
    RefusedWord{"lbs", ambiguous, mass_or_force, lb_or_lbf},
    RefusedWord{"pound", ambiguous, mass_or_force, lb_or_lbf},
    RefusedWord{"pounds", ambiguous, mass_or_force, lb_or_lbf},
    RefusedWord{"mil", ambiguous, thou_or_mm, "\"thou\" or \"mm\""},
    RefusedWord{"mils", ambiguous, thou_or_mm, "\"thou\" or \"mm\""},
    RefusedWord{
        "mK", ambiguous, "may be a millikelvin or a metre kelvin", "\"m.K\" or \"W/(m.K)\""},
    RefusedWord{"mN", ambiguous, "may be a millinewton or a metre newton", "\"N.m\" or \"N\""},
    RefusedWord{"ms", ambiguous, "may be a millisecond or a metre second", "\"s\" or \"m.s\""},
    RefusedWord{"pa", ambiguous, "may be a pascal or \"per year\"", "\"Pa\" or \"1/a\""},
    RefusedWord{"'", ambiguous, foot_or_minute, "\"ft\""},
    RefusedWord{"\u2032", ambiguous, foot_or_minute, "\"ft\""},
    RefusedWord{"\u2019", ambiguous, foot_or_minute, "\"ft\""},
    RefusedWord{"\"", ambiguous, inch_or_second, "\"in\""},
    RefusedWord{"\u2033", ambiguous, inch_or_second, "\"in\""},
    RefusedWord{"\u201D", ambiguous, inch_or_second, "\"in\""},
    RefusedWord{"$", ambiguous, several_currencies, "\"USD\", \"CAD\" or \"AUD\""},
    RefusedWord{"kr", ambiguous, several_currencies, "\"SEK\", \"NOK\" or \"DKK\""},
    RefusedWord{"\u00A5", ambiguous, several_currencies, "\"JPY\" or \"CNY\""},
    RefusedWord{"month", ambiguous, no_fixed_length, "\"d\" or \"h\""},
    RefusedWord{"months", ambiguous, no_fixed_length, "\"d\" or \"h\""},
    RefusedWord{"C", ambiguous, "may be a temperature or a charge", "\"degC\" or \"K\""},
    RefusedWord{"F", ambiguous, "may be a temperature or a capacitance", "\"degF\" or \"K\""},
    // symbols that differ from another by one letter case and a factor of a thousand million
    RefusedWord{"Mg", unknown, "is too easily taken for a milligram", "\"t\""},
    RefusedWord{"mg", unknown, "is too easily taken for a megagram", "\"g\""},
    RefusedWord{"nm", unknown, "is too easily taken for a newton metre", "\"um\" or \"N.m\""},
    // no units
    RefusedWord{"HB", wrong, is_hardness, hardness_alone},
    RefusedWord{"HV", wrong, is_hardness, hardness_alone},
    RefusedWord{"HRC", wrong, is_hardness, hardness_alone},
    RefusedWord{"CO", unknown, is_substance, "\"kg/kg\""},
    RefusedWord{"kgCO", unknown, is_substance, "\"kg/kg\""},
    RefusedWord{"gCO", unknown, is_substance, "\"g/kg\""},
    RefusedWord{"per", unknown, "is a word and no unit", "\"/\""},
    RefusedWord{"\u00BAC", unknown, wrong_degree_sign, "\"degC\""},
    RefusedWord{"\u00BAF", unknown, wrong_degree_sign, "\"degF\""},
    // names and short forms
    RefusedWord{"tonne", unknown, is_a_name, "\"t\""},
    RefusedWord{"tonnes", unknown, is_a_name, "\"t\""},
    RefusedWord{"inch", unknown, is_a_name, "\"in\""},
    RefusedWord{"inches", unknown, is_a_name, "\"in\""},
    RefusedWord{"foot", unknown, is_a_name, "\"ft\""},
    RefusedWord{"feet", unknown, is_a_name, "\"ft\""},
    RefusedWord{"hour", unknown, is_a_name, "\"h\""},
    RefusedWord{"hours", unknown, is_a_name, "\"h\""},
    RefusedWord{"day", unknown, is_a_name, "\"d\""},
    RefusedWord{"days", unknown, is_a_name, "\"d\""},
    RefusedWord{"degree", unknown, is_a_name, "\"deg\" or \"degC\""},
    RefusedWord{"degrees", unknown, is_a_name, "\"deg\" or \"degC\""},
    RefusedWord{"pieces", unknown, is_a_name, "\"parts\""},
    RefusedWord{"pcs", unknown, is_no_symbol, "\"parts\""},
    RefusedWord{"kips", unknown, is_no_symbol, "\"kip\""},
    RefusedWord{"psf", unknown, is_no_symbol, "\"lbf/ft2\""},
    RefusedWord{"plf", unknown, is_no_symbol, "\"lbf/ft\""},
    RefusedWord{"pli", unknown, is_no_symbol, "\"lbf/in\""},
    RefusedWord{"klf", unknown, is_no_symbol, "\"kip/ft\""},
    RefusedWord{"cc", unknown, is_no_symbol, "\"cm3\""},
    RefusedWord{"sec", unknown, is_no_symbol, "\"s\""},
    RefusedWord{"hr", unknown, is_no_symbol, "\"h\""},
    RefusedWord{"hrs", unknown, is_no_symbol, "\"h\""},
    RefusedWord{"yr", unknown, is_no_symbol, "\"a\""},
};

}  // namespace

const RefusedWord* find_refused(std::string_view word) noexcept {
  for (const RefusedWord& refused : refused_words) {
    if (refused.word == word) {
      return &refused;
    }
  }
  return nullptr;
}

}  // namespace bismar
