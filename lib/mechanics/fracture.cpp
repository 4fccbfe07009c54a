// SPDX-License-Identifier: MIT
#include <bismar/mechanics/fracture.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <optional>
#include <string_view>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// A fault unless 0 <= value < 1.
void require_share(FaultList& faults, std::string_view where, double value) {
  mechanics::require_not_negative(faults, where, value);
  if (std::isfinite(value) && value >= 1.0) {
    mechanics::add_out_of_range(faults, where, value, "below 1: the crack ends inside the part");
  }
}

void require_axis_ratio(FaultList& faults, std::string_view where, double value) {
  mechanics::require_positive(faults, where, value);
  if (std::isfinite(value) && value > 1.0) {
    mechanics::add_out_of_range(faults, where, value, "greater than 0 and at most 1");
  }
}

void require_at_most(FaultList& faults, std::string_view where, double value, double limit) {
  mechanics::require_not_negative(faults, where, value);
  // A ratio of two lengths that was meant to be the limit may miss it by rounding.
  if (std::isfinite(value) && value > limit * (1.0 + 1e-12)) {
    mechanics::add_out_of_range(
        faults, where, value, limit == 0.8 ? "between 0 and 0.8" : "between 0 and 0.5");
  }
}

void require_surface_crack(FaultList& faults, const SurfaceCrack& crack) {
  require_axis_ratio(faults, "crack.depth_to_half_length", crack.depth_to_half_length);
  require_at_most(faults, "crack.relative_depth", crack.relative_depth, 0.8);
  require_at_most(faults, "crack.relative_length", crack.relative_length, 0.5);
}

void require_angle(FaultList& faults, double angle) {
  mechanics::require_not_negative(faults, "angle", angle);
  if (std::isfinite(angle) && angle > pi / 2.0) {
    mechanics::add_out_of_range(faults, "angle", angle, "between 0 and pi / 2");
  }
}

/// Complete elliptic integral of the second kind by the arithmetic-geometric mean of 1 and k':
/// E = K (1 - sum 2^(n-1) c_n^2), K = pi / 2M. `complement` is k' = sqrt(1 - k^2), > 0.
double complete_elliptic_integral(double complement) {
  double a = 1.0;
  double b = complement;
  double weight = 0.5;
  double sum = weight * (1.0 - complement) * (1.0 + complement);
  // The difference squares in each step: 12 steps are enough for any positive double.
  for (int step = 0; step < 12 && a != b; ++step) {
    const double c = (a - b) / 2.0;
    const double mean = (a + b) / 2.0;
    b = std::sqrt(a * b);
    a = mean;
    weight *= 2.0;
    sum += weight * c * c;
  }
  return pi / (2.0 * a) * (1.0 - sum);
}

double factor_at(const SurfaceCrack& crack, double sine) {
  const double ac = crack.depth_to_half_length;
  const double at = crack.relative_depth;
  const double at2 = at * at;
  const double M1 = 1.13 - 0.09 * ac;
  const double M2 = -0.54 + 0.89 / (0.2 + ac);
  const double M3 = 0.5 - 1.0 / (0.65 + ac) + 14.0 * std::pow(1.0 - ac, 24);
  const double g = 1.0 + (0.1 + 0.35 * at2) * (1.0 - sine) * (1.0 - sine);
  const double sine2 = sine * sine;
  const double f_phi = std::sqrt(std::sqrt(ac * ac * (1.0 - sine2) + sine2));
  const double f_w = 1.0 / std::sqrt(std::cos(pi / 2.0 * crack.relative_length * std::sqrt(at)));
  return (M1 + at2 * (M2 + M3 * at2)) * g * f_phi * f_w /
         std::sqrt(1.0 + 1.464 * std::pow(ac, 1.65));
}

double bending_ratio_at(const SurfaceCrack& crack, double sine) {
  const double ac = crack.depth_to_half_length;
  const double at = crack.relative_depth;
  const double p = 0.2 + ac + 0.6 * at;
  const double G1 = -1.22 - 0.12 * ac;
  const double G2 = 0.55 - 1.05 * std::pow(ac, 0.75) + 0.47 * std::pow(ac, 1.5);
  const double H1 = 1.0 - 0.34 * at - 0.11 * ac * at;
  const double H2 = 1.0 + at * (G1 + G2 * at);
  return H1 + (H2 - H1) * std::pow(sine, p);
}

}  // namespace

double stress_intensity(double geometry_factor, double stress, double crack_length) {
  FaultList faults;
  mechanics::require_positive(faults, "geometry_factor", geometry_factor);
  mechanics::require_not_negative(faults, "stress", stress);
  mechanics::require_positive(faults, "crack_length", crack_length);
  faults.throw_if_any();
  return geometry_factor * stress * std::sqrt(pi * crack_length);
}

double centre_crack_factor(double relative_length, CentreCrackFormula formula) {
  FaultList faults;
  require_share(faults, "relative_length", relative_length);
  faults.throw_if_any();
  const double alpha = relative_length;
  const double secant = 1.0 / std::sqrt(std::cos(pi * alpha / 2.0));
  const double square = alpha * alpha;
  switch (formula) {
    case CentreCrackFormula::secant:
      return secant;
    case CentreCrackFormula::dowling:
      return (1.0 - 0.5 * alpha + 0.326 * square) / std::sqrt(1.0 - alpha);
    case CentreCrackFormula::tada:
      return (1.0 - 0.025 * square + 0.06 * square * square) * secant;
  }
  throw InternalError("centre crack without a formula");
}

double edge_crack_factor(double relative_depth, EdgeCrackFormula formula) {
  FaultList faults;
  require_share(faults, "relative_depth", relative_depth);
  faults.throw_if_any();
  const double alpha = relative_depth;
  switch (formula) {
    case EdgeCrackFormula::polynomial:
      return 1.12 + alpha * (-0.231 + alpha * (10.55 + alpha * (-21.72 + alpha * 30.39)));
    case EdgeCrackFormula::full_range:
      return 0.265 * std::pow(1.0 - alpha, 4) +
             (0.857 + 0.265 * alpha) / std::pow(1.0 - alpha, 1.5);
    case EdgeCrackFormula::tada: {
      const double x = pi * alpha / 2.0;
      const double root = alpha > 0.0 ? std::sqrt(std::tan(x) / x) : 1.0;
      return root * (0.752 + 2.02 * alpha + 0.37 * std::pow(1.0 - std::sin(x), 3)) / std::cos(x);
    }
  }
  throw InternalError("edge crack without a formula");
}

double edge_crack_bending_factor(double relative_depth) {
  FaultList faults;
  require_share(faults, "relative_depth", relative_depth);
  faults.throw_if_any();
  const double alpha = relative_depth;
  return 1.122 + alpha * (-1.40 + alpha * (7.33 + alpha * (-13.08 + alpha * 14.0)));
}

double penny_crack_factor() { return 2.0 / pi; }

EmbeddedEllipse embedded_ellipse_factors(double axis_ratio) {
  FaultList faults;
  require_axis_ratio(faults, "axis_ratio", axis_ratio);
  faults.throw_if_any();
  const double E = complete_elliptic_integral(axis_ratio);
  return {.phi_squared = E * E, .minor_end = 1.0 / E, .major_end = std::sqrt(axis_ratio) / E};
}

double crack_shape_parameter(double axis_ratio) {
  FaultList faults;
  require_axis_ratio(faults, "axis_ratio", axis_ratio);
  faults.throw_if_any();
  return 1.0 + 1.464 * std::pow(axis_ratio, 1.65);
}

double surface_crack_factor(const SurfaceCrack& crack, double angle) {
  FaultList faults;
  require_surface_crack(faults, crack);
  require_angle(faults, angle);
  faults.throw_if_any();
  return factor_at(crack, std::sin(angle));
}

double surface_crack_bending_ratio(const SurfaceCrack& crack, double angle) {
  FaultList faults;
  require_surface_crack(faults, crack);
  require_angle(faults, angle);
  faults.throw_if_any();
  return bending_ratio_at(crack, std::sin(angle));
}

std::array<FrontFactors, 19> surface_crack_front(const SurfaceCrack& crack) {
  FaultList faults;
  require_surface_crack(faults, crack);
  faults.throw_if_any();
  std::array<FrontFactors, 19> front{};
  for (std::size_t k = 0; k < front.size(); ++k) {
    const double share = static_cast<double>(k) / static_cast<double>(front.size() - 1);
    const double sine = std::sin(pi / 2.0 * share);
    const double F = factor_at(crack, sine);
    front[k] = {.tension = F, .bending = F * bending_ratio_at(crack, sine)};
  }
  return front;
}

double critical_crack_length(double toughness, double stress, double geometry_factor) {
  FaultList faults;
  mechanics::require_positive(faults, "toughness", toughness);
  mechanics::require_positive(faults, "stress", stress);
  mechanics::require_positive(faults, "geometry_factor", geometry_factor);
  faults.throw_if_any();
  const double root = toughness / (geometry_factor * stress);
  return root * root / pi;
}

std::optional<double> critical_crack_length(double toughness,
                                            double stress,
                                            double size,
                                            FunctionRef<double(double)> geometry_factor,
                                            double largest) {
  FaultList faults;
  mechanics::require_positive(faults, "toughness", toughness);
  mechanics::require_positive(faults, "stress", stress);
  mechanics::require_positive(faults, "size", size);
  require_axis_ratio(faults, "largest", largest);
  faults.throw_if_any();
  const auto share = [&](double alpha) {
    return geometry_factor(alpha) * stress * std::sqrt(pi * alpha * size) / toughness;
  };
  // Far below any crack that fractures: F is about 1 there, and K falls with the root of a.
  const double without_edge = critical_crack_length(toughness, stress, 1.0) / size;
  const double smallest = std::min(largest, without_edge) * 1e-6;
  const LimitBracket bracket = largest_feasible(share, smallest, largest);
  if (!bracket.x || !bracket.infeasible) {
    return std::nullopt;
  }
  return *bracket.x * size;
}

}  // namespace bismar
