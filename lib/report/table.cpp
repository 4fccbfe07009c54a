// SPDX-License-Identifier: MIT
#include <bismar/report/table.hpp>

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <limits>

#include <bismar/error.hpp>

#include "report/utf8.hpp"

namespace bismar::report {
namespace {

// Large enough for any double in fixed notation with the decimals used here.
using NumberBuffer = std::array<char, 400>;

std::string not_finite_text(double value) {
  if (std::isnan(value)) return "nan";
  return value > 0.0 ? "inf" : "-inf";
}

bool is_zero_text(std::string_view text) {
  return text.find_first_of("123456789") == std::string_view::npos;
}

// Length of the first piece of a word that fits into `width` columns.
std::size_t break_long_word(std::string_view word, std::size_t width) {
  std::size_t columns = 0;
  std::size_t at = 0;
  std::size_t behind_mark = 0;
  while (at < word.size()) {
    const Utf8Char c = utf8_at(word, at);
    const std::size_t next = columns + terminal_columns(c.code);
    if (next > width && at > 0) break;
    columns = next;
    at += c.bytes;
    if (std::string_view("/-+,_").find(word[at - 1]) != std::string_view::npos) behind_mark = at;
  }
  if (at == word.size()) return at;
  return behind_mark > 0 ? behind_mark : at;
}

void wrap_line(std::string_view line, std::size_t width, std::vector<std::string>& out) {
  std::string current;
  std::size_t columns = 0;
  std::size_t at = 0;
  const std::size_t before = out.size();
  while (at < line.size()) {
    const std::size_t start = line.find_first_not_of(' ', at);
    if (start == std::string_view::npos) break;
    const std::size_t end = std::min(line.find(' ', start), line.size());
    std::string_view word = line.substr(start, end - start);
    at = end;
    const std::size_t word_width = display_width(word);
    if (columns > 0 && columns + 1 + word_width <= width) {
      current += ' ';
      current += word;
      columns += 1 + word_width;
      continue;
    }
    if (columns > 0) out.push_back(std::move(current));
    while (display_width(word) > width) {
      const std::size_t piece = break_long_word(word, width);
      if (piece == word.size()) break;
      out.emplace_back(word.substr(0, piece));
      word.remove_prefix(piece);
    }
    current = std::string(word);
    columns = display_width(word);
  }
  if (columns > 0 || out.size() == before) out.push_back(std::move(current));
}

std::size_t widest_line(std::string_view text) {
  std::size_t widest = 0;
  for (std::size_t at = 0; at <= text.size();) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    widest = std::max(widest, display_width(text.substr(at, end - at)));
    at = end + 1;
  }
  return widest;
}

std::size_t longest_word(std::string_view text) {
  std::size_t longest = 0;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t end = std::min(text.find_first_of(" \n", at), text.size());
    longest = std::max(longest, display_width(text.substr(at, end - at)));
    at = end + 1;
  }
  return longest;
}

}  // namespace

std::size_t display_width(std::string_view text) {
  std::size_t columns = 0;
  for (std::size_t at = 0; at < text.size();) {
    const Utf8Char c = utf8_at(text, at);
    columns += terminal_columns(c.code);
    at += c.bytes;
  }
  return columns;
}

std::string fixed(double value, int decimals) {
  if (!std::isfinite(value)) return not_finite_text(value);
  NumberBuffer buffer;
  const auto done = std::to_chars(buffer.data(),
                                  buffer.data() + buffer.size(),
                                  value,
                                  std::chars_format::fixed,
                                  std::clamp(decimals, 0, 20));
  std::string text(buffer.data(), done.ptr);
  if (text.front() == '-' && is_zero_text(text)) text.erase(0, 1);
  return text;
}

std::string number(double value, int significant) {
  if (!std::isfinite(value)) return not_finite_text(value);
  if (value == 0.0) return "0";
  const int digits = std::clamp(significant, 1, 17);
  NumberBuffer buffer;
  const auto done = std::to_chars(buffer.data(),
                                  buffer.data() + buffer.size(),
                                  value,
                                  std::chars_format::scientific,
                                  digits - 1);
  const std::string_view text(buffer.data(), static_cast<std::size_t>(done.ptr - buffer.data()));
  const std::size_t mark = text.rfind('e');
  // The exponent is read behind the rounding, so that 9.996 becomes 10.0 and not 10.00.
  int exponent = 0;
  const std::size_t sign = text[mark + 1] == '+' ? 2 : 1;
  std::from_chars(text.data() + mark + sign, text.data() + text.size(), exponent);
  if (exponent < -4 || exponent >= 9) return std::string(text);
  return fixed(value, std::max(0, digits - 1 - exponent));
}

std::string money(double amount) {
  // Below a millionth there is only the rounding of sums.
  const double size = std::abs(amount);
  return size >= 1e-6 && size < 0.0995 ? number(amount, 2) : fixed(amount, 2);
}

std::string count(std::size_t value) {
  std::string text = std::to_string(value);
  if (text.size() > 4) {
    for (std::size_t at = text.size() - 3; at > 0 && at < text.size();
         at -= std::min<std::size_t>(at, 3)) {
      text.insert(at, 1, ' ');
    }
  }
  return text;
}

std::string exact(double value) {
  if (!std::isfinite(value)) return not_finite_text(value);
  NumberBuffer buffer;
  const auto done = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value);
  return std::string(buffer.data(), done.ptr);
}

std::vector<std::string> wrap(std::string_view text, std::size_t width) {
  std::vector<std::string> lines;
  for (std::size_t at = 0; at <= text.size();) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    wrap_line(text.substr(at, end - at), std::max<std::size_t>(width, 1), lines);
    at = end + 1;
  }
  return lines;
}

std::string paragraph(std::string_view text, std::size_t width, std::size_t hang) {
  const std::size_t inner = width > hang ? width - hang : 1;
  std::string out;
  for (const std::string& line : wrap(text, inner)) {
    if (!out.empty()) out.append(hang, ' ');
    out += line;
    out += '\n';
  }
  return out;
}

void Table::add_row(std::vector<std::string> cells) {
  if (cells.size() != columns_.size()) {
    throw InternalError("a table row has " + std::to_string(cells.size()) + " cells for " +
                        std::to_string(columns_.size()) + " columns");
  }
  rows_.push_back(std::move(cells));
}

std::vector<std::size_t> Table::widths(std::size_t available) const {
  const std::size_t n = columns_.size();
  std::vector<std::size_t> width(n, 1);
  std::vector<std::size_t> least(n, 1);
  for (std::size_t c = 0; c < n; ++c) {
    width[c] = std::max(width[c], widest_line(columns_[c].heading));
    least[c] = std::max(least[c], longest_word(columns_[c].heading));
    for (const auto& row : rows_) {
      width[c] = std::max(width[c], widest_line(row[c]));
      least[c] = std::max(least[c], longest_word(row[c]));
    }
  }
  const auto total = [&] {
    std::size_t sum = n > 0 ? 2 * (n - 1) : 0;
    for (const std::size_t w : width) sum += w;
    return sum;
  };
  // Words stay whole as long as that suffices.
  constexpr std::size_t broken_word_width = 8;
  for (const bool whole_words : {true, false}) {
    while (total() > available) {
      std::size_t widest = n;
      for (std::size_t c = 0; c < n; ++c) {
        const std::size_t floor = whole_words ? least[c] : broken_word_width;
        if (!columns_[c].may_wrap || width[c] <= floor) continue;
        if (widest == n || width[c] > width[widest]) widest = c;
      }
      if (widest == n) break;
      --width[widest];
    }
  }
  return width;
}

std::string Table::text(std::size_t width,
                        std::size_t indent,
                        std::string_view heading_on,
                        std::string_view heading_off) const {
  const std::vector<std::size_t> size = widths(width > indent ? width - indent : 0);
  std::string out;
  const auto put_row = [&](const std::vector<std::vector<std::string>>& cells,
                           std::string_view on,
                           std::string_view off,
                           bool at_bottom) {
    std::size_t height = 0;
    for (const auto& lines : cells) height = std::max(height, lines.size());
    for (std::size_t l = 0; l < height; ++l) {
      std::string line(indent, ' ');
      for (std::size_t c = 0; c < cells.size(); ++c) {
        const std::size_t skip = at_bottom ? height - cells[c].size() : 0;
        const std::string cell = l >= skip && l - skip < cells[c].size() ? cells[c][l - skip] : "";
        const std::size_t used = display_width(cell);
        const std::size_t blanks = size[c] > used ? size[c] - used : 0;
        if (c > 0) line += "  ";
        if (columns_[c].align == Align::right) line.append(blanks, ' ');
        line += cell;
        if (columns_[c].align == Align::left) line.append(blanks, ' ');
      }
      const std::size_t last = line.find_last_not_of(' ');
      line.resize(last == std::string::npos ? 0 : last + 1);
      out.append(on).append(line).append(off) += '\n';
    }
  };

  std::vector<std::vector<std::string>> cells(columns_.size());
  for (std::size_t c = 0; c < columns_.size(); ++c) cells[c] = wrap(columns_[c].heading, size[c]);
  put_row(cells, heading_on, heading_off, true);
  std::string rule(indent, ' ');
  for (std::size_t c = 0; c < columns_.size(); ++c) {
    if (c > 0) rule += "  ";
    rule.append(size[c], '-');
  }
  out += rule + '\n';
  for (const auto& row : rows_) {
    for (std::size_t c = 0; c < columns_.size(); ++c) cells[c] = wrap(row[c], size[c]);
    put_row(cells, {}, {}, false);
  }
  return out;
}

}  // namespace bismar::report
