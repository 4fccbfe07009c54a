// SPDX-License-Identifier: MIT
#include "report/plot.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>

#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

namespace bismar::report {

Axis::Axis(double low, double high, bool logarithmic, double at_low, double at_high)
    : low_(low), high_(high), logarithmic_(logarithmic), at_low_(at_low), at_high_(at_high) {}

double Axis::at(double value) const {
  const double share = logarithmic_ ? std::log(value / low_) / std::log(high_ / low_)
                                    : (value - low_) / (high_ - low_);
  return at_low_ + share * (at_high_ - at_low_);
}

double Axis::between(double from, double to, double share) const {
  if (logarithmic_) return from * std::pow(to / from, share);
  return from + share * (to - from);
}

std::vector<Tick> Axis::ticks() const {
  std::vector<Tick> out;
  const auto add = [&](double value, bool major) {
    const double slack = 1e-9 * (high_ - low_);
    if (value >= low_ - slack && value <= high_ + slack) out.push_back({value, major});
  };
  if (!logarithmic_) {
    const double rough = (high_ - low_) / 6.0;
    const double decade = std::pow(10.0, std::floor(std::log10(rough)));
    double step = 10.0 * decade;
    for (const double nice : {1.0, 2.0, 5.0}) {
      if (nice * decade >= rough) {
        step = nice * decade;
        break;
      }
    }
    const double first = std::ceil(low_ / step - 1e-9);
    for (double k = first; k * step <= high_ + 1e-9 * step; k += 1.0) add(k * step, true);
    return out;
  }
  const double decades = std::log10(high_ / low_);
  const int from = static_cast<int>(std::floor(std::log10(low_)));
  const int to = static_cast<int>(std::ceil(std::log10(high_)));
  for (int e = from; e <= to; ++e) {
    for (int m = 1; m <= 9; ++m) {
      const bool major = m == 1 || (decades < 3.2 && (m == 2 || m == 5)) || decades < 0.7;
      // Dividing by a power of ten is exact where multiplying by 0.1 is not.
      const double scale = std::pow(10.0, std::abs(e));
      add(e < 0 ? m / scale : m * scale, major);
    }
  }
  return out;
}

std::string tick_text(double value) {
  // Six figures would not fit beside an axis.
  const bool large = std::isfinite(value) && std::abs(value) >= 1e5;
  std::string text = number(value, 3);
  if (large) {
    std::array<char, 32> buffer;
    const auto done = std::to_chars(
        buffer.data(), buffer.data() + buffer.size(), value, std::chars_format::scientific, 2);
    text.assign(buffer.data(), done.ptr);
  }
  std::string exponent;
  if (const std::size_t e = text.find('e'); e != std::string::npos) {
    // "1.00e+08" becomes "1e8".
    exponent = text.substr(e);
    text.resize(e);
    std::erase(exponent, '+');
    const std::size_t digits = exponent.find_first_of("0123456789");
    const std::size_t first = exponent.find_first_not_of('0', digits);
    if (first != std::string::npos) exponent.erase(digits, first - digits);
  }
  if (text.find('.') != std::string::npos) {
    text.resize(text.find_last_not_of('0') + 1);
    if (text.back() == '.') text.pop_back();
  }
  return text + exponent;
}

ChoiceLetters::ChoiceLetters(const ExchangeRuler& ruler) {
  const auto add = [&](const std::string& name) {
    if (index_.emplace(name, names_.size()).second) names_.push_back(name);
  };
  for (const NamedStretch& stretch : ruler.stretches) add(stretch.choice);
  for (const NamedStretch& stretch : ruler.stretches) {
    for (const NamedStretch::RunnerUp& r : stretch.runners_up) add(r.choice);
  }
}

std::string ChoiceLetters::letter(const std::string& choice) const {
  const auto found = index_.find(choice);
  if (found == index_.end()) return {};
  std::size_t n = found->second;
  std::string text(1, static_cast<char>('A' + n % 26));
  for (; n >= 26; n = n / 26 - 1) text.insert(0, 1, static_cast<char>('A' + (n / 26 - 1) % 26));
  return text;
}

double draw_key(Svg& svg, std::vector<KeyEntry> entries, double top) {
  if (entries.empty()) return top;
  const auto before = [](const KeyEntry& a, const KeyEntry& b) {
    const auto is_number = [](const KeyEntry& e) { return e.mark < "A"; };
    if (is_number(a) != is_number(b)) return is_number(b);
    return a.mark.size() != b.mark.size() ? a.mark.size() < b.mark.size() : a.mark < b.mark;
  };
  std::stable_sort(entries.begin(), entries.end(), before);
  const auto same = [](const KeyEntry& a, const KeyEntry& b) { return a.mark == b.mark; };
  entries.erase(std::unique(entries.begin(), entries.end(), same), entries.end());

  constexpr double size = 10.5;
  constexpr double row = 15.0;
  double mark = 0.0;
  for (const KeyEntry& entry : entries)
    mark = std::max(mark, text_width(entry.mark, size, true) + 7.0);
  const std::size_t columns = entries.size() > 3 ? 2 : 1;
  const double column = (theme::page - 2.0 * theme::margin) / static_cast<double>(columns);

  // Lines are counted first, so that the columns end up about equally long.
  std::vector<std::vector<std::string>> lines;
  std::size_t total = 0;
  for (const KeyEntry& entry : entries) {
    lines.push_back(wrap_text(entry.text, size, column - mark - 14.0));
    total += lines.back().size();
  }
  const std::size_t per_column = (total + columns - 1) / columns;
  double bottom = top;
  double x = theme::margin;
  double y = top + row;
  std::size_t used = 0;
  for (std::size_t i = 0; i < entries.size(); ++i) {
    if (used >= per_column) {
      used = 0;
      x += column;
      y = top + row;
    }
    svg.text({x, y}, entries[i].mark, {.size = size, .colour = theme::accent, .bold = true});
    for (const std::string& line : lines[i]) {
      svg.text({x + mark, y}, line, {.size = size});
      y += row;
    }
    used += lines[i].size();
    bottom = std::max(bottom, y - row + 6.0);
  }
  return bottom;
}

double draw_small(Svg& svg, std::string_view text, double top, std::string_view colour) {
  constexpr double size = 10.5;
  double y = top + 14.0;
  for (const std::string& line : wrap_text(text, size, theme::page - 2.0 * theme::margin)) {
    svg.text({theme::margin, y}, line, {.size = size, .colour = colour});
    y += 14.0;
  }
  return y - 10.0;
}

double finish_page(Svg& svg, double top) {
  const double rule = top + 14.0;
  svg.line({theme::margin, rule},
           {theme::page - theme::margin, rule},
           {.colour = theme::hair, .width = 0.8});
  double y = rule + 13.0;
  for (const std::string& line : wrap_text(caution(), 9.0, theme::page - 2.0 * theme::margin)) {
    svg.text({theme::margin, y}, line, {.size = 9.0, .colour = theme::muted});
    y += 12.0;
  }
  return y + 8.0;
}

double draw_title(Svg& svg, std::string_view title, std::string_view subtitle, double top) {
  double y = top + 36.0;
  for (const std::string& line : wrap_text(title, 18.0, theme::page - 2.0 * theme::margin)) {
    svg.text({theme::margin, y}, line, {.size = 18.0});
    y += 22.0;
  }
  y -= 3.0;
  for (const std::string& line : wrap_text(subtitle, 12.0, theme::page - 2.0 * theme::margin)) {
    svg.text({theme::margin, y}, line, {.size = 12.0, .colour = theme::muted});
    y += 16.0;
  }
  return y - 8.0;
}

void draw_disc(Svg& svg, Point at) {
  svg.circle(at, 5.5, theme::accent, {.colour = theme::paper, .width = 1.2});
}

void draw_diamond(Svg& svg, Point at) {
  constexpr double r = 6.0;
  const std::array<Point, 4> points = {
      {{at.x, at.y - r}, {at.x + r, at.y}, {at.x, at.y + r}, {at.x - r, at.y}}};
  svg.polygon(points, theme::paper, {.colour = theme::accent, .width = 1.6});
}

std::string no_front_text(const Result& result) {
  const FunnelLine* most = nullptr;
  for (const FunnelLine& line : result.funnel.lines) {
    if (line.stage != FunnelLine::Stage::infeasible) continue;
    if (most == nullptr || line.candidates > most->candidates) most = &line;
  }
  std::string text = "No candidate meets every limit";
  if (most != nullptr && most->candidates > 0) {
    text += "; " + count(most->candidates) + (most->candidates == 1 ? " fails" : " fail") +
            " first by " + most->reason;
  }
  return text + ". Nothing can be drawn.";
}

}  // namespace bismar::report
