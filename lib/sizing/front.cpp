// SPDX-License-Identifier: MIT
#include <bismar/sizing/front.hpp>

#include "sizing/front_search.hpp"
#include "sizing/study.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/pareto/front.hpp>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>
#include <set>
#include <tuple>

namespace bismar {

namespace {

constexpr double plain_path_tolerance = 1e-12;

/// One feasible point with all that orders it.
struct Ranked {
  std::size_t outcome = 0;
  Outcome::Point point;
  const CandidateNames* names = nullptr;
  std::string item;  ///< Stock item id: the index in a list depends on the order of the table.
};

bool before(const Ranked& a, const Ranked& b) {
  return std::tie(a.point.mass, a.point.cost, *a.names, a.item, a.point.size, a.point.free_sizes) <
         std::tie(b.point.mass, b.point.cost, *b.names, b.item, b.point.size, b.point.free_sizes);
}

std::string item_id(const Solved& solved, const Outcome& outcome, double size) {
  if (outcome.candidate.stock == Candidate::none) {
    return {};
  }
  const auto& list = solved.problem->catalogue().stock[outcome.candidate.stock];
  return list.items[static_cast<std::size_t>(size)].id;
}

/// Whether no front point is better by the margin in both objectives. The front is given by rising
/// mass.
bool is_near(double mass, double cost, std::span<const Outcome::Point> front, double margin) {
  const double inflated = 1.0 + margin;
  const auto heavier = std::partition_point(
      front.begin(), front.end(), [&](const auto& point) { return inflated * point.mass < mass; });
  // Of the points lighter by the margin the heaviest is the cheapest.
  return heavier == front.begin() || !(inflated * std::prev(heavier)->cost < cost);
}

/// Whether the solver's path and the plain path agree on a design, and every utilisation is met.
bool is_confirmed(const Design& design, const SizingProblem& problem, std::size_t group) {
  std::vector<double> objectives(2);
  std::vector<double> utilisations(problem.constraints(group));
  problem.evaluate(group, std::span(&design.size, 1), objectives, utilisations);
  const auto differs = [](double a, double b) {
    return !(std::abs(a - b) <= plain_path_tolerance * std::max(std::abs(a), std::abs(b)));
  };
  return !differs(objectives[0], design.mass) && !differs(objectives[1], design.cost) &&
         std::all_of(design.utilisations.begin(),
                     design.utilisations.end(),
                     [](const Utilisation& u) { return u.value <= 1.0; });
}

class FrontBuilder {
 public:
  FrontBuilder(const Part& part, const Settings& settings, Solved& solved)
      : part_(part), settings_(settings), solved_(solved) {}

  Result run() {
    Result result;
    result.part = part_.name;
    result.currency = solved_.problem->catalogue().currency;
    rank();
    // A design that its re-evaluation does not confirm is a defect of ours: it is dropped and
    // named, and the front is made anew without it.
    while (!split(result)) {
    }
    fill_funnel(result);
    add_notes(result);
    result.telemetry.evaluations = solved_.evaluations;
    result.telemetry.boxes = solved_.boxes;
    if (solved_.searched) {
      result.delta = settings_.delta;
    }
    if (solved_.incomplete) {
      result.exact = false;
      result.epsilon_reached = std::numeric_limits<double>::infinity();
      result.notes.emplace_back(
          "A search ran out of boxes: designs shown are sound, but lighter or cheaper ones may be "
          "missing.");
    }
    result.telemetry.skipped = solved_.skipped;
    result.telemetry.dominated = solved_.dominated;
    return result;
  }

 private:
  void rank() {
    names_.reserve(solved_.outcomes.size());
    for (std::size_t o = 0; o < solved_.outcomes.size(); ++o) {
      const auto& outcome = solved_.outcomes[o];
      names_.push_back(names(outcome.candidate, part_, solved_.problem->catalogue()));
      for (const auto& point : outcome.points) {
        ranked_.push_back({o, point, &names_.back(), item_id(solved_, outcome, point.size)});
      }
    }
    std::sort(ranked_.begin(), ranked_.end(), before);
  }

  bool split(Result& result) {
    result.designs.clear();
    result.others.clear();
    stage_.clear();
    result.epsilon_reached = 0.0;
    std::vector<double> objectives;
    for (const auto& one : ranked_) {
      objectives.insert(objectives.end(), {one.point.mass, one.point.cost});
    }
    // Ties come back in the order of the rows, which is the canonical one.
    const auto front_rows = front_2d(objectives);
    std::vector<bool> on_front(ranked_.size(), false);
    std::vector<Outcome::Point> front;
    for (const auto row : front_rows) {
      on_front[row] = true;
      front.push_back(ranked_[row].point);
      if (!add_design(row, result)) {
        return false;
      }
      stage_[ranked_[row].outcome] = FunnelLine::Stage::front;
    }
    result.front_count = result.designs.size();
    for (std::size_t row = 0; row < ranked_.size(); ++row) {
      if (on_front[row]) {
        continue;
      }
      const auto& one = ranked_[row];
      if (is_near(one.point.mass, one.point.cost, front, settings_.near)) {
        if (!add_design(row, result)) {
          return false;
        }
        stage_.try_emplace(one.outcome, FunnelLine::Stage::near);
      } else if (settings_.explain == Explain::full) {
        result.others.push_back({solved_.outcomes[one.outcome].candidate,
                                 one.point.size,
                                 one.point.free_sizes,
                                 one.point.mass,
                                 one.point.cost});
      }
    }
    return true;
  }

  bool add_design(std::size_t row, Result& result) {
    const auto& one = ranked_[row];
    std::size_t group = 0;
    auto design = make_design(*solved_.problem, solved_.outcomes[one.outcome], one.point, group);
    const bool confirmed = is_confirmed(design, *solved_.problem, group);
    solved_.problem->remove_last();
    if (!confirmed) {
      result.exact = false;
      result.notes.push_back(
          "INTERNAL FAULT: " + design.id +
          " differs from its re-evaluation on the plain path and was left out; please "
          "report it.");
      ranked_.erase(ranked_.begin() + static_cast<std::ptrdiff_t>(row));
      return false;
    }
    result.epsilon_reached = std::max(result.epsilon_reached, one.point.epsilon);
    result.designs.push_back(std::move(design));
    return true;
  }

  void fill_funnel(Result& result) {
    using Stage = FunnelLine::Stage;
    auto& funnel = result.funnel;
    funnel.considered = solved_.considered;
    funnel.doubtful_sizes = solved_.doubtful_sizes;
    for (const auto& [rule, count] : solved_.cannot_exist) {
      funnel.lines.push_back({Stage::cannot_exist, std::string(name(rule)), count});
    }
    std::size_t front = 0;
    std::size_t near = 0;
    for (const auto& [outcome, stage] : stage_) {
      ++(stage == Stage::front ? front : near);
    }
    const std::size_t not_better = solved_.not_better + solved_.outcomes.size() - stage_.size();
    const auto add = [&](Stage stage_of, const std::map<std::string, std::size_t>& counts) {
      std::vector<std::pair<std::string, std::size_t>> sorted(counts.begin(), counts.end());
      std::stable_sort(sorted.begin(), sorted.end(), [](const auto& a, const auto& b) {
        return a.second > b.second;
      });
      for (const auto& [reason, count] : sorted) {
        funnel.lines.push_back({stage_of, reason, count});
      }
    };
    add(Stage::cannot_exist, solved_.excluded);
    add(Stage::undecided, solved_.undecided);
    add(Stage::infeasible, solved_.infeasible);
    const bool examined = settings_.explain == Explain::full || not_better == 0;
    funnel.lines.push_back(
        {Stage::not_better, examined ? "" : "feasibility not examined", not_better});
    funnel.lines.push_back({Stage::near, "", near});
    funnel.lines.push_back({Stage::front, "", front});
    result.undecided.assign(solved_.undecided_text.begin(), solved_.undecided_text.end());
  }

  void add_notes(Result& result) const {
    if (part_.limits.column_method == ColumnMethod::euler) {
      result.notes.emplace_back(
          "Columns by Euler's load alone: no imperfection and no yielding are in it. It is an "
          "upper bound on "
          "the resistance, not a check by itself.");
    }
    for (const auto& load_case : part_.body.load_cases) {
      for (const auto& [limit, factor] : load_case.factors) {
        if (factor < 1.0) {
          result.notes.push_back("Load case \"" + load_case.name + "\": the factor " +
                                 plain(factor) + " on " + limit +
                                 " is below 1, so designs fail before the load is reached.");
        }
      }
    }
    if (solved_.stopped) {
      result.exact = false;
      result.notes.emplace_back(
          "Stopped before the end: designs shown are sound, but lighter or cheaper ones may be "
          "missing.");
    }
  }

  const Part& part_;
  const Settings& settings_;
  Solved& solved_;
  std::vector<CandidateNames> names_;
  std::vector<Ranked> ranked_;
  std::map<std::size_t, FunnelLine::Stage> stage_;
};

std::string group_label(const Solved& solved,
                        const Outcome& outcome,
                        const CandidateNames& labels,
                        double size,
                        GroupBy group_by) {
  switch (group_by) {
    case GroupBy::material:
      return labels.material;
    case GroupBy::stock_item: {
      const auto item = item_id(solved, outcome, size);
      return item.empty() ? labels.material + "/" + labels.shape : labels.material + "/" + item;
    }
    case GroupBy::material_and_shape:
      return labels.material + "/" + labels.shape;
    case GroupBy::route:
      return labels.route;
  }
  throw InternalError("fronts: unknown grouping");
}

/// Indices inside the catalogue and part, and among what the part asks for.
void check_candidate(const Candidate& candidate, const Part& part, const Catalogue& catalogue) {
  FaultList faults;
  const auto check = [&](bool good, const char* field, const char* allowed) {
    if (!good) {
      faults.add({Code::out_of_range,
                  std::string("candidate.") + field,
                  {},
                  allowed,
                  std::string("The candidate's ") + field + " must be " + allowed + "."});
    }
  };
  const auto among = [](const std::vector<std::uint32_t>& choices, std::uint32_t index) {
    return std::find(choices.begin(), choices.end(), index) != choices.end();
  };
  const bool from_shape = candidate.shape != Candidate::none;
  const bool from_stock = candidate.stock != Candidate::none;
  check(candidate.material < catalogue.materials.size(), "material", "a material of the catalogue");
  check(among(route_choices(part, catalogue), candidate.route),
        "route",
        "a route that the part admits");
  check(from_shape != from_stock, "shape", "set where stock is not, and the other way round");
  check(!from_shape || candidate.shape < part.body.shapes.size(), "shape", "a shape of the part");
  check(!from_stock || among(stock_lists(part, catalogue), candidate.stock),
        "stock",
        "a stock list that the part admits");
  check(candidate.treatment == Candidate::none ||
            (candidate.treatment < catalogue.routes.size() &&
             catalogue.routes[candidate.treatment].kind == RouteKind::treatment),
        "treatment",
        "a treatment of the catalogue, or none");
  check(among(finish_choices(part, catalogue), candidate.finish),
        "finish",
        "a finish that the part tries");
  faults.throw_if_any();
}

/// Free dimensions where the shape has them, inside the ranges of their ratios.
void check_free_sizes(const Candidate& candidate,
                      double size,
                      const FreeSizes& free_sizes,
                      const Part& part) {
  const auto free = candidate.shape == Candidate::none
                        ? std::vector<FreeDimension>{}
                        : free_dimensions(part.body.shapes[candidate.shape]);
  FaultList faults;
  for (std::size_t f = 0; f < free_sizes.size(); ++f) {
    const bool used = f < free.size();
    const double low = used ? free[f].to_height.low * size * (1.0 - 1e-9) : 0.0;
    const double high = used ? free[f].to_height.high * size * (1.0 + 1e-9) : 0.0;
    if (!(free_sizes[f] >= low && free_sizes[f] <= high)) {
      const std::string name = used ? std::string(free[f].name) : "dimension";
      faults.add({Code::out_of_range,
                  "free_sizes[" + std::to_string(f) + "]",
                  plain(free_sizes[f]),
                  used ? plain(low) + " to " + plain(high) : "0",
                  used ? "The " + name + " is not inside the range of its ratio to the height."
                       : "The shape has no further free dimension: leave it 0."});
    }
  }
  faults.throw_if_any();
}

/// The functions that the guard protects are compiled apart from it (see FloatingPointGuard).
Result build_front(const Part& part,
                   const Catalogue& catalogue,
                   const Settings& settings,
                   const RunOptions& run,
                   FrontMemory* memory) {
  const bool full = settings.explain == Explain::full;
  auto solved = full ? solve_candidates(part, catalogue, settings, run)
                     : search_front(part, catalogue, settings, run, memory);
  if (!full && solved.outcomes.empty() && !solved.stopped) {
    // Nothing is feasible: then the reasons are the answer.
    Settings examined = settings;
    examined.explain = Explain::full;
    solved = solve_candidates(part, catalogue, examined, run);
    return FrontBuilder(part, examined, solved).run();
  }
  return FrontBuilder(part, settings, solved).run();
}

}  // namespace

Result make_front(const Part& part,
                  const Catalogue& catalogue,
                  const Settings& settings,
                  const RunOptions& run,
                  FrontMemory* memory) {
  return build_front(part, catalogue, settings, run, memory);
}

const Design* choice(const Result& result, ExchangeConstant alpha) {
  const Design* best = nullptr;
  // From the cheapest on: a lighter one must pay for itself.
  for (std::size_t i = result.front_count; i-- > 0;) {
    const Design& next = result.designs[i];
    const double saved = best != nullptr ? best->mass - next.mass : 0.0;
    const double paid = best != nullptr ? next.cost - best->cost : 0.0;
    const bool is_equal = saved == 0.0 && paid == 0.0;
    if (is_equal || alpha.value_per_kilogram() * saved > paid) {
      best = &next;
    }
  }
  return best;
}

Result front(const Part& part,
             const Catalogue& catalogue,
             const Settings& settings,
             const RunOptions& run) {
  const auto start = std::chrono::steady_clock::now();
  const FloatingPointGuard guard;
  validate(part, catalogue, settings);
  Result result = build_front(part, catalogue, settings, run, nullptr);
  result.telemetry.seconds =
      std::chrono::duration<double>(std::chrono::steady_clock::now() - start).count();
  return result;
}

std::vector<GroupedFront> fronts(const Part& part,
                                 const Catalogue& catalogue,
                                 GroupBy group_by,
                                 const Settings& settings) {
  const FloatingPointGuard guard;
  validate(part, catalogue, settings);
  const auto solved = solve_candidates(part, catalogue, settings);
  std::vector<CandidateNames> labels;
  labels.reserve(solved.outcomes.size());
  std::map<std::string, std::vector<Ranked>> groups;
  for (std::size_t o = 0; o < solved.outcomes.size(); ++o) {
    const auto& outcome = solved.outcomes[o];
    labels.push_back(names(outcome.candidate, part, catalogue));
    for (const auto& point : outcome.points) {
      groups[group_label(solved, outcome, labels.back(), point.size, group_by)].push_back(
          {o, point, &labels.back(), item_id(solved, outcome, point.size)});
    }
  }
  std::vector<GroupedFront> out;
  for (auto& [label, points] : groups) {
    std::sort(points.begin(), points.end(), before);
    std::vector<double> objectives;
    for (const auto& one : points) {
      objectives.insert(objectives.end(), {one.point.mass, one.point.cost});
    }
    GroupedFront group{label, {}};
    for (const auto row : front_2d(objectives)) {
      const auto& one = points[row];
      group.points.push_back({solved.outcomes[one.outcome].candidate,
                              one.point.size,
                              one.point.free_sizes,
                              one.point.mass,
                              one.point.cost});
    }
    out.push_back(std::move(group));
  }
  return out;
}

Design evaluate(const Part& part,
                const Catalogue& catalogue,
                const Candidate& candidate,
                double size,
                const Settings& settings) {
  return evaluate(part, catalogue, candidate, size, {}, settings);
}

Design evaluate(const Part& part,
                const Catalogue& catalogue,
                const Candidate& candidate,
                double size,
                const FreeSizes& free_sizes,
                const Settings& settings) {
  const FloatingPointGuard guard;
  validate(part, catalogue, settings);
  check_candidate(candidate, part, catalogue);
  if (const auto broken = first_broken_rule(candidate, part, catalogue)) {
    throw Error({Code::conflict, std::string(name(broken->rule)), {}, {}, broken->text});
  }
  SizingProblem problem(part, catalogue, settings);
  check_free_sizes(candidate, size, free_sizes, part);
  const auto& compiled = problem.add(candidate, size, free_sizes);
  FaultList faults;
  for (const Property property : compiled.undecided) {
    faults.add({Code::missing,
                std::string(info(property).name),
                {},
                {},
                "The material has no value for " + std::string(info(property).name) +
                    ", which this part needs."});
  }
  for (const auto& limit : compiled.undecided_limits) {
    faults.add({Code::missing,
                limit,
                {},
                {},
                "The material has no value for " + limit + ", on which the part has a limit."});
  }
  faults.throw_if_any();
  const auto listed = listed_size(compiled.variable, size);
  if (!listed) {
    throw Error({Code::out_of_range,
                 "size",
                 plain(size),
                 "a size that the part asks for",
                 "The size is not one of those that the part asks for."});
  }
  return make_design(problem, 0, *listed);
}

}  // namespace bismar
