// SPDX-License-Identifier: MIT
#include <bismar/mechanics/thin_wall.hpp>

#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/shear_area.hpp>

#include "mechanics/fault_places.hpp"
#include "mechanics/outline_scan.hpp"
#include "support/catch.hpp"

#include <array>
#include <cmath>
#include <numbers>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

TEST_CASE("Thin round tubes by hand and against the exact tube") {
  // r = 50, t = 2 mm.
  CHECK(thin_round_tube_area(0.05, 0.002) * 1e6 == Approx(200.0 * std::numbers::pi));
  CHECK(thin_round_tube_second_moment(0.05, 0.002) * 1e12 == Approx(250000.0 * std::numbers::pi));
  const SectionProperties exact = round_tube(0.102, 0.002, Forming::unknown);
  CHECK(exact.area == Approx(thin_round_tube_area(0.05, 0.002)).epsilon(1e-12));
  CHECK(exact.I_y / thin_round_tube_second_moment(0.05, 0.002) - 1 ==
        Approx(0.02 * 0.02).epsilon(1e-9));
}

TEST_CASE("The torsion constant of thin plates is the sum of b t3 over 3") {
  const std::array<ThinPlate, 2> plates{
      {{.length = 0.03, .thickness = 0.001}, {.length = 0.06, .thickness = 0.002}}};
  CHECK(thin_open_torsion_constant(plates) * 1e12 == Approx(10.0 + 160.0));
  CHECK(thin_open_torsion_constant({}) == 0.0);
}

TEST_CASE("A channel of thin walls has the shear centre and warping of its mid-line") {
  const ThinChannel thin{.depth = 0.1, .flange_width = 0.05, .flange = 1e-5, .web = 1e-5};
  // Constant wall, depth 2 b: e = 3 b / 8; I_w = t b^5 (4/12)(3 + 4)/(6 + 2) = 7/24 t b^5.
  CHECK(thin_channel_shear_centre(thin) == Approx(3 * 0.05 / 8));
  CHECK(thin_channel_warping_constant(thin) == Approx(7.0 / 24.0 * 1e-5 * std::pow(0.05, 5)));
  const SectionProperties s = channel(0.1 + 1e-5, 0.05 + 0.5e-5, 1e-5, 1e-5, 0.0, 0.0);
  const double c = s.width - s.I_z / s.W_el_z;
  CHECK(0.5e-5 - c - s.y_shear == Approx(3 * 0.05 / 8).epsilon(1e-3));
  CHECK(s.I_w == Approx(thin_channel_warping_constant(thin)).epsilon(1e-3));
}

TEST_CASE("The warping constant of an I is that of its flanges bending against each other") {
  // I_f = 10 x 100^3 / 12 = 833333 mm4 each, lever 190 mm: I_f 190^2 / 2.
  const SectionProperties s = i_section(0.2, 0.1, 0.006, 0.01, 0.0);
  CHECK(s.I_w * 1e18 == Approx(833333.333 * 190.0 * 190.0 / 2.0));
}

TEST_CASE("Shear areas of the deflection have the energy of their shear stress") {
  const auto box = [](double h, double b) {
    return test::Outline{{.y = -b / 2, .z = -h / 2},
                         {.y = b / 2, .z = -h / 2},
                         {.y = b / 2, .z = h / 2},
                         {.y = -b / 2, .z = h / 2}};
  };
  const SectionProperties flat = solid_rectangle(0.08, 0.02);
  CHECK(flat.A_s_z == Approx(1 / test::OutlineScan({box(0.08, 0.02)}).energy).epsilon(2e-3));
  // A bare I as outline: flange, web, flange.
  const double h = 0.2;
  const double b = 0.1;
  const double tw = 0.0056;
  const double tf = 0.0085;
  test::Outline outline;
  for (const double side : {1.0, -1.0}) {
    for (const auto& [y, z] : {std::pair{b / 2, -h / 2},
                               std::pair{b / 2, -h / 2 + tf},
                               std::pair{tw / 2, -h / 2 + tf},
                               std::pair{tw / 2, h / 2 - tf},
                               std::pair{b / 2, h / 2 - tf},
                               std::pair{b / 2, h / 2}}) {
      outline.push_back({.y = side * y, .z = side * z});
    }
  }
  const SectionProperties s = i_section(h, b, tw, tf, 0.0);
  const test::OutlineScan scan({outline});
  CHECK(scan.I_y == Approx(s.I_y));
  CHECK(s.A_s_z == Approx(1 / scan.energy).epsilon(1e-3));
  CHECK(channel(h, b, tw, tf, 0.0, 0.0).A_s_z == Approx(s.A_s_z).epsilon(1e-12));
  // A square thin tube: 5/12 A; a round one: A/2.
  const SectionProperties square =
      rectangular_tube(0.1, 0.1, 1e-5, Corners::sharp, Forming::unknown);
  CHECK(square.A_s_z == Approx(5.0 / 12.0 * square.area).epsilon(1e-3));
  CHECK(square.A_s_y == Approx(square.A_s_z).epsilon(1e-12));
  const SectionProperties round = round_tube(0.1, 1e-5, Forming::unknown);
  CHECK(round.A_s_z == Approx(round.area / 2).epsilon(1e-6));
  CHECK(solid_round(0.1).A_s_z == Approx(0.9 * solid_round(0.1).area));
  const test::OutlineScan ellipse({test::ellipse(0.02, 0.03)});
  CHECK(solid_ellipse(0.06, 0.04).A_s_z == Approx(1 / ellipse.energy).epsilon(1e-4));
}

TEST_CASE("Plastic shear areas by hand") {
  // IPE 200 (EN 10365): 2848 - 2 x 100 x 8.5 + (5.6 + 24) 8.5 = 1400 mm2, published 14.0 cm2.
  CHECK(plastic_shear_area_i(0.2, 0.1, 0.0056, 0.0085, 0.012) * 1e4 == Approx(14.0).epsilon(2e-3));
  // Welded-like, no radius: A - 2 b tf + tw tf = (h - tf) tw; never less than h_w t_w.
  CHECK(plastic_shear_area_i(0.2, 0.1, 0.006, 0.01, 0.0) * 1e6 == Approx(190.0 * 6.0));
  CHECK(plastic_shear_area_channel(0.2, 0.08, 0.006, 0.011, 0.0, 0.0) * 1e6 ==
        Approx(178.0 * 6.0 + 66.0));
  CHECK(plastic_shear_area_tee(0.1, 0.08, 0.006, 0.01, 0.0) * 1e6 == Approx(540.0 + 30.0));
  const SectionProperties box =
      rectangular_tube(0.1, 0.05, 0.004, Corners::sharp, Forming::unknown);
  CHECK(plastic_shear_area_tube(box) == Approx(box.area * 2 / 3));
  const SectionProperties pipe = round_tube(0.1, 0.004, Forming::unknown);
  CHECK(plastic_shear_area_tube(pipe) == Approx(2 * pipe.area / std::numbers::pi));
}

TEST_CASE("Faults of thin walls and plastic shear areas are named") {
  using Places = std::vector<std::string>;
  CHECK(test::fault_places([] { (void)thin_round_tube_area(0.0, NAN); }) ==
        Places{"mean_radius", "wall"});
  CHECK(test::fault_places([] { (void)thin_round_tube_second_moment(-1.0, 0.001); }) ==
        Places{"mean_radius"});
  const std::array<ThinPlate, 2> plates{{{.length = 0.03, .thickness = 0.0}, {}}};
  CHECK(test::fault_places([&] { (void)thin_open_torsion_constant(plates); }) ==
        Places{"plates[0]/thickness", "plates[1]/length", "plates[1]/thickness"});
  CHECK(test::fault_places([] { (void)thin_channel_shear_centre({}); }) ==
        Places{"depth", "flange_width", "flange", "web"});
  CHECK(test::fault_places([] { (void)thin_channel_warping_constant({}); }).size() == 4);
  CHECK(test::fault_places([] { (void)plastic_shear_area_tube(solid_round(0.1)); }) ==
        Places{"section"});
  CHECK(test::fault_places([] { (void)plastic_shear_area_i(0.1, 0.05, 0.05, 0.01, 0.0); }) ==
        Places{"web"});
}

}  // namespace bismar
