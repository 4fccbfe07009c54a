// SPDX-License-Identifier: MIT
#include "digest.hpp"
#include "json_document.hpp"
#include "result_words.hpp"

#include <bismar/catalogue/csv.hpp>
#include <bismar/job/result_json.hpp>
#include <bismar/numeric/floating_point_guard.hpp>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <limits>
#include <utility>

namespace bismar {

namespace {

using detail::JsonDocument;
using detail::JsonValue;
using Kind = JsonValue::Kind;

/// Takes values of known keys out of a stored result; what is missing or of another kind is a fault
/// with its place, and reads as zero or empty so that the rest is looked at too.
class ResultReader {
 public:
  ResultReader(const JsonDocument& document, FaultList& faults, StoredResult& stored)
      : document_(document), faults_(faults), stored_(stored) {}

  void read(const JsonValue& root) {
    stored_.library = text(root, "library");
    stored_.digest = text(root, "digest");
    for (const JsonValue& item : list(root, "tables")) {
      stored_.sources.push_back({text(item, "kind"), text(item, "file"), text(item, "digest")});
    }
    const std::string currency = text(root, "currency");
    for (const JsonValue& item : list(root, "results")) {
      PartResult part;
      read_part(item, part);
      part.result.currency = currency;
      stored_.results.push_back(std::move(part));
    }
    read_telemetry(root);
  }

 private:
  void add(Code code, const JsonValue& value, const std::string& key, const std::string& allowed) {
    Fault fault;
    fault.code = code;
    fault.where = document_.where(value.offset, {});
    fault.found = key;
    fault.allowed = allowed;
    fault.message = code == Code::missing
                        ? "the stored result lacks \"" + key + "\", " + allowed + '.'
                        : "\"" + key + "\" of the stored result is not " + allowed + '.';
    faults_.add(std::move(fault));
  }

  const JsonValue* get(const JsonValue& object, const std::string& key, Kind kind) {
    const JsonValue* value = object.find(key);
    if (value == nullptr) {
      add(Code::missing, object, key, std::string(phrase(kind)));
      return nullptr;
    }
    if (!value->is(kind)) {
      add(Code::wrong_type, *value, key, std::string(phrase(kind)));
      return nullptr;
    }
    return value;
  }

  std::string text(const JsonValue& object, const std::string& key) {
    const JsonValue* value = get(object, key, Kind::text);
    return value == nullptr ? std::string() : value->text;
  }
  double number(const JsonValue& object, const std::string& key) {
    const JsonValue* value = get(object, key, Kind::number);
    return value == nullptr ? 0.0 : value->number;
  }
  /// Null stands for infinity.
  double bound(const JsonValue& object, const std::string& key) {
    const JsonValue* value = object.find(key);
    return value != nullptr && value->is(Kind::null) ? std::numeric_limits<double>::infinity()
                                                     : number(object, key);
  }
  bool boolean(const JsonValue& object, const std::string& key) {
    const JsonValue* value = get(object, key, Kind::boolean);
    return value != nullptr && value->boolean;
  }
  std::optional<double> number_if(const JsonValue& object, const std::string& key) {
    return object.find(key) == nullptr ? std::nullopt : std::optional<double>(number(object, key));
  }
  std::size_t whole(const JsonValue& object, const std::string& key) {
    const double value = number(object, key);
    constexpr double largest = 9007199254740992.0;  // 2^53
    if (!(value >= 0.0 && value <= largest && value == std::floor(value))) {
      add(Code::out_of_range, object, key, "a whole number");
      return 0;
    }
    return static_cast<std::size_t>(value);
  }
  const std::vector<JsonValue>& list(const JsonValue& object, const std::string& key) {
    static const std::vector<JsonValue> nothing;
    const JsonValue* value = get(object, key, Kind::list);
    return value == nullptr ? nothing : value->items;
  }
  std::vector<std::string> texts(const JsonValue& object, const std::string& key) {
    std::vector<std::string> all;
    for (const JsonValue& item : list(object, key)) {
      if (!item.is(Kind::text)) {
        add(Code::wrong_type, item, key, "a list of texts");
      }
      all.push_back(item.text);
    }
    return all;
  }
  template <class Enum, std::size_t n>
  Enum word(const JsonValue& object, const std::string& key, const detail::Words<Enum, n>& words) {
    const std::string found = text(object, key);
    const std::optional<Enum> value = detail::value_of(words, found);
    if (!value.has_value()) {
      add(Code::unknown_name, object, key, "a known word: \"" + found + '"');
    }
    return value.value_or(words.front().first);
  }

  /// The place of an entry by id, or none with a sentence.
  template <class Entry>
  std::uint32_t index_of(const std::vector<Entry>& entries,
                         const JsonValue& id,
                         const std::string& what) {
    const auto found = std::find_if(
        entries.begin(), entries.end(), [&](const Entry& entry) { return entry.id == id.text; });
    if (!id.is(Kind::text) || found == entries.end()) {
      lost(what, id);
      return Candidate::none;
    }
    return static_cast<std::uint32_t>(found - entries.begin());
  }

  void lost(const std::string& what, const JsonValue& id) {
    std::string sentence = "the tables have no " + what + ' ' + shown(id) + " any more";
    if (std::find(stored_.unresolved.begin(), stored_.unresolved.end(), sentence) ==
        stored_.unresolved.end()) {
      stored_.unresolved.push_back(std::move(sentence));
    }
    resolved_ = false;
  }

  Candidate candidate(const std::vector<JsonValue>& row, const JsonValue& place) {
    Candidate candidate;
    if (row.size() < 5) {
      add(Code::wrong_type, place, "candidate", "a list of five entries");
      candidate.material = Candidate::none;
      return candidate;
    }
    const Catalogue& catalogue = stored_.job.catalogue;
    resolved_ = true;
    if (const auto material = catalogue.materials.find(row[0].text)) {
      candidate.material = static_cast<std::uint32_t>(*material);
    } else {
      lost("material", row[0]);
    }
    if (row[1].is(Kind::text)) {
      candidate.stock = index_of(catalogue.stock, row[1], "stock list");
    } else if (row[1].is(Kind::number) && row[1].number >= 0.0 && part_ != nullptr &&
               row[1].number < static_cast<double>(part_->body.shapes.size())) {
      candidate.shape = static_cast<std::uint32_t>(row[1].number);
    } else {
      add(Code::out_of_range, place, "candidate", "a shape of the part");
      resolved_ = false;
    }
    candidate.route = index_of(catalogue.routes, row[2], "route");
    if (!row[3].is(Kind::null)) {
      candidate.treatment = index_of(catalogue.routes, row[3], "treatment");
    }
    if (!row[4].is(Kind::null)) {
      candidate.finish = index_of(catalogue.finishes, row[4], "finish");
    }
    if (!resolved_) {
      candidate.material = Candidate::none;
    }
    return candidate;
  }

  double size(Candidate& candidate, const JsonValue& value) {
    if (value.is(Kind::number)) {
      return value.number;
    }
    if (candidate.stock == Candidate::none) {
      return 0.0;  // the list is lost, said already
    }
    const std::vector<StockItem>& items = stored_.job.catalogue.stock[candidate.stock].items;
    const std::uint32_t item = index_of(items, value, "stock size");
    if (item == Candidate::none) {
      candidate.material = Candidate::none;
      return 0.0;
    }
    return static_cast<double>(item);
  }

  /// As many as the shape has free dimensions; none of stock, or of a shape that is not known.
  FreeSizes free_sizes(const Candidate& candidate, const JsonValue& value) {
    FreeSizes sizes{};
    if (candidate.shape == Candidate::none || part_ == nullptr) {
      return sizes;
    }
    const std::size_t count = free_dimensions(part_->body.shapes[candidate.shape]).size();
    if (!value.is(Kind::list) || value.items.size() != count) {
      add(Code::wrong_type, value, "free_sizes", "a list of " + std::to_string(count) + " sizes");
      return sizes;
    }
    for (std::size_t i = 0; i < count; ++i) {
      if (!value.items[i].is(Kind::number)) {
        add(Code::wrong_type, value.items[i], "free_sizes", "a list of numbers");
      }
      sizes[i] = value.items[i].number;
    }
    return sizes;
  }

  SectionProperties section(const JsonValue& value) {
    SectionProperties section;
    const std::string family = text(value, "family");
    if (const std::optional<SectionFamily> known = section_family(family)) {
      section.family = *known;
    } else {
      add(Code::unknown_name, value, "family", "a known section: \"" + family + '"');
    }
    section.forming = word(value, "forming", detail::forming_words);
    for (const detail::SectionNumber& field : detail::section_numbers) {
      section.*field.field = number(value, std::string(field.name));
    }
    section.smooth_outline = boolean(value, "smooth_outline");
    for (const JsonValue& plate : list(value, "plates")) {
      section.plates.push_back({word(plate, "kind", detail::plate_words), number(plate, "ratio")});
    }
    for (const JsonValue& fibre : list(value, "fibres")) {
      section.fibres.push_back({number(fibre, "y"), number(fibre, "z")});
    }
    return section;
  }

  Design design(const JsonValue& value) {
    Design design;
    design.id = text(value, "id");
    design.candidate = candidate(list(value, "candidate"), value);
    if (const JsonValue* stored = value.find("size"); stored != nullptr) {
      design.size = size(design.candidate, *stored);
    } else {
      add(Code::missing, value, "size", "a number or the id of a stock size");
    }
    if (const JsonValue* stored = get(value, "free_sizes", Kind::list); stored != nullptr) {
      design.free_sizes = free_sizes(design.candidate, *stored);
    }
    design.material = text(value, "material");
    design.material_name = text(value, "material_name");
    design.shape = text(value, "shape");
    design.size_text = text(value, "size_text");
    design.stock_item = text(value, "stock_item");
    design.route = text(value, "route");
    design.treatment = text(value, "treatment");
    design.finish = text(value, "finish");
    design.mass = number(value, "mass");
    design.cost = number(value, "cost");
    for (const JsonValue& u : list(value, "utilisations")) {
      design.utilisations.push_back(
          {text(u, "limit"), text(u, "load_case"), number(u, "value"), number(u, "factor")});
    }
    design.governing = whole(value, "governing");
    if (design.governing >= design.utilisations.size()) {
      add(Code::out_of_range, value, "governing", "the place of a utilisation");
      design.governing = 0;
    }
    if (const JsonValue* cost = get(value, "cost_breakdown", Kind::object); cost != nullptr) {
      CostBreakdown& breakdown = design.cost_breakdown;
      for (const JsonValue& line : list(*cost, "lines")) {
        breakdown.lines.push_back({text(line, "item"), number(line, "amount"), text(line, "how")});
      }
      breakdown.total = number(*cost, "total");
      breakdown.low = number(*cost, "low");
      breakdown.high = number(*cost, "high");
      breakdown.bought_mass = number(*cost, "bought_mass");
      breakdown.blank = text(*cost, "blank");
    }
    if (const JsonValue* stored = get(value, "section", Kind::object); stored != nullptr) {
      design.section = section(*stored);
    }
    design.notes = texts(value, "notes");
    if (const JsonValue* buyable = value.find("buyable"); buyable != nullptr) {
      design.buyable_size = number(*buyable, "size");
      design.buyable_mass = number(*buyable, "mass");
      design.buyable_cost = number(*buyable, "cost");
      design.buyable_feasible = boolean(*buyable, "feasible");
    }
    return design;
  }

  ExchangeRuler ruler(const JsonValue& value, std::size_t designs) {
    ExchangeRuler ruler;
    ruler.per = word(value, "per", detail::per_words);
    for (const JsonValue& item : list(value, "stretches")) {
      NamedStretch stretch;
      stretch.from = number(item, "from");
      stretch.to = number_if(item, "to");
      stretch.design = design_index(item, designs);
      stretch.choice = text(item, "choice");
      stretch.mass = number(item, "mass");
      stretch.cost = number(item, "cost");
      stretch.penalty_from = number(item, "penalty_from");
      stretch.penalty_to = number_if(item, "penalty_to");
      if (const JsonValue* band = item.find("from_band"); band != nullptr) {
        stretch.from_band = BreakpointBand{number(*band, "low"), number_if(*band, "high")};
      }
      for (const JsonValue& second : list(item, "runners_up")) {
        NamedStretch::RunnerUp runner;
        runner.from = number(second, "from");
        runner.to = number_if(second, "to");
        runner.choice = text(second, "choice");
        runner.candidate = candidate(list(second, "candidate"), second);
        runner.mass = number(second, "mass");
        runner.cost = number(second, "cost");
        runner.regret_from = number(second, "regret_from");
        runner.regret_to = number_if(second, "regret_to");
        stretch.runners_up.push_back(std::move(runner));
      }
      ruler.stretches.push_back(std::move(stretch));
    }
    for (const JsonValue& item : list(value, "unsupported")) {
      ruler.unsupported.push_back(
          {design_index(item, designs), number(item, "regret"), number(item, "at")});
    }
    return ruler;
  }

  std::size_t design_index(const JsonValue& item, std::size_t designs) {
    const std::size_t index = whole(item, "design");
    if (index >= designs) {
      add(Code::out_of_range, item, "design", "the place of a design");
      return 0;
    }
    return index;
  }

  void read_part(const JsonValue& value, PartResult& part) {
    Result& result = part.result;
    result.part = text(value, "part");
    part_ = nullptr;
    for (const Part& known : stored_.job.parts) {
      if (known.name == result.part) {
        part_ = &known;
      }
    }
    result.exact = boolean(value, "exact");
    result.epsilon_reached = bound(value, "epsilon_reached");
    result.delta = number(value, "delta");
    for (const JsonValue& item : list(value, "designs")) {
      result.designs.push_back(design(item));
    }
    result.front_count = whole(value, "front_count");
    if (result.front_count > result.designs.size()) {
      add(Code::out_of_range, value, "front_count", "at most the number of designs");
      result.front_count = 0;
    }
    if (const JsonValue* stored = value.find("ruler"); stored != nullptr) {
      part.ruler = ruler(*stored, result.designs.size());
    }
    if (const JsonValue* funnel = get(value, "funnel", Kind::object); funnel != nullptr) {
      result.funnel.considered = whole(*funnel, "considered");
      result.funnel.doubtful_sizes = whole(*funnel, "doubtful_sizes");
      for (const JsonValue& line : list(*funnel, "lines")) {
        result.funnel.lines.push_back({word(line, "stage", detail::stage_words),
                                       text(line, "reason"),
                                       whole(line, "candidates")});
      }
    }
    result.undecided = texts(value, "undecided");
    result.notes = texts(value, "notes");
    for (const JsonValue& row : list(value, "others")) {
      if (row.items.size() != 9) {
        add(Code::wrong_type, row, "others", "a list of nine entries");
        continue;
      }
      FeasiblePoint point;
      point.candidate = candidate(row.items, row);
      point.size = size(point.candidate, row.items[5]);
      point.free_sizes = free_sizes(point.candidate, row.items[6]);
      point.mass = row.items[7].number;
      point.cost = row.items[8].number;
      result.others.push_back(point);
    }
  }

  void read_telemetry(const JsonValue& root) {
    for (const JsonValue& item : list(root, "telemetry")) {
      const std::string name = text(item, "part");
      for (PartResult& part : stored_.results) {
        if (part.result.part == name) {
          part.result.telemetry = {.evaluations = whole(item, "evaluations"),
                                   .boxes = whole(item, "boxes"),
                                   .skipped = whole(item, "skipped"),
                                   .dominated = whole(item, "dominated"),
                                   .seconds = number(item, "seconds")};
        }
      }
    }
  }

  const JsonDocument& document_;
  FaultList& faults_;
  StoredResult& stored_;
  const Part* part_ = nullptr;  ///< The part that is read; null where the job has none such.
  bool resolved_ = true;
};

std::string digest_of(const JsonValue& root) {
  JsonValue hashed = root;
  std::erase_if(hashed.members, [](const JsonValue::Member& member) {
    return member.key == "digest" || member.key == "telemetry";
  });
  detail::Digest digest;
  digest.add(detail::to_compact_text(hashed));
  return digest.text();
}

}  // namespace

StoredResult read_result_text(std::string_view text,
                              const std::string& name,
                              const std::string& folder) {
  const FloatingPointGuard guard;
  FaultList faults;
  JsonDocument document;
  if (!document.parse(std::string(text), name, faults)) {
    faults.throw_if_any();
  }
  const JsonValue& root = document.root();
  const JsonValue* version = root.find("bismar_result");
  if (version == nullptr || !version->is(Kind::number)) {
    Fault fault;
    fault.code = Code::missing;
    fault.where = document.where(root.offset, {});
    fault.allowed = "\"bismar_result\": " + std::to_string(result_format_version);
    fault.message =
        "this is no stored result: it has no \"bismar_result\". A result is written by "
        "`bismar front JOB --format json`.";
    throw Error(std::move(fault));
  }
  if (version->number != result_format_version) {
    Fault fault;
    fault.code = Code::version_unsupported;
    fault.where = document.where(version->offset, "/bismar_result");
    fault.found = version->text;
    fault.allowed = std::to_string(result_format_version);
    fault.message = "this result has format version " + version->text +
                    "; this program reads version " + std::to_string(result_format_version) + '.';
    throw Error(std::move(fault));
  }
  StoredResult stored;
  const JsonValue* job = root.find("job");
  if (job == nullptr || !job->is(Kind::object)) {
    faults.add(
        Code::missing, document.where(root.offset, "/job"), "the stored result lacks its job.");
    faults.throw_if_any();
  }
  stored.job = load_job_text(detail::to_compact_text(*job), name + " (its job)", folder);
  ResultReader(document, faults, stored).read(root);
  faults.throw_if_any();
  stored.actual_digest = digest_of(root);
  return stored;
}

StoredResult read_result(const std::string& path, const std::string& folder) {
  const std::filesystem::path file(path);
  return read_result_text(read_table_file(path),
                          file.filename().string(),
                          folder.empty() ? file.parent_path().string() : folder);
}

}  // namespace bismar
