// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/part.hpp>

#include <cmath>
#include <optional>
#include <string>
#include <utility>

namespace bismar {

/// Collects the faults of one part; places are JSON pointers inside it, as a job writes them.
class PartFaults {
 public:
  void fault(
      Code code, std::string where, std::string found, std::string allowed, std::string message) {
    list_.add({code, std::move(where), std::move(found), std::move(allowed), std::move(message)});
  }

  /// A finite positive number, or a fault.
  bool positive(double value, const std::string& where, const std::string& what) {
    if (std::isfinite(value) && value > 0.0) {
      return true;
    }
    fault(std::isfinite(value) ? Code::out_of_range : Code::not_finite,
          where,
          plain(value),
          "a positive number",
          "The " + what + " must be finite and above zero; it is " + plain(value) + ".");
    return false;
  }

  void optional_positive(const std::optional<double>& value,
                         const std::string& where,
                         const std::string& what) {
    if (value) {
      positive(*value, where, what);
    }
  }

  void append(const Error& error, const std::string& where) { list_.append(error, where); }
  void add(Fault fault) { list_.add(std::move(fault)); }
  [[nodiscard]] std::size_t size() const { return list_.size(); }
  void throw_if_any() const { list_.throw_if_any(); }

 private:
  FaultList list_;
};

/// Shapes: ratios, bounds, sizes, outlines.
void validate_shapes(const Part& part, PartFaults& faults);
/// Load cases, with the limits that they must be able to answer, and the details of the member.
void validate_loads(const Part& part, PartFaults& faults);

}  // namespace bismar
