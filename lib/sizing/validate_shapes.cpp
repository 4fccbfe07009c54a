// SPDX-License-Identifier: MIT
#include "sizing/part_faults.hpp"
#include "sizing/shape_section.hpp"

#include <bismar/mechanics/section_builder.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
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
      const auto known = std::find_if(
          names.begin(), names.end(), [&](const auto& one) { return one.name == dimension; });
      ratio(shape, where, key, dimension, known == names.end() ? nullptr : &*known, word);
    }
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

  void ratio(const Shape& shape,
             const std::string& where,
             std::string_view key,
             std::string_view dimension,
             const SectionDimension* known,
             const std::string& word) {
    const auto value =
        key == "height_to_width" ? shape.height_to_width : ratio_of(shape, dimension);
    const std::string place = where + "/" + std::string(key);
    if (value && known == nullptr) {
      faults_.fault(Code::conflict,
                    place,
                    plain(*value),
                    "nothing",
                    "A " + word + " has no " + std::string(key) + ".");
    } else if (value && !known->optional) {
      faults_.positive(*value, place, std::string(key));
    } else if (value && !(*value >= 0.0 && std::isfinite(*value))) {
      faults_.fault(Code::out_of_range,
                    place,
                    plain(*value),
                    "zero or more",
                    "The ratio " + std::string(key) + " cannot be negative.");
    } else if (!value && known != nullptr && !known->optional) {
      faults_.fault(
          Code::unsupported,
          where,
          "",
          "a fixed " + std::string(key),
          "A " + word + " without " + std::string(key) +
              " has two or more free sizes, which needs a solver that proves its bounds; this "
              "version does not have it. Fix the ratio \"" +
              std::string(key) + "\", or give several shapes with different ratios.");
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

  /// Ratios that make no section: a wall without a bore, a flange beyond the width, an outline that
  /// crosses itself.
  void proportions(const Shape& shape, const std::string& where) {
    try {
      if (shape.family == SectionFamily::polygon) {
        check_outline(shape);
      } else {
        static_cast<void>(ShapeSections({&shape, 1}).at(0, Route{}, 1.0));
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
            (shape.height_max - shape.height_min) / sizes.step > 1e5) {
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
