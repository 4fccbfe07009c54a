// SPDX-License-Identifier: MIT
#include "sizing/problem.hpp"

#include "sizing/candidate_compiler.hpp"
#include "sizing/gaps.hpp"
#include "sizing/stock_solver.hpp"

#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <set>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

MemberLimits limits_of_member(const Limits& limits, const MemberDetails& details) {
  MemberLimits out;
  out.deflection = limits.deflection;
  out.shear_deflection = limits.shear_deflection;
  out.rotation = limits.rotation;
  out.twist = limits.twist;
  out.frequency = limits.frequency;
  out.elongation = limits.elongation;
  out.height = limits.height;
  out.width = limits.width;
  out.wall = limits.wall;
  out.slenderness = limits.slenderness;
  out.column_method = limits.column_method;
  out.lateral_restraint = limits.lateral_restraint;
  out.details = details;
  return out;
}

double by_class(const std::map<std::string, double, std::less<>>& values,
                const MaterialInfo& material,
                double otherwise) {
  const auto own = values.find(material.material_class);
  return own != values.end() ? own->second : otherwise;
}

bool is_hollow(const SectionProperties& section) { return section.inner_perimeter > 0.0; }

/// A yes-or-no condition as a utilisation.
double pass(bool good) { return good ? 0.0 : infinity; }

}  // namespace

SizingProblem::SizingProblem(const Part& part, const Catalogue& catalogue, const Settings& settings)
    : part_(part),
      catalogue_(catalogue),
      settings_(settings),
      reader_(catalogue, settings),
      member_limits_(limits_of_member(part.limits, part.body.details)),
      sections_(part.body.shapes) {
  for (const auto& load_case : part.body.load_cases) {
    effects_.push_back(reduce(load_case, part.body.length));
  }
  stock_solver_ = std::make_unique<const StockSolver>(*this);
}

SizingProblem::~SizingProblem() = default;

const CompiledCandidate& SizingProblem::add(const Candidate& candidate) {
  return add(candidate, 0.0, {});
}

const CompiledCandidate& SizingProblem::add(const Candidate& candidate,
                                            double size,
                                            const FreeSizes& free_sizes) {
  groups_.push_back(CandidateCompiler(*this, candidate, size, free_sizes).run());
  return *groups_.back();
}

SectionProperties SizingProblem::section_of(const CompiledCandidate& group,
                                            const Route& route,
                                            double height) const {
  FreeSizes sizes = group.free_sizes;
  if (height != group.own_size) {
    for (double& size : sizes) {
      size *= height / group.own_size;
    }
  }
  return sections_.at(group.candidate.shape, route, height, sizes);
}

std::span<const Variable> SizingProblem::variables(std::size_t group) const {
  return {&groups_[group]->variable, 1};
}

std::size_t SizingProblem::constraints(std::size_t group) const {
  return groups_[group]->constraints.size();
}

Trend SizingProblem::objective_trend(std::size_t /*group*/,
                                     std::size_t /*i*/,
                                     std::size_t /*v*/) const {
  return Trend::rises;
}

Trend SizingProblem::utilisation_trend(std::size_t group, std::size_t i, std::size_t /*v*/) const {
  return groups_[group]->constraints[i].trend;
}

const std::vector<StepState>& SizingProblem::states(std::size_t material) {
  const auto [entry, added] = states_.try_emplace(material);
  if (added) {
    for (const auto& step : catalogue_.materials.steps(material)) {
      entry->second.push_back(make_state(material, step.row));
    }
  }
  return entry->second;
}

const std::vector<UsableItem>& SizingProblem::blank_stock_of(std::uint32_t material,
                                                             std::uint32_t route) {
  const auto [entry, added] = blank_stock_.try_emplace({material, route});
  if (added) {
    entry->second = blank_stock(
        catalogue_.materials.info(material), catalogue_.routes[route], catalogue_, settings_);
  }
  return entry->second;
}

StepState SizingProblem::make_state(std::size_t material, std::size_t row) const {
  const auto& material_class = catalogue_.materials.info(material).material_class;
  StepState state;
  state.row = row;
  for (std::size_t c = 0; c < effects_.size(); ++c) {
    state.cases.push_back(resolve_case(material, row, c));
  }
  state.density = state.cases.front().member.rho.value_or(0.0);
  if (const auto price = catalogue_.materials.value(Property::price, row)) {
    state.price = *price;
    state.usual_price = price->at(reader_.end(Property::price));
    state.priced = true;
  } else if (const auto median = reader_.class_median(Property::price, material_class)) {
    state.price = {*median, *median};
    state.usual_price = *median;
    state.priced = true;
    state.cases.front().notes.push_back(class_median_note(Property::price));
  }
  return state;
}

ResolvedMaterial SizingProblem::resolve_case(std::size_t material,
                                             std::size_t row,
                                             std::size_t load_case) const {
  const auto& loads = part_.body.load_cases[load_case];
  std::set<Symbol> filled;
  const Service service{part_.service_class, part_.limits.temperature};
  auto resolved = resolve(reader_, material, row, loads, service);
  if (settings_.missing != Missing::class_median) {
    return resolved;
  }
  // Whatever a limit state of this load case may read; the section is not known yet, so a
  // tube and an I stand for all: walls, and a weak axis. A filled yield strength may change the
  // rule, and so what is read:
  // look again.
  const std::array any_sections = {bismar::round_tube(0.1, 0.01, Forming::unknown),
                                   bismar::i_section(0.2, 0.1, 0.006, 0.009, 0.01)};
  for (int pass_number = 0; pass_number < 3; ++pass_number) {
    std::set<Symbol> wanted = {Symbol::rho};
    for (const LimitState* state : limit_states()) {
      const bool applies =
          std::any_of(any_sections.begin(), any_sections.end(), [&](const auto& section) {
            return state->applies(effects_[load_case], member_limits_, resolved.member, section);
          });
      if (applies) {
        const auto needs = state->needs(effects_[load_case], resolved.member);
        wanted.insert(needs.begin(), needs.end());
      }
    }
    std::erase_if(wanted,
                  [&](Symbol symbol) { return value_of(resolved.member, symbol).has_value(); });
    if (wanted.empty()) {
      break;
    }
    filled.merge(wanted);
    resolved = resolve(reader_, material, row, loads, service, filled);
  }
  return resolved;
}

std::vector<StepState> SizingProblem::multiply(std::size_t material, Symbol symbol, double factor) {
  auto before = states_[material];
  for (auto& state : states_[material]) {
    for (auto& resolved : state.cases) {
      if (auto& value = value_of(resolved.member, symbol)) {
        *value *= factor;
      }
      if (symbol == Symbol::E && resolved.member.E_axial) {
        *resolved.member.E_axial *= factor;
      }
    }
  }
  return before;
}

void SizingProblem::restore(std::size_t material, const std::vector<StepState>& states) {
  // Element by element: pieces point at the states.
  std::copy(states.begin(), states.end(), states_[material].begin());
}

std::optional<double> listed_size(const Variable& variable, double size) {
  if (variable.kind == Variable::Kind::continuous) {
    return size >= variable.lower && size <= variable.upper ? std::optional(size) : std::nullopt;
  }
  for (const double value : variable.values) {
    if (std::abs(value - size) <= 1e-12 * size) {
      return value;
    }
  }
  return std::nullopt;
}

const Piece& SizingProblem::piece_at(const CompiledCandidate& group, double at) const {
  // A bought thickness at the end of a step stays in it, whichever way its ratio was rounded.
  const double x = group.own_size > 0.0 ? at * (1.0 - 5e-13) : at;
  const auto found = std::lower_bound(
      group.pieces.begin(), group.pieces.end(), x, [](const Piece& piece, double size) {
        return piece.upper < size;
      });
  return found == group.pieces.end() ? group.pieces.back() : *found;
}

std::optional<Purchase> SizingProblem::purchase(const CompiledCandidate& group,
                                                const Piece& piece,
                                                const SectionProperties& section,
                                                double net_mass) const {
  const double length = part_.body.length;
  const Route& route = catalogue_.routes[group.candidate.route];
  if (piece.item != nullptr) {
    return buy_length(
        section.area, piece.step->density, length, piece.item->lengths, settings_.kerf);
  }
  if (machines_blank(route)) {
    return piece.blank == nullptr
               ? std::nullopt
               : buy(*piece.blank, section, piece.step->density, length, settings_);
  }
  return Purchase{net_mass / (1.0 - route.scrap), 0.0, 1.0};
}

double SizingProblem::material_utilisation(const CompiledCandidate& group,
                                           const Constraint& constraint,
                                           const StepState& step,
                                           const SectionProperties& section) const {
  const auto& info = catalogue_.materials.info(group.candidate.material);
  const Finish* finish = group.candidate.finish == Candidate::none
                             ? nullptr
                             : &catalogue_.finishes[group.candidate.finish];
  if (constraint.kind == Constraint::Kind::corrosion) {
    const auto& medium = *part_.limits.medium;
    const bool grade_holds = info.corrosion.at(medium) >= part_.limits.corrosion_at_least;
    if (grade_holds || finish == nullptr) {
      return pass(grade_holds);
    }
    // A finish helps where it states a rating; under it the grade holds out as well as it does by
    // itself. The bore of a tube is only finished by a bath.
    const auto after = finish->corrosion_after.find(medium);
    return pass(after != finish->corrosion_after.end() &&
                after->second >= part_.limits.corrosion_at_least &&
                (!is_hollow(section) || is_bath(*finish)));
  }
  if (constraint.kind == Constraint::Kind::temperature) {
    const double service = *part_.limits.temperature;
    const auto lowest = reader_.value(Property::service_temperature_min, step.row);
    const auto highest =
        highest_temperature(reader_, info, step.row, service, part_.body.load_cases);
    const bool finish_stands = finish == nullptr || !finish->service_temperature_max ||
                               service <= *finish->service_temperature_max;
    return pass((!lowest || service >= *lowest) && (!highest || service <= *highest) &&
                finish_stands);
  }
  return *property_utilisation(constraint.property_limit, step.row);
}

std::optional<double> SizingProblem::property_utilisation(std::size_t index,
                                                          std::size_t row) const {
  const auto& limit = part_.limits.properties[index];
  const auto range = limited_value(catalogue_.materials, limit, row);
  if (!range) {
    return std::nullopt;
  }
  double u = 0.0;
  if (limit.at_least) {
    const double value = limited_end(reader_, limit, *range, true);
    u = value > 0.0 && *limit.at_least > 0.0 ? *limit.at_least / value
                                             : pass(value >= *limit.at_least);
  }
  if (limit.at_most) {
    const double value = limited_end(reader_, limit, *range, false);
    u = std::max(u,
                 value > 0.0 && *limit.at_most > 0.0 ? value / *limit.at_most
                                                     : pass(value <= *limit.at_most));
  }
  return u;
}

double SizingProblem::least_wall(const CompiledCandidate& group) const {
  const Route& route = catalogue_.routes[group.candidate.route];
  return by_class(route.min_wall_by_class,
                  catalogue_.materials.info(group.candidate.material),
                  route.section_min);
}

double SizingProblem::least_mass(const CompiledCandidate& group) const {
  const Route& route = catalogue_.routes[group.candidate.route];
  return route.rate_basis == RateBasis::metre ? 0.0 : route.mass_min;
}

double SizingProblem::largest_wall(const CompiledCandidate& group) const {
  const Route& route = catalogue_.routes[group.candidate.route];
  return by_class(route.max_wall_by_class,
                  catalogue_.materials.info(group.candidate.material),
                  route.section_max);
}

Constraint SizingProblem::limit_constraint(const LimitState& state,
                                           std::size_t load_case,
                                           const MemberMaterial& material) const {
  const auto& factors = part_.body.load_cases[load_case].factors;
  Constraint constraint;
  constraint.state = &state;
  constraint.load_case = load_case;
  constraint.trend = state.trend_with_scale();
  constraint.label = std::string(state.id());
  auto own = factors.find(constraint.label);
  if (own == factors.end() && constraint.label == "deflection with shear") {
    own = factors.find("deflection");  // the same limit, its shear part included
  }
  constraint.factor = own != factors.end() ? own->second : state.default_factor(material);
  return constraint;
}

void SizingProblem::evaluate_section(const CompiledCandidate& group,
                                     std::span<const Constraint> constraints,
                                     const Piece& piece,
                                     const SectionProperties& section,
                                     std::span<double> objectives,
                                     std::span<double> utilisations) const {
  const double length = part_.body.length;
  std::optional<Purchase> bought;
  double net_mass = infinity;
  double mass = infinity;
  double cost = infinity;
  if (piece.step != nullptr) {
    net_mass = piece.step->density * section.area * length;
    bought = purchase(group, piece, section, net_mass);
    mass = net_mass + group.cost->finish_mass(section);
    if (bought) {
      cost = group.cost->total(
          {section, net_mass, *bought}, piece.step->price, piece.step->usual_price);
    }
  }
  objectives[0] = mass;
  objectives[1] = cost;

  const Route& route = catalogue_.routes[group.candidate.route];
  for (std::size_t i = 0; i < constraints.size(); ++i) {
    const auto& constraint = constraints[i];
    double u = 0.0;
    if (constraint.kind == Constraint::Kind::thickness_limit) {
      u = pass(piece.step != nullptr || piece.impossible);
    } else if (constraint.kind == Constraint::Kind::corners) {
      u = pass(!piece.impossible);
    } else if (piece.step != nullptr) {
      switch (constraint.kind) {
        case Constraint::Kind::thickness_limit:
        case Constraint::Kind::corners:
          break;
        case Constraint::Kind::blank:
          u = pass(bought.has_value());
          break;
        case Constraint::Kind::property:
        case Constraint::Kind::corrosion:
        case Constraint::Kind::temperature:
          u = material_utilisation(group, constraint, *piece.step, section);
          break;
        case Constraint::Kind::limit_state:
          u = applies(constraint, i, piece, section)
                  ? limit_utilisation(constraint, *piece.step, section)
                  : 0.0;
          break;
        case Constraint::Kind::route_wall:
          u = least_wall(group) / section.wall;
          break;
        case Constraint::Kind::route_section:
          u = section.wall / largest_wall(group);
          break;
        case Constraint::Kind::route_mass_min:
          u = route.mass_min / net_mass;
          break;
        case Constraint::Kind::route_mass_max:
          u = net_mass / route.mass_max;
          break;
        case Constraint::Kind::mass_cap:
          u = mass / *part_.limits.mass;
          break;
        case Constraint::Kind::cost_cap:
          u = cost / *part_.limits.cost;
          break;
      }
    }
    utilisations[i] = u;
  }
}

bool SizingProblem::applies(const Constraint& constraint,
                            std::size_t index,
                            const Piece& piece,
                            const SectionProperties& section) const {
  if (!constraint.by_section) {
    return piece.applies[index];
  }
  return constraint.state->applies(effects_[constraint.load_case],
                                   member_limits_,
                                   piece.step->cases[constraint.load_case].member,
                                   section);
}

double SizingProblem::limit_utilisation(const Constraint& constraint,
                                        const StepState& step,
                                        const SectionProperties& section) const {
  const auto& resolved = step.cases[constraint.load_case];
  const auto check = [&](const MemberMaterial& material) {
    return constraint.state->utilisation({section,
                                          material,
                                          effects_[constraint.load_case],
                                          member_limits_,
                                          part_.body.length,
                                          constraint.factor});
  };
  // Only LVL changes with its depth; the copy is not worth making for the others.
  return resolved.depth_reference > 0.0 ? check(resolved.at_depth(section.height))
                                        : check(resolved.member);
}

void SizingProblem::evaluate(std::size_t group,
                             std::span<const double> x,
                             std::span<double> objectives,
                             std::span<double> utilisations) const {
  const auto& compiled = *groups_[group];
  const Piece& piece = piece_at(compiled, x[0]);
  if (piece.item != nullptr || piece.impossible || x[0] == piece.size) {
    evaluate_section(
        compiled, compiled.constraints, piece, piece.section, objectives, utilisations);
  } else {
    evaluate_section(compiled,
                     compiled.constraints,
                     piece,
                     scaled(piece.section, x[0] / piece.size),
                     objectives,
                     utilisations);
  }
}

void SizingProblem::evaluate_plain(std::size_t group,
                                   double x,
                                   std::span<double> objectives,
                                   std::span<double> utilisations) const {
  const auto one = detail(group, x);
  const auto& compiled = *groups_[group];
  evaluate_section(
      compiled, compiled.constraints, *one.piece, one.section, objectives, utilisations);
}

SizingProblem::Detail SizingProblem::detail(std::size_t group, double x) const {
  const auto& compiled = *groups_[group];
  Detail out;
  out.piece = &piece_at(compiled, x);
  out.section = out.piece->item != nullptr || out.piece->impossible
                    ? out.piece->section
                    : section_of(compiled, catalogue_.routes[compiled.candidate.route], x);
  if (out.piece->step != nullptr) {
    out.net_mass = out.piece->step->density * out.section.area * part_.body.length;
    out.purchase = purchase(compiled, *out.piece, out.section, out.net_mass);
  }
  return out;
}

}  // namespace bismar
