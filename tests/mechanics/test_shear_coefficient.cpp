// SPDX-License-Identifier: MIT
#include <bismar/mechanics/shear_coefficient.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/section.hpp>

#include "support/catch.hpp"

#include <functional>
#include <limits>
#include <string>
#include <vector>

namespace bismar {

namespace {

std::vector<std::string> places(const std::function<double()>& call) {
  std::vector<std::string> found;
  try {
    static_cast<void>(call());
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      found.push_back(fault.where);
    }
  }
  return found;
}

}  // namespace

TEST_CASE("The shear coefficients have the limits of each other") {
  for (const double nu : {0.0, 0.2, 0.3, 0.5}) {
    INFO("nu " << nu);
    CHECK(shear_coefficient_round_tube(0.0, nu) == Approx(shear_coefficient_circle(nu)));
    CHECK(shear_coefficient_round_tube(1.0, nu) == Approx(shear_coefficient_thin_round_tube(nu)));
    CHECK(shear_coefficient_ellipse(1.0, nu) == Approx(shear_coefficient_circle(nu)));
    CHECK(shear_coefficient_i_section(0.0, 0.0, nu) == Approx(shear_coefficient_rectangle(nu)));
    CHECK(shear_coefficient_thin_box(0.0, 0.7, nu) == Approx(shear_coefficient_rectangle(nu)));
    CHECK(shear_coefficient_thin_box(1.0, 1.0, nu) ==
          Approx(shear_coefficient_thin_square_tube(nu)));
  }
}

TEST_CASE("A rectangle without lateral strain has the energy's shear area") {
  const SectionProperties s = solid_rectangle(0.1, 0.04);
  CHECK(shear_coefficient_rectangle(0.0) == Approx(s.A_s_z / s.area).epsilon(1e-12));
}

TEST_CASE("The coefficients at nu = 0.3 are those worked by hand") {
  // 13 / 15.3, 7.8 / 8.8, 2.6 / 4.9, 26 / 59.7, 1.3 / 1.6869, 101.92 / 174.447
  CHECK(shear_coefficient_rectangle(0.3) == Approx(0.849673).epsilon(1e-6));
  CHECK(shear_coefficient_circle(0.3) == Approx(0.886364).epsilon(1e-6));
  CHECK(shear_coefficient_thin_round_tube(0.3) == Approx(0.530612).epsilon(1e-6));
  CHECK(shear_coefficient_thin_square_tube(0.3) == Approx(0.435511).epsilon(1e-6));
  CHECK(shear_coefficient_semicircle(0.3) == Approx(0.770644).epsilon(1e-6));
  CHECK(shear_coefficient_i_section(0.6, 0.5, 0.3) == Approx(0.584246).epsilon(1e-6));
  // n = 2: 12 x 1.3 x 4 x 13 / (51.1 x 16 + 19 x 4 + 0.3) = 811.2 / 893.9
  CHECK(shear_coefficient_ellipse(2.0, 0.3) == Approx(0.907484).epsilon(1e-6));
}

TEST_CASE("Wrong arguments of shear coefficients are all named") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  using Places = std::vector<std::string>;
  CHECK(places([] { return shear_coefficient_rectangle(-0.1); }) == Places{"poissons_ratio"});
  CHECK(places([] { return shear_coefficient_circle(0.6); }) == Places{"poissons_ratio"});
  CHECK(places([] { return shear_coefficient_semicircle(0.6); }) == Places{"poissons_ratio"});
  CHECK(places([&] { return shear_coefficient_thin_round_tube(nan); }) == Places{"poissons_ratio"});
  CHECK(places([&] { return shear_coefficient_thin_square_tube(nan); }) ==
        Places{"poissons_ratio"});
  CHECK(places([&] { return shear_coefficient_ellipse(0.0, nan); }) ==
        Places{"axis_ratio", "poissons_ratio"});
  CHECK(places([] { return shear_coefficient_round_tube(1.1, 0.7); }) ==
        Places{"radius_ratio", "poissons_ratio"});
  CHECK(places([&] { return shear_coefficient_thin_box(-1.0, nan, 0.3); }) ==
        Places{"flange_ratio", "width_ratio"});
  CHECK(places([&] { return shear_coefficient_i_section(nan, -1.0, 0.3); }) ==
        Places{"flange_ratio", "width_ratio"});
}

}  // namespace bismar
