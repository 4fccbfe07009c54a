// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <bismar/mechanics/separable_bound.hpp>
#include <bismar/solver/separable.hpp>

#include <cstddef>
#include <cstdint>
#include <limits>
#include <optional>
#include <span>
#include <vector>

namespace bismar {

/// What the sizes of one stock list ask of any material: the demands of every separable bound of
/// every limit state in every load case, and of the limits of a route. Made once a list and shared
/// by all materials.
class StockDemands {
 public:
  static constexpr std::uint32_t no_place = std::numeric_limits<std::uint32_t>::max();

  StockDemands(const SizingProblem& problem, const StockList& list);

  /// Places run over the offered items by rising area, then by their order in the list.
  [[nodiscard]] std::span<const std::uint32_t> items() const { return items_; }
  /// Place of an item of the list; no_place where it is not offered.
  [[nodiscard]] std::uint32_t place_of(std::size_t item) const { return places_[item]; }
  /// Sizes of the table are the places.
  [[nodiscard]] const DemandTable& table() const { return table_; }

  /// The conditions of one limit state in one load case.
  struct Terms {
    const LimitState* state = nullptr;
    std::size_t load_case = 0;
    std::size_t first = 0;          ///< Condition of the table.
    std::vector<std::size_t> kept;  ///< Which terms of the bound are there: others ask nothing.
  };
  /// In the order of limit_states(), then of load cases, as a candidate's constraints are.
  [[nodiscard]] std::span<const Terms> terms() const { return terms_; }

  // Conditions of the route: 1 / wall, wall, 1 / A and A.
  static constexpr std::size_t thin_wall = 0;
  static constexpr std::size_t thick_wall = 1;
  static constexpr std::size_t light = 2;
  static constexpr std::size_t heavy = 3;
  static constexpr std::size_t first_term = 4;

 private:
  std::vector<std::uint32_t> items_;
  std::vector<std::uint32_t> places_;
  std::vector<Terms> terms_;
  DemandTable table_;
};

}  // namespace bismar
