// SPDX-License-Identifier: MIT
#include "sizing/study.hpp"

#include "sizing/words.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>
#include <cstdlib>

namespace bismar {

namespace {

constexpr double usual_size_step = 1e-3;  // [m]

std::string millimetres(double metres) { return plain(metres * 1e3, 5); }

/// Properties that the answer rests on and that no source confirms.
std::string unverified(const SizingProblem& problem,
                       const StepState& step,
                       const CompiledCandidate& compiled,
                       const Piece& piece) {
  std::vector<std::string> words;
  for (const Property property : properties_read(problem, compiled, piece)) {
    const auto& materials = problem.catalogue().materials;
    if (!materials.value(property, step.row)) {
      continue;
    }
    const auto evidence = materials.provenance(property, step.row).evidence;
    if (evidence == Evidence::from_memory || evidence == Evidence::estimated) {
      words.emplace_back(info(property).name);
    }
  }
  return words.empty() ? std::string() : "unverified: " + joined(words);
}

void add_utilisations(const SizingProblem& problem,
                      const CompiledCandidate& compiled,
                      const Piece& piece,
                      std::span<const double> values,
                      Design& design) {
  double largest = -3.0;
  for (std::size_t i = 0; i < values.size(); ++i) {
    const auto& constraint = compiled.constraints[i];
    const bool state = constraint.kind == Constraint::Kind::limit_state;
    // Met by every design that exists at all: nothing to tell.
    const bool trivial = constraint.kind == Constraint::Kind::thickness_limit ||
                         constraint.kind == Constraint::Kind::blank;
    if (trivial || (state && !piece.applies[i])) {
      continue;
    }
    Utilisation u;
    u.limit = constraint.label;
    u.value = values[i];
    if (state) {
      u.factor = constraint.factor;
      if (constraint.state->reads_loads()) {
        u.load_case = problem.part().body.load_cases[constraint.load_case].name;
      }
    }
    // Caps and envelopes tell where a design must stop, not what sizes it, unless it runs into
    // them; of a bought section the loads say why it is not smaller.
    const bool bought = piece.item != nullptr;
    const bool fixed = !state || !constraint.state->reads_loads();
    const bool beside = constraint.trend == Trend::rises || (bought && fixed);
    const double rank = beside && (bought || u.value < 1.0 - 1e-6) ? u.value - 2.0 : u.value;
    if (rank > largest) {
      largest = rank;
      design.governing = design.utilisations.size();
    }
    design.utilisations.push_back(std::move(u));
  }
}

/// Slender, bent about the strong axis, free to move across, and of a family that the limit state
/// of lateral-torsional buckling has no formula for.
bool may_buckle_unchecked(const SizingProblem& problem,
                          const CompiledCandidate& compiled,
                          const Piece& piece,
                          const SectionProperties& section) {
  // Principal axes: an angle has its own, and a thin outline turns aside sooner than a solid one.
  const double ratio = section.family == SectionFamily::angle ? 1.0 : 4.0;
  if (!(section.I_u() > ratio * section.I_v()) || section.inner_perimeter > 0.0 ||
      problem.member_limits().lateral_restraint) {
    return false;
  }
  for (std::size_t i = 0; i < compiled.constraints.size(); ++i) {
    if (piece.applies[i] && compiled.constraints[i].label == "lateral-torsional buckling") {
      return false;
    }
  }
  return std::any_of(problem.effects().begin(),
                     problem.effects().end(),
                     [](const LoadEffects& effects) { return effects.bends; });
}

void add_notes(const SizingProblem& problem,
               const CompiledCandidate& compiled,
               const Piece& piece,
               Design& design) {
  for (const auto& resolved : piece.step->cases) {
    for (const auto& note : resolved.notes) {
      if (!contains_word(design.notes, note)) {
        design.notes.push_back(note);
      }
    }
  }
  const double begin = std::nextafter(piece.lower, 1.0);
  if (compiled.variable.kind == Variable::Kind::continuous && design.size <= begin * (1.0 + 1e-9) &&
      piece.lower > compiled.variable.lower) {
    design.notes.emplace_back(
        "sized by the beginning of a thickness step or blank: no smaller size has its strength");
  }
  if (may_buckle_unchecked(problem, compiled, piece, design.section)) {
    design.notes.emplace_back(
        "NOT CHECKED: lateral-torsional buckling of a slender section bent about its strong axis; "
        "hold its compression side or check it");
  }
  if (piece.item != nullptr && piece.item->availability == Availability::unconfirmed) {
    design.notes.emplace_back("size unconfirmed as a stock size");
  }
  if (piece.item != nullptr && piece.item->availability == Availability::doubtful) {
    design.notes.emplace_back("size doubtful as a stock size");
  }
  if (auto text = unverified(problem, *piece.step, compiled, piece); !text.empty()) {
    design.notes.push_back(std::move(text));
  }
}

/// The next size up that a shop would set, re-checked and re-costed: the next whole millimetre, or
/// the one after where that falls back over the end of a step.
void add_buyable(const SizingProblem& problem, std::size_t group, Design& design) {
  const auto& variable = problem.compiled(group).variable;
  std::vector<double> objectives(2);
  std::vector<double> utilisations(problem.constraints(group));
  const auto first = std::llround(std::ceil(design.size / usual_size_step * (1.0 - 1e-12)));
  for (auto steps = first; steps <= first + 1; ++steps) {
    const double size = static_cast<double>(steps) * usual_size_step;
    if (size > variable.upper) {
      return;
    }
    problem.evaluate_plain(group, size, objectives, utilisations);
    // Beyond the last blank or tabulated thickness there is no mass and no cost to tell.
    if (!std::isfinite(objectives[0]) || !std::isfinite(objectives[1])) {
      return;
    }
    design.buyable_size = size;
    design.buyable_mass = objectives[0];
    design.buyable_cost = objectives[1];
    design.buyable_feasible =
        std::all_of(utilisations.begin(), utilisations.end(), [](double u) { return u <= 1.0; });
    if (design.buyable_feasible) {
      return;
    }
  }
}

}  // namespace

std::set<Property> properties_read(const SizingProblem& problem,
                                   const CompiledCandidate& compiled,
                                   const Piece& piece) {
  std::set<Property> out = {Property::density, Property::price};
  for (std::size_t i = 0; i < compiled.constraints.size(); ++i) {
    const auto& constraint = compiled.constraints[i];
    if (piece.applies[i]) {
      for (const Symbol symbol :
           constraint.state->needs(problem.effects()[constraint.load_case],
                                   piece.step->cases[constraint.load_case].member)) {
        out.insert(property_of(symbol));
      }
    }
  }
  return out;
}

std::string size_text(const SectionProperties& section) {
  switch (section.family) {
    case SectionFamily::solid_round:
      return "diameter " + millimetres(section.height) + " mm";
    case SectionFamily::solid_square:
      return "side " + millimetres(section.height) + " mm";
    case SectionFamily::solid_hexagon:
      return millimetres(section.height) + " mm across flats";
    case SectionFamily::round_tube:
      return millimetres(section.height) + " x " + millimetres(section.wall) + " mm";
    case SectionFamily::rectangular_tube:
    case SectionFamily::elliptical_tube:
    case SectionFamily::angle:
      return millimetres(section.height) + " x " + millimetres(section.width) + " x " +
             millimetres(section.wall) + " mm";
    default:
      return millimetres(section.height) + " x " + millimetres(section.width) + " mm";
  }
}

Design make_design(SizingProblem& problem,
                   const Outcome& outcome,
                   const Outcome::Point& point,
                   std::size_t& group) {
  group = outcome.group;
  if (outcome.group == Outcome::no_group) {
    problem.add(outcome.candidate, point.size, point.free_sizes);
    group = problem.groups() - 1;
  }
  return make_design(problem, group, point.size);
}

Design make_design(const SizingProblem& problem, std::size_t group, double size) {
  const auto& compiled = problem.compiled(group);
  const auto& catalogue = problem.catalogue();
  const auto detail = problem.detail(group, size);
  const auto& piece = *detail.piece;
  if (piece.step == nullptr || !detail.purchase) {
    throw Error({Code::out_of_range,
                 "size",
                 plain(size),
                 "a size within the tabulated thickness and stock",
                 "No strength is tabulated at this size, or no blank or stock length holds it."});
  }
  std::vector<double> objectives(2);
  std::vector<double> utilisations(compiled.constraints.size());
  problem.evaluate_plain(group, size, objectives, utilisations);

  Design design;
  design.candidate = compiled.candidate;
  const auto labels = names(compiled.candidate, problem.part(), catalogue);
  const auto& info = catalogue.materials.info(compiled.candidate.material);
  design.material = info.id;
  design.material_name = info.condition.empty() ? info.name : info.name + ", " + info.condition;
  design.shape = labels.shape;
  design.route = labels.route;
  design.treatment = labels.treatment;
  design.finish = labels.finish;
  design.size = size;
  design.free_sizes = compiled.free_sizes;
  design.section = detail.section;
  if (piece.item != nullptr) {
    design.stock_item = piece.item->id;
    design.size_text = piece.item->designation;
  } else {
    design.size_text = size_text(detail.section);
  }
  design.id = labels.material + "/" +
              (piece.item != nullptr ? piece.item->id : labels.shape + " " + design.size_text) +
              "/" + labels.route + (labels.treatment.empty() ? "" : "+" + labels.treatment) + "/" +
              labels.finish;
  design.mass = objectives[0];
  design.cost = objectives[1];
  add_utilisations(problem, compiled, piece, utilisations, design);

  const MadePart made{detail.section, detail.net_mass, *detail.purchase};
  design.cost_breakdown =
      compiled.cost->breakdown(made, piece.step->price, piece.step->usual_price);
  if (piece.item != nullptr) {
    design.cost_breakdown.blank =
        describe_stock(piece.item->designation, *detail.purchase, problem.part().body.length);
  } else if (piece.blank != nullptr) {
    design.cost_breakdown.blank =
        describe(*piece.blank, *detail.purchase, problem.part().body.length);
  }
  add_notes(problem, compiled, piece, design);
  if (compiled.variable.kind == Variable::Kind::continuous) {
    add_buyable(problem, group, design);
  }
  return design;
}

}  // namespace bismar
