// SPDX-License-Identifier: MIT
#include "report/ruler_rows.hpp"

#include <algorithm>
#include <array>

#include <bismar/report/labels.hpp>
#include <bismar/report/table.hpp>

#include "report/words.hpp"

namespace bismar::report {

using ruler_page::beam_tip;
using ruler_page::left;
using ruler_page::right;

std::optional<Cut> cut(const Axis& axis, double from, const std::optional<double>& to) {
  const double a = std::max(from, axis.low());
  const double b = std::min(to.value_or(axis.high()), axis.high());
  if (!(a < b)) return std::nullopt;
  return Cut{axis.at(a), axis.at(b), 0};
}

std::vector<SubStretch> sub_stretches(const ExchangeRuler& ruler, const Axis& axis) {
  std::vector<SubStretch> out;
  for (std::size_t s = 0; s < ruler.stretches.size(); ++s) {
    const NamedStretch& stretch = ruler.stretches[s];
    for (const NamedStretch::RunnerUp& r : stretch.runners_up) {
      auto c = cut(axis, r.from, r.to);
      if (!c) continue;
      c->stretch = s;
      out.push_back({*c,
                     std::max(r.from, axis.low()),
                     std::min(r.to.value_or(axis.high()), axis.high()),
                     &r});
    }
  }
  return out;
}

namespace {

// The scale of the regret: set by the peaks between breakpoints, not by the open ends.
double regret_scale(const Result& result, const std::vector<SubStretch>& subs, const Axis& axis) {
  double inner = 0.0;
  double any = 0.0;
  for (const SubStretch& sub : subs) {
    for (const double alpha : {sub.from, sub.to}) {
      const double behind = regret(result, *sub.runner_up, alpha);
      any = std::max(any, behind);
      if (alpha > axis.low() * 1.0001 && alpha < axis.high() * 0.9999)
        inner = std::max(inner, behind);
    }
  }
  return inner > 0.0 ? std::min(1.3 * inner, 1.05 * any) : 1.05 * any;
}

// The parts of a profile that stay below the top: what is cut off shall not look like a plateau.
void draw_below(Svg& svg, const std::vector<Point>& profile, double top) {
  std::vector<Point> piece;
  const auto flush = [&] {
    if (piece.size() > 1) {
      svg.polyline(piece, {.colour = theme::accent, .width = 1.4, .round = true});
    }
    piece.clear();
  };
  bool cut_before = false;
  for (std::size_t i = 0; i < profile.size(); ++i) {
    const bool is_cut = profile[i].y <= top + 0.005;
    if (!is_cut && piece.empty() && cut_before) piece.push_back(profile[i - 1]);
    if (!is_cut || !cut_before) piece.push_back(profile[i]);
    if (is_cut) flush();
    cut_before = is_cut;
  }
  flush();
}

}  // namespace

double draw_regret(Svg& svg,
                   const Result& result,
                   const ExchangeRuler& ruler,
                   const Axis& axis,
                   const std::vector<SubStretch>& subs,
                   double top) {
  constexpr double height = 74.0;
  const double base = top + height;
  const double scale = regret_scale(result, subs, axis);
  bool cut_off = false;
  if (scale > 0.0) {
    const Axis up(0.0, scale, false, base, top);
    for (const Tick& tick : up.ticks()) {
      const double y = up.at(tick.value);
      svg.line({left, y}, {right, y}, {.colour = theme::hair, .width = 0.6});
    }
    std::vector<Point> profile;
    const auto flush = [&] {
      if (profile.size() > 1) {
        std::vector<Point> area = profile;
        area.push_back({profile.back().x, base});
        area.push_back({profile.front().x, base});
        svg.polygon(area, theme::tint, {.width = 0.0, .opacity = 0.8});
        draw_below(svg, profile, top);
      }
      profile.clear();
    };
    std::size_t stretch = subs.empty() ? 0 : subs.front().cut.stretch;
    for (const SubStretch& sub : subs) {
      if (sub.cut.stretch != stretch) flush();
      stretch = sub.cut.stretch;
      const int samples = std::max(2, static_cast<int>(sub.cut.width() / 3.0));
      for (int k = 0; k <= samples; ++k) {
        const double alpha = axis.between(sub.from, sub.to, static_cast<double>(k) / samples);
        const double behind = regret(result, *sub.runner_up, alpha);
        cut_off = cut_off || behind > scale * 1.0001;
        profile.push_back({axis.at(alpha), up.at(std::min(behind, scale))});
      }
    }
    flush();
    for (const Tick& tick : up.ticks()) {
      svg.text({left - 7.0, up.at(tick.value) + 3.5},
               tick_text(tick.value),
               {.size = 10.0, .colour = theme::muted, .anchor = TextStyle::Anchor::end});
    }
    for (const UnsupportedDesign& u : ruler.unsupported) {
      if (axis.shows(u.at) && u.regret <= scale)
        draw_diamond(svg, {axis.at(u.at), up.at(u.regret)});
    }
  }
  svg.line({left, base}, {right, base}, {.width = 0.9});
  svg.text({left, top - 7.0},
           "how far the runner-up is behind [" + result.currency + " a part]" +
               (cut_off ? ", cut off at the top" : ""),
           {.size = 11.0, .colour = theme::muted});
  return base;
}

double draw_runners_up(Svg& svg,
                       const Result& result,
                       const std::vector<SubStretch>& subs,
                       const ChoiceLetters& letters,
                       double top,
                       std::size_t& unnamed,
                       std::set<std::string>& drawn) {
  constexpr double height = 17.0;
  struct Pulled {
    double centre;
    double width;
    std::string letter;
    std::string choice;
  };
  std::vector<Pulled> pulled;
  for (const SubStretch& sub : subs) {
    const std::string letter = letters.letter(sub.runner_up->choice);
    svg.begin_group("runner-up from " + number(sub.from) + " to " + number(sub.to) + ": " +
                    choice_name(result, sub.runner_up->choice));
    svg.rectangle({sub.cut.from, top, sub.cut.width(), height},
                  theme::paper,
                  {.colour = theme::muted, .width = 0.7});
    svg.end_group();
    const double width = text_width(letter, 10.5, true);
    if (width + 3.0 <= sub.cut.width()) {
      svg.text({sub.cut.middle(), top + 12.5},
               letter,
               {.size = 10.5, .colour = theme::accent, .anchor = TextStyle::Anchor::middle});
      drawn.insert(sub.runner_up->choice);
    } else {
      pulled.push_back({sub.cut.middle(), width, letter, sub.runner_up->choice});
    }
  }
  svg.text({left - 7.0, top + 12.5},
           "2nd",
           {.size = 10.0, .colour = theme::muted, .anchor = TextStyle::Anchor::end});
  if (pulled.empty()) return top + height;
  constexpr std::size_t most_pulled = 24;  // more of them cannot be followed by eye
  if (pulled.size() > most_pulled) {
    unnamed = pulled.size();
    return top + height;
  }
  std::vector<double> centres;
  std::vector<double> widths;
  for (const Pulled& p : pulled) {
    centres.push_back(p.centre);
    widths.push_back(p.width);
  }
  const auto places = fan_out(centres, widths, theme::margin, right + beam_tip, 5.0);
  if (!places) {
    unnamed = pulled.size();
    return top + height;
  }
  for (std::size_t i = 0; i < pulled.size(); ++i) {
    const std::array<Point, 3> leader = {{{centres[i], top + height},
                                          {centres[i], top + height + 3.0},
                                          {(*places)[i], top + height + 10.0}}};
    svg.polyline(leader, {.colour = theme::muted, .width = 0.6});
    svg.text({(*places)[i], top + height + 20.0},
             pulled[i].letter,
             {.size = 10.5, .colour = theme::accent, .anchor = TextStyle::Anchor::middle});
    drawn.insert(pulled[i].choice);
  }
  return top + height + 24.0;
}

}  // namespace bismar::report
