// SPDX-License-Identifier: MIT
#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>
#include <span>
#include <vector>

#include <bismar/error.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include "report/plot.hpp"

namespace bismar {
namespace {

using report::Box;
using report::coordinate;
using report::Pen;
using report::Point;
using report::Svg;
using report::TextStyle;
namespace theme = report::theme;

using Rings = std::vector<std::vector<SectionPoint>>;

constexpr double page = 440.0;
constexpr double drawn = 210.0;  // the larger outside dimension
const Pen outline{.colour = theme::ink, .width = 1.6, .round = true};

std::string mm(double metres) { return report::tick_text(metres * 1e3) + " mm"; }

bool is_hollow(const SectionProperties& s) {
  return s.family == SectionFamily::round_tube || s.family == SectionFamily::rectangular_tube ||
         s.family == SectionFamily::elliptical_tube;
}

// Drawn from its thicknesses, without radii.
bool is_profile(const SectionProperties& s) {
  return s.family == SectionFamily::i_section || s.family == SectionFamily::channel ||
         s.family == SectionFamily::tee || s.family == SectionFamily::angle;
}

// A rounded rectangle has the perimeter 2 (h + b) - (8 - 2 pi) r.
double corner_radius(double height, double width, double perimeter) {
  const double r = (2.0 * (height + width) - perimeter) / (8.0 - 2.0 * std::numbers::pi);
  return std::clamp(r, 0.0, 0.5 * std::min(height, width));
}

std::string rounded_path(const Box& box, double radius) {
  const double r = std::min(radius, 0.5 * std::min(box.width, box.height));
  const auto point = [](double x, double y) { return coordinate(x) + " " + coordinate(y); };
  const std::string arc = "A" + coordinate(r) + " " + coordinate(r) + " 0 0 1 ";
  const bool round = r > 0.005;
  std::string path = "M" + point(box.x + r, box.y) + "L" + point(box.right() - r, box.y);
  if (round) path += arc + point(box.right(), box.y + r);
  path += "L" + point(box.right(), box.bottom() - r);
  if (round) path += arc + point(box.right() - r, box.bottom());
  path += "L" + point(box.x + r, box.bottom());
  if (round) path += arc + point(box.x, box.bottom() - r);
  path += "L" + point(box.x, box.y + r);
  if (round) path += arc + point(box.x + r, box.y);
  return path + "Z";
}

// Flange thickness that gives the area, without root radii: A = n b t + (h - n t) w.
double flange_thickness(const SectionProperties& s) {
  const double flanges = s.family == SectionFamily::tee ? 1.0 : 2.0;
  const double spread = flanges * (s.width - s.wall);
  if (!(spread > 0.0)) return s.wall;
  return std::clamp((s.area - s.height * s.wall) / spread, s.wall * 0.5, 0.45 * s.height);
}

// Corners of a profile in fractions of a metre, from the lower left corner of its envelope.
std::vector<SectionPoint> profile_corners(const SectionProperties& s) {
  const double b = s.width;
  const double h = s.height;
  const double w = s.wall;
  const double t = flange_thickness(s);
  const double left = 0.5 * (b - w);
  const double right = 0.5 * (b + w);
  switch (s.family) {
    case SectionFamily::channel:
      return {{0, 0}, {b, 0}, {b, t}, {w, t}, {w, h - t}, {b, h - t}, {b, h}, {0, h}};
    case SectionFamily::tee:
      return {{left, 0},
              {right, 0},
              {right, h - t},
              {b, h - t},
              {b, h},
              {0, h},
              {0, h - t},
              {left, h - t}};
    case SectionFamily::angle:
      return {{0, 0}, {b, 0}, {b, w}, {w, w}, {w, h}, {0, h}};
    default:
      return {{0, 0},
              {b, 0},
              {b, t},
              {right, t},
              {right, h - t},
              {b, h - t},
              {b, h},
              {0, h},
              {0, h - t},
              {left, h - t},
              {left, t},
              {0, t}};
  }
}

// Centroid from the lower left corner of the envelope [m]: its lowest and leftmost fibre tell it.
SectionPoint centroid_of(const SectionProperties& s) {
  SectionPoint centroid{0.5 * s.width, 0.5 * s.height};
  if (s.fibres.empty()) return centroid;
  centroid = {0.0, 0.0};
  for (const SectionPoint& fibre : s.fibres) {
    centroid.y = std::max(centroid.y, -fibre.y);
    centroid.z = std::max(centroid.z, -fibre.z);
  }
  return centroid;
}

void draw_corners(Svg& svg, std::span<const SectionPoint> corners, const Box& box, double scale) {
  std::vector<Point> points;
  for (const SectionPoint& corner : corners) {
    points.push_back({box.x + corner.y * scale, box.bottom() - corner.z * scale});
  }
  svg.polygon(points, theme::tint, outline);
}

// A regular hexagon with its flats level, and the convex outline of a polygon.
std::vector<SectionPoint> solid_corners(const SectionProperties& s) {
  if (s.family == SectionFamily::solid_hexagon) {
    const double b = s.width;
    const double h = s.height;
    return {{0.25 * b, 0}, {0.75 * b, 0}, {b, 0.5 * h}, {0.75 * b, h}, {0.25 * b, h}, {0, 0.5 * h}};
  }
  const SectionPoint centroid = centroid_of(s);
  std::vector<SectionPoint> corners;
  for (const SectionPoint& fibre : s.fibres) {
    corners.push_back({fibre.y + centroid.y, fibre.z + centroid.z});
  }
  return corners;
}

void draw_outline(Svg& svg, const SectionProperties& s, const Box& box, double scale) {
  const Point centre = box.centre();
  const double t = s.wall * scale;
  switch (s.family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_ellipse:
      svg.ellipse(centre, 0.5 * box.width, 0.5 * box.height, theme::tint, outline);
      return;
    case SectionFamily::solid_square:
    case SectionFamily::solid_rectangle:
      svg.rectangle(box, theme::tint, outline);
      return;
    case SectionFamily::round_tube:
    case SectionFamily::elliptical_tube:
      svg.ellipse(centre, 0.5 * box.width, 0.5 * box.height, theme::tint, outline);
      svg.ellipse(centre, 0.5 * box.width - t, 0.5 * box.height - t, theme::paper, outline);
      return;
    case SectionFamily::rectangular_tube: {
      const double outer = corner_radius(s.height, s.width, s.perimeter) * scale;
      const double inner =
          corner_radius(s.height - 2.0 * s.wall, s.width - 2.0 * s.wall, s.inner_perimeter) * scale;
      const Box bore{box.x + t, box.y + t, box.width - 2.0 * t, box.height - 2.0 * t};
      svg.path(rounded_path(box, outer) + rounded_path(bore, inner), theme::tint, outline, true);
      return;
    }
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
    case SectionFamily::angle:
      draw_corners(svg, profile_corners(s), box, scale);
      return;
    case SectionFamily::solid_hexagon:
    case SectionFamily::polygon:
      draw_corners(svg, solid_corners(s), box, scale);
      return;
  }
}

void arrow_head(Svg& svg, Point tip, Point direction, double length, std::string_view colour) {
  const Point back{tip.x - length * direction.x, tip.y - length * direction.y};
  const double half = 0.33 * length;
  const std::array<Point, 3> points = {
      {tip,
       {back.x - half * direction.y, back.y + half * direction.x},
       {back.x + half * direction.y, back.y - half * direction.x}}};
  svg.polygon(points, colour, {.width = 0.0});
}

void load_arrow(Svg& svg, Point tip, Point direction, std::string_view text) {
  constexpr double length = 46.0;
  const Point tail{tip.x - length * direction.x, tip.y - length * direction.y};
  const Point neck{tip.x - 10.0 * direction.x, tip.y - 10.0 * direction.y};
  svg.line(tail, neck, {.colour = theme::bound, .width = 2.6});
  arrow_head(svg, tip, direction, 14.0, theme::bound);
  if (direction.y > 0.0) {
    svg.text({tail.x + 9.0, tail.y + 12.0}, text, {.size = 12.0, .colour = theme::bound});
  } else {
    svg.text({tail.x, tail.y - 8.0}, text, {.size = 12.0, .colour = theme::bound});
  }
}

void draw_dimension(Svg& svg, Point from, Point to, std::string_view text, bool upright) {
  const Pen pen{.colour = theme::muted, .width = 0.8};
  svg.line(from, to, pen);
  const Point along = upright ? Point{0.0, 1.0} : Point{1.0, 0.0};
  arrow_head(svg, to, along, 8.0, theme::muted);
  arrow_head(svg, from, {-along.x, -along.y}, 8.0, theme::muted);
  const Point middle{0.5 * (from.x + to.x), 0.5 * (from.y + to.y)};
  const TextStyle style{
      .size = 12.0, .anchor = TextStyle::Anchor::middle, .rotate = upright ? -90.0 : 0.0};
  svg.text(
      upright ? Point{middle.x - 6.0, middle.y} : Point{middle.x, middle.y + 16.0}, text, style);
}

// Axes through the centroid; the loads act along them, so that they do not seem to twist.
void draw_axes(Svg& svg, const Box& box, Point centroid, const SectionPictureOptions& options) {
  const Pen chain{.colour = theme::muted, .width = 0.8, .dash = "12 3 2 3"};
  const double top = box.y - (options.load_along_z ? 72.0 : 22.0);
  svg.line({centroid.x, box.bottom() + 12.0}, {centroid.x, top + 6.0}, chain);
  arrow_head(svg, {centroid.x, top}, {0.0, -1.0}, 8.0, theme::muted);
  svg.text({centroid.x - 16.0, top + 7.0}, "z", {.size = 13.0, .italic = true});
  const double end = box.right() + 36.0;
  svg.line({box.x - 12.0, centroid.y}, {end - 6.0, centroid.y}, chain);
  arrow_head(svg, {end, centroid.y}, {1.0, 0.0}, 8.0, theme::muted);
  svg.text({end + 6.0, centroid.y + 4.0}, "y", {.size = 13.0, .italic = true});
  if (options.load_along_z) load_arrow(svg, {centroid.x, box.y - 2.0}, {0.0, 1.0}, options.load_z);
  if (options.load_along_y) load_arrow(svg, {box.x - 2.0, centroid.y}, {1.0, 0.0}, options.load_y);
}

void check_corners(FaultList& faults,
                   std::span<const SectionPoint> corners,
                   const std::string& where) {
  if (corners.size() < 3) {
    faults.add(Code::missing, where, "a polygon has at least 3 corners.");
  }
  for (const SectionPoint& corner : corners) {
    if (std::isfinite(corner.y) && std::isfinite(corner.z)) continue;
    faults.add(Code::not_finite, where, "the corners of a polygon must be finite numbers.");
    return;
  }
}

// The rings of a polygon, outline first, in metres from the lower left corner of its envelope.
Rings scaled_rings(const SectionProperties& s,
                   std::span<const SectionPoint> outer,
                   std::span<const std::vector<SectionPoint>> holes) {
  FaultList faults;
  check_corners(faults, outer, "outline");
  for (std::size_t i = 0; i < holes.size(); ++i) {
    check_corners(faults, holes[i], "holes/" + std::to_string(i));
  }
  faults.throw_if_any();
  const auto across = [](const SectionPoint& a, const SectionPoint& b) { return a.y < b.y; };
  const auto up = [](const SectionPoint& a, const SectionPoint& b) { return a.z < b.z; };
  const auto [left, right] = std::minmax_element(outer.begin(), outer.end(), across);
  const auto [low, high] = std::minmax_element(outer.begin(), outer.end(), up);
  const SectionPoint corner{left->y, low->z};
  const double scale = s.height / (high->z - low->z);
  const double width = scale * (right->y - left->y);
  // Looser than any rounding on the way from the outline to its properties.
  constexpr double same = 1e-6;
  if (!std::isfinite(scale) || std::abs(width - s.width) > same * s.width) {
    faults.add(Code::conflict,
               "outline",
               "the outline is not that of the section: at the section's height it has another "
               "width.");
    faults.throw_if_any();
  }
  const auto scaled = [&](std::span<const SectionPoint> ring) {
    std::vector<SectionPoint> out;
    for (const SectionPoint& p : ring) {
      out.push_back({scale * (p.y - corner.y), scale * (p.z - corner.z)});
    }
    return out;
  };
  Rings rings = {scaled(outer)};
  for (const std::vector<SectionPoint>& hole : holes) rings.push_back(scaled(hole));
  return rings;
}

void draw_rings(Svg& svg, const Rings& rings, const Box& box, double scale) {
  std::string path;
  for (const std::vector<SectionPoint>& ring : rings) {
    char command = 'M';
    for (const SectionPoint& p : ring) {
      path +=
          command + coordinate(box.x + p.y * scale) + " " + coordinate(box.bottom() - p.z * scale);
      command = 'L';
    }
    path += "Z";
  }
  svg.path(path, theme::tint, outline, true);
}

void require_size(const SectionProperties& s) {
  FaultList faults;
  const auto require = [&](double value, const char* name) {
    if (std::isfinite(value) && value > 0.0) return;
    faults.add(Code::out_of_range,
               name,
               std::string("the ") + name + " of a section must be finite and above zero.");
  };
  require(s.height, "height");
  require(s.width, "width");
  if (is_hollow(s) || is_profile(s)) require(s.wall, "wall");
  faults.throw_if_any();
}

// @param rings  Of a polygon that is drawn whole; empty: what the properties tell.
std::string draw_section(const SectionProperties& s,
                         const Rings& rings,
                         const SectionPictureOptions& options) {
  const double scale = drawn / std::max(s.height, s.width);
  Svg svg;
  double top = 18.0;
  for (const std::string& line : report::wrap_text(options.title, 14.0, page - 40.0)) {
    if (line.empty()) break;
    svg.text({20.0, top + 12.0}, line, {.size = 14.0});
    top += 19.0;
  }
  top += 82.0;  // axis and load arrow
  const double w = s.width * scale;
  const double h = s.height * scale;
  const Box box{0.5 * page - 0.5 * w + 8.0, top, w, h};

  // Extension lines first, so that the outline lies over them.
  const Pen extension{.colour = theme::faint, .width = 0.6};
  const double left = box.x - 62.0;
  const double below = box.bottom() + 34.0;
  for (const double edge : {box.y, box.bottom()}) {
    svg.line({box.centre().x, edge}, {left - 4.0, edge}, extension);
  }
  for (const double edge : {box.x, box.right()}) {
    svg.line({edge, box.centre().y}, {edge, below + 4.0}, extension);
  }
  draw_dimension(svg, {left, box.y}, {left, box.bottom()}, mm(s.height), true);
  draw_dimension(svg, {box.x, below}, {box.right(), below}, mm(s.width), false);

  if (rings.empty()) {
    draw_outline(svg, s, box, scale);
  } else {
    draw_rings(svg, rings, box, scale);
  }
  const SectionPoint offset = centroid_of(s);
  const Point centroid{box.x + offset.y * scale, box.bottom() - offset.z * scale};
  draw_axes(svg, box, centroid, options);
  if (is_hollow(s) || is_profile(s)) {
    const std::string text =
        (is_hollow(s) || s.family == SectionFamily::angle ? "wall " : "web ") + mm(s.wall);
    const double t = s.wall * scale;
    const double level = box.centre().y + 0.16 * h;
    Point on{box.right() - 0.5 * t, level};
    if (s.family == SectionFamily::i_section) on.x = box.centre().x;
    if (s.family == SectionFamily::tee) on.x = box.centre().x;
    if (s.family == SectionFamily::channel) on.x = box.x + 0.5 * t;
    if (s.family == SectionFamily::angle) on = {box.right() - 0.3 * w, box.bottom() - 0.5 * t};
    if (s.family == SectionFamily::round_tube || s.family == SectionFamily::elliptical_tube) {
      // On the middle of the wall at that level.
      const double rise = 0.16 * h / (0.5 * h - 0.5 * t);
      on.x = box.centre().x + (0.5 * w - 0.5 * t) * std::sqrt(std::max(0.0, 1.0 - rise * rise));
    }
    const Point knee{box.right() + 20.0, box.bottom() - 0.10 * h};
    svg.line(on, knee, {.colour = theme::muted, .width = 0.8});
    svg.circle(on, 2.0, theme::ink, {.width = 0.0});
    svg.text({knee.x + 3.0, knee.y + 5.0}, text, {.size = 12.0});
  }

  double y = below + 40.0;
  const auto note = [&](const std::string& text, double size) {
    for (const std::string& line : report::wrap_text(text, size, page - 40.0)) {
      svg.text({20.0, y}, line, {.size = size, .colour = theme::muted});
      y += size + 3.0;
    }
  };
  std::string facts = std::string("to scale; x points at the reader");
  if (is_profile(s)) {
    facts += s.family == SectionFamily::angle
                 ? "; radii left out"
                 : "; flange drawn so that the area is right, root radii left out";
  } else if (s.family == SectionFamily::polygon && rings.empty()) {
    facts += "; convex outline, recesses and holes left out";
  }
  note(facts, 10.5);
  y += 3.0;
  note(std::string(caution()), 8.0);
  return svg.document(page,
                      y + 4.0,
                      options.title.empty() ? "Section" : options.title,
                      "Cross-section to scale, " + mm(s.height) + " high along z and " +
                          mm(s.width) + " wide along y.");
}

}  // namespace

std::string section_svg(const SectionProperties& section, const SectionPictureOptions& options) {
  require_size(section);
  return draw_section(section, {}, options);
}

std::string section_svg(const SectionProperties& section,
                        std::span<const SectionPoint> outer,
                        std::span<const std::vector<SectionPoint>> holes,
                        const SectionPictureOptions& options) {
  require_size(section);
  return draw_section(section, scaled_rings(section, outer, holes), options);
}

}  // namespace bismar
