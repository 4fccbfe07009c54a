// SPDX-License-Identifier: MIT
// What the pictures share: colours, axes, keys, small print, and the drawings that are combined.
#pragma once

#include <bismar/report/pictures.hpp>
#include <bismar/report/svg.hpp>

#include <cstddef>
#include <map>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::report {

namespace theme {
inline constexpr std::string_view ink = "#1d2b36";
inline constexpr std::string_view muted = "#55636f";
inline constexpr std::string_view hair = "#cdd5da";
inline constexpr std::string_view wash = "#f1f5f6";
inline constexpr std::string_view tint = "#d5e4e8";
inline constexpr std::string_view faint = "#a9b6be";
inline constexpr std::string_view paper = "#ffffff";
inline constexpr std::string_view accent = "#0e5a6d";  // choices
inline constexpr std::string_view bound = "#a8541a";   // limits and caps
inline constexpr double page = 960.0;
inline constexpr double margin = 48.0;
}  // namespace theme

/// A tick of an axis.
struct Tick {
  double value = 0.0;
  bool major = true;  ///< Carries a figure.
};

/// A linear or logarithmic scale from values to pixels.
class Axis {
 public:
  /// low < high; both > 0 when logarithmic.
  Axis(double low, double high, bool logarithmic, double at_low, double at_high);
  [[nodiscard]] double at(double value) const;
  [[nodiscard]] double low() const { return low_; }
  [[nodiscard]] double high() const { return high_; }
  [[nodiscard]] bool logarithmic() const { return logarithmic_; }
  [[nodiscard]] bool shows(double value) const { return value >= low_ && value <= high_; }
  /// Steps of 1, 2 or 5; on short logarithmic scales 1, 2, 5, on long ones the decades.
  [[nodiscard]] std::vector<Tick> ticks() const;
  /// The value `share` of the way along, in the measure of the axis.
  [[nodiscard]] double between(double from, double to, double share) const;

 private:
  double low_;
  double high_;
  bool logarithmic_;
  double at_low_;
  double at_high_;
};

/// A tick's figure without needless digits.
std::string tick_text(double value);

/// Letters A, B, ... for the choices of a ruler (then its runners-up), the same in every picture.
class ChoiceLetters {
 public:
  explicit ChoiceLetters(const ExchangeRuler& ruler);
  /// Empty when the ruler does not name it.
  [[nodiscard]] std::string letter(const std::string& choice) const;
  [[nodiscard]] const std::vector<std::string>& names() const { return names_; }

 private:
  std::map<std::string, std::size_t> index_;
  std::vector<std::string> names_;
};

/// A line of a key: what stands in the picture, and what it means.
struct KeyEntry {
  std::string mark;
  std::string text;
};
/// Draws a key in one or two columns, letters first, then numbers, each mark once; returns the y
/// below it.
double draw_key(Svg& svg, std::vector<KeyEntry> entries, double top);

/// Draws wrapped small text over the page's width; returns the y below it.
double draw_small(Svg& svg,
                  std::string_view text,
                  double top,
                  std::string_view colour = theme::muted);
/// The caution; returns the height of the page.
double finish_page(Svg& svg, double top);

/// Title and a line that explains; returns the y below.
double draw_title(Svg& svg, std::string_view title, std::string_view subtitle, double top = 0.0);

void draw_disc(Svg& svg, Point at);
void draw_diamond(Svg& svg, Point at);

/// The two large drawings, from y = 0 down; they return the y below. What they show by a mark only
/// is added to the key, which the page draws once.
double draw_tradeoff(Svg& svg,
                     const Result& result,
                     const ExchangeRuler& ruler,
                     const PictureOptions& options,
                     std::vector<KeyEntry>& key);
double draw_ruler(Svg& svg,
                  const Result& result,
                  const ExchangeRuler& ruler,
                  const PictureOptions& options,
                  std::vector<KeyEntry>& key);

/// What to say where there is no front.
std::string no_front_text(const Result& result);

}  // namespace bismar::report
