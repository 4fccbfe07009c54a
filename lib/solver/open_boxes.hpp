// SPDX-License-Identifier: MIT
#pragma once

#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// Boxes still to be looked at, in one pool: the one with the least promise first, ties by the
/// order in which they came. While more than `kept` wait, the last one that came goes first, so
/// that their number grows no further than the depth of the search.
class OpenBoxes {
 public:
  OpenBoxes(std::size_t variables, std::size_t objectives, std::size_t kept);

  [[nodiscard]] bool empty() const { return heap_.empty() && stack_.empty(); }

  /// A new box to fill in, then to `push`.
  [[nodiscard]] std::uint32_t make();
  void push(std::uint32_t box, double promise);
  /// The next box; it stays valid until `free`d.
  [[nodiscard]] std::uint32_t pop();
  void free(std::uint32_t box) { free_.push_back(box); }

  [[nodiscard]] std::span<double> lower(std::uint32_t box) {
    return std::span(bounds_).subspan(2 * box * variables_, variables_);
  }
  [[nodiscard]] std::span<double> upper(std::uint32_t box) {
    return std::span(bounds_).subspan((2 * box + 1) * variables_, variables_);
  }
  [[nodiscard]] std::span<double> objective_lower(std::uint32_t box) {
    return std::span(objective_lower_).subspan(box * objectives_, objectives_);
  }

  /// The boxes that wait: `first` is the next one of the best.
  [[nodiscard]] std::size_t waiting() const { return heap_.size() + stack_.size(); }
  [[nodiscard]] std::uint32_t waiting(std::size_t i) const {
    return i < heap_.size() ? heap_[i] : stack_[i - heap_.size()];
  }

 private:
  [[nodiscard]] bool later(std::uint32_t a, std::uint32_t b) const {
    return order_[a].promise != order_[b].promise ? order_[a].promise > order_[b].promise
                                                  : order_[a].number > order_[b].number;
  }

  struct Order {
    double promise = 0.0;
    std::uint64_t number = 0;
  };

  std::size_t variables_;
  std::size_t objectives_;
  std::size_t kept_;
  std::uint64_t pushed_ = 0;
  std::vector<double> bounds_;  ///< [boxes x 2 x variables]
  std::vector<double> objective_lower_;
  std::vector<Order> order_;
  std::vector<std::uint32_t> free_;
  std::vector<std::uint32_t> heap_;
  std::vector<std::uint32_t> stack_;
};

}  // namespace bismar
