// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <bismar/export.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/front.hpp>

#include <map>
#include <memory>
#include <set>
#include <string>
#include <vector>

namespace bismar {

/// What became of a candidate that can exist.
struct Outcome {
  enum class Kind : std::uint8_t { undecided, excluded, infeasible, feasible };
  struct Point {
    double size = 0.0;
    double mass = 0.0;
    double cost = 0.0;
  };
  Candidate candidate;
  std::size_t group = 0;  ///< In the problem.
  Kind kind = Kind::infeasible;
  std::string reason;               ///< Missing properties, or the limit that excludes it.
  std::vector<std::size_t> failed;  ///< Infeasible: the constraints of that reason.
  double least_utilisation = 0.0;   ///< Infeasible: the least value the excluding limit can have.
  std::vector<Point> points;        ///< Feasible: its non-dominated points.
};

/// Every candidate of a part, solved.
struct Solved {
  std::unique_ptr<SizingProblem> problem;
  std::vector<Outcome> outcomes;
  std::map<Rule, std::size_t> cannot_exist;
  std::size_t considered = 0;
  std::size_t doubtful_sizes = 0;
  std::size_t evaluations = 0;
  bool stopped = false;
};

/// Names of a candidate, for labels, ids and the canonical order.
struct CandidateNames {
  std::string material;
  std::string shape;
  std::string route;
  std::string treatment;
  std::string finish;
  // NOLINTNEXTLINE(modernize-use-nullptr): the 0 is the compiler's own
  friend auto operator<=>(const CandidateNames&, const CandidateNames&) = default;
};
[[nodiscard]] CandidateNames names(const Candidate& candidate,
                                   const Part& part,
                                   const Catalogue& catalogue);

/// Indices of the part's stock lists and finishes in the catalogue ("all" expanded; "none" is
/// Candidate::none).
[[nodiscard]] std::vector<std::uint32_t> stock_lists(const Part& part, const Catalogue& catalogue);
[[nodiscard]] std::vector<std::uint32_t> finish_choices(const Part& part,
                                                        const Catalogue& catalogue);
[[nodiscard]] std::vector<std::uint32_t> route_choices(const Part& part,
                                                       const Catalogue& catalogue);

/// Solves the candidates of one material, or of all (`material` == Candidate::none).
/// The part, catalogue and settings must outlive the result.
[[nodiscard]] BISMAR_API Solved solve_candidates(const Part& part,
                                                 const Catalogue& catalogue,
                                                 const Settings& settings,
                                                 const RunOptions& run = {},
                                                 std::uint32_t material = Candidate::none);

/// Solves one group and brings each point to the feasible side of the plain path.
[[nodiscard]] Outcome solve_group(const SizingProblem& problem,
                                  std::size_t group,
                                  std::size_t& evaluations);

/// Properties that the design's size, mass and cost rest on: density, price, and what the limit
/// states that apply on the piece read.
[[nodiscard]] std::set<Property> properties_read(const SizingProblem& problem,
                                                 const CompiledCandidate& compiled,
                                                 const Piece& piece);

/// The design at a size, on the plain path.
[[nodiscard]] Design make_design(const SizingProblem& problem, std::size_t group, double size);

/// "24.3 x 19.4 mm".
[[nodiscard]] std::string size_text(const SectionProperties& section);

}  // namespace bismar
