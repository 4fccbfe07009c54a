// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/fatigue_resistance.hpp"

#include "mechanics/limit_states/value.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/endurance.hpp>
#include <bismar/mechanics/notch.hpp>

#include <algorithm>
#include <cmath>

namespace bismar::mechanics {

namespace {

constexpr double line_begins = 1e3;
constexpr double steel_knee = 1e6;
/// A fatigue strength measured at fewer cycles than these says nothing about longer lives.
constexpr double least_knee = 1e4;

double neuber(double tensile, double radius, NotchLoad load) {
  // 50 kpsi, and 250 or 220 kpsi, a hair inside.
  constexpr double least = 344.738e6;
  const double largest = load == NotchLoad::torsion ? 1516.8e6 : 1723.6e6;
  return tensile > largest ? 1.0 : neuber_sensitivity(std::max(tensile, least), radius, load);
}

bool is_anisotropic(const MemberMaterial& material) {
  return material.rule == StressRule::direct_and_shear;
}

/// The steels' factor, capped at 1, is taken for all metals and plastics, which is common practice;
/// the skin of cast iron is no worse than the graphite inside, and anisotropic materials have no
/// such factor.
double surface_of(const CheckInput& input, double tensile) {
  if (input.material.cast_iron || is_anisotropic(input.material)) {
    return 1.0;
  }
  const auto factor = [tensile](FatigueSurface surface) {
    return std::min(1.0, surface_factor(surface, SurfaceEdition::eleventh, tensile));
  };
  switch (input.limits.details.surface) {
    case SurfaceFinish::polished:
      return 1.0;
    case SurfaceFinish::ground:
      return factor(FatigueSurface::ground);
    case SurfaceFinish::machined:
      return factor(FatigueSurface::machined);
    case SurfaceFinish::hot_rolled:
      return factor(FatigueSurface::hot_rolled);
    case SurfaceFinish::as_forged:
      return factor(FatigueSurface::as_forged);
  }
  throw InternalError("surface finish without a factor");
}

/// Round, elliptical and hexagonal sections may turn or be twisted: sqrt(h b), the diameter itself.
/// The others bend without turning: the rectangle around them has at least their material above 95
/// % of the largest stress.
double size_diameter(const SectionProperties& section) {
  return section.smooth_outline || section.family == SectionFamily::solid_hexagon
             ? std::sqrt(section.height * section.width)
             : equivalent_diameter_of_rectangle(section.height, section.width);
}

}  // namespace

FatigueNotch fatigue_notch(const CheckInput& input) {
  const MemberMaterial& material = input.material;
  const MemberDetails& details = input.limits.details;
  FatigueNotch notch;
  if (material.cast_iron) {
    notch.q = notch.q_torsion = cast_iron_sensitivity;
  } else if (material.steel && details.notch_radius) {
    const double tensile = needed(material.tensile, Symbol::tensile);
    notch.q = neuber(tensile, *details.notch_radius, NotchLoad::bending);
    notch.q_torsion = neuber(tensile, *details.notch_radius, NotchLoad::torsion);
  }
  notch.k_axial = fatigue_concentration(details.k_t_axial, notch.q);
  notch.k_bending = fatigue_concentration(details.k_t_bending, notch.q);
  notch.k_torsion = fatigue_concentration(details.k_t_torsion, notch.q_torsion);
  return notch;
}

FatigueResistance fatigue_resistance(const CheckInput& input) {
  const MemberMaterial& material = input.material;
  const double tensile = needed(material.tensile, Symbol::tensile);
  FatigueResistance r;
  r.estimated = material.steel && !material.sigma_e;
  r.specimen =
      r.estimated ? endurance_limit_estimate(tensile) : needed(material.sigma_e, Symbol::sigma_e);
  r.surface = surface_of(input, tensile);
  r.reliability = reliability_factor(input.limits.details.reliability);
  r.fraction = material.steel ? fatigue_strength_fraction(tensile) : 0.9;
  const double at_1000 = r.fraction * tensile;
  r.endurance = std::min(r.surface * r.reliability * r.specimen, at_1000);
  r.knee = r.estimated ? steel_knee : std::max(material.endurance_cycles, least_knee);
  r.place = std::max(
      0.0, std::log(input.effects.fatigue->cycles / line_begins) / std::log(r.knee / line_begins));
  if (material.steel || material.cast_iron) {
    r.place = std::min(r.place, 1.0);
  }
  r.strength = at_1000 * std::pow(r.endurance / at_1000, r.place);
  if (!is_anisotropic(material)) {
    r.diameter = size_diameter(input.section);
    // Held at the ends of the formula's range; a part below 7.62 mm, the specimens' size, is taken
    // as they are.
    r.size = std::min(1.0, size_factor(std::clamp(r.diameter, 2.79e-3, 0.254)));
    const double fade = std::min(r.place, 1.0);
    r.size_at_life = std::pow(r.size, fade);
    r.axial_at_life = std::pow(load_factor(FatigueLoad::axial), fade);
  }
  return r;
}

MeanStressLine mean_stress_line(const CheckInput& input) {
  switch (input.limits.details.criterion) {
    case FatigueCriterion::goodman:
      return MeanStressLine::goodman;
    case FatigueCriterion::gerber:
      return MeanStressLine::gerber;
    case FatigueCriterion::soderberg:
      return input.material.rule == StressRule::von_mises_yield ? MeanStressLine::soderberg
                                                                : MeanStressLine::goodman;
  }
  throw InternalError("fatigue criterion without a line");
}

bool is_welded_detail(const MemberDetails& details) {
  return details.welded || details.detail_category;
}

double detail_category(const MemberDetails& details) {
  constexpr double lowest = 36e6;
  return details.detail_category.value_or(lowest);
}

}  // namespace bismar::mechanics
