// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/fatigue_severity.hpp"

#include "mechanics/limit_states/value.hpp"
#include "mechanics/mean_stress.hpp"
#include "mechanics/stress_points.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/welded_detail.hpp>

#include <algorithm>
#include <cmath>
#include <limits>

namespace bismar::mechanics {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

StationStresses multiplied(StationStresses s, const StressMultipliers& by) {
  s.axial *= by.axial;
  s.bending_y *= by.bending;
  s.bending_z *= by.bending;
  s.bending *= by.bending;
  s.web_bending_z *= by.bending;
  s.shear_y *= by.shear;
  s.shear_z *= by.shear;
  s.flange_shear *= by.shear;
  s.torsion *= by.torsion;
  return s;
}

/// Largest von Mises stress of the section.
double largest_equivalent(const SectionProperties& section, const StationStresses& s) {
  double largest = 0.0;
  for (const StressPoint& point : stress_points(section, s)) {
    largest = std::max(largest, equivalent_squared(point));
  }
  return std::sqrt(largest);
}

/// No stress uses nothing up, even of a strength that has faded to zero.
double ratio(double stress, double strength) { return stress == 0.0 ? 0.0 : stress / strength; }

/// No stress stays none, even where the whole is infinite.
double part_of(double share, double stress) { return share == 0.0 ? 0.0 : share * stress; }

void judge(FatigueSeverity& s,
           MeanStressLine line,
           double strength,
           double mean_strength,
           double first_strength) {
  s.fatigue = share_used(line, ratio(s.amplitude, strength), ratio(s.mean, mean_strength));
  s.first = ratio(s.largest, first_strength);
}

/// The stresses of one station.
struct Swing {
  StationStresses largest;  ///< Under the whole load case.
  /// What amplitude_share() is of, and the same but for moments that compression raises.
  StationStresses range;
};

/// Of both, the worse.
FatigueSeverity anisotropic(const CheckInput& input, const StressLife& life, const Swing& swing) {
  const MemberMaterial& m = input.material;
  const double tensile = needed(m.tensile, Symbol::tensile);
  const StationStresses peak = multiplied(swing.largest, life.peak);
  const StationStresses range = multiplied(swing.range, life.peak);
  FatigueSeverity direct;
  direct.largest = std::abs(peak.axial) + peak.bending;
  direct.amplitude = part_of(amplitude_share(input), std::abs(range.axial) + range.bending);
  direct.mean = part_of(mean_share(input), (std::max(0.0, peak.axial) + peak.bending));
  judge(direct, life.line, life.resistance.strength, tensile, tensile);
  FatigueSeverity shear;
  shear.shear = true;
  shear.largest =
      std::sqrt(peak.shear_y * peak.shear_y + peak.shear_z * peak.shear_z) / m.k_cr + peak.torsion;
  if (shear.largest == 0.0) {
    return direct;
  }
  shear.amplitude = part_of(amplitude_share(input), shear.largest);
  shear.mean = part_of(mean_share(input), shear.largest);
  const double strength = needed(m.shear, Symbol::shear);
  judge(shear, life.line, strength * (life.resistance.strength / tensile), strength, strength);
  return shear.share() > direct.share() ? shear : direct;
}

/// Amplitude and mean may peak at different points of the section; both largest together are on the
/// safe side, by nothing where they grow alike.
FatigueSeverity isotropic(const CheckInput& input, const StressLife& life, const Swing& swing) {
  const StationStresses& s = swing.largest;
  const bool ductile = input.material.rule == StressRule::von_mises_yield;
  const double tensile = needed(input.material.tensile, Symbol::tensile);
  const double yield = ductile ? needed(input.material.sigma_y, Symbol::sigma_y) : tensile;
  const auto equivalent = [&](const StationStresses& stresses, const StressMultipliers& by) {
    return largest_equivalent(input.section, multiplied(stresses, by));
  };
  StressMultipliers tension = life.peak;
  if (s.axial < 0.0) {
    tension.axial = 0.0;
  }
  FatigueSeverity result;
  result.amplitude = part_of(amplitude_share(input), equivalent(swing.range, life.amplitude));
  result.mean = part_of(mean_share(input), equivalent(s, tension));
  result.largest = equivalent(s, life.peak);
  judge(result,
        life.line,
        life.resistance.strength,
        life.line == MeanStressLine::soderberg ? yield : tensile,
        yield);
  return result;
}

/// The range of the von Mises stress, which is never below that of the largest principal stress.
FatigueSeverity welded(const CheckInput& input, const Swing& swing) {
  const MemberDetails& d = input.limits.details;
  FatigueSeverity result;
  result.largest = part_of(2.0 * amplitude_share(input),
                           largest_equivalent(input.section,
                                              multiplied(swing.range,
                                                         {.axial = 1.0 / d.net_area,
                                                          .bending = 1.0 / d.net_modulus,
                                                          .shear = 1.0 / d.net_area,
                                                          .torsion = 1.0 / d.net_modulus})));
  if (!input.material.steel) {
    result.fatigue = result.largest > 0.0 ? infinity : 0.0;
    return result;
  }
  result.fatigue = ratio(result.largest,
                         welded_detail_strength(detail_category(d), input.effects.fatigue->cycles));
  if (input.material.rule == StressRule::von_mises_yield) {
    result.first = ratio(result.largest, 1.5 * needed(input.material.sigma_y, Symbol::sigma_y));
  }
  return result;
}

template <typename AtStation>
FatigueSeverity worst_station(const CheckInput& input,
                              const Amplifications& raised,
                              const AtStation& at_station) {
  const double stress_ratio = input.effects.fatigue->stress_ratio;
  const bool differ = is_amplified(input.effects) && stress_ratio > 0.0;
  FatigueSeverity worst;
  for (const Station& station : input.effects.stations) {
    const InternalForces forces = amplified_forces(input, station, raised);
    Swing swing;
    swing.largest = station_stresses(input.section, forces);
    swing.range =
        differ ? station_stresses(input.section,
                                  amplified_range_forces(input, station, raised, stress_ratio))
               : swing.largest;
    FatigueSeverity here = at_station(swing);
    if (worst.station == nullptr || here.share() > worst.share()) {
      here.station = &station;
      here.forces = forces;
      worst = here;
    }
  }
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  return worst;
}

}  // namespace

double amplitude_share(const CheckInput& input) {
  return 0.5 * (1.0 - input.effects.fatigue->stress_ratio);
}

double mean_share(const CheckInput& input) {
  return 0.5 * (1.0 + input.effects.fatigue->stress_ratio);
}

StressLife::StressLife(const CheckInput& input)
    : notch(fatigue_notch(input)),
      resistance(fatigue_resistance(input)),
      line(mean_stress_line(input)) {
  const MemberDetails& d = input.limits.details;
  peak = {.axial = notch.k_axial / d.net_area,
          .bending = notch.k_bending / d.net_modulus,
          .shear = notch.k_torsion / d.net_area,
          .torsion = notch.k_torsion / d.net_modulus};
  amplitude = {.axial = peak.axial / resistance.axial_at_life,
               .bending = peak.bending / resistance.size_at_life,
               .shear = peak.shear,
               .torsion = peak.torsion / resistance.size_at_life};
}

FatigueSeverity worst_of(const CheckInput& input,
                         const StressLife& life,
                         const Amplifications& raised) {
  return worst_station(input, raised, [&](const Swing& swing) {
    return input.material.rule == StressRule::direct_and_shear ? anisotropic(input, life, swing)
                                                               : isotropic(input, life, swing);
  });
}

FatigueSeverity worst_weld(const CheckInput& input, const Amplifications& raised) {
  return worst_station(input, raised, [&](const Swing& swing) { return welded(input, swing); });
}

}  // namespace bismar::mechanics
