// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <set>

using namespace bismar;

namespace {

std::size_t sum(const Funnel& funnel) {
  std::size_t out = 0;
  for (const auto& line : funnel.lines) {
    out += line.candidates;
  }
  return out;
}

Part starter_lever() {
  Part part = test::small_lever();
  part.body.shapes = {ellipse({.height_to_width = 1.25, .height_min = 8e-3, .height_max = 60e-3})};
  part.body.load_cases[0].hand_loaded = true;
  part.limits.deflection = 10e-3;
  return part;
}

}  // namespace

TEST_CASE(
    "the front of a lever over the starter table is sound, ordered and complete in its counts") {
  const auto part = starter_lever();
  const auto result = front(part, test::starter());
  CHECK(result.exact);
  REQUIRE(result.front_count >= 4);
  for (std::size_t i = 0; i < result.designs.size(); ++i) {
    const auto& design = result.designs[i];
    INFO(design.id);
    for (const auto& u : design.utilisations) {
      CHECK(u.value <= 1.0);
    }
    CHECK(design.utilisations[design.governing].value > 0.9);
    if (i > 0 && i < result.front_count) {
      CHECK(result.designs[i - 1].mass <= design.mass);
      CHECK(result.designs[i - 1].cost >= design.cost);
    }
  }
  CHECK(sum(result.funnel) == result.funnel.considered);
  CHECK(result.version == result_format_version);
  CHECK(result.notes.empty());
}

TEST_CASE("every design of a result comes back the same from its candidate and size") {
  const auto part = starter_lever();
  const auto result = front(part, test::starter());
  for (const auto& design : result.designs) {
    const auto again = evaluate(part, test::starter(), design.candidate, design.size);
    CHECK(again.id == design.id);
    CHECK(again.mass == design.mass);
    CHECK(again.cost == design.cost);
    REQUIRE(again.utilisations.size() == design.utilisations.size());
    for (std::size_t i = 0; i < again.utilisations.size(); ++i) {
      CHECK(again.utilisations[i].value == design.utilisations[i].value);
    }
    double lines = 0.0;
    for (const auto& line : design.cost_breakdown.lines) {
      lines += line.amount;
    }
    CHECK(lines == Approx(design.cost).epsilon(1e-12));
    CHECK(design.cost_breakdown.low <= design.cost * (1.0 + 1e-12));
    CHECK(design.cost_breakdown.high >= design.cost * (1.0 - 1e-12));
  }
}

TEST_CASE("near designs are those that no front design beats by the margin in both objectives") {
  const auto part = starter_lever();
  Settings settings;
  settings.near = 0.10;
  const auto result = front(part, test::starter(), settings);
  const auto beaten = [&](double mass, double cost) {
    for (std::size_t i = 0; i < result.front_count; ++i) {
      if (1.1 * result.designs[i].mass < mass && 1.1 * result.designs[i].cost < cost) {
        return true;
      }
    }
    return false;
  };
  CHECK(result.designs.size() > result.front_count);
  for (const auto& design : result.designs) {
    CHECK_FALSE(beaten(design.mass, design.cost));
  }
  for (const auto& point : result.others) {
    CHECK(beaten(point.mass, point.cost));
  }
}

TEST_CASE("nothing feasible gives an empty front with the reasons in the funnel") {
  Part part = starter_lever();
  part.limits.mass = 0.01;
  const auto result = front(part, test::starter());
  CHECK(result.front_count == 0);
  CHECK(result.designs.empty());
  CHECK(result.funnel.count(FunnelLine::Stage::infeasible) > 0);
  CHECK(sum(result.funnel) == result.funnel.considered);
  bool mass_cap = false;
  for (const auto& line : result.funnel.lines) {
    mass_cap = mass_cap || line.reason.find("mass cap") != std::string::npos;
  }
  CHECK(mass_cap);
  CHECK(exchange_ruler(result, part, test::starter()).stretches.empty());
}

TEST_CASE("sizes on a list, a step and a series are exact on them") {
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  part.limits.materials = {"steel-a"};  // continuous: 21.549 mm
  const auto size = [&](Sizes sizes) {
    part.body.shapes = {round({.sizes = std::move(sizes)})};
    return front(part, test::small_catalogue()).designs.at(0).size;
  };
  CHECK(size(Sizes::multiples_of(0.5e-3)) == Approx(22e-3).epsilon(1e-12));
  CHECK(size(Sizes::multiples_of(5e-3)) == Approx(25e-3).epsilon(1e-12));
  CHECK(size(Sizes::of({20e-3, 24e-3, 30e-3})) == Approx(24e-3).epsilon(1e-12));
  // R20 of ISO 3: ... 20, 22.4, 25 ...
  CHECK(size(Sizes::preferred("R20")) == Approx(22.4e-3).epsilon(1e-12));
}

TEST_CASE("a thickness step with a higher strength beyond it is not missed") {
  // Strength that rises with the thickness (sheet and extrusions in some tempers): no size of the
  // weak step carries the load, the first one of the strong step does.
  Catalogue catalogue = test::small_catalogue();
  MaterialTableBuilder builder("test");
  MaterialTableBuilder::Row thin;
  thin.info = catalogue.materials.info(0);
  thin.up_to = 0.030;
  thin.values = {{Property::density, {7850.0, 7850.0}},
                 {Property::youngs_modulus, {210e9, 210e9}},
                 {Property::yield_strength, {50e6, 50e6}},
                 {Property::elongation, {0.2, 0.2}},
                 {Property::price, {1.0, 1.0}}};
  auto thick = thin;
  thick.up_to = 0.1;
  thick.values[Property::yield_strength] = {400e6, 400e6};
  builder.add(thin);
  builder.add(thick);
  catalogue.materials = builder.build();
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  const auto result = front(part, catalogue);
  REQUIRE(result.front_count == 1);
  CHECK(result.designs[0].size > 0.030);
  CHECK(result.designs[0].size == Approx(0.030).epsilon(1e-12));
}

TEST_CASE("a flat part cut from sheet has the thickness of a sheet that can be bought") {
  Part part = starter_lever();
  part.body.shapes = {rectangle({.height_to_width = 4.0, .height_max = 0.2})};
  part.limits.routes = {"laser-cut-plate"};
  part.limits.materials = {"s355j2-as-rolled"};
  const auto result = front(part, test::starter());
  REQUIRE(result.front_count == 1);
  const double thickness = result.designs[0].section.width;
  std::set<double> bought;
  for (const auto& item : test::starter().find_stock("sheet-and-plate")->items) {
    bought.insert(std::round(item.thickness * 1e7));
  }
  CHECK(bought.contains(std::round(thickness * 1e7)));
}

TEST_CASE("a missing property leaves a candidate undecided, excluded or filled as the study says") {
  Part part = test::small_lever();
  part.body.load_cases = {cantilever({force(655.0, 0.3), torque(50.0, 0.3)})};
  part.limits.twist = 0.02;
  part.limits.routes = {"forging"};
  Catalogue catalogue = test::small_catalogue();
  MaterialTableBuilder builder("test");
  for (const char* id : {"a", "b"}) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(0);
    row.info.id = row.info.name = id;
    row.values = {{Property::density, {7850.0, 7850.0}},
                  {Property::youngs_modulus, {210e9, 210e9}},
                  {Property::yield_strength, {300e6, 300e6}},
                  {Property::elongation, {0.2, 0.2}},
                  {Property::price, {1.0, 1.0}}};
    if (row.info.id == "a") {
      row.values[Property::shear_modulus] = {80e9, 80e9};
    }
    builder.add(row);
  }
  catalogue.materials = builder.build();
  const auto undecided = front(part, catalogue);
  CHECK(undecided.funnel.count(FunnelLine::Stage::undecided) == 1);
  CHECK(undecided.undecided == std::vector<std::string>{"b: shear modulus"});
  Settings settings;
  settings.missing = Missing::exclude;
  const auto excluded = front(part, catalogue, settings);
  CHECK(excluded.funnel.count(FunnelLine::Stage::undecided) == 0);
  CHECK(sum(excluded.funnel) == excluded.funnel.considered);
  settings.missing = Missing::class_median;
  const auto filled = front(part, catalogue, settings);
  CHECK(filled.front_count == 2);
  const auto& notes = filled.designs[1].notes;
  CHECK(std::find(notes.begin(), notes.end(), "class median used for shear modulus") !=
        notes.end());
}

TEST_CASE("limits on properties exclude by the end of the range that is on the safe side") {
  Part part = starter_lever();
  part.limits.routes = {"hot-forging"};  // the part's own thickness decides the strength step
  part.limits.properties = {{"elongation", 0.10, std::nullopt}};
  const auto result = front(part, test::starter());
  const auto& table = test::starter().materials;
  for (const auto& design : result.designs) {
    const auto* step = table.step_at(design.candidate.material, design.section.ruling_dimension);
    REQUIRE(step != nullptr);
    CHECK(table.value(Property::elongation, step->row)->low >= 0.10);
  }
  bool counted = false;
  for (const auto& line : result.funnel.lines) {
    counted = counted || line.reason == "limit on elongation";
  }
  CHECK(counted);
}

TEST_CASE("grouped fronts keep what a shared choice needs and the front loses") {
  const auto part = starter_lever();
  const auto whole = front(part, test::starter(), {.explain = Explain::full});
  const auto groups = fronts(part, test::starter(), GroupBy::material);
  CHECK(groups.size() > whole.front_count);
  std::size_t points = 0;
  for (const auto& group : groups) {
    REQUIRE_FALSE(group.points.empty());
    for (std::size_t i = 1; i < group.points.size(); ++i) {
      CHECK(group.points[i - 1].mass <= group.points[i].mass);
    }
    points += group.points.size();
  }
  CHECK(points <= whole.designs.size() + whole.others.size());
  // The front of the union of the groups is the front.
  for (std::size_t i = 0; i < whole.front_count; ++i) {
    const auto found = std::find_if(groups.begin(), groups.end(), [&](const GroupedFront& group) {
      return group.group == whole.designs[i].material;
    });
    REQUIRE(found != groups.end());
    CHECK(std::any_of(found->points.begin(), found->points.end(), [&](const FeasiblePoint& point) {
      return point.mass == whole.designs[i].mass && point.cost == whole.designs[i].cost;
    }));
  }
}

TEST_CASE("a run can be stopped and says so") {
  std::stop_source stop;
  stop.request_stop();
  RunOptions run;
  run.stop = stop.get_token();
  const auto result = front(starter_lever(), test::starter(), {}, run);
  CHECK_FALSE(result.exact);
  REQUIRE(result.notes.size() == 1);
  CHECK(result.notes[0].find("Stopped") != std::string::npos);
}

TEST_CASE("the ruler of a result covers all worths of a kilogram without a gap") {
  const auto part = starter_lever();
  const auto result = front(part, test::starter());
  for (const Per per : {Per::design, Per::material, Per::shape, Per::route}) {
    const auto ruler = exchange_ruler(result, part, test::starter(), per);
    REQUIRE_FALSE(ruler.stretches.empty());
    CHECK(ruler.stretches.front().from == 0.0);
    CHECK_FALSE(ruler.stretches.back().to.has_value());
    for (std::size_t i = 1; i < ruler.stretches.size(); ++i) {
      const auto& stretch = ruler.stretches[i];
      CHECK(*ruler.stretches[i - 1].to == stretch.from);
      CHECK(ruler.stretches[i - 1].choice != stretch.choice);
      // Both choices cost the same where the one gives way to the other.
      CHECK(*ruler.stretches[i - 1].penalty_to == Approx(stretch.penalty_from).epsilon(1e-12));
      REQUIRE(stretch.from_band.has_value());
      CHECK(stretch.from_band->low <= stretch.from * (1.0 + 1e-9));
      CHECK((!stretch.from_band->high || *stretch.from_band->high >= stretch.from * (1.0 - 1e-9)));
    }
  }
}
