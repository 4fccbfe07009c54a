// SPDX-License-Identifier: MIT
#pragma once

#include "mechanics/polynomial.hpp"

#include <bismar/export.hpp>
#include <bismar/mechanics/member.hpp>

#include <span>
#include <vector>

namespace bismar::mechanics {

/// Shear force, bending moment and deflection of one plane, exact on each segment between two
/// neighbouring stations of the load case.
///
/// Signs: loads and deflections w are positive along the axis; Q(x) is the resultant of everything
/// beyond x, M(x) its moment, so that dM/dx = -Q, dQ/dx = -q and E I w'' = M. A positive point
/// moment moves the free end of a cantilever along the axis.
struct PlaneSegment {
  double start = 0.0;
  double length = 0.0;
  Polynomial load;        ///< q
  Polynomial shear;       ///< Q
  Polynomial moment;      ///< M
  Polynomial slope;       ///< E I w'
  Polynomial deflection;  ///< E I w
};

/// `stations`: sorted, from 0 to L, without repeats, every station of `loads` among them.
/// Values that are zero but for rounding are exactly zero at the ends of the segments.
[[nodiscard]] BISMAR_API std::vector<PlaneSegment> bending_plane(std::span<const Load> loads,
                                                                 Along along,
                                                                 Support support,
                                                                 std::span<const double> stations);

/// Largest |E I w| of the plane [N m^3].
[[nodiscard]] double largest_deflection(std::span<const PlaneSegment> plane);

}  // namespace bismar::mechanics
