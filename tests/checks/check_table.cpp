// SPDX-License-Identifier: MIT
#include "checks/check_table.hpp"

#include <algorithm>
#include <charconv>
#include <cstddef>
#include <fstream>
#include <iterator>
#include <numbers>
#include <stdexcept>
#include <utility>

namespace bismar::checks {

namespace {

// The units of the tables, from their definitions (inch 25.4 mm, pound-force 4.4482216152605 N). An
// own table, so that a fault in the library's unit parser cannot hide a fault in a check.
double unit_in_si(const std::string& unit) {
  constexpr double inch = 0.0254;
  constexpr double lbf = 4.4482216152605;
  static const std::map<std::string, double> units = {{"", 1.0},
                                                      {"m", 1.0},
                                                      {"mm", 1e-3},
                                                      {"cm", 1e-2},
                                                      {"mm2", 1e-6},
                                                      {"cm2", 1e-4},
                                                      {"mm3", 1e-9},
                                                      {"cm3", 1e-6},
                                                      {"mm4", 1e-12},
                                                      {"cm4", 1e-8},
                                                      {"1e5.mm4", 1e-7},
                                                      {"mm6", 1e-18},
                                                      {"N", 1.0},
                                                      {"kN", 1e3},
                                                      {"N.m", 1.0},
                                                      {"N.mm", 1e-3},
                                                      {"kN.m", 1e3},
                                                      {"N/mm", 1e3},
                                                      {"kN/m", 1e3},
                                                      {"kN/m2", 1e3},
                                                      {"kPa", 1e3},
                                                      {"MPa", 1e6},
                                                      {"GPa", 1e9},
                                                      {"rad", 1.0},
                                                      {"deg", std::numbers::pi / 180.0},
                                                      {"eps", 1.0},
                                                      {"in", inch},
                                                      {"in2", inch * inch},
                                                      {"in3", inch * inch * inch},
                                                      {"ft", 12.0 * inch},
                                                      {"kip", 1e3 * lbf},
                                                      {"kip.in", 1e3 * lbf * inch},
                                                      {"kip.ft", 12e3 * lbf * inch},
                                                      {"lbf.in", lbf * inch},
                                                      {"psi", lbf / (inch * inch)},
                                                      {"ksi", 1e3 * lbf / (inch * inch)},
                                                      {"Mlbf/in", 1e6 * lbf / inch},
                                                      {"kip/in", 1e3 * lbf / inch},
                                                      {"in4", inch * inch * inch * inch},
                                                      {"dm6", 1e-6},
                                                      {"1e9.mm6", 1e-9},
                                                      {"um", 1e-6},
                                                      {"mm^0.5", 0.031622776601683794},
                                                      {"in^0.5", 0.15937377450509228},
                                                      {"Hz", 1.0},
                                                      {"V", 1.0},
                                                      {"C", 1.0},
                                                      {"kg", 1.0},
                                                      {"kg/m3", 1.0},
                                                      {"Mg/m3", 1e3},
                                                      {"MPa.m^0.5", 1e6},
                                                      {"MPa^(2/3).m3/Mg", 10.0},
                                                      {"b tf/(h tw)", 1.0}};
  const auto found = units.find(unit);
  if (found == units.end()) {
    throw std::runtime_error("unit \"" + unit + "\" is not in the table of check units");
  }
  return found->second;
}

std::string trimmed(std::string_view text) {
  const std::size_t first = text.find_first_not_of(' ');
  if (first == std::string_view::npos) {
    return {};
  }
  return std::string(text.substr(first, text.find_last_not_of(' ') - first + 1));
}

std::optional<double> number_in(std::string_view text, std::string_view* rest) {
  double value = 0.0;
  const auto result = std::from_chars(text.data(), text.data() + text.size(), value);
  if (result.ec != std::errc{}) {
    return std::nullopt;
  }
  *rest = text.substr(static_cast<std::size_t>(result.ptr - text.data()));
  return value;
}

/// One record of a comma separated file with quotes; false at the end of the text.
bool next_record(const std::string& text, std::size_t& at, std::vector<std::string>& fields) {
  fields.assign(1, {});
  if (at >= text.size()) {
    return false;
  }
  bool quoted = false;
  for (; at < text.size(); ++at) {
    const char c = text[at];
    if (quoted && c == '"' && at + 1 < text.size() && text[at + 1] == '"') {
      fields.back() += c;
      ++at;
    } else if (c == '"') {
      quoted = !quoted;
    } else if (!quoted && c == ',') {
      fields.emplace_back();
    } else if (!quoted && c == '\n') {
      ++at;
      return true;
    } else {
      fields.back() += c;
    }
  }
  return true;
}

using Pairs = std::vector<std::pair<std::string, std::string>>;

/// "a=1 mm; b=2" into name and text.
Pairs split_pairs(const std::string& text) {
  Pairs pairs;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find("; ", at), text.size());
    const std::string item = text.substr(at, end - at);
    const std::size_t equals = item.find('=');
    if (equals == std::string::npos) {
      throw std::runtime_error("\"" + item + "\" is no name=value");
    }
    pairs.emplace_back(trimmed(item.substr(0, equals)), trimmed(item.substr(equals + 1)));
    at = end + 2;
  }
  return pairs;
}

std::map<std::string, Printed> printed_values(const std::string& text) {
  std::map<std::string, Printed> values;
  for (auto& [name, value] : split_pairs(text)) {
    values[name] = parse_printed(value);
  }
  return values;
}

Check make_check(const std::map<std::string, std::string>& row) {
  Check check;
  check.id = row.at("id");
  check.topic = row.at("topic");
  check.title = row.at("title");
  for (auto& [name, value] : split_pairs(row.at("inputs"))) {
    std::string_view rest;
    // A list such as "8.8, 10.9" or a formula such as "1.77-1.04psi" is a word, not a number with a
    // unit.
    if (number_in(value, &rest) && rest.substr(0, 1) != "," && rest.substr(0, 1) != "-") {
      check.inputs[name] = parse_printed(value);
    } else {
      check.words[name] = value;
    }
  }
  check.expected = printed_values(row.at("expected"));
  check.recomputed = printed_values(row.at("recomputed"));
  check.tolerance = parse_printed(row.at("relative tolerance")).si;
  check.source = row.at("source");
  check.how_verified = row.at("how verified");
  check.seen_part = row.at("seen part");
  check.note = row.at("note");
  return check;
}

std::string whole_file(const std::string& path) {
  std::ifstream file(path, std::ios::binary);
  if (!file) {
    throw std::runtime_error("cannot open " + path);
  }
  return {std::istreambuf_iterator<char>(file), std::istreambuf_iterator<char>()};
}

}  // namespace

Printed parse_printed(std::string_view text) {
  Printed result;
  const std::size_t mark = text.find('@');
  result.text = trimmed(text.substr(0, mark));
  std::string_view rest;
  const std::optional<double> value = number_in(result.text, &rest);
  if (!value) {
    throw std::runtime_error("\"" + std::string(text) + "\" does not begin with a number");
  }
  result.unit = unit_in_si(trimmed(rest));
  result.si = *value * result.unit;
  if (mark != std::string_view::npos) {
    result.tolerance = number_in(text.substr(mark + 1), &rest);
    if (!result.tolerance) {
      throw std::runtime_error("\"" + std::string(text) + "\" has no tolerance after @");
    }
  }
  return result;
}

double Check::operator[](const std::string& input) const {
  const auto found = inputs.find(input);
  if (found == inputs.end()) {
    throw std::runtime_error(id + " has no input " + input);
  }
  return found->second.si;
}

std::string Check::provenance() const {
  return id + ", " + title + ". Source: " + source + ". Verified: " + how_verified +
         " (seen: " + seen_part + "). " + note;
}

std::vector<std::map<std::string, std::string>> read_rows(const std::string& path) {
  const std::string text = whole_file(path);
  std::vector<std::map<std::string, std::string>> rows;
  std::vector<std::string> header;
  std::vector<std::string> fields;
  std::size_t at = 0;
  next_record(text, at, header);
  while (next_record(text, at, fields)) {
    if (fields.size() != header.size()) {
      throw std::runtime_error(path + ": a row has " + std::to_string(fields.size()) +
                               " fields under " + std::to_string(header.size()) + " headings");
    }
    std::map<std::string, std::string>& row = rows.emplace_back();
    for (std::size_t i = 0; i < header.size(); ++i) {
      row[header[i]] = fields[i];
    }
  }
  return rows;
}

std::vector<Check> read_checks(const std::string& path) {
  std::vector<Check> checks;
  for (const auto& row : read_rows(path)) {
    try {
      checks.push_back(make_check(row));
    } catch (const std::exception& fault) {
      throw std::runtime_error(path + ", " + row.at("id") + ": " + fault.what());
    }
  }
  return checks;
}

}  // namespace bismar::checks
