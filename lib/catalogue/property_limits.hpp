// SPDX-License-Identifier: MIT
// What a property can be at all, and what it is in any material known.
#pragma once

#include <bismar/catalogue/property.hpp>

namespace bismar::catalogue {

/// Values outside [least, greatest] are faults; with `above_least` least itself is one too, with
/// `below_greatest` greatest itself. Values outside [unusual_below, unusual_above] are most likely
/// in another unit than the header says, and give a warning. SI.
struct PropertyLimits {
  Property property;
  double least;
  bool above_least;
  double greatest;
  bool below_greatest;
  double unusual_below;
  double unusual_above;
};

[[nodiscard]] const PropertyLimits& limits(Property property);

}  // namespace bismar::catalogue
