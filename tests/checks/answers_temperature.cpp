// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/temperature.hpp>

#include <cstddef>
#include <optional>
#include <string>

namespace bismar::checks {

namespace {

/// The table's degrees; its unit C is read as a bare number.
double kelvin(const Check& check, const std::string& input) { return check[input] + 273.15; }

void add_steel(Answers& answers, double temperature, const std::string& suffix) {
  const SteelReduction k = steel_reduction(temperature).value();
  answers["k_y" + suffix] = k.k_y;
  answers["k_p" + suffix] = k.k_p;
  answers["k_E" + suffix] = k.k_E;
}

}  // namespace

std::optional<Answers> temperature_answers(const Check& check) {
  if (!starts_with(check.id, "TMP")) {
    return std::nullopt;
  }
  Answers answers;
  if (check.inputs.count("temperature") != 0) {
    add_steel(answers, kelvin(check, "temperature"), "");
    return answers;
  }
  for (std::size_t i = 1; i <= check.inputs.size(); ++i) {
    const std::string suffix = "_" + std::to_string(i);
    const double temperature = kelvin(check, "temperature" + suffix);
    if (starts_with(check.title, "carbon steel")) {
      add_steel(answers, temperature, suffix);
    } else if (starts_with(check.title, "aluminium modulus")) {
      answers["E" + suffix] = aluminium_modulus(temperature).value();
    } else if (check.title.find("6082-T6") != std::string::npos) {
      answers["k_o" + suffix] = aluminium_proof_ratio("EN AW-6082", "T6", temperature).value();
    } else {
      return std::nullopt;
    }
  }
  return answers;
}

}  // namespace bismar::checks
