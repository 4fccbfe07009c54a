// SPDX-License-Identifier: MIT
#include <bismar/mechanics/corrosion.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <array>
#include <cmath>
#include <optional>
#include <span>
#include <string_view>

namespace bismar {

double anodic_index_limit(GalvanicEnvironment environment) {
  switch (environment) {
    case GalvanicEnvironment::harsh:
      return 0.15;
    case GalvanicEnvironment::normal:
      return 0.25;
    case GalvanicEnvironment::controlled:
      return 0.50;
  }
  throw InternalError("environment without a limit");
}

bool galvanic_pair_accepted(double a, double b, GalvanicEnvironment environment) {
  FaultList faults;
  mechanics::require_finite(faults, "a", a);
  mechanics::require_finite(faults, "b", b);
  faults.throw_if_any();
  constexpr double slack = 1e-9;
  return std::abs(a - b) <= anodic_index_limit(environment) + slack;
}

std::span<const AnodicGroup> anodic_groups() {
  static constexpr std::array<AnodicGroup, 19> groups = {{
      {"gold, gold-platinum", 0.0, true},
      {"rhodium plated on silver-plated copper", 0.05, true},
      {"silver, high nickel-copper alloys", 0.15, true},
      {"nickel, titanium and alloys", 0.30, true},
      {"copper, low brasses or bronzes, silver solder, nickel-chromium alloys", 0.35, true},
      {"brass and bronzes", 0.40, true},
      {"high brasses and bronzes", 0.45, true},
      {"18 % chromium corrosion-resistant steel", 0.50, true},
      {"chromium plated, tin plated, 12 % chromium steel", 0.60, true},
      {"tin-plate, tin-lead solder", 0.65, true},
      {"lead", 0.70, true},
      {"2000 series wrought aluminium", 0.75, true},
      {"iron, plain carbon and low alloy steel", 0.85, false},
      {"other wrought aluminium, cast silicon aluminium", 0.90, false},
      {"other cast aluminium, cadmium", 0.95, false},
      {"hot-dip zinc plate, galvanized steel", 1.20, false},
      {"wrought zinc, zinc die castings, zinc plating", 1.25, false},
      {"magnesium and alloys", 1.75, false},
      {"beryllium", 1.85, false},
  }};
  return groups;
}

std::optional<double> anodic_index(std::string_view metals) {
  for (const AnodicGroup& group : anodic_groups()) {
    if (group.metals == metals) {
      return group.index;
    }
  }
  return std::nullopt;
}

}  // namespace bismar
