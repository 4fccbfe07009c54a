// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/sections/ellipse_circumference.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

/// Shear flow in the thin wall between two ellipses whose semi-axes differ by the same t. On the
/// mid-line (across: b cos phi, along the load: a sin phi) the arc is ds^2 = (a^2 cos^2 + b^2
/// sin^2) d phi^2, the area t_n ds = t (a cos^2 + b sin^2) d phi, and beyond phi there is
///     S = t a cos(phi) [b + (a - b) cos^2(phi) / 3].
/// The functions below leave out t and take cos^2(phi).
struct ThinEllipse {
  double a = 0.0;
  double b = 0.0;

  [[nodiscard]] double depth(double c2) const { return a * c2 + b * (1.0 - c2); }
  [[nodiscard]] double speed_squared(double c2) const { return a * a * c2 + b * b * (1.0 - c2); }
  [[nodiscard]] double moment(double c2) const {
    return a * std::sqrt(c2) * (b + (a - b) * c2 / 3.0);
  }
  /// S / t_n at cos^2(phi).
  [[nodiscard]] double stress(double c2) const {
    return moment(c2) * std::sqrt(speed_squared(c2)) / depth(c2);
  }
  /// Largest S / t_n over its value at the neutral axis, by golden section; 1 where it falls from
  /// there, as in every tube that is loaded along its longer axis.
  [[nodiscard]] double peak_ratio() const {
    constexpr double golden = 1.0 / std::numbers::phi;
    double low = 0.0;
    double high = 1.0;
    double left = high - golden * (high - low);
    double right = low + golden * (high - low);
    for (int step = 0; step < 60; ++step) {
      if (stress(left) > stress(right)) {
        high = right;
        right = left;
        left = high - golden * (high - low);
      } else {
        low = left;
        left = right;
        right = low + golden * (high - low);
      }
    }
    return std::max(1.0, stress((low + high) / 2.0) / stress(1.0));
  }
  /// A_s / A = I^2 / (A times the integral of S^2 / t_n ds); equal steps around a closed line
  /// converge faster than any power of their number.
  [[nodiscard]] double shear_factor() const {
    constexpr int steps = 64;
    double energy = 0.0;
    for (int k = 0; k < steps; ++k) {
      const double cosine = std::cos(pi / 2.0 * (k + 0.5) / steps);
      const double c2 = cosine * cosine;
      energy += moment(c2) * moment(c2) * speed_squared(c2) / depth(c2);
    }
    energy *= 4.0 * pi / 2.0 / steps;
    const double second_moment = pi / 4.0 * a * a * (a + 3.0 * b);
    return second_moment * second_moment / (pi * (a + b) * energy);
  }
};

/// What two concentric ellipses share, whatever lies between them.
SectionProperties between(
    double a, double b, double inner_a, double inner_b, double wall, Forming forming) {
  SectionProperties section;
  section.family = SectionFamily::elliptical_tube;
  section.forming = forming;
  section.height = 2.0 * a;
  section.width = 2.0 * b;
  section.wall = section.ruling_dimension = wall;
  section.perimeter = mechanics::ellipse_circumference(a, b);
  section.inner_perimeter = mechanics::ellipse_circumference(inner_a, inner_b);
  section.area = pi * (a * b - inner_a * inner_b);
  section.I_y = pi / 4.0 * (a * a * a * b - inner_a * inner_a * inner_a * inner_b);
  section.I_z = pi / 4.0 * (b * b * b * a - inner_b * inner_b * inner_b * inner_a);
  section.W_el_y = section.I_y / a;
  section.W_el_z = section.I_z / b;
  section.W_pl_y = 4.0 / 3.0 * (a * a * b - inner_a * inner_a * inner_b);
  section.W_pl_z = 4.0 / 3.0 * (b * b * a - inner_b * inner_b * inner_a);
  section.smooth_outline = true;
  const double longer = std::max(a, b);
  section.plates = {{.kind = PlateElement::Kind::round,
                     .ratio = 2.0 * longer * longer / (std::min(a, b) * wall)}};
  return section;
}

/// Peak of S / t_n over its value at the neutral axis where the bore is the outline scaled: there
/// S ~ cos phi and t_n ~ 1 / sqrt(a^2 cos^2 + b^2 sin^2).
double similar_peak_ratio(double along, double across) {
  const double a2 = along * along;
  const double b2 = across * across;
  return b2 > 2.0 * a2 ? b2 / (2.0 * along * std::sqrt(b2 - a2)) : 1.0;
}

}  // namespace

SectionProperties elliptical_tube(double height, double width, double wall, Forming forming) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "wall", wall);
  if (faults.empty() && wall >= std::min(height, width) / 2.0) {
    mechanics::add_out_of_range(faults, "wall", wall, "less than half the smaller axis");
  }
  faults.throw_if_any();

  const double a = height / 2.0;
  const double b = width / 2.0;
  const double t = wall;
  SectionProperties section = between(a, b, a - t, b - t, t, forming);

  // Bredt's closed cell and the wall's own share; U is the standard's length of the mid-line.
  const double both = height + width - 2.0 * t;
  const double skew = (height - width) / both;
  const double mid_line = pi / 2.0 * both * (1.0 + skew * skew / 4.0);
  const double enclosed = pi / 4.0 * (height - t) * (width - t);
  const double k = 2.0 * enclosed * t / mid_line;
  section.I_t = t * t * t * mid_line / 3.0 + 2.0 * k * enclosed;
  section.W_t = section.I_t / (t + k / t);

  const ThinEllipse z_load{.a = a - t / 2.0, .b = b - t / 2.0};
  const ThinEllipse y_load{.a = b - t / 2.0, .b = a - t / 2.0};
  section.A_v_z = section.I_y * 2.0 * t / (section.W_pl_y / 2.0) / z_load.peak_ratio();
  section.A_v_y = section.I_z * 2.0 * t / (section.W_pl_z / 2.0) / y_load.peak_ratio();
  section.A_s_z = z_load.shear_factor() * section.area;
  section.A_s_y = y_load.shear_factor() * section.area;
  return section;
}

SectionProperties similar_elliptical_tube(double height,
                                          double width,
                                          double bore_ratio,
                                          Forming forming) {
  FaultList faults;
  mechanics::require_positive(faults, "height", height);
  mechanics::require_positive(faults, "width", width);
  mechanics::require_positive(faults, "bore_ratio", bore_ratio);
  if (bore_ratio >= 1.0) {
    mechanics::add_out_of_range(faults, "bore_ratio", bore_ratio, "less than 1");
  }
  faults.throw_if_any();

  const double a = height / 2.0;
  const double b = width / 2.0;
  const double q = bore_ratio;
  const double least = std::min(a, b);
  SectionProperties section = between(a, b, q * a, q * b, (1.0 - q) * least, forming);
  const double left = 1.0 - q * q * q * q;
  section.I_t = pi * a * a * a * b * b * b / (a * a + b * b) * left;
  section.W_t = pi / 2.0 * a * b * least * left;
  section.A_v_z =
      section.I_y * 2.0 * (1.0 - q) * b / (section.W_pl_y / 2.0) / similar_peak_ratio(a, b);
  section.A_v_y =
      section.I_z * 2.0 * (1.0 - q) * a / (section.W_pl_z / 2.0) / similar_peak_ratio(b, a);
  section.A_s_z = 2.0 * a * a / (3.0 * a * a + b * b) * section.area;
  section.A_s_y = 2.0 * b * b / (3.0 * b * b + a * a) * section.area;
  return section;
}

}  // namespace bismar
