// SPDX-License-Identifier: MIT
// Enclosures of I, channel and T. Each number is taken at the corner of the box that its trends
// name; where a trend turns within the proportions of is_enclosable(), the number may change the
// wrong way by the stated power of that size.
#include "mechanics/fillet.hpp"
#include "mechanics/section_box_parts.hpp"
#include "mechanics/sections/shear_energy.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace bismar::mechanics {

namespace {

/// Height, width, web, flange and root radius of one corner.
struct Sizes {
  double h = 0.0;
  double b = 0.0;
  double w = 0.0;
  double f = 0.0;
  double r = 0.0;
};

/// The box, the logarithms of its ratios, and whether it is as usual profiles are, where several
/// numbers that turn elsewhere are monotone.
struct ProfileBox {
  Ends h;
  Ends b;
  Ends w;
  Ends f;
  Ends r;
  double in_h = 0.0;
  double in_b = 0.0;
  double in_w = 0.0;
  double in_f = 0.0;
  double in_r = 0.0;
  bool usual = false;

  explicit ProfileBox(const SizesBox& box)
      : h(ends(box.sizes[0])),
        b(ends(box.sizes[1])),
        w(ends(box.sizes[2])),
        f(ends(box.sizes[3])),
        r(ends(box.root_radius)),
        in_h(h.spread()),
        in_b(b.spread()),
        in_w(w.spread()),
        in_f(f.spread()),
        in_r(r.spread()),
        usual(w.lower >= 0.2 * f.upper && w.upper <= 1.2 * f.lower &&
              f.upper <= 0.12 * std::min(h.lower, b.lower)) {}

  [[nodiscard]] Sizes largest() const { return {h.upper, b.upper, w.upper, f.upper, r.upper}; }
  [[nodiscard]] Sizes least() const { return {h.lower, b.lower, w.lower, f.lower, r.lower}; }
  /// An exponent that only boxes of unusual profiles need.
  [[nodiscard]] double unless_usual(double exponent) const { return usual ? 0.0 : exponent; }
};

/// Outline, counts and thicknesses that the three share.
void start(const ProfileBox& p, SectionBox& out, BoxNumbers& numbers, double flanges) {
  SectionProperties& best = out.best;
  best.height = p.h.lower;
  best.width = p.b.lower;
  best.wall = std::min(p.w.upper, p.f.upper);
  out.height = {p.h.lower, p.h.upper};
  out.width = {p.b.lower, p.b.upper};
  out.wall = {std::min(p.w.lower, p.f.lower), best.wall};
  out.ruling_dimension = {p.f.lower, p.f.upper};
  out.inner_perimeter = Interval(0.0);
  numbers.flanges = flanges;
  numbers.clear_web = p.h.upper - flanges * p.f.lower;
  out.any = true;
}

// --- I and channel -------------------------------------------------------------------------

/// Area and bending about y of two flanges, a web and `fillets` root fillets.
struct TwoFlanges {
  Sizes s;
  double fillets = 4.0;

  [[nodiscard]] double clear() const { return s.h - 2.0 * s.f; }
  [[nodiscard]] double area() const {
    return 2.0 * s.b * s.f + clear() * s.w + fillets * spandrel(s.r).area;
  }
  [[nodiscard]] double I_y() const {
    const double c = clear();
    return (s.b * s.h * s.h * s.h - (s.b - s.w) * c * c * c) / 12.0 +
           fillets * spandrel(s.r).second_moment(c / 2.0);
  }
  [[nodiscard]] double half_first_moment() const {
    const double c = clear();
    return (s.b * s.h * s.h - (s.b - s.w) * c * c) / 8.0 +
           fillets / 2.0 * spandrel(s.r).first_moment(c / 2.0);
  }
  [[nodiscard]] double junction_shear_area() const {
    const double end = clear() / 2.0 - s.r;
    return I_y() * s.w / (half_first_moment() - s.w * end * end / 2.0);
  }
  /// Along a flange from a tip `overhang` from the web.
  [[nodiscard]] double flange_shear_area(double overhang) const {
    return I_y() / ((s.h - s.f) / 2.0 * overhang);
  }
};

/// What I and channel share.
void enclose_two_flanges(const ProfileBox& p,
                         double fillets,
                         double overhang_share,
                         SectionBox& out,
                         BoxNumbers& numbers) {
  start(p, out, numbers, 2.0);
  const Sizes top = p.largest();
  SectionProperties& best = out.best;
  const TwoFlanges largest{top, fillets};
  const TwoFlanges least{p.least(), fillets};
  best.area = largest.area();
  best.I_y = largest.I_y();
  best.W_el_y = 2.0 * best.I_y / top.h;
  best.A_v_z = best.I_y * top.w / largest.half_first_moment() * slack(0.17 * p.in_f + 0.1 * p.in_r);
  best.A_v_junction =
      TwoFlanges{{top.h, p.b.lower, top.w, p.f.lower, p.r.lower}, fillets}.junction_shear_area() *
      slack(0.1 * p.in_b + 0.01 * p.in_f);
  best.A_v_flange = TwoFlanges{{top.h, p.b.lower, top.w, top.f, top.r}, fillets}.flange_shear_area(
      (p.b.lower - top.w) * overhang_share);
  best.A_s_z = energy_shear_area_i(top.h, top.b, top.w, top.f);
  best.A_s_y = 2.0 * top.b * top.f / 1.2;
  best.junction_ratio = 1.0 - 2.0 * top.f / p.h.lower;
  PlateElement* plates = resized(best.plates, 2);
  plates[0] = {.kind = PlateElement::Kind::outstand,
               .ratio = ((p.b.lower - top.w) * overhang_share - top.r) / top.f};
  plates[1] = {.kind = PlateElement::Kind::internal_bending,
               .ratio = (p.h.lower - 2.0 * top.f - 2.0 * top.r) / top.w};
  out.area = widened(least.area(), best.area);
  const double rounding_off = (2.0 - std::numbers::pi / 2.0) * fillets;
  const auto outline = [](const Sizes& s) { return 2.0 * s.h + 4.0 * s.b - 2.0 * s.w; };
  out.perimeter = widened(outline({p.h.lower, p.b.lower, p.w.upper}) - rounding_off * p.r.upper,
                          outline({p.h.upper, p.b.upper, p.w.lower}) - rounding_off * p.r.lower);
  const TwoFlanges stretched{{top.h, top.b, p.w.lower, top.f, top.r}, fillets};
  numbers.largest_i_y_squared =
      stretched.I_y() / stretched.area() * slack(0.34 * p.in_f + 0.23 * p.in_r);
}

/// Torsion constant of an I; `parts` 1, of half of it 1/2.
double rolled_torsion(const Sizes& s, double web_length) {
  const double half = s.r + s.w / 2.0;
  const double d = (half * half + (s.r + s.f) * (s.r + s.f) - s.r * s.r) / (2.0 * s.r + s.f);
  const double alpha = s.w / s.f * (0.145 + 0.1 * s.r / s.f);
  return (s.b - 0.63 * s.f) * s.f * s.f * s.f / 3.0 + web_length * s.w * s.w * s.w / 3.0 +
         alpha * d * d * d * d;
}

/// I_z of two flanges and a web with fillets on both sides, its parts.
struct LateralParts {
  double flanges = 0.0;
  double web = 0.0;
  [[nodiscard]] double sum() const { return flanges + web; }
};

LateralParts lateral_parts(const Sizes& s, double flanges) {
  const Spandrel fillet = spandrel(s.r);
  return {.flanges = flanges * s.f * s.b * s.b * s.b / 12.0,
          .web = (s.h - flanges * s.f) * s.w * s.w * s.w / 12.0 +
                 2.0 * flanges * (fillet.i + s.w * fillet.s + s.w * s.w / 4.0 * fillet.area)};
}

}  // namespace

void enclose_i_section(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const ProfileBox p(box);
  enclose_two_flanges(p, 4.0, 0.5, out, numbers);
  const Sizes top = p.largest();
  SectionProperties& best = out.best;
  best.forming = box.forming == Forming::unknown ? Forming::hot_finished : box.forming;
  const double I_z = lateral_parts(top, 2.0).sum();
  best.I_z = I_z;
  best.W_el_z = 2.0 * I_z / top.b;
  best.A_v_y = 8.0 * I_z / (top.b * top.b) * slack(p.unless_usual(0.4) * p.in_b);
  const double torsion = 2.0 * rolled_torsion(top, (top.h - 2.0 * top.f) / 2.0);
  best.I_t = torsion * slack(p.unless_usual(0.5) * p.in_f);
  best.W_t = std::min(torsion / std::max(top.w, top.f) * slack(0.6 * p.in_w + 0.85 * p.in_f),
                      best.I_t / std::max(p.w.lower, p.f.lower));
  best.I_w = top.f * top.b * top.b * top.b * (top.h - top.f) * (top.h - top.f) / 24.0;
  best.fibres.clear();

  const Sizes across{p.h.lower, top.b, p.w.lower, top.f, p.r.lower};
  numbers.largest_i_z_squared = lateral_parts(across, 2.0).sum() / TwoFlanges{across}.area() *
                                slack(p.unless_usual(0.45) * p.in_w + 0.2 * p.in_r);
  const TwoFlanges shallow{across};
  numbers.least_slope_of_axes = shallow.I_y() / lateral_parts(across, 2.0).sum() *
                                slack(-p.unless_usual(0.62) * p.in_w - 0.12 * p.in_r);
  const Sizes small{p.h.lower, p.b.lower, p.w.upper, p.f.lower, p.r.lower};
  numbers.least_polar_squared = (TwoFlanges{small}.I_y() + lateral_parts(small, 2.0).sum()) /
                                TwoFlanges{small}.area() * slack(-0.22 * p.in_f - 0.26 * p.in_r);
}

namespace {

/// Across: y from the back of a channel's web.
struct Channel {
  TwoFlanges whole;
  double area = 0.0;
  double centroid = 0.0;
  double I_z = 0.0;
  double I_y = 0.0;

  explicit Channel(const Sizes& s) : whole{s, 2.0}, area(whole.area()), I_y(whole.I_y()) {
    const Spandrel fillet = spandrel(s.r);
    const double first =
        s.b * s.b * s.f + whole.clear() * s.w * s.w / 2.0 + 2.0 * (fillet.area * s.w + fillet.s);
    const double second = 2.0 / 3.0 * s.f * s.b * s.b * s.b +
                          whole.clear() * s.w * s.w * s.w / 3.0 +
                          2.0 * (fillet.i + 2.0 * s.w * fillet.s + s.w * s.w * fillet.area);
    centroid = first / area;
    I_z = second - centroid * first;
  }
  [[nodiscard]] double reach() const { return whole.s.b - centroid; }
  [[nodiscard]] double from_web() const { return centroid - whole.s.w / 2.0; }
  [[nodiscard]] double shear_centre() const {
    const Sizes& s = whole.s;
    const double across = s.b - s.w / 2.0;
    const double along = s.h - s.f;
    return s.f * across * across * along * along / (4.0 * I_y) + from_web();
  }
  [[nodiscard]] double A_v_y() const {
    const Sizes& s = whole.s;
    const double face = s.h / 2.0 - s.f;
    const double end = face - s.r;
    const double length = end > 0.0 ? std::min(face, end + s.r * s.w / (2.0 * end)) : face;
    return I_z / std::max(reach() * reach() / 2.0, length * from_web());
  }
  [[nodiscard]] double I_t() const {
    const Sizes& s = whole.s;
    const double t = s.w / s.f;
    const double r = s.r / s.f;
    const double alpha = -0.0908 + 0.2621 * t + 0.1231 * r - 0.0752 * t * r - 0.0945 * t * t;
    const double d =
        2.0 * ((3.0 * s.r + s.w + s.f) - std::sqrt(2.0 * (2.0 * s.r + s.w) * (2.0 * s.r + s.f)));
    const double cube = s.f * s.f * s.f;
    return 2.0 / 3.0 * s.b * cube + whole.clear() * s.w * s.w * s.w / 3.0 +
           2.0 * alpha * d * d * d * d - 0.42 * cube * s.f;
  }
  [[nodiscard]] double I_w() const {
    const double m = (whole.s.h - whole.s.f) * (whole.s.h - whole.s.f);
    return m / 4.0 * (I_z - area * from_web() * from_web() * (m * area / (4.0 * I_y) - 1.0));
  }
};

}  // namespace

void enclose_channel(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const ProfileBox p(box);
  enclose_two_flanges(p, 2.0, 1.0, out, numbers);
  const Channel top(p.largest());
  const Sizes& s = top.whole.s;
  SectionProperties& best = out.best;
  best.forming = box.forming == Forming::unknown ? Forming::hot_finished : box.forming;
  best.I_z = top.I_z;
  // Moduli of the back of the web and of the tips, and fibres that have just these.
  const double of_back =
      top.I_z / top.centroid * slack((p.usual ? 0.05 : 0.29) * p.in_w + 0.03 * p.in_r);
  const double of_tips = top.I_z / top.reach() * slack(0.04 * p.in_w + 0.01 * p.in_r);
  best.W_el_z = std::min(of_back, of_tips);
  const double tips = std::min(top.I_z / of_tips, p.b.lower);
  const double back = std::min(top.I_z / of_back, p.b.lower - tips);
  best.W_el_z = top.I_z / std::max(tips, back);
  best.width = tips + back;
  SectionPoint* fibres = resized(best.fibres, 4);
  fibres[0] = {.y = -back, .z = -s.h / 2.0};
  fibres[1] = {.y = -back, .z = s.h / 2.0};
  fibres[2] = {.y = tips, .z = -s.h / 2.0};
  fibres[3] = {.y = tips, .z = s.h / 2.0};
  best.A_v_y = Channel({p.h.lower, s.b, s.w, s.f, s.r}).A_v_y() *
               slack(0.25 * p.in_h + 0.1 * p.in_w + 0.05 * p.in_r);
  const double torsion = top.I_t();
  best.I_t = torsion * slack(p.unless_usual(0.1) * p.in_w + p.unless_usual(0.21) * p.in_r);
  best.W_t =
      std::min(torsion / std::max(s.w, s.f) * slack(1.1 * p.in_w + 0.6 * p.in_f + 0.21 * p.in_r),
               best.I_t / std::max(p.w.lower, p.f.lower));
  best.I_w = top.I_w() * slack(0.13 * p.in_r);
  best.y_shear = -Channel({s.h, p.b.lower, s.w, p.f.lower, s.r}).shear_centre() *
                 slack(-0.02 * p.in_h - 0.02 * p.in_f - 0.01 * p.in_r);

  const Channel across({p.h.lower, s.b, p.w.lower, s.f, p.r.lower});
  numbers.largest_i_z_squared =
      across.I_z / across.area *
      slack(0.15 * p.in_h + 0.13 * p.in_w + 0.15 * p.in_f + 0.12 * p.in_r);
  const Channel small({p.h.lower, p.b.lower, s.w, p.f.lower, p.r.lower});
  numbers.least_polar_squared =
      (small.I_y + small.I_z) / small.area * slack(-0.09 * p.in_w - 0.25 * p.in_f - 0.11 * p.in_r);
  numbers.least_slope_of_axes = Channel(p.least()).I_y / top.I_z;
}

// --- T -------------------------------------------------------------------------------------

namespace {

/// z downwards from the flange's outer face.
struct Tee {
  Sizes s;
  double area = 0.0;
  double centroid = 0.0;
  double I_y = 0.0;
  double I_z = 0.0;

  explicit Tee(const Sizes& sizes) : s(sizes) {
    const Spandrel fillet = spandrel(s.r);
    const double stem = s.h - s.f;
    const double middle = s.f + stem / 2.0;
    const double flange_area = s.b * s.f;
    const double stem_area = s.w * stem;
    area = flange_area + stem_area + 2.0 * fillet.area;
    const double first =
        flange_area * s.f / 2.0 + stem_area * middle + 2.0 * (s.f * fillet.area + fillet.s);
    const double second = flange_area * s.f * s.f / 3.0 +
                          stem_area * (middle * middle + stem * stem / 12.0) +
                          2.0 * (s.f * s.f * fillet.area + 2.0 * s.f * fillet.s + fillet.i);
    centroid = first / area;
    I_y = second - centroid * first;
    I_z = lateral_parts(s, 1.0).sum();
  }
  [[nodiscard]] double tip() const { return s.h - centroid; }
  [[nodiscard]] double lever() const { return centroid - s.f / 2.0; }
};

}  // namespace

void enclose_tee(const SizesBox& box, SectionBox& out, BoxNumbers& numbers) {
  const ProfileBox p(box);
  start(p, out, numbers, 1.0);
  const Tee top(p.largest());
  const Tee least(p.least());
  const Sizes& s = top.s;
  SectionProperties& best = out.best;
  best.forming = box.forming == Forming::unknown ? Forming::hot_finished : box.forming;
  best.area = top.area;
  best.I_y = top.I_y;
  best.I_z = top.I_z;
  const double of_top =
      top.I_y / top.centroid * slack((p.usual ? 0.29 : 0.53) * p.in_f + 0.16 * p.in_r);
  const double of_tip = top.I_y / top.tip() * slack(0.03 * p.in_f + 0.01 * p.in_r);
  best.W_el_y = std::min(of_top, of_tip);
  best.W_el_z = 2.0 * top.I_z / s.b;
  // Half of what the tip of the stem takes of M_z, as thin as the box has it.
  const Sizes thin{s.h, s.b, p.w.lower, s.f, s.r};
  const double of_stem =
      lateral_parts(thin, 1.0).sum() * 2.0 / p.w.lower * slack(p.unless_usual(0.75) * p.in_w);
  // The inner face of the flange lies nearer to both axes than the outer one.
  SectionPoint* fibres = resized(best.fibres, 4);
  for (int side = 0; side < 2; ++side) {
    const double sign = side == 0 ? -1.0 : 1.0;
    fibres[2 * side] = {.y = sign * s.b / 2.0, .z = top.I_y / of_top};
    fibres[2 * side + 1] = {.y = sign * top.I_z / of_stem, .z = -top.I_y / of_tip};
  }
  best.A_v_z = 2.0 * top.I_y / (top.tip() * top.tip()) *
               slack(p.unless_usual(0.2) * p.in_h + 0.06 * p.in_b + 0.1 * p.in_f + 0.05 * p.in_r);
  best.A_v_y = 8.0 * top.I_z / (s.b * s.b) * slack(p.unless_usual(0.77) * p.in_b);
  const Tee narrow({s.h, p.b.lower, s.w, s.f, s.r});
  best.A_v_flange =
      narrow.I_y / ((p.b.lower - s.w) / 2.0 * narrow.lever()) *
      slack((p.usual ? 0.05 : 0.28) * (p.in_b + p.in_w) + (p.usual ? 0.26 : 0.8) * p.in_r);
  best.A_s_z = energy_shear_area_tee(s.h, s.b, s.w, s.f) *
               slack(p.unless_usual(0.86) * p.in_h + 0.04 * p.in_b + 0.04 * p.in_f);
  best.A_s_y = s.b * s.f / 1.2;
  const auto torsion_of = [](const Sizes& t) {
    return rolled_torsion(t, t.h - t.f) - 0.105 * t.w * t.w * t.w * t.w;
  };
  const double torsion = torsion_of(s);
  best.I_t = torsion * slack(p.unless_usual(0.42) * p.in_f);
  best.W_t = std::min(torsion / std::max(s.w, s.f) * slack(0.29 * p.in_w + 0.9 * p.in_f),
                      best.I_t / std::max(p.w.lower, p.f.lower));
  const auto cube = [](double x) { return x * x * x; };
  best.I_w = cube(s.b * s.f) / 144.0 + cube((s.h - p.f.lower / 2.0) * s.w) / 36.0;
  best.z_shear = Tee({p.h.lower, s.b, p.w.lower, s.f, p.r.lower}).lever() * slack(-0.26 * p.in_r);
  PlateElement* plates = resized(best.plates, 2);
  plates[0] = {.kind = PlateElement::Kind::outstand,
               .ratio = ((p.b.lower - s.w) / 2.0 - s.r) / s.f};
  plates[1] = {.kind = PlateElement::Kind::outstand, .ratio = (p.h.lower - s.f - s.r) / s.w};

  out.area = widened(least.area, top.area);
  const double rounding_off = 4.0 - std::numbers::pi;
  out.perimeter = widened(2.0 * (p.h.lower + p.b.lower) - rounding_off * p.r.upper,
                          2.0 * (p.h.upper + p.b.upper) - rounding_off * p.r.lower);
  const Tee deep({s.h, p.b.lower, s.w, p.f.lower, s.r});
  numbers.largest_i_y_squared =
      deep.I_y / deep.area * slack(0.15 * p.in_b + 0.15 * p.in_w + 0.13 * p.in_f + 0.37 * p.in_r);
  const Tee across({p.h.lower, s.b, p.w.lower, s.f, p.r.lower});
  numbers.largest_i_z_squared =
      across.I_z / across.area * slack(p.unless_usual(0.8) * p.in_w + 0.17 * p.in_r);
  numbers.least_slope_of_axes =
      across.I_y / across.I_z * slack(-p.unless_usual(0.89) * p.in_w - 0.26 * p.in_r);
  const Tee compact({p.h.lower, p.b.lower, p.w.lower, s.f, s.r});
  numbers.least_polar_squared =
      std::max((least.I_y + least.I_z) / top.area,
               (compact.I_y + compact.I_z) / compact.area *
                   slack(-0.56 * p.in_b - 0.29 * p.in_w - 0.32 * p.in_f - 0.05 * p.in_r));
}

}  // namespace bismar::mechanics
