// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/export.hpp>
#include <bismar/quantity/currency.hpp>
#include <bismar/sizing/part.hpp>

#include <cstddef>
#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// Version of the job format; raised when a reader of the old one could misread the new one.
inline constexpr int job_format_version = 1;

/// A table that a job was read with, and what stood in it.
struct CatalogueSource {
  std::string kind;    ///< "materials", "stock", "routes", "finishes" or "operations".
  std::string file;    ///< "starter", or the path as the job writes it.
  std::string digest;  ///< "fnv1a64:" and 16 hexadecimal digits over the bytes of the file(s).
  friend bool operator==(const CatalogueSource&, const CatalogueSource&) = default;
};

/// The exchange constants that a job is interested in.
struct ExchangeRange {
  double from = 0.0;  ///< [currency/kg], > 0.
  double to = 0.0;    ///< [currency/kg], > from.
};

/// A job as loaded: everything in SI units and the job's currency, names resolved, tables read.
struct Job {
  int version = job_format_version;
  std::string title;
  std::string currency = "EUR";  ///< ISO 4217 code; also the catalogue's.
  CurrencyRates rates{"EUR"};
  Catalogue catalogue;
  std::vector<CatalogueSource> sources;  ///< In the order of reading.
  Settings settings;
  std::vector<Part> parts;  ///< At least one; names differ.
  std::optional<ExchangeRange> exchange;
  std::string text;    ///< The job without comments, keys in their order, on one line.
  std::string folder;  ///< The folder that table paths are relative to.
  std::map<std::string, std::string> places;  ///< JSON pointer -> "file:line:column".
};

/// Reads a job file: JSON with // and /* */ comments, see `job_schema()` and data/jobs.
///
/// Paths of tables are relative to the folder of the job file. Prices of tables in another currency
/// than the job's are converted with the job's rates.
///
/// @throws bismar::Error  every fault at once, each with "file:line:column /pointer":
/// table_unreadable
///   (the job file itself); json_malformed; not_finite; duplicate (keys, names, ids); unknown_key;
///   wrong_type; missing; version_unsupported; unknown_name (with the nearest word); unit_missing
///   (a bare number), unit_unknown, unit_wrong, unit_ambiguous, number_malformed; out_of_range;
///   conflict; empty; and the faults of the tables with file:row:column.
[[nodiscard]] BISMAR_API Job load_job(const std::string& path);

/// The same for a text in memory.
/// @param name    Stands for the file in every place.
/// @param folder  What paths of tables are relative to; empty = the working folder.
[[nodiscard]] BISMAR_API Job load_job_text(std::string_view text,
                                           const std::string& name,
                                           const std::string& folder = {});

/// Checks every part against the catalogue without solving it.
/// @throws bismar::Error  every fault, each with "file:line:column /pointer".
BISMAR_API void validate(const Job& job);

/// The index of the part with this name.
/// @throws bismar::Error  unknown_name, with the nearest name.
[[nodiscard]] BISMAR_API std::size_t find_part(const Job& job, std::string_view name);

/// The JSON Schema (draft-07) of the job format, ending with a line end. It is written from the
/// same description that the loader checks against; what it cannot say (units, names,
/// contradictions) the loader still checks.
[[nodiscard]] BISMAR_API std::string job_schema();

/// A starter job for a member, with comments; `load_job_text` accepts it.
[[nodiscard]] BISMAR_API std::string starter_job();

}  // namespace bismar
