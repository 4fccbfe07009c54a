// SPDX-License-Identifier: MIT
#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/property.hpp>
#include <bismar/catalogue/range.hpp>

#include <string>

#include "support/catch.hpp"

using bismar::MaterialTable;
using bismar::Property;
using bismar::Range;

TEST_CASE("every property has its name, unit and default end, and is found by its name") {
  REQUIRE(bismar::properties().size() == bismar::property_count);
  for (const bismar::PropertyInfo& known : bismar::properties()) {
    INFO(known.name);
    CHECK(bismar::property(known.name) == known.property);
    CHECK(&bismar::info(known.property) == &known);
    // The usual unit is one that a header of the kind may carry.
    const std::string header =
        std::string(known.name) + (known.unit.empty() ? "" : " [" + std::string(known.unit) + "]");
    const std::string value = known.property == Property::poisson_ratio ? "0.3" : "1";
    const MaterialTable table =
        bismar::read_materials_text("id,class," + header + "\na,steel," + value + "\n", "m.csv");
    CHECK(table.value(known.property, 0).has_value());
    CHECK(table.extra_names().empty());
  }
  CHECK(bismar::property(" YIELD  strength ") == Property::yield_strength);
  CHECK_FALSE(bismar::property("yield"));
  CHECK(bismar::info(Property::yield_strength).default_end == bismar::RangeEnd::low);
  CHECK(bismar::info(Property::youngs_modulus).default_end == bismar::RangeEnd::low);
  CHECK(bismar::info(Property::density).default_end == bismar::RangeEnd::mid);
  CHECK(bismar::info(Property::price).default_end == bismar::RangeEnd::mid);
}

TEST_CASE("the ends of a range") {
  const Range range{2.0, 8.0};
  CHECK(range.at(bismar::RangeEnd::low) == 2.0);
  CHECK(range.at(bismar::RangeEnd::mid) == 5.0);
  CHECK(range.at(bismar::RangeEnd::geometric_mid) == Approx(4.0).epsilon(1e-15));
  CHECK(range.at(bismar::RangeEnd::high) == 8.0);
  CHECK(Range{0.0, 8.0}.geometric_mid() == 4.0);
}
