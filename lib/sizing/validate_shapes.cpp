// SPDX-License-Identifier: MIT
#include "sizing/part_faults.hpp"
#include "sizing/shape_section.hpp"

#include <bismar/mechanics/section_builder.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/result.hpp>

#include <algorithm>
#include <cstddef>
#include <optional>
#include <span>
#include <string_view>

namespace bismar {

namespace {

/// The ratio that fixes a dimension of a shape.
struct RatioKey {
  std::string_view key;
  std::string_view dimension;
};
constexpr RatioKey ratio_keys[] = {{"height_to_width", "width"},
                                   {"wall_to_height", "wall"},
                                   {"web_to_height", "web"},
                                   {"flange_to_height", "flange"},
                                   {"root_radius_to_height", "root radius"}};

class ShapeCheck {
 public:
  ShapeCheck(const Part& part, PartFaults& faults) : part_(part), faults_(faults) {}

  void shapes() {
    if (part_.body.shapes.empty() && part_.body.stock.empty()) {
      faults_.fault(Code::empty,
                    "/member/shapes",
                    "",
                    "shapes or stock lists",
                    "The member has neither a shape nor a stock list to try. Name at least one, or "
                    "\"stock\": \"all\".");
    }
    for (std::size_t i = 0; i < part_.body.shapes.size(); ++i) {
      const std::string where = "/member/shapes/" + std::to_string(i);
      shape(part_.body.shapes[i], where);
      for (std::size_t j = 0; j < i; ++j) {
        if (part_.body.shapes[j] == part_.body.shapes[i]) {
          faults_.fault(
              Code::duplicate,
              where,
              std::string(name(part_.body.shapes[i].family)),
              "each once",
              "This shape stands twice with the same ratios and sizes; leave one of them out.");
        }
      }
    }
  }

 private:
  void shape(const Shape& shape, const std::string& where) {
    const std::size_t before = faults_.size();
    const std::string word(name(shape.family));
    const auto names = dimensions(shape.family);
    for (const auto& [key, dimension] : ratio_keys) {
      const bool known = std::any_of(
          names.begin(), names.end(), [&](const auto& one) { return one.name == dimension; });
      if (const auto given = given_ratio(shape, key)) {
        ratio(*given, where + "/" + std::string(key), key, known, word);
      }
    }
    root_radius(shape, where + "/root_radius_to_height", names, word);
    const bool bounds = faults_.positive(shape.height_min, where + "/height", "least height") &&
                        faults_.positive(shape.height_max, where + "/height", "largest height");
    if (bounds && shape.height_min >= shape.height_max) {
      faults_.fault(Code::conflict,
                    where + "/height",
                    "",
                    "least below largest",
                    "The least height must be below the largest one.");
    }
    if (bounds) {
      sizes(shape, where + "/sizes");
    }
    outline(shape, where);
    if (faults_.size() == before) {
      proportions(shape, where);
    }
  }

  /// A ratio as the shape gives it, one number or a range; the root radius is no ratio of this
  /// kind.
  static std::optional<Ratio> given_ratio(const Shape& shape, std::string_view key) {
    return key == "height_to_width"    ? shape.height_to_width
           : key == "wall_to_height"   ? shape.wall_to_height
           : key == "web_to_height"    ? shape.web_to_height
           : key == "flange_to_height" ? shape.flange_to_height
                                       : std::nullopt;
  }

  void no_such_ratio(const std::string& found,
                     const std::string& place,
                     std::string_view key,
                     const std::string& word) {
    faults_.fault(
        Code::conflict, place, found, "nothing", "A " + word + " has no " + std::string(key) + ".");
  }

  void ratio(const Ratio& given,
             const std::string& place,
             std::string_view key,
             bool known,
             const std::string& word) {
    const std::string found = plain(given.low) + (given.is_fixed() ? "" : ".." + plain(given.high));
    if (!known) {
      no_such_ratio(found, place, key, word);
    } else if (faults_.positive(given.low, place, std::string(key)) &&
               faults_.positive(given.high, place, std::string(key)) && given.low > given.high) {
      faults_.fault(Code::conflict,
                    place,
                    found,
                    "the smaller end first",
                    "The range of " + std::string(key) + " runs from high to low.");
    }
  }

  void root_radius(const Shape& shape,
                   const std::string& place,
                   std::span<const SectionDimension> names,
                   const std::string& word) {
    if (!shape.root_radius_to_height) {
      return;
    }
    const double given = *shape.root_radius_to_height;
    const std::string_view key = "root_radius_to_height";
    if (std::none_of(names.begin(), names.end(), [](const auto& one) {
          return one.name == "root radius";
        })) {
      no_such_ratio(plain(given), place, key, word);
    } else if (!(given >= 0.0 && std::isfinite(given))) {
      faults_.fault(Code::out_of_range,
                    place,
                    plain(given),
                    "zero or more",
                    "The ratio " + std::string(key) + " cannot be negative.");
    }
  }

  void outline(const Shape& shape, const std::string& where) {
    const bool polygon = shape.family == SectionFamily::polygon;
    if (polygon && shape.outline.empty()) {
      faults_.fault(
          Code::missing, where, "", "an outline", "A polygon needs the corners of its outline.");
    } else if (!polygon && (!shape.outline.empty() || !shape.holes.empty())) {
      faults_.fault(Code::conflict,
                    where + "/outline",
                    "",
                    "nothing",
                    "Only a polygon has an outline of its own.");
    }
  }

  /// The free dimensions at a height of 1 m that make a section wherever any do: every condition of
  /// a section asks for thin walls and a large width.
  static FreeSizes slenderest(const Shape& shape) {
    FreeSizes sizes{};
    std::size_t i = 0;
    for (const auto& [dimension, range] : free_dimensions(shape)) {
      sizes[i++] = dimension == "width" ? range.high : range.low;
    }
    return sizes;
  }

  /// Ratios that make no section: a wall without a bore, a flange beyond the width, an outline that
  /// crosses itself. Of a range some part must make one.
  void proportions(const Shape& shape, const std::string& where) {
    try {
      if (shape.family == SectionFamily::polygon) {
        check_outline(shape);
      } else {
        static_cast<void>(ShapeSections({&shape, 1}).at(0, Route{}, 1.0, slenderest(shape)));
      }
    } catch (const Error& error) {
      for (Fault fault : error.faults()) {
        if (fault.where == "wall" && is_tube(shape.family)) {
          fault.message = "The wall leaves no bore: wall_to_height is too large.";
          fault.where = "/wall_to_height";
        } else if (!fault.where.starts_with("/")) {
          // The section was made 1 m high: its dimensions are the ratios.
          const std::string key = ratio_key(fault.where);
          fault.message = (key.empty() ? "The " + fault.where : key) +
                          " does not fit the other ratios (at a height of 1 m: " + fault.message +
                          ")";
          fault.message += fault.message.ends_with(".)") ? "" : ".";
          fault.where = key.empty() ? "" : "/" + key;
        }
        fault.where.insert(0, where);
        faults_.add(std::move(fault));
      }
    }
  }

  /// The key of a dimension as a section's function names it, "root_radius"; empty for none.
  static std::string ratio_key(std::string dimension) {
    std::replace(dimension.begin(), dimension.end(), '_', ' ');
    if (dimension == "thickness") {
      dimension = "wall";  // of an angle
    }
    for (const auto& [key, name] : ratio_keys) {
      if (name == dimension) {
        return std::string(key);
      }
    }
    return {};
  }

  void sizes(const Shape& shape, const std::string& where) {
    const auto& sizes = shape.sizes;
    switch (sizes.kind) {
      case Sizes::Kind::continuous:
        return;
      case Sizes::Kind::step:
        if (faults_.positive(sizes.step, where + "/step", "size step") &&
            widest(shape) / sizes.step > 1e5) {
          faults_.fault(
              Code::out_of_range,
              where + "/step",
              plain(sizes.step),
              "a coarser step",
              "The step makes more than 100,000 sizes; take a coarser one or a smaller range.");
        } else if (sizes.step > 0.0 &&
                   std::floor(shape.height_max / sizes.step) * sizes.step < shape.height_min) {
          no_size(where);
        }
        return;
      case Sizes::Kind::series:
        try {
          if (preferred_numbers(sizes.series, shape.height_min, shape.height_max).empty()) {
            no_size(where);
          }
        } catch (const Error& error) {
          faults_.append(error, where);
        }
        return;
      case Sizes::Kind::list: {
        if (sizes.values.empty()) {
          faults_.fault(Code::empty, where, "", "at least one size", "The list of sizes is empty.");
          return;
        }
        bool any = false;
        for (std::size_t i = 0; i < sizes.values.size(); ++i) {
          if (faults_.positive(sizes.values[i], where + "/" + std::to_string(i), "size")) {
            any =
                any || (sizes.values[i] >= shape.height_min && sizes.values[i] <= shape.height_max);
          }
        }
        if (!any) {
          no_size(where);
        }
        return;
      }
    }
  }

  /// The widest span of a free size [m]: of the height, or of a free dimension over all heights.
  static double widest(const Shape& shape) {
    double span = shape.height_max - shape.height_min;
    for (const auto& [dimension, range] : free_dimensions(shape)) {
      const double own = range.high * shape.height_max - range.low * shape.height_min;
      span = std::isfinite(own) ? std::max(span, own) : span;  // otherwise the ratio has a fault
    }
    return span;
  }

  void no_size(const std::string& where) {
    faults_.fault(Code::conflict,
                  where,
                  "",
                  "a size inside the range of heights",
                  "None of the sizes lies in the range of heights.");
  }

  const Part& part_;
  PartFaults& faults_;
};

}  // namespace

void validate_shapes(const Part& part, PartFaults& faults) { ShapeCheck(part, faults).shapes(); }

}  // namespace bismar
