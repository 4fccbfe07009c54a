// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/quantity/kind.hpp>

#include <cstdint>
#include <memory>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::detail {

struct Format;

/// A key of an object: what stands under it.
struct Key {
  std::string name;
  std::shared_ptr<const Format> format;
  bool required = false;
};

/// Which numbers a quantity or a number may be.
enum class Sign : std::uint8_t { any, not_negative, positive };

/// What one value of a job may be. The tree of these is the one description of the job format: the
/// loader checks against it and the JSON Schema is written from it, so the two cannot part.
struct Format {
  enum class Type : std::uint8_t {
    text,  ///< Any text but an empty one.
    boolean,
    whole,     ///< One of `numbers`, as a plain number.
    quantity,  ///< A number with its unit, as text; ratios and counts also as a plain number.
    range,     ///< "low..high" with a unit, as text; of a ratio also one value, as of a quantity.
    word,      ///< One of `words`.
    list,      ///< Of `item`.
    object,    ///< With `keys`.
    map,       ///< Keys of the user's or the library's own, each with an `item`.
    tagged,    ///< An object that is one of `variants`, told apart by its first key.
    any_of,    ///< One of `alternatives`.
  };
  struct Variant {
    std::string tag;
    std::vector<Key> keys;  ///< The tag itself included.
  };

  Type type = Type::text;
  std::string about;  ///< One sentence for the schema.
  QuantityKind kind = QuantityKind::ratio;
  Sign sign = Sign::any;
  std::vector<int> numbers;
  std::vector<std::string>
      words;  ///< Of a word; of a map: its allowed keys, empty = `key_pattern`.
  std::string key_pattern;
  std::shared_ptr<const Format> item;
  bool may_be_empty = false;  ///< Lists only.
  std::vector<Key> keys;
  std::vector<Variant> variants;
  std::vector<Format> alternatives;
};

/// The format of a job file.
[[nodiscard]] BISMAR_API const Format& job_format();

/// Whether a plain JSON number may stand for this kind.
[[nodiscard]] bool takes_plain_number(QuantityKind kind);

}  // namespace bismar::detail
