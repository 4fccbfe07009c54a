// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/member.hpp>

#include <memory>
#include <optional>
#include <vector>

namespace bismar {

/// Stiffness of a beam of one section in one plane.
struct BeamStiffness {
  double bending = 0.0;              ///< E I [N m^2], > 0.
  std::optional<double> shear = {};  ///< G A_s [N], > 0. Absent: stiff in shear (Euler-Bernoulli).
};

/// What one support does to the beam.
struct BeamReaction {
  double x = 0.0;       ///< Its station [m].
  double force = 0.0;   ///< Along the axis of the loads: negative where it holds up positive loads.
  double moment = 0.0;  ///< With the sign of a point moment [N m]; 0 at a pin.
};

/// An extreme value and where it is; of equal ones the first.
struct BeamExtreme {
  double value = 0.0;
  double x = 0.0;  ///< [m]
};

/// Both ends of the range of a quantity along a beam, with their signs: an overhang can deflect
/// most against the load.
struct BeamRange {
  BeamExtreme least;
  BeamExtreme greatest;
  /// The one of larger magnitude; of equal ones `greatest`.
  [[nodiscard]] BISMAR_API BeamExtreme largest() const;
};

/// One plane of a member under its loads, answered at any place: reactions, shear force, moment,
/// rotation and deflection. For tools that look at a single beam; sizing goes through reduce().
///
///     E I theta' = M,  w' = theta + Q / (G A_s),  M' = -Q,  Q' = -q
///
/// First order, one section, linear. Exact: piecewise polynomials between the loads, statically
/// indeterminate beams by the force method with the shear flexibility in it, so that reactions
/// depend on E I / (G A_s L^2). Own mass is left out, as the section is not known here: give its
/// weight as a distributed load.
///
/// Signs: loads, deflection w and shear force Q, the resultant of what lies beyond x, are positive
/// along the axis; M and theta = w' (without shear) go with E I w'' = M, so that a cantilever
/// loaded along the axis has Q, M, theta, w >= 0 and a beam on two supports M <= 0.
///
/// Accuracy: relative error about 1e-12 of the largest value along the beam.
///
/// Source: Timoshenko beam theory; checked against Roark's tables and finite elements (tests).
class BeamResponse {
 public:
  /// @param load_case  Supports, second support and transverse loads along `along` are read.
  /// @param length  L [m], > 0.
  /// @throws bismar::Error  the faults of reduce(), "/stiffness/bending" and "/stiffness/shear"
  ///   where not finite or not > 0.
  BISMAR_API BeamResponse(const LoadCase& load_case,
                          Along along,
                          double length,
                          const BeamStiffness& stiffness);

  /// The supports from x = 0 on: one of a cantilever, two of the others.
  [[nodiscard]] BISMAR_API const std::vector<BeamReaction>& reactions() const;

  // At x [m] in [0, L]; at a jump the value beyond it, at x = L that before it.
  // @throws bismar::Error  "x": not finite or off the beam.

  /// w [m].
  [[nodiscard]] BISMAR_API double deflection(double x) const;
  /// Rotation of the section theta [rad]: the slope of the axis where shear is left out.
  [[nodiscard]] BISMAR_API double rotation(double x) const;
  /// M [N m].
  [[nodiscard]] BISMAR_API double moment(double x) const;
  /// Q [N].
  [[nodiscard]] BISMAR_API double shear(double x) const;

  // True extremes over the length, both sides of every jump looked at.

  [[nodiscard]] BISMAR_API BeamRange deflections() const;
  [[nodiscard]] BISMAR_API BeamRange rotations() const;
  [[nodiscard]] BISMAR_API BeamRange moments() const;
  [[nodiscard]] BISMAR_API BeamRange shears() const;

 private:
  struct State;
  std::shared_ptr<const State> state_;
};

}  // namespace bismar
