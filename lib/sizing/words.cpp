// SPDX-License-Identifier: MIT
#include "sizing/words.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>

namespace bismar {

bool contains_word(std::span<const std::string> words, std::string_view word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

bool shares_word(std::span<const std::string> a, std::span<const std::string> b) {
  return std::any_of(a.begin(), a.end(),
                     [&](const std::string& word) { return contains_word(b, word); });
}

std::string joined(std::span<const std::string> words, std::string_view between) {
  std::string out;
  for (const auto& word : words) {
    if (!out.empty()) {
      out += between;
    }
    out += word;
  }
  return out.empty() ? "nothing" : out;
}

std::string plain(double value, int significant) {
  if (!std::isfinite(value)) {
    return std::isnan(value) ? "not a number" : value > 0.0 ? "infinite" : "minus infinite";
  }
  std::array<char, 64> buffer{};
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value,
                                 std::chars_format::general, significant);
  return {buffer.data(), end.ptr};
}

}  // namespace bismar
