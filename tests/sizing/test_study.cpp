// SPDX-License-Identifier: MIT
// The definition that a study is held to is front() itself, called anew for the same part.
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/study.hpp>

#include <algorithm>
#include <functional>
#include <limits>
#include <memory>
#include <random>
#include <stdexcept>
#include <stop_token>
#include <string>
#include <utility>
#include <vector>

using namespace bismar;

namespace {

std::shared_ptr<const Catalogue> shared_starter() {
  return {std::shared_ptr<const Catalogue>(), &test::starter()};
}

std::string text(const Result& result) {
  std::string out = result.part + "|" + result.currency + "|" + std::to_string(result.front_count);
  for (const auto& line : result.funnel.lines) {
    out += "\n" + std::to_string(static_cast<int>(line.stage)) + " " + line.reason + ": " +
           std::to_string(line.candidates);
  }
  out += "\n" + std::to_string(result.funnel.considered) + "/" +
         std::to_string(result.funnel.doubtful_sizes);
  for (const auto* list : {&result.undecided, &result.notes}) {
    for (const auto& one : *list) {
      out += "\n" + one;
    }
  }
  return out;
}

bool are_equal(const Design& a, const Design& b) {
  bool same = a.id == b.id && a.candidate == b.candidate && a.size == b.size &&
              a.free_sizes == b.free_sizes && a.mass == b.mass && a.cost == b.cost &&
              a.notes == b.notes && a.governing == b.governing && a.size_text == b.size_text &&
              a.buyable_size == b.buyable_size && a.buyable_mass == b.buyable_mass &&
              a.buyable_cost == b.buyable_cost && a.buyable_feasible == b.buyable_feasible &&
              a.cost_breakdown.low == b.cost_breakdown.low &&
              a.cost_breakdown.high == b.cost_breakdown.high &&
              a.cost_breakdown.blank == b.cost_breakdown.blank &&
              a.utilisations.size() == b.utilisations.size();
  for (std::size_t i = 0; same && i < a.utilisations.size(); ++i) {
    const auto& u = a.utilisations[i];
    const auto& v = b.utilisations[i];
    same = u.limit == v.limit && u.load_case == v.load_case && u.value == v.value &&
           u.factor == v.factor;
  }
  return same;
}

/// All but the telemetry, bit for bit.
bool are_equal(const Result& a, const Result& b) {
  bool same = text(a) == text(b) && a.exact == b.exact && a.delta == b.delta &&
              a.epsilon_reached == b.epsilon_reached && a.designs.size() == b.designs.size() &&
              a.others.size() == b.others.size();
  for (std::size_t i = 0; same && i < a.designs.size(); ++i) {
    same = are_equal(a.designs[i], b.designs[i]);
  }
  for (std::size_t i = 0; same && i < a.others.size(); ++i) {
    const auto& p = a.others[i];
    const auto& q = b.others[i];
    same = p.candidate == q.candidate && p.size == q.size && p.free_sizes == q.free_sizes &&
           p.mass == q.mass && p.cost == q.cost;
  }
  return same;
}

void check_as_fresh(Study& study) {
  const auto fresh = front(study.part(), study.catalogue(), study.settings());
  const auto& result = study.solve();
  CHECK(text(result) == text(fresh));
  CHECK(are_equal(result, fresh));
}

/// A lever of several shapes, two routes and a finish, with some of most things set.
Part lever() {
  Part part;
  part.name = "lever";
  part.quantity = 5000.0;
  part.body.length = 0.3;
  part.body.shapes = {ellipse({.height_to_width = 1.25, .height_min = 8e-3, .height_max = 60e-3}),
                      round_tube({.wall_to_height = 0.1, .height_min = 8e-3, .height_max = 80e-3})};
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.limits.deflection = 12e-3;
  part.limits.routes = {"hot-forging", "machining-from-bar"};
  return part;
}

struct Edit {
  const char* field;
  std::function<void(Part&)> make;
};

/// One edit for every field of a part. The bindings count the fields: where one is added this stops
/// compiling until it has its edit.
std::vector<Edit> edits() {
  Part part;
  [[maybe_unused]] const auto& [name,
                                quantity,
                                batch,
                                body,
                                limits,
                                finishes,
                                operations,
                                service_class] = part;
  [[maybe_unused]] const auto& [length, shapes, stock, load_cases, details] = body;
  [[maybe_unused]] const auto& [deflection,
                                shear_deflection,
                                rotation,
                                twist,
                                frequency,
                                elongation,
                                height,
                                width,
                                wall,
                                slenderness,
                                column_method,
                                lateral_restraint,
                                mass,
                                cost,
                                routes,
                                forbidden_routes,
                                processes,
                                forms,
                                classes,
                                materials,
                                forbidden_materials,
                                properties,
                                medium,
                                corrosion_at_least,
                                temperature,
                                allow_brittle,
                                allow_hard] = limits;
  return {
      {"name", [](Part& p) { p.name = "another"; }},
      {"quantity", [](Part& p) { p.quantity = 200.0; }},
      {"batch", [](Part& p) { p.batch = 10.0; }},
      {"length", [](Part& p) { p.body.length = 0.35; }},
      {"one shape less", [](Part& p) { p.body.shapes.pop_back(); }},
      {"another family", [](Part& p) { p.body.shapes[0] = square({.height_min = 8e-3}); }},
      {"a ratio", [](Part& p) { p.body.shapes[0].height_to_width = 2.0; }},
      {"height_min", [](Part& p) { p.body.shapes[0].height_min = 45e-3; }},
      {"height_max", [](Part& p) { p.body.shapes[0].height_max = 18e-3; }},
      {"sizes", [](Part& p) { p.body.shapes[0].sizes = Sizes::multiples_of(5e-3); }},
      {"stock",
       [](Part& p) {
         p.limits.routes.emplace_back("bar-sawing");
         p.body.stock = {"round-bar"};
       }},
      {"a load", [](Part& p) { p.body.load_cases[0].loads[0].value = 1300.0; }},
      {"another load case",
       [](Part& p) { p.body.load_cases.push_back(pinned_pinned({axial(-20e3)}, "push")); }},
      {"a factor", [](Part& p) { p.body.load_cases[0].factors["yield"] = 0.8; }},
      {"hand_loaded",
       [](Part& p) {
         p.limits.routes.clear();
         p.body.load_cases[0].hand_loaded = true;
       }},
      {"duration", [](Part& p) { p.body.load_cases[0].duration = 3.0e8; }},
      {"fatigue", [](Part& p) { p.body.load_cases[0].fatigue = FatigueLoading{}; }},
      {"details", [](Part& p) { p.body.details.net_modulus = 0.7; }},
      {"deflection", [](Part& p) { p.limits.deflection = 6e-3; }},
      {"shear_deflection", [](Part& p) { p.limits.shear_deflection = true; }},
      {"rotation", [](Part& p) { p.limits.rotation = 0.01; }},
      {"twist",
       [](Part& p) {
         p.body.load_cases[0].loads.push_back(torque(100.0, 0.3));
         p.limits.twist = 0.01;
       }},
      {"frequency", [](Part& p) { p.limits.frequency = 400.0; }},
      {"elongation",
       [](Part& p) {
         p.body.load_cases[0].loads.push_back(axial(10e3));
         p.limits.elongation = 1e-5;
       }},
      {"height", [](Part& p) { p.limits.height = 22e-3; }},
      {"width", [](Part& p) { p.limits.width = 18e-3; }},
      {"wall", [](Part& p) { p.limits.wall = 5e-3; }},
      {"slenderness",
       [](Part& p) {
         p.body.load_cases[0].loads.push_back(axial(-1e3));
         p.limits.slenderness = 60.0;
       }},
      {"column_method",
       [](Part& p) {
         p.body.load_cases[0].loads.push_back(axial(-1e3));
         p.limits.column_method = ColumnMethod::euler;
       }},
      {"lateral_restraint",
       [](Part& p) {
         p.body.shapes[0].height_to_width = 5.0;
         p.limits.lateral_restraint = true;
       }},
      {"mass", [](Part& p) { p.limits.mass = 0.35; }},
      {"cost", [](Part& p) { p.limits.cost = 6.0; }},
      {"routes",
       [](Part& p) {
         p.limits.routes = {"extrusion", "hot-forging"};
       }},
      {"every route", [](Part& p) { p.limits.routes.clear(); }},
      {"forbidden_routes", [](Part& p) { p.limits.forbidden_routes = {"hot-forging"}; }},
      {"processes", [](Part& p) { p.limits.processes = {"painting"}; }},
      {"forms", [](Part& p) { p.limits.forms = {"tube"}; }},
      {"classes", [](Part& p) { p.limits.classes = {"aluminium"}; }},
      {"materials", [](Part& p) { p.limits.materials = {test::starter().materials.info(3).id}; }},
      {"forbidden_materials", [](Part& p) { p.limits.forbidden_materials = {"steel"}; }},
      {"properties",
       [](Part& p) { p.limits.properties = {{.property = "Young's modulus", .at_most = 100e9}}; }},
      {"medium", [](Part& p) { p.limits.medium = "fresh water"; }},
      {"corrosion_at_least",
       [](Part& p) {
         p.limits.medium = "fresh water";
         p.limits.corrosion_at_least = Rating::fair;
       }},
      {"temperature", [](Part& p) { p.limits.temperature = 273.15 + 150.0; }},
      {"allow_brittle", [](Part& p) { p.limits.allow_brittle = true; }},
      {"allow_hard", [](Part& p) { p.limits.allow_hard = true; }},
      {"finishes",
       [](Part& p) {
         p.finishes = {"none", "zinc-plate"};
       }},
      {"operations",
       [](Part& p) {
         p.operations = {{"saw-cut", 2.0}};
       }},
      {"service_class",
       [](Part& p) {
         p.limits.routes = {"sawing-planing"};
         p.body.shapes = {square()};
         p.service_class = ServiceClass::two;
       }},
  };
}

struct SettingsEdit {
  const char* field;
  std::function<void(Settings&)> make;
};

/// The same for the settings.
std::vector<SettingsEdit> settings_edits() {
  Settings settings;
  [[maybe_unused]] const auto& [missing,
                                range_ends,
                                route_end,
                                epsilon,
                                delta,
                                explain,
                                near,
                                fold,
                                doubtful_sizes,
                                kerf,
                                machining_allowance,
                                scrap_credit] = settings;
  return {
      {"missing", [](Settings& s) { s.missing = Missing::class_median; }},
      {"missing: exclude", [](Settings& s) { s.missing = Missing::exclude; }},
      {"range_ends", [](Settings& s) { s.range_ends[Property::price] = RangeEnd::high; }},
      {"route_end", [](Settings& s) { s.route_end = RangeEnd::high; }},
      {"epsilon", [](Settings& s) { s.epsilon = 0.05; }},
      {"delta", [](Settings& s) { s.delta = 1e-3; }},
      {"explain", [](Settings& s) { s.explain = Explain::full; }},
      {"near", [](Settings& s) { s.near = 0.3; }},
      {"fold", [](Settings& s) { s.fold = 0.1; }},
      {"doubtful_sizes", [](Settings& s) { s.doubtful_sizes = true; }},
      {"kerf", [](Settings& s) { s.kerf = 10e-3; }},
      {"machining_allowance", [](Settings& s) { s.machining_allowance = 6e-3; }},
      {"scrap_credit", [](Settings& s) { s.scrap_credit = 0.4; }},
  };
}

}  // namespace

TEST_CASE("a study answers as a fresh front after each field of its part has changed") {
  Study study(lever(), shared_starter());
  check_as_fresh(study);
  const auto before = study.solve();
  for (const auto& edit : edits()) {
    INFO(edit.field);
    study.change(edit.make);
    check_as_fresh(study);
    // An edit that changed nothing would not tell whether what it touches was looked up anew.
    CHECK_FALSE(are_equal(study.solve(), before));
    study.change([](Part& part) { part = lever(); });
    CHECK(are_equal(study.solve(), before));
  }
}

TEST_CASE("a study answers as a fresh front after each of its settings has changed") {
  // With stock, blanks and gaps, so that each of them counts.
  Part part = lever();
  part.body.stock = {"round-bar", "chs"};
  part.limits.routes.emplace_back("bar-sawing");
  Study study(part, shared_starter());
  check_as_fresh(study);
  for (const auto& edit : settings_edits()) {
    INFO(edit.field);
    study.change_settings(edit.make);
    check_as_fresh(study);
    study.change_settings([](Settings& settings) { settings = {}; });
    check_as_fresh(study);
  }
  // The stock by itself: its route is among those asked for before and after.
  study.change([](Part& p) { p.body.stock = {"chs"}; });
  check_as_fresh(study);
}

TEST_CASE("a study over every route answers as a fresh front while its load goes up and down") {
  // Flat parts and rolled tubes among them, whose thickness must be one that can be bought.
  Part part = lever();
  part.limits.routes.clear();
  part.body.shapes = {
      round(),
      rectangle({.height_to_width = 4.0}),
      round_tube({.wall_to_height = 0.1}),
      rectangular_tube({.height_to_width = 1.5, .wall_to_height = 0.08}),
      channel({.height_to_width = 2.0, .web_to_height = 0.05, .flange_to_height = 0.05})};
  Study study(part, shared_starter());
  for (const double load : {655.0, 700.0, 600.0, 5.0e4, 20.0, 655.0, 3000.0}) {
    INFO("load " << load);
    study.change([&](Part& p) { p.body.load_cases[0].loads[0].value = load; });
    check_as_fresh(study);
  }
}

TEST_CASE("a study of shapes with free sizes answers as a fresh front, tolerances included") {
  Part part = lever();
  part.body.shapes = {rectangle({.height_min = 8e-3, .height_max = 60e-3}),
                      round_tube({.height_min = 8e-3, .height_max = 60e-3})};
  part.limits.routes = {"machining-from-bar"};
  part.limits.classes = {"aluminium"};
  Study study(part, shared_starter());
  check_as_fresh(study);
  study.change([](Part& p) { p.body.load_cases[0].loads[0].value = 900.0; });
  check_as_fresh(study);
  study.change_settings([](Settings& settings) { settings.epsilon = 0.01; });
  check_as_fresh(study);
  study.change([](Part& p) { p.body.shapes.pop_back(); });
  check_as_fresh(study);
}

TEST_CASE("a study answers as a fresh front through long sequences of random changes") {
  std::mt19937 random(5);
  for (int n = 0; n < 25; ++n) {
    const auto catalogue = std::make_shared<const Catalogue>(test::random_catalogue(random, 12));
    Study study(test::random_part(random), catalogue);
    for (int step = 0; step < 8; ++step) {
      INFO(n << ", step " << step);
      study.change([&](Part& part) {
        switch (random() % 5) {
          case 0:
            part = test::random_part(random);
            break;
          case 1:
            part.limits.mass.reset();
            part.limits.cost.reset();
            break;
          case 2:
            part.limits.classes = {"aluminium"};
            break;
          case 3:
            part.limits.classes.clear();
            part.finishes = {"paint"};
            break;
          default:
            for (auto& load_case : part.body.load_cases) {
              for (auto& load : load_case.loads) {
                load.value *= 0.5 + static_cast<double>(random() % 100) / 50.0;
                load.value_to = load.value;
              }
            }
        }
      });
      check_as_fresh(study);
    }
  }
}

TEST_CASE("threads and reductions do not change what a study answers") {
  Study study(lever(), shared_starter());
  double load = 655.0;
  for (const unsigned threads : {1U, 2U, 5U}) {
    for (const bool on : {true, false}) {
      load += 20.0;
      study.change([&](Part& part) { part.body.load_cases[0].loads[0].value = load; });
      const auto& result = study.solve(
          {.threads = threads,
           .reductions = {.material_limits = on, .dominance = on, .bounds = on, .skipping = on}});
      CHECK(are_equal(result, front(study.part(), study.catalogue())));
    }
  }
}

TEST_CASE("a change with faults reports all of them and leaves the study as it was") {
  Study study(lever(), shared_starter());
  const auto before = study.solve();
  try {
    study.change([](Part& part) {
      part.name = "faulty";
      part.quantity = 0.0;
      part.limits.routes = {"no such route"};
    });
    FAIL("the faults were not seen");
  } catch (const Error& error) {
    CHECK(error.faults().size() == 2);
  }
  CHECK(study.part().name == "lever");
  CHECK_THROWS_AS(study.change([](Part& part) {
    part.name = "half done";
    throw std::runtime_error("the host's own");
  }),
                  std::runtime_error);
  CHECK_THROWS_AS(study.change_settings([](Settings& settings) { settings.near = -1.0; }), Error);
  CHECK(study.settings().near == Settings{}.near);
  CHECK(are_equal(study.solve(), before));
  check_as_fresh(study);
}

TEST_CASE("a study is refused where its part has faults or there is no catalogue") {
  Part part = lever();
  part.body.length = -1.0;
  CHECK_THROWS_AS(Study(part, shared_starter()), Error);
  try {
    const Study study(lever(), nullptr);
    FAIL("no catalogue was taken");
  } catch (const Error& error) {
    CHECK(error.faults()[0].code == Code::invalid_argument);
    CHECK(error.faults()[0].where == "catalogue");
  }
}

TEST_CASE("the choice of a study has the least penalty of all its designs") {
  Study study(lever(), shared_starter());
  // Not solved yet: it solves by itself.
  REQUIRE(study.choice(ExchangeConstant::per_kilogram(0.0)) != nullptr);
  const auto& result = study.solve();
  REQUIRE(result.front_count >= 3);
  const auto& front_designs = result.designs;
  CHECK(study.choice(ExchangeConstant::per_kilogram(0.0))->cost ==
        front_designs[result.front_count - 1].cost);
  CHECK(study.choice(ExchangeConstant::per_kilogram(1e308))->mass == front_designs[0].mass);
  // Brute force over all designs, by the formula of linear_penalty().
  for (double alpha = 1e-3; alpha < 1e6; alpha *= 1.07) {
    const auto worth = ExchangeConstant::per_kilogram(alpha);
    double least = std::numeric_limits<double>::infinity();
    for (const auto& design : result.designs) {
      least = std::min(least, linear_penalty(worth, {design.cost, design.mass}));
    }
    const Design* best = study.choice(worth);
    CHECK(linear_penalty(worth, {best->cost, best->mass}) == Approx(least).epsilon(1e-14));
  }
  // On each side of a breakpoint it is the ruler's own choice.
  const auto ruler = study.ruler(Per::design);
  REQUIRE(ruler.stretches.size() >= 2);
  for (const auto& stretch : ruler.stretches) {
    const double inside = stretch.to ? 0.5 * (stretch.from + *stretch.to) : 2.0 * stretch.from;
    CHECK(study.choice(ExchangeConstant::per_kilogram(inside))->id == stretch.choice);
  }
}

TEST_CASE("the choice of a study between two designs changes where one pays for itself") {
  // The switch of a linear penalty, alpha = (C_B - C_A) / (m_A - m_B): check SEL-052.
  Study study(lever(), shared_starter());
  const auto& result = study.solve();
  const auto ruler = study.ruler(Per::design);
  for (std::size_t s = 1; s < ruler.stretches.size(); ++s) {
    const auto& a = result.designs[ruler.stretches[s - 1].design];
    const auto& b = result.designs[ruler.stretches[s].design];
    const double at = (b.cost - a.cost) / (a.mass - b.mass);
    CHECK(study.choice(ExchangeConstant::per_kilogram(at * (1.0 - 1e-9)))->id == a.id);
    CHECK(study.choice(ExchangeConstant::per_kilogram(at * (1.0 + 1e-9)))->id == b.id);
  }
}

TEST_CASE("a study without a feasible design has no choice and comes back when it may") {
  Study study(lever(), shared_starter());
  const auto before = study.solve();
  study.change([](Part& part) { part.limits.mass = 1e-3; });
  check_as_fresh(study);
  CHECK(study.choice(ExchangeConstant::per_kilogram(1.0)) == nullptr);
  CHECK(study.ruler().stretches.empty());
  study.change([](Part& part) { part.limits.mass.reset(); });
  CHECK(are_equal(study.solve(), before));
}

TEST_CASE("a stopped solution is not taken for the answer") {
  Study study(lever(), shared_starter());
  std::stop_source source;
  source.request_stop();
  const auto& stopped = study.solve({.stop = source.get_token()});
  CHECK_FALSE(stopped.exact);
  check_as_fresh(study);
  CHECK(study.solve().exact);
}

TEST_CASE("a study that was moved goes on, and studies share a catalogue") {
  const auto catalogue = std::make_shared<const Catalogue>(test::small_catalogue());
  Study first(test::small_lever(), catalogue);
  Study second(test::small_lever(), catalogue);
  check_as_fresh(first);
  CHECK(&first.catalogue() == &second.catalogue());
  Study moved = std::move(first);
  check_as_fresh(moved);
  moved.change([](Part& part) { part.body.load_cases[0].loads[0].value = 100.0; });
  check_as_fresh(moved);
  second = std::move(moved);
  second.change([](Part& part) { part.limits.classes = {"aluminium"}; });
  check_as_fresh(second);
}

TEST_CASE("nothing is solved again where nothing has changed") {
  Study study(lever(), shared_starter());
  const Result* first = &study.solve();
  bool asked = false;
  const Result* second = &study.solve({.progress = [&](double) { asked = true; }});
  CHECK(first == second);
  CHECK_FALSE(asked);
  CHECK(study.why(study.solve().designs[0].material).standing == Answer::Standing::front);
}
