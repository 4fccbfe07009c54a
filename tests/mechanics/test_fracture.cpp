// SPDX-License-Identifier: MIT
#include <bismar/mechanics/fracture.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <numbers>
#include <string>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

template <class Call>
std::string places(const Call& call) {
  try {
    call();
  } catch (const Error& error) {
    std::string text;
    for (const Fault& fault : error.faults()) {
      text += fault.where + ";";
    }
    return text;
  }
  return "none";
}

}  // namespace

TEST_CASE("A small crack knows nothing of the far edge") {
  for (const auto formula :
       {CentreCrackFormula::secant, CentreCrackFormula::dowling, CentreCrackFormula::tada}) {
    CHECK(centre_crack_factor(0.0, formula) == 1.0);
  }
  // The free surface adds 12 %.
  for (const auto formula :
       {EdgeCrackFormula::polynomial, EdgeCrackFormula::full_range, EdgeCrackFormula::tada}) {
    CHECK(edge_crack_factor(0.0, formula) == Approx(1.12).epsilon(2e-3));
  }
  CHECK(edge_crack_bending_factor(0.0) == Approx(edge_crack_factor(0.0)).epsilon(2e-3));
}

TEST_CASE("The formulas of one crack agree within what they claim") {
  for (double alpha = 0.0; alpha <= 0.6; alpha += 0.02) {
    const double centre = centre_crack_factor(alpha);
    CHECK(centre_crack_factor(alpha, CentreCrackFormula::secant) == Approx(centre).epsilon(3e-3));
    CHECK(centre_crack_factor(alpha, CentreCrackFormula::dowling) == Approx(centre).epsilon(9e-3));
    const double edge = edge_crack_factor(alpha);
    CHECK(edge_crack_factor(alpha, EdgeCrackFormula::tada) == Approx(edge).epsilon(1.4e-2));
    CHECK(edge_crack_factor(alpha, EdgeCrackFormula::full_range) == Approx(edge).epsilon(2.3e-2));
    // Bending stress falls off in front of the crack.
    CHECK(edge_crack_bending_factor(alpha) <= edge_crack_factor(alpha) + 2.1e-3);
  }
  // The full-range form tends to that of a ligament in bending and tension, 1.122 / (1 -
  // alpha)^1.5.
  CHECK(edge_crack_factor(0.999, EdgeCrackFormula::full_range) * std::pow(0.001, 1.5) ==
        Approx(1.122).epsilon(1e-3));
}

TEST_CASE("An embedded ellipse runs from the penny to the through crack") {
  const EmbeddedEllipse penny = embedded_ellipse_factors(1.0);
  CHECK(penny.minor_end == Approx(penny_crack_factor()).epsilon(1e-15));
  CHECK(penny.major_end == Approx(2.0 / pi).epsilon(1e-15));
  CHECK(embedded_ellipse_factors(1e-9).minor_end == Approx(1.0).epsilon(1e-12));
  // E(k) by Simpson's rule of its integral.
  for (const double ratio : {0.05, 0.3, 0.7, 0.95}) {
    const int steps = 2000;
    double sum = 0.0;
    for (int i = 0; i <= steps; ++i) {
      const double angle = pi / 2.0 * i / steps;
      const double s = std::sin(angle);
      const double f = std::sqrt(1.0 - (1.0 - ratio * ratio) * s * s);
      sum += f * (i == 0 || i == steps ? 1.0 : i % 2 == 1 ? 4.0 : 2.0);
    }
    const double E = sum * pi / 2.0 / steps / 3.0;
    CHECK(embedded_ellipse_factors(ratio).phi_squared == Approx(E * E).epsilon(1e-12));
    CHECK(crack_shape_parameter(ratio) == Approx(E * E).epsilon(3e-3));
  }
}

TEST_CASE("A surface crack meets the limits of its formula") {
  // A shallow half penny: 1.04 x 1.1 x 2 / pi at the surface, 1.04 x 2 / pi at its deepest point.
  const SurfaceCrack half_penny{.depth_to_half_length = 1.0};
  CHECK(surface_crack_factor(half_penny, 0.0) ==
        Approx(1.04 * 1.1 / std::sqrt(2.464)).epsilon(1e-12));
  CHECK(surface_crack_factor(half_penny, pi / 2.0) ==
        Approx(1.04 / std::sqrt(2.464)).epsilon(1e-12));
  // Bending is tension for a crack that is shallow beside the thickness.
  for (const double angle : {0.0, 0.6, pi / 2.0}) {
    CHECK(surface_crack_bending_ratio(half_penny, angle) == Approx(1.0).epsilon(1e-12));
  }
  // By hand, a/c 0.5, a/t 0.5: H1 = 1 - 0.17 - 0.0275; G1 = -1.28; G2 = 0.55 - 0.62433 + 0.16617.
  const SurfaceCrack deep{.depth_to_half_length = 0.5, .relative_depth = 0.5};
  CHECK(surface_crack_bending_ratio(deep, 0.0) == Approx(0.8025).epsilon(1e-12));
  CHECK(surface_crack_bending_ratio(deep, pi / 2.0) ==
        Approx(1.0 - 0.64 + 0.25 * 0.09184).epsilon(1e-5));
  // A long shallow crack is nearly the edge crack.
  CHECK(surface_crack_factor({.depth_to_half_length = 1e-6}, pi / 2.0) ==
        Approx(edge_crack_factor(0.0)).epsilon(1e-2));
}

TEST_CASE("The front of a surface crack is read from surface to deepest point") {
  const SurfaceCrack crack{
      .depth_to_half_length = 0.1, .relative_depth = 0.75, .relative_length = 0.2};
  const auto front = surface_crack_front(crack);
  CHECK(front.front().tension == surface_crack_factor(crack, 0.0));
  CHECK(front.back().tension == Approx(surface_crack_factor(crack, pi / 2.0)).epsilon(1e-15));
  CHECK(front[6].bending ==
        Approx(surface_crack_factor(crack, pi / 6.0) * surface_crack_bending_ratio(crack, pi / 6.0))
            .epsilon(1e-13));
  // Deep and long in bending: the worst place is between the ends.
  CHECK(front[5].bending > 1.1 * front.front().bending);
  CHECK(front[5].bending > 1.1 * front.back().bending);
}

TEST_CASE("The critical crack length is where K reaches the toughness") {
  const auto F = [](double alpha) { return centre_crack_factor(alpha); };
  const double a = critical_crack_length(60e6, 300e6, 50e-3, F, 0.9).value();
  CHECK(stress_intensity(F(a / 50e-3), 300e6, a) == Approx(60e6).epsilon(1e-10));
  // In an endless plate.
  CHECK(critical_crack_length(60e6, 300e6, 50.0, F, 0.9).value() ==
        Approx(critical_crack_length(60e6, 300e6, 1.0)).epsilon(1e-5));
  CHECK(critical_crack_length(60e6, 300e6, 1.0) == Approx(0.04 / pi).epsilon(1e-14));
  // Tough enough for every crack that the formula covers.
  CHECK_FALSE(critical_crack_length(60e6, 300e6, 1e-3, F, 0.6).has_value());
}

TEST_CASE("Fracture refuses what it cannot mean") {
  CHECK(places([] { return stress_intensity(0.0, -1.0, 0.0); }) ==
        "geometry_factor;stress;crack_length;");
  CHECK(stress_intensity(1.12, 0.0, 1e-3) == 0.0);
  CHECK(places([] { return centre_crack_factor(1.0); }) == "relative_length;");
  CHECK(places([] { return edge_crack_factor(-0.1); }) == "relative_depth;");
  CHECK(places([] { return edge_crack_bending_factor(1.0); }) == "relative_depth;");
  CHECK(places([] { return embedded_ellipse_factors(1.1); }) == "axis_ratio;");
  CHECK(places([] { return crack_shape_parameter(0.0); }) == "axis_ratio;");
  const SurfaceCrack wrong{
      .depth_to_half_length = 1.2, .relative_depth = 0.81, .relative_length = 0.51};
  const std::string all = "crack.depth_to_half_length;crack.relative_depth;crack.relative_length;";
  CHECK(places([&] { return surface_crack_factor(wrong, 2.0); }) == all + "angle;");
  CHECK(places([&] { return surface_crack_bending_ratio(wrong, -1.0); }) == all + "angle;");
  CHECK(places([&] { return surface_crack_front(wrong); }) == all);
  CHECK(places([] { return critical_crack_length(0.0, 0.0, 0.0); }) ==
        "toughness;stress;geometry_factor;");
  const auto one = [](double) { return 1.0; };
  CHECK(places([&] { return critical_crack_length(0.0, 0.0, 0.0, one, 1.5); }) ==
        "toughness;stress;size;largest;");
}

}  // namespace bismar
