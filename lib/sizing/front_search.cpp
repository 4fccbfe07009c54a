// SPDX-License-Identifier: MIT
#include "sizing/front_search.hpp"

#include "sizing/dominance.hpp"
#include "sizing/screening.hpp"

#include <algorithm>
#include <atomic>
#include <iterator>
#include <map>
#include <memory>
#include <mutex>
#include <thread>
#include <tuple>

namespace bismar {

namespace {

/// What one thread works with.
struct Worker {
  Worker(const Part& part, const Catalogue& catalogue, const Settings& settings)
      : problem(std::make_unique<SizingProblem>(part, catalogue, settings)), screening(*problem) {}
  std::unique_ptr<SizingProblem> problem;
  Screening screening;
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
              const RunOptions& run,
              FrontMemory& memory)
      : part_(part),
        settings_(settings),
        run_(run),
        materials_(catalogue.materials),
        memory_(memory),
        workers_(part, catalogue, settings),
        incumbent_(2, std::max(settings.epsilon, settings.near)),
        progress_(run) {
    if (memory.kinds == nullptr) {
      memory.kinds = std::make_unique<const Kinds>(part, catalogue);
    }
  }

  Solved run() {
    Solved out;
    auto first = workers_.take();
    auto admitted = admit(*first, out);
    Dominance dominance;
    dominance.by.assign(materials_.size(), Dominance::none);
    if (run_.reductions.dominance && !bounds_are_quicker()) {
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
      kept = in_order(*first, kept);
    }
    workers_.give_back(std::move(first));
    search(kept, out);
    // What a material that came nowhere near replaces comes nowhere near either; but a lighter one
    // may fall below the least mass of a route where the heavier does not.
    auto worker = workers_.take();
    std::erase_if(replaced, [&](std::uint32_t m) {
      const bool closed = open_[dominance.by[m]] == 0 && (dominance.is_lighter[m] == 0 ||
                                                          worker->screening.is_beaten_at_least_mass(
                                                              m, candidates_of(m), incumbent_));
      if (closed) {
        out.not_better += candidates_of(m).size();
      }
      return closed;
    });
    workers_.give_back(std::move(worker));
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
    out.considered = memory_.kinds->considered();
    out.cannot_exist = memory_.kinds->cannot_exist();
    for (std::uint32_t m = 0; m < materials_.size(); ++m) {
      const auto& [candidates, without_sheet] = sell(*worker.problem, m);
      if (without_sheet > 0) {
        out.cannot_exist[Rule::stock_thickness] += without_sheet;
      }
      if (candidates.empty()) {
        continue;
      }
      if (run_.reductions.material_limits) {
        if (const auto failed = worker.screening.failed_by_itself(m, candidates)) {
          out.infeasible[*failed] += candidates.size();
          continue;
        }
      }
      admitted.push_back(m);
    }
    return admitted;
  }

  /// Candidates of a kind of material, their material not set, but those of a fixed shape whose
  /// sheet is not sold: that they cannot exist must not depend on what is solved.
  struct Sold {
    std::vector<Candidate> candidates;
    std::size_t without_sheet = 0;
  };
  const Sold& sell(SizingProblem& problem, std::uint32_t material) {
    const auto& kind = memory_.kinds->of(material);
    const auto [entry, added] = sold_.try_emplace(&kind);
    if (!added) {
      return entry->second;
    }
    for (Candidate candidate : kind.candidates) {
      candidate.material = material;
      const bool bought_thickness =
          candidate.shape != Candidate::none &&
          takes_sheet_thickness(problem.catalogue().routes[candidate.route]) &&
          free_dimensions(part_.body.shapes[candidate.shape]).empty();
      bool sold = true;
      if (bought_thickness) {
        sold = !problem.add(candidate).variable.values.empty();
        problem.remove_last();
      }
      entry->second.without_sheet += sold ? 0U : 1U;
      if (sold) {
        entry->second.candidates.push_back(candidate);
      }
    }
    return entry->second;
  }
  [[nodiscard]] const std::vector<Candidate>& candidates_of(std::uint32_t material) const {
    return sold_.at(&memory_.kinds->of(material)).candidates;
  }

  /// Whether an order from before is followed. Points of a shape with free dimensions are found,
  /// and so may differ within the study's tolerance with what was found before them: there the
  /// order is always that of front(), for the same answer bit for bit.
  [[nodiscard]] bool order_is_known() const {
    const auto& shapes = part_.body.shapes;
    return !memory_.order.empty() && run_.reductions.bounds &&
           std::all_of(shapes.begin(), shapes.end(), [](const Shape& shape) {
             return free_dimensions(shape).empty();
           });
  }

  /// Whether looking for materials that others replace takes longer than what it spares: where
  /// every candidate has one size and bounds, and a known order lets the bounds decide at once.
  [[nodiscard]] bool bounds_are_quicker() const {
    return order_is_known() && run_.reductions.skipping && part_.body.stock.empty();
  }

  /// In the known order; those that it lacks come last, by promise, and are added to it.
  std::vector<std::uint32_t> in_order(Worker& worker, const std::vector<std::uint32_t>& materials) {
    if (!order_is_known()) {
      memory_.order = by_promise(worker, materials);
      return memory_.order;
    }
    std::vector<char> open(materials_.size(), 0);
    for (const auto m : materials) {
      open[m] = 1;
    }
    std::vector<std::uint32_t> out;
    out.reserve(materials.size());
    for (const auto m : memory_.order) {
      if (open[m] != 0) {
        open[m] = 0;
        out.push_back(m);
      }
    }
    std::vector<std::uint32_t> unknown;
    std::copy_if(
        materials.begin(), materials.end(), std::back_inserter(unknown), [&](std::uint32_t m) {
          return open[m] != 0;
        });
    unknown = by_promise(worker, unknown);
    out.insert(out.end(), unknown.begin(), unknown.end());
    memory_.order.insert(memory_.order.end(), unknown.begin(), unknown.end());
    return out;
  }

  /// The most promising first: by the product of the bounds, which no unit changes.
  std::vector<std::uint32_t> by_promise(Worker& worker,
                                        const std::vector<std::uint32_t>& materials) {
    std::vector<std::pair<double, std::uint32_t>> order;
    order.reserve(materials.size());
    for (const auto m : materials) {
      order.emplace_back(worker.screening.promise(m, candidates_of(m)), m);
    }
    std::sort(order.begin(), order.end());
    std::vector<std::uint32_t> out;
    out.reserve(order.size());
    for (const auto& [promise, m] : order) {
      out.push_back(m);
    }
    return out;
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
    for (Candidate candidate : candidates_of(material)) {
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
      bool open = outcome->partly_skipped || outcome->kind == Outcome::Kind::undecided ||
                  outcome->kind == Outcome::Kind::excluded;  // for want of a value
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
  FrontMemory& memory_;
  std::map<const Enumeration::Kind*, Sold> sold_;
  Workers workers_;
  Incumbent incumbent_;
  Progress progress_;
  std::vector<char>
      open_;  ///< Per material: something of it is undecided or may be near the front.
};

}  // namespace

Kinds::Kinds(const Part& part, const Catalogue& catalogue) : enumeration_(part, catalogue) {
  const auto count = static_cast<std::uint32_t>(catalogue.materials.size());
  of_.reserve(count);
  for (std::uint32_t m = 0; m < count; ++m) {
    const auto& kind = enumeration_.of(m);
    of_.push_back(&kind);
    considered_ += kind.considered;
    for (const auto& [rule, number] : kind.cannot_exist) {
      cannot_exist_[rule] += number;
    }
  }
}

bool Kinds::are_same(const Part& a, const Part& b) {
  // What Enumeration and the rules of existence.hpp read of a part.
  const auto read = [](const Part& part) {
    const auto& limits = part.limits;
    return std::tie(part.body.shapes,
                    part.body.stock,
                    part.finishes,
                    limits.routes,
                    limits.forbidden_routes,
                    limits.processes,
                    limits.forms,
                    limits.classes,
                    limits.materials,
                    limits.forbidden_materials,
                    limits.allow_brittle,
                    limits.allow_hard);
  };
  return read(a) == read(b);
}

Solved search_front(const Part& part,
                    const Catalogue& catalogue,
                    const Settings& settings,
                    const RunOptions& run,
                    FrontMemory* memory) {
  FrontMemory own;
  auto out = FrontSearch(part, catalogue, settings, run, memory != nullptr ? *memory : own).run();
  out.doubtful_sizes = doubtful_sizes(part, catalogue, settings);
  return out;
}

}  // namespace bismar
