// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"
#include "sizing/shape_bounds.hpp"

#include <bismar/export.hpp>
#include <bismar/solver/certified_front.hpp>

#include <cstdint>
#include <map>
#include <memory>
#include <optional>
#include <span>
#include <string>
#include <tuple>
#include <utility>
#include <vector>

namespace bismar {

/// Whether sections with walls are among a part's shapes and stock.
[[nodiscard]] bool has_walls(const Part& part);

/// Looks at materials and candidates without solving them.
class BISMAR_API Screening {
 public:
  /// Keeps a view of the problem.
  explicit Screening(SizingProblem& problem) : problem_(problem) {}

  /// The limit on a property that the material exceeds in every thickness step, so that none of its
  /// candidates is feasible; nothing where one of them lacks a value.
  [[nodiscard]] std::optional<std::string> failed_by_itself(std::uint32_t material,
                                                            std::span<const Candidate> candidates);

  /// The least product of the lower bounds of mass and cost over the material's candidates; 0 where
  /// nothing is known of one.
  [[nodiscard]] double promise(std::uint32_t material, std::span<const Candidate> candidates);

  /// Whether the incumbent beats the candidate's lower bounds; never one that lacks a value.
  [[nodiscard]] bool is_beaten(const Candidate& candidate, const Incumbent& incumbent);

  /// Whether the incumbent beats all candidates of the material even at the least mass that their
  /// routes make; trivially so where routes have none.
  [[nodiscard]] bool is_beaten_at_least_mass(std::uint32_t material,
                                             std::span<const Candidate> candidates,
                                             const Incumbent& incumbent);

 private:
  struct Lower {
    double mass = 0.0;
    double cost = 0.0;
  };
  struct Current {
    std::uint32_t material = UINT32_MAX;
    /// Per shape bounds: what the material asks of them, where made.
    std::vector<std::optional<ShapeBounds::Needs>> needs;
  };
  void set_material(std::uint32_t material);
  [[nodiscard]] std::size_t bounds_of(const Candidate& candidate);
  [[nodiscard]] bool lacks_value(const Candidate& candidate);
  /// Lower bounds of mass and cost for this area [m^2].
  [[nodiscard]] Lower lower_at(const Candidate& candidate, double area) const;

  SizingProblem& problem_;
  std::vector<std::unique_ptr<ShapeBounds>> bounds_;
  std::map<std::pair<std::uint32_t, Forming>, std::size_t> places_;
  /// Whether a material of these traits lacks a value for a shape, or for a stock list.
  std::map<std::tuple<std::uint32_t, std::uint32_t, std::string>, bool> lacking_;
  std::string traits_;
  Current current_;
};

}  // namespace bismar
