// SPDX-License-Identifier: MIT
#include <bismar/mechanics/column.hpp>

#include <bismar/error.hpp>
#include <bismar/mechanics/wall.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <numbers>
#include <random>
#include <vector>

namespace bismar {

TEST_CASE("Every column curve solves its own quadratic and stays below squash and Euler load") {
  // (1 - chi)(1 - chi lambda^2) = alpha (lambda - lambda_0) chi, the smaller root.
  std::vector<ColumnCurve> curves = {
      aluminium_curve(true), aluminium_curve(false), timber_curve(true), timber_curve(false)};
  for (const BucklingCurve curve : {BucklingCurve::a0,
                                    BucklingCurve::a,
                                    BucklingCurve::b,
                                    BucklingCurve::c,
                                    BucklingCurve::d}) {
    curves.push_back(steel_curve(curve));
  }
  for (const ColumnCurve& curve : curves) {
    double before = 1.0;
    for (double lambda = 0.01; lambda < 6.0; lambda += 0.013) {
      const double chi = reduction_factor(curve, lambda);
      CHECK(chi > 0.0);
      CHECK(chi <= 1.0);
      CHECK(chi * lambda * lambda <= 1.0 + 1e-12);
      CHECK(chi <= before);
      before = chi;
      if (lambda > curve.lambda_0) {
        const double left = (1.0 - chi) * (1.0 - chi * lambda * lambda);
        CHECK(left == Approx(curve.alpha * (lambda - curve.lambda_0) * chi).margin(1e-12));
      } else {
        CHECK(chi == 1.0);
      }
    }
  }
}

TEST_CASE("A lower curve gives a lower factor, and an endless column none") {
  for (const double lambda : {0.3, 1.0, 3.0}) {
    CHECK(reduction_factor(steel_curve(BucklingCurve::a0), lambda) >
          reduction_factor(steel_curve(BucklingCurve::a), lambda));
    CHECK(reduction_factor(steel_curve(BucklingCurve::c), lambda) >
          reduction_factor(steel_curve(BucklingCurve::d), lambda));
  }
  CHECK(reduction_factor(steel_curve(BucklingCurve::c), 1e9) == Approx(1e-18).epsilon(1e-6));
  CHECK(reduction_factor(steel_curve(BucklingCurve::c), 1e200) == 0.0);
}

TEST_CASE("The buckling curve follows section, forming, flange and axis") {
  const auto both = [](const SectionProperties& s) {
    return std::vector<BucklingCurve>{buckling_curve(s, BendingAxis::y),
                                      buckling_curve(s, BendingAxis::z)};
  };
  using Curves = std::vector<BucklingCurve>;
  const Curves ab = {BucklingCurve::a, BucklingCurve::b};
  const Curves bc = {BucklingCurve::b, BucklingCurve::c};
  const Curves cc = {BucklingCurve::c, BucklingCurve::c};
  const Curves dd = {BucklingCurve::d, BucklingCurve::d};
  const Curves aa = {BucklingCurve::a, BucklingCurve::a};
  CHECK(both(i_section(0.3, 0.15, 0.0071, 0.0107, 0.015)) == ab);
  CHECK(both(i_section(1.0, 0.3, 0.02, 0.040, 0.03)) == ab);
  CHECK(both(i_section(1.0, 0.3, 0.02, 0.041, 0.03)) == bc);
  CHECK(both(i_section(0.36, 0.3, 0.01, 0.02, 0.02)) == bc);  // h/b = 1.2 exactly
  CHECK(both(i_section(0.5, 0.5, 0.05, 0.1, 0.02)) == bc);
  CHECK(both(i_section(0.5, 0.5, 0.05, 0.11, 0.02)) == dd);
  CHECK(both(round_tube(0.1, 0.005, Forming::hot_finished)) == aa);
  CHECK(both(rectangular_tube(0.1, 0.1, 0.005, Corners::en_10219, Forming::cold_formed)) == cc);
  CHECK(both(round_tube(0.1, 0.005, Forming::unknown)) == cc);
  CHECK(both(solid_round(0.1)) == cc);
  CHECK(both(channel(0.2, 0.075, 0.0085, 0.0115, 0.0115, 0.08)) == cc);
  SectionProperties unknown = i_section(0.3, 0.15, 0.0071, 0.0107, 0.015);
  unknown.forming = Forming::unknown;
  CHECK(both(unknown) == cc);
}

TEST_CASE("Euler's load is met to a few roundings") {
  // The header promises 4 eps: two multiplications by pi, three more operations.
  std::mt19937 random(3);
  std::uniform_real_distribution<double> value(0.1, 10.0);
  for (int trial = 0; trial < 1000; ++trial) {
    const double E = value(random);
    const double I = value(random);
    const double L = value(random);
    const long double exact = std::numbers::pi_v<long double> * std::numbers::pi_v<long double> *
                              static_cast<long double>(E) * static_cast<long double>(I) /
                              (static_cast<long double>(L) * static_cast<long double>(L));
    const long double error =
        (static_cast<long double>(euler_critical_load(E, I, L)) - exact) / exact;
    CHECK(std::abs(static_cast<double>(error)) <= 4.0 * 2.220446049250313e-16);
  }
}

TEST_CASE("Johnson's parabola meets Euler's curve with the same load") {
  const double E = 207e9;
  const double yield = 300e6;
  const double transition = std::sqrt(2.0 * std::numbers::pi * std::numbers::pi * E / yield);
  CHECK(johnson_critical_load(1.0, yield, E, transition * (1 - 1e-9)) ==
        Approx(yield / 2).epsilon(1e-6));
  CHECK(johnson_critical_load(1.0, yield, E, transition * (1 + 1e-9)) ==
        Approx(yield / 2).epsilon(1e-6));
}

TEST_CASE(
    "The secant formula without eccentricity is P/A and has no answer beyond the Euler load") {
  EccentricColumn column{.load = 1e4,
                         .area = 1e-4,
                         .radius_of_gyration = 5e-3,
                         .effective_length = 0.5,
                         .youngs_modulus = 210e9,
                         .eccentricity = 0.0,
                         .fibre_distance = 1e-2};
  CHECK(secant_stress(column) == Approx(1e8));
  column.load = 1.01 * euler_critical_load(210e9, 1e-4 * 25e-6, 0.5);
  CHECK(std::isinf(secant_stress(column)));
}

TEST_CASE("Aluminium walls have their own class 3 limits") {
  // EN 1999-1-1:2007 Table 6.2, unwelded: internal 22 and 18 epsilon, outstand 6 and 5; 6.1.4.3:
  // beta 0.40 b/t for a web in bending, 3 sqrt(D/t) for a tube. 22 seen in a worked example, the
  // rest from memory.
  using Kind = PlateElement::Kind;
  CHECK(aluminium_wall_epsilon(250e6) == 1.0);
  CHECK(aluminium_wall_epsilon(200e6) == Approx(1.118).epsilon(1e-4));
  const double epsilon = 1.2;
  for (const bool class_a : {true, false}) {
    const double internal = class_a ? 22.0 : 18.0;
    const auto limit = [&](Kind kind) { return aluminium_class_3_limit(kind, epsilon, class_a); };
    CHECK(limit(Kind::internal_compression) == Approx(internal * epsilon));
    CHECK(0.40 * limit(Kind::internal_bending) == Approx(internal * epsilon));
    CHECK(3.0 * std::sqrt(limit(Kind::round)) == Approx(internal * epsilon));
    CHECK(limit(Kind::outstand) == Approx((class_a ? 6.0 : 5.0) * epsilon));
  }
}

TEST_CASE("Column and wall functions name a wrong argument") {
  CHECK_THROWS_AS(euler_critical_load(0.0, 1.0, 1.0), Error);
  CHECK_THROWS_AS(relative_slenderness(1.0, -1.0, 1.0), Error);
  CHECK_THROWS_AS(reduction_factor({}, -0.1), Error);
  CHECK_THROWS_AS(johnson_critical_load(1.0, 1.0, 1.0, 0.0), Error);
  CHECK_THROWS_AS(secant_stress({}), Error);
  CHECK_THROWS_AS(aisc_critical_stress(1.0, std::nan(""), 1.0), Error);
  CHECK_THROWS_AS(wall_epsilon(0.0, 1.0), Error);
  CHECK_THROWS_AS(class_3_limit(PlateElement::Kind::round, 0.0), Error);
  CHECK_THROWS_AS(aluminium_wall_epsilon(-1.0), Error);
  CHECK_THROWS_AS(aluminium_class_3_limit(PlateElement::Kind::round, std::nan(""), true), Error);
  try {
    (void)secant_stress({});
  } catch (const Error& error) {
    CHECK(error.faults().size() == 6);
    CHECK(error.faults()[0].where == "load");
  }
}

}  // namespace bismar
