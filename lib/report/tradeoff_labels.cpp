// SPDX-License-Identifier: MIT
#include "report/tradeoff_labels.hpp"

#include <algorithm>
#include <span>

#include <bismar/report/table.hpp>

#include "report/words.hpp"

namespace bismar::report {
namespace {

constexpr double label_size = 11.0;
constexpr double label_row = 13.0;
constexpr double widest_label = 185.0;
constexpr std::size_t most_named = 14;  // more names than this make a plot restless

LabelRequest request_for(const Design& d,
                         const Plot& plot,
                         const std::string& mark,
                         const std::vector<std::string>& lines,
                         double reach) {
  LabelRequest request;
  request.marker = plot.at(d.mass, d.cost);
  request.radius = 6.5;
  double indent = mark.empty() ? 0.0 : text_width(mark + " ", label_size, true);
  for (const std::string& line : lines) {
    request.width = std::max(request.width, indent + text_width(line, label_size) + 2.0);
    indent = 0.0;
  }
  request.height = label_row * static_cast<double>(lines.size()) + 1.0;
  request.reach = reach;
  return request;
}

void draw_label(Svg& svg,
                const LabelPlace& place,
                const std::string& mark,
                const std::vector<std::string>& lines,
                double marker_x,
                std::size_t strong_lines,
                const LabelField& field) {
  if (place.leader)
    svg.line(place.leader->from, place.leader->to, {.colour = theme::muted, .width = 0.7});
  const bool on_strokes = std::any_of(field.strokes.begin(),
                                      field.strokes.end(),
                                      [&](const Segment& s) { return crosses(s, place.box); });
  if (on_strokes) svg.rectangle(place.box, theme::paper, {.width = 0.0, .opacity = 0.85}, 2.0);
  // Lines lean towards their marker.
  const bool left = place.box.centre().x < marker_x && place.box.right() <= marker_x;
  double y = place.box.y + label_row - 2.5;
  for (std::size_t i = 0; i < lines.size(); ++i) {
    const Point at{left ? place.box.right() - 1.0 : place.box.x + 1.0, y};
    const TextStyle style{.size = label_size,
                          .colour = i < strong_lines ? theme::ink : theme::muted,
                          .anchor = left ? TextStyle::Anchor::end : TextStyle::Anchor::start};
    if (i == 0 && !mark.empty()) {
      svg.marked_text(at, mark, theme::accent, lines[i], style);
    } else {
      svg.text(at, lines[i], style);
    }
    y += label_row;
  }
}

}  // namespace

Entry make_entry(const Result& result,
                 const Representative& r,
                 const ExchangeRuler& ruler,
                 const ChoiceLetters& letters) {
  const Design& d = result.designs[r.design];
  Entry entry;
  entry.design = r.design;
  for (const NamedStretch& stretch : ruler.stretches) {
    if (stretch.design == r.design) entry.letter = letters.letter(stretch.choice);
  }
  const std::string alike =
      r.alike.empty() ? "" : " (+" + std::to_string(r.alike.size()) + " alike)";
  entry.lines = wrap_text(material_of(d), label_size, widest_label);
  entry.name_lines = entry.lines.size();
  for (std::string& line : wrap_text(shape_and_size(d) + alike, label_size, widest_label)) {
    entry.lines.push_back(std::move(line));
  }
  entry.key_text = material_of(d) + ", " + shape_and_size(d) + alike + ": " + number(d.mass) +
                   " kg, " + money(d.cost) + " " + result.currency;
  return entry;
}

std::vector<KeyEntry> draw_labels(Svg& svg,
                                  const Result& result,
                                  const Plot& plot,
                                  const std::vector<Entry>& entries,
                                  LabelField& field,
                                  std::size_t& unnamed) {
  std::vector<LabelRequest> requests;
  for (const Entry& entry : entries) {
    requests.push_back(
        request_for(result.designs[entry.design], plot, entry.letter, entry.lines, 95.0));
  }
  const std::size_t named = requests.size() <= most_named ? requests.size() : 0;
  const auto marker_box = [&](std::size_t i) {
    const Point m = requests[i].marker;
    return Box{m.x - 6.5, m.y - 6.5, 13.0, 13.0};
  };
  // The markers of points that are not to be named are obstacles all the same.
  LabelField first = field;
  for (std::size_t i = named; i < requests.size(); ++i) first.obstacles.push_back(marker_box(i));
  const auto places = place_labels(std::span(requests).first(named), first);
  std::vector<std::size_t> left_over;
  for (std::size_t i = 0; i < requests.size(); ++i) {
    if (i >= named || !places[i]) {
      left_over.push_back(i);
      continue;
    }
    draw_label(svg,
               *places[i],
               entries[i].letter,
               entries[i].lines,
               requests[i].marker.x,
               entries[i].name_lines,
               field);
    field.obstacles.push_back(places[i]->box);
    field.obstacles.push_back(marker_box(i));
    if (places[i]->leader) field.barriers.push_back(*places[i]->leader);
  }

  std::vector<LabelRequest> marks;
  std::vector<std::string> texts;
  for (const std::size_t i : left_over) {
    const Entry& entry = entries[i];
    texts.push_back(entry.letter.empty() ? std::to_string(entry.design + 1) : entry.letter);
    marks.push_back(request_for(result.designs[entry.design], plot, texts.back(), {""}, 70.0));
  }
  std::vector<KeyEntry> key;
  const auto mark_places = place_labels(marks, field, 2.0);
  for (std::size_t k = 0; k < marks.size(); ++k) {
    if (!mark_places[k]) {
      ++unnamed;
      continue;
    }
    draw_label(svg, *mark_places[k], texts[k], {""}, marks[k].marker.x, 1, field);
    field.obstacles.push_back(mark_places[k]->box);
    if (mark_places[k]->leader) field.barriers.push_back(*mark_places[k]->leader);
    key.push_back({texts[k], entries[left_over[k]].key_text});
  }
  for (const std::size_t i : left_over) field.obstacles.push_back(marker_box(i));
  return key;
}

}  // namespace bismar::report
