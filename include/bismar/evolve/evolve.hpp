// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/solver/box_problem.hpp>

#include <cstddef>
#include <cstdint>
#include <functional>
#include <stop_token>
#include <vector>

namespace bismar {

/// The evolutionary algorithms on offer.
enum class EvolveAlgorithm : std::uint8_t {
  nsga2,  ///< Deb et al., IEEE Transactions on Evolutionary Computation 6 (2002) 182-197.
  moead,  ///< Li and Zhang, IEEE Transactions on Evolutionary Computation 13 (2009) 284-302.
};

/// How long to search, and from where.
struct EvolveOptions {
  EvolveAlgorithm algorithm = EvolveAlgorithm::nsga2;
  std::size_t population = 100;   ///< Individuals: a multiple of 4, at least 8, at most 1e6.
  std::size_t generations = 200;  ///< Rounds after the first population, at most 1e9.
  std::uint32_t seed = 20240229;  ///< Same seed, same binary, same problem: same result.
  /// Groups to search, each once; empty = every group.
  std::vector<std::size_t> groups = {};
  /// Generations between two entries of the trace; 0 = no trace.
  std::size_t trace_every = 10;
  /// Reference point of the hypervolume [objectives], finite. Empty: the largest value of each
  /// objective among all feasible points met in the run; the result states it.
  std::vector<double> reference = {};
  /// Called with the share done in [0, 1] after every generation, from the calling thread.
  std::function<void(double)> progress = {};
  std::stop_token stop = {};  ///< Looked at after every generation.
};

/// A feasible point that the search met.
struct EvolvedPoint {
  std::size_t group = 0;
  std::vector<double> x = {};             ///< [variables of the group]
  std::vector<double> objectives = {};    ///< [objectives], finite.
  std::vector<double> utilisations = {};  ///< [constraints of the group], all <= 1.
  friend bool operator==(const EvolvedPoint&, const EvolvedPoint&) = default;
};

/// How far the search had come.
struct HypervolumeStep {
  std::size_t generation = 0;   ///< 0 = the first population.
  std::size_t evaluations = 0;  ///< Made up to then.
  double hypervolume = 0.0;     ///< Of the front known then, against EvolvedFront::reference.
  friend bool operator==(const HypervolumeStep&, const HypervolumeStep&) = default;
};

/// What an evolutionary search found. It is heuristic: every point is feasible and no point
/// dominates another, but better ones may exist and nothing bounds how much better.
struct EvolvedFront {
  static constexpr bool exact = false;
  /// Non-dominated among all feasible points that were evaluated, by (objectives, group, x). Points
  /// with equal objectives are ties and all kept; the same x of the same group appears once.
  std::vector<EvolvedPoint> points = {};
  std::vector<double> reference = {};       ///< [objectives]; empty when nothing feasible was met.
  std::vector<HypervolumeStep> trace = {};  ///< By generation; never falls. See trace_every.
  std::size_t evaluations = 0;              ///< Calls of BoxProblem::evaluate.
  std::size_t feasible_evaluations = 0;     ///< Those that met u <= 1 with finite objectives.
  std::size_t generations = 0;              ///< Finished.
  bool stopped = false;                     ///< The stop token ended it early.
};

/// Searches the front of all groups of a problem at once by an evolutionary algorithm.
///
/// The group is a categorical variable; the other variables are as many as the largest group has,
/// and a smaller group reads the first ones. A continuous variable is searched evenly between its
/// bounds, or evenly in its logarithm when it is positive and upper > 10 lower. An ordered set is
/// searched by rank, so its spacing does not matter. Of the problem only `evaluate` is asked,
/// never `bound` or a trend: on small problems it is a second opinion on the exact engine.
///
/// Constraints act by penalty. The algorithm sees each objective f of a feasible point as
///
///     g = f / (s + |f|)    in (-1, 1),
///
/// with s the median of the finite |f| of the first population (1 where that is 0), and every
/// objective of an infeasible point as
///
///     g = 1 + (1/n) sum v / (1 + v)    in (1, 2],    v = max(0, u - 1).
///
/// The sum runs over the constraints and, as the last of n terms, over whether the objectives are
/// finite (0 or 1). Both forms keep the order of their kind and every feasible point dominates
/// every infeasible one, so that no weight has to be chosen. Points returned are kept with their
/// own objectives, not with g.
///
/// Operators: NSGA-II crosses over with probability 0.95 (distribution index 10) and mutates one
/// variable in the mean (index 50); MOEA/D has the Chebyshev decomposition and 20 neighbours at
/// most. MOEA/D recombines by differences, which say little about categories: prefer NSGA-II where
/// there are many groups.
///
/// Everything runs in the calling thread. Time beside the evaluations: O(points log points) a
/// generation with two objectives; O(population x points x objectives) with more, and the
/// hypervolume grows fast beyond three objectives (lower or switch off the trace).
///
/// @throws bismar::Error  All faults of the arguments at once. unsupported: fewer than two
///   objectives ("objectives"); empty: no group ("groups"), no variable or an ordered set without
///   values ("groups[g].variables[v]"); out_of_range: "population", "generations", "groups" (no
///   such group), a variable with lower > upper; duplicate: a group named twice; not_finite: bounds
///   of a variable, "reference"; conflict: length of "reference". During the search: not_finite
///   when the problem evaluates to NaN ("groups[g]", with the x). What `evaluate` throws passes
///   through.
/// @throws bismar::InternalError  the library below refuses what was checked here.
[[nodiscard]] BISMAR_API EvolvedFront evolve(const BoxProblem& problem,
                                             const EvolveOptions& options = {});

}  // namespace bismar
