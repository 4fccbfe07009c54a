// SPDX-License-Identifier: MIT
// Oracle: the general units program GNU units (2.22 was used), run as a process of its own. Its
// year is the tropical one and it knows no half powers in products with other units, so that
// neither is compared here.
#include <bismar/quantity/unit.hpp>

#include "support/catch.hpp"

#include <charconv>
#include <cmath>
#include <cstdio>
#include <memory>
#include <optional>
#include <string>
#include <vector>

using namespace bismar;

namespace {

struct PipeCloser {
  void operator()(std::FILE* pipe) const { pclose(pipe); }
};

std::string output_of(const std::string& command) {
  const std::unique_ptr<std::FILE, PipeCloser> pipe(popen(command.c_str(), "r"));
  std::string output;
  if (pipe != nullptr) {
    for (int c = std::fgetc(pipe.get()); c != EOF; c = std::fgetc(pipe.get())) {
      output += static_cast<char>(c);
    }
  }
  return output;
}

/// "1 from" in "to" by the program; absent when it does not answer with a number.
std::optional<double> by_program(const std::string& from, const std::string& to) {
  const std::string output =
      output_of("units --terse --output-format %.17g '" + from + "' '" + to + "' 2>/dev/null");
  double number = 0.0;
  const auto [end, error] = std::from_chars(output.data(), output.data() + output.size(), number);
  if (error != std::errc() || *end != '\n') {
    return std::nullopt;
  }
  return number;
}

struct Comparison {
  const char* ours;
  const char* theirs;
  const char* si;
};

const std::vector<Comparison> comparisons = {
    {"km", "km", "m"},
    {"dm", "dm", "m"},
    {"cm", "cm", "m"},
    {"mm", "mm", "m"},
    {"um", "micrometer", "m"},
    {"in", "inch", "m"},
    {"ft", "foot", "m"},
    {"thou", "mil", "m"},
    {"L", "liter", "m^3"},
    {"t", "tonne", "kg"},
    {"g", "gram", "kg"},
    {"lb", "pound", "kg"},
    {"min", "minute", "s"},
    {"h", "hour", "s"},
    {"d", "day", "s"},
    {"delta_degF", "degF", "K"},
    {"deg", "degree", "radian"},
    {"rpm", "rpm", "radian/s"},
    {"rev/min", "revolution/minute", "radian/s"},
    {"kHz", "kHz", "1/s"},
    {"daN", "daN", "N"},
    {"kN", "kN", "N"},
    {"MN", "MN", "N"},
    {"kgf", "kgf", "N"},
    {"lbf", "lbf", "N"},
    {"kip", "kip", "N"},
    {"kNm", "kN m", "N m"},
    {"Nmm", "N mm", "N m"},
    {"MNm", "MN m", "N m"},
    {"kPa", "kPa", "Pa"},
    {"MPa", "MPa", "Pa"},
    {"GPa", "GPa", "Pa"},
    {"bar", "bar", "Pa"},
    {"psi", "psi", "Pa"},
    {"ksi", "1000 psi", "Pa"},
    {"Msi", "1000000 psi", "Pa"},
    {"kJ", "kJ", "J"},
    {"MJ", "MJ", "J"},
    {"kWh", "kWh", "J"},
    {"kW", "kW", "W"},
    {"%", "percent", "1"},
    {"N/mm2", "N/mm^2", "Pa"},
    {"kgf/mm2", "kgf/mm^2", "Pa"},
    {"lbf.in", "lbf inch", "N m"},
    {"lbf.ft", "lbf foot", "N m"},
    {"kip.ft", "kip foot", "N m"},
    {"lbf/in", "lbf/inch", "N/m"},
    {"lbf/ft", "lbf/foot", "N/m"},
    {"kip/ft", "kip/foot", "N/m"},
    {"lbf/ft2", "lbf/foot^2", "Pa"},
    {"g/cm3", "g/cm^3", "kg/m^3"},
    {"lb/in3", "pound/inch^3", "kg/m^3"},
    {"lb/ft3", "pound/foot^3", "kg/m^3"},
    {"lb/ft", "pound/foot", "kg/m"},
    {"lb/ft2", "pound/foot^2", "kg/m^2"},
    {"in2", "inch^2", "m^2"},
    {"in3", "inch^3", "m^3"},
    {"in4", "inch^4", "m^4"},
    {"ft4", "foot^4", "m^4"},
    {"cm6", "cm^6", "m^6"},
    {"um/m/K", "micrometer/m/K", "1/K"},
    {"W/in/K", "W/inch/K", "W/m/K"},
    {"kWh/lb", "kWh/pound", "J/kg"},
    {"ft/s2", "foot/s^2", "m/s^2"},
    {"ft/h", "foot/hour", "m/s"},
    {"lb/h", "pound/hour", "kg/s"},
};

}  // namespace

TEST_CASE("A general units program gives the same sizes of units") {
  if (!by_program("1 m", "mm").has_value()) {
    WARN("NOT RUN: the program 'units' (GNU units) is not installed, so nothing was compared.");
    return;
  }
  for (const Comparison& comparison : comparisons) {
    INFO(comparison.ours);
    const std::optional<double> theirs = by_program(comparison.theirs, comparison.si);
    REQUIRE(theirs.has_value());
    // Its own roundings add up to a few units in the last place.
    CHECK(parse_unit(comparison.ours).to_si(1.0) == Approx(*theirs).epsilon(4e-15).margin(0.0));
  }
}

TEST_CASE("A general units program gives the same temperatures") {
  if (!by_program("1 m", "mm").has_value()) {
    WARN("NOT RUN: the program 'units' (GNU units) is not installed, so nothing was compared.");
    return;
  }
  for (const int degrees : {-40, 0, 20, 32, 100, 212, 650}) {
    INFO(degrees);
    const std::string number = std::to_string(degrees);
    const std::optional<double> celsius = by_program("tempC(" + number + ")", "K");
    const std::optional<double> fahrenheit = by_program("tempF(" + number + ")", "K");
    REQUIRE(celsius.has_value());
    REQUIRE(fahrenheit.has_value());
    CHECK(parse_unit("degC").to_si(degrees) == Approx(*celsius).epsilon(1e-15).margin(0.0));
    CHECK(parse_unit("degF").to_si(degrees) == Approx(*fahrenheit).epsilon(1e-15).margin(0.0));
  }
}
