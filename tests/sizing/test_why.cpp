// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <set>

using namespace bismar;

namespace {

bool says(const Answer& answer, const char* text) {
  return answer.headline.find(text) != std::string::npos ||
         std::any_of(answer.lines.begin(), answer.lines.end(), [&](const std::string& line) {
           return line.find(text) != std::string::npos;
         });
}

Part forged() {
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  return part;
}

}  // namespace

TEST_CASE(
    "why tells of a material on the front: its stretch, its limits, its cost and its sources") {
  const auto answer = why("alu-a", forged(), test::small_catalogue());
  CHECK(answer.standing == Answer::Standing::front);
  REQUIRE(answer.design.has_value());
  CHECK(says(answer, "EUR/kg"));
  REQUIRE(answer.checks.size() >= 2);
  CHECK(answer.checks[0].starts_with("Yield"));
  CHECK(answer.checks[1].starts_with("  "));  // yield governs: its steps follow
  REQUIRE(answer.sources.size() >= 4);
  CHECK(answer.sources[0].find("user's table") != std::string::npos);
}

TEST_CASE("why tells of a beaten material which design beats it and by how much") {
  Part part = forged();
  part.limits.materials = {};
  auto catalogue = test::small_catalogue();
  MaterialTableBuilder builder("test");
  for (const double yield : {300e6, 200e6}) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(0);
    row.info.id = row.info.name = yield > 250e6 ? "strong" : "weak";
    row.values = {{Property::density, {7850.0, 7850.0}},
                  {Property::youngs_modulus, {210e9, 210e9}},
                  {Property::yield_strength, {yield, yield}},
                  {Property::elongation, {0.2, 0.2}},
                  {Property::price, {1.0, 1.0}}};
    builder.add(row);
  }
  catalogue.materials = builder.build();
  const auto answer = why("weak", part, catalogue);
  CHECK(answer.standing == Answer::Standing::dominated);
  CHECK(says(answer, "strong"));
  CHECK(says(answer, "lighter"));
}

TEST_CASE(
    "why tells of an infeasible material the limit, by how much, and the value that would let it "
    "in") {
  Part part = forged();
  part.body.shapes = {round({.height_max = 20e-3})};  // steel A needs 21.549 mm
  const auto answer = why("steel-a", part, test::small_catalogue());
  CHECK(answer.standing == Answer::Standing::infeasible);
  CHECK(says(answer, "yield"));
  // At 20 mm the stress is 196.5 / (pi 8e-6 / 32) = 250.2 MPa; with 1.5 a yield strength of 375.3
  // MPa is needed, which is 1.25 times what there is.
  CHECK(says(answer, "1.25"));
  CHECK(says(answer, "375."));
}

TEST_CASE("a cap that smaller sizes would meet is not blamed alone, thickness steps or not") {
  // C45 normalised has a strength step at 16 mm: at its end the lever is too heavy and still too
  // weak.
  Part part = test::small_lever();
  part.body.shapes = {ellipse({.height_to_width = 1.25, .height_min = 8e-3, .height_max = 60e-3})};
  part.limits.routes = {"hot-forging"};
  part.limits.mass = 0.5;
  const auto answer = why("c45-normalised", part, test::starter());
  CHECK(answer.headline == "Infeasible: yield against mass cap.");
}

TEST_CASE("why names two limits that clash") {
  Part part = forged();
  part.limits.mass = 0.7;  // steel A needs 0.859 kg
  const auto answer = why("steel-a", part, test::small_catalogue());
  CHECK(answer.standing == Answer::Standing::infeasible);
  CHECK(says(answer, "yield against mass cap"));
}

TEST_CASE("why tells which rule a material breaks") {
  Part part = test::small_lever();
  part.body.load_cases[0].hand_loaded = true;
  part.limits.routes = {"hot-forging"};
  const auto spruce = why("c24-12-pct-moisture-graded", part, test::starter());
  CHECK(spruce.standing == Answer::Standing::cannot_exist);
  CHECK(says(spruce, "wood"));
  const auto hard = why("100cr6-through-hardened-60-62-hrc", part, test::starter());
  CHECK(hard.standing == Answer::Standing::cannot_exist);
  CHECK(says(hard, "allow_hard"));
}

TEST_CASE("why refuses an unknown material with the nearest id") {
  try {
    static_cast<void>(why("steel-c", forged(), test::small_catalogue()));
    FAIL("no error");
  } catch (const Error& error) {
    CHECK(error.faults()[0].code == Code::unknown_name);
    CHECK(error.faults()[0].message.find("Did you mean") != std::string::npos);
  }
}

TEST_CASE("why answers for every material of the starter table") {
  Part part = test::small_lever();
  part.body.shapes = {ellipse({.height_to_width = 1.25})};
  part.body.load_cases[0].hand_loaded = true;
  part.limits.deflection = 10e-3;
  part.limits.mass = 0.5;
  part.limits.routes = {"hot-forging", "extrusion", "sand-casting"};
  std::set<Answer::Standing> met;
  const auto& table = test::starter().materials;
  for (std::size_t m = 0; m < table.size(); m += 7) {
    const auto answer = why(table.info(m).id, part, test::starter());
    INFO(table.info(m).id);
    CHECK_FALSE(answer.headline.empty());
    CHECK_FALSE(answer.lines.empty());
    met.insert(answer.standing);
  }
  CHECK(met.size() >= 3);
}

TEST_CASE("why tells the index of the best design") {
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  part.limits.materials = {"steel-a"};
  part.limits.deflection.reset();
  const auto free = why("steel-a", part, test::small_catalogue());
  REQUIRE(free.index.size() == 1);
  // A bar in bending held by strength: mass goes with rho / sigma^(2/3).
  CHECK(free.index[0].find("Held by yield") == 0);
  CHECK(free.index[0].find("density, exponent 1.00") != std::string::npos);
  CHECK(free.index[0].find("yield strength, exponent -0.667") != std::string::npos);
}
