// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/shear_coefficient.hpp>

#include <cmath>
#include <string>
#include <vector>

namespace bismar::checks {

namespace {

using Points = std::vector<SectionPoint>;

/// "outer_1_1", "outer_1_2", ...: y and z of the points in order.
Points points(const Check& check, const std::string& ring) {
  Points list;
  for (int i = 1; check.inputs.contains(ring + "_" + std::to_string(i) + "_1"); ++i) {
    const std::string name = ring + "_" + std::to_string(i);
    list.push_back({check[name + "_1"], check[name + "_2"]});
  }
  return list;
}

Answers with_hole(const Check& check) {
  // The check's x and y are y and z here.
  const Points outer = points(check, "outer");
  const std::vector<Points> holes = {points(check, "hole")};
  const SectionProperties s = polygon(outer, holes);
  const SectionPoint centroid = polygon_centroid(outer, holes);
  return {{"A", s.area},
          {"x_c", centroid.y},
          {"y_c", centroid.z},
          {"Ix", s.I_y},
          {"Iy", s.I_z},
          {"Ixy", s.I_yz},
          {"I1", s.I_u()},
          {"I2", s.I_v()}};
}

Answers triangle(const Check& check) {
  const double a = check["a"];
  const SectionProperties s =
      polygon(Points{{0.0, 0.0}, {a, 0.0}, {a / 2.0, a * std::sqrt(3.0) / 2.0}});
  return {{"A", s.area}, {"I_centroid", s.I_y}, {"J", s.I_t}, {"Wt", s.W_t}};
}

Answers shear_coefficients(double nu) {
  return {{"rectangle", shear_coefficient_rectangle(nu)},
          {"circle", shear_coefficient_circle(nu)},
          {"thin_tube", shear_coefficient_thin_round_tube(nu)},
          {"thin_square_tube", shear_coefficient_thin_square_tube(nu)},
          {"semicircle", shear_coefficient_semicircle(nu)},
          {"tube_m_0.5", shear_coefficient_round_tube(0.5, nu)},
          {"I_n0.5_m0.6", shear_coefficient_i_section(0.6, 0.5, nu)}};
}

}  // namespace

std::optional<Answers> polygon_answers(const Check& check) {
  if (starts_with(check.title, "polygon with")) {
    return with_hole(check);
  }
  if (starts_with(check.title, "equilateral triangle")) {
    return triangle(check);
  }
  if (starts_with(check.title, "Timoshenko shear coefficients")) {
    return shear_coefficients(check["nu"]);
  }
  return std::nullopt;
}

}  // namespace bismar::checks
