// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/corrosion.hpp>

#include <optional>

namespace bismar::checks {

std::optional<Answers> corrosion_answers(const Check& check) {
  if (check.id != "GAL-002") {
    return std::nullopt;
  }
  return Answers{{"limit_1", anodic_index_limit(GalvanicEnvironment::harsh)},
                 {"limit_2", anodic_index_limit(GalvanicEnvironment::normal)},
                 {"limit_3", anodic_index_limit(GalvanicEnvironment::controlled)}};
}

}  // namespace bismar::checks
