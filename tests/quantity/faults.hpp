// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>

#include "support/catch.hpp"

namespace quantity_test {

/// The one fault of a call that must fail; the test case ends when it does not.
template <class Call>
bismar::Fault fault_of(Call&& call) {
  try {
    static_cast<void>(call());
  } catch (const bismar::Error& error) {
    REQUIRE(error.faults().size() == 1);
    return error.faults()[0];
  }
  FAIL("an error was expected");
  return {};
}

inline bool contains(const std::string& text, std::string_view part) {
  return text.find(part) != std::string::npos;
}

}  // namespace quantity_test
