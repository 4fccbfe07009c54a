// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/endurance.hpp>
#include <bismar/mechanics/fatigue.hpp>
#include <bismar/mechanics/welded_detail.hpp>

#include <algorithm>
#include <numbers>
#include <optional>
#include <string>
#include <vector>

namespace bismar::checks {

namespace {

constexpr double megapascal = 1e6;
constexpr double celsius = 273.15;

bool has(const Check& check, const char* input) { return check.inputs.contains(input); }

Answers line_of_steel(const Check& check) {
  const double Sut = check["Sut"];
  const double Se = has(check, "Se") ? check["Se"] : endurance_limit_estimate(Sut);
  const SNLine line = sn_line(check["f"], Sut, Se);
  Answers answers = {{"Se_prime", Se}, {"a", line.a}, {"b", line.b}};
  if (has(check, "sigma_rev")) {
    const double N = fatigue_life(line, check["sigma_rev"]);
    answers["N"] = N;
    answers["N_at_55"] = N;
  }
  if (has(check, "N")) {
    const double Sf = fatigue_strength(line, check["N"]);
    answers["Sf"] = Sf;
    answers["Sf_1e4"] = Sf;
  }
  return answers;
}

FatigueSurface surface_named(const std::string& word) {
  return starts_with(word, "ground")     ? FatigueSurface::ground
         : starts_with(word, "machined") ? FatigueSurface::machined
         : starts_with(word, "hot")      ? FatigueSurface::hot_rolled
                                         : FatigueSurface::as_forged;
}

Answers surface(const Check& check) {
  const FatigueSurface surface = surface_named(check.words.at("finish"));
  const bool ninth = check.title.find("9th") != std::string::npos;
  const SurfaceEdition edition = ninth ? SurfaceEdition::ninth : SurfaceEdition::eleventh;
  const SurfaceConstants constants = surface_constants(surface, edition);
  return {{"a_kpsi", constants.a_kpsi},
          {"a_MPa", constants.a_MPa},
          {"b", constants.b},
          {"ratio_a", constants.a_MPa / constants.a_kpsi},
          {ninth ? "ka_600MPa" : "ka_1000MPa", surface_factor(surface, edition, check["Sut"])}};
}

/// Hardness to endurance limit; the older edition's example is in inches.
Answers of_hardness(const Check& check) {
  const bool inches = check.id == "FAT-020";
  const HandbookUnits units = inches ? HandbookUnits::inch : HandbookUnits::metric;
  const double Sut = tensile_strength_from_brinell(check["HB"], units);
  const double Se_prime = endurance_limit_estimate(Sut, units);
  const EnduranceFactors factors{
      .surface = surface_factor(FatigueSurface::ground,
                                inches ? SurfaceEdition::ninth : SurfaceEdition::eleventh,
                                check.expected.at("Sut").si,  // both examples go on with it rounded
                                units),
      .size = size_factor(check["d"], SizeRule::two_ranges, units)};
  return {{"Sut", Sut},
          {"Se_prime", Se_prime},
          {"ka", factors.surface},
          {"kb", factors.size},
          {"Se", endurance_limit(Se_prime, factors)}};
}

Answers warm_bar(const Check& check) {
  const double d = equivalent_diameter_of_rectangle(check["b"], check["b"]);
  const EnduranceFactors factors{
      .surface = surface_factor(FatigueSurface::hot_rolled, SurfaceEdition::ninth, check["Sut"]),
      .size = size_factor(d, SizeRule::one_range),
      .load = load_factor(FatigueLoad::bending),
      .temperature = temperature_factor(check["T"] + celsius, FatigueTemperatureRule::plateau),
      .reliability = tabulated_reliability_factor(check["reliability"])};
  return {{"d_equiv", d},
          {"C_size", factors.size},
          {"C_surf", factors.surface},
          {"C_temp", factors.temperature},
          {"C_reliab", factors.reliability},
          {"Se", endurance_limit(endurance_limit_estimate(check["Sut"]), factors)}};
}

Answers four_lines(const Check& check) {
  const FatigueStress stress{.amplitude = check["sigma_a"], .mean = check["sigma_m"]};
  const FatigueStrengths strengths{
      .endurance = check["Se"], .tensile = check["Sut"], .yield = check["Sy"]};
  const auto n = [&](MeanStressLine line) {
    return fatigue_safety_factor(line, stress, strengths);
  };
  return {{"n_goodman", n(MeanStressLine::goodman)},
          {"n_gerber", n(MeanStressLine::gerber)},
          {"n_elliptic", n(MeanStressLine::asme_elliptic)},
          {"n_soderberg", n(MeanStressLine::soderberg)}};
}

Answers shaft(const Check& check) {
  const ShaftLoading loading{.alternating_moment = check["Ma"],
                             .mean_moment = check["Mm"],
                             .alternating_torque = check["Ta"],
                             .mean_torque = check["Tm"],
                             .k_f = check["Kf"],
                             .k_fs = check["Kfs"]};
  const FatigueStrengths strengths{
      .endurance = check["Se"], .tensile = check["Sut"], .yield = check["Sy"]};
  const auto d = [&](MeanStressLine line) {
    return shaft_diameter(line, loading, strengths, check["n"]);
  };
  const ShaftMoments moments = shaft_moments(loading);
  return {{"A", moments.alternating},
          {"B", moments.mean},
          {"d_gerber", d(MeanStressLine::gerber)},
          {"d_elliptic", d(MeanStressLine::asme_elliptic)},
          {"d_soderberg", d(MeanStressLine::soderberg)},
          {"d_goodman", d(MeanStressLine::goodman)}};
}

Answers shaft_with_yield(const Check& check) {
  const ShaftLoading loading{.alternating_moment = check["Ma"], .mean_torque = check["Tm"]};
  const FatigueStrengths strengths{.endurance = check["Se"], .tensile = check["Sut"]};
  const double d = shaft_diameter(MeanStressLine::goodman, loading, strengths, check["n"]);
  const double d_yield = shaft_yield_diameter(loading, check["Sy"], check["n"]);
  return {{"d_goodman", d},
          {"n_yield_at_d", shaft_yield_factor(loading, check["Sy"], d)},
          {"d_yield", d_yield},
          {"d_required", std::max(d, d_yield)}};
}

/// A machined bar in axial load; the example is in kpsi.
Answers bar(const Check& check) {
  const double Sut = check["Sut"];
  const EnduranceFactors factors{
      .surface =
          surface_factor(FatigueSurface::machined, SurfaceEdition::ninth, Sut, HandbookUnits::inch),
      .load = load_factor(FatigueLoad::axial)};
  const double Se = endurance_limit(endurance_limit_estimate(Sut, HandbookUnits::inch), factors);
  const double area = std::numbers::pi / 4.0 * check["d"] * check["d"];
  const FatigueStress stress =
      fatigue_stress(check["Kf"] * check["F_min"] / area, check["Kf"] * check["F_max"] / area);
  const FatigueStrengths strengths{.endurance = Se, .tensile = Sut};
  return {{"Se", Se},
          {"sigma_a", stress.amplitude},
          {"sigma_m", stress.mean},
          {"n_gerber", fatigue_safety_factor(MeanStressLine::gerber, stress, strengths)},
          {"n_goodman", fatigue_safety_factor(MeanStressLine::goodman, stress, strengths)},
          {"n_yield", first_cycle_yield_factor(stress, check["Sy"])}};
}

Answers local_mean_stress(const Check& check) {
  const double coefficient = check["sigma_f_prime"];
  const SNLine line = sn_line_of_reversals(coefficient, check["b"]);
  const double amplitude = check["sigma_a"];
  if (has(check, "sigma_max")) {
    const double reversed =
        swt_stress({.amplitude = amplitude, .mean = check["sigma_max"] - amplitude});
    return {{"sigma_ar", reversed}, {"N_f", fatigue_life(line, reversed)}};
  }
  const double mean = check["sigma_m"];
  const double reversed = morrow_stress({.amplitude = amplitude, .mean = mean}, coefficient);
  // At half a cycle the line is at its coefficient.
  return {{"sigma_ar", reversed},
          {"N_f", fatigue_life(line, reversed)},
          {"sigma_f_minus_sm", morrow_amplitude(coefficient, check["b"], mean, 0.5)}};
}

std::vector<StressBlock> blocks(const Check& check) {
  std::vector<StressBlock> list;
  for (int i = 1; has(check, ("blocks_" + std::to_string(i) + "_1").c_str()); ++i) {
    const std::string name = "blocks_" + std::to_string(i);
    list.push_back({.range = check[name + "_1"] * megapascal, .cycles = check[name + "_2"]});
  }
  return list;
}

Answers spectrum(const Check& check) {
  const std::vector<StressBlock> all = blocks(check);
  const double category = check["category"];
  if (!has(check, "gamma_Mf")) {
    const double range = equivalent_stress_range(all);
    return {{"equivalent_range", range}, {"N_total", welded_detail_life(category, range)}};
  }
  const double gamma = check["gamma_Mf"];
  Answers answers = {{"D", miner_damage(category, all, gamma)}};
  for (const StressBlock& block : all) {
    answers["D" + std::to_string(answers.size())] =
        miner_damage(category, std::vector<StressBlock>{block}, gamma);
  }
  return answers;
}

Answers reliabilities(const Check& check) {
  Answers answers;
  for (int i = 1; i <= 8; ++i) {
    answers["k_e_" + std::to_string(i)] =
        reliability_factor(check["reliability_" + std::to_string(i)]);
  }
  return answers;
}

std::optional<Answers> factors(const Check& check) {
  if (check.words.contains("finish")) {
    return surface(check);
  }
  if (check.words.contains("loads")) {
    return Answers{{"bending", load_factor(FatigueLoad::bending)},
                   {"axial", load_factor(FatigueLoad::axial)},
                   {"torsion", load_factor(FatigueLoad::torsion)}};
  }
  if (starts_with(check.title, "size factor")) {
    return Answers{{"kb_10", size_factor(check["d1"])},
                   {"kb_32", size_factor(check["d2"])},
                   {"kb_60", size_factor(check["d3"])}};
  }
  if (starts_with(check.title, "reliability factor")) {
    return reliabilities(check);
  }
  return std::nullopt;
}

std::optional<Answers> welded(const Check& check) {
  if (has(check, "m1_m2_1")) {
    const double D = constant_amplitude_limit(1.0);
    return Answers{
        {"D_over_C", D}, {"L_over_D", cut_off_limit(1.0) / D}, {"L_over_C", cut_off_limit(1.0)}};
  }
  if (has(check, "detail_category")) {
    const double category = check["detail_category"];
    return Answers{{"N", welded_detail_life(category, check["stress_range"], check["gamma_Mf"])},
                   {"delta_sigma_D", constant_amplitude_limit(category)}};
  }
  if (has(check, "FAT")) {
    return Answers{{"N", iiw_life(check["FAT"], check["stress_range"])},
                   {"range_at_1e7", iiw_strength(check["FAT"], 1e7)}};
  }
  if (has(check, "category")) {
    return spectrum(check);
  }
  return std::nullopt;
}

}  // namespace

std::optional<Answers> fatigue_answers(const Check& check) {
  if (has(check, "f")) {
    return line_of_steel(check);
  }
  if (has(check, "HB")) {
    return of_hardness(check);
  }
  if (has(check, "T")) {
    return warm_bar(check);
  }
  if (has(check, "F_max")) {
    return bar(check);
  }
  if (has(check, "Ma")) {
    return has(check, "Kf") ? shaft(check) : shaft_with_yield(check);
  }
  if (has(check, "sigma_f_prime")) {
    return local_mean_stress(check);
  }
  if (has(check, "sigma_a")) {
    return four_lines(check);
  }
  if (has(check, "point1_1")) {
    const SNLine line = sn_line_through(check["point1_1"] * megapascal,
                                        check["point1_2"],
                                        check["point2_1"] * megapascal,
                                        check["point2_2"]);
    return Answers{
        {"B", line.b}, {"A", line.a}, {"sigma_f_prime", fatigue_strength_coefficient(line)}};
  }
  if (std::optional<Answers> answers = factors(check)) {
    return answers;
  }
  return welded(check);
}

}  // namespace bismar::checks
