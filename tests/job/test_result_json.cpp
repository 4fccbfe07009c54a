// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/result_json.hpp>

#include "full_job.hpp"

#include "support/catch.hpp"

#include <algorithm>
#include <string>
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
  CHECK(fault(R"({"bismar_result": 2})").message == "the stored result lacks its job.");
  const Fault kind =
      fault(with(stored_text(), "\"front_count\": ", "\"front_count\": \"x\", \"y\": "));
  CHECK(kind.code == Code::wrong_type);
  CHECK(kind.where.rfind("result.json:", 0) == 0);
  CHECK(fault(with(stored_text(), "\"front_count\": ", "\"front_cnt\": ")).code == Code::missing);
}
