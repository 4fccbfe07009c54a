// SPDX-License-Identifier: MIT
// Cases that once went wrong or could hurt someone if they did.
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>

using namespace bismar;

namespace {

Part starter_lever() {
  Part part = test::small_lever();
  part.body.shapes = {ellipse({.height_to_width = 1.25, .height_min = 8e-3, .height_max = 60e-3})};
  part.limits.deflection = 10e-3;
  return part;
}

const MaterialInfo& material(const char* id) {
  const auto& table = test::starter().materials;
  return table.info(table.find(id).value());
}

const Route& route(const char* id) { return *test::starter().find_route(id); }

/// The yield strength behind a design: what its yield utilisation says.
double yield_of(const Design& design, double moment) {
  for (const auto& u : design.utilisations) {
    if (u.limit == "yield") {
      return 1.5 * moment / design.section.W_el_y / u.value;
    }
  }
  return 0.0;
}

}  // namespace

TEST_CASE("a plate at the very end of a thickness step has the strength of that step") {
  // S355J2: 355 MPa up to 16 mm, 345 up to 40, 335 up to 63 (EN 10025-2, seen in reproduction).
  const auto& table = test::starter().materials;
  const auto id = static_cast<std::uint32_t>(table.find("s355j2-as-rolled").value());
  for (const double thickness : {0.016, 0.040}) {
    for (const double ratio : {1.0, 1.25, 1.6, 2.0, 2.5, 3.0, 5.0, 7.0}) {
      Part part = starter_lever();
      part.limits.deflection.reset();
      part.body.shapes = {rectangle({.height_to_width = ratio, .height_max = 0.5})};
      part.limits.routes = {"hot-forging", "laser-cut-plate", "machining-from-bar"};
      part.body.shapes[0].sizes = Sizes::of({thickness * ratio});
      Candidate candidate;
      candidate.material = id;
      candidate.shape = 0;
      candidate.route =
          static_cast<std::uint32_t>(&route("laser-cut-plate") - test::starter().routes.data());
      const auto expected =
          table.value(Property::yield_strength, table.step_at(id, thickness)->row)->low;
      const auto result = front(part, test::starter());
      for (const auto& design : result.designs) {
        if (design.candidate == candidate) {
          INFO(thickness << " " << ratio);
          CHECK(yield_of(design, 196.5) == Approx(expected).epsilon(1e-6));
        }
      }
    }
  }
}

TEST_CASE("hardened bar grades count by the equivalent diameter of a flat") {
  // EN 10083-3, 42CrMo4 +QT: 900 MPa for d <= 16 or t <= 8, 750 MPa for d <= 40 or t <= 20 (from
  // memory; the table carries the diameters). A flat of 30 x 15 mm has 4 A / U = 20 mm and belongs
  // to the second step.
  Part part = starter_lever();
  part.limits.deflection.reset();
  part.limits.routes = {"hot-forging"};
  part.limits.materials = {"42crmo4-quenched-and-tempered"};
  part.body.shapes = {rectangle({.height_to_width = 2.0, .sizes = Sizes::of({30e-3})})};
  const auto result = front(part, test::starter());
  REQUIRE(result.front_count == 1);
  CHECK(yield_of(result.designs[0], 196.5) == Approx(750e6).epsilon(1e-6));
}

TEST_CASE("rectangular tubes of every wall ratio can be tried by every route") {
  for (const double wall : {0.02, 0.05, 0.09, 0.12, 0.2}) {
    for (const double ratio : {0.5, 1.0, 2.0, 4.0}) {
      if (wall >= 0.5 * std::min(1.0, 1.0 / ratio)) {
        continue;
      }
      Part part = starter_lever();
      part.body.shapes = {rectangular_tube({.height_to_width = ratio, .wall_to_height = wall})};
      const auto result = front(part, test::starter());
      CHECK(result.exact);
      std::size_t sum = 0;
      for (const auto& line : result.funnel.lines) {
        sum += line.candidates;
      }
      CHECK(sum == result.funnel.considered);
    }
  }
}

TEST_CASE("a value filled from the class is treated as the row's own would be") {
  // Two rows alike but for a gap: the median is the other's value, so the sizes must agree.
  Catalogue catalogue = test::small_catalogue();
  MaterialTableBuilder builder("test");
  for (const char* id : {"with", "without"}) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(0);
    row.info.id = row.info.name = id;
    row.info.basis = Basis::typical;  // strengths are divided by 1.25
    row.info.isotropic = false;
    row.values = {{Property::density, {500.0, 500.0}},
                  {Property::youngs_modulus, {10e9, 10e9}},
                  {Property::shear_modulus, {1e9, 1e9}},
                  {Property::tensile_strength, {20e6, 20e6}},
                  {Property::compressive_strength, {20e6, 20e6}},
                  {Property::flexural_strength, {30e6, 30e6}},
                  {Property::price, {1.0, 1.0}}};
    if (row.info.id == "with") {
      row.values[Property::shear_strength] = {2e6, 2e6};
    }
    builder.add(row);
  }
  catalogue.materials = builder.build();
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  part.body.load_cases = {cantilever({force(655.0, 0.3), torque(150.0, 0.3)})};
  Settings settings;
  settings.missing = Missing::class_median;
  const auto result = front(part, catalogue, settings);
  REQUIRE(result.front_count == 2);
  CHECK(result.designs[0].size == result.designs[1].size);
  CHECK(front(part, catalogue).undecided == std::vector<std::string>{"without: shear strength"});
}

TEST_CASE("evaluate refuses indices outside the catalogue and what the part does not admit") {
  const Part part = test::small_lever();
  const auto catalogue = test::small_catalogue();
  Candidate good;
  good.shape = 0;
  CHECK_NOTHROW(evaluate(part, catalogue, good, 0.03));
  for (const auto& change : std::vector<std::pair<const char*, void (*)(Candidate&)>>{
           {"candidate.shape", [](Candidate& c) { c.shape = Candidate::none; }},
           {"candidate.shape", [](Candidate& c) { c.shape = 7; }},
           {"candidate.shape", [](Candidate& c) { c.stock = 0; }},
           {"candidate.material", [](Candidate& c) { c.material = 9999999; }},
           {"candidate.route", [](Candidate& c) { c.route = 100000; }},
           {"candidate.route", [](Candidate& c) { c.route = 3; }},  // a treatment
           {"candidate.treatment", [](Candidate& c) { c.treatment = 0; }},
           {"candidate.finish", [](Candidate& c) { c.finish = 0; }},  // the part tries none
       }) {
    Candidate bad = good;
    change.second(bad);
    INFO(change.first);
    try {
      static_cast<void>(evaluate(part, catalogue, bad, 0.03));
      FAIL("no error");
    } catch (const Error& error) {
      CHECK(std::any_of(error.faults().begin(), error.faults().end(), [&](const Fault& fault) {
        return fault.where == change.first;
      }));
    }
  }
  Part other = part;
  other.limits.forbidden_routes = {"forging"};
  CHECK_THROWS_AS(evaluate(other, catalogue, good, 0.03), Error);
}

TEST_CASE("extrusion keeps ageing and loses cold work, and makes only what the row is for") {
  const auto lost = [](const char* id) {
    const auto broken = route_rules(material(id), route("extrusion"));
    return broken.has_value() && broken->rule == Rule::condition_lost;
  };
  CHECK(lost("en-aw-2024-t3-bar"));
  CHECK_FALSE(lost("en-aw-7075-t6-bar"));
  CHECK_FALSE(route_rules(material("en-aw-6082-t6-profile"), route("extrusion")).has_value());
  // A bar's values are not a tube's.
  CHECK(
      drawn_form_rules(material("en-aw-7075-t6-bar"), route("extrusion"), SectionFamily::round_tube)
          .has_value());
  CHECK_FALSE(drawn_form_rules(
                  material("en-aw-7075-t6-bar"), route("extrusion"), SectionFamily::solid_round)
                  .has_value());
  CHECK(drawn_form_rules(material("en-aw-6005a-t6-open-profile"),
                         route("extrusion"),
                         SectionFamily::rectangular_tube)
            .has_value());
  // Granulate takes any form.
  CHECK_FALSE(drawn_form_rules(material("pp-homopolymer-as-moulded"),
                               route("polymer-extrusion"),
                               SectionFamily::round_tube)
                  .has_value());
}

TEST_CASE("a rolled tube is welded: weldable grades only, and no heat-treated aluminium") {
  const auto broken = [](const char* id) {
    return route_rules(material(id), route("roll-forming"));
  };
  CHECK_FALSE(broken("s355mc-thermomechanically-rolled").has_value());
  CHECK(broken("en-aw-6082-t6").has_value());
  for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
    const auto& info = test::starter().materials.info(m);
    if (!route_rules(info, route("roll-forming"))) {
      const bool weldable =
          std::any_of(info.processes.begin(), info.processes.end(), [](const std::string& word) {
            return word == "welding (good)" || word == "welding (fair)";
          });
      INFO(info.id);
      CHECK(weldable);
    }
  }
}

TEST_CASE("a service temperature above what the strength holds for is undecided, not accepted") {
  Part part = starter_lever();
  part.limits.routes = {"hot-forging"};
  part.limits.materials = {"42crmo4-quenched-and-tempered"};
  part.limits.temperature = 293.15;
  CHECK(front(part, test::starter()).front_count == 1);
  part.limits.temperature = 673.15;
  const auto hot = front(part, test::starter());
  CHECK(hot.front_count == 0);
  CHECK(hot.funnel.count(FunnelLine::Stage::undecided) == 1);
}

TEST_CASE("a missing corrosion rating is undecided, and timber in water too") {
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  part.limits.medium = "fresh water";
  auto catalogue = test::small_catalogue();
  MaterialTableBuilder builder("test");
  for (const char* id : {"rated", "unrated"}) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(0);
    row.info.id = id;
    row.info.corrosion = {{"fresh water", Rating::good}};
    if (row.info.id == "unrated") {
      row.info.corrosion.clear();
    }
    row.values = {{Property::density, {7850.0, 7850.0}},
                  {Property::youngs_modulus, {210e9, 210e9}},
                  {Property::yield_strength, {300e6, 300e6}},
                  {Property::elongation, {0.2, 0.2}},
                  {Property::price, {1.0, 1.0}}};
    builder.add(row);
  }
  catalogue.materials = builder.build();
  const auto result = front(part, catalogue);
  CHECK(result.front_count == 1);
  CHECK(result.undecided == std::vector<std::string>{"unrated: corrosion in fresh water"});

  Part beam = starter_lever();
  beam.body.shapes.clear();
  beam.body.stock = {"timber"};
  beam.limits.medium = "sea water";
  beam.limits.corrosion_at_least = Rating::poor;
  const auto wet = front(beam, test::starter());
  CHECK(wet.front_count == 0);
  CHECK(wet.funnel.count(FunnelLine::Stage::undecided) > 0);
}

TEST_CASE("paint outside does not protect the bore of a tube, a zinc bath does") {
  Part part = starter_lever();
  part.body.shapes.clear();
  part.body.stock = {"chs", "round-bar"};
  part.body.load_cases = {pinned_pinned({axial(-10e3)})};
  part.limits.deflection.reset();
  part.limits.medium = "fresh water";
  part.limits.classes = {"steel"};
  part.finishes = {"none", "galvanising", "wet-paint-system"};
  const auto result = front(part, test::starter());
  REQUIRE_FALSE(result.designs.empty());
  for (const auto& design : result.designs) {
    INFO(design.id);
    CHECK((design.shape != "chs" || design.finish == "galvanising"));
    CHECK(design.finish != "none");
  }
}

TEST_CASE("limits that internal forces alone cannot answer are refused") {
  Part part = test::small_lever();
  part.body.load_cases[0].loads.clear();
  part.body.load_cases[0].direct = InternalForces{.M_y = 500.0};
  CHECK_NOTHROW(front(part, test::small_catalogue()));
  part.limits.deflection = 1e-3;
  CHECK_THROWS_AS(front(part, test::small_catalogue()), Error);
}

TEST_CASE("the same shape, stock list or finish twice is refused") {
  const auto faulty = [](auto change) {
    Part part = test::small_lever();
    change(part);
    try {
      validate(part, test::small_catalogue());
      return false;
    } catch (const Error& error) {
      return error.faults()[0].code == Code::duplicate;
    }
  };
  CHECK(faulty([](Part& p) { p.body.shapes = {round(), round()}; }));
  CHECK(faulty([](Part& p) { p.body.stock = {"bars", "bars"}; }));
  CHECK(faulty([](Part& p) { p.finishes = {"none", "none"}; }));
  CHECK(faulty([](Part& p) { p.limits.routes = {"forging", "forging"}; }));
}

TEST_CASE("a factor below one is told") {
  Part part = test::small_lever();
  part.body.load_cases[0].factors["yield"] = 0.5;
  const auto result = front(part, test::small_catalogue());
  REQUIRE(result.notes.size() == 1);
  CHECK(result.notes[0].find("below 1") != std::string::npos);
}

TEST_CASE("lateral-torsional buckling is checked for an I section unless it is held across") {
  Part part = starter_lever();
  part.body.shapes.clear();
  part.body.stock = {"ipe"};
  part.body.length = 6.0;
  part.body.load_cases = {pinned_pinned({force(20e3, 3.0)})};
  const auto free = front(part, test::starter());
  part.limits.lateral_restraint = true;
  const auto held = front(part, test::starter());
  REQUIRE(free.front_count > 0);
  REQUIRE(held.front_count > 0);
  const auto checked = [](const Design& design) {
    return std::any_of(design.utilisations.begin(), design.utilisations.end(), [](const auto& u) {
      return u.limit == "lateral-torsional buckling";
    });
  };
  CHECK(checked(free.designs[0]));
  CHECK_FALSE(checked(held.designs[0]));
  const auto u = [](const Design& design, std::string_view limit) {
    const auto found = std::find_if(design.utilisations.begin(),
                                    design.utilisations.end(),
                                    [&](const auto& one) { return one.limit == limit; });
    REQUIRE(found != design.utilisations.end());
    return found->value;
  };
  // Over 6 m an IPE turns aside long before it yields.
  CHECK(u(free.designs[0], "lateral-torsional buckling") > 1.5 * u(free.designs[0], "yield"));
}
