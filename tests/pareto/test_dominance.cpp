// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/pareto/dominance.hpp>

#include <limits>
#include <random>
#include <vector>

#include "support/catch.hpp"

namespace {

using Vector = std::vector<double>;

constexpr double infinity = std::numeric_limits<double>::infinity();

}  // namespace

TEST_CASE("better in one objective and not worse in the others dominates") {
  CHECK(bismar::dominates(Vector{1.0, 2.0}, Vector{1.0, 3.0}));
  CHECK(bismar::dominates(Vector{1.0, 2.0}, Vector{2.0, 3.0}));
  CHECK_FALSE(bismar::dominates(Vector{1.0, 3.0}, Vector{1.0, 2.0}));
  CHECK_FALSE(bismar::dominates(Vector{1.0, 3.0}, Vector{2.0, 2.0}));
  CHECK(bismar::dominates(Vector{1.0, 2.0, 3.0}, Vector{1.0, 2.0, 4.0}));
  CHECK(bismar::dominates(Vector{1.0}, Vector{2.0}));
}

TEST_CASE("equal vectors are ties, and -0.0 equals 0.0") {
  CHECK_FALSE(bismar::dominates(Vector{1.0, 2.0}, Vector{1.0, 2.0}));
  CHECK_FALSE(bismar::dominates(Vector{-0.0, 0.0}, Vector{0.0, -0.0}));
  CHECK_FALSE(bismar::dominates(Vector{0.0, -0.0}, Vector{-0.0, 0.0}));
  CHECK_FALSE(bismar::dominates(Vector{}, Vector{}));
}

TEST_CASE("infinities are ordinary values and NaN takes no part") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(bismar::dominates(Vector{1.0, 2.0}, Vector{1.0, infinity}));
  CHECK(bismar::dominates(Vector{-infinity, 2.0}, Vector{1.0, 2.0}));
  CHECK_FALSE(bismar::dominates(Vector{1.0, infinity}, Vector{1.0, infinity}));
  CHECK_FALSE(bismar::dominates(Vector{1.0, 1.0}, Vector{nan, 2.0}));
  CHECK_FALSE(bismar::dominates(Vector{nan, 1.0}, Vector{3.0, 2.0}));
}

TEST_CASE("dominance is a strict partial order on random vectors with many ties") {
  std::mt19937_64 random(7);
  std::uniform_int_distribution<int> value(0, 2);
  std::vector<Vector> vectors;
  for (int i = 0; i < 60; ++i) {
    vectors.push_back({1.0 * value(random), 1.0 * value(random), 1.0 * value(random)});
  }
  for (const Vector& a : vectors) {
    CHECK_FALSE(bismar::dominates(a, a));
    for (const Vector& b : vectors) {
      CHECK_FALSE((bismar::dominates(a, b) && bismar::dominates(b, a)));
      for (const Vector& c : vectors) {
        if (bismar::dominates(a, b) && bismar::dominates(b, c)) {
          REQUIRE(bismar::dominates(a, c));
        }
      }
    }
  }
}

TEST_CASE("vectors of different lengths cannot be compared") {
  try {
    (void)bismar::dominates(Vector{1.0}, Vector{1.0, 2.0});
    FAIL("accepted");
  } catch (const bismar::Error& error) {
    CHECK(error.faults()[0].code == bismar::Code::conflict);
    CHECK(error.faults()[0].where == "b");
  }
}
