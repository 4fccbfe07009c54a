// SPDX-License-Identifier: MIT
// The rows of the exchange ruler's picture.
#pragma once

#include <cstddef>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "report/plot.hpp"

namespace bismar::report {

namespace ruler_page {
inline constexpr double left = theme::margin + 30.0;
inline constexpr double right = theme::page - theme::margin;
inline constexpr double beam_height = 30.0;
inline constexpr double beam_tip =
    13.0;  // the pointed ends: the beam goes on to zero and without end
}  // namespace ruler_page

/// A part of the alpha axis in pixels.
struct Cut {
  double from = 0.0;
  double to = 0.0;
  std::size_t stretch = 0;
  [[nodiscard]] double middle() const { return 0.5 * (from + to); }
  [[nodiscard]] double width() const { return to - from; }
};

/// The stretch [from, to] within the axis, or nothing outside it.
std::optional<Cut> cut(const Axis& axis, double from, const std::optional<double>& to);

/// A sub-stretch with its runner-up, clipped to the axis.
struct SubStretch {
  Cut cut;
  double from = 0.0;  // [currency/kg]
  double to = 0.0;
  const NamedStretch::RunnerUp* runner_up = nullptr;
};

std::vector<SubStretch> sub_stretches(const ExchangeRuler& ruler, const Axis& axis);

/// The profile of the distance to the runner-up; zero at each breakpoint. Returns the y below.
double draw_regret(Svg& svg,
                   const Result& result,
                   const ExchangeRuler& ruler,
                   const Axis& axis,
                   const std::vector<SubStretch>& subs,
                   double top);

/// Who the runner-up is: letters in a strip, pulled out below where it is too narrow. Returns the y
/// below.
/// @param unnamed  Set to the number of sub-stretches without a letter.
/// @param drawn  Gets the choices whose letters stand there.
double draw_runners_up(Svg& svg,
                       const Result& result,
                       const std::vector<SubStretch>& subs,
                       const ChoiceLetters& letters,
                       double top,
                       std::size_t& unnamed,
                       std::set<std::string>& drawn);

}  // namespace bismar::report
