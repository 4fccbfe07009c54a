// SPDX-License-Identifier: MIT
#include "mechanics/load_case.hpp"

#include "mechanics/arguments.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <span>
#include <string>
#include <vector>

namespace bismar::mechanics {

namespace {

/// A station may miss L by this much after unit conversion; it is then taken as L.
constexpr double end_slack = 1e-12;

void check_station(FaultList& faults, const std::string& where, double x, double length) {
  require_not_negative(faults, where, x);
  if (std::isfinite(x) && std::isfinite(length) && length > 0.0 && x > length * (1.0 + end_slack)) {
    add_out_of_range(faults, where, x, "a place on the member, between 0 and its length");
  }
}

void check_load(FaultList& faults, const std::string& where, const Load& load, double length) {
  require_finite(faults, where + "/value", load.value);
  if (load.kind == Load::Kind::axial) {
    return;
  }
  check_station(faults, where + "/at", load.at, length);
  if (load.kind == Load::Kind::distributed) {
    require_finite(faults, where + "/value_to", load.value_to);
    check_station(faults, where + "/to", load.to, length);
    if (std::isfinite(load.at) && std::isfinite(load.to) && load.to <= load.at) {
      add_out_of_range(
          faults, where + "/to", load.to, "greater than the place where the load begins");
    }
  }
}

void check_second_support(FaultList& faults, const LoadCase& load_case, double length) {
  if (!load_case.second_support) {
    return;
  }
  const double x = *load_case.second_support;
  // Two supports on one place would be a clamp with boundless reactions.
  constexpr double shortest_span = 1e-6;
  require_positive(faults, "/second_support", x);
  if (std::isfinite(x) && x > 0.0 && std::isfinite(length) && length > 0.0 &&
      (x > length * (1.0 + end_slack) || x < shortest_span * length)) {
    add_out_of_range(faults,
                     "/second_support",
                     x,
                     "a place on the member, beyond a millionth of its length and not "
                     "beyond its end");
  }
  if (!has_second_support(load_case.support_z) || !has_second_support(load_case.support_y)) {
    faults.add(Code::conflict,
               "/second_support",
               "Only a member that is pinned or fixed pinned in both planes can overhang a second "
               "support. Leave it out or change the supports.");
  }
}

void check_fatigue(FaultList& faults, const FatigueLoading& fatigue) {
  require_finite(faults, "/fatigue/cycles", fatigue.cycles);
  if (std::isfinite(fatigue.cycles) && fatigue.cycles < 1.0) {
    add_out_of_range(faults, "/fatigue/cycles", fatigue.cycles, "at least 1");
  }
  require_finite(faults, "/fatigue/stress_ratio", fatigue.stress_ratio);
  if (std::isfinite(fatigue.stress_ratio) && std::abs(fatigue.stress_ratio) > 1.0) {
    add_out_of_range(faults, "/fatigue/stress_ratio", fatigue.stress_ratio, "between -1 and 1");
  }
}

/// Own mass that is accelerated and a change of temperature are loads too.
bool has_load(const LoadCase& load_case) {
  return !load_case.loads.empty() || load_case.direct || load_case.acceleration_z != 0.0 ||
         load_case.acceleration_y != 0.0 || load_case.temperature_change != 0.0;
}

}  // namespace

void check_load_case(FaultList& faults, const LoadCase& load_case, double length) {
  require_positive(faults, "/length", length);
  if (!has_load(load_case)) {
    faults.add(Code::empty,
               "/loads",
               "The load case has no load; give at least one load or internal forces directly.");
  }
  for (std::size_t i = 0; i < load_case.loads.size(); ++i) {
    check_load(faults, "/loads/" + std::to_string(i), load_case.loads[i], length);
  }
  if (load_case.direct) {
    const InternalForces& f = *load_case.direct;
    require_finite(faults, "/direct/N", f.N);
    require_finite(faults, "/direct/V_y", f.V_y);
    require_finite(faults, "/direct/V_z", f.V_z);
    require_finite(faults, "/direct/M_y", f.M_y);
    require_finite(faults, "/direct/M_z", f.M_z);
    require_finite(faults, "/direct/T", f.T);
  }
  check_second_support(faults, load_case, length);
  require_finite(faults, "/acceleration_z", load_case.acceleration_z);
  require_finite(faults, "/acceleration_y", load_case.acceleration_y);
  if (load_case.eccentricity) {
    require_not_negative(faults, "/eccentricity", *load_case.eccentricity);
  }
  require_finite(faults, "/temperature_change", load_case.temperature_change);
  if (load_case.fatigue) {
    check_fatigue(faults, *load_case.fatigue);
  }
}

bool has_second_support(Support support) {
  return support == Support::pinned_pinned || support == Support::fixed_pinned;
}

std::vector<Load> loads_on_member(const LoadCase& load_case, double length) {
  std::vector<Load> loads = load_case.loads;
  for (Load& load : loads) {
    load.at = std::min(load.at, length);
    load.to = std::min(load.to, length);
  }
  return loads;
}

double second_support(const LoadCase& load_case, double length) {
  return std::min(load_case.second_support.value_or(length), length);
}

std::vector<double> load_stations(std::span<const Load> loads,
                                  double length,
                                  double second_support) {
  std::vector<double> stations = {0.0, length, second_support};
  for (const Load& load : loads) {
    if (load.kind != Load::Kind::axial) {
      stations.push_back(load.at);
    }
    if (load.kind == Load::Kind::distributed) {
      stations.push_back(load.to);
    }
  }
  std::sort(stations.begin(), stations.end());
  stations.erase(std::unique(stations.begin(), stations.end()), stations.end());
  return stations;
}

}  // namespace bismar::mechanics
