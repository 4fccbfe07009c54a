// SPDX-License-Identifier: MIT
#include "job_reader.hpp"

#include <bismar/quantity/format.hpp>
#include <bismar/quantity/parse.hpp>

#include <algorithm>
#include <array>
#include <utility>

namespace bismar::detail {

namespace {

using Kind = JsonValue::Kind;

RangeEnd range_end_of(const std::string& word) {
  return word == "low"    ? RangeEnd::low
         : word == "mid"  ? RangeEnd::mid
         : word == "high" ? RangeEnd::high
                          : RangeEnd::geometric_mid;
}

}  // namespace

const JsonValue* JobReader::get(const JsonValue& object, std::string_view key) const {
  const JsonValue* value = object.find(key);
  return value != nullptr && checker_.good(*value) ? value : nullptr;
}

std::optional<double> JobReader::quantity(const JsonValue& value, QuantityKind kind) const {
  if (!checker_.good(value)) {
    return std::nullopt;
  }
  if (value.is(Kind::number)) {
    return value.number;
  }
  const Dimension dimension = dimension_of(kind);
  if (dimension.sixths(Base::currency) != 0 && !checker_.reads_money()) {
    return std::nullopt;
  }
  return parse_quantity(value.text, kind, &job_.rates);
}

std::optional<double> JobReader::quantity(const JsonValue& object,
                                          std::string_view key,
                                          QuantityKind kind) const {
  const JsonValue* value = get(object, key);
  return value == nullptr ? std::nullopt : quantity(*value, kind);
}

std::optional<std::string> JobReader::text(const JsonValue& object, std::string_view key) const {
  const JsonValue* value = get(object, key);
  return value == nullptr ? std::nullopt : std::optional<std::string>(value->text);
}

void JobReader::set(bool& target, const JsonValue& object, std::string_view key) const {
  if (const JsonValue* value = get(object, key); value != nullptr) {
    target = value->boolean;
  }
}

void JobReader::set(double& target,
                    const JsonValue& object,
                    std::string_view key,
                    QuantityKind kind) const {
  target = quantity(object, key, kind).value_or(target);
}

void JobReader::set(std::optional<double>& target,
                    const JsonValue& object,
                    std::string_view key,
                    QuantityKind kind) const {
  if (const std::optional<double> value = quantity(object, key, kind)) {
    target = value;
  }
}

std::vector<std::string> JobReader::names(const JsonValue& object,
                                          std::string_view key,
                                          std::string_view what,
                                          const Words& words) {
  std::vector<std::string> all;
  const JsonValue* list = get(object, key);
  if (list == nullptr) {
    return all;
  }
  for (const JsonValue& item : list->items) {
    if (!checker_.good(item)) {
      continue;
    }
    if (tables_read_ && std::find(words.begin(), words.end(), item.text) == words.end()) {
      checker_.add_unknown(item, what, words);
    } else if (std::find(all.begin(), all.end(), item.text) != all.end()) {
      checker_.add(Code::duplicate,
                   item,
                   item.text,
                   "each name once",
                   '"' + item.text + "\" stands twice in the list.");
    } else {
      all.push_back(item.text);
    }
  }
  return all;
}

void JobReader::read_title(const JsonValue& root) { job_.title = text(root, "title").value_or(""); }

void JobReader::read_settings(const JsonValue* value) {
  if (value == nullptr || !value->is(Kind::object)) {
    return;
  }
  Settings& settings = job_.settings;
  if (const std::optional<std::string> missing = text(*value, "missing")) {
    settings.missing = *missing == "exclude"        ? Missing::exclude
                       : *missing == "class median" ? Missing::class_median
                                                    : Missing::undecided;
  }
  if (const JsonValue* ends = get(*value, "range_ends"); ends != nullptr) {
    for (const JsonValue::Member& end : ends->members) {
      const std::optional<Property> known = property(end.key);
      if (known.has_value() && checker_.good(end.value)) {
        settings.range_ends[*known] = range_end_of(end.value.text);
      }
    }
  }
  if (const std::optional<std::string> end = text(*value, "route_end")) {
    settings.route_end = range_end_of(*end);
  }
  if (const std::optional<std::string> explain = text(*value, "explain")) {
    settings.explain = *explain == "full" ? Explain::full : Explain::front;
  }
  set(settings.epsilon, *value, "epsilon", QuantityKind::ratio);
  set(settings.delta, *value, "delta", QuantityKind::ratio);
  for (const auto& [key, largest] : {std::pair<std::string_view, double>{"epsilon", 0.1},
                                     std::pair<std::string_view, double>{"delta", 0.01}}) {
    const std::optional<double> read = quantity(*value, key, QuantityKind::ratio);
    if (read.has_value() && *read > largest) {
      const JsonValue& found = *value->find(key);
      const std::string most = format_number(largest);
      checker_.add(Code::out_of_range,
                   found,
                   shown(found),
                   "above 0, at most " + most,
                   shown(found) + " is too wide a margin. Write a number up to " + most + '.');
    }
  }
  set(settings.near, *value, "near", QuantityKind::ratio);
  set(settings.fold, *value, "fold", QuantityKind::ratio);
  set(settings.doubtful_sizes, *value, "doubtful_sizes");
  set(settings.kerf, *value, "kerf", QuantityKind::length);
  set(settings.machining_allowance, *value, "machining_allowance", QuantityKind::length);
  set(settings.scrap_credit, *value, "scrap_credit", QuantityKind::ratio);
  for (const std::string_view key : {"near", "fold", "scrap_credit"}) {
    const std::optional<double> share = quantity(*value, key, QuantityKind::ratio);
    if (share.has_value() && *share > 1.0) {
      const JsonValue& found = *value->find(key);
      checker_.add(Code::out_of_range,
                   found,
                   shown(found),
                   "0 to 1, or 0 % to 100 %",
                   shown(found) +
                       " is more than the whole. Write a fraction or a percentage, such "
                       "as 0.05 or \"5 %\".");
    }
  }
}

void JobReader::read_exchange(const JsonValue* value) {
  if (value == nullptr || !value->is(Kind::object) || !checker_.reads_money()) {
    return;
  }
  const JsonValue* mass = get(*value, "mass");
  if (mass == nullptr) {
    return;
  }
  const QuantityRange range = parse_range(mass->text, QuantityKind::price_per_mass, &job_.rates);
  if (!(range.low < range.high)) {
    checker_.add(Code::conflict,
                 *mass,
                 mass->text,
                 "a range with two different ends",
                 "the range of the exchange constant has no width. Write \"low..high\".");
    return;
  }
  job_.exchange = ExchangeRange{range.low, range.high};
}

}  // namespace bismar::detail
