// SPDX-License-Identifier: MIT
// What a candidate with free dimensions is: its modes, and the truth at a point. Bounds over boxes
// stand in free_bounds.cpp.
#include "sizing/free_problem.hpp"

#include "sizing/bought_sizes.hpp"
#include "sizing/free_scratch.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/section_builder.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <set>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Sizes that stand in a list, or are those of a sheet, are at the end of a step but for rounding;
/// found ones keep clear of it, so that whoever computes the thickness again finds the same step.
constexpr double rounding = 1e-12;

}  // namespace

FreeSizeProblem::FreeSizeProblem(SizingProblem& sizing, const CompiledCandidate& base)
    : sizing_(sizing),
      base_(base),
      shape_(sizing.part().body.shapes[base.candidate.shape]),
      route_(sizing.catalogue().routes[base.candidate.route]),
      free_(free_dimensions(shape_)),
      constraints_(base.constraints),
      missing_(base.undecided) {
  const auto& material = sizing.catalogue().materials.info(base.candidate.material);
  const auto mid = sizing.section_of(base, Route{}, 1.0);
  equivalent_diameter_ =
      mid.inner_perimeter == 0.0 && mid.plates.empty() && is_hardened_bar_grade(material);
  open_limits_ = base.undecided_limits;
  make_modes();
  note_applying();
}

std::size_t FreeSizeProblem::constraints(std::size_t group) const {
  return constraints_.size() + FreeConstraint::first_proportion +
         2 * modes_[group].proportions.size();
}

bool FreeSizeProblem::has_own_blank(std::size_t group, std::span<const double> x) const {
  const Mode& mode = modes_[group];
  if (mode.piece.blank == nullptr || mode.piece.blank->item == nullptr) {
    return true;
  }
  const auto section = section_at(mode, x);
  return std::none_of(&*blanks_.begin(), mode.piece.blank, [&](const Blank& lighter) {
    return room_in(lighter, section, sizing_.settings()) >= 1.0;
  });
}

std::string FreeSizeProblem::label(std::size_t constraint) const {
  if (constraint < constraints_.size()) {
    return constraints_[constraint].label;
  }
  switch (constraint - constraints_.size()) {
    case FreeConstraint::thickness_above:
    case FreeConstraint::thickness_up_to:
      return "tabulated thickness";
    case FreeConstraint::blank:
      return "blank or stock length";
    case FreeConstraint::other_blank:
      return "strength of the lightest blank";
    case FreeConstraint::section:
      return "proportions that make a section";
    default:
      return "range of a ratio";
  }
}

Trend FreeSizeProblem::objective_trend(std::size_t group, std::size_t /*i*/, std::size_t v) const {
  return modes_[group].similar && v == 0 ? Trend::rises : Trend::neither;
}

Trend FreeSizeProblem::utilisation_trend(std::size_t group, std::size_t i, std::size_t v) const {
  if (!modes_[group].similar || v != 0) {
    return Trend::neither;
  }
  if (i < constraints_.size()) {
    return constraints_[i].trend;
  }
  switch (i - constraints_.size()) {
    case FreeConstraint::thickness_above:
    case FreeConstraint::other_blank:
      return Trend::falls;
    case FreeConstraint::thickness_up_to:
    case FreeConstraint::blank:
      return Trend::rises;
    default:
      return Trend::constant;
  }
}

std::uint32_t FreeSizeProblem::size_direction(std::size_t group) const {
  return modes_[group].similar ? 0 : no_index;
}

void FreeSizeProblem::dimensions_of(const Mode& mode,
                                    std::span<const double> x,
                                    std::span<double> out) const {
  for (std::size_t i = 0; i < mode.rules.size(); ++i) {
    const auto& rule = mode.rules[i];
    switch (rule.kind) {
      case DimensionRule::Kind::height:
      case DimensionRule::Kind::variable:
        out[i] = x[rule.variable];
        break;
      case DimensionRule::Kind::ratio:
        out[i] = x[rule.variable] * out[0];
        break;
      case DimensionRule::Kind::fixed:
        out[i] = rule.value * out[0];
        break;
      case DimensionRule::Kind::constant:
        out[i] = rule.value;
        break;
    }
  }
}

FreeSizeProblem::Found FreeSizeProblem::sizes(std::size_t group, std::span<const double> x) const {
  const Mode& mode = modes_[group];
  std::array<double, max_dimensions> all{};
  dimensions_of(mode, x, all);
  const auto names = dimensions(shape_.family);
  Found out;
  out.height = all[0];
  for (std::size_t f = 0; f < free_.size(); ++f) {
    for (std::size_t i = 1; i < names.size(); ++i) {
      if (names[i].name == free_[f].name) {
        out.free_sizes[f] = all[i];
      }
    }
  }
  return out;
}

SectionProperties FreeSizeProblem::section_at(const Mode& mode, std::span<const double> x) const {
  std::array<double, max_dimensions> all{};
  dimensions_of(mode, x, all);
  const auto names = dimensions(shape_.family);
  std::array<std::optional<double>, max_dimensions> sizes{};
  for (std::size_t i = 0; i < mode.rules.size(); ++i) {
    if (!names[i].optional || ratio_of(shape_, names[i].name)) {
      sizes[i] = all[i];
    }
  }
  return make_section(shape_.family, std::span(sizes).first(names.size()), forming_of(route_));
}

bool FreeSizeProblem::in_proportion(const Mode& mode, std::span<const double> all) const {
  const auto names = dimensions(shape_.family);
  std::array<Interval, max_dimensions> sizes;
  std::size_t count = 0;
  double root_radius = 0.0;
  for (std::size_t i = 0; i < mode.rules.size(); ++i) {
    if (!names[i].optional) {
      sizes[count++] = all[i];
    } else if (names[i].name == "root radius") {
      root_radius = all[i];
    }
  }
  return may_be_usual(
      {shape_.family, std::span(sizes).first(count), root_radius, 0.0, forming_of(route_)});
}

double FreeSizeProblem::strength_thickness(const SectionProperties& section) const {
  return equivalent_diameter_ ? 4.0 * section.area / section.perimeter : section.ruling_dimension;
}

void FreeSizeProblem::own_utilisations(const Mode& mode,
                                       const SectionProperties& section,
                                       std::span<const double> dimensions,
                                       std::span<double> out) const {
  // A thickness that a blank or a sheet sets is in its step already.
  const double slack = mode.similar ? -rounding : rounding;
  const bool own_thickness = mode.piece.blank == nullptr || mode.piece.blank->item == nullptr;
  const double thickness = own_thickness ? strength_thickness(section) : 0.0;
  out[FreeConstraint::thickness_above] =
      own_thickness ? mode.thickness_above / (thickness * (1.0 + slack)) : 0.0;
  out[FreeConstraint::thickness_up_to] =
      own_thickness ? thickness / (mode.thickness_up_to * (1.0 + slack)) : 0.0;
  out[FreeConstraint::blank] =
      own_thickness ? 0.0 : (1.0 - slack) / room_in(*mode.piece.blank, section, sizing_.settings());
  out[FreeConstraint::section] = 0.0;
  out[FreeConstraint::other_blank] = 0.0;
  for (const Blank* other : mode.others) {
    out[FreeConstraint::other_blank] =
        std::max(out[FreeConstraint::other_blank],
                 room_in(*other, section, sizing_.settings()) * (1.0 + rounding));
  }
  std::size_t next = FreeConstraint::first_proportion;
  for (const auto& proportion : mode.proportions) {
    const double ratio = dimensions[proportion.dimension] / dimensions[0];
    out[next++] = proportion.range.low / (ratio * (1.0 + rounding));
    out[next++] = ratio / (proportion.range.high * (1.0 + rounding));
  }
}

void FreeSizeProblem::evaluate_at(const Mode& mode,
                                  const SectionProperties& section,
                                  std::span<const double> dimensions,
                                  std::span<double> objectives,
                                  std::span<double> utilisations) const {
  sizing_.evaluate_section(base_,
                           constraints_,
                           mode.piece,
                           section,
                           objectives,
                           utilisations.first(constraints_.size()));
  own_utilisations(mode, section, dimensions, utilisations.subspan(constraints_.size()));
}

void FreeSizeProblem::evaluate(std::size_t group,
                               std::span<const double> x,
                               std::span<double> objectives,
                               std::span<double> utilisations) const {
  const Mode& mode = modes_[group];
  std::array<double, max_dimensions> all{};
  dimensions_of(mode, x, all);
  bool there = in_proportion(mode, all);
  try {
    if (there) {
      evaluate_at(mode, section_at(mode, x), all, objectives, utilisations);
    }
  } catch (const Error&) {
    there = false;
  }
  if (!there) {
    // Proportions that make no section, as walls that meet, or none that bounds are known for.
    std::fill(objectives.begin(), objectives.end(), infinity);
    std::fill(utilisations.begin(), utilisations.end(), 0.0);
    utilisations[constraints_.size() + FreeConstraint::section] = infinity;
  }
}

}  // namespace bismar
