// SPDX-License-Identifier: MIT
#include <bismar/mechanics/member.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <string>
#include <utility>
#include <vector>

namespace bismar {

Load force(double newtons, double at, Along along) {
  Load load;
  load.kind = Load::Kind::force;
  load.along = along;
  load.value = newtons;
  load.at = at;
  return load;
}

Load moment(double newton_metres, double at, Along along) {
  Load load;
  load.kind = Load::Kind::moment;
  load.along = along;
  load.value = newton_metres;
  load.at = at;
  return load;
}

Load distributed(double from_value, double to_value, double from, double to, Along along) {
  Load load;
  load.kind = Load::Kind::distributed;
  load.along = along;
  load.value = from_value;
  load.value_to = to_value;
  load.at = from;
  load.to = to;
  return load;
}

Load axial(double newtons) {
  Load load;
  load.kind = Load::Kind::axial;
  load.value = newtons;
  return load;
}

Load torque(double newton_metres, double at) {
  Load load;
  load.kind = Load::Kind::torque;
  load.value = newton_metres;
  load.at = at;
  return load;
}

double torque_from_preload(double torque_factor, double preload, double diameter) {
  FaultList faults;
  mechanics::require_positive(faults, "torque_factor", torque_factor);
  mechanics::require_positive(faults, "preload", preload);
  mechanics::require_positive(faults, "diameter", diameter);
  faults.throw_if_any();
  return torque_factor * preload * diameter;
}

double lever_force_from_preload(double torque_factor, double preload, double diameter, double arm) {
  FaultList faults;
  mechanics::require_positive(faults, "torque_factor", torque_factor);
  mechanics::require_positive(faults, "preload", preload);
  mechanics::require_positive(faults, "diameter", diameter);
  mechanics::require_positive(faults, "arm", arm);
  faults.throw_if_any();
  return torque_factor * preload * diameter / arm;
}

namespace {

LoadCase held_alike(Support support, std::vector<Load> loads, std::string name) {
  LoadCase load_case;
  load_case.name = std::move(name);
  load_case.support_z = load_case.support_y = support;
  load_case.loads = std::move(loads);
  return load_case;
}

}  // namespace

LoadCase cantilever(std::vector<Load> loads, std::string name) {
  return held_alike(Support::cantilever, std::move(loads), std::move(name));
}

LoadCase pinned_pinned(std::vector<Load> loads, std::string name) {
  return held_alike(Support::pinned_pinned, std::move(loads), std::move(name));
}

LoadCase fixed_pinned(std::vector<Load> loads, std::string name) {
  return held_alike(Support::fixed_pinned, std::move(loads), std::move(name));
}

LoadCase fixed_fixed(std::vector<Load> loads, std::string name) {
  return held_alike(Support::fixed_fixed, std::move(loads), std::move(name));
}

}  // namespace bismar
