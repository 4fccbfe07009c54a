// SPDX-License-Identifier: MIT
// Formulas of endurance.hpp, fatigue.hpp and welded_detail.hpp beside the published checks: special
// values, limits of the ranges, faults.
#include <bismar/error.hpp>
#include <bismar/mechanics/endurance.hpp>
#include <bismar/mechanics/fatigue.hpp>
#include <bismar/mechanics/welded_detail.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <functional>
#include <limits>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr double megapascal = 1e6;
constexpr double infinity = std::numeric_limits<double>::infinity();
const double nan = std::numeric_limits<double>::quiet_NaN();

/// "place code" of every fault, in order.
std::string faults_of(const std::function<void()>& call) {
  std::string text;
  try {
    call();
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

template <typename Call>
std::string faults(Call call) {
  return faults_of([&] { static_cast<void>(call()); });
}

}  // namespace

TEST_CASE("The estimate of an endurance limit is half the tensile strength to its cap") {
  CHECK(endurance_limit_estimate(1000 * megapascal) == 500 * megapascal);
  CHECK(endurance_limit_estimate(1400 * megapascal) == 700 * megapascal);
  CHECK(endurance_limit_estimate(2000 * megapascal) == 700 * megapascal);
  CHECK(endurance_limit_estimate(2000 * megapascal, HandbookUnits::inch) ==
        Approx(689.476 * megapascal).epsilon(1e-6));
  CHECK(tensile_strength_from_brinell(200) == Approx(680 * megapascal));
  // 0.495 kpsi = 3.413 MPa.
  CHECK(tensile_strength_from_brinell(200, HandbookUnits::inch) ==
        Approx(682.58 * megapascal).epsilon(1e-5));
  CHECK(faults([] { return endurance_limit_estimate(0.0); }) == "tensile_strength out of range");
  CHECK(faults([] { return tensile_strength_from_brinell(nan); }) == "brinell_hardness not finite");
}

TEST_CASE("The strength at 1000 cycles over the tensile strength meets two printed values") {
  // Shigley, 9th ed., Example 6-2: 0.86 at 90 kpsi; 11th ed., problem 6-3: 0.82 at 120 kpsi.
  CHECK(fatigue_strength_fraction(90 * 6.894757 * megapascal) == Approx(0.86).margin(0.005));
  CHECK(fatigue_strength_fraction(120 * 6.894757 * megapascal) == Approx(0.82).margin(0.005));
  CHECK(fatigue_strength_fraction(400 * megapascal) == 0.9);
  CHECK(fatigue_strength_fraction(70.001 * 6.894757 * megapascal) == Approx(0.9).margin(0.005));
  CHECK(fatigue_strength_fraction(1500 * megapascal) ==
        fatigue_strength_fraction(2500 * megapascal));
  CHECK(faults([] { return fatigue_strength_fraction(-1.0); }) == "tensile_strength out of range");
}

TEST_CASE("Both prints of the surface constants and both editions are near each other") {
  for (const FatigueSurface surface : {FatigueSurface::ground,
                                       FatigueSurface::machined,
                                       FatigueSurface::hot_rolled,
                                       FatigueSurface::as_forged}) {
    for (const SurfaceEdition edition : {SurfaceEdition::ninth, SurfaceEdition::eleventh}) {
      CHECK(surface_factor(surface, edition, 800 * megapascal) ==
            Approx(surface_factor(surface, edition, 800 * megapascal, HandbookUnits::inch))
                .epsilon(0.005));
    }
    CHECK(
        surface_factor(surface, SurfaceEdition::ninth, 800 * megapascal) ==
        Approx(surface_factor(surface, SurfaceEdition::eleventh, 800 * megapascal)).epsilon(0.08));
  }
  // As the header says, at 1000 MPa.
  const auto at_1000 = [](FatigueSurface surface, SurfaceEdition edition) {
    return surface_factor(surface, edition, 1000 * megapascal);
  };
  CHECK(at_1000(FatigueSurface::machined, SurfaceEdition::ninth) == Approx(0.72).margin(0.005));
  CHECK(at_1000(FatigueSurface::machined, SurfaceEdition::eleventh) == Approx(0.68).margin(0.005));
  CHECK(at_1000(FatigueSurface::as_forged, SurfaceEdition::ninth) == Approx(0.28).margin(0.005));
  CHECK(at_1000(FatigueSurface::as_forged, SurfaceEdition::eleventh) == Approx(0.29).margin(0.005));
  CHECK(faults([] { return surface_factor(FatigueSurface::ground, SurfaceEdition::ninth, 0.0); }) ==
        "tensile_strength out of range");
}

TEST_CASE("The size factor holds between its ends and takes ends from tables of millimetres") {
  CHECK(size_factor(7.62e-3) == Approx(1.0).epsilon(0.003));
  CHECK(size_factor(7.62e-3, SizeRule::two_ranges, HandbookUnits::inch) == Approx(1.0));
  CHECK(size_factor(2.79 * 1e-3) == Approx(1.24 * std::pow(2.79, -0.107)));
  CHECK(size_factor(254 * 1e-3) == Approx(1.51 * std::pow(254.0, -0.157)));
  CHECK(size_factor(10 * 0.0254, SizeRule::two_ranges, HandbookUnits::inch) ==
        Approx(0.91 * std::pow(10.0, -0.157)));
  const double step = size_factor(51.0001e-3) / size_factor(51 * 1e-3);
  CHECK(step > 1.0);
  CHECK(step == Approx(1.0004).epsilon(1e-5));
  CHECK(size_factor(8 * 1e-3, SizeRule::one_range) == 1.0);
  CHECK(size_factor(1e-6, SizeRule::one_range) == 1.0);
  CHECK(size_factor(0.25, SizeRule::one_range) == Approx(1.189 * std::pow(250.0, -0.097)));
  CHECK(faults([] { return size_factor(2.7e-3); }) == "diameter out of range");
  CHECK(faults([] { return size_factor(0.255); }) == "diameter out of range");
  CHECK(faults([] { return size_factor(nan); }) == "diameter not finite");
  CHECK(faults([] { return size_factor(0.26, SizeRule::one_range); }) == "diameter out of range");
  CHECK(faults([] { return size_factor(0.0, SizeRule::one_range); }) == "diameter out of range");
  CHECK(equivalent_diameter_of_round(0.1) == Approx(0.037));
  CHECK(equivalent_diameter_of_rectangle(0.04, 0.01) == Approx(0.808 * 0.02).epsilon(2e-4));
  CHECK(faults([] { return equivalent_diameter_of_rectangle(0.0, infinity); }) ==
        "height out of range, width not finite");
  CHECK(faults([] { return equivalent_diameter_of_round(-1.0); }) == "diameter out of range");
}

TEST_CASE("The temperature factors begin at one and end at their ranges") {
  using Rule = FatigueTemperatureRule;
  CHECK(temperature_factor(294.27, Rule::polynomial) == Approx(1.0).margin(0.001));
  // Shigley, 9th ed., Table 6-4 (from memory), which the polynomial fits.
  const auto at = [](double fahrenheit) {
    return temperature_factor((fahrenheit + 459.67) / 1.8, Rule::polynomial);
  };
  CHECK(at(200) == Approx(1.020).margin(0.005));
  CHECK(at(500) == Approx(0.995).margin(0.005));
  CHECK(at(1000) == Approx(0.698).margin(0.005));
  CHECK(temperature_factor(200.0, Rule::plateau) == 1.0);
  CHECK(temperature_factor(723.15, Rule::plateau) == 1.0);
  CHECK(temperature_factor(823.15, Rule::plateau) == Approx(0.42));
  CHECK(faults([] { return temperature_factor(824.0, Rule::plateau); }) ==
        "temperature out of range");
  CHECK(faults([] { return temperature_factor(293.0, Rule::polynomial); }) ==
        "temperature out of range");
  CHECK(faults([] { return temperature_factor(811.0, Rule::polynomial); }) ==
        "temperature out of range");
  CHECK(faults([] { return temperature_factor(-1.0, Rule::plateau); }) ==
        "temperature out of range");
  CHECK(faults([] { return temperature_factor(nan, Rule::polynomial); }) ==
        "temperature not finite");
}

TEST_CASE("The table of reliability factors is the rounded formula") {
  for (const ReliabilityRow& row : reliability_table()) {
    INFO(row.reliability);
    CHECK(reliability_factor(row.reliability) == Approx(row.factor).margin(0.00051));
    CHECK(tabulated_reliability_factor(row.reliability) == row.factor);
  }
  CHECK(reliability_factor(0.5) == Approx(1.0).margin(1e-15));
  // The deviate by bisection of the tail, to the rounding of the factor.
  for (int i = 0; i <= 2000; ++i) {
    const double reliability = 1.0 - 0.5 * std::pow(2e-6, i / 2000.0);
    double low = 0.0;
    double high = 6.0;
    for (int k = 0; k < 60; ++k) {
      const double middle = 0.5 * (low + high);
      (0.5 * std::erfc(middle / std::sqrt(2.0)) > 1.0 - reliability ? low : high) = middle;
    }
    INFO(reliability);
    CHECK(std::abs(reliability_factor(reliability) - (1.0 - 0.04 * (low + high))) < 1e-15);
  }
  // z of 0.975 is 1.959964.
  CHECK(reliability_factor(0.975) == Approx(1.0 - 0.08 * 1.959964).epsilon(1e-8));
  CHECK(faults([] { return reliability_factor(0.49); }) == "reliability out of range");
  CHECK(faults([] { return reliability_factor(1.0); }) == "reliability out of range");
  CHECK(faults([] { return reliability_factor(nan); }) == "reliability not finite");
  CHECK(faults([] { return tabulated_reliability_factor(0.98); }) == "reliability out of range");
}

TEST_CASE("An endurance limit is the product of its factors") {
  const EnduranceFactors factors{
      .surface = 0.8, .size = 0.9, .load = 0.85, .temperature = 0.7, .reliability = 0.753};
  CHECK(endurance_limit(100 * megapascal, factors) ==
        Approx(0.8 * 0.9 * 0.85 * 0.7 * 0.753 * 100 * megapascal));
  CHECK(endurance_limit(100 * megapascal, {}) == 100 * megapascal);
  CHECK(faults([] {
          return endurance_limit(0.0, {.surface = 0.0, .size = nan, .reliability = -1.0});
        }) ==
        "specimen_limit out of range, surface out of range, size not finite, reliability out of "
        "range");
}

TEST_CASE("An S-N line passes through its two points and its inverse comes back") {
  const SNLine line = sn_line(0.9, 800 * megapascal, 300 * megapascal);
  CHECK(fatigue_strength(line, 1e3) == Approx(720 * megapascal));
  CHECK(fatigue_strength(line, 1e6) == Approx(300 * megapascal));
  CHECK(fatigue_life(line, 300 * megapascal) == Approx(1e6));
  CHECK(fatigue_life(line, 0.0) == infinity);
  const SNLine same = sn_line_through(720 * megapascal, 1e3, 300 * megapascal, 1e6);
  CHECK(same.a == Approx(line.a));
  CHECK(same.b == Approx(line.b));
  const SNLine swapped = sn_line_through(300 * megapascal, 1e6, 720 * megapascal, 1e3);
  CHECK(swapped.a == Approx(line.a));
  const SNLine reversals = sn_line_of_reversals(1758 * megapascal, -0.0977);
  CHECK(fatigue_strength(reversals, 0.5) == Approx(1758 * megapascal));
  CHECK(fatigue_strength_coefficient(reversals) == Approx(1758 * megapascal));

  CHECK(faults([] { return sn_line(1.1, 0.0, nan); }) ==
        "fraction out of range, tensile_strength out of range, endurance_limit not finite");
  CHECK(faults([] { return sn_line(0.9, 800, 720); }) == "endurance_limit out of range");
  CHECK(faults([] { return sn_line_through(100, 1e3, 200, 1e6); }) == "stress_2 out of range");
  CHECK(faults([] { return sn_line_through(100, 1e3, 50, 1e3); }) == "stress_2 out of range");
  CHECK(faults([] { return sn_line_through(0, -1, nan, 0); }) ==
        "stress_1 out of range, cycles_1 out of range, stress_2 not finite, cycles_2 out of range");
  CHECK(faults([] { return fatigue_life({.a = 0.0, .b = 0.1}, -1.0); }) ==
        "a out of range, b out of range, reversed_stress out of range");
  CHECK(faults([] { return fatigue_strength({.a = 1.0, .b = -0.1}, 0.0); }) ==
        "cycles out of range");
  CHECK(faults([] { return sn_line_of_reversals(0.0, 0.0); }) ==
        "coefficient out of range, exponent out of range");
}

TEST_CASE("The four lines meet on their axes and order themselves between") {
  const FatigueStrengths s{.endurance = 200, .tensile = 600, .yield = 400};
  const auto n = [&](MeanStressLine line, double amplitude, double mean) {
    return fatigue_safety_factor(line, {.amplitude = amplitude, .mean = mean}, s);
  };
  for (const MeanStressLine line : {MeanStressLine::goodman,
                                    MeanStressLine::gerber,
                                    MeanStressLine::asme_elliptic,
                                    MeanStressLine::soderberg}) {
    CHECK(n(line, 100, 0) == Approx(2.0));
    CHECK(n(line, 0, 0) == infinity);
    // Proportional to the load.
    CHECK(n(line, 60, 90) == Approx(2.0 * n(line, 120, 180)));
  }
  CHECK(n(MeanStressLine::goodman, 0, 300) == Approx(2.0));
  CHECK(n(MeanStressLine::gerber, 0, 300) == Approx(2.0));
  CHECK(n(MeanStressLine::asme_elliptic, 0, 200) == Approx(2.0));
  CHECK(n(MeanStressLine::soderberg, 0, 200) == Approx(2.0));
  CHECK(n(MeanStressLine::gerber, 80, 80) > n(MeanStressLine::goodman, 80, 80));
  CHECK(n(MeanStressLine::goodman, 80, 80) > n(MeanStressLine::soderberg, 80, 80));
  // Gerber's own equation holds at n.
  const double g = n(MeanStressLine::gerber, 80, 150);
  CHECK(g * 80 / 200 + std::pow(g * 150 / 600, 2) == Approx(1.0));

  CHECK(first_cycle_yield_factor({.amplitude = 50, .mean = -150}, 400) == Approx(2.0));
  CHECK(first_cycle_yield_factor({}, 400) == infinity);
  CHECK(faults([] {
          return fatigue_safety_factor(
              MeanStressLine::soderberg, {.amplitude = -1, .mean = -1}, {.endurance = 1});
        }) == "amplitude out of range, mean out of range, yield out of range");
  CHECK(faults([] { return fatigue_safety_factor(MeanStressLine::gerber, {}, {.yield = 1}); }) ==
        "endurance out of range, tensile out of range");
  CHECK(faults([] { return first_cycle_yield_factor({.amplitude = -1, .mean = nan}, 0); }) ==
        "amplitude out of range, mean not finite, yield_strength out of range");
  CHECK(fatigue_stress(-30, 70).amplitude == 50);
  CHECK(fatigue_stress(-30, 70).mean == 20);
  CHECK(faults([] { return fatigue_stress(2, 1).mean; }) == "least out of range");
  CHECK(faults([] { return fatigue_stress(nan, infinity).mean; }) ==
        "least not finite, largest not finite");
}

TEST_CASE("Without a mean stress every equivalent reversed stress is the amplitude") {
  const FatigueStress reversed{.amplitude = 300};
  CHECK(morrow_stress(reversed, 1000) == 300);
  CHECK(swt_stress(reversed) == Approx(300));
  CHECK(walker_stress(reversed, 0.7) == Approx(300));
  const FatigueStress tension{.amplitude = 300, .mean = 200};
  CHECK(walker_stress(tension, 0.5) == Approx(swt_stress(tension)));
  CHECK(walker_stress(tension, 1.0) == Approx(300));
  const FatigueStress pressed{.amplitude = 100, .mean = -100};
  CHECK(swt_stress(pressed) == 0.0);
  CHECK(walker_stress(pressed, 0.5) == 0.0);
  CHECK(walker_exponent_of_steel(1000 * megapascal) == Approx(0.6818));
  CHECK(walker_exponent_of_steel(5000 * megapascal) == 0.0);
  // Morrow both ways: the amplitude with a mean lasts as long as its equivalent without.
  const double amplitude = morrow_amplitude(1758, -0.0977, 200, 1e5);
  CHECK(fatigue_life(sn_line_of_reversals(1758, -0.0977),
                     morrow_stress({.amplitude = amplitude, .mean = 200}, 1758)) == Approx(1e5));
  CHECK(faults([] { return morrow_stress({.amplitude = 1, .mean = 5}, 5); }) ==
        "mean out of range");
  CHECK(faults([] { return morrow_amplitude(5, -0.1, 5, 1); }) == "mean out of range");
  CHECK(faults([] { return swt_stress({.amplitude = -1}); }) == "amplitude out of range");
  CHECK(faults([] { return walker_stress({}, 1.5); }) == "exponent out of range");
  CHECK(faults([] { return walker_exponent_of_steel(0); }) == "tensile_strength out of range");
}

TEST_CASE("The diameter of a shaft gives back its safety factor") {
  const ShaftLoading loading{.alternating_moment = 300,
                             .mean_moment = 100,
                             .alternating_torque = 50,
                             .mean_torque = 400,
                             .k_f = 1.7,
                             .k_fs = 1.4};
  const FatigueStrengths s{
      .endurance = 200 * megapascal, .tensile = 700 * megapascal, .yield = 500 * megapascal};
  const ShaftMoments moments = shaft_moments(loading);
  for (const MeanStressLine line : {MeanStressLine::goodman,
                                    MeanStressLine::gerber,
                                    MeanStressLine::asme_elliptic,
                                    MeanStressLine::soderberg}) {
    const double d = shaft_diameter(line, loading, s, 1.8);
    const double per_moment = 16.0 / (3.14159265358979 * d * d * d);
    const FatigueStress stress{.amplitude = per_moment * moments.alternating,
                               .mean = per_moment * moments.mean};
    CHECK(fatigue_safety_factor(line, stress, s) == Approx(1.8));
  }
  CHECK(shaft_yield_factor(loading,
                           500 * megapascal,
                           shaft_yield_diameter(loading, 500 * megapascal, 1.3)) == Approx(1.3));
  CHECK(shaft_yield_factor({}, 500 * megapascal, 0.01) == infinity);
  CHECK(shaft_diameter(MeanStressLine::gerber, {}, s, 1.0) == 0.0);
  CHECK(faults([] {
          return shaft_diameter(MeanStressLine::goodman,
                                {.mean_torque = -1, .k_f = 0.9, .k_fs = nan},
                                {.endurance = 1},
                                0.0);
        }) ==
        "mean_torque out of range, k_f out of range, k_fs not finite, tensile out of range, "
        "safety_factor out of range");
  CHECK(faults([] { return shaft_yield_diameter({}, 0, 0); }) ==
        "yield_strength out of range, safety_factor out of range");
  CHECK(faults([] { return shaft_yield_factor({}, 0, 0); }) ==
        "yield_strength out of range, diameter out of range");
  CHECK(faults([] { return shaft_moments({.alternating_moment = -1}).mean; }) ==
        "alternating_moment out of range");
}

TEST_CASE("The curve of a welded detail has two slopes and a cut-off, and its inverse") {
  const double C = 80 * megapascal;
  CHECK(welded_detail_strength(C, 2e6) == Approx(C));
  CHECK(welded_detail_strength(C, 5e6) == Approx(constant_amplitude_limit(C)));
  CHECK(welded_detail_strength(C, 1e8) == Approx(cut_off_limit(C)));
  CHECK(welded_detail_strength(C, 1e12) == welded_detail_strength(C, 1e8));
  for (const double N : {1e3, 1e6, 4.9e6, 5.1e6, 9e7}) {
    CHECK(welded_detail_life(C, welded_detail_strength(C, N)) == Approx(N));
    CHECK(welded_detail_life(C, welded_detail_strength(C, N, 1.35), 1.35) == Approx(N));
  }
  CHECK(welded_detail_life(C, 0.999 * cut_off_limit(C)) == infinity);
  CHECK(welded_detail_life(C, 0.0) == infinity);
  CHECK(faults([] { return welded_detail_life(0, -1, nan); }) ==
        "detail_category out of range, partial_factor not finite, stress_range out of range");
  CHECK(faults([] { return welded_detail_strength(1, 0); }) == "cycles out of range");
  CHECK(faults([] { return constant_amplitude_limit(0); }) == "detail_category out of range");
  CHECK(faults([] { return cut_off_limit(nan); }) == "detail_category not finite");
}

TEST_CASE("The curve of the IIW has its knee at ten million cycles") {
  const double knee = iiw_strength(90 * megapascal, 1e7);
  for (const IIWLoading loading :
       {IIWLoading::constant_amplitude, IIWLoading::variable_amplitude}) {
    CHECK(iiw_strength(90 * megapascal, 2e6, loading) == Approx(90 * megapascal));
    for (const double N : {1e5, 9.9e6, 1.1e7, 1e9}) {
      CHECK(iiw_life(90 * megapascal, iiw_strength(90 * megapascal, N, loading), loading) ==
            Approx(N));
    }
    CHECK(iiw_life(90 * megapascal, 0.0, loading) == infinity);
  }
  CHECK(iiw_strength(90 * megapascal, 1e8) == Approx(knee * std::pow(10.0, -1.0 / 22.0)));
  CHECK(iiw_strength(90 * megapascal, 1e8, IIWLoading::variable_amplitude) ==
        Approx(knee * std::pow(10.0, -1.0 / 5.0)));
  CHECK(faults([] { return iiw_strength(0, 0); }) == "fat_class out of range, cycles out of range");
  CHECK(faults([] { return iiw_life(1, -1); }) == "stress_range out of range");
}

TEST_CASE("Damage adds up and the equivalent range does the same damage") {
  const std::vector<StressBlock> blocks = {{90 * megapascal, 2e5}, {70 * megapascal, 1e6}};
  const double range = equivalent_stress_range(blocks);
  CHECK(1.2e6 / welded_detail_life(80 * megapascal, range) ==
        Approx(miner_damage(80 * megapascal, blocks)));
  CHECK(miner_damage(80 * megapascal, {}) == 0.0);
  CHECK(equivalent_stress_range({}) == 0.0);
  CHECK(equivalent_stress_range(std::vector<StressBlock>{{50, 3}, {50, 4}}, 5.0) == Approx(50));
  CHECK(equivalent_stress_range(std::vector<StressBlock>{{50, 0}}) == 0.0);
  CHECK(faults([] {
          return miner_damage(1, std::vector<StressBlock>{{1, 1}, {-1, nan}});
        }) == "/1/range out of range, /1/cycles not finite");
  CHECK(faults([] { return equivalent_stress_range({}, 0.0); }) == "slope out of range");
}

}  // namespace bismar
