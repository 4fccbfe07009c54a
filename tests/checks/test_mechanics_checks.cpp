// SPDX-License-Identifier: MIT
// Every mechanics check from outside the project: values, sources and how far each was verified are
// in data/ and are shown by a failure. `-c beams` runs one table; `[table]` prints what passed.
#include "checks/check_table.hpp"
#include "checks/mechanics_answers.hpp"

#include "support/catch.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <iomanip>
#include <iostream>
#include <map>
#include <optional>
#include <string>
#include <vector>

namespace bismar::checks {

namespace {

using Answer = std::optional<Answers> (*)(const Check&);

/// One table of checks: how many it must hold, so that none is lost, and who answers.
struct Table {
  const char* name;
  std::size_t checks;
  std::vector<Answer> answers;
};

const std::vector<Table>& tables() {
  static const std::vector<Table> list = {
      {"sections", 80, {polygon_answers, section_answers}},
      {"beams", 34, {beam_answers}},
      {"columns", 44, {column_answers}},
      {"stability", 72, {stability_answers, aluminium_timber_answers}},
      {"stress", 9, {stress_answers}},
      {"indices", 31, {index_answers}},
      {"sizes", 17, {size_answers}},
      {"fatigue", 32, {fatigue_answers}},
      {"notches", 17, {notch_answers}},
      {"fracture", 21, {fracture_answers}},
      {"vibration", 16, {vibration_answers}},
      {"temperature", 6, {temperature_answers}},
      {"bolts", 14, {bolt_answers}},
      {"corrosion", 1, {corrosion_answers}},
  };
  return list;
}

std::vector<Check> checks_of(const Table& table) {
  return read_checks(std::string(BISMAR_CHECKS_DIR) + "/data/" + table.name + ".csv");
}

std::optional<Answers> answer(const Table& table, const Check& check) {
  for (const Answer& topic : table.answers) {
    if (std::optional<Answers> answers = topic(check)) {
      return answers;
    }
  }
  return std::nullopt;
}

bool agrees(double found, const Printed& wanted, double tolerance) {
  return std::abs(found - wanted.si) <= tolerance * std::abs(wanted.si);
}

void compare(const Check& check,
             const Answers& answers,
             const std::map<std::string, Printed>& values,
             double tolerance) {
  for (const auto& [output, wanted] : values) {
    const auto found = answers.find(output);
    INFO("output " << output << ", wanted " << wanted.text);
    if (found == answers.end()) {
      FAIL_CHECK(check.id << " is not answered for " << output);
      continue;
    }
    INFO("found " << found->second / wanted.unit);
    CHECK(agrees(found->second, wanted, wanted.tolerance.value_or(tolerance)));
  }
}

}  // namespace

TEST_CASE("Every published mechanics value is met within its rounding") {
  for (const Table& table : tables()) {
    DYNAMIC_SECTION(table.name) {
      for (const Check& check : checks_of(table)) {
        INFO(check.provenance());
        const std::optional<Answers> answers = answer(table, check);
        if (!answers) {
          FAIL_CHECK(check.id << " is not answered");
          continue;
        }
        CHECK_FALSE(check.expected.empty());
        compare(check, *answers, check.expected, check.tolerance);
      }
    }
  }
}

TEST_CASE("Every independently recomputed mechanics value is met to five digits") {
  for (const Table& table : tables()) {
    DYNAMIC_SECTION(table.name) {
      for (const Check& check : checks_of(table)) {
        INFO(check.provenance());
        if (const std::optional<Answers> answers = answer(table, check)) {
          compare(check, *answers, check.recomputed, 1e-5);
        }
      }
    }
  }
}

TEST_CASE("The tables of mechanics checks are whole") {
  for (const Table& table : tables()) {
    INFO(table.name);
    const std::vector<Check> checks = checks_of(table);
    CHECK(checks.size() == table.checks);
    for (const Check& check : checks) {
      INFO(check.id);
      CHECK_FALSE(check.source.empty());
      CHECK_FALSE(check.how_verified.empty());
    }
  }
}

TEST_CASE("The checks by topic, their values and their tolerances", "[.][table]") {
  struct Row {
    int checks = 0;
    int values = 0;
    int passed = 0;
    double tightest = 1.0;
    double widest = 0.0;
    double worst = 0.0;
  };
  std::map<std::string, Row> rows;
  for (const Table& table : tables()) {
    for (const Check& check : checks_of(table)) {
      Row& row = rows[check.topic.substr(check.topic.find(' ') + 1)];
      ++row.checks;
      const std::optional<Answers> answers = answer(table, check);
      for (const auto& [output, wanted] : check.expected) {
        ++row.values;
        const double tolerance = wanted.tolerance.value_or(check.tolerance);
        row.tightest = std::min(row.tightest, tolerance);
        row.widest = std::max(row.widest, tolerance);
        if (!answers || answers->count(output) == 0) {
          continue;
        }
        const double found = answers->at(output);
        row.passed += agrees(found, wanted, tolerance) ? 1 : 0;
        if (wanted.si != 0.0) {
          row.worst = std::max(row.worst, std::abs(found / wanted.si - 1.0));
        }
      }
    }
  }
  std::cout << std::left << std::setw(48) << "topic" << std::right << std::setw(8) << "checks"
            << std::setw(8) << "values" << std::setw(8) << "passed" << std::setw(22) << "tolerance"
            << std::setw(12) << "worst" << '\n';
  for (const auto& [topic, row] : rows) {
    std::cout << std::left << std::setw(48) << topic << std::right << std::setw(8) << row.checks
              << std::setw(8) << row.values << std::setw(8) << row.passed << std::setw(10)
              << row.tightest << " to " << std::setw(8) << row.widest << std::setw(12)
              << std::setprecision(2) << row.worst << '\n';
    CHECK(row.passed == row.values);
  }
}

}  // namespace bismar::checks
