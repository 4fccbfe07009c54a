// SPDX-License-Identifier: MIT
#include <bismar/mechanics/load_effects.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/bending_plane.hpp"
#include "mechanics/polynomial.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <span>
#include <string>
#include <vector>

namespace bismar {

namespace {

using mechanics::PlaneSegment;

/// A station may miss L by this much after unit conversion; it is then taken as L.
constexpr double end_slack = 1e-12;

// --- what the caller gave
// --------------------------------------------------------------------------

void check_station(FaultList& faults, const std::string& where, double x, double length) {
  mechanics::require_not_negative(faults, where, x);
  if (std::isfinite(x) && std::isfinite(length) && length > 0.0 && x > length * (1.0 + end_slack)) {
    mechanics::add_out_of_range(
        faults, where, x, "a place on the member, between 0 and its length");
  }
}

void check_load(FaultList& faults, const std::string& where, const Load& load, double length) {
  mechanics::require_finite(faults, where + "/value", load.value);
  if (load.kind == Load::Kind::axial) {
    return;
  }
  check_station(faults, where + "/at", load.at, length);
  if (load.kind == Load::Kind::distributed) {
    mechanics::require_finite(faults, where + "/value_to", load.value_to);
    check_station(faults, where + "/to", load.to, length);
    if (std::isfinite(load.at) && std::isfinite(load.to) && load.to <= load.at) {
      mechanics::add_out_of_range(
          faults, where + "/to", load.to, "greater than the place where the load begins");
    }
  }
}

void check(const LoadCase& load_case, double length) {
  FaultList faults;
  mechanics::require_positive(faults, "/length", length);
  if (load_case.loads.empty() && !load_case.direct) {
    faults.add(Code::empty,
               "/loads",
               "The load case has no load; give at least one load or internal forces directly.");
  }
  for (std::size_t i = 0; i < load_case.loads.size(); ++i) {
    check_load(faults, "/loads/" + std::to_string(i), load_case.loads[i], length);
  }
  if (load_case.direct) {
    const InternalForces& f = *load_case.direct;
    mechanics::require_finite(faults, "/direct/N", f.N);
    mechanics::require_finite(faults, "/direct/V_y", f.V_y);
    mechanics::require_finite(faults, "/direct/V_z", f.V_z);
    mechanics::require_finite(faults, "/direct/M_y", f.M_y);
    mechanics::require_finite(faults, "/direct/M_z", f.M_z);
    mechanics::require_finite(faults, "/direct/T", f.T);
  }
  faults.throw_if_any();
}

// --- the member's internal forces
// ------------------------------------------------------------------

struct TorqueSegment {
  double torque = 0.0;
  double twist_at_end = 0.0;  ///< phi G I_t from x = 0.
};

/// The member cut at every station of its loads.
struct Cut {
  std::vector<double> stations;
  std::vector<PlaneSegment> z;
  std::vector<PlaneSegment> y;
  std::vector<TorqueSegment> torque;
  double axial = 0.0;
  double force_noise = 0.0;   ///< Below this a shear force is rounding.
  double moment_noise = 0.0;  ///< Below this a bending moment is rounding.
};

std::vector<Load> with_stations_on_member(std::span<const Load> loads, double length) {
  std::vector<Load> result(loads.begin(), loads.end());
  for (Load& load : result) {
    load.at = std::min(load.at, length);
    load.to = std::min(load.to, length);
  }
  return result;
}

std::vector<double> stations_of(std::span<const Load> loads, double length) {
  std::vector<double> stations = {0.0, length};
  for (const Load& load : loads) {
    if (load.kind != Load::Kind::axial) {
      stations.push_back(load.at);
    }
    if (load.kind == Load::Kind::distributed) {
      stations.push_back(load.to);
    }
  }
  std::sort(stations.begin(), stations.end());
  stations.erase(std::unique(stations.begin(), stations.end()), stations.end());
  return stations;
}

Cut cut_member(const LoadCase& load_case, double length) {
  const std::vector<Load> loads = with_stations_on_member(load_case.loads, length);
  Cut cut;
  cut.stations = stations_of(loads, length);
  cut.z = mechanics::bending_plane(loads, Along::z, load_case.support_z, cut.stations);
  cut.y = mechanics::bending_plane(loads, Along::y, load_case.support_y, cut.stations);
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
  double twist = 0.0;
  for (std::size_t k = 0; k < cut.torque.size(); ++k) {
    twist += cut.torque[k].torque * (cut.stations[k + 1] - cut.stations[k]);
    cut.torque[k].twist_at_end = twist;
  }
  constexpr double rounding = 1e-13;
  cut.force_noise = rounding * (forces + moments / length);
  cut.moment_noise = rounding * (forces * length + moments);
  return cut;
}

double without_noise(double value, double noise) { return std::abs(value) <= noise ? 0.0 : value; }

Station station_at(const Cut& cut, std::size_t segment, double xi) {
  const PlaneSegment& z = cut.z[segment];
  const PlaneSegment& y = cut.y[segment];
  Station station;
  station.x = z.start + xi;
  station.forces.N = cut.axial;
  station.forces.V_z = without_noise(z.shear(xi), cut.force_noise);
  station.forces.V_y = without_noise(y.shear(xi), cut.force_noise);
  station.forces.M_y = without_noise(z.moment(xi), cut.moment_noise);
  station.forces.M_z = without_noise(y.moment(xi), cut.moment_noise);
  station.forces.T = cut.torque[segment].torque;
  return station;
}

// --- the stations that matter
// ----------------------------------------------------------------------

/// Every place inside the segment between which |V| and |M| of both planes are monotone.
std::vector<double> turning_points(const PlaneSegment& z, const PlaneSegment& y) {
  std::vector<double> points = {0.0, z.length};
  for (const PlaneSegment* plane : {&z, &y}) {
    for (const mechanics::Polynomial* p : {&plane->load, &plane->shear, &plane->moment}) {
      const std::vector<double> roots = mechanics::sign_changes(*p, plane->length);
      points.insert(points.end(), roots.begin(), roots.end());
    }
  }
  std::sort(points.begin(), points.end());
  points.erase(std::unique(points.begin(), points.end()), points.end());
  return points;
}

/// Whether |M| bulges outwards between two neighbouring turning points.
bool is_concave(const PlaneSegment& plane, double from, double to) {
  const double sign = plane.moment((from + to) / 2.0) < 0.0 ? -1.0 : 1.0;
  return sign * plane.load(from) < 0.0 || sign * plane.load(to) < 0.0;
}

/// The two moments trade against each other and their weighted sum may peak in between. Where both
/// |M| are convex the sum is convex and its ends suffice.
bool needs_steps(const Cut& cut, std::size_t segment, const Station& from, const Station& to) {
  const double change_y = std::abs(to.forces.M_y) - std::abs(from.forces.M_y);
  const double change_z = std::abs(to.forces.M_z) - std::abs(from.forces.M_z);
  if (change_y * change_z >= 0.0) {
    return false;
  }
  const double start = cut.z[segment].start;
  return is_concave(cut.z[segment], from.x - start, to.x - start) ||
         is_concave(cut.y[segment], from.x - start, to.x - start);
}

double larger(double a, double b) { return std::abs(a) < std::abs(b) ? b : a; }

/// One station for a stretch with monotone forces: each component at its larger end.
Station envelope(const Station& a, const Station& b) {
  Station result = a;
  result.x = (a.x + b.x) / 2.0;
  result.forces.V_y = larger(a.forces.V_y, b.forces.V_y);
  result.forces.V_z = larger(a.forces.V_z, b.forces.V_z);
  result.forces.M_y = larger(a.forces.M_y, b.forces.M_y);
  result.forces.M_z = larger(a.forces.M_z, b.forces.M_z);
  return result;
}

void add_stations(const Cut& cut, std::size_t segment, std::vector<Station>& stations) {
  constexpr int steps = 64;
  const std::vector<double> points = turning_points(cut.z[segment], cut.y[segment]);
  for (std::size_t k = 0; k < points.size(); ++k) {
    const Station here = station_at(cut, segment, points[k]);
    stations.push_back(here);
    if (k + 1 == points.size()) {
      continue;
    }
    const Station next = station_at(cut, segment, points[k + 1]);
    if (needs_steps(cut, segment, here, next)) {
      Station left = here;
      for (int step = 1; step <= steps; ++step) {
        const double share = static_cast<double>(step) / steps;
        const Station right =
            station_at(cut, segment, points[k] + share * (points[k + 1] - points[k]));
        stations.push_back(envelope(left, right));
        left = right;
      }
    }
  }
}

/// Whether nothing is worse at `a` than at `b`. Compression helps one side of a bent brittle member
/// and harms the other, so that only an equal N can be compared.
bool is_covered(const InternalForces& a, const InternalForces& b) {
  return a.N == b.N && std::abs(a.V_y) <= std::abs(b.V_y) && std::abs(a.V_z) <= std::abs(b.V_z) &&
         std::abs(a.M_y) <= std::abs(b.M_y) && std::abs(a.M_z) <= std::abs(b.M_z) &&
         std::abs(a.T) <= std::abs(b.T);
}

std::vector<Station> without_covered(const std::vector<Station>& all) {
  std::vector<Station> kept;
  for (std::size_t i = 0; i < all.size(); ++i) {
    bool covered = false;
    for (std::size_t j = 0; j < all.size() && !covered; ++j) {
      // Of equal stations the first stays.
      covered = i != j && is_covered(all[i].forces, all[j].forces) &&
                (j < i || !is_covered(all[j].forces, all[i].forces));
    }
    if (!covered) {
      kept.push_back(all[i]);
    }
  }
  return kept;
}

double effective_length(Support support, double length) {
  return support == Support::cantilever ? 2.0 * length : length;
}

}  // namespace

LoadEffects reduce(const LoadCase& load_case, double length) {
  check(load_case, length);

  LoadEffects effects;
  effects.buckling_length_y = effective_length(load_case.support_z, length);
  effects.buckling_length_z = effective_length(load_case.support_y, length);

  std::vector<Station> stations;
  if (!load_case.loads.empty()) {
    const Cut cut = cut_member(load_case, length);
    for (std::size_t k = 0; k < cut.z.size(); ++k) {
      add_stations(cut, k, stations);
    }
    effects.deflection_z = mechanics::largest_deflection(cut.z);
    effects.deflection_y = mechanics::largest_deflection(cut.y);
    for (const TorqueSegment& segment : cut.torque) {
      effects.twist = std::max(effects.twist, std::abs(segment.twist_at_end));
    }
  }
  if (load_case.direct) {
    stations.push_back({.x = 0.0, .forces = *load_case.direct});
  }
  std::stable_sort(stations.begin(), stations.end(), [](const Station& a, const Station& b) {
    return a.x < b.x;
  });
  effects.stations = without_covered(stations);

  for (const Station& station : effects.stations) {
    const InternalForces& f = station.forces;
    effects.compression = std::max(effects.compression, -f.N);
    effects.tension = std::max(effects.tension, f.N);
    effects.bends = effects.bends || f.M_y != 0.0 || f.M_z != 0.0;
    effects.twists = effects.twists || f.T != 0.0;
  }
  return effects;
}

}  // namespace bismar
