// SPDX-License-Identifier: MIT
#pragma once

#include "format.hpp"

namespace bismar::detail {

/// "member" of a part: length, shapes, stock, load cases, details.
[[nodiscard]] Format member_format();

}  // namespace bismar::detail
