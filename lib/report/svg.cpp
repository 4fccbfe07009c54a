// SPDX-License-Identifier: MIT
#include <bismar/report/svg.hpp>

#include <algorithm>
#include <array>
#include <cmath>

#include <bismar/error.hpp>
#include <bismar/report/table.hpp>

#include "report/utf8.hpp"

namespace bismar::report {
namespace {

// Advance widths in thousandths of the size: U+0020 to U+007E.
constexpr std::array<std::uint16_t, 95> ascii_widths = {
    318, 401, 460, 838, 637, 951, 780, 275, 391, 391, 500, 838, 318, 361,  318, 337, 637, 637, 637,
    637, 637, 637, 637, 637, 637, 637, 337, 337, 838, 838, 838, 556, 1015, 685, 687, 722, 771, 667,
    611, 778, 752, 295, 500, 667, 558, 863, 749, 788, 667, 788, 722, 667,  611, 732, 685, 989, 686,
    667, 686, 391, 337, 391, 838, 556, 500, 613, 635, 550, 635, 616, 353,  635, 634, 278, 278, 580,
    278, 975, 634, 612, 635, 635, 412, 521, 393, 634, 592, 818, 592, 592,  525, 637, 337, 637, 838};
// U+00A0 to U+00FF.
constexpr std::array<std::uint16_t, 96> latin_widths = {
    343, 426, 662, 662, 662, 662, 362,  525, 525, 1025, 497, 637, 863, 386, 1025, 525,
    525, 863, 426, 426, 525, 662, 662,  343, 525, 426,  497, 637, 995, 995, 995,  556,
    710, 710, 710, 710, 710, 710, 1000, 724, 657, 657,  657, 657, 320, 320, 320,  320,
    800, 774, 813, 813, 813, 813, 813,  863, 813, 757,  757, 757, 757, 636, 630,  655,
    638, 638, 638, 638, 638, 638, 1007, 575, 641, 641,  641, 641, 303, 303, 303,  303,
    637, 659, 637, 637, 637, 637, 637,  863, 637, 659,  659, 659, 659, 617, 660,  617};
// The widest bold letters are 26 % wider than their regular forms, most of them under 15 %.
constexpr double bold_factor = 1.2;

double advance(char32_t c) {
  if (c >= 0x20 && c <= 0x7E) return ascii_widths[c - 0x20];
  if (c >= 0xA0 && c <= 0xFF) return latin_widths[c - 0xA0];
  if (terminal_columns(c) == 0) return 0.0;
  if (c < 0x20) return ascii_widths[0];
  if (c >= 0x370 && c < 0x400) return 940.0;
  return 1100.0;
}

bool allowed_in_xml(char32_t c) {
  return c == 0x9 || c == 0xA || c == 0xD || (c >= 0x20 && c != 0xFFFE && c != 0xFFFF);
}

std::string points_text(std::span<const Point> points) {
  std::string text;
  for (const Point& p : points) {
    if (!text.empty()) text += ' ';
    text.append(coordinate(p.x)).append(",").append(coordinate(p.y));
  }
  return text;
}

}  // namespace

std::string coordinate(double value) {
  if (!std::isfinite(value))
    throw InternalError("a picture was given a coordinate that is not finite");
  std::string text = fixed(value, 2);
  text.resize(text.find_last_not_of('0') + 1);
  if (text.back() == '.') text.pop_back();
  return text;
}

std::string escape_xml(std::string_view text) {
  std::string out;
  out.reserve(text.size());
  for (std::size_t at = 0; at < text.size();) {
    const Utf8Char c = utf8_at(text, at);
    switch (c.code) {
      case U'&':
        out += "&amp;";
        break;
      case U'<':
        out += "&lt;";
        break;
      case U'>':
        out += "&gt;";
        break;
      case U'"':
        out += "&quot;";
        break;
      case U'\'':
        out += "&#39;";
        break;
      case U'\uFFFD':
        out += "\xEF\xBF\xBD";
        break;
      default:
        if (allowed_in_xml(c.code)) {
          out += text.substr(at, c.bytes);
        } else {
          out += "\xEF\xBF\xBD";
        }
    }
    at += c.bytes;
  }
  return out;
}

double text_width(std::string_view text, double size, bool bold) {
  double thousandths = 0.0;
  for (std::size_t at = 0; at < text.size();) {
    const Utf8Char c = utf8_at(text, at);
    thousandths += advance(c.code);
    at += c.bytes;
  }
  return thousandths * 1e-3 * size * (bold ? bold_factor : 1.0);
}

std::vector<std::string> wrap_text(std::string_view text, double size, double width) {
  std::vector<std::string> lines(1);
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t start = text.find_first_not_of(" \n", at);
    if (start == std::string_view::npos) break;
    const std::size_t end = std::min(text.find_first_of(" \n", start), text.size());
    const std::string_view word = text.substr(start, end - start);
    at = end;
    std::string& line = lines.back();
    const std::string longer = line.empty() ? std::string(word) : line + " " + std::string(word);
    if (line.empty() || text_width(longer, size) <= width) {
      line = longer;
    } else {
      lines.emplace_back(word);
    }
  }
  return lines;
}

void Svg::attributes(std::string_view fill, const Pen& pen) {
  body_.append(" fill=\"").append(fill.empty() ? "none" : fill).append("\"");
  if (pen.width > 0.0) {
    body_.append(" stroke=\"").append(pen.colour).append("\" stroke-width=\"");
    body_.append(coordinate(pen.width)).append("\"");
    if (!pen.dash.empty()) body_.append(" stroke-dasharray=\"").append(pen.dash).append("\"");
    if (pen.round) body_ += " stroke-linecap=\"round\" stroke-linejoin=\"round\"";
  }
  if (pen.opacity < 1.0) body_.append(" opacity=\"").append(coordinate(pen.opacity)).append("\"");
}

void Svg::line(Point from, Point to, const Pen& pen) {
  body_.append("<line x1=\"")
      .append(coordinate(from.x))
      .append("\" y1=\"")
      .append(coordinate(from.y));
  body_.append("\" x2=\"").append(coordinate(to.x)).append("\" y2=\"").append(coordinate(to.y));
  body_ += '"';
  attributes({}, pen);
  body_ += "/>\n";
}

void Svg::polyline(std::span<const Point> points, const Pen& pen) {
  body_.append("<polyline points=\"").append(points_text(points)).append("\"");
  attributes({}, pen);
  body_ += "/>\n";
}

void Svg::polygon(std::span<const Point> points, std::string_view fill, const Pen& pen) {
  body_.append("<polygon points=\"").append(points_text(points)).append("\"");
  attributes(fill, pen);
  body_ += "/>\n";
}

void Svg::rectangle(const Box& box, std::string_view fill, const Pen& pen, double radius) {
  body_.append("<rect x=\"").append(coordinate(box.x)).append("\" y=\"").append(coordinate(box.y));
  body_.append("\" width=\"").append(coordinate(box.width)).append("\" height=\"");
  body_.append(coordinate(box.height)).append("\"");
  if (radius > 0.0) body_.append(" rx=\"").append(coordinate(radius)).append("\"");
  attributes(fill, pen);
  body_ += "/>\n";
}

void Svg::circle(Point centre, double radius, std::string_view fill, const Pen& pen) {
  body_.append("<circle cx=\"").append(coordinate(centre.x)).append("\" cy=\"");
  body_.append(coordinate(centre.y)).append("\" r=\"").append(coordinate(radius)).append("\"");
  attributes(fill, pen);
  body_ += "/>\n";
}

void Svg::ellipse(
    Point centre, double radius_x, double radius_y, std::string_view fill, const Pen& pen) {
  body_.append("<ellipse cx=\"").append(coordinate(centre.x)).append("\" cy=\"");
  body_.append(coordinate(centre.y)).append("\" rx=\"").append(coordinate(radius_x));
  body_.append("\" ry=\"").append(coordinate(radius_y)).append("\"");
  attributes(fill, pen);
  body_ += "/>\n";
}

void Svg::path(std::string_view data, std::string_view fill, const Pen& pen, bool even_odd) {
  body_.append("<path d=\"").append(data).append("\"");
  if (even_odd) body_ += " fill-rule=\"evenodd\"";
  attributes(fill, pen);
  body_ += "/>\n";
}

void Svg::begin_text(Point at, const TextStyle& style) {
  body_.append("<text x=\"").append(coordinate(at.x)).append("\" y=\"").append(coordinate(at.y));
  body_.append("\" font-size=\"").append(coordinate(style.size)).append("\" fill=\"");
  body_.append(style.colour).append("\"");
  if (style.anchor == TextStyle::Anchor::middle) body_ += " text-anchor=\"middle\"";
  if (style.anchor == TextStyle::Anchor::end) body_ += " text-anchor=\"end\"";
  if (style.bold) body_ += " font-weight=\"bold\"";
  if (style.italic) body_ += " font-style=\"italic\"";
  if (style.rotate != 0.0) {
    body_.append(" transform=\"rotate(").append(coordinate(style.rotate)).append(" ");
    body_.append(coordinate(at.x)).append(" ").append(coordinate(at.y)).append(")\"");
  }
  body_ += '>';
}

void Svg::text(Point at, std::string_view text, const TextStyle& style) {
  if (text.empty()) return;
  begin_text(at, style);
  body_.append(escape_xml(text)).append("</text>\n");
}

void Svg::marked_text(Point at,
                      std::string_view mark,
                      std::string_view mark_colour,
                      std::string_view text,
                      const TextStyle& style) {
  begin_text(at, style);
  body_.append("<tspan font-weight=\"bold\" fill=\"").append(mark_colour).append("\">");
  body_.append(escape_xml(mark)).append("</tspan>");
  // A no-break space, since plain blanks at the edge of an element may be dropped.
  if (!text.empty()) body_.append("\xC2\xA0").append(escape_xml(text));
  body_ += "</text>\n";
}

void Svg::begin_group(std::string_view title, Point shift) {
  body_ += "<g";
  if (shift.x != 0.0 || shift.y != 0.0) {
    body_.append(" transform=\"translate(").append(coordinate(shift.x)).append(" ");
    body_.append(coordinate(shift.y)).append(")\"");
  }
  body_ += ">\n";
  if (!title.empty()) body_.append("<title>").append(escape_xml(title)).append("</title>\n");
  ++open_groups_;
}

void Svg::end_group() {
  if (open_groups_ == 0) throw InternalError("a picture closes a group that it did not open");
  --open_groups_;
  body_ += "</g>\n";
}

std::string Svg::document(double width,
                          double height,
                          std::string_view title,
                          std::string_view description) const {
  if (open_groups_ != 0) throw InternalError("a picture leaves a group open");
  const std::string w = coordinate(width);
  const std::string h = coordinate(height);
  std::string out = "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n";
  out.append("<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"").append(w).append("\" height=\"");
  out.append(h).append("\" viewBox=\"0 0 ").append(w).append(" ").append(h);
  out += "\" role=\"img\" font-family=\"Liberation Sans, DejaVu Sans, sans-serif\">\n";
  out.append("<title>").append(escape_xml(title)).append("</title>\n");
  out.append("<desc>").append(escape_xml(description)).append("</desc>\n");
  out.append("<rect x=\"0\" y=\"0\" width=\"").append(w).append("\" height=\"").append(h);
  out += "\" fill=\"#ffffff\"/>\n";
  return out + body_ + "</svg>\n";
}

}  // namespace bismar::report
