// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/aluminium.hpp>
#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/timber.hpp>
#include <bismar/mechanics/wall.hpp>

#include <cmath>
#include <map>
#include <string>
#include <vector>

namespace bismar::checks {

namespace {

Answers aluminium_column(const Check& check) {
  const bool class_a = starts_with(check.words.at("buckling_class"), "A");
  const SectionProperties s =
      rectangular_tube(check["b"], check["b"], check["t"], Corners::sharp, Forming::extruded);
  const double f = check["f_o"];
  const double epsilon = aluminium_wall_epsilon(f);
  const double beta = s.plates.at(0).ratio;
  const double rho = aluminium_wall_factor({.class_a = class_a}, beta / epsilon);
  const double effective = rho * s.area;
  const double critical = euler_critical_load(check["E"], s.I_y, check["L_cr"]);
  const double lambda = relative_slenderness(effective, f, critical);
  const double chi = reduction_factor(aluminium_curve(class_a), lambda);
  return {{"A", s.area},
          {"I", s.I_y},
          {"epsilon", epsilon},
          {"beta", beta},
          {"beta3",
           aluminium_class_3_limit(PlateElement::Kind::internal_compression, epsilon, class_a)},
          {"rho_c", rho},
          {"t_eff", rho * check["t"]},
          {"A_eff", effective},
          {"N_cr", critical},
          {"lambda_bar", lambda},
          {"chi", chi},
          {"N_b_Rd", chi * effective * f / check["gamma_M1"]}};
}

/// The row of the shipped table that a title such as "HAZ factors, EN AW-6063 T6, EP/ET/ER/B,
/// t<=25" means: same alloy, product and thickness limit, and the same temper.
Answers weld_zone(const Check& check) {
  static const std::vector<std::map<std::string, std::string>> rows =
      read_rows(std::string(BISMAR_TEST_DATA_DIR) + "/weld-zones.csv");
  Answers answers;
  int found = 0;
  for (const auto& row : rows) {
    const std::string temper = row.at("tempers").substr(0, row.at("tempers").find(';'));
    const std::string product = row.at("product").empty() ? "" : ", " + row.at("product");
    if (check.title.find("EN AW-" + row.at("alloy") + " " + temper) == std::string::npos ||
        check.title.find(product + ", t<=" + row.at("thickness limit [mm]")) == std::string::npos) {
      continue;
    }
    // A temper may be the beginning of another one: T6 of T66.
    const std::size_t after = check.title.find("EN AW-" + row.at("alloy") + " " + temper) + 7 +
                              row.at("alloy").size() + temper.size();
    if (after < check.title.size() && check.title[after] != ',' && check.title[after] != '/') {
      continue;
    }
    ++found;
    const auto value = [&](const char* column) { return std::stod(row.at(column)); };
    answers = {{"rho_o_haz",
                weld_zone_factor(value("zone yield strength [MPa]"),
                                 value("parent yield strength [MPa]"))},
               {"rho_u_haz",
                weld_zone_factor(value("zone tensile strength [MPa]"),
                                 value("parent tensile strength [MPa]"))}};
  }
  return found == 1 ? answers : Answers{};
}

std::optional<Answers> aluminium_answers(const Check& check) {
  if (check.inputs.contains("lambda_bar")) {
    const double lambda = check["lambda_bar"];
    return Answers{{"chi_A", reduction_factor(aluminium_curve(true), lambda)},
                   {"chi_B", reduction_factor(aluminium_curve(false), lambda)}};
  }
  if (check.inputs.contains("beta_over_eps")) {
    return Answers{{"rho_c", aluminium_wall_factor({}, check["beta_over_eps"])}};
  }
  return check.inputs.contains("f_o_haz") ? weld_zone(check) : aluminium_column(check);
}

Answers slenderness_100(const Check& check) {
  // A = 1, I = i^2 = 1: the effective length is the slenderness.
  const double relative = relative_slenderness(
      1.0, check["f_c_0_k"], euler_critical_load(check["E_0_05"], 1.0, check["slenderness"]));
  return {{"lambda_rel_100", relative},
          {"lambda_for_0.3", 0.3 / (relative / check["slenderness"])},
          {"kc_100", reduction_factor(timber_curve(false), relative)}};
}

Answers timber_column(const Check& check) {
  const SectionProperties s = solid_rectangle(check["h"], check["b"]);
  const double N = check["gamma_G"] * check["G_k"] + check["gamma_Q"] * check["Q_k"];
  const double L = check["L"];
  const auto relative = [&](double I) {
    return relative_slenderness(
        s.area, check["f_c_0_k"], euler_critical_load(check["E_0_05"], I, L));
  };
  const double k_c_y = reduction_factor(timber_curve(false), relative(s.I_y));
  const double k_c_z = reduction_factor(timber_curve(false), relative(s.I_z));
  const double design = modification_factor(1, LoadDuration::medium_term) / check["gamma_M"];
  const double k_h_z = size_factor(TimberKind::solid, check["b"]);
  const double f_c = check["f_c_0_k"] * design;
  const double f_m_y = check["f_m_k"] * design * size_factor(TimberKind::solid, check["h"]);
  const double f_m_z = check["f_m_k"] * design * k_h_z;
  const double sigma_y = N * check["e_z (moment about y-y)"] / s.W_el_y;
  const double sigma_z = N * check["e_y (moment about z-z)"] / s.W_el_z;
  const double sigma_c = N / s.area;
  const TimberSums sums = timber_column_sums({.axial_y = sigma_c / (k_c_y * f_c),
                                              .axial_z = sigma_c / (k_c_z * f_c),
                                              .moment_y = sigma_y / f_m_y,
                                              .moment_z = sigma_z / f_m_z},
                                             check["k_m"]);
  return {{"N_d", N},
          {"lambda_y", L / s.i_y()},
          {"lambda_z", L / s.i_z()},
          {"lambda_rel_y", relative(s.I_y)},
          {"lambda_rel_z", relative(s.I_z)},
          {"kc_y", k_c_y},
          {"kc_z", k_c_z},
          {"sigma_c", sigma_c},
          {"sigma_m_y", sigma_y},
          {"sigma_m_z", sigma_z},
          {"k_h_z", k_h_z},
          {"f_c_0_d", f_c},
          {"f_m_y_d", f_m_y},
          {"f_m_z_d", f_m_z},
          {"ratio_6_23", sums.about_y},
          {"ratio_6_24", sums.about_z}};
}

Answers modification_factors() {
  Answers answers;
  for (int service = 1; service <= 3; ++service) {
    for (int duration = 0; duration < 5; ++duration) {
      answers["SC" + std::to_string(service) + "_" + std::to_string(duration + 1)] =
          modification_factor(service, static_cast<LoadDuration>(duration));
    }
  }
  return answers;
}

/// TIM-032: a C24 joist (f_m,k = 24 MPa) on two supports; 1.35 G + 1.5 Q on its spacing.
Answers joist(const Check& check) {
  const SectionProperties s = solid_rectangle(check["h"], check["b"]);
  const double L = check["L"];
  const auto under = [&](double q) {
    return reduce(pinned_pinned({distributed(q, q, 0.0, L)}), L);
  };
  const LoadEffects service = under(check["q_instantaneous"]);
  const double bending = service.deflection_z / (check["E_mean"] * s.I_y);
  const double shear = service.shear_deflection_z / (check["G_mean"] * s.A_s_z);
  const double ultimate = (1.35 * check["G_k"] + 1.5 * check["Q_k"]) * check["spacing"];
  const double sigma = under(ultimate).moment_y.largest / s.W_el_y;
  const double strength = 24e6 * modification_factor(1, LoadDuration::medium_term) *
                          check["k_sys"] * size_factor(TimberKind::solid, check["h"]) /
                          check["gamma_M"];
  return {{"w_bending", bending},
          {"w_shear", shear},
          {"w_total", bending + shear},
          {"q_uls", ultimate},
          {"sigma_m", sigma},
          {"utilisation", sigma / strength}};
}

std::optional<Answers> timber_answers(const Check& check) {
  if (check.inputs.contains("lambda_rel")) {
    const double lambda = check["lambda_rel"];
    return Answers{{"kc_solid", reduction_factor(timber_curve(false), lambda)},
                   {"kc_glulam", reduction_factor(timber_curve(true), lambda)}};
  }
  if (check.inputs.contains("lambda_rel_m")) {
    return Answers{{"k_crit", lateral_buckling_factor(check["lambda_rel_m"])}};
  }
  if (check.inputs.contains("slenderness")) {
    return slenderness_100(check);
  }
  if (check.id == "TIM-014") {
    return modification_factors();
  }
  if (check.id == "TIM-013") {
    return timber_column(check);
  }
  if (check.id == "TIM-032") {
    return joist(check);
  }
  if (check.inputs.contains("h")) {
    const bool glued = check.title.find("glulam") != std::string::npos;
    return Answers{
        {"k_h", size_factor(glued ? TimberKind::glued_laminated : TimberKind::solid, check["h"])}};
  }
  return std::nullopt;
}

}  // namespace

std::optional<Answers> aluminium_timber_answers(const Check& check) {
  if (starts_with(check.id, "ALU")) {
    return aluminium_answers(check);
  }
  return starts_with(check.id, "TIM") ? timber_answers(check) : std::nullopt;
}

}  // namespace bismar::checks
