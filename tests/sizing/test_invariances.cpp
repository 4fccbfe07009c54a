// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <cfenv>
#include <clocale>
#include <cstdio>
#include <string>
#include <vector>

#if defined(__SSE2__)
#include <immintrin.h>
#endif

using namespace bismar;

namespace {

/// What must not change: the identity and the exact numbers of every design, in order.
std::vector<std::string> account(const Result& result) {
  std::vector<std::string> out;
  for (const auto& design : result.designs) {
    std::string line = design.id;
    for (const double value : {design.mass, design.cost}) {
      // The bits, not a rounded text.
      char buffer[64];
      std::snprintf(buffer, sizeof buffer, " %a", value);
      line += buffer;
    }
    out.push_back(std::move(line));
  }
  for (const auto& line : result.funnel.lines) {
    out.push_back(line.reason + " " + std::to_string(line.candidates));
  }
  out.push_back(std::to_string(result.others.size()));
  return out;
}

}  // namespace

TEST_CASE("the order of the tables does not change the result") {
  std::mt19937 random(3);
  for (int round = 0; round < 25; ++round) {
    const auto catalogue = test::random_catalogue(random, 8);
    const auto part = test::random_part(random);
    const auto result = account(front(part, catalogue));
    for (int again = 0; again < 3; ++again) {
      CHECK(account(front(part, test::shuffled(catalogue, random))) == result);
    }
  }
}

TEST_CASE("another currency scales costs and the ruler and changes nothing else") {
  std::mt19937 random(5);
  for (int round = 0; round < 25; ++round) {
    const auto catalogue = test::random_catalogue(random, 8);
    auto part = test::random_part(random);
    const auto before = front(part, catalogue);
    const auto ruler = exchange_ruler(before, part, catalogue);
    // A power of two scales without rounding, so even ties stay ties.
    const double factor = 8.0;
    const auto other = test::in_other_currency(catalogue, factor);
    if (part.limits.cost) {
      *part.limits.cost *= factor;
    }
    const auto after = front(part, other);
    REQUIRE(after.designs.size() == before.designs.size());
    CHECK(after.front_count == before.front_count);
    for (std::size_t i = 0; i < before.designs.size(); ++i) {
      CHECK(after.designs[i].id == before.designs[i].id);
      CHECK(after.designs[i].mass == before.designs[i].mass);
      CHECK(after.designs[i].cost == Approx(before.designs[i].cost * factor).epsilon(1e-12));
    }
    const auto scaled = exchange_ruler(after, part, other);
    REQUIRE(scaled.stretches.size() == ruler.stretches.size());
    for (std::size_t i = 0; i < ruler.stretches.size(); ++i) {
      CHECK(scaled.stretches[i].choice == ruler.stretches[i].choice);
      CHECK(scaled.stretches[i].from == Approx(ruler.stretches[i].from * factor).epsilon(1e-12));
    }
  }
}

TEST_CASE("a repeated material under another id appears as a tie and hides nothing") {
  auto catalogue = test::small_catalogue();
  const auto part = test::small_lever();
  const auto before = front(part, catalogue);
  MaterialTableBuilder builder("test");
  for (std::size_t m = 0; m < catalogue.materials.size(); ++m) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(m);
    const auto source = catalogue.materials.steps(m)[0].row;
    for (const auto& one : properties()) {
      if (const auto value = catalogue.materials.value(one.property, source)) {
        row.values[one.property] = *value;
      }
    }
    builder.add(row);
    row.info.id += "-again";
    builder.add(row);
  }
  catalogue.materials = builder.build();
  const auto after = front(part, catalogue);
  CHECK(after.front_count == 2 * before.front_count);
}

TEST_CASE("rounding mode, flush-to-zero and locale of the host change nothing") {
  const auto catalogue = test::small_catalogue();
  std::mt19937 random(17);
  const auto part = test::random_part(random);
  const auto expected = account(front(part, catalogue));
  for (const int mode : {FE_UPWARD, FE_DOWNWARD, FE_TOWARDZERO}) {
    std::fesetround(mode);
    const auto result = front(part, catalogue);
    CHECK(std::fegetround() == mode);  // the host gets its own mode back
    std::fesetround(FE_TONEAREST);
    CHECK(account(result) == expected);
  }
#if defined(__SSE2__)
  const auto control = _mm_getcsr();
  _mm_setcsr(control | 0x8040U);  // flush to zero, denormals are zero
  const auto flushed = front(part, catalogue);
  CHECK((_mm_getcsr() & 0x8040U) == 0x8040U);
  _mm_setcsr(control);
  CHECK(account(flushed) == expected);
#endif
  const char* foreign = nullptr;
  for (const char* name : {"de_DE.UTF-8", "fr_FR.UTF-8", "de_DE", "nl_NL.UTF-8"}) {
    foreign = foreign == nullptr ? std::setlocale(LC_ALL, name) : foreign;
  }
  if (foreign == nullptr) {
    WARN("NOT RUN: no locale with a decimal comma is installed");
  } else {
    CHECK(account(front(part, catalogue)) == expected);
    std::setlocale(LC_ALL, "C");
  }
}

TEST_CASE("the same part twice gives the same bits") {
  std::mt19937 random(19);
  const auto catalogue = test::random_catalogue(random, 10);
  const auto part = test::random_part(random);
  CHECK(account(front(part, catalogue)) == account(front(part, catalogue)));
}
