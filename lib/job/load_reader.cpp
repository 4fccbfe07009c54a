// SPDX-License-Identifier: MIT
#include "job_reader.hpp"

#include <bismar/mechanics/member.hpp>

#include <array>
#include <utility>

namespace bismar::detail {

namespace {

using Kind = JsonValue::Kind;

Support support_of(const std::string& word) {
  return word == "pinned"         ? Support::pinned_pinned
         : word == "fixed pinned" ? Support::fixed_pinned
         : word == "fixed"        ? Support::fixed_fixed
                                  : Support::cantilever;
}

constexpr double standard_gravity = 9.80665;  // [m/s^2], ISO 80000-3

}  // namespace

void JobReader::read_load_case(const JsonValue& value, const Member& member, LoadCase& load_case) {
  if (const std::optional<std::string> name = text(value, "name")) {
    load_case.name = *name;
  }
  if (const JsonValue* support = get(value, "support"); support != nullptr) {
    if (support->is(Kind::text)) {
      load_case.support_z = load_case.support_y = support_of(support->text);
    } else {
      load_case.support_z = support_of(text(*support, "z").value_or(""));
      load_case.support_y = support_of(text(*support, "y").value_or(""));
    }
  }
  if (get(value, "second_support") != nullptr) {
    load_case.second_support = station(value, "second_support", member.length);
  }
  read_own_mass(value, load_case);
  const bool own_mass = load_case.acceleration_z > 0.0 || load_case.acceleration_y > 0.0;
  if (value.find("loads") == nullptr && value.find("direct") == nullptr && !own_mass) {
    checker_.add(Code::missing,
                 value,
                 "",
                 "loads or direct",
                 "the load case has no load. Give \"loads\", \"direct\" or both.");
  }
  if (const JsonValue* loads = get(value, "loads"); loads != nullptr) {
    for (const JsonValue& load : loads->items) {
      if (load.is(Kind::object) && checker_.good(load)) {
        read_load(load, member.length, load_case);
      }
    }
  }
  if (const JsonValue* direct = get(value, "direct"); direct != nullptr) {
    InternalForces forces;
    set(forces.N, *direct, "N", QuantityKind::force);
    set(forces.V_y, *direct, "V_y", QuantityKind::force);
    set(forces.V_z, *direct, "V_z", QuantityKind::force);
    set(forces.M_y, *direct, "M_y", QuantityKind::moment);
    set(forces.M_z, *direct, "M_z", QuantityKind::moment);
    set(forces.T, *direct, "T", QuantityKind::moment);
    if (direct->members.empty()) {
      checker_.add(Code::empty,
                   *direct,
                   "{}",
                   "at least one of N, V_y, V_z, M_y, M_z, T",
                   "no force or moment is given. Give one of N, V_y, V_z, M_y, M_z, T.");
    }
    load_case.direct = forces;
  }
  if (const JsonValue* factors = get(value, "factors"); factors != nullptr) {
    for (const JsonValue::Member& factor : factors->members) {
      if (const auto number = quantity(factor.value, QuantityKind::ratio)) {
        load_case.factors[factor.key] = *number;
      }
    }
  }
  set(load_case.eccentricity, value, "eccentricity", QuantityKind::length);
  set(load_case.temperature_change,
      value,
      "temperature_change",
      QuantityKind::temperature_difference);
  set(load_case.restrained, value, "restrained");
  if (const JsonValue* fatigue = get(value, "fatigue"); fatigue != nullptr) {
    FatigueLoading loading;
    set(loading.cycles, *fatigue, "cycles", QuantityKind::count);
    set(loading.stress_ratio, *fatigue, "stress_ratio", QuantityKind::ratio);
    load_case.fatigue = loading;
  }
  set(load_case.duration, value, "duration", QuantityKind::time);
  set(load_case.hand_loaded, value, "hand_loaded");
  set(load_case.impact, value, "impact");
}

void JobReader::read_own_mass(const JsonValue& value, LoadCase& load_case) {
  bool weight = false;
  set(weight, value, "own_weight");
  if (weight) {
    load_case.acceleration_z = standard_gravity;
  }
  const JsonValue* acceleration = get(value, "acceleration");
  if (acceleration == nullptr) {
    return;
  }
  if (weight) {
    checker_.add(Code::conflict,
                 *acceleration,
                 "",
                 "own_weight or acceleration",
                 "the own weight is an acceleration too. Give \"own_weight\", or one "
                 "\"acceleration\" that has it in it.");
  }
  set(load_case.acceleration_z, *acceleration, "z", QuantityKind::acceleration);
  set(load_case.acceleration_y, *acceleration, "y", QuantityKind::acceleration);
}

std::optional<double> JobReader::station(const JsonValue& load,
                                         std::string_view key,
                                         double length) {
  const JsonValue* value = get(load, key);
  if (value == nullptr) {
    return std::nullopt;
  }
  if (value->text == "end") {
    return length;
  }
  if (value->text == "middle") {
    return 0.5 * length;
  }
  const std::optional<double> at = quantity(*value, QuantityKind::length);
  if (at.has_value() && length > 0.0 && *at > length) {
    checker_.add(Code::out_of_range,
                 *value,
                 value->text,
                 "a station on the member",
                 value->text + " lies beyond the end of the member.");
    return std::nullopt;
  }
  return at;
}

void JobReader::read_load(const JsonValue& value, double length, LoadCase& load_case) {
  Load load;
  load.along = text(value, "along") == "y" ? Along::y : Along::z;
  const double at = station(value, "at", length).value_or(0.0);
  load.at = at;
  if (const auto force = quantity(value, "force", QuantityKind::force)) {
    load.kind = Load::Kind::force;
    load.value = *force;
  } else if (const auto moment = quantity(value, "moment", QuantityKind::moment)) {
    load.kind = Load::Kind::moment;
    load.value = *moment;
  } else if (const auto torque = quantity(value, "torque", QuantityKind::moment)) {
    load.kind = Load::Kind::torque;
    load.value = *torque;
  } else if (const auto axial = quantity(value, "axial", QuantityKind::force)) {
    load.kind = Load::Kind::axial;
    load.value = *axial;
  } else if (const auto line = quantity(value, "distributed", QuantityKind::line_load)) {
    load.kind = Load::Kind::distributed;
    load.value = *line;
    load.value_to = quantity(value, "distributed_to", QuantityKind::line_load).value_or(*line);
    load.at = station(value, "from", length).value_or(0.0);
    load.to = station(value, "to", length).value_or(length);
    if (length > 0.0 && !(load.at < load.to)) {
      checker_.add(Code::conflict,
                   value,
                   "",
                   "from below to",
                   "the distributed load ends where it begins or before. \"from\" must lie before "
                   "\"to\".");
      return;
    }
  } else if (const JsonValue* bolt = get(value, "from_preload"); bolt != nullptr) {
    const auto preload = quantity(*bolt, "preload", QuantityKind::force);
    const auto diameter = quantity(*bolt, "diameter", QuantityKind::length);
    const auto factor = quantity(*bolt, "torque_factor", QuantityKind::ratio);
    if (!preload.has_value() || !diameter.has_value() || !factor.has_value()) {
      return;
    }
    if (const JsonValue* arm = get(value, "at"); arm != nullptr && !(at > 0.0)) {
      if (checker_.good(*arm)) {
        checker_.add(Code::out_of_range,
                     *arm,
                     arm->text,
                     "a station away from the start",
                     "a force at the start of the member makes no torque. Put it at the end.");
      }
      return;
    }
    if (!(at > 0.0)) {
      return;  // the station or the length is missing, a fault already
    }
    load.kind = Load::Kind::force;
    load.value = lever_force_from_preload(*factor, *preload, *diameter, at);
  } else {
    return;
  }
  load_case.loads.push_back(load);
}

}  // namespace bismar::detail
