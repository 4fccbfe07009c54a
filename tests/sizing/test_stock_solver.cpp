// SPDX-License-Identifier: MIT
// The stock solver beside the walk through every size, solve_exact(), over the starter tables.
#include "sizing/stock_solver.hpp"

#include "sizing/enumeration.hpp"
#include "support/catch.hpp"

#include <bismar/catalogue/catalogue.hpp>

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <random>
#include <span>
#include <string>
#include <utility>
#include <vector>

using namespace bismar;

namespace {

const Catalogue& starter() {
  static const Catalogue catalogue = read_catalogue(BISMAR_TEST_DATA_DIR);
  return catalogue;
}

/// What was compared, so that a test can say that it was something.
struct Seen {
  std::size_t solved = 0;
  std::size_t points = 0;
  std::size_t fronts_of_several = 0;
  std::size_t ties = 0;
  std::size_t excluded = 0;
  std::size_t clashes = 0;
  StockSolver::Counts counts;

  Seen& operator+=(const Seen& other) {
    solved += other.solved;
    points += other.points;
    fronts_of_several += other.fronts_of_several;
    ties += other.ties;
    excluded += other.excluded;
    clashes += other.clashes;
    counts.sizes += other.counts.sizes;
    counts.excluded += other.counts.excluded;
    counts.beaten += other.counts.beaten;
    counts.evaluated += other.counts.evaluated;
    counts.whole_walks += other.counts.whole_walks;
    return *this;
  }
};

void require_equal(const GroupSolution& quick, const GroupSolution& plain, Seen& seen) {
  REQUIRE(quick.points.size() == plain.points.size());
  for (std::size_t i = 0; i < plain.points.size(); ++i) {
    // Exactly: both are made by the same evaluation.
    REQUIRE(quick.points[i].x == plain.points[i].x);
    REQUIRE(quick.points[i].objectives == plain.points[i].objectives);
    REQUIRE(quick.points[i].utilisations == plain.points[i].utilisations);
    seen.ties += i > 0 && plain.points[i].objectives == plain.points[i - 1].objectives ? 1U : 0U;
  }
  REQUIRE(quick.solved == plain.solved);
  REQUIRE(quick.excluded_by == plain.excluded_by);
  REQUIRE(quick.least_utilisation == plain.least_utilisation);
  REQUIRE(quick.clash_falling == plain.clash_falling);
  REQUIRE(quick.clash_rising == plain.clash_rising);
  ++seen.solved;
  seen.points += plain.points.size();
  seen.fronts_of_several += plain.points.size() > 1 ? 1U : 0U;
  seen.excluded += plain.excluded_by != SIZE_MAX ? 1U : 0U;
  seen.clashes += plain.points.empty() && plain.excluded_by == SIZE_MAX ? 1U : 0U;
}

/// Every candidate out of stock; of random ones only about one in `stride`.
Seen compare(const Part& part,
             const Settings& settings = {},
             std::size_t stride = 1,
             const Catalogue& catalogue = starter()) {
  Seen seen;
  SizingProblem problem(part, catalogue, settings);
  const StockSolver solver(problem);
  Enumeration enumeration(part, catalogue);
  std::size_t turn = 0;
  for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
    for (Candidate candidate : enumeration.of(m).candidates) {
      if (candidate.stock == Candidate::none || ++turn % stride != 0) {
        continue;
      }
      candidate.material = m;
      const auto& compiled = problem.add(candidate);
      if (compiled.undecided.empty() && compiled.undecided_limits.empty() &&
          !compiled.variable.values.empty()) {
        INFO(part.name << ": " << catalogue.materials.info(m).id << ", "
                       << catalogue.stock[candidate.stock].id << ", "
                       << catalogue.routes[candidate.route].id << ", finish " << candidate.finish);
        const std::size_t group = problem.groups() - 1;
        require_equal(solver.solve(group, &seen.counts), solve_exact(problem, group), seen);
      }
      problem.remove_last();
    }
  }
  return seen;
}

/// data/jobs/gate_stem.json
Part gate_stem() {
  Part part;
  part.name = "gate stem";
  part.quantity = 60.0;
  part.batch = 20.0;
  part.body.length = 1.8;
  part.body.stock = {"all"};
  part.body.load_cases = {pinned_pinned({axial(-50e3)}, "closing")};
  part.limits.width = part.limits.height = 60e-3;
  part.limits.wall = 3e-3;
  part.limits.mass = 20.0;
  part.limits.cost = 60.0;
  part.limits.medium = "fresh water";
  part.finishes = {"none", "galvanising", "powder-coat", "wet-paint-system"};
  part.operations = {{.operation = "drill-hole", .units = 2.0}};
  return part;
}

/// data/jobs/gear_beam.json, its stock.
Part gear_beam() {
  Part part;
  part.name = "gear beam";
  part.quantity = 40.0;
  part.batch = 10.0;
  part.body.length = 3.6;
  part.body.stock = {"all"};
  const auto spanning = [](std::vector<Load> loads, std::string name) {
    LoadCase out = fixed_pinned(std::move(loads), std::move(name));
    out.second_support = 3.2;
    return out;
  };
  LoadCase raising = spanning({force(-9e3, 1.6), torque(120.0, 1.6)}, "raising a stuck gate");
  LoadCase step = spanning({force(-1e3, 3.6)}, "somebody on the step");
  raising.acceleration_z = step.acceleration_z = 9.80665;
  LoadCase daily = spanning({force(-5e3, 1.6)}, "daily use");
  daily.fatigue = FatigueLoading{.cycles = 150000.0, .stress_ratio = -0.33};
  part.body.load_cases = {raising, step, daily};
  auto& details = part.body.details;
  details.net_area = 0.88;
  details.net_modulus = 0.85;
  details.k_t_bending = 2.3;
  details.notch_radius = 7e-3;
  details.surface = SurfaceFinish::hot_rolled;
  details.masses = {{.mass = 45.0, .at = 1.6}};
  part.limits.deflection = 8e-3;
  part.limits.rotation = 0.5 * 3.141592653589793 / 180.0;
  part.limits.twist = 3.141592653589793 / 180.0;
  part.limits.frequency = 6.0;
  part.limits.mass = 110.0;
  part.limits.cost = 400.0;
  part.limits.medium = "fresh water";
  part.limits.corrosion_at_least = Rating::fair;
  part.finishes = {"none", "galvanising", "wet-paint-system"};
  part.operations = {{.operation = "drill-hole", .units = 4.0}};
  return part;
}

Part lever() {
  Part part;
  part.name = "lever";
  part.quantity = 2000.0;
  part.body.length = 0.3;
  part.body.stock = {"all"};
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.limits.deflection = 10e-3;
  return part;
}

double between(std::mt19937_64& random, double low, double high) {
  return std::exp(std::uniform_real_distribution<double>(std::log(low), std::log(high))(random));
}

/// Members of every kind: ties, struts, beams and shafts held in any way under up to three load
/// cases, with caps, limits and details now and then.
Part random_part(std::mt19937_64& random) {
  const auto chance = [&](unsigned one_in) { return random() % one_in == 0; };
  Part part;
  part.quantity = between(random, 1.0, 1e4);
  part.body.length = between(random, 0.1, 5.0);
  part.body.stock = {"all"};
  const double L = part.body.length;
  const std::size_t cases = 1 + random() % 3;
  for (std::size_t c = 0; c < cases; ++c) {
    std::vector<Load> loads;
    const double size = between(random, 20.0, 2e4) * std::min(1.0, 1.0 / L);
    if (chance(2)) {
      loads.push_back(axial((chance(3) ? 1.0 : -1.0) * 5.0 * size));
    }
    if (chance(2)) {
      loads.push_back(force(-size, L * between(random, 0.2, 1.0)));
    }
    if (chance(4)) {
      loads.push_back(force(0.3 * size, L * 0.7, Along::y));
    }
    if (loads.empty() || chance(4)) {
      loads.push_back(torque(0.05 * size, L));
    }
    LoadCase made = random() % 2 == 0   ? pinned_pinned(loads)
                    : random() % 2 == 0 ? cantilever(loads)
                                        : fixed_fixed(loads);
    made.name = "case " + std::to_string(c);
    made.acceleration_z = chance(3) ? 9.80665 : 0.0;
    if (chance(4)) {
      made.factors = {{"yield", 2.0}, {"flexural buckling", 1.2}, {"brittle fracture", 4.0}};
    }
    part.body.load_cases.push_back(made);
  }
  auto& limits = part.limits;
  if (chance(2)) {
    limits.deflection = L / between(random, 50.0, 500.0);
    limits.shear_deflection = chance(3);
  }
  if (chance(4)) {
    limits.rotation = 0.02;
  }
  if (chance(4)) {
    limits.twist = 0.05;
  }
  if (chance(5)) {
    limits.frequency = between(random, 3.0, 200.0);
  }
  if (chance(4)) {
    limits.height = between(random, 0.02, 0.3);
  }
  if (chance(4)) {
    limits.width = between(random, 0.02, 0.3);
  }
  if (chance(6)) {
    limits.wall = 4e-3;
  }
  if (chance(4)) {
    limits.mass = L * between(random, 1.0, 30.0);
  }
  if (chance(4)) {
    limits.cost = L * between(random, 10.0, 200.0);
  }
  if (chance(5)) {
    limits.medium = "fresh water";
    part.finishes = {"none", "galvanising"};
  }
  limits.allow_brittle = chance(3);
  if (chance(5)) {
    limits.column_method = chance(2) ? ColumnMethod::johnson : ColumnMethod::euler;
  }
  if (chance(6)) {
    limits.properties = {{.property = "youngs_modulus", .at_least = 100e9}};
  }
  if (chance(6)) {
    part.body.details.masses = {{.mass = 5.0, .at = 0.5 * L}};
  }
  if (chance(8)) {
    part.body.details.welded = true;
  }
  return part;
}

}  // namespace

TEST_CASE("Out of stock the demo parts get what the walk through every size gives") {
  Settings all_sizes;
  all_sizes.doubtful_sizes = true;
  for (const Part& part : {gate_stem(), gear_beam(), lever()}) {
    Seen seen = compare(part);
    seen += compare(part, all_sizes);
    INFO(part.name);
    CHECK(seen.solved > 300);
    CHECK(seen.points > 20);
    CHECK(seen.excluded > 20);
    // The point of it: most sizes are never evaluated.
    CHECK(seen.counts.evaluated * 2 < seen.counts.sizes);
  }
}

TEST_CASE("Out of stock random parts get what the walk through every size gives") {
  std::mt19937_64 random(6101);
  Seen seen;
  for (int n = 0; n < 120; ++n) {
    Part part = random_part(random);
    part.name = "random part " + std::to_string(n);
    Settings settings;
    settings.doubtful_sizes = n % 2 == 0;
    settings.scrap_credit = n % 3 == 0 ? 0.4 : 0.0;
    settings.missing = n % 4 == 0 ? Missing::class_median : Missing::undecided;
    seen += compare(part, settings, 7);
  }
  CHECK(seen.solved > 3000);
  CHECK(seen.points > 2000);
  CHECK(seen.fronts_of_several > 100);
  CHECK(seen.excluded > 500);
  CHECK(seen.clashes > 20);
  CHECK(seen.counts.beaten > seen.counts.evaluated);
}

TEST_CASE("An offcut that makes the heavier size cheaper keeps both, and equal sizes stay ties") {
  // Two of 2.9 m come out of 6 m, one out of 4 m: the heavier bar costs less.
  Part part = lever();
  part.body.length = 2.9;
  part.body.load_cases = {pinned_pinned({force(-500.0, 1.45)})};
  part.limits.deflection = 15e-3;
  Catalogue catalogue = starter();
  for (auto& list : catalogue.stock) {
    if (list.sheet) {
      continue;
    }
    // Every other size is sold in another length, and each size is there twice.
    for (std::size_t i = 0; i < list.items.size(); ++i) {
      list.items[i].lengths = {i % 2 == 0 ? 4.0 : 6.0};
    }
    const auto once = list.items;
    for (auto item : once) {
      item.id += " again";
      list.items.push_back(std::move(item));
    }
  }
  const Seen seen = compare(part, {}, 1, catalogue);
  CHECK(seen.fronts_of_several > 50);
  CHECK(seen.ties > 50);
  CHECK(seen.points >= 2 * seen.fronts_of_several);
}

TEST_CASE(
    "A size whose utilisation is exactly 1 is feasible out of stock, just above 1 it is not") {
  // With the deflection's own value for its limit, u = 1.0 * d / d = 1 to the last bit; with the
  // next double below, u is 1 or the next double above it, as the division rounds.
  Part part = lever();
  part.limits.deflection = 1.0;
  const Catalogue& catalogue = starter();
  const Settings settings;
  std::size_t at_one = 0;
  std::size_t above_one = 0;
  Enumeration enumeration(part, catalogue);
  for (std::uint32_t m = 0; m < catalogue.materials.size(); m += 3) {
    for (Candidate candidate : enumeration.of(m).candidates) {
      if (candidate.stock == Candidate::none) {
        continue;
      }
      candidate.material = m;
      SizingProblem problem(part, catalogue, settings);
      const auto& compiled = problem.add(candidate);
      if (!compiled.undecided.empty() || compiled.variable.values.empty()) {
        continue;
      }
      const auto found = std::find_if(compiled.constraints.begin(),
                                      compiled.constraints.end(),
                                      [](const auto& c) { return c.label == "deflection"; });
      if (found == compiled.constraints.end()) {
        continue;  // thicker than the table goes, all of them
      }
      const auto i = static_cast<std::size_t>(found - compiled.constraints.begin());
      std::vector<double> objectives(2);
      std::vector<double> u(compiled.constraints.size());
      const double x = compiled.variable.values[compiled.variable.values.size() / 2];
      problem.evaluate(0, std::span(&x, 1), objectives, u);
      if (u[i] == 0.0) {
        continue;
      }
      for (const double limit : {u[i], std::nextafter(u[i], 0.0), std::nextafter(u[i], 1.0)}) {
        Part tight = part;
        tight.limits.deflection = limit;
        SizingProblem again(tight, catalogue, settings);
        again.add(candidate);
        again.evaluate(0, std::span(&x, 1), objectives, u);
        at_one += u[i] == 1.0 ? 1U : 0U;
        above_one += u[i] == std::nextafter(1.0, 2.0) ? 1U : 0U;
        Seen seen;
        require_equal(StockSolver(again).solve(0), solve_exact(again, 0), seen);
      }
    }
  }
  CHECK(at_one > 50);
  CHECK(above_one > 20);
}
