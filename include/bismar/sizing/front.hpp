// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/numeric/parallel.hpp>
#include <bismar/sizing/result.hpp>

#include <functional>
#include <stop_token>
#include <string>
#include <vector>

namespace bismar {

/// What spares a front work. None changes the result; each can be switched off to see that, and
/// what it is worth.
struct Reductions {
  bool material_limits = true;  ///< What a material fails by itself is asked before any section.
  bool dominance = true;   ///< A material that another replaces is looked at only near the front.
  bool bounds = true;      ///< Bounds in which powers of material values stand outside the loop.
  bool skipping = true;    ///< What lies beyond the front and its near designs is not solved.
  bool one_point = true;   ///< Where mass and cost agree a candidate has one point, polished.
  bool directions = true;  ///< The size along which all is monotone is solved for, not split.
};

struct RunOptions {
  /// Called with the share done in [0, 1], from the calling thread, at most about 20 times a
  /// second.
  std::function<void(double)> progress = {};
  std::stop_token stop = {};
  unsigned threads = 1;    ///< 0: as the machine has.
  Executor executor = {};  ///< The host's threads; empty: threads of this call's own.
  Reductions reductions = {};
};

/// Mass-cost front of a part: minimise (mass, unit cost) over material x section x size x route,
/// subject to every utilisation <= 1.
///
/// Result by definition: for each candidate its own points, a function of the job and the candidate
/// alone. Stock and size lists: every size. One free size: the root to 1e-9 in the size on the
/// feasible side. Several free sizes: what branch and bound with certified bounds returns, so that
/// for every size whose utilisations are all <= 1 - delta a point is within epsilon in mass and
/// cost, relative; one polished point where cost follows mass. The front is the non-dominated
/// subset of their union; equal objective vectors are kept as ties; designs within `near` of it
/// follow. Under Explain::front what others beat by more than max(epsilon, near) is skipped: only
/// the funnel tells less then, `others` is empty, and where nothing at all is feasible every
/// candidate is examined after all, for the reasons.
///
/// Results are ordered by (mass, cost, material, shape, route, treatment, finish ids, sizes) and
/// depend neither on the order of the tables, on threads or reductions (`telemetry` apart), nor on
/// locale, flush-to-zero or rounding mode of the caller.
///
/// The bounds of shapes with several free sizes rest on trends of section properties that were
/// observed on hundreds of thousands of random sections, not proved (section_box.hpp).
///
/// @throws bismar::Error  every fault of the part (see validate()).
/// A design whose re-evaluation on the plain path differs by more than 1e-12 is left out and named
/// in the notes.
[[nodiscard]] BISMAR_API Result front(const Part& part,
                                      const Catalogue& catalogue,
                                      const Settings& settings = {},
                                      const RunOptions& run = {});

/// Fronts of groups: in each, skipping and dominance act only inside the group.
enum class GroupBy : std::uint8_t { material, stock_item, material_and_shape, route };
struct GroupedFront {
  std::string group;                  ///< Label.
  std::vector<FeasiblePoint> points;  ///< Non-dominated within the group, by rising mass.
};
[[nodiscard]] BISMAR_API std::vector<GroupedFront> fronts(const Part& part,
                                                          const Catalogue& catalogue,
                                                          GroupBy group_by,
                                                          const Settings& settings = {});

/// The exchange ruler of a result: which choice has the least Z = cost + alpha mass for which
/// alpha.
///
/// @param part, catalogue, settings  Those that the result was made with: its designs are looked up
/// in them.
/// @throws bismar::Error  conflict: they do not fit the result.
[[nodiscard]] BISMAR_API ExchangeRuler exchange_ruler(const Result& result,
                                                      const Part& part,
                                                      const Catalogue& catalogue,
                                                      Per per = Per::material,
                                                      const Settings& settings = {});

/// Where one material stands, and why.
struct Answer {
  enum class Standing : std::uint8_t {
    front,
    near,
    dominated,
    infeasible,
    undecided,
    cannot_exist
  };
  Standing standing = Standing::cannot_exist;
  std::string headline;  ///< One sentence.
  /// What follows from it: stretches of alpha, by what it is beaten, what would let it in, broken
  /// rules.
  std::vector<std::string> lines;
  std::optional<Design> design;  ///< The material's best design, where it has one.
  /// How each limit state of that design comes about, a line each; the steps of the governing one
  /// follow its line, indented by two spaces.
  std::vector<std::string> checks;
  /// What a better material or the next size would bring (see design_indices), a sentence each.
  std::vector<std::string> index;
  /// The numbers that the design rests on, each with its table, line, source, basis and evidence.
  std::vector<std::string> sources;
};
/// @throws bismar::Error (unknown_name) with the nearest id.
[[nodiscard]] BISMAR_API Answer why(const std::string& material,
                                    const Part& part,
                                    const Catalogue& catalogue,
                                    const Settings& settings = {});

/// Re-evaluates one candidate at one size on the plain scalar path.
/// @param size height [m], or the index of the item for stock.
/// @param free_sizes  The other free dimensions of its shape [m].
/// @throws bismar::Error  when the part does not admit the candidate, it cannot exist, a property
/// it needs is
///   missing, or the size is not one of those that the part asks for.
[[nodiscard]] BISMAR_API Design evaluate(const Part& part,
                                         const Catalogue& catalogue,
                                         const Candidate& candidate,
                                         double size,
                                         const Settings& settings = {});
[[nodiscard]] BISMAR_API Design evaluate(const Part& part,
                                         const Catalogue& catalogue,
                                         const Candidate& candidate,
                                         double size,
                                         const FreeSizes& free_sizes,
                                         const Settings& settings = {});

}  // namespace bismar
