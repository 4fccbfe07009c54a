// SPDX-License-Identifier: MIT
#include "text.hpp"

#include <array>
#include <cstdint>
#include <utility>

namespace bismar::quantity_text {

namespace {

constexpr std::size_t longest_shown = 80;

std::uint8_t byte_at(std::string_view text, std::size_t at) noexcept {
  return static_cast<std::uint8_t>(text[at]);
}

char lower(char c) noexcept { return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c; }

bool is_control(char32_t code) noexcept { return code < 0x20 || (code >= 0x7F && code < 0xA0); }

}  // namespace

Character character_at(std::string_view text, std::size_t at) noexcept {
  if (at >= text.size()) {
    return {};
  }
  const std::uint8_t first = byte_at(text, at);
  if (first < 0x80) {
    return {first, 1};
  }
  std::size_t size = 0;
  char32_t code = 0;
  char32_t least = 0;  // anything below would be an overlong form
  if ((first & 0xE0U) == 0xC0U) {
    size = 2;
    code = first & 0x1FU;
    least = 0x80;
  } else if ((first & 0xF0U) == 0xE0U) {
    size = 3;
    code = first & 0x0FU;
    least = 0x800;
  } else if ((first & 0xF8U) == 0xF0U) {
    size = 4;
    code = first & 0x07U;
    least = 0x10000;
  }
  if (size == 0 || at + size > text.size()) {
    return {invalid_character, 1};
  }
  for (std::size_t i = 1; i < size; ++i) {
    const std::uint8_t next = byte_at(text, at + i);
    if ((next & 0xC0U) != 0x80U) {
      return {invalid_character, 1};
    }
    code = (code << 6U) | (next & 0x3FU);
  }
  const bool surrogate = code >= 0xD800 && code <= 0xDFFF;
  if (code < least || code > 0x10FFFF || surrogate) {
    return {invalid_character, 1};
  }
  return {code, size};
}

bool is_space(char32_t code) noexcept {
  return code == U' ' || code == U'\t' || code == 0xA0 || (code >= 0x2000 && code <= 0x200A) ||
         code == 0x202F || code == 0x205F;
}

std::size_t skip_spaces(std::string_view text, std::size_t at) noexcept {
  for (;;) {
    const Character next = character_at(text, at);
    if (!is_space(next.code)) {
      return at;
    }
    at += next.size;
  }
}

std::string_view trimmed(std::string_view text) noexcept {
  text.remove_prefix(skip_spaces(text, 0));
  std::size_t end = 0;  // behind the last character that is no space
  for (std::size_t at = 0; at < text.size();) {
    const Character next = character_at(text, at);
    at += next.size;
    if (!is_space(next.code)) {
      end = at;
    }
  }
  return text.substr(0, end);
}

bool equal_but_for_case(std::string_view a, std::string_view b) noexcept {
  if (a.size() != b.size()) {
    return false;
  }
  for (std::size_t i = 0; i < a.size(); ++i) {
    if (lower(a[i]) != lower(b[i])) {
      return false;
    }
  }
  return true;
}

std::string printable(std::string_view text) {
  constexpr std::array<char, 17> hex = {"0123456789ABCDEF"};
  std::string shown;
  for (std::size_t at = 0; at < text.size();) {
    if (shown.size() >= longest_shown) {
      shown += "...";
      break;
    }
    const Character next = character_at(text, at);
    if (next.code == invalid_character || is_control(next.code)) {
      for (std::size_t i = 0; i < next.size; ++i) {
        const std::uint8_t byte = byte_at(text, at + i);
        shown += "\\x";
        shown += hex[byte >> 4U];
        shown += hex[byte & 0x0FU];
      }
    } else {
      shown += text.substr(at, next.size);
    }
    at += next.size;
  }
  return shown;
}

std::string quoted(std::string_view text) { return '"' + printable(text) + '"'; }

std::string joined_with_or(std::string_view comma_list) {
  std::string joined(comma_list);
  if (const std::size_t last = joined.rfind(", "); last != std::string::npos) {
    joined.replace(last, 2, " or ");
  }
  return joined;
}

Fault fault(Code code, std::string_view found, std::string_view allowed, std::string message) {
  Fault made;
  made.code = code;
  made.found = printable(found);
  made.allowed = allowed;
  made.message = std::move(message);
  return made;
}

void fail(Code code, std::string_view found, std::string_view allowed, std::string message) {
  throw Error(fault(code, found, allowed, std::move(message)));
}

}  // namespace bismar::quantity_text
