// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/exchange/ruler.hpp>
#include <bismar/pareto/front.hpp>

#include <cmath>
#include <cstdint>
#include <functional>
#include <limits>
#include <string>
#include <utility>
#include <vector>

#include "support/catch.hpp"

namespace {

using Indices = std::vector<std::uint32_t>;
using Table = std::vector<double>;

std::vector<std::pair<std::string, bismar::Code>> faults_of(const std::function<void()>& call) {
  std::vector<std::pair<std::string, bismar::Code>> result;
  try {
    call();
  } catch (const bismar::Error& error) {
    for (const bismar::Fault& fault : error.faults()) {
      result.emplace_back(fault.where, fault.code);
    }
  }
  return result;
}

}  // namespace

TEST_CASE("SEL-052: the switching exchange constants of three designs") {
  // Inputs: A (2.0 kg, 10), B (1.2 kg, 18), C (1.0 kg, 30). Expected: alpha_AB = 10, alpha_BC = 60,
  // Z_A(5) = 20, Z_B(5) = 24; best at 5 is A, at 20 B, at 100 C. Relative tolerance 1e-9.
  // Source: "linear penalty Z = C + alpha m; switch at alpha = (C_B-C_A)/(m_A-m_B)";
  // how verified: "recomputed independently"; note: "constructed; all three on the lower convex
  // hull".
  const Table table = {2.0, 10.0, 1.2, 18.0, 1.0, 30.0};
  const Indices labels = {0, 1, 2};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, labels);
  REQUIRE(ruler.stretches.size() == 3);
  CHECK(*ruler.stretches[0].to == Approx(10.0).epsilon(1e-9));
  CHECK(*ruler.stretches[1].to == Approx(60.0).epsilon(1e-9));
  CHECK(ruler.stretches[ruler.stretch_at(5.0).value()].label == 0);
  CHECK(ruler.stretches[ruler.stretch_at(20.0).value()].label == 1);
  CHECK(ruler.stretches[ruler.stretch_at(100.0).value()].label == 2);
  CHECK(ruler.unsupported.empty());
  CHECK(ruler.ties.empty());

  // At alpha = 5 the choice A costs 20 and the runner-up B 24: a ruler cut to start there says so.
  const bismar::Ruler from_5 = bismar::exchange_ruler(table, labels, {.from = 5.0});
  const bismar::RulerStretch& first = from_5.stretches.front();
  CHECK(first.penalty_from == Approx(20.0).epsilon(1e-9));
  REQUIRE_FALSE(first.runners_up.empty());
  CHECK(first.runners_up[0].label == 1);
  CHECK(first.penalty_from + first.runners_up[0].regret_from == Approx(24.0).epsilon(1e-9));
}

TEST_CASE("SEL-053: non-dominated but never optimal for a linear penalty") {
  // Inputs: m = 2.0, 1.6, 1.0 kg; C = 10, 18, 20. Expected: 3 on the front, 2 on the convex hull,
  // switch at alpha = 10. Relative tolerance 1e-9. Source: "trade-off surface theory: points off
  // the lower convex hull are Pareto-optimal but never minimise C + alpha m"; how verified:
  // "recomputed independently"; note: "A(2.0,10) B(1.6,18) C(1.0,20); line A-C at m=1.6 is 14 <
  // 18".
  const Table table = {2.0, 10.0, 1.6, 18.0, 1.0, 20.0};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{0, 1, 2});
  CHECK(bismar::front_2d(table).size() == 3);
  REQUIRE(ruler.stretches.size() == 2);
  CHECK(*ruler.stretches[0].to == Approx(10.0).epsilon(1e-9));
  REQUIRE(ruler.unsupported.size() == 1);
  CHECK(ruler.unsupported[0].row == 1);
  CHECK(ruler.unsupported[0].alpha == Approx(10.0).epsilon(1e-9));
  // The least regret is the height above the line, 18 - 14.
  CHECK(ruler.unsupported[0].least_regret == Approx(4.0).epsilon(1e-9));
}

TEST_CASE("a ruler worked by hand, field by field") {
  // (m, C), label:        0: (8, 1) a   1: (4, 3) a   2: (2, 7) b   3: (1, 19) a   4: (6, 9) b
  // Breakpoints: 0-1 at (3-1)/(8-4) = 0.5, 1-2 at (7-3)/(4-2) = 2, 2-3 at (19-7)/(2-1) = 12.
  const Table table = {8.0, 1.0, 4.0, 3.0, 2.0, 7.0, 1.0, 19.0, 6.0, 9.0};
  const Indices labels = {10, 10, 20, 10, 20};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, labels);
  REQUIRE(ruler.stretches.size() == 3);

  const bismar::RulerStretch& a = ruler.stretches[0];
  CHECK(a.label == 10);
  CHECK(a.from == 0.0);
  CHECK(a.to == 2.0);
  CHECK(a.penalty_from == 1.0);
  CHECK(a.penalty_to == 3.0 + 2.0 * 4.0);
  REQUIRE(a.vertices.size() == 2);
  CHECK(a.vertices[0].rows == Indices{0});
  CHECK(a.vertices[0].from == 0.0);
  CHECK(a.vertices[0].to == 0.5);
  CHECK(a.vertices[1].rows == Indices{1});
  CHECK(a.vertices[1].priced == 4.0);
  CHECK(a.vertices[1].cost == 3.0);
  CHECK(a.vertices[1].from == 0.5);
  CHECK(a.vertices[1].to == 2.0);
  // The only undominated row of b is 2: at alpha = 0 it costs 7 - 1 more; at 0.5: 8 - 5; at 2: 0.
  REQUIRE(a.runners_up.size() == 1);
  CHECK(a.runners_up[0].label == 20);
  CHECK(a.runners_up[0].rows == Indices{2});
  CHECK(a.runners_up[0].from == 0.0);
  CHECK(a.runners_up[0].to == 2.0);
  CHECK(a.runners_up[0].regret_from == 6.0);
  CHECK(a.runners_up[0].regret_to == 0.0);
  CHECK(a.runners_up[0].least_regret == 0.0);
  CHECK(a.runners_up[0].least_regret_at == 2.0);

  // On b's stretch rows 1 and 3 of a meet at (19-3)/(4-1) = 16/3.
  const bismar::RulerStretch& b = ruler.stretches[1];
  CHECK(b.label == 20);
  CHECK(b.from == 2.0);
  CHECK(b.to == 12.0);
  REQUIRE(b.runners_up.size() == 2);
  CHECK(b.runners_up[0].rows == Indices{1});
  CHECK(b.runners_up[0].regret_from == 0.0);
  CHECK(*b.runners_up[0].to == 16.0 / 3.0);
  CHECK(*b.runners_up[0].regret_to == Approx(-4.0 + 16.0 / 3.0 * 2.0));
  CHECK(b.runners_up[1].rows == Indices{3});
  CHECK(b.runners_up[1].from == 16.0 / 3.0);
  CHECK(b.runners_up[1].regret_from == Approx(12.0 - 16.0 / 3.0));
  CHECK(b.runners_up[1].regret_to == 0.0);

  // The last stretch has no upper end: C = 19 and m = 1 say how Z goes on.
  const bismar::RulerStretch& last = ruler.stretches[2];
  CHECK(last.label == 10);
  CHECK(last.from == 12.0);
  CHECK_FALSE(last.to.has_value());
  CHECK_FALSE(last.penalty_to.has_value());
  CHECK(last.vertices.back().cost == 19.0);
  CHECK(last.vertices.back().priced == 1.0);
  CHECK_FALSE(last.vertices.back().to.has_value());
  REQUIRE(last.runners_up.size() == 1);
  CHECK(last.runners_up[0].rows == Indices{2});
  CHECK_FALSE(last.runners_up[0].regret_to.has_value());
  CHECK(last.runners_up[0].least_regret == 0.0);
  CHECK(last.runners_up[0].least_regret_at == 12.0);
  CHECK(ruler.unsupported.empty());
}

TEST_CASE("the least regret of a runner-up may lie inside its range") {
  // Label 1 holds rows 0 and 1, which meet at alpha = 1; row 2 of label 2 is 0.5 above them there.
  const Table table = {4.0, 0.0, 0.0, 4.0, 2.0, 2.5};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{1, 1, 2});
  REQUIRE(ruler.stretches.size() == 1);
  REQUIRE(ruler.stretches[0].runners_up.size() == 1);
  const bismar::RunnerUp& runner = ruler.stretches[0].runners_up[0];
  CHECK(runner.least_regret == 0.5);
  CHECK(runner.least_regret_at == 1.0);
  CHECK(runner.regret_from == 2.5);
  REQUIRE(ruler.unsupported.size() == 1);
  CHECK(ruler.unsupported[0].least_regret == 0.5);
  CHECK(ruler.unsupported[0].label == 2);
}

TEST_CASE("the ends are the lexicographic minima of (C, m) and (m, C)") {
  // Rows 0 and 1 have the least C, rows 2 and 3 the least m.
  const Table table = {9.0, 1.0, 7.0, 1.0, 2.0, 8.0, 2.0, 6.0};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{0, 1, 2, 3});
  REQUIRE(ruler.stretches.size() == 2);
  CHECK(ruler.stretches[0].vertices[0].rows == Indices{1});
  CHECK(ruler.stretches[1].vertices[0].rows == Indices{3});
  CHECK(ruler.stretches[0].to == 1.0);
}

TEST_CASE("equal rows share a vertex in the order of index, and the first one names the label") {
  const Table table = {2.0, 1.0, 1.0, 5.0, 2.0, 1.0, 1.0, 5.0};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{7, 8, 9, 8});
  REQUIRE(ruler.stretches.size() == 2);
  CHECK(ruler.stretches[0].label == 7);
  CHECK(ruler.stretches[0].vertices[0].rows == Indices{0, 2});
  CHECK(ruler.stretches[1].vertices[0].rows == Indices{1, 3});
  // The equal row of the other label is the runner-up, at no regret over the whole stretch.
  REQUIRE(ruler.stretches[0].runners_up.size() == 1);
  CHECK(ruler.stretches[0].runners_up[0].rows == Indices{2});
  CHECK(ruler.stretches[0].runners_up[0].label == 9);
  CHECK(ruler.stretches[0].runners_up[0].regret_from == 0.0);
  CHECK(ruler.stretches[0].runners_up[0].regret_to == 0.0);
}

TEST_CASE("rows on a hull edge are ties at its breakpoint, not stretches") {
  // Rows 0, 1, 2, 3 on one line of slope -2; row 4 equals row 2; row 5 is above the line.
  const Table table = {4.0, 0.0, 3.0, 2.0, 2.0, 4.0, 1.0, 6.0, 2.0, 4.0, 2.5, 3.5};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{0, 1, 2, 3, 4, 5});
  REQUIRE(ruler.stretches.size() == 2);
  CHECK(ruler.stretches[0].vertices[0].rows == Indices{0});
  CHECK(ruler.stretches[1].vertices[0].rows == Indices{3});
  REQUIRE(ruler.ties.size() == 1);
  CHECK(ruler.ties[0].alpha == 2.0);
  CHECK(ruler.ties[0].rows == Indices{1, 2, 4});
  REQUIRE(ruler.unsupported.size() == 1);
  CHECK(ruler.unsupported[0].row == 5);
  CHECK(ruler.unsupported[0].least_regret == 0.5);
}

TEST_CASE("vertices whose range rounds to nothing are ties, so ranges always rise") {
  // Nearly collinear: the middle point is one unit in the last place below the line.
  const Table table = {3.0, 0.0, 2.0, std::nextafter(1.0, 0.0), 1.0, 2.0, 0.9, 2.1};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{0, 1, 2, 3});
  double last = 0.0;
  for (const bismar::RulerStretch& stretch : ruler.stretches) {
    CHECK(stretch.from == last);
    if (stretch.to) {
      CHECK(*stretch.to > stretch.from);
      last = *stretch.to;
    }
  }
  std::size_t rows = ruler.unsupported.size();
  for (const auto& stretch : ruler.stretches) {
    rows += stretch.vertices.size();
  }
  for (const auto& tie : ruler.ties) {
    rows += tie.rows.size();
  }
  CHECK(rows == 4);
}

TEST_CASE("a range cuts stretches, vertices, runners-up and ties, but not the unsupported rows") {
  const Table table = {4.0, 0.0, 3.0, 2.0, 2.0, 4.0, 1.0, 16.0, 1.5, 14.0};
  const Indices labels = {0, 1, 2, 3, 4};
  // Breakpoints: 2 (row 1 tied) and 12; row 4 lies above the last edge.
  const bismar::Ruler ruler = bismar::exchange_ruler(table, labels, {.from = 3.0, .to = 5.0});
  REQUIRE(ruler.stretches.size() == 1);
  CHECK(ruler.stretches[0].label == 2);
  CHECK(ruler.stretches[0].from == 3.0);
  CHECK(ruler.stretches[0].to == 5.0);
  CHECK(ruler.stretches[0].penalty_from == 10.0);
  CHECK(ruler.stretches[0].penalty_to == 14.0);
  CHECK(ruler.stretches[0].vertices[0].from == 3.0);
  CHECK(ruler.stretches[0].vertices[0].to == 5.0);
  CHECK(ruler.stretches[0].runners_up.front().from == 3.0);
  CHECK(ruler.stretches[0].runners_up.back().to == 5.0);
  CHECK(ruler.ties.empty());
  CHECK(ruler.unsupported.size() == 1);
  CHECK(bismar::exchange_ruler(table, labels, {.to = 2.0}).ties.size() == 1);
  CHECK(bismar::exchange_ruler(table, labels, {.to = 2.0}).stretches.size() == 1);
  CHECK(bismar::exchange_ruler(table, labels, {.from = 2.0}).stretches.front().label == 2);
}

TEST_CASE("the stretch of a breakpoint is the one that ends there") {
  const Table table = {2.0, 10.0, 1.0, 20.0};
  const Indices labels = {0, 1};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, labels);
  CHECK(ruler.stretch_at(0.0) == 0U);
  CHECK(ruler.stretch_at(10.0) == 0U);
  CHECK(ruler.stretch_at(std::nextafter(10.0, 11.0)) == 1U);
  CHECK(ruler.stretch_at(1e300) == 1U);
  CHECK_FALSE(ruler.stretch_at(-1.0).has_value());
  CHECK_FALSE(ruler.stretch_at(std::nan("")).has_value());
  const bismar::Ruler cut = bismar::exchange_ruler(table, labels, {.from = 1.0, .to = 12.0});
  CHECK_FALSE(cut.stretch_at(0.5).has_value());
  CHECK_FALSE(cut.stretch_at(13.0).has_value());
  CHECK(cut.stretch_at(1.0) == 0U);
  CHECK(cut.stretch_at(12.0) == 1U);
}

TEST_CASE("no row gives an empty ruler, one row and one label have no runner-up") {
  CHECK(bismar::exchange_ruler({}, {}).stretches.empty());
  CHECK_FALSE(bismar::exchange_ruler({}, {}).stretch_at(1.0).has_value());
  const bismar::Ruler one = bismar::exchange_ruler(Table{3.0, -4.0}, Indices{5});
  REQUIRE(one.stretches.size() == 1);
  CHECK(one.stretches[0].runners_up.empty());
  CHECK(one.stretches[0].penalty_from == -4.0);
  CHECK_FALSE(one.stretches[0].to.has_value());
  const bismar::Ruler same =
      bismar::exchange_ruler(Table{3.0, 1.0, 2.0, 2.0, 9.0, 9.0}, Indices{5, 5, 5});
  REQUIRE(same.stretches.size() == 1);
  CHECK(same.stretches[0].vertices.size() == 2);
  CHECK(same.stretches[0].runners_up.empty());
}

TEST_CASE("a row that dominates all is the only choice, with the best of the rest behind it") {
  const Table table = {1.0, 1.0, 2.0, 3.0, 5.0, 2.0};
  const bismar::Ruler ruler = bismar::exchange_ruler(table, Indices{0, 1, 2});
  REQUIRE(ruler.stretches.size() == 1);
  // Rows 1 and 2 meet at (3-2)/(5-2) = 1/3.
  REQUIRE(ruler.stretches[0].runners_up.size() == 2);
  CHECK(ruler.stretches[0].runners_up[0].label == 2);
  CHECK(ruler.stretches[0].runners_up[1].label == 1);
  CHECK(*ruler.stretches[0].runners_up[0].to == 1.0 / 3.0);
  CHECK(ruler.stretches[0].runners_up[0].least_regret == 1.0);
  CHECK(ruler.stretches[0].runners_up[0].least_regret_at == 0.0);
  CHECK(ruler.unsupported.empty());
}

TEST_CASE("every fault of the input is named at once") {
  using bismar::Code;
  using Faults = std::vector<std::pair<std::string, Code>>;
  const double infinity = std::numeric_limits<double>::infinity();
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(faults_of([&] {
          (void)bismar::exchange_ruler(
              Table{1.0, nan, infinity, 1e308, 0.0, 0.0}, Indices{0}, {.from = -1.0, .to = nan});
        }) == Faults{{"labels", Code::conflict},
                     {"objectives[0][1]", Code::not_finite},
                     {"objectives[1][0]", Code::not_finite},
                     {"objectives[1][1]", Code::out_of_range},
                     {"from", Code::out_of_range},
                     {"to", Code::not_finite}});
  CHECK(faults_of([] { (void)bismar::exchange_ruler(Table{1.0}, {}); }) ==
        Faults{{"objectives", Code::invalid_argument}});
  CHECK(faults_of([] {
          (void)bismar::exchange_ruler(Table{1.0, 1.0}, Indices{0}, {.from = 2.0, .to = 2.0});
        }) == Faults{{"to", Code::out_of_range}});
  CHECK(faults_of([] {
          (void)bismar::exchange_ruler(Table{1e-300, 0.0, 0.0, 1e300}, Indices{0, 1});
        }) == Faults{{"objectives", Code::out_of_range}});
}
