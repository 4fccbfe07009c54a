// SPDX-License-Identifier: MIT
#include <bismar/pareto/front.hpp>

#include <bismar/error.hpp>
#include <bismar/pareto/dominance.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <utility>

namespace bismar {
namespace {

struct Row {
  double f1;
  double f2;
  std::uint32_t index;
  std::uint32_t group;

  [[nodiscard]] bool has_objectives_of(const Row& other) const {
    return f1 == other.f1 && f2 == other.f2;
  }
};

/// By (group, f1, f2, index). Written with < only, so that -0.0 and 0.0 are one value.
bool is_before(const Row& a, const Row& b) {
  if (a.group != b.group) {
    return a.group < b.group;
  }
  if (a.f1 != b.f1) {
    return a.f1 < b.f1;
  }
  if (a.f2 != b.f2) {
    return a.f2 < b.f2;
  }
  return a.index < b.index;
}

void check(std::span<const double> objectives, FaultList& faults) {
  if (objectives.size() % 2 != 0) {
    faults.add({Code::invalid_argument,
                "objectives",
                std::to_string(objectives.size()) + " values",
                "two values per row",
                "there are " + std::to_string(objectives.size()) +
                    " values, an odd number; give two for each row"});
  }
  if (objectives.size() / 2 > std::numeric_limits<std::uint32_t>::max()) {
    faults.add({Code::invalid_argument,
                "objectives",
                std::to_string(objectives.size() / 2) + " rows",
                "at most 4294967295 rows",
                "there are more rows than a row index can count; split the table"});
  }
  for (std::size_t i = 0; i < objectives.size(); ++i) {
    if (std::isnan(objectives[i])) {
      faults.add({Code::not_finite,
                  "objectives[" + std::to_string(i / 2) + "][" + std::to_string(i % 2) + "]",
                  "NaN",
                  "a number or an infinity",
                  "the objective is not a number; leave the row out or give its value"});
    }
  }
}

/// The rows that survive, in the order of `is_before`.
std::vector<Row> non_dominated(std::vector<Row> rows) {
  std::sort(rows.begin(), rows.end(), is_before);
  std::size_t kept = 0;
  for (const Row& row : rows) {
    // The row kept last has the least f2 of its group so far, and no lower f1 comes later: a row
    // survives if it lowers f2 or is equal to that one.
    const bool is_first = kept == 0 || rows[kept - 1].group != row.group;
    if (is_first || row.f2 < rows[kept - 1].f2 || row.has_objectives_of(rows[kept - 1])) {
      rows[kept++] = row;
    }
  }
  rows.resize(kept);
  return rows;
}

std::vector<Row> make_rows(std::span<const double> objectives,
                           std::span<const std::uint32_t> group_ids) {
  std::vector<Row> rows;
  rows.reserve(objectives.size() / 2);
  for (std::size_t i = 0; 2 * i < objectives.size(); ++i) {
    rows.push_back({objectives[2 * i],
                    objectives[2 * i + 1],
                    static_cast<std::uint32_t>(i),
                    group_ids.empty() ? 0U : group_ids[i]});
  }
  return rows;
}

}  // namespace

bool dominates(std::span<const double> a, std::span<const double> b) {
  if (a.size() != b.size()) {
    throw Error(Fault{Code::conflict,
                      "b",
                      std::to_string(b.size()) + " objectives",
                      std::to_string(a.size()) + " objectives",
                      "the vectors have " + std::to_string(a.size()) + " and " +
                          std::to_string(b.size()) + " objectives; compare vectors of one length"});
  }
  bool is_better = false;
  for (std::size_t i = 0; i < a.size(); ++i) {
    if (!(a[i] <= b[i])) {
      return false;
    }
    is_better = is_better || a[i] < b[i];
  }
  return is_better;
}

std::vector<std::uint32_t> front_2d(std::span<const double> objectives) {
  FaultList faults;
  check(objectives, faults);
  faults.throw_if_any();

  std::vector<std::uint32_t> result;
  for (const Row& row : non_dominated(make_rows(objectives, {}))) {
    result.push_back(row.index);
  }
  return result;
}

GroupedFronts grouped_front_2d(std::span<const double> objectives,
                               std::span<const std::uint32_t> group_ids) {
  FaultList faults;
  check(objectives, faults);
  if (group_ids.size() != objectives.size() / 2) {
    faults.add({Code::conflict,
                "group_ids",
                std::to_string(group_ids.size()) + " group ids",
                std::to_string(objectives.size() / 2) + " group ids",
                "there are " + std::to_string(group_ids.size()) + " group ids for " +
                    std::to_string(objectives.size() / 2) + " rows; give one for each row"});
  }
  faults.throw_if_any();

  GroupedFronts result;
  for (const Row& row : non_dominated(make_rows(objectives, group_ids))) {
    if (result.groups.empty() || result.groups.back() != row.group) {
      result.groups.push_back(row.group);
      result.starts.push_back(result.rows.size());
    }
    result.rows.push_back(row.index);
    result.starts.back() = result.rows.size();
  }
  return result;
}

}  // namespace bismar
