// SPDX-License-Identifier: MIT
#include "sizing/shape_bounds.hpp"

#include "sizing/free_scratch.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/scaled_section.hpp>
#include <bismar/mechanics/section_builder.hpp>
#include <bismar/mechanics/separable_bound.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Sizes at which only the highest, and only the lowest power of a demand is left [m].
constexpr double small_size = 1e-7;
constexpr double large_size = 1e7;

/// Rounding of demands, capacities and powers.
constexpr double slack = 1e-8;

constexpr std::size_t most_boxes = 6000;
/// Boxes split for one question at most.
constexpr std::size_t most_splits = 100;
/// Boxes narrower than this in every ratio are not split further.
constexpr double narrow = 1.02;

}  // namespace

ShapeBounds::ShapeBounds(const SizingProblem& problem, std::size_t shape, Forming forming)
    : problem_(problem), shape_(problem.part().body.shapes[shape]), forming_(forming) {
  std::vector<Interval> root;
  for (const auto& dimension : dimensions(shape_.family)) {
    if (root.empty()) {
      root.emplace_back(1.0);
    } else if (!dimension.optional) {
      const Ratio range = ratio_range(shape_, dimension.name);
      root.emplace_back(range.low, range.high);
    }
  }
  if (!can_enclose(shape_.family)) {
    return;  // a polygon: nothing is known of it but what solving tells
  }
  find_sources();
  find_conditions();
  ratios_.push_back(std::move(root));
  look(ratios_.front());
  fill(0);
  // Boxes that cannot be enclosed yet bound nothing.
  for (std::size_t b = 0; b < ratios_.size(); ++b) {
    while (rough_[b] != 0 && split(b)) {
    }
  }
}

/// Limit states that every section of the shape meets, with conditions of their own.
void ShapeBounds::find_sources() {
  std::vector<SectionProperties> samples;
  for (const auto& sizes : sample_sizes(shape_)) {
    samples.push_back(ShapeSections({&shape_, 1}).at(0, Route{}, 1.0, sizes));
  }
  if (samples.empty()) {
    return;
  }
  sample_ = samples.front();
  for (const LimitState* state : limit_states()) {
    if (state->separable() == nullptr) {
      continue;
    }
    for (std::size_t c = 0; c < problem_.effects().size(); ++c) {
      if (c > 0 && !state->reads_loads()) {
        break;
      }
      Source source;
      source.state = state;
      source.load_case = c;
      bool always = true;
      for (const StressRule rule :
           {StressRule::von_mises_yield, StressRule::principal, StressRule::direct_and_shear}) {
        MemberMaterial material;
        material.rule = rule;
        source.kinds.push_back(state->best_section(problem_.effects()[c], material));
        // One that comes up for some proportions only says nothing about the others.
        const auto applying =
            std::count_if(samples.begin(), samples.end(), [&](const auto& section) {
              return state->applies(
                  problem_.effects()[c], problem_.member_limits(), material, section);
            });
        always =
            always && (applying == 0 || applying == static_cast<std::ptrdiff_t>(samples.size()));
      }
      std::sort(source.kinds.begin(), source.kinds.end());
      source.kinds.erase(std::unique(source.kinds.begin(), source.kinds.end()), source.kinds.end());
      if (always) {
        sources_.push_back(std::move(source));
      }
    }
  }
}

void ShapeBounds::look(const std::vector<Interval>& ratios) {
  const double radius = shape_.root_radius_to_height.value_or(0.0);
  const SizesBox box{
      shape_.family, ratios, radius, 0.0, forming_, Interval(shape_.height_min, shape_.height_max)};
  enclosed_ = may_be_usual(box) && is_enclosable(box);
  rough_area_ = may_be_usual(box) ? rough_area(box) : infinity;
  if (enclosed_) {
    enclose_sections(box, enclosure_);
  }
}

void ShapeBounds::demands(Source& source, double size, std::vector<double>& out) {
  const auto& bound = *source.state->separable();
  out.assign(bound.terms(), infinity);
  out_.resize(bound.terms());
  for (const BestSection kind : source.kinds) {
    make_best(enclosure_, kind, best_);
    scale_into(best_, size, scaled_);
    bound.demands({scaled_,
                   problem_.effects()[source.load_case],
                   problem_.member_limits(),
                   problem_.part().body.length},
                  out_);
    for (std::size_t t = 0; t < out.size(); ++t) {
      out[t] = std::min(out[t], out_[t]);
    }
  }
}

void ShapeBounds::sample_demands(const Source& source, double size, std::vector<double>& out) {
  const auto& bound = *source.state->separable();
  out.resize(bound.terms());
  scale_into(sample_, size, scaled_);
  bound.demands({scaled_,
                 problem_.effects()[source.load_case],
                 problem_.member_limits(),
                 problem_.part().body.length},
                out);
}

/// Powers are those of the whole shape: they do not depend on the ratios.
void ShapeBounds::find_conditions() {
  const auto power_at = [&](Source& source, double size, std::size_t term) {
    sample_demands(source, size, source.small);
    sample_demands(source, 2.0 * size, source.large);
    const double power = std::log2(source.small[term] / source.large[term]);
    const double whole = std::round(power);
    const bool clean = std::isfinite(power) && std::abs(power - whole) < 1e-6 && whole >= 0.0;
    return clean ? whole : -1.0;
  };
  for (std::size_t s = 0; s < sources_.size(); ++s) {
    for (std::size_t t = 0; t < sources_[s].state->separable()->terms(); ++t) {
      const double highest = power_at(sources_[s], small_size, t);
      const double lowest = power_at(sources_[s], large_size, t);
      if (highest >= 0.0) {
        conditions_.push_back({s, t, highest, false});
      }
      if (lowest >= 0.0 && lowest != highest) {
        conditions_.push_back({s, t, lowest, true});
      }
    }
  }
  conditions_.push_back({sources_.size(), 0, 2.0, false});  // the least height
}

/// The first brackets of a box whose enclosure was just made.
void ShapeBounds::fill(std::size_t box) {
  const std::size_t n = conditions_.size();
  factors_.resize(std::max(factors_.size(), (box + 1) * n));
  areas_.resize(std::max(areas_.size(), box + 1));
  rough_.resize(std::max(rough_.size(), box + 1));
  rough_[box] = !enclosed_ && rough_area_ < infinity ? 1 : 0;
  double* factors = &factors_[box * n];
  if (!enclosed_ || !enclosure_.any) {
    // Not enclosed yet: only its rough area is known, infinite where no section is.
    const double area = enclosed_ ? infinity : rough_area_;
    std::fill_n(factors, n, 0.0);
    factors[n - 1] = area * shape_.height_min * shape_.height_min;
    return;
  }
  for (std::size_t s = 0; s < sources_.size(); ++s) {
    bool small = false;
    bool large = false;
    for (const auto& condition : conditions_) {
      small = small || (condition.source == s && !condition.at_large);
      large = large || (condition.source == s && condition.at_large);
    }
    if (small) {
      demands(sources_[s], small_size, sources_[s].small);
    }
    if (large) {
      demands(sources_[s], large_size, sources_[s].large);
    }
  }
  const double area = enclosure_.area.lower();
  for (std::size_t j = 0; j < n; ++j) {
    const auto& one = conditions_[j];
    if (one.source == sources_.size()) {
      factors[j] = area * shape_.height_min * shape_.height_min;
      continue;
    }
    const double size = one.at_large ? large_size : small_size;
    const auto& demand = one.at_large ? sources_[one.source].large : sources_[one.source].small;
    const double c = demand[one.term] * std::pow(size, one.power);
    factors[j] = one.power == 0.0 ? c : area * std::pow(c, 2.0 / one.power);
  }
}

ShapeBounds::Needs ShapeBounds::needs(const std::vector<StepState>& states) const {
  Needs out;
  out.weights.assign(conditions_.size(), infinity);
  std::vector<double> capacities;
  for (const StepState& state : states) {
    for (std::size_t j = 0; j < conditions_.size(); ++j) {
      const auto& one = conditions_[j];
      if (one.source == sources_.size()) {
        out.weights[j] = 1.0;
        continue;
      }
      const auto& source = sources_[one.source];
      const auto& member = state.cases[source.load_case].member;
      const auto& effects = problem_.effects()[source.load_case];
      double weight = 0.0;
      // A limit state that this material does not meet, or lacks a value for, asks nothing.
      const bool present = [&] {
        const auto needed = source.state->needs(effects, member);
        return std::all_of(needed.begin(), needed.end(), [&](Symbol symbol) {
          return value_of(member, symbol).has_value();
        });
      }();
      if (present && source.state->applies(effects, problem_.member_limits(), member, sample_)) {
        const auto& bound = *source.state->separable();
        capacities.resize(bound.terms());
        bound.capacities({member, effects, problem_.member_limits()}, capacities);
        const double factor =
            problem_.limit_constraint(*source.state, source.load_case, member).factor;
        const double ratio = factor / capacities[one.term] * (1.0 - slack);
        weight = one.power == 0.0 ? ratio : std::pow(ratio, 2.0 / one.power);
      }
      out.weights[j] = std::min(out.weights[j], weight);
    }
  }
  return out;
}

double ShapeBounds::area_of(std::size_t box, const Needs& needs) const {
  const std::size_t n = conditions_.size();
  const double* factors = &factors_[box * n];
  double area = 0.0;
  for (std::size_t j = 0; j < n; ++j) {
    if (!(needs.weights[j] > 0.0)) {
      continue;
    }
    const double value = factors[j] * needs.weights[j];
    if (conditions_[j].power == 0.0) {
      area = value > 1.0 ? infinity : area;
    } else {
      area = std::max(area, value);
    }
  }
  return area;
}

bool ShapeBounds::split(std::size_t box) {
  std::size_t widest = 0;
  double most = narrow;
  for (std::size_t d = 1; d < ratios_[box].size(); ++d) {
    const double width = ratios_[box][d].upper() / ratios_[box][d].lower();
    if (width > most) {
      most = width;
      widest = d;
    }
  }
  if (widest == 0 || ratios_.size() >= most_boxes) {
    return false;
  }
  const Interval whole = ratios_[box][widest];
  const double middle = std::sqrt(whole.lower() * whole.upper());
  auto upper = ratios_[box];
  upper[widest] = Interval(middle, whole.upper());
  ratios_[box][widest] = Interval(whole.lower(), middle);
  look(ratios_[box]);
  fill(box);
  look(upper);
  ratios_.push_back(std::move(upper));
  fill(ratios_.size() - 1);
  return true;
}

double ShapeBounds::least_area(const Needs& needs, FunctionRef<bool(double)> enough) {
  if (ratios_.empty()) {
    return 0.0;
  }
  for (std::size_t b = 0; b < ratios_.size(); ++b) {
    areas_[b] = area_of(b, needs);
  }
  for (std::size_t splits = 0;; ++splits) {
    const auto least = std::min_element(areas_.begin(), areas_.end());
    if (least == areas_.end()) {
      return infinity;  // the shape has no section at all
    }
    if (*least == infinity || splits >= most_splits || enough(*least)) {
      return *least;
    }
    const auto box = static_cast<std::size_t>(least - areas_.begin());
    const double area = *least;
    if (!split(box)) {
      return area;
    }
    areas_[box] = area_of(box, needs);
    areas_.back() = area_of(ratios_.size() - 1, needs);
  }
}

}  // namespace bismar
