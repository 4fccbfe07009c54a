// SPDX-License-Identifier: MIT
#include "job_reader.hpp"

#include <bismar/mechanics/section.hpp>
#include <bismar/quantity/parse.hpp>

#include <algorithm>
#include <set>
#include <utility>

namespace bismar::detail {

namespace {

using Kind = JsonValue::Kind;

std::vector<std::string_view> sorted(const std::set<std::string_view>& words) {
  return {words.begin(), words.end()};
}

}  // namespace

void JobReader::collect_words() {
  const Catalogue& catalogue = job_.catalogue;
  std::set<std::string_view> classes;
  std::set<std::string_view> processes;
  std::set<std::string_view> forms;
  std::set<std::string_view> media;
  for (std::size_t i = 0; i < catalogue.materials.size(); ++i) {
    const MaterialInfo& info = catalogue.materials.info(i);
    words_.materials.push_back(info.id);
    classes.insert(info.material_class);
    processes.insert(info.processes.begin(), info.processes.end());
    forms.insert(info.forms.begin(), info.forms.end());
    for (const auto& [medium, rating] : info.corrosion) {
      media.insert(medium);
    }
  }
  for (const Finish& finish : catalogue.finishes) {
    words_.finishes.push_back(finish.id);
    for (const auto& [medium, rating] : finish.corrosion_after) {
      media.insert(medium);
    }
  }
  if (job_.catalogue.find_finish("none") == nullptr) {
    words_.finishes.push_back("none");  // a bare part needs no table
  }
  for (const Route& route : catalogue.routes) {
    if (route.kind == RouteKind::primary) {
      words_.routes.push_back(route.id);
    }
  }
  for (const Operation& operation : catalogue.operations) {
    words_.operations.push_back(operation.id);
  }
  for (const StockList& list : catalogue.stock) {
    if (!list.sheet) {
      words_.stock.push_back(list.id);
    }
  }
  words_.classes = sorted(classes);
  words_.processes = sorted(processes);
  words_.forms = sorted(forms);
  words_.media = sorted(media);
}

void JobReader::read_parts(const JsonValue* value) {
  if (value == nullptr || !value->is(Kind::list)) {
    return;
  }
  collect_words();
  for (std::size_t i = 0; i < value->items.size(); ++i) {
    const JsonValue& item = value->items[i];
    if (!item.is(Kind::object)) {
      continue;
    }
    Part part = read_part(item);
    const bool repeated = std::any_of(job_.parts.begin(), job_.parts.end(), [&](const Part& other) {
      return other.name == part.name;
    });
    if (const JsonValue* name = get(item, "name"); name != nullptr && repeated) {
      checker_.add(Code::duplicate,
                   *name,
                   part.name,
                   "a name of its own",
                   "another part is called \"" + part.name + "\" too. Give each its own name.");
    }
    job_.parts.push_back(std::move(part));
  }
}

Part JobReader::read_part(const JsonValue& value) {
  Part part;
  part.name = text(value, "name").value_or("");
  set(part.quantity, value, "quantity", QuantityKind::count);
  set(part.batch, value, "batch", QuantityKind::count);
  const JsonValue* whole = value.find("quantity");
  const bool quantity_is_known = whole == nullptr || checker_.good(*whole);
  if (const JsonValue* batch = get(value, "batch"); batch != nullptr && quantity_is_known &&
                                                    part.batch.has_value() &&
                                                    *part.batch > part.quantity) {
    checker_.add(Code::conflict,
                 *batch,
                 shown(*batch),
                 "at most the quantity",
                 "the batch is larger than the quantity. Leave it out to make all at once.");
  }
  if (const JsonValue* member = get(value, "member"); member != nullptr) {
    read_member(*member, part.body);
  }
  if (const JsonValue* limits = get(value, "limits"); limits != nullptr) {
    read_limits(*limits, part.limits);
  }
  if (get(value, "finishes") != nullptr) {
    part.finishes = names(value, "finishes", "finish", words_.finishes);
  }
  read_operations(get(value, "operations"), part);
  if (const JsonValue* climate = get(value, "service_class"); climate != nullptr) {
    part.service_class = climate->number == 2.0 ? ServiceClass::two : ServiceClass::one;
  }
  return part;
}

void JobReader::read_limits(const JsonValue& value, Limits& limits) {
  set(limits.deflection, value, "deflection", QuantityKind::length);
  set(limits.shear_deflection, value, "shear_deflection");
  set(limits.rotation, value, "rotation", QuantityKind::angle);
  set(limits.twist, value, "twist", QuantityKind::angle);
  set(limits.frequency, value, "frequency", QuantityKind::frequency);
  set(limits.elongation, value, "elongation", QuantityKind::length);
  set(limits.height, value, "height", QuantityKind::length);
  set(limits.width, value, "width", QuantityKind::length);
  set(limits.wall, value, "wall", QuantityKind::length);
  set(limits.slenderness, value, "slenderness", QuantityKind::ratio);
  if (const std::optional<std::string> method = text(value, "column_method")) {
    limits.column_method = *method == "euler"     ? ColumnMethod::euler
                           : *method == "johnson" ? ColumnMethod::johnson
                                                  : ColumnMethod::curves;
  }
  set(limits.lateral_restraint, value, "lateral_restraint");
  set(limits.mass, value, "mass", QuantityKind::mass);
  set(limits.cost, value, "cost", QuantityKind::money);
  limits.routes = names(value, "routes", "primary route", words_.routes);
  limits.forbidden_routes = names(value, "forbidden_routes", "primary route", words_.routes);
  limits.processes = names(value, "processes", "process of a material", words_.processes);
  limits.forms = names(value, "forms", "form of a material", words_.forms);
  limits.classes = names(value, "classes", "material class", words_.classes);
  limits.materials = names(value, "materials", "material", words_.materials);
  Words materials_and_classes = words_.classes;
  materials_and_classes.insert(
      materials_and_classes.end(), words_.materials.begin(), words_.materials.end());
  limits.forbidden_materials =
      names(value, "forbidden_materials", "material or material class", materials_and_classes);
  if (const JsonValue* list = get(value, "properties"); list != nullptr) {
    for (const JsonValue& item : list->items) {
      read_property_limit(item, limits);
    }
  }
  if (const JsonValue* medium = get(value, "medium"); medium != nullptr) {
    if (tables_read_ &&
        std::find(words_.media.begin(), words_.media.end(), medium->text) == words_.media.end()) {
      checker_.add_unknown(*medium, "medium for which the tables have ratings", words_.media);
    }
    limits.medium = medium->text;
  }
  if (const std::optional<std::string> rating = text(value, "corrosion_at_least")) {
    limits.corrosion_at_least = *rating == "good"   ? Rating::good
                                : *rating == "fair" ? Rating::fair
                                                    : Rating::poor;
    if (value.find("medium") == nullptr) {
      const JsonValue& bound = *value.find("corrosion_at_least");
      checker_.add(Code::missing,
                   bound,
                   bound.text,
                   "a medium beside it",
                   "a rating needs its \"medium\", such as \"fresh water\".");
    }
  }
  set(limits.temperature, value, "temperature", QuantityKind::temperature);
  set(limits.allow_brittle, value, "allow_brittle");
  set(limits.allow_hard, value, "allow_hard");
}

void JobReader::read_property_limit(const JsonValue& value, Limits& limits) {
  const std::optional<std::string> name =
      value.is(Kind::object) ? text(value, "property") : std::nullopt;
  if (!name.has_value()) {
    return;
  }
  // Own columns are named with their unit, "hardness HV [1]"; a limit names the part in front.
  Words words;
  for (const PropertyInfo& known : properties()) {
    words.push_back(known.name);
  }
  const std::vector<std::string> extras = job_.catalogue.materials.extra_names();
  std::optional<std::string> unit;
  for (const std::string& extra : extras) {
    const Header header = split_header(extra);
    words.push_back(extra);
    if (extra == *name || header.name == *name) {
      unit = header.unit.value_or("");
    }
  }
  if (const std::optional<Property> known = property(*name)) {
    unit = std::string(bismar::info(*known).unit);
  }
  if (!unit.has_value()) {
    if (tables_read_) {
      checker_.add_unknown(*value.find("property"), "property", words);
    }
    return;
  }
  PropertyLimit limit;
  limit.property = *name;
  if (const JsonValue* bound = get(value, "at_least"); bound != nullptr) {
    limit.at_least = property_value(*bound, *unit);
  }
  if (const JsonValue* bound = get(value, "at_most"); bound != nullptr) {
    limit.at_most = property_value(*bound, *unit);
  }
  if (value.find("at_least") == nullptr && value.find("at_most") == nullptr) {
    checker_.add(Code::missing,
                 value,
                 "",
                 "at_least or at_most",
                 "the limit has no bound. Give \"at_least\", \"at_most\" or both.");
  }
  if (limit.at_least.has_value() && limit.at_most.has_value() && *limit.at_least > *limit.at_most) {
    checker_.add(Code::conflict,
                 value,
                 *name,
                 "at_least not above at_most",
                 "\"at_least\" is above \"at_most\": no material can hold both.");
  }
  limits.properties.push_back(std::move(limit));
}

/// A bound in the dimension of the property; a temperature may be written in degC.
std::optional<double> JobReader::property_value(const JsonValue& value, const std::string& unit) {
  try {
    const Unit own = parse_unit(unit.empty() ? "1" : unit, &job_.rates);
    if (value.is(Kind::number)) {
      if (own.bases != 0) {
        checker_.add(Code::unit_missing,
                     value,
                     value.text,
                     "a text with a unit such as " + unit,
                     "the number " + value.text + " has no unit. Write it as a text with a unit " +
                         "such as " + unit + '.');
        return std::nullopt;
      }
      return value.number;
    }
    return own.role == TemperatureRole::absolute
               ? parse_quantity(value.text, QuantityKind::temperature)
               : parse_quantity(value.text, own.dimension, &job_.rates);
  } catch (const Error& error) {
    checker_.append(error, value);
    return std::nullopt;
  }
}

void JobReader::read_operations(const JsonValue* value, Part& part) {
  if (value == nullptr) {
    return;
  }
  for (const JsonValue& item : value->items) {
    if (!item.is(Kind::object)) {
      continue;
    }
    OperationUse use;
    const JsonValue* name = get(item, "operation");
    if (name == nullptr) {
      continue;
    }
    use.operation = name->text;
    if (tables_read_ && job_.catalogue.find_operation(use.operation) == nullptr) {
      checker_.add_unknown(*name, "operation of the catalogue", words_.operations);
    }
    set(use.units, item, "units", QuantityKind::ratio);
    part.operations.push_back(std::move(use));
  }
}

}  // namespace bismar::detail
