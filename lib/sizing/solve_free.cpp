// SPDX-License-Identifier: MIT
#include "sizing/free_problem.hpp"
#include "sizing/study.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Points that no other of the list beats, by mass; ties are kept.
void keep_non_dominated(std::vector<Outcome::Point>& points) {
  std::sort(points.begin(), points.end(), [](const auto& a, const auto& b) {
    return std::tie(a.mass, a.cost, a.size, a.free_sizes) <
           std::tie(b.mass, b.cost, b.size, b.free_sizes);
  });
  double cheapest = infinity;
  std::vector<Outcome::Point> kept;
  for (const auto& point : points) {
    const bool tie =
        !kept.empty() && kept.back().mass == point.mass && kept.back().cost == point.cost;
    if (point.cost < cheapest || tie) {
      cheapest = point.cost;
      kept.push_back(point);
    }
  }
  points = std::move(kept);
}

}  // namespace

Outcome solve_free(SizingProblem& problem,
                   const Candidate& candidate,
                   const RunOptions& run,
                   Incumbent* incumbent,
                   Solved& solved) {
  Outcome out;
  out.candidate = candidate;
  out.searched = true;
  solved.searched = true;
  const Shape& shape = problem.part().body.shapes[candidate.shape];
  const auto middle = middle_sizes(shape);
  const auto& base = problem.add(candidate, 1.0, middle);
  const FreeSizeProblem free(problem, base);
  const auto& settings = problem.settings();
  if (!free.missing().empty() || !free.open_limits().empty()) {
    out.kind =
        settings.missing == Missing::exclude ? Outcome::Kind::excluded : Outcome::Kind::undecided;
    out.reason = missing_text(free.missing(), free.open_limits());
    problem.remove_last();
    return out;
  }
  CertifyOptions options;
  options.epsilon = shape.sizes.kind == Sizes::Kind::continuous ? settings.epsilon : 0.0;
  if (machines_blank(problem.catalogue().routes[candidate.route])) {
    // A part is cut from the lightest blank that holds it, so that a point of a heavier blank may
    // stand for nothing but a point of a lighter one: each within the root of what is promised.
    options.epsilon = std::sqrt(1.0 + options.epsilon) - 1.0;
  }
  options.delta = settings.delta;
  options.near = settings.near;
  options.stop = run.stop;
  options.explain = settings.explain == Explain::full;
  options.one_point = run.reductions.one_point;
  options.directions = run.reductions.directions;
  out.least_utilisation = infinity;
  out.reason = "no size in the range asked for";
  bool skipped = false;
  for (std::size_t g = 0; g < free.groups(); ++g) {
    const auto found = certified_group(free, g, options, incumbent);
    solved.boxes += found.boxes;
    solved.evaluations += found.evaluations;
    skipped = skipped || found.state == GroupState::skipped;
    if (found.state == GroupState::infeasible && found.least_utilisation < out.least_utilisation) {
      out.least_utilisation = found.least_utilisation;
      out.reason =
          found.excluded_by == no_index ? "several limits together" : free.label(found.excluded_by);
    }
    solved.incomplete = solved.incomplete || found.state == GroupState::incomplete;
    if (found.state == GroupState::skipped) {
      continue;  // what it had found by then depends on when the others' points came
    }
    for (const auto& point : found.points) {
      // A part is cut from the lightest blank that holds it: what fits a lighter one is that
      // mode's.
      if (!free.has_own_blank(g, point.x)) {
        continue;
      }
      const auto sizes = free.sizes(g, point.x);
      out.points.push_back({sizes.height,
                            sizes.free_sizes,
                            point.objectives[0],
                            point.objectives[1],
                            found.epsilon_reached});
    }
  }
  problem.remove_last();
  keep_non_dominated(out.points);
  // Each is what the candidate with these ratios says on its plain path, which knows the lightest
  // blank for instance.
  for (auto& point : out.points) {
    const auto& own = problem.add(candidate, point.size, point.free_sizes);
    point.size = listed_size(own.variable, point.size).value_or(point.size);
    std::vector<double> objectives(2);
    std::vector<double> utilisations(own.constraints.size());
    problem.evaluate_plain(problem.groups() - 1, point.size, objectives, utilisations);
    point.mass = objectives[0];
    point.cost = objectives[1];
    if (!(*std::max_element(utilisations.begin(), utilisations.end()) <= 1.0)) {
      point.mass = infinity;
      out.reason = "INTERNAL: the plain path does not confirm it";
    }
    problem.remove_last();
  }
  std::erase_if(out.points, [](const auto& point) { return point.mass == infinity; });
  keep_non_dominated(out.points);
  out.partly_skipped = skipped;
  out.kind = !out.points.empty() ? Outcome::Kind::feasible
             : skipped           ? Outcome::Kind::skipped
                                 : Outcome::Kind::infeasible;
  return out;
}

}  // namespace bismar
