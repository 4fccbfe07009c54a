// SPDX-License-Identifier: MIT
// Pieces of text that several reports share.
#pragma once

#include <bismar/report/text_report.hpp>

#include <optional>
#include <string>
#include <string_view>

namespace bismar::report {

inline constexpr std::string_view bold_on = "\x1b[1m";
inline constexpr std::string_view emphasis_off = "\x1b[0m";

inline std::string emphasised(std::string_view text, bool colour) {
  if (!colour) return std::string(text);
  return std::string(bold_on).append(text).append(emphasis_off);
}

/// "up to 3.20", "3.20 to 14.1", "from 14.1", "any".
std::string alpha_span(double from, const std::optional<double>& to);

/// How far a runner-up is behind at one alpha [currency]: its C + alpha m less the least of the
/// front. Convex in alpha over a sub-stretch: the choice may change its design within it.
double regret(const Result& result, const NamedStretch::RunnerUp& runner_up, double alpha);

/// How far a runner-up is behind over its sub-stretch, from the least to the most: "0.12 to 0.40",
/// "from 0.40 upwards".
std::string regret_span(const Result& result, const NamedStretch::RunnerUp& runner_up);

/// The material of a design as people call it.
std::string material_of(const Design& design);

/// A ruler's choice as people call it: the name of the material where the choice is a material's
/// id.
std::string choice_name(const Result& result, const std::string& choice);

/// What the search of shapes with several free sizes promises, in one sentence; empty where none
/// was made.
std::string promise_line(const Result& result);

std::string ruler_table(const Result& result,
                        const ExchangeRuler& ruler,
                        const TextOptions& options);
std::string utilisation_table(const Design& design, const TextOptions& options);
std::string cost_table(const Design& design, std::string_view currency, const TextOptions& options);

}  // namespace bismar::report
