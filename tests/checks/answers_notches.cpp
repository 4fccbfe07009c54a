// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/notch.hpp>

#include <optional>

namespace bismar::checks {

namespace {

Answers fillet(const RoundNotch& notch) {
  const auto K_t = [&](NotchLoad load, NotchFormula formula) {
    return shoulder_fillet_factor(notch, load, formula);
  };
  Answers answers = {{"roark_tension", K_t(NotchLoad::tension, NotchFormula::roark)},
                     {"roark_bending", K_t(NotchLoad::bending, NotchFormula::roark)},
                     {"pilkey_tension", K_t(NotchLoad::tension, NotchFormula::pilkey)},
                     {"pilkey_bending", K_t(NotchLoad::bending, NotchFormula::pilkey)}};
  // The fit for torsion ends at h/r = 4.
  if (notch.large_diameter - notch.small_diameter < 8.0 * notch.radius) {
    answers["pilkey_torsion"] = K_t(NotchLoad::torsion, NotchFormula::pilkey);
  }
  return answers;
}

Answers groove(const RoundNotch& notch) {
  const auto K_t = [&](NotchLoad load, NotchFormula formula) {
    return u_groove_factor(notch, load, formula);
  };
  return {{"roark_tension", K_t(NotchLoad::tension, NotchFormula::roark)},
          {"roark_bending", K_t(NotchLoad::bending, NotchFormula::roark)},
          {"roark_torsion", K_t(NotchLoad::torsion, NotchFormula::roark)},
          {"pilkey_tension", K_t(NotchLoad::tension, NotchFormula::pilkey)},
          {"pilkey_bending", K_t(NotchLoad::bending, NotchFormula::pilkey)},
          {"pilkey_torsion", K_t(NotchLoad::torsion, NotchFormula::pilkey)}};
}

Answers radial_hole(double bore_ratio, double hole_ratio) {
  return {{"tension", radial_hole_factor(bore_ratio, hole_ratio, NotchLoad::tension)},
          {"bending", radial_hole_factor(bore_ratio, hole_ratio, NotchLoad::bending)},
          {"torsion", radial_hole_factor(bore_ratio, hole_ratio, NotchLoad::torsion)}};
}

/// The same constants under the names of the different tables.
Answers neuber(const Check& check) {
  // One example rounds the conversion to kpsi; the constants are then of its rounded strength.
  const double S = check[check.inputs.contains("S_ut_kpsi") ? "S_ut_kpsi" : "S_ut"];
  const double r = check["r"];
  const double bending = neuber_constant(S, NotchLoad::bending);
  const double torsion = neuber_constant(S, NotchLoad::torsion);
  const double q = neuber_sensitivity(S, r, NotchLoad::bending);
  const double q_s = neuber_sensitivity(S, r, NotchLoad::torsion);
  Answers answers = {{"sqrt_a_bending", bending},
                     {"sqrt_a_bending_in", bending},
                     {"sqrt_a_bending_mm", bending},
                     {"sqrt_a_torsion", torsion},
                     {"sqrt_a_torsion_in", torsion},
                     {"sqrt_a_torsion_mm", torsion},
                     {"q", q},
                     {"q_r1", q},
                     {"q_s", q_s},
                     {"qs_r1", q_s}};
  if (check.inputs.contains("K_t")) {
    answers["K_f"] = fatigue_concentration(check["K_t"], q);
    answers["K_fs"] = fatigue_concentration(check["K_ts"], q_s);
  }
  return answers;
}

}  // namespace

std::optional<Answers> notch_answers(const Check& check) {
  if (!starts_with(check.id, "NOT")) {
    return std::nullopt;
  }
  if (check.inputs.contains("D")) {
    const RoundNotch notch{
        .large_diameter = check["D"], .small_diameter = check["d"], .radius = check["r"]};
    return starts_with(check.title, "stepped") ? fillet(notch) : groove(notch);
  }
  if (check.inputs.contains("d_over_W")) {
    const double x = check["d_over_W"];
    return Answers{{"Kt_net", plate_hole_factor(x)},
                   {"Kt_gross", plate_hole_gross_factor(x)},
                   {"Kt_net_heywood", plate_hole_heywood_factor(x)}};
  }
  if (check.inputs.contains("bore_ratio")) {
    return radial_hole(check["bore_ratio"], check["hole_ratio"]);
  }
  if (check.inputs.contains("S_ut")) {
    return neuber(check);
  }
  if (starts_with(check.title, "cast iron")) {
    return Answers{{"q", cast_iron_sensitivity},
                   {"K_f", fatigue_concentration(check["K_t"], cast_iron_sensitivity)}};
  }
  return std::nullopt;
}

}  // namespace bismar::checks
