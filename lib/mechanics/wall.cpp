// SPDX-License-Identifier: MIT
#include <bismar/mechanics/wall.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

double wall_epsilon(double strength, double youngs_modulus) {
  FaultList faults;
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  faults.throw_if_any();
  return std::sqrt(235e6 / strength * (youngs_modulus / 210e9));
}

double wall_class_limit(PlateElement::Kind kind, int wall_class, double epsilon) {
  FaultList faults;
  if (wall_class < 1 || wall_class > 3) {
    mechanics::add_out_of_range(faults, "wall_class", wall_class, "1, 2 or 3");
  }
  mechanics::require_positive(faults, "epsilon", epsilon);
  faults.throw_if_any();
  const auto of_class = [&](double first, double second, double third) {
    return wall_class == 1 ? first : wall_class == 2 ? second : third;
  };
  switch (kind) {
    case PlateElement::Kind::internal_compression:
      return of_class(33.0, 38.0, 42.0) * epsilon;
    case PlateElement::Kind::internal_bending:
      return of_class(72.0, 83.0, 124.0) * epsilon;
    case PlateElement::Kind::outstand:
      return of_class(9.0, 10.0, 14.0) * epsilon;
    case PlateElement::Kind::round:
      return of_class(50.0, 70.0, 90.0) * epsilon * epsilon;
  }
  throw InternalError("plate element without a wall limit");
}

double class_3_limit(PlateElement::Kind kind, double epsilon) {
  return wall_class_limit(kind, 3, epsilon);
}

int wall_class(PlateElement::Kind kind, double ratio, double epsilon) {
  FaultList faults;
  mechanics::require_positive(faults, "ratio", ratio);
  mechanics::require_positive(faults, "epsilon", epsilon);
  faults.throw_if_any();
  int result = 1;
  while (result < 4 && ratio > wall_class_limit(kind, result, epsilon) * (1.0 + 1e-12)) {
    ++result;
  }
  return result;
}

int section_class(const SectionProperties& section, double epsilon, bool compressed) {
  FaultList faults;
  mechanics::require_positive(faults, "epsilon", epsilon);
  faults.throw_if_any();
  int worst = 1;
  for (const PlateElement& plate : section.plates) {
    const bool web = plate.kind == PlateElement::Kind::internal_bending;
    const PlateElement::Kind kind =
        web && compressed ? PlateElement::Kind::internal_compression : plate.kind;
    // A wall all root radius has no flat part that could buckle.
    if (plate.ratio > 0.0) {
      worst = std::max(worst, wall_class(kind, plate.ratio, epsilon));
    }
  }
  return worst;
}

double acting_wall_epsilon(double epsilon, double strength, double stress) {
  FaultList faults;
  mechanics::require_positive(faults, "epsilon", epsilon);
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "stress", stress);
  faults.throw_if_any();
  return stress < strength ? epsilon * std::sqrt(strength / stress) : epsilon;
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

double web_shear_coefficient(WebEdges edges) { return edges == WebEdges::both_held ? 5.34 : 1.2; }

double web_shear_slenderness(WebEdges edges, double ratio, double strength, double youngs_modulus) {
  FaultList faults;
  mechanics::require_positive(faults, "ratio", ratio);
  mechanics::require_positive(faults, "strength", strength);
  mechanics::require_positive(faults, "youngs_modulus", youngs_modulus);
  faults.throw_if_any();
  constexpr double poisson = 0.3;
  constexpr double plate = std::numbers::pi * std::numbers::pi / (12.0 * (1.0 - poisson * poisson));
  return 0.76 * ratio *
         std::sqrt(strength / (web_shear_coefficient(edges) * plate * youngs_modulus));
}

double web_shear_factor(double slenderness) {
  FaultList faults;
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  faults.throw_if_any();
  constexpr double stocky = 0.83;
  return slenderness <= stocky ? 1.0 : stocky / slenderness;
}

}  // namespace bismar
