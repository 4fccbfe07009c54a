// SPDX-License-Identifier: MIT
#include <bismar/mechanics/aluminium.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>

namespace bismar {

namespace {

struct WallConstants {
  double C1 = 0.0;
  double C2 = 0.0;
  double limit = 0.0;  ///< rho_c = 1 up to it.
};

WallConstants constants(const AluminiumWall& wall) {
  // A weld costs one class, and so does a temper that was not heat-treated.
  const int losses = (wall.class_a ? 0 : 1) + (wall.welded ? 1 : 0);
  switch (losses) {
    case 0:
      return wall.internal ? WallConstants{32.0, 220.0, 22.0} : WallConstants{10.0, 24.0, 6.0};
    case 1:
      return wall.internal ? WallConstants{29.0, 198.0, 18.0} : WallConstants{9.0, 20.0, 5.0};
    default:
      return wall.internal ? WallConstants{25.0, 150.0, 15.0} : WallConstants{8.0, 16.0, 4.0};
  }
}

}  // namespace

double aluminium_wall_factor(const AluminiumWall& wall, double ratio) {
  FaultList faults;
  mechanics::require_positive(faults, "ratio", ratio);
  faults.throw_if_any();
  const WallConstants c = constants(wall);
  return ratio <= c.limit ? 1.0 : std::min(1.0, c.C1 / ratio - c.C2 / (ratio * ratio));
}

double longitudinal_weld_factor(bool class_a, double slenderness, double area_share) {
  FaultList faults;
  mechanics::require_not_negative(faults, "slenderness", slenderness);
  mechanics::require_positive(faults, "area_share", area_share);
  if (area_share > 1.0) {
    mechanics::add_out_of_range(faults, "area_share", area_share, "at most 1");
  }
  faults.throw_if_any();
  const double lambda = slenderness;
  if (class_a) {
    return 1.0 - (1.0 - area_share) * std::pow(10.0, -lambda) -
           (0.05 + 0.1 * area_share) * std::pow(lambda, 1.3 * (1.0 - lambda));
  }
  return lambda <= 0.2 ? 1.0
                       : std::min(1.0,
                                  1.0 + 0.04 * std::pow(4.0 * lambda, 0.5 - lambda) -
                                      0.22 * std::pow(lambda, 1.4 * (1.0 - lambda)));
}

double weld_zone_factor(double zone, double parent) {
  FaultList faults;
  mechanics::require_positive(faults, "zone", zone);
  mechanics::require_positive(faults, "parent", parent);
  faults.throw_if_any();
  return zone / parent;
}

ColumnCurve aluminium_lateral_curve(bool compact) {
  return compact ? ColumnCurve{.alpha = 0.10, .lambda_0 = 0.6}
                 : ColumnCurve{.alpha = 0.20, .lambda_0 = 0.4};
}

}  // namespace bismar
