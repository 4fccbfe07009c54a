// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/evolve/evolve.hpp>

#include <cstddef>
#include <vector>

namespace bismar {

/// The search itself, with arguments that were checked.
[[nodiscard]] EvolvedFront search(const BoxProblem& problem,
                                  std::vector<std::size_t> groups,
                                  const EvolveOptions& options);

}  // namespace bismar
