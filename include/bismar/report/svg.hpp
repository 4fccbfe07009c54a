// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::report {

/// Lengths of pictures are in pixels of the picture's own grid; y runs down.
struct Point {
  double x = 0.0;
  double y = 0.0;
};

/// A rectangle with its upper left corner.
struct Box {
  double x = 0.0;
  double y = 0.0;
  double width = 0.0;
  double height = 0.0;

  [[nodiscard]] double right() const { return x + width; }
  [[nodiscard]] double bottom() const { return y + height; }
  [[nodiscard]] Point centre() const { return {x + 0.5 * width, y + 0.5 * height}; }
  /// Whether the two come closer than `gap` in both directions.
  [[nodiscard]] bool overlaps(const Box& other, double gap = 0.0) const {
    return x < other.right() + gap && other.x < right() + gap && y < other.bottom() + gap &&
           other.y < bottom() + gap;
  }
  /// Whether `inner` lies inside, edges included.
  [[nodiscard]] bool contains(const Box& inner) const {
    return inner.x >= x && inner.y >= y && inner.right() <= right() && inner.bottom() <= bottom();
  }
};

/// A number in a picture: at most two decimals, no trailing zeros, never "-0".
/// @throws bismar::InternalError  not finite: such a number has no place in a picture.
[[nodiscard]] BISMAR_API std::string coordinate(double value);

/// Text made safe for XML content and attributes: & < > " ' become entities, bytes that are not
/// UTF-8 and characters that XML 1.0 forbids become U+FFFD.
[[nodiscard]] BISMAR_API std::string escape_xml(std::string_view text);

/// Upper estimate of the width of a text in the fonts of the pictures, at `size` px. From the
/// advance widths of DejaVu Sans and Nimbus Sans, the larger one for each character (measured from
/// the font files of Debian 12); characters outside Latin-1 count generously.
[[nodiscard]] BISMAR_API double text_width(std::string_view text, double size, bool bold = false);

/// Breaks a text at blanks so that each line is at most `width` px wide; a single longer word stays
/// whole. At least one line.
[[nodiscard]] BISMAR_API std::vector<std::string> wrap_text(std::string_view text,
                                                            double size,
                                                            double width);

/// How a line is drawn.
struct Pen {
  std::string_view colour = "#1d2b36";
  double width = 1.0;
  std::string_view dash = "";  ///< Lengths of dashes and gaps.
  bool round = false;          ///< Round ends and joints.
  double opacity = 1.0;
};

/// How a text is set.
struct TextStyle {
  enum class Anchor : std::uint8_t { start, middle, end };
  double size = 12.0;
  std::string_view colour = "#1d2b36";
  Anchor anchor = Anchor::start;
  bool bold = false;
  bool italic = false;
  double rotate = 0.0;  ///< Degrees, clockwise about the anchor point.
};

/// A small SVG writer. The same calls give the same bytes on every machine and under every locale.
class BISMAR_API Svg {
 public:
  void line(Point from, Point to, const Pen& pen);
  void polyline(std::span<const Point> points, const Pen& pen);
  void polygon(std::span<const Point> points, std::string_view fill, const Pen& pen);
  void rectangle(const Box& box, std::string_view fill, const Pen& pen, double radius = 0.0);
  void circle(Point centre, double radius, std::string_view fill, const Pen& pen);
  void ellipse(
      Point centre, double radius_x, double radius_y, std::string_view fill, const Pen& pen);
  /// `data` is SVG path data made of coordinate() numbers.
  void path(std::string_view data, std::string_view fill, const Pen& pen, bool even_odd = false);
  void text(Point at, std::string_view text, const TextStyle& style);
  /// A text with a short bold mark of another colour before it, set as one line.
  void marked_text(Point at,
                   std::string_view mark,
                   std::string_view mark_colour,
                   std::string_view text,
                   const TextStyle& style);
  /// Everything until the matching end belongs together; `title` is shown by viewers on hovering.
  void begin_group(std::string_view title = {}, Point shift = {});
  void end_group();

  /// The whole picture on white, with a title and a description for readers who cannot see it.
  [[nodiscard]] std::string document(double width,
                                     double height,
                                     std::string_view title,
                                     std::string_view description) const;

 private:
  void attributes(std::string_view fill, const Pen& pen);
  void begin_text(Point at, const TextStyle& style);
  std::string body_;
  int open_groups_ = 0;
};

}  // namespace bismar::report
