// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/result_json.hpp>

#include "full_job.hpp"

#include "support/catch.hpp"

#include <algorithm>
#include <limits>
#include <string>
#include <utility>
#include <vector>

using namespace bismar;
using job_test::with;

namespace {

/// A lever from few materials, by shapes and from stock.
const std::string lever_job = R"json({
  "bismar": 1,
  "parts": [
    {
      "name": "lever", "quantity": 2000,
      "member": {
        "length": "300 mm",
        "shapes": [{ "round": { "diameter": "8 mm..60 mm" } },
                   { "ellipse": { "height_to_width": 1.25, "height": "8 mm..60 mm" } }],
        "stock": ["round-bar"],
        "load_cases": [{ "support": "cantilever", "loads": [{ "force": "655 N", "at": "end" }],
                         "factors": { "yield": 1.5 } }]
      },
      "limits": { "deflection": "10 mm", "classes": ["steel", "aluminium"] }
    }
  ]
})json";

struct Solved {
  Job job;
  std::vector<PartResult> results;
};

const Solved& solved() {
  static const Solved one = [] {
    Solved made;
    made.job = load_job_text(lever_job, "lever.json");
    made.job.settings.explain = Explain::full;
    const Part& part = made.job.parts.at(0);
    PartResult found;
    found.result = front(part, made.job.catalogue, made.job.settings);
    found.ruler = exchange_ruler(found.result, part, made.job.catalogue);
    made.results.push_back(std::move(found));
    return made;
  }();
  return one;
}

const std::string& stored_text() {
  static const std::string text = result_json(solved().job, solved().results);
  return text;
}

/// The stored text with the first number behind `key` changed.
std::string tampered(const std::string& key, const std::string& number) {
  std::string text = stored_text();
  const std::size_t at = text.find("\"designs\"");
  REQUIRE(at != std::string::npos);
  const std::size_t found = text.find("\"" + key + "\":", at);
  REQUIRE(found != std::string::npos);
  const std::size_t begin = text.find_first_of("-0123456789", found + key.size() + 3);
  const std::size_t end = text.find_first_not_of("-+.0123456789eE", begin);
  return text.replace(begin, end - begin, number);
}

bool has_difference(const Verification& found, const std::string& where) {
  return std::any_of(found.differences.begin(), found.differences.end(), [&](const Difference& d) {
    return d.where.find(where) != std::string::npos;
  });
}

}  // namespace

TEST_CASE("the result that these tests store has something of everything") {
  const Result& result = solved().results.at(0).result;
  CHECK(result.front_count >= 2);
  CHECK_FALSE(result.others.empty());
  CHECK_FALSE(result.funnel.lines.empty());
  CHECK_FALSE(solved().results.at(0).ruler->stretches.empty());
  const auto has_shape = [&result](bool stock) {
    const auto is = [stock](const auto& point) {
      return (point.candidate.stock != Candidate::none) == stock;
    };
    return std::any_of(result.designs.begin(), result.designs.end(), is) ||
           std::any_of(result.others.begin(), result.others.end(), is);
  };
  CHECK(has_shape(true));
  CHECK(has_shape(false));
}

TEST_CASE("a result read back writes the same text, byte for byte") {
  const StoredResult stored = read_result_text(stored_text(), "result.json");
  CHECK(stored.unresolved.empty());
  CHECK(stored.digest == stored.actual_digest);
  CHECK(stored.sources == solved().job.sources);
  CHECK(result_json(stored.job, stored.results) == stored_text());
}

TEST_CASE("a stored result of today verifies without a difference") {
  const Verification found = verify(read_result_text(stored_text(), "result.json"));
  for (const Difference& difference : found.differences) {
    UNSCOPED_INFO(difference.text());
  }
  CHECK(found.differences.empty());
  CHECK(found.designs == solved().results.at(0).result.designs.size());
  CHECK(found.values > 5 * found.designs);
  CHECK(found.largest_difference <= 1e-12);
}

TEST_CASE("work done is stored and read back, and lies outside the digest") {
  Solved other = solved();
  other.results.at(0).result.telemetry = {
      .evaluations = 11, .boxes = 22, .skipped = 33, .dominated = 44, .seconds = 0.5};
  const StoredResult read = read_result_text(result_json(other.job, other.results), "r.json");
  const Telemetry& work = read.results.at(0).result.telemetry;
  CHECK(work.evaluations == 11);
  CHECK(work.boxes == 22);
  CHECK(work.skipped == 33);
  CHECK(work.dominated == 44);
  CHECK(work.seconds == 0.5);
  CHECK(read.digest == read_result_text(stored_text(), "r.json").digest);
}

TEST_CASE("what the search reached is stored and read back, infinity too") {
  Solved other = solved();
  Result& result = other.results.at(0).result;
  result.delta = 1e-6;
  for (const double reached : {0.0, 9.7e-4, std::numeric_limits<double>::infinity()}) {
    result.epsilon_reached = reached;
    const std::string text = result_json(other.job, other.results);
    const StoredResult read = read_result_text(text, "r.json");
    CHECK(read.results.at(0).result.epsilon_reached == reached);
    CHECK(read.results.at(0).result.delta == 1e-6);
    CHECK(read.digest == read.actual_digest);
    CHECK(result_json(read.job, read.results) == text);
  }
}

TEST_CASE("free sizes are stored and read back, as many as the shape has") {
  // Invented sizes: storing them asks for no search.
  Solved other;
  const std::string job =
      with(lever_job,
           R"({ "ellipse": { "height_to_width": 1.25, "height": "8 mm..60 mm" } })",
           R"({ "ellipse": {} }, { "elliptical_tube": {} })");
  other.job = load_job_text(job, "lever.json");
  other.results = solved().results;
  other.results.at(0).ruler.reset();
  Result& result = other.results.at(0).result;
  result.others.resize(1);
  for (Design& design : result.designs) {
    design.candidate.stock = Candidate::none;
    design.candidate.shape = 1;
    design.size = 0.03;
    design.free_sizes = {0.0231, 0.0, 0.0};
  }
  FeasiblePoint& point = result.others.front();
  point.candidate.stock = Candidate::none;
  point.candidate.shape = 2;
  point.size = 0.04;
  point.free_sizes = {0.031, 0.0017, 0.0};
  const std::string text = result_json(other.job, other.results);
  const StoredResult read = read_result_text(text, "r.json");
  const Result& back = read.results.at(0).result;
  REQUIRE(back.designs.size() == result.designs.size());
  CHECK(back.designs.at(0).free_sizes == FreeSizes{0.0231, 0.0, 0.0});
  CHECK(back.others.at(0).free_sizes == FreeSizes{0.031, 0.0017, 0.0});
  CHECK(result_json(read.job, read.results) == text);
  // One size too few or too many, or no list of numbers.
  for (const char* wrong : {"[]", "[0.031]", "[0.031,0.0017,0.002]", R"(["a",0.0017])", "0.031"}) {
    INFO(wrong);
    CHECK_THROWS_AS(read_result_text(with(text, "[0.031,0.0017]", wrong), "r.json"), Error);
  }
}

TEST_CASE("a solved design with free sizes verifies, and a changed free size is found") {
  Solved free;
  free.job = load_job_text(R"json({
    "bismar": 1,
    "parts": [{
      "name": "lever", "quantity": 2000,
      "member": {
        "length": "300 mm",
        "shapes": [{ "ellipse": { "height_to_width": "0.8..2", "height": "8 mm..60 mm" } }],
        "load_cases": [{ "support": "cantilever", "loads": [{ "force": "655 N", "at": "end" }] }]
      },
      "limits": { "deflection": "10 mm", "classes": ["aluminium"], "routes": ["hot-forging"] }
    }]
  })json",
                           "free.json");
  PartResult found;
  found.result = front(free.job.parts.at(0), free.job.catalogue, free.job.settings);
  REQUIRE(found.result.front_count > 0);
  CHECK(found.result.delta == 1e-6);
  CHECK(found.result.epsilon_reached <= 1e-3);
  CHECK(found.result.telemetry.boxes > 0);
  free.results.push_back(std::move(found));
  const Design& first = free.results[0].result.designs[0];
  CHECK(first.free_sizes[0] == Approx(first.section.width).epsilon(1e-12));
  CHECK(first.free_sizes[1] == 0.0);
  const Verification sound =
      verify(read_result_text(result_json(free.job, free.results), "r.json"));
  for (const Difference& difference : sound.differences) {
    UNSCOPED_INFO(difference.text());
  }
  CHECK(sound.differences.empty());
  CHECK(sound.largest_difference <= 1e-12);
  free.results[0].result.designs[0].free_sizes[0] *= 1.001;
  const Verification changed =
      verify(read_result_text(result_json(free.job, free.results), "r.json"));
  CHECK(has_difference(changed, "/ mass"));
}

TEST_CASE("telemetry is outside the digest, everything else is inside") {
  Solved other = solved();
  other.results.at(0).result.telemetry.seconds += 1.0;
  const StoredResult later = read_result_text(result_json(other.job, other.results), "r.json");
  const StoredResult stored = read_result_text(stored_text(), "result.json");
  CHECK(later.digest == stored.digest);
  CHECK(later.results.at(0).result.telemetry.seconds ==
        stored.results.at(0).result.telemetry.seconds + 1.0);
  other.results.at(0).result.notes.emplace_back("another note");
  CHECK(read_result_text(result_json(other.job, other.results), "r.json").digest != stored.digest);
}

TEST_CASE("a changed mass, cost or utilisation is found and named") {
  for (const char* key : {"mass", "cost", "value", "amount", "factor"}) {
    INFO(key);
    const Verification found = verify(read_result_text(tampered(key, "0.123"), "result.json"));
    CHECK(has_difference(found, "digest"));
    CHECK(found.differences.size() >= 2);
  }
}

TEST_CASE("a difference beyond one part in a thousand million is found, a smaller one is not") {
  const double mass = solved().results.at(0).result.designs.at(0).mass;
  const auto differs = [mass](double by) {
    Solved changed = solved();
    changed.results.at(0).result.designs.at(0).mass = mass + by;
    const Verification found =
        verify(read_result_text(result_json(changed.job, changed.results), "r.json"));
    return has_difference(found, "/ mass");
  };
  CHECK(differs(2e-9));
  CHECK_FALSE(differs(2e-10));
}

TEST_CASE("a design of the front that a stored point dominates is found") {
  Solved changed = solved();
  Result& result = changed.results.at(0).result;
  REQUIRE_FALSE(result.others.empty());
  result.others[0].mass = result.designs[0].mass * 0.5;
  result.others[0].cost = result.designs[0].cost * 0.5;
  const Verification found =
      verify(read_result_text(result_json(changed.job, changed.results), "r.json"));
  CHECK(has_difference(found, result.designs[0].id));
}

TEST_CASE("a material that the tables have no more is a difference, not a crash") {
  const std::string id = solved().results.at(0).result.designs.at(0).material;
  std::string text = stored_text();
  for (std::size_t at = text.find('"' + id + '"'); at != std::string::npos;
       at = text.find('"' + id + '"', at + 1)) {
    text.replace(at, id.size() + 2, "\"gone-steel\"");
  }
  const StoredResult stored = read_result_text(text, "result.json");
  REQUIRE_FALSE(stored.unresolved.empty());
  CHECK(stored.unresolved[0] == "the tables have no material \"gone-steel\" any more");
  CHECK(has_difference(verify(stored), "tables"));
}

TEST_CASE("what is no stored result, or one of another version, is refused with its place") {
  const auto fault = [](const std::string& text) {
    try {
      static_cast<void>(read_result_text(text, "result.json"));
    } catch (const Error& error) {
      return error.faults()[0];
    }
    FAIL("an error was expected");
    return Fault{};
  };
  CHECK(fault("{}").code == Code::missing);
  CHECK(fault("{").code == Code::json_malformed);
  CHECK(fault(R"({"bismar_result": 99})").code == Code::version_unsupported);
  CHECK(fault(R"({"bismar_result": 3})").message == "the stored result lacks its job.");
  const Fault old = fault(with(stored_text(), "\"bismar_result\": 3", "\"bismar_result\": 2"));
  CHECK(old.code == Code::version_unsupported);
  CHECK(old.message == "this result has format version 2; this program reads version 3.");
  const Fault kind =
      fault(with(stored_text(), "\"front_count\": ", "\"front_count\": \"x\", \"y\": "));
  CHECK(kind.code == Code::wrong_type);
  CHECK(kind.where.rfind("result.json:", 0) == 0);
  CHECK(fault(with(stored_text(), "\"front_count\": ", "\"front_cnt\": ")).code == Code::missing);
}
