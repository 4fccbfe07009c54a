// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <optional>
#include <string>
#include <vector>

namespace bismar {

/// The value of a limited property in a row, whether of the library's properties or an extra
/// column.
[[nodiscard]] std::optional<Range> limited_value(const MaterialTable& table,
                                                 const PropertyLimit& limit,
                                                 std::size_t row);
/// The end of its range that counts: the study's own where it names one, otherwise the one on the
/// safe side.
[[nodiscard]] double limited_end(const PropertyReader& reader,
                                 const PropertyLimit& limit,
                                 const Range& range,
                                 bool at_least);

/// Limits of the job that a missing value of the material leaves open.
[[nodiscard]] std::vector<std::string> open_limits(const SizingProblem& problem,
                                                   std::uint32_t material,
                                                   const StepState& step);

/// Whether density, price, a strength or a limit of the job lacks its value in some thickness step,
/// whatever the section.
[[nodiscard]] bool lacks_value(SizingProblem& problem, std::uint32_t material);
/// Whether a candidate of a free shape lacks a value, for some of its proportions.
[[nodiscard]] bool lacks_value(SizingProblem& problem, const Candidate& candidate);

/// What of a material decides whether it lacks a value and which limit states it meets, packed.
[[nodiscard]] std::string traits(SizingProblem& problem, std::uint32_t material);

}  // namespace bismar
