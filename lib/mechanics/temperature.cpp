// SPDX-License-Identifier: MIT
#include <bismar/mechanics/temperature.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <array>
#include <cmath>
#include <cstddef>
#include <optional>
#include <span>
#include <string_view>

namespace bismar {

namespace {

struct Point {
  double celsius = 0.0;
  double value = 0.0;
};

/// A temperature of a table in degrees must be met again after it went through kelvin: 1e-9 K.
double checked_celsius(double kelvin) {
  FaultList faults;
  mechanics::require_not_negative(faults, "temperature", kelvin);
  faults.throw_if_any();
  return std::round((kelvin - 273.15) * 1e9) / 1e9;
}

std::optional<double> interpolated(std::span<const Point> table, double celsius) {
  if (celsius <= table.front().celsius) {
    return table.front().value;
  }
  for (std::size_t k = 1; k < table.size(); ++k) {
    const Point& a = table[k - 1];
    const Point& b = table[k];
    if (celsius <= b.celsius) {
      // Exact at both points.
      const double share = (celsius - a.celsius) / (b.celsius - a.celsius);
      return a.value * (1.0 - share) + b.value * share;
    }
  }
  return std::nullopt;
}

// EN 1993-1-2:2005 Table 3.1.
constexpr std::array<Point, 13> steel_yield = {{{20, 1},
                                                {100, 1},
                                                {200, 1},
                                                {300, 1},
                                                {400, 1},
                                                {500, 0.78},
                                                {600, 0.47},
                                                {700, 0.23},
                                                {800, 0.11},
                                                {900, 0.06},
                                                {1000, 0.04},
                                                {1100, 0.02},
                                                {1200, 0}}};
constexpr std::array<Point, 13> steel_proportional_limit = {{{20, 1},
                                                             {100, 1},
                                                             {200, 0.807},
                                                             {300, 0.613},
                                                             {400, 0.42},
                                                             {500, 0.36},
                                                             {600, 0.18},
                                                             {700, 0.075},
                                                             {800, 0.05},
                                                             {900, 0.0375},
                                                             {1000, 0.025},
                                                             {1100, 0.0125},
                                                             {1200, 0}}};
constexpr std::array<Point, 13> steel_modulus = {{{20, 1},
                                                  {100, 1},
                                                  {200, 0.9},
                                                  {300, 0.8},
                                                  {400, 0.7},
                                                  {500, 0.6},
                                                  {600, 0.31},
                                                  {700, 0.13},
                                                  {800, 0.09},
                                                  {900, 0.0675},
                                                  {1000, 0.045},
                                                  {1100, 0.0225},
                                                  {1200, 0}}};

// EN 1999-1-2:2007 Table 2 [GPa].
constexpr std::array<Point, 10> aluminium_gigapascals = {{{20, 70},
                                                          {50, 69.3},
                                                          {100, 67.9},
                                                          {150, 65.1},
                                                          {200, 60.2},
                                                          {250, 54.6},
                                                          {300, 47.6},
                                                          {350, 37.8},
                                                          {400, 28},
                                                          {550, 0}}};

// EN 1999-1-2:2007 Table 1a.
constexpr std::array<Point, 8> proof_6082_t6 = {{{20, 1},
                                                 {100, 0.9},
                                                 {150, 0.79},
                                                 {200, 0.65},
                                                 {250, 0.38},
                                                 {300, 0.2},
                                                 {350, 0.11},
                                                 {550, 0}}};
// The same, from memory.
constexpr std::array<Point, 8> proof_6063_t6 = {{{20, 1},
                                                 {100, 0.91},
                                                 {150, 0.84},
                                                 {200, 0.71},
                                                 {250, 0.38},
                                                 {300, 0.19},
                                                 {350, 0.09},
                                                 {550, 0}}};
constexpr std::array<Point, 8> proof_5083_o = {
    {{20, 1}, {100, 1}, {150, 0.98}, {200, 0.9}, {250, 0.75}, {300, 0.4}, {350, 0.22}, {550, 0}}};

struct Grade {
  std::string_view alloy;
  std::string_view temper;
  std::span<const Point> table;
};

std::span<const Grade> grades() {
  static const std::array<Grade, 3> list = {
      {{"6082", "T6", proof_6082_t6}, {"6063", "T6", proof_6063_t6}, {"5083", "O", proof_5083_o}}};
  return list;
}

}  // namespace

std::optional<SteelReduction> steel_reduction(double temperature) {
  const double celsius = checked_celsius(temperature);
  const std::optional<double> yield = interpolated(steel_yield, celsius);
  const std::optional<double> limit = interpolated(steel_proportional_limit, celsius);
  const std::optional<double> modulus = interpolated(steel_modulus, celsius);
  if (!yield || !limit || !modulus) {
    return std::nullopt;
  }
  return SteelReduction{.k_y = *yield, .k_p = *limit, .k_E = *modulus};
}

std::optional<double> aluminium_modulus(double temperature) {
  const std::optional<double> gigapascals =
      interpolated(aluminium_gigapascals, checked_celsius(temperature));
  return gigapascals ? std::optional<double>(*gigapascals * 1e9) : std::nullopt;
}

std::optional<double> aluminium_proof_ratio(std::string_view alloy,
                                            std::string_view temper,
                                            double temperature) {
  const double celsius = checked_celsius(temperature);
  constexpr std::string_view prefix = "EN AW-";
  if (alloy.substr(0, prefix.size()) == prefix) {
    alloy.remove_prefix(prefix.size());
  }
  for (const Grade& grade : grades()) {
    if (grade.alloy == alloy && grade.temper == temper) {
      return interpolated(grade.table, celsius);
    }
  }
  return std::nullopt;
}

}  // namespace bismar
