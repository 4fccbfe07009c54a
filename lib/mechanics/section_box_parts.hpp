// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/section_box.hpp>

#include <cmath>
#include <limits>

namespace bismar::mechanics {

/// A range of sizes or numbers, unchecked.
struct Ends {
  double lower = 0.0;
  double upper = 0.0;
  [[nodiscard]] bool is_point() const { return !(upper > lower); }
  /// ln(upper / lower): what a number gains over the range is at most exp(slope x this).
  [[nodiscard]] double spread() const { return is_point() ? 0.0 : std::log(upper / lower); }
};

inline Ends ends(const Interval& interval) {
  return {.lower = interval.lower(), .upper = interval.upper()};
}

/// exp of a sum of slopes times spreads, 1 where nothing varies.
inline double slack(double exponent) { return exponent == 0.0 ? 1.0 : std::exp(exponent); }

/// What a family's file fills in: the upper ends of what resists, the ends of what is counted.
/// `best` of SectionBox is filled directly but for its outline; what follows is beside it.
struct BoxNumbers {
  double largest_i_y_squared = 0.0;  ///< I_y / A [m^2]
  double largest_i_z_squared = 0.0;  ///< I_z / A, of an angle I_v / A [m^2]
  double least_polar_squared = 0.0;  ///< (I_y + I_z) / A [m^2]; 0 where the section does not twist.
  double least_slope_of_axes = 2.0;  ///< Least I_y / I_z [-]; read where a beam may turn aside.
  double clear_web = 0.0;            ///< Largest height of the web of an I, channel, T or box [m].
  double flanges = 0.0;              ///< How many of them the web lies between.
};

/// Rounding of the sections' own formulas, thin tubes included.
inline constexpr double box_rounding = 1e-11;

inline Interval widened(double lower, double upper) {
  return {lower * (1.0 - box_rounding), upper * (1.0 + box_rounding)};
}

/// Makes the list n long and returns its data; no allocation once it was.
template <typename List>
auto* resized(List& list, std::size_t n) {
  list.resize(n);
  return list.data();
}

// Each fills `out` and `numbers` for the sizes of the box, or leaves out.any false.
void enclose_solid(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_round_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_rectangular_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_elliptical_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_i_section(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_channel(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_tee(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);
void enclose_angle(const SizesBox& box, SectionBox& out, BoxNumbers& numbers);

}  // namespace bismar::mechanics
