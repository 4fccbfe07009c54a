// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/job/job.hpp>
#include <bismar/sizing/front.hpp>

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// The answer to one part of a job.
struct PartResult {
  Result result;  ///< `result.part` is the name of the part.
  std::optional<ExchangeRuler> ruler;
};

/// A result as JSON, with everything that is needed to check it again: the job's text, the digests
/// of the tables it was read with, every kept design with all utilisations and cost lines, every
/// other feasible point, funnel, ruler, undecided candidates, notes and the caution.
///
/// Values are SI and in the job's currency. A design and a point carry "size", the height of a
/// shape or the id of a stock size, and "free_sizes", the free dimensions beside the height in the
/// order of free_dimensions(), as many as the shape has. "epsilon_reached" is null where a search
/// could not be finished. Numbers are the shortest text that reads back as the same double.
/// `digest` is taken over everything but itself and `telemetry`, so equal results have equal
/// digests; it notices accidents, not forgery. Ends with a line end.
///
/// @throws bismar::Error  unknown_name: a result of a part that the job does not have.
/// @throws bismar::InternalError  a number that is not finite, `epsilon_reached` apart.
[[nodiscard]] BISMAR_API std::string result_json(const Job& job,
                                                 std::span<const PartResult> results);

/// A stored result, read back.
struct StoredResult {
  int version = result_format_version;
  std::string library;  ///< Version of the library that wrote it.
  Job job;              ///< Loaded again from the embedded text, with the tables of today.
  std::vector<CatalogueSource> sources;  ///< The tables of then.
  std::vector<PartResult> results;
  std::string digest;         ///< As stored.
  std::string actual_digest;  ///< Of what the file contains.
  /// What the tables of today do not have any more, one sentence each; the candidates concerned
  /// have `material == Candidate::none`.
  std::vector<std::string> unresolved;
};

/// Reads what `result_json` wrote.
///
/// @param path    A result file; tables of the job are looked for relative to `folder`, or to the
///   folder of the file where `folder` is empty.
/// @throws bismar::Error  table_unreadable, json_malformed, version_unsupported, missing,
/// wrong_type,
///   unknown_name, and the faults of the embedded job.
[[nodiscard]] BISMAR_API StoredResult read_result(const std::string& path,
                                                  const std::string& folder = {});
[[nodiscard]] BISMAR_API StoredResult read_result_text(std::string_view text,
                                                       const std::string& name,
                                                       const std::string& folder = {});

/// A point in which a stored result and today's evaluation differ.
struct Difference {
  std::string where;   ///< "part / design / utilisation yield, service"; or "catalogue", "digest".
  std::string stored;  ///< What the file says.
  std::string recomputed;  ///< What it is today.
  [[nodiscard]] BISMAR_API std::string text() const;
};

/// What a verification looked at and found.
struct Verification {
  std::size_t designs = 0;          ///< Designs evaluated anew.
  std::size_t values = 0;           ///< Numbers compared.
  double largest_difference = 0.0;  ///< Largest relative difference among them.
  std::vector<Difference> differences;
};

/// Largest relative difference that counts as equal: |a - b| <= tolerance max(1, |a|, |b|).
inline constexpr double verify_tolerance = 1e-9;

/// Evaluates every stored design anew with `evaluate` and compares mass, cost, cost lines and every
/// utilisation; checks that each design holds all limits, that no stored point dominates a design
/// of the front, that the funnel adds up, and that the digest and the tables are the same. It does
/// not search for designs that are missing: that takes a new run.
[[nodiscard]] BISMAR_API Verification verify(const StoredResult& stored);

}  // namespace bismar
