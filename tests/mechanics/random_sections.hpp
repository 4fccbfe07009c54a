// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/section_trends.hpp>

#include <cstddef>
#include <optional>
#include <random>
#include <string>
#include <vector>

namespace bismar::test {

/// A random choice of what makes a section.
struct RandomSection {
  std::vector<double> sizes;
  FixedSizes fixed;
};

inline constexpr SectionFamily sized_families[] = {SectionFamily::solid_round,
                                                   SectionFamily::solid_square,
                                                   SectionFamily::solid_rectangle,
                                                   SectionFamily::solid_ellipse,
                                                   SectionFamily::solid_hexagon,
                                                   SectionFamily::round_tube,
                                                   SectionFamily::rectangular_tube,
                                                   SectionFamily::elliptical_tube,
                                                   SectionFamily::i_section,
                                                   SectionFamily::channel,
                                                   SectionFamily::tee,
                                                   SectionFamily::angle};

/// Whether the sizes make a section, of the proportions asked for.
bool fits(SectionFamily family, const RandomSection& section, Proportions proportions);

/// Sizes over the whole range that fits, its far corners included.
RandomSection random_section(SectionFamily family,
                             Proportions proportions,
                             std::mt19937_64& random);

/// How often a quantity rose, fell or stayed when one size alone grew.
struct Moves {
  int rose = 0;
  int fell = 0;
  int stayed = 0;
};

/// Moves of every quantity over random pairs, one row a quantity.
std::vector<Moves> moves(SectionFamily family,
                         std::size_t variable,
                         Proportions proportions,
                         int pairs,
                         std::mt19937_64& random);

}  // namespace bismar::test
