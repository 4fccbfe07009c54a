// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/member.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/shaft.hpp>
#include <bismar/mechanics/stress.hpp>
#include <bismar/mechanics/torsion.hpp>
#include <bismar/mechanics/wall.hpp>

#include <optional>

namespace bismar::checks {

namespace {

/// u of one limit state at one section with the given internal forces.
double utilisation(const char* id,
                   const SectionProperties& section,
                   const MemberMaterial& material,
                   const InternalForces& forces,
                   double factor) {
  LoadCase load_case;
  load_case.direct = forces;
  const LoadEffects effects = reduce(load_case, 1.0);
  const MemberLimits limits;
  return limit_state(id)->utilisation({section, material, effects, limits, 1.0, factor});
}

Answers walls(const Check& check) {
  using Kind = PlateElement::Kind;
  if (check.inputs.count("sigma_com_Ed") != 0) {
    const double E = 210e9;
    const Kind kind =
        check["class3_limit"] > 100.0 ? Kind::internal_bending : Kind::internal_compression;
    const double epsilon = wall_epsilon(check["f_y"] / check["gamma_M0"], E);
    const double increased = wall_epsilon(check["sigma_com_Ed"], E);
    return {{"epsilon", epsilon},
            {"epsilon_increased", increased},
            {"limit_plain", class_3_limit(kind, epsilon)},
            {"limit_increased", class_3_limit(kind, increased)}};
  }
  const double epsilon = wall_epsilon(check["fy"], 210e9);
  if (check.inputs.count("D") != 0) {
    const SectionProperties s = round_tube(check["D"], check["t"], Forming::hot_finished);
    const double ratio = s.plates.at(0).ratio;
    return {{"d_over_t", ratio},
            {"beyond_class_3", ratio > class_3_limit(Kind::round, epsilon) ? 1.0 : 0.0}};
  }
  if (check.inputs.count("tw") != 0) {
    const SectionProperties s =
        i_section(check["h"], check["b"], check["tw"], check["tf"], check["r"]);
    MemberMaterial steel;
    steel.E = 210e9;
    steel.sigma_y = check["fy"];
    // Bent to its yield strength, and compressed.
    const InternalForces bent{.M_y = check["fy"] * s.W_el_y};
    const InternalForces squeezed{.N = -1.0};
    const double u_bent = utilisation("wall slenderness", s, steel, bent, 1.0);
    const double u_squeezed = utilisation("wall slenderness", s, steel, squeezed, 1.0);
    return {{"cf_tf", s.plates.at(0).ratio},
            {"cw_tw", s.plates.at(1).ratio},
            {"beyond_class_3_bending", u_bent > 1.0 ? 1.0 : 0.0},
            {"beyond_class_3_compression", u_squeezed > 1.0 ? 1.0 : 0.0}};
  }
  return {{"epsilon", epsilon},
          {"int_bend_3", class_3_limit(Kind::internal_bending, epsilon)},
          {"int_comp_3", class_3_limit(Kind::internal_compression, epsilon)},
          {"outst_3", class_3_limit(Kind::outstand, epsilon)},
          {"tube_3", class_3_limit(Kind::round, epsilon)}};
}

Answers thin_tubes(const Check& check) {
  if (check.id == "SHF-001") {
    const MidLine line = rectangular_mid_line(check["h"], check["b"], check["t"]);
    const double torque =
        check["tau_allow"] / bredt_shear_stress(1.0, line.enclosed_area, check["t"]);
    const double J = bredt_torsion_constant(line.enclosed_area, check["t"], line.length);
    const double theta = torque * check["L"] / (check["G"] * J);
    return {{"A_m", line.enclosed_area},
            {"L_m", line.length},
            {"T", torque},
            {"theta", theta},
            {"theta_deg", theta}};
  }
  if (check.id == "SHF-002") {
    const MidLine line = flat_oval_mid_line(check["r"], check["b"]);
    const double J = bredt_torsion_constant(line.enclosed_area, check["t"], line.length);
    return {{"A_m", line.enclosed_area},
            {"L_m", line.length},
            {"J", J},
            {"tau", bredt_shear_stress(check["T"], line.enclosed_area, check["t"])},
            {"theta_deg", check["T"] * check["L"] / (check["G"] * J)}};
  }
  if (check.id == "SHF-004") {
    const double r = (check["d_inner"] + check["t"]) / 2.0;
    const SectionProperties s =
        round_tube(check["d_inner"] + 2.0 * check["t"], check["t"], Forming::unknown);
    const MidLine line = flat_oval_mid_line(r, 0.0);
    return {{"tau_thin", bredt_shear_stress(check["T"], line.enclosed_area, check["t"])},
            {"tau_exact", check["T"] / s.W_t}};
  }
  const MidLine line = rectangular_mid_line(check["h"], check["b"], check["t"]);
  const auto stress = [&](double t) {
    return bredt_shear_stress(check["T"], line.enclosed_area, t);
  };
  constexpr double inch = 0.0254;
  return {{"A_m", line.enclosed_area},
          {"q", stress(check["t"]) * check["t"]},
          {"tau", stress(check["t"])},
          {"tau_at_t_0.120", stress(0.120 * inch)},
          {"tau_at_t_0.200", stress(0.200 * inch)}};
}

Answers strip(const Check& check) {
  const double tau = check["tau_allow"];
  const double b = check["b"];
  const double c = check["c"];
  return {{"T_thin", thin_strip_torque(tau, b, c)},
          {"T_rect_formula", rectangle_torque_estimate(tau, b, c)},
          {"T_series", tau * rectangle_torsion(b / c).k1 * b * c * c}};
}

/// A shaft under bending and torsion by three criteria.
Answers three_theories(const Check& check) {
  MemberMaterial ductile;
  ductile.sigma_y = check["fy"];
  MemberMaterial brittle;
  brittle.rule = StressRule::principal;
  brittle.tensile = brittle.flexural = brittle.compressive = check["fy"];
  const InternalForces forces{.M_y = check["M"], .T = check["T"]};
  const auto tube = [&](double D) {
    return round_tube(D, D * (1.0 - check["d_over_D"]) / 2.0, Forming::unknown);
  };
  const auto diameter = [&](const char* id, const MemberMaterial& material) {
    return where_falls_to(1.0, 5e-3, 0.5, [&](double D) {
      return utilisation(id, tube(D), material, forces, check["n"]);
    });
  };
  const double by_shear =
      where_falls_to(check["fy"] / (2.0 * check["n"]), 5e-3, 0.5, [&](double D) {
        const SectionProperties s = tube(D);
        return largest_shear_stress(check["M"] / s.W_el_y, check["T"] / s.W_t);
      });
  return {{"D_von_mises", diameter("yield", ductile)},
          {"D_max_principal", diameter("brittle fracture", brittle)},
          {"D_max_shear", by_shear}};
}

Answers shafts(const Check& check) {
  if (check.id == "SHF-007") {
    return strip(check);
  }
  if (check.id == "SHF-008") {
    const double equivalent = von_mises(check["sigma"], check["tau"]);
    return {{"sigma_vm", equivalent}, {"n_y", check["Sy"] / equivalent}};
  }
  if (check.id == "SHF-010") {
    return three_theories(check);
  }
  if (check.id == "SHF-011") {
    return {{"d", where_falls_to(check["tau_allow"], 5e-3, 0.5, [&](double d) {
               const SectionProperties s = solid_round(d);
               return largest_shear_stress(check["M"] / s.W_el_y, check["T"] / s.W_t);
             })}};
  }
  const double torque = check["T"];
  const double q = check["d_over_D"];
  const auto tube = [q](double D) { return round_tube(D, D * (1.0 - q) / 2.0, Forming::unknown); };
  const double solid = where_falls_to(
      check["tau_allow"], 5e-3, 0.5, [&](double d) { return torque / solid_round(d).W_t; });
  const double hollow =
      where_falls_to(check["tau_allow"], 5e-3, 0.5, [&](double D) { return torque / tube(D).W_t; });
  return {{"d_solid", solid},
          {"D_hollow", hollow},
          {"mass_ratio_hollow_solid", tube(hollow).area / solid_round(solid).area}};
}

Answers interaction(const Check& check) {
  SectionProperties s = solid_square(0.1);  // the outline only; the check gives A and W
  s.area = check["A"];
  s.W_el_y = s.W_el_z = check["W_el"];
  MemberMaterial steel;
  steel.sigma_y = check["f_y"];
  const InternalForces forces{.N = -check["N"], .M_y = check["M_y"], .M_z = check["M_z"]};
  const double u = utilisation("yield", s, steel, forces, 1.0);
  return {{"utilisation", u}, {"sigma_max", u * check["f_y"]}};
}

}  // namespace

std::optional<Answers> stress_answers(const Check& check) {
  if (starts_with(check.id, "LTB") || check.inputs.count("sigma_com_Ed") != 0) {
    return walls(check);
  }
  if (check.id == "SHF-001" || check.id == "SHF-002" || check.id == "SHF-004" ||
      check.id == "SHF-005") {
    return thin_tubes(check);
  }
  if (starts_with(check.id, "SHF")) {
    return shafts(check);
  }
  if (check.id == "STL-023") {
    return interaction(check);
  }
  return std::nullopt;
}

}  // namespace bismar::checks
