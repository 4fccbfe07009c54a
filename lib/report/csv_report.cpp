// SPDX-License-Identifier: MIT
#include <algorithm>
#include <array>
#include <charconv>
#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

namespace bismar {
namespace {

// Lengths are kept in metres; 15 digits turn 0.0243 m into "24.3" instead of "24.299999999999997".
std::string millimetres(double metres) {
  std::array<char, 64> buffer;
  const auto done = std::to_chars(
      buffer.data(), buffer.data() + buffer.size(), metres * 1e3, std::chars_format::general, 15);
  return std::string(buffer.data(), done.ptr);
}

std::string joined(const std::vector<std::string>& texts) {
  std::string out;
  for (const std::string& text : texts) out += (out.empty() ? "" : "; ") + text;
  return out;
}

using LimitInCase = std::pair<std::string, std::string>;

// The columns of utilisations, in the order in which the designs first use them.
std::vector<LimitInCase> limit_columns(const Result& result, std::size_t rows) {
  std::vector<LimitInCase> columns;
  for (std::size_t d = 0; d < rows; ++d) {
    for (const Utilisation& u : result.designs[d].utilisations) {
      LimitInCase column{u.limit, u.load_case};
      if (std::find(columns.begin(), columns.end(), column) == columns.end()) {
        columns.push_back(std::move(column));
      }
    }
  }
  return columns;
}

}  // namespace

std::string front_csv(const Result& result, const CsvOptions& options) {
  const std::size_t front = std::min(result.front_count, result.designs.size());
  const std::size_t rows = options.near ? result.designs.size() : front;
  const std::vector<LimitInCase> limits = limit_columns(result, rows);
  const std::string money_unit = " [" + result.currency + "]";

  CsvWriter csv(options.delimiter);
  std::vector<std::string> cells = {"id",
                                    "standing",
                                    "mass [kg]",
                                    "cost" + money_unit,
                                    "cost low" + money_unit,
                                    "cost high" + money_unit,
                                    "bought mass [kg]",
                                    "material",
                                    "material name",
                                    "shape",
                                    "size",
                                    "stock item",
                                    "height [mm]",
                                    "width [mm]",
                                    "wall [mm]",
                                    "route",
                                    "treatment",
                                    "finish",
                                    "governing limit",
                                    "governing load case",
                                    "governing utilisation",
                                    "next size [mm]",
                                    "next size passes",
                                    "next size mass [kg]",
                                    "next size cost" + money_unit,
                                    "marks"};
  for (const auto& [limit, load_case] : limits) {
    cells.push_back("u " + limit + (load_case.empty() ? "" : " / " + load_case));
  }
  csv.add_row(cells);

  for (std::size_t i = 0; i < rows; ++i) {
    const Design& d = result.designs[i];
    const Utilisation governing =
        d.governing < d.utilisations.size() ? d.utilisations[d.governing] : Utilisation{};
    const bool next = d.buyable_size.has_value();
    cells = {d.id,
             i < front ? "front" : "near",
             report::exact(d.mass),
             report::exact(d.cost),
             report::exact(d.cost_breakdown.low),
             report::exact(d.cost_breakdown.high),
             report::exact(d.cost_breakdown.bought_mass),
             d.material,
             d.material_name,
             d.shape,
             d.size_text,
             d.stock_item,
             millimetres(d.section.height),
             millimetres(d.section.width),
             millimetres(d.section.wall),
             d.route,
             d.treatment,
             d.finish,
             governing.limit,
             governing.load_case,
             governing.limit.empty() ? "" : report::exact(governing.value),
             next ? millimetres(*d.buyable_size) : "",
             next ? (d.buyable_feasible ? "yes" : "no") : "",
             next ? report::exact(d.buyable_mass) : "",
             next ? report::exact(d.buyable_cost) : "",
             joined(d.notes)};
    for (const auto& [limit, load_case] : limits) {
      const auto u = std::find_if(d.utilisations.begin(), d.utilisations.end(), [&](const auto& c) {
        return c.limit == limit && c.load_case == load_case;
      });
      cells.push_back(u == d.utilisations.end() ? "" : report::exact(u->value));
    }
    csv.add_row(cells);
  }
  return csv.take();
}

std::string ruler_csv(const Result& result, const ExchangeRuler& ruler, const CsvOptions& options) {
  const std::string alpha_unit = " [" + result.currency + "/kg]";
  const std::string money_unit = " [" + result.currency + "]";
  CsvWriter csv(options.delimiter);
  const std::vector<std::string> header = {"stretch",
                                           "from" + alpha_unit,
                                           "to" + alpha_unit,
                                           "from low" + alpha_unit,
                                           "from high" + alpha_unit,
                                           "choice",
                                           "design id",
                                           "mass [kg]",
                                           "cost" + money_unit,
                                           "penalty from" + money_unit,
                                           "penalty to" + money_unit,
                                           "runner-up from" + alpha_unit,
                                           "runner-up to" + alpha_unit,
                                           "runner-up",
                                           "runner-up mass [kg]",
                                           "runner-up cost" + money_unit,
                                           "regret from" + money_unit,
                                           "regret to" + money_unit};
  csv.add_row(header);
  const auto optional_number = [](const std::optional<double>& value) {
    return value ? report::exact(*value) : std::string();
  };
  for (std::size_t s = 0; s < ruler.stretches.size(); ++s) {
    const NamedStretch& stretch = ruler.stretches[s];
    const std::vector<std::string> head = {
        std::to_string(s + 1),
        report::exact(stretch.from),
        optional_number(stretch.to),
        stretch.from_band ? report::exact(stretch.from_band->low) : "",
        stretch.from_band && stretch.from_band->high ? report::exact(*stretch.from_band->high) : "",
        stretch.choice,
        stretch.design < result.designs.size() ? result.designs[stretch.design].id : "",
        report::exact(stretch.mass),
        report::exact(stretch.cost),
        report::exact(stretch.penalty_from),
        optional_number(stretch.penalty_to)};
    if (stretch.runners_up.empty()) {
      std::vector<std::string> cells = head;
      cells.resize(header.size());
      csv.add_row(cells);
    }
    for (const NamedStretch::RunnerUp& r : stretch.runners_up) {
      std::vector<std::string> cells = head;
      cells.insert(cells.end(),
                   {report::exact(r.from),
                    optional_number(r.to),
                    r.choice,
                    report::exact(r.mass),
                    report::exact(r.cost),
                    report::exact(r.regret_from),
                    optional_number(r.regret_to)});
      csv.add_row(cells);
    }
  }
  return csv.take();
}

}  // namespace bismar
