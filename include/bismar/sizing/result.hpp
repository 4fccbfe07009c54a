// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/sizing/part.hpp>

#include <array>
#include <cstddef>
#include <cstdint>
#include <optional>
#include <string>
#include <vector>

namespace bismar {

/// Version of the stored result; raised when a reader of the old one could misread the new one.
inline constexpr int result_format_version = 3;

/// One utilisation of a design.
struct Utilisation {
  std::string
      limit;  ///< A limit state's id, or "mass cap", "cost cap", "route section", "route mass".
  std::string load_case;  ///< Empty where no load case is meant.
  double value = 0.0;     ///< u; feasible when <= 1.
  double factor = 1.0;    ///< The factor used.
};

/// One line of a unit cost.
struct CostLine {
  std::string item;     ///< "material", "tooling", "set-up", "machine and labour", "treatment", ...
  double amount = 0.0;  ///< [currency] a part.
  std::string how;      ///< The numbers put in.
};

/// Unit cost with its account.
struct CostBreakdown {
  std::vector<CostLine> lines;  ///< They add up to `total`.
  double total = 0.0;           ///< [currency] a part.
  double low = 0.0;             ///< With every price and route range at its cheap end.
  double high = 0.0;            ///< With every price and route range at its dear end.
  double bought_mass = 0.0;     ///< Material bought for one good part [kg].
  std::string blank;            ///< From what it is made: "round bar 45, 6 of 300 mm from 6 m".
};

/// A candidate: what a part is made of and by, before it has a size. Indices into the catalogue and
/// part.
struct Candidate {
  static constexpr std::uint32_t none = UINT32_MAX;
  std::uint32_t material = 0;
  std::uint32_t shape = none;  ///< Index into Member::shapes, or none for stock.
  std::uint32_t stock = none;  ///< Index into Catalogue::stock, or none for a shape.
  std::uint32_t route = 0;
  std::uint32_t treatment = none;  ///< Index into Catalogue::routes.
  std::uint32_t finish = none;     ///< Index into Catalogue::finishes.
  friend bool operator==(const Candidate&, const Candidate&) = default;
};

/// The free dimensions of a shape beside its height [m], in the order of free_dimensions(); unused
/// ones are 0.
using FreeSizes = std::array<double, 3>;

/// A candidate with its size.
struct Design {
  std::string
      id;  ///< Stable:
           ///< "42crmo4-quenched-and-tempered/ellipse 24.31x19.45/hot-forging+quench-temper/none".
  Candidate candidate;
  std::string material;       ///< Id.
  std::string material_name;  ///< "42CrMo4, quenched and tempered"
  std::string shape;          ///< Family name, or stock list id.
  std::string size_text;      ///< "24.3 x 19.4 mm", or the stock designation.
  std::string stock_item;     ///< Id, empty for a shape.
  std::string route;
  std::string treatment;  ///< Empty for none.
  std::string finish;     ///< "none" for none.
  double size = 0.0;      ///< Height [m]; for stock the index of the item in its list.
  FreeSizes free_sizes = {};
  SectionProperties section;
  double mass = 0.0;                      ///< [kg], finish included.
  double cost = 0.0;                      ///< [currency] a part.
  std::vector<Utilisation> utilisations;  ///< In the order of the limit states, load cases inside.
  std::size_t governing = 0;  ///< Index of the largest utilisation (caps aside unless they bind).
  CostBreakdown cost_breakdown;
  std::vector<std::string>
      notes;  ///< Marks: typical strength divided, unverified, class median used, ...
  /// Continuous sizes: the next size up in the usual 1 mm step (or the step asked for), re-checked
  /// and re-costed.
  std::optional<double> buyable_size;
  double buyable_mass = 0.0;
  double buyable_cost = 0.0;
  bool buyable_feasible = false;
};

/// How many candidates ended where, and why.
struct FunnelLine {
  enum class Stage : std::uint8_t { cannot_exist, undecided, infeasible, not_better, near, front };
  Stage stage = Stage::cannot_exist;
  /// Rule, property, limit. "feasibility not examined" of what Explain::front leaves out as not
  /// better; else empty for the last three.
  std::string reason;
  std::size_t candidates = 0;
};

struct Funnel {
  std::size_t considered =
      0;  ///< All combinations of material, shape or list, route, treatment, finish.
  std::vector<FunnelLine> lines;   ///< In the stated order; counts add up to `considered`.
  std::size_t doubtful_sizes = 0;  ///< Stock sizes that were not offered.
  [[nodiscard]] BISMAR_API std::size_t count(FunnelLine::Stage stage) const;
};

/// A feasible point of a candidate that is neither on nor near the front: enough for plots and
/// rulers.
struct FeasiblePoint {
  Candidate candidate;
  double size = 0.0;
  FreeSizes free_sizes = {};
  double mass = 0.0;
  double cost = 0.0;
};

/// Work done; outside the result's digest. It may differ from run to run.
struct Telemetry {
  std::size_t evaluations = 0;  ///< Designs evaluated.
  std::size_t boxes = 0;        ///< Boxes of sizes bounded.
  std::size_t skipped = 0;      ///< Candidates that others beat before they were solved.
  std::size_t dominated = 0;    ///< Materials set aside because another is no worse in anything.
  double seconds = 0.0;
};

struct Result {
  int version = result_format_version;
  std::string part;
  std::string currency;
  /// Stock, size lists and one-size shapes: exact to 1e-9 in the size.
  bool exact = true;
  /// Where shapes have several free sizes: for every design whose utilisations are all <= 1 -
  /// `delta` some design of the front is within this in both objectives, relative. 0 where none
  /// has; infinity where a search could not be finished.
  double epsilon_reached = 0.0;
  double delta = 0.0;                 ///< 0 where no shape has several free sizes.
  std::vector<Design> designs;        ///< Front first, then near designs; each in canonical order.
  std::size_t front_count = 0;        ///< designs[0, front_count) is the front, by rising mass.
  std::vector<FeasiblePoint> others;  ///< Every other feasible point, canonical order.
  Funnel funnel;
  std::vector<std::string> undecided;  ///< "material: property", for the report.
  std::vector<std::string> notes;      ///< Warnings that concern the whole answer.
  Telemetry telemetry;
};

/// The level at which a choice counts as one.
enum class Per : std::uint8_t { design, material, shape, route };

/// Where a breakpoint may lie over the price and density ranges of its two neighbours.
struct BreakpointBand {
  double low = 0.0;  ///< [currency/kg]
  std::optional<double>
      high;  ///< [currency/kg]; absent: at some ends no worth of a kilogram changes the choice.
};

/// A stretch of the exchange constant with its choice.
struct NamedStretch {
  double from = 0.0;          ///< [currency/kg], inclusive.
  std::optional<double> to;   ///< Absent: no upper end.
  std::size_t design = 0;     ///< Index into Result::designs: the choice at the lower end.
  std::string choice;         ///< Label at the chosen level.
  double penalty_from = 0.0;  ///< Z at the lower end [currency].
  std::optional<double> penalty_to;
  double mass = 0.0;
  double cost = 0.0;
  struct RunnerUp {
    double from = 0.0;
    std::optional<double> to;
    std::string choice;
    Candidate candidate;
    double mass = 0.0;
    double cost = 0.0;
    double regret_from = 0.0;  ///< How far behind at the lower end [currency].
    std::optional<double> regret_to;
  };
  std::vector<RunnerUp> runners_up;
  /// Band of the lower breakpoint over the price and density ranges of the two neighbours
  /// [currency/kg].
  std::optional<BreakpointBand> from_band;
};

struct UnsupportedDesign {
  std::size_t design = 0;  ///< Index into Result::designs.
  double regret = 0.0;     ///< Least regret over all alpha [currency].
  double at = 0.0;         ///< Where [currency/kg].
};

struct ExchangeRuler {
  Per per = Per::material;
  std::vector<NamedStretch> stretches;  ///< From 0 upwards, without gaps.
  std::vector<UnsupportedDesign> unsupported;
};

}  // namespace bismar
