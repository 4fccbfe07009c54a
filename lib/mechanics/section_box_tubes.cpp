// SPDX-License-Identifier: MIT
// Enclosures of solids and tubes.
#include "mechanics/section_box_parts.hpp"
#include "mechanics/sections/ellipse_circumference.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar::mechanics {

namespace {

constexpr double pi = std::numbers::pi;

/// All of a solid's resistances rise with both sizes, so that the largest one has them all.
void enclose_corners(const SectionProperties& least,
                     const SectionProperties& largest,
                     SectionBox& out,
                     BoxNumbers& numbers) {
  out.best = largest;
  out.best.height = least.height;
  out.best.width = least.width;
  out.area = widened(least.area, largest.area);
  out.perimeter = widened(least.perimeter, largest.perimeter);
  out.inner_perimeter = Interval(0.0);
  out.height = {least.height, largest.height};
  out.width = {least.width, largest.width};
  out.wall = {least.wall, largest.wall};
  out.ruling_dimension = {least.ruling_dimension, largest.ruling_dimension};
  numbers.largest_i_y_squared = largest.I_y / largest.area;
  numbers.largest_i_z_squared = largest.I_z / largest.area;
  out.any = true;
}

}  // namespace

void enclose_solid(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const Ends h = ends(box.sizes[0]);
  const Forming forming = box.forming;
  switch (box.family) {
    case SectionFamily::solid_round:
      enclose_corners(solid_round(h.lower), solid_round(h.upper), out, numbers);
      break;
    case SectionFamily::solid_square:
      enclose_corners(solid_square(h.lower), solid_square(h.upper), out, numbers);
      break;
    case SectionFamily::solid_hexagon:
      enclose_corners(solid_hexagon(h.lower), solid_hexagon(h.upper), out, numbers);
      break;
    default: {
      const Ends b = ends(box.sizes[1]);
      const bool rectangle = box.family == SectionFamily::solid_rectangle;
      const auto make = rectangle ? solid_rectangle : solid_ellipse;
      const SectionProperties largest = make(h.upper, b.upper);
      SectionProperties least = largest;  // torsion and moduli of it are not read
      least.height = h.lower;
      least.width = b.lower;
      least.wall = least.ruling_dimension = std::min(h.lower, b.lower);
      least.area = (rectangle ? 1.0 : pi / 4.0) * h.lower * b.lower;
      least.perimeter = rectangle ? 2.0 * (h.lower + b.lower)
                                  : ellipse_circumference(h.lower / 2.0, b.lower / 2.0);
      enclose_corners(least, largest, out, numbers);
      const double ratio = h.lower / b.upper;
      numbers.least_slope_of_axes = ratio * ratio;
    }
  }
  out.best.forming = forming;
}

void enclose_round_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const Ends all = ends(box.sizes[0]);
  const Ends t0 = ends(box.sizes[1]);
  if (!(t0.lower < all.upper / 2.0)) {
    return;
  }
  // The sizes that make a section lie between these, the limit of a bore of nothing included.
  const Ends D{std::max(all.lower, 2.0 * t0.lower), all.upper};
  const Ends t{t0.lower, std::min(t0.upper, all.upper / 2.0)};
  const double bore = D.upper - 2.0 * t.upper;
  const double squares = 2.0 * t.upper * (D.upper + bore);
  const double cubes = 2.0 * t.upper * (D.upper * D.upper + D.upper * bore + bore * bore);
  SectionProperties& best = out.best;
  best.smooth_outline = true;
  best.area = pi / 4.0 * squares;
  best.I_y = best.I_z = pi / 64.0 * squares * (D.upper * D.upper + bore * bore);
  best.W_el_y = best.W_el_z = 2.0 * best.I_y / D.upper;
  best.I_t = 2.0 * best.I_y;
  best.W_t = 2.0 * best.W_el_y;
  best.A_v_y = best.A_v_z = best.I_y * 24.0 * t.upper / cubes;
  const double m = bore / D.upper;
  const double sum = (1.0 + m * m) * (1.0 + m * m);
  best.A_s_y = best.A_s_z = 6.0 * sum / (7.0 * sum + 20.0 * m * m) * best.area;
  best.height = best.width = D.lower;
  best.wall = t.upper;
  *resized(best.plates, 1) = {.kind = PlateElement::Kind::round, .ratio = D.lower / t.upper};
  best.fibres.clear();

  const double widest_bore = D.upper - 2.0 * t.lower;
  out.area = widened(pi * t.lower * (D.lower - t.lower), best.area);
  out.perimeter = widened(pi * D.lower, pi * D.upper);
  out.inner_perimeter = widened(pi * std::max(0.0, D.lower - 2.0 * t.upper), pi * widest_bore);
  out.height = out.width = {D.lower, D.upper};
  out.wall = out.ruling_dimension = {t.lower, t.upper};
  numbers.largest_i_y_squared = numbers.largest_i_z_squared =
      (D.upper * D.upper + widest_bore * widest_bore) / 16.0;
  out.any = true;
}

namespace {

/// Outer and inner corner radius over the wall.
struct CornerFactors {
  double outer = 0.0;
  double inner = 0.0;
};

CornerFactors corner_factors(Forming forming, double wall) {
  constexpr double slack = 1.0 + 1e-9;
  switch (forming) {
    case Forming::hot_finished:
      return {.outer = 1.5, .inner = 1.0};
    case Forming::cold_formed: {
      const double outer = wall <= 6e-3 * slack ? 2.0 : wall <= 10e-3 * slack ? 2.5 : 3.0;
      return {.outer = outer, .inner = outer - 1.0};
    }
    default:
      return {};
  }
}

/// The rectangular tube with radii in proportion to its wall.
struct Box {
  double h = 0.0;
  double b = 0.0;
  double t = 0.0;
  CornerFactors k;

  [[nodiscard]] double area() const {
    return 2.0 * t * (h + b - 2.0 * t) -
           (4.0 - pi) * t * t * (k.outer * k.outer - k.inner * k.inner);
  }
  /// About the axis along the width, with both sides given.
  [[nodiscard]] static double corner(double r, double d) {
    return ((1.0 - 5.0 * pi / 16.0) * r * r - 2.0 * d * (5.0 / 6.0 - pi / 4.0) * r +
            d * d * (1.0 - pi / 4.0)) *
           r * r;
  }
  [[nodiscard]] double second_moment(double along, double across) const {
    const double inside = along - 2.0 * t;
    return (across * along * along * along - (across - 2.0 * t) * inside * inside * inside) / 12.0 -
           4.0 * (corner(k.outer * t, along / 2.0) - corner(k.inner * t, inside / 2.0));
  }
  [[nodiscard]] double half_first_moment(double along, double across) const {
    const auto first = [](double r, double d) {
      return (d * (1.0 - pi / 4.0) - (5.0 / 6.0 - pi / 4.0) * r) * r * r;
    };
    const double inside = along - 2.0 * t;
    return (across * along * along - (across - 2.0 * t) * inside * inside) / 8.0 -
           2.0 * (first(k.outer * t, along / 2.0) - first(k.inner * t, inside / 2.0));
  }
  [[nodiscard]] double junction_shear_area() const {
    const double clear = std::min(h / 2.0 - t, h / 2.0 - k.outer * t);
    return second_moment(h, b) * 2.0 * t / (half_first_moment(h, b) - t * clear * clear);
  }
  /// As energy_shear_area_box().
  [[nodiscard]] double deflection_shear_area(double along, double across) const {
    const double x = along - t;
    const double y = across - t;
    const double second = x * x * (x / 6.0 + y / 2.0);
    const double p = y * x / 4.0;
    return t * second * second /
           (x * x * y * y * y / 24.0 + 2.0 * x * (p * p + p * x * x / 6.0 + x * x * x * x / 120.0));
  }
};

}  // namespace

void enclose_rectangular_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  Ends h = ends(box.sizes[0]);
  Ends b = ends(box.sizes[1]);
  Ends t = ends(box.sizes[2]);
  CornerFactors sharper = corner_factors(box.forming, t.lower * box.scale.lower());
  const double room = std::min(h.upper, b.upper) / 2.0;
  const double least_wall = 1.0 + sharper.inner;
  if (sharper.inner > 0.0 ? t.lower * least_wall > room : t.lower >= room) {
    return;
  }
  h.lower = std::max(h.lower, 2.0 * least_wall * t.lower);
  b.lower = std::max(b.lower, 2.0 * least_wall * t.lower);
  t.upper = std::min(t.upper, room / least_wall);
  const CornerFactors rounder = corner_factors(box.forming, t.upper * box.scale.upper());

  // Up to here every resistance rises with the wall; in thicker tubes the rounder corners, which
  // grow with it, take more than the wall gives, and the torsion formulas are no longer good.
  const bool thin = t.upper <= 0.125 * std::min(h.lower, b.lower);
  const double in_h = h.spread();
  const double in_b = b.spread();
  const double in_t = thin ? 0.0 : t.spread();
  const double of_bending = slack(0.62 * in_t);
  const double of_torsion = slack(0.5 * in_t) * (rounder.outer > sharper.outer ? 1.02 : 1.0);
  const Box top{h.upper, b.upper, t.upper, sharper};
  SectionProperties& best = out.best;
  best.height = h.lower;
  best.width = b.lower;
  best.wall = t.upper;
  best.area = top.area();
  best.I_y = top.second_moment(h.upper, b.upper) * of_bending;
  best.I_z = top.second_moment(b.upper, h.upper) * of_bending;
  best.W_el_y = 2.0 * best.I_y / h.upper;
  best.W_el_z = 2.0 * best.I_z / b.upper;
  const double mean_radius = (sharper.outer + sharper.inner) / 2.0 * t.upper;
  const double mid_line =
      2.0 * (b.upper + h.upper - 2.0 * t.upper) - 2.0 * mean_radius * (4.0 - pi);
  const double enclosed =
      (b.upper - t.upper) * (h.upper - t.upper) - mean_radius * mean_radius * (4.0 - pi);
  const double k = 2.0 * enclosed * t.upper / mid_line;
  const double torsion = t.upper * t.upper * t.upper * mid_line / 3.0 + 2.0 * k * enclosed;
  best.I_t = torsion * of_torsion;
  best.W_t = torsion / (t.upper + k / t.upper) * of_torsion;
  best.A_v_z =
      top.second_moment(h.upper, b.upper) * 2.0 * t.upper / top.half_first_moment(h.upper, b.upper);
  best.A_v_y =
      top.second_moment(b.upper, h.upper) * 2.0 * t.upper / top.half_first_moment(b.upper, h.upper);
  // It falls with the width, or hardly rises; a section of the width and the wall below the widest
  // one that has this wall first gives up what it gains by being narrower.
  const double narrow = std::max(b.lower, 2.0 * least_wall * t.upper);
  best.A_v_junction = Box{h.upper, narrow, t.upper, sharper}.junction_shear_area() *
                      slack(0.9 * std::log(narrow / b.lower) + 0.33 * in_b);
  best.junction_ratio = std::max(0.0, 1.0 - 2.0 * t.upper / h.lower);
  best.A_s_z = top.deflection_shear_area(h.upper, b.upper) * slack(0.97 * in_b + 0.95 * in_t);
  best.A_s_y = top.deflection_shear_area(b.upper, h.upper) * slack(0.97 * in_h + 0.95 * in_t);
  const double lost = 2.0 * std::max(rounder.outer, 1.0);
  PlateElement* plates = resized(best.plates, 2);
  plates[0] = {.kind = PlateElement::Kind::internal_compression, .ratio = b.lower / t.upper - lost};
  plates[1] = {.kind = PlateElement::Kind::internal_bending, .ratio = h.lower / t.upper - lost};
  best.fibres.clear();

  const double rounding_off = 8.0 - 2.0 * pi;
  const Box bottom{h.lower, b.lower, t.lower, rounder};
  const Box light{h.upper, b.upper, t.lower, sharper};
  out.area = widened(bottom.area(), best.area);
  out.perimeter = widened(2.0 * (h.lower + b.lower) - rounding_off * rounder.outer * t.upper,
                          2.0 * (h.upper + b.upper) - rounding_off * sharper.outer * t.lower);
  const double inside =
      2.0 * (h.lower + b.lower - 4.0 * t.upper) - rounding_off * rounder.inner * t.upper;
  out.inner_perimeter =
      widened(std::max(0.0, inside),
              2.0 * (h.upper + b.upper - 4.0 * t.lower) - rounding_off * sharper.inner * t.lower);
  out.height = {h.lower, h.upper};
  out.width = {b.lower, b.upper};
  out.wall = out.ruling_dimension = {t.lower, t.upper};
  numbers.largest_i_y_squared = light.second_moment(h.upper, b.upper) / light.area();
  numbers.largest_i_z_squared = light.second_moment(b.upper, h.upper) / light.area();
  out.any = true;
}

namespace {

/// Circumference of a bore, or, where it all but vanishes, pi (a + b), which is nowhere above it.
double least_bore(double a, double b) {
  const double semi = std::max(a, 0.0);
  const double other = std::max(b, 0.0);
  return std::min(semi, other) > 1e-3 * std::max(semi, other) ? ellipse_circumference(semi, other)
                                                              : pi * (semi + other);
}

}  // namespace

void enclose_elliptical_tube(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  Ends h = ends(box.sizes[0]);
  Ends b = ends(box.sizes[1]);
  Ends t = ends(box.sizes[2]);
  const double room = std::min(h.upper, b.upper) / 2.0;
  if (!(t.lower < room)) {
    return;
  }
  // elliptical_tube() does not take the limit of a bore of nothing.
  constexpr double inside = 1.0 - 1e-12;
  h.lower = std::max(h.lower, 2.0 * t.lower / inside);
  b.lower = std::max(b.lower, 2.0 * t.lower / inside);
  t.upper = std::max(t.lower, std::min(t.upper, room * inside));
  const bool thin = t.upper <= 0.2 * std::min(h.lower, b.lower);
  const double in_h = h.spread();
  const double in_b = b.spread();
  const double in_t = thin ? 0.0 : t.spread();
  SectionProperties& best = out.best;
  best = elliptical_tube(h.upper, b.upper, t.upper, box.forming);
  best.W_t *= slack(0.07 * in_t);
  best.A_v_z *= slack(0.5 * in_b);
  best.A_v_y *= slack(0.5 * in_h);
  best.A_s_z *= slack(1.29 * in_b + 1.1 * in_t);
  best.A_s_y *= slack(1.29 * in_h + 1.1 * in_t);
  best.height = h.lower;
  best.width = b.lower;
  // 2 longer^2 / (shorter t) is least where both sides are the same, or as near as they come.
  const double shorter = std::min(h.upper, b.upper);
  const double longer = std::max(h.lower, b.lower);
  best.plates[0].ratio =
      longer > shorter ? longer * longer / (shorter * t.upper) : longer / t.upper;

  const double thinnest = pi * t.lower * ((h.lower + b.lower) / 2.0 - t.lower);
  out.area = widened(thinnest, best.area);
  out.perimeter = widened(ellipse_circumference(h.lower / 2.0, b.lower / 2.0),
                          ellipse_circumference(h.upper / 2.0, b.upper / 2.0));
  out.inner_perimeter =
      widened(least_bore(h.lower / 2.0 - t.upper, b.lower / 2.0 - t.upper),
              ellipse_circumference(h.upper / 2.0 - t.lower, b.upper / 2.0 - t.lower));
  out.height = {h.lower, h.upper};
  out.width = {b.lower, b.upper};
  out.wall = out.ruling_dimension = {t.lower, t.upper};
  const double a = h.upper / 2.0;
  const double c = b.upper / 2.0;
  const double a_i = a - t.lower;
  const double c_i = c - t.lower;
  const double light = 4.0 * (a * c - a_i * c_i);
  numbers.largest_i_y_squared = (a * a * a * c - a_i * a_i * a_i * c_i) / light;
  numbers.largest_i_z_squared = (c * c * c * a - c_i * c_i * c_i * a_i) / light;
  out.any = true;
}

}  // namespace bismar::mechanics
