// SPDX-License-Identifier: MIT
// Evolutionary search and the certified front on one and the same problem: how long until a share
// of the certified hypervolume is reached.
//
// The problem: the demo lever in all materials and routes of the starter table, as rectangle,
// ellipse, round tube and rectangular tube with free ratios; every (candidate, mode) is a group,
// which the evolutionary algorithms see as a categorical variable.
//
// Hypervolume: objectives are divided by the reference point, 1.1 times the largest mass and the
// largest cost on the certified front, so that its box is the unit square. The true front's
// hypervolume lies between that of the certified points (rows "certified", "hypervolume") and that
// of the same points divided by 1 + epsilon ("hypervolume_at_most", for designs whose utilisations
// are all <= 1 - delta); shares are taken of the former.
//
// A share is reached at the evaluation that brings the set of all feasible points met so far to it:
// the problem itself watches, so no trace is needed. Times are processor times of the one thread at
// work, watching and the making of the population included.
#include "inputs.hpp"
#include "sizing/enumeration.hpp"
#include "sizing/free_problem.hpp"
#include "sizing/shape_section.hpp"

#include <benchmark/benchmark.h>

#include <bismar/evolve/evolve.hpp>
#include <bismar/sizing/front.hpp>
#include <bismar/solver/certified_front.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>
#include <ctime>
#include <iterator>
#include <limits>
#include <memory>
#include <set>
#include <span>
#include <stop_token>
#include <string>
#include <vector>

namespace bismar::benchmarks {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();
constexpr std::array shares = {0.9, 0.99, 0.999};
constexpr std::array<const char*, 3> share_names = {"90", "99", "99.9"};
constexpr std::uint32_t seeds = 9;

double processor_seconds() {
  return static_cast<double>(std::clock()) / static_cast<double>(CLOCKS_PER_SEC);
}

Part free_lever() {
  const ShapeOptions all_free = {.height_min = 8e-3, .height_max = 80e-3};
  Part part;
  part.name = "crank lever";
  part.quantity = 10'000.0;
  part.body.length = 0.3;
  part.body.shapes = {
      rectangle(all_free), ellipse(all_free), round_tube(all_free), rectangular_tube(all_free)};
  part.body.load_cases = {cantilever({force(655.0, 0.3)}, "tightening")};
  part.limits.deflection = 12e-3;
  return part;
}

/// All modes of all candidates of a part side by side. Asks every question of the mode's own
/// problem.
class AllModes : public BoxProblem {
 public:
  AllModes(const Part& part, const Catalogue& catalogue)
      : sizing_(part, catalogue, settings_), part_(part) {
    Enumeration enumeration(part, catalogue);
    for (std::uint32_t m = 0; m < catalogue.materials.size(); ++m) {
      for (Candidate candidate : enumeration.of(m).candidates) {
        candidate.material = m;
        add(candidate);
      }
    }
  }

  [[nodiscard]] std::size_t groups() const override { return groups_.size(); }
  [[nodiscard]] std::size_t objectives() const override { return 2; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t g) const override {
    return of(g).variables(groups_[g].mode);
  }
  [[nodiscard]] std::size_t constraints(std::size_t g) const override {
    return of(g).constraints(groups_[g].mode);
  }
  [[nodiscard]] Trend objective_trend(std::size_t g, std::size_t i, std::size_t v) const override {
    return of(g).objective_trend(groups_[g].mode, i, v);
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t g,
                                        std::size_t i,
                                        std::size_t v) const override {
    return of(g).utilisation_trend(groups_[g].mode, i, v);
  }
  void evaluate(std::size_t g,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    of(g).evaluate(groups_[g].mode, x, objectives, utilisations);
  }
  void bound(std::size_t g, const BoxBatch& boxes, BoundBatch bounds) const override {
    of(g).bound(groups_[g].mode, boxes, bounds);
  }
  [[nodiscard]] std::uint32_t size_direction(std::size_t g) const override {
    return of(g).size_direction(groups_[g].mode);
  }
  [[nodiscard]] bool objectives_agree(std::size_t g) const override {
    return of(g).objectives_agree(groups_[g].mode);
  }
  void contract(std::size_t g, double allowed, ContractBatch boxes) const override {
    of(g).contract(groups_[g].mode, allowed, boxes);
  }
  [[nodiscard]] bool settle(std::size_t g,
                            std::span<double> x,
                            double lower,
                            double upper) const override {
    return of(g).settle(groups_[g].mode, x, lower, upper);
  }

 private:
  struct Group {
    std::size_t problem = 0;
    std::size_t mode = 0;
  };

  void add(const Candidate& candidate) {
    const auto& base =
        sizing_.add(candidate, 1.0, middle_sizes(part_.body.shapes[candidate.shape]));
    auto problem = std::make_unique<const FreeSizeProblem>(sizing_, base);
    if (!problem->missing().empty() || !problem->open_limits().empty()) {
      sizing_.remove_last();
      return;
    }
    for (std::size_t mode = 0; mode < problem->groups(); ++mode) {
      groups_.push_back({problems_.size(), mode});
    }
    problems_.push_back(std::move(problem));
  }
  [[nodiscard]] const FreeSizeProblem& of(std::size_t g) const {
    return *problems_[groups_[g].problem];
  }

  Settings settings_;
  SizingProblem sizing_;
  const Part& part_;
  std::vector<std::unique_ptr<const FreeSizeProblem>> problems_;
  std::vector<Group> groups_;
};

/// A front of two objectives that grows, with its hypervolume inside the unit square.
class Staircase {
 public:
  /// @return whether the point is on the front and inside the square.
  bool add(double x, double y) {
    if (!(x < 1.0 && y < 1.0)) {
      return false;
    }
    const auto at =
        std::upper_bound(steps_.begin(), steps_.end(), x, [](double value, const Step& step) {
          return value < step.x;
        });
    if (at != steps_.begin() && std::prev(at)->y <= y) {
      return false;
    }
    auto from = at != steps_.begin() && std::prev(at)->x == x ? std::prev(at) : at;
    auto to = from;
    while (to != steps_.end() && to->y >= y) {
      ++to;
    }
    steps_.insert(steps_.erase(from, to), {x, y});
    return true;
  }
  [[nodiscard]] double hypervolume() const {
    double sum = 0.0;
    for (std::size_t i = 0; i < steps_.size(); ++i) {
      const double next = i + 1 < steps_.size() ? steps_[i + 1].x : 1.0;
      sum += (next - steps_[i].x) * (1.0 - steps_[i].y);
    }
    return sum;
  }

 private:
  struct Step {
    double x = 0.0;
    double y = 0.0;
  };
  std::vector<Step> steps_;  // x rises, y falls
};

/// What there is to reach.
struct Target {
  std::vector<double> reference;
  double hypervolume = 0.0;
  double hypervolume_at_most = 0.0;
  std::vector<std::size_t> groups;  ///< Those on the front.
};

/// The problem as an evolutionary search sees it: evaluate alone, and a stop when the last share is
/// reached or the time is up. One thread at a time.
class Watched : public BoxProblem {
 public:
  Watched(const BoxProblem& problem, const Target& target, double seconds_at_most)
      : problem_(problem),
        target_(target),
        start_(processor_seconds()),
        seconds_at_most_(seconds_at_most) {
    reached_.fill(infinity);
  }

  [[nodiscard]] std::size_t groups() const override { return problem_.groups(); }
  [[nodiscard]] std::size_t objectives() const override { return 2; }
  [[nodiscard]] std::span<const Variable> variables(std::size_t g) const override {
    return problem_.variables(g);
  }
  [[nodiscard]] std::size_t constraints(std::size_t g) const override {
    return problem_.constraints(g);
  }
  [[nodiscard]] Trend objective_trend(std::size_t g, std::size_t i, std::size_t v) const override {
    return problem_.objective_trend(g, i, v);
  }
  [[nodiscard]] Trend utilisation_trend(std::size_t g,
                                        std::size_t i,
                                        std::size_t v) const override {
    return problem_.utilisation_trend(g, i, v);
  }
  void evaluate(std::size_t g,
                std::span<const double> x,
                std::span<double> objectives,
                std::span<double> utilisations) const override {
    problem_.evaluate(g, x, objectives, utilisations);
    // The clock is asked now and then only: it takes about as long as an evaluation.
    if (++evaluations_ % 256 == 0 && processor_seconds() - start_ > seconds_at_most_) {
      stop_.request_stop();
    }
    const bool feasible = std::ranges::all_of(utilisations, [](double u) { return u <= 1.0; });
    if (feasible &&
        front_.add(objectives[0] / target_.reference[0], objectives[1] / target_.reference[1])) {
      note();
    }
  }

  [[nodiscard]] std::stop_token stop() const { return stop_.get_token(); }
  /// Seconds until each share was reached; infinity where it was not.
  [[nodiscard]] const std::array<double, shares.size()>& reached() const { return reached_; }
  [[nodiscard]] double hypervolume() const { return front_.hypervolume(); }
  [[nodiscard]] double share() const { return hypervolume() / target_.hypervolume; }
  [[nodiscard]] std::size_t evaluations() const { return evaluations_; }

 private:
  void note() const {
    const double now = share();
    for (std::size_t i = 0; i < shares.size(); ++i) {
      if (now >= shares[i] && reached_[i] == infinity) {
        reached_[i] = processor_seconds() - start_;
        if (i + 1 == shares.size()) {
          stop_.request_stop();
        }
      }
    }
  }

  const BoxProblem& problem_;
  const Target& target_;
  double start_;
  double seconds_at_most_;
  // A search sees its problem through const members only.
  mutable Staircase front_;
  mutable std::array<double, shares.size()> reached_{};
  mutable std::size_t evaluations_ = 0;
  mutable std::stop_source stop_;
};

const AllModes& all_modes() {
  static const Part part = free_lever();
  static const AllModes problem(part, starter());
  return problem;
}

/// Only the front itself is asked for.
CertifyOptions certify_options() { return {.near = 0.0, .explain = false}; }

Target make_target(const CertifiedFront& found) {
  Target target;
  target.reference = {0.0, 0.0};
  std::set<std::size_t> groups;
  for (const auto& point : found.points) {
    for (std::size_t j = 0; j < 2; ++j) {
      target.reference[j] = std::max(target.reference[j], 1.1 * point.objectives[j]);
    }
    groups.insert(point.group);
  }
  target.groups.assign(groups.begin(), groups.end());
  Staircase front;
  Staircase best;
  const double better = 1.0 + certify_options().epsilon;
  for (const auto& point : found.points) {
    const double x = point.objectives[0] / target.reference[0];
    const double y = point.objectives[1] / target.reference[1];
    front.add(x, y);
    best.add(x / better, y / better);
  }
  target.hypervolume = front.hypervolume();
  target.hypervolume_at_most = best.hypervolume();
  return target;
}

const Target& the_target() {
  static const Target target = make_target(certified_front(all_modes(), certify_options()));
  return target;
}

void certified(benchmark::State& state) {
  const auto& problem = all_modes();
  CertifiedFront found;
  for (auto _ : state) {
    found = certified_front(problem, certify_options());
    benchmark::DoNotOptimize(&found);
  }
  if (!found.complete) {
    state.SkipWithError("a group ran out of boxes");
  }
  const auto target = make_target(found);
  std::vector<double> costs;
  for (const auto& point : found.points) {
    costs.push_back(point.objectives[1]);
  }
  state.counters["n"] = static_cast<double>(problem.groups());
  state.counters["size"] = static_cast<double>(found.points.size());
  state.counters["checksum"] = checksum(costs);
  state.counters["evaluations"] = static_cast<double>(found.counts.evaluations);
  state.counters["boxes"] = static_cast<double>(found.counts.boxes);
  state.counters["reference_mass"] = target.reference[0];
  state.counters["reference_cost"] = target.reference[1];
  state.counters["hypervolume"] = target.hypervolume;
  state.counters["hypervolume_at_most"] = target.hypervolume_at_most;
}

/// From part and tables: making the candidates ready and all reductions included.
void certified_from_part(benchmark::State& state) {
  const auto part = free_lever();
  const auto& catalogue = starter();
  const Settings settings = {.near = 0.0};
  Result result;
  for (auto _ : state) {
    result = front(part, catalogue, settings);
    benchmark::DoNotOptimize(&result);
  }
  const auto& target = the_target();
  Staircase reached;
  std::vector<double> costs;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    const auto& design = result.designs[i];
    reached.add(design.mass / target.reference[0], design.cost / target.reference[1]);
    costs.push_back(design.cost);
  }
  const double hypervolume = reached.hypervolume();
  // Both keep the promise, so that neither has more than the other could have at most.
  const double better = target.hypervolume_at_most / target.hypervolume;
  if (!(hypervolume <= target.hypervolume_at_most * (1.0 + 1e-5) &&
        target.hypervolume <= hypervolume * better * (1.0 + 1e-5))) {
    state.SkipWithError("the front of the part is not that of the same problem");
  }
  state.counters["n"] = static_cast<double>(result.funnel.considered);
  state.counters["size"] = static_cast<double>(result.front_count);
  state.counters["checksum"] = checksum(costs);
  state.counters["evaluations"] = static_cast<double>(result.telemetry.evaluations);
  state.counters["hypervolume"] = hypervolume;
}

struct Contest {
  EvolveAlgorithm algorithm;
  std::size_t population;
  bool knows_groups;  ///< It is told which groups are on the front, and searches these alone.
  double seconds_at_most;
};

void evolutionary(benchmark::State& state, const Contest& contest) {
  const auto& problem = all_modes();
  const auto& target = the_target();
  std::array<std::vector<double>, shares.size()> times;
  std::vector<double> ends;
  std::size_t evaluations = 0;
  for (auto _ : state) {
    for (std::uint32_t seed = 1; seed <= seeds; ++seed) {
      const Watched watched(problem, target, contest.seconds_at_most);
      EvolveOptions options = {.algorithm = contest.algorithm,
                               .population = contest.population,
                               .generations = 1'000'000'000,
                               .seed = seed,
                               .trace_every = 1'000'000'000,  // the first and the last
                               .reference = target.reference,
                               .stop = watched.stop()};
      if (contest.knows_groups) {
        options.groups = target.groups;
      }
      const auto found = evolve(watched, options);
      // The search has the hypervolume of all that it met from the peer library.
      const double theirs =
          found.trace.back().hypervolume / (target.reference[0] * target.reference[1]);
      if (!(std::abs(theirs - watched.hypervolume()) <= 1e-9)) {
        state.SkipWithError("the hypervolume watched is not that of the points found");
      }
      for (std::size_t i = 0; i < shares.size(); ++i) {
        times[i].push_back(watched.reached()[i]);
      }
      ends.push_back(watched.share());
      evaluations += watched.evaluations();
    }
  }
  state.counters["n"] =
      static_cast<double>(contest.knows_groups ? target.groups.size() : problem.groups());
  state.counters["evaluations"] = static_cast<double>(evaluations) / static_cast<double>(seeds);
  state.counters["limit_s"] = contest.seconds_at_most;
  for (std::size_t i = 0; i < shares.size(); ++i) {
    auto& list = times[i];
    std::sort(list.begin(), list.end());
    const std::string name = share_names[i];
    state.counters["failed_" + name] =
        static_cast<double>(std::count(list.begin(), list.end(), infinity));
    // No median where more than half of the seeds fail.
    if (const double median = list[list.size() / 2]; median < infinity) {
      state.counters["median_" + name + "_s"] = median;
    }
  }
  std::sort(ends.begin(), ends.end());
  state.counters["share_least"] = ends.front();
  state.counters["share_median"] = ends[ends.size() / 2];
  state.counters["share_most"] = ends.back();
}

const bool registered = [] {
  benchmark::RegisterBenchmark("evolutionary/certified_same_problem", certified)
      ->Unit(benchmark::kMillisecond);
  benchmark::RegisterBenchmark("evolutionary/certified_from_part", certified_from_part)
      ->Unit(benchmark::kMillisecond);
  // All of them together take at most four minutes of processor time. A thousand individuals are no
  // use to a search of a few groups.
  for (const bool knows : {false, true}) {
    for (const auto algorithm : {EvolveAlgorithm::nsga2, EvolveAlgorithm::moead}) {
      for (const std::size_t population : {std::size_t{100}, std::size_t{400}, std::size_t{1000}}) {
        if (knows && population == 1000) {
          continue;
        }
        const std::string name = std::string("evolutionary/") +
                                 (algorithm == EvolveAlgorithm::nsga2 ? "nsga2" : "moead") +
                                 (knows ? "_told_the_groups" : "") + "/" +
                                 std::to_string(population);
        const Contest contest = {algorithm, population, knows, knows ? 0.6 : 4.0};
        benchmark::RegisterBenchmark(
            name.c_str(), [contest](benchmark::State& state) { evolutionary(state, contest); })
            ->Iterations(1)
            ->Unit(benchmark::kSecond);
      }
    }
  }
  return true;
}();

}  // namespace

}  // namespace bismar::benchmarks
