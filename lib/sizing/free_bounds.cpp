// SPDX-License-Identifier: MIT
// Bounds of a candidate with free dimensions over boxes of them, and the size solved for.
#include "sizing/free_scratch.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section_builder.hpp>
#include <bismar/numeric/root.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Bounds are taken outward by this: above the rounding of the few hundred operations behind them.
constexpr double slack = 1e-12;

/// The largest size up to which u(size) > allowed, as far as a few evaluations tell: the size
/// returned was evaluated and is above. `u` falls; it is `first` at `from` and above there.
/// @return `to` where it is above everywhere.
template <class Utilisation>
double infeasible_up_to(
    double from, double first, double to, double allowed, Utilisation&& utilisation) {
  constexpr double close = 2e-5;
  double below = from;
  double log_below = std::log(first / allowed);
  double above = infinity;
  double slope = 3.0;  // -d ln u / d ln size: bending
  for (int step = 0; step < 40 && std::isfinite(log_below); ++step) {
    // A little short of the root, so that the next point is on the side that counts.
    double next = below * std::exp(log_below / slope * (1.0 - 1e-3));
    next = std::min(next, to);
    if (above < infinity) {
      next = std::min(next, below + 0.9 * (above - below));
    }
    if (next <= below * (1.0 + close)) {
      return below;
    }
    const double u = utilisation(next);
    if (!(u > allowed)) {
      above = next;
      slope = std::max(slope * 1.3, log_below / std::log(next / below));
      if (above <= below * (1.0 + close)) {
        return below;
      }
      continue;
    }
    if (next >= to) {
      return to;
    }
    const double log_next = std::log(u / allowed);
    const double secant = (log_below - log_next) / std::log(next / below);
    slope = std::clamp(secant, 0.5, 8.0);
    below = next;
    log_below = log_next;
  }
  // Infinite, or steeper than any power: halve.
  for (int step = 0; step < 40 && (above == infinity || above > below * (1.0 + close)); ++step) {
    const double next = above == infinity ? std::min(2.0 * below, to) : 0.5 * (below + above);
    if (utilisation(next) > allowed) {
      if (next >= to) {
        return to;
      }
      below = next;
    } else {
      above = next;
    }
  }
  return below;
}

}  // namespace

bool FreeSizeProblem::enclose(const Mode& mode,
                              std::span<const double> lower,
                              std::span<const double> upper,
                              std::size_t stride,
                              bool unit_height,
                              Scratch& scratch) const {
  const auto names = dimensions(shape_.family);
  auto& sizes = scratch.dimensions;
  double root_radius = 0.0;
  auto& count = scratch.count;
  count = 0;
  for (std::size_t i = 0; i < mode.rules.size(); ++i) {
    const auto& rule = mode.rules[i];
    const std::size_t v = rule.variable * stride;
    Interval size;
    switch (rule.kind) {
      case DimensionRule::Kind::height:
        size = unit_height ? Interval(1.0) : Interval(lower[v], upper[v]);
        break;
      case DimensionRule::Kind::variable:
        size = Interval(lower[v], upper[v]);
        break;
      case DimensionRule::Kind::ratio:
        // The height of the unit is exact, so that its other dimensions are the ratios.
        size = unit_height ? Interval(lower[v], upper[v])
                           : Interval(lower[v] * sizes[0].lower(), upper[v] * sizes[0].upper());
        break;
      case DimensionRule::Kind::fixed:
        size = Interval(rule.value * sizes[0].lower(), rule.value * sizes[0].upper());
        break;
      case DimensionRule::Kind::constant:
        size = Interval(rule.value);
        break;
    }
    if (names[i].optional) {
      root_radius = names[i].name == "root radius" ? rule.value : root_radius;
    } else {
      sizes[count++] = size;
    }
  }
  const Interval radius(root_radius * sizes[0].lower(), root_radius * sizes[0].upper());
  const SizesBox box{shape_.family, std::span(sizes).first(count), radius, 0.0, forming_of(route_)};
  if (!may_be_usual(box)) {
    return false;
  }
  scratch.enclosed = is_enclosable(box);
  if (!scratch.enclosed) {
    scratch.rough_area = rough_area(box);
    return true;
  }
  enclose_sections(box, scratch.box);
  scratch.made.fill(false);
  scratch.light.clear();
  if (scratch.box.any) {
    for (const auto& resolved : mode.piece.step->cases) {
      scratch.light.push_back(lightened(resolved.depth_reference > 0.0
                                            ? resolved.at_depth(scratch.box.height.lower())
                                            : resolved.member,
                                        scratch.box));
    }
  }
  return scratch.box.any;
}

double FreeSizeProblem::least_utilisation(const Mode& mode,
                                          std::size_t constraint,
                                          const SectionBox& box,
                                          double scale,
                                          Scratch& scratch) const {
  const auto& one = constraints_[constraint];
  const auto& effects = sizing_.effects()[one.load_case];
  const auto kind = static_cast<std::size_t>(mode.best[constraint]);
  if (!scratch.made.at(kind)) {
    make_best(box, mode.best[constraint], scratch.best[kind]);
    scratch.made.at(kind) = true;
  }
  scale_into(scratch.best[kind], scale, scratch.scaled);
  const auto& resolved = mode.piece.step->cases[one.load_case];
  if (one.by_section &&
      !one.state->applies(effects, sizing_.member_limits(), resolved.member, scratch.scaled)) {
    return 0.0;
  }
  const auto check = [&](const MemberMaterial& material) {
    return one.state->utilisation({scratch.scaled,
                                   material,
                                   effects,
                                   sizing_.member_limits(),
                                   sizing_.part().body.length,
                                   one.factor}) *
           (1.0 - slack);
  };
  // LVL is the weaker the deeper: the least depth at this size counts.
  return resolved.depth_reference > 0.0
             ? check(lightened(resolved.at_depth(box.height.lower() * scale), box))
             : check(scratch.light[one.load_case]);
}

/// A box that is not enclosed yet: nothing is cut off, and it is split until it is.
void FreeSizeProblem::leave_whole(const Mode& mode,
                                  const ContractBatch& boxes,
                                  std::size_t b,
                                  Scratch& scratch) const {
  const double scale = mode.similar ? boxes.lower[b] : 1.0;
  const double area = scratch.rough_area * scale * scale;
  const auto& step = *mode.piece.step;
  boxes.objective_lower[b] = step.density * area * sizing_.part().body.length;
  // Some cost there always is: how much is not asked.
  boxes.objective_lower[boxes.count + b] = boxes.objective_lower[b] * step.usual_price;
}

void FreeSizeProblem::lower_objectives(const Mode& mode,
                                       const SectionBox& box,
                                       double scale,
                                       double least_mass,
                                       Scratch& scratch,
                                       std::span<double> objectives) const {
  SectionProperties& least = scratch.lower;
  least.family = shape_.family;
  least.height = box.height.lower() * scale;
  least.width = box.width.lower() * scale;
  least.wall = box.wall.lower() * scale;
  least.perimeter = box.perimeter.lower() * scale;
  least.inner_perimeter = box.inner_perimeter.lower() * scale;
  least.area = box.area.lower() * scale * scale;
  const auto& step = *mode.piece.step;
  const double net_mass =
      std::max(step.density * least.area * sizing_.part().body.length, least_mass);
  const auto bought = sizing_.purchase(base_, mode.piece, least, net_mass);
  objectives[0] = (net_mass + base_.cost->finish_mass(least)) * (1.0 - slack);
  objectives[1] =
      bought ? base_.cost->total({least, net_mass, *bought}, step.price, step.usual_price) *
                   (1.0 - slack)
             : infinity;
}

void FreeSizeProblem::contract_similar(const Mode& mode,
                                       double allowed,
                                       const ContractBatch& boxes,
                                       std::size_t b,
                                       Scratch& scratch) const {
  const std::size_t n = boxes.count;
  const auto extra = [&](std::size_t place) {
    return static_cast<std::uint32_t>(constraints_.size() + place);
  };
  double low = boxes.lower[b];
  double high = boxes.upper[b];
  auto& broken = boxes.broken[b];
  if (!enclose(mode, boxes.lower.subspan(b), boxes.upper.subspan(b), n, true, scratch)) {
    broken = extra(FreeConstraint::section);
    return;
  }
  if (!scratch.enclosed) {
    leave_whole(mode, boxes, b, scratch);
    return;
  }
  const SectionBox& box = scratch.box;
  const auto at_least = [&](double size, std::uint32_t constraint) {
    low = std::max(low, size * (1.0 - slack));
    broken = low > high && broken == no_index ? constraint : broken;
  };
  const auto at_most = [&](double size, std::uint32_t constraint) {
    high = std::min(high, size * (1.0 + slack));
    broken = low > high && broken == no_index ? constraint : broken;
  };
  const bool own_thickness = mode.piece.blank == nullptr || mode.piece.blank->item == nullptr;
  if (own_thickness) {
    const Interval thickness =
        equivalent_diameter_ ? box.ruling_by_surface() : box.ruling_dimension;
    at_least(mode.thickness_above / (thickness.upper() * allowed),
             extra(FreeConstraint::thickness_above));
    at_most(mode.thickness_up_to * allowed / thickness.lower(),
            extra(FreeConstraint::thickness_up_to));
  } else {
    scratch.lower.family = shape_.family;
    scratch.lower.height = box.height.lower();
    scratch.lower.width = box.width.lower();
    at_most(room_in(*mode.piece.blank, scratch.lower, sizing_.settings()),
            extra(FreeConstraint::blank));
    scratch.lower.width = box.width.upper();
    for (const Blank* other : mode.others) {
      if (holds_as_much(*other,
                        *mode.piece.blank,
                        shape_.family,
                        box.height,
                        box.width,
                        sizing_.settings())) {
        broken = extra(FreeConstraint::other_blank);
        return;
      }
      at_least(room_in(*other, scratch.lower, sizing_.settings()) / allowed,
               extra(FreeConstraint::other_blank));
    }
  }
  const auto& step = *mode.piece.step;
  const double length = sizing_.part().body.length;
  const double least_unit_mass = step.density * box.area.lower() * length;
  const double most_unit_mass = step.density * box.area.upper() * length;
  for (std::uint32_t i = 0; i < constraints_.size() && broken == no_index; ++i) {
    const auto& one = constraints_[i];
    using Kind = Constraint::Kind;
    switch (one.kind) {
      case Kind::route_wall:
        at_least(sizing_.least_wall(base_) / (box.wall.upper() * allowed), i);
        break;
      case Kind::route_section:
        at_most(sizing_.largest_wall(base_) * allowed / box.wall.lower(), i);
        break;
      case Kind::route_mass_min:
        at_least(std::sqrt(route_.mass_min / (most_unit_mass * allowed)), i);
        break;
      case Kind::route_mass_max:
        at_most(std::sqrt(route_.mass_max * allowed / least_unit_mass), i);
        break;
      case Kind::mass_cap:
        at_most(std::sqrt(*sizing_.part().limits.mass * allowed / least_unit_mass), i);
        break;
      case Kind::property:
      case Kind::corrosion:
      case Kind::temperature:
        if (sizing_.material_utilisation(base_, one, step, box.best) > allowed) {
          broken = i;
        }
        break;
      case Kind::limit_state:
        if (mode.piece.applies[i]) {
          const auto u = [&](double size) {
            return least_utilisation(mode, i, box, size, scratch);
          };
          const double here = u(low);
          if (!(here > allowed)) {
            break;
          }
          // Asked at the upper end first: the root below is only as close as it needs to be, which
          // must not keep a box alive that has no feasible size.
          if (one.trend == Trend::falls && !(u(high) > allowed)) {
            low = infeasible_up_to(low, here, high, allowed, u);
          } else {
            broken = i;
          }
        }
        break;
      default:
        break;
    }
  }
  if (broken != no_index) {
    return;
  }
  boxes.lower[b] = low;
  boxes.upper[b] = high;
  std::array<double, 2> objectives{};
  // Below its least mass the route makes nothing: without this the designs at that mass would be a
  // plateau that no splitting ends.
  lower_objectives(mode, box, low, sizing_.least_mass(base_), scratch, objectives);
  boxes.objective_lower[b] = objectives[0];
  boxes.objective_lower[n + b] = objectives[1];
  const auto& limits = sizing_.part().limits;
  for (std::uint32_t i = 0; i < constraints_.size(); ++i) {
    const bool over =
        (constraints_[i].kind == Constraint::Kind::cost_cap &&
         objectives[1] > *limits.cost * allowed) ||
        (constraints_[i].kind == Constraint::Kind::mass_cap &&
         objectives[0] > *limits.mass * allowed) ||
        (constraints_[i].kind == Constraint::Kind::blank && objectives[1] == infinity);
    if (over) {
      broken = i;
      return;
    }
  }
}

void FreeSizeProblem::contract_any(const Mode& mode,
                                   double allowed,
                                   const ContractBatch& boxes,
                                   std::size_t b,
                                   Scratch& scratch) const {
  const std::size_t n = boxes.count;
  const auto base = static_cast<std::uint32_t>(constraints_.size());
  auto& broken = boxes.broken[b];
  if (!enclose(mode, boxes.lower.subspan(b), boxes.upper.subspan(b), n, false, scratch)) {
    broken = base + FreeConstraint::section;
    return;
  }
  if (!scratch.enclosed) {
    leave_whole(mode, boxes, b, scratch);
    return;
  }
  const SectionBox& box = scratch.box;
  const auto hold = [&](double least, std::uint32_t constraint) {
    if (least * (1.0 - slack) > allowed && broken == no_index) {
      broken = constraint;
    }
  };
  const Interval thickness = equivalent_diameter_ ? box.ruling_by_surface() : box.ruling_dimension;
  const bool own_thickness = mode.piece.blank == nullptr || mode.piece.blank->item == nullptr;
  if (own_thickness) {
    hold(mode.thickness_above / thickness.upper() / (1.0 + 1e-9),
         base + FreeConstraint::thickness_above);
    hold(thickness.lower() / mode.thickness_up_to / (1.0 + 1e-9),
         base + FreeConstraint::thickness_up_to);
  } else {
    scratch.lower.family = shape_.family;
    scratch.lower.height = box.height.lower();
    scratch.lower.width = box.width.lower();
    hold(1.0 / room_in(*mode.piece.blank, scratch.lower, sizing_.settings()) / (1.0 + 1e-9),
         base + FreeConstraint::blank);
    scratch.lower.height = box.height.upper();
    scratch.lower.width = box.width.upper();
    for (const Blank* other : mode.others) {
      hold(room_in(*other, scratch.lower, sizing_.settings()) / (1.0 + 1e-9),
           base + FreeConstraint::other_blank);
    }
  }
  std::uint32_t next = base + FreeConstraint::first_proportion;
  for (const auto& proportion : mode.proportions) {
    const Interval ratio =
        dimension_box(mode, proportion.dimension, boxes, b) / dimension_box(mode, 0, boxes, b);
    hold(proportion.range.low / ratio.upper() / (1.0 + 1e-9), next++);
    hold(ratio.lower() / proportion.range.high / (1.0 + 1e-9), next++);
  }
  std::array<double, 2> objectives{};
  lower_objectives(mode, box, 1.0, sizing_.least_mass(base_), scratch, objectives);
  boxes.objective_lower[b] = objectives[0];
  boxes.objective_lower[n + b] = objectives[1];
  const auto& step = *mode.piece.step;
  const auto& limits = sizing_.part().limits;
  const double length = sizing_.part().body.length;
  for (std::uint32_t i = 0; i < constraints_.size() && broken == no_index; ++i) {
    const auto& one = constraints_[i];
    using Kind = Constraint::Kind;
    switch (one.kind) {
      case Kind::route_wall:
        hold(sizing_.least_wall(base_) / box.wall.upper(), i);
        break;
      case Kind::route_section:
        hold(box.wall.lower() / sizing_.largest_wall(base_), i);
        break;
      case Kind::route_mass_min:
        hold(route_.mass_min / (step.density * box.area.upper() * length), i);
        break;
      case Kind::route_mass_max:
        hold(step.density * box.area.lower() * length / route_.mass_max, i);
        break;
      case Kind::mass_cap:
        hold(objectives[0] / *limits.mass, i);
        break;
      case Kind::cost_cap:
        hold(objectives[1] / *limits.cost, i);
        break;
      case Kind::blank:
        broken = objectives[1] == infinity ? i : broken;
        break;
      case Kind::property:
      case Kind::corrosion:
      case Kind::temperature:
        hold(sizing_.material_utilisation(base_, one, step, box.best), i);
        break;
      case Kind::limit_state:
        if (mode.piece.applies[i]) {
          hold(least_utilisation(mode, i, box, 1.0, scratch), i);
        }
        break;
      default:
        break;
    }
  }
}

Interval FreeSizeProblem::dimension_box(const Mode& mode,
                                        std::size_t dimension,
                                        const ContractBatch& boxes,
                                        std::size_t b) const {
  const auto& rule = mode.rules[dimension];
  if (rule.kind == DimensionRule::Kind::constant) {
    return rule.value;
  }
  const std::size_t v = rule.variable * boxes.count + b;
  return {boxes.lower[v], boxes.upper[v]};
}

void FreeSizeProblem::contract(std::size_t group, double allowed, ContractBatch boxes) const {
  const Mode& mode = modes_[group];
  Scratch scratch;
  for (std::size_t b = 0; b < boxes.count; ++b) {
    boxes.broken[b] = no_index;
    if (mode.similar) {
      contract_similar(mode, allowed, boxes, b, scratch);
    } else {
      contract_any(mode, allowed, boxes, b, scratch);
    }
  }
}

/// Least value of each utilisation over the box, one by one, and of the objectives.
void FreeSizeProblem::bound_box(const Mode& mode,
                                const ContractBatch& boxes,
                                std::size_t b,
                                Scratch& scratch,
                                std::span<double> objectives,
                                std::span<double> utilisations) const {
  const std::size_t base = constraints_.size();
  std::fill(objectives.begin(), objectives.end(), 0.0);
  std::fill(utilisations.begin(), utilisations.end(), 0.0);
  const bool some = enclose(
      mode, boxes.lower.subspan(b), boxes.upper.subspan(b), boxes.count, mode.similar, scratch);
  if (!some) {
    std::fill(objectives.begin(), objectives.end(), infinity);
    utilisations[base + FreeConstraint::section] = infinity;
    return;
  }
  if (!scratch.enclosed) {
    return;
  }
  const SectionBox& box = scratch.box;
  // What falls with the size is least at the largest, what rises at the least.
  const double low = mode.similar ? boxes.lower[b] : 1.0;
  const double high = mode.similar ? boxes.upper[b] : 1.0;
  lower_objectives(mode, box, low, 0.0, scratch, objectives);
  const auto& step = *mode.piece.step;
  const auto& limits = sizing_.part().limits;
  const double most_mass =
      step.density * box.area.upper() * high * high * sizing_.part().body.length;
  const double least_mass =
      step.density * box.area.lower() * low * low * sizing_.part().body.length;
  const auto least = [&](std::size_t i) {
    const auto& one = constraints_[i];
    using Kind = Constraint::Kind;
    switch (one.kind) {
      case Kind::route_wall:
        return sizing_.least_wall(base_) / (box.wall.upper() * high);
      case Kind::route_section:
        return box.wall.lower() * low / sizing_.largest_wall(base_);
      case Kind::route_mass_min:
        return route_.mass_min / most_mass;
      case Kind::route_mass_max:
        return least_mass / route_.mass_max;
      case Kind::mass_cap:
        return objectives[0] / *limits.mass;
      case Kind::cost_cap:
        return objectives[1] / *limits.cost;
      case Kind::blank:
        return objectives[1] == infinity ? infinity : 0.0;
      case Kind::property:
      case Kind::corrosion:
      case Kind::temperature:
        return sizing_.material_utilisation(base_, one, step, box.best);
      case Kind::limit_state:
        return !mode.piece.applies[i]
                   ? 0.0
                   : least_utilisation(
                         mode, i, box, one.trend == Trend::falls ? high : low, scratch);
      default:
        return 0.0;
    }
  };
  for (std::size_t i = 0; i < base; ++i) {
    utilisations[i] = least(i) * (1.0 - slack);
  }
  if (mode.piece.blank == nullptr || mode.piece.blank->item == nullptr) {
    const Interval thickness =
        equivalent_diameter_ ? box.ruling_by_surface() : box.ruling_dimension;
    utilisations[base + FreeConstraint::thickness_above] =
        mode.thickness_above / (thickness.upper() * high) * (1.0 - 1e-9);
    utilisations[base + FreeConstraint::thickness_up_to] =
        thickness.lower() * low / mode.thickness_up_to * (1.0 - 1e-9);
  } else {
    scratch.lower.family = shape_.family;
    scratch.lower.height = box.height.lower() * low;
    scratch.lower.width = box.width.lower() * low;
    utilisations[base + FreeConstraint::blank] =
        (1.0 - 1e-9) / room_in(*mode.piece.blank, scratch.lower, sizing_.settings());
    scratch.lower.height = box.height.upper() * high;
    scratch.lower.width = box.width.upper() * high;
    for (const Blank* other : mode.others) {
      double& u = utilisations[base + FreeConstraint::other_blank];
      u = std::max(u, room_in(*other, scratch.lower, sizing_.settings()) * (1.0 - 1e-9));
    }
  }
  std::size_t next = base + FreeConstraint::first_proportion;
  for (const auto& proportion : mode.proportions) {
    const Interval ratio =
        dimension_box(mode, proportion.dimension, boxes, b) / dimension_box(mode, 0, boxes, b);
    utilisations[next++] = proportion.range.low / ratio.upper() * (1.0 - 1e-9);
    utilisations[next++] = ratio.lower() / proportion.range.high * (1.0 - 1e-9);
  }
}

void FreeSizeProblem::bound(std::size_t group, const BoxBatch& boxes, BoundBatch bounds) const {
  const Mode& mode = modes_[group];
  const std::size_t n = boxes.count;
  const std::size_t m = constraints(group);
  std::vector<double> lower(boxes.lower.begin(), boxes.lower.end());
  std::vector<double> upper(boxes.upper.begin(), boxes.upper.end());
  std::vector<double> objectives(2);
  std::vector<double> utilisations(m);
  const ContractBatch batch{n, lower, upper, {}, {}};
  Scratch scratch;
  for (std::size_t b = 0; b < n; ++b) {
    bound_box(mode, batch, b, scratch, objectives, utilisations);
    for (std::size_t j = 0; j < 2; ++j) {
      bounds.objective_lower[j * n + b] = objectives[j];
    }
    for (std::size_t i = 0; i < m; ++i) {
      bounds.utilisation_lower[i * n + b] = utilisations[i];
      bounds.utilisation_upper[i * n + b] = infinity;
    }
  }
}

}  // namespace bismar
