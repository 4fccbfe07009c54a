// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/blank.hpp"
#include "sizing/candidate_cost.hpp"
#include "sizing/shape_section.hpp"
#include "sizing/strength.hpp"

#include <bismar/export.hpp>
#include <bismar/solver/box_problem.hpp>

#include <map>
#include <memory>
#include <optional>
#include <span>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

class StockSolver;

/// A material at one thickness step, as the limit states see it in each load case.
struct StepState {
  std::size_t row = 0;
  std::vector<ResolvedMaterial> cases;
  double density = 0.0;
  bool priced = false;  ///< Whether there is a price at all.
  Range price;
  double usual_price = 0.0;
};

/// One condition of a candidate that its utilisation must not exceed 1.
struct Constraint {
  enum class Kind : std::uint8_t {
    property,  ///< A limit on a property of the material.
    corrosion,
    temperature,
    thickness_limit,  ///< No strength is tabulated for so thick a piece.
    corners,          ///< The corner radii of the standard do not fit the wall.
    blank,            ///< No bar or stock length is large enough.
    limit_state,
    route_wall,
    route_section,
    route_mass_min,
    route_mass_max,
    mass_cap,
    cost_cap,
  };
  Kind kind = Kind::limit_state;
  const LimitState* state = nullptr;
  std::size_t load_case = 0;
  double factor = 1.0;
  std::size_t property_limit = 0;
  Trend trend = Trend::constant;
  bool by_section = false;  ///< Limit state: whether it applies depends on the ratios.
  std::string label;        ///< As results and messages call it.
};

/// A stretch of sizes over which everything but the size stays: strength step, blank, corner rule.
struct Piece {
  double lower = 0.0;               ///< Exclusive but for the first piece.
  double upper = 0.0;               ///< Inclusive.
  const StepState* step = nullptr;  ///< Null: thicker than the table's last limit.
  const Blank* blank = nullptr;     ///< Machined parts.
  const StockItem* item = nullptr;  ///< Stock.
  bool impossible = false;          ///< There is no such section: its corners leave no wall.
  SectionProperties section;        ///< At `size`; other sizes of the piece are scaled from it.
  double size = 0.0;
  std::vector<bool> applies;  ///< Per constraint: can this load case cause it here?
};

/// A candidate made ready for solving.
struct CompiledCandidate {
  Candidate candidate;
  /// The part's shape, with the ratios of one design where it has free dimensions; absent for
  /// stock.
  std::optional<Shape> shape;
  /// The free dimensions at `own_size`, of which the ratios are made.
  FreeSizes free_sizes = {};
  double own_size = 0.0;
  Variable variable;
  std::vector<Piece> pieces;  ///< Ascending; one a value for stock.
  std::vector<Constraint> constraints;
  std::vector<Blank> blanks;
  std::optional<CandidateCost> cost;
  std::vector<Property> undecided;  ///< Needed and missing; the candidate is not solved then.
  std::vector<std::string>
      undecided_limits;  ///< Limits of the job that a missing value leaves open.
};

/// The size of a list that this one is but for rounding; a size between the ends where there is no
/// list; else nothing.
[[nodiscard]] std::optional<double> listed_size(const Variable& variable, double size);

/// A part's sizing as the solver sees it. One group a candidate; the variable is the height of the
/// section [m], or the index of the item for stock. Objectives: mass [kg], unit cost.
///
/// Why the trends hold, on each piece: dimensions are multiples of the height, so every stress is a
/// load over a power of it and falls; mass, surface, bought mass and process time rise; ratios of
/// walls stay.
class BISMAR_API SizingProblem : public BoxProblem {
 public:
  SizingProblem(const Part& part, const Catalogue& catalogue, const Settings& settings);
  ~SizingProblem() override;
  SizingProblem(const SizingProblem&) = delete;
  SizingProblem& operator=(const SizingProblem&) = delete;
  SizingProblem(SizingProblem&&) = delete;
  SizingProblem& operator=(SizingProblem&&) = delete;

  /// Adds a candidate as the last group; the returned reference holds as long as the problem.
  const CompiledCandidate& add(const Candidate& candidate);
  /// The same for a shape with free dimensions: its ratios are those of this design.
  const CompiledCandidate& add(const Candidate& candidate,
                               double size,
                               const FreeSizes& free_sizes);
  /// Solves candidates out of stock.
  [[nodiscard]] const StockSolver& stock_solver() const { return *stock_solver_; }
  /// Lets go of a material's states; no group of it may be left.
  void forget(std::size_t material) { states_.erase(material); }
  /// Utilisation of the part's property limit `index` in a table row; nothing where it is missing.
  [[nodiscard]] std::optional<double> property_utilisation(std::size_t index,
                                                           std::size_t row) const;
  /// Takes the last group away.
  void remove_last() { groups_.pop_back(); }
  [[nodiscard]] const CompiledCandidate& compiled(std::size_t group) const {
    return *groups_[group];
  }

  [[nodiscard]] std::size_t groups() const override { return groups_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return 2; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t group) const override;
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

  /// The plain path: section from its own formulas at this size, not scaled from the piece.
  void evaluate_plain(std::size_t group,
                      double x,
                      std::span<double> objectives,
                      std::span<double> utilisations) const;

  /// What a design shows beyond objectives and utilisations.
  struct Detail {
    SectionProperties section;
    const Piece* piece = nullptr;
    double net_mass = 0.0;
    std::optional<Purchase> purchase;
  };
  [[nodiscard]] Detail detail(std::size_t group, double x) const;

  /// Multiplies a value of a material in every state, to ask what a better one would change.
  /// @return the states as they were, for restore().
  std::vector<StepState> multiply(std::size_t material, Symbol symbol, double factor);
  void restore(std::size_t material, const std::vector<StepState>& states);

  [[nodiscard]] const Part& part() const { return part_; }
  [[nodiscard]] const Catalogue& catalogue() const { return catalogue_; }
  [[nodiscard]] const Settings& settings() const { return settings_; }
  [[nodiscard]] const PropertyReader& reader() const { return reader_; }
  [[nodiscard]] std::span<const LoadEffects> effects() const { return effects_; }
  [[nodiscard]] const MemberLimits& member_limits() const { return member_limits_; }
  /// Section of a candidate's shape at one height, by its own formulas.
  [[nodiscard]] SectionProperties section_of(const CompiledCandidate& group,
                                             const Route& route,
                                             double height) const;
  [[nodiscard]] const ShapeSections& sections() const { return sections_; }
  /// States of a material at each of its thickness steps, made once.
  const std::vector<StepState>& states(std::size_t material);
  /// Least and largest section that the route makes of the candidate's material [m].
  [[nodiscard]] double least_wall(const CompiledCandidate& group) const;
  [[nodiscard]] double largest_wall(const CompiledCandidate& group) const;
  /// Least net mass that the route makes [kg]: what comes by the metre is cut to length and has
  /// none.
  [[nodiscard]] double least_mass(const CompiledCandidate& group) const;
  /// The constraint that a limit state makes in a load case, with the factor used there.
  [[nodiscard]] Constraint limit_constraint(const LimitState& state,
                                            std::size_t load_case,
                                            const MemberMaterial& material) const;
  /// What a material and route can be machined from, looked up once.
  const std::vector<UsableItem>& blank_stock_of(std::uint32_t material, std::uint32_t route);

 private:
  friend class CandidateCompiler;
  friend class FreeSizeProblem;

  [[nodiscard]] StepState make_state(std::size_t material, std::size_t row) const;
  [[nodiscard]] ResolvedMaterial resolve_case(std::size_t material,
                                              std::size_t row,
                                              std::size_t load_case) const;
  [[nodiscard]] const Piece& piece_at(const CompiledCandidate& group, double x) const;
  [[nodiscard]] std::optional<Purchase> purchase(const CompiledCandidate& group,
                                                 const Piece& piece,
                                                 const SectionProperties& section,
                                                 double net_mass) const;
  void evaluate_section(const CompiledCandidate& group,
                        std::span<const Constraint> constraints,
                        const Piece& piece,
                        const SectionProperties& section,
                        std::span<double> objectives,
                        std::span<double> utilisations) const;
  [[nodiscard]] double material_utilisation(const CompiledCandidate& group,
                                            const Constraint& constraint,
                                            const StepState& step,
                                            const SectionProperties& section) const;
  [[nodiscard]] bool applies(const Constraint& constraint,
                             std::size_t index,
                             const Piece& piece,
                             const SectionProperties& section) const;
  [[nodiscard]] double limit_utilisation(const Constraint& constraint,
                                         const StepState& step,
                                         const SectionProperties& section) const;

  const Part& part_;
  const Catalogue& catalogue_;
  const Settings& settings_;
  PropertyReader reader_;
  MemberLimits member_limits_;
  ShapeSections sections_;
  std::vector<LoadEffects> effects_;
  std::map<std::size_t, std::vector<StepState>> states_;
  std::map<std::pair<std::uint32_t, std::uint32_t>, std::vector<UsableItem>> blank_stock_;
  std::vector<std::unique_ptr<CompiledCandidate>> groups_;
  std::unique_ptr<const StockSolver> stock_solver_;
};

}  // namespace bismar
