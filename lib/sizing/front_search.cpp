// SPDX-License-Identifier: MIT
#include "sizing/front_search.hpp"

#include "sizing/dominance.hpp"
#include "sizing/screening.hpp"

#include <algorithm>
#include <atomic>
#include <memory>
#include <mutex>
#include <thread>

namespace bismar {

namespace {

/// What one thread works with.
struct Worker {
  Worker(const Part& part, const Catalogue& catalogue, const Settings& settings)
      : problem(std::make_unique<SizingProblem>(part, catalogue, settings)),
        screening(*problem),
        enumeration(part, catalogue) {}
  std::unique_ptr<SizingProblem> problem;
  Screening screening;
  Enumeration enumeration;
};

/// Workers lent to whoever works, so that there are never more than threads.
class Workers {
 public:
  Workers(const Part& part, const Catalogue& catalogue, const Settings& settings)
      : part_(part), catalogue_(catalogue), settings_(settings) {}

  std::unique_ptr<Worker> take() {
    {
      const std::scoped_lock lock(mutex_);
      if (!idle_.empty()) {
        auto out = std::move(idle_.back());
        idle_.pop_back();
        return out;
      }
    }
    return std::make_unique<Worker>(part_, catalogue_, settings_);
  }
  void give_back(std::unique_ptr<Worker> worker) {
    const std::scoped_lock lock(mutex_);
    idle_.push_back(std::move(worker));
  }

 private:
  const Part& part_;
  const Catalogue& catalogue_;
  const Settings& settings_;
  std::mutex mutex_;
  std::vector<std::unique_ptr<Worker>> idle_;
};

class FrontSearch {
 public:
  FrontSearch(const Part& part,
              const Catalogue& catalogue,
              const Settings& settings,
              const RunOptions& run)
      : part_(part),
        settings_(settings),
        run_(run),
        materials_(catalogue.materials),
        workers_(part, catalogue, settings),
        incumbent_(2, std::max(settings.epsilon, settings.near)),
        progress_(run) {}

  Solved run() {
    Solved out;
    auto first = workers_.take();
    auto admitted = admit(*first, out);
    Dominance dominance;
    dominance.by.assign(materials_.size(), Dominance::none);
    if (run_.reductions.dominance) {
      dominance = find_dominance(*first->problem, admitted, has_walls(part_));
      out.dominated = dominance.replaced;
    }
    open_.assign(materials_.size(), 1);
    std::vector<std::uint32_t> kept;
    std::vector<std::uint32_t> replaced;
    for (const auto m : admitted) {
      (dominance.by[m] == Dominance::none ? kept : replaced).push_back(m);
    }
    if (run_.reductions.bounds) {
      kept = by_promise(*first, kept);
    }
    workers_.give_back(std::move(first));
    search(kept, out);
    // What a material that came nowhere near replaces comes nowhere near either.
    std::erase_if(replaced, [&](std::uint32_t m) {
      const bool closed = open_[dominance.by[m]] == 0;
      if (closed) {
        out.not_better += candidates_of(m);
      }
      return closed;
    });
    search(replaced, out);
    out.problem = std::move(workers_.take()->problem);
    std::stable_sort(out.outcomes.begin(), out.outcomes.end(), [](const auto& a, const auto& b) {
      return a.candidate.material < b.candidate.material;
    });
    return out;
  }

 private:
  /// Materials that the job asks for and that do not fail a limit on a property by themselves.
  std::vector<std::uint32_t> admit(Worker& worker, Solved& out) {
    std::vector<std::uint32_t> admitted;
    for (std::uint32_t m = 0; m < materials_.size(); ++m) {
      const auto& kind = worker.enumeration.of(m);
      out.considered += kind.considered;
      for (const auto& [rule, number] : kind.cannot_exist) {
        out.cannot_exist[rule] += number;
      }
      if (kind.candidates.empty()) {
        continue;
      }
      if (run_.reductions.material_limits) {
        if (const auto failed = worker.screening.failed_by_itself(m)) {
          out.infeasible[*failed] += kind.candidates.size();
          continue;
        }
      }
      admitted.push_back(m);
    }
    return admitted;
  }

  /// The most promising first: by the product of the bounds, which no unit changes.
  std::vector<std::uint32_t> by_promise(Worker& worker,
                                        const std::vector<std::uint32_t>& materials) {
    std::vector<std::pair<double, std::uint32_t>> order;
    order.reserve(materials.size());
    for (const auto m : materials) {
      order.emplace_back(worker.screening.promise(m, worker.enumeration.of(m).candidates), m);
    }
    std::sort(order.begin(), order.end());
    std::vector<std::uint32_t> out;
    out.reserve(order.size());
    for (const auto& [promise, m] : order) {
      out.push_back(m);
    }
    return out;
  }

  std::size_t candidates_of(std::uint32_t material) {
    auto worker = workers_.take();
    const auto count = worker->enumeration.of(material).candidates.size();
    workers_.give_back(std::move(worker));
    return count;
  }

  void search(const std::vector<std::uint32_t>& materials, Solved& out) {
    std::vector<Solved> parts(materials.size());
    ParallelOptions options;
    options.threads = run_.threads;
    options.executor = run_.executor;
    options.stop = run_.stop;
    const auto caller = std::this_thread::get_id();
    std::atomic<std::size_t> done = 0;
    const auto outcome = parallel_for_chunks(
        materials.size(), options, [&](std::size_t begin, std::size_t, std::size_t) {
          auto worker = workers_.take();
          one(*worker, materials[begin], parts[begin]);
          workers_.give_back(std::move(worker));
          const std::size_t now = ++done;
          if (std::this_thread::get_id() == caller) {
            progress_.at(static_cast<double>(now) / static_cast<double>(materials.size()));
          }
        });
    out.stopped = out.stopped || !outcome.is_complete || run_.stop.stop_requested();
    for (auto& part : parts) {
      merge(std::move(part), out);
    }
  }

  void one(Worker& worker, std::uint32_t material, Solved& out) {
    auto& problem = *worker.problem;
    open_[material] = 0;
    for (Candidate candidate : worker.enumeration.of(material).candidates) {
      candidate.material = material;
      const bool can_skip = run_.reductions.skipping && run_.reductions.bounds;
      if (can_skip && worker.screening.is_beaten(candidate, incumbent_)) {
        ++out.not_better;
        ++out.skipped;
        continue;
      }
      auto outcome = solve_candidate(
          problem, candidate, run_, run_.reductions.skipping ? &incumbent_ : nullptr, false, out);
      if (!outcome) {
        continue;
      }
      if (outcome->kind == Outcome::Kind::infeasible) {
        // Whether one is infeasible or only no better is told under Explain::full: here it would
        // depend on what was skipped before. A sliver that the search may pass by is no proof that
        // a replaced material finds nothing in it.
        const bool proven = outcome->least_utilisation > 1.0;
        open_[material] = open_[material] != 0 || !proven ? 1 : 0;
        ++out.not_better;
        continue;
      }
      bool near = false;  // may be near the front
      bool open = outcome->kind == Outcome::Kind::undecided;
      const double cover = 1.0 + (outcome->searched ? settings_.epsilon : 0.0);
      for (const auto& point : outcome->points) {
        const double objectives[] = {point.mass, point.cost};
        incumbent_.add(objectives);
        near = near || !incumbent_.beats(objectives);
        // What a point stands for may be that much better than it.
        const double at_best[] = {point.mass / cover, point.cost / cover};
        open = open || !incumbent_.beats(at_best);
      }
      out.skipped += outcome->kind == Outcome::Kind::skipped ? 1U : 0U;
      open_[material] = open_[material] != 0 || open ? 1 : 0;
      if (outcome->kind == Outcome::Kind::feasible && !near) {
        ++out.not_better;
      } else {
        keep_or_count(std::move(*outcome), part_, problem.catalogue(), out);
      }
    }
    problem.forget(material);
  }

  void merge(Solved part, Solved& out) {
    std::move(part.outcomes.begin(), part.outcomes.end(), std::back_inserter(out.outcomes));
    for (const auto& [rule, number] : part.cannot_exist) {
      out.cannot_exist[rule] += number;
    }
    for (const auto& [reason, number] : part.undecided) {
      out.undecided[reason] += number;
    }
    for (const auto& [reason, number] : part.excluded) {
      out.excluded[reason] += number;
    }
    out.undecided_text.merge(part.undecided_text);
    out.not_better += part.not_better;
    out.skipped += part.skipped;
    out.boxes += part.boxes;
    out.evaluations += part.evaluations;
    out.searched = out.searched || part.searched;
    out.incomplete = out.incomplete || part.incomplete;
  }

  const Part& part_;
  const Settings& settings_;
  const RunOptions& run_;
  const MaterialTable& materials_;
  Workers workers_;
  Incumbent incumbent_;
  Progress progress_;
  std::vector<char>
      open_;  ///< Per material: something of it is undecided or may be near the front.
};

}  // namespace

Solved search_front(const Part& part,
                    const Catalogue& catalogue,
                    const Settings& settings,
                    const RunOptions& run) {
  return FrontSearch(part, catalogue, settings, run).run();
}

}  // namespace bismar
