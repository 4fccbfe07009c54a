// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/solver/trend.hpp>

#include <cstddef>
#include <cstdint>
#include <span>
#include <vector>

namespace bismar {

/// One variable of a problem.
struct Variable {
  enum class Kind : std::uint8_t {
    continuous,   ///< Any value in [lower, upper].
    integer,      ///< A whole number in [lower, upper].
    ordered_set,  ///< One of `values`, ascending.
  };
  Kind kind = Kind::continuous;
  double lower = 0.0;
  double upper = 0.0;
  std::vector<double> values;  ///< Ordered set: its values, ascending, lower and upper at its ends.
  std::vector<double>
      breakpoints;  ///< Continuous: interior values where outputs may jump, ascending. A
                    ///< piece is (previous, this], the first one closed below.
};

/// Boxes side by side: `lower[v * count + b]` and `upper[v * count + b]` bound variable v of box b.
/// An ordered set is boxed by values of the set.
struct BoxBatch {
  std::size_t count = 0;
  std::span<const double> lower;  ///< [variables x count]
  std::span<const double> upper;  ///< [variables x count]
};

/// Bounds of the outputs over those boxes: same layout, one row an output.
struct BoundBatch {
  std::span<double> objective_lower;    ///< [objectives x count]
  std::span<double> utilisation_lower;  ///< [constraints x count]
  std::span<double> utilisation_upper;  ///< [constraints x count]
};

/// No constraint, no variable.
inline constexpr std::uint32_t no_index = UINT32_MAX;

/// Boxes that are cut down to what may matter, with lower bounds over the rest.
struct ContractBatch {
  std::size_t count = 0;
  std::span<double> lower;            ///< [variables x count], moved up only.
  std::span<double> upper;            ///< [variables x count], moved down only.
  std::span<double> objective_lower;  ///< [objectives x count], over what is left.
  /// [count]: a constraint that nothing of the box meets, or no_index. A box that only several
  /// constraints together empty has any one of them.
  std::span<std::uint32_t> broken;
};

/// What the solver sees of a design problem: variables, objectives to minimise, utilisations that
/// must not exceed 1, and groups (independent boxes of the same problem). No engineering.
///
/// `evaluate` is the definition of truth (plain scalar path); `bound` is fast and must enclose it.
/// Implementations are immutable while solved: every member may be called from several threads.
class BISMAR_API BoxProblem {
 public:
  BoxProblem() = default;
  BoxProblem(const BoxProblem&) = default;
  BoxProblem& operator=(const BoxProblem&) = default;
  BoxProblem(BoxProblem&&) = default;
  BoxProblem& operator=(BoxProblem&&) = default;
  virtual ~BoxProblem();

  [[nodiscard]] virtual std::size_t groups() const = 0;
  [[nodiscard]] virtual std::size_t objectives() const = 0;
  /// Variables of a group; at least one.
  [[nodiscard]] virtual std::span<const Variable> variables(std::size_t group) const = 0;
  /// Number of utilisations of a group.
  [[nodiscard]] virtual std::size_t constraints(std::size_t group) const = 0;
  /// Trend of objective `i` in variable `v`, on each piece between breakpoints.
  [[nodiscard]] virtual Trend objective_trend(std::size_t group,
                                              std::size_t i,
                                              std::size_t v) const = 0;
  /// Trend of utilisation `i` in variable `v`, on each piece between breakpoints.
  [[nodiscard]] virtual Trend utilisation_trend(std::size_t group,
                                                std::size_t i,
                                                std::size_t v) const = 0;
  /// Objectives [objectives] and utilisations [constraints] at `x` [variables].
  virtual void evaluate(std::size_t group,
                        std::span<const double> x,
                        std::span<double> objectives,
                        std::span<double> utilisations) const = 0;
  /// Bounds over boxes. The default takes them from the declared trends by evaluating the corners
  /// of each piece, outward by `outward_ulps` units in the last place; an output with trend
  /// `neither` in a variable that the box leaves room gets no bound (lower -infinity, upper
  /// +infinity). Trends in a whole number hold over its whole range, so it makes one piece; of an
  /// ordered set nothing is known between the values, so each is a piece of its own, and a box of
  /// several variables with more than 64 pieces gets no bound: it is cut until it has fewer.
  virtual void bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const;

  // What follows lets a solver do better; the defaults are right for every problem.

  /// A continuous variable that can be solved for, or no_index: whatever the others are, on each of
  /// its pieces every objective rises or stays with it and no utilisation has the trend `neither`.
  [[nodiscard]] virtual std::uint32_t size_direction(std::size_t group) const;
  /// Whether all objectives are functions of one and the same number that never fall with it, so
  /// that the point where the first is least is the only non-dominated one (ties apart). Default:
  /// where there is one objective only.
  [[nodiscard]] virtual bool objectives_agree(std::size_t group) const;
  /// Cuts from each box what has a utilisation above `allowed`, and bounds the objectives over what
  /// is left. The default bounds, and solves the bounds along the size direction where there is one
  /// that has no breakpoints inside the box.
  /// @param allowed  > 0, 1 - delta: what is cut off has no point whose utilisations are all <= it.
  virtual void contract(std::size_t group, double allowed, ContractBatch boxes) const;
  /// Sets the size direction of `x` to its least value within [lower, upper] at which every
  /// utilisation is at most 1; the other variables stay. To adjacent doubles or a relative width of
  /// 1e-12, on the feasible side.
  /// @return false: there is none, or no size direction; x is then unspecified along it.
  [[nodiscard]] virtual bool settle(std::size_t group,
                                    std::span<double> x,
                                    double lower,
                                    double upper) const;
};

/// Outward rounding of bounds taken from trends. Covers the rounding of an evaluation of a few
/// dozen operations, so that a computed corner still encloses computed interior values.
inline constexpr int outward_ulps = 64;

/// The feasible, mutually non-dominated points of one group.
struct GroupSolution {
  struct Point {
    std::vector<double> x;             ///< [variables]
    std::vector<double> objectives;    ///< [objectives]
    std::vector<double> utilisations;  ///< [constraints]
  };
  std::vector<Point> points;  ///< Ordered by objectives, then x. Empty when nothing is feasible.
  bool solved = true;  ///< False: a trend is `neither`, or there are several continuous variables.
  /// Where nothing is feasible: a constraint that alone exceeds 1 everywhere (the first in order),
  /// and the least value it can have ...
  std::size_t excluded_by = SIZE_MAX;
  double least_utilisation = 0.0;
  /// ... or, where each alone could be met, the two that clash first.
  std::size_t clash_falling = SIZE_MAX;  ///< Wants a larger size.
  std::size_t clash_rising = SIZE_MAX;   ///< Wants a smaller size.
  std::size_t evaluations = 0;
};

/// Exact solution of a group whose variables are one continuous variable or one ordered set.
///
/// Ordered set: every value is evaluated. Continuous: on each piece every objective must rise or
/// stay and every utilisation must rise, fall or stay, so the feasible sizes are an interval and
/// its lower end is the only non-dominated point: the root of the largest falling utilisation,
/// found by bracketing to adjacent doubles or a relative width of 1e-12, on the feasible side.
/// Pieces are kept apart and their points filtered.
///
/// @return solved == false when the group has another form (it needs a solver that bounds boxes).
[[nodiscard]] BISMAR_API GroupSolution solve_exact(const BoxProblem& problem, std::size_t group);

}  // namespace bismar
