// SPDX-License-Identifier: MIT
// Whether one constraint alone leaves nothing of a group.
#include "solver/group_search.hpp"
#include "solver/splitting.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Boxes by the lower bound of one utilisation.
class OneConstraint {
 public:
  OneConstraint(const BoxProblem& problem, std::size_t group, std::uint32_t constraint)
      : problem_(problem),
        group_(group),
        constraint_(constraint),
        variables_(problem.variables(group)),
        open_(variables_.size(), 1, std::numeric_limits<std::size_t>::max()),
        lower_(variables_.size()),
        upper_(variables_.size()),
        objective_lower_(problem.objectives()),
        u_lower_(problem.constraints(group)),
        u_upper_(u_lower_.size()) {}

  bool excludes(double allowed, std::size_t most_boxes, double& least) {
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      const Parts range = whole_range(variables_[v]);
      lower_[v] = range.lower_end;
      upper_[v] = range.upper_begin;
      root_width_.push_back(width_of(variables_[v], lower_[v], upper_[v]));
    }
    // The least bound comes first: once it is above what is allowed, all are.
    add(-infinity);
    for (std::size_t boxes = 1; boxes + 2 <= most_boxes; boxes += 2) {
      const std::uint32_t box = open_.pop();
      least = open_.objective_lower(box)[0];
      if (least > allowed) {
        return true;
      }
      const std::size_t v = widest(box);
      if (v == variables_.size()) {
        return false;
      }
      const auto lower = open_.lower(box);
      const auto upper = open_.upper(box);
      const Parts parts = cut_in_two(variables_[v], lower[v], upper[v]);
      const std::vector<double> from(lower.begin(), lower.end());
      const std::vector<double> to(upper.begin(), upper.end());
      open_.free(box);
      const double parent = least;
      lower_ = from;
      upper_ = to;
      upper_[v] = parts.lower_end;
      add(parent);
      lower_ = from;
      upper_ = to;
      lower_[v] = parts.upper_begin;
      add(parent);
    }
    least = open_.objective_lower(open_.pop())[0];
    return least > allowed;
  }

 private:
  void add(double parent) {
    problem_.bound(group_,
                   {.count = 1, .lower = lower_, .upper = upper_},
                   {.objective_lower = objective_lower_,
                    .utilisation_lower = u_lower_,
                    .utilisation_upper = u_upper_});
    const std::uint32_t box = open_.make();
    std::copy(lower_.begin(), lower_.end(), open_.lower(box).begin());
    std::copy(upper_.begin(), upper_.end(), open_.upper(box).begin());
    const double own = u_lower_[constraint_];
    open_.objective_lower(box)[0] = own > parent ? own : parent;
    open_.push(box, open_.objective_lower(box)[0]);
  }

  [[nodiscard]] std::size_t widest(std::uint32_t box) {
    std::size_t best = variables_.size();
    double best_share = 0.0;
    for (std::size_t v = 0; v < variables_.size(); ++v) {
      const double lower = open_.lower(box)[v];
      const double upper = open_.upper(box)[v];
      const double share =
          lower < upper ? width_of(variables_[v], lower, upper) / root_width_[v] : 0.0;
      if (share > best_share) {
        best_share = share;
        best = v;
      }
    }
    return best;
  }

  const BoxProblem& problem_;
  std::size_t group_;
  std::uint32_t constraint_;
  std::span<const Variable> variables_;
  OpenBoxes open_;
  std::vector<double> lower_;
  std::vector<double> upper_;
  std::vector<double> root_width_;
  std::vector<double> objective_lower_;
  std::vector<double> u_lower_;
  std::vector<double> u_upper_;
};

}  // namespace

bool excludes_all(const BoxProblem& problem,
                  std::size_t group,
                  std::uint32_t constraint,
                  double allowed,
                  std::size_t most_boxes,
                  double& least) {
  return OneConstraint(problem, group, constraint).excludes(allowed, most_boxes, least);
}

}  // namespace bismar
