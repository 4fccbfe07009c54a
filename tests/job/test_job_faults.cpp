// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/job.hpp>

#include "full_job.hpp"

#include "support/catch.hpp"

#include <algorithm>
#include <string>
#include <vector>

using namespace bismar;
using job_test::full_job;
using job_test::small_job;
using job_test::with;

namespace {

std::vector<Fault> faults_of(const std::string& text) {
  try {
    static_cast<void>(load_job_text(text, "job.json"));
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

struct Case {
  std::string from;  ///< In the full job ...
  std::string to;    ///< ... becomes this, and
  Code code;         ///< this fault must be among the answers,
  std::string pointer;
  std::string message;  ///< with this in its message.
};

const std::vector<Case>& cases() {
  static const std::vector<Case> all = {
      // keys
      {R"("deflection":)",
       R"("deflecton":)",
       Code::unknown_key,
       "/parts/0/limits/deflecton",
       "Did you mean \"deflection\"?"},
      {R"("title": "every key once",)",
       R"("title": "a", "title": "b",)",
       Code::duplicate,
       "/title",
       "stands twice"},
      {R"("at_least": "8 %")",
       R"("atleast": "8 %")",
       Code::unknown_key,
       "/parts/0/limits/properties/0/atleast",
       "Did you mean \"at_least\"?"},
      {R"("quantity": 2000)",
       R"("quantity": "many")",
       Code::number_malformed,
       "/parts/0/quantity",
       "many"},
      {R"("factors": { "yield": 1.7 })",
       R"("factors": { "yeild": 1.7 })",
       Code::unknown_key,
       "/parts/0/member/load_cases/0/factors/yeild",
       "Did you mean \"yield\"?"},
      {R"("torque_factor": 0.2)",
       R"("k": 0.2)",
       Code::missing,
       "/parts/0/member/load_cases/0/loads/5/from_preload",
       "\"torque_factor\" is missing"},
      // counts
      {R"("cycles": 200000, )",
       "",
       Code::missing,
       "/parts/1/member/load_cases/0/fatigue",
       "a whole number, such as 2000"},
      {R"("cycles": 200000)",
       R"("cycles": 1.5)",
       Code::out_of_range,
       "/parts/1/member/load_cases/0/fatigue/cycles",
       "1.5 is not a whole number"},
      // version
      {R"("bismar": 1)",
       R"("bismar": 2)",
       Code::version_unsupported,
       "/bismar",
       "this program reads version 1"},
      {R"("bismar": 1)", R"("bismar": "1")", Code::wrong_type, "/bismar", "the number 1"},
      // kinds
      {R"("name": "first")",
       R"("name": ["first"])",
       Code::wrong_type,
       "/parts/0/name",
       "here stands a list; allowed: a text."},
      {R"("name": "first")", R"("name": "  ")", Code::empty, "/parts/0/name", "empty"},
      {R"("hand_loaded": true)",
       R"("hand_loaded": "yes")",
       Code::wrong_type,
       "/parts/0/member/load_cases/0/hand_loaded",
       "true or false"},
      {R"("impact": true)",
       R"("impact": null)",
       Code::wrong_type,
       "/parts/0/member/load_cases/0/impact",
       "here stands null"},
      {R"(["none", "galvanising"])", "[]", Code::empty, "/parts/0/finishes", "the list is empty"},
      {R"("service_class": 2)",
       R"("service_class": 3)",
       Code::out_of_range,
       "/parts/0/service_class",
       "the number 1 or 2"},
      // ratios and the search among them
      {R"("height_to_width": 1.25)",
       R"("height_to_width": "2..0.5")",
       Code::conflict,
       "/parts/0/member/shapes/3/ellipse/height_to_width",
       "runs from high to low"},
      {R"("height_to_width": 1.25)",
       R"("height_to_width": "0..2")",
       Code::out_of_range,
       "/parts/0/member/shapes/3/ellipse/height_to_width",
       "must be above zero"},
      {R"("height_to_width": 1.25)",
       R"("height_to_width": "0.5..2 mm")",
       Code::unit_wrong,
       "/parts/0/member/shapes/3/ellipse/height_to_width",
       ""},
      {R"("height_to_width": 1.25)",
       R"("height_to_width": true)",
       Code::wrong_type,
       "/parts/0/member/shapes/3/ellipse/height_to_width",
       "or a range as a text \"low..high\""},
      {R"("root_radius_to_height": 0.03)",
       R"("root_radius_to_height": "0.01..0.03")",
       Code::number_malformed,
       "/parts/1/member/shapes/2/i_section/root_radius_to_height",
       "is a range where one value is needed"},
      {R"("epsilon": "0.5 %")",
       R"("epsilon": 0.2)",
       Code::out_of_range,
       "/settings/epsilon",
       "up to 0.1"},
      {R"("epsilon": "0.5 %")",
       R"("epsilon": 0)",
       Code::out_of_range,
       "/settings/epsilon",
       "above"},
      {R"("delta": 1e-5)",
       R"("delta": "2 %")",
       Code::out_of_range,
       "/settings/delta",
       "up to 0.01"},
      {R"("explain": "full")",
       R"("explain": "ful")",
       Code::unknown_name,
       "/settings/explain",
       "Did you mean \"full\"?"},
      // units
      {R"("length": "400 mm")",
       R"("length": 400)",
       Code::unit_missing,
       "/parts/0/member/length",
       "the number 400 has no unit"},
      {R"("length": "400 mm")",
       R"("length": "400")",
       Code::unit_missing,
       "/parts/0/member/length",
       ""},
      {R"("length": "400 mm")",
       R"("length": "400 kg")",
       Code::unit_wrong,
       "/parts/0/member/length",
       ""},
      {R"("length": "400 mm")",
       R"("length": "400 mmm")",
       Code::unit_unknown,
       "/parts/0/member/length",
       ""},
      {R"("length": "400 mm")",
       R"("length": "-400 mm")",
       Code::out_of_range,
       "/parts/0/member/length",
       "above zero"},
      {R"("length": "400 mm")",
       R"("length": "nan mm")",
       Code::not_finite,
       "/parts/0/member/length",
       ""},
      {R"("kerf": "4 mm")", R"("kerf": "-4 mm")", Code::out_of_range, "/settings/kerf", "negative"},
      {R"("deflection": "10 mm")",
       R"("deflection": "0 mm")",
       Code::out_of_range,
       "/parts/0/limits/deflection",
       "above zero"},
      {R"("10 mm..60 mm", "sizes": "R20")",
       R"("60 mm..10 mm", "sizes": "R20")",
       Code::conflict,
       "/parts/0/member/shapes/0/round/diameter",
       ""},
      {R"("temperature": "40 degC")",
       R"("temperature": "-300 degC")",
       Code::out_of_range,
       "/parts/0/limits/temperature",
       ""},
      {R"("batch": 500)", R"("batch": 2.5)", Code::out_of_range, "/parts/0/batch", "whole"},
      {R"("batch": 500)", R"("batch": 0)", Code::out_of_range, "/parts/0/batch", "above zero"},
      {R"("near": "10 %")",
       R"("near": 10)",
       Code::out_of_range,
       "/settings/near",
       "more than the whole"},
      {R"("mass": "3 kg")",
       R"("mass": 1e999)",
       Code::not_finite,
       "/parts/0/limits/mass",
       "too large"},
      {R"("0.5 EUR/kg..500 EUR/kg")",
       R"("5 EUR/kg..5 EUR/kg")",
       Code::conflict,
       "/exchange/mass",
       "no width"},
      // money
      {R"("currency": "EUR")",
       R"("currency": "euro")",
       Code::unknown_name,
       "/currency",
       "no currency code"},
      {R"("USD": "0.92 EUR")", R"("usd": "0.92 EUR")", Code::unknown_key, "/rates/usd", "ISO 4217"},
      {R"("USD": "0.92 EUR")", R"("USD": "0.92 USD")", Code::missing, "/rates/USD", ""},
      {R"("USD": "0.92 EUR")",
       R"("EUR": "0.92 EUR")",
       Code::conflict,
       "/rates/EUR",
       "own currency"},
      {R"("cost": "20 EUR")", R"("cost": "20 GBP")", Code::missing, "/parts/0/limits/cost", "GBP"},
      // words and names
      {R"("R20")", R"("R21")", Code::unknown_name, "/parts/0/member/shapes/0/round/sizes", "R20"},
      {R"("support": "pinned")",
       R"("support": "pined")",
       Code::unknown_name,
       "/parts/0/member/load_cases/1/support",
       "Did you mean \"pinned\"?"},
      {R"("middle")",
       R"("midle")",
       Code::unknown_name,
       "/parts/0/member/load_cases/0/loads/1/at",
       "Did you mean \"middle\"?"},
      {R"("missing": "exclude")",
       R"("missing": "ignore")",
       Code::unknown_name,
       "/settings/missing",
       "\"class median\""},
      {R"(["hot-forging"])",
       R"(["hot-forgin"])",
       Code::unknown_name,
       "/parts/0/limits/routes/0",
       "Did you mean \"hot-forging\"?"},
      {R"(["sand-casting"])",
       R"(["sand-casting", "sand-casting"])",
       Code::duplicate,
       "/parts/0/limits/forbidden_routes/1",
       "twice"},
      {R"("classes": ["steel", "aluminium"])",
       R"("classes": ["steel", "aluminum"])",
       Code::unknown_name,
       "/parts/0/limits/classes/1",
       "Did you mean \"aluminium\"?"},
      {R"("processes": ["machining"])",
       R"("processes": ["machning"])",
       Code::unknown_name,
       "/parts/0/limits/processes/0",
       "Did you mean \"machining\"?"},
      {R"(["s235jr-as-rolled"])",
       R"(["s235jr"])",
       Code::unknown_name,
       "/parts/0/limits/materials/0",
       "is no material"},
      {R"("fresh water")",
       R"("fresh watr")",
       Code::unknown_name,
       "/parts/0/limits/medium",
       "Did you mean \"fresh water\"?"},
      {R"("galvanising")",
       R"("galvanizing")",
       Code::unknown_name,
       "/parts/0/finishes/1",
       "Did you mean \"galvanising\"?"},
      {R"("saw-cut")",
       R"("sawcut")",
       Code::unknown_name,
       "/parts/0/operations/0/operation",
       "Did you mean \"saw-cut\"?"},
      {R"(["round-bar", "chs"])",
       R"(["round-bar", "csh"])",
       Code::unknown_name,
       "/parts/0/member/stock/1",
       "Did you mean \"chs\"?"},
      {R"("property": "elongation")",
       R"("property": "elongatoin")",
       Code::unknown_name,
       "/parts/0/limits/properties/0/property",
       "Did you mean \"elongation\"?"},
      // bounds on properties
      {R"("at_least": "50 MPa.m^0.5")",
       R"("at_least": "50 MPa")",
       Code::unit_wrong,
       "/parts/0/limits/properties/1/at_least",
       ""},
      {R"("at_least": "50 MPa.m^0.5")",
       R"("at_least": 50)",
       Code::unit_missing,
       "/parts/0/limits/properties/1/at_least",
       "no unit"},
      {R"("at_most": "0.2 GPa.m^0.5")",
       R"("at_most": "2 MPa.m^0.5")",
       Code::conflict,
       "/parts/0/limits/properties/1",
       "no material can hold both"},
      {R"(, "at_least": "8 %" })", "}", Code::missing, "/parts/0/limits/properties/0", "no bound"},
      {R"("medium": "fresh water", )",
       "",
       Code::missing,
       "/parts/0/limits/corrosion_at_least",
       "medium"},
      // what excludes or needs something else
      {R"({ "axial": "-5 kN" })",
       R"({ "axial": "-5 kN", "force": "1 N", "at": "end" })",
       Code::conflict,
       "/parts/0/member/load_cases/0/loads/3",
       "exclude each other"},
      {R"({ "axial": "-5 kN" })",
       R"({ "axail": "-5 kN" })",
       Code::unknown_key,
       "/parts/0/member/load_cases/0/loads/3/axail",
       "Did you mean \"axial\"?"},
      {R"({ "axial": "-5 kN" })",
       "{}",
       Code::missing,
       "/parts/0/member/load_cases/0/loads/3",
       "\"from_preload\""},
      {R"({ "axial": "-5 kN" })",
       R"({ "axial": "-5 kN", "at": "end" })",
       Code::unknown_key,
       "/parts/0/member/load_cases/0/loads/3/at",
       "no such key"},
      {R"(["20 mm", "25 mm"])",
       R"(["20 mm", "70 mm"])",
       Code::out_of_range,
       "/parts/0/member/shapes/2/rectangle/sizes/1",
       "outside the bounds"},
      {R"(["20 mm", "25 mm"])",
       R"(["20 mm", "2 cm"])",
       Code::duplicate,
       "/parts/0/member/shapes/2/rectangle/sizes/1",
       "twice"},
      {R"("force": "655 N", "at": "300 mm")",
       R"("force": "655 N", "at": "500 mm")",
       Code::out_of_range,
       "/parts/0/member/load_cases/0/loads/0/at",
       "beyond the end"},
      {R"("from": "100 mm")",
       R"("from": "end")",
       Code::conflict,
       "/parts/0/member/load_cases/0/loads/2",
       "must lie before"},
      {R"("torque_factor": 0.2 }, "at": "300 mm")",
       R"("torque_factor": 0.2 }, "at": "0 mm")",
       Code::out_of_range,
       "/parts/0/member/load_cases/0/loads/5/at",
       "makes no torque"},
      {R"("name": "direct")",
       R"("name": "all loads")",
       Code::duplicate,
       "/parts/0/member/load_cases/1",
       "its own"},
      {R"("batch": 500)",
       R"("batch": 5000)",
       Code::conflict,
       "/parts/0/batch",
       "larger than the quantity"},
      // tables
      {R"("stock": ["starter"])",
       R"("stock": ["missing.csv"])",
       Code::table_unreadable,
       "/catalogue/stock/0",
       "missing.csv"},
      {R"("routes": ["starter"])",
       R"("routes": ["starter", { "file": "x.csv", "decimal": "," }])",
       Code::conflict,
       "/catalogue/routes/1",
       "the same"},
  };
  return all;
}

}  // namespace

TEST_CASE("each kind of fault in a job has its code, its place and its remedy") {
  for (const Case& test : cases()) {
    INFO(test.from << "  ->  " << test.to);
    const std::vector<Fault> faults = faults_of(with(full_job, test.from, test.to));
    std::string answers;
    for (const Fault& fault : faults) {
      answers += std::to_string(static_cast<int>(fault.code)) + ' ' + fault.text() + '\n';
    }
    INFO(answers);
    const bool found = std::any_of(faults.begin(), faults.end(), [&test](const Fault& fault) {
      const std::size_t blank = fault.where.find(' ');
      return fault.code == test.code && blank != std::string::npos &&
             fault.where.substr(blank + 1) == test.pointer &&
             fault.where.rfind("job.json:", 0) == 0 &&
             fault.message.find(test.message) != std::string::npos;
    });
    CHECK(found);
  }
}

TEST_CASE("one fault gives one message") {
  for (const Case& test : cases()) {
    const std::vector<Fault> faults = faults_of(with(full_job, test.from, test.to));
    INFO(test.from << "  ->  " << test.to);
    // Leaving a key out under another name is two faults: one is missing, one is unknown.
    const bool two = test.to == R"("k": 0.2)" || test.to == R"("atleast": "8 %")";
    const bool unreadable = test.code == Code::conflict && test.pointer == "/catalogue/routes/1";
    // In a job whose currency is unknown nothing else can be said about money.
    std::string answers;
    for (const Fault& fault : faults) {
      answers += fault.text() + '\n';
    }
    INFO(answers);
    CHECK(faults.size() == (two || unreadable ? 2U : 1U));
  }
}

TEST_CASE("all faults of a job are told at once, in the order of reading") {
  const std::string text = R"json({
  "bismar": 1,
  "settings": { "kerf": 3 },
  "parts": [
    { "name": "a", "quantity": -5,
      "member": { "length": "300 Nm", "shapes": [{ "ronud": {} }],
        "load_cases": [{ "support": "cantilever", "loads": [{ "force": 655, "at": "end" }] }] },
      "limits": { "routes": ["forging"] } } ]
})json";
  std::vector<std::string> found;
  for (const Fault& fault : faults_of(text)) {
    found.push_back(fault.where);
  }
  const std::vector<std::string> expected = {
      "job.json:3:25 /settings/kerf",
      "job.json:5:32 /parts/0/quantity",
      "job.json:6:29 /parts/0/member/length",
      "job.json:6:52 /parts/0/member/shapes/0/ronud",
      "job.json:7:72 /parts/0/member/load_cases/0/loads/0/force",
      "job.json:8:30 /parts/0/limits/routes/0",
  };
  CHECK(found == expected);
}

TEST_CASE("a message names what was found and what is allowed") {
  const std::vector<Fault> faults =
      faults_of(with(small_job, R"("length": "300 mm")", R"("length": 300)"));
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].found == "300");
  CHECK(faults[0].text().rfind("job.json:7:19 /parts/0/member/length: the number 300 has no unit. "
                               "Write a length as a text with its unit, such as \"",
                               0) == 0);
}

TEST_CASE("a count beyond every whole type is a whole number all the same") {
  CHECK(faults_of(with(full_job, R"("cycles": 200000)", R"("cycles": 1e30)")).empty());
}

TEST_CASE("a job that is not an object is refused") {
  const std::string text = GENERATE(as<std::string>{}, "[]", "1", "null", "\"job\"");
  const std::vector<Fault> faults = faults_of(text);
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].code == Code::wrong_type);
}

TEST_CASE("a missing section, load or name is asked for") {
  const auto message = [](const std::string& from, const std::string& to) {
    const std::vector<Fault> faults = faults_of(with(small_job, from, to));
    REQUIRE(faults.size() == 1);
    CHECK(faults[0].code == Code::missing);
    return faults[0].message;
  };
  CHECK(message(R"("shapes": [{ "round": {} }],)", "") ==
        "it is not said which sections to try. Give \"shapes\", \"stock\" or both.");
  CHECK(message(R"(, "loads": [{ "force": "655 N", "at": "end" }])", "") ==
        "the load case has no load. Give \"loads\", \"direct\" or both.");
  CHECK(message(R"("name": "bar",)", "") == "the key \"name\" is missing: a text.");
}

TEST_CASE("two parts of one name are refused") {
  const std::string part =
      R"({ "name": "bar", "member": { "length": "1 m", "stock": "all", "load_cases": )"
      R"([{ "support": "pinned", "loads": [{ "axial": "1 kN" }] }] } })";
  const std::vector<Fault> faults =
      faults_of("{\"bismar\": 1, \"parts\": [" + part + "," + part + "]}");
  REQUIRE(faults.size() == 1);
  CHECK(faults[0].code == Code::duplicate);
}

TEST_CASE("a job file that is not there is named") {
  try {
    static_cast<void>(load_job("no/such/job.json"));
    FAIL("an error was expected");
  } catch (const Error& error) {
    REQUIRE(error.faults().size() == 1);
    CHECK(error.faults()[0].code == Code::table_unreadable);
    CHECK(error.faults()[0].text().find("no/such/job.json") != std::string::npos);
  }
}
