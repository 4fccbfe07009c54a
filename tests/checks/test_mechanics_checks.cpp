// SPDX-License-Identifier: MIT
// Every mechanics check from outside the project: values, sources and how far each was verified are
// in data/mechanics.csv and are shown by a failure.
#include "checks/check_table.hpp"
#include "checks/mechanics_answers.hpp"

#include "support/catch.hpp"

#include <cmath>
#include <map>
#include <string>
#include <vector>

namespace bismar::checks {

namespace {

std::optional<Answers> answer(const Check& check) {
  for (auto* topic :
       {section_answers, beam_answers, index_answers, stress_answers, column_answers}) {
    if (std::optional<Answers> answers = topic(check)) {
      return answers;
    }
  }
  return std::nullopt;
}

const std::vector<Check>& all_checks() {
  static const std::vector<Check> checks =
      read_checks(std::string(BISMAR_CHECKS_DIR) + "/data/mechanics.csv");
  return checks;
}

bool agrees(double found, const Printed& wanted, double tolerance) {
  return std::abs(found - wanted.si) <= tolerance * std::abs(wanted.si);
}

void compare(const Check& check) {
  const std::optional<Answers> answers = answer(check);
  INFO(check.provenance());
  REQUIRE(answers.has_value());
  REQUIRE_FALSE(check.expected.empty());
  for (const auto& [output, wanted] : check.expected) {
    const auto found = answers->find(output);
    INFO("output " << output << ", published " << wanted.text);
    REQUIRE(found != answers->end());
    INFO("found " << found->second / wanted.unit);
    CHECK(agrees(found->second, wanted, wanted.tolerance.value_or(check.tolerance)));
  }
}

}  // namespace

TEST_CASE("Every published mechanics value is met within its rounding") {
  for (const Check& check : all_checks()) {
    compare(check);
  }
}

TEST_CASE("Every independently recomputed mechanics value is met to five digits") {
  for (const Check& check : all_checks()) {
    const std::optional<Answers> answers = answer(check);
    INFO(check.provenance());
    REQUIRE(answers.has_value());
    for (const auto& [output, wanted] : check.recomputed) {
      INFO("output " << output << ", recomputed " << wanted.text);
      INFO("found " << answers->at(output) / wanted.unit);
      CHECK(agrees(answers->at(output), wanted, wanted.tolerance.value_or(1e-5)));
    }
  }
}

TEST_CASE("The table of mechanics checks is whole") {
  std::map<std::string, int> by_topic;
  for (const Check& check : all_checks()) {
    ++by_topic[check.topic];
    CHECK_FALSE(check.source.empty());
    CHECK_FALSE(check.how_verified.empty());
  }
  CHECK(by_topic.size() == 12);
  CHECK(all_checks().size() == 171);
}

}  // namespace bismar::checks
