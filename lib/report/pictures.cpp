// SPDX-License-Identifier: MIT
#include <bismar/report/pictures.hpp>

#include "report/plot.hpp"

namespace bismar {
namespace {

std::string of_part(const Result& result) {
  return result.part.empty() ? std::string() : ": " + result.part;
}

std::string message_page(const Result& result, const std::string& message) {
  report::Svg svg;
  const double y = report::draw_title(svg, "Mass and cost" + of_part(result), message);
  const double height = report::finish_page(svg, y);
  return svg.document(report::theme::page, height, "Nothing to draw" + of_part(result), message);
}

}  // namespace

std::string tradeoff_svg(const Result& result,
                         const ExchangeRuler& ruler,
                         const PictureOptions& options) {
  if (result.front_count == 0) return message_page(result, report::no_front_text(result));
  report::Svg svg;
  std::vector<report::KeyEntry> key;
  const double below = report::draw_tradeoff(svg, result, ruler, options, key);
  const double height = report::finish_page(svg, report::draw_key(svg, key, below + 2.0));
  return svg.document(report::theme::page,
                      height,
                      "Mass against cost" + of_part(result),
                      "Feasible designs by mass and unit cost, with the front as a staircase.");
}

std::string ruler_svg(const Result& result,
                      const ExchangeRuler& ruler,
                      const PictureOptions& options) {
  if (result.front_count == 0) return message_page(result, report::no_front_text(result));
  if (ruler.stretches.empty()) return message_page(result, "The exchange ruler has no stretches.");
  report::Svg svg;
  std::vector<report::KeyEntry> key;
  const double below = report::draw_ruler(svg, result, ruler, options, key);
  const double height = report::finish_page(svg, report::draw_key(svg, key, below + 2.0));
  return svg.document(report::theme::page,
                      height,
                      "Exchange ruler" + of_part(result),
                      "Which choice has the least cost + alpha x mass, for every worth alpha of a "
                      "saved kilogram.");
}

std::string front_picture_svg(const Result& result,
                              const ExchangeRuler& ruler,
                              const PictureOptions& options) {
  if (result.front_count == 0) return message_page(result, report::no_front_text(result));
  report::Svg svg;
  std::vector<report::KeyEntry> key;
  double y = report::draw_tradeoff(svg, result, ruler, options, key);
  if (!ruler.stretches.empty()) {
    svg.begin_group({}, {0.0, y + 4.0});
    const double below = report::draw_ruler(svg, result, ruler, options, key);
    svg.end_group();
    y += 4.0 + below;
  }
  const double height = report::finish_page(svg, report::draw_key(svg, key, y + 2.0));
  return svg.document(
      report::theme::page,
      height,
      "Mass-cost front and exchange ruler" + of_part(result),
      "Above, feasible designs by mass and unit cost with the front as a staircase; "
      "below, which choice holds for which worth of a saved kilogram.");
}

}  // namespace bismar
