// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/sizing/part.hpp>

#include <cstddef>
#include <span>
#include <vector>

namespace bismar::benchmarks {

/// The starter tables of the source tree, read once.
[[nodiscard]] const Catalogue& starter();

/// A crank lever: a cantilever of 300 mm with 655 N at its end, several shapes, every route.
[[nodiscard]] Part wide_lever();
/// The same, also out of every list of stock.
[[nodiscard]] Part wide_lever_with_stock();

/// n points of two objectives, evenly spread over the unit square; fixed seed.
[[nodiscard]] const std::vector<double>& random_points(std::size_t n);
/// n points on the convex curve f1 f2 = 1 in random order: every one is on the front.
[[nodiscard]] const std::vector<double>& points_on_a_curve(std::size_t n);

/// Sum of numbers, each weighted by its place, so that another order shows.
[[nodiscard]] double checksum(std::span<const double> values);

}  // namespace bismar::benchmarks
