// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section_box.hpp>

#include "mechanics/section_box_parts.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
/// A section as stiff across as in its depth does not turn aside; as in lateral_resistance.cpp.
constexpr double deeper = 1.001;

void require_box(const SizesBox& box) {
  if (!can_enclose(box.family) || box.sizes.size() != size_variables(box.family).size()) {
    throw InternalError("a box of sizes that is none of its family");
  }
  for (const Interval& size : box.sizes) {
    if (!(size.lower() > 0.0) || size.is_empty() || !std::isfinite(size.upper())) {
      throw InternalError("a box of sizes that are not all above zero");
    }
  }
}

bool may_turn(SectionFamily family) {
  switch (family) {
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
      return true;
    default:
      return false;
  }
}

/// A hot-finished I gets the better column curve above h / b = 1.2 and the better curve of lateral
/// buckling up to 2. Where the box holds such sections the outline shows them, made smaller for it,
/// never larger.
void place_outline_of_rolled_i(SectionBox& out) {
  SectionProperties& best = out.best;
  constexpr double inside = 1.0 - 1e-9;
  if (out.height.upper() > 1.2 * out.width.lower() && !(best.height > 1.2 * best.width)) {
    best.width = best.height / 1.2 * inside;
  }
  constexpr double slack = 1.0 + 1e-9;
  if (out.height.lower() <= 2.0 * out.width.upper() * slack && best.height > 2.0 * best.width) {
    best.height = 2.0 * best.width;
  }
}

/// Outline, widening for rounding and what else all families share.
void complete(const SizesBox& box, const mechanics::BoxNumbers& numbers, SectionBox& out) {
  SectionProperties& best = out.best;
  for (double* number : {&best.area,
                         &best.I_y,
                         &best.I_z,
                         &best.W_el_y,
                         &best.W_el_z,
                         &best.I_t,
                         &best.W_t,
                         &best.I_w,
                         &best.A_v_y,
                         &best.A_v_z,
                         &best.A_s_y,
                         &best.A_s_z,
                         &best.A_v_junction,
                         &best.A_v_flange,
                         &best.wall}) {
    *number *= 1.0 + mechanics::box_rounding;
  }
  best.I_yz *= 1.0 + mechanics::box_rounding;
  for (PlateElement& plate : best.plates) {
    plate.ratio = std::max(0.0, plate.ratio * (1.0 - mechanics::box_rounding));
  }
  for (SectionPoint& fibre : best.fibres) {
    fibre.y *= 1.0 - mechanics::box_rounding;
    fibre.z *= 1.0 - mechanics::box_rounding;
  }
  best.W_pl_y = best.W_pl_z = infinity;
  best.perimeter = out.perimeter.lower();
  best.inner_perimeter = out.inner_perimeter.lower();

  constexpr double wider = 1.0 + 1e-10;
  const double weak = best.I_yz != 0.0 ? best.I_v() : best.I_z;
  out.slim_area = weak / (numbers.largest_i_z_squared * wider);
  if (best.I_yz == 0.0) {
    out.slim_area = std::min(out.slim_area, best.I_y / (numbers.largest_i_y_squared * wider));
  }
  if (may_turn(box.family) && !(numbers.least_slope_of_axes > deeper * wider)) {
    best.I_z = std::max(best.I_z, best.I_y / deeper * wider);
  }
  out.twisting_share =
      numbers.least_polar_squared > 0.0
          ? std::max(1.0, (best.I_y + best.I_z) / best.area / numbers.least_polar_squared * wider)
          : 1.0;

  out.large_height = out.height.upper();
  out.large_width = out.width.upper();
  if (box.family == SectionFamily::rectangular_tube) {
    // Clear webs are the outline less twice `wall`, which is the largest.
    out.large_height += 2.0 * (best.wall - out.wall.lower());
    out.large_width += 2.0 * (best.wall - out.wall.lower());
  }
  best.ruling_dimension = out.ruling_dimension.lower();
  out.large_ruling = best.ruling_dimension;
  if (box.family == SectionFamily::i_section && best.forming == Forming::hot_finished) {
    place_outline_of_rolled_i(out);
  }
  if (numbers.flanges > 0.0) {
    out.large_ruling = (out.large_height - numbers.clear_web) / numbers.flanges;
  }
}

}  // namespace

bool can_enclose(SectionFamily family) { return family != SectionFamily::polygon; }

bool is_enclosable(const SizesBox& box) {
  require_box(box);
  const auto ratio_within = [&](double most) {
    return box.sizes[1].upper() <= most * box.sizes[0].lower() &&
           most * box.sizes[1].lower() >= box.sizes[0].upper();
  };
  const auto wide_within = [&](double least, double most) {
    return box.sizes[1].upper() <= most * box.sizes[0].lower() &&
           box.sizes[1].lower() >= least * box.sizes[0].upper();
  };
  switch (box.family) {
    case SectionFamily::rectangular_tube:
    case SectionFamily::elliptical_tube:
      return ratio_within(20.0);
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee: {
      const Interval& web = box.sizes[2];
      const Interval& flange = box.sizes[3];
      const double smaller = std::min(box.sizes[0].lower(), box.sizes[1].lower());
      return wide_within(0.1, 3.0) && flange.upper() <= 0.15 * smaller &&
             web.lower() >= 0.05 * flange.upper() && web.upper() <= 2.0 * flange.lower() &&
             box.root_radius.upper() <= 2.0 * flange.lower();
    }
    case SectionFamily::angle: {
      const Interval& wall = box.sizes[2];
      const double smaller = std::min(box.sizes[0].lower(), box.sizes[1].lower());
      return ratio_within(3.0) && wall.upper() <= 0.25 * smaller &&
             box.root_radius.upper() <= 1.2 * wall.lower() &&
             box.toe_radius.upper() <= 0.8 * wall.lower();
    }
    default:
      return true;
  }
}

void enclose_sections(const SizesBox& box, SectionBox& out) {
  if (!is_enclosable(box)) {
    throw InternalError("a box of sizes of unusual proportions");
  }
  SectionProperties& best = out.best;
  out.any = false;
  best.family = box.family;
  best.forming = box.forming;
  best.smooth_outline = false;
  best.I_yz = best.I_w = best.y_shear = best.z_shear = 0.0;
  best.junction_ratio = best.A_v_junction = best.A_v_flange = 0.0;
  mechanics::BoxNumbers numbers;
  switch (box.family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_square:
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::solid_hexagon:
      mechanics::enclose_solid(box, out, numbers);
      break;
    case SectionFamily::round_tube:
      mechanics::enclose_round_tube(box, out, numbers);
      break;
    case SectionFamily::rectangular_tube:
      mechanics::enclose_rectangular_tube(box, out, numbers);
      break;
    case SectionFamily::elliptical_tube:
      mechanics::enclose_elliptical_tube(box, out, numbers);
      break;
    case SectionFamily::i_section:
      mechanics::enclose_i_section(box, out, numbers);
      break;
    case SectionFamily::channel:
      mechanics::enclose_channel(box, out, numbers);
      break;
    case SectionFamily::tee:
      mechanics::enclose_tee(box, out, numbers);
      break;
    case SectionFamily::angle:
      mechanics::enclose_angle(box, out, numbers);
      break;
    case SectionFamily::polygon:
      break;
  }
  if (out.any) {
    complete(box, numbers, out);
  }
}

SectionBox enclose_sections(const SizesBox& box) {
  SectionBox out;
  enclose_sections(box, out);
  return out;
}

namespace {

bool is_solid(SectionFamily family) {
  switch (family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_square:
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::solid_hexagon:
      return true;
    default:
      return false;
  }
}

/// The factor of tension of an edge crack (1.12 - 0.231 a/d + ...) and that of bending of any crack
/// may rise as the depth d of the material grows: the first with the power 0.0012 of d at most, the
/// second by less than d. The moduli take it twice, as the own mass grows with the area.
void raise_for_crack(const SectionBox& box, SectionProperties& out) {
  const bool solid = is_solid(out.family);
  const double deeper_by = solid ? std::max(box.height.upper() / box.height.lower(),
                                            box.width.upper() / box.width.lower())
                                 : box.wall.upper() / box.wall.lower();
  const double of_tension = std::pow(deeper_by, 0.002);
  const double of_bending = solid ? deeper_by * of_tension : of_tension * of_tension;
  out.area *= of_tension;
  out.W_el_y *= of_bending;
  out.W_el_z *= of_bending;
  for (SectionPoint& fibre : out.fibres) {
    fibre.y /= of_bending;
    fibre.z /= of_bending;
  }
}

}  // namespace

void make_best(const SectionBox& box, BestSection kind, SectionProperties& out) {
  out = box.best;
  const double varies = box.area.upper() / box.area.lower();
  switch (kind) {
    case BestSection::stiff:
      return;
    case BestSection::slim:
      out.area = box.slim_area;
      return;
    case BestSection::swift: {
      // rho_lightened x area = rho x slim area; A_s over it is at least that of any section.
      out.area = box.slim_area * varies;
      const double more = std::max(1.0, box.slim_area / box.area.lower());
      out.A_s_y *= more;
      out.A_s_z *= more;
      return;
    }
    case BestSection::large:
      out.height = box.large_height;
      out.width = box.large_width;
      out.ruling_dimension = box.large_ruling;
      return;
    case BestSection::tired:
      // 1.24 d^-0.107 is at 50.82 mm what 1.51 d^-0.157 is just beyond 51 mm.
      if (box.height.lower() < box.height.upper() || box.width.lower() < box.width.upper()) {
        out.height *= 0.996 * 0.996;  // the diameter goes with the root of h b
      }
      return;
    case BestSection::cracked:
      out.height = box.large_height;
      out.width = box.large_width;
      raise_for_crack(box, out);
      return;
    case BestSection::relieved:
      for (double* number : {&out.W_el_y,
                             &out.W_el_z,
                             &out.W_t,
                             &out.A_v_y,
                             &out.A_v_z,
                             &out.A_v_junction,
                             &out.A_v_flange}) {
        *number *= varies;
      }
      for (SectionPoint& fibre : out.fibres) {
        fibre.y /= varies;
        fibre.z /= varies;
      }
      if (out.family == SectionFamily::channel) {
        // The back of the web lies at `width` less the tip's distance, both of the fibres.
        out.width /= varies;
      }
      out.I_t *= box.twisting_share;
      out.I_w *= box.twisting_share;
      return;
    case BestSection::column:
      out.I_t *= box.twisting_share;
      out.I_w *= box.twisting_share;
      return;
  }
}

MemberMaterial lightened(const MemberMaterial& material, const SectionBox& box) {
  MemberMaterial result = material;
  const double share = box.area.lower() / box.area.upper() * (1.0 - 1e-10);
  for (std::optional<double>* value : {&result.rho, &result.alpha}) {
    if (*value) {
      **value *= share;
    }
  }
  return result;
}

std::span<const double> critical_ratios(SectionFamily family, Forming forming) {
  static constexpr std::array<double, 2> of_rolled_i = {1.2, 2.0};
  if (family == SectionFamily::i_section &&
      (forming == Forming::unknown || forming == Forming::hot_finished)) {
    return of_rolled_i;
  }
  return {};
}

}  // namespace bismar
