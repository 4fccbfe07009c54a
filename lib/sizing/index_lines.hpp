// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/sizing/part.hpp>
#include <bismar/sizing/result.hpp>

#include <string>
#include <vector>

namespace bismar {

/// The material indices of a design in words: what holds it, how its mass goes with each property;
/// of a bought size its neighbours. Empty where it has none.
[[nodiscard]] std::vector<std::string> index_lines(const Design& design,
                                                   const Part& part,
                                                   const Catalogue& catalogue,
                                                   const Settings& settings);

}  // namespace bismar
