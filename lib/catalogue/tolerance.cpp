// SPDX-License-Identifier: MIT
#include <bismar/catalogue/tolerance.hpp>

#include <array>
#include <cmath>
#include <cstddef>
#include <string>

#include <bismar/error.hpp>
#include <bismar/quantity/format.hpp>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

constexpr int first_grade = 6;
constexpr std::size_t grades = 8;
constexpr std::size_t ranges = 13;
constexpr double end_tolerance = 1e-12;

/// Upper ends of the ranges of nominal sizes [mm].
constexpr std::array<double, ranges> range_ends = {
    3, 6, 10, 18, 30, 50, 80, 120, 180, 250, 315, 400, 500};

/// IT6 to IT13 [micrometre], one value a range.
constexpr std::array<std::array<double, ranges>, grades> micrometres = {{
    {6, 8, 9, 11, 13, 16, 19, 22, 25, 29, 32, 36, 40},
    {10, 12, 15, 18, 21, 25, 30, 35, 40, 46, 52, 57, 63},
    {14, 18, 22, 27, 33, 39, 46, 54, 63, 72, 81, 89, 97},
    {25, 30, 36, 43, 52, 62, 74, 87, 100, 115, 130, 140, 155},
    {40, 48, 58, 70, 84, 100, 120, 140, 160, 185, 210, 230, 250},
    {60, 75, 90, 110, 130, 160, 190, 220, 250, 290, 320, 360, 400},
    {100, 120, 150, 180, 210, 250, 300, 350, 400, 460, 520, 570, 630},
    {140, 180, 220, 270, 330, 390, 460, 540, 630, 720, 810, 890, 970},
}};

/// Grade of "h9"; 0 for anything else.
int grade_of(std::string_view tolerance_class) {
  for (int grade = first_grade; grade < first_grade + static_cast<int>(grades); ++grade) {
    if (tolerance_class == "h" + std::to_string(grade)) {
      return grade;
    }
  }
  return 0;
}

void check_size(double size, double most, FaultList& faults) {
  if (!std::isfinite(size)) {
    faults.add(Code::not_finite, "size", "The nominal size must be a finite number.");
  } else if (size <= 0.0 || size > most) {
    faults.add(Code::out_of_range,
               "size",
               "The nominal size must be above 0 and at most " + format_number(most) + " m, not " +
                   format_number(size) + " m.");
  }
}

constexpr double largest = 0.5 * (1.0 + end_tolerance);

}  // namespace

double standard_tolerance(int grade, double size) {
  FaultList faults;
  if (grade < first_grade || grade >= first_grade + static_cast<int>(grades)) {
    faults.add(Code::out_of_range,
               "grade",
               "The tolerance grade must be IT6 to IT13, not IT" + std::to_string(grade) + ".");
  }
  check_size(size, largest, faults);
  faults.throw_if_any();
  std::size_t range = 0;
  while (range + 1 < ranges && size > range_ends[range] * 1e-3 * (1.0 + end_tolerance)) {
    ++range;
  }
  return micrometres[static_cast<std::size_t>(grade - first_grade)][range] / 1e6;
}

SizeLimits shaft_limits(std::string_view tolerance_class, double size) {
  const int grade = grade_of(tolerance_class);
  FaultList faults;
  if (grade == 0) {
    Fault fault;
    fault.code = Code::unknown_name;
    fault.where = "tolerance_class";
    fault.found = std::string(tolerance_class);
    fault.allowed = "h6 to h13";
    fault.message = "There is no tolerance class " + catalogue::quoted(tolerance_class) +
                    " here: use one of h6 to h13.";
    faults.add(std::move(fault));
  }
  check_size(size, largest, faults);
  faults.throw_if_any();
  return {0.0, -standard_tolerance(grade, size)};
}

double least_area_ratio(const SizeLimits& limits, double size) {
  FaultList faults;
  check_size(size, 1e200, faults);
  if (!std::isfinite(limits.lower)) {
    faults.add(Code::not_finite, "limits.lower", "The lower limit must be a finite number.");
  } else if (size > 0.0 && limits.lower <= -size) {
    faults.add(Code::out_of_range,
               "limits.lower",
               "The lower limit must leave something of the size " + format_number(size) + " m.");
  }
  faults.throw_if_any();
  const double ratio = (size + limits.lower) / size;
  return ratio * ratio;
}

}  // namespace bismar
