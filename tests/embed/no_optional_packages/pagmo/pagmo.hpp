// SPDX-License-Identifier: MIT
// Stands before the real header where the core is built alone.
#error "bismar::core must not include <pagmo/pagmo.hpp>"
