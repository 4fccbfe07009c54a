// SPDX-License-Identifier: MIT
#include "mechanics/random_members.hpp"

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
    : family_(pick(random, 8)),
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
    default:
      // Thick enough that a tapered flange of any width keeps its tip.
      return channel(h, b, 0.5 * t, std::fmax(t, 0.06 * b), 0.5 * t, slope_);
  }
}

LoadCase random_load_case(std::mt19937& random, double length) {
  LoadCase load_case;
  load_case.support_z = pick(random, 2) == 0 ? Support::cantilever : Support::pinned_pinned;
  load_case.support_y = pick(random, 2) == 0 ? Support::cantilever : Support::pinned_pinned;
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
  if (pick(random, 3) == 0) {
    m.k_cr = 0.67;
    m.strength_factor = 0.6;
  }
  return m;
}

MemberLimits random_limits(std::mt19937& random) {
  MemberLimits limits;
  limits.deflection = between(random, 1e-4, 0.1);
  limits.twist = between(random, 1e-3, 0.5);
  limits.height = between(random, 0.005, 0.3);
  limits.width = between(random, 0.005, 0.3);
  limits.wall = between(random, 1e-4, 0.05);
  limits.column_method = pick(random, 4) == 0 ? ColumnMethod::euler : ColumnMethod::curves;
  return limits;
}

}  // namespace bismar::test
