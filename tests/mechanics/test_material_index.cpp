// SPDX-License-Identifier: MIT
#include <bismar/mechanics/material_index.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <limits>
#include <vector>

using namespace bismar;

namespace {

constexpr auto circle = ShapeReference::solid_circle;
constexpr auto square = ShapeReference::solid_square;

template <class Call>
std::vector<Fault> faults_of(Call call) {
  try {
    call();
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

}  // namespace

TEST_CASE("the solid reference has shape factors of one") {
  const ShapeFactors round = shape_factors(solid_round(0.03), circle);
  CHECK(round.bending_stiffness == Approx(1.0).epsilon(1e-12));
  CHECK(round.torsion_stiffness == Approx(1.0).epsilon(1e-12));
  CHECK(round.bending_strength == Approx(1.0).epsilon(1e-12));
  CHECK(round.torsion_strength == Approx(1.0).epsilon(1e-12));
  const ShapeFactors side = shape_factors(solid_square(0.03), square);
  CHECK(side.bending_stiffness == Approx(1.0).epsilon(1e-12));
  CHECK(side.bending_strength == Approx(1.0).epsilon(1e-12));
  // 7.14 and 4.8 are rounded in the source; 0.1406 and 0.2082 by the St Venant series.
  CHECK(side.torsion_stiffness == Approx(7.14 * 0.1406).epsilon(5e-4));
  CHECK(side.torsion_strength == Approx(4.8 * 0.2082).epsilon(5e-4));
}

TEST_CASE("the two references differ by pi over three in bending stiffness") {
  const SectionProperties tube = round_tube(0.06, 0.002, Forming::unknown);
  const double ratio = bending_shape_factor(tube.area, tube.I_y, circle) /
                       bending_shape_factor(tube.area, tube.I_y, square);
  CHECK(ratio == Approx(std::acos(-1.0) / 3.0).epsilon(1e-12));
  // A thin tube: phi = 4 pi (pi r^3 t) / (2 pi r t)^2 = r / t at the mid-line radius 29 mm, t 2 mm,
  // short of it by (t / 2 r)^2.
  CHECK(bending_shape_factor(tube.area, tube.I_y, circle) == Approx(14.5).epsilon(2e-3));
}

TEST_CASE("shape factors do not change with the scale of the section") {
  const ShapeFactors small = shape_factors(i_section(0.2, 0.1, 0.0056, 0.0085, 0.012), square);
  const ShapeFactors large = shape_factors(i_section(2.0, 1.0, 0.056, 0.085, 0.12), square);
  CHECK(small.bending_stiffness == Approx(large.bending_stiffness).epsilon(1e-12));
  CHECK(small.torsion_stiffness == Approx(large.torsion_stiffness).epsilon(1e-12));
  CHECK(small.bending_strength == Approx(large.bending_strength).epsilon(1e-12));
  CHECK(small.torsion_strength == Approx(large.torsion_strength).epsilon(1e-12));
}

TEST_CASE("a material index is a power of the property over the density") {
  // 100 MPa and 2 Mg/m3: (1e8)^(2/3) / 2000 = 107.72.
  CHECK(material_index(100e6, 2.0 / 3.0, 2000.0) == Approx(107.7217).epsilon(1e-6));
  CHECK(material_index(210e9, 1.0, 7850.0) == Approx(210e9 / 7850.0).epsilon(1e-14));
  CHECK(material_index(210e9, 0.0, 500.0) == Approx(1.0 / 500.0).epsilon(1e-14));
}

TEST_CASE("shape factors and indices name what they cannot take") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  auto faults = faults_of([&] { (void)bending_shape_factor(0.0, nan, circle); });
  REQUIRE(faults.size() == 2);
  CHECK(faults[0].code == Code::out_of_range);
  CHECK(faults[0].where == "area");
  CHECK(faults[1].code == Code::not_finite);
  CHECK(faults[1].where == "second_moment");
  SectionProperties nothing;
  faults = faults_of([&] { (void)shape_factors(nothing, square); });
  REQUIRE(faults.size() == 5);
  CHECK(faults[4].where == "W_t");
  faults = faults_of([&] { (void)material_index(-1.0, nan, 0.0); });
  REQUIRE(faults.size() == 3);
  CHECK(faults[0].where == "property");
  CHECK(faults[1].where == "exponent");
  CHECK(faults[2].where == "density");
}
