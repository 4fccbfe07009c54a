// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <bismar/export.hpp>
#include <bismar/mechanics/section_box.hpp>
#include <bismar/solver/box_problem.hpp>

#include <cstdint>
#include <set>
#include <span>
#include <string>
#include <vector>

namespace bismar {

/// How a dimension of the section follows from the variables of a mode.
struct DimensionRule {
  enum class Kind : std::uint8_t {
    height,    ///< The first dimension where it is a variable.
    variable,  ///< [m]
    ratio,     ///< A variable times the height.
    fixed,     ///< `value` times the height.
    constant,  ///< `value` [m]
  };
  Kind kind = Kind::height;
  std::uint32_t variable = 0;
  double value = 0.0;
};

/// One way of making a candidate in which everything but the sizes stays: a strength step, a blank,
/// the thickness of a sheet. Steps are thereby bounds of boxes.
struct Mode {
  Piece piece;                    ///< Step and blank; its section is not used.
  std::vector<BestSection> best;  ///< Per constraint: which section of a box bounds it.
  std::vector<Variable> variables;
  std::vector<DimensionRule> rules;  ///< One a dimension of the family, radii included.
  /// The first variable is the height and all else follows it in proportion.
  bool similar = true;
  bool objectives_agree = false;
  /// The thickness that strength is read at lies in (above, up_to] [m].
  double thickness_above = 0.0;
  double thickness_up_to = 0.0;
  /// Lighter blanks that are worse in something: what fits one is cut from it all the same.
  std::vector<const Blank*> others;
  /// Ratios that are not variables: dimension index over the height inside the range.
  struct Proportion {
    std::size_t dimension = 0;
    Ratio range = 0.0;
  };
  std::vector<Proportion> proportions;
};

/// A candidate whose shape has free dimensions, as the certified solver sees it: one group a mode.
///
/// Utilisations: those of the candidate's constraints, in their order, then thickness above,
/// thickness up to, room in the blank, and the proportions of the mode (below and above each).
class BISMAR_API FreeSizeProblem : public BoxProblem {
 public:
  /// `base` is the candidate compiled with the ratios in the middle of their ranges.
  FreeSizeProblem(SizingProblem& sizing, const CompiledCandidate& base);

  /// Limits that cannot be bounded for several free sizes, or lack a value; empty: can be solved.
  [[nodiscard]] const std::vector<std::string>& open_limits() const { return open_limits_; }
  [[nodiscard]] const std::vector<Property>& missing() const { return missing_; }
  [[nodiscard]] const Mode& mode(std::size_t group) const { return modes_[group]; }
  /// Whether no lighter blank than the mode's holds these sizes; true where there are no blanks.
  [[nodiscard]] bool has_own_blank(std::size_t group, std::span<const double> x) const;
  [[nodiscard]] std::string label(std::size_t constraint) const;

  /// The height and the free dimensions that the variables stand for.
  struct Found {
    double height = 0.0;
    FreeSizes free_sizes = {};
  };
  [[nodiscard]] Found sizes(std::size_t group, std::span<const double> x) const;

  [[nodiscard]] std::size_t groups() const override { return modes_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return 2; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t group) const override {
    return modes_[group].variables;
  }
  [[nodiscard]] std::size_t constraints(std::size_t group) const override;
  [[nodiscard]] Trend objective_trend(std::size_t group,
                                      std::size_t i,
                                      std::size_t v) const override;
  [[nodiscard]] Trend utilisation_trend(std::size_t group,
                                        std::size_t i,
                                        std::size_t v) const override;
  void evaluate(std::size_t group,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override;
  void bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const override;
  [[nodiscard]] std::uint32_t size_direction(std::size_t group) const override;
  [[nodiscard]] bool objectives_agree(std::size_t group) const override {
    return modes_[group].objectives_agree;
  }
  void contract(std::size_t group, double allowed, ContractBatch boxes) const override;
  [[nodiscard]] bool settle(std::size_t group,
                            std::span<double> x,
                            double lower,
                            double upper) const override;

 private:
  struct Scratch;

  void make_modes();
  void sheet_modes();
  void machined_modes();
  void own_modes();
  /// The mode's variables and rules, where `thickness` > 0 that of a bought sheet in dimension
  /// `sheet_dimension`.
  [[nodiscard]] Mode proportional_mode() const;
  [[nodiscard]] Mode listed_mode() const;
  [[nodiscard]] static bool keep_flat(Mode& mode, bool lying);
  static void drop_variable(Mode& mode, std::uint32_t gone);
  void set_sheet(Mode& mode, std::size_t dimension, double thickness) const;
  void add_mode(Mode mode, const StepState* step, const Blank* blank);
  void note_applying();
  void note_state(const LimitState& state,
                  std::size_t load_case,
                  std::span<const SectionProperties> samples,
                  std::set<Property>& missing);

  void dimensions_of(const Mode& mode, std::span<const double> x, std::span<double> out) const;
  [[nodiscard]] SectionProperties section_at(const Mode& mode, std::span<const double> x) const;
  [[nodiscard]] bool in_proportion(const Mode& mode, std::span<const double> all) const;
  [[nodiscard]] double strength_thickness(const SectionProperties& section) const;
  void evaluate_at(const Mode& mode,
                   const SectionProperties& section,
                   std::span<const double> dimensions,
                   std::span<double> objectives,
                   std::span<double> utilisations) const;
  void own_utilisations(const Mode& mode,
                        const SectionProperties& section,
                        std::span<const double> dimensions,
                        std::span<double> out) const;

  void bound_box(const Mode& mode,
                 const ContractBatch& boxes,
                 std::size_t b,
                 Scratch& scratch,
                 std::span<double> objectives,
                 std::span<double> utilisations) const;
  void leave_whole(const Mode& mode,
                   const ContractBatch& boxes,
                   std::size_t b,
                   Scratch& scratch) const;
  [[nodiscard]] double one_utilisation(const Mode& mode,
                                       std::size_t constraint,
                                       const SectionProperties& section,
                                       std::span<const double> dimensions) const;
  [[nodiscard]] Interval dimension_box(const Mode& mode,
                                       std::size_t dimension,
                                       const ContractBatch& boxes,
                                       std::size_t b) const;

  /// Least utilisation of a limit state over the sections of a box, enlarged by `scale`.
  [[nodiscard]] double least_utilisation(const Mode& mode,
                                         std::size_t constraint,
                                         const SectionBox& box,
                                         double scale,
                                         Scratch& scratch) const;
  void contract_similar(const Mode& mode,
                        double allowed,
                        const ContractBatch& boxes,
                        std::size_t b,
                        Scratch& scratch) const;
  void contract_any(const Mode& mode,
                    double allowed,
                    const ContractBatch& boxes,
                    std::size_t b,
                    Scratch& scratch) const;
  [[nodiscard]] bool enclose(const Mode& mode,
                             std::span<const double> lower,
                             std::span<const double> upper,
                             std::size_t stride,
                             bool unit_height,
                             Scratch& scratch) const;
  /// Of the sections of a box that have this mass or more [kg].
  void lower_objectives(const Mode& mode,
                        const SectionBox& box,
                        double scale,
                        double least_mass,
                        Scratch& scratch,
                        std::span<double> objectives) const;

  SizingProblem& sizing_;
  const CompiledCandidate& base_;
  const Shape& shape_;
  const Route& route_;
  std::vector<FreeDimension> free_;
  std::vector<Constraint> constraints_;
  std::vector<Mode> modes_;
  std::vector<std::string> open_limits_;
  std::vector<Property> missing_;
  std::vector<Blank> blanks_;
  bool equivalent_diameter_ = false;  ///< Strength is read at 4 A / U.
};

}  // namespace bismar
