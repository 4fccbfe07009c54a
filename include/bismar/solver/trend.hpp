// SPDX-License-Identifier: MIT
#pragma once

#include <cstdint>

namespace bismar {

/// How a quantity moves when one other quantity grows and all else stays.
enum class Trend : std::uint8_t { constant, rises, falls, neither };

}  // namespace bismar
