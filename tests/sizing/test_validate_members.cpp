// SPDX-License-Identifier: MIT
// What a whole member cannot have together, and numbers that no detail can have.
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>

#include <functional>
#include <string>
#include <vector>

using namespace bismar;

namespace {

std::vector<Fault> faults_after(const std::function<void(Part&)>& change) {
  Part part = test::small_lever();
  change(part);
  try {
    validate(part, test::small_catalogue(), {});
  } catch (const Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

struct Case {
  const char* where;
  Code code;
  const char* says;
  std::function<void(Part&)> change;
};

LoadCase& first(Part& part) { return part.body.load_cases[0]; }
MemberDetails& details(Part& part) { return part.body.details; }

void hold(const std::vector<Case>& cases) {
  for (const Case& one : cases) {
    const auto faults = faults_after(one.change);
    INFO(one.where << ": " << one.says);
    REQUIRE(faults.size() == 1);
    INFO(faults[0].text());
    CHECK(faults[0].where == one.where);
    CHECK(faults[0].code == one.code);
    CHECK(faults[0].message.find(one.says) != std::string::npos);
  }
}

}  // namespace

TEST_CASE("a load case that asks for what cannot be answered together is refused") {
  hold({{"/member/load_cases/0/direct",
         Code::conflict,
         "Give loads with stations",
         [](Part& p) {
           first(p).direct = InternalForces{.M_y = 10.0};
           p.limits.deflection = 1e-3;
         }},
        {"/member/load_cases/0/direct",
         Code::conflict,
         "not added up",
         [](Part& p) {
           first(p).direct = InternalForces{.N = 10.0};
           first(p).acceleration_z = 9.81;
           p.limits.deflection.reset();
         }},
        {"/member/load_cases/0/eccentricity",
         Code::conflict,
         "as loads at both ends",
         [](Part& p) {
           first(p).eccentricity = 2e-3;
           p.limits.deflection = 1e-3;
         }},
        {"/member/load_cases/0/restrained",
         Code::conflict,
         "temperature_change",
         [](Part& p) {
           first(p).restrained = true;
           first(p).support_z = first(p).support_y = Support::pinned_pinned;
         }},
        {"/member/load_cases/0/restrained",
         Code::conflict,
         "free end",
         [](Part& p) {
           first(p).restrained = true;
           first(p).temperature_change = 30.0;
         }},
        {"/member/load_cases/0/restrained", Code::conflict, "as an axial load", [](Part& p) {
           first(p).restrained = true;
           first(p).temperature_change = 30.0;
           first(p).support_z = first(p).support_y = Support::pinned_pinned;
           details(p).crack = Crack{.depth = 1e-3};
         }}});
}

TEST_CASE("details out of range, and details that nothing would read, are refused") {
  hold({{"/member/details/net_area",
         Code::out_of_range,
         "at most at 1",
         [](Part& p) { details(p).net_area = 1.2; }},
        {"/member/details/net_modulus",
         Code::out_of_range,
         "above 0",
         [](Part& p) { details(p).net_modulus = 0.0; }},
        {"/member/details/k_t_bending",
         Code::out_of_range,
         "1 or more",
         [](Part& p) { details(p).k_t_bending = 0.9; }},
        {"/member/details/reliability",
         Code::out_of_range,
         "0.999999",
         [](Part& p) { details(p).reliability = 1.0; }},
        {"/member/details/notch_radius",
         Code::conflict,
         "k_t",
         [](Part& p) { details(p).notch_radius = 1e-3; }},
        {"/member/details/detail_category",
         Code::conflict,
         "no load case has",
         [](Part& p) { details(p).detail_category = 80e6; }},
        {"/member/details/detail_category",
         Code::out_of_range,
         "36 to 160",
         [](Part& p) {
           first(p).fatigue = FatigueLoading{};
           details(p).detail_category = 500e6;
         }},
        {"/member/details/masses",
         Code::conflict,
         "no limit",
         [](Part& p) {
           details(p).masses = {{1.0, 0.1}};
         }},
        {"/member/details/masses/0/at",
         Code::out_of_range,
         "beyond the ends",
         [](Part& p) {
           details(p).masses = {{1.0, 0.4}};
           p.limits.frequency = 5.0;
         }},
        {"/member/details/crack/depth",
         Code::out_of_range,
         "above zero",
         [](Part& p) { details(p).crack = Crack{}; }},
        {"/member/details/crack/half_length",
         Code::out_of_range,
         "at least its depth",
         [](Part& p) {
           details(p).crack =
               Crack{.kind = Crack::Kind::surface, .depth = 2e-3, .half_length = 1e-3};
         }},
        {"/limits/rotation",
         Code::out_of_range,
         "rotation limit",
         [](Part& p) { p.limits.rotation = -0.1; }},
        {"/limits/frequency",
         Code::out_of_range,
         "frequency",
         [](Part& p) { p.limits.frequency = 0.0; }},
        {"/limits/elongation", Code::out_of_range, "elongation", [](Part& p) {
           p.limits.elongation = 0.0;
         }}});
}

TEST_CASE("faults of a load case stand at its own keys") {
  hold({{"/member/load_cases/0/second_support",
         Code::out_of_range,
         "",
         [](Part& p) {
           first(p).support_z = first(p).support_y = Support::pinned_pinned;
           first(p).second_support = 9.0;
         }},
        {"/member/load_cases/0/fatigue/stress_ratio", Code::out_of_range, "", [](Part& p) {
           first(p).fatigue = FatigueLoading{.cycles = 1e4, .stress_ratio = -2.0};
         }}});
}
