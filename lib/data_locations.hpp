// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <string>
#include <vector>

namespace bismar::detail {

/// The folders in which the starter tables may lie, the likeliest first; a caller takes the first
/// one that exists. They are, in this order:
///
/// 1. the data folder of the installation that this code was loaded from, found relative to the
///    shared library (static builds: to the program), so that an installed tree can be moved;
/// 2. the data folder of the source tree, only while the code runs from its build tree;
/// 3. the data folder of the prefix that was configured.
///
/// No environment variable is read and no folder is opened.
BISMAR_API std::vector<std::string> data_locations();

}  // namespace bismar::detail
