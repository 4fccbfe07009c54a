// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/torsion.hpp>

#include <cmath>
#include <numbers>

namespace bismar::checks {

namespace {

Answers named(const SectionProperties& s) {
  return {{"A", s.area},
          {"Iy", s.I_y},
          {"Iz", s.I_z},
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
  if (shape == "solid ellipse") {
    // The check's x axis lies along its semi-axis a, so that b is half the height.
    Answers answers = named(solid_ellipse(2.0 * check["b"], 2.0 * check["a"]));
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
  return named(solid_square(check["a"]));
}

}  // namespace

std::optional<Answers> section_answers(const Check& check) {
  const bool section = starts_with(check.topic, "1 ") || starts_with(check.topic, "19 ");
  if (!section) {
    return std::nullopt;
  }
  if (starts_with(check.title, "solid rectangle St Venant")) {
    const RectangleTorsion torsion = rectangle_torsion(check["b_over_h"]);
    return Answers{{"k1", torsion.k1}, {"k2", torsion.k2}};
  }
  if (starts_with(check.title, "thin tube")) {
    const double r = check["r_mean"];
    const double t = check["t"];
    const double pi = std::numbers::pi;
    return Answers{{"J_thin", bredt_torsion_constant(pi * r * r, t, 2.0 * pi * r)},
                   {"I_exact", round_tube(2.0 * r + t, t, Forming::unknown).I_y}};
  }
  if (starts_with(check.title, "CHS")) {
    return named(round_tube(check["D"], check["t"], Forming::hot_finished));
  }
  if (check.inputs.count("tw") != 0) {
    const double h = check["h"];
    const double b = check["b"];
    if (starts_with(check.title, "UPN")) {
      return named(channel(h, b, check["tw"], check["tf"], check["r1"], 0.08));
    }
    if (check.title.find("channel") != std::string::npos) {
      return named(channel(h, b, check["tw"], check["tf"], check["r"], 0.0));
    }
    return named(i_section(h, b, check["tw"], check["tf"], check["r"]));
  }
  if (starts_with(check.words.at("shape"), "rectangular hollow")) {
    return named(hollow(check));
  }
  return solid(check);
}

}  // namespace bismar::checks
