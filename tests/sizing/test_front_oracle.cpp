// SPDX-License-Identifier: MIT
// Brute force beside the front: every candidate of every combination, every size of a list or a
// dense grid.
#include "sizing/small_catalogue.hpp"
#include "support/catch.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>
#include <set>

using namespace bismar;

namespace {

struct Feasible {
  double mass;
  double cost;
};

/// All combinations by plain loops, with the rules asked one by one through the public function.
std::vector<Candidate> all_candidates(const Part& part, const Catalogue& catalogue) {
  std::vector<Candidate> out;
  for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
    for (std::uint32_t r = 0; r < catalogue.routes.size(); ++r) {
      for (std::uint32_t t = 0; t <= catalogue.routes.size(); ++t) {
        for (std::uint32_t s = 0; s < part.body.shapes.size() + catalogue.stock.size(); ++s) {
          for (std::uint32_t f = 0; f <= catalogue.finishes.size(); ++f) {
            Candidate one;
            one.material = m;
            one.route = r;
            one.treatment = t < catalogue.routes.size() ? t : Candidate::none;
            const bool stock = s >= part.body.shapes.size();
            one.shape = stock ? Candidate::none : s;
            one.stock =
                stock ? s - static_cast<std::uint32_t>(part.body.shapes.size()) : Candidate::none;
            one.finish = f < catalogue.finishes.size() ? f : Candidate::none;
            if (catalogue.routes[r].kind == RouteKind::primary &&
                !first_broken_rule(one, part, catalogue)) {
              out.push_back(one);
            }
          }
        }
      }
    }
  }
  return out;
}

bool feasible(const Design& design) {
  return std::all_of(design.utilisations.begin(),
                     design.utilisations.end(),
                     [](const Utilisation& u) { return u.value <= 1.0; });
}

std::vector<double> grid(const Part& part, const Catalogue& catalogue, const Candidate& candidate) {
  if (candidate.stock != Candidate::none) {
    std::vector<double> out(catalogue.stock[candidate.stock].items.size());
    for (std::size_t i = 0; i < out.size(); ++i) {
      out[i] = static_cast<double>(i);
    }
    return out;
  }
  const auto& shape = part.body.shapes[candidate.shape];
  if (shape.sizes.kind == Sizes::Kind::list) {
    return shape.sizes.values;
  }
  std::vector<double> out;
  constexpr int count = 300;
  for (int i = 0; i <= count; ++i) {
    out.push_back(shape.height_min *
                  std::pow(shape.height_max / shape.height_min, i / double{count}));
  }
  return out;
}

std::vector<Feasible> brute_force(const Part& part, const Catalogue& catalogue) {
  std::vector<Feasible> out;
  for (const auto& candidate : all_candidates(part, catalogue)) {
    for (const double size : grid(part, catalogue, candidate)) {
      try {
        const auto design = evaluate(part, catalogue, candidate, size);
        if (feasible(design)) {
          out.push_back({design.mass, design.cost});
        }
      } catch (const Error&) {
        // Beyond the tabulated thickness or the largest blank: no design there.
      }
    }
  }
  return out;
}

/// Non-dominated points by comparing every pair.
std::multiset<std::pair<double, double>> brute_front(const std::vector<Feasible>& points) {
  std::multiset<std::pair<double, double>> out;
  for (const auto& a : points) {
    const bool dominated = std::any_of(points.begin(), points.end(), [&](const Feasible& b) {
      return b.mass <= a.mass && b.cost <= a.cost && (b.mass < a.mass || b.cost < a.cost);
    });
    if (!dominated) {
      out.insert({a.mass, a.cost});
    }
  }
  return out;
}

}  // namespace

TEST_CASE("on lists of sizes the front equals brute force, ties included") {
  std::mt19937 random(7);
  std::size_t ties = 0;
  std::size_t points = 0;
  for (int round = 0; round < 60; ++round) {
    const auto catalogue = test::random_catalogue(random, 7);
    auto part = test::random_part(random);
    for (auto& shape : part.body.shapes) {
      shape.sizes = Sizes::of({0.010, 0.015, 0.020, 0.025, 0.030, 0.040, 0.060});
      shape.height_max = 0.1;
    }
    const auto expected = brute_front(brute_force(part, catalogue));
    const auto result = front(part, catalogue);
    std::multiset<std::pair<double, double>> found;
    for (std::size_t i = 0; i < result.front_count; ++i) {
      found.insert({result.designs[i].mass, result.designs[i].cost});
    }
    INFO("round " << round);
    CHECK(found == expected);
    points += found.size();
    ties += found.size() - std::set(found.begin(), found.end()).size();
  }
  CHECK(points > 100);
  CHECK(ties > 10);
}

TEST_CASE("on free sizes no point of a dense grid escapes the front") {
  std::mt19937 random(11);
  std::size_t covered = 0;
  for (int round = 0; round < 12; ++round) {
    const auto catalogue = test::random_catalogue(random, 4);
    const auto part = test::random_part(random);
    const auto result = front(part, catalogue);
    for (const auto& point : brute_force(part, catalogue)) {
      const bool is_covered =
          std::any_of(result.designs.begin(),
                      result.designs.begin() + static_cast<std::ptrdiff_t>(result.front_count),
                      [&](const Design& design) {
                        return design.mass <= point.mass * (1.0 + 2e-9) &&
                               design.cost <= point.cost * (1.0 + 2e-9);
                      });
      CHECK(is_covered);
      ++covered;
    }
  }
  CHECK(covered > 1000);
}
