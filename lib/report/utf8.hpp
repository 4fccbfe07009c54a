// SPDX-License-Identifier: MIT
// Reading UTF-8 character by character; shared by tables and pictures.
#pragma once

#include <cstddef>
#include <string_view>

namespace bismar::report {

/// One character: its code point (U+FFFD for a byte that is not UTF-8) and its length in bytes.
struct Utf8Char {
  char32_t code = U'\uFFFD';
  std::size_t bytes = 1;
};

/// The character that begins at `text[at]`; `at` lies inside the text.
inline Utf8Char utf8_at(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const unsigned char lead = byte(at);
  if (lead < 0x80) return {lead, 1};
  std::size_t length = 0;
  char32_t code = 0;
  char32_t least = 0;
  if ((lead & 0xE0U) == 0xC0) {
    length = 2, code = lead & 0x1FU, least = 0x80;
  } else if ((lead & 0xF0U) == 0xE0) {
    length = 3, code = lead & 0x0FU, least = 0x800;
  } else if ((lead & 0xF8U) == 0xF0) {
    length = 4, code = lead & 0x07U, least = 0x10000;
  }
  if (length == 0 || at + length > text.size()) return {};
  for (std::size_t i = 1; i < length; ++i) {
    if ((byte(at + i) & 0xC0U) != 0x80) return {};
    code = (code << 6U) | (byte(at + i) & 0x3FU);
  }
  // Overlong forms, surrogates and numbers beyond the last plane are no characters.
  if (code < least || code > 0x10FFFF || (code >= 0xD800 && code <= 0xDFFF)) return {};
  return {code, length};
}

/// Columns on a terminal.
inline std::size_t terminal_columns(char32_t c) {
  if (c == 0x200B || c == 0x200D || c == 0xFEFF || (c >= 0x300 && c <= 0x36F) ||
      (c >= 0x1AB0 && c <= 0x1AFF) || (c >= 0x20D0 && c <= 0x20FF) ||
      (c >= 0xFE00 && c <= 0xFE0F)) {
    return 0;
  }
  const bool wide = (c >= 0x1100 && c <= 0x115F) || (c >= 0x2E80 && c <= 0xA4CF) ||
                    (c >= 0xAC00 && c <= 0xD7A3) || (c >= 0xF900 && c <= 0xFAFF) ||
                    (c >= 0xFE30 && c <= 0xFE6F) || (c >= 0xFF00 && c <= 0xFF60) ||
                    (c >= 0xFFE0 && c <= 0xFFE6) || (c >= 0x1F300 && c <= 0x1FAFF) ||
                    (c >= 0x20000 && c <= 0x3FFFD);
  return wide ? 2 : 1;
}

}  // namespace bismar::report
