// SPDX-License-Identifier: MIT
#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <set>

#include <bismar/report/labels.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include "report/plot.hpp"
#include "report/ruler_rows.hpp"
#include "report/words.hpp"

namespace bismar::report {
namespace {

using ruler_page::beam_height;
using ruler_page::beam_tip;
using ruler_page::left;
using ruler_page::right;

constexpr double name_size = 11.0;
constexpr double name_row = 13.0;

// From well below the first breakpoint to well above the last one.
Axis make_axis(const ExchangeRuler& ruler, const PictureOptions& options) {
  double low = std::numeric_limits<double>::infinity();
  double high = 0.0;
  for (const NamedStretch& stretch : ruler.stretches) {
    if (!stretch.to || *stretch.to <= 0.0) continue;
    low = std::min(low, *stretch.to);
    high = std::max(high, *stretch.to);
  }
  if (high <= 0.0) {
    low = 1.0;
    high = 10.0;
  }
  low = options.alpha_from.value_or(low / 4.0);
  high = options.alpha_to.value_or(high * 4.0);
  if (!(low > 0.0) || !(high > low * 1.001)) {
    // Ends that leave no scale between them: a decade from the lower one.
    low = low > 0.0 ? low : 1.0;
    high = low * 10.0;
  }
  return {low, high, true, left, right};
}

struct NameBlock {
  std::string letter;
  std::vector<std::string> lines;
  std::size_t strong = 0;  // lines of the choice itself
  double width = 0.0;
};

NameBlock name_block(const Result& result,
                     const NamedStretch& stretch,
                     const std::string& letter,
                     double wrap_at) {
  NameBlock block;
  block.letter = letter;
  const double indent = text_width(letter, name_size, true) + 5.0;
  block.lines = wrap_text(choice_name(result, stretch.choice), name_size, wrap_at - indent);
  block.strong = block.lines.size();
  if (stretch.design < result.designs.size()) {
    for (std::string& line :
         wrap_text(shape_and_size(result.designs[stretch.design]), name_size, wrap_at - indent)) {
      block.lines.push_back(std::move(line));
    }
  }
  block.lines.push_back(number(stretch.mass) + " kg, " + money(stretch.cost));
  for (const std::string& line : block.lines) {
    block.width = std::max(block.width, indent + text_width(line, name_size));
  }
  return block;
}

// Names over the beam, each tied to its stretch; letters alone where the names have no room.
// Returns the top of the beam.
double draw_names(Svg& svg,
                  const Result& result,
                  const ExchangeRuler& ruler,
                  const ChoiceLetters& letters,
                  const std::vector<Cut>& cuts,
                  double top,
                  std::vector<KeyEntry>& key,
                  bool& lettered) {
  std::vector<double> centres;
  for (const Cut& c : cuts) centres.push_back(c.middle());
  const double room = right + beam_tip - theme::margin;
  for (const double wrap_at : {170.0, 140.0, 115.0, 95.0}) {
    std::vector<NameBlock> blocks;
    std::vector<double> widths;
    std::size_t rows = 0;
    for (const Cut& c : cuts) {
      const NamedStretch& stretch = ruler.stretches[c.stretch];
      blocks.push_back(name_block(result, stretch, letters.letter(stretch.choice), wrap_at));
      widths.push_back(blocks.back().width);
      rows = std::max(rows, blocks.back().lines.size());
    }
    const auto places = fan_out(centres, widths, theme::margin, theme::margin + room, 14.0);
    if (!places) continue;
    const double bottom = top + name_row * static_cast<double>(rows);
    const double beam = bottom + 26.0;
    for (std::size_t i = 0; i < blocks.size(); ++i) {
      const NameBlock& block = blocks[i];
      const double x = (*places)[i] - 0.5 * widths[i];
      const double indent = text_width(block.letter, name_size, true) + 5.0;
      double y = bottom - name_row * static_cast<double>(block.lines.size()) + name_row - 3.0;
      svg.text({x, y}, block.letter, {.size = name_size, .colour = theme::accent, .bold = true});
      for (std::size_t l = 0; l < block.lines.size(); ++l) {
        svg.text({x + indent, y},
                 block.lines[l],
                 {.size = name_size, .colour = l < block.strong ? theme::ink : theme::muted});
        y += name_row;
      }
      const std::array<Point, 3> leader = {
          {{x + 0.5 * widths[i], bottom + 4.0}, {centres[i], beam - 7.0}, {centres[i], beam}}};
      svg.polyline(leader, {.colour = theme::muted, .width = 0.7});
    }
    return beam;
  }

  // Too many for names: letters over the beam, the names in the key.
  std::vector<double> widths;
  for (const Cut& c : cuts) {
    widths.push_back(
        text_width(letters.letter(ruler.stretches[c.stretch].choice), name_size, true));
  }
  double gap = 8.0;
  auto places = fan_out(centres, widths, theme::margin, theme::margin + room, gap);
  while (!places && gap > 1.0) {
    gap -= 1.0;
    places = fan_out(centres, widths, theme::margin, theme::margin + room, gap);
  }
  const double beam = top + name_row + 26.0;
  for (std::size_t i = 0; i < cuts.size(); ++i) {
    const NamedStretch& stretch = ruler.stretches[cuts[i].stretch];
    std::string text = choice_name(result, stretch.choice);
    if (stretch.design < result.designs.size()) {
      text += ", " + shape_and_size(result.designs[stretch.design]);
    }
    key.push_back({letters.letter(stretch.choice),
                   text + ": " + number(stretch.mass) + " kg, " + money(stretch.cost) + " " +
                       result.currency});
    lettered = places.has_value();
    if (!places) continue;
    const double x = (*places)[i];
    svg.text({x, top + name_row - 3.0},
             key.back().mark,
             {.size = name_size,
              .colour = theme::accent,
              .anchor = TextStyle::Anchor::middle,
              .bold = true});
    const std::array<Point, 3> leader = {
        {{x, top + name_row + 2.0}, {centres[i], beam - 7.0}, {centres[i], beam}}};
    svg.polyline(leader, {.colour = theme::muted, .width = 0.7});
  }
  return beam;
}

void draw_beam(Svg& svg,
               const Result& result,
               const ExchangeRuler& ruler,
               const Axis& axis,
               const std::vector<Cut>& cuts,
               double top) {
  const double bottom = top + beam_height;
  const double middle = top + 0.5 * beam_height;
  for (std::size_t i = 0; i < cuts.size(); ++i) {
    const Cut& c = cuts[i];
    const NamedStretch& stretch = ruler.stretches[c.stretch];
    svg.begin_group(alpha_span(stretch.from, stretch.to) + " " + result.currency +
                    "/kg: " + choice_name(result, stretch.choice));
    std::vector<Point> outline = {{c.from, top}, {c.to, top}};
    if (c.to >= right - 0.01) outline.push_back({right + beam_tip, middle});
    outline.push_back({c.to, bottom});
    outline.push_back({c.from, bottom});
    if (c.from <= left + 0.01) outline.push_back({left - beam_tip, middle});
    svg.polygon(outline,
                c.stretch % 2 == 0 ? theme::tint : theme::paper,
                {.colour = theme::ink, .width = 1.2, .round = true});
    svg.end_group();
  }
  // Graduations along the lower edge, as on a measuring rod.
  for (const Tick& tick : axis.ticks()) {
    const double x = axis.at(tick.value);
    svg.line(
        {x, bottom}, {x, bottom - (tick.major ? 10.0 : 5.0)}, {.width = tick.major ? 1.0 : 0.6});
  }
}

// The breakpoints' values under the beam.
double draw_breakpoints(Svg& svg,
                        const ExchangeRuler& ruler,
                        const Axis& axis,
                        double beam_bottom) {
  std::vector<double> at;
  std::vector<double> widths;
  std::vector<std::string> texts;
  constexpr double size = 11.0;
  for (const NamedStretch& stretch : ruler.stretches) {
    if (!stretch.to || *stretch.to <= axis.low() || *stretch.to >= axis.high()) continue;
    at.push_back(axis.at(*stretch.to));
    texts.push_back(number(*stretch.to));
    widths.push_back(text_width(texts.back(), size));
  }
  const auto places = fan_out(at, widths, theme::margin, right + beam_tip, 7.0);
  if (places) {
    for (std::size_t i = 0; i < at.size(); ++i) {
      const std::array<Point, 3> leader = {
          {{at[i], beam_bottom}, {at[i], beam_bottom + 5.0}, {(*places)[i], beam_bottom + 15.0}}};
      svg.polyline(leader, {.colour = theme::ink, .width = 0.8});
      svg.text({(*places)[i], beam_bottom + 26.0},
               texts[i],
               {.size = size, .anchor = TextStyle::Anchor::middle});
    }
    return beam_bottom + 34.0;
  }
  // Upright figures take the room of their height only.
  const std::vector<double> heights(at.size(), size);
  const auto upright = fan_out(at, heights, theme::margin, right + beam_tip, 1.0);
  double tallest = 0.0;
  for (const double width : widths) tallest = std::max(tallest, width);
  if (!upright) return beam_bottom + 12.0;
  for (std::size_t i = 0; i < at.size(); ++i) {
    const double x = (*upright)[i];
    const std::array<Point, 3> leader = {
        {{at[i], beam_bottom}, {at[i], beam_bottom + 5.0}, {x, beam_bottom + 15.0}}};
    svg.polyline(leader, {.colour = theme::ink, .width = 0.6});
    svg.text({x + 4.0, beam_bottom + 18.0},
             texts[i],
             {.size = size, .anchor = TextStyle::Anchor::end, .rotate = -90.0});
  }
  return beam_bottom + 22.0 + tallest;
}

double draw_scale(Svg& svg, const Axis& axis, const std::string& currency, double top) {
  double last = -1e9;
  svg.line({left, top}, {right, top}, {.width = 0.9});
  for (const Tick& tick : axis.ticks()) {
    const double x = axis.at(tick.value);
    svg.line({x, top}, {x, top + (tick.major ? 6.0 : 3.0)}, {.width = 0.8});
    if (!tick.major) continue;
    const std::string text = tick_text(tick.value);
    const double half = 0.5 * text_width(text, 11.0);
    if (x - half < last + 6.0) continue;
    last = x + half;
    svg.text({x, top + 18.0},
             text,
             {.size = 11.0, .colour = theme::muted, .anchor = TextStyle::Anchor::middle});
  }
  svg.text({0.5 * (left + right), top + 35.0},
           "alpha, the worth of a saved kilogram [" + currency + "/kg], logarithmic",
           {.size = 12.0, .anchor = TextStyle::Anchor::middle});
  return top + 40.0;
}

std::string unsupported_text(const Result& result, const ExchangeRuler& ruler) {
  constexpr std::size_t most = 4;
  std::string text;
  std::size_t told = 0;
  for (const UnsupportedDesign& u : ruler.unsupported) {
    if (u.design >= result.designs.size()) continue;
    if (told++ == most) break;
    const Design& d = result.designs[u.design];
    text += text.empty() ? "Diamonds: on the front, yet no alpha chooses them: " : "; ";
    text += material_of(d) + ", " + shape_and_size(d) + " (at best " + money(u.regret) + " " +
            result.currency + " behind, at " + number(u.at) + ")";
  }
  if (ruler.unsupported.size() > most) {
    text += "; and " + count(ruler.unsupported.size() - most) + " more";
  }
  return text.empty() ? text : text + ".";
}

}  // namespace

double draw_ruler(Svg& svg,
                  const Result& result,
                  const ExchangeRuler& ruler,
                  const PictureOptions& options,
                  std::vector<KeyEntry>& key) {
  double y = draw_title(
      svg,
      "Exchange ruler: what is a saved kilogram worth?",
      "Find your alpha on the beam: the choice above it has the least cost + alpha x mass. "
      "At each cut the two neighbours come out equal.");
  const Axis axis = make_axis(ruler, options);
  std::vector<Cut> cuts;
  for (std::size_t s = 0; s < ruler.stretches.size(); ++s) {
    auto c = cut(axis, ruler.stretches[s].from, ruler.stretches[s].to);
    if (!c) continue;
    c->stretch = s;
    cuts.push_back(*c);
  }
  const ChoiceLetters letters(ruler);
  bool lettered = true;
  const double beam = draw_names(svg, result, ruler, letters, cuts, y + 12.0, key, lettered);
  draw_beam(svg, result, ruler, axis, cuts, beam);
  y = draw_breakpoints(svg, ruler, axis, beam + beam_height);

  const std::vector<SubStretch> subs = sub_stretches(ruler, axis);
  std::size_t unnamed = 0;
  std::set<std::string> seconds;
  if (!subs.empty()) {
    y = draw_regret(svg, result, ruler, axis, subs, y + 22.0);
    y = draw_runners_up(svg, result, subs, letters, y + 5.0, unnamed, seconds) + 5.0;
  }
  y = draw_scale(svg, axis, result.currency, y + 2.0) + 4.0;

  // Letters of the second row that no name over the beam explains; a letter that stands nowhere is
  // left out.
  for (const std::string& name : letters.names()) {
    const bool named = std::any_of(cuts.begin(), cuts.end(), [&](const Cut& c) {
      return ruler.stretches[c.stretch].choice == name;
    });
    if (named || seconds.count(name) == 0) continue;
    const bool chosen = std::any_of(ruler.stretches.begin(),
                                    ruler.stretches.end(),
                                    [&](const NamedStretch& s) { return s.choice == name; });
    key.push_back({letters.letter(name),
                   choice_name(result, name) +
                       (chosen ? " (chosen outside the scale shown)" : " (runner-up only)")});
  }
  std::string remarks;
  if (cuts.size() < ruler.stretches.size()) {
    remarks = count(ruler.stretches.size() - cuts.size()) + " of " + count(ruler.stretches.size()) +
              " stretches lie outside the scale shown. ";
  }
  if (!lettered) {
    remarks += "The beam has no room for letters: its stretches follow the order of the key. ";
  }
  if (unnamed > 0) {
    remarks +=
        count(unnamed) + " narrow sub-stretches of the second row carry no letter: see the table. ";
  }
  remarks += unsupported_text(result, ruler);
  if (!remarks.empty()) y = draw_small(svg, remarks, y + 4.0);
  return y;
}

}  // namespace bismar::report
