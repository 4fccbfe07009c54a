// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/sizing/front.hpp>

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// How a text report looks.
struct TextOptions {
  std::size_t width = 100;  ///< Columns that tables and paragraphs keep to.
  bool colour = false;      ///< Emphasis by terminal escape sequences (bold and dim only).
  bool all = false;  ///< Every kept design on a line of its own, every reason and undecided one.
  bool reasons = false;  ///< The funnel also by reason.
  double fold = 0.02;    ///< Designs this close in mass and cost stand under one representative.
  double near = 0.05;    ///< The band in which near designs were kept, for the words only.
};

/// The caution that ends every report.
[[nodiscard]] BISMAR_API std::string_view caution();

/// A front design that stands for those close to it.
struct Representative {
  std::size_t design = 0;          ///< Index into Result::designs, on the front.
  std::vector<std::size_t> alike;  ///< Front and near designs within the fold, ascending.
};

/// Folds designs that the input data cannot tell apart.
///
/// Design d stands under representative r when |m_d - m_r| <= fold m_r and |C_d - C_r| <= fold C_r.
/// Every front design is a representative or stands under the first one that admits it; those the
/// ruler chooses become representatives first, then the others, each in the order of the result.
/// Near designs never represent.
/// @param ruler  May be null.
/// @return by rising index; every front design occurs exactly once.
[[nodiscard]] BISMAR_API std::vector<Representative> fold_front(const Result& result,
                                                                const ExchangeRuler* ruler,
                                                                double fold);

/// "ellipse 24.3 x 19.4 mm", or the designation of a stock item.
[[nodiscard]] BISMAR_API std::string shape_and_size(const Design& design);
/// "hot-forging + quench-temper + zinc-plating": route, treatment and finish, those there are.
[[nodiscard]] BISMAR_API std::string made_by(const Design& design);

/// The answer to a mass-cost study as plain text: headline, funnel, front, factors, ruler, notes
/// and marks, what is undecided, caution. Lines end with a line feed.
/// @param ruler  Null leaves the ruler out.
[[nodiscard]] BISMAR_API std::string front_text(const Result& result,
                                                const ExchangeRuler* ruler,
                                                const TextOptions& options = {});

/// The exchange ruler alone as plain text, and the caution. Lines end with a line feed.
[[nodiscard]] BISMAR_API std::string ruler_text(const Result& result,
                                                const ExchangeRuler& ruler,
                                                const TextOptions& options = {});

/// Where one material stands, and why, with all utilisations and the account of its cost.
[[nodiscard]] BISMAR_API std::string why_text(const Answer& answer,
                                              std::string_view currency,
                                              const TextOptions& options = {});

/// What a valid job says, in the units of the shop: to be read over before it is solved.
[[nodiscard]] BISMAR_API std::string check_text(const Part& part,
                                                const Catalogue& catalogue,
                                                const TextOptions& options = {});

/// How CSV is written.
struct CsvOptions {
  char delimiter = ',';
  bool near = true;  ///< Near designs too.
};

/// The designs as CSV (RFC 4180), units in the headers, a column for each limit state in each load
/// case. Masses and money are the shortest text that reads back as the same double; lengths are in
/// mm with 15 significant digits.
[[nodiscard]] BISMAR_API std::string front_csv(const Result& result,
                                               const CsvOptions& options = {});

/// The ruler as CSV: one row for each runner-up sub-stretch of each stretch. An empty cell under
/// "to" means: no upper end.
[[nodiscard]] BISMAR_API std::string ruler_csv(const Result& result,
                                               const ExchangeRuler& ruler,
                                               const CsvOptions& options = {});

}  // namespace bismar
