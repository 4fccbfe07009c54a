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

constexpr std::array<std::string_view, 8> family_names = {"solid round",
                                                          "solid square",
                                                          "solid rectangle",
                                                          "solid ellipse",
                                                          "round tube",
                                                          "rectangular tube",
                                                          "I section",
                                                          "channel"};

}  // namespace

double SectionProperties::i_y() const { return std::sqrt(I_y / area); }
double SectionProperties::i_z() const { return std::sqrt(I_z / area); }

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
