// SPDX-License-Identifier: MIT
#include "solver/open_boxes.hpp"

#include <algorithm>

namespace bismar {

OpenBoxes::OpenBoxes(std::size_t variables, std::size_t objectives, std::size_t kept)
    : variables_(variables), objectives_(objectives), kept_(kept) {}

std::uint32_t OpenBoxes::make() {
  if (!free_.empty()) {
    const std::uint32_t box = free_.back();
    free_.pop_back();
    return box;
  }
  order_.emplace_back();
  bounds_.resize(bounds_.size() + 2 * variables_);
  objective_lower_.resize(objective_lower_.size() + objectives_);
  return static_cast<std::uint32_t>(order_.size() - 1);
}

void OpenBoxes::push(std::uint32_t box, double promise) {
  order_[box] = {promise, pushed_++};
  if (heap_.size() >= kept_) {
    stack_.push_back(box);
    return;
  }
  heap_.push_back(box);
  std::push_heap(
      heap_.begin(), heap_.end(), [this](std::uint32_t a, std::uint32_t b) { return later(a, b); });
}

std::uint32_t OpenBoxes::pop() {
  if (!stack_.empty()) {
    const std::uint32_t box = stack_.back();
    stack_.pop_back();
    return box;
  }
  std::pop_heap(
      heap_.begin(), heap_.end(), [this](std::uint32_t a, std::uint32_t b) { return later(a, b); });
  const std::uint32_t box = heap_.back();
  heap_.pop_back();
  return box;
}

}  // namespace bismar
