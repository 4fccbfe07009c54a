// SPDX-License-Identifier: MIT
// Stability of steel members: lateral-torsional buckling, section classes, axial force with
// bending.
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/beam_column.hpp>
#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/cross_section_resistance.hpp>
#include <bismar/mechanics/lateral_torsional.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/wall.hpp>

#include <algorithm>
#include <string>

namespace bismar::checks {

namespace {

constexpr double E_steel = 210e9;
constexpr double G_steel = 81e9;

double get(const Check& check, const std::string& name, double otherwise) {
  return check.inputs.contains(name) ? check[name] : otherwise;
}

LateralTorsionalBeam beam_of(const Check& check, const MomentFactors& factors) {
  return {.youngs_modulus = get(check, "E", E_steel),
          .shear_modulus = get(check, "G", G_steel),
          .I_z = get(check, "Iz", get(check, "I_z", 0.0)),
          .I_t = get(check, "It", get(check, "I_t", 0.0)),
          .I_w = get(check, "Iw", get(check, "I_w", 0.0)),
          .length = check["L"],
          .k = get(check, "k", 1.0),
          .k_w = get(check, "kw", 1.0),
          .factors = factors,
          .load_height = get(check, "zg", 0.0)};
}

Answers critical_moment(const Check& check) {
  const MomentFactors factors{.C1 = get(check, "C1", 1.0), .C2 = get(check, "C2", 0.0)};
  const double critical = elastic_critical_moment(beam_of(check, factors));
  Answers answers{{"Mcr", critical}};
  if (check.inputs.contains("Wpl_y")) {
    answers["lambda_0"] = lateral_torsional_slenderness(check["Wpl_y"], check["fy"], critical);
  }
  return answers;
}

/// LTB-007: alpha 0.49 is curve c.
Answers rolled_with_divisor(const Check& check) {
  const double lambda = check["lambda_LT"];
  return {{"phi_LT", rolled_lateral_torsional_phi(BucklingCurve::c, lambda)},
          {"chi_LT_mod",
           std::min(1.0, rolled_lateral_torsional_factor(BucklingCurve::c, lambda) / check["f"])}};
}

Answers lateral_curves(const Check& check) {
  const double lambda = check["lambda_LT"];
  const auto general = [&](BucklingCurve curve) {
    return reduction_factor(steel_curve(curve), lambda);
  };
  return {{"general_a", general(BucklingCurve::a)},
          {"general_b", general(BucklingCurve::b)},
          {"general_c", general(BucklingCurve::c)},
          {"general_d", general(BucklingCurve::d)},
          {"rolled_b", rolled_lateral_torsional_factor(BucklingCurve::b, lambda)},
          {"rolled_c", rolled_lateral_torsional_factor(BucklingCurve::c, lambda)},
          {"rolled_d", rolled_lateral_torsional_factor(BucklingCurve::d, lambda)}};
}

Answers shape_corrections() {
  return {{"kc_psi_1", moment_shape_correction(1.0)},
          {"kc_psi_0", moment_shape_correction(0.0)},
          {"kc_psi_-1", moment_shape_correction(-1.0)},
          {"f_0.8_psi0", rolled_moment_divisor(moment_shape_correction(0.0), 0.8)},
          {"f_1.2_psi0", rolled_moment_divisor(moment_shape_correction(0.0), 1.2)}};
}

/// STL-011, an IPE 400: h = 400, b = 180, tw = 8.6, tf = 13.5, r = 21 mm.
Answers beam_segment(const Check& check) {
  const double C1 = linear_moment_factor(check["psi"]);
  const double critical = elastic_critical_moment(beam_of(check, {.C1 = C1, .C2 = 0.0}));
  const double W = check["W_pl_y"];
  const double f = check["f_y"];
  const double lambda = lateral_torsional_slenderness(W, f, critical);
  const BucklingCurve curve =
      lateral_torsional_curve(i_section(0.400, 0.180, 0.0086, 0.0135, 0.021));
  return {{"M_c_Rd", bending_resistance(W, f)},
          {"V_c_Rd", plastic_shear_resistance(check["A_v"], f)},
          {"C1", C1},
          {"lambda_LT", lambda},
          {"M_b_Rd", reduction_factor(steel_curve(curve), lambda) * bending_resistance(W, f)}};
}

/// The moment factor of a uniform load, from the energy of the buckled beam over the uniform
/// moment's. The three ratios differ in the fourth digit; the value is that of the middle one.
Answers moment_factor_by_energy(const Check& check) {
  const LateralTorsionalBeam beam{.youngs_modulus = 1.0,
                                  .shear_modulus = 1.0,
                                  .I_z = 1.0,
                                  .I_t = 1.0,
                                  .I_w = check["EIw_over_GItL2_2"],
                                  .length = 1.0};
  const auto parabola = [](double xi) { return 4.0 * xi * (1.0 - xi); };
  return {{"C1",
           critical_load_factor(beam, LateralEnds::forks, {.moment = parabola}) /
               elastic_critical_moment(beam)}};
}

Answers class_limits(const Check& check) {
  const double epsilon = wall_epsilon(check["fy"], E_steel);
  Answers answers{{"epsilon", epsilon}};
  using Kind = PlateElement::Kind;
  for (int number = 1; number <= 3; ++number) {
    const std::string suffix = "_" + std::to_string(number);
    answers["int_bend" + suffix] = wall_class_limit(Kind::internal_bending, number, epsilon);
    answers["int_comp" + suffix] = wall_class_limit(Kind::internal_compression, number, epsilon);
    answers["outst" + suffix] = wall_class_limit(Kind::outstand, number, epsilon);
    answers["tube" + suffix] = wall_class_limit(Kind::round, number, epsilon);
  }
  return answers;
}

Answers classes(const Check& check) {
  const double epsilon = wall_epsilon(check["fy"], E_steel);
  if (check.inputs.contains("D")) {
    const SectionProperties tube = round_tube(check["D"], check["t"], Forming::hot_finished);
    return {{"d_over_t", tube.plates.at(0).ratio}, {"class", section_class(tube, epsilon, true)}};
  }
  const SectionProperties s =
      i_section(check["h"], check["b"], check["tw"], check["tf"], check["r"]);
  Answers answers{{"class_bending", section_class(s, epsilon, false)},
                  {"class_compression", section_class(s, epsilon, true)}};
  for (const PlateElement& plate : s.plates) {
    answers[plate.kind == PlateElement::Kind::outstand ? "cf_tf" : "cw_tw"] = plate.ratio;
  }
  return answers;
}

Answers acting_stress(const Check& check) {
  const double f = check["f_y"];
  const double epsilon = wall_epsilon(f, E_steel);
  const double increased = acting_wall_epsilon(epsilon, f, check["sigma_com_Ed"]);
  // The check names its wall by the table's limit: 42 internal in compression, 124 in bending, 14
  // an outstand.
  using Kind = PlateElement::Kind;
  const double limit = check["class3_limit"];
  const Kind kind = limit == 42.0    ? Kind::internal_compression
                    : limit == 124.0 ? Kind::internal_bending
                                     : Kind::outstand;
  return {{"epsilon", epsilon},
          {"epsilon_increased", increased},
          {"limit_plain", class_3_limit(kind, epsilon)},
          {"limit_increased", class_3_limit(kind, increased)}};
}

Answers plastic_with_axial(const Check& check) {
  const double n = check["n"];
  if (check.inputs.contains("t_f")) {
    const double a = web_share(check["A"], check["b"], check["t_f"]);
    return {{"a", a},
            {"M_N_y_ratio", plastic_moment_share_y(n, a)},
            {"M_N_z_ratio", plastic_moment_share_z(n, a)},
            {"alpha", biaxial_exponents_i(n).alpha},
            {"beta", biaxial_exponents_i(n).beta}};
  }
  const double a = web_share(check["A"], check["b"], check["t"]);
  return {{"a_w", a},
          {"M_N_ratio", plastic_moment_share_y(n, a)},
          {"exponent", biaxial_exponents_tube(n).alpha},
          {"CHS_M_N_ratio", plastic_moment_share_round(n)}};
}

struct Columns {
  double lambda = 0.0;
  double chi = 1.0;
};

Columns column(const Check& check, double I, BucklingCurve curve) {
  const double lambda =
      relative_slenderness(check["A"], check["f_y"], euler_critical_load(E_steel, I, check["L"]));
  return {lambda, reduction_factor(steel_curve(curve), lambda)};
}

/// STL-020: HEB 200, 400 kN, 40 kN m (psi 0) about y, 10 kN m (psi 1) about z, as its title says.
Answers beam_column_i(const Check& check) {
  const SectionProperties s = i_section(0.200, 0.200, 0.009, 0.015, 0.018);
  const Columns y = column(check, check["I_y"], buckling_curve(s, BendingAxis::y));
  const Columns z = column(check, check["I_z"], buckling_curve(s, BendingAxis::z));
  const double f = check["f_y"];
  const double critical =
      elastic_critical_moment(beam_of(check, {.C1 = linear_moment_factor(0.0), .C2 = 0.0}));
  const double lambda = lateral_torsional_slenderness(check["W_pl_y"], f, critical);
  const double chi = reduction_factor(steel_curve(lateral_torsional_curve(s)), lambda);
  const double squash = check["A"] * f;
  const BeamColumnShares shares{.axial_y = 400e3 / (y.chi * squash),
                                .axial_z = 400e3 / (z.chi * squash),
                                .moment_y = 40e3 / (chi * bending_resistance(check["W_pl_y"], f)),
                                .moment_z = 10e3 / bending_resistance(check["W_pl_z"], f)};
  const InteractionFactors k = interaction_factors({.kind = BeamColumnKind::i_plastic,
                                                    .twists = true,
                                                    .lambda_y = y.lambda,
                                                    .lambda_z = z.lambda,
                                                    .n_y = shares.axial_y,
                                                    .n_z = shares.axial_z,
                                                    .C_my = equivalent_moment_factor(0.0),
                                                    .C_mz = equivalent_moment_factor(1.0),
                                                    .C_mLT = equivalent_moment_factor(0.0)});
  const BeamColumnSums sums = beam_column_sums(shares, k);
  return {{"lambda_y", y.lambda},
          {"lambda_z", z.lambda},
          {"chi_y", y.chi},
          {"chi_z", z.chi},
          {"M_cr", critical},
          {"lambda_LT", lambda},
          {"chi_LT", chi},
          {"k_yy", k.yy},
          {"k_yz", k.yz},
          {"k_zy", k.zy},
          {"k_zz", k.zz},
          {"eq_6_61", sums.about_y},
          {"eq_6_62", sums.about_z}};
}

Answers beam_column_tube(const Check& check) {
  const SectionProperties s =
      rectangular_tube(0.100, 0.100, 0.005, Corners::en_10210, Forming::hot_finished);
  const Columns c = column(check, check["I"], buckling_curve(s, BendingAxis::y));
  const double n = check["N_Ed"] / (c.chi * check["A"] * check["f_y"]);
  const double resistance = bending_resistance(check["W_pl"], check["f_y"]);
  const InteractionFactors k = interaction_factors({.kind = BeamColumnKind::hollow_plastic,
                                                    .twists = false,
                                                    .lambda_y = c.lambda,
                                                    .lambda_z = c.lambda,
                                                    .n_y = n,
                                                    .n_z = n,
                                                    .C_my = check["C_m"],
                                                    .C_mz = check["C_m"]});
  const BeamColumnSums sums = beam_column_sums({.axial_y = n,
                                                .axial_z = n,
                                                .moment_y = check["M_y_Ed"] / resistance,
                                                .moment_z = check["M_z_Ed"] / resistance},
                                               k);
  return {{"lambda_bar", c.lambda},
          {"chi", c.chi},
          {"k_yy", k.yy},
          {"k_zy", k.zy},
          {"k_yz", k.yz},
          {"eq_6_61", sums.about_y},
          {"eq_6_62", sums.about_z}};
}

/// STL-023 through the yield limit state: a section that has these properties.
Answers elastic_sum(const Check& check) {
  SectionProperties s =
      rectangular_tube(0.100, 0.100, 0.005, Corners::en_10210, Forming::hot_finished);
  s.area = check["A"];
  s.W_el_y = check["W_el"];
  s.W_el_z = check["W_el"];
  MemberMaterial material;
  material.sigma_y = check["f_y"];
  LoadCase load_case;
  load_case.direct = InternalForces{.N = check["N"], .M_y = check["M_y"], .M_z = check["M_z"]};
  const LoadEffects effects = reduce(load_case, 1.0);
  const double u =
      limit_state("yield")->utilisation({s, material, effects, MemberLimits{}, 1.0, 1.0});
  return {{"utilisation", u}, {"sigma_max", u * check["f_y"]}};
}

Answers american_beam_column(const Check& check) {
  constexpr double ksi = 6894757.293168361;
  constexpr double foot = 0.3048;
  // Yield strength and modulus are in the title only.
  const double E = 29000.0 * ksi;
  const double Fy = 50.0 * ksi;
  const double slenderness = 14.0 * foot / check["r_y"];
  const double critical = aisc_critical_stress(Fy, E, slenderness);
  const AmericanBeam beam{.yield_strength = Fy,
                          .plastic_modulus = check["Z_x"],
                          .elastic_modulus = check["S_x"],
                          .L_p = check["L_p"],
                          .L_r = check["L_r"],
                          .C_b = check["C_b"]};
  const double M_n = aisc_flexural_strength(beam, 14.0 * foot);
  return {{"F_e", euler_critical_load(E, 1.0, slenderness)},
          {"F_cr", critical},
          {"P_n", critical * check["A"]},
          {"phi_P_n", 0.90 * critical * check["A"]},
          {"M_p", aisc_flexural_strength(beam, 0.0)},
          {"M_n", M_n},
          {"phi_M_n", 0.90 * M_n}};
}

Answers minor_axis(const Check& check) {
  const AmericanMinorAxis r = aisc_minor_axis_strength(
      check["F_y"], check["E"], check["Z_y"], check["S_y"], check["b_2tf"]);
  return {{"M_ny", r.strength},
          {"lambda_p", r.lambda_p},
          {"lambda_r", r.lambda_r},
          {"phi_Mny", 0.90 * r.strength}};
}

std::optional<Answers> lateral_answers(const Check& check) {
  if (check.inputs.contains("f")) {
    return rolled_with_divisor(check);
  }
  if (check.inputs.contains("L")) {
    return critical_moment(check);
  }
  return check.inputs.size() == 1 ? class_limits(check) : classes(check);
}

}  // namespace

std::optional<Answers> stability_answers(const Check& check) {
  if (starts_with(check.id, "LTB")) {
    return lateral_answers(check);
  }
  if (!starts_with(check.id, "STL")) {
    return std::nullopt;
  }
  if (check.inputs.contains("sigma_com_Ed")) {
    return acting_stress(check);
  }
  if (check.inputs.contains("lambda_LT")) {
    return lateral_curves(check);
  }
  if (check.inputs.contains("n")) {
    return plastic_with_axial(check);
  }
  if (check.inputs.contains("Pr_Pc")) {
    return Answers{{"ratio", aisc_interaction(check["Pr_Pc"], check["Mrx_Mcx"], check["Mry_Mcy"])}};
  }
  if (check.id == "STL-010") {
    return shape_corrections();
  }
  if (check.id == "STL-011") {
    return beam_segment(check);
  }
  if (check.id == "STL-014") {
    return moment_factor_by_energy(check);
  }
  if (check.id == "STL-020") {
    return beam_column_i(check);
  }
  if (check.id == "STL-022") {
    return beam_column_tube(check);
  }
  if (check.id == "STL-023") {
    return elastic_sum(check);
  }
  if (check.id == "STL-025") {
    return minor_axis(check);
  }
  return check.id == "STL-029" ? std::optional(american_beam_column(check)) : std::nullopt;
}

}  // namespace bismar::checks
