// SPDX-License-Identifier: MIT
// The indices of real designs: one steel, one load, sized by front(). Exponents of the ideal cases:
// Materials Selection in Mechanical Design (textbook), appendix of material indices (from memory),
// derived anew beside each test.
#include <bismar/sizing/index.hpp>

#include <bismar/error.hpp>

#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <cmath>
#include <cstddef>
#include <random>
#include <utility>

using namespace bismar;

namespace {

constexpr double pi = 3.14159265358979323846;
/// What was promised of the exponents; differences of power laws do better.
constexpr double agreed = 1e-6;

Part steel_part(LoadCase load_case, double length = 1.0) {
  Part part;
  part.quantity = 1000.0;
  part.body.length = length;
  part.body.shapes = {round()};
  part.body.load_cases = {std::move(load_case)};
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  return part;
}

Design only_design(const Part& part, const Catalogue& catalogue) {
  const Result result = front(part, catalogue);
  REQUIRE(result.front_count == 1);
  return result.designs[0];
}

DesignIndices indices_of(const Part& part, const Catalogue& catalogue) {
  return design_indices(only_design(part, catalogue), part, catalogue);
}

const PropertyElasticity& of(const DesignIndices& indices, Property property) {
  for (const auto& one : indices.elasticities) {
    if (one.property == property) {
      return one;
    }
  }
  FAIL("no elasticity of " << info(property).name);
  return indices.elasticities[0];
}

/// x of the index P^x / rho, the same on both sides.
double exponent(const DesignIndices& indices, Property property) {
  const SidedValue& mass = of(indices, property).mass;
  const SidedValue& density = of(indices, Property::density).mass;
  CHECK(mass.below.value() == Approx(mass.above.value()).epsilon(agreed));
  return -mass.below.value() / density.below.value();
}

void check_ideal(const Part& part, const char* limit, Property property, double expected) {
  const DesignIndices found = indices_of(part, test::small_catalogue());
  CHECK(found.free_size);
  REQUIRE(found.governing.size() == 1);
  CHECK(found.governing[0].limit == limit);
  CHECK(exponent(found, property) == Approx(expected).epsilon(agreed));
}

/// The catalogue with one property of steel-a times a factor.
Catalogue changed(Property property, double factor) {
  Catalogue catalogue = test::small_catalogue();
  MaterialTableBuilder builder("changed");
  MaterialTableBuilder::Row row;
  row.info = catalogue.materials.info(0);
  for (const auto& one : properties()) {
    if (const auto value = catalogue.materials.value(one.property, 0)) {
      const double by = one.property == property ? factor : 1.0;
      row.values[one.property] = {value->low * by, value->high * by};
    }
  }
  builder.add(std::move(row));
  catalogue.materials = builder.build();
  return catalogue;
}

}  // namespace

TEST_CASE("a tie has the indices E/rho and sigma/rho") {
  Part part = steel_part(pinned_pinned({axial(20e3)}));
  check_ideal(part, "yield", Property::yield_strength, 1.0);  // A = F / sigma
  part.limits.elongation = 1e-4;
  check_ideal(part, "elongation", Property::youngs_modulus, 1.0);  // A = F L / (E delta)
}

TEST_CASE("a beam has the indices E^(1/2)/rho and sigma^(2/3)/rho") {
  Part part = test::small_lever();
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  check_ideal(part, "yield", Property::yield_strength, 2.0 / 3.0);  // W ~ A^(3/2)
  part.limits.deflection = 1e-3;
  check_ideal(part, "deflection", Property::youngs_modulus, 0.5);  // I ~ A^2
}

TEST_CASE("a column in Euler's range has the index E^(1/2)/rho") {
  LoadCase load_case = pinned_pinned({axial(-15e3)});
  load_case.eccentricity = 0.0;  // Euler's own column: the default of L / 500 would govern
  Part part = steel_part(std::move(load_case));
  part.limits.column_method = ColumnMethod::euler;
  check_ideal(part, "flexural buckling", Property::youngs_modulus, 0.5);
}

TEST_CASE("a shaft has the indices G^(1/2)/rho and sigma^(2/3)/rho") {
  Part part = steel_part(cantilever({torque(200.0, 1.0)}));
  check_ideal(part, "yield", Property::yield_strength, 2.0 / 3.0);
  part.limits.twist = 0.01;
  check_ideal(part, "twist", Property::shear_modulus, 0.5);
}

TEST_CASE("a column of the buckling curves lies between E and strength") {
  // By the curve both count; together they scale the resistance like Euler's load or squashing:
  // for slender columns the sum of both exponents is 1/2, for stocky ones 1.
  Part part = steel_part(pinned_pinned({axial(-40e3)}));
  const DesignIndices found = indices_of(part, test::small_catalogue());
  const double by_E = exponent(found, Property::youngs_modulus);
  const double by_yield = exponent(found, Property::yield_strength);
  CHECK(by_E > 0.1);
  CHECK(by_yield > 0.01);
  CHECK(by_E + by_yield > 0.5);
  CHECK(by_E + by_yield < 1.0);
}

TEST_CASE("the elasticities foretell what a changed material does to mass and cost") {
  Part part = steel_part(pinned_pinned({axial(-40e3)}));
  const DesignIndices found = indices_of(part, test::small_catalogue());
  const double step = 1e-4;
  for (const auto& one : found.elasticities) {
    INFO(one.name);
    const Design more = only_design(part, changed(one.property, 1.0 + step));
    const Design less = only_design(part, changed(one.property, 1.0 - step));
    const double over = std::log((1.0 + step) / (1.0 - step));
    CHECK(one.mass.above.value() == Approx(std::log(more.mass / less.mass) / over).margin(1e-6));
    CHECK(one.cost.above.value() == Approx(std::log(more.cost / less.cost) / over).margin(1e-6));
  }
}

TEST_CASE("the material of a forged part costs as its mass and its price") {
  Part part = test::small_lever();
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  const DesignIndices found = indices_of(part, test::small_catalogue());
  CHECK(found.elasticities.front().property == Property::density);
  CHECK(found.elasticities.back().property == Property::price);
  CHECK(of(found, Property::price).material_cost.above.value() == Approx(1.0).epsilon(agreed));
  CHECK(of(found, Property::price).mass.above.value() == Approx(0.0).margin(agreed));
  CHECK(of(found, Property::yield_strength).material_cost.below.value() ==
        Approx(-2.0 / 3.0).epsilon(agreed));
  // Tooling and time rise more slowly than the mass, so the whole cost does too.
  CHECK(of(found, Property::yield_strength).cost.below.value() > -2.0 / 3.0);
  CHECK(of(found, Property::yield_strength).cost.below.value() < -0.05);
  CHECK(of(found, Property::yield_strength).value == Approx(300e6));
  // m ~ u^(2/3): the multiplier is two thirds of the mass.
  const Design design = only_design(part, test::small_catalogue());
  CHECK(found.governing[0].mass_elasticity.value() == Approx(2.0 / 3.0).epsilon(agreed));
  CHECK(found.governing[0].mass_per_utilisation.value() ==
        Approx(2.0 / 3.0 * design.mass).epsilon(agreed));
  CHECK(found.governing[0].load_case == "service");
}

TEST_CASE("where strength and stiffness couple each counts on one side") {
  // The lever of 21.549 mm, and as its limit the deflection it has: F L^3 / (3 E I).
  Part part = test::small_lever();
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  const double d = std::cbrt(32.0 * 655.0 * 0.3 / 200e6 / pi);
  part.limits.deflection = 655.0 * 0.3 * 0.3 * 0.3 / (3.0 * 210e9 * pi / 64.0 * std::pow(d, 4));
  const DesignIndices found = indices_of(part, test::small_catalogue());
  REQUIRE(found.governing.size() == 2);
  const SidedValue& E = of(found, Property::youngs_modulus).mass;
  const SidedValue& yield = of(found, Property::yield_strength).mass;
  CHECK(E.below.value() == Approx(-0.5).epsilon(agreed));
  CHECK(E.above.value() == Approx(0.0).margin(agreed));
  CHECK(yield.below.value() == Approx(-2.0 / 3.0).epsilon(agreed));
  CHECK(yield.above.value() == Approx(0.0).margin(agreed));
}

TEST_CASE("at its least size only density and price count") {
  Part part = test::small_lever();
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  part.body.shapes = {round({.height_min = 0.04})};
  const DesignIndices found = indices_of(part, test::small_catalogue());
  REQUIRE(found.governing.size() == 1);
  CHECK(found.governing[0].limit == "least size");
  REQUIRE(found.elasticities.size() == 2);
  CHECK(found.elasticities[0].mass.above.value() == Approx(1.0).epsilon(agreed));
}

TEST_CASE("at the beginning of a thickness step no property of the strength counts") {
  // Up to 22 mm yield 200 MPa, which needs 24.7 mm; above 400 MPa, which needs 19.6 mm: 22 mm.
  Catalogue catalogue = test::small_catalogue();
  MaterialTableBuilder builder("steps");
  for (const bool thick : {false, true}) {
    MaterialTableBuilder::Row row;
    row.info = catalogue.materials.info(0);
    for (const auto& one : properties()) {
      if (const auto value = catalogue.materials.value(one.property, 0)) {
        row.values[one.property] = *value;
      }
    }
    row.values[Property::yield_strength] = thick ? Range{400e6, 400e6} : Range{200e6, 200e6};
    if (!thick) {
      row.up_to = 0.022;
    }
    builder.add(std::move(row));
  }
  catalogue.materials = builder.build();
  Part part = test::small_lever();
  part.limits.routes = {"forging"};
  const Design design = only_design(part, catalogue);
  CHECK(design.size == Approx(0.022));
  const DesignIndices found = design_indices(design, part, catalogue);
  REQUIRE(found.governing.size() == 1);
  CHECK(found.governing[0].limit == "thickness step or blank");
  CHECK(found.elasticities.size() == 2);
}

TEST_CASE("a bought bar tells its neighbours, the price of the next size and what it would take") {
  // The lever needs 21.549 mm of steel A: of 20 and 25 mm it takes 25 mm. The 20 mm bar would have
  // u = (21.549 / 20)^3 = 1.2508, and hold with a yield strength 1.2508 times as high.
  const Catalogue catalogue = test::small_catalogue();
  Part part = test::small_lever();
  part.body.shapes = {};
  part.body.stock = {"bars"};
  part.limits.materials = {"steel-a"};
  const Design design = only_design(part, catalogue);
  REQUIRE(design.size_text == "bar 25");
  const DesignIndices found = design_indices(design, part, catalogue);
  CHECK_FALSE(found.free_size);
  CHECK(found.elasticities.empty());
  REQUIRE(found.lighter);
  REQUIRE(found.heavier);
  const double u = std::pow(std::cbrt(32.0 * 655.0 * 0.3 / 200e6 / pi) / 0.020, 3);
  CHECK(found.lighter->size_text == "bar 20");
  CHECK_FALSE(found.lighter->feasible);
  CHECK(found.lighter->limit == "yield");
  CHECK(found.lighter->load_case == "service");
  CHECK(found.lighter->utilisation == Approx(u).epsilon(1e-9));
  REQUIRE(found.lighter->needed.size() == 1);
  CHECK(found.lighter->needed[0].property == Property::yield_strength);
  CHECK(found.lighter->needed[0].factor == Approx(u).epsilon(2e-6));
  CHECK(found.lighter->needed[0].factor >= u * (1.0 - 1e-12));
  CHECK(found.heavier->size_text == "bar 30");
  CHECK(found.heavier->feasible);
  CHECK(found.heavier->needed.empty());
  // pi / 4 (0.030^2 - 0.025^2) x 0.3 x 7850
  CHECK(found.heavier->mass_difference == Approx(0.25 * pi * 275e-6 * 0.3 * 7850.0).epsilon(1e-9));
  const Design heavier = evaluate(part, catalogue, design.candidate, found.heavier->size);
  CHECK(found.heavier->cost_difference == Approx(heavier.cost - design.cost).epsilon(1e-9));
  CHECK(found.lighter->mass_difference < 0.0);
  CHECK(found.lighter->cost_difference < 0.0);
}

TEST_CASE("the ends of a list have one neighbour") {
  const Catalogue catalogue = test::small_catalogue();
  Part part = test::small_lever();
  part.body.shapes = {round({.sizes = Sizes::of({0.022, 0.030})})};
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  const Design design = only_design(part, catalogue);
  CHECK(design.size == 0.022);
  const DesignIndices found = design_indices(design, part, catalogue);
  CHECK_FALSE(found.lighter);
  REQUIRE(found.heavier);
  CHECK(found.heavier->size == 0.030);
}

TEST_CASE("every design of random fronts has its indices") {
  std::mt19937 random(20250101);
  std::size_t free_sizes = 0;
  std::size_t lists = 0;
  for (int trial = 0; trial < 30; ++trial) {
    const Catalogue catalogue = test::random_catalogue(random, 8);
    const Part part = test::random_part(random);
    for (const Design& design : front(part, catalogue).designs) {
      INFO(design.id);
      const DesignIndices found = design_indices(design, part, catalogue);
      if (!found.free_size) {
        ++lists;
        if (found.lighter) {
          CHECK(found.lighter->mass < design.mass);
        }
        if (found.heavier) {
          CHECK(found.heavier->mass > design.mass);
        }
        continue;
      }
      ++free_sizes;
      CHECK_FALSE(found.governing.empty());
      // With the density the mass rises by as much, less where a finish is in it, and not at all
      // where the route's least mass holds the size.
      const SidedValue& density = of(found, Property::density).mass;
      CHECK(density.above.value() > -agreed);
      CHECK(density.above.value() < 1.0 + agreed);
      // A price moves no size, and costs at most as it rises.
      CHECK(of(found, Property::price).mass.above.value() == Approx(0.0).margin(agreed));
      CHECK(of(found, Property::price).cost.above.value() > 0.0);
      CHECK(of(found, Property::price).cost.above.value() < 1.0);
    }
  }
  CHECK(free_sizes > 50);
  CHECK(lists > 20);
}

TEST_CASE("a size that no limit holds has no indices") {
  const Catalogue catalogue = test::small_catalogue();
  Part part = test::small_lever();
  part.limits.materials = {"steel-a"};
  part.limits.routes = {"forging"};
  Design design = only_design(part, catalogue);
  for (const double size : {0.022, 0.020}) {  // rounded up, and too thin
    design.size = size;
    try {
      static_cast<void>(design_indices(design, part, catalogue));
      FAIL("nothing thrown");
    } catch (const Error& error) {
      CHECK(error.faults()[0].code == Code::conflict);
      CHECK(error.faults()[0].where == "size");
    }
  }
  design.size = 5.0;
  CHECK_THROWS_AS(design_indices(design, part, catalogue), Error);
}
