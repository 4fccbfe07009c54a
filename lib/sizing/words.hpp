// SPDX-License-Identifier: MIT
#pragma once

#include <span>
#include <string>
#include <string_view>

namespace bismar {

// Small text helpers of this floor.

[[nodiscard]] bool contains_word(std::span<const std::string> words, std::string_view word);
[[nodiscard]] bool shares_word(std::span<const std::string> a, std::span<const std::string> b);
/// "a, b, c", or "nothing".
[[nodiscard]] std::string joined(std::span<const std::string> words, std::string_view between = ", ");
/// A number for people: at most so many significant digits, no trailing zeros, never an exponent in between.
[[nodiscard]] std::string plain(double value, int significant = 6);

}  // namespace bismar
