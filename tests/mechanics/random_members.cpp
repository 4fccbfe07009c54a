// SPDX-License-Identifier: MIT
#include "mechanics/random_members.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::test {

namespace {

double between(std::mt19937& random, double low, double high) {
  return std::exp(std::uniform_real_distribution<double>(std::log(low), std::log(high))(random));
}

int pick(std::mt19937& random, int count) {
  return std::uniform_int_distribution<int>(0, count - 1)(random);
}

}  // namespace

RandomSection::RandomSection(std::mt19937& random)
    : family_(pick(random, 12)),
      height_(between(random, 0.01, 0.15)),
      width_ratio_(between(random, 0.45, 2.0)),
      wall_ratio_(between(random, 0.01, 0.18)),
      slope_(pick(random, 2) == 0 ? 0.0 : 0.02),
      forming_(pick(random, 2) == 0 ? Forming::hot_finished : Forming::cold_formed) {}

SectionProperties RandomSection::at(double scale) const {
  const double h = height_ * scale;
  const double b = h * width_ratio_;
  const double t = wall_ratio_ * std::fmin(h, b);
  switch (family_) {
    case 0:
      return solid_round(h);
    case 1:
      return solid_square(h);
    case 2:
      return solid_rectangle(h, b);
    case 3:
      return solid_ellipse(h, b);
    case 4:
      return round_tube(h, wall_ratio_ * h, forming_);
    case 5:
      return rectangular_tube(h, b, t, 1.5 * t, t, forming_);
    case 6:
      // Never thicker than 40 mm, where the buckling curve changes.
      return i_section(h, b, 0.5 * t, t, 0.5 * t);
    case 7:
      return solid_hexagon(h);
    case 8:
      return elliptical_tube(h, b, t, forming_);
    case 9:
      return tee(h, b, t, t, 0.5 * t);
    case 10:
      return angle(h, b, t, 0.5 * t, 0.25 * t);
    default:
      // Thick enough that a tapered flange of any width keeps its tip.
      return channel(h, b, 0.5 * t, std::fmax(t, 0.06 * b), 0.5 * t, slope_);
  }
}

namespace {

/// Supports of any kind, with an overhang now and then.
void add_supports(std::mt19937& random, double length, LoadCase& load_case) {
  load_case.support_z = static_cast<Support>(pick(random, 4));
  load_case.support_y = static_cast<Support>(pick(random, 4));
  if (pick(random, 5) == 0) {
    const auto either = [&] {
      return pick(random, 2) == 0 ? Support::pinned_pinned : Support::fixed_pinned;
    };
    load_case.support_z = either();
    load_case.support_y = either();
    load_case.second_support = length * std::uniform_real_distribution<double>(0.1, 1.0)(random);
  }
}

/// Own mass, eccentricity, heat and fatigue, each now and then.
void add_surroundings(std::mt19937& random, LoadCase& load_case) {
  const auto sign = [&] { return pick(random, 2) == 0 ? 1.0 : -1.0; };
  if (pick(random, 3) == 0) {
    load_case.acceleration_z = sign() * between(random, 1.0, 100.0);
  }
  if (pick(random, 5) == 0) {
    load_case.acceleration_y = sign() * between(random, 1.0, 100.0);
  }
  if (pick(random, 3) == 0) {
    load_case.eccentricity = pick(random, 4) == 0 ? 0.0 : between(random, 1e-4, 0.05);
  }
  if (pick(random, 3) == 0) {
    load_case.temperature_change = sign() * between(random, 1.0, 100.0);
    load_case.restrained = pick(random, 2) == 0;
  }
  if (pick(random, 3) == 0) {
    load_case.fatigue =
        FatigueLoading{.cycles = between(random, 1.0, 1e9),
                       .stress_ratio = std::uniform_real_distribution<double>(-1.0, 1.0)(random)};
  }
}

}  // namespace

LoadCase random_load_case(std::mt19937& random, double length) {
  LoadCase load_case;
  add_supports(random, length, load_case);
  add_surroundings(random, load_case);
  const auto signed_size = [&](double high) {
    return (pick(random, 2) == 0 ? 1.0 : -1.0) * between(random, 1e-3 * high, high);
  };
  if (pick(random, 6) == 0) {
    load_case.direct = InternalForces{.N = signed_size(1e4),
                                      .V_y = signed_size(1e3),
                                      .V_z = signed_size(1e3),
                                      .M_y = signed_size(1e3),
                                      .M_z = signed_size(1e3),
                                      .T = signed_size(1e3)};
    return load_case;
  }
  const double at = length * std::uniform_real_distribution<double>(0.2, 1.0)(random);
  const auto along = [&] { return pick(random, 3) == 0 ? Along::y : Along::z; };
  const int count = 1 + pick(random, 4);
  for (int i = 0; i < count; ++i) {
    switch (pick(random, 5)) {
      case 0:
        load_case.loads.push_back(force(signed_size(1e4), at, along()));
        break;
      case 1:
        load_case.loads.push_back(moment(signed_size(1e3), at, along()));
        break;
      case 2:
        load_case.loads.push_back(
            distributed(signed_size(1e4), signed_size(1e4), 0.0, at, along()));
        break;
      case 3:
        load_case.loads.push_back(axial(signed_size(1e5)));
        break;
      default:
        load_case.loads.push_back(torque(signed_size(1e3), at));
    }
  }
  return load_case;
}

MemberMaterial random_material(std::mt19937& random) {
  MemberMaterial m;
  m.rule = static_cast<StressRule>(pick(random, 3));
  m.column_law = static_cast<ColumnLaw>(pick(random, 5));
  m.ceramic = pick(random, 2) == 0;
  m.rho = between(random, 500.0, 8000.0);
  m.E = between(random, 1e9, 400e9);
  if (pick(random, 2) == 0) {
    m.E_axial = *m.E * between(random, 0.5, 2.0);
  }
  m.E_05 = *m.E * 0.67;
  m.G = *m.E / 2.6;
  m.sigma_y = between(random, 10e6, 1500e6);
  m.tensile = between(random, 10e6, 1500e6);
  m.compressive = between(random, 10e6, 1500e6);
  m.flexural = between(random, 10e6, 1500e6);
  m.shear = between(random, 1e6, 500e6);
  m.alpha = between(random, 1e-6, 1e-4);
  m.K_Ic = between(random, 1e5, 1e8);
  m.sigma_e = between(random, 5e6, 700e6);
  m.endurance_cycles = between(random, 1e6, 5e8);
  m.steel = pick(random, 2) == 0;
  m.cast_iron = !m.steel && pick(random, 3) == 0;
  m.weld_yield_factor = std::uniform_real_distribution<double>(0.4, 1.0)(random);
  m.weld_tensile_factor = std::uniform_real_distribution<double>(0.4, 1.0)(random);
  if (pick(random, 3) == 0) {
    m.k_cr = 0.67;
    m.strength_factor = 0.6;
  }
  return m;
}

namespace {

MemberDetails random_details(std::mt19937& random, double length) {
  MemberDetails details;
  const auto share = [&](double low) {
    return std::uniform_real_distribution<double>(low, 1.0)(random);
  };
  const auto concentration = [&] { return pick(random, 2) == 0 ? 1.0 : between(random, 1.0, 4.0); };
  if (pick(random, 2) == 0) {
    details.net_area = share(0.3);
    details.net_modulus = share(0.3);
  }
  details.k_t_axial = concentration();
  details.k_t_bending = concentration();
  details.k_t_torsion = concentration();
  if (pick(random, 2) == 0) {
    details.notch_radius = between(random, 1e-4, 1e-2);
  }
  details.surface = static_cast<SurfaceFinish>(pick(random, 5));
  details.reliability = std::uniform_real_distribution<double>(0.5, 0.999999)(random);
  details.criterion = static_cast<FatigueCriterion>(pick(random, 3));
  if (pick(random, 3) == 0) {
    details.detail_category = between(random, 36e6, 160e6);
  }
  details.welded = pick(random, 3) == 0;
  if (pick(random, 3) == 0) {
    const double depth = between(random, 1e-5, 5e-3);
    details.crack = Crack{.kind = static_cast<Crack::Kind>(pick(random, 2)),
                          .depth = depth,
                          .half_length = depth * between(random, 1.0, 5.0)};
  }
  for (int i = pick(random, 3); i > 0; --i) {
    details.masses.push_back({.mass = between(random, 1e-2, 1e2),
                              .at = std::uniform_real_distribution<double>(0.0, length)(random)});
  }
  return details;
}

}  // namespace

MemberLimits random_limits(std::mt19937& random, double length) {
  MemberLimits limits;
  limits.deflection = between(random, 1e-4, 0.1);
  limits.shear_deflection = pick(random, 2) == 0;
  limits.rotation = between(random, 1e-4, 0.1);
  limits.twist = between(random, 1e-3, 0.5);
  limits.frequency = between(random, 1.0, 1000.0);
  limits.elongation = between(random, 1e-5, 0.1);
  limits.height = between(random, 0.005, 0.3);
  limits.width = between(random, 0.005, 0.3);
  limits.wall = between(random, 1e-4, 0.05);
  limits.column_method = static_cast<ColumnMethod>(std::max(0, pick(random, 5) - 2));
  limits.lateral_restraint = pick(random, 4) == 0;
  limits.details = random_details(random, length);
  return limits;
}

}  // namespace bismar::test
