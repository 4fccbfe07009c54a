// SPDX-License-Identifier: MIT
#pragma once

#include "checks/check_table.hpp"

#include <functional>
#include <optional>
#include <string>

namespace bismar::checks {

// What the library says to the checks of one table of data/, or of a part of one; nothing for a
// check that another function answers.
std::optional<Answers> section_answers(const Check& check);
std::optional<Answers> polygon_answers(const Check& check);
std::optional<Answers> beam_answers(const Check& check);
std::optional<Answers> column_answers(const Check& check);
std::optional<Answers> stability_answers(const Check& check);
std::optional<Answers> aluminium_timber_answers(const Check& check);
std::optional<Answers> stress_answers(const Check& check);
std::optional<Answers> fatigue_answers(const Check& check);
std::optional<Answers> fracture_answers(const Check& check);
std::optional<Answers> vibration_answers(const Check& check);
std::optional<Answers> temperature_answers(const Check& check);
std::optional<Answers> bolt_answers(const Check& check);
std::optional<Answers> corrosion_answers(const Check& check);
std::optional<Answers> index_answers(const Check& check);
std::optional<Answers> notch_answers(const Check& check);
std::optional<Answers> size_answers(const Check& check);

/// The x in [low, high] at which a falling function reaches `target`, by bisection.
double where_falls_to(double target,
                      double low,
                      double high,
                      const std::function<double(double)>& f);

inline bool starts_with(const std::string& text, const char* prefix) {
  return text.rfind(prefix, 0) == 0;
}

}  // namespace bismar::checks
