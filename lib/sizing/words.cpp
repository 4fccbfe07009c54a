// SPDX-License-Identifier: MIT
#include "sizing/words.hpp"

#include <algorithm>
#include <array>
#include <cctype>
#include <charconv>
#include <cmath>

namespace bismar {

bool contains_word(std::span<const std::string> words, std::string_view word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

bool shares_word(std::span<const std::string> a, std::span<const std::string> b) {
  return std::any_of(
      a.begin(), a.end(), [&](const std::string& word) { return contains_word(b, word); });
}

bool starts_word(std::string_view text, std::string_view start) {
  for (std::size_t at = text.find(start); at != std::string_view::npos;
       at = text.find(start, at + 1)) {
    if (at == 0 || std::isalnum(static_cast<unsigned char>(text[at - 1])) == 0) {
      return true;
    }
  }
  return false;
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
  char* const end = buffer.data() + buffer.size();
  auto written = std::to_chars(buffer.data(), end, value, std::chars_format::general, significant);
  const double size = std::abs(value);
  if (size >= 1e-6 && size < 1e15) {
    // The same digits written out: "12340", not "1.234e+04".
    double rounded = 0.0;
    std::from_chars(buffer.data(), written.ptr, rounded);
    written = std::to_chars(buffer.data(), end, rounded, std::chars_format::fixed);
  }
  return {buffer.data(), written.ptr};
}

}  // namespace bismar
