// SPDX-License-Identifier: MIT
#include <bismar/mechanics/wall.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <cmath>

namespace bismar {

double wall_epsilon(double strength, double youngs_modulus) {
  FaultList faults;
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  faults.throw_if_any();
  return std::sqrt(235e6 / strength * (youngs_modulus / 210e9));
}

double class_3_limit(PlateElement::Kind kind, double epsilon) {
  FaultList faults;
  mechanics::require_positive(faults, "epsilon", epsilon);
  faults.throw_if_any();
  switch (kind) {
    case PlateElement::Kind::internal_compression:
      return 42.0 * epsilon;
    case PlateElement::Kind::internal_bending:
      return 124.0 * epsilon;
    case PlateElement::Kind::outstand:
      return 14.0 * epsilon;
    case PlateElement::Kind::round:
      return 90.0 * epsilon * epsilon;
  }
  throw InternalError("plate element without a wall limit");
}

double aluminium_wall_epsilon(double strength) {
  FaultList faults;
  mechanics::require_positive(faults, "strength", strength);
  faults.throw_if_any();
  return std::sqrt(250e6 / strength);
}

double aluminium_class_3_limit(PlateElement::Kind kind, double epsilon, bool class_a) {
  FaultList faults;
  mechanics::require_positive(faults, "epsilon", epsilon);
  faults.throw_if_any();
  const double internal = (class_a ? 22.0 : 18.0) * epsilon;
  switch (kind) {
    case PlateElement::Kind::internal_compression:
      return internal;
    case PlateElement::Kind::internal_bending:
      return internal / 0.40;
    case PlateElement::Kind::outstand:
      return (class_a ? 6.0 : 5.0) * epsilon;
    case PlateElement::Kind::round:
      return internal / 3.0 * (internal / 3.0);
  }
  throw InternalError("plate element without a wall limit");
}

}  // namespace bismar
