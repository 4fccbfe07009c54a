// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/section.hpp>

#include <cmath>
#include <functional>
#include <numbers>

namespace bismar::checks {

namespace {

constexpr double pi = std::numbers::pi;

/// Shape factors from the section's own properties. Circle reference: 4 pi I/A^2 and so on; square
/// reference: 12 I/A^2 and so on.
Answers shape_factors(const SectionProperties& s) {
  const double A2 = s.area * s.area;
  const double A15 = std::pow(s.area, 1.5);
  return {{"phi_Be_circle", 4.0 * pi * s.I_y / A2},
          {"phi_Te_circle", 2.0 * pi * s.I_t / A2},
          {"phi_Bf_circle", 4.0 * std::sqrt(pi) * s.W_el_y / A15},
          {"phi_Tf_circle", 2.0 * std::sqrt(pi) * s.W_t / A15},
          {"phi_Be_square", 12.0 * s.I_y / A2},
          {"phi_Te_square", 7.14 * s.I_t / A2},
          {"phi_Bf_square", 6.0 * s.W_el_y / A15},
          {"phi_Tf_square", 4.8 * s.W_t / A15}};
}

SectionProperties shape(const std::string& name) {
  if (name == "solid square") {
    return solid_square(0.020);
  }
  if (name == "tube 60x2") {
    return round_tube(0.060, 0.002, Forming::unknown);
  }
  if (name == "IPE 200") {
    return i_section(0.200, 0.100, 0.0056, 0.0085, 0.012);
  }
  return i_section(0.600, 0.220, 0.012, 0.019, 0.024);  // IPE 600
}

/// One sizing task: which limit state, which load, how the free size makes a section, which
/// property.
struct Task {
  const char* id = "";
  InternalForces forces;    ///< Direct forces, or
  std::vector<Load> loads;  ///< loads on a cantilever of 1 m.
  std::function<SectionProperties(double)> section;
  std::optional<double> MemberMaterial::*property = nullptr;
};

/// Area of the least section that satisfies the task.
double least_area(const Task& task, double value) {
  MemberMaterial material;
  material.*(task.property) = value;
  LoadCase load_case;
  load_case.loads = task.loads;
  if (task.loads.empty()) {
    load_case.direct = task.forces;
  }
  const LoadEffects effects = reduce(load_case, 1.0);
  MemberLimits limits;
  limits.deflection = 1e-3;
  limits.twist = 1e-3;
  const double size = where_falls_to(1.0, 1e-4, 10.0, [&](double x) {
    const SectionProperties s = task.section(x);
    return limit_state(task.id)->utilisation({s, material, effects, limits, 1.0, 1.0});
  });
  return task.section(size).area;
}

Task task_of(const std::string& function) {
  const auto similar = [](double x) { return solid_rectangle(x, 0.5 * x); };
  Task task;
  task.section = similar;
  if (function.find("stiffness") != std::string::npos) {
    const bool torsional = function.find("torsional") != std::string::npos;
    task.id = torsional ? "twist" : "deflection";
    task.loads = {torsional ? torque(100.0, 1.0) : force(100.0, 1.0)};
    task.property = torsional ? &MemberMaterial::G : &MemberMaterial::E;
    if (function.find("width fixed") != std::string::npos) {
      task.section = [](double x) { return solid_rectangle(x, 0.02); };
    }
    return task;
  }
  task.id = "yield";
  task.property = &MemberMaterial::sigma_y;
  if (function.find("shaft") != std::string::npos) {
    task.forces.T = 100.0;
  } else if (function.find("crushing") != std::string::npos) {
    task.forces.N = -1000.0;
  } else {
    task.forces.M_y = 100.0;
    if (function.find("height fixed") != std::string::npos) {
      task.section = [](double x) { return solid_rectangle(0.02, x); };
    }
  }
  return task;
}

}  // namespace

std::optional<Answers> index_answers(const Check& check) {
  if (!starts_with(check.topic, "12 ")) {
    return std::nullopt;
  }
  if (check.words.count("section") != 0) {
    return shape_factors(shape(check.words.at("section")));
  }
  // m ~ rho A and A ~ X^-x: the exponent from two values of the property a factor of two apart.
  const Task task = task_of(check.words.at("function"));
  const double value = task.property == &MemberMaterial::sigma_y ? 200e6 : 100e9;
  return Answers{{"x", std::log2(least_area(task, value) / least_area(task, 2.0 * value))}};
}

}  // namespace bismar::checks
