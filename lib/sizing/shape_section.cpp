// SPDX-License-Identifier: MIT
#include "sizing/shape_section.hpp"

#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/polygon.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <utility>

namespace bismar {

namespace {

/// The ratio that the shape gives for a dimension, as its key has it (a width by h/b).
std::optional<Ratio> given_ratio(const Shape& shape, std::string_view dimension) {
  if (dimension == "width") {
    return shape.height_to_width;
  }
  if (dimension == "wall") {
    return shape.wall_to_height;
  }
  if (dimension == "web") {
    return shape.web_to_height;
  }
  if (dimension == "flange") {
    return shape.flange_to_height;
  }
  return dimension == "root radius" ? shape.root_radius_to_height : std::nullopt;
}

std::string_view key_of(std::string_view dimension) {
  return dimension == "width"  ? "height_to_width"
         : dimension == "wall" ? "wall_to_height"
         : dimension == "web"  ? "web_to_height"
                               : "flange_to_height";
}

}  // namespace

std::optional<double> ratio_of(const Shape& shape, std::string_view dimension) {
  const auto given = given_ratio(shape, dimension);
  if (!given || !given->is_fixed()) {
    return std::nullopt;
  }
  return dimension == "width" ? 1.0 / given->low : given->low;
}

Ratio ratio_range(const Shape& shape, std::string_view dimension) {
  const Ratio ratio =
      given_ratio(shape, dimension).value_or(default_ratio(shape.family, key_of(dimension)));
  return dimension == "width" ? Ratio(1.0 / ratio.high, 1.0 / ratio.low) : ratio;
}

Shape with_ratios(const Shape& shape, double height, const FreeSizes& free_sizes) {
  Shape out = shape;
  const auto free = free_dimensions(shape);
  for (std::size_t i = 0; i < free.size(); ++i) {
    const double ratio = free_sizes[i] / height;
    if (free[i].name == "width") {
      out.height_to_width = height / free_sizes[i];
    } else if (free[i].name == "wall") {
      out.wall_to_height = ratio;
    } else {
      (free[i].name == "web" ? out.web_to_height : out.flange_to_height) = ratio;
    }
  }
  return out;
}

std::vector<FreeSizes> sample_sizes(const Shape& shape) {
  const auto free = free_dimensions(shape);
  const std::size_t corners = std::size_t{1} << free.size();
  std::vector<FreeSizes> out;
  for (std::size_t corner = corners + 1; corner-- > 0;) {
    FreeSizes sizes{};
    for (std::size_t f = 0; f < free.size(); ++f) {
      const Ratio& range = free[f].to_height;
      sizes[f] = corner == corners            ? std::sqrt(range.low * range.high)
                 : ((corner >> f) & 1U) != 0U ? range.high
                                              : range.low;
    }
    try {
      static_cast<void>(ShapeSections({&shape, 1}).at(0, Route{}, 1.0, sizes));
      out.push_back(sizes);
    } catch (const Error&) {
      continue;
    }
  }
  return out;
}

FreeSizes middle_sizes(const Shape& shape) {
  const auto samples = sample_sizes(shape);
  if (samples.empty()) {
    throw InternalError("middle_sizes: no proportions of the shape make a section");
  }
  return samples.front();
}

bool may_be_usual(const SizesBox& box) {
  const auto& s = box.sizes;
  const auto within = [](const Interval& part, const Interval& whole, double low, double high) {
    return part.upper() >= low * whole.lower() && part.lower() <= high * whole.upper();
  };
  const auto smaller = [&] { return std::min(s[0].upper(), s[1].upper()); };
  switch (box.family) {
    case SectionFamily::rectangular_tube:
    case SectionFamily::elliptical_tube:
      return within(s[1], s[0], 1.0 / 16.0, 16.0);
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
      return within(s[1], s[0], 0.12, 2.5) && s[3].lower() <= 0.12 * smaller() &&
             within(s[2], s[3], 0.07, 1.5) && box.root_radius.lower() <= 1.6 * s[3].upper();
    case SectionFamily::angle:
      return within(s[1], s[0], 0.4, 2.5) && s[2].lower() <= 0.2 * smaller() &&
             box.root_radius.lower() <= s[2].upper();
    default:
      return true;
  }
}

double rough_area(const SizesBox& box) {
  // A wall as high as the section is part of every tube and profile; half of it to be safe, as the
  // walls of a round tube are bent.
  const auto& s = box.sizes;
  const bool round = box.family == SectionFamily::round_tube;
  const bool walls = s.size() > 2 || round;
  return 0.5 * s[0].lower() * (walls ? s[round ? 1 : 2].lower() : s.back().lower());
}

Forming forming_of(const Route& route) {
  if (contains_word(route.leaves, "welded tube")) {
    return Forming::cold_formed;
  }
  return contains_word(route.leaves, "tube") ? Forming::extruded : Forming::unknown;
}

namespace {

std::vector<SectionPoint> enlarged(const std::vector<SectionPoint>& points, double factor) {
  std::vector<SectionPoint> out;
  out.reserve(points.size());
  for (const SectionPoint& point : points) {
    out.push_back({point.y * factor, point.z * factor});
  }
  return out;
}

/// A polygon's points at height 1 m.
struct UnitOutline {
  std::vector<SectionPoint> outer;
  std::vector<std::vector<SectionPoint>> holes;
};

/// Points that have no height cannot be enlarged to one: they are left as they are where they have
/// faults of their own to tell.
UnitOutline unit_outline(const Shape& shape) {
  double low = std::numeric_limits<double>::infinity();
  double high = -low;
  for (const SectionPoint& point : shape.outline) {
    if (std::isfinite(point.z)) {
      low = std::min(low, point.z);
      high = std::max(high, point.z);
    }
  }
  const double height = high - low;  // -infinity where no z is a number
  const bool finite = std::isfinite(height) && std::isfinite(1.0 / height);
  if (height >= 0.0 && !finite && shape.outline.size() >= 3) {
    Fault fault;
    fault.code = Code::out_of_range;
    fault.where = "/outer";
    fault.found = plain(height) + " high";
    fault.allowed = "corners at different z";
    fault.message =
        "The outline is " + plain(height) +
        " high and cannot be enlarged to a size. A corner is [y, z], z along the height.";
    throw Error(std::move(fault));
  }
  const double factor = finite ? 1.0 / height : 1.0;
  UnitOutline unit;
  unit.outer = enlarged(shape.outline, factor);
  for (const auto& hole : shape.holes) {
    unit.holes.push_back(enlarged(hole, factor));
  }
  return unit;
}

/// Runs `f`; its faults get the places of a part.
template <class Function>
auto with_places(const std::string& where, Function f) {
  try {
    return f();
  } catch (const Error& error) {
    constexpr std::string_view outer = "/outer";
    FaultList faults;
    for (Fault fault : error.faults()) {
      if (fault.where.starts_with(outer)) {
        fault.where.replace(0, outer.size(), "/outline");
      }
      fault.where.insert(0, where);
      faults.add(std::move(fault));
    }
    faults.throw_if_any();
    throw;
  }
}

}  // namespace

void check_outline(const Shape& shape) {
  if (shape.family == SectionFamily::polygon) {
    with_places({}, [&] {
      const UnitOutline unit = unit_outline(shape);
      check_polygon(unit.outer, unit.holes);
    });
  }
}

ShapeSections::ShapeSections(std::span<const Shape> shapes) : shapes_(shapes) {
  for (std::size_t i = 0; i < shapes.size(); ++i) {
    polygons_.emplace_back();
    if (shapes[i].family == SectionFamily::polygon) {
      polygons_.back() = with_places("/member/shapes/" + std::to_string(i), [&] {
        const UnitOutline unit = unit_outline(shapes[i]);
        return polygon(unit.outer, unit.holes);
      });
    }
  }
}

SectionProperties ShapeSections::at(std::size_t index, const Route& route, double height) const {
  return at(index, route, height, {});
}

SectionProperties ShapeSections::at(std::size_t index,
                                    const Route& route,
                                    double height,
                                    const FreeSizes& free_sizes) const {
  const Shape& shape = shapes_[index];
  if (shape.family == SectionFamily::polygon) {
    return scaled(polygons_[index], height);
  }
  const auto names = dimensions(shape.family);
  std::vector<std::optional<double>> sizes(names.size());
  sizes[0] = height;
  std::size_t free = 0;
  for (std::size_t i = 1; i < names.size(); ++i) {
    if (const auto ratio = ratio_of(shape, names[i].name)) {
      sizes[i] = *ratio * height;
    } else if (!names[i].optional) {
      sizes[i] = free_sizes[free++];
    }
  }
  return make_section(shape.family, sizes, forming_of(route));
}

}  // namespace bismar
