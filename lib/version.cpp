// SPDX-License-Identifier: MIT
#include <bismar/version.hpp>

namespace bismar {

std::string_view version() noexcept { return BISMAR_VERSION; }

}  // namespace bismar
