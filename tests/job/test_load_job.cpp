// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/job.hpp>

#include "full_job.hpp"

#include "support/catch.hpp"

#include <string>

using namespace bismar;
using job_test::full_job;
using job_test::small_job;
using job_test::with;

TEST_CASE("a small job takes the documented defaults") {
  const Job job = load_job_text(small_job, "small.json");
  CHECK(job.currency == "EUR");
  CHECK(job.catalogue.currency == "EUR");
  CHECK(job.catalogue.materials.size() > 100);
  CHECK(job.sources.size() == 6);
  CHECK_FALSE(job.exchange.has_value());
  REQUIRE(job.parts.size() == 1);
  CHECK(job.places.at("/parts/0") == "small.json:4:5");
  const Part& part = job.parts[0];
  CHECK(part.name == "bar");
  CHECK(part.quantity == 1.0);
  CHECK_FALSE(part.batch.has_value());
  CHECK(part.finishes == std::vector<std::string>{"none"});
  CHECK(part.limits.slenderness == 200.0);
  CHECK(part.limits.column_method == ColumnMethod::curves);
  CHECK(part.service_class == ServiceClass::one);
  REQUIRE(part.body.shapes.size() == 1);
  CHECK(part.body.shapes[0].family == SectionFamily::solid_round);
  CHECK(part.body.shapes[0].height_min == Shape{}.height_min);
  CHECK(part.body.shapes[0].sizes.kind == Sizes::Kind::continuous);
  REQUIRE(part.body.load_cases.size() == 1);
  const LoadCase& service = part.body.load_cases[0];
  CHECK(service.name == "service");
  CHECK(service.support_z == Support::cantilever);
  CHECK(service.support_y == Support::cantilever);
  REQUIRE(service.loads.size() == 1);
  CHECK(service.loads[0].kind == Load::Kind::force);
  CHECK(service.loads[0].value == 655.0);
  CHECK(service.loads[0].at == 0.3);
  CHECK(service.factors.empty());
  CHECK(job.settings.near == 0.05);
  CHECK(job.settings.explain == Explain::front);
  CHECK(job.settings.epsilon == 1e-3);
  CHECK(job.settings.delta == 1e-6);
}

TEST_CASE("shapes and sizes of a job are read in SI units") {
  const Member member = load_job_text(full_job, "full.json").parts.at(0).body;
  CHECK(member.length == 0.4);
  REQUIRE(member.shapes.size() == 6);
  CHECK(member.shapes[0].family == SectionFamily::solid_round);
  CHECK(member.shapes[0].height_min == 0.01);
  CHECK(member.shapes[0].height_max == 0.06);
  CHECK(member.shapes[0].sizes.kind == Sizes::Kind::series);
  CHECK(member.shapes[0].sizes.series == "R20");
  CHECK(member.shapes[1].family == SectionFamily::solid_square);
  CHECK(member.shapes[1].sizes.kind == Sizes::Kind::step);
  CHECK(member.shapes[1].sizes.step == 0.0005);
  CHECK(member.shapes[2].family == SectionFamily::solid_rectangle);
  CHECK(member.shapes[2].height_to_width == 2.0);
  CHECK(member.shapes[2].sizes.values == std::vector<double>{0.02, 0.025});
  CHECK(member.shapes[3].family == SectionFamily::solid_ellipse);
  CHECK(member.shapes[3].height_to_width == 1.25);
  CHECK(member.shapes[4].family == SectionFamily::round_tube);
  CHECK(member.shapes[4].wall_to_height == 0.1);
  CHECK(member.shapes[4].height_max == Approx(0.0508).epsilon(1e-15));
  CHECK(member.shapes[5].family == SectionFamily::rectangular_tube);
  CHECK(member.shapes[5].height_to_width == 1.5);
  CHECK(member.shapes[5].wall_to_height == Ratio(0.0002, 0.08));  // the unit behind counts for both
  CHECK(member.stock == std::vector<std::string>{"round-bar", "chs"});
}

TEST_CASE("a ratio of a job is a number, a text, a range, or left out and free") {
  const auto shape = [](const std::string& ratios) {
    const std::string text = with(small_job, R"("round": {})", R"("rectangle": {)" + ratios + "}");
    return load_job_text(text, "job.json").parts.at(0).body.shapes.at(0);
  };
  CHECK(shape(R"("height_to_width": 1.25)").height_to_width == Ratio(1.25));
  CHECK(shape(R"("height_to_width": "1.25")").height_to_width == Ratio(1.25));
  CHECK(shape(R"("height_to_width": "125 %")").height_to_width == Ratio(1.25));
  CHECK(shape(R"("height_to_width": "0.5..2")").height_to_width == Ratio(0.5, 2.0));
  CHECK(shape(R"("height_to_width": "50..200 %")").height_to_width == Ratio(0.5, 2.0));
  CHECK(shape(R"("height_to_width": "2..2")").height_to_width->is_fixed());
  CHECK_FALSE(shape("").height_to_width.has_value());
  // Left out it is free in the documented range: h/b from 0.2 to 5 is a width of h/5 to 5 h.
  const auto free = free_dimensions(shape(""));
  REQUIRE(free.size() == 1);
  CHECK(free[0].name == "width");
  CHECK(free[0].to_height == Ratio(0.2, 5.0));
}

TEST_CASE("the margins of the search are read as ratios") {
  const Settings settings = load_job_text(full_job, "full.json").settings;
  CHECK(settings.explain == Explain::full);
  CHECK(settings.epsilon == Approx(0.005).epsilon(1e-15));
  CHECK(settings.delta == 1e-5);
}

TEST_CASE("loads of a job are read in SI units") {
  const Member member = load_job_text(full_job, "full.json").parts.at(0).body;
  REQUIRE(member.load_cases.size() == 2);
  const LoadCase& first = member.load_cases[0];
  CHECK(first.name == "all loads");
  CHECK(first.support_z == Support::cantilever);
  CHECK(first.support_y == Support::pinned_pinned);
  CHECK(first.factors.at("yield") == 1.7);
  CHECK(first.duration == 10.0 * 365.0 * 86400.0);
  CHECK(first.hand_loaded);
  CHECK(first.impact);
  REQUIRE(first.loads.size() == 6);
  CHECK(first.loads[0].along == Along::y);
  CHECK(first.loads[0].at == 0.3);
  CHECK(first.loads[1].kind == Load::Kind::moment);
  CHECK(first.loads[1].value == -12.0);
  CHECK(first.loads[1].at == 0.2);
  CHECK(first.loads[2].kind == Load::Kind::distributed);
  CHECK(first.loads[2].value == 2000.0);
  CHECK(first.loads[2].value_to == 3000.0);
  CHECK(first.loads[2].at == 0.1);
  CHECK(first.loads[2].to == 0.4);
  CHECK(first.loads[3].kind == Load::Kind::axial);
  CHECK(first.loads[3].value == -5000.0);
  CHECK(first.loads[4].kind == Load::Kind::torque);
  CHECK(first.loads[4].value == 7.0);
  CHECK(first.loads[4].at == 0.4);
  const LoadCase& second = member.load_cases[1];
  REQUIRE(second.direct.has_value());
  CHECK(second.direct->N == -1000.0);
  CHECK(second.direct->V_y == 2.0);
  CHECK(second.direct->V_z == 3.0);
  CHECK(second.direct->M_y == 4.0);
  CHECK(second.direct->M_z == 5.0);
  CHECK(second.direct->T == 6.0);
}

// Common practice, no source: K = 0.2, nominal half an inch and 17,400 lbf need about 1,740 lbf.in
// = 197 N m, which is about 650 N at 0.3 m. The exact product: 0.2 * 17400 * 4.4482216152605 N *
// 0.0127 m / 0.3 m, with the pound-force of NIST SP 811, appendix B (exact by definition).
TEST_CASE("a force from a bolt preload is the tightening torque over the arm") {
  const Load load = load_job_text(full_job, "full.json").parts.at(0).body.load_cases.at(0).loads[5];
  CHECK(load.kind == Load::Kind::force);
  CHECK(load.at == 0.3);
  CHECK(load.value == Approx(0.2 * 17400.0 * 4.4482216152605 * 0.0127 / 0.3).epsilon(1e-12));
  CHECK(load.value == Approx(650.0).epsilon(0.01));
  CHECK(load.value * 0.3 == Approx(197.0).epsilon(0.01));
}

TEST_CASE("limits, finishes, operations and settings of a job are read") {
  const Job job = load_job_text(full_job, "full.json");
  const Part& part = job.parts.at(0);
  const Limits& limits = part.limits;
  CHECK(part.quantity == 2000.0);
  CHECK(part.batch == 500.0);
  CHECK(limits.deflection == 0.01);
  CHECK(*limits.twist == Approx(2.0 * 3.14159265358979323846 / 180.0).epsilon(1e-15));
  CHECK(limits.height == 0.06);
  CHECK(limits.width == 0.05);
  CHECK(limits.wall == 0.002);
  CHECK(limits.slenderness == 180.0);
  CHECK(limits.column_method == ColumnMethod::euler);
  CHECK(limits.mass == 3.0);
  CHECK(limits.cost == 20.0);
  CHECK(limits.routes == std::vector<std::string>{"hot-forging"});
  CHECK(limits.forbidden_routes == std::vector<std::string>{"sand-casting"});
  CHECK(limits.processes == std::vector<std::string>{"machining"});
  CHECK(limits.forms == std::vector<std::string>{"bar", "forging"});
  CHECK(limits.classes == std::vector<std::string>{"steel", "aluminium"});
  CHECK(limits.materials == std::vector<std::string>{"s235jr-as-rolled"});
  CHECK(limits.forbidden_materials == std::vector<std::string>{"wood"});
  REQUIRE(limits.properties.size() == 2);
  CHECK(limits.properties[0].property == "elongation");
  CHECK(limits.properties[0].at_least == 0.08);
  CHECK_FALSE(limits.properties[0].at_most.has_value());
  CHECK(limits.properties[1].at_least == 50e6);
  CHECK(limits.properties[1].at_most == Approx(200e6).epsilon(1e-15));
  CHECK(limits.medium == "fresh water");
  CHECK(limits.corrosion_at_least == Rating::fair);
  CHECK(limits.temperature == 313.15);
  CHECK(limits.allow_brittle);
  CHECK(limits.allow_hard);
  CHECK(part.finishes == std::vector<std::string>{"none", "galvanising"});
  REQUIRE(part.operations.size() == 1);
  CHECK(part.operations[0].operation == "saw-cut");
  CHECK(part.operations[0].units == 2.0);
  CHECK(part.service_class == ServiceClass::two);

  const Settings& settings = job.settings;
  CHECK(settings.missing == Missing::exclude);
  CHECK(settings.range_ends.at(Property::price) == RangeEnd::high);
  CHECK(settings.range_ends.at(Property::yield_strength) == RangeEnd::mid);
  CHECK(settings.route_end == RangeEnd::low);
  CHECK(settings.near == 0.1);
  CHECK(settings.fold == 0.01);
  CHECK(settings.doubtful_sizes);
  CHECK(settings.kerf == 0.004);
  CHECK(settings.machining_allowance == 0.003);
  CHECK(settings.scrap_credit == 0.2);
  REQUIRE(job.exchange.has_value());
  CHECK(job.exchange->from == 0.5);
  CHECK(job.exchange->to == 500.0);
  CHECK(job.title == "every key once");
}

TEST_CASE("the text of a job as loaded loads to the same text again") {
  const Job job = load_job_text(full_job, "full.json");
  CHECK(job.text.find("comment") == std::string::npos);
  CHECK(load_job_text(job.text, "again.json").text == job.text);
}

TEST_CASE("amounts in another currency are converted with the job's rate") {
  const Job job =
      load_job_text(with(full_job, "\"cost\": \"20 EUR\"", "\"cost\": \"100 USD\""), "j");
  CHECK(*job.parts.at(0).limits.cost == Approx(92.0).epsilon(1e-15));
}

TEST_CASE("in a job of another currency the starter prices are converted") {
  const Job euro = load_job_text(small_job, "j");
  const Job dollar =
      load_job_text(with(small_job,
                         "\"bismar\": 1,",
                         R"("bismar": 1, "currency": "USD", "rates": { "EUR": "1.25 USD" },)"),
                    "j");
  CHECK(dollar.catalogue.currency == "USD");
  const std::size_t row = euro.catalogue.materials.steps(0)[0].row;
  const auto in_euro = euro.catalogue.materials.value(Property::price, row);
  const auto in_dollar = dollar.catalogue.materials.value(Property::price, row);
  REQUIRE(in_euro.has_value());
  REQUIRE(in_dollar.has_value());
  CHECK(in_dollar->low == Approx(1.25 * in_euro->low).epsilon(1e-14));
  const Route* forging = dollar.catalogue.find_route("hot-forging");
  REQUIRE(forging != nullptr);
  CHECK(forging->tooling_cost.high ==
        Approx(1.25 * euro.catalogue.find_route("hot-forging")->tooling_cost.high).epsilon(1e-14));
}

TEST_CASE("the starter job is valid and says what its comments say") {
  const Job job = load_job_text(starter_job(), "new.json");
  REQUIRE(job.parts.size() == 1);
  CHECK(job.parts[0].body.shapes.size() == 2);
  CHECK_NOTHROW(validate(job));
}

TEST_CASE("the demo jobs are valid") {
  for (const char* name : {"crank_lever.json", "gate_stem.json"}) {
    INFO(name);
    const Job job = load_job(std::string(BISMAR_TEST_DATA_DIR) + "/jobs/" + name);
    CHECK_NOTHROW(validate(job));
  }
}

TEST_CASE("the demo lever's end force is the one its comment states") {
  const Job job = load_job(std::string(BISMAR_TEST_DATA_DIR) + "/jobs/crank_lever.json");
  const Load& load = job.parts.at(0).body.load_cases.at(0).loads.at(0);
  CHECK(load.value == Approx(655.0).epsilon(0.001));
  CHECK(job.parts[0].body.load_cases[0].factors.at("yield") == 1.5);
}

TEST_CASE("a part is found by its name, and a misspelt name is helped") {
  const Job job = load_job_text(small_job, "j");
  CHECK(find_part(job, "bar") == 0);
  try {
    static_cast<void>(find_part(job, "baar"));
    FAIL("an error was expected");
  } catch (const Error& error) {
    CHECK(error.faults()[0].code == Code::unknown_name);
    CHECK(error.faults()[0].message ==
          "the job has no part \"baar\". Did you mean \"bar\"? Its parts: \"bar\".");
  }
}

TEST_CASE("whole members of a job are read in SI units") {
  const Part part = load_job_text(full_job, "full.json").parts.at(1);
  const Member& member = part.body;
  REQUIRE(member.shapes.size() == 7);
  CHECK(member.shapes[0].family == SectionFamily::solid_hexagon);
  CHECK(member.shapes[0].height_max == 0.06);
  CHECK(member.shapes[1].family == SectionFamily::elliptical_tube);
  CHECK(member.shapes[1].wall_to_height == 0.06);
  CHECK(member.shapes[2].family == SectionFamily::i_section);
  CHECK(member.shapes[2].web_to_height == 0.05);
  CHECK(member.shapes[2].flange_to_height == 0.08);
  CHECK(member.shapes[2].root_radius_to_height == 0.03);
  CHECK(member.shapes[4].family == SectionFamily::tee);
  CHECK(member.shapes[5].family == SectionFamily::angle);
  CHECK(member.shapes[5].wall_to_height == 0.1);
  const Shape& polygon = member.shapes[6];
  REQUIRE(polygon.outline.size() == 4);
  CHECK(polygon.outline[2] == SectionPoint{0.04, 0.05});
  REQUIRE(polygon.holes.size() == 1);
  CHECK(polygon.holes[0][2] == SectionPoint{0.03, 0.04});
  CHECK(polygon.height_min == 0.02);

  const LoadCase& built_in = member.load_cases[0];
  CHECK(built_in.support_z == Support::fixed_pinned);
  CHECK(built_in.support_y == Support::fixed_fixed);
  CHECK(built_in.acceleration_z == 9.80665);
  CHECK(built_in.acceleration_y == 0.0);
  CHECK(built_in.eccentricity == 0.003);
  CHECK(built_in.temperature_change == -30.0);
  CHECK(built_in.restrained);
  REQUIRE(built_in.fatigue.has_value());
  CHECK(built_in.fatigue->cycles == 200000.0);
  CHECK(built_in.fatigue->stress_ratio == 0.0);
  const LoadCase& overhanging = member.load_cases[1];
  CHECK(overhanging.second_support == 1.5);
  CHECK(overhanging.acceleration_z == 15.0);
  CHECK(overhanging.acceleration_y == 2.0);
  CHECK(overhanging.loads.empty());

  const MemberDetails& details = member.details;
  CHECK(details.net_area == 0.9);
  CHECK(details.net_modulus == 0.8);
  CHECK(details.k_t_axial == 2.0);
  CHECK(details.k_t_bending == 1.8);
  CHECK(details.k_t_torsion == 1.5);
  CHECK(details.notch_radius == 0.002);
  CHECK(details.surface == SurfaceFinish::as_forged);
  CHECK(details.reliability == Approx(0.999).epsilon(1e-15));
  CHECK(details.criterion == FatigueCriterion::gerber);
  CHECK(details.detail_category == 80e6);
  CHECK(details.welded);
  REQUIRE(details.crack.has_value());
  CHECK(details.crack->kind == Crack::Kind::surface);
  CHECK(details.crack->half_length == 0.003);
  REQUIRE(details.masses.size() == 1);
  CHECK(details.masses[0].at == 2.0);

  CHECK(part.limits.shear_deflection);
  CHECK(part.limits.rotation == Approx(0.017453292519943295));
  CHECK(part.limits.frequency == 8.0);
  CHECK(part.limits.elongation == 0.001);
  CHECK(part.limits.lateral_restraint);
}
