// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/direct_stress.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/second_order.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/stress.hpp>

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <limits>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

bool is_ductile(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield;
}

bool is_weakened(const MemberDetails& details) {
  return details.net_area < 1.0 || details.net_modulus < 1.0;
}

bool concentrates(const MemberDetails& details) {
  return details.k_t_axial > 1.0 || details.k_t_bending > 1.0 || details.k_t_torsion > 1.0;
}

/// Stresses on the net section; where the material does not yield, at the notch.
StationStresses net_stresses(const CheckInput& input, const InternalForces& forces) {
  const MemberDetails& d = input.limits.details;
  const bool peaks = !is_ductile(input.material);
  const double axial = (peaks ? d.k_t_axial : 1.0) / d.net_area;
  const double bending = (peaks ? d.k_t_bending : 1.0) / d.net_modulus;
  const double torsion = (peaks ? d.k_t_torsion : 1.0) / d.net_modulus;
  StationStresses s = station_stresses(input.section, forces);
  s.axial *= axial;
  s.bending_y *= bending;
  s.bending_z *= bending;
  s.bending *= bending;
  s.web_bending_z *= bending;
  s.torsion *= torsion;
  s.shear_y /= d.net_area;
  s.shear_z /= d.net_area;
  s.flange_shear /= d.net_area;
  return s;
}

/// What is held against what.
enum class Mode : std::uint8_t {
  von_mises,    ///< Ductile: against 0.9 f_u.
  tension,      ///< Brittle: largest principal tension.
  compression,  ///< Brittle: largest principal compression.
  direct,       ///< Anisotropic: direct stresses, each over its strength.
  shear         ///< Anisotropic: shear stress.
};

struct Worst {
  const Station* station = nullptr;
  Mode mode = Mode::von_mises;
  StressPoint point = {};         ///< Of ductile and brittle materials.
  StationStresses stresses = {};  ///< Of anisotropic ones.
  double stress = 0.0;            ///< What the mode looks at, of `direct` nothing [Pa].
  double strength = 0.0;          ///< Likewise [Pa].
  double ratio = -1.0;            ///< Before the factor.
};

/// Whether compression in a brittle member is looked at: where it is loaded in compression, and
/// where bending or torsion causes some and the table has the strength.
bool may_crush(const LoadEffects& effects, const MemberMaterial& material) {
  return effects.compression > 0.0 ||
         ((effects.bends || effects.twists) && material.compressive.has_value());
}

/// Largest principal stress of one side. Axial load of the other sense relieves bending only where
/// no own mass acts (see brittle fracture: else a larger section could be the worse one), and never
/// more than all of it.
double principal_on_side(const StressPoint& point, bool tension_side, bool relieves) {
  const double axial = tension_side ? point.axial : -point.axial;
  return largest_principal(std::max(0.0, point.bending + (relieves ? axial : std::max(0.0, axial))),
                           point.shear);
}

void keep_larger(Worst& worst, const Worst& other) {
  if (other.ratio > worst.ratio) {
    worst = other;
  }
}

/// Of one station, ductile or brittle.
Worst worst_point(const CheckInput& input, const StationStresses& stresses) {
  const MemberMaterial& material = input.material;
  const double tensile = needed(material.tensile, Symbol::tensile);
  const bool relieves = !own_mass_acts(input.effects);
  Worst worst;
  for (const StressPoint& point : stress_points(input.section, stresses)) {
    const auto look_at = [&](Mode mode, double stress, double strength) {
      keep_larger(worst,
                  {.mode = mode,
                   .point = point,
                   .stress = stress,
                   .strength = strength,
                   .ratio = stress / strength});
    };
    if (is_ductile(material)) {
      look_at(Mode::von_mises, std::sqrt(std::max(0.0, equivalent_squared(point))), 0.9 * tensile);
      continue;
    }
    look_at(Mode::tension, principal_on_side(point, true, relieves), tensile);
    if (may_crush(input.effects, material)) {
      look_at(Mode::compression,
              principal_on_side(point, false, relieves),
              needed(material.compressive, Symbol::compressive));
    }
  }
  return worst;
}

/// Of one station, anisotropic: as direct and shear strength have it for the full section.
Worst worst_part(const MemberMaterial& material, const StationStresses& s) {
  Worst direct{.mode = Mode::direct, .stresses = s, .ratio = direct_ratio(s, material)};
  Worst shear{.mode = Mode::shear, .stresses = s};
  shear.stress = shear_stress(s, material);
  if (shear.stress > 0.0) {
    shear.strength = needed(material.shear, Symbol::shear);
    shear.ratio = shear.stress / shear.strength;
  }
  keep_larger(direct, shear);
  return direct;
}

/// Of a member that is not unstable.
Worst worst_station(const CheckInput& input, const Amplifications& raised) {
  Worst worst;
  for (const Station& station : input.effects.stations) {
    const StationStresses stresses = net_stresses(input, amplified_forces(input, station, raised));
    Worst here = input.material.rule == StressRule::direct_and_shear
                     ? worst_part(input.material, stresses)
                     : worst_point(input, stresses);
    here.station = &station;
    keep_larger(worst, here);
  }
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  return worst;
}

std::string_view name(Mode mode) {
  switch (mode) {
    case Mode::von_mises:
      return "von Mises stress";
    case Mode::tension:
      return "principal tension";
    case Mode::compression:
      return "principal compression";
    case Mode::direct:
      return "direct stress";
    case Mode::shear:
      return "shear stress";
  }
  throw InternalError("net section without a mode");
}

class NetSection final : public LimitState {
 public:
  std::string_view id() const override { return "net section"; }
  std::string_view source() const override {
    return "0.9 f_u on the net section: EN 1993-1-1:2005 (6.7), for bending and shear too (von "
           "Mises); brittle materials: largest principal stresses with K_t; anisotropic ones: as "
           "direct and shear strength, EN 1995-1-1:2004 6.1, 6.2; moments raised by 1 / (1 - N / "
           "N_cr)";
  }
  /// Ductile: 1.5 on the load times gamma_M2 = 1.25. Brittle: as for brittle fracture.
  double default_factor(const MemberMaterial& material) const override {
    switch (material.rule) {
      case StressRule::von_mises_yield:
        return 1.875;
      case StressRule::principal:
        return material.ceramic ? 5.0 : 3.0;
      case StressRule::direct_and_shear:
        return 1.5;
    }
    throw InternalError("stress rule without a factor");
  }
  /// Where the section is weakened; of a material that does not yield also where the stress is
  /// raised. The plain section is the subject of the other limit states.
  bool applies(const LoadEffects&,
               const MemberLimits& limits,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return is_weakened(limits.details) || (!is_ductile(material) && concentrates(limits.details));
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override;
  /// Ductile: von Mises stress against 0.9 f_u. Brittle: principal tension against the tensile,
  /// principal compression against the compressive strength. Anisotropic: the direct stresses over
  /// the strength for each action, added, and the shear stress. K_t raises compression as it does
  /// tension.
  double utilisation(const CheckInput& input) const override {
    const Amplifications raised = amplifications(input);
    return raised.unstable ? std::numeric_limits<double>::infinity()
                           : input.factor * std::max(0.0, worst_station(input, raised).ratio);
  }
  Explanation explain(const CheckInput& input) const override;
  /// The stresses are those of yield, brittle fracture and direct and shear strength times
  /// constants; the rise by compression falls.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// Axial stress of one sense relieves the side that bends the other way.
  BestSection best_section(const LoadEffects&, const MemberMaterial& material) const override {
    return material.rule == StressRule::principal ? BestSection::relieved : BestSection::stiff;
  }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::tensile:
      case Symbol::compressive:
      case Symbol::flexural:
      case Symbol::shear:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

std::vector<Symbol> NetSection::needs(const LoadEffects& effects,
                                      const MemberMaterial& material) const {
  std::vector<Symbol> symbols;
  if (material.rule == StressRule::direct_and_shear) {
    // Those of the full section, own mass included.
    symbols = direct_and_shear_limit_state().needs(effects, material);
  } else {
    symbols.push_back(Symbol::tensile);
    if (!is_ductile(material) && may_crush(effects, material)) {
      symbols.push_back(Symbol::compressive);
    }
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
  }
  if (is_amplified(effects)) {
    symbols.push_back(Symbol::E);
  }
  return symbols;
}

void add_direct_steps(const CheckInput& input,
                      const StationStresses& s,
                      std::vector<std::string>& steps) {
  if (s.axial != 0.0) {
    const bool tie = s.axial > 0.0;
    const double strength = tie ? needed(input.material.tensile, Symbol::tensile)
                                : needed(input.material.compressive, Symbol::compressive);
    steps.push_back(std::string(tie ? "Tension " : "Compression ") +
                    megapascals(std::abs(s.axial)) + " over " + megapascals(strength) + " = " +
                    number(std::abs(s.axial) / strength) + ".");
  }
  if (s.bending > 0.0) {
    const double strength = bending_strength(input.material);
    steps.push_back("Bending " + megapascals(s.bending) + " over " + megapascals(strength) + " = " +
                    number(s.bending / strength) + ".");
  }
}

Explanation NetSection::explain(const CheckInput& input) const {
  const Amplifications raised = amplifications(input);
  if (raised.unstable) {
    return unstable_explanation("Net section", raised, input);
  }
  const Worst worst = worst_station(input, raised);
  const MemberDetails& d = input.limits.details;
  const bool ductile = is_ductile(input.material);
  const bool anisotropic = input.material.rule == StressRule::direct_and_shear;
  const double u = utilisation(input);
  const std::string place = " at x = " + millimetres(worst.station->x);
  Explanation text;
  if (worst.mode == Mode::direct) {
    text.line = "Net section: axial stress " + megapascals(worst.stresses.axial) +
                " and bending stress " + megapascals(worst.stresses.bending) + place + ", factor " +
                number(input.factor) + ": u = " + number(u) + ".";
  } else {
    text.line = "Net section: " + number(input.factor) + " x " + megapascals(worst.stress) + " " +
                std::string(name(worst.mode)) +
                (anisotropic ? "" : " " + std::string(worst.point.place)) + place + " against " +
                megapascals(worst.strength) + ": u = " + number(u) + ".";
  }
  add_own_mass_step(input, text.steps);
  add_amplification_step(raised, input, text.steps);
  text.steps.push_back("Net over full section: area " + number(d.net_area) + ", moduli " +
                       number(d.net_modulus) + ".");
  if (!ductile) {
    text.steps.push_back("Stress concentration, which the material does not yield away: axial " +
                         number(d.k_t_axial) + ", bending " + number(d.k_t_bending) + ", torsion " +
                         number(d.k_t_torsion) + ".");
  }
  if (worst.mode == Mode::direct) {
    add_direct_steps(input, worst.stresses, text.steps);
  } else if (worst.mode == Mode::shear) {
    text.steps.push_back("Shear stress of bending = root of " +
                         megapascals(worst.stresses.shear_z) + " squared plus " +
                         megapascals(worst.stresses.shear_y) +
                         " squared, over k_cr = " + number(input.material.k_cr) +
                         "; torsion adds " + megapascals(worst.stresses.torsion) + ".");
  } else {
    text.steps.push_back("There: axial " + megapascals(worst.point.axial) + ", bending " +
                         megapascals(worst.point.bending) + ", shear " +
                         megapascals(worst.point.shear) + ".");
  }
  if (ductile) {
    text.steps.push_back("Limit: 0.9 f_u = 0.9 x " + megapascals(*input.material.tensile) + " = " +
                         megapascals(worst.strength) + ".");
  }
  text.steps.push_back("u = factor x ratio = " + number(input.factor) + " x " +
                       number(std::max(0.0, worst.ratio)) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& net_section_limit_state() {
  static const NetSection state;
  return state;
}

}  // namespace bismar::mechanics
