// SPDX-License-Identifier: MIT
#include "digest.hpp"
#include "result_words.hpp"

#include <bismar/job/result_json.hpp>
#include <bismar/report/text_report.hpp>
#include <bismar/version.hpp>

#include <nlohmann/json.hpp>

#include <cmath>
#include <cstddef>
#include <limits>
#include <utility>

namespace bismar {

namespace {

using Json = nlohmann::ordered_json;
using detail::word_of;

/// No "-0.0": the sign of a zero means nothing here.
Json number(double value) { return value == 0.0 ? Json(0.0) : Json(value); }

/// JSON has no words for what is not finite; a result never holds it.
void require_finite(const Json& json, const std::string& pointer) {
  if (json.is_number_float() && !std::isfinite(json.get<double>())) {
    throw InternalError("the result's " + pointer + " is not finite");
  }
  if (json.is_structured()) {
    for (const auto& [key, value] : json.items()) {
      require_finite(value, pointer + '/' + key);
    }
  }
}

void add_if(Json& object, const char* key, const std::optional<double>& value) {
  if (value.has_value()) {
    object[key] = number(*value);
  }
}

Json names_of(const std::vector<std::string>& texts) { return Json(texts); }

Json section_json(const SectionProperties& section) {
  Json json{{"family", std::string(name(section.family))},
            {"forming", std::string(word_of(detail::forming_words, section.forming))}};
  for (const detail::SectionNumber& field : detail::section_numbers) {
    json[std::string(field.name)] = number(section.*field.field);
  }
  json["smooth_outline"] = section.smooth_outline;
  json["plates"] = Json::array();
  for (const PlateElement& plate : section.plates) {
    json["plates"].push_back({{"kind", std::string(word_of(detail::plate_words, plate.kind))},
                              {"ratio", number(plate.ratio)}});
  }
  json["fibres"] = Json::array();
  for (const SectionPoint& fibre : section.fibres) {
    json["fibres"].push_back({{"y", number(fibre.y)}, {"z", number(fibre.z)}});
  }
  return json;
}

Json cost_json(const CostBreakdown& cost) {
  Json lines = Json::array();
  for (const CostLine& line : cost.lines) {
    lines.push_back({{"item", line.item}, {"amount", number(line.amount)}, {"how", line.how}});
  }
  return {{"lines", std::move(lines)},
          {"total", number(cost.total)},
          {"low", number(cost.low)},
          {"high", number(cost.high)},
          {"bought_mass", number(cost.bought_mass)},
          {"blank", cost.blank}};
}

/// Names candidates of a part by ids, so that a stored result outlives a change of the tables'
/// order.
class Naming {
 public:
  Naming(const Catalogue& catalogue, const Part& part) : catalogue_(catalogue), part_(part) {}

  /// Material, shape (its index in the part) or stock list, route, treatment, finish.
  [[nodiscard]] Json row(const Candidate& candidate) const {
    return Json::array(
        {catalogue_.materials.info(candidate.material).id,
         candidate.stock == Candidate::none ? Json(candidate.shape)
                                            : Json(catalogue_.stock.at(candidate.stock).id),
         catalogue_.routes.at(candidate.route).id,
         candidate.treatment == Candidate::none
             ? Json(nullptr)
             : Json(catalogue_.routes.at(candidate.treatment).id),
         candidate.finish == Candidate::none ? Json(nullptr)
                                             : Json(catalogue_.finishes.at(candidate.finish).id)});
  }

  /// The height of a shape, the item's id for stock.
  [[nodiscard]] Json size(const Candidate& candidate, double size) const {
    if (candidate.stock == Candidate::none) {
      return number(size);
    }
    return catalogue_.stock.at(candidate.stock).items.at(static_cast<std::size_t>(size)).id;
  }

  /// The free dimensions beside the height, as many as the shape has.
  [[nodiscard]] Json free_sizes(const Candidate& candidate, const FreeSizes& sizes) const {
    Json all = Json::array();
    if (candidate.stock == Candidate::none) {
      const std::size_t count = free_dimensions(part_.body.shapes.at(candidate.shape)).size();
      for (std::size_t i = 0; i < count; ++i) {
        all.push_back(number(sizes.at(i)));
      }
    }
    return all;
  }

 private:
  const Catalogue& catalogue_;
  const Part& part_;
};

Json design_json(const Design& design, const Naming& naming) {
  Json utilisations = Json::array();
  for (const Utilisation& u : design.utilisations) {
    utilisations.push_back({{"limit", u.limit},
                            {"load_case", u.load_case},
                            {"value", number(u.value)},
                            {"factor", number(u.factor)}});
  }
  Json json{{"id", design.id},
            {"candidate", naming.row(design.candidate)},
            {"size", naming.size(design.candidate, design.size)},
            {"free_sizes", naming.free_sizes(design.candidate, design.free_sizes)},
            {"material", design.material},
            {"material_name", design.material_name},
            {"shape", design.shape},
            {"size_text", design.size_text},
            {"stock_item", design.stock_item},
            {"route", design.route},
            {"treatment", design.treatment},
            {"finish", design.finish},
            {"mass", number(design.mass)},
            {"cost", number(design.cost)},
            {"governing", design.governing},
            {"utilisations", std::move(utilisations)},
            {"cost_breakdown", cost_json(design.cost_breakdown)},
            {"section", section_json(design.section)},
            {"notes", names_of(design.notes)}};
  if (design.buyable_size.has_value()) {
    json["buyable"] = {{"size", number(*design.buyable_size)},
                       {"mass", number(design.buyable_mass)},
                       {"cost", number(design.buyable_cost)},
                       {"feasible", design.buyable_feasible}};
  }
  return json;
}

Json ruler_json(const ExchangeRuler& ruler, const Naming& naming) {
  Json stretches = Json::array();
  for (const NamedStretch& stretch : ruler.stretches) {
    Json json{{"from", number(stretch.from)}};
    add_if(json, "to", stretch.to);
    json["design"] = stretch.design;
    json["choice"] = stretch.choice;
    json["mass"] = number(stretch.mass);
    json["cost"] = number(stretch.cost);
    json["penalty_from"] = number(stretch.penalty_from);
    add_if(json, "penalty_to", stretch.penalty_to);
    if (stretch.from_band.has_value()) {
      json["from_band"] = {{"low", number(stretch.from_band->low)}};
      if (stretch.from_band->high.has_value()) {
        json["from_band"]["high"] = number(*stretch.from_band->high);
      }
    }
    json["runners_up"] = Json::array();
    for (const NamedStretch::RunnerUp& second : stretch.runners_up) {
      Json runner{{"from", number(second.from)}};
      add_if(runner, "to", second.to);
      runner["choice"] = second.choice;
      runner["candidate"] = naming.row(second.candidate);
      runner["mass"] = number(second.mass);
      runner["cost"] = number(second.cost);
      runner["regret_from"] = number(second.regret_from);
      add_if(runner, "regret_to", second.regret_to);
      json["runners_up"].push_back(std::move(runner));
    }
    stretches.push_back(std::move(json));
  }
  Json unsupported = Json::array();
  for (const UnsupportedDesign& design : ruler.unsupported) {
    unsupported.push_back(
        {{"design", design.design}, {"regret", number(design.regret)}, {"at", number(design.at)}});
  }
  return {{"per", std::string(word_of(detail::per_words, ruler.per))},
          {"stretches", std::move(stretches)},
          {"unsupported", std::move(unsupported)}};
}

Json funnel_json(const Funnel& funnel) {
  Json lines = Json::array();
  for (const FunnelLine& line : funnel.lines) {
    lines.push_back({{"stage", std::string(word_of(detail::stage_words, line.stage))},
                     {"reason", line.reason},
                     {"candidates", line.candidates}});
  }
  return {{"considered", funnel.considered},
          {"doubtful_sizes", funnel.doubtful_sizes},
          {"lines", std::move(lines)}};
}

/// Null for infinity: a search that was not finished proves no bound.
Json bound_json(double bound) {
  return bound == std::numeric_limits<double>::infinity() ? Json(nullptr) : number(bound);
}

Json telemetry_json(const Result& result) {
  const Telemetry& work = result.telemetry;
  return {{"part", result.part},
          {"evaluations", work.evaluations},
          {"boxes", work.boxes},
          {"skipped", work.skipped},
          {"dominated", work.dominated},
          {"seconds", number(work.seconds)}};
}

Json part_json(const PartResult& part, const Naming& naming) {
  const Result& result = part.result;
  Json designs = Json::array();
  for (const Design& design : result.designs) {
    designs.push_back(design_json(design, naming));
  }
  Json others = Json::array();
  for (const FeasiblePoint& point : result.others) {
    Json row = naming.row(point.candidate);
    row.push_back(naming.size(point.candidate, point.size));
    row.push_back(naming.free_sizes(point.candidate, point.free_sizes));
    row.push_back(number(point.mass));
    row.push_back(number(point.cost));
    others.push_back(std::move(row));
  }
  Json json{{"part", result.part},
            {"exact", result.exact},
            {"epsilon_reached", bound_json(result.epsilon_reached)},
            {"delta", number(result.delta)},
            {"front_count", result.front_count},
            {"designs", std::move(designs)}};
  if (part.ruler.has_value()) {
    json["ruler"] = ruler_json(*part.ruler, naming);
  }
  json["funnel"] = funnel_json(result.funnel);
  json["undecided"] = names_of(result.undecided);
  json["notes"] = names_of(result.notes);
  json["others_columns"] = {
      "material", "shape", "route", "treatment", "finish", "size", "free_sizes", "mass", "cost"};
  json["others"] = std::move(others);
  return json;
}

/// Lines that a person can read: what fits on one stays on one.
void write_lines(const Json& json, std::size_t indent, std::string& out) {
  constexpr std::size_t line_length = 100;
  std::string compact = json.dump();
  if (!json.is_structured() || json.empty() || compact.size() + indent <= line_length) {
    out += compact;
    return;
  }
  const bool object = json.is_object();
  out += object ? '{' : '[';
  bool first = true;
  for (const auto& [key, value] : json.items()) {
    out += first ? "\n" : ",\n";
    first = false;
    out.append(indent + 1, ' ');
    if (object) {
      out += Json(key).dump() + ": ";
    }
    write_lines(value, indent + 1, out);
  }
  out += '\n';
  out.append(indent, ' ');
  out += object ? '}' : ']';
}

}  // namespace

std::string result_json(const Job& job, std::span<const PartResult> results) {
  Json sources = Json::array();
  for (const CatalogueSource& source : job.sources) {
    sources.push_back({{"kind", source.kind}, {"file", source.file}, {"digest", source.digest}});
  }
  Json parts = Json::array();
  Json telemetry = Json::array();
  for (const PartResult& part : results) {
    const Part& of = job.parts[find_part(job, part.result.part)];
    parts.push_back(part_json(part, Naming(job.catalogue, of)));
    telemetry.push_back(telemetry_json(part.result));
  }
  Json json{{"bismar_result", result_format_version},
            {"library", std::string(version())},
            {"caution", std::string(caution())},
            {"units", "SI: m, kg, N, Pa, s, K, rad; money in the job's currency"},
            {"currency", job.currency},
            {"tables", std::move(sources)},
            {"job", Json::parse(job.text)},
            {"results", std::move(parts)}};
  require_finite(json, "");
  detail::Digest digest;
  digest.add(json.dump());
  json["digest"] = digest.text();
  json["telemetry"] = std::move(telemetry);
  std::string out;
  write_lines(json, 0, out);
  out += '\n';
  return out;
}

}  // namespace bismar
