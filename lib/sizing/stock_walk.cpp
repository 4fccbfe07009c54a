// SPDX-License-Identifier: MIT
#include "sizing/stock_walk.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <bit>
#include <cmath>
#include <limits>
#include <numbers>
#include <utility>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Left for rounding wherever a size is turned down without its full evaluation: bounds differ from
/// it by a few roundings of 1e-16.
constexpr double slack = 1e-9;

using Kind = Constraint::Kind;

bool is_hollow(const SectionProperties& section) { return section.inner_perimeter > 0.0; }

/// Whether the constraint is the same for all sizes of one strength step, solid or hollow.
bool is_of_material(Kind kind) {
  return kind == Kind::property || kind == Kind::corrosion || kind == Kind::temperature;
}

bool rises_with_mass(const Route& route) {
  return route.tooling_mass_exponent >= 0.0 && route.rate_mass_exponent >= 0.0 &&
         route.scrap >= 0.0 && route.scrap < 1.0;
}

}  // namespace

StockWalk::StockWalk(const SizingProblem& problem,
                     std::size_t group,
                     const StockDemands& demands,
                     StockSolver::Counts& counts)
    : problem_(problem),
      group_(group),
      compiled_(problem.compiled(group)),
      demands_(demands),
      counts_(counts),
      piece_at_(demands.items().size(), StockDemands::no_place),
      objectives_(2),
      utilisations_(compiled_.constraints.size()),
      least_(compiled_.constraints.size(), infinity) {}

GroupSolution StockWalk::run() {
  counts_.sizes += compiled_.pieces.size();
  sort_pieces();
  walk();
  if (solution_.points.empty()) {
    explain();
  } else {
    filter();
  }
  return std::move(solution_);
}

void StockWalk::sort_pieces() {
  const std::size_t words = demands_.table().blocks();
  least_price_ = least_density_ = infinity;
  steps_.reserve(8);
  Step* step = nullptr;
  for (std::size_t p = 0; p < compiled_.pieces.size(); ++p) {
    const Piece& piece = compiled_.pieces[p];
    // All three are the item's index; this one lies beside the step in memory.
    const auto place = demands_.place_of(static_cast<std::size_t>(piece.lower));
    piece_at_[place] = static_cast<std::uint32_t>(p);
    if (piece.step == nullptr) {
      untabulated_ = true;
      continue;
    }
    if (step == nullptr || step->state != piece.step) {
      const auto known = std::find_if(
          steps_.begin(), steps_.end(), [&](const Step& one) { return one.state == piece.step; });
      step = known != steps_.end()
                 ? &*known
                 : &steps_.emplace_back(Step{.state = piece.step,
                                             .first_piece = p,
                                             .places = std::vector<std::uint64_t>(words)});
      least_density_ = std::min(least_density_, piece.step->density);
      least_price_ = std::min(least_price_, piece.step->usual_price);
    }
    step->places[place / DemandTable::block] |= std::uint64_t{1} << (place % DemandTable::block);
  }
  const auto& catalogue = problem_.catalogue();
  const auto& candidate = compiled_.candidate;
  cost_rises_ = least_price_ >= 0.0 && problem_.settings().scrap_credit >= 0.0 &&
                problem_.settings().scrap_credit <= 1.0 &&
                rises_with_mass(catalogue.routes[candidate.route]) &&
                (candidate.treatment == Candidate::none ||
                 rises_with_mass(catalogue.routes[candidate.treatment]));
}

void StockWalk::set_capacities(Step& step) const {
  step.capacities.assign(demands_.table().conditions(), infinity);
  auto& capacities = step.capacities;
  const double mass_per_area = step.state->density * problem_.part().body.length;
  const auto& limits = problem_.part().limits;
  const Route& route = problem_.catalogue().routes[compiled_.candidate.route];
  const auto lower = [&](std::size_t condition, double capacity) {
    // No limit at all, or one that no number can be made of, leaves the condition open.
    if (capacity > 0.0) {
      capacities[condition] = std::min(capacities[condition], capacity * (1.0 + slack));
    }
  };
  constexpr std::size_t most_terms = 16;
  std::array<double, most_terms> of_terms{};
  auto terms = demands_.terms().begin();
  const auto& first = compiled_.pieces[step.first_piece];
  for (std::size_t i = 0; i < compiled_.constraints.size(); ++i) {
    const Constraint& constraint = compiled_.constraints[i];
    switch (constraint.kind) {
      case Kind::route_wall:
        lower(StockDemands::thin_wall, 1.0 / problem_.least_wall(compiled_));
        break;
      case Kind::route_section:
        lower(StockDemands::thick_wall, problem_.largest_wall(compiled_));
        break;
      case Kind::route_mass_min:
        lower(StockDemands::light, mass_per_area / route.mass_min);
        break;
      case Kind::route_mass_max:
        lower(StockDemands::heavy, route.mass_max / mass_per_area);
        break;
      case Kind::mass_cap:
        lower(StockDemands::heavy, *limits.mass / mass_per_area);
        break;
      case Kind::limit_state: {
        // Both lists run in the same order; what applies to the first size applies to all, or
        // asks nothing of the others.
        const auto found = std::find_if(terms, demands_.terms().end(), [&](const auto& one) {
          return one.state == constraint.state && one.load_case == constraint.load_case;
        });
        if (found == demands_.terms().end() || !first.applies[i]) {
          break;
        }
        terms = found + 1;
        const SeparableBound* bound = constraint.state->separable();
        if (bound->terms() > most_terms) {
          throw InternalError("a separable bound has too many terms");
        }
        bound->capacities({step.state->cases[constraint.load_case].member,
                           problem_.effects()[constraint.load_case],
                           problem_.member_limits()},
                          std::span(of_terms).first(bound->terms()));
        for (std::size_t t = 0; t < found->kept.size(); ++t) {
          lower(found->first + t, of_terms[found->kept[t]] / constraint.factor);
        }
        break;
      }
      default:
        break;
    }
  }
}

std::vector<std::uint64_t> StockWalk::possible() const {
  std::vector<std::uint64_t> bits(demands_.table().blocks());
  for (const Step& step : steps_) {
    for (std::size_t b = 0; b < bits.size(); ++b) {
      if (step.places[b] != 0) {
        bits[b] |= step.places[b] & ~exceeding_in_block(demands_.table(), b, step.capacities);
      }
    }
  }
  return bits;
}

StockWalk::Worth StockWalk::worth(const Piece& piece) const {
  // As SizingProblem::evaluate computes them, to the last bit.
  const auto& section = piece.section;
  const double length = problem_.part().body.length;
  const double net_mass = piece.step->density * section.area * length;
  const auto bought = buy_length(
      section.area, piece.step->density, length, piece.item->lengths, problem_.settings().kerf);
  return {
      .mass = net_mass + compiled_.cost->finish_mass(section),
      .cost = bought ? compiled_.cost->total(
                           {section, net_mass, *bought}, piece.step->price, piece.step->usual_price)
                     : infinity,
      .bought = bought.has_value()};
}

bool StockWalk::is_beaten(double mass, double cost) const {
  return std::any_of(
      solution_.points.begin(), solution_.points.end(), [&](const GroupSolution::Point& point) {
        const double m = point.objectives[0];
        const double c = point.objectives[1];
        return m <= mass && c <= cost && (m < mass || c < cost);
      });
}

bool StockWalk::all_beaten_from(std::size_t place) const {
  const Piece& piece = compiled_.pieces[piece_at_[place]];
  SectionProperties least;
  least.area = piece.section.area;
  // No outline of that area is shorter than a circle.
  least.perimeter = 2.0 * std::sqrt(std::numbers::pi * least.area);
  const double mass = least_density_ * least.area * problem_.part().body.length;
  const double cost = compiled_.cost->total(
      {least, mass, Purchase{mass, 0.0, 1.0}}, {least_price_, least_price_}, least_price_);
  const auto& cheapest = solution_.points[*cheapest_].objectives;
  return cheapest[0] <= mass * (1.0 - slack) && cheapest[1] < cost * (1.0 - slack);
}

std::size_t StockWalk::end_of_walk(std::size_t from, std::size_t end) const {
  if (!cost_rises_) {
    return end;
  }
  // Both bounds rise with the area, so that what is true of a place is true of those behind it.
  while (from < end) {
    std::size_t middle = from + (end - from) / 2;
    const std::size_t asked = middle;
    // Not every offered size is of the candidate.
    while (middle < end && piece_at_[middle] == StockDemands::no_place) {
      ++middle;
    }
    if (middle == end || all_beaten_from(middle)) {
      end = asked;
    } else {
      from = middle + 1;
    }
  }
  return end;
}

void StockWalk::walk() {
  for (Step& step : steps_) {
    set_capacities(step);
  }
  const auto bits = possible();
  std::size_t left = 0;
  for (const auto word : bits) {
    left += static_cast<std::size_t>(std::popcount(word));
  }
  counts_.excluded += compiled_.pieces.size() - left;
  std::size_t end = piece_at_.size();
  for (std::size_t b = 0; b < bits.size(); ++b) {
    for (std::uint64_t word = bits[b]; word != 0; word &= word - 1) {
      const std::size_t place =
          b * DemandTable::block + static_cast<std::size_t>(std::countr_zero(word));
      if (place >= end) {
        counts_.beaten += left;
        return;
      }
      --left;
      const auto before = cheapest_;
      visit(place);
      if (cheapest_ != before) {
        end = end_of_walk(place + 1, end);
      }
    }
  }
}

void StockWalk::visit(std::size_t place) {
  const Piece& piece = compiled_.pieces[piece_at_[place]];
  const Step& step = step_of(piece);
  if ((is_hollow(piece.section) ? step.hollow : step.solid) > 1.0) {
    return;
  }
  const Worth worth = this->worth(piece);
  if (is_beaten(worth.mass, worth.cost)) {
    ++counts_.beaten;
    return;
  }
  const auto& limits = problem_.part().limits;
  if (!worth.bought || (limits.mass && worth.mass / *limits.mass > 1.0) ||
      (limits.cost && worth.cost / *limits.cost > 1.0)) {
    return;
  }
  if (last_failed_ && piece.applies[*last_failed_] && utilisation(*last_failed_, piece) > 1.0) {
    ++counts_.checked;
    return;
  }
  evaluate(piece);
  double largest = 1.0;
  bool feasible = true;
  for (std::size_t i = 0; i < utilisations_.size(); ++i) {
    if (utilisations_[i] <= 1.0) {
      continue;
    }
    feasible = false;
    const Kind kind = compiled_.constraints[i].kind;
    if (kind == Kind::limit_state && utilisations_[i] > largest) {
      largest = utilisations_[i];
      last_failed_ = i;
    }
  }
  if (feasible) {
    solution_.points.push_back({{piece.size}, objectives_, utilisations_});
    if (!cheapest_ || objectives_[1] < solution_.points[*cheapest_].objectives[1]) {
      cheapest_ = solution_.points.size() - 1;
    }
  }
}

void StockWalk::filter() {
  // Ordered and filtered as solve_exact() does it.
  auto& points = solution_.points;
  std::sort(points.begin(), points.end(), [](const auto& a, const auto& b) {
    return a.objectives != b.objectives ? a.objectives < b.objectives : a.x < b.x;
  });
  // In this order a point is beaten where one before it costs less, or as much at less mass.
  std::vector<GroupSolution::Point> kept;
  for (auto& point : points) {
    const bool ties = !kept.empty() && kept.back().objectives == point.objectives;
    if (kept.empty() || ties || point.objectives[1] < kept.back().objectives[1]) {
      kept.push_back(std::move(point));
    }
  }
  points = std::move(kept);
}

void StockWalk::evaluate(const Piece& piece) {
  problem_.evaluate(group_, std::span(&piece.size, 1), objectives_, utilisations_);
  ++solution_.evaluations;
  ++counts_.evaluated;
  double* of_material = nullptr;
  if (piece.step != nullptr) {
    Step& step = step_of(piece);
    of_material = is_hollow(piece.section) ? &step.hollow : &step.solid;
  }
  for (std::size_t i = 0; i < least_.size(); ++i) {
    least_[i] = std::min(least_[i], utilisations_[i]);
    if (of_material != nullptr && is_of_material(compiled_.constraints[i].kind)) {
      *of_material = std::max(*of_material, utilisations_[i]);
    }
  }
}

double StockWalk::utilisation(std::size_t i, const Piece& piece) const {
  const Constraint& constraint = compiled_.constraints[i];
  const auto& resolved = piece.step->cases[constraint.load_case];
  const auto check = [&](const MemberMaterial& material) {
    return constraint.state->utilisation({piece.section,
                                          material,
                                          problem_.effects()[constraint.load_case],
                                          problem_.member_limits(),
                                          problem_.part().body.length,
                                          constraint.factor});
  };
  return resolved.depth_reference > 0.0 ? check(resolved.at_depth(piece.section.height))
                                        : check(resolved.member);
}

StockWalk::Step& StockWalk::step_of(const Piece& piece) {
  const auto found = std::find_if(
      steps_.begin(), steps_.end(), [&](const Step& one) { return one.state == piece.step; });
  if (found == steps_.end()) {
    throw InternalError("a stock size without a strength step was looked up");
  }
  return *found;
}

}  // namespace bismar
