// SPDX-License-Identifier: MIT
#include "catalogue/text.hpp"

#include <cstddef>

namespace bismar::catalogue {

namespace {

constexpr std::string_view no_break_space = "\xC2\xA0";
constexpr std::string_view typographic_apostrophe = "\xE2\x80\x99";
constexpr std::size_t longest_shown = 60;  // bytes of a text in a message

/// Length of the blank that starts here, 0 where there is none.
std::size_t blank_at_start(std::string_view text) {
  if (text.empty()) {
    return 0;
  }
  const char c = text.front();
  if (c == ' ' || c == '\t' || c == '\r' || c == '\n') {
    return 1;
  }
  return text.substr(0, no_break_space.size()) == no_break_space ? no_break_space.size() : 0;
}

std::size_t blank_at_end(std::string_view text) {
  if (text.size() >= no_break_space.size() &&
      text.substr(text.size() - no_break_space.size()) == no_break_space) {
    return no_break_space.size();
  }
  return text.empty() ? 0 : blank_at_start(text.substr(text.size() - 1));
}

bool continues_character(char c) { return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U; }

}  // namespace

std::string_view trim(std::string_view text) {
  const auto is_solid = [](char c) { return c > ' ' && c <= '~'; };
  if (text.empty() || (is_solid(text.front()) && is_solid(text.back()))) {
    return text;
  }
  while (const std::size_t length = blank_at_start(text)) {
    text.remove_prefix(length);
  }
  while (const std::size_t length = blank_at_end(text)) {
    text.remove_suffix(length);
  }
  return text;
}

std::string folded(std::string_view text) {
  std::string result;
  text = trim(text);
  result.reserve(text.size());
  while (!text.empty()) {
    if (std::size_t length = blank_at_start(text)) {
      while (length != 0) {
        text.remove_prefix(length);
        length = blank_at_start(text);
      }
      result += ' ';
    } else if (text.substr(0, typographic_apostrophe.size()) == typographic_apostrophe) {
      text.remove_prefix(typographic_apostrophe.size());
      result += '\'';
    } else {
      const char c = text.front();
      result += c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
      text.remove_prefix(1);
    }
  }
  return result;
}

std::string quoted(std::string_view text) {
  std::string shown(text);
  if (text.size() > longest_shown) {
    std::size_t head = longest_shown / 2;
    while (head > 0 && continues_character(text[head])) {
      --head;
    }
    std::size_t tail = text.size() - longest_shown / 2;
    while (tail < text.size() && continues_character(text[tail])) {
      ++tail;
    }
    shown = std::string(text.substr(0, head)) + " ... " + std::string(text.substr(tail));
  }
  for (char& c : shown) {
    if (static_cast<unsigned char>(c) < 0x20U || c == '\x7F') {
      c = ' ';
    }
  }
  return '"' + shown + '"';
}

std::vector<std::string_view> split(std::string_view text, char separator) {
  std::vector<std::string_view> parts;
  if (trim(text).empty()) {
    return parts;
  }
  for (;;) {
    const std::size_t end = text.find(separator);
    parts.push_back(trim(text.substr(0, end)));
    if (end == std::string_view::npos) {
      return parts;
    }
    text.remove_prefix(end + 1);
  }
}

}  // namespace bismar::catalogue
