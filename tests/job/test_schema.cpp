// SPDX-License-Identifier: MIT
#include "full_job.hpp"
#include "job/format.hpp"
#include "schema_judge.hpp"

#include <bismar/error.hpp>
#include <bismar/job/job.hpp>

#include "support/catch.hpp"

#include <nlohmann/json.hpp>

#include <fstream>
#include <set>
#include <sstream>
#include <string>
#include <vector>

using bismar::detail::Format;
using bismar::detail::Key;
using job_test::SchemaJudge;
using nlohmann::json;

namespace {

std::string file_text(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  REQUIRE(file.good());
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

json read(const std::string& text) { return json::parse(text, nullptr, true, true); }

const SchemaJudge& judge() {
  static const SchemaJudge one(json::parse(bismar::job_schema()));
  return one;
}

bool loads(const json& job) {
  try {
    static_cast<void>(bismar::load_job_text(job.dump(), "job.json"));
    return true;
  } catch (const bismar::Error&) {
    return false;
  }
}

void collect_keys(const Format& format, std::set<std::string>& keys) {
  const auto add = [&keys](const std::vector<Key>& list) {
    for (const Key& key : list) {
      keys.insert(key.name);
      collect_keys(*key.format, keys);
    }
  };
  add(format.keys);
  for (const Format::Variant& variant : format.variants) {
    add(variant.keys);
  }
  for (const Format& alternative : format.alternatives) {
    collect_keys(alternative, keys);
  }
  if (format.item != nullptr) {
    collect_keys(*format.item, keys);
  }
}

void collect_used(const json& value, std::set<std::string>& keys) {
  for (const auto& [key, child] : value.items()) {
    if (value.is_object()) {
      keys.insert(key);
    }
    if (child.is_structured()) {
      collect_used(child, keys);
    }
  }
}

/// Pointers to every value below the root.
void collect_pointers(const json& value,
                      const json::json_pointer& at,
                      std::vector<json::json_pointer>& all) {
  for (const auto& [key, child] : value.items()) {
    const json::json_pointer below =
        value.is_object() ? at / key : at / static_cast<std::size_t>(std::stoul(key));
    all.push_back(below);
    if (child.is_structured()) {
      collect_pointers(child, below, all);
    }
  }
}

const std::vector<json::json_pointer>& all_pointers() {
  static const std::vector<json::json_pointer> pointers = [] {
    std::vector<json::json_pointer> all;
    collect_pointers(read(job_test::full_job), json::json_pointer(), all);
    return all;
  }();
  return pointers;
}

}  // namespace

TEST_CASE("the schema file is the one that the library prints") {
  CHECK(file_text(std::string(BISMAR_TEST_DATA_DIR) + "/schema/job.schema.json") ==
        bismar::job_schema());
}

TEST_CASE("the job that the schema tests start from uses every key of the format") {
  std::set<std::string> known;
  collect_keys(bismar::detail::job_format(), known);
  std::set<std::string> used;
  collect_used(read(job_test::full_job), used);
  // Formats of own tables need a file beside the job: test_catalogue_sources.cpp.
  for (const char* elsewhere : {"file", "delimiter", "decimal", "replaces"}) {
    known.erase(elsewhere);
  }
  for (const std::string& key : known) {
    INFO(key);
    CHECK(used.contains(key));
  }
  CHECK(all_pointers().size() > 150);
}

TEST_CASE("schema and loader accept the same valid jobs") {
  for (const std::string& text :
       {job_test::full_job,
        job_test::small_job,
        bismar::starter_job(),
        file_text(std::string(BISMAR_TEST_DATA_DIR) + "/jobs/crank_lever.json"),
        file_text(std::string(BISMAR_TEST_DATA_DIR) + "/jobs/gate_stem.json"),
        file_text(std::string(BISMAR_TEST_DATA_DIR) + "/jobs/gear_beam.json")}) {
    INFO(text);
    CHECK(judge().accepts(read(text)));
    CHECK(loads(read(text)));
  }
}

TEST_CASE("schema and loader refuse every misspelt key") {
  std::size_t tried = 0;
  for (const json::json_pointer& at : all_pointers()) {
    json job = read(job_test::full_job);
    json& parent = job.at(at.parent_pointer());
    if (!parent.is_object()) {
      continue;
    }
    json value = parent.at(at.back());
    parent.erase(at.back());
    parent[at.back() + "x"] = std::move(value);
    INFO(at.to_string());
    CHECK_FALSE(judge().accepts(job));
    CHECK_FALSE(loads(job));
    ++tried;
  }
  CHECK(tried > 100);
}

TEST_CASE("schema and loader refuse every value of a wrong kind") {
  for (const json::json_pointer& at : all_pointers()) {
    for (const json& wrong : {json(nullptr), json(json::array({json::array()})), json(-1.5)}) {
      const std::string key = at.back();
      if (wrong.is_number() && (key == "at_least" || key == "at_most" || key == "stress_ratio")) {
        continue;  // a bound of a property without a unit may be any number, a ratio negative
      }
      json job = read(job_test::full_job);
      json& value = job.at(at);
      value = wrong;
      INFO(at.to_string() << " = " << wrong.dump());
      CHECK_FALSE(judge().accepts(job));
      CHECK_FALSE(loads(job));
    }
  }
}

TEST_CASE("schema and loader refuse a word that is in no list, and a text without a number") {
  // Names of the tables: to the schema any text may be one, the loader looks them up.
  const std::set<std::string> named = {"currency",
                                       "property",
                                       "medium",
                                       "operation",
                                       "at_least",
                                       "at_most",
                                       "routes",
                                       "forbidden_routes",
                                       "processes",
                                       "forms",
                                       "classes",
                                       "materials",
                                       "forbidden_materials",
                                       "finishes",
                                       "stock",
                                       "operations",
                                       "weld_zones"};
  std::size_t tried = 0;
  for (const json::json_pointer& at : all_pointers()) {
    json job = read(job_test::full_job);
    json& value = job.at(at);
    const bool in_list = job.at(at.parent_pointer()).is_array();
    const std::string key = in_list ? at.parent_pointer().back() : at.back();
    if (!value.is_string() || key == "name" || key == "title") {
      continue;
    }
    value = "zzz";
    INFO(at.to_string());
    CHECK_FALSE(loads(job));
    if (!named.contains(key)) {
      CHECK_FALSE(judge().accepts(job));
      ++tried;
    }
  }
  CHECK(tried > 50);
}

TEST_CASE("schema and loader refuse a job that lacks a required key") {
  const std::vector<std::string> required = {
      "/bismar",
      "/parts",
      "/parts/0/name",
      "/parts/0/member",
      "/parts/0/member/length",
      "/parts/0/member/load_cases",
      "/parts/0/member/load_cases/0/support",
      "/parts/0/member/load_cases/0/support/y",
      "/parts/0/member/load_cases/0/loads/0/at",
      "/parts/0/member/load_cases/0/loads/5/from_preload/preload",
      "/parts/0/limits/properties/0/property",
      "/parts/0/operations/0/operation",
  };
  for (const std::string& pointer : required) {
    json job = read(job_test::full_job);
    const json::json_pointer at(pointer);
    job.at(at.parent_pointer()).erase(at.back());
    INFO(pointer);
    CHECK_FALSE(judge().accepts(job));
    CHECK_FALSE(loads(job));
  }
}

TEST_CASE("schema and loader take the same texts for a ratio") {
  const auto both = [](const json& ratio) {
    json job = read(job_test::small_job);
    job.at("/parts/0/member/shapes/0"_json_pointer) = {{"ellipse", {{"height_to_width", ratio}}}};
    const bool loaded = loads(job);
    CHECK(judge().accepts(job) == loaded);
    return loaded;
  };
  for (const char* text : {"0.5..2", "50..200 %", "50 %..200 %", "1.25", "125 %", " .5 .. 2 "}) {
    INFO(text);
    CHECK(both(text));
  }
  for (const char* text : {"0.5..", "..2", "0.5..-2", "-1..2", "a..b", "", "0.5...2"}) {
    INFO(text);
    CHECK_FALSE(both(text));
  }
  CHECK(both(2));
  CHECK_FALSE(both(0));
  CHECK_FALSE(both(json::array({0.5, 2})));
}

TEST_CASE("the schema knows quantities by their form") {
  const auto accepts = [](const std::string& length) {
    json job = read(job_test::small_job);
    job.at("/parts/0/member/length"_json_pointer) = length;
    return judge().accepts(job);
  };
  CHECK(accepts("300 mm"));
  CHECK(accepts("300mm"));
  CHECK(accepts(" 3e-1 m"));
  CHECK(accepts(".3 m"));
  CHECK_FALSE(accepts("300"));
  CHECK_FALSE(accepts("-300 mm"));
  CHECK_FALSE(accepts("mm"));
  CHECK_FALSE(accepts("300,5 mm"));
  CHECK_FALSE(accepts("1 000 mm"));
}
