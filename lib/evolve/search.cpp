// SPDX-License-Identifier: MIT
#include "evolve/search.hpp"

#include "evolve/point_archive.hpp"
#include "evolve/search_space.hpp"

#include <pagmo/algorithm.hpp>
#include <pagmo/algorithms/moead.hpp>
#include <pagmo/algorithms/nsga2.hpp>
#include <pagmo/population.hpp>
#include <pagmo/problem.hpp>
#include <pagmo/utils/hypervolume.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <exception>
#include <limits>
#include <new>
#include <string>
#include <utility>

namespace bismar {

namespace {

constexpr std::size_t most_neighbours = 20;

std::string text(double value) {
  std::array<char, 32> buffer;
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(), value).ptr;
  return {buffer.data(), end};
}

/// Evaluates, keeps the feasible points and makes the numbers that the algorithm compares.
class Evaluator {
 public:
  Evaluator(const BoxProblem& problem, const SearchSpace& space)
      : problem_(problem),
        space_(space),
        archive_(problem.objectives()),
        objectives_(problem.objectives()),
        scales_(problem.objectives(), 1.0),
        worst_(problem.objectives(), -std::numeric_limits<double>::infinity()) {}

  struct Values {
    std::vector<double> objectives;
    double violation = 0.0;  ///< In [0, 1]; 0 = feasible.
  };

  Values evaluate(const std::vector<double>& numbers) {
    const auto group = space_.decode(numbers, x_);
    utilisations_.resize(problem_.constraints(group));
    try {
      problem_.evaluate(group, x_, objectives_, utilisations_);
      ++evaluations_;
      refuse_nan(group);
    } catch (...) {
      // So that it can be told from what the algorithm itself throws.
      failure_ = std::current_exception();
      throw;
    }
    Values values{objectives_, violation()};
    if (values.violation == 0.0) {
      ++feasible_;
      for (std::size_t i = 0; i < worst_.size(); ++i) {
        worst_[i] = std::max(worst_[i], objectives_[i]);
      }
      archive_.add({group, x_, objectives_, utilisations_});
    }
    return values;
  }

  [[nodiscard]] std::vector<double> fitness(const Values& values) const {
    std::vector<double> out(scales_.size(), 1.0 + values.violation);
    if (values.violation == 0.0) {
      for (std::size_t i = 0; i < out.size(); ++i) {
        out[i] = values.objectives[i] / (scales_[i] + std::abs(values.objectives[i]));
      }
    }
    return out;
  }

  void set_scales(const std::vector<Values>& first_population) {
    for (std::size_t i = 0; i < scales_.size(); ++i) {
      std::vector<double> magnitudes;
      for (const auto& values : first_population) {
        if (std::isfinite(values.objectives[i])) {
          magnitudes.push_back(std::abs(values.objectives[i]));
        }
      }
      if (magnitudes.empty()) {
        continue;
      }
      const auto middle = magnitudes.begin() + static_cast<std::ptrdiff_t>(magnitudes.size() / 2);
      std::nth_element(magnitudes.begin(), middle, magnitudes.end());
      scales_[i] = *middle > 0.0 ? *middle : 1.0;
    }
  }

  [[nodiscard]] PointArchive& archive() { return archive_; }
  [[nodiscard]] std::size_t evaluations() const { return evaluations_; }
  [[nodiscard]] std::size_t feasible() const { return feasible_; }
  /// Largest value of each objective among the feasible points; -infinity where there is none.
  [[nodiscard]] const std::vector<double>& worst() const { return worst_; }
  [[nodiscard]] std::exception_ptr failure() const { return failure_; }

 private:
  void refuse_nan(std::size_t group) const {
    const auto refuse = [&](const std::vector<double>& values, const char* what) {
      for (std::size_t i = 0; i < values.size(); ++i) {
        if (!std::isnan(values[i])) {
          continue;
        }
        std::string place;
        for (const double x : x_) {
          place += (place.empty() ? "" : ", ") + text(x);
        }
        throw Error({Code::not_finite,
                     "groups[" + std::to_string(group) + "]",
                     "NaN",
                     "a number or infinity",
                     std::string(what) + " " + std::to_string(i) + " is NaN at x = (" + place +
                         "). Give infinity where there is no design."});
      }
    };
    refuse(objectives_, "Objective");
    refuse(utilisations_, "Utilisation");
  }

  [[nodiscard]] double violation() const {
    double sum = 0.0;
    for (const double u : utilisations_) {
      if (u > 1.0) {
        const double excess = u - 1.0;
        sum += std::isinf(excess) ? 1.0 : excess / (1.0 + excess);
      }
    }
    const bool all_finite = std::all_of(
        objectives_.begin(), objectives_.end(), [](double value) { return std::isfinite(value); });
    sum += all_finite ? 0.0 : 1.0;
    return sum / static_cast<double>(utilisations_.size() + 1);
  }

  const BoxProblem& problem_;
  const SearchSpace& space_;
  PointArchive archive_;
  std::vector<double> x_;
  std::vector<double> objectives_;
  std::vector<double> utilisations_;
  std::vector<double> scales_;
  std::vector<double> worst_;
  std::size_t evaluations_ = 0;
  std::size_t feasible_ = 0;
  std::exception_ptr failure_;
};

/// The problem as pagmo wants it. Copies share one evaluator; everything runs in one thread.
struct PagmoProblem {
  Evaluator* evaluator = nullptr;
  const SearchSpace* space = nullptr;
  std::size_t objectives = 0;
  /// Whether the group is a whole number to the algorithm. MOEA/D makes fractions of it.
  bool whole_group = true;

  [[nodiscard]] std::vector<double> fitness(const std::vector<double>& numbers) const {
    return evaluator->fitness(evaluator->evaluate(numbers));
  }
  [[nodiscard]] std::pair<std::vector<double>, std::vector<double>> get_bounds() const {
    std::vector<double> lower(space->numbers(), 0.0);
    std::vector<double> upper(space->numbers(), 1.0);
    if (space->groups() > 1) {
      upper.back() = static_cast<double>(space->groups() - (whole_group ? 1 : 0));
    }
    return {std::move(lower), std::move(upper)};
  }
  [[nodiscard]] std::size_t get_nobj() const { return objectives; }
  [[nodiscard]] std::size_t get_nix() const { return whole_group && space->groups() > 1 ? 1 : 0; }
};

pagmo::algorithm algorithm_of(const EvolveOptions& options, const PagmoProblem& problem) {
  // One generation a call; the generator of random numbers goes on from call to call.
  if (options.algorithm == EvolveAlgorithm::nsga2) {
    const double mutation = 1.0 / static_cast<double>(problem.space->numbers());
    return pagmo::algorithm(pagmo::nsga2(1u, 0.95, 10.0, mutation, 50.0, options.seed));
  }
  // A grid of weights exists for every population only with two objectives.
  return pagmo::algorithm(pagmo::moead(1u,
                                       problem.objectives == 2 ? "grid" : "low discrepancy",
                                       "tchebycheff",
                                       std::min(most_neighbours, options.population - 1),
                                       1.0,
                                       0.5,
                                       20.0,
                                       0.9,
                                       2u,
                                       true,
                                       options.seed));
}

/// Hypervolume of points [n x objectives]; those not below the reference everywhere add nothing.
double hypervolume_of(const std::vector<std::vector<double>>& points,
                      const std::vector<double>& reference) {
  std::vector<std::vector<double>> inside;
  for (const auto& point : points) {
    if (std::equal(point.begin(), point.end(), reference.begin(), std::less<>())) {
      inside.push_back(point);
    }
  }
  return inside.empty() ? 0.0 : pagmo::hypervolume(inside, true).compute(reference);
}

class Search {
 public:
  Search(const BoxProblem& problem, std::vector<std::size_t> groups, const EvolveOptions& options)
      : options_(options),
        space_(problem, std::move(groups)),
        evaluator_(problem, space_),
        udp_{&evaluator_,
             &space_,
             problem.objectives(),
             options.algorithm == EvolveAlgorithm::nsga2} {}

  EvolvedFront run() {
    try {
      auto population = first_population();
      finish_generation(0);
      const auto algorithm = algorithm_of(options_, udp_);
      for (std::size_t g = 1; g <= options_.generations && !out_.stopped; ++g) {
        population = algorithm.evolve(population);
        finish_generation(g);
      }
      return collect();
    } catch (const std::bad_alloc&) {
      throw;
    } catch (const std::exception& error) {
      // The problem's and the callback's own exceptions are the host's.
      if (evaluator_.failure() || in_callback_) {
        throw;
      }
      throw InternalError(std::string("evolve: the algorithm was refused: ") + error.what());
    }
  }

 private:
  pagmo::population first_population() {
    pagmo::population population(pagmo::problem(udp_), 0, options_.seed);
    std::vector<std::vector<double>> vectors;
    std::vector<Evaluator::Values> values;
    for (std::size_t i = 0; i < options_.population; ++i) {
      vectors.push_back(population.random_decision_vector());
      values.push_back(evaluator_.evaluate(vectors.back()));
    }
    // The scales have to stand before the first comparison.
    evaluator_.set_scales(values);
    for (std::size_t i = 0; i < vectors.size(); ++i) {
      population.push_back(vectors[i], evaluator_.fitness(values[i]));
    }
    return population;
  }

  void finish_generation(std::size_t generation) {
    evaluator_.archive().settle();
    out_.generations = generation;
    out_.stopped = generation < options_.generations && options_.stop.stop_requested();
    const bool last = generation == options_.generations || out_.stopped;
    if (options_.trace_every > 0 && (generation % options_.trace_every == 0 || last)) {
      Snapshot snapshot{generation, evaluator_.evaluations(), {}};
      for (const auto& point : evaluator_.archive().points()) {
        snapshot.objectives.push_back(point.objectives);
      }
      snapshots_.push_back(std::move(snapshot));
    }
    if (options_.progress) {
      in_callback_ = true;
      options_.progress(options_.generations == 0 ? 1.0
                                                  : static_cast<double>(generation) /
                                                        static_cast<double>(options_.generations));
      in_callback_ = false;
    }
  }

  EvolvedFront collect() {
    out_.evaluations = evaluator_.evaluations();
    out_.feasible_evaluations = evaluator_.feasible();
    if (!options_.reference.empty()) {
      out_.reference = options_.reference;
    } else if (evaluator_.feasible() > 0) {
      out_.reference = evaluator_.worst();
    }
    for (const auto& snapshot : snapshots_) {
      out_.trace.push_back({snapshot.generation,
                            snapshot.evaluations,
                            hypervolume_of(snapshot.objectives, out_.reference)});
    }
    out_.points = evaluator_.archive().release();
    return std::move(out_);
  }

  /// The reference point is known at the end only, so the fronts wait for it.
  struct Snapshot {
    std::size_t generation = 0;
    std::size_t evaluations = 0;
    std::vector<std::vector<double>> objectives;
  };

  const EvolveOptions& options_;
  SearchSpace space_;
  Evaluator evaluator_;
  PagmoProblem udp_;
  std::vector<Snapshot> snapshots_;
  EvolvedFront out_;
  bool in_callback_ = false;
};

}  // namespace

EvolvedFront search(const BoxProblem& problem,
                    std::vector<std::size_t> groups,
                    const EvolveOptions& options) {
  return Search(problem, std::move(groups), options).run();
}

}  // namespace bismar
