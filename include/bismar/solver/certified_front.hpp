// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/numeric/parallel.hpp>
#include <bismar/solver/box_problem.hpp>

#include <cstddef>
#include <cstdint>
#include <functional>
#include <limits>
#include <memory>
#include <span>
#include <stop_token>
#include <vector>

namespace bismar {

/// What a certified front must reach, and how.
///
/// The promise, for every x whose utilisations are all <= 1 - delta: some point p of the front has
/// p_j <= f_j(x) + max(epsilon |f_j(x)|, absolute_j) in every objective j; and every point of the
/// front has every utilisation <= 1 as `evaluate` computes it.
struct CertifyOptions {
  double epsilon = 1e-3;              ///< Relative tolerance, >= 0 (0: on sets only), < 1.
  std::vector<double> absolute = {};  ///< a_j >= 0, one an objective; empty: all 0.
  double delta = 1e-6;                ///< Margin, 0 <= delta < 1.
  /// beta >= 0: points within this of the front are wanted too, so that a group is skipped only
  /// beyond max(epsilon, near).
  double near = 0.05;
  /// Whether an infeasible group is asked which constraint alone excludes it, which takes as long
  /// again.
  bool explain = true;
  /// Boxes a group may take; a group that needs more is returned incomplete with what it reached.
  std::size_t boxes_per_group = 1'000'000;
  /// Boxes kept at a time in a group; with more it goes on depth first.
  std::size_t boxes_kept = 8192;

  // Reductions. Each leaves the promise as it is; switched off in tests to compare.
  bool one_point = true;   ///< Where objectives agree: one point, polished.
  bool directions = true;  ///< The size direction is solved for, not split.
  bool skipping = true;    ///< A group is left as soon as the others' points beat all its boxes.

  unsigned threads = 1;    ///< 0: as the machine has.
  Executor executor = {};  ///< The host's threads.
  std::stop_token stop = {};
  /// Called with the share of groups done in [0, 1], at most about 20 times a second, by one thread
  /// at a time, which may be any of those at work.
  std::function<void(double)> progress = {};
};

/// Why and how far a group was searched.
enum class GroupState : std::uint8_t {
  solved,      ///< Its points keep the promise for it.
  infeasible,  ///< Proven: no x has every utilisation <= 1 - delta.
  skipped,     ///< Nothing of it is within max(epsilon, near) of the points of other groups.
  incomplete,  ///< Stopped, or out of boxes: its points are feasible, the promise is not kept.
};

/// A feasible point.
struct CertifiedPoint {
  std::uint32_t group = 0;
  std::vector<double> x;             ///< [variables]
  std::vector<double> objectives;    ///< [objectives]
  std::vector<double> utilisations;  ///< [constraints]
};

struct GroupFront {
  GroupState state = GroupState::infeasible;
  /// Mutually non-dominated; by objectives, then x. Of a skipped group what it had found. With
  /// epsilon = 0 every non-dominated x, ties among them; otherwise points closer together than a
  /// quarter of the tolerance may be left out; one point where the objectives agree.
  std::vector<CertifiedPoint> points = {};
  /// An epsilon >= 0 with which the points found keep the promise, as bounded when boxes were
  /// discarded; infinity where some box has no point at all.
  double epsilon_reached = 0.0;
  /// Infeasible: a constraint that alone is above 1 - delta everywhere (the first in order), or
  /// no_index where only several together are; and the least it can be, as bounded.
  std::uint32_t excluded_by = no_index;
  double least_utilisation = 0.0;
  std::size_t boxes = 0;
  std::size_t evaluations = 0;
};

/// Feasible points of all groups so far, shared by the threads at work: what they beat may be
/// skipped. Never part of a result, so that the order in which points come changes the time only.
class BISMAR_API Incumbent {
 public:
  /// @param margin  max(epsilon, near).  @param absolute  One an objective, or empty.
  Incumbent(std::size_t objectives, double margin, std::vector<double> absolute = {});
  ~Incumbent();
  Incumbent(const Incumbent&) = delete;
  Incumbent& operator=(const Incumbent&) = delete;
  Incumbent(Incumbent&&) = delete;
  Incumbent& operator=(Incumbent&&) = delete;

  /// A feasible point's objectives. From any thread.
  void add(std::span<const double> objectives);
  /// Whether a point q has q_j + max(margin |q_j|, absolute_j) < lower_j in every j. From any
  /// thread.
  [[nodiscard]] bool beats(std::span<const double> lower) const;

 private:
  struct Implementation;
  std::unique_ptr<Implementation> implementation_;
};

/// Searches one group by branch and bound. A pure function of the problem, the group and the
/// options (threads, executor and progress aside), unless `incumbent` skips it or a stop comes.
///
/// @param incumbent  Points of other groups, or null. This group's points are added to it.
/// @throws bismar::Error  all faults of the options and of the group's variables.
[[nodiscard]] BISMAR_API GroupFront certified_group(const BoxProblem& problem,
                                                    std::size_t group,
                                                    const CertifyOptions& options = {},
                                                    Incumbent* incumbent = nullptr);

/// The certified front over all groups.
struct CertifiedFront {
  std::vector<CertifiedPoint> points;  ///< By objectives, then group, then x. Ties are kept.
  /// Points of the groups' own fronts within `near` of the front and not on it, same order.
  std::vector<CertifiedPoint> near_points;
  bool complete = true;          ///< No group is incomplete.
  double epsilon_reached = 0.0;  ///< Largest of the groups that were not skipped.
  struct Counts {
    std::size_t solved = 0;
    std::size_t infeasible = 0;
    std::size_t skipped = 0;  ///< Depends on threads and time.
    std::size_t incomplete = 0;
    std::size_t boxes = 0;        ///< Depends on threads and time.
    std::size_t evaluations = 0;  ///< Depends on threads and time.
  };
  Counts counts;  ///< Telemetry, not part of the answer.
};

/// Result by definition: for each group its own front is what `certified_group` returns for it
/// alone; the answer is the non-dominated subset of their union, and what is near it. Groups are
/// searched in the order of an optimistic front (lower bounds of their whole boxes). Points do not
/// depend on threads, on the executor, or on `skipping`; nor on the order of the groups but for the
/// numbers that name them.
[[nodiscard]] BISMAR_API CertifiedFront certified_front(const BoxProblem& problem,
                                                        const CertifyOptions& options = {});

}  // namespace bismar
