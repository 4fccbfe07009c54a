// SPDX-License-Identifier: MIT
#include "mechanics/bending_plane.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <span>
#include <utility>
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

/// A plane being solved: its segments, and at each station the loads and reactions found so far.
struct Work {
  std::vector<PlaneSegment> segments;
  std::vector<Jump> jumps;
  std::size_t second = 0;  ///< Station of the second support.
  double place = 0.0;      ///< x of it.
  double flexibility = 0.0;
};

/// Shear and moment of every segment, from the far end back.
void integrate_forces(Work& work) {
  double shear = 0.0;
  double moment = 0.0;
  for (std::size_t k = work.segments.size(); k-- > 0;) {
    PlaneSegment& segment = work.segments[k];
    shear += work.jumps[k + 1].force;
    moment += work.jumps[k + 1].moment;
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

void integrate_deflection(Work& work, double rotation_at_start) {
  double rotation = rotation_at_start;
  double deflection = 0.0;
  for (PlaneSegment& segment : work.segments) {
    segment.rotation = segment.moment.integral(rotation);
    Polynomial slope = segment.rotation;
    for (std::size_t i = 0; i < Polynomial::terms; ++i) {
      slope.c[i] += work.flexibility * segment.shear.c[i];
    }
    segment.deflection = slope.integral(deflection);
    rotation = segment.rotation(segment.length);
    deflection = segment.deflection(segment.length);
  }
}

double deflection_at_second(const Work& work) {
  const PlaneSegment& before = work.segments[work.second - 1];
  return before.deflection(before.length);
}

void solve_two_pins(Work& work) {
  integrate_forces(work);
  // The second support takes the moment that the loads make about the first one.
  const double about_first = work.segments.front().moment.c[0] + work.jumps.front().moment;
  work.jumps[work.second].force -= about_first / work.place;
  integrate_forces(work);
  // A moment at the pin itself acts inside the member; without one the pin is exactly free.
  work.segments.front().moment.c[0] = -work.jumps.front().moment;
  integrate_deflection(work, 0.0);
  integrate_deflection(work, -deflection_at_second(work) / work.place);
}

/// Once more with what is left of the conditions, which takes most of the rounding out.
constexpr int passes = 2;

void solve_fixed_pinned(Work& work) {
  const double x = work.place;
  const double flexibility = x * x * x / 3.0 + work.flexibility * x;
  for (int pass = 0; pass < passes; ++pass) {
    integrate_forces(work);
    integrate_deflection(work, 0.0);
    work.jumps[work.second].force -= deflection_at_second(work) / flexibility;
  }
  integrate_forces(work);
  integrate_deflection(work, 0.0);
}

/// A force R and a moment M at the end move it by R (L^3/3 + s L) + M L^2/2 and turn it by R L^2/2
/// + M L.
void solve_two_fixed(Work& work) {
  const double L = work.place;
  const double determinant = L * L * (L * L / 12.0 + work.flexibility);
  for (int pass = 0; pass < passes; ++pass) {
    integrate_forces(work);
    integrate_deflection(work, 0.0);
    const double w = deflection_at_second(work);
    const double theta = work.segments.back().rotation(work.segments.back().length);
    Jump& end = work.jumps.back();
    end.force -= (L * w - L * L / 2.0 * theta) / determinant;
    end.moment -=
        ((L * L * L / 3.0 + work.flexibility * L) * theta - L * L / 2.0 * w) / determinant;
  }
  integrate_forces(work);
  integrate_deflection(work, 0.0);
}

Work prepare(std::span<const Load> loads,
             Along along,
             const PlaneSetup& setup,
             std::span<const double> stations) {
  Work work;
  work.segments.resize(stations.size() - 1);
  for (std::size_t k = 0; k < work.segments.size(); ++k) {
    work.segments[k].start = stations[k];
    work.segments[k].length = stations[k + 1] - stations[k];
  }
  work.jumps.resize(stations.size());
  work.place = setup.support == Support::pinned_pinned || setup.support == Support::fixed_pinned
                   ? setup.second_support
                   : stations.back();
  work.second = index_of(stations, work.place);
  work.flexibility = setup.shear_flexibility;
  for (const Load& load : loads) {
    if (!bends_in(load, along)) {
      continue;
    }
    if (load.kind == Load::Kind::distributed) {
      add_distributed(load, stations, work.segments);
    } else if (load.kind == Load::Kind::force) {
      work.jumps[index_of(stations, load.at)].force += load.value;
    } else {
      work.jumps[index_of(stations, load.at)].moment += load.value;
    }
  }
  return work;
}

/// What the reactions do to the deflection where it would miss the second support by `gap`: a
/// cubic in x up to that support.
Polynomial closing_curve(const PlaneSetup& setup, double place, double gap) {
  Polynomial curve;
  const double square = place * place;
  switch (setup.support) {
    case Support::cantilever:
      break;
    case Support::pinned_pinned:
      curve.c[1] = -gap / place;
      break;
    case Support::fixed_pinned:
      curve.c[2] = -1.5 * gap / square;
      curve.c[3] = 0.5 * gap / (square * place);
      break;
    case Support::fixed_fixed:
      curve.c[2] = -3.0 * gap / square;
      curve.c[3] = 2.0 * gap / (square * place);
      break;
  }
  return curve;
}

/// p(x) of degree 3 about x = start.
Polynomial about(const Polynomial& p, double start) {
  Polynomial shifted;
  shifted.c[0] = p(start);
  shifted.c[1] = p.derivative()(start);
  shifted.c[2] = p.c[2] + 3.0 * p.c[3] * start;
  shifted.c[3] = p.c[3];
  return shifted;
}

}  // namespace

BendingPlane bending_plane(std::span<const Load> loads,
                           Along along,
                           const PlaneSetup& setup,
                           std::span<const double> stations) {
  Work work = prepare(loads, along, setup, stations);
  const Jump second_load = work.jumps[work.second];
  switch (setup.support) {
    case Support::cantilever:
      integrate_forces(work);
      integrate_deflection(work, 0.0);
      break;
    case Support::pinned_pinned:
      solve_two_pins(work);
      break;
    case Support::fixed_pinned:
      solve_fixed_pinned(work);
      break;
    case Support::fixed_fixed:
      solve_two_fixed(work);
      break;
  }
  BendingPlane plane;
  plane.setup = setup;
  plane.setup.second_support = work.place;
  plane.second_force = work.jumps[work.second].force - second_load.force;
  plane.end_moment = work.jumps[work.second].moment - second_load.moment;
  const PlaneSegment& first = work.segments.front();
  plane.start_force = -(first.shear.c[0] + work.jumps.front().force);
  plane.start_moment = -(first.moment.c[0] + work.jumps.front().moment);
  plane.segments = std::move(work.segments);
  return plane;
}

double largest_deflection(const BendingPlane& plane) {
  double value = 0.0;
  for (const PlaneSegment& segment : plane.segments) {
    value = std::max(value, largest(segment.deflection, segment.length));
  }
  return value;
}

double largest_rotation(const BendingPlane& plane) {
  double value = 0.0;
  for (const PlaneSegment& segment : plane.segments) {
    value = std::max(value, largest(segment.rotation, segment.length));
  }
  return value;
}

double largest_shear_deflection(const BendingPlane& plane) {
  // Shear strains alone, from x = 0 on: they miss the second support by `gap`.
  const double place = plane.setup.second_support;
  std::vector<Polynomial> strained;
  double sum = 0.0;
  double gap = 0.0;
  for (const PlaneSegment& segment : plane.segments) {
    strained.push_back(segment.shear.integral(sum));
    sum = strained.back()(segment.length);
    if (segment.start < place) {
      gap = sum;
    }
  }
  const Polynomial inside = closing_curve(plane.setup, place, gap);
  Polynomial beyond;  // without curvature past the support
  beyond.c[1] = inside.derivative()(place);
  beyond.c[0] = inside(place) - beyond.c[1] * place;
  double value = 0.0;
  for (std::size_t k = 0; k < plane.segments.size(); ++k) {
    const PlaneSegment& segment = plane.segments[k];
    const Polynomial closing = about(segment.start < place ? inside : beyond, segment.start);
    for (std::size_t i = 0; i < Polynomial::terms; ++i) {
      strained[k].c[i] += closing.c[i];
    }
    value = std::max(value, largest(strained[k], segment.length));
  }
  return value;
}

}  // namespace bismar::mechanics
