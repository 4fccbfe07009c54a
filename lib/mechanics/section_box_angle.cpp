// SPDX-License-Identifier: MIT
// Enclosure of angles, whose axes are not principal.
#include "mechanics/section_box_parts.hpp"
#include "mechanics/sections/outline_moments.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace bismar::mechanics {

namespace {

/// What a number of an angle is at a corner; lengths from the heel.
struct Angle {
  double h = 0.0;
  double b = 0.0;
  double t = 0.0;
  double root = 0.0;
  double toe = 0.0;
  double area = 0.0;
  double y_s = 0.0;
  double z_s = 0.0;
  double I_y = 0.0;
  double I_z = 0.0;
  double I_yz = 0.0;  ///< Below zero: the legs point along +y and +z.

  Angle(double height, double width, double thickness, double root_radius, double toe_radius)
      : h(height), b(width), t(thickness), root(root_radius), toe(toe_radius) {
    OutlineMoments m;
    m.add_rectangle(0.0, b, 0.0, t);
    m.add_rectangle(0.0, t, t, h);
    m.add_spandrel(t, t, 1.0, 1.0, root, 1.0);
    m.add_spandrel(b, t, -1.0, -1.0, toe, -1.0);
    m.add_spandrel(t, h, -1.0, -1.0, toe, -1.0);
    area = m.area;
    y_s = m.first_y / m.area;
    z_s = m.first_z / m.area;
    I_y = m.second_zz - z_s * m.first_z;
    I_z = m.second_yy - y_s * m.first_y;
    I_yz = m.second_yz - y_s * m.first_z;
  }
  [[nodiscard]] double determinant() const { return I_y * I_z - I_yz * I_yz; }
  [[nodiscard]] double I_v() const {
    return determinant() / ((I_y + I_z) / 2.0 + std::hypot((I_y - I_z) / 2.0, I_yz));
  }
  /// The corners of the convex outline, as angle() lists them.
  [[nodiscard]] std::array<SectionPoint, 7> fibres() const {
    const double cut = toe * (2.0 - std::numbers::sqrt2);
    return {{{-y_s, -z_s},
             {b - y_s, -z_s},
             {b - y_s, t - cut - z_s},
             {b - cut - y_s, t - z_s},
             {t - y_s, h - cut - z_s},
             {t - cut - y_s, h - z_s},
             {-y_s, h - z_s}}};
  }
  /// Bending stress at a point for M_y = 1, and for M_z = 1.
  [[nodiscard]] double of_y(const SectionPoint& p) const {
    return (I_z * p.z - I_yz * p.y) / determinant();
  }
  [[nodiscard]] double of_z(const SectionPoint& p) const {
    return (I_y * p.y - I_yz * p.z) / determinant();
  }
};

/// Largest shear flow over the wall along a leg, its bending stress linear from tip to end: as in
/// sections/angle.cpp.
double peak_flow(double at_tip, double at_end, double length) {
  const double whole = std::abs(at_tip + at_end) / 2.0 * length;
  return at_tip * at_end >= 0.0
             ? whole
             : std::max(whole, at_tip * at_tip / std::abs(at_tip - at_end) * length / 2.0);
}

double shear_area(const Angle& a, bool along_z) {
  const auto stress = [&](double y, double z) {
    return along_z ? a.of_y({.y = y, .z = z}) : a.of_z({.y = y, .z = z});
  };
  const double y_middle = a.t / 2.0 - a.y_s;
  const double z_middle = a.t / 2.0 - a.z_s;
  return 1.0 / std::max(peak_flow(stress(y_middle, a.h - a.z_s), stress(y_middle, -a.z_s), a.h),
                        peak_flow(stress(a.b - a.y_s, z_middle), stress(-a.y_s, z_middle), a.b));
}

double torsion_constant(const Angle& a) {
  const double t = a.t;
  const double d = 2.0 * ((3.0 * a.root + 2.0 * t) - std::numbers::sqrt2 * (2.0 * a.root + t));
  const double cube = t * t * t;
  return (a.b + a.h - t) * cube / 3.0 + (0.07 + 0.076 * a.root / t) * d * d * d * d -
         0.21 * cube * t;
}

double warping_constant(const Angle& a) {
  const double along = (a.h - a.t / 2.0) * a.t;
  const double across = (a.b - a.t / 2.0) * a.t;
  return (along * along * along + across * across * across) / 36.0;
}

/// How the bending stress at each fibre may grow with the sizes, where it should fall: powers of
/// height, width and root radius, and of the toe radius, which is at its lower end or its upper
/// one.
struct FibrePowers {
  double h = 0.0;
  double b = 0.0;
  double root = 0.0;
  double toe = 0.0;
  bool blunt = false;
};
// By the fibres, of M_y; those of M_z are the same with the legs exchanged. The stress at the far
// corner of the leg that lies along the axis changes its sign; it is taken from its parts.
constexpr std::array<FibrePowers, 7> powers = {{
    {.root = 0.01},
    {},
    {.b = 0.69, .root = 0.09, .toe = 0.11, .blunt = true},
    {.b = 1.34, .root = 0.1, .toe = 0.25},
    {.root = 0.01, .toe = 0.05},
    {.root = 0.01, .toe = 0.07},
    {.b = 0.15, .root = 0.01},
}};
/// The fibre that is this one with the legs exchanged.
constexpr std::array<std::size_t, 7> mirrored = {0, 6, 5, 4, 3, 2, 1};

struct Spreads {
  double h = 0.0;
  double b = 0.0;
  double root = 0.0;
  double toe = 0.0;
};

double power(const FibrePowers& p, const Spreads& in) {
  return slack(-(p.h * in.h + p.b * in.b + p.root * in.root + p.toe * in.toe));
}

/// Least magnitude of a - b.
double least_difference(const Ends& a, const Ends& b) {
  return std::max({0.0, a.lower - b.upper, b.lower - a.upper});
}

/// Least magnitude over a range.
double nearest_to_zero(double lower, double upper) {
  return lower > 0.0 ? lower : upper < 0.0 ? -upper : 0.0;
}

struct Turn {
  double least = 0.0;
  double largest = 0.0;
};

/// Angle of the major axis for I_y - I_z and -I_yz > 0 in these ranges.
Turn principal_angles(const Ends& difference, const Ends& product) {
  const auto at = [](double d, double p) { return std::atan2(2.0 * p, d) / 2.0; };
  const double a = at(difference.upper, product.lower);
  const double b = at(difference.upper, product.upper);
  const double c = at(difference.lower, product.lower);
  const double d = at(difference.lower, product.upper);
  return {.least = std::min(a, b), .largest = std::max(c, d)};
}

}  // namespace

void enclose_angle(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const Ends h = ends(box.sizes[0]);
  const Ends b = ends(box.sizes[1]);
  const Ends t = ends(box.sizes[2]);
  const Ends root = ends(box.root_radius);
  const Ends toe = ends(box.toe_radius);
  const Spreads in{h.spread(), b.spread(), root.spread(), toe.spread()};
  const double in_t = t.spread();
  // The larger angle contains the smaller one with the heel in the same place, so that its second
  // moments about any axis through its own centroid are larger.
  const Angle top(h.upper, b.upper, t.upper, root.upper, toe.lower);
  const Angle least(h.lower, b.lower, t.lower, root.lower, toe.upper);
  SectionProperties& best = out.best;
  best.forming = box.forming == Forming::unknown ? Forming::hot_finished : box.forming;
  best.height = h.lower;
  best.width = b.lower;
  best.wall = t.upper;
  best.area = top.area;
  // |I_yz| over the determinant falls with every size but the radii.
  const double stiffer = slack(0.01 * in.root);
  best.I_y = top.I_y * stiffer;
  best.I_z = top.I_z * stiffer;
  best.I_yz = top.I_yz * stiffer;
  best.I_t = torsion_constant(top);
  best.W_t = best.I_t / t.upper;
  best.I_w = warping_constant(top);
  best.A_s_z = h.upper * t.upper / 1.2;
  best.A_s_y = b.upper * t.upper / 1.2;
  const double of_shear = 0.02 * in.root;
  best.A_v_z = shear_area(top, true) * slack(of_shear + 0.03 * in.b);
  best.A_v_y = shear_area(top, false) * slack(of_shear + 0.03 * in.h);

  // Fibres at which M_y and M_z make just the least stress of the box: (z, y) of them solve the
  // askew bending formula with the tensor of `best`.
  const Angle blunt(h.upper, b.upper, t.upper, root.upper, toe.upper);
  const auto sharp_points = top.fibres();
  const auto blunt_points = blunt.fibres();
  const Ends across{
      least.z_s,
      Angle(h.upper, b.lower, t.upper, root.lower, toe.lower).z_s * slack(0.04 * in.root)};
  const Ends along{
      least.y_s,
      Angle(h.lower, b.upper, t.upper, root.lower, toe.lower).y_s * slack(0.04 * in.root)};
  // The centroid moves away along one leg and back along the other.
  const Ends z_s{
      Angle(h.lower, b.upper, t.lower, root.upper, toe.upper).z_s * slack(-0.04 * in.root),
      across.upper};
  const Ends y_s{
      Angle(h.upper, b.lower, t.lower, root.upper, toe.upper).y_s * slack(-0.04 * in.root),
      along.upper};
  const Ends product{-least.I_yz * slack(-0.02 * in.root), -top.I_yz * slack(0.05 * in.root)};
  const Ends I_y{least.I_y, top.I_y};
  const Ends I_z{least.I_z, top.I_z};
  const double determinant = top.determinant();
  const double far_of_y = least_difference({I_z.lower * z_s.lower, I_z.upper * z_s.upper},
                                           {product.lower * (b.lower - y_s.upper),
                                            product.upper * (b.upper - y_s.lower)}) /
                          determinant;
  const double far_of_z = least_difference({I_y.lower * y_s.lower, I_y.upper * y_s.upper},
                                           {product.lower * (h.lower - z_s.upper),
                                            product.upper * (h.upper - z_s.lower)}) /
                          determinant;
  SectionPoint* fibres = resized(best.fibres, powers.size());
  const Spreads exchanged{in.b, in.h, in.root, in.toe};
  double of_y_most = 0.0;
  double of_z_most = 0.0;
  for (std::size_t k = 0; k < powers.size(); ++k) {
    const FibrePowers& py = powers[k];
    const FibrePowers& pz = powers[mirrored[k]];
    const Angle& ay = py.blunt ? blunt : top;
    const Angle& az = pz.blunt ? blunt : top;
    const double g =
        k == 1 ? far_of_y
               : std::abs(ay.of_y(py.blunt ? blunt_points[k] : sharp_points[k])) * power(py, in);
    const double m = k == 6 ? far_of_z
                            : std::abs(az.of_z(pz.blunt ? blunt_points[k] : sharp_points[k])) *
                                  power(pz, exchanged);
    of_y_most = std::max(of_y_most, g);
    of_z_most = std::max(of_z_most, m);
    // of_y = g and of_z = m: (y, z) = tensor (m, g) with the product's sign.
    fibres[k] = {.y = best.I_z * m + best.I_yz * g, .z = best.I_yz * m + best.I_y * g};
  }
  best.W_el_y = 1.0 / of_y_most;
  best.W_el_z = 1.0 / of_z_most;

  // The shear centre in the principal axes as near as the box has it.
  const Ends from_y{-(Angle(h.lower, b.upper, t.lower, root.lower, toe.lower).y_s - t.lower / 2.0) *
                        slack(0.06 * in.root),
                    -(Angle(h.upper, b.lower, t.upper, root.upper, toe.upper).y_s - t.upper / 2.0) *
                        slack(-0.06 * in.root)};
  const Ends from_z{-(Angle(h.upper, b.lower, t.lower, root.lower, toe.lower).z_s - t.lower / 2.0) *
                        slack(0.06 * in.root),
                    -(Angle(h.lower, b.upper, t.upper, root.upper, toe.upper).z_s - t.upper / 2.0) *
                        slack(-0.06 * in.root)};
  const Turn turn = principal_angles({I_y.lower - I_z.upper, I_y.upper - I_z.lower}, product);
  // The angle lies between 0 and a right one, so that sine and cosine are positive.
  const Ends cosine{std::cos(turn.largest), std::cos(turn.least)};
  const Ends sine{std::sin(turn.least), std::sin(turn.largest)};
  const double u = nearest_to_zero(from_y.lower * cosine.upper + from_z.lower * sine.upper,
                                   from_y.upper * cosine.lower + from_z.upper * sine.lower);
  const double v = nearest_to_zero(from_z.lower * cosine.upper - from_y.upper * sine.lower,
                                   from_z.upper * cosine.lower - from_y.lower * sine.upper);
  const double angle = best.principal_angle();
  best.y_shear = u * std::cos(angle) - v * std::sin(angle);
  best.z_shear = u * std::sin(angle) + v * std::cos(angle);

  PlateElement* plates = resized(best.plates, 2);
  plates[0] = {.kind = PlateElement::Kind::outstand,
               .ratio = (h.lower - t.upper - root.upper) / t.upper};
  plates[1] = {.kind = PlateElement::Kind::outstand,
               .ratio = (b.lower - t.upper - root.upper) / t.upper};

  out.area = widened(least.area, top.area);
  const double rounding_off = 2.0 - std::numbers::pi / 2.0;
  out.perimeter =
      widened(2.0 * (h.lower + b.lower) - rounding_off * (root.upper + 2.0 * toe.upper),
              2.0 * (h.upper + b.upper) - rounding_off * (root.lower + 2.0 * toe.lower));
  out.inner_perimeter = Interval(0.0);
  out.height = {h.lower, h.upper};
  out.width = {b.lower, b.upper};
  out.wall = out.ruling_dimension = {t.lower, t.upper};
  numbers.largest_i_y_squared = top.I_y / least.area;
  numbers.largest_i_z_squared =
      std::min(top.I_v() / least.area,
               top.I_v() / top.area * slack(0.41 * (in.h + in.b) + 0.1 * in_t + 0.1 * in.root)) *
      slack(0.02 * in.toe + 0.01 * in.root);
  const Angle compact(h.lower, b.lower, t.upper, root.upper, toe.upper);
  numbers.least_polar_squared = (compact.I_y + compact.I_z) / compact.area * slack(-0.01 * in.root);
  out.any = true;
}

}  // namespace bismar::mechanics
