// SPDX-License-Identifier: MIT
// Index exponents are not typed in: each model is a mass and a limit with one free size, sized by
// the library, and its exponent is the elasticity of that mass.
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/material_index.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/mechanics/torsion.hpp>
#include <bismar/numeric/root.hpp>
#include <bismar/solver/sensitivity.hpp>

#include <algorithm>
#include <functional>
#include <numbers>
#include <optional>
#include <span>
#include <stdexcept>
#include <string>

namespace bismar::checks {

namespace {

constexpr double pi = std::numbers::pi;

/// A member of unit length with one free size x. The limit falls with x.
struct Model {
  std::function<double(double x, double density)> mass;
  std::function<double(double x, double property, double density)> limit;
};

struct Sized {
  double mass = 0.0;
  double exponent = 0.0;  ///< x of the index P^x / rho.
};

Sized sized(const Model& model, double property, double density) {
  const LimitBracket root =
      smallest_feasible([&](double x) { return model.limit(x, property, density); }, 1e-6, 1e4);
  if (!root.x || !root.infeasible) {
    throw std::runtime_error("the model has no size between 1e-6 and 1e4");
  }
  SizedDesign design;
  design.objective = [&](double x, std::span<const double> p) { return model.mass(x, p[1]); };
  design.utilisations = [&](double x, std::span<const double> p, std::span<double> u) {
    u[0] = model.limit(x, p[0], p[1]);
  };
  design.constraints = 1;
  design.size = *root.x;
  design.parameters = {property, density};
  const Sensitivity found = sensitivity(design);
  return {model.mass(*root.x, density),
          -found.objective[0].above.value() / found.objective[1].above.value()};
}

using Shape = std::function<SectionProperties(double)>;

SectionProperties similar(double x) { return solid_rectangle(x, 0.5 * x); }
SectionProperties width_fixed(double x) { return solid_rectangle(x, 0.02); }
SectionProperties height_fixed(double x) { return solid_rectangle(0.02, x); }
/// A strip of a panel a metre wide.
SectionProperties panel(double thickness) { return solid_rectangle(thickness, 1.0); }

/// A member held by one of the library's limit states.
Model member(const char* state,
             const Shape& shape,
             const LoadCase& loads,
             std::optional<double> MemberMaterial::*property) {
  const LoadEffects effects = reduce(loads, 1.0);
  MemberLimits limits;
  limits.deflection = 1e-3;
  limits.twist = 1e-3;
  return {[shape](double x, double density) { return density * shape(x).area; },
          [=](double x, double value, double density) {
            MemberMaterial material;
            material.rho = density;
            material.*property = value;
            const SectionProperties section = shape(x);
            return limit_state(state)->utilisation({section, material, effects, limits, 1.0, 1.0});
          }};
}

Model stiff_beam(const Shape& shape) {
  return member("deflection", shape, cantilever({force(100.0, 1.0)}), &MemberMaterial::E);
}

Model strong(const Shape& shape, const InternalForces& forces) {
  LoadCase loads;
  loads.direct = forces;
  return member("yield", shape, loads, &MemberMaterial::sigma_y);
}

/// F L / (E A) against a stretch of 0.1 %.
Model stiff_tie() {
  return {[](double x, double density) { return density * similar(x).area; },
          [](double x, double E, double) { return 100.0 / (E * similar(x).area) / 1e-3; }};
}

/// A round tube of radius x with a wall that is fixed and thin against it (Bredt).
Model thin_shaft(bool stiffness) {
  constexpr double wall = 1e-4;
  Model model;
  model.mass = [](double x, double density) { return density * 2.0 * pi * x * wall; };
  if (stiffness) {
    model.limit = [](double x, double G, double) {
      return 100.0 / (G * bredt_torsion_constant(pi * x * x, wall, 2.0 * pi * x)) / 1e-3;
    };
  } else {
    model.limit = [](double x, double strength, double) {
      return bredt_shear_stress(100.0, pi * x * x, wall) / strength;
    };
  }
  return model;
}

/// A wide plate between its unloaded edges, free thickness x: sigma_cr = 4 pi^2 E / (12 (1 - nu^2))
/// (x / b)^2 with b = 1 m and nu = 0.3, against the stress N / x of 100 kN a metre.
Model compressed_plate() {
  return {[](double x, double density) { return density * x; },
          [](double x, double E, double) {
            return 1e5 / x / (4.0 * pi * pi * E / (12.0 * 0.91) * x * x);
          }};
}

/// A cylinder of radius 1 m under 1 MPa, free wall x: hoop strain p r / (E x) against 0.1 %.
Model pressure_vessel() {
  return {[](double x, double density) { return density * 2.0 * pi * x; },
          [](double x, double E, double) { return 1e6 / (E * x) / 1e-3; }};
}

/// A disc of radius 0.5 m and free thickness x that must store 1 MJ, as fast as that asks:
/// sigma = (3 + nu) / 8 rho omega^2 R^2 in its centre, U = m R^2 omega^2 / 4.
Model flywheel() {
  const auto mass = [](double x, double density) { return density * pi * 0.25 * x; };
  return {mass, [=](double x, double strength, double density) {
            const double speed_2 = 4.0 * 1e6 / mass(x, density);  // (omega R)^2
            return 3.3 / 8.0 * density * speed_2 / strength;
          }};
}

Model model_of(const std::string& function) {
  const auto has = [&](const char* word) { return function.find(word) != std::string::npos; };
  InternalForces bending;
  bending.M_y = 100.0;
  InternalForces torsion;
  torsion.T = 100.0;
  InternalForces compression;
  compression.N = -1000.0;
  if (has("tie, stiffness")) {
    return stiff_tie();
  }
  if (has("pressure vessel")) {
    return pressure_vessel();
  }
  if (has("flywheel")) {
    return flywheel();
  }
  if (has("in-plane compression")) {
    return compressed_plate();
  }
  if (has("crushing")) {
    return strong(similar, compression);
  }
  if (has("wall fixed")) {
    return thin_shaft(has("stiffness"));
  }
  if (has("shaft")) {
    return has("stiffness")
               ? member("twist", similar, cantilever({torque(100.0, 1.0)}), &MemberMaterial::G)
               : strong(similar, torsion);
  }
  const Shape shape = has("panel")          ? panel
                      : has("width fixed")  ? width_fixed
                      : has("height fixed") ? height_fixed
                                            : similar;
  if (!has("panel") && !has("beam")) {
    throw std::runtime_error("no model for " + function);
  }
  return has("stiffness") ? stiff_beam(shape) : strong(shape, bending);
}

SectionProperties section_of(const std::string& name) {
  if (name == "solid square") {
    return solid_square(0.020);
  }
  if (name == "tube 60x2") {
    return round_tube(0.060, 0.002, Forming::unknown);
  }
  return name == "IPE 200" ? i_section(0.200, 0.100, 0.0056, 0.0085, 0.012)
                           : i_section(0.600, 0.220, 0.012, 0.019, 0.024);  // IPE 600
}

Answers shape_answers(const Check& check) {
  if (check.expected.count("mass_ratio_same_stiffness") != 0) {
    const double phi = bending_shape_factor(check["A"], check["I"], ShapeReference::solid_square);
    // The mass of a beam that is as stiff goes with I / A^2 to the power of the beam's exponent.
    const double exponent = sized(stiff_beam(similar), 200e9, 7850.0).exponent;
    return {{"phi_Be_square", phi},
            {"mass_ratio_same_stiffness", 1.0 / material_index(phi, exponent, 1.0)}};
  }
  const SectionProperties section = section_of(check.words.at("section"));
  const ShapeFactors circle = shape_factors(section, ShapeReference::solid_circle);
  const ShapeFactors square = shape_factors(section, ShapeReference::solid_square);
  return {{"phi_Be_circle", circle.bending_stiffness},
          {"phi_Te_circle", circle.torsion_stiffness},
          {"phi_Bf_circle", circle.bending_strength},
          {"phi_Tf_circle", circle.torsion_strength},
          {"phi_Be_square", square.bending_stiffness},
          {"phi_Te_square", square.torsion_stiffness},
          {"phi_Bf_square", square.bending_strength},
          {"phi_Tf_square", square.torsion_strength}};
}

/// A rod of width x and thickness alpha x: fatigue of its area, and buckling in its weak plane.
Answers connecting_rod(const Check& check) {
  const double F = check["F"];
  const double L = check["L"];
  const double alpha = check["alpha"];
  const Shape shape = [alpha](double x) { return solid_rectangle(x, alpha * x); };
  const auto mass = [&](double x, double density) {
    return check["beta"] * density * shape(x).area * L;
  };
  const Model fatigue = {
      mass, [&](double x, double strength, double) { return F / (shape(x).area * strength); }};
  const Model buckling = {mass, [&](double x, double E, double) {
                            return F / euler_critical_load(E, shape(x).I_z, L);
                          }};
  const double m1 = sized(fatigue, check["sigma_e"], check["rho"]).mass;
  const double m2 = sized(buckling, check["E"], check["rho"]).mass;
  return {{"m1_fatigue", m1}, {"m2_buckling", m2}, {"m_max", std::max(m1, m2)}};
}

Answers relative_masses(const Check& check) {
  const auto ratio = [&](const Model& model) {
    return sized(model, check["E"], check["rho"]).mass / sized(model, 210e9, 7850.0).mass;
  };
  return {{"tie", ratio(stiff_tie())},
          {"beam", ratio(stiff_beam(similar))},
          {"panel", ratio(stiff_beam(panel))}};
}

}  // namespace

std::optional<Answers> index_answers(const Check& check) {
  if (!starts_with(check.id, "SEL-")) {
    return std::nullopt;
  }
  if (check.words.count("section") != 0) {
    return shape_answers(check);
  }
  if (check.words.count("function") != 0) {
    const std::string& function = check.words.at("function");
    const bool strength = check.words.at("maximise").find("sigma") != std::string::npos;
    return Answers{{"x", sized(model_of(function), strength ? 200e6 : 100e9, 5000.0).exponent}};
  }
  if (check.expected.count("m_max") != 0) {
    return connecting_rod(check);
  }
  if (check.expected.count("P") != 0) {
    InternalForces torsion;
    torsion.T = 100.0;
    const double exponent = sized(strong(similar, torsion), 200e6, 5000.0).exponent;
    return Answers{{"P", material_index(check["tau_f"], exponent, check["rho"])}};
  }
  return relative_masses(check);
}

}  // namespace bismar::checks
