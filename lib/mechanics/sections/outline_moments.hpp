// SPDX-License-Identifier: MIT
#pragma once

namespace bismar::mechanics {

/// Area moments about any two axes, summed over rectangles and over the spandrels that fillets add
/// and rounded corners take away (fillet.hpp). Exact.
struct OutlineMoments {
  double area = 0.0;
  double first_y = 0.0;    ///< Integral of y.
  double first_z = 0.0;    ///< Integral of z.
  double second_yy = 0.0;  ///< Integral of y^2.
  double second_zz = 0.0;  ///< Integral of z^2.
  double second_yz = 0.0;  ///< Integral of y z.

  void add_rectangle(double y_from, double y_to, double z_from, double z_to);
  /// Spandrel of a corner at (y, z) that reaches from there in the directions `along_y` and
  /// `along_z` (+1 or -1); `sign` -1 takes it away.
  void add_spandrel(double y, double z, double along_y, double along_z, double radius, double sign);
};

}  // namespace bismar::mechanics
