// SPDX-License-Identifier: MIT
#include <bismar/mechanics/cross_section_resistance.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

void require_axial(FaultList& faults, double axial) {
  mechanics::require_not_negative(faults, "axial", axial);
  if (axial > 1.0) {
    mechanics::add_out_of_range(faults, "axial", axial, "at most 1");
  }
}

void require_share(FaultList& faults, double share) {
  mechanics::require_not_negative(faults, "web_share", share);
  if (share > 0.5) {
    mechanics::add_out_of_range(faults, "web_share", share, "at most 0.5");
  }
}

}  // namespace

double bending_resistance(double modulus, double strength) {
  FaultList faults;
  mechanics::require_positive(faults, "modulus", modulus);
  mechanics::require_positive(faults, "strength", strength);
  faults.throw_if_any();
  return modulus * strength;
}

double plastic_shear_resistance(double shear_area, double yield_strength) {
  FaultList faults;
  mechanics::require_positive(faults, "shear_area", shear_area);
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  faults.throw_if_any();
  return shear_area * yield_strength / std::numbers::sqrt3;
}

double web_share(double area, double width, double flange) {
  FaultList faults;
  mechanics::require_positive(faults, "area", area);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "flange", flange);
  if (2.0 * width * flange > area) {
    mechanics::add_out_of_range(faults, "flange", flange, "such that the flanges are in the area");
  }
  faults.throw_if_any();
  return std::min(0.5, (area - 2.0 * width * flange) / area);
}

double plastic_moment_share_y(double axial, double web_share) {
  FaultList faults;
  require_axial(faults, axial);
  require_share(faults, web_share);
  faults.throw_if_any();
  return std::min(1.0, (1.0 - axial) / (1.0 - 0.5 * web_share));
}

double plastic_moment_share_z(double axial, double web_share) {
  FaultList faults;
  require_axial(faults, axial);
  require_share(faults, web_share);
  faults.throw_if_any();
  if (axial <= web_share) {
    return 1.0;
  }
  const double beyond = (axial - web_share) / (1.0 - web_share);
  return 1.0 - beyond * beyond;
}

double plastic_moment_share_round(double axial) {
  FaultList faults;
  require_axial(faults, axial);
  faults.throw_if_any();
  return 1.0 - std::pow(axial, 1.7);
}

BiaxialExponents biaxial_exponents_i(double axial) {
  FaultList faults;
  require_axial(faults, axial);
  faults.throw_if_any();
  return {.alpha = 2.0, .beta = std::max(1.0, 5.0 * axial)};
}

BiaxialExponents biaxial_exponents_tube(double axial) {
  FaultList faults;
  require_axial(faults, axial);
  faults.throw_if_any();
  const double rest = 1.0 - 1.13 * axial * axial;
  const double exponent = rest > 1.66 / 6.0 ? 1.66 / rest : 6.0;
  return {.alpha = exponent, .beta = exponent};
}

AmericanMinorAxis aisc_minor_axis_strength(double yield_strength,
                                           double youngs_modulus,
                                           double plastic_modulus,
                                           double elastic_modulus,
                                           double flange_slenderness) {
  FaultList faults;
  mechanics::require_positive(faults, "yield_strength", yield_strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  mechanics::require_positive(faults, "plastic_modulus", plastic_modulus);
  mechanics::require_positive(faults, "elastic_modulus", elastic_modulus);
  mechanics::require_positive(faults, "flange_slenderness", flange_slenderness);
  faults.throw_if_any();
  const double root = std::sqrt(youngs_modulus / yield_strength);
  AmericanMinorAxis result{.lambda_p = 0.38 * root, .lambda_r = 1.0 * root};
  const double plastic =
      std::min(yield_strength * plastic_modulus, 1.6 * yield_strength * elastic_modulus);
  if (flange_slenderness <= result.lambda_p) {
    result.strength = plastic;
  } else if (flange_slenderness <= result.lambda_r) {
    const double share =
        (flange_slenderness - result.lambda_p) / (result.lambda_r - result.lambda_p);
    result.strength = plastic - (plastic - 0.7 * yield_strength * elastic_modulus) * share;
  } else {
    result.strength =
        0.69 * youngs_modulus / (flange_slenderness * flange_slenderness) * elastic_modulus;
  }
  return result;
}

}  // namespace bismar
