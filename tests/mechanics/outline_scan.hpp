// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/section.hpp>

#include <vector>

namespace bismar::test {

/// A closed polygon; the last corner joins the first.
using Outline = std::vector<SectionPoint>;

/// Appends points of an arc about (y, z) from one angle to another, both ends included; without a
/// radius the one point.
void add_arc(Outline& outline, double y, double z, double radius, double from, double to);

/// Points of an ellipse with semi-axes along y and z.
Outline ellipse(double semi_y, double semi_z);

/// The same outline with y and z exchanged.
Outline transposed(const Outline& outline);

/// Properties of what lies inside an odd number of outlines, by cutting it into slabs at every
/// corner's z and integrating the scan lines of each slab. Slow, plain and independent of the
/// library's closed forms; exact for polygons.
struct OutlineScan {
  double area = 0.0;
  double y = 0.0;  ///< Centroid.
  double z = 0.0;
  double I_y = 0.0;
  double I_z = 0.0;
  double I_yz = 0.0;
  double W_pl = 0.0;        ///< About the line along y that halves the area.
  double peak_shear = 0.0;  ///< Largest S(z) / (I_y b(z)), looked at in every slab's middle.
  double energy = 0.0;      ///< Integral of S^2 / b over the depth, over I_y^2: 1 / A_s.

  explicit OutlineScan(const std::vector<Outline>& outlines);
};

}  // namespace bismar::test
