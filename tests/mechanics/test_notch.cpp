// SPDX-License-Identifier: MIT
// Stress concentration beside the published checks: limits of the ranges, special values, faults.
#include <bismar/error.hpp>
#include <bismar/mechanics/notch.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <functional>
#include <limits>
#include <string>

namespace bismar {

namespace {

const double nan = std::numeric_limits<double>::quiet_NaN();

/// "place code" of every fault, in order.
std::string faults_of(const std::function<double()>& call) {
  std::string text;
  try {
    static_cast<void>(call());
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      text += (text.empty() ? "" : ", ") + fault.where +
              (fault.code == Code::not_finite     ? " not finite"
               : fault.code == Code::out_of_range ? " out of range"
                                                  : " other");
    }
  }
  return text;
}

/// A notch of h/r = `depth` with x = 2 h / D.
RoundNotch notch(double depth, double x) {
  return {.large_diameter = 1.0, .small_diameter = 1.0 - x, .radius = 0.5 * x / depth};
}

constexpr NotchLoad loads[] = {NotchLoad::tension, NotchLoad::bending, NotchLoad::torsion};

}  // namespace

TEST_CASE("A notch that leaves almost nothing of the bar has a factor near one") {
  // The constants of each set sum to 1 at h = D/2, which proves their signs.
  const double x = 1.0 - 1e-9;
  for (const NotchLoad load : loads) {
    for (const double depth : {0.25, 1.0, 1.99, 2.01, 3.9, 20.0, 50.0}) {
      INFO("h/r = " << depth);
      CHECK(u_groove_factor(notch(depth, x), load) == Approx(1.0).margin(0.051));
      CHECK(u_groove_factor(notch(depth, x), load, NotchFormula::pilkey) ==
            Approx(1.0).margin(0.14));
      if (depth > (load == NotchLoad::torsion ? 4.0 : 20.0)) {
        continue;
      }
      CHECK(shoulder_fillet_factor(notch(depth, x), load) ==
            Approx(1.0).margin(load == NotchLoad::torsion ? 0.04 : 0.01));
      CHECK(shoulder_fillet_factor(notch(depth, x), load, NotchFormula::pilkey) ==
            Approx(1.0).margin(0.04));
    }
  }
}

TEST_CASE("The two handbooks agree at fillets and grooves of shafts") {
  for (const NotchLoad load : loads) {
    for (const double depth : {0.5, 1.0, 2.0, 3.0}) {
      for (const double x : {0.1, 0.2, 0.3}) {
        INFO("h/r = " << depth << ", 2h/D = " << x);
        CHECK(shoulder_fillet_factor(notch(depth, x), load) ==
              Approx(shoulder_fillet_factor(notch(depth, x), load, NotchFormula::pilkey))
                  .epsilon(0.03));
        CHECK(u_groove_factor(notch(depth, x), load) ==
              Approx(u_groove_factor(notch(depth, x), load, NotchFormula::pilkey)).epsilon(0.1));
      }
    }
  }
}

TEST_CASE("A sharper notch is worse, and the two ranges meet at h/r = 2") {
  for (const NotchLoad load : loads) {
    double before = 1.0;
    for (const double depth : {0.25, 0.5, 1.0, 1.9, 2.5, 3.5}) {
      const double K_t = shoulder_fillet_factor(notch(depth, 0.2), load);
      CHECK(K_t > before);
      before = K_t;
    }
    for (const NotchFormula formula : {NotchFormula::roark, NotchFormula::pilkey}) {
      CHECK(shoulder_fillet_factor(notch(2.0001, 0.2), load, formula) ==
            Approx(shoulder_fillet_factor(notch(2.0, 0.2), load, formula)).epsilon(0.02));
      CHECK(u_groove_factor(notch(2.0001, 0.2), load, formula) ==
            Approx(u_groove_factor(notch(2.0, 0.2), load, formula)).epsilon(0.04));
    }
  }
}

TEST_CASE("The fits refuse what they were not made for") {
  const auto fillet = [](double depth, NotchLoad load) {
    return faults_of([=] { return shoulder_fillet_factor(notch(depth, 0.2), load); });
  };
  CHECK(fillet(0.1, NotchLoad::bending).empty());
  CHECK(fillet(20.0, NotchLoad::tension).empty());
  CHECK(fillet(0.25, NotchLoad::torsion).empty());
  CHECK(fillet(4.0, NotchLoad::torsion).empty());
  CHECK(fillet(0.099, NotchLoad::bending) == "radius out of range");
  CHECK(fillet(20.1, NotchLoad::tension) == "radius out of range");
  CHECK(fillet(0.24, NotchLoad::torsion) == "radius out of range");
  CHECK(fillet(4.1, NotchLoad::torsion) == "radius out of range");
  const auto groove = [](double depth, NotchLoad load, NotchFormula formula) {
    return faults_of([=] { return u_groove_factor(notch(depth, 0.2), load, formula); });
  };
  CHECK(groove(0.25, NotchLoad::bending, NotchFormula::roark).empty());
  CHECK(groove(50.0, NotchLoad::torsion, NotchFormula::roark).empty());
  CHECK(groove(0.1, NotchLoad::bending, NotchFormula::pilkey).empty());
  CHECK(groove(0.24, NotchLoad::bending, NotchFormula::roark) == "radius out of range");
  CHECK(groove(0.24, NotchLoad::torsion, NotchFormula::pilkey) == "radius out of range");
  CHECK(groove(0.09, NotchLoad::tension, NotchFormula::pilkey) == "radius out of range");
  CHECK(groove(51.0, NotchLoad::tension, NotchFormula::pilkey) == "radius out of range");

  CHECK(faults_of([] {
          return shoulder_fillet_factor({.large_diameter = 1, .small_diameter = 1, .radius = 0.1},
                                        NotchLoad::bending);
        }) == "small_diameter out of range");
  CHECK(faults_of([] {
          return u_groove_factor({.large_diameter = nan, .small_diameter = 0, .radius = -1},
                                 NotchLoad::bending);
        }) == "large_diameter not finite, small_diameter out of range, radius out of range");
}

TEST_CASE("A small hole triples the stress of a plate and of a shaft") {
  CHECK(plate_hole_factor(0.0) == 3.0);
  CHECK(plate_hole_gross_factor(0.0) == 3.0);
  CHECK(plate_hole_heywood_factor(0.0) == 3.0);
  for (const double x : {0.1, 0.3, 0.5, 0.7}) {
    CHECK(plate_hole_factor(x) == Approx(plate_hole_heywood_factor(x)).epsilon(0.04));
  }
  CHECK(radial_hole_factor(0.0, 0.0, NotchLoad::tension) == 3.0);
  CHECK(radial_hole_factor(0.5, 0.0, NotchLoad::bending) == 3.0);
  CHECK(radial_hole_factor(0.5, 0.0, NotchLoad::torsion) == 4.0);
  CHECK(faults_of([] { return plate_hole_factor(1.0); }) == "relative_hole out of range");
  CHECK(faults_of([] { return plate_hole_gross_factor(-0.1); }) == "relative_hole out of range");
  CHECK(faults_of([] { return plate_hole_heywood_factor(nan); }) == "relative_hole not finite");
  CHECK(faults_of([] { return radial_hole_factor(0.9, 0.45, NotchLoad::bending); }).empty());
  CHECK(faults_of([] { return radial_hole_factor(0.91, 0.46, NotchLoad::bending); }) ==
        "bore_ratio out of range, hole_ratio out of range");
  CHECK(faults_of([] { return radial_hole_factor(0.5, 0.41, NotchLoad::torsion); }) ==
        "hole_ratio out of range");
  CHECK(faults_of([] { return radial_hole_factor(nan, -1, NotchLoad::tension); }) ==
        "bore_ratio not finite, hole_ratio out of range");
}

TEST_CASE("Notch sensitivity rises with radius and strength, and both methods are alike") {
  const double megapascal = 1e6;
  CHECK(neuber_sensitivity(700 * megapascal, 3e-3, NotchLoad::bending) >
        neuber_sensitivity(700 * megapascal, 1e-3, NotchLoad::bending));
  double before = 0.0;
  for (const double S : {350.0, 500.0, 800.0, 1100.0, 1500.0}) {
    const double q = neuber_sensitivity(S * megapascal, 1e-3, NotchLoad::tension);
    CHECK(q > before);
    CHECK(q == neuber_sensitivity(S * megapascal, 1e-3, NotchLoad::bending));
    CHECK(q < neuber_sensitivity(S * megapascal, 1e-3, NotchLoad::torsion));
    before = q;
  }
  // By hand: S = 2070 MPa has a = 0.0254 mm, so that r = 0.0254 mm gives a half.
  CHECK(peterson_sensitivity(2070 * megapascal, 0.0254e-3, NotchLoad::bending) == Approx(0.5));
  CHECK(peterson_sensitivity(2070 * megapascal, 0.6 * 0.0254e-3, NotchLoad::torsion) ==
        Approx(0.5));
  CHECK(peterson_sensitivity(800 * megapascal, 2e-3, NotchLoad::bending) ==
        Approx(neuber_sensitivity(800 * megapascal, 2e-3, NotchLoad::bending)).margin(0.1));

  CHECK(faults_of([] { return neuber_constant(340e6, NotchLoad::bending); }) ==
        "tensile_strength out of range");
  CHECK(faults_of([] { return neuber_constant(1600e6, NotchLoad::torsion); }) ==
        "tensile_strength out of range");
  CHECK(faults_of([] { return neuber_constant(1600e6, NotchLoad::tension); }).empty());
  CHECK(faults_of([] { return neuber_constant(1730e6, NotchLoad::bending); }) ==
        "tensile_strength out of range");
  CHECK(faults_of([] { return neuber_sensitivity(nan, 0.0, NotchLoad::bending); }) ==
        "tensile_strength not finite, radius out of range");
  CHECK(faults_of([] { return peterson_sensitivity(0.0, nan, NotchLoad::bending); }) ==
        "tensile_strength out of range, radius not finite");
}

TEST_CASE("Fatigue feels between nothing and all of a notch") {
  CHECK(fatigue_concentration(2.5, 0.0) == 1.0);
  CHECK(fatigue_concentration(2.5, 1.0) == 2.5);
  CHECK(fatigue_concentration(1.0, 0.7) == 1.0);
  CHECK(faults_of([] { return fatigue_concentration(0.9, 1.1); }) ==
        "stress_concentration out of range, sensitivity out of range");
  CHECK(faults_of([] { return fatigue_concentration(nan, -0.1); }) ==
        "stress_concentration not finite, sensitivity out of range");
}

}  // namespace bismar
