// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/exchange/penalty.hpp>

#include <functional>
#include <limits>

#include "support/catch.hpp"

using bismar::ExchangeConstant;

namespace {

bismar::Code code_of(const std::function<void()>& call) {
  try {
    call();
  } catch (const bismar::Error& error) {
    CHECK(error.faults()[0].where == "exchange constant");
    return error.faults()[0].code;
  }
  return bismar::Code::internal;
}

}  // namespace

TEST_CASE("an exchange constant goes in and comes out by name") {
  CHECK(ExchangeConstant::per_kilogram(3.5).value_per_kilogram() == 3.5);
  CHECK(ExchangeConstant::per_gram(0.25).value_per_kilogram() == 250.0);
  CHECK(ExchangeConstant::per_kilogram(250.0).value_per_gram() == 0.25);
  // 1 lb = 0.45359237 kg exactly, so 1 per lb = 2.2046226218 per kg (NIST SP 811, 2008, B.8; from
  // memory).
  CHECK(ExchangeConstant::per_pound(1.0).value_per_kilogram() ==
        Approx(2.2046226218).epsilon(1e-10));
  CHECK(ExchangeConstant::per_kilogram(1.0).value_per_pound() == 0.45359237);
  CHECK(ExchangeConstant::per_gram(1.0) > ExchangeConstant::per_kilogram(1.0));
}

TEST_CASE("the linear penalty is cost plus alpha times mass") {
  // SEL-052: m_A = 2.0 kg, C_A = 10; m_B = 1.2 kg, C_B = 18; Z_A(5) = 20, Z_B(5) = 24.
  // Source: "linear penalty Z = C + alpha m; switch at alpha = (C_B-C_A)/(m_A-m_B)";
  // how verified: "recomputed independently"; relative tolerance 1e-9.
  const auto alpha = ExchangeConstant::per_kilogram(5.0);
  CHECK(bismar::linear_penalty(alpha, {.cost = 10.0, .mass = 2.0}) == Approx(20.0).epsilon(1e-9));
  CHECK(bismar::linear_penalty(alpha, {.cost = 18.0, .mass = 1.2}) == Approx(24.0).epsilon(1e-9));
}

TEST_CASE("an exchange constant that is negative or not finite is refused") {
  using bismar::Code;
  const double infinity = std::numeric_limits<double>::infinity();
  CHECK(code_of([] { (void)ExchangeConstant::per_kilogram(-1.0); }) == Code::out_of_range);
  CHECK(code_of([&] { (void)ExchangeConstant::per_kilogram(infinity); }) == Code::not_finite);
  CHECK(code_of([&] { (void)ExchangeConstant::per_pound(infinity - infinity); }) ==
        Code::not_finite);
  CHECK(code_of([] { (void)ExchangeConstant::per_gram(1e307); }) == Code::not_finite);
  CHECK(ExchangeConstant::per_kilogram(-0.0).value_per_kilogram() == 0.0);
}
