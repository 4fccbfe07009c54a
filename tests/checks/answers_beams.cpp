// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include "mechanics/bending_plane.hpp"

#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>

#include <algorithm>
#include <cmath>
#include <sstream>
#include <vector>

namespace bismar::checks {

namespace {

using mechanics::PlaneSegment;

/// One plane of a beam with E I = 1 times its stiffness, and the public reduction beside it.
class Beam {
 public:
  Beam(Support support, std::vector<Load> loads, double length, double stiffness)
      : stiffness_(stiffness) {
    std::vector<double> stations = {0.0, length};
    for (const Load& load : loads) {
      stations.push_back(load.at);
      if (load.kind == Load::Kind::distributed) {
        stations.push_back(load.to);
      }
    }
    std::sort(stations.begin(), stations.end());
    stations.erase(std::unique(stations.begin(), stations.end()), stations.end());
    plane_ = mechanics::bending_plane(loads, Along::z, support, stations);
    LoadCase load_case;
    load_case.support_z = support;
    load_case.loads = std::move(loads);
    effects_ = reduce(load_case, length);
  }

  [[nodiscard]] double w(double x) const {
    const PlaneSegment& s = segment(x);
    return s.deflection(x - s.start) / stiffness_;
  }
  [[nodiscard]] double slope(double x) const {
    const PlaneSegment& s = segment(x);
    return s.slope(x - s.start) / stiffness_;
  }
  [[nodiscard]] double moment(double x) const {
    const PlaneSegment& s = segment(x);
    return s.moment(x - s.start);
  }
  [[nodiscard]] double w_max() const { return effects_.deflection_z / stiffness_; }
  [[nodiscard]] double M_max() const { return largest_station().forces.M_y; }
  [[nodiscard]] double x_of_M_max() const { return largest_station().x; }
  [[nodiscard]] double V_max() const {
    double largest = 0.0;
    for (const Station& s : effects_.stations) {
      largest = std::max(largest, std::abs(s.forces.V_z));
    }
    return largest;
  }
  /// Reactions, upwards for loads downwards.
  [[nodiscard]] double R_left() const { return plane_.front().shear(0.0); }
  [[nodiscard]] double R_right() const { return -plane_.back().shear(plane_.back().length); }
  [[nodiscard]] double x_of_w_max() const {
    double best = 0.0;
    double at = 0.0;
    for (const PlaneSegment& s : plane_) {
      for (const double xi : mechanics::sign_changes(s.slope, s.length)) {
        if (std::abs(s.deflection(xi)) > best) {
          best = std::abs(s.deflection(xi));
          at = s.start + xi;
        }
      }
    }
    return at;
  }

 private:
  [[nodiscard]] const PlaneSegment& segment(double x) const {
    for (const PlaneSegment& s : plane_) {
      if (x <= s.start + s.length) {
        return s;
      }
    }
    return plane_.back();
  }
  [[nodiscard]] const Station& largest_station() const {
    return *std::max_element(
        effects_.stations.begin(), effects_.stations.end(), [](const Station& a, const Station& b) {
          return std::abs(a.forces.M_y) < std::abs(b.forces.M_y);
        });
  }

  double stiffness_;
  std::vector<PlaneSegment> plane_;
  LoadEffects effects_;
};

/// Cantilevers and simply supported beams of the beam tables.
Answers table_beam(const Check& check) {
  const double L = check["L"];
  const double EI = check["E"] * check["I"];
  const bool fixed = starts_with(check.title, "cantilever");
  const Support support = fixed ? Support::cantilever : Support::pinned_pinned;
  const double a = check.inputs.count("a") != 0 ? check["a"] : L;
  std::vector<Load> loads;
  if (check.title.find("rising") != std::string::npos) {
    loads = {distributed(0.0, check["q"], 0.0, L)};
  } else if (check.title.find("UDL") != std::string::npos) {
    loads = {distributed(check["q"], check["q"], 0.0, L)};
  } else if (check.title.find("two equal loads") != std::string::npos) {
    loads = {force(check["P"], a), force(check["P"], L - a)};
  } else {
    loads = {force(check["P"], a)};
  }
  const Beam beam(support, loads, L, EI);
  return {{"w_tip", beam.w(L)},
          {"theta_tip", beam.slope(L)},
          {"M_max", std::abs(beam.M_max())},
          {"w_load", beam.w(a)},
          {"w_mid", beam.w(L / 2.0)},
          {"theta_end", beam.slope(0.0)},
          {"theta_A", beam.slope(0.0)},
          {"theta_B", -beam.slope(L)},
          {"M_load", std::abs(beam.moment(a))}};
}

Answers joist(const Check& check) {
  const double L = check["L"];
  const Beam beam(Support::pinned_pinned, {distributed(check["q"], check["q"], 0.0, L)}, L, 1.0);
  const double moment = std::abs(beam.M_max());
  const double side = where_falls_to(check["sigma_allow"], 0.01, 1.0, [moment](double a) {
    return moment / solid_square(a).W_el_y;
  });
  return {{"M_max", moment},
          {"V_max", beam.V_max()},
          {"a_required", side},
          {"tau_max_at_a", beam.V_max() / solid_square(side).A_v_z}};
}

/// "P 0.2 1.0/q 0.4 0.9 1.0 3.0/M 0.6 0.1": forces downwards, moments counter-clockwise, so that a
/// moment's sign turns (ours moves what lies beyond it along the loads).
std::vector<Load> listed_loads(const std::string& text) {
  std::vector<Load> loads;
  std::istringstream items(text);
  std::string item;
  while (std::getline(items, item, '/')) {
    std::vector<double> numbers;
    const std::string kind = item.substr(0, 1);
    std::size_t at = 2;
    while (at < item.size()) {
      const std::size_t end = std::min(item.find(' ', at), item.size());
      numbers.push_back(parse_printed(item.substr(at, end - at)).si);
      at = end + 1;
    }
    if (kind == "P") {
      loads.push_back(force(numbers.at(1), numbers.at(0)));
    } else if (kind == "q") {
      loads.push_back(distributed(numbers.at(2), numbers.at(3), numbers.at(0), numbers.at(1)));
    } else {
      loads.push_back(moment(-numbers.at(1), numbers.at(0)));
    }
  }
  return loads;
}

Answers unit_beam(const Check& check) {
  const bool fixed = starts_with(check.title, "cantilever");
  double at = 0.0;
  std::vector<Load> loads;
  if (check.words.count("loads") != 0) {
    loads = listed_loads(check.words.at("loads"));
  } else if (check.title.find("0.4 L from the left") != std::string::npos) {
    at = 0.4;
    loads = {distributed(1.0, 1.0, 0.0, 0.4)};
  } else if (check.title.find("0.6 L from the root") != std::string::npos) {
    loads = {distributed(1.0, 1.0, 0.0, 0.6)};
  } else if (check.title.find("triangular") != std::string::npos) {
    loads = {distributed(0.0, 1.0, 0.0, 0.5), distributed(1.0, 0.0, 0.5, 1.0)};
  } else if (check.title.find("moment at the right end") != std::string::npos) {
    loads = {moment(1.0, 1.0)};
  } else {
    const std::size_t place = check.title.find("at 0.") + 3;
    at = parse_printed(check.title.substr(place, 4)).si;
    loads = {force(1.0, at)};
  }
  const Beam beam(fixed ? Support::cantilever : Support::pinned_pinned, loads, 1.0, 1.0);
  return {{"R1", beam.R_left()},
          {"R2", beam.R_right()},
          {"R_0", beam.R_left()},
          {"R_1", beam.R_right()},
          {"R_abs", std::abs(beam.R_left())},
          {"M_max", std::abs(beam.M_max())},
          {"M_abs_max", std::abs(beam.M_max())},
          {"x_M", beam.x_of_M_max()},
          {"y_max", beam.w_max()},
          {"x", beam.x_of_w_max()},
          {"x_y", beam.x_of_w_max()},
          {"y_at_a", beam.w(at)},
          {"y_under_load", beam.w(at)},
          {"y_tip", beam.w(1.0)},
          {"rot_tip", beam.slope(1.0)},
          {"rot_far", std::abs(beam.slope(0.0))},
          {"rot_near", std::abs(beam.slope(1.0))}};
}

}  // namespace

std::optional<Answers> beam_answers(const Check& check) {
  if (starts_with(check.id, "BEAM")) {
    return check.inputs.count("sigma_allow") != 0 ? joist(check) : table_beam(check);
  }
  if (starts_with(check.id, "BMX")) {
    return unit_beam(check);
  }
  if (check.id == "TIM-032") {
    // A floor joist: deflection under the instantaneous load, stress under the design load.
    const double L = check["L"];
    const SectionProperties s = solid_rectangle(check["h"], check["b"]);
    const double q = check["q_instantaneous"];
    const Beam service(
        Support::pinned_pinned, {distributed(q, q, 0.0, L)}, L, check["E_mean"] * s.I_y);
    const double q_design = (1.35 * check["G_k"] + 1.5 * check["Q_k"]) * check["spacing"];
    const Beam design(Support::pinned_pinned, {distributed(q_design, q_design, 0.0, L)}, L, 1.0);
    return Answers{{"w_bending", service.w_max()},
                   {"sigma_m", std::abs(design.M_max()) / s.W_el_y}};
  }
  return std::nullopt;
}

}  // namespace bismar::checks
