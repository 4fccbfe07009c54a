// SPDX-License-Identifier: MIT
#include "sizing/stock_solver.hpp"

#include "sizing/stock_walk.hpp"

#include <bismar/error.hpp>

namespace bismar {

StockSolver::StockSolver(const SizingProblem& problem)
    : problem_(problem), slots_(std::make_unique<Slot[]>(problem.catalogue().stock.size())) {}

StockSolver::~StockSolver() = default;

const StockDemands& StockSolver::demands_of(std::size_t list) const {
  Slot& slot = slots_[list];
  std::call_once(slot.once, [&] {
    slot.demands = std::make_unique<const StockDemands>(problem_, problem_.catalogue().stock[list]);
  });
  return *slot.demands;
}

GroupSolution StockSolver::solve(std::size_t group, Counts* counts) const {
  const auto& compiled = problem_.compiled(group);
  if (compiled.candidate.stock == Candidate::none) {
    throw InternalError("a candidate that is not out of stock was given to the stock solver");
  }
  Counts own;
  Counts& used = counts != nullptr ? *counts : own;
  if (compiled.pieces.empty()) {
    ++used.whole_walks;
    return solve_exact(problem_, group);
  }
  return StockWalk(problem_, group, demands_of(compiled.candidate.stock), used).run();
}

}  // namespace bismar
