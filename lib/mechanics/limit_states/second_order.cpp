// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/second_order.hpp"

#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/column.hpp>

#include <algorithm>
#include <limits>
#include <string>
#include <vector>

namespace bismar::mechanics {

namespace {

/// Which planes the loads and own mass bend.
struct Bent {
  bool about_y = false;
  bool about_z = false;
};

Bent bent(const LoadEffects& effects) {
  Bent result;
  for (const Station& station : effects.stations) {
    result.about_y = result.about_y || station.forces.M_y != 0.0 || station.own.M_y != 0.0;
    result.about_z = result.about_z || station.forces.M_z != 0.0 || station.own.M_z != 0.0;
  }
  return result;
}

/// No moment stays none, whatever raises it.
void raise(double& moment, double factor) {
  if (moment != 0.0) {
    moment *= factor;
  }
}

std::string rise(const char* moment, const Amplification& a, double compression) {
  return std::string(moment) + " by 1 / (1 - " + kilonewtons(compression) + " / " +
         kilonewtons(a.critical) + ") = " + number(a.factor());
}

}  // namespace

double Amplification::factor() const {
  return share < 1.0 ? 1.0 / (1.0 - share) : std::numeric_limits<double>::infinity();
}

double Amplification::range_factor(double stress_ratio) const {
  return factor() / (1.0 - std::min(share, 1.0) * std::max(0.0, stress_ratio));
}

bool is_amplified(const LoadEffects& effects) { return effects.compression > 0.0 && effects.bends; }

Amplifications amplifications(const CheckInput& input) {
  Amplifications result;
  if (!is_amplified(input.effects)) {
    return result;
  }
  const SectionProperties& s = input.section;
  const double L_y = input.effects.buckling_length_y;
  const double L_z = input.effects.buckling_length_z;
  const double E = needed(input.material.E, Symbol::E);
  const double N = input.factor * input.effects.compression;
  if (s.I_yz != 0.0) {
    result.y.critical = result.z.critical = euler_critical_load(E, s.I_v(), std::max(L_y, L_z));
  } else {
    result.y.critical = euler_critical_load(E, s.I_y, L_y);
    result.z.critical = euler_critical_load(E, s.I_z, L_z);
  }
  result.y.share = N / result.y.critical;
  result.z.share = N / result.z.critical;
  const Bent planes = bent(input.effects);
  result.unstable =
      (planes.about_y && !(result.y.share < 1.0)) || (planes.about_z && !(result.z.share < 1.0));
  return result;
}

InternalForces amplified_forces(const CheckInput& input,
                                const Station& station,
                                const Amplifications& raised) {
  InternalForces forces = acting_forces(input, station);
  raise(forces.M_y, raised.y.factor());
  raise(forces.M_z, raised.z.factor());
  return forces;
}

InternalForces amplified_range_forces(const CheckInput& input,
                                      const Station& station,
                                      const Amplifications& raised,
                                      double stress_ratio) {
  InternalForces forces = acting_forces(input, station);
  raise(forces.M_y, raised.y.range_factor(stress_ratio));
  raise(forces.M_z, raised.z.range_factor(stress_ratio));
  return forces;
}

void add_amplification_step(const Amplifications& raised,
                            const CheckInput& input,
                            std::vector<std::string>& steps) {
  if (!is_amplified(input.effects)) {
    return;
  }
  const double N = input.factor * input.effects.compression;
  const Bent planes = bent(input.effects);
  std::string step = "The factored compression raises the moments of first order: ";
  if (planes.about_y) {
    step += rise("M_y", raised.y, N);
  }
  if (planes.about_z) {
    step += (planes.about_y ? ", " : "") + rise("M_z", raised.z, N);
  }
  steps.push_back(step + ".");
}

Explanation unstable_explanation(const std::string& subject,
                                 const Amplifications& raised,
                                 const CheckInput& input) {
  const Bent planes = bent(input.effects);
  const bool about_y = planes.about_y && !(raised.y.share < 1.0);
  const double critical = about_y ? raised.y.critical : raised.z.critical;
  const double N = input.factor * input.effects.compression;
  Explanation text;
  text.line = subject + ": the factored compression " + kilonewtons(N) +
              " reaches N_cr = " + kilonewtons(critical) +
              ", the deflection grows without bound: u = infinity.";
  text.steps = {"A member that is bent about " + std::string(about_y ? "y" : "z") +
                " has moments of 1 / (1 - N / N_cr) times those of first order; " +
                number(input.factor) + " x " + kilonewtons(input.effects.compression) + " = " +
                kilonewtons(N) + " is not below N_cr."};
  return text;
}

}  // namespace bismar::mechanics
