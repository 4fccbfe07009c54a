// SPDX-License-Identifier: MIT
#include <bismar/mechanics/beam.hpp>

#include "mechanics/arguments.hpp"
#include "mechanics/bending_plane.hpp"
#include "mechanics/load_case.hpp"
#include "mechanics/polynomial.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <memory>
#include <vector>

namespace bismar {

using mechanics::BendingPlane;
using mechanics::PlaneSegment;
using mechanics::Polynomial;

struct BeamResponse::State {
  double length = 0.0;
  double bending = 1.0;
  BendingPlane plane;
  std::vector<BeamReaction> reactions;
};

namespace {

/// The segment that begins at or before `x`, the last one for the end.
const PlaneSegment& segment_at(const BendingPlane& plane, double x, double length) {
  FaultList faults;
  mechanics::require_not_negative(faults, "x", x);
  if (x > length) {
    mechanics::add_out_of_range(faults, "x", x, "a place on the beam, between 0 and its length");
  }
  faults.throw_if_any();
  const auto beyond = std::upper_bound(
      plane.segments.begin(), plane.segments.end(), x, [](double place, const PlaneSegment& s) {
        return place < s.start;
      });
  return *std::prev(beyond);
}

BeamRange range(const BendingPlane& plane, Polynomial PlaneSegment::*quantity, double scale) {
  BeamRange result;
  bool first = true;
  const auto look = [&](double x, double value) {
    if (first || value > result.greatest.value) {
      result.greatest = {.value = value, .x = x};
    }
    if (first || value < result.least.value) {
      result.least = {.value = value, .x = x};
    }
    first = false;
  };
  for (const PlaneSegment& segment : plane.segments) {
    const Polynomial& p = segment.*quantity;
    look(segment.start, scale * p(0.0));
    for (const double xi : mechanics::sign_changes(p.derivative(), segment.length)) {
      look(segment.start + xi, scale * p(xi));
    }
    look(segment.start + segment.length, scale * p(segment.length));
  }
  return result;
}

std::vector<BeamReaction> reactions_of(const BendingPlane& plane) {
  std::vector<BeamReaction> reactions = {
      {.x = 0.0, .force = plane.start_force, .moment = plane.start_moment}};
  if (plane.setup.support == Support::pinned_pinned) {
    reactions.front().moment = 0.0;
  }
  if (plane.setup.support != Support::cantilever) {
    reactions.push_back(
        {.x = plane.setup.second_support, .force = plane.second_force, .moment = plane.end_moment});
  }
  return reactions;
}

}  // namespace

BeamExtreme BeamRange::largest() const {
  return std::abs(least.value) > std::abs(greatest.value) ? least : greatest;
}

BeamResponse::BeamResponse(const LoadCase& load_case,
                           Along along,
                           double length,
                           const BeamStiffness& stiffness) {
  FaultList faults;
  mechanics::check_load_case(faults, load_case, length);
  mechanics::require_positive(faults, "/stiffness/bending", stiffness.bending);
  if (stiffness.shear) {
    mechanics::require_positive(faults, "/stiffness/shear", *stiffness.shear);
  }
  faults.throw_if_any();

  const std::vector<Load> loads = mechanics::loads_on_member(load_case, length);
  const double second = mechanics::second_support(load_case, length);
  const mechanics::PlaneSetup setup = {
      .support = along == Along::z ? load_case.support_z : load_case.support_y,
      .second_support = second,
      .shear_flexibility = stiffness.shear ? stiffness.bending / *stiffness.shear : 0.0};
  auto state = std::make_shared<State>();
  state->length = length;
  state->bending = stiffness.bending;
  state->plane = mechanics::bending_plane(
      loads, along, setup, mechanics::load_stations(loads, length, second));
  state->reactions = reactions_of(state->plane);
  state_ = std::move(state);
}

const std::vector<BeamReaction>& BeamResponse::reactions() const { return state_->reactions; }

double BeamResponse::deflection(double x) const {
  const PlaneSegment& s = segment_at(state_->plane, x, state_->length);
  return s.deflection(x - s.start) / state_->bending;
}

double BeamResponse::rotation(double x) const {
  const PlaneSegment& s = segment_at(state_->plane, x, state_->length);
  return s.rotation(x - s.start) / state_->bending;
}

double BeamResponse::moment(double x) const {
  const PlaneSegment& s = segment_at(state_->plane, x, state_->length);
  return s.moment(x - s.start);
}

double BeamResponse::shear(double x) const {
  const PlaneSegment& s = segment_at(state_->plane, x, state_->length);
  return s.shear(x - s.start);
}

BeamRange BeamResponse::deflections() const {
  return range(state_->plane, &PlaneSegment::deflection, 1.0 / state_->bending);
}

BeamRange BeamResponse::rotations() const {
  return range(state_->plane, &PlaneSegment::rotation, 1.0 / state_->bending);
}

BeamRange BeamResponse::moments() const { return range(state_->plane, &PlaneSegment::moment, 1.0); }

BeamRange BeamResponse::shears() const { return range(state_->plane, &PlaneSegment::shear, 1.0); }

}  // namespace bismar
