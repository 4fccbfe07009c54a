// SPDX-License-Identifier: MIT
#include <bismar/solver/certified_front.hpp>

#include "solver/certify_faults.hpp"
#include "solver/group_search.hpp"
#include "solver/splitting.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>
#include <mutex>
#include <numeric>
#include <string>
#include <utility>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Calls the host's progress now and then, one call at a time.
class Progress {
 public:
  Progress(const std::function<void(double)>& report, std::size_t groups)
      : report_(report), groups_(groups) {}

  void group_done() {
    if (!report_) {
      return;
    }
    const std::scoped_lock lock(mutex_);
    ++done_;
    const auto now = std::chrono::steady_clock::now();
    if (done_ == groups_ || now - last_ >= std::chrono::milliseconds(50)) {
      last_ = now;
      report_(static_cast<double>(done_) / static_cast<double>(groups_));
    }
  }

 private:
  const std::function<void(double)>& report_;
  std::size_t groups_;
  std::mutex mutex_;
  std::size_t done_ = 0;
  std::chrono::steady_clock::time_point last_ = {};
};

/// Lower bounds of whole groups, [groups x objectives]; infinity where nothing is feasible.
std::vector<double> root_bounds(const BoxProblem& problem, const CertifyOptions& options) {
  const std::size_t k = problem.objectives();
  std::vector<double> out(problem.groups() * k, infinity);
  parallel_for_chunks(
      problem.groups(),
      {.chunk = 16, .threads = options.threads, .executor = options.executor, .stop = options.stop},
      [&](std::size_t begin, std::size_t end, std::size_t /*chunk*/) {
        std::vector<double> lower;
        std::vector<double> upper;
        for (std::size_t group = begin; group < end; ++group) {
          lower.clear();
          upper.clear();
          for (const auto& variable : problem.variables(group)) {
            const Parts range = whole_range(variable);
            lower.push_back(range.lower_end);
            upper.push_back(range.upper_begin);
          }
          const auto row = std::span(out).subspan(group * k, k);
          std::uint32_t broken = no_index;
          problem.contract(group,
                           1.0 - options.delta,
                           {.count = 1,
                            .lower = lower,
                            .upper = upper,
                            .objective_lower = row,
                            .broken = std::span(&broken, 1)});
          for (double& bound : row) {
            bound = broken != no_index ? infinity : std::isnan(bound) ? -infinity : bound;
          }
        }
      });
  return out;
}

/// Groups in the order in which they are searched: the front of the bounds, then what is least by
/// the sum of shares of the least bounds. The order changes the time only.
std::vector<std::uint32_t> search_order(const std::vector<double>& bounds, std::size_t k) {
  const std::size_t n = bounds.size() / k;
  std::vector<double> least(k, infinity);
  for (std::size_t i = 0; i < bounds.size(); ++i) {
    const double size = std::abs(bounds[i]);
    least[i % k] = size > 0.0 ? std::min(least[i % k], size) : least[i % k];
  }
  std::vector<double> sums(n);
  for (std::size_t g = 0; g < n; ++g) {
    for (std::size_t j = 0; j < k; ++j) {
      // Two infinities of unlike sign would make no number.
      const double bound = std::clamp(bounds[g * k + j], -1e300, 1e300);
      sums[g] += std::isfinite(least[j]) ? bound / least[j] : 0.0;
    }
  }
  std::vector<bool> foremost(n);
  if (k == 2) {
    for (const std::uint32_t g : front_2d(bounds)) {
      foremost[g] = true;
    }
  }
  std::vector<std::uint32_t> order(n);
  std::iota(order.begin(), order.end(), 0U);
  std::sort(order.begin(), order.end(), [&](std::uint32_t a, std::uint32_t b) {
    if (foremost[a] != foremost[b]) {
      return static_cast<bool>(foremost[a]);
    }
    return sums[a] != sums[b] ? sums[a] < sums[b] : a < b;
  });
  return order;
}

bool comes_before(const CertifiedPoint& a, const CertifiedPoint& b) {
  if (a.objectives != b.objectives) {
    return a.objectives < b.objectives;
  }
  return a.group != b.group ? a.group < b.group : a.x < b.x;
}

/// Which of the points, ordered, are non-dominated; ties are.
std::vector<bool> non_dominated(const std::vector<CertifiedPoint>& points, std::size_t k) {
  std::vector<bool> out(points.size());
  if (k == 2) {
    std::vector<double> rows;
    rows.reserve(2 * points.size());
    for (const auto& point : points) {
      rows.insert(rows.end(), point.objectives.begin(), point.objectives.end());
    }
    for (const std::uint32_t row : front_2d(rows)) {
      out[row] = true;
    }
    return out;
  }
  // In this order a point can be dominated by an earlier one only.
  std::vector<std::size_t> kept;
  for (std::size_t p = 0; p < points.size(); ++p) {
    const auto& f = points[p].objectives;
    const bool dominated = std::any_of(kept.begin(), kept.end(), [&](std::size_t q) {
      const auto& other = points[q].objectives;
      return other != f &&
             std::equal(
                 other.begin(), other.end(), f.begin(), [](double a, double b) { return a <= b; });
    });
    if (!dominated) {
      out[p] = true;
      kept.push_back(p);
    }
  }
  return out;
}

void count(const GroupFront& group, CertifiedFront& out) {
  auto& counts = out.counts;
  switch (group.state) {
    case GroupState::solved:
      ++counts.solved;
      break;
    case GroupState::infeasible:
      ++counts.infeasible;
      break;
    case GroupState::skipped:
      ++counts.skipped;
      break;
    case GroupState::incomplete:
      ++counts.incomplete;
      out.complete = false;
      break;
  }
  if (group.state != GroupState::skipped) {
    out.epsilon_reached = std::max(out.epsilon_reached, group.epsilon_reached);
  }
  counts.boxes += group.boxes;
  counts.evaluations += group.evaluations;
}

/// The front of the groups' points, and what is near it.
void merge(std::vector<GroupFront>& groups, const CertifyOptions& options, CertifiedFront& out) {
  std::vector<CertifiedPoint> all;
  for (auto& group : groups) {
    count(group, out);
    // What a skipped group had found is beaten by others, by more than the margin of nearness.
    if (group.state != GroupState::skipped) {
      std::move(group.points.begin(), group.points.end(), std::back_inserter(all));
    }
  }
  if (all.empty()) {
    return;
  }
  std::sort(all.begin(), all.end(), comes_before);
  const std::size_t k = all.front().objectives.size();
  const auto kept = non_dominated(all, k);
  Incumbent beyond(k, options.near, options.absolute);
  for (std::size_t p = 0; p < all.size(); ++p) {
    if (kept[p]) {
      beyond.add(all[p].objectives);
    }
  }
  for (std::size_t p = 0; p < all.size(); ++p) {
    if (kept[p]) {
      out.points.push_back(std::move(all[p]));
    } else if (!beyond.beats(all[p].objectives)) {
      out.near_points.push_back(std::move(all[p]));
    }
  }
}

}  // namespace

GroupFront certified_group(const BoxProblem& problem,
                           std::size_t group,
                           const CertifyOptions& options,
                           Incumbent* incumbent) {
  FaultList faults;
  add_option_faults(options, problem.objectives(), faults);
  if (group >= problem.groups()) {
    faults.add(Code::out_of_range,
               "group",
               "There are " + std::to_string(problem.groups()) + " groups, counted from 0.");
  } else {
    add_group_faults(problem, group, options, faults);
  }
  faults.throw_if_any();
  const FloatingPointGuard guard;
  return GroupSearch(problem, group, options, incumbent).run();
}

CertifiedFront certified_front(const BoxProblem& problem, const CertifyOptions& options) {
  FaultList faults;
  add_option_faults(options, problem.objectives(), faults);
  for (std::size_t group = 0; group < problem.groups(); ++group) {
    add_group_faults(problem, group, options, faults);
  }
  faults.throw_if_any();

  // Groups that a stop leaves untouched are incomplete.
  std::vector<GroupFront> groups(
      problem.groups(), GroupFront{.state = GroupState::incomplete, .epsilon_reached = infinity});
  const auto order = search_order(root_bounds(problem, options), problem.objectives());
  Incumbent incumbent(
      problem.objectives(), std::max(options.epsilon, options.near), options.absolute);
  Progress progress(options.progress, groups.size());
  parallel_for_chunks(
      order.size(),
      {.chunk = 1, .threads = options.threads, .executor = options.executor, .stop = options.stop},
      [&](std::size_t begin, std::size_t end, std::size_t /*chunk*/) {
        for (std::size_t i = begin; i < end; ++i) {
          groups[order[i]] = GroupSearch(problem, order[i], options, &incumbent).run();
          progress.group_done();
        }
      });
  CertifiedFront out;
  merge(groups, options, out);
  return out;
}

}  // namespace bismar
