// SPDX-License-Identifier: MIT
#include "evolve/search_space.hpp"

#include <algorithm>
#include <cmath>

namespace bismar {

namespace {

/// Sizes that span more than a decade are searched by ratio: half of a linear search would
/// otherwise go into the largest half.
constexpr double widest_linear_ratio = 10.0;

/// The whole part of `at`, where `at` == `count` still belongs to the last one.
std::size_t rank(double at, std::size_t count) {
  return std::min(static_cast<std::size_t>(std::max(at, 0.0)), count - 1);
}

double value_at(const Variable& variable, double share) {
  if (variable.kind == Variable::Kind::ordered_set) {
    const auto count = variable.values.size();
    return variable.values[rank(share * static_cast<double>(count), count)];
  }
  const double lower = variable.lower;
  const double upper = variable.upper;
  if (variable.kind == Variable::Kind::integer) {
    const double first = std::ceil(lower);
    const double last = std::floor(upper);
    return std::clamp(first + std::floor(share * (last - first + 1.0)), first, last);
  }
  const double x = lower > 0.0 && upper > widest_linear_ratio * lower
                       ? lower * std::pow(upper / lower, share)
                       : lower * (1.0 - share) + upper * share;
  return std::clamp(x, lower, upper);
}

}  // namespace

SearchSpace::SearchSpace(const BoxProblem& problem, std::vector<std::size_t> groups)
    : problem_(problem), groups_(std::move(groups)) {
  for (const auto group : groups_) {
    shares_ = std::max(shares_, problem.variables(group).size());
  }
}

std::size_t SearchSpace::decode(std::span<const double> values, std::vector<double>& x) const {
  const auto group =
      groups_.size() == 1 ? groups_.front() : groups_[rank(values[shares_], groups_.size())];
  const auto variables = problem_.variables(group);
  x.resize(variables.size());
  for (std::size_t v = 0; v < x.size(); ++v) {
    x[v] = value_at(variables[v], values[v]);
  }
  return group;
}

}  // namespace bismar
