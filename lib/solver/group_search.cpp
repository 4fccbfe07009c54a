// SPDX-License-Identifier: MIT
#include "solver/group_search.hpp"

#include "solver/pieces.hpp"
#include "solver/splitting.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Share of its range to which every variable is cut before an objective that may still be zero or
/// less is taken for one that reaches zero.
constexpr double narrow = 1e-6;

/// Boxes whose points are tried in any case, and afterwards one in so many.
constexpr std::size_t always_tried = 32;
constexpr std::size_t tried_each = 4;

/// A variable without effect so far keeps this share of the greatest one, so that none starves.
constexpr double least_effect = 0.1;

}  // namespace

GroupSearch::GroupSearch(const BoxProblem& problem,
                         std::size_t group,
                         const CertifyOptions& options,
                         Incumbent* incumbent)
    : problem_(problem),
      group_(group),
      options_(options),
      incumbent_(incumbent),
      variables_(problem.variables(group)),
      n_(variables_.size()),
      k_(problem.objectives()),
      m_(problem.constraints(group)),
      allowed_(1.0 - options.delta),
      absolute_(options.absolute.empty() ? std::vector<double>(k_) : options.absolute),
      has_continuous_(std::any_of(
          variables_.begin(),
          variables_.end(),
          [](const Variable& variable) { return variable.kind == Variable::Kind::continuous; })),
      one_point_(options.one_point && options.epsilon > 0.0 && problem.objectives_agree(group)),
      size_(problem.size_direction(group)),
      settled_(options.directions ? size_ : no_index),
      front_(n_,
             k_,
             m_,
             options.epsilon,
             absolute_,
             one_point_               ? Keep::best_one
             : options.epsilon == 0.0 ? Keep::exact
                                      : Keep::spaced),
      open_(n_, k_, options.boxes_kept),
      scale_(k_, 1.0),
      effect_(n_, -1.0),
      batch_lower_(most_children * n_),
      batch_upper_(most_children * n_),
      batch_objectives_(most_children * k_, -infinity),
      columns_lower_(most_children * n_),
      columns_upper_(most_children * n_),
      columns_objectives_(most_children * k_),
      x_(n_),
      f_(k_),
      u_(m_),
      least_seen_(m_, infinity) {
  for (const auto& variable : variables_) {
    const Parts range = whole_range(variable);
    root_width_.push_back(width_of(variable, range.lower_end, range.upper_begin));
  }
  read_trends();
}

GroupFront GroupSearch::run() {
  const End end = search();
  if (one_point_ && end == End::done) {
    polish_found();
    polish_starts();
  }
  GroupFront out;
  for (std::size_t i = 0; i < open_.waiting() && end == End::stopped; ++i) {
    reached_ = std::max(reached_, front_.needed(open_.objective_lower(open_.waiting(i))));
  }
  for (std::size_t p = 0; p < front_.size(); ++p) {
    const auto x = front_.x(p);
    const auto f = front_.objectives(p);
    const auto u = front_.utilisations(p);
    out.points.push_back({.group = static_cast<std::uint32_t>(group_),
                          .x = {x.begin(), x.end()},
                          .objectives = {f.begin(), f.end()},
                          .utilisations = {u.begin(), u.end()}});
  }
  std::sort(out.points.begin(), out.points.end(), [](const auto& a, const auto& b) {
    return a.objectives != b.objectives ? a.objectives < b.objectives : a.x < b.x;
  });
  out.epsilon_reached = reached_;
  out.state = end == End::stopped  ? GroupState::incomplete
              : end == End::beaten ? GroupState::skipped
              : front_.empty()     ? GroupState::infeasible
                                   : GroupState::solved;
  if (out.state == GroupState::infeasible && options_.explain) {
    explain(out);
  }
  out.boxes = boxes_;
  out.evaluations = evaluations_;
  return out;
}

GroupSearch::End GroupSearch::search() {
  add_root();
  while (!open_.empty()) {
    if (options_.stop.stop_requested() || boxes_ >= options_.boxes_per_group) {
      return End::stopped;
    }
    if (is_beaten()) {
      return End::beaten;
    }
    parent_count_ = 0;
    child_count_ = 0;
    while (parent_count_ < cut_at_once && !open_.empty()) {
      take_next();
    }
    contract_batch();
  }
  return End::done;
}

void GroupSearch::add_root() {
  for (std::size_t v = 0; v < n_; ++v) {
    const Parts range = whole_range(variables_[v]);
    batch_lower_[v] = range.lower_end;
    batch_upper_[v] = range.upper_begin;
  }
  child_count_ = 1;
  parent_count_ = 0;
  contract_batch();
}

/// Objectives are added up as shares of what they are at least, or of what they are in the middle.
void GroupSearch::set_scales() {
  for (std::size_t v = 0; v < n_; ++v) {
    x_[v] = middle_of(variables_[v], batch_lower_[v], batch_upper_[v]);
  }
  bool looked = false;
  for (std::size_t j = 0; j < k_; ++j) {
    double size = columns_objectives_[j];
    if (!(size > 0.0 && std::isfinite(size))) {
      if (!looked) {
        problem_.evaluate(group_, x_, f_, u_);
        ++evaluations_;
        looked = true;
      }
      size = std::abs(f_[j]);
    }
    scale_[j] = size > 0.0 && std::isfinite(size) ? size : 1.0;
  }
}

double GroupSearch::promise_of(std::span<const double> objective_lower) const {
  double sum = 0.0;
  for (std::size_t j = 0; j < k_; ++j) {
    if (objective_lower[j] == -infinity) {
      return -infinity;
    }
    sum += objective_lower[j] / scale_[j];
  }
  return sum;
}

void GroupSearch::take_next() {
  const std::uint32_t box = open_.pop();
  if (box == unbeaten_) {
    unbeaten_ = no_index;
  }
  if (is_covered(box)) {
    open_.free(box);
    return;
  }
  // Where one polished point is all that is wanted, points matter little once it is found: the
  // boxes only prove it.
  if (++taken_ == polished_after && one_point_) {
    polish_found();
  }
  const bool worth =
      !one_point_ || taken_ <= always_tried || taken_ % (front_.empty() ? 2 : tried_each) == 0;
  const bool decided = worth && try_points(box);
  const std::uint32_t variable = decided || is_covered(box) ? no_index : choose_variable(box);
  if (variable == no_index && !worth && !is_covered(box)) {
    try_points(box);
  }
  if (variable == no_index) {
    open_.free(box);
    return;
  }
  check_above_zero(box);
  const auto lower = open_.lower(box);
  const auto upper = open_.upper(box);
  const auto objectives = open_.objective_lower(box);
  const Parts parts = cut_in_two(variables_[variable], lower[variable], upper[variable]);
  for (const bool is_upper : {false, true}) {
    const auto n = static_cast<std::ptrdiff_t>(n_);
    const auto c = static_cast<std::ptrdiff_t>(child_count_);
    std::copy(lower.begin(), lower.end(), batch_lower_.begin() + c * n);
    std::copy(upper.begin(), upper.end(), batch_upper_.begin() + c * n);
    std::copy(objectives.begin(),
              objectives.end(),
              batch_objectives_.begin() + c * static_cast<std::ptrdiff_t>(k_));
    (is_upper ? batch_lower_ : batch_upper_)[child_count_ * n_ + variable] =
        is_upper ? parts.upper_begin : parts.lower_end;
    ++child_count_;
  }
  parents_[parent_count_++] = {.variable = variable,
                               .share = share_of_width(variable, lower[variable], upper[variable]),
                               .sum = promise_of(objectives)};
  open_.free(box);
}

void GroupSearch::contract_batch() {
  const std::size_t count = child_count_;
  if (count == 0) {
    return;
  }
  for (std::size_t c = 0; c < count; ++c) {
    for (std::size_t v = 0; v < n_; ++v) {
      columns_lower_[v * count + c] = batch_lower_[c * n_ + v];
      columns_upper_[v * count + c] = batch_upper_[c * n_ + v];
    }
  }
  std::fill_n(broken_.begin(), count, no_index);
  problem_.contract(group_,
                    allowed_,
                    {.count = count,
                     .lower = std::span(columns_lower_).first(n_ * count),
                     .upper = std::span(columns_upper_).first(n_ * count),
                     .objective_lower = std::span(columns_objectives_).first(k_ * count),
                     .broken = std::span(broken_).first(count)});
  boxes_ += count;
  if (parent_count_ == 0 && broken_[0] == no_index) {
    set_scales();
  }
  for (std::size_t c = 0; c < count; ++c) {
    if (broken_[c] != no_index) {
      continue;
    }
    const std::uint32_t box = open_.make();
    const auto lower = open_.lower(box);
    const auto upper = open_.upper(box);
    const auto objectives = open_.objective_lower(box);
    bool is_empty = false;
    for (std::size_t v = 0; v < n_; ++v) {
      lower[v] = std::max(columns_lower_[v * count + c], batch_lower_[c * n_ + v]);
      upper[v] = std::min(columns_upper_[v * count + c], batch_upper_[c * n_ + v]);
      is_empty = is_empty || !snap_inward(variables_[v], lower[v], upper[v]);
    }
    for (std::size_t j = 0; j < k_; ++j) {
      // A part is never better than the whole; nothing is known where the bound is no number.
      const double own = columns_objectives_[j * count + c];
      objectives[j] = own > batch_objectives_[c * k_ + j] ? own : batch_objectives_[c * k_ + j];
      is_empty = is_empty || own == infinity;
    }
    if (parent_count_ > 0 && !is_empty) {
      learn(c / 2, promise_of(objectives) - parents_[c / 2].sum);
    }
    if (is_empty || is_covered(box)) {
      open_.free(box);
    } else {
      open_.push(box, promise_of(objectives));
    }
  }
}

void GroupSearch::learn(std::size_t parent, double gain) {
  const auto& from = parents_[parent];
  if (!std::isfinite(gain) || !(from.share > 0.0)) {
    return;
  }
  double& effect = effect_[from.variable];
  const double seen = gain / from.share;
  effect = effect < 0.0 ? seen : effect + 0.25 * (seen - effect);
}

bool GroupSearch::is_covered(std::uint32_t box) {
  double needed = 0.0;
  if (!front_.covers(open_.objective_lower(box), needed)) {
    return false;
  }
  reached_ = std::max(reached_, needed);
  return true;
}

/// Whether all that is open and all that was found is beaten by points of other groups. Never box
/// by box: what is found here would then depend on when the others' points came.
bool GroupSearch::is_beaten() {
  if (incumbent_ == nullptr || !options_.skipping) {
    return false;
  }
  if (unbeaten_ != no_index && !incumbent_->beats(open_.objective_lower(unbeaten_))) {
    return false;
  }
  for (std::size_t i = 0; i < open_.waiting(); ++i) {
    const std::uint32_t box = open_.waiting(i);
    if (!incumbent_->beats(open_.objective_lower(box))) {
      unbeaten_ = box;
      return false;
    }
  }
  for (std::size_t p = 0; p < front_.size(); ++p) {
    if (!incumbent_->beats(front_.objectives(p))) {
      return false;
    }
  }
  return true;
}

/// A box cut fine that may still reach zero would be cut for ever.
void GroupSearch::check_above_zero(std::uint32_t box) {
  const auto bounds = open_.objective_lower(box);
  for (std::size_t j = 0; j < k_ && has_continuous_; ++j) {
    if (absolute_[j] > 0.0 || bounds[j] > 0.0 || bounds[j] == -infinity) {
      continue;
    }
    for (std::size_t v = 0; v < n_; ++v) {
      const double lower = open_.lower(box)[v];
      const double upper = open_.upper(box)[v];
      if (v != settled_ && share_of_width(v, lower, upper) > narrow) {
        return;
      }
    }
    refuse_zero(j);
  }
}

double GroupSearch::share_of_width(std::size_t v, double lower, double upper) const {
  return root_width_[v] > 0.0 ? width_of(variables_[v], lower, upper) / root_width_[v] : 0.0;
}

std::uint32_t GroupSearch::choose_variable(std::uint32_t box) {
  const auto lower = open_.lower(box);
  const auto upper = open_.upper(box);
  // Trends end at breakpoints, so those come first.
  for (std::size_t v = 0; v < n_; ++v) {
    if (has_breakpoint_inside(variables_[v], lower[v], upper[v])) {
      return static_cast<std::uint32_t>(v);
    }
  }
  const double greatest = *std::max_element(effect_.begin(), effect_.end());
  std::uint32_t best = no_index;
  double best_score = -1.0;
  for (std::size_t v = 0; v < n_; ++v) {
    if (v == settled_ || !(lower[v] < upper[v])) {
      continue;
    }
    const double effect =
        effect_[v] < 0.0 ? greatest : std::max(effect_[v], least_effect * greatest);
    const double score = share_of_width(v, lower[v], upper[v]) * (greatest > 0.0 ? effect : 1.0);
    if (score > best_score) {
      best_score = score;
      best = static_cast<std::uint32_t>(v);
    }
  }
  return best;
}

void GroupSearch::explain(GroupFront& out) {
  constexpr std::size_t most_boxes = 256;
  for (std::size_t i = 0; i < m_; ++i) {
    const auto constraint = static_cast<std::uint32_t>(i);
    double least = 0.0;
    if (least_seen_[i] > allowed_ &&
        excludes_all(problem_, group_, constraint, allowed_, most_boxes, least)) {
      out.excluded_by = constraint;
      out.least_utilisation = least;
      return;
    }
  }
}

}  // namespace bismar
