// SPDX-License-Identifier: MIT
#include <bismar/catalogue/odd_sizes.hpp>

#include <string>
#include <vector>

#include <bismar/catalogue/catalogue.hpp>

#include "support/catch.hpp"

using namespace bismar;

namespace {

StockItem item(const char* id, const SectionProperties& section) {
  StockItem out;
  out.id = id;
  out.section = section;
  out.classes = {"steel"};
  return out;
}

bool has(const std::string& text, const char* words) {
  return text.find(words) != std::string::npos;
}

}  // namespace

TEST_CASE("a web thicker than its flange is odd") {
  StockList list;
  list.id = "beams";
  list.items = {item("right", i_section(0.2, 0.1, 0.0056, 0.0085, 0.012)),
                item("swapped", i_section(0.2, 0.1, 0.0085, 0.0056, 0.012)),
                item("equal", i_section(0.2, 0.1, 0.006, 0.006, 0.0)),
                item("channel", channel(0.2, 0.08, 0.009, 0.006, 0.0, 0.0)),
                item("channel-right", channel(0.2, 0.08, 0.006, 0.009, 0.0, 0.0)),
                item("tube", round_tube(0.06, 0.005, Forming::hot_finished))};
  const std::vector<std::string> odd = odd_sizes(list);
  REQUIRE(odd.size() == 2);
  CHECK(has(odd[0], "\"swapped\" of the list \"beams\""));
  CHECK(has(odd[0], "web of 8.50 mm, thicker than its flange of 5.60 mm"));
  CHECK(has(odd[1], "\"channel\""));
}

TEST_CASE("a size under two ids is odd, unless it is made of something else") {
  StockList list;
  list.id = "bars";
  list.items = {item("a", solid_round(0.02)),
                item("b", solid_round(0.03)),
                item("again", solid_round(0.02)),
                item("aluminium", solid_round(0.02))};
  list.items[3].classes = {"aluminium"};
  const std::vector<std::string> odd = odd_sizes(list);
  REQUIRE(odd.size() == 1);
  CHECK(has(odd[0], "\"again\""));
  CHECK(has(odd[0], "materials of \"a\""));
  list.sheet = true;
  CHECK(odd_sizes(list).empty());
}

TEST_CASE("the starter lists of sizes have nothing odd") {
  const Catalogue catalogue = read_catalogue(BISMAR_TEST_DATA_DIR);
  for (const StockList& list : catalogue.stock) {
    INFO(list.id);
    for (const std::string& one : odd_sizes(list)) {
      FAIL_CHECK(one);
    }
  }
}
