// SPDX-License-Identifier: MIT
#include <bismar/mechanics/lateral_torsional.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

void require_end_ratio(FaultList& faults, double end_ratio) {
  mechanics::require_finite(faults, "end_ratio", end_ratio);
  if (end_ratio < -1.0 || end_ratio > 1.0) {
    mechanics::add_out_of_range(faults, "end_ratio", end_ratio, "from -1 to 1");
  }
}

void require_quarters(const QuarterMoments& moments) {
  FaultList faults;
  mechanics::require_positive(faults, "moments.largest", moments.largest);
  const auto require = [&](const char* where, double value) {
    mechanics::require_finite(faults, where, value);
    if (std::abs(value) > moments.largest * (1.0 + 1e-9)) {
      mechanics::add_out_of_range(faults, where, value, "at most the largest moment");
    }
  };
  require("moments.quarter", moments.quarter);
  require("moments.middle", moments.middle);
  require("moments.three_quarters", moments.three_quarters);
  faults.throw_if_any();
}

bool is_rolled_i(const SectionProperties& section) {
  return section.family == SectionFamily::i_section && section.forming == Forming::hot_finished;
}

/// h = 2 b of a size table must stay on the line after unit conversion.
bool is_deep(const SectionProperties& section) {
  return section.height > 2.0 * section.width * (1.0 + 1e-9);
}

}  // namespace

MomentFactors uniform_moment_factors() { return {.C1 = 1.0, .C2 = 0.0}; }
MomentFactors uniform_load_factors() { return {.C1 = 1.127, .C2 = 0.454}; }
MomentFactors central_load_factors() { return {.C1 = 1.348, .C2 = 0.630}; }

double linear_moment_factor(double end_ratio) {
  FaultList faults;
  require_end_ratio(faults, end_ratio);
  faults.throw_if_any();
  return std::min(2.60, 1.77 - 1.04 * end_ratio + 0.27 * end_ratio * end_ratio);
}

double quarter_point_moment_factor(const QuarterMoments& moments) {
  require_quarters(moments);
  return 12.5 * moments.largest /
         (2.5 * moments.largest + 3.0 * std::abs(moments.quarter) + 4.0 * std::abs(moments.middle) +
          3.0 * std::abs(moments.three_quarters));
}

double quadratic_moment_factor(const QuarterMoments& moments) {
  require_quarters(moments);
  const double a = moments.quarter / moments.largest;
  const double b = moments.middle / moments.largest;
  const double c = moments.three_quarters / moments.largest;
  return std::sqrt(35.0 / (1.0 + 9.0 * a * a + 16.0 * b * b + 9.0 * c * c));
}

double elastic_critical_moment(const LateralTorsionalBeam& beam) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.youngs_modulus", beam.youngs_modulus);
  mechanics::require_positive(faults, "beam.shear_modulus", beam.shear_modulus);
  mechanics::require_positive(faults, "beam.I_z", beam.I_z);
  mechanics::require_positive(faults, "beam.I_t", beam.I_t);
  mechanics::require_not_negative(faults, "beam.I_w", beam.I_w);
  mechanics::require_positive(faults, "beam.length", beam.length);
  mechanics::require_positive(faults, "beam.k", beam.k);
  mechanics::require_positive(faults, "beam.k_w", beam.k_w);
  mechanics::require_positive(faults, "beam.factors.C1", beam.factors.C1);
  mechanics::require_not_negative(faults, "beam.factors.C2", beam.factors.C2);
  mechanics::require_finite(faults, "beam.load_height", beam.load_height);
  faults.throw_if_any();
  const double length = beam.k * beam.length;
  const double lateral = pi * pi * beam.youngs_modulus * beam.I_z / (length * length);
  const double ratio = beam.k / beam.k_w;
  const double held = ratio * ratio * beam.I_w / beam.I_z + beam.shear_modulus * beam.I_t / lateral;
  const double off = beam.factors.C2 * beam.load_height;
  const double root = std::sqrt(held + off * off);
  // root - off without cancellation where the load sits high.
  const double arm = off > 0.0 ? held / (root + off) : root - off;
  return beam.factors.C1 * lateral * arm;
}

double tee_critical_moment(double youngs_modulus,
                           double second_moment,
                           double torsion_constant,
                           double height,
                           double length) {
  FaultList faults;
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  mechanics::require_positive(faults, "second_moment", second_moment);
  mechanics::require_positive(faults, "torsion_constant", torsion_constant);
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "length", length);
  faults.throw_if_any();
  const double B = 2.3 * height / length * std::sqrt(second_moment / torsion_constant);
  // sqrt(1 + B^2) - B without cancellation.
  return 1.95 * youngs_modulus / length * std::sqrt(second_moment * torsion_constant) /
         (std::sqrt(1.0 + B * B) + B);
}

double lateral_torsional_slenderness(double modulus, double strength, double critical_moment) {
  FaultList faults;
  mechanics::require_positive(faults, "modulus", modulus);
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "critical_moment", critical_moment);
  faults.throw_if_any();
  return std::sqrt(modulus * strength / critical_moment);
}

BucklingCurve lateral_torsional_curve(const SectionProperties& section) {
  if (!is_rolled_i(section)) {
    return BucklingCurve::d;
  }
  return is_deep(section) ? BucklingCurve::b : BucklingCurve::a;
}

BucklingCurve rolled_lateral_torsional_curve(const SectionProperties& section) {
  if (!is_rolled_i(section)) {
    return BucklingCurve::d;
  }
  return is_deep(section) ? BucklingCurve::c : BucklingCurve::b;
}

double rolled_lateral_torsional_phi(BucklingCurve curve, double slenderness) {
  FaultList faults;
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  faults.throw_if_any();
  return 0.5 *
         (1.0 + steel_curve(curve).alpha * (slenderness - 0.4) + 0.75 * slenderness * slenderness);
}

double rolled_lateral_torsional_factor(BucklingCurve curve, double slenderness) {
  const double phi = rolled_lateral_torsional_phi(curve, slenderness);
  if (slenderness <= 0.4) {
    return 1.0;
  }
  const double square = slenderness * slenderness;
  const double chi = 1.0 / (phi + std::sqrt(std::max(0.0, phi * phi - 0.75 * square)));
  return std::min({1.0, 1.0 / square, chi});
}

double moment_shape_correction(double end_ratio) {
  FaultList faults;
  require_end_ratio(faults, end_ratio);
  faults.throw_if_any();
  return 1.0 / (1.33 - 0.33 * end_ratio);
}

double rolled_moment_divisor(double correction, double slenderness) {
  FaultList faults;
  mechanics::require_positive(faults, "correction", correction);
  if (correction > 1.0) {
    mechanics::add_out_of_range(faults, "correction", correction, "at most 1");
  }
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  faults.throw_if_any();
  const double off = slenderness - 0.8;
  return std::min(1.0, 1.0 - 0.5 * (1.0 - correction) * (1.0 - 2.0 * off * off));
}

double aisc_flexural_strength(const AmericanBeam& beam, double unbraced_length) {
  FaultList faults;
  mechanics::require_positive(faults, "beam.yield_strength", beam.yield_strength);
  mechanics::require_positive(faults, "beam.plastic_modulus", beam.plastic_modulus);
  mechanics::require_positive(faults, "beam.elastic_modulus", beam.elastic_modulus);
  mechanics::require_positive(faults, "beam.L_p", beam.L_p);
  mechanics::require_positive(faults, "beam.L_r", beam.L_r);
  mechanics::require_not_negative(faults, "unbraced_length", unbraced_length);
  if (beam.L_r <= beam.L_p) {
    mechanics::add_out_of_range(faults, "beam.L_r", beam.L_r, "above L_p");
  }
  if (!(beam.C_b >= 1.0)) {
    mechanics::add_out_of_range(faults, "beam.C_b", beam.C_b, "1 or above");
  }
  if (unbraced_length > beam.L_r) {
    mechanics::add_out_of_range(faults, "unbraced_length", unbraced_length, "at most L_r");
  }
  faults.throw_if_any();
  const double plastic = beam.yield_strength * beam.plastic_modulus;
  const double elastic = 0.7 * beam.yield_strength * beam.elastic_modulus;
  const double share = std::max(0.0, (unbraced_length - beam.L_p) / (beam.L_r - beam.L_p));
  return std::min(plastic, beam.C_b * (plastic - (plastic - elastic) * share));
}

}  // namespace bismar
