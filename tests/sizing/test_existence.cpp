// SPDX-License-Identifier: MIT
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <map>
#include <set>

using namespace bismar;

namespace {

const MaterialInfo& material(const char* id) {
  const auto& table = test::starter().materials;
  return table.info(table.find(id).value());
}

const Route& route(const char* id) { return *test::starter().find_route(id); }

bool any_item_made_of(const char* list, const MaterialInfo& info) {
  const auto& items = test::starter().find_stock(list)->items;
  return std::any_of(
      items.begin(), items.end(), [&](const StockItem& item) { return made_of(item, info); });
}

}  // namespace

TEST_CASE("every pair of route and shape is possible or not as a shop would say") {
  // Common practice, no source. Letters: r round, s square, R rectangle, e ellipse, t round tube, T
  // rectangular tube; "stock" keeps a bought section; "-" makes no prismatic member of these
  // shapes.
  const std::map<std::string, std::string> expected = {
      {"hot-forging", "rsRehp"},
      {"open-die-forging", "rsRehp"},
      {"sand-casting", "rsRetThEp"},
      {"permanent-mould-casting", "rsRetThEp"},
      {"die-casting", "rsReichyap"},
      {"investment-casting", "rsRetThEp"},
      {"powder-pressing", "rsRehp"},
      {"machining-from-bar", "rsRehp"},
      {"laser-cut-plate", "R"},
      {"press-brake-forming", "ca"},
      {"press-forming", "ca"},
      {"hot-press-hardening", "ca"},
      {"deep-drawing", "-"},
      {"extrusion", "rsRetTichEyap"},
      {"roll-forming", "tTca"},
      {"injection-moulding", "rsReichyap"},
      {"polymer-extrusion", "rsRetTichEyap"},
      {"compression-moulding", "rsReichyap"},
      {"pultrusion", "rsRetTichEyap"},
      {"filament-winding", "tEp"},
      {"hand-lay-up", "RtTicEyap"},
      {"resin-infusion", "RtTicEyap"},
      {"autoclave", "RtTicEyap"},
      {"sawing-planing", "sR"},
      {"bar-sawing", "stock"},
      {"timber-cutting", "stock"},
      {"panel-cutting", "R"},
      {"glass-cutting", "R"},
      {"ceramic-pressing", "rsRetThEp"},
      {"arc-welding", "-"},
      {"spot-welding", "-"},
      {"adhesive-bonding", "-"},
      {"quench-temper", "-"},
      {"case-hardening", "-"},
      {"nitriding", "-"},
      {"solution-ageing", "-"},
      {"galvanising", "-"},
      {"chrome-plating", "-"},
      {"anodising", "-"},
      {"painting", "-"},
  };
  const std::vector<std::pair<SectionFamily, char>> shapes = {
      {SectionFamily::solid_round, 'r'},
      {SectionFamily::solid_square, 's'},
      {SectionFamily::solid_rectangle, 'R'},
      {SectionFamily::solid_ellipse, 'e'},
      {SectionFamily::round_tube, 't'},
      {SectionFamily::rectangular_tube, 'T'},
      {SectionFamily::i_section, 'i'},
      {SectionFamily::channel, 'c'},
      {SectionFamily::solid_hexagon, 'h'},
      {SectionFamily::elliptical_tube, 'E'},
      {SectionFamily::tee, 'y'},
      {SectionFamily::angle, 'a'},
      {SectionFamily::polygon, 'p'}};
  REQUIRE(test::starter().routes.size() == expected.size());
  for (const auto& one : test::starter().routes) {
    INFO(one.id);
    REQUIRE(expected.contains(one.id));
    std::string found;
    for (const auto& [family, letter] : shapes) {
      if (!shape_rules(one, family, false)) {
        found += letter;
      }
    }
    if (!shape_rules(one, SectionFamily::solid_round, true)) {
      CHECK(found.empty());  // what keeps stock never makes a free size
      found = "stock";
    }
    CHECK((found.empty() ? "-" : found) == expected.at(one.id));
  }
}

TEST_CASE("timber never becomes a tube, a casting or a forging") {
  for (const auto& one : test::starter().routes) {
    for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
      const auto& info = test::starter().materials.info(m);
      if (info.material_class != "wood" || one.kind != RouteKind::primary ||
          route_rules(info, one)) {
        continue;
      }
      INFO(info.id << " by " << one.id);
      CHECK_FALSE(can_leave(one, SectionFamily::round_tube));
      CHECK_FALSE(can_leave(one, SectionFamily::rectangular_tube));
      CHECK_FALSE(can_leave(one, SectionFamily::solid_round));
    }
  }
}

TEST_CASE("hardened bearing steel is not forged and still hard without its heat treatment") {
  const auto& hard = material("100cr6-through-hardened-60-62-hrc");
  CHECK(strength_is_lost_when_hot(hard.condition));
  const auto needed = needed_treatments(hard, route("hot-forging"), test::starter());
  CHECK(std::find(needed.begin(), needed.end(), Candidate::none) == needed.end());
  // And it is only admitted where the job says so.
  Limits limits;
  CHECK(material_rules(hard, limits)->rule == Rule::structural_use);
  limits.allow_hard = true;
  CHECK_FALSE(material_rules(hard, limits).has_value());
}

TEST_CASE("a forged part gets the treatment that its condition needs, and none that it does not") {
  const auto treatment = [](const char* id) {
    const auto needed = needed_treatments(material(id), route("hot-forging"), test::starter());
    REQUIRE(needed.size() == 1);
    return needed[0] == Candidate::none ? std::string("none")
                                        : test::starter().routes[needed[0]].id;
  };
  CHECK(treatment("42crmo4-quenched-and-tempered") == "quench-temper");
  CHECK(treatment("c45-normalised") == "none");
  CHECK(treatment("16mncr5-blank-hardened-core") == "case-hardening");
  CHECK(treatment("38mnvs6-controlled-cooled-from-hot-forming") == "none");
  CHECK(treatment("en-aw-7075-t6-bar") == "solution-ageing");
  // Machining keeps the condition of the bar.
  CHECK(needed_treatments(material("42crmo4-quenched-and-tempered"),
                          route("machining-from-bar"),
                          test::starter()) == std::vector<std::uint32_t>{Candidate::none});
}

TEST_CASE(
    "cold-drawn and strain-hardened strength does not survive hot forming and nothing restores "
    "it") {
  for (const char* condition :
       {"cold drawn", "cold worked to C700", "H14", "H116/H321", "cold rolled, dual phase"}) {
    CHECK(strength_is_lost_when_hot(condition));
    MaterialInfo info;
    info.material_class = "steel";
    info.condition = condition;
    info.processes = {"hot forging", "quench and temper"};
    CHECK(needed_treatments(info, route("hot-forging"), test::starter()).empty());
  }
  for (const char* condition : {"normalised",
                                "annealed",
                                "solution annealed bar",
                                "as rolled",
                                "controlled cooled from hot forming",
                                "soft annealed",
                                "hot rolled"}) {
    CHECK_FALSE(strength_is_lost_when_hot(condition));
  }
}

TEST_CASE("a cast grade enters only through its own casting route") {
  std::size_t pairs = 0;
  for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
    const auto& info = test::starter().materials.info(m);
    if (info.forms != std::vector<std::string>{"casting"}) {
      continue;
    }
    for (const auto& one : test::starter().routes) {
      if (one.kind == RouteKind::primary && !route_rules(info, one)) {
        INFO(info.id << " by " << one.id);
        CHECK(one.id.find("casting") != std::string::npos);
        ++pairs;
      }
    }
  }
  CHECK(pairs >= 80);
  const auto broken = route_rules(material("en-ac-46000-alsi9cu3-fe-pressure-die-cast-f"),
                                  route("machining-from-bar"));
  REQUIRE(broken.has_value());
  CHECK(broken->rule == Rule::casting_route);
}

TEST_CASE("stock keeps to its material family") {
  CHECK(any_item_made_of("chs", material("s355j2h-hot-finished-hollow-section")));
  CHECK_FALSE(
      any_item_made_of("aluminium-round-tube", material("s355j2h-hot-finished-hollow-section")));
  CHECK_FALSE(any_item_made_of("aluminium-rectangular-tube",
                               material("s355j2h-hot-finished-hollow-section")));
  CHECK_FALSE(any_item_made_of("chs", material("en-aw-6082-t6-profile")));
  CHECK_FALSE(any_item_made_of("round-bar", material("c24-12-pct-moisture-graded")));
  CHECK(any_item_made_of("timber", material("c24-12-pct-moisture-graded")));
  CHECK_FALSE(any_item_made_of("timber", material("s235jr-as-rolled")));
  for (const auto& list : test::starter().stock) {
    for (const auto& item : list.items) {
      for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
        const auto& info = test::starter().materials.info(m);
        if (list.id == "timber" && made_of(item, info)) {
          CHECK(info.material_class == "wood");
        }
        if (list.id.starts_with("aluminium") && made_of(item, info)) {
          CHECK(info.material_class == "aluminium");
        }
      }
    }
  }
}

TEST_CASE("the filters of the job come first and say what was asked") {
  Limits limits;
  limits.classes = {"aluminium"};
  CHECK(material_rules(material("s235jr-as-rolled"), limits)->rule == Rule::not_asked_for);
  limits = {};
  limits.processes = {"welding (good)"};
  CHECK(material_rules(material("42crmo4-quenched-and-tempered"), limits)->rule ==
        Rule::not_asked_for);
  CHECK_FALSE(material_rules(material("s235jr-as-rolled"), limits).has_value());
  limits = {};
  limits.forms = {"plate"};
  CHECK_FALSE(material_rules(material("s235jr-as-rolled"), limits).has_value());
  limits = {};
  limits.forbidden_materials = {"steel"};
  CHECK(material_rules(material("s235jr-as-rolled"), limits).has_value());
}

TEST_CASE("core materials and mean values of clear wood are never members") {
  std::size_t never = 0;
  Limits all;
  all.allow_brittle = all.allow_hard = true;
  for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
    const auto& info = test::starter().materials.info(m);
    if (info.use == StructuralUse::no) {
      ++never;
      CHECK(material_rules(info, all)->rule == Rule::structural_use);
    }
  }
  CHECK(never == 10);
}

TEST_CASE("a finish goes only on the classes and processes it is for") {
  const auto& zinc = *test::starter().find_finish("galvanising");
  CHECK_FALSE(finish_rules(material("s235jr-as-rolled"), zinc).has_value());
  CHECK(finish_rules(material("en-aw-6082-t6-profile"), zinc)->rule == Rule::finish);
  CHECK(finish_rules(material("42crmo4-quenched-and-tempered"), zinc).has_value());
}

TEST_CASE(
    "the list of conditions that lose their strength covers every row that can be hot formed") {
  // Each condition among the rows that allow hot forging or forming is one of these two, written
  // out here.
  const std::set<std::string> kept = {"normalised",
                                      "annealed",
                                      "solution annealed bar",
                                      "soft annealed",
                                      "controlled cooled from hot forming",
                                      "duplex annealed"};
  for (std::size_t m = 0; m < test::starter().materials.size(); ++m) {
    const auto& info = test::starter().materials.info(m);
    const bool hot =
        std::any_of(info.processes.begin(), info.processes.end(), [](const auto& word) {
          return word == "hot forging" || word == "hot forming";
        });
    if (hot) {
      INFO(info.id << ": " << info.condition);
      CHECK(strength_is_lost_when_hot(info.condition) != kept.contains(info.condition));
    }
  }
}
