// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section_trends.hpp>

#include "mechanics/section_trend_table.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cstddef>
#include <vector>

namespace bismar {

namespace {

using V = SizeVariable;

constexpr std::array<V, 1> only_height = {V::height};
constexpr std::array<V, 2> two_sides = {V::height, V::width};
constexpr std::array<V, 2> round_wall = {V::height, V::wall};
constexpr std::array<V, 3> sides_and_wall = {V::height, V::width, V::wall};
constexpr std::array<V, 4> profile = {V::height, V::width, V::web, V::flange};

/// The quantity at the box corner at which it is least (or greatest) by these trends; nothing where
/// the corner is outside what they are declared for.
///
/// One corner is enough: all conditions on sizes, those of is_slender too, are linear, so that the
/// straight way from any section of the box to the corner stays within them, and every slope has
/// its sign along it.
std::optional<double> at_corner(SectionFamily family,
                                SectionQuantity quantity,
                                std::span<const Interval> box,
                                const FixedSizes& fixed,
                                Proportions proportions,
                                bool least) {
  const auto variables = size_variables(family);
  std::vector<double> sizes;
  for (std::size_t i = 0; i < box.size(); ++i) {
    const Trend trend = section_trend(family, quantity, variables[i], proportions);
    if (trend == Trend::neither) {
      return std::nullopt;
    }
    const bool low = (trend != Trend::falls) == least;
    sizes.push_back(low ? box[i].lower() : box[i].upper());
  }
  if (proportions == Proportions::slender && !is_slender(family, sizes, fixed)) {
    return std::nullopt;
  }
  try {
    return quantity_of(section_of(family, sizes, fixed), quantity);
  } catch (const Error&) {
    return std::nullopt;
  }
}

/// Bounds from parts, for quantities whose own trend is none.
class Parts {
 public:
  Parts(SectionFamily family,
        std::span<const Interval> box,
        const FixedSizes& fixed,
        Proportions proportions)
      : family_(family), box_(box), fixed_(fixed), proportions_(proportions) {}

  [[nodiscard]] std::optional<Interval> bound(SectionQuantity quantity) const {
    using Q = SectionQuantity;
    switch (quantity) {
      case Q::elastic_modulus_y:
        return modulus(Q::second_moment_y, Q::height, symmetric_height());
      case Q::elastic_modulus_z:
        return modulus(Q::second_moment_z, Q::width, symmetric_width());
      case Q::radius_of_gyration_y:
        return gyration(Q::second_moment_y);
      case Q::radius_of_gyration_z:
        return gyration(Q::second_moment_z);
      case Q::peak_shear_area_z:
        // I_y t_w / S with S = W_pl,y / 2.
        return is_i_or_channel()
                   ? product(Q::second_moment_y, size(V::web) * 2.0, Q::plastic_modulus_y)
                   : std::nullopt;
      case Q::peak_shear_area_y:
        return family_ == SectionFamily::i_section || family_ == SectionFamily::tee
                   ? over(Q::second_moment_z, size(V::width) * size(V::width) / 8.0)
                   : std::nullopt;
      default:
        return std::nullopt;
    }
  }

 private:
  [[nodiscard]] bool is_i_or_channel() const {
    return family_ == SectionFamily::i_section || family_ == SectionFamily::channel;
  }
  [[nodiscard]] bool symmetric_height() const {
    return family_ != SectionFamily::tee && family_ != SectionFamily::angle;
  }
  [[nodiscard]] bool symmetric_width() const {
    return family_ != SectionFamily::channel && family_ != SectionFamily::angle;
  }

  [[nodiscard]] Interval size(SizeVariable variable) const {
    const auto variables = size_variables(family_);
    const auto place = std::find(variables.begin(), variables.end(), variable);
    return box_[static_cast<std::size_t>(place - variables.begin())];
  }

  [[nodiscard]] std::optional<Interval> part(SectionQuantity quantity) const {
    return section_bound(family_, quantity, box_, fixed_, proportions_);
  }

  [[nodiscard]] std::optional<Interval> over(SectionQuantity top, const Interval& bottom) const {
    const std::optional<Interval> i = part(top);
    return i ? std::optional(*i / bottom) : std::nullopt;
  }

  [[nodiscard]] std::optional<Interval> product(SectionQuantity top,
                                                const Interval& factor,
                                                SectionQuantity bottom) const {
    const std::optional<Interval> b = part(bottom);
    const std::optional<Interval> i = b ? over(top, *b) : std::nullopt;
    return i ? std::optional(*i * factor) : std::nullopt;
  }

  /// I over the farther side, which is half the extent, or between half of it and the whole.
  [[nodiscard]] std::optional<Interval> modulus(SectionQuantity second_moment,
                                                SectionQuantity extent,
                                                bool symmetric) const {
    const std::optional<Interval> e = part(extent);
    if (!e) {
      return std::nullopt;
    }
    return over(second_moment, symmetric ? *e / 2.0 : hull(*e / 2.0, *e));
  }

  [[nodiscard]] std::optional<Interval> gyration(SectionQuantity second_moment) const {
    const std::optional<Interval> area = part(SectionQuantity::area);
    const std::optional<Interval> square = area ? over(second_moment, *area) : std::nullopt;
    return square ? std::optional(sqrt(*square)) : std::nullopt;
  }

  SectionFamily family_;
  std::span<const Interval> box_;
  const FixedSizes& fixed_;
  Proportions proportions_;
};

void require_count(SectionFamily family, std::size_t count) {
  if (family == SectionFamily::polygon || count != size_variables(family).size()) {
    throw InternalError("wrong count of sizes for a section");
  }
}

}  // namespace

std::span<const SizeVariable> size_variables(SectionFamily family) {
  switch (family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_square:
    case SectionFamily::solid_hexagon:
      return only_height;
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
      return two_sides;
    case SectionFamily::round_tube:
      return round_wall;
    case SectionFamily::rectangular_tube:
    case SectionFamily::elliptical_tube:
    case SectionFamily::angle:
      return sides_and_wall;
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee:
      return profile;
    case SectionFamily::polygon:
      return {};
  }
  throw InternalError("section family without sizes");
}

SectionProperties section_of(SectionFamily family,
                             std::span<const double> sizes,
                             const FixedSizes& fixed) {
  require_count(family, sizes.size());
  const Forming forming = Forming::unknown;
  const double h = sizes[0];
  switch (family) {
    case SectionFamily::solid_round:
      return solid_round(h);
    case SectionFamily::solid_square:
      return solid_square(h);
    case SectionFamily::solid_rectangle:
      return solid_rectangle(h, sizes[1]);
    case SectionFamily::solid_ellipse:
      return solid_ellipse(h, sizes[1]);
    case SectionFamily::solid_hexagon:
      return solid_hexagon(h);
    case SectionFamily::round_tube:
      return round_tube(h, sizes[1], forming);
    case SectionFamily::rectangular_tube:
      return rectangular_tube(h, sizes[1], sizes[2], fixed.corners, forming);
    case SectionFamily::elliptical_tube:
      return elliptical_tube(h, sizes[1], sizes[2], forming);
    case SectionFamily::i_section:
      return i_section(h, sizes[1], sizes[2], sizes[3], fixed.root_radius);
    case SectionFamily::channel:
      return channel(h, sizes[1], sizes[2], sizes[3], fixed.root_radius, 0.0);
    case SectionFamily::tee:
      return tee(h, sizes[1], sizes[2], sizes[3], fixed.root_radius);
    case SectionFamily::angle:
      return angle(h, sizes[1], sizes[2], fixed.root_radius, fixed.toe_radius);
    case SectionFamily::polygon:
      break;
  }
  throw InternalError("section family without sizes");
}

double quantity_of(const SectionProperties& section, SectionQuantity quantity) {
  switch (quantity) {
    case SectionQuantity::area:
      return section.area;
    case SectionQuantity::perimeter:
      return section.perimeter;
    case SectionQuantity::inner_perimeter:
      return section.inner_perimeter;
    case SectionQuantity::second_moment_y:
      return section.I_y;
    case SectionQuantity::second_moment_z:
      return section.I_z;
    case SectionQuantity::torsion_constant:
      return section.I_t;
    case SectionQuantity::warping_constant:
      return section.I_w;
    case SectionQuantity::elastic_modulus_y:
      return section.W_el_y;
    case SectionQuantity::elastic_modulus_z:
      return section.W_el_z;
    case SectionQuantity::plastic_modulus_y:
      return section.W_pl_y;
    case SectionQuantity::plastic_modulus_z:
      return section.W_pl_z;
    case SectionQuantity::torsion_modulus:
      return section.W_t;
    case SectionQuantity::peak_shear_area_y:
      return section.A_v_y;
    case SectionQuantity::peak_shear_area_z:
      return section.A_v_z;
    case SectionQuantity::junction_shear_area:
      return section.A_v_junction;
    case SectionQuantity::flange_shear_area:
      return section.A_v_flange;
    case SectionQuantity::deflection_shear_area_y:
      return section.A_s_y;
    case SectionQuantity::deflection_shear_area_z:
      return section.A_s_z;
    case SectionQuantity::junction_ratio:
      return section.junction_ratio;
    case SectionQuantity::height:
      return section.height;
    case SectionQuantity::width:
      return section.width;
    case SectionQuantity::wall:
      return section.wall;
    case SectionQuantity::ruling_dimension:
      return section.ruling_dimension;
    case SectionQuantity::largest_plate_ratio: {
      double ratio = 0.0;
      for (const PlateElement& plate : section.plates) {
        ratio = std::max(ratio, plate.ratio);
      }
      return ratio;
    }
    case SectionQuantity::radius_of_gyration_y:
      return section.i_y();
    case SectionQuantity::radius_of_gyration_z:
      return section.i_z();
  }
  throw InternalError("unknown quantity of a section");
}

bool is_slender(SectionFamily family, std::span<const double> sizes, const FixedSizes& fixed) {
  require_count(family, sizes.size());
  const double least = sizes.size() > 1 ? std::min(sizes[0], sizes[1]) : sizes[0];
  const auto alike = [&] { return sizes[0] <= 2.0 * sizes[1] && sizes[1] <= 2.0 * sizes[0]; };
  switch (family) {
    case SectionFamily::rectangular_tube:
    case SectionFamily::elliptical_tube:
      return sizes[2] <= 0.2 * least;
    case SectionFamily::angle:
      return sizes[2] <= 0.2 * least && alike() && fixed.root_radius <= 1.5 * sizes[2];
    case SectionFamily::i_section:
    case SectionFamily::channel:
    case SectionFamily::tee: {
      const double web = sizes[2];
      const double flange = sizes[3];
      const bool shape = family == SectionFamily::tee ? alike() : sizes[1] <= sizes[0];
      return shape && 3.0 * web >= flange && web <= flange && flange <= 0.1 * least &&
             fixed.root_radius <= 1.5 * flange;
    }
    default:
      return true;
  }
}

Trend section_trend(SectionFamily family,
                    SectionQuantity quantity,
                    SizeVariable variable,
                    Proportions proportions) {
  for (const mechanics::TrendRow& row : mechanics::trend_rows) {
    if (row.family != family || row.variable != variable) {
      continue;
    }
    const std::string_view trends =
        proportions == Proportions::slender && !row.slender.empty() ? row.slender : row.any;
    switch (trends[static_cast<std::size_t>(quantity)]) {
      case 'r':
        return Trend::rises;
      case 'f':
        return Trend::falls;
      case 'c':
        return Trend::constant;
      default:
        return Trend::neither;
    }
  }
  throw InternalError("a section family without that size");
}

std::optional<Interval> section_bound(SectionFamily family,
                                      SectionQuantity quantity,
                                      std::span<const Interval> box,
                                      const FixedSizes& fixed,
                                      Proportions proportions) {
  require_count(family, box.size());
  const auto low = at_corner(family, quantity, box, fixed, proportions, true);
  const auto high = at_corner(family, quantity, box, fixed, proportions, false);
  if (low && high) {
    constexpr double rounding = 1e-12;
    return Interval(std::min(*low, *high) * (1.0 - rounding), *high * (1.0 + rounding));
  }
  if (const auto parts = Parts(family, box, fixed, proportions).bound(quantity)) {
    return parts;
  }
  return proportions == Proportions::slender
             ? section_bound(family, quantity, box, fixed, Proportions::any)
             : std::nullopt;
}

}  // namespace bismar
