// SPDX-License-Identifier: MIT
#include <bismar/catalogue/stock.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <span>

#include <bismar/error.hpp>
#include <bismar/quantity/format.hpp>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

// One decade in hundredths, so that every size is a whole number divided once: no rounding piles
// up. Values: ISO 3 (R) and, for the first rounded series (R'), ISO 497; the same as in
// data/preferred_numbers.csv, which says how they were verified.
constexpr std::array r5 = {100, 160, 250, 400, 630};
constexpr std::array r10 = {100, 125, 160, 200, 250, 315, 400, 500, 630, 800};
constexpr std::array r20 = {100, 112, 125, 140, 160, 180, 200, 224, 250, 280,
                            315, 355, 400, 450, 500, 560, 630, 710, 800, 900};
constexpr std::array r40 = {100, 106, 112, 118, 125, 132, 140, 150, 160, 170, 180, 190, 200, 212,
                            224, 236, 250, 265, 280, 300, 315, 335, 355, 375, 400, 425, 450, 475,
                            500, 530, 560, 600, 630, 670, 710, 750, 800, 850, 900, 950};
constexpr std::array rounded_10 = {100, 125, 160, 200, 250, 320, 400, 500, 630, 800};
constexpr std::array rounded_20 = {100, 110, 125, 140, 160, 180, 200, 220, 250, 280,
                                   320, 360, 400, 450, 500, 560, 630, 710, 800, 900};
constexpr std::array rounded_40 = {100, 105, 110, 120, 125, 130, 140, 150, 160, 170,
                                   180, 190, 200, 210, 220, 240, 250, 260, 280, 300,
                                   320, 340, 360, 380, 400, 420, 450, 480, 500, 530,
                                   560, 600, 630, 670, 710, 750, 800, 850, 900, 950};

struct Series {
  std::string_view name;
  std::span<const int> hundredths;
};

constexpr std::array<Series, 7> all_series = {Series{"R5", r5},
                                              Series{"R10", r10},
                                              Series{"R20", r20},
                                              Series{"R40", r40},
                                              Series{"R'10", rounded_10},
                                              Series{"R'20", rounded_20},
                                              Series{"R'40", rounded_40}};

constexpr std::size_t most_values = 10'000;
constexpr double end_tolerance = 1e-12;
// Inside these ends no power of ten below can overflow.
constexpr double least_size = 1e-200;
constexpr double greatest_size = 1e200;

const Series* find_series(std::string_view name, FaultList& faults) {
  const auto found = std::find_if(
      all_series.begin(), all_series.end(), [&](const Series& s) { return s.name == name; });
  if (found != all_series.end()) {
    return &*found;
  }
  std::array<std::string_view, all_series.size()> names;
  std::transform(
      all_series.begin(), all_series.end(), names.begin(), [](const Series& s) { return s.name; });
  Fault fault;
  fault.code = Code::unknown_name;
  fault.where = "series";
  fault.found = std::string(name);
  fault.allowed = "R5, R10, R20, R40, R'10, R'20 or R'40";
  fault.message = "There is no series of preferred numbers " + catalogue::quoted(name) +
                  ": use one of " + fault.allowed + "." + did_you_mean(name, names);
  faults.add(std::move(fault));
  return nullptr;
}

bool check_positive(std::string_view where, double value, FaultList& faults) {
  if (!std::isfinite(value)) {
    faults.add(Code::not_finite,
               std::string(where),
               "The " + std::string(where) + " of preferred sizes must be a finite number.");
    return false;
  }
  if (value < least_size || value > greatest_size) {
    faults.add(Code::out_of_range,
               std::string(where),
               "The " + std::string(where) +
                   " of preferred sizes must be above 0 (1e-200 m to 1e200 m), not " +
                   format_number(value) + " m.");
    return false;
  }
  return true;
}

/// hundredths 10^(decade - 2) unit, rounded once where the unit is one over a whole number (mm).
double preferred_value(int hundredths, int decade, double unit) {
  const double reciprocal = std::round(1.0 / unit);
  const bool one_over_whole = reciprocal >= 1.0 && 1.0 / reciprocal == unit;
  const double divisor = one_over_whole ? reciprocal : 1.0;
  const double factor = one_over_whole ? 1.0 : unit;
  const int power = decade - 2;
  // Powers of ten are exact in double up to 10^22: one division or one product.
  const double scaled = power >= 0 ? hundredths * std::pow(10.0, power) / divisor
                                   : hundredths / (std::pow(10.0, -power) * divisor);
  return scaled * factor;
}

}  // namespace

std::vector<double> preferred_numbers(std::string_view series,
                                      double from,
                                      double to,
                                      double unit) {
  FaultList faults;
  const Series* found = find_series(series, faults);
  const bool from_ok = check_positive("from", from, faults);
  const bool to_ok = check_positive("to", to, faults);
  check_positive("unit", unit, faults);
  if (from_ok && to_ok && from > to) {
    faults.add(Code::conflict,
               "from",
               "The range of preferred sizes ends at " + format_number(to) +
                   " m before it begins at " + format_number(from) + " m: swap its ends.");
  }
  faults.throw_if_any();

  const auto per_decade = static_cast<double>(found->hundredths.size());
  const double decades = std::log10(to) - std::log10(from);
  if (decades * per_decade > static_cast<double>(most_values)) {
    throw Error(Fault{.code = Code::out_of_range,
                      .where = "to",
                      .found = format_number(to),
                      .allowed = "at most 10,000 values",
                      .message = "From " + format_number(from) + " m to " + format_number(to) +
                                 " m there are more than 10,000 values of " + std::string(series) +
                                 ": choose a narrower range."});
  }

  std::vector<double> values;
  const int first = static_cast<int>(std::floor(std::log10(from) - std::log10(unit))) - 1;
  const int last = static_cast<int>(std::ceil(std::log10(to) - std::log10(unit))) + 1;
  for (int decade = first; decade <= last; ++decade) {
    for (const int hundredths : found->hundredths) {
      const double value = preferred_value(hundredths, decade, unit);
      if (value < from * (1.0 - end_tolerance) || value > to * (1.0 + end_tolerance)) {
        continue;
      }
      values.push_back(value);
    }
  }
  if (values.empty()) {
    throw Error(Fault{.code = Code::empty,
                      .where = "from",
                      .found = format_number(from) + ".." + format_number(to),
                      .allowed = "a range with a value of the series",
                      .message = "No value of " + std::string(series) + " lies between " +
                                 format_number(from) + " m and " + format_number(to) +
                                 " m: widen the range or take a finer series."});
  }
  return values;
}

}  // namespace bismar
