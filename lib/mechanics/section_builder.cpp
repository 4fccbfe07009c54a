// SPDX-License-Identifier: MIT
// The list of section families: a new one is an entry here beside its own file.
#include <bismar/mechanics/section_builder.hpp>

#include <bismar/error.hpp>

#include <array>
#include <cstddef>
#include <optional>
#include <span>
#include <string>

namespace bismar {

namespace {

using Dimensions = std::span<const std::optional<double>>;

double or_zero(const std::optional<double>& value) { return value.value_or(0.0); }

Corners corners_of(Forming forming) {
  return forming == Forming::hot_finished  ? Corners::en_10210
         : forming == Forming::cold_formed ? Corners::en_10219
                                           : Corners::sharp;
}

SectionProperties make_rectangular_tube(Dimensions d, Forming forming) {
  const std::optional<double>& outer = d[3];
  const std::optional<double>& inner = d[4];
  if (outer.has_value() != inner.has_value()) {
    throw Error({Code::missing,
                 outer ? "outer radius" : "inner radius",
                 {},
                 "both radii or none",
                 "outer and inner radius are given together or not at all."});
  }
  if (outer) {
    return rectangular_tube(*d[0], *d[1], *d[2], *outer, *inner, forming);
  }
  return rectangular_tube(*d[0], *d[1], *d[2], corners_of(forming), forming);
}

struct Family {
  SectionFamily family;
  std::array<SectionDimension, 6> names;
  std::size_t count;
  SectionProperties (*make)(Dimensions d, Forming forming);
};

constexpr SectionDimension height{"height"};
constexpr SectionDimension width{"width"};
constexpr SectionDimension wall{"wall"};
constexpr SectionDimension root{"root radius", true, false, true};

// clang-format off
const Family families[] = {
    {SectionFamily::solid_round, {{{"diameter"}}}, 1,
     [](Dimensions d, Forming) { return solid_round(*d[0]); }},
    {SectionFamily::solid_square, {{{"side"}}}, 1,
     [](Dimensions d, Forming) { return solid_square(*d[0]); }},
    {SectionFamily::solid_rectangle, {{height, width}}, 2,
     [](Dimensions d, Forming) { return solid_rectangle(*d[0], *d[1]); }},
    {SectionFamily::solid_ellipse, {{height, width}}, 2,
     [](Dimensions d, Forming) { return solid_ellipse(*d[0], *d[1]); }},
    {SectionFamily::solid_hexagon, {{{"width across flats"}}}, 1,
     [](Dimensions d, Forming) { return solid_hexagon(*d[0]); }},
    {SectionFamily::round_tube, {{{"diameter"}, wall}}, 2,
     [](Dimensions d, Forming forming) { return round_tube(*d[0], *d[1], forming); }},
    {SectionFamily::elliptical_tube, {{height, width, wall}}, 3,
     [](Dimensions d, Forming forming) { return elliptical_tube(*d[0], *d[1], *d[2], forming); }},
    {SectionFamily::rectangular_tube,
     {{height, width, wall, {"outer radius", true}, {"inner radius", true}}}, 5,
     make_rectangular_tube},
    {SectionFamily::i_section, {{height, width, {"web"}, {"flange"}, root}}, 5,
     [](Dimensions d, Forming) { return i_section(*d[0], *d[1], *d[2], *d[3], or_zero(d[4])); }},
    {SectionFamily::channel,
     {{height, width, {"web"}, {"flange"}, root, {"flange slope", true, true}}}, 6,
     [](Dimensions d, Forming) { return channel(*d[0], *d[1], *d[2], *d[3], or_zero(d[4]), or_zero(d[5])); }},
    {SectionFamily::tee, {{height, width, {"web"}, {"flange"}, root}}, 5,
     [](Dimensions d, Forming) { return tee(*d[0], *d[1], *d[2], *d[3], or_zero(d[4])); }},
    {SectionFamily::angle, {{height, width, wall, root, {"toe radius", true}}}, 5,
     [](Dimensions d, Forming) { return angle(*d[0], *d[1], *d[2], or_zero(d[3]), or_zero(d[4])); }},
    {SectionFamily::polygon, {}, 0, nullptr},
};
// clang-format on

const Family& entry(SectionFamily family) {
  for (const Family& one : families) {
    if (one.family == family) {
      return one;
    }
  }
  throw InternalError("section family without an entry in the list");
}

}  // namespace

std::span<const SectionDimension> dimensions(SectionFamily family) {
  const Family& one = entry(family);
  return {one.names.data(), one.count};
}

SectionProperties make_section(SectionFamily family, Dimensions d, Forming forming) {
  const Family& one = entry(family);
  bool complete = one.make != nullptr && d.size() == one.count;
  for (std::size_t i = 0; complete && i < one.count; ++i) {
    complete = one.names[i].optional || d[i].has_value();
  }
  if (!complete) {
    throw InternalError("make_section: dimensions are missing for a " + std::string(name(family)));
  }
  SectionProperties section = one.make(d, forming);
  if (forming != Forming::unknown) {
    section.forming = forming;
  }
  return section;
}

}  // namespace bismar
