// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/moment_factor.hpp"

#include <bismar/mechanics/beam_column.hpp>

#include <cmath>

namespace bismar::mechanics {

bool at_most(const MomentShape& moment, double first, double second, double third) {
  const double largest = moment.largest * (1.0 + 1e-9);
  return std::abs(moment.quarters[0]) <= first * largest &&
         std::abs(moment.quarters[1]) <= second * largest &&
         std::abs(moment.quarters[2]) <= third * largest;
}

bool overhangs(const LoadEffects& effects, double length) {
  return effects.second_support && *effects.second_support < length * (1.0 - 1e-9);
}

double moment_factor(const MomentShape& moment, Support support, bool own_mass, bool overhang) {
  if (overhang) {
    return 1.0;
  }
  if (support == Support::cantilever) {
    return at_most(moment, 0.75, 0.5, 0.25) ? 0.9 : 1.0;
  }
  if (moment.end_ratio && !own_mass) {
    return equivalent_moment_factor(*moment.end_ratio);
  }
  if (!own_mass && at_most(moment, 0.5, 1.0, 0.5)) {
    return 0.9;
  }
  return at_most(moment, 0.75, 1.0, 0.75) ? 0.95 : 1.0;
}

}  // namespace bismar::mechanics
