// SPDX-License-Identifier: MIT
#include <bismar/mechanics/load_effects.hpp>

#include "mechanics/bending_plane.hpp"
#include "mechanics/load_case.hpp"
#include "mechanics/stations.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <vector>

namespace bismar {

namespace {

double effective_length(const LoadCase& load_case, Support support, double length) {
  const double span = mechanics::has_second_support(support)
                          ? mechanics::second_support(load_case, length) / length
                          : 1.0;
  return effective_length_factor(support, span) * length;
}

OwnMassEffects own_mass_effects(const mechanics::BendingPlane& plane) {
  return {.deflection = mechanics::largest_deflection(plane),
          .shear_deflection = mechanics::largest_shear_deflection(plane),
          .rotation = mechanics::largest_rotation(plane)};
}

/// See MomentShape::load_share.
double twisting_weight(const mechanics::PlaneSetup& held, double length, double x) {
  if (held.support == Support::cantilever) {
    return x / length;
  }
  const double s = held.second_support;
  if (s < length * (1.0 - 1e-9)) {
    return (x < s ? x * (s - x) / s : x - s) / length;
  }
  const double wave = std::sin(std::numbers::pi * x / length);
  return wave * wave;
}

/// Integral of w |q| over a part of a segment on which q keeps its sign.
double weighted_line_load(const mechanics::PlaneSegment& segment,
                          const mechanics::PlaneSetup& held,
                          double length,
                          double from,
                          double to) {
  // Simpson's rule, exact for the polynomial weights, within 1e-5 for the sine.
  constexpr int intervals = 32;
  const double step = (to - from) / intervals;
  double sum = 0.0;
  for (int i = 0; i <= intervals; ++i) {
    const double xi = from + i * step;
    const double count = i == 0 || i == intervals ? 1.0 : i % 2 == 1 ? 4.0 : 2.0;
    sum += count * std::abs(segment.load(xi)) * twisting_weight(held, length, segment.start + xi);
  }
  return sum * step / 3.0;
}

double load_share(const mechanics::CutMember& cut, const mechanics::BendingPlane& plane) {
  double sum = 0.0;
  const auto add_force = [&](double force, double x) {
    if (std::abs(force) > cut.force_noise) {
      sum += std::abs(force) * twisting_weight(plane.setup, cut.length, x);
    }
  };
  // A jump of the shear force is a point load. Reactions are jumps too, where the weight is zero.
  for (std::size_t k = 0; k < plane.segments.size(); ++k) {
    const mechanics::PlaneSegment& segment = plane.segments[k];
    const bool line_load = segment.load.c[0] != 0.0 || segment.load.c[1] != 0.0;
    if (line_load) {
      const double zero = segment.load.c[1] != 0.0 ? -segment.load.c[0] / segment.load.c[1] : 0.0;
      const double turn = std::clamp(zero, 0.0, segment.length);
      sum += weighted_line_load(segment, plane.setup, cut.length, 0.0, turn) +
             weighted_line_load(segment, plane.setup, cut.length, turn, segment.length);
    }
    const double before = segment.shear(segment.length);
    if (k + 1 < plane.segments.size()) {
      add_force(before - plane.segments[k + 1].shear(0.0), plane.segments[k + 1].start);
    } else if (plane.setup.support == Support::cantilever ||
               plane.setup.second_support < cut.length * (1.0 - 1e-9)) {
      add_force(before, cut.length);
    }
  }
  return sum;
}

/// How a moment given directly runs along the member is not known: uniform is the worst. Other
/// loads of the plane go on twisting the member, so that its moment is none of end moments alone.
void include_direct(MomentShape& shape, double moment) {
  if (moment == 0.0) {
    return;
  }
  const double size = std::max(shape.largest, std::abs(moment));
  shape.largest = size;
  shape.quarters = {size, size, size};
  if (shape.load_share > 0.0) {
    shape.end_ratio.reset();
  } else {
    shape.end_ratio = 1.0;
  }
}

void read_member(const mechanics::CutMember& cut, LoadEffects& effects) {
  effects.deflection_z = mechanics::largest_deflection(cut.z);
  effects.deflection_y = mechanics::largest_deflection(cut.y);
  effects.shear_deflection_z = mechanics::largest_shear_deflection(cut.z);
  effects.shear_deflection_y = mechanics::largest_shear_deflection(cut.y);
  effects.rotation_z = mechanics::largest_rotation(cut.z);
  effects.rotation_y = mechanics::largest_rotation(cut.y);
  for (const mechanics::TorqueSegment& segment : cut.torque) {
    effects.twist = std::max(effects.twist, std::abs(segment.twist_at_end));
  }
  effects.moment_y = mechanics::moment_shape(cut, cut.z);
  effects.moment_z = mechanics::moment_shape(cut, cut.y);
  effects.moment_y.load_share = load_share(cut, cut.z);
  effects.moment_z.load_share = load_share(cut, cut.y);
  effects.own_z = own_mass_effects(cut.own_z);
  effects.own_y = own_mass_effects(cut.own_y);
}

void pass_through(const LoadCase& load_case, LoadEffects& effects) {
  effects.support_z = load_case.support_z;
  effects.support_y = load_case.support_y;
  effects.acceleration_z = load_case.acceleration_z;
  effects.acceleration_y = load_case.acceleration_y;
  effects.eccentricity = load_case.eccentricity;
  effects.temperature_change = std::abs(load_case.temperature_change);
  effects.restrained = load_case.restrained;
  effects.fatigue = load_case.fatigue;
  effects.second_support = load_case.second_support;
}

/// Whether only one section is known, with the forces given for it.
bool is_direct_only(const LoadCase& load_case) {
  return load_case.direct && load_case.loads.empty() && load_case.acceleration_z == 0.0 &&
         load_case.acceleration_y == 0.0;
}

}  // namespace

LoadEffects reduce(const LoadCase& load_case, double length) {
  FaultList faults;
  mechanics::check_load_case(faults, load_case, length);
  faults.throw_if_any();

  LoadEffects effects;
  pass_through(load_case, effects);
  effects.buckling_length_y = effective_length(load_case, load_case.support_z, length);
  effects.buckling_length_z = effective_length(load_case, load_case.support_y, length);

  const mechanics::CutMember cut = mechanics::cut_member(load_case, length);
  read_member(cut, effects);
  std::vector<Station> stations;
  if (!is_direct_only(load_case)) {
    stations = mechanics::all_stations(cut);
  }
  if (load_case.direct) {
    stations.push_back({.x = 0.0, .forces = *load_case.direct, .own = {}});
    include_direct(effects.moment_y, load_case.direct->M_y);
    include_direct(effects.moment_z, load_case.direct->M_z);
  }
  std::stable_sort(stations.begin(), stations.end(), [](const Station& a, const Station& b) {
    return a.x < b.x;
  });
  effects.stations = mechanics::without_covered(stations);

  for (const Station& station : effects.stations) {
    const InternalForces& f = station.forces;
    effects.compression = std::max(effects.compression, -f.N);
    effects.tension = std::max(effects.tension, f.N);
    effects.bends = effects.bends || f.M_y != 0.0 || f.M_z != 0.0 || station.own.M_y != 0.0 ||
                    station.own.M_z != 0.0;
    effects.twists = effects.twists || f.T != 0.0;
  }
  return effects;
}

}  // namespace bismar
