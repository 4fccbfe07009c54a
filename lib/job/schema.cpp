// SPDX-License-Identifier: MIT
#include "format.hpp"

#include <bismar/error.hpp>
#include <bismar/job/job.hpp>
#include <bismar/quantity/kind.hpp>

#include <nlohmann/json.hpp>

#include <string>

namespace bismar {

namespace {

using detail::Format;
using detail::Key;
using Json = nlohmann::ordered_json;
using Type = Format::Type;

/// A number as `parse_number` reads it; a minus only where the sign is free.
std::string number_pattern(bool negative) {
  return std::string(negative ? "[+-]?" : "[+]?") +
         "([0-9]+[.]?[0-9]*|[.][0-9]+)([eE][+-]?[0-9]+)?";
}

/// Behind a number a unit begins with something that is no digit, sign or mark; it may be "1/K".
const std::string& unit_pattern() {
  static const std::string pattern = "[ \\t]*([^0-9 \\t.,+-]|1/).*";
  return pattern;
}

std::string quantity_pattern(const Format& format) {
  const std::string number = number_pattern(format.sign == detail::Sign::any);
  const bool plain = detail::takes_plain_number(format.kind);
  if (format.type == Type::range) {
    const std::string start = "^(?!.*[.][.][.])[ \\t]*" + number;  // three points are no mark
    const std::string dots = "[ \\t]*([.][.]|\xE2\x80\xA6)[ \\t]*";
    const std::string unit = "(" + unit_pattern() + ")?";
    // A unit may hold any character, points too: the order of the ends is the loader's business.
    return plain ? start + unit + "(" + dots + number + unit + ")?[ \\t]*$"
                 : start + unit + dots + number + unit_pattern() + "$";
  }
  return "^[ \\t]*" + number + (plain ? "(" + unit_pattern() + ")?" : unit_pattern()) + "$";
}

Json schema_of(const Format& format);

Json schema_of_keys(const std::vector<Key>& keys) {
  Json schema{{"type", "object"}};
  Json needed = Json::array();
  Json known = Json::object();
  for (const Key& key : keys) {
    known[key.name] = schema_of(*key.format);
    if (key.required) {
      needed.push_back(key.name);
    }
  }
  schema["properties"] = std::move(known);
  if (!needed.empty()) {
    schema["required"] = std::move(needed);
  }
  schema["additionalProperties"] = false;
  return schema;
}

Json schema_of_number(const Format& format) {
  Json number{{"type", format.kind == QuantityKind::count ? "integer" : "number"}};
  if (format.sign == detail::Sign::positive) {
    number["exclusiveMinimum"] = 0;
  } else if (format.sign == detail::Sign::not_negative) {
    number["minimum"] = 0;
  }
  return number;
}

Json schema_of_quantity(const Format& format) {
  Json text{{"type", "string"}, {"pattern", quantity_pattern(format)}};
  const bool ratio_range = format.type == Type::range && detail::takes_plain_number(format.kind);
  text["examples"] = {ratio_range ? "0.5..2" : std::string(example_of(format.kind))};
  if (!detail::takes_plain_number(format.kind)) {
    return text;
  }
  return Json{{"anyOf", {schema_of_number(format), std::move(text)}}};
}

Json schema_of_map(const Format& format) {
  Json schema{{"type", "object"}};
  if (format.words.empty()) {
    schema["patternProperties"][format.key_pattern] = schema_of(*format.item);
  } else {
    for (const std::string& word : format.words) {
      schema["properties"][word] = schema_of(*format.item);
    }
  }
  schema["additionalProperties"] = false;
  return schema;
}

Json bare_schema_of(const Format& format) {
  switch (format.type) {
    case Type::text:
      return {{"type", "string"}, {"pattern", "[^ \\t\\r\\n]"}};
    case Type::boolean:
      return {{"type", "boolean"}};
    case Type::whole:
      return {{"enum", format.numbers}};
    case Type::quantity:
    case Type::range:
      return schema_of_quantity(format);
    case Type::word:
      return {{"enum", format.words}};
    case Type::list:
      return {{"type", "array"}, {"minItems", 1}, {"items", schema_of(*format.item)}};
    case Type::object:
      return schema_of_keys(format.keys);
    case Type::map:
      return schema_of_map(format);
    case Type::tagged: {
      Json all = Json::array();
      for (const Format::Variant& variant : format.variants) {
        all.push_back(schema_of_keys(variant.keys));
      }
      return {{"oneOf", std::move(all)}};
    }
    case Type::any_of: {
      Json all = Json::array();
      for (const Format& alternative : format.alternatives) {
        all.push_back(schema_of(alternative));
      }
      return {{"anyOf", std::move(all)}};
    }
  }
  throw InternalError("format of no type");
}

Json schema_of(const Format& format) {
  Json schema = Json::object();
  if (!format.about.empty()) {
    schema["description"] = format.about;
  }
  schema.update(bare_schema_of(format));
  return schema;
}

}  // namespace

std::string job_schema() {
  Json schema{{"$schema", "http://json-schema.org/draft-07/schema#"}, {"title", "Bismar job"}};
  schema.update(schema_of(detail::job_format()));
  return schema.dump(2) + '\n';
}

}  // namespace bismar
