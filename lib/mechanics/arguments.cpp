// SPDX-License-Identifier: MIT
#include "mechanics/arguments.hpp"

#include "mechanics/text.hpp"

#include <cmath>
#include <string>
#include <utility>

namespace bismar::mechanics {

namespace {

void add(
    FaultList& faults, Code code, std::string_view where, double value, std::string_view allowed) {
  Fault fault;
  fault.code = code;
  fault.where = std::string(where);
  fault.found = std::isnan(value) ? "not a number" : number(value, 6);
  fault.allowed = std::string(allowed);
  fault.message = "Found " + fault.found + "; it must be " + fault.allowed + ".";
  faults.add(std::move(fault));
}

}  // namespace

void require_finite(FaultList& faults, std::string_view where, double value) {
  if (!std::isfinite(value)) {
    add(faults, Code::not_finite, where, value, "a finite number");
  }
}

void require_positive(FaultList& faults, std::string_view where, double value) {
  if (!std::isfinite(value)) {
    add(faults, Code::not_finite, where, value, "a finite number above zero");
  } else if (value <= 0.0) {
    add(faults, Code::out_of_range, where, value, "above zero");
  }
}

void require_not_negative(FaultList& faults, std::string_view where, double value) {
  if (!std::isfinite(value)) {
    add(faults, Code::not_finite, where, value, "a finite number, zero or above");
  } else if (value < 0.0) {
    add(faults, Code::out_of_range, where, value, "zero or above");
  }
}

void add_out_of_range(FaultList& faults,
                      std::string_view where,
                      double value,
                      std::string_view allowed) {
  add(faults, Code::out_of_range, where, value, allowed);
}

}  // namespace bismar::mechanics
