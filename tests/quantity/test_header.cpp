// SPDX-License-Identifier: MIT
#include <bismar/quantity/parse.hpp>

#include "quantity/faults.hpp"

using namespace bismar;
using quantity_test::contains;
using quantity_test::fault_of;

TEST_CASE("A heading is split into its name and its unit") {
  const Header density = split_header("density [kg/m3]");
  CHECK(density.name == "density");
  CHECK(density.unit == "kg/m3");
  const Header strength = split_header("  yield strength (min) [ MPa ] ");
  CHECK(strength.name == "yield strength (min)");
  CHECK(strength.unit == "MPa");
  const Header name = split_header("name");
  CHECK(name.name == "name");
  CHECK_FALSE(name.unit.has_value());
  CHECK(split_header("poisson [-]").unit == "-");
  CHECK(split_header("toughness [MPa√m]").unit == "MPa√m");
}

TEST_CASE("A heading with broken brackets is refused with the right form") {
  for (const char* text : {"density [kg/m3",
                           "density kg/m3]",
                           "density ]kg/m3[",
                           "density [kg/m3] x",
                           "density [kg] [m3]",
                           "density [kg[m3]",
                           "density [[kg]]"}) {
    INFO(text);
    const Fault fault = fault_of([&] { return split_header(text); });
    CHECK(fault.code == Code::table_malformed);
    CHECK(contains(fault.message, "density [kg/m3]"));
  }
  CHECK(fault_of([] { return split_header(""); }).code == Code::empty);
  CHECK(fault_of([] { return split_header("  "); }).code == Code::empty);
  CHECK(fault_of([] { return split_header("[MPa]"); }).code == Code::empty);
  CHECK(fault_of([] { return split_header("density []"); }).code == Code::unit_missing);
  CHECK(fault_of([] { return split_header("density [ ]"); }).code == Code::unit_missing);
}
