// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/error.hpp>

#include <string>
#include <vector>

namespace bismar::test {

/// The places of the faults that a call throws; empty when it throws none.
template <typename Call>
std::vector<std::string> fault_places(const Call& call) {
  std::vector<std::string> found;
  try {
    call();
  } catch (const Error& error) {
    for (const Fault& fault : error.faults()) {
      found.push_back(fault.where);
    }
  }
  return found;
}

}  // namespace bismar::test
