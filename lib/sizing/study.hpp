// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/enumeration.hpp"
#include "sizing/problem.hpp"

#include <bismar/export.hpp>
#include <bismar/sizing/existence.hpp>
#include <bismar/sizing/front.hpp>
#include <bismar/solver/certified_front.hpp>

#include <chrono>
#include <map>
#include <memory>
#include <set>
#include <string>
#include <vector>

namespace bismar {

/// What became of a candidate that can exist.
struct Outcome {
  enum class Kind : std::uint8_t { undecided, excluded, infeasible, feasible, skipped };
  struct Point {
    double size = 0.0;
    FreeSizes free_sizes = {};
    double mass = 0.0;
    double cost = 0.0;
    double epsilon = 0.0;  ///< With which it and its like keep the promise for their candidate.
  };
  static constexpr std::size_t no_group = SIZE_MAX;
  Candidate candidate;
  std::size_t group = no_group;  ///< In the problem, where it is kept there.
  Kind kind = Kind::infeasible;
  std::string reason;               ///< Missing properties, or the limit that excludes it.
  std::vector<std::size_t> failed;  ///< Infeasible: the constraints of that reason.
  double least_utilisation = 0.0;   ///< Infeasible: the least value the excluding limit can have.
  std::vector<Point> points;        ///< Feasible: its non-dominated points.
  bool searched = false;            ///< Its shape has free dimensions.
  bool partly_skipped = false;      ///< Some of its groups were beaten before they were solved.
};

/// The candidates of a part, solved as far as asked.
struct Solved {
  std::unique_ptr<SizingProblem> problem;
  /// Of one material all that can exist, their groups kept in the problem; of all materials those
  /// with points.
  std::vector<Outcome> outcomes;
  // What became of the others, for the funnel.
  std::map<Rule, std::size_t> cannot_exist;
  std::map<std::string, std::size_t> undecided;   ///< By reason.
  std::map<std::string, std::size_t> excluded;    ///< By what is missing.
  std::map<std::string, std::size_t> infeasible;  ///< By limit.
  std::set<std::string> undecided_text;           ///< "material: reason"
  std::size_t not_better = 0;                     ///< Left out or skipped: not examined.
  std::size_t considered = 0;
  std::size_t doubtful_sizes = 0;
  std::size_t evaluations = 0;
  std::size_t boxes = 0;
  std::size_t skipped = 0;
  std::size_t dominated = 0;
  bool searched = false;    ///< Whether there were candidates with free dimensions.
  bool incomplete = false;  ///< Whether one of them ran out of boxes.
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

/// Solves the candidates of one material, or of all (`material` == Candidate::none).
/// The part, catalogue and settings must outlive the result.
[[nodiscard]] BISMAR_API Solved solve_candidates(const Part& part,
                                                 const Catalogue& catalogue,
                                                 const Settings& settings,
                                                 const RunOptions& run = {},
                                                 std::uint32_t material = Candidate::none);

/// Solves a candidate; nothing where it turns out that it cannot exist.
/// @param keep_group  Whether its group stays in the problem.
/// @param solved  Its counts are added to.
[[nodiscard]] std::optional<Outcome> solve_candidate(SizingProblem& problem,
                                                     const Candidate& candidate,
                                                     const RunOptions& run,
                                                     Incumbent* incumbent,
                                                     bool keep_group,
                                                     Solved& solved);

/// What a candidate is left undecided for: missing properties, then open limits.
[[nodiscard]] std::string missing_text(std::span<const Property> properties,
                                       std::span<const std::string> limits);

/// Keeps what has points and counts the rest.
void keep_or_count(Outcome outcome, const Part& part, const Catalogue& catalogue, Solved& solved);

/// Calls the progress callback at most about twenty times a second.
class Progress {
 public:
  explicit Progress(const RunOptions& run) : run_(run) {}
  void at(double share) {
    const auto now = std::chrono::steady_clock::now();
    if (run_.progress && now - last_ >= std::chrono::milliseconds(50)) {
      last_ = now;
      run_.progress(share);
    }
  }

 private:
  const RunOptions& run_;
  std::chrono::steady_clock::time_point last_ = std::chrono::steady_clock::now();
};

/// Solves a candidate whose shape has free dimensions to the study's epsilon and delta.
[[nodiscard]] Outcome solve_free(SizingProblem& problem,
                                 const Candidate& candidate,
                                 const RunOptions& run,
                                 Incumbent* incumbent,
                                 Solved& solved);

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
/// The design of an outcome's point; where its shape has free dimensions the candidate is compiled
/// anew with its ratios, as the last group.
[[nodiscard]] Design make_design(SizingProblem& problem,
                                 const Outcome& outcome,
                                 const Outcome::Point& point,
                                 std::size_t& group);

/// "24.3 x 19.4 mm".
[[nodiscard]] std::string size_text(const SectionProperties& section);

}  // namespace bismar
