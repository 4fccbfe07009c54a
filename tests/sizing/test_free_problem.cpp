// SPDX-License-Identifier: MIT
// What the certified search of free sizes rests on, against evaluation at random points: bounds,
// contraction, least areas, dominance, and the promise itself. Private classes, so in static builds
// only.
#include "sizing/free_problem.hpp"

#include "sizing/dominance.hpp"
#include "sizing/enumeration.hpp"
#include "sizing/shape_bounds.hpp"
#include "sizing/shape_section.hpp"
#include "sizing/small_catalogue.hpp"
#include "sizing/study.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <map>
#include <set>
#include <string>
#include <vector>

using namespace bismar;

namespace {

constexpr double allowed = 1.0 - 1e-6;

double between(double low, double high, std::mt19937& random) {
  return low >= high
             ? low
             : std::clamp(low * std::pow(high / low,
                                         std::uniform_real_distribution<double>(0.0, 1.0)(random)),
                          low,
                          high);
}

ShapeOptions heights(Sizes sizes = {}) {
  ShapeOptions out;
  out.height_min = 8e-3;
  out.height_max = 80e-3;
  out.sizes = std::move(sizes);
  return out;
}

std::vector<Shape> free_shapes() {
  return {rectangle(heights()),
          ellipse(heights()),
          round_tube(heights()),
          rectangular_tube(heights()),
          elliptical_tube(heights()),
          i_section(heights()),
          channel(heights()),
          tee(heights()),
          angle(heights())};
}

/// A lever with much to check, of a few metals by every sort of route.
Part lever(std::vector<Shape> shapes) {
  Part part = test::small_lever();
  part.quantity = 2000.0;
  part.body.shapes = std::move(shapes);
  part.body.load_cases = {
      cantilever({force(655.0, 0.3), torque(20.0, 0.3)}, "turning"),
      pinned_pinned({axial(-8000.0), distributed(500.0, 500.0, 0.0, 0.3)}, "pressing")};
  part.limits.deflection = 6e-3;
  part.limits.twist = 0.05;
  part.limits.frequency = 20.0;
  part.limits.mass = 3.0;
  part.limits.cost = 60.0;
  part.limits.materials = {"42crmo4-quenched-and-tempered",
                           "s355j2-as-rolled",
                           "en-aw-6082-t6-profile",
                           "en-aw-6082-t651",
                           "s355j2h-hot-finished-hollow-section",
                           "c24-12-pct-moisture-graded"};
  return part;
}

bool all_within(std::span<const double> utilisations, double limit) {
  return std::all_of(
      utilisations.begin(), utilisations.end(), [&](double u) { return u <= limit; });
}

/// A random box of the variables, round `inside` where that is given.
struct RandomBox {
  std::vector<double> lower;
  std::vector<double> upper;
};
RandomBox random_box(std::span<const Variable> variables,
                     const std::vector<double>* inside,
                     std::mt19937& random) {
  RandomBox out;
  const double most = std::pow(10.0, std::uniform_real_distribution<double>(-4.0, 0.3)(random));
  for (std::size_t v = 0; v < variables.size(); ++v) {
    const auto& one = variables[v];
    if (one.kind == Variable::Kind::ordered_set) {
      std::uniform_int_distribution<std::size_t> index(0, one.values.size() - 1);
      double a = one.values[index(random)];
      double b = inside != nullptr ? (*inside)[v] : one.values[index(random)];
      out.lower.push_back(std::min(a, b));
      out.upper.push_back(std::max(a, b));
      continue;
    }
    const double middle = inside != nullptr ? (*inside)[v] : between(one.lower, one.upper, random);
    std::uniform_real_distribution<double> part(0.0, most);
    out.lower.push_back(std::max(one.lower, middle * (1.0 - std::min(part(random), 0.9))));
    out.upper.push_back(std::min(one.upper, middle * (1.0 + part(random))));
  }
  return out;
}

std::vector<double> random_point(std::span<const Variable> variables,
                                 const RandomBox& box,
                                 std::mt19937& random) {
  std::vector<double> out;
  for (std::size_t v = 0; v < variables.size(); ++v) {
    const auto& one = variables[v];
    if (one.kind == Variable::Kind::ordered_set) {
      const auto from = std::lower_bound(one.values.begin(), one.values.end(), box.lower[v]);
      const auto to = std::upper_bound(one.values.begin(), one.values.end(), box.upper[v]);
      out.push_back(*(from + std::uniform_int_distribution<std::ptrdiff_t>(
                                 0, std::distance(from, to) - 1)(random)));
      continue;
    }
    const int end = std::uniform_int_distribution<int>(0, 3)(random);
    out.push_back(end == 0   ? box.lower[v]
                  : end == 1 ? box.upper[v]
                             : between(box.lower[v], box.upper[v], random));
  }
  return out;
}

struct Seen {
  std::size_t modes = 0;
  std::size_t points = 0;
  std::size_t feasible = 0;
  std::size_t cut = 0;
  std::set<std::string> kinds;
};

/// A feasible point: the least size of random proportions, a little more; else a lucky throw.
std::optional<std::vector<double>> feasible_point(const FreeSizeProblem& free,
                                                  std::size_t group,
                                                  std::mt19937& random) {
  const auto variables = free.variables(group);
  std::vector<double> objectives(2);
  std::vector<double> u(free.constraints(group));
  RandomBox all;
  for (const auto& one : variables) {
    all.lower.push_back(one.lower);
    all.upper.push_back(one.upper);
  }
  for (int tries = 0; tries < 12; ++tries) {
    auto x = random_point(variables, all, random);
    if (free.size_direction(group) == 0) {
      if (!free.settle(group, x, all.lower[0], all.upper[0])) {
        continue;
      }
      x[0] = std::min(x[0] * (1.0 + between(1e-6, 3e-2, random)), all.upper[0]);
    }
    free.evaluate(group, x, objectives, u);
    if (all_within(u, allowed)) {
      return x;
    }
  }
  return std::nullopt;
}

void check_mode(const FreeSizeProblem& free, std::size_t group, std::mt19937& random, Seen& seen) {
  const auto variables = free.variables(group);
  const std::size_t m = free.constraints(group);
  ++seen.modes;
  seen.kinds.insert(std::string(free.mode(group).similar ? "similar" : "any") +
                    (free.mode(group).piece.blank != nullptr ? " from a blank" : "") +
                    (variables[0].kind == Variable::Kind::ordered_set ? " of a list" : ""));
  for (int b = 0; b < 8; ++b) {
    const auto inside =
        b % 2 == 0 ? feasible_point(free, group, random) : std::optional<std::vector<double>>();
    const auto box = random_box(variables, inside ? &*inside : nullptr, random);
    std::vector<double> objective_lower(2);
    std::vector<double> u_lower(m);
    std::vector<double> u_upper(m);
    free.bound(group, {1, box.lower, box.upper}, {objective_lower, u_lower, u_upper});
    RandomBox left = box;
    std::vector<double> left_lower(2);
    std::vector<std::uint32_t> broken(1, no_index);
    free.contract(group, allowed, {1, left.lower, left.upper, left_lower, broken});
    const bool smaller = left.lower[0] > box.lower[0] || left.upper[0] < box.upper[0];
    seen.cut += broken[0] != no_index || smaller ? 1U : 0U;
    std::vector<double> objectives(2);
    std::vector<double> u(m);
    for (int p = 0; p < 12; ++p) {
      const auto x = p == 0 && inside ? *inside : random_point(variables, box, random);
      free.evaluate(group, x, objectives, u);
      if (!std::isfinite(objectives[0])) {
        continue;  // no section of these proportions
      }
      ++seen.points;
      std::string wrong;
      for (std::size_t j = 0; j < 2; ++j) {
        wrong += objectives[j] * (1.0 + 1e-9) >= objective_lower[j] ? "" : " objective";
      }
      for (std::size_t i = 0; i < m; ++i) {
        wrong += u[i] * (1.0 + 1e-9) >= u_lower[i] ? "" : " " + free.label(i);
      }
      CAPTURE(group, x, box.lower, box.upper);
      CHECK(wrong == "");
      if (!all_within(u, allowed)) {
        continue;
      }
      ++seen.feasible;
      CHECK(broken[0] == no_index);
      for (std::size_t v = 0; v < x.size() && broken[0] == no_index; ++v) {
        CHECK(left.lower[v] <= x[v]);
        CHECK(x[v] <= left.upper[v]);
      }
      for (std::size_t j = 0; j < 2 && broken[0] == no_index; ++j) {
        CHECK(objectives[j] * (1.0 + 1e-9) >= left_lower[j]);
      }
    }
  }
}

/// Calls back with every candidate of the part that can be solved for its free sizes.
void for_each_free(const Part& part,
                   const Catalogue& catalogue,
                   const std::function<void(const Candidate&, const FreeSizeProblem&)>& call) {
  const Settings settings;
  validate(part, catalogue, settings);
  SizingProblem problem(part, catalogue, settings);
  Enumeration enumeration(part, catalogue);
  for (std::uint32_t material = 0; material < catalogue.materials.size(); ++material) {
    for (Candidate candidate : enumeration.of(material).candidates) {
      candidate.material = material;
      const auto& base =
          problem.add(candidate, 1.0, middle_sizes(part.body.shapes[candidate.shape]));
      {
        const FreeSizeProblem free(problem, base);
        if (free.missing().empty() && free.open_limits().empty()) {
          call(candidate, free);
        }
      }
      problem.remove_last();
    }
    problem.forget(material);
  }
}

/// Of the shape's free dimensions those of this height, at random; sheet thicknesses of whole and
/// half millimetres now and then.
FreeSizes random_free(const Shape& shape, double height, std::mt19937& random) {
  FreeSizes out{};
  const auto free = free_dimensions(shape);
  for (std::size_t f = 0; f < free.size(); ++f) {
    out[f] = between(free[f].to_height.low, free[f].to_height.high, random) * height;
  }
  return out;
}

bool is_usual(const Shape& shape, double height, const FreeSizes& free_sizes) {
  const auto free = free_dimensions(shape);
  std::vector<Interval> sizes;
  for (const auto& dimension : dimensions(shape.family)) {
    if (sizes.empty()) {
      sizes.emplace_back(height);
    } else if (!dimension.optional) {
      const auto at = std::find_if(
          free.begin(), free.end(), [&](const auto& one) { return one.name == dimension.name; });
      const double value = at != free.end()
                               ? free_sizes[static_cast<std::size_t>(at - free.begin())]
                               : ratio_of(shape, dimension.name).value_or(0.0) * height;
      sizes.emplace_back(value);
    }
  }
  return may_be_usual({shape.family, sizes, Interval(0.0), 0.0, Forming::unknown});
}

}  // namespace

TEST_CASE(
    "bounds of free sizes enclose what random points evaluate to, and contraction keeps them") {
  std::mt19937 random(5101);
  Seen seen;
  const auto check = [&](const Part& part) {
    for_each_free(part, test::starter(), [&](const Candidate& candidate, const auto& free) {
      INFO(names(candidate, part, test::starter()).material
           << " " << names(candidate, part, test::starter()).shape << " "
           << names(candidate, part, test::starter()).route);
      for (std::size_t g = 0; g < free.groups(); ++g) {
        if (g < 2 || g % 7 == 0) {
          check_mode(free, g, random, seen);
        }
      }
    });
  };
  check(lever(free_shapes()));
  check(lever({rectangle(heights(Sizes::multiples_of(5e-3))),
               round_tube(heights(Sizes::preferred("R10"))),
               rectangular_tube(heights(Sizes::multiples_of(2e-3)))}));
  CAPTURE(seen.modes, seen.points, seen.feasible, seen.cut, seen.kinds.size());
  CHECK(seen.modes > 200);
  CHECK(seen.points > 20000);
  CHECK(seen.feasible > 2000);
  CHECK(seen.cut > 500);
  CHECK(seen.kinds.size() >= 4);
}

TEST_CASE("no solved design has less area than the bound of its shape") {
  const auto& catalogue = test::starter();
  auto shapes = free_shapes();
  for (const Shape& fixed : {bismar::round({}),
                             square({}),
                             hexagon({}),
                             rectangle({.height_to_width = 2.0}),
                             ellipse({.height_to_width = 1.25}),
                             round_tube({.wall_to_height = 0.05}),
                             rectangular_tube({.height_to_width = 1.5, .wall_to_height = 0.04})}) {
    shapes.push_back(fixed);
  }
  std::size_t compared = 0;
  std::size_t close = 0;
  for (std::uint32_t s = 0; s < shapes.size(); ++s) {
    Part part = lever({shapes[s]});
    if (s >= free_shapes().size()) {
      part.limits.materials.clear();
    }
    part.limits.mass.reset();
    part.limits.cost.reset();
    const Settings settings{.epsilon = 1e-2, .explain = Explain::full};
    const auto solved = solve_candidates(part, catalogue, settings);
    auto& problem = *solved.problem;
    std::map<Forming, ShapeBounds> bounds;
    for (const auto& outcome : solved.outcomes) {
      const auto& route = catalogue.routes[outcome.candidate.route];
      const bool rolled = shapes[s].family == SectionFamily::rectangular_tube;
      const Forming forming = rolled ? forming_of(route) : Forming::unknown;
      auto& one = bounds.try_emplace(forming, problem, 0, forming).first->second;
      const auto needs = one.needs(problem.states(outcome.candidate.material));
      const double least = one.least_area(needs, [](double) { return false; });
      for (const auto& point : outcome.points) {
        const auto section = problem.sections().at(0, route, point.size, point.free_sizes);
        INFO(names(outcome.candidate, part, catalogue).material
             << " " << names(outcome.candidate, part, catalogue).shape << " " << route.id);
        CHECK(section.area * (1.0 + 1e-9) >= least);
        ++compared;
        close += least > 0.5 * section.area ? 1U : 0U;
      }
    }
  }
  CHECK(compared > 500);
  CHECK(close > compared / 4);
}

TEST_CASE("a replaced material has no point that its replacement does not match") {
  std::mt19937 random(5102);
  std::size_t replaced = 0;
  std::size_t points = 0;
  for (int turn = 0; turn < 25; ++turn) {
    const auto catalogue = test::random_catalogue(random, 30);
    auto part = test::random_part(random);
    const bool free = turn % 5 == 0;
    if (free) {
      part.body.shapes = {rectangle({.height_max = 0.08})};
    }
    const Settings settings{.epsilon = 5e-3};
    validate(part, catalogue, settings);
    SizingProblem problem(part, catalogue, settings);
    std::vector<std::uint32_t> all;
    for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
      all.push_back(m);
    }
    const auto dominance = find_dominance(problem, all, true);
    replaced += dominance.replaced;
    std::map<std::uint32_t, Solved> solved;
    const auto points_of = [&](std::uint32_t m) {
      const auto entry = solved.find(m);
      const auto& one =
          entry != solved.end()
              ? entry->second
              : solved.emplace(m, solve_candidates(part, catalogue, settings, {}, m)).first->second;
      std::vector<Outcome::Point> out;
      for (const auto& outcome : one.outcomes) {
        out.insert(out.end(), outcome.points.begin(), outcome.points.end());
      }
      return out;
    };
    for (const auto m : all) {
      if (dominance.by[m] == Dominance::none) {
        continue;
      }
      CHECK(dominance.by[dominance.by[m]] == Dominance::none);
      const auto by = points_of(dominance.by[m]);
      const double factor = 1.0 + (free ? settings.epsilon : 0.0) + 2e-9;
      for (const auto& point : points_of(m)) {
        CAPTURE(turn, m, dominance.by[m], point.mass, point.cost);
        CHECK(std::any_of(by.begin(), by.end(), [&](const auto& other) {
          return other.mass <= factor * point.mass && other.cost <= factor * point.cost;
        }));
        ++points;
      }
    }
  }
  CHECK(replaced > 50);
  CHECK(points > 200);
}

TEST_CASE("no random design with a margin is better than the front by more than epsilon") {
  std::mt19937 random(5103);
  const auto& catalogue = test::starter();
  const Settings settings{.epsilon = 3e-3};
  constexpr double sheets[] = {1e-3, 1.5e-3, 2e-3, 3e-3, 4e-3, 5e-3, 6e-3, 8e-3, 10e-3};
  std::size_t designs = 0;
  std::size_t close = 0;
  const auto shapes = free_shapes();
  for (const auto& shape : shapes) {
    Part part = lever({shape});
    if (&shape - shapes.data() >= 5) {
      // Open sections give way when twisted: a plain lever, for more parts.
      part.body.load_cases = {cantilever({force(300.0, 0.3)}, "bending")};
      part.limits.twist.reset();
      part.quantity = 20000.0;
    }
    const Result result = front(part, catalogue, settings);
    CHECK(result.epsilon_reached <= settings.epsilon);
    SizingProblem problem(part, catalogue, settings);
    std::vector<double> objectives(2);
    std::size_t of_shape = 0;
    /// Feasible with a margin: counted and compared.
    const auto is_feasible = [&](const Candidate& candidate, double size, const FreeSizes& free) {
      bool good = false;
      try {
        const auto& own = problem.add(candidate, size, free);
        const auto listed = listed_size(own.variable, size);
        if (listed && own.undecided.empty() && own.undecided_limits.empty()) {
          std::vector<double> u(own.constraints.size());
          problem.evaluate_plain(problem.groups() - 1, *listed, objectives, u);
          good = all_within(u, allowed);
        }
        problem.remove_last();
      } catch (const Error&) {
        while (problem.groups() > 0) {
          problem.remove_last();
        }
        return false;  // no section of these proportions
      }
      if (good) {
        ++of_shape;
        bool is_close = false;
        const bool covered =
            std::any_of(result.designs.begin(),
                        result.designs.begin() + static_cast<std::ptrdiff_t>(result.front_count),
                        [&](const Design& design) {
                          is_close = is_close || (objectives[0] <= 1.05 * design.mass &&
                                                  objectives[1] <= 1.05 * design.cost);
                          return design.mass <= (1.0 + settings.epsilon) * objectives[0] &&
                                 design.cost <= (1.0 + settings.epsilon) * objectives[1];
                        });
        close += is_close ? 1U : 0U;
        INFO(names(candidate, part, catalogue).material
             << " " << names(candidate, part, catalogue).shape << " "
             << names(candidate, part, catalogue).route);
        CAPTURE(size, free[0], free[1], free[2], objectives[0], objectives[1]);
        CHECK(covered);
      }
      return good;
    };
    Enumeration enumeration(part, catalogue);
    const auto dimensions_free = free_dimensions(shape);
    for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
      for (Candidate candidate : enumeration.of(m).candidates) {
        candidate.material = m;
        const bool sheet = takes_sheet_thickness(catalogue.routes[candidate.route]);
        for (int throws = 0; throws < 600; ++throws) {
          double high = between(shape.height_min, shape.height_max, random);
          const auto at_one = random_free(shape, 1.0, random);
          const auto scaled = [&](double height) {
            FreeSizes out = at_one;
            for (auto& size : out) {
              size *= height;
            }
            return out;
          };
          if (sheet) {
            // The wall, or of a flat part the smaller dimension, is that of a sheet.
            const double thickness =
                sheets[std::uniform_int_distribution<std::size_t>(0, 8)(random)];
            const std::size_t wall = dimensions_free.size() - 1;
            high = shape.family == SectionFamily::solid_rectangle && at_one[0] > 1.0
                       ? thickness
                       : thickness / at_one[wall];
          }
          if (!(high >= shape.height_min && high <= shape.height_max) ||
              !is_usual(shape, high, scaled(high)) || !is_feasible(candidate, high, scaled(high)) ||
              sheet) {
            continue;
          }
          // Down to the least height of these proportions, near which the front is.
          double low = shape.height_min;
          for (int step = 0; step < 14; ++step) {
            const double middle = std::sqrt(low * high);
            (is_feasible(candidate, middle, scaled(middle)) ? high : low) = middle;
          }
        }
      }
      problem.forget(m);
    }
    INFO(name(shape.family));
    CHECK(of_shape > 30);
    designs += of_shape;
  }
  CAPTURE(designs, close);
  CHECK(designs > 5000);
  CHECK(close > 50);
}
