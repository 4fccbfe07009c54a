// SPDX-License-Identifier: MIT
#include <bismar/mechanics/temperature.hpp>

#include <bismar/error.hpp>

#include "support/catch.hpp"

#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double zero_celsius = 273.15;

}  // namespace

TEST_CASE("Steel keeps its strength to 400 C, its proportional limit and modulus to 100 C") {
  // EN 1993-1-2:2005 Table 3.1.
  for (const double celsius : {-40.0, 20.0, 99.0, 100.0}) {
    const SteelReduction k = steel_reduction(zero_celsius + celsius).value();
    CHECK(k.k_y == 1.0);
    CHECK(k.k_p == 1.0);
    CHECK(k.k_E == 1.0);
  }
  const SteelReduction warm = steel_reduction(zero_celsius + 350.0).value();
  CHECK(warm.k_y == 1.0);
  CHECK(warm.k_p == Approx((0.613 + 0.42) / 2.0).epsilon(1e-12));
  CHECK(warm.k_E == Approx(0.75).epsilon(1e-12));
}

TEST_CASE("Heat takes everything at the end of each table and nothing is said beyond it") {
  CHECK(steel_reduction(zero_celsius + 1200.0).value().k_y == 0.0);
  CHECK_FALSE(steel_reduction(zero_celsius + 1200.1).has_value());
  CHECK(aluminium_modulus(zero_celsius + 550.0).value() == 0.0);
  CHECK_FALSE(aluminium_modulus(zero_celsius + 551.0).has_value());
  CHECK(aluminium_proof_ratio("6082", "T6", zero_celsius + 550.0).value() == 0.0);
  CHECK_FALSE(aluminium_proof_ratio("6082", "T6", zero_celsius + 600.0).has_value());
}

TEST_CASE("Every reduction falls with the temperature") {
  SteelReduction before;
  double modulus = aluminium_modulus(0.0).value();
  CHECK(modulus == 70e9);
  for (double celsius = 0.0; celsius <= 550.0; celsius += 10.0) {
    const SteelReduction k = steel_reduction(zero_celsius + celsius).value();
    CHECK(k.k_y <= before.k_y);
    CHECK(k.k_p <= before.k_p);
    CHECK(k.k_E <= before.k_E);
    CHECK(k.k_p <= k.k_y);
    before = k;
    const double E = aluminium_modulus(zero_celsius + celsius).value();
    CHECK(E <= modulus);
    modulus = E;
  }
}

TEST_CASE("Aluminium alloys are known by number and temper") {
  // Half way between 0.79 at 150 C and 0.65 at 200 C.
  CHECK(aluminium_proof_ratio("6082", "T6", zero_celsius + 175.0).value() ==
        Approx(0.72).epsilon(1e-12));
  CHECK(aluminium_proof_ratio("EN AW-6082", "T6", 400.0) ==
        aluminium_proof_ratio("6082", "T6", 400.0));
  // From memory.
  CHECK(aluminium_proof_ratio("EN AW-6063", "T6", zero_celsius + 200.0).value() == 0.71);
  CHECK(aluminium_proof_ratio("EN AW-5083", "O", zero_celsius + 200.0).value() == 0.90);
  CHECK_FALSE(aluminium_proof_ratio("6082", "T4", 300.0).has_value());
  CHECK_FALSE(aluminium_proof_ratio("2024", "T3", 300.0).has_value());
  CHECK_FALSE(aluminium_proof_ratio("", "", 300.0).has_value());
}

TEST_CASE("A temperature is finite and not below absolute zero") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK_THROWS_AS(steel_reduction(-1.0), Error);
  CHECK_THROWS_AS(steel_reduction(nan), Error);
  CHECK_THROWS_AS(aluminium_modulus(-1.0), Error);
  CHECK_THROWS_AS(aluminium_proof_ratio("6082", "T6", nan), Error);
  try {
    static_cast<void>(aluminium_modulus(-1.0));
  } catch (const Error& error) {
    CHECK(error.faults().front().where == "temperature");
    CHECK(error.faults().front().code == Code::out_of_range);
  }
}

}  // namespace bismar
