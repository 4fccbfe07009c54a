// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <vector>

namespace bismar {

/// The part of the alpha axis to report.
struct RulerOptions {
  std::optional<double> from = {};  ///< [currency per unit], finite, >= 0; absent: from 0.
  std::optional<double> to = {};    ///< [currency per unit], finite, > from; absent: no upper end.
};

/// A vertex of the lower-left hull: the design that has the least penalty over a range of alpha.
struct RulerVertex {
  std::vector<std::uint32_t> rows = {};  ///< Every row with these objectives, ascending.
  double priced = 0.0;                   ///< m, first objective [unit]
  double cost = 0.0;                     ///< C, second objective [currency]
  double from = 0.0;                     ///< [currency per unit]
  std::optional<double> to = {};         ///< [currency per unit]; absent: no upper end.
};

/// The best design of another label over part of a stretch.
struct RunnerUp {
  std::uint32_t label = 0;  ///< Label of the first row.
  std::vector<std::uint32_t> rows =
      {};                         ///< Rows of another label with these objectives, ascending.
  double priced = 0.0;            ///< m [unit]
  double cost = 0.0;              ///< C [currency]
  double from = 0.0;              ///< [currency per unit]
  std::optional<double> to = {};  ///< [currency per unit]; absent: no upper end.
  /// Regret [currency] of taking it: its Z less the Z of the choice, >= 0.
  double regret_from = 0.0;              ///< At `from`.
  std::optional<double> regret_to = {};  ///< At `to`; absent where `to` is.
  double least_regret = 0.0;             ///< The least regret between `from` and `to`.
  double least_regret_at = 0.0;          ///< The (first) alpha where it is.
};

/// A range of alpha over which one label is the choice.
struct RulerStretch {
  std::uint32_t label = 0;
  double from = 0.0;                      ///< [currency per unit]; 0 means alpha -> 0+.
  std::optional<double> to = {};          ///< [currency per unit]; absent: no upper end.
  double penalty_from = 0.0;              ///< Z of the choice at `from` [currency]
  std::optional<double> penalty_to = {};  ///< Z of the choice at `to`; absent where `to` is.
  /// The designs of the choice by rising alpha; their ranges join without gap. The last one's C and
  /// m say how Z goes on where there is no upper end.
  std::vector<RulerVertex> vertices = {};
  /// By rising alpha; ranges join without gap and cover the stretch. Empty: there is no other
  /// label.
  std::vector<RunnerUp> runners_up = {};
};

/// Rows that equal the choice at one alpha only.
struct RulerTie {
  double alpha = 0.0;  ///< A breakpoint [currency per unit].
  std::vector<std::uint32_t> rows =
      {};  ///< By falling m, then index; the two vertices are not among them.
};

/// A non-dominated row that is the choice at no alpha.
struct UnsupportedRow {
  std::uint32_t row = 0;
  std::uint32_t label = 0;
  double least_regret = 0.0;  ///< Z of the row less the Z of the choice, the least over all alpha.
  double alpha = 0.0;         ///< Where it is [currency per unit].
};

/// Which choice has the least penalty for which exchange constant.
struct Ruler {
  std::vector<RulerStretch> stretches = {};      ///< By rising alpha.
  std::vector<RulerTie> ties = {};               ///< By rising alpha.
  std::vector<UnsupportedRow> unsupported = {};  ///< By rising alpha, falling m, then index.

  /// The stretch that holds alpha; at a breakpoint the one that ends there, at the lower end of the
  /// ruler the first one. Absent: alpha is outside the ruler, or the ruler is empty.
  [[nodiscard]] BISMAR_API std::optional<std::size_t> stretch_at(double alpha) const;
};

/// The exchange ruler: for every alpha the label whose best row minimises
///
///     Z = C + alpha m
///
/// over the rows (m, C) of a table. It is the lower-left hull of the non-dominated rows; between
/// neighbouring vertices the choice changes at the breakpoint alpha = -dC / dm, computed from the
/// two vertices as (C_2 - C_1) / (m_1 - m_2), three roundings. Consecutive vertices of one label
/// make one stretch; a label may come back in a later stretch.
///
/// Ends: alpha -> 0+ chooses the lexicographic minimum of (C, m), alpha -> infinity that of (m, C).
///
/// Ties: rows with the objectives of a vertex share it, and the first row's label is the label. A
/// row that lies exactly on a hull edge (decided in exact arithmetic) is a tie at that breakpoint
/// and makes no stretch; so does a vertex whose range would be empty because its two breakpoints
/// are equal after rounding. The vertices so left out cost at most some 1e-15 of the cost
/// difference.
///
/// Runner-up: the lower envelope of all rows, dominated ones included, whose label is not the
/// stretch's. Along one runner-up the regret is convex in alpha, so it is greatest at an end.
/// Regrets within 4 epsilon of the two costs' difference count as 0.
///
/// Unsupported rows: non-dominated rows above the hull; their regret is least at the breakpoint
/// between the vertices on either side of them. `unsupported` is about all alpha > 0, whatever the
/// range asked for; stretches, vertices, runners-up and ties are cut to the range.
///
/// Time O(n log n) in the worst case (a sort; every row takes part in the envelopes of at most
/// three stretches), memory O(n). Objectives may be negative. No row gives an empty ruler.
/// Multiplying a column by a power of two changes the result by exactly that factor, short of
/// under- or overflow.
///
/// @param objectives  n x 2, row by row: m (the priced quantity) [unit], C [currency].
/// @param labels      [n]; what the choice is about: numbers of materials, shapes, routes or
/// designs.
/// @throws bismar::Error  All faults at once. invalid_argument: odd number of values or too many
/// rows
///         ("objectives"); not_finite: NaN or infinity, out_of_range: a magnitude above 2^1022,
///         whose differences could overflow ("objectives[row][column]"); conflict: lengths
///         ("labels"); not_finite or out_of_range: the range ("from", "to"). After these,
///         out_of_range: a breakpoint leaves the range of double ("objectives").
///
/// Source of the switch and of unsupported rows: checks SEL-052 and SEL-053.
[[nodiscard]] BISMAR_API Ruler exchange_ruler(std::span<const double> objectives,
                                              std::span<const std::uint32_t> labels,
                                              const RulerOptions& options = {});

}  // namespace bismar
