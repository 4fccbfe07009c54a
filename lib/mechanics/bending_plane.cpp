// SPDX-License-Identifier: MIT
#include "mechanics/bending_plane.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <span>
#include <vector>

namespace bismar::mechanics {

namespace {

/// What happens at one station: a point force and a point moment.
struct Jump {
  double force = 0.0;
  double moment = 0.0;
};

std::size_t index_of(std::span<const double> stations, double x) {
  return static_cast<std::size_t>(std::lower_bound(stations.begin(), stations.end(), x) -
                                  stations.begin());
}

bool bends_in(const Load& load, Along along) {
  return load.along == along &&
         (load.kind == Load::Kind::force || load.kind == Load::Kind::moment ||
          load.kind == Load::Kind::distributed);
}

void add_distributed(const Load& load,
                     std::span<const double> stations,
                     std::vector<PlaneSegment>& segments) {
  const double rate = (load.value_to - load.value) / (load.to - load.at);
  const std::size_t first = index_of(stations, load.at);
  const std::size_t last = index_of(stations, load.to);
  for (std::size_t k = first; k < last; ++k) {
    segments[k].load.c[0] += load.value + rate * (segments[k].start - load.at);
    segments[k].load.c[1] += rate;
  }
}

/// Shear and moment of every segment, from the free end (or the right support with `reaction`)
/// back.
void integrate_forces(std::vector<PlaneSegment>& segments,
                      std::span<const Jump> jumps,
                      double reaction) {
  double shear = reaction;
  double moment = 0.0;
  for (std::size_t k = segments.size(); k-- > 0;) {
    PlaneSegment& segment = segments[k];
    shear += jumps[k + 1].force;
    moment += jumps[k + 1].moment;
    // Q(xi) = Q_end + integral from xi to the end of q; M likewise of Q.
    const Polynomial load_sum = segment.load.integral(0.0);
    for (std::size_t i = 0; i < Polynomial::terms; ++i) {
      segment.shear.c[i] = -load_sum.c[i];
    }
    segment.shear.c[0] = shear + load_sum(segment.length);
    const Polynomial shear_sum = segment.shear.integral(0.0);
    for (std::size_t i = 0; i < Polynomial::terms; ++i) {
      segment.moment.c[i] = -shear_sum.c[i];
    }
    segment.moment.c[0] = moment + shear_sum(segment.length);
    shear = segment.shear.c[0];
    moment = segment.moment.c[0];
  }
}

void integrate_deflection(std::vector<PlaneSegment>& segments, double slope_at_start) {
  double slope = slope_at_start;
  double deflection = 0.0;
  for (PlaneSegment& segment : segments) {
    segment.slope = segment.moment.integral(slope);
    segment.deflection = segment.slope.integral(deflection);
    slope = segment.slope(segment.length);
    deflection = segment.deflection(segment.length);
  }
}

}  // namespace

std::vector<PlaneSegment> bending_plane(std::span<const Load> loads,
                                        Along along,
                                        Support support,
                                        std::span<const double> stations) {
  const double length = stations.back();
  std::vector<PlaneSegment> segments(stations.size() - 1);
  for (std::size_t k = 0; k < segments.size(); ++k) {
    segments[k].start = stations[k];
    segments[k].length = stations[k + 1] - stations[k];
  }
  std::vector<Jump> jumps(stations.size());
  for (const Load& load : loads) {
    if (!bends_in(load, along)) {
      continue;
    }
    if (load.kind == Load::Kind::distributed) {
      add_distributed(load, stations, segments);
    } else if (load.kind == Load::Kind::force) {
      jumps[index_of(stations, load.at)].force += load.value;
    } else {
      jumps[index_of(stations, load.at)].moment += load.value;
    }
  }

  integrate_forces(segments, jumps, 0.0);
  if (support == Support::pinned_pinned) {
    // The right support takes the moment that the loads make about the left one.
    const double about_left = segments.front().moment.c[0] + jumps.front().moment;
    integrate_forces(segments, jumps, -about_left / length);
    // A moment at the left pin itself acts inside the member; without one the pin is exactly free.
    segments.front().moment.c[0] = -jumps.front().moment;
    integrate_deflection(segments, 0.0);
    const PlaneSegment& last = segments.back();
    integrate_deflection(segments, -last.deflection(last.length) / length);
  } else {
    integrate_deflection(segments, 0.0);
  }
  return segments;
}

double largest_deflection(std::span<const PlaneSegment> plane) {
  double largest = 0.0;
  for (const PlaneSegment& segment : plane) {
    largest = std::max(
        {largest, std::abs(segment.deflection.c[0]), std::abs(segment.deflection(segment.length))});
    for (const double x : sign_changes(segment.slope, segment.length)) {
      largest = std::max(largest, std::abs(segment.deflection(x)));
    }
  }
  return largest;
}

}  // namespace bismar::mechanics
