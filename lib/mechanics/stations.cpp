// SPDX-License-Identifier: MIT
#include "mechanics/stations.hpp"

#include "mechanics/load_case.hpp"
#include "mechanics/polynomial.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <span>
#include <vector>

namespace bismar::mechanics {

namespace {

// --- the member cut
// --------------------------------------------------------------------------------

/// Axial force, torque and the sizes that rounding is measured by.
void add_loads(CutMember& cut, std::span<const Load> loads) {
  double forces = 0.0;
  double moments = 0.0;
  cut.torque.resize(cut.stations.size() - 1);
  for (const Load& load : loads) {
    switch (load.kind) {
      case Load::Kind::axial:
        cut.axial += load.value;
        break;
      case Load::Kind::torque:
        for (std::size_t k = 0; k < cut.torque.size() && cut.stations[k] < load.at; ++k) {
          cut.torque[k].torque += load.value;
        }
        break;
      case Load::Kind::force:
        forces += std::abs(load.value);
        break;
      case Load::Kind::moment:
        moments += std::abs(load.value);
        break;
      case Load::Kind::distributed:
        forces += (std::abs(load.value) + std::abs(load.value_to)) * (load.to - load.at);
        break;
    }
  }
  // Near a first support the second one takes more than all the loads together.
  forces += std::max(std::abs(cut.z.second_force), std::abs(cut.y.second_force));
  constexpr double rounding = 1e-13;
  cut.force_noise = rounding * (forces + moments / cut.length);
  cut.moment_noise = rounding * (forces * cut.length + moments);
  double twist = 0.0;
  for (std::size_t k = 0; k < cut.torque.size(); ++k) {
    twist += cut.torque[k].torque * (cut.stations[k + 1] - cut.stations[k]);
    cut.torque[k].twist_at_end = twist;
  }
}

// --- one place
// -------------------------------------------------------------------------------------

double without_noise(double value, double noise) { return std::abs(value) <= noise ? 0.0 : value; }

/// Magnitude of what 1 N/m of own mass does.
double own_size(double value, double noise) { return std::abs(without_noise(value, noise)); }

Station station_at(const CutMember& cut, std::size_t segment, double xi) {
  const PlaneSegment& z = cut.z.segments[segment];
  const PlaneSegment& y = cut.y.segments[segment];
  Station station;
  station.x = z.start + xi;
  station.forces.N = cut.axial;
  station.forces.V_z = without_noise(z.shear(xi), cut.force_noise);
  station.forces.V_y = without_noise(y.shear(xi), cut.force_noise);
  station.forces.M_y = without_noise(z.moment(xi), cut.moment_noise);
  station.forces.M_z = without_noise(y.moment(xi), cut.moment_noise);
  station.forces.T = cut.torque[segment].torque;
  constexpr double rounding = 1e-13;
  const double force_noise = rounding * cut.length;
  const double moment_noise = force_noise * cut.length;
  if (cut.accelerated_z) {
    const PlaneSegment& own = cut.own_z.segments[segment];
    station.own.V_z = own_size(own.shear(xi), force_noise);
    station.own.M_y = own_size(own.moment(xi), moment_noise);
  }
  if (cut.accelerated_y) {
    const PlaneSegment& own = cut.own_y.segments[segment];
    station.own.V_y = own_size(own.shear(xi), force_noise);
    station.own.M_z = own_size(own.moment(xi), moment_noise);
  }
  return station;
}

/// The planes that bend a member on one segment: of its loads, of its own mass where that acts.
std::vector<const PlaneSegment*> planes_of(const CutMember& cut, std::size_t segment) {
  std::vector<const PlaneSegment*> planes = {&cut.z.segments[segment], &cut.y.segments[segment]};
  if (cut.accelerated_z) {
    planes.push_back(&cut.own_z.segments[segment]);
  }
  if (cut.accelerated_y) {
    planes.push_back(&cut.own_y.segments[segment]);
  }
  return planes;
}

/// Every place on the segment between which all |V| and |M| are monotone.
std::vector<double> turning_points(std::span<const PlaneSegment* const> planes) {
  const double length = planes.front()->length;
  std::vector<double> points = {0.0, length};
  for (const PlaneSegment* plane : planes) {
    for (const Polynomial* p : {&plane->load, &plane->shear, &plane->moment}) {
      const std::vector<double> roots = sign_changes(*p, length);
      points.insert(points.end(), roots.begin(), roots.end());
    }
  }
  std::sort(points.begin(), points.end());
  // The peaks of two planes often fall on one place but for rounding.
  const auto same = [length](double a, double b) { return b - a <= 1e-12 * length; };
  points.erase(std::unique(points.begin(), points.end(), same), points.end());
  points.back() = length;
  return points;
}

// --- stretches on which moments trade against each other
// -------------------------------------------------------------------------------------------

/// Whether |M| bulges outwards between two neighbouring turning points.
bool is_concave(const PlaneSegment& plane, double from, double to) {
  const double sign = plane.moment((from + to) / 2.0) < 0.0 ? -1.0 : 1.0;
  return sign * plane.load(from) < 0.0 || sign * plane.load(to) < 0.0;
}

/// Some |M| rises while another falls, and one of them bulges outwards, so that a weighted sum may
/// peak in between. Where every |M| is convex the sum is convex and its ends suffice.
bool needs_steps(std::span<const PlaneSegment* const> planes,
                 const Station& from,
                 const Station& to,
                 double noise) {
  const std::array<double, 4> changes = {
      std::abs(to.forces.M_y) - std::abs(from.forces.M_y),
      std::abs(to.forces.M_z) - std::abs(from.forces.M_z),
      // An own moment is that of 1 N/m: its rounding has no common measure with the loads'.
      to.own.M_y - from.own.M_y,
      to.own.M_z - from.own.M_z};
  const bool rises =
      changes[0] > noise || changes[1] > noise || changes[2] > 0.0 || changes[3] > 0.0;
  const bool falls =
      changes[0] < -noise || changes[1] < -noise || changes[2] < 0.0 || changes[3] < 0.0;
  if (!rises || !falls) {
    return false;
  }
  const double start = planes.front()->start;
  return std::any_of(planes.begin(), planes.end(), [&](const PlaneSegment* plane) {
    return is_concave(*plane, from.x - start, to.x - start);
  });
}

/// An upper bound for |p| at the middle of a step on which p keeps its sign and |p| its curvature,
/// such that the broken line from end to middle to end lies nowhere below |p|: the chord where it
/// is convex, the higher of the tangents at both ends where it is concave. With the sign of p.
double middle_bound(const Polynomial& p, double from, double to) {
  const double half = (to - from) / 2.0;
  const double sign = p(from + half) < 0.0 ? -1.0 : 1.0;
  const Polynomial slope = p.derivative();
  const double at_from = sign * p(from);
  const double at_to = sign * p(to);
  return sign * std::max({0.0,
                          (at_from + at_to) / 2.0,
                          at_from + half * sign * slope(from),
                          at_to - half * sign * slope(to)});
}

/// The middle of a step with every component at its bound. In equal steps each real place between
/// two middles is no worse than the worse of them: its components lie below the straight line
/// between, and every limit state is a convex function of them that rises with each.
Station bound_station(const CutMember& cut, std::size_t segment, double from, double to) {
  Station station = station_at(cut, segment, (from + to) / 2.0);
  const auto set = [&](double& shear, double& moment, const BendingPlane& plane) {
    const PlaneSegment& s = plane.segments[segment];
    shear = shear == 0.0 ? 0.0 : middle_bound(s.shear, from, to);
    moment = moment == 0.0 ? 0.0 : middle_bound(s.moment, from, to);
  };
  set(station.forces.V_z, station.forces.M_y, cut.z);
  set(station.forces.V_y, station.forces.M_z, cut.y);
  if (cut.accelerated_z) {
    set(station.own.V_z, station.own.M_y, cut.own_z);
  }
  if (cut.accelerated_y) {
    set(station.own.V_y, station.own.M_z, cut.own_y);
  }
  for (double InternalForces::*component :
       {&InternalForces::V_y, &InternalForces::V_z, &InternalForces::M_y, &InternalForces::M_z}) {
    station.own.*component = std::abs(station.own.*component);
  }
  return station;
}

void add_stations(const CutMember& cut, std::size_t segment, std::vector<Station>& stations) {
  constexpr int steps = 8;
  const std::vector<const PlaneSegment*> planes = planes_of(cut, segment);
  const std::vector<double> points = turning_points(planes);
  for (std::size_t k = 0; k < points.size(); ++k) {
    const Station here = station_at(cut, segment, points[k]);
    stations.push_back(here);
    if (k + 1 == points.size()) {
      continue;
    }
    const Station next = station_at(cut, segment, points[k + 1]);
    if (!needs_steps(planes, here, next, cut.moment_noise)) {
      continue;
    }
    const double step = (points[k + 1] - points[k]) / steps;
    for (int i = 0; i < steps; ++i) {
      const double from = points[k] + i * step;
      stations.push_back(bound_station(cut, segment, from, from + step));
    }
  }
}

/// Whether no component of `a` is larger than that of `b`.
bool is_within(const InternalForces& a, const InternalForces& b) {
  return std::abs(a.V_y) <= std::abs(b.V_y) && std::abs(a.V_z) <= std::abs(b.V_z) &&
         std::abs(a.M_y) <= std::abs(b.M_y) && std::abs(a.M_z) <= std::abs(b.M_z) &&
         std::abs(a.T) <= std::abs(b.T);
}

/// Whether nothing is worse at `a` than at `b`, however heavy the member is. Compression helps one
/// side of a bent brittle member and harms the other, so that only an equal N can be compared.
bool is_covered(const Station& a, const Station& b) {
  return a.forces.N == b.forces.N && is_within(a.forces, b.forces) && is_within(a.own, b.own);
}

/// Whether the moments at the stations lie on one straight line between the ends.
bool is_linear(const CutMember& cut, const BendingPlane& plane) {
  const PlaneSegment& last = plane.segments.back();
  const double first = plane.segments.front().moment(0.0);
  const double slope = (last.moment(last.length) - first) / cut.length;
  const auto on_line = [&](const PlaneSegment& s, double xi) {
    return std::abs(s.moment(xi) - (first + slope * (s.start + xi))) <= cut.moment_noise;
  };
  return std::all_of(
      plane.segments.begin(), plane.segments.end(), [&](const PlaneSegment& segment) {
        return segment.load.c[0] == 0.0 && segment.load.c[1] == 0.0 && on_line(segment, 0.0) &&
               on_line(segment, segment.length);
      });
}

/// The larger moment at `x`, on either side of it.
double moment_at(const CutMember& cut, const BendingPlane& plane, double x) {
  double moment = 0.0;
  for (const PlaneSegment& segment : plane.segments) {
    if (segment.start <= x && x <= segment.start + segment.length) {
      const double here = segment.moment(x - segment.start);
      moment = std::abs(here) > std::abs(moment) ? here : moment;
    }
  }
  return without_noise(moment, cut.moment_noise);
}

}  // namespace

CutMember cut_member(const LoadCase& load_case, double length) {
  const std::vector<Load> loads = loads_on_member(load_case, length);
  CutMember cut;
  cut.length = length;
  const double second = second_support(load_case, length);
  cut.stations = load_stations(loads, length, second);
  const PlaneSetup setup_z = {.support = load_case.support_z, .second_support = second};
  const PlaneSetup setup_y = {.support = load_case.support_y, .second_support = second};
  const std::vector<Load> own = {distributed(1.0, 1.0, 0.0, length, Along::z),
                                 distributed(1.0, 1.0, 0.0, length, Along::y)};
  cut.z = bending_plane(loads, Along::z, setup_z, cut.stations);
  cut.y = bending_plane(loads, Along::y, setup_y, cut.stations);
  cut.own_z = bending_plane(own, Along::z, setup_z, cut.stations);
  cut.own_y = bending_plane(own, Along::y, setup_y, cut.stations);
  cut.accelerated_z = load_case.acceleration_z != 0.0;
  cut.accelerated_y = load_case.acceleration_y != 0.0;
  add_loads(cut, loads);
  return cut;
}

std::vector<Station> all_stations(const CutMember& cut) {
  std::vector<Station> stations;
  for (std::size_t k = 0; k < cut.z.segments.size(); ++k) {
    add_stations(cut, k, stations);
  }
  return stations;
}

std::vector<Station> without_covered(const std::vector<Station>& all) {
  std::vector<Station> kept;
  for (std::size_t i = 0; i < all.size(); ++i) {
    bool covered = false;
    for (std::size_t j = 0; j < all.size() && !covered; ++j) {
      covered = i != j && is_covered(all[i], all[j]) && (j < i || !is_covered(all[j], all[i]));
    }
    if (!covered) {
      kept.push_back(all[i]);
    }
  }
  return kept;
}

MomentShape moment_shape(const CutMember& cut, const BendingPlane& plane) {
  MomentShape shape;
  for (const PlaneSegment& segment : plane.segments) {
    shape.largest = std::max(shape.largest, largest(segment.moment, segment.length));
  }
  shape.largest = without_noise(shape.largest, cut.moment_noise);
  for (std::size_t i = 0; i < shape.quarters.size(); ++i) {
    shape.quarters[i] = moment_at(cut, plane, cut.length * static_cast<double>(i + 1) / 4.0);
  }
  if (shape.largest > 0.0 && is_linear(cut, plane)) {
    const PlaneSegment& last = plane.segments.back();
    const double a = without_noise(plane.segments.front().moment(0.0), cut.moment_noise);
    const double b = without_noise(last.moment(last.length), cut.moment_noise);
    shape.end_ratio = std::abs(a) < std::abs(b) ? a / b : b / a;
  }
  return shape;
}

}  // namespace bismar::mechanics
