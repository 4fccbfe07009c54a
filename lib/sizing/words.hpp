// SPDX-License-Identifier: MIT
#pragma once

#include <span>
#include <string>
#include <string_view>

namespace bismar {

// Small text helpers of this floor.

[[nodiscard]] bool contains_word(std::span<const std::string> words, std::string_view word);
[[nodiscard]] bool shares_word(std::span<const std::string> a, std::span<const std::string> b);
/// Whether `start` begins a word of `text`: no letter or digit stands before it.
[[nodiscard]] bool starts_word(std::string_view text, std::string_view start);
/// "a, b, c", or "nothing".
[[nodiscard]] std::string joined(std::span<const std::string> words,
                                 std::string_view between = ", ");
/// A number for people: at most so many significant digits, no trailing zeros, no exponent from
/// 1e-6 to 1e15.
[[nodiscard]] std::string plain(double value, int significant = 6);

}  // namespace bismar
