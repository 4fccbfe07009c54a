// SPDX-License-Identifier: MIT
#pragma once

#include "format.hpp"

#include <memory>
#include <string>
#include <utility>
#include <vector>

/// Short forms that the tables of the format are written with.
namespace bismar::detail::build {

using Type = Format::Type;

inline Key key(std::string name, Format format) {
  return {std::move(name), std::make_shared<const Format>(std::move(format)), false};
}

inline Key required(std::string name, Format format) {
  Key made = key(std::move(name), std::move(format));
  made.required = true;
  return made;
}

inline Format text(std::string about) {
  Format format;
  format.type = Type::text;
  format.about = std::move(about);
  return format;
}

inline Format yes_or_no(std::string about) {
  Format format;
  format.type = Type::boolean;
  format.about = std::move(about);
  return format;
}

inline Format whole(std::vector<int> numbers, std::string about) {
  Format format;
  format.type = Type::whole;
  format.numbers = std::move(numbers);
  format.about = std::move(about);
  return format;
}

inline Format quantity(QuantityKind kind, Sign sign, std::string about) {
  Format format;
  format.type = Type::quantity;
  format.kind = kind;
  format.sign = sign;
  format.about = std::move(about);
  return format;
}

inline Format range(QuantityKind kind, std::string about) {
  Format format = quantity(kind, Sign::positive, std::move(about));
  format.type = Type::range;
  return format;
}

inline Format word(std::vector<std::string> words, std::string about) {
  Format format;
  format.type = Type::word;
  format.words = std::move(words);
  format.about = std::move(about);
  return format;
}

inline Format list_of(Format item, std::string about) {
  Format format;
  format.type = Type::list;
  format.item = std::make_shared<const Format>(std::move(item));
  format.about = std::move(about);
  return format;
}

inline Format object(std::vector<Key> keys, std::string about) {
  Format format;
  format.type = Type::object;
  format.keys = std::move(keys);
  format.about = std::move(about);
  return format;
}

inline Format map_of(std::vector<std::string> words, Format item, std::string about) {
  Format format;
  format.type = Type::map;
  format.words = std::move(words);
  format.item = std::make_shared<const Format>(std::move(item));
  format.about = std::move(about);
  return format;
}

inline Format any_of(std::vector<Format> alternatives, std::string about) {
  Format format;
  format.type = Type::any_of;
  format.alternatives = std::move(alternatives);
  format.about = std::move(about);
  return format;
}

inline Format tagged(std::vector<Format::Variant> variants, std::string about) {
  Format format;
  format.type = Type::tagged;
  format.variants = std::move(variants);
  format.about = std::move(about);
  return format;
}

inline Format names(std::string about) {
  return list_of(text("An id or a word."), std::move(about));
}

}  // namespace bismar::detail::build
