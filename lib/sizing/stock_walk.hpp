// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/stock_solver.hpp"

#include <array>
#include <cstdint>
#include <optional>
#include <span>
#include <vector>

namespace bismar {

/// The state of solving one candidate out of stock.
class StockWalk {
 public:
  StockWalk(const SizingProblem& problem,
            std::size_t group,
            const StockDemands& demands,
            StockSolver::Counts& counts);
  [[nodiscard]] GroupSolution run();

 private:
  /// Sizes whose strengths stand in one row of the table.
  struct Step {
    const StepState* state = nullptr;
    std::size_t first_piece = 0;
    std::vector<std::uint64_t> places;    ///< [blocks] bits
    std::vector<double> capacities = {};  ///< [conditions] over the factors, with the margin.
    /// Largest utilisation of the limits on the material, solid or hollow, as far as evaluated.
    double solid = 0.0;
    double hollow = 0.0;
  };
  struct Worth {
    double mass = 0.0;
    double cost = 0.0;
    bool bought = false;
  };

  void sort_pieces();
  void set_capacities(Step& step) const;
  /// Bits of the places that no bound excludes.
  [[nodiscard]] std::vector<std::uint64_t> possible() const;
  [[nodiscard]] Worth worth(const Piece& piece) const;
  [[nodiscard]] bool is_beaten(double mass, double cost) const;
  /// Whether every size from this place on is beaten.
  [[nodiscard]] bool all_beaten_from(std::size_t place) const;
  /// The first place from which every size is beaten.
  [[nodiscard]] std::size_t end_of_walk(std::size_t from, std::size_t end) const;
  void visit(std::size_t place);
  void walk();
  void filter();

  void evaluate(const Piece& piece);
  [[nodiscard]] double utilisation(std::size_t constraint, const Piece& piece) const;
  /// A value that the constraint's utilisation of this piece is nowhere below, where that value
  /// exceeds 1.
  [[nodiscard]] double lower_bound(std::size_t constraint, const Piece& piece);

  void explain();
  void explain_clash();
  /// A size and a value that its worst utilisation is nowhere below, where that value exceeds 1.
  struct Bounded {
    const Piece* piece = nullptr;
    double least = 0.0;
  };
  [[nodiscard]] double glance(const Piece& piece, std::size_t constraint);
  /// All sizes with a strength, by rising bound.
  [[nodiscard]] std::vector<Bounded> bounded_sizes();
  void probe();
  template <class Key>
  void evaluate_least(Key&& key);
  /// Brings least_ of a constraint down to its least value over all sizes, or below 1.
  void find_least(std::size_t constraint);
  void find_least_limit_state(std::size_t constraint);
  [[nodiscard]] Step& step_of(const Piece& piece);

  const SizingProblem& problem_;
  std::size_t group_;
  const CompiledCandidate& compiled_;
  const StockDemands& demands_;
  StockSolver::Counts& counts_;
  GroupSolution solution_;
  std::vector<Step> steps_;
  std::vector<std::uint32_t> piece_at_;  ///< [places]
  bool untabulated_ = false;             ///< Some size is thicker than the table goes.
  bool cost_rises_ = false;              ///< The bound of the cost holds.
  double least_density_ = 0.0;
  double least_price_ = 0.0;
  std::optional<std::size_t> last_failed_;  ///< The limit state that failed last.
  std::optional<std::size_t> cheapest_;     ///< Among the points.
  std::vector<double> objectives_;
  std::vector<double> utilisations_;
  std::vector<double> least_;  ///< Of each constraint over what was evaluated; explain() only.
};

}  // namespace bismar
