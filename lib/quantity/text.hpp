// SPDX-License-Identifier: MIT
// Private to the quantity floor: characters, and the making of its faults.
#pragma once

#include <bismar/error.hpp>

#include <cstddef>
#include <string>
#include <string_view>

namespace bismar::quantity_text {

/// One character of UTF-8: its code point and its length in bytes.
struct Character {
  char32_t code = 0;     ///< U+FFFD for a byte that is no UTF-8; 0 at the end of the text.
  std::size_t size = 0;  ///< 0 at the end of the text.
};

inline constexpr char32_t invalid_character = 0xFFFD;
inline constexpr char32_t minus_sign = 0x2212;
inline constexpr char32_t ellipsis = 0x2026;

/// The character of `text` that begins at byte `at`. Overlong forms and surrogates are no UTF-8.
[[nodiscard]] Character character_at(std::string_view text, std::size_t at) noexcept;

/// Blank, tab and the spaces of typesetting (no-break, thin, ...) that come along when text is
/// copied out of a document.
[[nodiscard]] bool is_space(char32_t code) noexcept;

[[nodiscard]] constexpr bool is_digit(char32_t code) noexcept {
  return code >= U'0' && code <= U'9';
}
[[nodiscard]] constexpr bool is_ascii_letter(char32_t code) noexcept {
  return (code >= U'a' && code <= U'z') || (code >= U'A' && code <= U'Z');
}

[[nodiscard]] std::size_t skip_spaces(std::string_view text, std::size_t at) noexcept;
[[nodiscard]] std::string_view trimmed(std::string_view text) noexcept;

/// Whether the texts are equal but for the case of ASCII letters.
[[nodiscard]] bool equal_but_for_case(std::string_view a, std::string_view b) noexcept;

/// `text` fit to be shown: what is no printable UTF-8 becomes \xNN, and a long text is cut.
[[nodiscard]] std::string printable(std::string_view text);
/// `printable` in quotation marks.
[[nodiscard]] std::string quoted(std::string_view text);

/// "a, b or c".
[[nodiscard]] std::string joined_with_or(std::string_view comma_list);

[[nodiscard]] Fault fault(Code code,
                          std::string_view found,
                          std::string_view allowed,
                          std::string message);
[[noreturn]] void fail(Code code,
                       std::string_view found,
                       std::string_view allowed,
                       std::string message);

}  // namespace bismar::quantity_text
