// SPDX-License-Identifier: MIT
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::checks {

/// A number as it is printed in the source, and in SI.
struct Printed {
  std::string text;   ///< "10.3 cm2"
  double unit = 1.0;  ///< The unit in SI.
  double si = 0.0;
  std::optional<double> tolerance;  ///< Relative; absent = the check's own.
};

/// One value from outside the project, with where it comes from and how far it was verified.
struct Check {
  std::string id;
  std::string topic;
  std::string title;
  std::map<std::string, Printed> inputs;
  std::map<std::string, std::string> words;   ///< Inputs that are no numbers.
  std::map<std::string, Printed> expected;    ///< As published, rounded.
  std::map<std::string, Printed> recomputed;  ///< The same from an independent script, unrounded.
  double tolerance = 0.0;
  std::string source;
  std::string how_verified;
  std::string seen_part;
  std::string note;

  /// An input in SI; fails the test when the table does not have it.
  [[nodiscard]] double operator[](const std::string& input) const;
  /// Source and verification for a failure message.
  [[nodiscard]] std::string provenance() const;
};

/// Reads a table of checks: comma separated, quoted where needed, one check a row. Throws
/// std::runtime_error with the row for anything that it cannot read.
std::vector<Check> read_checks(const std::string& path);

/// A comma separated table, one map from heading to text a row. Throws std::runtime_error.
std::vector<std::map<std::string, std::string>> read_rows(const std::string& path);

/// "12.5 cm3" in SI; units are those of the tables.
Printed parse_printed(std::string_view text);

/// Answers of the library to one check: output name to SI value.
using Answers = std::map<std::string, double>;

}  // namespace bismar::checks
