// SPDX-License-Identifier: MIT
#include <bismar/report/text_report.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <map>
#include <set>

#include <bismar/report/table.hpp>

#include "report/words.hpp"

namespace bismar {

using report::Align;
using report::money;
using report::number;
using report::paragraph;
using report::Table;

std::string_view caution() {
  return "Caution: preliminary sizing. Property values, prices and rates are as given in the "
         "tables; "
         "starter values are unverified where marked. Check every design against the local codes "
         "and "
         "standards that apply. A licensed or otherwise competent engineer answers for the design.";
}

std::vector<Representative> fold_front(const Result& result,
                                       const ExchangeRuler* ruler,
                                       double fold) {
  const std::size_t front = std::min(result.front_count, result.designs.size());
  const auto close = [&](std::size_t d, std::size_t r) {
    const Design& a = result.designs[d];
    const Design& b = result.designs[r];
    return std::abs(a.mass - b.mass) <= fold * std::abs(b.mass) &&
           std::abs(a.cost - b.cost) <= fold * std::abs(b.cost);
  };

  std::vector<std::size_t> order;
  std::vector<bool> listed(front, false);
  const auto list = [&](std::size_t d) {
    if (d < front && !listed[d]) {
      listed[d] = true;
      order.push_back(d);
    }
  };
  if (ruler != nullptr) {
    std::set<std::size_t> chosen;
    for (const NamedStretch& stretch : ruler->stretches) chosen.insert(stretch.design);
    for (const std::size_t d : chosen) list(d);
  }
  for (std::size_t d = 0; d < front; ++d) list(d);
  // Near designs come last: they can only stand under somebody.
  for (std::size_t d = front; d < result.designs.size(); ++d) order.push_back(d);

  std::vector<Representative> folded;
  for (const std::size_t d : order) {
    const auto host = std::find_if(
        folded.begin(), folded.end(), [&](const Representative& r) { return close(d, r.design); });
    if (host != folded.end()) {
      host->alike.push_back(d);
    } else if (d < front) {
      folded.push_back({d, {}});
    }
  }
  std::sort(folded.begin(), folded.end(), [](const Representative& a, const Representative& b) {
    return a.design < b.design;
  });
  for (Representative& r : folded) std::sort(r.alike.begin(), r.alike.end());
  return folded;
}

std::string shape_and_size(const Design& design) {
  if (!design.stock_item.empty() || design.shape.empty()) return design.size_text;
  return design.shape + " " + design.size_text;
}

std::string made_by(const Design& design) {
  std::string text = design.route;
  if (!design.treatment.empty()) text += " + " + design.treatment;
  if (!design.finish.empty() && design.finish != "none") text += " + " + design.finish;
  return text;
}

namespace {

// Marks of designs, each told once and referred to by a letter.
class Footnotes {
 public:
  std::string letters(const std::vector<std::string>& notes) {
    std::vector<std::size_t> numbers;
    for (const std::string& note : notes) {
      auto found = std::find(notes_.begin(), notes_.end(), note);
      if (found == notes_.end()) found = notes_.insert(notes_.end(), note);
      const auto at = static_cast<std::size_t>(found - notes_.begin());
      if (std::find(numbers.begin(), numbers.end(), at) == numbers.end()) numbers.push_back(at);
    }
    std::sort(numbers.begin(), numbers.end());
    std::string text;
    for (const std::size_t n : numbers) text += (text.empty() ? "[" : ",") + letter(n);
    return text.empty() ? text : text + "]";
  }
  [[nodiscard]] std::string text(std::size_t width) const {
    std::string out;
    for (std::size_t n = 0; n < notes_.size(); ++n) {
      out += paragraph("[" + letter(n) + "] " + notes_[n], width, 4);
    }
    return out;
  }

 private:
  static std::string letter(std::size_t n) {
    std::string text(1, static_cast<char>('a' + n % 26));
    for (; n >= 26; n = n / 26 - 1) text.insert(0, 1, static_cast<char>('a' + (n / 26 - 1) % 26));
    return text;
  }
  std::vector<std::string> notes_;
};

std::string headline(const Result& result, std::size_t shown) {
  const std::string of = result.part.empty() ? "" : result.part + ": ";
  if (result.front_count == 0) {
    return of + "no candidate meets every limit, so there is no front.";
  }
  const Design& light = result.designs.front();
  const auto money_text = [&](const Design& d) { return money(d.cost) + " " + result.currency; };
  if (result.front_count == 1) {
    return of + "one design is both lightest and cheapest: " + light.material_name + ", " +
           number(light.mass) + " kg at " + money_text(light) + ".";
  }
  const Design& cheap = result.designs[result.front_count - 1];
  std::string text = of + report::count(result.front_count) + " designs on the mass-cost front";
  if (shown < result.front_count) {
    text += ", " + report::count(shown) + " of them told apart";
  }
  return text + ", from " + number(light.mass) + " kg at " + money_text(light) + " to " +
         number(cheap.mass) + " kg at " + money_text(cheap) + ".";
}

std::string funnel_line(const Funnel& funnel) {
  std::array<std::size_t, 6> at{};
  bool examined = true;
  for (const FunnelLine& line : funnel.lines) {
    at[static_cast<std::size_t>(line.stage)] += line.candidates;
    examined = examined && (line.stage != FunnelLine::Stage::not_better || line.reason.empty());
  }
  std::string text = "Candidates: " + report::count(funnel.considered) + " considered = ";
  constexpr std::array<std::string_view, 6> words = {
      "cannot exist", "undecided", "infeasible", "not better than the front", "near it", "on it"};
  for (std::size_t s = 0; s < at.size(); ++s) {
    if (s > 0) text += " + ";
    text += report::count(at[s]) + " ";
    text += words[s];
    text += s == 3 && !examined ? " (feasible or not: not examined)" : "";
  }
  text += ".";
  if (funnel.doubtful_sizes > 0) {
    text += " " + report::count(funnel.doubtful_sizes) +
            (funnel.doubtful_sizes == 1 ? " stock size marked doubtful was not offered."
                                        : " stock sizes marked doubtful were not offered.");
  }
  return text;
}

std::string reason_table(const Funnel& funnel, std::size_t width) {
  constexpr std::array<std::string_view, 6> words = {
      "cannot exist", "undecided", "infeasible", "not better", "near", "front"};
  Table table({{"stage", Align::left, false},
               {"candidates", Align::right, false},
               {"reason", Align::left, true}});
  for (const FunnelLine& line : funnel.lines) {
    if (line.candidates == 0 || line.reason.empty()) continue;
    table.add_row({std::string(words[static_cast<std::size_t>(line.stage)]),
                   report::count(line.candidates),
                   line.reason});
  }
  return table.rows() == 0 ? std::string() : table.text(width, 2);
}

std::string cost_cell(const Design& design) {
  std::string text = money(design.cost);
  if (design.cost_breakdown.high > design.cost_breakdown.low) {
    text += "\n" + money(design.cost_breakdown.low) + ".." + money(design.cost_breakdown.high);
  }
  return text;
}

std::string size_cell(const Design& design, const std::string& currency) {
  std::string text = shape_and_size(design);
  if (design.buyable_size) {
    // Free dimensions beside the height keep their proportion to it.
    const bool several = design.free_sizes[0] > 0.0;
    text += "\nnext size " + number(*design.buyable_size * 1e3, 3) + " mm" +
            (several ? ", same proportions: " : ": ");
    text += design.buyable_feasible ? number(design.buyable_mass) + " kg, " +
                                          money(design.buyable_cost) + " " + currency
                                    : std::string("does not pass");
  }
  return text;
}

std::string governs_cell(const Design& design, bool name_case) {
  if (design.governing >= design.utilisations.size()) return "";
  const Utilisation& u = design.utilisations[design.governing];
  return name_case && !u.load_case.empty() ? u.limit + " (" + u.load_case + ")" : u.limit;
}

bool several_load_cases(const Result& result) {
  std::set<std::string_view> cases;
  for (const Design& design : result.designs) {
    for (const Utilisation& u : design.utilisations) {
      if (!u.load_case.empty()) cases.insert(u.load_case);
    }
  }
  return cases.size() > 1;
}

// "yield 1.5; brittle fracture 3 or 5": each limit with the factors used for it, first use first.
std::string factors_line(const Result& result) {
  std::vector<std::string_view> order;
  std::map<std::string_view, std::set<double>> factors;
  for (const Design& design : result.designs) {
    for (const Utilisation& u : design.utilisations) {
      if (u.load_case.empty()) continue;
      if (factors.find(u.limit) == factors.end()) order.push_back(u.limit);
      factors[u.limit].insert(u.factor);
    }
  }
  std::string text;
  for (const std::string_view limit : order) {
    text += text.empty() ? "Factors on the loads, by limit: " : "; ";
    text += limit;
    bool first = true;
    for (const double factor : factors[limit]) {
      text += first ? " " : " or ";
      text += report::exact(factor);
      first = false;
    }
  }
  return text.empty() ? text : text + ".";
}

std::string front_table(const Result& result,
                        const std::vector<Representative>& shown,
                        Footnotes& footnotes,
                        const TextOptions& options) {
  const bool name_case = several_load_cases(result);
  Table table({{"no.", Align::right, false},
               {"mass\n[kg]", Align::right, false},
               {"cost\n[" + result.currency + "]", Align::right, false},
               {"material", Align::left, true},
               {"shape and size", Align::left, true},
               {"made by", Align::left, true},
               {"governed by", Align::left, true},
               {"u", Align::right, false}});
  for (const Representative& r : shown) {
    const Design& d = result.designs[r.design];
    std::string material = d.material_name.empty() ? d.material : d.material_name;
    if (!r.alike.empty()) material += " (+" + std::to_string(r.alike.size()) + " alike)";
    const std::string letters = footnotes.letters(d.notes);
    if (!letters.empty()) material += " " + letters;
    const std::string governs = governs_cell(d, name_case);
    table.add_row({std::to_string(r.design + 1),
                   number(d.mass),
                   cost_cell(d),
                   std::move(material),
                   size_cell(d, result.currency),
                   made_by(d),
                   governs,
                   governs.empty() ? "" : report::fixed(d.utilisations[d.governing].value, 3)});
  }
  return table.text(options.width,
                    0,
                    options.colour ? report::bold_on : "",
                    options.colour ? report::emphasis_off : "");
}

std::string near_line(const Result& result,
                      const std::vector<Representative>& shown,
                      const TextOptions& options) {
  const std::size_t near =
      result.designs.size() - std::min(result.designs.size(), result.front_count);
  std::size_t alike = 0;
  for (const Representative& r : shown) {
    for (const std::size_t d : r.alike) alike += d >= result.front_count ? 1 : 0;
  }
  std::string text;
  if (near > 0 && !options.all) {
    text = report::count(near) + (near == 1 ? " near design lies" : " near designs lie") +
           " within " + number(100.0 * options.near, 1) + " % of the front";
    if (alike == near) {
      text += near == 1 ? ", counted as alike above. " : ", all of them counted as alike above. ";
    } else {
      text += alike > 0 ? ", " + report::count(alike) + " of them counted as alike above. " : ". ";
    }
  }
  const bool any_alike = std::any_of(
      shown.begin(), shown.end(), [](const Representative& r) { return !r.alike.empty(); });
  if (any_alike) {
    text += "Alike: within " + number(100.0 * options.fold, 1) +
            " % in mass and in cost, closer than the input data can tell. ";
  }
  text += "u = demand / capacity of the governing limit, at most 1.";
  const bool banded = std::any_of(shown.begin(), shown.end(), [&](const Representative& r) {
    const CostBreakdown& cost = result.designs[r.design].cost_breakdown;
    return cost.high > cost.low;
  });
  if (banded)
    text += " Below a cost: its span when every price and rate range is at its cheap or dear end.";
  return text;
}

std::string undecided_lines(const Result& result, const TextOptions& options) {
  if (result.undecided.empty()) return {};
  constexpr std::size_t shown_by_default = 6;
  const std::size_t shown =
      options.all ? result.undecided.size() : std::min(shown_by_default, result.undecided.size());
  std::string text = "Undecided for want of a property: ";
  for (std::size_t i = 0; i < shown; ++i) {
    if (i > 0) text += "; ";
    text += result.undecided[i];
  }
  const std::size_t left = result.undecided.size() - shown;
  if (left > 0) text += "; and " + report::count(left) + " more";
  return paragraph(text + ".", options.width, 2);
}

}  // namespace

std::string front_text(const Result& result,
                       const ExchangeRuler* ruler,
                       const TextOptions& options) {
  std::vector<Representative> shown;
  if (options.all) {
    for (std::size_t d = 0; d < result.designs.size(); ++d) shown.push_back({d, {}});
  } else {
    shown = fold_front(result, ruler, options.fold);
  }

  const auto heading = [&](std::string_view text) {
    return "\n" + report::emphasised(text, options.colour) + "\n";
  };
  std::string out;
  for (const std::string& line : report::wrap(
           headline(result, options.all ? result.front_count : shown.size()), options.width)) {
    out += report::emphasised(line, options.colour) + "\n";
  }
  if (!result.exact) {
    out += paragraph("Not exact: " + (result.notes.empty() ? std::string("see the notes.")
                                                           : std::string("see the notes below.")),
                     options.width);
  }
  const std::string promise = report::promise_line(result);
  if (!promise.empty()) out += paragraph(promise, options.width, 2);
  out += paragraph(funnel_line(result.funnel), options.width, 2);
  if (options.reasons || options.all || result.front_count == 0) {
    const std::string reasons = reason_table(result.funnel, options.width);
    if (!reasons.empty()) out += heading("Why candidates fell out") + reasons;
  }

  Footnotes footnotes;
  if (!shown.empty()) {
    out += heading(options.all && result.designs.size() > result.front_count
                       ? "Front (numbers 1 to " + std::to_string(result.front_count) +
                             ") and near designs"
                       : std::string("Front"));
    out += front_table(result, shown, footnotes, options);
    out += paragraph(near_line(result, shown, options), options.width);
    const std::string factors = factors_line(result);
    if (!factors.empty()) out += paragraph(factors, options.width, 2);
    // Said every time: a limit that nobody checked looks like one that is met.
    out += paragraph(
        "Not checked: joints, wear, resonance beyond the first frequency, and whatever the job "
        "does "
        "not name (own weight, fatigue, cracks, heat and vibration are checked where it names "
        "them).",
        options.width,
        2);
  }
  if (ruler != nullptr && !ruler->stretches.empty() && result.front_count > 0) {
    out += heading("Exchange ruler: least cost + alpha x mass, alpha = worth of a saved kilogram");
    out += report::ruler_table(result, *ruler, options);
  }

  const std::string marks = footnotes.text(options.width);
  if (!marks.empty()) out += heading("Marks: values to confirm before relying on a design") + marks;
  const std::string undecided = undecided_lines(result, options);
  if (!result.notes.empty() || !undecided.empty()) {
    out += heading("Notes");
    for (const std::string& note : result.notes) out += paragraph("- " + note, options.width, 2);
    out += undecided;
  }
  out += "\n" + paragraph(caution(), options.width);
  return out;
}

std::string ruler_text(const Result& result,
                       const ExchangeRuler& ruler,
                       const TextOptions& options) {
  std::string out =
      report::emphasised(result.part +
                             ": exchange ruler, least cost + alpha x mass, alpha = worth "
                             "of a saved kilogram",
                         options.colour) +
      "\n";
  out += report::ruler_table(result, ruler, options);
  return out + "\n" + paragraph(caution(), options.width);
}

namespace {

/// A heading and its items; an item that begins with two spaces is a step of the one before.
std::string listed(std::string_view heading,
                   const std::vector<std::string>& items,
                   const TextOptions& options) {
  if (items.empty()) {
    return {};
  }
  std::string out = "\n" + report::emphasised(std::string(heading), options.colour) + "\n";
  for (const std::string& item : items) {
    if (!item.starts_with("  ")) {
      out += paragraph("- " + item, options.width, 2);
      continue;
    }
    for (const std::string& line : report::wrap(item, options.width > 4 ? options.width - 4 : 1)) {
      out += "    " + line + "\n";
    }
  }
  return out;
}

}  // namespace

std::string why_text(const Answer& answer, std::string_view currency, const TextOptions& options) {
  std::string out;
  for (const std::string& line : report::wrap(answer.headline, options.width)) {
    out += report::emphasised(line, options.colour) + "\n";
  }
  for (const std::string& line : answer.lines) out += paragraph("- " + line, options.width, 2);
  if (answer.design) {
    const Design& d = *answer.design;
    out += "\n" + report::emphasised("Its best design", options.colour) + "\n";
    out += paragraph((d.material_name.empty() ? d.material : d.material_name) + ", " +
                         shape_and_size(d) + ", " + made_by(d) + ": " + number(d.mass) + " kg, " +
                         money(d.cost) + " " + std::string(currency) + " (" + d.id + ")",
                     options.width,
                     2);
    out += "\n" + report::utilisation_table(d, options);
    out += listed("How they come about", answer.checks, options);
    if (!answer.index.empty()) {
      out += listed(
          "Its index: what a better material or the next size would bring", answer.index, options);
    }
    out += "\n" + report::cost_table(d, currency, options);
    if (!d.cost_breakdown.blank.empty()) {
      out += paragraph("Bought as " + d.cost_breakdown.blank + ".", options.width);
    }
    out += listed("Numbers it rests on", answer.sources, options);
    if (!d.notes.empty()) {
      out += "\n" + report::emphasised("Marks", options.colour) + "\n";
      for (const std::string& note : d.notes) out += paragraph("- " + note, options.width, 2);
    }
  }
  out += "\n" + paragraph(caution(), options.width);
  return out;
}

}  // namespace bismar
