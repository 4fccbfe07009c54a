// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/study.hpp"

#include <string>
#include <vector>

namespace bismar {

/// The numbers a design rests on, each with its table, row, source, basis and evidence.
[[nodiscard]] std::vector<std::string> provenance_lines(const SizingProblem& problem,
                                                        std::size_t group,
                                                        const Design& design);

/// Every limit state at the design, one line each, the governing one with its steps, indented by
/// two spaces.
[[nodiscard]] std::vector<std::string> limit_lines(const SizingProblem& problem,
                                                   std::size_t group,
                                                   const Design& design);

/// Why a candidate is infeasible, and what would let it in.
[[nodiscard]] std::vector<std::string> infeasible_lines(SizingProblem& problem,
                                                        const Outcome& outcome);

/// "0.512 kg", "12.34 EUR".
[[nodiscard]] std::string mass_text(double kilograms);
[[nodiscard]] std::string money_text(double amount, const std::string& currency);

}  // namespace bismar
