// SPDX-License-Identifier: MIT
#pragma once

#include "solver/open_boxes.hpp"
#include "solver/own_front.hpp"
#include "solver/polish.hpp"

#include <bismar/solver/certified_front.hpp>

#include <array>
#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// Branch and bound over one group; `certified_group` says what it returns. Options and variables
/// are valid.
class GroupSearch {
 public:
  GroupSearch(const BoxProblem& problem,
              std::size_t group,
              const CertifyOptions& options,
              Incumbent* incumbent);

  [[nodiscard]] GroupFront run();

 private:
  /// Boxes cut in two at a time, so that a problem that bounds side by side gets some to bound.
  static constexpr std::size_t cut_at_once = 8;
  static constexpr std::size_t most_children = 2 * cut_at_once;
  /// Points from which the one point is polished besides the best.
  static constexpr std::size_t most_starts = 3;

  enum class End : std::uint8_t { done, beaten, stopped };

  void read_trends();
  void set_scales();
  [[nodiscard]] End search();
  void add_root();
  /// Looks at the next box; one that stays open is cut and its children join the batch.
  void take_next();
  void contract_batch();
  void learn(std::size_t parent, double gain);

  [[nodiscard]] bool is_covered(std::uint32_t box);
  [[nodiscard]] bool is_beaten();
  void check_above_zero(std::uint32_t box);
  [[noreturn]] void refuse_zero(std::size_t j) const;
  /// @return Whether what a point told settles the whole box.
  bool try_points(std::uint32_t box);
  bool try_settled(std::uint32_t box);
  /// @return Whether the point is feasible.
  bool try_point();
  void evaluate();
  void polish_best();
  void note_start();
  /// Keeps a feasible point where the front wants it. @return Whether it did.
  bool keep(std::span<const double> x, std::span<const double> f, std::span<const double> u);
  /// Within a twentieth of the range in every continuous variable but the size, equal in others.
  [[nodiscard]] bool same_place(std::span<const double> a, std::span<const double> b) const;
  /// Polishes the best point, unless it comes from a polish.
  void polish_found();
  void polish_starts();

  /// The variable to cut, or no_index for a box of which nothing is left to cut.
  [[nodiscard]] std::uint32_t choose_variable(std::uint32_t box);
  [[nodiscard]] double share_of_width(std::size_t v, double lower, double upper) const;
  [[nodiscard]] double promise_of(std::span<const double> objective_lower) const;
  void explain(GroupFront& out);

  const BoxProblem& problem_;
  std::size_t group_;
  const CertifyOptions& options_;
  Incumbent* incumbent_;
  std::span<const Variable> variables_;
  std::size_t n_;  ///< Variables.
  std::size_t k_;  ///< Objectives.
  std::size_t m_;  ///< Constraints.
  double allowed_;
  std::vector<double> absolute_;
  bool has_continuous_;
  bool one_point_;
  std::uint32_t size_;     ///< The size direction, whether used or not.
  std::uint32_t settled_;  ///< The size direction where it is solved for.
  OwnFront front_;
  OpenBoxes open_;

  std::vector<double> root_width_;
  std::vector<double> scale_;  ///< Of the objectives.
  /// Where objectives, or utilisations, agree that a variable is best: -1 lower, 1 upper end.
  std::vector<int> lean_;
  std::vector<int> ease_;
  /// What cutting a variable has raised lower bounds by, over the share of width it halved;
  /// negative: not known.
  std::vector<double> effect_;

  struct Parent {
    std::uint32_t variable = no_index;
    double share = 0.0;
    double sum = 0.0;  ///< Promise of the parent.
  };
  std::array<Parent, cut_at_once> parents_;
  std::size_t parent_count_ = 0;
  std::vector<double> batch_lower_;  ///< [children x variables] while filled, then transposed.
  std::vector<double> batch_upper_;
  std::vector<double> batch_objectives_;  ///< [children x objectives] of the parents.
  std::vector<double> columns_lower_;
  std::vector<double> columns_upper_;
  std::vector<double> columns_objectives_;
  std::array<std::uint32_t, most_children> broken_ = {};
  std::size_t child_count_ = 0;

  std::vector<double> x_;
  std::vector<double> f_;
  std::vector<double> u_;
  std::vector<double> least_seen_;  ///< Least of each utilisation at any point tried.
  std::vector<PolishedPoint> starts_;
  std::vector<std::vector<double>> origins_;  ///< Where polishes began.
  std::vector<double> polished_;              ///< Objectives of the last polished point.
  double reached_ = 0.0;
  /// Boxes taken before the first polish: most groups that others beat are left by then.
  static constexpr std::size_t polished_after = 24;
  std::size_t taken_ = 0;  ///< Boxes taken out to be cut.
  std::size_t boxes_ = 0;
  std::size_t evaluations_ = 0;
  std::uint32_t unbeaten_ = no_index;  ///< A box known not to be beaten when last looked at.
};

/// Whether a constraint alone is above `allowed` everywhere in the group, as far as `most_boxes`
/// bounds can tell; `least` is then what it is at least.
[[nodiscard]] bool excludes_all(const BoxProblem& problem,
                                std::size_t group,
                                std::uint32_t constraint,
                                double allowed,
                                std::size_t most_boxes,
                                double& least);

}  // namespace bismar
