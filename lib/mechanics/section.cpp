// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include <bismar/error.hpp>

#include <array>
#include <cmath>
#include <cstddef>
#include <optional>
#include <string_view>

namespace bismar {

namespace {

constexpr std::array<std::string_view, 13> family_names = {"solid round",
                                                           "solid square",
                                                           "solid rectangle",
                                                           "solid ellipse",
                                                           "round tube",
                                                           "rectangular tube",
                                                           "I section",
                                                           "channel",
                                                           "solid hexagon",
                                                           "elliptical tube",
                                                           "T section",
                                                           "angle",
                                                           "polygon"};

}  // namespace

double SectionProperties::i_y() const { return std::sqrt(I_y / area); }
double SectionProperties::i_z() const { return std::sqrt(I_z / area); }

double SectionProperties::I_u() const {
  return (I_y + I_z) / 2.0 + std::hypot((I_y - I_z) / 2.0, I_yz);
}

double SectionProperties::I_v() const {
  // I_u I_v = I_y I_z - I_yz^2; the difference of near equals is avoided.
  return (I_y * I_z - I_yz * I_yz) / I_u();
}

double SectionProperties::principal_angle() const {
  return std::atan2(-2.0 * I_yz, I_y - I_z) / 2.0;
}

std::string_view name(SectionFamily family) {
  const auto index = static_cast<std::size_t>(family);
  if (index >= family_names.size()) {
    throw InternalError("section family without a name");
  }
  return family_names[index];
}

std::optional<SectionFamily> section_family(std::string_view name) {
  for (std::size_t i = 0; i < family_names.size(); ++i) {
    if (family_names[i] == name) {
      return static_cast<SectionFamily>(i);
    }
  }
  return std::nullopt;
}

}  // namespace bismar
