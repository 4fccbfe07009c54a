// SPDX-License-Identifier: MIT
#pragma once

#include "checks/check_table.hpp"

#include <functional>
#include <optional>

namespace bismar::checks {

// What the library says to a check of its topic; nothing for a check of another topic.
std::optional<Answers> section_answers(const Check& check);
std::optional<Answers> beam_answers(const Check& check);
std::optional<Answers> column_answers(const Check& check);
std::optional<Answers> stress_answers(const Check& check);
std::optional<Answers> index_answers(const Check& check);

/// The x in [low, high] at which a falling function reaches `target`, by bisection.
double where_falls_to(double target,
                      double low,
                      double high,
                      const std::function<double(double)>& f);

inline bool starts_with(const std::string& text, const char* prefix) {
  return text.rfind(prefix, 0) == 0;
}

}  // namespace bismar::checks
