// SPDX-License-Identifier: MIT
#include "sizing/study.hpp"

#include "sizing/words.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

std::string missing_text(const CompiledCandidate& compiled) {
  std::string out;
  for (const Property property : compiled.undecided) {
    out += (out.empty() ? "" : ", ") + std::string(info(property).name);
  }
  for (const auto& limit : compiled.undecided_limits) {
    out += (out.empty() ? "" : ", ") + limit;
  }
  return out;
}

/// The constraints that exclude a candidate: one that fails everywhere, or two that clash.
std::vector<std::size_t> failed_constraints(const GroupSolution& solution) {
  if (solution.excluded_by != SIZE_MAX) {
    return {solution.excluded_by};
  }
  if (solution.clash_falling == solution.clash_rising) {
    return {solution.clash_falling};
  }
  return {solution.clash_falling, solution.clash_rising};
}

/// Calls back at most about twenty times a second.
class Progress {
 public:
  explicit Progress(const RunOptions& run) : run_(run) {}
  void at(double share) {
    const auto now = std::chrono::steady_clock::now();
    if (run_.progress && now - last_ >= std::chrono::milliseconds(50)) {
      last_ = now;
      run_.progress(share);
    }
  }

 private:
  const RunOptions& run_;
  std::chrono::steady_clock::time_point last_ = std::chrono::steady_clock::now();
};

/// Walks through all combinations and counts what cannot exist, rule by rule.
class Enumeration {
 public:
  Enumeration(const Part& part, const Catalogue& catalogue, Solved& solved)
      : part_(part),
        catalogue_(catalogue),
        solved_(solved),
        lists_(stock_lists(part, catalogue)),
        finishes_(finish_choices(part, catalogue)),
        routes_(route_choices(part, catalogue)) {
    const std::size_t sections = part.body.shapes.size() + lists_.size();
    per_route_ = sections * finishes_.size();
    per_material_ = per_route_ * routes_.size();
    for (const auto route : routes_) {
      std::vector<bool> can;
      for (const auto& shape : part.body.shapes) {
        can.push_back(!shape_rules(catalogue.routes[route], shape.family, false) &&
                      !proportion_rules(catalogue.routes[route], shape));
      }
      for (const auto list : lists_) {
        can.push_back(!shape_rules(catalogue.routes[route], catalogue.stock[list].family, true));
      }
      can_leave_.push_back(std::move(can));
    }
  }

  template <class Take>
  void material(std::uint32_t material, Take&& take) {
    const auto& info = catalogue_.materials.info(material);
    solved_.considered += per_material_;
    if (const auto broken = material_rules(info, part_.limits)) {
      solved_.cannot_exist[broken->rule] += per_material_;
      return;
    }
    for (std::size_t r = 0; r < routes_.size(); ++r) {
      route(material, info, r, take);
    }
  }

 private:
  template <class Take>
  void route(std::uint32_t material, const MaterialInfo& info, std::size_t r, Take&& take) {
    const auto& route = catalogue_.routes[routes_[r]];
    if (const auto broken = route_rules(info, route)) {
      solved_.cannot_exist[broken->rule] += per_route_;
      return;
    }
    const auto treatments = needed_treatments(info, route, catalogue_);
    if (treatments.empty()) {
      solved_.cannot_exist[Rule::condition_lost] += per_route_;
      return;
    }
    solved_.considered += per_route_ * (treatments.size() - 1);
    Candidate candidate;
    candidate.material = material;
    candidate.route = routes_[r];
    const std::size_t each = finishes_.size() * treatments.size();
    for (std::size_t s = 0; s < can_leave_[r].size(); ++s) {
      const bool from_stock = s >= part_.body.shapes.size();
      candidate.shape = from_stock ? Candidate::none : static_cast<std::uint32_t>(s);
      candidate.stock = from_stock ? lists_[s - part_.body.shapes.size()] : Candidate::none;
      if (!can_leave_[r][s]) {
        solved_.cannot_exist[Rule::output_form] += each;
      } else if (!from_stock && drawn_form_rules(info, route, part_.body.shapes[s].family)) {
        solved_.cannot_exist[Rule::input_form] += each;
      } else if (from_stock && !any_suits(catalogue_.stock[candidate.stock], info, route)) {
        solved_.cannot_exist[Rule::stock_family] += each;
      } else {
        for (const auto treatment : treatments) {
          candidate.treatment = treatment;
          finishes(candidate, info, take);
        }
      }
    }
  }

  template <class Take>
  void finishes(Candidate candidate, const MaterialInfo& info, Take&& take) {
    for (const auto finish : finishes_) {
      candidate.finish = finish;
      if (finish != Candidate::none && finish_rules(info, catalogue_.finishes[finish])) {
        ++solved_.cannot_exist[Rule::finish];
      } else {
        take(candidate);
      }
    }
  }

  const Part& part_;
  const Catalogue& catalogue_;
  Solved& solved_;
  std::vector<std::uint32_t> lists_;
  std::vector<std::uint32_t> finishes_;
  std::vector<std::uint32_t> routes_;
  std::vector<std::vector<bool>> can_leave_;
  std::size_t per_route_ = 0;
  std::size_t per_material_ = 0;
};

}  // namespace

CandidateNames names(const Candidate& candidate, const Part& part, const Catalogue& catalogue) {
  CandidateNames out;
  out.material = catalogue.materials.info(candidate.material).id;
  out.shape = candidate.stock != Candidate::none
                  ? catalogue.stock[candidate.stock].id
                  : std::string(name(part.body.shapes[candidate.shape].family));
  out.route = catalogue.routes[candidate.route].id;
  out.treatment =
      candidate.treatment == Candidate::none ? "" : catalogue.routes[candidate.treatment].id;
  out.finish =
      candidate.finish == Candidate::none ? "none" : catalogue.finishes[candidate.finish].id;
  return out;
}

std::vector<std::uint32_t> stock_lists(const Part& part, const Catalogue& catalogue) {
  std::vector<std::uint32_t> out;
  const bool all = contains_word(part.body.stock, "all");
  for (std::size_t i = 0; i < catalogue.stock.size(); ++i) {
    const auto& list = catalogue.stock[i];
    if (!list.sheet && (all || contains_word(part.body.stock, list.id))) {
      out.push_back(static_cast<std::uint32_t>(i));
    }
  }
  return out;
}

std::vector<std::uint32_t> finish_choices(const Part& part, const Catalogue& catalogue) {
  std::vector<std::uint32_t> out;
  for (const auto& id : part.finishes) {
    if (id == "none") {
      out.push_back(Candidate::none);
      continue;
    }
    for (std::size_t i = 0; i < catalogue.finishes.size(); ++i) {
      if (catalogue.finishes[i].id == id) {
        out.push_back(static_cast<std::uint32_t>(i));
      }
    }
  }
  return out;
}

std::vector<std::uint32_t> route_choices(const Part& part, const Catalogue& catalogue) {
  const auto& limits = part.limits;
  std::vector<std::uint32_t> out;
  for (std::size_t i = 0; i < catalogue.routes.size(); ++i) {
    const auto& route = catalogue.routes[i];
    const bool asked = limits.routes.empty() || contains_word(limits.routes, route.id);
    // A route that runs after another one (bending after cutting) leaves no prismatic shape of its
    // own.
    if (route.kind == RouteKind::primary && asked &&
        !contains_word(limits.forbidden_routes, route.id)) {
      out.push_back(static_cast<std::uint32_t>(i));
    }
  }
  return out;
}

Outcome solve_group(const SizingProblem& problem, std::size_t group, std::size_t& evaluations) {
  const auto& compiled = problem.compiled(group);
  Outcome out;
  out.candidate = compiled.candidate;
  out.group = group;
  if (!compiled.undecided.empty() || !compiled.undecided_limits.empty()) {
    out.kind = problem.settings().missing == Missing::exclude ? Outcome::Kind::excluded
                                                              : Outcome::Kind::undecided;
    out.reason = missing_text(compiled);
    return out;
  }
  if (compiled.variable.kind == Variable::Kind::ordered_set && compiled.variable.values.empty()) {
    out.reason = "no size in the range asked for";
    out.least_utilisation = infinity;
    return out;
  }
  const auto solution = solve_exact(problem, group);
  evaluations += solution.evaluations;
  if (!solution.solved) {
    throw InternalError("sizing: a candidate with one size is not solvable exactly");
  }
  if (solution.points.empty()) {
    out.failed = failed_constraints(solution);
    for (const auto constraint : out.failed) {
      out.reason +=
          (out.reason.empty() ? "" : " against ") + compiled.constraints[constraint].label;
    }
    out.least_utilisation = solution.least_utilisation;
    return out;
  }
  std::vector<double> objectives(2);
  std::vector<double> utilisations(compiled.constraints.size());
  for (const auto& point : solution.points) {
    double x = point.x[0];
    // The root lies on the feasible side of the scaled section; the plain path may differ by a
    // rounding.
    double step = 4.0 * std::numeric_limits<double>::epsilon();
    for (int tries = 0; tries < 16; ++tries) {
      problem.evaluate_plain(group, x, objectives, utilisations);
      const double worst = *std::max_element(utilisations.begin(), utilisations.end());
      if (worst <= 1.0 || compiled.variable.kind == Variable::Kind::ordered_set) {
        break;
      }
      x *= 1.0 + step;
      step *= 2.0;
    }
    if (*std::max_element(utilisations.begin(), utilisations.end()) <= 1.0) {
      out.points.push_back({x, objectives[0], objectives[1]});
    } else {
      out.reason = "INTERNAL: the plain path does not confirm it";
    }
  }
  out.kind = out.points.empty() ? Outcome::Kind::infeasible : Outcome::Kind::feasible;
  return out;
}

Solved solve_candidates(const Part& part,
                        const Catalogue& catalogue,
                        const Settings& settings,
                        const RunOptions& run,
                        std::uint32_t material) {
  Solved solved;
  solved.problem = std::make_unique<SizingProblem>(part, catalogue, settings);
  Enumeration enumeration(part, catalogue, solved);
  Progress progress(run);
  const auto count = static_cast<std::uint32_t>(catalogue.materials.size());
  const std::uint32_t from = material == Candidate::none ? 0 : material;
  const std::uint32_t to = material == Candidate::none ? count : material + 1;
  for (std::uint32_t m = from; m < to; ++m) {
    if (run.stop.stop_requested()) {
      solved.stopped = true;
      break;
    }
    enumeration.material(m, [&](const Candidate& candidate) {
      const auto& compiled = solved.problem->add(candidate);
      const bool bought_thickness = candidate.shape != Candidate::none &&
                                    takes_sheet_thickness(catalogue.routes[candidate.route]);
      if (bought_thickness && compiled.variable.values.empty()) {
        ++solved.cannot_exist[Rule::stock_thickness];
        return;
      }
      solved.outcomes.push_back(
          solve_group(*solved.problem, solved.problem->groups() - 1, solved.evaluations));
    });
    progress.at(static_cast<double>(m - from + 1) / static_cast<double>(to - from));
  }
  if (!settings.doubtful_sizes) {
    for (const auto list : stock_lists(part, catalogue)) {
      const auto& items = catalogue.stock[list].items;
      solved.doubtful_sizes += static_cast<std::size_t>(
          std::count_if(items.begin(), items.end(), [](const StockItem& item) {
            return item.availability == Availability::doubtful;
          }));
    }
  }
  return solved;
}

}  // namespace bismar
