// SPDX-License-Identifier: MIT
// The ways of making a candidate with free dimensions in which everything but the sizes stays.
#include "sizing/bought_sizes.hpp"
#include "sizing/free_scratch.hpp"
#include "sizing/shape_section.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/section_builder.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <limits>
#include <set>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Sizes of a list or of a sheet are at the end of a step but for rounding.
constexpr double rounding = 1e-12;

/// Whether a state may leave undone what the other does: a value is lower, or missing on one side,
/// density or price higher. As a rule a thicker step is the worse one.
bool is_worse(const StepState& one, const StepState& other) {
  if (one.density > other.density || one.usual_price > other.usual_price) {
    return true;
  }
  for (std::size_t c = 0; c < one.cases.size(); ++c) {
    const MemberMaterial& a = one.cases[c].member;
    const MemberMaterial& b = other.cases[c].member;
    for (const Symbol symbol : all_symbols) {
      const auto& value = value_of(a, symbol);
      const auto& beside = value_of(b, symbol);
      if (value.has_value() != beside.has_value() ||
          (value && symbol != Symbol::rho && symbol != Symbol::alpha && *value < *beside)) {
        return true;
      }
    }
    if (a.rule != b.rule) {
      return true;
    }
  }
  return false;
}

}  // namespace

Mode FreeSizeProblem::proportional_mode() const {
  Mode mode;
  Variable height;
  height.lower = shape_.height_min;
  height.upper = shape_.height_max;
  mode.variables.push_back(height);
  for (const auto& dimension : dimensions(shape_.family)) {
    DimensionRule rule;
    const auto free = std::find_if(
        free_.begin(), free_.end(), [&](const auto& one) { return one.name == dimension.name; });
    if (mode.rules.empty()) {
      rule.kind = DimensionRule::Kind::height;
    } else if (free != free_.end()) {
      rule.kind = DimensionRule::Kind::ratio;
      rule.variable = static_cast<std::uint32_t>(mode.variables.size());
      Variable ratio;
      ratio.lower = free->to_height.low;
      ratio.upper = free->to_height.high;
      mode.variables.push_back(ratio);
    } else {
      rule.kind = DimensionRule::Kind::fixed;
      rule.value = ratio_of(shape_, dimension.name).value_or(0.0);
    }
    mode.rules.push_back(rule);
  }
  return mode;
}

Mode FreeSizeProblem::listed_mode() const {
  Mode mode = proportional_mode();
  mode.similar = false;
  const auto names = dimensions(shape_.family);
  for (std::size_t i = 0; i < mode.rules.size(); ++i) {
    auto& rule = mode.rules[i];
    if (rule.kind == DimensionRule::Kind::fixed) {
      continue;
    }
    Ratio range = 1.0;
    if (rule.kind == DimensionRule::Kind::ratio) {
      range = ratio_range(shape_, names[i].name);
      rule.kind = DimensionRule::Kind::variable;
      mode.proportions.push_back({i, range});
    }
    Variable& variable = mode.variables[rule.variable];
    variable.kind = Variable::Kind::ordered_set;
    variable.values =
        wanted_sizes(shape_.sizes, range.low * shape_.height_min, range.high * shape_.height_max);
    if (!variable.values.empty()) {
      variable.lower = variable.values.front();
      variable.upper = variable.values.back();
    }
  }
  return mode;
}

void FreeSizeProblem::drop_variable(Mode& mode, std::uint32_t gone) {
  mode.variables.erase(mode.variables.begin() + gone);
  for (auto& other : mode.rules) {
    if (other.variable > gone) {
      --other.variable;
    }
  }
}

void FreeSizeProblem::set_sheet(Mode& mode, std::size_t dimension, double thickness) const {
  mode.similar = false;
  auto& rule = mode.rules[dimension];
  auto& height = mode.rules[0];
  if (rule.kind == DimensionRule::Kind::fixed) {
    // A wall in a fixed proportion to the height: the sheet decides the height.
    if (height.kind == DimensionRule::Kind::height) {
      height.kind = DimensionRule::Kind::constant;
      height.value = thickness / rule.value;
      drop_variable(mode, 0);
    }
    return;
  }
  const auto names = dimensions(shape_.family);
  const bool known = std::any_of(mode.proportions.begin(),
                                 mode.proportions.end(),
                                 [&](const auto& one) { return one.dimension == dimension; });
  if (dimension != 0 && !known) {
    mode.proportions.push_back({dimension, ratio_range(shape_, names[dimension].name)});
  }
  const auto gone = rule.variable;
  rule.kind = DimensionRule::Kind::constant;
  rule.value = thickness;
  drop_variable(mode, gone);
}

void FreeSizeProblem::add_mode(Mode mode, const StepState* step, const Blank* blank) {
  const bool empty =
      std::any_of(mode.variables.begin(), mode.variables.end(), [](const Variable& variable) {
        return variable.kind == Variable::Kind::ordered_set && variable.values.empty();
      });
  const auto& height = mode.rules[0];
  const bool outside = height.kind == DimensionRule::Kind::constant &&
                       (height.value < shape_.height_min * (1.0 - rounding) ||
                        height.value > shape_.height_max * (1.0 + rounding));
  if (empty || outside || step == nullptr) {
    return;
  }
  if (mode.variables.empty()) {
    // Everything is bought or fixed: one point, which a variable of one value stands for.
    Variable one;
    one.lower = one.upper = 1.0;
    mode.variables.push_back(one);
  }
  mode.piece.step = step;
  mode.piece.blank = blank;
  // Mass alone decides the cost where nothing is bought by its outline and nothing is coated.
  const bool by_outline =
      machines_blank(route_) && (blank == nullptr || blank->item == nullptr || blank->plate);
  mode.objectives_agree = base_.candidate.finish == Candidate::none && !by_outline;
  modes_.push_back(std::move(mode));
}

void FreeSizeProblem::make_modes() {
  if (takes_sheet_thickness(route_)) {
    sheet_modes();
  } else if (machines_blank(route_)) {
    machined_modes();
  } else {
    own_modes();
  }
}

void FreeSizeProblem::own_modes() {
  const auto steps = sizing_.catalogue().materials.steps(base_.candidate.material);
  const auto& states = sizing_.states(base_.candidate.material);
  const bool listed = shape_.sizes.kind != Sizes::Kind::continuous;
  for (std::size_t s = 0; s < steps.size(); ++s) {
    Mode mode = listed ? listed_mode() : proportional_mode();
    mode.thickness_above = steps[s].above;
    mode.thickness_up_to = steps[s].up_to;
    add_mode(std::move(mode), &states[s], nullptr);
  }
}

void FreeSizeProblem::machined_modes() {
  const auto& stock = sizing_.blank_stock_of(base_.candidate.material, base_.candidate.route);
  if (stock.empty()) {
    blanks_.emplace_back();
    own_modes();
    for (auto& mode : modes_) {
      mode.piece.blank = &blanks_.front();
    }
    return;
  }
  blanks_ = all_blanks(sizing_.part().body.length, stock, sizing_.settings());
  const auto& states = sizing_.states(base_.candidate.material);
  const auto steps = sizing_.catalogue().materials.steps(base_.candidate.material);
  const auto& material = sizing_.catalogue().materials.info(base_.candidate.material);
  const bool listed = shape_.sizes.kind != Sizes::Kind::continuous;
  std::vector<std::pair<const Blank*, std::size_t>> before;  // with their strength steps
  for (const Blank& blank : blanks_) {
    const double thickness = blank_thickness(blank, material);
    // steps.size(): no strength is tabulated for so thick a blank.
    std::size_t own = steps.size();
    for (std::size_t s = 0; s < steps.size(); ++s) {
      own = thickness > steps[s].above && thickness <= steps[s].up_to ? s : own;
    }
    if (own < steps.size()) {
      Mode mode = listed ? listed_mode() : proportional_mode();
      mode.thickness_up_to = infinity;
      for (const auto& [lighter, step] : before) {
        if (step != own && (step == steps.size() || is_worse(states[step], states[own]))) {
          mode.others.push_back(lighter);
        }
      }
      add_mode(std::move(mode), &states[own], &blank);
    }
    before.emplace_back(&blank, own);
  }
}

/// The thickness of a flat part is its smaller dimension: lying, its width is no less than its
/// height; standing, no more. False where the ratios leave none.
bool FreeSizeProblem::keep_flat(Mode& mode, bool lying) {
  const auto narrow = [&](double& low, double& high) {
    (lying ? low : high) = lying ? std::max(low, 1.0) : std::min(high, 1.0);
    return low <= high;
  };
  bool some = true;
  for (auto& proportion : mode.proportions) {
    some = some && narrow(proportion.range.low, proportion.range.high);
  }
  const auto& width = mode.rules[1];
  if (width.kind == DimensionRule::Kind::ratio) {
    auto& variable = mode.variables[width.variable];
    some = some && narrow(variable.lower, variable.upper);
  }
  return some;
}

void FreeSizeProblem::sheet_modes() {
  std::vector<double> sheets =
      sheet_thicknesses(sizing_.catalogue(),
                        sizing_.settings(),
                        sizing_.catalogue().materials.info(base_.candidate.material),
                        route_);
  const auto names = dimensions(shape_.family);
  // The dimensions that are the sheet's thickness: the walls, or of a flat part either one.
  std::vector<std::vector<std::size_t>> ways;
  std::vector<std::size_t> walls;
  for (std::size_t i = 1; i < names.size(); ++i) {
    if (names[i].name == "wall" || names[i].name == "web" || names[i].name == "flange") {
      walls.push_back(i);
    }
  }
  if (walls.empty()) {
    ways = {{0}, {1}};
  } else {
    ways = {walls};
  }
  const auto steps = sizing_.catalogue().materials.steps(base_.candidate.material);
  const auto& states = sizing_.states(base_.candidate.material);
  const bool listed = shape_.sizes.kind != Sizes::Kind::continuous;
  for (const double sheet : sheets) {
    for (const auto& way : ways) {
      Mode made = listed ? listed_mode() : proportional_mode();
      for (const std::size_t dimension : way) {
        set_sheet(made, dimension, sheet);  // 0: lying flat, its height is the sheet's
      }
      if (walls.empty() && !keep_flat(made, way.front() == 0)) {
        continue;
      }
      for (std::size_t s = 0; s < steps.size(); ++s) {
        const bool by_wall = !walls.empty() && !equivalent_diameter_;
        if (by_wall && !(sheet > steps[s].above * (1.0 + rounding) &&
                         sheet <= steps[s].up_to * (1.0 + rounding))) {
          continue;
        }
        Mode mode = made;
        mode.thickness_above = by_wall ? 0.0 : steps[s].above;
        mode.thickness_up_to = by_wall ? infinity : steps[s].up_to;
        add_mode(std::move(mode), &states[s], nullptr);
      }
    }
  }
}

/// Which limit states apply, and whether that depends on the proportions: looked at in the middle
/// and at the ends of every ratio.
void FreeSizeProblem::note_applying() {
  std::vector<SectionProperties> samples;
  for (const auto& sizes : sample_sizes(shape_)) {
    samples.push_back(sizing_.sections().at(base_.candidate.shape, Route{}, 1.0, sizes));
  }
  std::set<Property> missing(missing_.begin(), missing_.end());
  for (const LimitState* state : limit_states()) {
    for (std::size_t c = 0; c < sizing_.effects().size(); ++c) {
      if (c > 0 && !state->reads_loads()) {
        break;
      }
      note_state(*state, c, samples, missing);
    }
  }
  missing_.assign(missing.begin(), missing.end());
  for (auto& mode : modes_) {
    mode.piece.applies.assign(constraints_.size(), false);
    mode.best.assign(constraints_.size(), BestSection::stiff);
    for (std::size_t i = 0; i < constraints_.size(); ++i) {
      const auto& constraint = constraints_[i];
      mode.piece.applies[i] =
          constraint.kind == Constraint::Kind::limit_state &&
          std::any_of(samples.begin(), samples.end(), [&](const auto& section) {
            return constraint.state->applies(sizing_.effects()[constraint.load_case],
                                             sizing_.member_limits(),
                                             mode.piece.step->cases[constraint.load_case].member,
                                             section);
          });
      if (mode.piece.applies[i]) {
        mode.best[i] =
            constraint.state->best_section(sizing_.effects()[constraint.load_case],
                                           mode.piece.step->cases[constraint.load_case].member);
      }
    }
  }
}

void FreeSizeProblem::note_state(const LimitState& state,
                                 std::size_t load_case,
                                 std::span<const SectionProperties> samples,
                                 std::set<Property>& missing) {
  const auto& effects = sizing_.effects()[load_case];
  std::size_t applying = 0;
  const MemberMaterial* member = nullptr;
  for (const auto& mode : modes_) {
    member = &mode.piece.step->cases[load_case].member;
    applying = static_cast<std::size_t>(
        std::count_if(samples.begin(), samples.end(), [&](const auto& section) {
          return state.applies(effects, sizing_.member_limits(), *member, section);
        }));
    if (applying > 0) {
      break;
    }
  }
  if (applying == 0) {
    return;
  }
  for (const Symbol symbol : state.needs(effects, *member)) {
    if (!value_of(*member, symbol)) {
      missing.insert(property_of(symbol));
    }
  }
  auto known =
      std::find_if(constraints_.begin(), constraints_.end(), [&](const Constraint& constraint) {
        return constraint.kind == Constraint::Kind::limit_state && constraint.state == &state &&
               constraint.load_case == load_case;
      });
  if (known == constraints_.end()) {
    // In the order of the list, before the limits of the route: as it would stand had the middle
    // of the ratios met it.
    const auto place =
        std::find_if(constraints_.begin(), constraints_.end(), [&](const Constraint& constraint) {
          return constraint.kind == Constraint::Kind::route_wall;
        });
    Constraint constraint = sizing_.limit_constraint(state, load_case, *member);
    known = constraints_.insert(place, std::move(constraint));
  }
  known->by_section = applying != samples.size();
}

}  // namespace bismar
