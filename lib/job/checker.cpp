// SPDX-License-Identifier: MIT
#include "checker.hpp"

#include <bismar/quantity/parse.hpp>

#include <algorithm>
#include <cmath>
#include <utility>

namespace bismar::detail {

namespace {

using Type = Format::Type;
using Kind = JsonValue::Kind;

std::vector<std::string_view> views(const std::vector<std::string>& words) {
  return {words.begin(), words.end()};
}

bool is_money(QuantityKind kind) { return dimension_of(kind).sixths(Base::currency) != 0; }

/// What a format takes, for the inside of a sentence.
std::string describe(const Format& format) {
  switch (format.type) {
    case Type::text:
      return "a text";
    case Type::boolean:
      return "true or false";
    case Type::whole: {
      std::string numbers;
      for (const int number : format.numbers) {
        numbers += (numbers.empty() ? "" : " or ") + std::to_string(number);
      }
      return "the number " + numbers;
    }
    case Type::quantity:
      if (format.kind == QuantityKind::count) {
        return "a whole number, such as 2000";
      }
      return std::string(phrase_of(format.kind)) +
             (takes_plain_number(format.kind) ? ", such as "
                                              : " as a text with its unit, such as ") +
             '"' + std::string(example_of(format.kind)) + '"';
    case Type::range:
      return takes_plain_number(format.kind)
                 ? std::string(phrase_of(format.kind)) +
                       ", such as 0.5, or a range as a text \"low..high\""
                 : "a range of " + std::string(usual_units(format.kind)) +
                       " as a text \"low..high\"";
    case Type::word:
      return in_words(views(format.words));
    case Type::list:
      return "a list";
    case Type::object:
    case Type::map:
    case Type::tagged:
      return "an object";
    case Type::any_of: {
      std::string all;
      for (const Format& alternative : format.alternatives) {
        all += (all.empty() ? "" : ", or ") + describe(alternative);
      }
      return all;
    }
  }
  throw InternalError("format of no type");
}

bool takes(const Format& format, Kind kind) {
  switch (format.type) {
    case Type::text:
    case Type::word:
      return kind == Kind::text;
    case Type::boolean:
      return kind == Kind::boolean;
    case Type::whole:
      return kind == Kind::number;
    case Type::quantity:
    case Type::range:
      return kind == Kind::text || (kind == Kind::number && takes_plain_number(format.kind));
    case Type::list:
      return kind == Kind::list;
    case Type::object:
    case Type::map:
    case Type::tagged:
      return kind == Kind::object;
    case Type::any_of:
      return std::any_of(format.alternatives.begin(),
                         format.alternatives.end(),
                         [kind](const Format& alternative) { return takes(alternative, kind); });
  }
  throw InternalError("format of no type");
}

bool looks_like_a_number(const std::string& text) {
  const std::size_t first = text.find_first_not_of(" \t");
  return first != std::string::npos &&
         std::string_view("+-.0123456789").find(text[first]) != std::string_view::npos;
}

}  // namespace

std::string in_words(std::span<const std::string_view> words) {
  std::string all;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (i > 0) {
      all += i + 1 == words.size() ? " or " : ", ";
    }
    all += '"' + std::string(words[i]) + '"';
  }
  return all;
}

std::string Checker::where(const JsonValue& value) const {
  const auto found = pointers_.find(&value);
  return document_.where(value.offset, found == pointers_.end() ? std::string() : found->second);
}

std::map<std::string, std::string> Checker::places() const {
  std::map<std::string, std::string> all;
  for (const auto& [value, pointer] : pointers_) {
    all[pointer] = document_.where(value->offset, {});
  }
  return all;
}

void Checker::add(Code code,
                  const JsonValue& value,
                  std::string found,
                  std::string allowed,
                  std::string message) {
  bad_.insert(&value);
  Fault fault;
  fault.code = code;
  fault.where = where(value);
  fault.found = std::move(found);
  fault.allowed = std::move(allowed);
  fault.message = std::move(message);
  faults_.add(std::move(fault));
}

void Checker::append(const Error& error, const JsonValue& value) {
  bad_.insert(&value);
  faults_.append(error, where(value));
}

void Checker::add_unknown(const JsonValue& value,
                          std::string_view what,
                          std::span<const std::string_view> words) {
  constexpr std::size_t short_list = 20;
  std::string message =
      '"' + value.text + "\" is no " + std::string(what) + '.' + did_you_mean(value.text, words);
  const std::string allowed = in_words(words);
  if (words.size() <= short_list) {
    message += " Allowed: " + allowed + '.';
  }
  add(Code::unknown_name, value, value.text, allowed, std::move(message));
}

void Checker::add_wrong_type(const JsonValue& value, const std::string& allowed) {
  add(Code::wrong_type,
      value,
      shown(value),
      allowed,
      "here stands " + shown(value) + "; allowed: " + allowed + '.');
}

void Checker::add_unknown_key(const JsonValue::Member& member,
                              const std::string& pointer,
                              std::span<const std::string_view> keys) {
  Fault fault;
  fault.code = Code::unknown_key;
  fault.where = document_.where(member.offset, pointer + '/' + pointer_step(member.key));
  fault.found = member.key;
  fault.allowed = in_words(keys);
  fault.message = "no such key as \"" + member.key + "\" here." + did_you_mean(member.key, keys) +
                  " Allowed: " + fault.allowed + '.';
  faults_.add(std::move(fault));
}

void Checker::check(const JsonValue& value, const Format& format, const std::string& pointer) {
  pointers_[&value] = pointer;
  if (!good(value)) {
    return;
  }
  if (format.type == Type::any_of) {
    check_any_of(value, format, pointer);
    return;
  }
  if (!takes(format, value.kind)) {
    if (value.is(Kind::number) && (format.type == Type::quantity || format.type == Type::range)) {
      add(Code::unit_missing,
          value,
          value.text,
          describe(format),
          "the number " + value.text + " has no unit. Write " + describe(format) +
              " (units: " + std::string(usual_units(format.kind)) + ").");
      return;
    }
    add_wrong_type(value, describe(format));
    return;
  }
  switch (format.type) {
    case Type::text:
      check_text(value, format);
      return;
    case Type::boolean:
      return;
    case Type::whole:
      check_whole(value, format);
      return;
    case Type::quantity:
    case Type::range:
      check_quantity(value, format);
      return;
    case Type::word:
      check_word(value, format, {});
      return;
    case Type::list:
      check_list(value, format, pointer);
      return;
    case Type::object:
      check_object(value, format.keys, pointer);
      return;
    case Type::map:
      check_map(value, format, pointer);
      return;
    case Type::tagged:
      check_tagged(value, format, pointer);
      return;
    case Type::any_of:
      return;
  }
}

void Checker::check_text(const JsonValue& value, const Format& /*format*/) {
  if (value.text.find_first_not_of(" \t\r\n") == std::string::npos) {
    add(Code::empty,
        value,
        value.text,
        "a text",
        "the text is empty. Write something or leave the "
        "key out.");
  }
}

void Checker::check_word(const JsonValue& value, const Format& format, std::string_view otherwise) {
  const std::vector<std::string_view> words = views(format.words);
  if (std::find(words.begin(), words.end(), value.text) != words.end()) {
    return;
  }
  std::string allowed = in_words(words);
  if (!otherwise.empty()) {
    allowed += ", or ";
    allowed += otherwise;
  }
  add(Code::unknown_name,
      value,
      value.text,
      allowed,
      '"' + value.text + "\" is not allowed here." + did_you_mean(value.text, words) +
          " Allowed: " + allowed + '.');
}

void Checker::check_whole(const JsonValue& value, const Format& format) {
  for (const int number : format.numbers) {
    if (value.number == static_cast<double>(number)) {
      return;
    }
  }
  add(Code::out_of_range,
      value,
      value.text,
      describe(format),
      "here stands " + value.text + "; allowed: " + describe(format) + '.');
}

void Checker::check_quantity(const JsonValue& value, const Format& format) {
  if (is_money(format.kind) && rates_ == nullptr) {
    return;
  }
  if (value.is(Kind::number)) {
    if (format.kind == QuantityKind::count && value.number != std::floor(value.number)) {
      add(Code::out_of_range,
          value,
          value.text,
          "a whole number",
          value.text + " is not a whole number.");
      return;
    }
    check_sign(value, format, value.number);
    return;
  }
  try {
    check_sign(value,
               format,
               format.type == Type::range ? parse_range(value.text, format.kind, rates_).low
                                          : parse_quantity(value.text, format.kind, rates_));
  } catch (const Error& error) {
    append(error, value);
  }
}

void Checker::check_sign(const JsonValue& value, const Format& format, double least) {
  if (format.sign == Sign::positive && !(least > 0.0)) {
    add(Code::out_of_range,
        value,
        shown(value),
        "above zero",
        shown(value) + " must be above zero.");
  } else if (format.sign == Sign::not_negative && !(least >= 0.0)) {
    add(Code::out_of_range,
        value,
        shown(value),
        "zero or above",
        shown(value) + " must not be negative.");
  }
}

void Checker::check_list(const JsonValue& value, const Format& format, const std::string& pointer) {
  if (value.items.empty()) {
    add(Code::empty,
        value,
        "[]",
        "a list with something in it",
        "the list is empty. Put something in or leave the key out.");
  }
  for (std::size_t i = 0; i < value.items.size(); ++i) {
    check(value.items[i], *format.item, pointer + '/' + std::to_string(i));
  }
}

void Checker::check_object(const JsonValue& value,
                           std::span<const Key> keys,
                           const std::string& pointer) {
  std::vector<std::string_view> names;
  for (const Key& key : keys) {
    names.push_back(key.name);
  }
  std::vector<bool> seen(keys.size(), false);
  for (const JsonValue::Member& member : value.members) {
    const auto found = std::find(names.begin(), names.end(), member.key);
    if (found == names.end()) {
      add_unknown_key(member, pointer, names);
      continue;
    }
    const std::size_t index = static_cast<std::size_t>(found - names.begin());
    if (!seen[index]) {  // a repeated key was a fault already
      seen[index] = true;
      check(member.value, *keys[index].format, pointer + '/' + pointer_step(member.key));
    }
  }
  for (std::size_t i = 0; i < keys.size(); ++i) {
    if (keys[i].required && !seen[i]) {
      add(Code::missing,
          value,
          "",
          keys[i].name,
          "the key \"" + keys[i].name + "\" is missing: " + describe(*keys[i].format) + '.');
    }
  }
}

void Checker::check_map(const JsonValue& value, const Format& format, const std::string& pointer) {
  const std::vector<std::string_view> words = views(format.words);
  std::unordered_set<std::string_view> seen;
  for (const JsonValue::Member& member : value.members) {
    const bool known = words.empty()
                           ? is_currency_code(member.key)
                           : std::find(words.begin(), words.end(), member.key) != words.end();
    if (!known && words.empty()) {
      Fault fault;
      fault.code = Code::unknown_key;
      fault.where = document_.where(member.offset, pointer + '/' + pointer_step(member.key));
      fault.found = member.key;
      fault.allowed = "a currency code of three capital letters";
      fault.message = "\"" + member.key +
                      "\" is no currency code. Write three capital letters "
                      "(ISO 4217), such as \"USD\".";
      faults_.add(std::move(fault));
    } else if (!known) {
      add_unknown_key(member, pointer, words);
    } else if (seen.insert(member.key).second) {
      check(member.value, *format.item, pointer + '/' + pointer_step(member.key));
    }
  }
}

void Checker::check_tagged(const JsonValue& value,
                           const Format& format,
                           const std::string& pointer) {
  std::vector<std::string_view> tags;
  std::vector<const Format::Variant*> found;
  for (const Format::Variant& variant : format.variants) {
    tags.push_back(variant.tag);
    if (value.find(variant.tag) != nullptr) {
      found.push_back(&variant);
    }
  }
  if (found.size() == 1) {
    check_object(value, found.front()->keys, pointer);
    return;
  }
  const std::string allowed = "one of " + in_words(tags);
  if (found.size() > 1) {
    add(Code::conflict,
        value,
        found[0]->tag + " and " + found[1]->tag,
        allowed,
        "\"" + found[0]->tag + "\" and \"" + found[1]->tag +
            "\" exclude each other. Make two objects of them.");
    return;
  }
  bool named = false;
  for (const JsonValue::Member& member : value.members) {
    const bool belongs = std::any_of(
        format.variants.begin(), format.variants.end(), [&member](const Format::Variant& variant) {
          return std::any_of(variant.keys.begin(), variant.keys.end(), [&member](const Key& key) {
            return key.name == member.key;
          });
        });
    if (!belongs) {
      add_unknown_key(member, pointer, tags);
      named = true;
    }
  }
  bad_.insert(&value);
  if (!named) {
    add(Code::missing,
        value,
        "",
        allowed,
        "it is not said what this is. Allowed: " + allowed + '.');
  }
}

void Checker::check_any_of(const JsonValue& value,
                           const Format& format,
                           const std::string& pointer) {
  const Format* words = nullptr;
  const Format* other = nullptr;
  for (const Format& alternative : format.alternatives) {
    if (!takes(alternative, value.kind)) {
      continue;
    }
    if (alternative.type == Type::word) {
      words = &alternative;
    } else if (other == nullptr || alternative.type == Type::text) {
      other = &alternative;
    }
  }
  if (words != nullptr) {
    const bool is_word =
        std::find(words->words.begin(), words->words.end(), value.text) != words->words.end();
    if (is_word || other == nullptr || !looks_like_a_number(value.text)) {
      check_word(value, *words, other == nullptr ? std::string() : describe(*other));
      return;
    }
  }
  if (other != nullptr) {
    check(value, *other, pointer);
    return;
  }
  for (const Format& alternative : format.alternatives) {
    if (value.is(Kind::number) && alternative.type == Type::quantity) {
      check(value, alternative, pointer);  // says that the unit is missing
      return;
    }
  }
  add_wrong_type(value, describe(format));
}

}  // namespace bismar::detail
