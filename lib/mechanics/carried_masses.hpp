// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/mechanics/member.hpp>

#include <optional>
#include <span>

namespace bismar::mechanics {

/// Faults of the masses and the second support of a vibrating beam, see vibration.hpp. A length
/// that is itself wrong is not compared with.
void require_carried(FaultList& faults,
                     double length,
                     Support support,
                     std::span<const AttachedMass> masses,
                     const std::optional<double>& second_support);

}  // namespace bismar::mechanics
