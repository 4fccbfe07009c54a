// SPDX-License-Identifier: MIT
#include "member_words.hpp"

namespace bismar::detail {

namespace {

constexpr RatioWords proportion{
    "height_to_width", "height_to_width", "Height over width, both outside; height is along z."};
constexpr RatioWords wall{"wall_to_height", "wall_to_height", "Wall thickness over height."};
constexpr RatioWords web{"web_to_height", "web_to_height", "Web thickness over height."};
constexpr RatioWords flange{
    "flange_to_height", "flange_to_height", "Flange thickness over height."};
constexpr RatioWords root{"root_radius_to_height", "", "Root radius over height; default 0."};

}  // namespace

std::span<const ShapeWords> shape_words() {
  static const std::vector<ShapeWords> words = {
      {"round", SectionFamily::solid_round, "diameter", {}},
      {"square", SectionFamily::solid_square, "side", {}},
      {"hexagon", SectionFamily::solid_hexagon, "width_across_flats", {}},
      {"rectangle", SectionFamily::solid_rectangle, "height", {proportion}},
      {"ellipse", SectionFamily::solid_ellipse, "height", {proportion}},
      {"round_tube",
       SectionFamily::round_tube,
       "diameter",
       {{"wall_to_diameter", "wall_to_height", "Wall thickness over diameter."}}},
      {"elliptical_tube", SectionFamily::elliptical_tube, "height", {proportion, wall}},
      {"rectangular_tube", SectionFamily::rectangular_tube, "height", {proportion, wall}},
      {"i_section", SectionFamily::i_section, "height", {proportion, web, flange, root}},
      {"channel", SectionFamily::channel, "height", {proportion, web, flange, root}},
      {"t_section", SectionFamily::tee, "height", {proportion, web, flange, root}},
      {"angle", SectionFamily::angle, "height", {proportion, wall, root}},
      {"polygon", SectionFamily::polygon, "height", {}},
  };
  return words;
}

std::vector<std::string> surface_words() {
  return {"polished", "ground", "machined", "hot rolled", "as forged"};
}

std::vector<std::string> criterion_words() { return {"goodman", "gerber", "soderberg"}; }

}  // namespace bismar::detail
