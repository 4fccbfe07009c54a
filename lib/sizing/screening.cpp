// SPDX-License-Identifier: MIT
#include "sizing/screening.hpp"

#include "sizing/gaps.hpp"
#include "sizing/shape_section.hpp"

#include <bismar/sizing/existence.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

/// Rounding of a mass and a cost made of a bound.
constexpr double slack = 1e-9;

}  // namespace

bool has_walls(const Part& part) {
  const auto walled = [](const Shape& shape) {
    return is_tube(shape.family) || is_open_section(shape.family) ||
           shape.family == SectionFamily::polygon;
  };
  return !part.body.stock.empty() ||
         std::any_of(part.body.shapes.begin(), part.body.shapes.end(), walled);
}

std::optional<std::string> Screening::failed_by_itself(std::uint32_t material,
                                                       std::span<const Candidate> candidates) {
  const auto& limits = problem_.part().limits;
  if (limits.properties.empty()) {
    return std::nullopt;
  }
  const auto steps = problem_.catalogue().materials.steps(material);
  for (std::size_t p = 0; p < limits.properties.size(); ++p) {
    bool fails = true;
    for (const auto& step : steps) {
      const auto u = problem_.property_utilisation(p, step.row);
      if (!u) {
        return std::nullopt;  // undecided, whatever else it fails
      }
      fails = fails && *u > 1.0;
    }
    if (fails) {
      set_material(material);
      const bool open = std::any_of(candidates.begin(), candidates.end(), [&](Candidate one) {
        one.material = material;
        return lacks_value(one);
      });
      problem_.forget(material);
      current_.material = UINT32_MAX;
      return open ? std::nullopt : std::optional("limit on " + limits.properties[p].property);
    }
  }
  return std::nullopt;
}

void Screening::set_material(std::uint32_t material) {
  if (current_.material == material) {
    return;
  }
  current_.material = material;
  current_.needs.assign(bounds_.size(), std::nullopt);
  traits_ = traits(problem_, material);
}

std::size_t Screening::bounds_of(const Candidate& candidate) {
  const auto& route = problem_.catalogue().routes[candidate.route];
  const bool rolled =
      problem_.part().body.shapes[candidate.shape].family == SectionFamily::rectangular_tube;
  const Forming forming = rolled ? forming_of(route) : Forming::unknown;
  const auto [entry, added] = places_.try_emplace({candidate.shape, forming}, bounds_.size());
  if (added) {
    bounds_.push_back(std::make_unique<ShapeBounds>(problem_, candidate.shape, forming));
    current_.needs.resize(bounds_.size());
  }
  return entry->second;
}

bool Screening::lacks_value(const Candidate& candidate) {
  const auto [entry, added] =
      lacking_.try_emplace({candidate.shape, candidate.stock, traits_}, true);
  if (added) {
    if (candidate.shape != Candidate::none) {
      entry->second = bismar::lacks_value(problem_, candidate);
    } else {
      const auto& compiled = problem_.add(candidate);
      entry->second = !compiled.undecided.empty() || !compiled.undecided_limits.empty();
      problem_.remove_last();
    }
  }
  return entry->second;
}

Screening::Lower Screening::lower_at(const Candidate& candidate, double area) const {
  if (area == infinity) {
    return {infinity, infinity};
  }
  double density = infinity;
  double price = infinity;
  for (const StepState& state : problem_.states(candidate.material)) {
    density = std::min(density, state.density);
    price = std::min(price, state.usual_price);
  }
  const double length = problem_.part().body.length;
  const Route& route = problem_.catalogue().routes[candidate.route];
  SectionProperties least;
  least.area = area;
  // Of all outlines of this area the circle is the shortest.
  least.perimeter = 2.0 * std::sqrt(std::numbers::pi * area);
  const bool has_least_mass = route.rate_basis != RateBasis::metre;
  const double net_mass = std::max(density * area * length, has_least_mass ? route.mass_min : 0.0);
  const bool as_bought = candidate.stock != Candidate::none || machines_blank(route);
  const double bought = as_bought ? net_mass : net_mass / (1.0 - route.scrap);
  const CandidateCost cost(problem_.part(), problem_.catalogue(), problem_.settings(), candidate);
  return {(net_mass + cost.finish_mass(least)) * (1.0 - slack),
          cost.total({least, net_mass, {bought, 0.0, 1.0}}, {price, price}, price) * (1.0 - slack)};
}

double Screening::promise(std::uint32_t material, std::span<const Candidate> candidates) {
  set_material(material);
  double least = infinity;
  for (Candidate candidate : candidates) {
    candidate.material = material;
    if (candidate.shape == Candidate::none || lacks_value(candidate)) {
      return 0.0;
    }
    const auto place = bounds_of(candidate);
    auto& needs = current_.needs[place];
    if (!needs) {
      needs = bounds_[place]->needs(problem_.states(material));
    }
    const double area = bounds_[place]->least_area(*needs, [](double) { return true; });
    const auto lower = lower_at(candidate, area);
    least = std::min(least, lower.mass * lower.cost);
  }
  problem_.forget(material);
  current_.material = UINT32_MAX;
  return least;
}

bool Screening::is_beaten_at_least_mass(std::uint32_t material,
                                        std::span<const Candidate> candidates,
                                        const Incumbent& incumbent) {
  const bool beaten = std::all_of(candidates.begin(), candidates.end(), [&](Candidate candidate) {
    const Route& route = problem_.catalogue().routes[candidate.route];
    if (route.rate_basis == RateBasis::metre || !(route.mass_min > 0.0)) {
      return true;
    }
    candidate.material = material;
    const auto lower = lower_at(candidate, 0.0);
    const double objectives[] = {lower.mass, lower.cost};
    return incumbent.beats(objectives);
  });
  problem_.forget(material);
  return beaten;
}

bool Screening::is_beaten(const Candidate& candidate, const Incumbent& incumbent) {
  if (candidate.shape == Candidate::none) {
    return false;
  }
  set_material(candidate.material);
  if (lacks_value(candidate)) {
    return false;
  }
  const auto place = bounds_of(candidate);
  auto& needs = current_.needs[place];
  if (!needs) {
    needs = bounds_[place]->needs(problem_.states(candidate.material));
  }
  const auto beaten = [&](double area) {
    const auto lower = lower_at(candidate, area);
    const double objectives[] = {lower.mass, lower.cost};
    return incumbent.beats(objectives);
  };
  const double area = bounds_[place]->least_area(*needs, beaten);
  return area == infinity || beaten(area);
}

}  // namespace bismar
