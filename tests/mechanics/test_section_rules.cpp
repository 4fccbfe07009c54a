// SPDX-License-Identifier: MIT
// What holds for every section: scaling, faults, names.
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section.hpp>

#include "mechanics/fault_places.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <cstddef>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

using test::fault_places;

TEST_CASE("Scaling a section scales each property by its power") {
  const auto build = [](double k) {
    return std::vector<SectionProperties>{
        solid_round(0.02 * k),
        solid_square(0.02 * k),
        solid_rectangle(0.03 * k, 0.01 * k),
        solid_ellipse(0.04 * k, 0.032 * k),
        solid_hexagon(0.02 * k),
        round_tube(0.04 * k, 0.003 * k, Forming::hot_finished),
        rectangular_tube(0.06 * k, 0.04 * k, 0.004 * k, 0.006 * k, 0.004 * k, Forming::unknown),
        i_section(0.2 * k, 0.1 * k, 0.0056 * k, 0.0085 * k, 0.012 * k),
        channel(0.1 * k, 0.05 * k, 0.006 * k, 0.0085 * k, 0.0085 * k, 0.08),
        elliptical_tube(0.06 * k, 0.04 * k, 0.003 * k, Forming::hot_finished),
        similar_elliptical_tube(0.06 * k, 0.04 * k, 0.8, Forming::extruded),
        tee(0.1 * k, 0.08 * k, 0.006 * k, 0.009 * k, 0.007 * k),
        angle(0.1 * k, 0.065 * k, 0.008 * k, 0.01 * k, 0.005 * k)};
  };
  const double k = 1.7;
  const std::vector<SectionProperties> small = build(1.0);
  const std::vector<SectionProperties> large = build(k);
  using Member = double SectionProperties::*;
  const std::vector<std::pair<Member, int>> powers = {
      {&SectionProperties::height, 1},     {&SectionProperties::width, 1},
      {&SectionProperties::wall, 1},       {&SectionProperties::ruling_dimension, 1},
      {&SectionProperties::perimeter, 1},  {&SectionProperties::inner_perimeter, 1},
      {&SectionProperties::y_shear, 1},    {&SectionProperties::z_shear, 1},
      {&SectionProperties::area, 2},       {&SectionProperties::A_v_y, 2},
      {&SectionProperties::A_v_z, 2},      {&SectionProperties::A_v_junction, 2},
      {&SectionProperties::A_v_flange, 2}, {&SectionProperties::A_s_y, 2},
      {&SectionProperties::A_s_z, 2},      {&SectionProperties::W_el_y, 3},
      {&SectionProperties::W_el_z, 3},     {&SectionProperties::W_pl_y, 3},
      {&SectionProperties::W_pl_z, 3},     {&SectionProperties::W_t, 3},
      {&SectionProperties::I_y, 4},        {&SectionProperties::I_z, 4},
      {&SectionProperties::I_yz, 4},       {&SectionProperties::I_t, 4},
      {&SectionProperties::I_w, 6},        {&SectionProperties::junction_ratio, 0}};
  for (std::size_t n = 0; n < small.size(); ++n) {
    const SectionProperties& a = small[n];
    const SectionProperties& b = large[n];
    INFO(name(a.family));
    const SectionProperties c = scaled(a, k);
    for (const auto& [member, power] : powers) {
      INFO("power " << power << ", value " << a.*member);
      CHECK(b.*member == Approx(std::pow(k, power) * a.*member).margin(1e-30));
      CHECK(c.*member == Approx(b.*member).margin(1e-30));
    }
    CHECK(b.i_z() == Approx(k * a.i_z()));
    CHECK(c.plates.size() == b.plates.size());
    REQUIRE(c.fibres.size() == b.fibres.size());
    for (std::size_t p = 0; p < b.fibres.size(); ++p) {
      CHECK(c.fibres[p].y == Approx(b.fibres[p].y));
      CHECK(c.fibres[p].z == Approx(b.fibres[p].z));
    }
    for (std::size_t p = 0; p < a.plates.size(); ++p) {
      CHECK(b.plates[p].ratio == Approx(a.plates[p].ratio));
    }
  }
}

TEST_CASE("A wrong dimension is named, and all wrong dimensions at once") {
  using Places = std::vector<std::string>;
  CHECK(fault_places([] { (void)solid_round(0.0); }) == Places{"diameter"});
  CHECK(fault_places([] { (void)solid_square(-1.0); }) == Places{"side"});
  CHECK(fault_places([] { (void)solid_rectangle(std::nan(""), 0.0); }) ==
        Places{"height", "width"});
  CHECK(fault_places([] { (void)solid_ellipse(INFINITY, 0.1); }) == Places{"height"});
  CHECK(fault_places([] { (void)round_tube(0.04, 0.02, Forming::unknown); }) == Places{"wall"});
  CHECK(fault_places([] {
          (void)rectangular_tube(0.1, 0.05, 0.025, Corners::sharp, Forming::unknown);
        }) == Places{"wall"});
  CHECK(fault_places([] {
          (void)rectangular_tube(0.1, 0.05, 0.014, Corners::en_10210, Forming::unknown);
        }) == Places{"wall"});
  CHECK(fault_places([] {
          (void)rectangular_tube(0.1, 0.05, 0.005, 0.03, 0.02, Forming::unknown);
        }) == Places{"outer_radius"});
  CHECK(fault_places([] {
          (void)rectangular_tube(0.1, 0.05, 0.005, 0.005, 0.006, Forming::unknown);
        }) == Places{"inner_radius"});
  CHECK(fault_places([] {
          (void)rectangular_tube(0.1, 0.1, 0.005, 0.020, 0.0, Forming::unknown);
        }) == Places{"outer_radius"});
  CHECK(fault_places([] { (void)i_section(0.1, 0.05, 0.05, 0.006, 0.0); }) == Places{"web"});
  CHECK(fault_places([] { (void)i_section(0.1, 0.05, 0.005, 0.05, 0.0); }) == Places{"flange"});
  CHECK(fault_places([] { (void)i_section(0.1, 0.05, 0.005, 0.006, 0.03); }) ==
        Places{"root_radius"});
  CHECK(fault_places([] { (void)channel(0.1, 0.05, 0.05, 0.06, 0.0, 0.3); }) ==
        Places{"flange", "web", "flange_slope"});
  CHECK(fault_places([] { (void)channel(0.1, 0.05, 0.006, 0.0085, 0.05, 0.08); }) ==
        Places{"root_radius"});
}

TEST_CASE("Every family has a word of its own that leads back to it") {
  for (const SectionFamily family : {SectionFamily::solid_round,
                                     SectionFamily::solid_square,
                                     SectionFamily::solid_rectangle,
                                     SectionFamily::solid_ellipse,
                                     SectionFamily::round_tube,
                                     SectionFamily::rectangular_tube,
                                     SectionFamily::i_section,
                                     SectionFamily::channel,
                                     SectionFamily::solid_hexagon,
                                     SectionFamily::elliptical_tube,
                                     SectionFamily::tee,
                                     SectionFamily::angle,
                                     SectionFamily::polygon}) {
    CHECK(section_family(name(family)) == family);
  }
  CHECK(name(SectionFamily::round_tube) == "round tube");
  CHECK(name(SectionFamily::tee) == "T section");
  CHECK_FALSE(section_family("hexagon").has_value());
}

}  // namespace bismar
