// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/solver/certified_front.hpp>

#include <cstddef>

namespace bismar {

/// Adds what is wrong with the options, for that many objectives.
void add_option_faults(const CertifyOptions& options, std::size_t objectives, FaultList& faults);

/// Adds what is wrong with a group's variables, or with asking an epsilon of 0 of them.
void add_group_faults(const BoxProblem& problem,
                      std::size_t group,
                      const CertifyOptions& options,
                      FaultList& faults);

}  // namespace bismar
