// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/shear_area.hpp>
#include <bismar/mechanics/thin_wall.hpp>
#include <bismar/mechanics/torsion.hpp>

#include <array>
#include <cmath>
#include <numbers>

namespace bismar::checks {

namespace {

Answers named(const SectionProperties& s) {
  return {{"A", s.area},
          {"Iy", s.I_y},
          {"Iz", s.I_z},
          {"Iu", s.I_u()},
          {"Iv", s.I_v()},
          {"iv", std::sqrt(s.I_v() / s.area)},
          {"Iw", s.I_w},
          {"iy", s.i_y()},
          {"iz", s.i_z()},
          {"Wel_y", s.W_el_y},
          {"Wel_z", s.W_el_z},
          {"Wpl_y", s.W_pl_y},
          {"Wpl_z", s.W_pl_z},
          {"It", s.I_t},
          {"Wt", s.W_t},
          {"I", s.I_y},
          {"i", s.i_y()},
          {"Wel", s.W_el_y},
          {"Wpl", s.W_pl_y},
          {"J", s.I_t},
          {"Ix", s.I_y},
          {"Wel_x", s.W_el_y},
          {"Wpl_x", s.W_pl_y},
          // From the back of a channel's web, which is the nearer side of the least modulus.
          {"c_z", s.width - s.I_z / s.W_el_z}};
}

SectionProperties hollow(const Check& check) {
  const double h = check["h"];
  const double b = check["b"];
  const double t = check["t"];
  const bool hot = check.title.find("hot") != std::string::npos;
  return rectangular_tube(h,
                          b,
                          t,
                          hot ? Corners::en_10210 : Corners::en_10219,
                          hot ? Forming::hot_finished : Forming::cold_formed);
}

Answers solid(const Check& check) {
  const std::string& shape = check.words.at("shape");
  if (shape == "solid ellipse" || starts_with(shape, "hollow ellipse")) {
    // The check's x axis lies along its semi-axis a, so that b is half the height.
    const double h = 2.0 * check["b"];
    const double b = 2.0 * check["a"];
    Answers answers = named(shape == "solid ellipse"
                                ? solid_ellipse(h, b)
                                : similar_elliptical_tube(h, b, check["q"], Forming::unknown));
    answers["Iy"] = answers["Iz"];
    return answers;
  }
  if (shape == "solid rectangle") {
    const SectionProperties s = solid_rectangle(check["h"], check["b"]);
    Answers answers = named(s);
    answers["Iy"] = s.I_z;
    answers["plastic_shape_factor"] = s.W_pl_y / s.W_el_y;
    return answers;
  }
  const SectionProperties s = solid_square(check["a"]);
  Answers answers = named(s);
  answers["Wel_diagonal"] = s.I_u() / std::hypot(s.height / 2.0, s.width / 2.0);
  return answers;
}

Answers thin_tube(const Check& check) {
  const double r = check["r_mean"];
  const double t = check["t"];
  const double pi = std::numbers::pi;
  const double exact = round_tube(2.0 * r + t, t, Forming::unknown).I_y;
  const double thin = thin_round_tube_second_moment(r, t);
  return {{"A_thin", thin_round_tube_area(r, t)},
          {"I_thin", thin},
          {"J_thin", bredt_torsion_constant(pi * r * r, t, 2.0 * pi * r)},
          {"I_exact", exact},
          {"ratio_I_exact_thin", exact / thin}};
}

Answers rolled(const Check& check) {
  const double h = check["h"];
  const double b = check["b"];
  const double t_w = check["tw"];
  const double t_f = check["tf"];
  if (starts_with(check.title, "UPN")) {
    return named(channel(h, b, t_w, t_f, check["r1"], 0.08));
  }
  if (check.title.find("channel") != std::string::npos) {
    const SectionProperties s = channel(h, b, t_w, t_f, check["r"], 0.0);
    const ThinChannel thin{
        .depth = h - t_f, .flange_width = b - t_w / 2.0, .flange = t_f, .web = t_w};
    Answers answers = named(s);
    answers["e0"] = t_w / 2.0 - answers["c_z"] - s.y_shear;
    answers["e0_thin"] = thin_channel_shear_centre(thin);
    answers["Iw_thin"] = thin_channel_warping_constant(thin);
    return answers;
  }
  if (check.inputs.count("r") == 0) {
    const double A_s = i_section(h, b, t_w, t_f, 0.0).A_s_z;
    return {{"A_s", A_s},
            {"h_tw", h * t_w},
            {"ratio_to_h_tw", A_s / (h * t_w)},
            {"ratio_to_(h-tf)tw", A_s / ((h - t_f) * t_w)}};
  }
  Answers answers = named(i_section(h, b, t_w, t_f, check["r"]));
  answers["Av_z"] = plastic_shear_area_i(h, b, t_w, t_f, check["r"]);
  return answers;
}

Answers t_section(const Check& check) {
  const double d = check["d"];
  const double b = check["bf"];
  const double t_w = check["tw"];
  const double t_f = check["tf"];
  const SectionProperties s = tee(d, b, t_w, t_f, check["root_radius"]);
  // The check's J is that of the plates alone; test_tee compares I_t with the published ones.
  const std::array<ThinPlate, 2> plates{
      {{.length = b, .thickness = t_f}, {.length = d - t_f, .thickness = t_w}}};
  return {{"A", s.area},
          {"y_bar", s.z_shear + t_f / 2.0},
          {"Ix", s.I_y},
          {"Iy", s.I_z},
          {"Sx", s.W_el_y},
          {"rx", s.i_y()},
          {"ry", s.i_z()},
          {"J", thin_open_torsion_constant(plates)}};
}

Answers angles(const Check& check) {
  const bool equal = check.inputs.count("a") != 0;
  const double h = equal ? check["a"] : check["a_long"];
  const double b = equal ? check["a"] : check["b_short"];
  const double t = check["t"];
  const SectionProperties s = angle(h, b, t, check["r1"], check["r2"]);
  Answers answers = named(s);
  answers["c"] = answers["c_long"] = t / 2.0 - s.z_shear;
  answers["c_short"] = t / 2.0 - s.y_shear;
  answers["tan_alpha"] = std::tan(s.principal_angle());
  answers["Iyz"] = -s.I_yz;  // the check's angle is the mirror image
  return answers;
}

Answers hexagon(const Check& check) {
  const double d = check["d"];
  const SectionProperties s = solid_hexagon(d);
  const double side = d / std::numbers::sqrt3;
  Answers answers = named(s);
  answers["A_over_d2"] = s.area / (d * d);
  answers["I_over_d4"] = s.I_y / std::pow(d, 4);
  answers["J_over_d4"] = s.I_t / std::pow(d, 4);
  answers["Wt_over_d3"] = s.W_t / std::pow(d, 3);
  answers["J_over_side4"] = s.I_t / std::pow(side, 4);
  return answers;
}

/// Triangle, polygons with holes and shear coefficients belong to answers_polygon.cpp.
bool belongs_to_polygons(const std::string& id) {
  return id == "SEC-080" || id == "SXN-032" || id == "SXN-034" || id == "SXN-035" ||
         id == "SXN-037";
}

}  // namespace

std::optional<Answers> section_answers(const Check& check) {
  const bool section = starts_with(check.topic, "1 ") || starts_with(check.topic, "19 ");
  if (!section || belongs_to_polygons(check.id)) {
    return std::nullopt;
  }
  if (starts_with(check.title, "solid rectangle St Venant")) {
    const RectangleTorsion torsion = rectangle_torsion(check["b_over_h"]);
    return Answers{{"k1", torsion.k1}, {"k2", torsion.k2}};
  }
  if (starts_with(check.title, "thin tube")) {
    return thin_tube(check);
  }
  if (starts_with(check.title, "CHS")) {
    return named(round_tube(check["D"], check["t"], Forming::hot_finished));
  }
  if (starts_with(check.title, "EHS") || starts_with(check.title, "elliptical hollow")) {
    return named(elliptical_tube(check["h"], check["b"], check["t"], Forming::hot_finished));
  }
  if (check.title.find("angle L") != std::string::npos) {
    return angles(check);
  }
  if (starts_with(check.title, "T section")) {
    return t_section(check);
  }
  if (check.title.find("hexagon") != std::string::npos) {
    return hexagon(check);
  }
  if (check.inputs.count("tw") != 0) {
    return rolled(check);
  }
  if (starts_with(check.words.at("shape"), "rectangular hollow")) {
    return named(hollow(check));
  }
  return solid(check);
}

}  // namespace bismar::checks
