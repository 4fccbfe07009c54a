// SPDX-License-Identifier: MIT
#include <algorithm>
#include <cmath>
#include <set>
#include <utility>

#include <bismar/report/labels.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include "report/plot.hpp"
#include "report/tradeoff_labels.hpp"
#include "report/words.hpp"

namespace bismar::report {
namespace {

constexpr double plot_left = 78.0;
constexpr double plot_width = theme::page - plot_left - theme::margin;
constexpr double plot_height = 430.0;

struct Span {
  double low = 0.0;
  double high = 0.0;
};

// The view of one axis: the kept designs, room for labels, and the cap where it is not far away.
Axis make_axis(Span data, const std::optional<double>& cap, double at_low, double at_high) {
  const bool logarithmic = data.low > 0.0 && data.high / data.low > 9.0;
  if (logarithmic) {
    const double decades = std::log(data.high / data.low);
    const double low = data.low * std::exp(-0.10 * decades);
    double high = data.high * std::exp(0.22 * decades);
    if (cap && *cap >= low && *cap <= data.high * std::exp(0.5 * decades)) {
      high = std::max(high, *cap * std::exp(0.04 * decades));
    }
    return {low, high, true, at_low, at_high};
  }
  double span = data.high - data.low;
  if (span <= 0.06 * std::abs(data.high)) span = 0.35 * std::max(std::abs(data.high), 1e-9);
  double low = data.low - 0.14 * span;
  if (data.low >= 0.0 && low < 0.25 * data.high) low = 0.0;
  double high = data.high + 0.28 * span;
  if (cap && *cap >= low && *cap <= data.high + 0.8 * span)
    high = std::max(high, *cap + 0.06 * span);
  return {low, high, false, at_low, at_high};
}

Plot make_plot(const Result& result, const PictureOptions& options, double top) {
  Span mass{result.designs.front().mass, result.designs.front().mass};
  Span cost{result.designs.front().cost, result.designs.front().cost};
  for (const Design& d : result.designs) {
    mass = {std::min(mass.low, d.mass), std::max(mass.high, d.mass)};
    cost = {std::min(cost.low, d.cost), std::max(cost.high, d.cost)};
  }
  return {make_axis(mass, options.mass_cap, plot_left, plot_left + plot_width),
          make_axis(cost, options.cost_cap, top + plot_height, top)};
}

void draw_axes(Svg& svg, const Plot& plot, const std::string& currency) {
  const Box area = plot.area();
  const Pen grid{.colour = theme::hair, .width = 0.6};
  const TextStyle figure{.size = 11.0, .colour = theme::muted, .anchor = TextStyle::Anchor::middle};
  double last = -1e9;
  for (const Tick& tick : plot.mass.ticks()) {
    const double x = plot.mass.at(tick.value);
    svg.line({x, area.bottom()}, {x, area.bottom() + (tick.major ? 6.0 : 3.0)}, {.width = 0.8});
    if (!tick.major) continue;
    const std::string text = tick_text(tick.value);
    const double half = 0.5 * text_width(text, figure.size);
    if (x - half < last + 5.0) continue;
    last = x + half;
    svg.line({x, area.y}, {x, area.bottom()}, grid);
    svg.text({x, area.bottom() + 19.0}, text, figure);
  }
  TextStyle side = figure;
  side.anchor = TextStyle::Anchor::end;
  last = 1e9;
  for (const Tick& tick : plot.cost.ticks()) {
    const double y = plot.cost.at(tick.value);
    svg.line({area.x - (tick.major ? 6.0 : 3.0), y}, {area.x, y}, {.width = 0.8});
    if (!tick.major || y > last - 13.0) continue;
    last = y;
    svg.line({area.x, y}, {area.right(), y}, grid);
    svg.text({area.x - 9.0, y + 4.0}, tick_text(tick.value), side);
  }
  svg.text({area.centre().x, area.bottom() + 37.0},
           std::string("mass of a part [kg]") + (plot.mass.logarithmic() ? ", logarithmic" : ""),
           {.size = 12.0, .anchor = TextStyle::Anchor::middle});
  svg.text({area.x - 50.0, area.centre().y},
           "unit cost [" + currency + "]" + (plot.cost.logarithmic() ? ", logarithmic" : ""),
           {.size = 12.0, .anchor = TextStyle::Anchor::middle, .rotate = -90.0});
}

// One dot for each cell of two pixels: a hundred thousand designs must not make a heavy file.
std::size_t draw_others(Svg& svg, const Result& result, const Plot& plot) {
  std::set<std::pair<long, long>> cells;
  std::size_t outside = 0;
  for (const FeasiblePoint& p : result.others) {
    if (!plot.shows(p.mass, p.cost)) {
      ++outside;
      continue;
    }
    const Point at = plot.at(p.mass, p.cost);
    cells.emplace(std::lround(0.5 * at.x), std::lround(0.5 * at.y));
  }
  std::string data;
  for (const auto& [x, y] : cells) {
    data += "M" + std::to_string(2 * x) + " " + std::to_string(2 * y) + "h0";
  }
  if (!data.empty()) svg.path(data, "none", {.colour = theme::faint, .width = 2.4, .round = true});
  return outside;
}

std::vector<Point> staircase(const Result& result, const Plot& plot) {
  const Box area = plot.area();
  std::vector<Point> points;
  for (std::size_t d = 0; d < result.front_count; ++d) {
    const Point at = plot.at(result.designs[d].mass, result.designs[d].cost);
    if (points.empty()) {
      points.push_back({at.x, area.y});
    } else {
      points.push_back({at.x, points.back().y});
    }
    points.push_back(at);
  }
  points.push_back({area.right(), points.back().y});
  return points;
}

void draw_cap(Svg& svg, Point from, Point to, Point outward) {
  const Pen pen{.colour = theme::bound, .width = 1.6};
  svg.line(from, to, pen);
  // Short strokes on the forbidden side, as ground is hatched on drawings.
  const double length = std::abs(to.x - from.x) + std::abs(to.y - from.y);
  const Point along{(to.x - from.x) / length, (to.y - from.y) / length};
  for (double s = 6.0; s < length; s += 9.0) {
    const Point foot{from.x + s * along.x, from.y + s * along.y};
    svg.line(foot,
             {foot.x + 5.0 * (outward.x + along.x), foot.y + 5.0 * (outward.y + along.y)},
             {.colour = theme::bound, .width = 0.9});
  }
}

// Draws the caps in view; adds what they cover to the field; tells of those outside.
std::string draw_caps(Svg& svg,
                      const Plot& plot,
                      const std::string& currency,
                      const PictureOptions& options,
                      LabelField& field) {
  const Box area = plot.area();
  std::string outside;
  const TextStyle style{.size = 11.0, .colour = theme::bound};
  if (options.mass_cap) {
    const std::string text = "mass cap " + tick_text(*options.mass_cap) + " kg";
    if (plot.mass.shows(*options.mass_cap)) {
      const double x = plot.mass.at(*options.mass_cap);
      draw_cap(svg, {x, area.bottom()}, {x, area.y}, {1.0, 0.0});
      const double width = text_width(text, style.size);
      const Box box{x - width - 8.0, area.bottom() - 20.0, width, 14.0};
      svg.text({box.x, box.y + 11.0}, text, style);
      field.obstacles.push_back(box);
      field.obstacles.push_back({x - 1.0, area.y, 8.0, area.height});
    } else {
      outside += " The " + text + " lies outside the view.";
    }
  }
  double right = area.right();
  if (options.mass_cap && plot.mass.shows(*options.mass_cap))
    right = plot.mass.at(*options.mass_cap);
  if (options.cost_cap) {
    const std::string text = "cost cap " + tick_text(*options.cost_cap) + " " + currency;
    if (plot.cost.shows(*options.cost_cap)) {
      const double y = plot.cost.at(*options.cost_cap);
      draw_cap(svg, {area.x, y}, {area.right(), y}, {0.0, -1.0});
      const double width = text_width(text, style.size);
      const Box box{right - width - 10.0, y + 4.0, width, 14.0};
      svg.text({box.x, box.y + 11.0}, text, style);
      field.obstacles.push_back(box);
      field.obstacles.push_back({area.x, y - 7.0, area.width, 8.0});
    } else {
      outside += " The " + text + " lies outside the view.";
    }
  }
  return outside;
}

// The hull's edges; on logarithmic axes a straight exchange becomes a curve.
std::vector<std::vector<Point>> hull_edges(const Result& result,
                                           const Plot& plot,
                                           const std::vector<std::size_t>& supported) {
  std::vector<std::vector<Point>> edges;
  const bool straight = !plot.mass.logarithmic() && !plot.cost.logarithmic();
  const int pieces = straight ? 1 : 24;
  for (std::size_t i = 1; i < supported.size(); ++i) {
    const Design& a = result.designs[supported[i - 1]];
    const Design& b = result.designs[supported[i]];
    std::vector<Point> edge;
    for (int k = 0; k <= pieces; ++k) {
      const double t = static_cast<double>(k) / pieces;
      edge.push_back(plot.at(a.mass + t * (b.mass - a.mass), a.cost + t * (b.cost - a.cost)));
    }
    edges.push_back(std::move(edge));
  }
  return edges;
}

void draw_slopes(Svg& svg,
                 const Result& result,
                 const std::vector<std::size_t>& supported,
                 const std::vector<std::vector<Point>>& edges,
                 LabelField field) {
  // A figure that finds no free place is left out: the ruler has it too.
  field.barriers.insert(field.barriers.end(), field.strokes.begin(), field.strokes.end());
  std::vector<LabelRequest> requests;
  std::vector<std::string> texts;
  for (std::size_t i = 1; i < supported.size(); ++i) {
    const Design& a = result.designs[supported[i - 1]];
    const Design& b = result.designs[supported[i]];
    if (!(b.mass > a.mass)) continue;
    texts.push_back(number((a.cost - b.cost) / (b.mass - a.mass)));
    const std::vector<Point>& edge = edges[i - 1];
    const Point middle = edge.size() == 2
                             ? Point{0.5 * (edge[0].x + edge[1].x), 0.5 * (edge[0].y + edge[1].y)}
                             : edge[edge.size() / 2];
    requests.push_back({middle, 1.0, text_width(texts.back(), 10.0) + 2.0, 12.0, 8.0});
  }
  const auto places = place_labels(requests, field, 2.0);
  for (std::size_t i = 0; i < places.size(); ++i) {
    if (!places[i]) continue;
    svg.text({places[i]->box.centre().x, places[i]->box.y + 10.0},
             texts[i],
             {.size = 10.0,
              .colour = theme::accent,
              .anchor = TextStyle::Anchor::middle,
              .italic = true});
  }
}

void draw_legend(Svg& svg, const Result& result, bool unsupported, double near_band, double y) {
  const bool near = result.designs.size() > result.front_count;
  const bool others = !result.others.empty();
  double x = theme::margin + 6.0;
  const auto word = [&](const std::string& text) {
    svg.text({x + 12.0, y + 4.0}, text, {.size = 11.0, .colour = theme::muted});
    x += 12.0 + text_width(text, 11.0) + 22.0;
  };
  draw_disc(svg, {x, y});
  word(result.front_count == 1 ? "the only front design" : "best for some worth of a kilogram");
  if (unsupported) {
    draw_diamond(svg, {x, y});
    word("on the front, best for none");
  }
  if (near) {
    svg.circle({x, y}, 2.8, theme::paper, {.colour = theme::muted, .width = 0.9});
    word("within " + tick_text(100.0 * near_band) + " % of the front");
  }
  if (others) {
    svg.circle({x, y}, 1.4, theme::faint, {.width = 0.0});
    word("other feasible designs");
  }
}

}  // namespace

double draw_tradeoff(Svg& svg,
                     const Result& result,
                     const ExchangeRuler& ruler,
                     const PictureOptions& options,
                     std::vector<KeyEntry>& key) {
  const std::size_t front = result.front_count;
  const std::string name =
      result.part.empty() ? "Mass against cost" : result.part + ": mass against cost";
  double top = draw_title(
      svg,
      name,
      "Each mark is a way to make the part that meets every limit; to the lower left of the stairs "
      "there is none.");

  std::set<std::size_t> unsupported;
  for (const UnsupportedDesign& u : ruler.unsupported) unsupported.insert(u.design);
  std::vector<std::size_t> supported;
  for (std::size_t d = 0; d < front; ++d) {
    if (unsupported.count(d) == 0) supported.push_back(d);
  }
  draw_legend(svg, result, !unsupported.empty(), options.near, top + 16.0);
  top += 34.0;

  const Plot plot = make_plot(result, options, top);
  const Box area = plot.area();
  const std::vector<Point> stairs = staircase(result, plot);
  std::vector<Point> attainable = stairs;
  attainable.push_back({area.right(), area.y});
  svg.polygon(attainable, theme::wash, {.width = 0.0});
  draw_axes(svg, plot, result.currency);
  const std::size_t outside = draw_others(svg, result, plot);

  LabelField field;
  field.area = {area.x + 3.0, area.y + 3.0, area.width - 6.0, area.height - 6.0};
  const std::string caps_outside = draw_caps(svg, plot, result.currency, options, field);
  for (std::size_t d = front; d < result.designs.size(); ++d) {
    const Point at = plot.at(result.designs[d].mass, result.designs[d].cost);
    svg.circle(at, 2.8, theme::paper, {.colour = theme::muted, .width = 0.9});
    field.dots.push_back(at);
  }
  const auto edges = hull_edges(result, plot, supported);
  for (const auto& edge : edges) {
    svg.polyline(edge, {.colour = theme::accent, .width = 0.9, .dash = "5 3"});
    for (std::size_t i = 1; i < edge.size(); ++i) field.strokes.push_back({edge[i - 1], edge[i]});
  }
  svg.polyline(stairs, {.colour = theme::ink, .width = 1.5, .round = true});
  for (std::size_t i = 1; i < stairs.size(); ++i)
    field.strokes.push_back({stairs[i - 1], stairs[i]});
  svg.rectangle(area, "none", {.colour = theme::ink, .width = 0.9});

  const ChoiceLetters letters(ruler);
  std::vector<Entry> entries;
  const std::vector<Representative> folded = fold_front(result, &ruler, options.fold);
  for (const Representative& r : folded) entries.push_back(make_entry(result, r, ruler, letters));
  // Choices of the ruler get their labels first.
  std::stable_sort(entries.begin(), entries.end(), [&](const Entry& a, const Entry& b) {
    const auto rank = [&](const Entry& e) {
      return !e.letter.empty() ? 0 : unsupported.count(e.design) == 0 ? 1 : 2;
    };
    return rank(a) < rank(b);
  });
  // Markers of designs folded under another are drawn too, so labels must not cover them.
  for (const Representative& r : folded) {
    for (const std::size_t d : r.alike) {
      if (d >= front) continue;
      const Point at = plot.at(result.designs[d].mass, result.designs[d].cost);
      field.obstacles.push_back({at.x - 4.0, at.y - 4.0, 8.0, 8.0});
    }
  }
  std::size_t unnamed = 0;
  for (KeyEntry& entry : draw_labels(svg, result, plot, entries, field, unnamed)) {
    key.push_back(std::move(entry));
  }
  draw_slopes(svg, result, supported, edges, field);

  for (std::size_t d = 0; d < front; ++d) {
    const Design& design = result.designs[d];
    const Point at = plot.at(design.mass, design.cost);
    svg.begin_group(std::to_string(d + 1) + ": " + material_of(design) + ", " +
                    shape_and_size(design) + ", " + made_by(design) + ", " + number(design.mass) +
                    " kg, " + money(design.cost) + " " + result.currency);
    if (unsupported.count(d) == 0) {
      draw_disc(svg, at);
    } else {
      draw_diamond(svg, at);
    }
    svg.end_group();
  }

  double y = area.bottom() + 44.0;
  std::string caption;
  if (supported.size() > 1) {
    caption =
        "Reading alpha: designs of equal cost + alpha x mass lie on a line that falls to the right "
        "by "
        "alpha " +
        result.currency + " per kg";
    if (plot.mass.logarithmic() || plot.cost.logarithmic())
      caption += " (a curve on logarithmic axes)";
    caption +=
        "; the best design for that alpha is the one such a line touches first from the lower "
        "left. Figures on the dashed line: the alpha at which the best design changes.";
  }
  if (outside > 0) {
    caption += " " + count(outside) +
               (outside == 1 ? " feasible design lies" : " feasible designs lie") +
               " outside the view.";
  }
  caption += caps_outside;
  if (unnamed > 0) {
    caption += " " + count(unnamed) + (unnamed == 1 ? " front design is" : " front designs are") +
               " too close to others for a label: see the table.";
  }
  if (!caption.empty()) y = draw_small(svg, caption, y);
  return y;
}

}  // namespace bismar::report
