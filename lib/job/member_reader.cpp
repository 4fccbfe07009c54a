// SPDX-License-Identifier: MIT
#include "job_reader.hpp"
#include "member_words.hpp"

#include <bismar/quantity/parse.hpp>

#include <algorithm>
#include <set>
#include <utility>

namespace bismar::detail {

namespace {

using Kind = JsonValue::Kind;

}  // namespace

void JobReader::read_member(const JsonValue& value, Member& member) {
  set(member.length, value, "length", QuantityKind::length);
  const JsonValue* shapes = get(value, "shapes");
  const JsonValue* stock = get(value, "stock");
  if (value.find("shapes") == nullptr && value.find("stock") == nullptr) {
    checker_.add(Code::missing,
                 value,
                 "",
                 "shapes or stock",
                 "it is not said which sections to try. Give \"shapes\", \"stock\" or both.");
  }
  if (shapes != nullptr) {
    for (const JsonValue& shape : shapes->items) {
      read_shape(shape, member);
    }
  }
  if (stock != nullptr) {
    member.stock = stock->is(Kind::text) ? std::vector<std::string>{stock->text}
                                         : names(value, "stock", "stock list", words_.stock);
  }
  if (const JsonValue* cases = get(value, "load_cases"); cases != nullptr) {
    std::set<std::string> seen;
    for (const JsonValue& item : cases->items) {
      if (!item.is(Kind::object)) {
        continue;
      }
      LoadCase load_case;
      read_load_case(item, member, load_case);
      if (!seen.insert(load_case.name).second) {
        checker_.add(Code::duplicate,
                     item,
                     load_case.name,
                     "a name of its own",
                     "another load case is called \"" + load_case.name +
                         "\" too. Give each its own \"name\".");
      }
      member.load_cases.push_back(std::move(load_case));
    }
  }
  if (const JsonValue* details = get(value, "details"); details != nullptr) {
    read_details(*details, member.length, member.details);
  }
}

void JobReader::read_details(const JsonValue& value, double length, MemberDetails& details) {
  set(details.net_area, value, "net_area", QuantityKind::ratio);
  set(details.net_modulus, value, "net_modulus", QuantityKind::ratio);
  set(details.k_t_axial, value, "k_t_axial", QuantityKind::ratio);
  set(details.k_t_bending, value, "k_t_bending", QuantityKind::ratio);
  set(details.k_t_torsion, value, "k_t_torsion", QuantityKind::ratio);
  set(details.notch_radius, value, "notch_radius", QuantityKind::length);
  const auto word = [&](std::string_view key, const std::vector<std::string>& words) {
    const auto found = std::find(words.begin(), words.end(), text(value, key).value_or(""));
    return found == words.end() ? std::nullopt : std::optional(found - words.begin());
  };
  if (const auto surface = word("surface", surface_words())) {
    details.surface = static_cast<SurfaceFinish>(*surface);
  }
  if (const auto criterion = word("criterion", criterion_words())) {
    details.criterion = static_cast<FatigueCriterion>(*criterion);
  }
  set(details.reliability, value, "reliability", QuantityKind::ratio);
  set(details.detail_category, value, "detail_category", QuantityKind::stress);
  set(details.welded, value, "welded");
  if (const JsonValue* crack = get(value, "crack"); crack != nullptr) {
    Crack read;
    read.kind = text(*crack, "kind") == "surface" ? Crack::Kind::surface : Crack::Kind::edge;
    set(read.depth, *crack, "depth", QuantityKind::length);
    read.half_length = read.depth;
    set(read.half_length, *crack, "half_length", QuantityKind::length);
    details.crack = read;
  }
  if (const JsonValue* masses = get(value, "masses"); masses != nullptr) {
    for (const JsonValue& item : masses->items) {
      if (!item.is(Kind::object)) {
        continue;
      }
      AttachedMass mass;
      set(mass.mass, item, "mass", QuantityKind::mass);
      mass.at = station(item, "at", length).value_or(0.0);
      details.masses.push_back(mass);
    }
  }
}

namespace {

/// The ratio of a shape by its key there.
std::optional<Ratio>& ratio_field(Shape& shape, std::string_view key) {
  return key == "height_to_width"    ? shape.height_to_width
         : key == "web_to_height"    ? shape.web_to_height
         : key == "flange_to_height" ? shape.flange_to_height
                                     : shape.wall_to_height;
}

}  // namespace

void JobReader::read_shape(const JsonValue& value, Member& member) {
  if (!value.is(Kind::object) || !checker_.good(value)) {
    return;
  }
  for (const ShapeWords& words : shape_words()) {
    const JsonValue* options = get(value, words.tag);
    if (options == nullptr) {
      continue;
    }
    Shape shape;
    shape.family = words.family;
    for (const RatioWords& ratio : words.ratios) {
      if (ratio.free_key.empty()) {
        set(shape.root_radius_to_height, *options, ratio.key, QuantityKind::ratio);
      } else if (const JsonValue* given = get(*options, ratio.key); given != nullptr) {
        ratio_field(shape, ratio.free_key) = read_ratio(*given);
      }
    }
    if (const JsonValue* outline = get(*options, "outline"); outline != nullptr) {
      shape.outline = read_corners(*outline);
    }
    if (const JsonValue* holes = get(*options, "holes"); holes != nullptr) {
      for (const JsonValue& hole : holes->items) {
        shape.holes.push_back(read_corners(hole));
      }
    }
    if (const JsonValue* range = get(*options, words.size); range != nullptr) {
      const QuantityRange read = parse_range(range->text, QuantityKind::length);
      shape.height_min = read.low;
      shape.height_max = read.high;
    }
    read_sizes(get(*options, "sizes"), shape, shape.sizes);
    member.shapes.push_back(std::move(shape));
  }
}

Ratio JobReader::read_ratio(const JsonValue& value) {
  if (value.is(Kind::number)) {
    return value.number;
  }
  const QuantityRange read = parse_range(value.text, QuantityKind::ratio);
  return {read.low, read.high};
}

std::vector<SectionPoint> JobReader::read_corners(const JsonValue& value) {
  std::vector<SectionPoint> corners;
  for (const JsonValue& item : value.items) {
    if (item.items.size() != 2) {
      checker_.add(Code::out_of_range,
                   item,
                   "",
                   "two coordinates, [y, z]",
                   "a corner has two coordinates. Write it as [\"10 mm\", \"25 mm\"].");
      continue;
    }
    const std::optional<double> y = quantity(item.items[0], QuantityKind::length);
    const std::optional<double> z = quantity(item.items[1], QuantityKind::length);
    if (y.has_value() && z.has_value()) {
      corners.push_back({*y, *z});
    }
  }
  return corners;
}

void JobReader::read_sizes(const JsonValue* value, const Shape& shape, Sizes& sizes) {
  if (value == nullptr) {
    return;
  }
  if (value->is(Kind::text)) {
    sizes = value->text == "continuous" ? Sizes::any() : Sizes::preferred(value->text);
  } else if (value->is(Kind::object)) {
    if (const std::optional<double> step = quantity(*value, "step", QuantityKind::length)) {
      sizes = Sizes::multiples_of(*step);
    }
  } else {
    std::vector<double> list;
    for (const JsonValue& item : value->items) {
      const std::optional<double> size = quantity(item, QuantityKind::length);
      if (!size.has_value()) {
        continue;
      }
      if (*size < shape.height_min || *size > shape.height_max) {
        checker_.add(Code::out_of_range,
                     item,
                     item.text,
                     "a size within the bounds of the shape",
                     item.text +
                         " lies outside the bounds of the shape. Widen them or leave this "
                         "size out.");
      } else if (std::find(list.begin(), list.end(), *size) != list.end()) {
        checker_.add(Code::duplicate,
                     item,
                     item.text,
                     "each size once",
                     "the size " + item.text + " stands twice in the list.");
      } else {
        list.push_back(*size);
      }
    }
    sizes = Sizes::of(std::move(list));
  }
}

}  // namespace bismar::detail
