// SPDX-License-Identifier: MIT
// Private to the quantity floor: the powers in the text of a unit.
#pragma once

#include <cstddef>
#include <string_view>

namespace bismar {

inline constexpr int first_power = 6;  // [sixths]

/// Whether the character is part of a raised power: a superscript digit or minus, or one half.
[[nodiscard]] bool begins_superscript(char32_t code);

/// The exponent that begins at byte `at` of `text`, in sixths, and moves `at` behind it;
/// `first_power` when there is none. Never zero, at most 12 in size.
[[nodiscard]] int read_exponent(std::string_view text, std::size_t& at, std::string_view whole);

/// @throws bismar::Error  unit_unknown, always.
[[noreturn]] void refuse_power(std::string_view whole);

}  // namespace bismar
