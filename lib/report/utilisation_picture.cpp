// SPDX-License-Identifier: MIT
#include <algorithm>
#include <cmath>

#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include "report/plot.hpp"
#include "report/words.hpp"

namespace bismar {

std::string utilisation_svg(const Design& design) {
  using report::Svg;
  namespace theme = report::theme;
  constexpr double row = 24.0;
  constexpr double bar = 14.0;
  constexpr double longest = 1.25;  // bars beyond are cut
  constexpr double size = 12.0;

  Svg svg;
  const std::string name = report::material_of(design) + ", " + shape_and_size(design);
  double y = report::draw_title(
      svg,
      "Utilisation: " + name,
      "Demand over capacity of every limit; 1 is the limit. The dark bar governs.");
  double label_width = 0.0;
  std::vector<std::vector<std::string>> labels;
  for (const Utilisation& u : design.utilisations) {
    std::string text = u.limit;
    if (!u.load_case.empty()) text += ", " + u.load_case + ", factor " + report::exact(u.factor);
    labels.push_back(report::wrap_text(text, size, 300.0));
    for (const std::string& line : labels.back()) {
      label_width = std::max(label_width, report::text_width(line, size));
    }
  }
  const double left = theme::margin + std::min(label_width, 420.0) + 14.0;
  const double right = theme::page - theme::margin - 60.0;
  const report::Axis axis(0.0, longest, false, left, right);
  y += 26.0;
  const double top = y;
  for (const double tick : {0.0, 0.25, 0.5, 0.75, 1.0}) {
    svg.text({axis.at(tick), top - 6.0},
             report::tick_text(tick),
             {.size = 11.0,
              .colour = tick == 1.0 ? theme::bound : theme::muted,
              .anchor = report::TextStyle::Anchor::middle});
  }
  const auto row_height = [&](std::size_t i) {
    return std::max(row, 14.0 * static_cast<double>(labels[i].size()) + 8.0);
  };
  double bottom = top;
  for (std::size_t i = 0; i < labels.size(); ++i) bottom += row_height(i);
  for (const double tick : {0.0, 0.25, 0.5, 0.75}) {
    svg.line({axis.at(tick), top}, {axis.at(tick), bottom}, {.colour = theme::hair, .width = 0.6});
  }
  for (std::size_t i = 0; i < design.utilisations.size(); ++i) {
    const Utilisation& u = design.utilisations[i];
    const double tall = row_height(i);
    const double middle = y + 0.5 * tall;
    double line_y = middle + 4.0 - 7.0 * static_cast<double>(labels[i].size() - 1);
    for (const std::string& line : labels[i]) {
      svg.text(
          {left - 10.0, line_y}, line, {.size = size, .anchor = report::TextStyle::Anchor::end});
      line_y += 14.0;
    }
    const bool over = !(u.value <= 1.0);
    const double shown = std::isnan(u.value) ? longest : std::clamp(u.value, 0.0, longest);
    const double end = axis.at(shown);
    const bool governs = i == design.governing;
    svg.rectangle({left, middle - 0.5 * bar, end - left, bar},
                  governs ? theme::accent : theme::tint,
                  {.colour = over ? theme::bound : theme::accent, .width = over ? 1.8 : 0.8});
    if (!(u.value <= longest)) {
      // A slanted gap says that the bar is cut.
      svg.line({end - 14.0, middle + 0.5 * bar + 3.0},
               {end - 6.0, middle - 0.5 * bar - 3.0},
               {.colour = theme::paper, .width = 4.0});
    }
    svg.text({std::max(end, axis.at(over ? 1.0 : 0.0)) + 6.0, middle + 4.0},
             report::fixed(u.value, 3),
             {.size = size, .colour = over ? theme::bound : theme::ink, .bold = governs});
    y += tall;
  }
  svg.line({axis.at(1.0), top},
           {axis.at(1.0), y},
           {.colour = theme::bound, .width = 1.6, .dash = "7 3"});
  const double height = report::finish_page(svg, y + 4.0);
  return svg.document(theme::page,
                      height,
                      "Utilisation: " + name,
                      "Bars of demand over capacity for every limit state of one design.");
}

}  // namespace bismar
