// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/beam.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>

#include <algorithm>
#include <cmath>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace bismar::checks {

namespace {

bool mentions(const Check& check, const char* text) {
  return check.title.find(text) != std::string::npos;
}

/// A beam with its loads downwards, which are positive here: reactions upwards, moments that hollow
/// the upper side (sagging) and deflections downwards are then reported as the tables do.
class Beam {
 public:
  Beam(const LoadCase& load_case, double length, const BeamStiffness& stiffness)
      : response_(load_case, Along::z, length, stiffness),
        effects_(reduce(load_case, length)),
        stiffness_(stiffness),
        length_(length) {}

  [[nodiscard]] const BeamResponse& response() const { return response_; }
  [[nodiscard]] double w(double x) const { return response_.deflection(x); }
  [[nodiscard]] double rotation(double x) const { return response_.rotation(x); }
  [[nodiscard]] double moment(double x) const { return -response_.moment(x); }
  [[nodiscard]] double R(std::size_t i) const { return -response_.reactions().at(i).force; }
  /// Counter-clockwise.
  [[nodiscard]] double M_react(std::size_t i) const { return -response_.reactions().at(i).moment; }
  /// Through the reduction that sizing uses; with shear, the parts added.
  [[nodiscard]] double w_max() const {
    return effects_.deflection_z / stiffness_.bending +
           (stiffness_.shear ? effects_.shear_deflection_z / *stiffness_.shear : 0.0);
  }
  [[nodiscard]] double rotation_max() const { return effects_.rotation_z / stiffness_.bending; }
  [[nodiscard]] double M_max() const { return effects_.moment_y.largest; }
  [[nodiscard]] double V_max() const { return std::abs(response_.shears().largest().value); }
  [[nodiscard]] double length() const { return length_; }

 private:
  BeamResponse response_;
  LoadEffects effects_;
  BeamStiffness stiffness_;
  double length_;
};

Support support_of(const Check& check) {
  if (starts_with(check.title, "cantilever") || mentions(check, "Timoshenko: cantilever")) {
    return Support::cantilever;
  }
  if (mentions(check, "fixed-fixed")) {
    return Support::fixed_fixed;
  }
  if (mentions(check, "fixed-pinned") || mentions(check, "propped cantilever")) {
    return Support::fixed_pinned;
  }
  return Support::pinned_pinned;
}

LoadCase held(Support support, std::vector<Load> loads) {
  LoadCase load_case;
  load_case.support_z = load_case.support_y = support;
  load_case.loads = std::move(loads);
  return load_case;
}

/// The beam tables with dimensions.
Answers table_beam(const Check& check) {
  const double L = check["L"];
  const double a = check.inputs.count("a") != 0             ? check["a"]
                   : starts_with(check.title, "cantilever") ? L
                                                            : L / 2.0;
  std::vector<Load> loads;
  if (mentions(check, "rising")) {
    loads = {distributed(0.0, check["q"], 0.0, L)};
  } else if (mentions(check, "UDL")) {
    loads = {distributed(check["q"], check["q"], 0.0, L)};
  } else if (mentions(check, "two equal loads")) {
    loads = {force(check["P"], a), force(check["P"], L - a)};
  } else {
    loads = {force(check["P"], a)};
  }
  const Beam beam(held(support_of(check), loads), L, {.bending = check["E"] * check["I"]});
  Answers answers = {{"w_tip", beam.w(L)},
                     {"theta_tip", beam.rotation_max()},
                     {"M_max", beam.M_max()},
                     {"w_load", beam.w(a)},
                     {"w_mid", beam.w(L / 2.0)},
                     {"theta_end", beam.rotation_max()},
                     {"theta_A", beam.rotation(0.0)},
                     {"theta_B", -beam.rotation(L)},
                     {"M_load", beam.moment(a)},
                     {"M_mid", beam.moment(L / 2.0)},
                     {"M_fixed", beam.M_react(0)}};
  if (support_of(check) != Support::cantilever) {
    answers["R_prop"] = beam.R(1);
  }
  return answers;
}

Answers joist(const Check& check) {
  const double L = check["L"];
  const Beam beam(held(Support::pinned_pinned, {distributed(check["q"], check["q"], 0.0, L)}),
                  L,
                  {.bending = 1.0});
  const double moment = beam.M_max();
  const double side = where_falls_to(check["sigma_allow"], 0.01, 1.0, [moment](double a) {
    return moment / solid_square(a).W_el_y;
  });
  return {{"M_max", moment},
          {"V_max", beam.V_max()},
          {"a_required", side},
          {"tau_max_at_a", beam.V_max() / solid_square(side).A_v_z}};
}

/// The diameter of a round rod at which one limit state is just met.
double diameter(const char* id, const Check& check, const MemberLimits& limits) {
  const LimitState& state = *limit_state(id);
  const double length = check["L"];
  const LoadEffects effects = reduce(cantilever({axial(check["F"])}), length);
  MemberMaterial material;
  material.E = check["E"];
  material.sigma_y = check["sigma_allow"];
  return where_falls_to(1.0, 1e-3, 1.0, [&](double d) {
    return state.utilisation({solid_round(d), material, effects, limits, length, 1.0});
  });
}

Answers tie_rod(const Check& check) {
  if (limit_state("elongation") == nullptr) {
    return {};  // every output is then reported as unanswered
  }
  MemberLimits limits;
  limits.elongation = check["delta_max"];
  const double by_strength = diameter("yield", check, limits);
  const double by_stiffness = diameter("elongation", check, limits);
  const double d = std::max(by_strength, by_stiffness);
  return {{"A_strength", solid_round(by_strength).area},
          {"A_stiffness", solid_round(by_stiffness).area},
          {"A_min", solid_round(d).area},
          {"d_min", d}};
}

/// loads_1_1=P; loads_1_2=place; loads_1_3=size; q from, to, at from, at to; M place, size. Forces
/// downwards, moments counter-clockwise, so that a moment's sign turns.
std::vector<Load> listed_loads(const Check& check) {
  std::vector<Load> loads;
  for (int i = 1; check.words.count("loads_" + std::to_string(i) + "_1") != 0; ++i) {
    const std::string row = "loads_" + std::to_string(i) + "_";
    const std::string& kind = check.words.at(row + "1");
    if (kind == "P") {
      loads.push_back(force(check[row + "3"], check[row + "2"]));
    } else if (kind == "q") {
      loads.push_back(
          distributed(check[row + "4"], check[row + "5"], check[row + "2"], check[row + "3"]));
    } else {
      loads.push_back(moment(-check[row + "3"], check[row + "2"]));
    }
  }
  return loads;
}

/// The number after "at 0." in a title, 0 without one.
double place_in_title(const Check& check) {
  const std::size_t place = check.title.find("at 0.");
  const std::size_t assigned = check.title.find("at a=0.");
  const std::size_t start = place != std::string::npos      ? place + 3
                            : assigned != std::string::npos ? assigned + 5
                                                            : std::string::npos;
  return start == std::string::npos ? 0.0 : parse_printed(check.title.substr(start, 4)).si;
}

std::vector<Load> loads_of_title(const Check& check) {
  if (check.words.count("loads_1_1") != 0) {
    return listed_loads(check);
  }
  const double q = check["load"];
  const double at = place_in_title(check);
  if (mentions(check, "over 0.4 L from the left")) {
    return {distributed(q, q, 0.0, 0.4)};
  }
  if (mentions(check, "over 0.6 L from the root")) {
    return {distributed(q, q, 0.0, 0.6)};
  }
  if (mentions(check, "peak at mid-span")) {
    return {distributed(0.0, q, 0.0, 0.5), distributed(q, 0.0, 0.5, 1.0)};
  }
  if (mentions(check, "triangular load")) {
    return {distributed(0.0, q, 0.0, 1.0)};
  }
  if (mentions(check, "on the overhang")) {
    return {distributed(q, q, 1.0, 1.3)};
  }
  if (mentions(check, "UDL over everything")) {
    return {distributed(q, q, 0.0, 1.3)};
  }
  if (mentions(check, "half next to the pin")) {
    return {distributed(q, q, 0.5, 1.0)};
  }
  if (mentions(check, "UDL")) {
    return {distributed(q, q, 0.0, 1.0)};
  }
  if (mentions(check, "moment at the")) {
    return {moment(q, 1.0)};
  }
  if (mentions(check, "moment at a=")) {
    return {moment(q, at)};
  }
  if (mentions(check, "tip load")) {
    return {force(q, 1.0)};
  }
  return {force(q, mentions(check, "central load") ? 0.5 : at)};
}

/// Beams with L = EI = 1; the overhang reaches to 1.3.
Answers unit_beam(const Check& check) {
  const bool overhangs = mentions(check, "overhang");
  LoadCase load_case = held(support_of(check), loads_of_title(check));
  if (overhangs) {
    load_case.second_support = 1.0;
  }
  const double length = overhangs ? 1.3 : 1.0;
  BeamStiffness stiffness = {.bending = check["EI"]};
  if (check.inputs.count("kappa_GA") != 0) {
    stiffness.shear = check["kappa_GA"];
  }
  const Beam beam(load_case, length, stiffness);
  const BeamRange deflections = beam.response().deflections();
  const BeamRange moments = beam.response().moments();
  const double at = mentions(check, "over 0.4 L") ? 0.4 : place_in_title(check);
  // The reduction leaves reactions as they are without shear, so that it does not know the largest
  // deflection of a statically indeterminate beam with it to first order only.
  const double largest = stiffness.shear ? deflections.largest().value : beam.w_max();
  Answers answers = {{"R1", beam.R(0)},
                     {"R_0", beam.R(0)},
                     {"R_abs", std::abs(beam.R(0))},
                     {"R", std::abs(beam.R(0))},
                     {"R_fix", beam.R(0)},
                     {"R_left", beam.R(0)},
                     {"M_fix", beam.M_react(0)},
                     {"M_fix_abs", std::abs(beam.M_react(0))},
                     {"M_left", beam.M_react(0)},
                     {"M_A", std::abs(beam.M_react(0))},
                     {"M_react_0", beam.M_react(0)},
                     {"M_max", beam.M_max()},
                     {"M_abs_max", beam.M_max()},
                     {"M_span", -moments.least.value},
                     {"M_support", beam.moment(1.0)},
                     {"x_M", moments.largest().x},
                     {"y", largest},
                     {"y_max", largest},
                     {"y_up", -deflections.least.value},
                     {"x", deflections.largest().x},
                     {"x_y", deflections.largest().x},
                     {"x_from_pin", length - deflections.largest().x},
                     {"y_at_a", beam.w(at)},
                     {"y_under_load", beam.w(at)},
                     {"y_tip", beam.w(length)},
                     {"rot_tip", beam.rotation(length)},
                     {"rot_far", std::abs(beam.rotation(0.0))},
                     {"rot_near", beam.rotation_max()},
                     {"rot_pin", beam.rotation_max()}};
  if (load_case.support_z != Support::cantilever) {
    answers["R2"] = answers["R_1"] = answers["R_pin"] = answers["R_right"] = beam.R(1);
    answers["M_right"] = -beam.M_react(1);
    answers["M_B"] = std::abs(beam.M_react(1));
    answers["M_react_1"] = beam.M_react(1);
  }
  return answers;
}

}  // namespace

std::optional<Answers> beam_answers(const Check& check) {
  if (starts_with(check.id, "BEAM")) {
    if (check.inputs.count("delta_max") != 0) {
      return tie_rod(check);
    }
    return check.inputs.count("sigma_allow") != 0 ? joist(check) : table_beam(check);
  }
  if (starts_with(check.id, "BMX")) {
    return unit_beam(check);
  }
  return std::nullopt;
}

}  // namespace bismar::checks
