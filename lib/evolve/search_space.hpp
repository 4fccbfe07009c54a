// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/solver/box_problem.hpp>

#include <cstddef>
#include <span>
#include <utility>
#include <vector>

namespace bismar {

/// The groups of a problem laid over one vector of numbers: shares in [0, 1] for as many variables
/// as the largest group has, then the group where there are several.
class SearchSpace {
 public:
  /// `groups` are valid, and so are their variables.
  SearchSpace(const BoxProblem& problem, std::vector<std::size_t> groups);

  [[nodiscard]] std::size_t groups() const { return groups_.size(); }
  /// Numbers in all. A single group has no number of its own: the algorithms refuse one that cannot
  /// vary.
  [[nodiscard]] std::size_t numbers() const { return shares_ + (groups_.size() > 1 ? 1 : 0); }

  /// @param values  [numbers()]; the group's in [0, groups()].
  /// @param x       Becomes the variables of the group.
  /// @return The group, as the problem counts it.
  std::size_t decode(std::span<const double> values, std::vector<double>& x) const;

 private:
  const BoxProblem& problem_;
  std::vector<std::size_t> groups_;
  std::size_t shares_ = 0;
};

}  // namespace bismar
