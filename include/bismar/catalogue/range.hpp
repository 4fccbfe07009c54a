// SPDX-License-Identifier: MIT
#pragma once

#include <cmath>
#include <cstdint>

namespace bismar {

/// Which value of a range a study uses.
enum class RangeEnd : std::uint8_t { low, mid, geometric_mid, high };

/// A value or a range of values; SI. low == high for a single value.
struct Range {
  double low = 0.0;
  double high = 0.0;

  [[nodiscard]] double mid() const { return 0.5 * (low + high); }
  /// sqrt(low high) where both are positive, otherwise the arithmetic mean (a range that starts at
  /// 0).
  [[nodiscard]] double geometric_mid() const {
    return low > 0.0 && high > 0.0 ? std::sqrt(low) * std::sqrt(high) : mid();
  }
  [[nodiscard]] double at(RangeEnd end) const {
    switch (end) {
      case RangeEnd::low:
        return low;
      case RangeEnd::mid:
        return mid();
      case RangeEnd::geometric_mid:
        return geometric_mid();
      case RangeEnd::high:
        return high;
    }
    return mid();
  }
  friend bool operator==(const Range&, const Range&) = default;
};

}  // namespace bismar
