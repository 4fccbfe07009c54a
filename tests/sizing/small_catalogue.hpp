// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/sizing/front.hpp>

#include <cstdint>
#include <random>

namespace bismar::test {

/// Invented materials, routes, stock and finishes, small enough to reckon by hand.
[[nodiscard]] Catalogue small_catalogue();

/// A cantilever of 0.3 m with 655 N at its end.
[[nodiscard]] Part small_lever();

/// Random materials (values drawn from short lists, so that ties are common), the routes of the
/// small catalogue, random stock.
[[nodiscard]] Catalogue random_catalogue(std::mt19937& random, std::size_t materials);

/// Random part with solids, tubes and stock.
[[nodiscard]] Part random_part(std::mt19937& random);

/// The same catalogue with its tables in another order.
[[nodiscard]] Catalogue shuffled(const Catalogue& catalogue, std::mt19937& random);

/// The same catalogue in a currency of which `factor` buy one of the old.
[[nodiscard]] Catalogue in_other_currency(const Catalogue& catalogue, double factor);

/// The starter tables of the source tree.
[[nodiscard]] const Catalogue& starter();

}  // namespace bismar::test
