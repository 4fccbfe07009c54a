// SPDX-License-Identifier: MIT
#include <bismar/mechanics/section_trends.hpp>

#include <bismar/error.hpp>

#include "mechanics/random_sections.hpp"
#include "support/catch.hpp"

#include <algorithm>
#include <cstddef>
#include <random>
#include <string>
#include <vector>

namespace bismar {

namespace {

constexpr Proportions all_proportions[] = {Proportions::any, Proportions::slender};

std::string words(SectionFamily family, std::size_t quantity, SizeVariable variable) {
  static const char* const variables[] = {"height", "width", "wall", "web", "flange"};
  return std::string(name(family)) + ", quantity " + std::to_string(quantity) + ", growing " +
         variables[static_cast<std::size_t>(variable)];
}

}  // namespace

TEST_CASE(
    "Every declared trend of a section holds over random pairs and says no less than it could") {
  std::mt19937_64 random(20240612);
  constexpr int pairs = 3000;
  // Some turns of a "neither" are in small corners of the range; it takes a while to come by them.
  constexpr int most_rounds = 80;
  for (const SectionFamily family : test::sized_families) {
    const auto variables = size_variables(family);
    for (std::size_t v = 0; v < variables.size(); ++v) {
      for (const Proportions proportions : all_proportions) {
        std::vector<test::Moves> sum(section_quantity_count);
        const auto trend = [&](std::size_t q) {
          return section_trend(family, static_cast<SectionQuantity>(q), variables[v], proportions);
        };
        bool seen_all = false;
        for (int round = 0; round < most_rounds && !seen_all; ++round) {
          const std::vector<test::Moves> found = test::moves(family, v, proportions, pairs, random);
          seen_all = true;
          for (std::size_t q = 0; q < found.size(); ++q) {
            sum[q].rose += found[q].rose;
            sum[q].fell += found[q].fell;
            sum[q].stayed += found[q].stayed;
            seen_all =
                seen_all && (trend(q) != Trend::neither || (sum[q].rose > 0 && sum[q].fell > 0));
          }
        }
        for (std::size_t q = 0; q < sum.size(); ++q) {
          INFO(words(family, q, variables[v])
               << (proportions == Proportions::any ? "" : ", slender"));
          INFO("rose " << sum[q].rose << ", fell " << sum[q].fell << ", stayed " << sum[q].stayed);
          switch (trend(q)) {
            case Trend::constant:
              CHECK(sum[q].rose == 0);
              CHECK(sum[q].fell == 0);
              break;
            case Trend::rises:
              CHECK(sum[q].rose > 0);
              CHECK(sum[q].fell == 0);
              break;
            case Trend::falls:
              CHECK(sum[q].rose == 0);
              CHECK(sum[q].fell > 0);
              break;
            case Trend::neither:
              CHECK(sum[q].rose > 0);
              CHECK(sum[q].fell > 0);
              break;
          }
        }
      }
    }
  }
}

TEST_CASE("A bound over a random box of sizes contains the section's own value") {
  std::mt19937_64 random(20240613);
  std::uniform_real_distribution<double> share(0.0, 1.0);
  for (const SectionFamily family : test::sized_families) {
    for (const Proportions proportions : all_proportions) {
      int bounded = 0;
      for (int trial = 0; trial < 300; ++trial) {
        const test::RandomSection inside = test::random_section(family, proportions, random);
        std::vector<Interval> box;
        const double spread = 0.2 * share(random) * share(random);
        for (const double size : inside.sizes) {
          const double low = size * (1.0 - spread * share(random));
          const double high = size * (1.0 + spread * share(random));
          box.emplace_back(low, high);
        }
        const SectionProperties section = section_of(family, inside.sizes, inside.fixed);
        for (std::size_t q = 0; q < section_quantity_count; ++q) {
          const auto quantity = static_cast<SectionQuantity>(q);
          const auto bound = section_bound(family, quantity, box, inside.fixed, proportions);
          if (bound) {
            INFO(words(family, q, SizeVariable::height)
                 << ": " << bound->lower() << " to " << bound->upper());
            CHECK(bound->contains(quantity_of(section, quantity)));
            ++bounded;
          }
        }
      }
      INFO(name(family));
      CHECK(bounded > 300 * 5);
    }
  }
}

TEST_CASE("A bound shrinks to the value with its box and needs sections at its corners") {
  const std::vector<double> sizes = {0.2, 0.1, 0.0056, 0.0085};
  const FixedSizes fixed = {.root_radius = 0.012};
  const std::vector<Interval> point(sizes.begin(), sizes.end());
  const SectionProperties s = section_of(SectionFamily::i_section, sizes, fixed);
  for (const SectionQuantity quantity : {SectionQuantity::second_moment_y,
                                         SectionQuantity::elastic_modulus_z,
                                         SectionQuantity::peak_shear_area_y,
                                         SectionQuantity::peak_shear_area_z,
                                         SectionQuantity::radius_of_gyration_y,
                                         SectionQuantity::radius_of_gyration_z}) {
    const auto bound = section_bound(SectionFamily::i_section, quantity, point, fixed);
    REQUIRE(bound);
    CHECK(bound->lower() == Approx(quantity_of(s, quantity)).epsilon(1e-11));
    CHECK(bound->upper() == Approx(quantity_of(s, quantity)).epsilon(1e-11));
  }
  CHECK_FALSE(
      section_bound(SectionFamily::i_section, SectionQuantity::torsion_constant, point, fixed));
  // A wall of 30 mm does not fit the least diameter of the box: i_y, which falls with the wall,
  // then comes from I and A.
  const std::vector<Interval> tube = {Interval(0.05, 0.1), Interval(0.01, 0.03)};
  const auto gyration =
      section_bound(SectionFamily::round_tube, SectionQuantity::radius_of_gyration_y, tube);
  REQUIRE(gyration);
  CHECK(gyration->contains(round_tube(0.061, 0.03, Forming::unknown).i_y()));
  CHECK(gyration->contains(round_tube(0.1, 0.01, Forming::unknown).i_y()));
  CHECK_FALSE(section_bound(SectionFamily::round_tube, SectionQuantity::inner_perimeter, tube));
  // W_t of a tube rises with the wall only as far as it is slender, which the corner must be.
  const auto torsion = [](double wall) {
    const std::vector<Interval> box = {
        Interval(0.04, 0.1), Interval(0.04, 0.1), Interval(0.004, wall)};
    return section_bound(SectionFamily::rectangular_tube,
                         SectionQuantity::torsion_modulus,
                         box,
                         {.corners = Corners::en_10210},
                         Proportions::slender);
  };
  CHECK(torsion(0.0199));
  CHECK_FALSE(torsion(0.0201));
  CHECK(section_bound(SectionFamily::round_tube, SectionQuantity::height, tube));
}

TEST_CASE("Slender is what its text says") {
  const auto slender = [](SectionFamily family, std::vector<double> sizes, double radius = 0.0) {
    return is_slender(family, sizes, {.root_radius = radius});
  };
  CHECK(slender(SectionFamily::i_section, {0.2, 0.1, 0.0056, 0.0085}, 0.012));  // IPE 200
  CHECK_FALSE(slender(SectionFamily::i_section, {0.2, 0.1, 0.0056, 0.0085}, 0.013));
  CHECK_FALSE(slender(SectionFamily::i_section, {0.2, 0.1, 0.009, 0.0085}));
  CHECK_FALSE(slender(SectionFamily::i_section, {0.2, 0.21, 0.0056, 0.0085}));
  CHECK(slender(SectionFamily::tee, {0.1, 0.15, 0.006, 0.009}));
  CHECK_FALSE(slender(SectionFamily::tee, {0.1, 0.21, 0.006, 0.009}));
  CHECK(slender(SectionFamily::angle, {0.1, 0.1, 0.02}));
  CHECK_FALSE(slender(SectionFamily::angle, {0.1, 0.09, 0.02}));
  CHECK(slender(SectionFamily::rectangular_tube, {0.1, 0.06, 0.012}));
  CHECK_FALSE(slender(SectionFamily::elliptical_tube, {0.1, 0.06, 0.013}));
  CHECK(slender(SectionFamily::solid_round, {0.1}));
}

TEST_CASE("Sizes that a family does not have are a defect of the caller") {
  CHECK(size_variables(SectionFamily::polygon).empty());
  CHECK_THROWS_AS(
      section_trend(SectionFamily::solid_round, SectionQuantity::area, SizeVariable::wall),
      InternalError);
  const std::vector<double> two = {0.1, 0.1};
  CHECK_THROWS_AS(section_of(SectionFamily::solid_round, two), InternalError);
  CHECK_THROWS_AS(section_of(SectionFamily::polygon, {}), InternalError);
  const std::vector<double> wrong = {0.1, 0.06};
  CHECK_THROWS_AS(section_of(SectionFamily::round_tube, wrong), Error);
}

}  // namespace bismar
