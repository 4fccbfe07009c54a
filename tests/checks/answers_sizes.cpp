// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/catalogue/preferred_sizes.hpp>
#include <bismar/catalogue/stock.hpp>
#include <bismar/catalogue/tolerance.hpp>

#include <charconv>
#include <cmath>
#include <cstddef>
#include <optional>
#include <stdexcept>
#include <string>
#include <system_error>
#include <vector>

namespace bismar::checks {

namespace {

std::string series_of(double n) { return "R" + std::to_string(std::lround(n)); }

Answers series(const Check& check) {
  const std::string name = series_of(check["n"]);
  Answers answers = {{"ratio", preferred_step(name)}};
  const std::vector<double> values = preferred_numbers(name, 1.0, 9.999, 1.0);
  for (std::size_t i = 0; i < values.size(); ++i) {
    answers["series_" + std::to_string(i + 1)] = values[i];
  }
  return answers;
}

Answers neighbours(const Check& check) {
  Answers answers;
  for (const char* name : {"R5", "R10", "R20", "R40"}) {
    answers[std::string("up_") + name] = preferred_at_least(name, check["x"]);
    answers[std::string("down_") + name] = preferred_at_most(name, check["x"]);
  }
  return answers;
}

/// The grade in "standard tolerance IT6 (h6: 0 / -IT)".
int grade_in(const std::string& title) {
  const std::size_t at = title.find("IT");
  int grade = 0;
  if (at == std::string::npos ||
      std::from_chars(title.data() + at + 2, title.data() + title.size(), grade).ec !=
          std::errc{}) {
    throw std::runtime_error("no grade in \"" + title + "\"");
  }
  return grade;
}

/// At the upper end of each range of sizes, which belongs to it.
Answers tolerances(const Check& check) {
  const int grade = grade_in(check.title);
  Answers answers;
  for (int range = 1;; ++range) {
    const std::string name = "size_ranges_" + std::to_string(range);
    if (check.inputs.count(name + "_2") == 0) {
      return answers;
    }
    const double low = check[name + "_1"];
    const double high = check[name + "_2"];
    const double value = standard_tolerance(grade, high);
    // The whole range has one value; a difference inside it must show.
    const bool same = standard_tolerance(grade, low + 0.001 * (high - low)) == value &&
                      standard_tolerance(grade, 0.5 * (low + high)) == value;
    if (same) {
      answers["IT_" + std::to_string(range)] = value;
    }
  }
}

Answers bright_bar(const Check& check) {
  const SizeLimits limits = shaft_limits(check.words.at("class"), check["d"]);
  return {{"upper", limits.upper},
          {"lower", limits.lower},
          {"min_area_ratio", least_area_ratio(limits, check["d"])}};
}

}  // namespace

std::optional<Answers> size_answers(const Check& check) {
  if (!starts_with(check.id, "PRF-")) {
    return std::nullopt;
  }
  if (check.words.count("class") != 0) {
    return bright_bar(check);
  }
  if (check.inputs.count("n") != 0) {
    return series(check);
  }
  return check.inputs.count("x") != 0 ? neighbours(check) : tolerances(check);
}

}  // namespace bismar::checks
