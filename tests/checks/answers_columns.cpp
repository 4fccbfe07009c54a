// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar::checks {

namespace {

constexpr double pi = std::numbers::pi;

double chi(BucklingCurve curve, double slenderness) {
  return reduction_factor(steel_curve(curve), slenderness);
}

/// Slenderness KL/r at which Johnson's parabola meets Euler's curve.
double transition(double E, double yield) { return std::sqrt(2.0 * pi * pi * E / yield); }

Answers euler_tubes(const Check& check) {
  if (check.inputs.count("r_o") != 0) {
    const double outer = 2.0 * check["r_o"];
    const SectionProperties s =
        round_tube(outer, (outer - 2.0 * check["r_i"]) / 2.0, Forming::unknown);
    const double load = euler_critical_load(check["E"], s.I_y, check["L"]);
    return {{"P_cr", load}, {"sigma_cr", load / s.area}};
  }
  const double outer = check["d_o"];
  const SectionProperties s = round_tube(outer, (outer - check["d_i"]) / 2.0, Forming::unknown);
  // The checks use K = 1, 2 and 0.5, and 0.7 (COL-008) or the root of tan x = x (COL-001) for
  // fixed-pinned.
  const double fixed_pinned =
      check.inputs.count("Sy") != 0 ? 0.7 : effective_length_factor(Support::fixed_pinned);
  const auto load = [&](double K) {
    if (check.inputs.count("Sy") != 0) {
      return johnson_critical_load(s.area, check["Sy"], check["E"], K * check["L"] / s.i_y());
    }
    return euler_critical_load(check["E"], s.I_y, K * check["L"]);
  };
  return {{"I", s.I_y},
          {"P_pinned", load(1.0)},
          {"P_pinned_pinned", load(1.0)},
          {"P_fixed_free", load(2.0)},
          {"P_fixed_pinned", load(fixed_pinned)},
          {"P_fixed_fixed", load(0.5)}};
}

Answers round_sizing(const Check& check) {
  if (check.inputs.count("n_d") != 0) {
    const double target = check["P"] * check["n_d"];
    const double d = where_falls_to(1.0, 1e-3, 1.0, [&](double size) {
      return target / euler_critical_load(check["E"], solid_round(size).I_y, check["L"]);
    });
    return {{"d_required", d},
            {"slenderness_at_40mm", check["L"] / solid_round(0.040).i_y()},
            {"transition_slenderness", transition(check["E"], check["Sy"])}};
  }
  const double target = check["F"] * check["N"];
  const double d = where_falls_to(1.0, 1e-3, 1.0, [&](double size) {
    const SectionProperties s = solid_round(size);
    return target / johnson_critical_load(s.area, check["Sy"], check["E"], check["Le"] / s.i_y());
  });
  return {{"d", d}, {"transition_slenderness", transition(check["E"], check["Sy"])}};
}

Answers worked_steel(const Check& check) {
  if (check.id == "COL-040") {
    const double A = check["A"];
    const double fy = check["fy"];
    const double Ncr_y = euler_critical_load(check["E"], check["Iy"], check["Lcr_y"]);
    const double Ncr_z = euler_critical_load(check["E"], check["Iz"], check["Lcr_z"]);
    const double lambda_y = relative_slenderness(A, fy, Ncr_y);
    const double lambda_z = relative_slenderness(A, fy, Ncr_z);
    // The curves follow from the rolled section (HE 300 B: h = b = 300, tf = 19 mm).
    const SectionProperties s = i_section(0.300, 0.300, 0.011, 0.019, 0.027);
    const ColumnCurve curve_y = steel_curve(buckling_curve(s, BendingAxis::y));
    const double chi_y = reduction_factor(curve_y, lambda_y);
    const double chi_z = chi(buckling_curve(s, BendingAxis::z), lambda_z);
    return {{"Ncr_y", Ncr_y},
            {"Ncr_z", Ncr_z},
            {"lambda_y", lambda_y},
            {"lambda_z", lambda_z},
            {"Phi_y",
             // chi = 1/(Phi + sqrt(Phi^2 - lambda^2)) solved for Phi
             (1.0 / chi_y + lambda_y * lambda_y * chi_y) / 2.0},
            {"chi_y", chi_y},
            {"chi_z", chi_z},
            {"Nb_Rd", std::min(chi_y, chi_z) * A * fy}};
  }
  const double A = check["A"];
  const double I = A * check["iz"] * check["iz"];
  const double lambda =
      relative_slenderness(A, check["fy"], euler_critical_load(check["E"], I, check["L"]));
  const double factor = chi(BucklingCurve::c, lambda);
  return {{"lambda_1", check["L"] / check["iz"] / lambda},
          {"lambda_bar", lambda},
          {"Phi", (1.0 / factor + lambda * lambda * factor) / 2.0},
          {"chi", factor}};
}

Answers american(const Check& check) {
  const auto get = [&](const char* name, double otherwise) {
    return check.inputs.count(name) != 0 ? check[name] : otherwise;
  };
  const double E = check["E"];
  const double Fy = check["Fy"];
  const double area = get("Ag", 1.0);
  double slenderness = get("KL_r", 0.0);
  Answers answers;
  if (check.inputs.count("ry") != 0) {
    const double about_y = get("KLy", get("KL", 0.0)) / check["ry"];
    const double about_x = check.inputs.count("rx") != 0 ? check["KLx"] / check["rx"] : 0.0;
    answers["KLx_rx"] = about_x;
    answers["KLy_ry"] = about_y;
    slenderness = std::max(about_x, about_y);
    answers["KL_r"] = slenderness;
  }
  const double critical = aisc_critical_stress(Fy, E, slenderness);
  const double phi = get("phi", 0.90);
  // F_e = N_cr / A of a column with A = 1 and I = 1.
  const double elastic = euler_critical_load(E, 1.0, slenderness);
  answers.insert({{"Fe", elastic},
                  {"F_e", elastic},
                  {"Fcr", critical},
                  {"F_cr", critical},
                  {"phiFcr", phi * critical},
                  {"phiFcr_table", phi * critical},
                  {"P_n", critical * area},
                  {"phiPn", phi * critical * area},
                  {"phi_P_n", phi * critical * area},
                  {"Pn_Omega", critical * area / 1.67}});
  return answers;
}

}  // namespace

double where_falls_to(double target,
                      double low,
                      double high,
                      const std::function<double(double)>& f) {
  for (int step = 0; step < 200; ++step) {
    const double middle = (low + high) / 2.0;
    (f(middle) > target ? low : high) = middle;
  }
  return (low + high) / 2.0;
}

std::optional<Answers> column_answers(const Check& check) {
  if (check.inputs.count("lambda_bar") != 0) {
    const double lambda = check["lambda_bar"];
    return Answers{{"chi_a0", chi(BucklingCurve::a0, lambda)},
                   {"chi_a", chi(BucklingCurve::a, lambda)},
                   {"chi_b", chi(BucklingCurve::b, lambda)},
                   {"chi_c", chi(BucklingCurve::c, lambda)},
                   {"chi_d", chi(BucklingCurve::d, lambda)}};
  }
  const auto ends = check.words.find("ends");
  if (ends != check.words.end()) {
    const Support support =
        ends->second == "fixed-fixed" ? Support::fixed_fixed : Support::fixed_pinned;
    return Answers{{"K", effective_length_factor(support)}};
  }
  if (check.title.find("AISC") != std::string::npos) {
    return american(check);
  }
  if (check.id == "COL-010") {
    const double I = check["A"] * check["r"] * check["r"];
    const double load = euler_critical_load(check["E"], I, check["K"] * check["L"]);
    return Answers{{"P_cr", load}, {"sigma_cr", load / check["A"]}};
  }
  if (check.id == "COL-011") {
    return Answers{{"sigma_max",
                    secant_stress({.load = check["P"],
                                   .area = check["A"],
                                   .radius_of_gyration = check["r"],
                                   .effective_length = check["K"] * check["L"],
                                   .youngs_modulus = check["E"],
                                   .eccentricity = check["e"],
                                   .fibre_distance = check["c"]})}};
  }
  if (check.id == "COL-040" || check.id == "COL-041") {
    return worked_steel(check);
  }
  if (starts_with(check.id, "COL")) {
    const bool tube = check.inputs.count("d_o") != 0 || check.inputs.count("r_o") != 0;
    return tube ? euler_tubes(check) : round_sizing(check);
  }
  return std::nullopt;
}

}  // namespace bismar::checks
