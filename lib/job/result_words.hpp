// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/sizing/result.hpp>

#include <array>
#include <optional>
#include <string_view>
#include <utility>

namespace bismar::detail {

/// The words of enumerations in stored results, both ways.
template <class Enum, std::size_t n>
using Words = std::array<std::pair<Enum, std::string_view>, n>;

inline constexpr Words<FunnelLine::Stage, 6> stage_words{{
    {FunnelLine::Stage::cannot_exist, "cannot exist"},
    {FunnelLine::Stage::undecided, "undecided"},
    {FunnelLine::Stage::infeasible, "infeasible"},
    {FunnelLine::Stage::not_better, "not better"},
    {FunnelLine::Stage::near, "near"},
    {FunnelLine::Stage::front, "front"},
}};
inline constexpr Words<Per, 4> per_words{{
    {Per::design, "design"},
    {Per::material, "material"},
    {Per::shape, "shape"},
    {Per::route, "route"},
}};
inline constexpr Words<Forming, 5> forming_words{{
    {Forming::unknown, "unknown"},
    {Forming::hot_finished, "hot finished"},
    {Forming::cold_formed, "cold formed"},
    {Forming::extruded, "extruded"},
    {Forming::sawn, "sawn"},
}};
inline constexpr Words<PlateElement::Kind, 4> plate_words{{
    {PlateElement::Kind::internal_compression, "internal compression"},
    {PlateElement::Kind::internal_bending, "internal bending"},
    {PlateElement::Kind::outstand, "outstand"},
    {PlateElement::Kind::round, "round"},
}};

template <class Enum, std::size_t n>
std::string_view word_of(const Words<Enum, n>& words, Enum value) {
  for (const auto& [known, word] : words) {
    if (known == value) {
      return word;
    }
  }
  throw InternalError("an enumeration without its word");
}

template <class Enum, std::size_t n>
std::optional<Enum> value_of(const Words<Enum, n>& words, std::string_view word) {
  for (const auto& [value, known] : words) {
    if (known == word) {
      return value;
    }
  }
  return std::nullopt;
}

/// The plain numbers of a section by name, in the order in which they are stored.
struct SectionNumber {
  std::string_view name;
  double SectionProperties::*field;
};
inline constexpr std::array<SectionNumber, 26> section_numbers{{
    {"height", &SectionProperties::height},
    {"width", &SectionProperties::width},
    {"wall", &SectionProperties::wall},
    {"ruling_dimension", &SectionProperties::ruling_dimension},
    {"perimeter", &SectionProperties::perimeter},
    {"inner_perimeter", &SectionProperties::inner_perimeter},
    {"area", &SectionProperties::area},
    {"I_y", &SectionProperties::I_y},
    {"I_z", &SectionProperties::I_z},
    {"I_yz", &SectionProperties::I_yz},
    {"W_el_y", &SectionProperties::W_el_y},
    {"W_el_z", &SectionProperties::W_el_z},
    {"W_pl_y", &SectionProperties::W_pl_y},
    {"W_pl_z", &SectionProperties::W_pl_z},
    {"I_t", &SectionProperties::I_t},
    {"W_t", &SectionProperties::W_t},
    {"I_w", &SectionProperties::I_w},
    {"y_shear", &SectionProperties::y_shear},
    {"z_shear", &SectionProperties::z_shear},
    {"A_v_y", &SectionProperties::A_v_y},
    {"A_v_z", &SectionProperties::A_v_z},
    {"A_s_y", &SectionProperties::A_s_y},
    {"A_s_z", &SectionProperties::A_s_z},
    {"A_v_flange", &SectionProperties::A_v_flange},
    {"junction_ratio", &SectionProperties::junction_ratio},
    {"A_v_junction", &SectionProperties::A_v_junction},
}};

}  // namespace bismar::detail
