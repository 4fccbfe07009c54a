// SPDX-License-Identifier: MIT
#include <bismar/mechanics/timber.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>

namespace bismar {

double modification_factor(int service_class, LoadDuration duration) {
  FaultList faults;
  if (service_class < 1 || service_class > 3) {
    mechanics::add_out_of_range(faults, "service_class", service_class, "1, 2 or 3");
  }
  faults.throw_if_any();
  const bool outside = service_class == 3;
  switch (duration) {
    case LoadDuration::permanent:
      return outside ? 0.50 : 0.60;
    case LoadDuration::long_term:
      return outside ? 0.55 : 0.70;
    case LoadDuration::medium_term:
      return outside ? 0.65 : 0.80;
    case LoadDuration::short_term:
      return outside ? 0.70 : 0.90;
    case LoadDuration::instantaneous:
      return outside ? 0.90 : 1.10;
  }
  throw InternalError("load duration without a factor");
}

double size_factor(TimberKind kind, double depth) {
  FaultList faults;
  mechanics::require_positive(faults, "depth", depth);
  faults.throw_if_any();
  const bool solid = kind == TimberKind::solid;
  const double rise = solid ? std::min(std::pow(0.150 / depth, 0.2), 1.3)
                            : std::min(std::pow(0.600 / depth, 0.1), 1.1);
  return std::max(1.0, rise);
}

double timber_critical_bending_stress(double width,
                                      double height,
                                      double modulus,
                                      double effective_length) {
  FaultList faults;
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "modulus", modulus);
  mechanics::require_positive(faults, "effective_length", effective_length);
  faults.throw_if_any();
  return 0.78 * width * width * modulus / (height * effective_length);
}

double lateral_buckling_factor(double slenderness) {
  FaultList faults;
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  faults.throw_if_any();
  if (slenderness <= 0.75) {
    return 1.0;
  }
  return slenderness <= 1.4 ? 1.56 - 0.75 * slenderness : 1.0 / (slenderness * slenderness);
}

double lateral_length_factor(TimberLoad load) {
  switch (load) {
    case TimberLoad::uniform_moment:
      return 1.0;
    case TimberLoad::uniform_load:
      return 0.9;
    case TimberLoad::central_load:
      return 0.8;
  }
  throw InternalError("timber load without an effective length");
}

TimberSums timber_column_sums(const TimberShares& shares, double k_m) {
  FaultList faults;
  mechanics::require_not_negative(faults, "shares.axial_y", shares.axial_y);
  mechanics::require_not_negative(faults, "shares.axial_z", shares.axial_z);
  mechanics::require_not_negative(faults, "shares.moment_y", shares.moment_y);
  mechanics::require_not_negative(faults, "shares.moment_z", shares.moment_z);
  mechanics::require_positive(faults, "k_m", k_m);
  faults.throw_if_any();
  return {.about_y = shares.axial_y + shares.moment_y + k_m * shares.moment_z,
          .about_z = shares.axial_z + k_m * shares.moment_y + shares.moment_z};
}

}  // namespace bismar
