// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/vibration.hpp>

#include <array>
#include <cmath>
#include <numbers>
#include <optional>
#include <stdexcept>
#include <string>

namespace bismar::checks {

namespace {

/// f to omega in the unit sqrt(E I / (m L^4)): a beam of E I = m = L = 1.
constexpr double omega = 2.0 * std::numbers::pi;
constexpr UniformBeam unit{.bending_stiffness = 1.0, .mass_per_length = 1.0, .length = 1.0};

BeamEnds ends(const std::string& words) {
  if (words == "cantilever (fixed-free)") {
    return BeamEnds::fixed_free;
  }
  if (words == "pinned-pinned") {
    return BeamEnds::pinned_pinned;
  }
  if (words == "fixed-pinned") {
    return BeamEnds::fixed_pinned;
  }
  if (words == "fixed-fixed and free-free") {
    return BeamEnds::free_free;
  }
  throw std::runtime_error("beam ends \"" + words + "\" are not known");
}

/// With a mass by the general solution, without one by the characteristic root: both are the
/// library's, and the tip mass's own equation must agree.
double lowest_omega(double mass_ratio) {
  if (mass_ratio == 0.0) {
    return omega * natural_frequency(unit, tip_mass_root(0.0, 1));
  }
  const std::array<AttachedMass, 1> tip = {{{.mass = mass_ratio, .at = 1.0}}};
  return omega * lowest_natural_frequency(unit, Support::cantilever, tip);
}

Answers tip_mass(const Check& check) {
  const double mu = check["mu"];
  Answers answers;
  if (check.expected.count("omega_1") != 0) {
    answers["omega_1"] = lowest_omega(mu);
    for (int mode = 2; mode <= 5; ++mode) {
      answers["omega_" + std::to_string(mode)] =
          omega * natural_frequency(unit, tip_mass_root(mu, mode));
    }
    return answers;
  }
  const double estimate = omega * tip_mass_frequency_estimate(unit, mu);
  return {{"omega_exact", lowest_omega(mu)},
          {"omega_approx", estimate},
          {"ratio", estimate / lowest_omega(mu)}};
}

Answers strip(const Check& check) {
  const SectionProperties s = solid_rectangle(check["h"], check["b"]);
  const Support support = check.title.find("pinned-pinned") != std::string::npos
                              ? Support::pinned_pinned
                              : Support::fixed_fixed;
  return {{"f1",
           lowest_natural_frequency({.bending_stiffness = check["E"] * s.I_y,
                                     .mass_per_length = check["rho"] * s.area,
                                     .length = check["L"]},
                                    support)}};
}

}  // namespace

std::optional<Answers> vibration_answers(const Check& check) {
  if (!starts_with(check.id, "VIB")) {
    return std::nullopt;
  }
  if (check.inputs.count("mode") != 0) {
    const double root =
        characteristic_root(ends(check.words.at("ends")), static_cast<int>(check["mode"]));
    return Answers{{"beta_L", root}, {"omega_coef", omega * natural_frequency(unit, root)}};
  }
  return check.inputs.count("mu") != 0 ? tip_mass(check) : strip(check);
}

}  // namespace bismar::checks
