// SPDX-License-Identifier: MIT
#pragma once

#include <cstddef>

namespace bismar::test {

/// St Venant torsion of a solid regular polygon with n corners and inscribed radius 1 by Fourier
/// series: phi = (1 - r^2) / 2 + sum a_k r^(nk) cos(n k theta) - a_0, coefficients by least squares
/// on the outline. Plain, slow, and independent of boundary elements.
struct RegularPolygonTorsion {
  double I_t = 0.0;
  double W_t = 0.0;

  RegularPolygonTorsion(int corners, std::size_t terms);
};

/// Torsion constant of a region of unit cells by finite differences of Prandtl's stress function.
/// `cells_a_side` cells along a square of side 1, of which the square [cut_from, cut_to)^2 is left
/// out: a hole, or a notch where it reaches the edge (then an L).
double torsion_by_differences(int cells_a_side, int cut_from, int cut_to);

}  // namespace bismar::test
