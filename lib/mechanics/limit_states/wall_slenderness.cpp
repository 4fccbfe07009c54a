// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/own_mass.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/stress.hpp>
#include <bismar/mechanics/wall.hpp>

#include <algorithm>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

bool is_compressed(const LoadEffects& effects) {
  return effects.compression > 0.0 || effects.bends || effects.twists;
}

Symbol strength_symbol(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield ? Symbol::sigma_y : Symbol::compressive;
}

double strength(const MemberMaterial& material) {
  return material.rule == StressRule::von_mises_yield
             ? needed(material.sigma_y, Symbol::sigma_y)
             : needed(material.compressive, Symbol::compressive);
}

/// Largest compression in the section [Pa]: bending less axial tension, with torsion as principal
/// compression, so that a thin tube in torsion is looked at too. Where own mass acts tension gives
/// no relief: it would fall faster with the scale than the bending stress of own mass.
double acting_compression(const CheckInput& input) {
  double largest = 0.0;
  for (const Station& station : input.effects.stations) {
    const StationStresses s = station_stresses(input.section, acting_forces(input, station));
    const double axial = own_mass_acts(input.effects) ? std::min(0.0, s.axial) : s.axial;
    largest = std::max(largest, largest_principal(s.bending - axial, s.torsion));
  }
  return largest;
}

/// Which planes bend.
struct Bending {
  bool about_y = false;
  bool about_z = false;
};

Bending bending(const LoadEffects& effects) {
  Bending result;
  for (const Station& station : effects.stations) {
    result.about_y = result.about_y || station.forces.M_y != 0.0 || station.own.M_y != 0.0;
    result.about_z = result.about_z || station.forces.M_z != 0.0 || station.own.M_z != 0.0;
  }
  return result;
}

/// A section lists its walls for bending about y. Axial compression makes its webs uniformly
/// compressed, and so does bending about z in a box or a channel; a box bent about z alone has its
/// roles exchanged.
PlateElement::Kind acting_kind(const PlateElement& plate,
                               const CheckInput& input,
                               const Bending& bends) {
  using Kind = PlateElement::Kind;
  const bool squeezed = input.effects.compression > 0.0;
  const bool box = input.section.family == SectionFamily::rectangular_tube;
  if (plate.kind == Kind::internal_bending) {
    const bool side_wall = box || input.section.family == SectionFamily::channel;
    return squeezed || (bends.about_z && side_wall) ? Kind::internal_compression : plate.kind;
  }
  if (plate.kind == Kind::internal_compression && box && !squeezed && bends.about_z &&
      !bends.about_y) {
    return Kind::internal_bending;
  }
  return plate.kind;
}

/// The strength that the limit is taken at: the material's where member buckling is verified (axial
/// compression), otherwise the factored acting stress where that is lower.
struct Basis {
  double stress = 0.0;  ///< [Pa]; zero where nothing is compressed.
  double acting = 0.0;  ///< Acting compression, unfactored [Pa].
  bool plain = true;
};

Basis basis(const CheckInput& input) {
  Basis result;
  result.stress = strength(input.material);
  if (input.effects.compression > 0.0) {
    return result;
  }
  result.acting = acting_compression(input);
  const double factored = input.factor * result.acting;
  if (factored < result.stress) {
    result.stress = factored;
    result.plain = false;
  }
  return result;
}

bool is_aluminium(ColumnLaw law) {
  return law == ColumnLaw::aluminium_class_a || law == ColumnLaw::aluminium_class_b;
}

double material_epsilon(const MemberMaterial& material, double stress) {
  return is_aluminium(material.column_law) ? aluminium_wall_epsilon(stress)
                                           : wall_epsilon(stress, needed(material.E, Symbol::E));
}

double limit_of(PlateElement::Kind kind, const MemberMaterial& material, double epsilon) {
  return is_aluminium(material.column_law)
             ? aluminium_class_3_limit(
                   kind, epsilon, material.column_law == ColumnLaw::aluminium_class_a)
             : class_3_limit(kind, epsilon);
}

struct Worst {
  PlateElement plate;
  PlateElement::Kind kind = PlateElement::Kind::round;
  double limit = 0.0;
  double ratio = 0.0;
};

Worst worst_wall(const CheckInput& input, double stress) {
  const double epsilon = material_epsilon(input.material, stress);
  const Bending bends = bending(input.effects);
  Worst worst;
  worst.ratio = -1.0;
  for (const PlateElement& plate : input.section.plates) {
    const PlateElement::Kind kind = acting_kind(plate, input, bends);
    const double limit = limit_of(kind, input.material, epsilon);
    if (plate.ratio / limit > worst.ratio) {
      worst = {.plate = plate, .kind = kind, .limit = limit, .ratio = plate.ratio / limit};
    }
  }
  return worst;
}

std::string_view name(PlateElement::Kind kind) {
  switch (kind) {
    case PlateElement::Kind::internal_compression:
      return "internal wall in compression, c/t";
    case PlateElement::Kind::internal_bending:
      return "internal wall in bending, c/t";
    case PlateElement::Kind::outstand:
      return "outstanding flange, c/t";
    case PlateElement::Kind::round:
      return "round wall, d/t";
  }
  throw InternalError("plate element without a name");
}

class WallSlenderness final : public LimitState {
 public:
  std::string_view id() const override { return "wall slenderness"; }
  std::string_view source() const override {
    return "class 3 limits of EN 1993-1-1:2005 Table 5.2; on acting stress 5.5.2(9), only where no "
           "member buckling is verified, 5.5.2(10); aluminium EN 1999-1-1:2007 Table 6.2 (from "
           "memory), on acting stress likewise";
  }
  /// On the acting stress, as for stability; the plain limit has no factor.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects&,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties& section) const override {
    return !section.plates.empty();
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override {
    if (!is_compressed(effects)) {
      return {};
    }
    std::vector<Symbol> symbols = {strength_symbol(material)};
    if (!is_aluminium(material.column_law)) {
      symbols.push_back(Symbol::E);
    }
    // With axial compression the acting stress, and so the density, is not read.
    if (own_mass_acts(effects) && effects.compression == 0.0) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  double utilisation(const CheckInput& input) const override {
    if (!is_compressed(input.effects)) {
      return 0.0;
    }
    const double stress = basis(input).stress;
    return stress > 0.0 ? std::max(0.0, worst_wall(input, stress).ratio) : 0.0;
  }
  Explanation explain(const CheckInput& input) const override;
  /// The ratios of the walls stay; the acting stress falls, and the plain limit does not move.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// Tension relieves the compressed side.
  BestSection best_section(const LoadEffects& effects, const MemberMaterial&) const override {
    return effects.tension > 0.0 ? BestSection::relieved : BestSection::stiff;
  }
  /// A stronger grade is allowed more stress and so gets the stricter limit.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
        return Trend::falls;
      case Symbol::rho:
      case Symbol::sigma_y:
      case Symbol::compressive:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation WallSlenderness::explain(const CheckInput& input) const {
  Explanation text;
  const Basis on = is_compressed(input.effects) ? basis(input) : Basis{};
  if (on.stress <= 0.0) {
    text.line = "Wall slenderness: no wall is compressed: u = 0.";
    text.steps = {"Neither axial compression nor bending nor torsion acts."};
    return text;
  }
  if (input.effects.compression == 0.0) {
    add_own_mass_step(input, text.steps);
  }
  const Worst worst = worst_wall(input, on.stress);
  const double u = utilisation(input);
  const double epsilon = material_epsilon(input.material, on.stress);
  text.line = "Wall slenderness: " + std::string(name(worst.kind)) + " = " +
              number(worst.plate.ratio) + " against a class 3 limit of " + number(worst.limit) +
              (on.plain ? " at the material's strength" : " on the acting stress") +
              ": u = " + number(u) + ".";
  text.steps.push_back(
      on.plain ? "The limit is taken at the strength f = " + megapascals(on.stress) +
                     (input.effects.compression > 0.0 ? ", because member buckling is verified."
                                                      : ", because the factored stress reaches it.")
               : "No axial compression: the limit is taken at the factored acting compression, " +
                     number(input.factor) + " x " + megapascals(on.acting) + " = " +
                     megapascals(on.stress) + ".");
  text.steps.push_back(
      is_aluminium(input.material.column_law)
          ? "Aluminium class " +
                std::string(input.material.column_law == ColumnLaw::aluminium_class_a ? "A" : "B") +
                ": epsilon = root of (250 MPa / " + megapascals(on.stress) +
                ") = " + number(epsilon) + "."
          : "epsilon = root of (235 MPa / " + megapascals(on.stress) + " x " +
                gigapascals(*input.material.E) + " / 210 GPa) = " + number(epsilon) + ".");
  text.steps.push_back("u = " + number(worst.plate.ratio) + " / " + number(worst.limit) + " = " +
                       number(u) + ".");
  return text;
}

}  // namespace

const LimitState& wall_slenderness_limit_state() {
  static const WallSlenderness state;
  return state;
}

}  // namespace bismar::mechanics
