// SPDX-License-Identifier: MIT
#include <bismar/catalogue/catalogue.hpp>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <map>
#include <set>
#include <string>
#include <vector>

#include <bismar/error.hpp>

#include "catalogue/temporary_table.hpp"
#include "support/catch.hpp"

using bismar::Availability;
using bismar::Catalogue;
using bismar::Code;
using bismar::MaterialInfo;
using bismar::Route;
using bismar::RouteKind;
using bismar::SectionFamily;
using bismar::StockItem;
using bismar::StockList;

namespace {

const Catalogue& starter() {
  static const Catalogue catalogue = bismar::read_catalogue(BISMAR_TEST_DATA_DIR);
  return catalogue;
}

bool has(const std::vector<std::string>& words, const std::string& word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

template <class Visit>
void for_every_material(Visit&& visit) {
  for (std::size_t i = 0; i < starter().materials.size(); ++i) visit(starter().materials.info(i));
}

/// How many items of the list are made of the materials that `wanted` picks.
template <class Wanted>
std::size_t pairs(const StockList& list, Wanted&& wanted) {
  std::size_t count = 0;
  for_every_material([&](const MaterialInfo& material) {
    if (!wanted(material)) return;
    for (const StockItem& item : list.items) count += made_of(item, material) ? 1U : 0U;
  });
  return count;
}

}  // namespace

TEST_CASE("no size of the starter lists is lost or changed") {
  // Counts of rows and sums of a column over the files of sizes as delivered, in their own units,
  // computed from those files when they were converted. The sums are of five-figure numbers for
  // areas (mm2), of plain dimensions for the thicknesses (mm).
  struct Expected {
    std::size_t items;
    double area;
    double relative;  // of the sum; see test_stock_sections.cpp for single rows
  };
  const std::map<std::string, Expected> expected = {
      {"round-bar", {56, 479329.765, 2e-5}},
      {"square-bar", {33, 145672.0, 1e-12}},
      {"flat-bar", {152, 238046.0, 1e-12}},
      {"timber", {381, 24553460.0, 1e-12}},
      {"chs", {110, 682037.1, 2e-5}},
      {"shs", {96, 588293.71, 2e-5}},
      {"rhs", {105, 585391.55, 2e-5}},
      {"aluminium-round-tube", {78, 105674.817, 2e-5}},
      {"aluminium-rectangular-tube", {56, 56124.0, 1e-9}},
      {"ipe", {18, 101690.84, 2e-5}},
      {"hea", {19, 202700.1, 2e-5}},
      {"heb", {19, 258778.2, 2e-5}},
      {"upe", {14, 54365.3, 1e-4}},
      {"upn", {16, 71107.0, 3e-4}}};
  CHECK(starter().stock.size() == 15);
  std::size_t items = 0;
  for (const auto& [id, e] : expected) {
    INFO(id);
    const StockList* list = starter().find_stock(id);
    REQUIRE(list != nullptr);
    CHECK_FALSE(list->sheet);
    CHECK(list->items.size() == e.items);
    items += list->items.size();
    double area = 0;
    for (const StockItem& item : list->items) area += item.section.area * 1e6;
    CHECK(area == Approx(e.area).epsilon(e.relative));
  }
  const StockList* sheet = starter().find_stock("sheet-and-plate");
  REQUIRE(sheet != nullptr);
  CHECK(sheet->sheet);
  CHECK(sheet->items.size() == 236);
  double thickness = 0;
  for (const StockItem& item : sheet->items) thickness += item.thickness * 1e3;
  CHECK(thickness == Approx(3798.73).epsilon(1e-12));
  CHECK(items + sheet->items.size() == 1389);
}

TEST_CASE("sizes in doubt are marked as delivered") {
  // 84 rows of the list of doubtful sizes that came with the data, by file.
  std::map<std::string, int> unconfirmed, doubtful;
  for (const StockList& list : starter().stock) {
    for (const StockItem& item : list.items) {
      if (item.availability == Availability::unconfirmed) ++unconfirmed[list.id];
      if (item.availability == Availability::doubtful) ++doubtful[list.id];
      CHECK_FALSE(item.evidence.empty());
    }
  }
  CHECK(unconfirmed == std::map<std::string, int>{{"chs", 10}, {"rhs", 4}, {"shs", 6}});
  CHECK(doubtful ==
        std::map<std::string, int>{{"round-bar", 1}, {"sheet-and-plate", 1}, {"timber", 62}});
}

TEST_CASE("each list keeps its shape, forming and title") {
  const std::map<std::string, SectionFamily> families = {
      {"round-bar", SectionFamily::solid_round},
      {"square-bar", SectionFamily::solid_square},
      {"flat-bar", SectionFamily::solid_rectangle},
      {"timber", SectionFamily::solid_rectangle},
      {"chs", SectionFamily::round_tube},
      {"shs", SectionFamily::rectangular_tube},
      {"rhs", SectionFamily::rectangular_tube},
      {"aluminium-round-tube", SectionFamily::round_tube},
      {"aluminium-rectangular-tube", SectionFamily::rectangular_tube},
      {"ipe", SectionFamily::i_section},
      {"hea", SectionFamily::i_section},
      {"heb", SectionFamily::i_section},
      {"upe", SectionFamily::channel},
      {"upn", SectionFamily::channel}};
  for (const auto& [id, family] : families) {
    INFO(id);
    const StockList& list = *starter().find_stock(id);
    CHECK(list.family == family);
    CHECK(list.title != list.id);
    for (const StockItem& item : list.items) {
      INFO(item.id);
      CHECK(item.section.family == family);
      CHECK(item.section.I_y >=
            item.section.I_z * (1.0 - 1e-9));  // laid with the stronger axis as y
      CHECK_FALSE(item.designation.empty());
      CHECK_FALSE(item.lengths.empty());
      CHECK_FALSE(item.forms.empty());
    }
  }
  using bismar::Forming;
  CHECK(starter().find_stock("timber")->items[0].section.forming == Forming::sawn);
  CHECK(starter().find_stock("chs")->items[0].section.forming == Forming::hot_finished);
  CHECK(starter().find_stock("aluminium-round-tube")->items[0].section.forming ==
        Forming::extruded);
}

TEST_CASE("a stock family never takes a foreign material") {
  SECTION("no aluminium tube of steel, nor of an open profile") {
    for (const char* id : {"aluminium-round-tube", "aluminium-rectangular-tube"}) {
      const StockList& list = *starter().find_stock(id);
      CHECK(pairs(list, [](const MaterialInfo& m) { return m.material_class != "aluminium"; }) ==
            0);
      CHECK(pairs(list, [](const MaterialInfo& m) { return !has(m.forms, "tube"); }) == 0);
      CHECK(pairs(list, [](const MaterialInfo& m) { return m.material_class == "aluminium"; }) > 0);
    }
  }
  SECTION("a structural hollow-section grade comes in its own sizes only") {
    const auto hollow_grade = [](const MaterialInfo& m) {
      return m.group == "structural hollow-section steel";
    };
    for (const StockList& list : starter().stock) {
      INFO(list.id);
      const bool hollow = list.id == "chs" || list.id == "shs" || list.id == "rhs";
      CHECK((pairs(list, hollow_grade) > 0) == hollow);
      if (!hollow) continue;
      CHECK(pairs(list, [&](const MaterialInfo& m) { return !hollow_grade(m); }) == 0);
      // Cold-formed grades (EN 10219) have other corners: they do not come in hot-finished sizes.
      CHECK(pairs(list, [](const MaterialInfo& m) { return m.standard != "EN 10210-1"; }) == 0);
    }
  }
  SECTION("timber sizes take graded timber and nothing else") {
    const StockList& timber = *starter().find_stock("timber");
    CHECK(pairs(timber, [](const MaterialInfo& m) { return m.material_class != "wood"; }) == 0);
    for_every_material([&](const MaterialInfo& m) {
      INFO(m.id);
      std::size_t sawn = 0, glued = 0;
      for (const StockItem& item : timber.items) {
        if (!made_of(item, m)) continue;
        ++(item.forms.front() == "sawn" ? sawn : glued);
      }
      // 168 sawn sizes and 213 of glued laminated timber, as delivered.
      CHECK(sawn == (m.group == "softwood, graded" || m.group == "hardwood, graded" ? 168U : 0U));
      CHECK(glued == (m.group == "glued laminated timber" ? 213U : 0U));
    });
  }
  SECTION("rolled sections take structural steel sold as sections") {
    for (const char* id : {"ipe", "hea", "heb", "upe", "upn"}) {
      const StockList& list = *starter().find_stock(id);
      CHECK(pairs(list, [](const MaterialInfo& m) {
              return m.material_class != "steel" || !has(m.forms, "section");
            }) == 0);
      CHECK(pairs(list, [](const MaterialInfo& m) { return m.material_class == "steel"; }) > 0);
    }
  }
  SECTION("bars take what is sold as bar, composite rod only to 40 mm") {
    const StockList& round = *starter().find_stock("round-bar");
    CHECK(pairs(round, [](const MaterialInfo& m) { return !has(m.forms, "bar"); }) == 0);
    std::set<std::string> classes;
    for_every_material([&](const MaterialInfo& m) {
      for (const StockItem& item : round.items) {
        if (!made_of(item, m)) continue;
        classes.insert(m.material_class);
        if (m.material_class == "composite") CHECK(item.section.height <= 0.0401);
      }
    });
    CHECK(classes == std::set<std::string>{"aluminium",
                                           "composite",
                                           "copper alloy",
                                           "magnesium",
                                           "nickel alloy",
                                           "polymer",
                                           "stainless steel",
                                           "steel",
                                           "titanium"});
    CHECK(size_standard(round.items[5], "aluminium") == "EN 755-3");
    CHECK(size_standard(round.items[5], "steel") == "EN 10060");
    CHECK(size_standard(round.items[5], "titanium").empty());
  }
}

TEST_CASE("whatever metal is sold as bar, tube or section can be sawn to length") {
  // Common practice, no source; hard grades are sawn before they are hardened.
  const Route& sawing = *starter().find_route("bar-sawing");
  std::set<std::string> classes;
  int materials = 0;
  for_every_material([&](const MaterialInfo& m) {
    const bool sold_long = has(m.forms, "bar") || has(m.forms, "tube") || has(m.forms, "section");
    const bool metal = m.material_class != "polymer" && m.material_class != "composite" &&
                       m.material_class != "wood" && m.material_class != "ceramic";
    if (!sold_long || !metal) return;
    INFO(m.id);
    ++materials;
    classes.insert(m.material_class);
    CHECK(has(m.processes, "sawing"));
    CHECK(has(sawing.classes, m.material_class));
  });
  CHECK(materials > 150);
  CHECK(classes == std::set<std::string>{"aluminium",
                                         "copper alloy",
                                         "magnesium",
                                         "nickel alloy",
                                         "stainless steel",
                                         "steel",
                                         "titanium"});
  // Every class of the bar lists has the route by which a bar becomes a part.
  for (const char* id : {"round-bar", "square-bar", "flat-bar"}) {
    for (const StockItem& item : starter().find_stock(id)->items) {
      for (const std::string& material_class : item.classes) {
        INFO(item.id << ": " << material_class);
        CHECK(has(sawing.classes, material_class));
      }
    }
  }
}

TEST_CASE("every starter size is made of at least one material, and every word is known") {
  for (const StockList& list : starter().stock) {
    for (const StockItem& item : list.items) {
      INFO(list.id << " " << item.id);
      bool any = false;
      for_every_material([&](const MaterialInfo& m) { any = any || made_of(item, m); });
      CHECK(any);
    }
  }
  const std::vector<std::string> unused = bismar::unused_names(starter());
  for (const std::string& sentence : unused) UNSCOPED_INFO(sentence);
  CHECK(unused.empty());
  CHECK(starter().warnings == starter().materials.warnings());
}

TEST_CASE("what hot shaping destroys in the starter table, a treatment restores") {
  // Words of conditions whose strength a forging heat takes away: common practice, no source.
  const std::vector<std::string> lost = {"quenched and tempered",
                                         "hardened",
                                         "aged",
                                         "T3",
                                         "T4",
                                         "T5",
                                         "T6",
                                         "T7",
                                         "T9",
                                         "H900",
                                         "H925",
                                         "H1025",
                                         "H1075",
                                         "H1100",
                                         "H1150",
                                         "P800",
                                         "P930",
                                         "P1070",
                                         "cold drawn"};
  std::map<std::string, int> restored;
  std::set<std::string> not_restored;
  for_every_material([&](const MaterialInfo& m) {
    if (!has(m.processes, "hot forging")) return;
    if (std::none_of(lost.begin(), lost.end(), [&](const std::string& word) {
          return m.condition.find(word) != std::string::npos;
        })) {
      return;
    }
    bool found = false;
    for (const Route& route : starter().routes) {
      if (route.kind != RouteKind::treatment) continue;
      const bool open = route.process_words.empty() ||
                        std::any_of(route.process_words.begin(),
                                    route.process_words.end(),
                                    [&](const std::string& w) { return has(m.processes, w); });
      if (!open || !restores(route, m.material_class, m.condition)) continue;
      ++restored[route.id];
      found = true;
    }
    if (!found) not_restored.insert(m.id);
  });
  for (const std::string& id : not_restored) UNSCOPED_INFO(id);
  // Two martensitic stainless grades do not list "quench and temper" among their processes,
  // magnesium has no forging route, and an aged copper alloy no treatment: such forgings are not
  // offered.
  CHECK(not_restored == std::set<std::string>{"1-4313-x3crnimo13-4-quenched-and-tempered-qt900",
                                              "1-4418-x4crnimo16-5-1-quenched-and-tempered-qt900",
                                              "cucr1zr-cw106c-precipitation-hardened",
                                              "mgal8zn-az80a-extruded-t5",
                                              "mgzn6zr-zk60a-extruded-t5"});
  CHECK(restored["case-hardening"] == 7);  // nine rows, two of them a second thickness
  CHECK(restored["quench-temper"] > 0);
  CHECK(restored["solution-ageing"] > 0);
}

TEST_CASE("a treatment opens for no grade whose condition it does not restore") {
  const Route& ageing = *starter().find_route("solution-ageing");
  for_every_material([&](const MaterialInfo& m) {
    INFO(m.id << ": " << m.condition);
    const bool heat_treatable = m.condition.find("aged") != std::string::npos ||
                                m.condition.find("T4") != std::string::npos ||
                                m.condition.find("T5") != std::string::npos ||
                                m.condition.find("T6") != std::string::npos ||
                                m.group == "precipitation-hardening stainless steel";
    if (!heat_treatable) CHECK_FALSE(restores(ageing, m.material_class, m.condition));
  });
}

TEST_CASE("the process words of the starter routes are those of the materials") {
  std::set<std::string> known;
  for_every_material(
      [&](const MaterialInfo& m) { known.insert(m.processes.begin(), m.processes.end()); });
  std::set<std::string> unreached;
  for (const Route& route : starter().routes) {
    for (const std::string& word : route.process_words) {
      INFO(route.id << ": " << word);
      CHECK(known.contains(word));
    }
    bool reached = false;
    for_every_material([&](const MaterialInfo& m) {
      reached = reached ||
                (has(route.classes, m.material_class) &&
                 (route.process_words.empty() ||
                  std::any_of(route.process_words.begin(),
                              route.process_words.end(),
                              [&](const std::string& w) { return has(m.processes, w); })) &&
                 std::any_of(route.takes.begin(), route.takes.end(), [&](const std::string& form) {
                   return has(m.forms, form);
                 }));
    });
    if (!reached) unreached.insert(route.id);
  }
  // The note of that row says so.
  CHECK(unreached == std::set<std::string>{"powder-pressing"});
}

TEST_CASE("entries are found by id") {
  CHECK(starter().find_stock("ipe")->id == "ipe");
  CHECK(starter().find_route("hot-forging")->id == "hot-forging");
  CHECK(starter().find_finish("none")->id == "none");
  CHECK(starter().find_operation("saw-cut")->id == "saw-cut");
  CHECK(starter().find_stock("IPE") == nullptr);
  CHECK(starter().find_route("") == nullptr);
  CHECK(starter().find_finish("gold") == nullptr);
  CHECK(starter().find_operation("saw") == nullptr);
}

TEST_CASE("the starter catalogue is found from the build tree") {
  const Catalogue found = bismar::starter_catalogue();
  CHECK(found.materials.size() == starter().materials.size());
  CHECK(found.stock.size() == starter().stock.size());
  CHECK(found.currency == "EUR");
}

TEST_CASE("all faults of all tables are told at once") {
  namespace fs = std::filesystem;
  const test::TemporaryTable anchor("anchor", "");
  const fs::path folder = fs::path(anchor.path()).parent_path();
  const auto write = [&](const char* name, const std::string& text) {
    fs::create_directories((folder / name).parent_path());
    std::ofstream(folder / name, std::ios::binary) << text;
  };
  write("stock/a.csv", "id,shape,diameter [mm],material classes\na,solid round,-1,steel\n");
  write("stock/b.csv", "id,shape,diameter [mm],material classes\na,solid,1,steel\n");
  write("stock/notes.txt", "not a table");
  write("routes.csv", "id\n");
  write("finishes.csv",
        "id,material classes,cost basis,cost per area [EUR/m2]\na,steel,square metre,\n");
  fs::copy_file(fs::path(BISMAR_TEST_DATA_DIR) / "materials.csv", folder / "materials.csv");

  const auto faults = test::faults_of([&] { return bismar::read_catalogue(folder.string()); });
  const auto at = [&](const char* place) { return (folder / place).string(); };
  CHECK(test::has_fault(faults, Code::out_of_range, at("stock/a.csv") + ":2:3", "diameter"));
  CHECK(test::has_fault(faults, Code::cell_invalid, at("stock/b.csv") + ":2:2", "shape"));
  CHECK(test::has_fault(faults, Code::missing, at("finishes.csv") + ":2:4", "cost per area"));
  std::set<Code> codes;
  for (const bismar::Fault& fault : faults) codes.insert(fault.code);
  CHECK(codes.contains(Code::empty));             // routes.csv without a row
  CHECK(codes.contains(Code::table_unreadable));  // operations.csv
  CHECK(codes.contains(Code::column_missing));    // routes.csv
}

TEST_CASE("a folder without tables is a fault, and so is one without lists of sizes") {
  CHECK(test::has_fault(test::faults_of([] { return bismar::read_catalogue("no-such-folder"); }),
                        Code::table_unreadable,
                        "no-such-folder",
                        "materials.csv"));
  const test::TemporaryTable anchor("anchor", "");
  const auto folder = std::filesystem::path(anchor.path()).parent_path();
  std::filesystem::create_directories(folder / "stock");
  const auto faults = test::faults_of([&] { return bismar::read_catalogue(folder.string()); });
  CHECK(test::has_fault(faults, Code::empty, (folder / "stock").string(), "no .csv"));
}

TEST_CASE("names that no material has are a warning, one sentence each") {
  Catalogue own;
  StockList list;
  list.id = "bars";
  for (int i = 0; i < 2; ++i) {
    StockItem item;
    item.classes = {"unobtainium"};
    item.forms = {"ingot"};
    list.items.push_back(item);
  }
  own.stock.push_back(list);
  CHECK(bismar::unused_names(own) ==
        std::vector<std::string>{
            "The stock list \"bars\" names the material class \"unobtainium\", which no material "
            "has.",
            "The stock list \"bars\" names the material form \"ingot\", which no material has."});
}
