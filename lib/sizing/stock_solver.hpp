// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"
#include "sizing/stock_demands.hpp"

#include <bismar/export.hpp>
#include <bismar/solver/box_problem.hpp>

#include <cstddef>
#include <memory>
#include <mutex>
#include <vector>

namespace bismar {

/// Solves candidates out of stock: the same answer as solve_exact(), found by looking closely at
/// few sizes only.
///
/// 1. Sizes that a separable bound excludes are never evaluated (StockDemands, one comparison a
///    bound, size and load case; a relative 1e-9 is left for rounding).
/// 2. The others are walked by rising area. One that a feasible size before beats (no worse in mass
///    and cost, better in one) is not evaluated: it is not among the answers whether feasible or
///    not. The walk ends where every size to come is beaten: mass is at least density * area *
///    length, and cost at least that of a part without offcut and with the least perimeter of its
///    area.
/// 3. Of the rest the limit state that failed last is looked at first; a size that passes it is
///    evaluated in full, by SizingProblem::evaluate.
///
/// Where nothing is feasible the first constraint that fails everywhere is looked for by itself,
/// and where each can be met alone the two that clash, both by rising bounds: a size whose bound is
/// above the least value found so far is not evaluated.
///
/// The problem must outlive it and keep its stock and loads; groups may come and go, and materials
/// may change. Concurrent calls of solve() are allowed.
class BISMAR_API StockSolver {
 public:
  explicit StockSolver(const SizingProblem& problem);
  ~StockSolver();
  StockSolver(const StockSolver&) = delete;
  StockSolver& operator=(const StockSolver&) = delete;
  StockSolver(StockSolver&&) = delete;
  StockSolver& operator=(StockSolver&&) = delete;

  /// What a solution took.
  struct Counts {
    std::size_t sizes = 0;     ///< Of the candidate.
    std::size_t excluded = 0;  ///< By separable bounds.
    std::size_t beaten = 0;    ///< By a feasible size, or beyond the end of the walk.
    std::size_t checked = 0;   ///< Held against one limit state only.
    std::size_t evaluated = 0;
    std::size_t whole_walks = 0;  ///< Left to solve_exact(): candidates without any size.
  };

  /// @param group  A group of the problem whose candidate is out of stock, nothing undecided.
  /// @return As solve_exact() gives it, but for `evaluations`, which are those made.
  [[nodiscard]] GroupSolution solve(std::size_t group, Counts* counts = nullptr) const;

 private:
  struct Slot {
    std::once_flag once;
    std::unique_ptr<const StockDemands> demands;
  };
  [[nodiscard]] const StockDemands& demands_of(std::size_t list) const;

  const SizingProblem& problem_;
  std::unique_ptr<Slot[]> slots_;  ///< [stock lists of the catalogue]
};

}  // namespace bismar
