// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>

#include "solver/cover.hpp"
#include "solver/power_problem.hpp"
#include "solver/random_posynomials.hpp"
#include "support/catch.hpp"

#include <atomic>
#include <functional>
#include <limits>
#include <numeric>
#include <string>

using namespace bismar;
using namespace bismar::test;

namespace {

PosynomialProblem many_groups(unsigned seed, std::size_t objectives, std::size_t count) {
  PosynomialMaker make(seed);
  PosynomialProblem out;
  for (std::size_t g = 0; g < count; ++g) {
    out.all.push_back(make.group(objectives, make.continuous(1 + g % 2)));
    if (g % 5 == 0) {
      out.all.push_back(out.all.back());  // equal groups make ties
    }
    if (g % 7 == 0) {
      make.add_step(out.all.back());
    }
    if (g % 6 == 3) {
      // One number that both objectives rise with: a single point, polished.
      auto& objectives_of = out.all.back().objectives;
      for (auto& objective : objectives_of) {
        objective = objectives_of.front();
      }
      objectives_of.back().shift = 0.5;
      out.all.back().agree = true;
    }
  }
  return out;
}

/// A point without the number of its group.
struct Plain {
  std::vector<double> objectives;
  std::vector<double> x;
  std::vector<double> utilisations;
  bool operator==(const Plain&) const = default;
  bool operator<(const Plain& other) const {
    return objectives != other.objectives ? objectives < other.objectives : x < other.x;
  }
};

std::vector<Plain> plain(const std::vector<CertifiedPoint>& points) {
  std::vector<Plain> out;
  for (const auto& point : points) {
    out.push_back({point.objectives, point.x, point.utilisations});
  }
  std::sort(out.begin(), out.end());
  return out;
}

bool same_points(const std::vector<CertifiedPoint>& a, const std::vector<CertifiedPoint>& b) {
  return std::equal(a.begin(), a.end(), b.begin(), b.end(), [](const auto& p, const auto& q) {
    return p.group == q.group && p.x == q.x && p.objectives == q.objectives &&
           p.utilisations == q.utilisations;
  });
}

std::vector<std::string> places(const std::function<void()>& call) {
  std::vector<std::string> out;
  try {
    call();
  } catch (const Error& error) {
    for (const auto& fault : error.faults()) {
      out.push_back(fault.where);
    }
  }
  return out;
}

/// y - 1 over [0.5, 2]: an objective that reaches zero and falls below.
class ReachesZero : public PowerProblem {
 public:
  ReachesZero() : PowerProblem({{{0.1, -1.0}}}, 0.5, 2.0) {}
  void evaluate(std::size_t /*group*/,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    objectives[0] = x[0] - offset;
    objectives[1] = x[0];
    utilisations[0] = 0.1 / x[0];
  }
  double offset = 1.0;
};

}  // namespace

TEST_CASE("the front is the same for any number of threads, with and without skipping") {
  for (unsigned seed = 1; seed <= 6; ++seed) {
    const auto problem = many_groups(seed, 1 + seed % 3, 30);
    const auto expected = certified_front(problem, {.epsilon = 1e-2, .skipping = false});
    REQUIRE_FALSE(expected.points.empty());
    CHECK(expected.counts.skipped == 0);
    std::size_t skipped = 0;
    for (const unsigned threads : {1U, 2U, 5U}) {
      const auto front = certified_front(problem, {.epsilon = 1e-2, .threads = threads});
      CHECK(same_points(front.points, expected.points));
      CHECK(same_points(front.near_points, expected.near_points));
      CHECK(front.complete);
      CHECK(front.epsilon_reached <= 1e-2);
      skipped += front.counts.skipped;
      const auto& c = front.counts;
      CHECK(c.solved + c.infeasible + c.skipped + c.incomplete == problem.groups());
    }
    CHECK(skipped > 0);
  }
}

TEST_CASE("the order of the groups changes their numbers only") {
  for (unsigned seed = 11; seed <= 16; ++seed) {
    auto problem = many_groups(seed, 2, 25);
    const auto expected = certified_front(problem, {.epsilon = 1e-2});
    PosynomialMaker shuffler(seed);
    std::shuffle(problem.all.begin(), problem.all.end(), shuffler.engine());
    const auto front = certified_front(problem, {.epsilon = 1e-2});
    CHECK(plain(front.points) == plain(expected.points));
    CHECK(plain(front.near_points) == plain(expected.near_points));
  }
}

TEST_CASE("the answer is the non-dominated part of what the groups give alone, and what is near") {
  for (unsigned seed = 21; seed <= 26; ++seed) {
    const std::size_t k = 1 + seed % 4;
    const auto problem = many_groups(seed, k, 20);
    const CertifyOptions options{.epsilon = 2e-2, .near = 0.05};
    std::vector<CertifiedPoint> all;
    for (std::size_t g = 0; g < problem.groups(); ++g) {
      const auto own = certified_group(problem, g, options);
      all.insert(all.end(), own.points.begin(), own.points.end());
    }
    std::vector<CertifiedPoint> kept;
    std::copy_if(all.begin(), all.end(), std::back_inserter(kept), [&](const auto& p) {
      return std::none_of(all.begin(), all.end(), [&](const auto& q) {
        return dominates_objectives(q.objectives, p.objectives);
      });
    });
    std::vector<CertifiedPoint> close;
    std::copy_if(all.begin(), all.end(), std::back_inserter(close), [&](const auto& p) {
      const bool on_front = std::any_of(
          kept.begin(), kept.end(), [&](const auto& q) { return q.objectives == p.objectives; });
      const bool beyond = std::any_of(kept.begin(), kept.end(), [&](const auto& q) {
        for (std::size_t j = 0; j < k; ++j) {
          if (!(q.objectives[j] + 0.05 * std::abs(q.objectives[j]) < p.objectives[j])) {
            return false;
          }
        }
        return true;
      });
      return !on_front && !beyond;
    });
    const auto front = certified_front(problem, options);
    CHECK(plain(front.points) == plain(kept));
    CHECK(plain(front.near_points) == plain(close));
    CHECK(
        std::is_sorted(front.points.begin(), front.points.end(), [](const auto& a, const auto& b) {
          return a.objectives != b.objectives ? a.objectives < b.objectives : a.group < b.group;
        }));
  }
}

TEST_CASE("equal groups are ties and both kept") {
  auto problem = many_groups(5, 2, 1);
  REQUIRE(problem.groups() == 2);
  problem.all[1] = problem.all[0];
  const auto front = certified_front(problem, {.epsilon = 1e-2});
  REQUIRE(front.points.size() >= 2);
  CHECK(front.points.size() % 2 == 0);
  CHECK(front.points[0].objectives == front.points[1].objectives);
  CHECK(front.points[0].group == 0);
  CHECK(front.points[1].group == 1);
}

TEST_CASE("every reduction keeps the promise alone and together") {
  PosynomialMaker make(31);
  std::size_t wrong = 0;
  std::size_t solved = 0;
  for (int round = 0; round < 60; ++round) {
    PosynomialProblem problem;
    problem.all.push_back(make.group(2, make.continuous(2)));
    if (round % 2 == 0) {
      problem.all[0].objectives[1] = problem.all[0].objectives[0];
      problem.all[0].objectives[1].shift = 1.0;
      problem.all[0].agree = true;
    }
    for (const bool one_point : {false, true}) {
      for (const bool directions : {false, true}) {
        const CertifyOptions options{
            .epsilon = 1e-2, .one_point = one_point, .directions = directions};
        const auto front = certified_group(problem, 0, options);
        wrong += violations(problem, 0, front, options, 60);
        solved += front.state == GroupState::solved ? 1U : 0U;
        wrong += one_point && problem.all[0].agree && front.points.size() > 1 ? 1U : 0U;
      }
    }
  }
  CHECK(wrong == 0);
  CHECK(solved > 100);
}

TEST_CASE("few boxes kept change the order of the search and not the promise") {
  PosynomialMaker make(41);
  std::size_t wrong = 0;
  for (int round = 0; round < 60; ++round) {
    PosynomialProblem problem;
    problem.all.push_back(make.group(2, make.continuous(2)));
    const CertifyOptions options{.epsilon = 1e-2,
                                 .boxes_kept = 1U + static_cast<unsigned>(round % 4)};
    wrong += violations(problem, 0, certified_group(problem, 0, options), options, 50);
  }
  CHECK(wrong == 0);
}

TEST_CASE("out of boxes a group says what it reached, and the grid agrees") {
  PosynomialMaker make(51);
  std::size_t incomplete = 0;
  std::size_t finite = 0;
  for (int round = 0; round < 60; ++round) {
    PosynomialProblem problem;
    problem.all.push_back(make.group(2, make.continuous(2)));
    const auto front = certified_group(problem, 0, {.epsilon = 1e-4, .boxes_per_group = 200});
    if (front.state != GroupState::incomplete) {
      continue;
    }
    ++incomplete;
    CHECK(front.epsilon_reached > 1e-4);
    CHECK(front.boxes >= 200);
    CHECK(front.boxes < 220);
    if (std::isfinite(front.epsilon_reached)) {
      ++finite;
      CertifyOptions reached;
      reached.epsilon = front.epsilon_reached * (1.0 + 1e-12);
      CHECK(violations(problem, 0, front, reached, 60) == 0);
    }
  }
  CHECK(incomplete > 10);
  CHECK(finite > 10);
}

TEST_CASE("a constraint that alone excludes a group is named with its least value") {
  // u_1 = 5 / x is at least 5 / 2 on [0.1, 2]; u_0 = 1 / x can be met.
  const PowerProblem alone({{{1.0, -1.0}, {5.0, -1.0}}}, 0.1, 2.0);
  const auto excluded = certified_group(alone, 0);
  CHECK(excluded.state == GroupState::infeasible);
  CHECK(excluded.excluded_by == 1);
  CHECK(excluded.least_utilisation == Approx(2.5));
  CHECK(excluded.least_utilisation <= 2.5);
  // x >= 2 and x <= 1: each alone can be met.
  const PowerProblem together({{{2.0, -1.0}, {1.0, 1.0}}}, 0.1, 10.0);
  const auto clash = certified_group(together, 0);
  CHECK(clash.state == GroupState::infeasible);
  CHECK(clash.excluded_by == no_index);
}

TEST_CASE("an objective that can reach zero needs an absolute tolerance") {
  const ReachesZero problem;
  CHECK(places([&] { (void)certified_group(problem, 0); }) ==
        std::vector<std::string>{"absolute[0]"});
  const auto front = certified_group(problem, 0, {.epsilon = 1e-3, .absolute = {1e-3, 0.0}});
  REQUIRE(front.points.size() == 1);
  CHECK(front.points[0].objectives[0] == Approx(-0.5));
  // The same without a size to solve for.
  CHECK(places([&] { (void)certified_group(problem, 0, {.directions = false}); }) ==
        std::vector<std::string>{"absolute[0]"});
  // Sets are finite: nothing has to be cut ever finer.
  const PowerProblem set({{{0.1, -1.0}}}, std::vector<double>{1.0, 2.0});
  CHECK(certified_group(set, 0, {.epsilon = 0.0}).state == GroupState::solved);
}

TEST_CASE("all faults of options and variables are told at once") {
  PosynomialProblem problem = many_groups(1, 2, 1);
  auto& variable = problem.all[0].variables[0];
  variable.lower = 5.0;
  CertifyOptions options;
  options.epsilon = 1.0;
  options.delta = -0.1;
  options.near = -1.0;
  options.absolute = {1.0};
  options.boxes_per_group = 0;
  options.boxes_kept = 0;
  CHECK(places([&] { (void)certified_group(problem, 0, options); }) ==
        std::vector<std::string>{"epsilon",
                                 "delta",
                                 "near",
                                 "absolute",
                                 "boxes_per_group",
                                 "boxes_kept",
                                 "groups[0].variables[0]"});
  CHECK(places([&] { (void)certified_group(problem, 99); }) == std::vector<std::string>{"group"});
  variable = between(1.0, 2.0);
  CHECK(places([&] { (void)certified_front(problem, {.epsilon = 0.0}); }).front() == "epsilon");
  const auto refused = [&](const Variable& bad) {
    problem.all[0].variables[0] = bad;
    return places([&] { (void)certified_group(problem, 0); }) ==
           std::vector<std::string>{"groups[0].variables[0]"};
  };
  CHECK(refused(whole(1.2, 1.8)));
  CHECK(refused(whole(1.0, 1e17)));
  CHECK(refused(between(1.0, std::numeric_limits<double>::infinity())));
  auto set = one_of_values({1.0, 2.0});
  set.values = {2.0, 1.0};
  CHECK(refused(set));
  set.values.clear();
  CHECK(refused(set));
  auto broken = between(1.0, 2.0);
  broken.breakpoints = {2.0};
  CHECK(refused(broken));
}

TEST_CASE("after a stop the front says that it is not complete") {
  const auto problem = many_groups(3, 2, 10);
  std::stop_source source;
  source.request_stop();
  const auto none = certified_front(problem, {.stop = source.get_token()});
  CHECK_FALSE(none.complete);
  CHECK(none.points.empty());
  CHECK(none.counts.incomplete == problem.groups());
  CHECK(none.epsilon_reached == std::numeric_limits<double>::infinity());
}

TEST_CASE("progress rises to 1, one call at a time") {
  const auto problem = many_groups(4, 2, 20);
  std::vector<double> shares;
  std::atomic<int> inside = 0;
  bool alone = true;
  CertifyOptions options{.epsilon = 1e-2, .threads = 3};
  options.progress = [&](double share) {
    alone = alone && ++inside == 1;
    shares.push_back(share);
    --inside;
  };
  (void)certified_front(problem, options);
  REQUIRE_FALSE(shares.empty());
  CHECK(alone);
  CHECK(std::is_sorted(shares.begin(), shares.end()));
  CHECK(shares.back() == 1.0);
}

TEST_CASE("a problem without groups has an empty, complete front") {
  class None : public PowerProblem {
   public:
    None() : PowerProblem({}, 1.0, 2.0) {}
  };
  const auto front = certified_front(None{});
  CHECK(front.complete);
  CHECK(front.points.empty());
}
