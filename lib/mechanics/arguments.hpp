// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>

#include <string_view>

namespace bismar::mechanics {

/// Adds a fault unless `value` is finite.
void require_finite(FaultList& faults, std::string_view where, double value);
/// Adds a fault unless `value` is finite and greater than zero.
void require_positive(FaultList& faults, std::string_view where, double value);
/// Adds a fault unless `value` is finite and not below zero.
void require_not_negative(FaultList& faults, std::string_view where, double value);
/// Adds an out_of_range fault with the value found and the sentence of what is allowed.
void add_out_of_range(FaultList& faults,
                      std::string_view where,
                      double value,
                      std::string_view allowed);

}  // namespace bismar::mechanics
