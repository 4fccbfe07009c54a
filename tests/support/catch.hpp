// SPDX-License-Identifier: MIT
// One include for Catch2 version 2 and version 3.
#pragma once

#if __has_include(<catch2/catch_all.hpp>)
#include <catch2/catch_all.hpp>
using Catch::Approx;  // NOLINT(google-global-names-in-headers): version 2 has it there too
#else
#include <catch2/catch.hpp>
#endif
