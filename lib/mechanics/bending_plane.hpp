// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/polynomial.hpp"

#include <bismar/export.hpp>
#include <bismar/mechanics/member.hpp>

#include <span>
#include <vector>

namespace bismar::mechanics {

/// How one plane of a member is held, and whether shear bends its axis.
struct PlaneSetup {
  Support support = Support::cantilever;
  double second_support =
      0.0;  ///< Its station [m]; L but for an overhang. Unread for a cantilever.
  double shear_flexibility = 0.0;  ///< s = E I / (G A_s) [m^2]; 0: stiff in shear.
};

/// Shear force, bending moment and deflection of one plane, exact on each segment between two
/// neighbouring stations of the load case.
///
/// Signs: loads and deflections w are positive along the axis; Q(x) is the resultant of everything
/// beyond x, M(x) its moment, so that dM/dx = -Q, dQ/dx = -q. The section turns by theta with
/// E I theta' = M, and E I w' = E I theta + s Q (Timoshenko; s = 0: Euler-Bernoulli). A positive
/// point moment moves the free end of a cantilever along the axis.
struct PlaneSegment {
  double start = 0.0;
  double length = 0.0;
  Polynomial load;        ///< q
  Polynomial shear;       ///< Q
  Polynomial moment;      ///< M
  Polynomial rotation;    ///< E I theta
  Polynomial deflection;  ///< E I w
};

struct BendingPlane {
  PlaneSetup setup;
  std::vector<PlaneSegment> segments;
  // What the supports do to the member: force along the axis [N], moment with the sign of a point
  // moment [N m].
  double start_force = 0.0;
  double start_moment = 0.0;
  double second_force = 0.0;
  double end_moment = 0.0;
};

/// Statically indeterminate planes are solved by the force method: the member as a cantilever, the
/// reactions beyond x = 0 from the conditions of their supports.
///
/// `stations`: sorted, from 0 to L, without repeats, every station of `loads` and the second
/// support among them. At a free or pinned end the moment is exactly zero.
[[nodiscard]] BISMAR_API BendingPlane bending_plane(std::span<const Load> loads,
                                                    Along along,
                                                    const PlaneSetup& setup,
                                                    std::span<const double> stations);

/// Largest |E I w| of the plane [N m^3].
[[nodiscard]] double largest_deflection(const BendingPlane& plane);

/// Largest |E I theta| of the plane [N m^2].
[[nodiscard]] double largest_rotation(const BendingPlane& plane);

/// Largest |G A_s w_s| [N m], w_s being what shear adds to the deflection of a slender plane (s =
/// 0) to first order in s. It is all that shear adds where the plane is determinate. Elsewhere the
/// reactions are those of the slender member; by the theorem of minimum complementary energy the
/// deflection under a single load is a concave function of s, so that the sum is on the safe side
/// there.
[[nodiscard]] double largest_shear_deflection(const BendingPlane& plane);

}  // namespace bismar::mechanics
