// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/member.hpp>

#include <span>
#include <vector>

namespace bismar::test {

/// A small beam finite-element solution with E I = 1: cubic elements with consistent loads, whose
/// nodal deflections and end moments are exact for linear element loads. Independent of the
/// library's integration: it never forms a polynomial of the whole beam.
struct HermiteBeam {
  std::vector<double> x;             ///< Nodes.
  std::vector<double> deflection;    ///< w at the nodes.
  std::vector<double> moment_left;   ///< E I w'' just left of each node (first: unused).
  std::vector<double> moment_right;  ///< Just right of each node (last: unused).
  std::vector<double> shear_left;
  std::vector<double> shear_right;

  /// Loads along `along` only; `elements` at least, more where stations fall between.
  HermiteBeam(
      std::span<const Load> loads, Along along, Support support, double length, int elements);
};

}  // namespace bismar::test
