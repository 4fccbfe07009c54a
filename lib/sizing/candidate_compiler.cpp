// SPDX-License-Identifier: MIT
#include "sizing/candidate_compiler.hpp"

#include "sizing/gaps.hpp"

#include "sizing/bought_sizes.hpp"
#include "sizing/derating.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>
#include <set>

namespace bismar {

CandidateCompiler::CandidateCompiler(SizingProblem& problem,
                                     const Candidate& candidate,
                                     double size,
                                     const FreeSizes& free_sizes)
    : problem_(problem),
      out_(std::make_unique<CompiledCandidate>()),
      material_(problem.catalogue().materials.info(candidate.material)),
      route_(problem.catalogue().routes[candidate.route]) {
  out_->candidate = candidate;
  out_->cost.emplace(problem.part(), problem.catalogue(), problem.settings(), candidate);
  if (candidate.shape != Candidate::none) {
    out_->shape = with_ratios(problem.part().body.shapes[candidate.shape], size, free_sizes);
    if (!free_dimensions(problem.part().body.shapes[candidate.shape]).empty()) {
      out_->own_size = size;
      out_->free_sizes = free_sizes;
    }
  }
}

std::unique_ptr<CompiledCandidate> CandidateCompiler::run() {
  states_ = &problem_.states(out_->candidate.material);
  if (out_->candidate.stock != Candidate::none) {
    stock_pieces();
  } else {
    shape_pieces();
  }
  collect_constraints();
  find_undecided();
  return std::move(out_);
}

const StepState* CandidateCompiler::state_at(double thickness) const {
  const auto steps = problem_.catalogue().materials.steps(out_->candidate.material);
  for (std::size_t s = 0; s < steps.size(); ++s) {
    if (thickness > steps[s].above && thickness <= steps[s].up_to) {
      return &(*states_)[s];
    }
  }
  return nullptr;
}

double CandidateCompiler::strength_thickness(const SectionProperties& section) const {
  return bismar::strength_thickness(section, material_);
}

void CandidateCompiler::stock_pieces() {
  const auto& list = problem_.catalogue().stock[out_->candidate.stock];
  out_->variable.kind = Variable::Kind::ordered_set;
  for (std::size_t i = 0; i < list.items.size(); ++i) {
    const auto& item = list.items[i];
    if (!is_offered(item, problem_.settings()) || !suits(item, material_, route_)) {
      continue;
    }
    Piece piece;
    piece.lower = piece.upper = piece.size = static_cast<double>(i);
    piece.item = &item;
    piece.section = item.section;
    piece.step = state_at(strength_thickness(item.section));
    out_->variable.values.push_back(piece.size);
    out_->pieces.push_back(std::move(piece));
  }
  if (!out_->variable.values.empty()) {
    out_->variable.lower = out_->variable.values.front();
    out_->variable.upper = out_->variable.values.back();
  }
}

void CandidateCompiler::shape_pieces() {
  const Shape& shape = *out_->shape;
  const double lower = shape.height_min;
  const double upper = shape.height_max;
  // Its ratios, with sharp corners: whatever corners the real wall allows.
  const auto unit = problem_.section_of(*out_, Route{}, 1.0);
  const double thickness_per_height = strength_thickness(unit);
  const bool machined = machines_blank(route_);

  std::vector<double> ends;
  const auto add_end = [&](double size) {
    if (size > lower && size < upper) {
      ends.push_back(size);
    }
  };
  if (machined) {
    // The strength of a machined part was set in its blank, so its steps are those of the blanks.
    out_->blanks = blanks(unit,
                          problem_.part().body.length,
                          upper,
                          problem_.blank_stock_of(out_->candidate.material, out_->candidate.route),
                          problem_.settings());
    for (const auto& blank : out_->blanks) {
      add_end(blank.largest_size);
    }
  }
  const bool own_thickness =
      !machined || (out_->blanks.size() == 1 && out_->blanks[0].item == nullptr);
  if (own_thickness) {
    for (const auto& step : problem_.catalogue().materials.steps(out_->candidate.material)) {
      add_end(step.above / thickness_per_height);
      add_end(step.up_to / thickness_per_height);
    }
  }
  if (shape.family == SectionFamily::rectangular_tube) {
    // EN 10219-2 changes its corner radii at walls of 6 and 10 mm.
    add_end(6e-3 / unit.wall);
    add_end(10e-3 / unit.wall);
  }
  tidy(ends);
  out_->variable.breakpoints = ends;
  ends.push_back(upper);

  double from = lower;
  for (const double to : ends) {
    Piece piece;
    piece.lower = from;
    piece.upper = to;
    piece.size = to;
    try {
      piece.section = problem_.section_of(*out_, route_, to);
    } catch (const Error&) {
      // The corner radii that the standard gives this wall leave no flat side: all sizes of the
      // piece have the same ratios, so none of them exists.
      piece.impossible = true;
      out_->pieces.push_back(std::move(piece));
      from = to;
      continue;
    }
    // A point inside decides, so that rounding at the end of a step does not.
    double thickness = 0.5 * (from + to) * thickness_per_height;
    if (machined) {
      // The smallest blank that holds the upper end of the piece; a rounding of the division above
      // must not push the end itself out of it.
      const auto fits =
          std::find_if(out_->blanks.begin(), out_->blanks.end(), [&](const Blank& blank) {
            return blank.largest_size * (1.0 + 1e-12) >= to;
          });
      piece.blank = fits == out_->blanks.end() ? nullptr : &*fits;
      if (piece.blank != nullptr && piece.blank->item != nullptr) {
        thickness = blank_thickness(*piece.blank, material_);
      }
    }
    piece.step = state_at(thickness);
    out_->pieces.push_back(std::move(piece));
    from = to;
  }
  set_sizes();
}

std::vector<double> CandidateCompiler::sheet_sizes() const {
  // The wall of a rolled tube, or the smaller dimension of a flat part, is the thickness of the
  // sheet.
  const Shape& shape = *out_->shape;
  const auto& wall = shape.wall_to_height ? shape.wall_to_height : shape.web_to_height;
  const double height_per_thickness =
      wall ? 1.0 / wall->low : std::max(shape.height_to_width.value_or(1.0).low, 1.0);
  auto out = sheet_thicknesses(problem_.catalogue(), problem_.settings(), material_, route_);
  for (double& size : out) {
    size *= height_per_thickness;
  }
  return out;
}

void CandidateCompiler::set_sizes() {
  const Shape& shape = *out_->shape;
  auto& variable = out_->variable;
  variable.lower = shape.height_min;
  variable.upper = shape.height_max;
  const bool wanted = shape.sizes.kind != Sizes::Kind::continuous;
  if (!wanted && !takes_sheet_thickness(route_)) {
    return;
  }
  auto values = wanted ? wanted_sizes(shape.sizes, variable.lower, variable.upper) : sheet_sizes();
  if (wanted && takes_sheet_thickness(route_)) {
    const auto bought = sheet_sizes();
    std::erase_if(values, [&](double value) {
      return std::none_of(bought.begin(), bought.end(), [&](double other) {
        return std::abs(value - other) <= 1e-9 * other;
      });
    });
  }
  // A size made of a sheet and the ratios of a design that has just this sheet is the design's own.
  for (double& value : values) {
    if (std::abs(value - out_->own_size) <= 1e-9 * out_->own_size) {
      value = out_->own_size;
    }
  }
  std::erase_if(values, [&](double value) {
    return value < variable.lower * (1.0 - 1e-12) || value > variable.upper * (1.0 + 1e-12);
  });
  // A size that is the end of a piece but for rounding is that end: 40 mm plate is in the step up
  // to 40 mm.
  for (double& value : values) {
    for (const Piece& piece : out_->pieces) {
      if (std::abs(value - piece.upper) <= 1e-12 * piece.upper) {
        value = piece.upper;
      }
    }
  }
  variable.kind = Variable::Kind::ordered_set;
  variable.breakpoints.clear();
  variable.values = std::move(values);
  if (!variable.values.empty()) {
    variable.lower = variable.values.front();
    variable.upper = variable.values.back();
  }
}

void CandidateCompiler::collect_constraints() {
  using Kind = Constraint::Kind;
  const auto& limits = problem_.part().limits;
  const auto add = [&](Kind kind, Trend trend, std::string label) {
    Constraint constraint;
    constraint.kind = kind;
    constraint.trend = trend;
    constraint.label = std::move(label);
    out_->constraints.push_back(std::move(constraint));
  };
  for (std::size_t p = 0; p < limits.properties.size(); ++p) {
    add(Kind::property, Trend::constant, "limit on " + limits.properties[p].property);
    out_->constraints.back().property_limit = p;
  }
  if (limits.medium) {
    add(Kind::corrosion, Trend::constant, "corrosion in " + *limits.medium);
  }
  if (limits.temperature) {
    add(Kind::temperature, Trend::constant, "service temperature");
  }
  add(Kind::thickness_limit, Trend::constant, "tabulated thickness");
  if (std::any_of(out_->pieces.begin(), out_->pieces.end(), [](const Piece& piece) {
        return piece.impossible;
      })) {
    add(Kind::corners, Trend::constant, "corner radii of the wall");
  }
  add_limit_states();
  add(Kind::route_wall, Trend::falls, "least section of the route");
  add(Kind::route_section, Trend::rises, "largest section of the route");
  // What comes by the metre is cut to length: the machine has no least mass of a part.
  if (route_.rate_basis != RateBasis::metre) {
    add(Kind::route_mass_min, Trend::falls, "least mass of the route");
  }
  add(Kind::route_mass_max, Trend::rises, "largest mass of the route");
  add(Kind::blank, Trend::constant, "blank or stock length");
  if (limits.mass) {
    add(Kind::mass_cap, Trend::rises, "mass cap");
  }
  if (limits.cost) {
    add(Kind::cost_cap, Trend::rises, "cost cap");
  }
  for (auto& piece : out_->pieces) {
    piece.applies.assign(out_->constraints.size(), false);
    for (std::size_t i = 0; i < out_->constraints.size(); ++i) {
      const auto& constraint = out_->constraints[i];
      piece.applies[i] = constraint.kind == Kind::limit_state && piece.step != nullptr &&
                         constraint.state->applies(problem_.effects()[constraint.load_case],
                                                   problem_.member_limits(),
                                                   piece.step->cases[constraint.load_case].member,
                                                   piece.section);
    }
  }
}

void CandidateCompiler::add_limit_states() {
  const auto first = std::find_if(out_->pieces.begin(), out_->pieces.end(), [](const Piece& piece) {
    return piece.step != nullptr;
  });
  if (first == out_->pieces.end()) {
    return;
  }
  for (const LimitState* state : limit_states()) {
    for (std::size_t c = 0; c < problem_.effects().size(); ++c) {
      if (c > 0 && !state->reads_loads()) {
        break;
      }
      const bool anywhere =
          std::any_of(out_->pieces.begin(), out_->pieces.end(), [&](const Piece& piece) {
            return piece.step != nullptr && state->applies(problem_.effects()[c],
                                                           problem_.member_limits(),
                                                           piece.step->cases[c].member,
                                                           piece.section);
          });
      if (!anywhere) {
        continue;
      }
      out_->constraints.push_back(
          problem_.limit_constraint(*state, c, first->step->cases[c].member));
    }
  }
}

bool CandidateCompiler::thin_polygon() const {
  if (!out_->shape || out_->shape->family != SectionFamily::polygon) {
    return false;
  }
  // The limit states of walls and of twisting know no polygons. Up to this ratio no wall buckles in
  // any usual metal: an outstand of EN 1993-1-1 Table 5.2 is class 3 up to 14 epsilon.
  constexpr double stocky = 10.0;
  const auto unit = problem_.section_of(*out_, route_, 1.0);
  const bool thin = std::max(unit.height, unit.width) > stocky * unit.wall;
  const auto effects = problem_.effects();
  return thin && std::any_of(effects.begin(), effects.end(), [](const LoadEffects& one) {
           return one.bends || one.compression > 0.0 || one.twists || one.acceleration_z != 0.0 ||
                  one.acceleration_y != 0.0;
         });
}

void CandidateCompiler::find_undecided() {
  std::set<std::string> open;
  std::set<Property> missing;
  for (auto& piece : out_->pieces) {
    if (piece.step == nullptr) {
      continue;
    }
    for (const auto& resolved : piece.step->cases) {
      missing.insert(resolved.missing.begin(), resolved.missing.end());
      if (!resolved.member.rho) {
        missing.insert(Property::density);
      }
    }
    for (std::size_t i = 0; i < out_->constraints.size(); ++i) {
      if (!piece.applies[i]) {
        continue;
      }
      const auto& constraint = out_->constraints[i];
      const auto& member = piece.step->cases[constraint.load_case].member;
      for (const Symbol symbol :
           constraint.state->needs(problem_.effects()[constraint.load_case], member)) {
        if (!value_of(member, symbol)) {
          missing.insert(property_of(symbol));
        }
      }
    }
    if (!piece.step->priced) {
      missing.insert(Property::price);
    }
    for (auto& text : open_limits(problem_, out_->candidate.material, *piece.step)) {
      open.insert(std::move(text));
    }
  }
  if (thin_polygon()) {
    open.emplace("local and torsional buckling of a thin polygon");
  }
  out_->undecided_limits.assign(open.begin(), open.end());
  out_->undecided.assign(missing.begin(), missing.end());
}

}  // namespace bismar
