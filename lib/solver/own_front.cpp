// SPDX-License-Identifier: MIT
#include "solver/own_front.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Share of the tolerance within which a further point tells nothing new.
constexpr double spacing = 0.25;

bool no_worse(const double* a, const double* b, std::size_t n) {
  for (std::size_t j = 0; j < n; ++j) {
    if (!(a[j] <= b[j])) {
      return false;
    }
  }
  return true;
}

template <class T>
void store(std::vector<T>& rows, std::size_t slot, std::span<const T> row) {
  std::copy(row.begin(), row.end(), rows.begin() + static_cast<std::ptrdiff_t>(slot * row.size()));
}

}  // namespace

OwnFront::OwnFront(std::size_t variables,
                   std::size_t objectives,
                   std::size_t constraints,
                   double epsilon,
                   std::span<const double> absolute,
                   Keep keep)
    : n_variables_(variables),
      n_objectives_(objectives),
      n_constraints_(constraints),
      epsilon_(epsilon),
      absolute_(absolute),
      keep_(keep) {}

std::span<const double> OwnFront::x(std::size_t p) const {
  return std::span(x_).subspan(order_[p] * n_variables_, n_variables_);
}

std::span<const double> OwnFront::objectives(std::size_t p) const {
  return std::span(objectives_).subspan(order_[p] * n_objectives_, n_objectives_);
}

std::span<const double> OwnFront::utilisations(std::size_t p) const {
  return std::span(utilisations_).subspan(order_[p] * n_constraints_, n_constraints_);
}

double OwnFront::limit(double lower, std::size_t j, double share) const {
  // Without a lower bound nothing is known.
  return lower == -infinity ? -infinity
                            : lower + share * std::max(epsilon_ * std::abs(lower), absolute_[j]);
}

bool OwnFront::reaches(const double* point, std::span<const double> lower, double share) const {
  bool strictly = keep_ != Keep::exact;
  for (std::size_t j = 0; j < n_objectives_; ++j) {
    if (!(point[j] <= limit(lower[j], j, share))) {
      return false;
    }
    strictly = strictly || point[j] < lower[j];
  }
  return strictly;
}

std::size_t OwnFront::find(std::span<const double> lower, double share) const {
  if (n_objectives_ == 2) {
    // Of the points that reach the first bound, the last is the least in the second.
    const double first = limit(lower[0], 0, share);
    const auto end = std::partition_point(
        order_.begin(), order_.end(), [&](std::uint32_t slot) { return row(slot)[0] <= first; });
    if (end == order_.begin() || !reaches(row(*std::prev(end)), lower, share)) {
      return order_.size();
    }
    return static_cast<std::size_t>(end - order_.begin()) - 1;
  }
  std::size_t p = 0;
  while (p < order_.size() && !reaches(row(order_[p]), lower, share)) {
    ++p;
  }
  return p;
}

double OwnFront::needed_of(const double* point, std::span<const double> lower) const {
  double most = 0.0;
  for (std::size_t j = 0; j < n_objectives_; ++j) {
    const double gap = point[j] - lower[j];
    if (gap > absolute_[j]) {
      const double size = std::abs(lower[j]);
      most = std::max(most, size > 0.0 && std::isfinite(size) ? gap / size : infinity);
    }
  }
  return most;
}

bool OwnFront::covers(std::span<const double> lower, double& needed) const {
  const std::size_t p = find(lower, 1.0);
  if (p == order_.size()) {
    return false;
  }
  needed = std::min(needed_of(row(order_[p]), lower), epsilon_);
  return true;
}

double OwnFront::needed(std::span<const double> lower) const {
  double least = infinity;
  for (const std::uint32_t slot : order_) {
    least = std::min(least, needed_of(row(slot), lower));
  }
  return least;
}

bool OwnFront::is_wanted(std::span<const double> x, std::span<const double> objectives) const {
  const std::size_t k = n_objectives_;
  const double* point = objectives.data();
  if (keep_ == Keep::best_one) {
    return order_.empty() ||
           std::lexicographical_compare(point, point + k, row(order_[0]), row(order_[0]) + k);
  }
  if (keep_ == Keep::exact) {
    // A tie is another place with equal objectives, not the same place tried again.
    return std::none_of(order_.begin(), order_.end(), [&](std::uint32_t slot) {
      return no_worse(row(slot), point, k) &&
             (!std::equal(point, point + k, row(slot)) ||
              std::equal(x.begin(), x.end(), &x_[slot * n_variables_]));
    });
  }
  // A point that dominates others takes their place, however near; of the rest those stay out that
  // are worse, equal or near.
  const bool equal_or_worse = std::any_of(order_.begin(), order_.end(), [&](std::uint32_t slot) {
    return no_worse(row(slot), point, k);
  });
  return !equal_or_worse && (find(objectives, spacing) == order_.size() ||
                             std::any_of(order_.begin(), order_.end(), [&](std::uint32_t slot) {
                               return no_worse(point, row(slot), k);
                             }));
}

void OwnFront::drop_dominated(std::span<const double> objectives) {
  std::size_t kept = 0;
  for (const std::uint32_t slot : order_) {
    const bool tie =
        keep_ == Keep::exact && std::equal(objectives.begin(), objectives.end(), row(slot));
    const bool gone =
        keep_ == Keep::best_one || (!tie && no_worse(objectives.data(), row(slot), n_objectives_));
    if (gone) {
      free_.push_back(slot);
    } else {
      order_[kept++] = slot;
    }
  }
  order_.resize(kept);
}

bool OwnFront::add(std::span<const double> x,
                   std::span<const double> objectives,
                   std::span<const double> utilisations) {
  if (!is_wanted(x, objectives)) {
    return false;
  }
  drop_dominated(objectives);
  if (free_.empty()) {
    free_.push_back(static_cast<std::uint32_t>(objectives_.size() / n_objectives_));
    x_.resize(x_.size() + n_variables_);
    objectives_.resize(objectives_.size() + n_objectives_);
    utilisations_.resize(utilisations_.size() + n_constraints_);
  }
  const std::uint32_t slot = free_.back();
  free_.pop_back();
  store(x_, slot, x);
  store(objectives_, slot, objectives);
  store(utilisations_, slot, utilisations);
  const auto at = n_objectives_ == 2 ? std::partition_point(order_.begin(),
                                                            order_.end(),
                                                            [&](std::uint32_t other) {
                                                              return row(other)[0] <= objectives[0];
                                                            })
                                     : order_.end();
  order_.insert(at, slot);
  return true;
}

}  // namespace bismar
