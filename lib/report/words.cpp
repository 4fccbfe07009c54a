// SPDX-License-Identifier: MIT
#include "report/words.hpp"

#include <algorithm>
#include <cmath>

#include <bismar/quantity/format.hpp>
#include <bismar/report/table.hpp>

namespace bismar::report {

std::string alpha_span(double from, const std::optional<double>& to) {
  if (from <= 0.0) return to ? "up to " + number(*to) : std::string("any");
  return to ? number(from) + " to " + number(*to) : "from " + number(from);
}

double regret(const Result& result, const NamedStretch::RunnerUp& runner_up, double alpha) {
  double least = runner_up.cost + alpha * runner_up.mass;
  const double own = least;
  for (std::size_t d = 0; d < std::min(result.front_count, result.designs.size()); ++d) {
    least = std::min(least, result.designs[d].cost + alpha * result.designs[d].mass);
  }
  return own - least;
}

namespace {

// The front's vertices of the lower-left hull, by rising mass.
std::vector<std::size_t> hull(const Result& result) {
  std::vector<std::size_t> chain;
  const auto& d = result.designs;
  for (std::size_t i = 0; i < std::min(result.front_count, d.size()); ++i) {
    while (chain.size() > 1) {
      const Design& a = d[chain[chain.size() - 2]];
      const Design& b = d[chain.back()];
      const double turn =
          (b.mass - a.mass) * (d[i].cost - a.cost) - (b.cost - a.cost) * (d[i].mass - a.mass);
      if (turn > 0.0) break;
      chain.pop_back();
    }
    chain.push_back(i);
  }
  return chain;
}

}  // namespace

std::string regret_span(const Result& result, const NamedStretch::RunnerUp& runner_up) {
  // The least value of a convex function with kinks lies at an end or at a kink: where two
  // neighbours on the hull come out equal.
  double least = runner_up.regret_from;
  const std::vector<std::size_t> vertices = hull(result);
  for (std::size_t i = 1; i < vertices.size(); ++i) {
    const Design& light = result.designs[vertices[i - 1]];
    const Design& heavy = result.designs[vertices[i]];
    if (!(heavy.mass > light.mass)) continue;
    const double alpha = (light.cost - heavy.cost) / (heavy.mass - light.mass);
    if (!(alpha > runner_up.from) || (runner_up.to && !(alpha < *runner_up.to))) continue;
    least = std::min(least, regret(result, runner_up, alpha));
  }
  if (!runner_up.regret_to) {
    // Without an upper end the distance grows with alpha unless both weigh the same.
    const bool grows = !vertices.empty() && runner_up.mass > result.designs.front().mass;
    return grows ? "from " + money(least) + " upwards" : money(least);
  }
  least = std::min(least, *runner_up.regret_to);
  const std::string from = money(least);
  const std::string to = money(std::max(runner_up.regret_from, *runner_up.regret_to));
  return from == to ? from : from + " to " + to;
}

std::string material_of(const Design& design) {
  return design.material_name.empty() ? design.material : design.material_name;
}

std::string choice_name(const Result& result, const std::string& choice) {
  for (const Design& design : result.designs) {
    if (design.material == choice) return material_of(design);
  }
  return choice;
}

std::string ruler_table(const Result& result,
                        const ExchangeRuler& ruler,
                        const TextOptions& options) {
  Table table({{"alpha\n[" + result.currency + "/kg]", Align::left, false},
               {"least cost + alpha x mass", Align::left, true},
               {"mass\n[kg]", Align::right, false},
               {"cost\n[" + result.currency + "]", Align::right, false},
               {"runner-up, and how far behind [" + result.currency + "]", Align::left, true}});
  bool banded = false;
  for (const NamedStretch& stretch : ruler.stretches) {
    std::string span = alpha_span(stretch.from, stretch.to);
    if (stretch.from_band && !stretch.from_band->high) {
      span += "\n(from " + number(stretch.from_band->low) + ")";
    } else if (stretch.from_band && stretch.from_band->low < *stretch.from_band->high) {
      span +=
          "\n(" + number(stretch.from_band->low) + ".." + number(*stretch.from_band->high) + ")";
      banded = true;
    }
    std::string choice = choice_name(result, stretch.choice);
    if (stretch.design < result.designs.size()) {
      const Design& d = result.designs[stretch.design];
      choice += "\n" + shape_and_size(d) + ", " + made_by(d);
    }
    constexpr std::size_t shown_by_default = 3;
    const std::size_t all = stretch.runners_up.size();
    const std::size_t shown = options.all ? all : std::min(all, shown_by_default);
    std::string behind = all == 0 ? "none" : "";
    for (std::size_t i = 0; i < shown; ++i) {
      const NamedStretch::RunnerUp& r = stretch.runners_up[i];
      if (i > 0) behind += "\n";
      if (all > 1) behind += alpha_span(r.from, r.to) + ": ";
      behind += choice_name(result, r.choice) + ", " + regret_span(result, r);
    }
    if (shown < all) behind += "\nand " + std::to_string(all - shown) + " more";
    table.add_row({std::move(span),
                   std::move(choice),
                   number(stretch.mass),
                   money(stretch.cost),
                   std::move(behind)});
  }
  std::string out = table.text(
      options.width, 0, options.colour ? bold_on : "", options.colour ? emphasis_off : "");
  if (banded) {
    out += paragraph(
        "In brackets: where the lower end of the stretch may lie over the price and "
        "density ranges of its two neighbours.",
        options.width);
  }
  for (const UnsupportedDesign& u : ruler.unsupported) {
    if (u.design >= result.designs.size()) continue;
    out += paragraph("No alpha chooses no. " + std::to_string(u.design + 1) + " (" +
                         material_of(result.designs[u.design]) + "): at best it is " +
                         money(u.regret) + " " + result.currency + " behind, at " + number(u.at) +
                         " " + result.currency + "/kg.",
                     options.width,
                     2);
  }
  return out;
}

std::string utilisation_table(const Design& design, const TextOptions& options) {
  Table table({{"limit", Align::left, true},
               {"load case", Align::left, true},
               {"factor", Align::right, false},
               {"u", Align::right, false},
               {"", Align::left, false}});
  for (std::size_t i = 0; i < design.utilisations.size(); ++i) {
    const Utilisation& u = design.utilisations[i];
    std::string remark = i == design.governing ? "governs" : "";
    if (!(u.value <= 1.0)) remark = "over the limit";
    table.add_row({u.limit,
                   u.load_case,
                   u.load_case.empty() ? "" : exact(u.factor),
                   fixed(u.value, 3),
                   std::move(remark)});
  }
  return table.text(
      options.width, 0, options.colour ? bold_on : "", options.colour ? emphasis_off : "");
}

std::string cost_table(const Design& design,
                       std::string_view currency,
                       const TextOptions& options) {
  Table table({{"unit cost", Align::left, true},
               {std::string(currency), Align::right, false},
               {"how", Align::left, true}});
  const CostBreakdown& cost = design.cost_breakdown;
  for (const CostLine& line : cost.lines) table.add_row({line.item, money(line.amount), line.how});
  std::string how;
  if (cost.high > cost.low) {
    how = money(cost.low) + " to " + money(cost.high) + " over every price and rate range";
  }
  if (cost.bought_mass > 0.0) {
    if (!how.empty()) how += "; ";
    how += number(cost.bought_mass) + " kg bought for one good part";
  }
  if (!cost.blank.empty()) how += (how.empty() ? "" : ", ") + cost.blank;
  table.add_row({"total", money(cost.lines.empty() ? design.cost : cost.total), how});
  return table.text(
      options.width, 0, options.colour ? bold_on : "", options.colour ? emphasis_off : "");
}

namespace {

// A share in per cent with two digits, rounded up: no bound is stated tighter than it is.
std::string percent_up(double share) {
  const double percent = 100.0 * share;
  if (!(percent > 0.0)) return "0 %";
  const double unit = std::pow(10.0, std::floor(std::log10(percent)) - 1.0);
  return number(std::ceil(percent / unit * (1.0 - 1e-12)) * unit, 2) + " %";
}

}  // namespace

std::string promise_line(const Result& result) {
  if (!(result.delta > 0.0)) return {};
  const std::string boxes = count(result.telemetry.boxes);
  const std::string margin = " with a margin of " + format_number(result.delta);
  if (!result.exact || !std::isfinite(result.epsilon_reached)) {
    return "Front not proven complete: the search of shapes with several free sizes was not "
           "finished. Boxes examined: " +
           boxes + ".";
  }
  if (result.front_count == 0) {
    return "Proven: no decided candidate has a design" + margin + "; boxes examined: " + boxes +
           ".";
  }
  const std::string within =
      result.epsilon_reached > 0.0 ? " within " + percent_up(result.epsilon_reached) : "";
  return "Front complete" + within + " for every design" + margin + "; boxes examined: " + boxes +
         ".";
}

}  // namespace bismar::report
