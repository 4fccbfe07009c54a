// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/member.hpp>

#include <optional>
#include <random>
#include <span>
#include <vector>

namespace bismar::test {

/// How the finite-element beam is held.
struct BeamHold {
  Support support = Support::cantilever;
  std::optional<double> second_support = {};  ///< Absent: at the end.
  double shear_flexibility = 0.0;             ///< E I / (G A_s) [m^2].
};

/// A small beam finite-element solution with E I = 1: cubic elements (with the shear terms of
/// Timoshenko's beam) and consistent loads, whose nodal deflections and end moments are exact for
/// linear element loads. Independent of the library's integration: it never forms a polynomial of
/// the whole beam and knows no reactions.
struct HermiteBeam {
  std::vector<double> x;             ///< Nodes.
  std::vector<double> deflection;    ///< w at the nodes.
  std::vector<double> rotation;      ///< Of the section at the nodes.
  std::vector<double> moment_left;   ///< E I w'' just left of each node (first: unused).
  std::vector<double> moment_right;  ///< Just right of each node (last: unused).
  std::vector<double> shear_left;
  std::vector<double> shear_right;

  /// Loads along `along` only; `elements` at least, more where stations fall between.
  HermiteBeam(
      std::span<const Load> loads, Along along, const BeamHold& hold, double length, int elements);
};

/// One to four forces, moments and distributed loads along z. Places lie on a grid of fortieths of
/// the length: very short elements would spoil the mesh's own accuracy.
std::vector<Load> random_loads(std::mt19937& random, double length);
/// Any kind of support, overhanging now and then; stiff in shear.
BeamHold random_hold(std::mt19937& random, double length);
/// A load case of these loads and supports, alike in both planes.
LoadCase held(const BeamHold& hold, std::vector<Load> loads);

}  // namespace bismar::test
