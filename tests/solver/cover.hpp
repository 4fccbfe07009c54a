// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/certified_front.hpp>

#include <algorithm>
#include <cmath>
#include <functional>
#include <span>
#include <vector>

namespace bismar::test {

/// The promise of `CertifyOptions`, written down once more from its words.
[[nodiscard]] inline bool keeps_promise(const std::vector<CertifiedPoint>& points,
                                        std::span<const double> objectives,
                                        double epsilon,
                                        std::span<const double> absolute = {}) {
  return std::any_of(points.begin(), points.end(), [&](const CertifiedPoint& p) {
    for (std::size_t j = 0; j < objectives.size(); ++j) {
      const double a = absolute.empty() ? 0.0 : absolute[j];
      if (!(p.objectives[j] <= objectives[j] + std::max(epsilon * std::abs(objectives[j]), a))) {
        return false;
      }
    }
    return true;
  });
}

[[nodiscard]] inline bool dominates_objectives(const std::vector<double>& a,
                                               const std::vector<double>& b) {
  return a != b &&
         std::equal(a.begin(), a.end(), b.begin(), [](double p, double q) { return p <= q; });
}

/// Values of a variable for a grid: all of a set, all whole numbers, `count` of a continuous one
/// with both sides of each breakpoint.
[[nodiscard]] inline std::vector<double> grid_values(const Variable& variable, std::size_t count) {
  if (variable.kind == Variable::Kind::ordered_set) {
    return variable.values;
  }
  std::vector<double> out;
  if (variable.kind == Variable::Kind::integer) {
    for (double x = std::ceil(variable.lower); x <= variable.upper; ++x) {
      out.push_back(x);
    }
    return out;
  }
  for (std::size_t i = 0; i < count; ++i) {
    const double share = static_cast<double>(i) / static_cast<double>(count - 1);
    out.push_back(std::clamp(variable.lower + share * (variable.upper - variable.lower),
                             variable.lower,
                             variable.upper));
  }
  for (const double at : variable.breakpoints) {
    out.push_back(at);
    out.push_back(std::nextafter(at, variable.upper));
  }
  return out;
}

/// Calls `visit(x, objectives, utilisations)` at every point of the grid.
template <class Visit>
void for_each_grid_point(const BoxProblem& problem,
                         std::size_t group,
                         std::size_t count,
                         Visit&& visit) {
  std::vector<std::vector<double>> values;
  for (const auto& variable : problem.variables(group)) {
    values.push_back(grid_values(variable, count));
  }
  std::vector<std::size_t> at(values.size());
  std::vector<double> x(values.size());
  std::vector<double> f(problem.objectives());
  std::vector<double> u(problem.constraints(group));
  bool more = true;
  while (more) {
    for (std::size_t v = 0; v < x.size(); ++v) {
      x[v] = values[v][at[v]];
    }
    problem.evaluate(group, x, f, u);
    visit(x, f, u);
    more = false;
    for (std::size_t v = 0; v < x.size() && !more; ++v) {
      more = ++at[v] < values[v].size();
      at[v] = more ? at[v] : 0U;
    }
  }
}

[[nodiscard]] inline bool all_at_most(std::span<const double> u, double limit) {
  return std::all_of(u.begin(), u.end(), [&](double value) { return value <= limit; });
}

/// What the words of `GroupFront` promise of any solved or infeasible group, held against a grid:
/// soundness, mutual non-dominance, order, cover. Returns the number of violations.
[[nodiscard]] inline std::size_t violations(const BoxProblem& problem,
                                            std::size_t group,
                                            const GroupFront& front,
                                            const CertifyOptions& options,
                                            std::size_t grid) {
  std::size_t wrong = 0;
  std::vector<double> f(problem.objectives());
  std::vector<double> u(problem.constraints(group));
  for (std::size_t p = 0; p < front.points.size(); ++p) {
    const auto& point = front.points[p];
    problem.evaluate(group, point.x, f, u);
    wrong += all_at_most(u, 1.0) && f == point.objectives && u == point.utilisations ? 0U : 1U;
    for (const auto& other : front.points) {
      wrong += dominates_objectives(other.objectives, point.objectives) ? 1U : 0U;
    }
    wrong += p > 0 && point.objectives < front.points[p - 1].objectives ? 1U : 0U;
  }
  for_each_grid_point(problem, group, grid, [&](const auto&, const auto& at, const auto& limits) {
    if (all_at_most(limits, 1.0 - options.delta)) {
      wrong += keeps_promise(front.points, at, options.epsilon, options.absolute) ? 0U : 1U;
    }
  });
  return wrong;
}

}  // namespace bismar::test
