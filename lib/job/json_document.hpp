// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::detail {

/// Deepest nesting of objects and lists that is read: far beyond any job, far from the stack's end.
inline constexpr std::size_t json_depth_limit = 64;

/// One value of a JSON text, with the place where it begins.
struct JsonValue {
  enum class Kind : std::uint8_t { null, boolean, number, text, list, object };
  struct Member;

  Kind kind = Kind::null;
  bool boolean = false;
  double number = 0.0;
  std::string text;  ///< The text, or the number as it was written.
  std::vector<JsonValue> items;
  std::vector<Member> members;  ///< In the order of the text, repeated keys included.
  std::size_t offset = 0;       ///< Byte in the text.

  [[nodiscard]] BISMAR_API const JsonValue* find(std::string_view key) const;
  [[nodiscard]] bool is(Kind other) const noexcept { return kind == other; }
};

struct JsonValue::Member {
  std::string key;
  std::size_t offset = 0;  ///< Of the key.
  JsonValue value;
};

/// "a text", "a number", "a list": the kind as a message says it.
[[nodiscard]] std::string_view phrase(JsonValue::Kind kind);

/// The value as a message quotes it: short values whole, lists and objects by their kind.
[[nodiscard]] std::string shown(const JsonValue& value);

/// A JSON text with // and /* */ comments, and where everything stands in it.
class BISMAR_API JsonDocument {
 public:
  /// Reads `text`. Faults: json_malformed (not JSON, not UTF-8, nested deeper than the limit),
  /// not_finite (a number too large for a double), duplicate (a key twice in one object). A text
  /// that is not JSON has one fault, because nothing behind it can be trusted.
  ///
  /// @param name  Stands for the file in every place.
  /// @return whether there is a value to go on with.
  bool parse(std::string text, std::string name, FaultList& faults);

  [[nodiscard]] const JsonValue& root() const noexcept { return root_; }
  [[nodiscard]] const std::string& name() const noexcept { return name_; }

  /// "file:line:column /pointer"; columns count characters.
  [[nodiscard]] std::string where(std::size_t offset, std::string_view pointer) const;

 private:
  friend class JsonBuilder;
  std::string text_;
  std::string name_;
  std::vector<std::size_t> line_starts_;
  JsonValue root_;
};

/// A key as one step of a JSON pointer: "~" and "/" escaped (RFC 6901).
[[nodiscard]] std::string pointer_step(std::string_view key);

/// The value without comments, keys in the order of the text, on one line.
[[nodiscard]] BISMAR_API std::string to_compact_text(const JsonValue& value);

}  // namespace bismar::detail
