// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/column_resistance.hpp"
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/text.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace bismar::mechanics {

namespace {

double strength_in_bending(const MemberMaterial& material) {
  return is_ductile_column(material) ? needed(material.sigma_y, Symbol::sigma_y)
                                     : bending_strength(material);
}

/// The largest moments along the member [N m]. They and the largest compression are taken together
/// wherever each of them is.
struct Peaks {
  double M_y = 0.0;
  double M_z = 0.0;
};

Peaks peaks(const LoadEffects& effects) {
  Peaks result;
  for (const Station& station : effects.stations) {
    result.M_y = std::max(result.M_y, std::abs(station.forces.M_y));
    result.M_z = std::max(result.M_z, std::abs(station.forces.M_z));
  }
  return result;
}

/// Bending about one axis.
struct Bent {
  double moment = 0.0;         ///< Largest first-order moment, without the factor [N m].
  double amplification = 1.0;  ///< 1 / (1 - N / N_cr), +infinity at N >= N_cr.
  double share = 0.0;          ///< Of the utilisation.
};

Bent bent(const CheckInput& input, BendingAxis axis, double moment) {
  Bent result;
  result.moment = moment;
  if (moment == 0.0) {
    return result;
  }
  const double N = input.factor * input.effects.compression;
  const double W = axis == BendingAxis::y ? input.section.W_el_y : input.section.W_el_z;
  const double critical = column_resistance(input, axis).critical;
  result.amplification =
      N < critical ? 1.0 / (1.0 - N / critical) : std::numeric_limits<double>::infinity();
  result.share =
      input.factor * moment * result.amplification / (W * strength_in_bending(input.material));
  return result;
}

class CompressionBending final : public LimitState {
 public:
  std::string_view id() const override { return "compression with bending"; }
  std::string_view source() const override {
    return "linear interaction of EN 1993-1-1:2005 6.2.1(7) and 6.3.3(4) with W_el and the "
           "interaction factor 1 / (1 - N / N_cr) (from memory); EN 1995-1-1:2004 (6.23), (6.24) "
           "with k_m = 1; lateral-torsional buckling is not in it";
  }
  /// On the loads, as for flexural buckling.
  double default_factor(const MemberMaterial&) const override { return 1.5; }
  bool applies(const LoadEffects& effects,
               const MemberLimits&,
               const MemberMaterial&,
               const SectionProperties&) const override {
    return effects.compression > 0.0 && effects.bends;
  }
  std::vector<Symbol> needs(const LoadEffects& effects,
                            const MemberMaterial& material) const override;
  /// The largest compression and the largest moments of both axes, wherever each of them is, are
  /// added linearly over N_b of the weaker axis and the elastic bending resistance:
  ///
  ///     u = g N / N_b + g M_y / (W_el,y f_b (1 - g N / N_cr,y))
  ///                   + g M_z / (W_el,z f_b (1 - g N / N_cr,z))
  ///
  /// with g the factor. On the safe side of the moment-shape factors (C_m), of plastic resistance
  /// and of the reduced cross terms that annexes A and B of EN 1993-1-1 allow: 5 to 25 % above them
  /// in the checks. Against the exact elastic solution of a member bent by one and the same moment
  /// over its length, the worst shape for the amplification, it is at most 2 % low (a test scans
  /// it). The interaction factors of the annexes come with lateral-torsional buckling.
  double utilisation(const CheckInput& input) const override {
    const Peaks moments = peaks(input.effects);
    return input.factor * input.effects.compression / least_column_resistance(input).load +
           bent(input, BendingAxis::y, moments.M_y).share +
           bent(input, BendingAxis::z, moments.M_z).share;
  }
  Explanation explain(const CheckInput& input) const override;
  /// N_b rises as for flexural buckling, and so do N_cr and W.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// N_b as for flexural buckling; a modulus raises N_cr, a strength the bending resistance.
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::E:
      case Symbol::E_05:
      case Symbol::sigma_y:
      case Symbol::tensile:
      case Symbol::compressive:
      case Symbol::flexural:
        return Trend::falls;
      default:
        return Trend::constant;
    }
  }
};

std::vector<Symbol> CompressionBending::needs(const LoadEffects&,
                                              const MemberMaterial& material) const {
  std::vector<Symbol> symbols = column_symbols(material);
  if (is_ductile_column(material)) {
    return symbols;
  }
  // The column's compressive strength is named already.
  const bool from_both = !material.flexural && material.tensile && material.compressive;
  symbols.push_back(from_both ? Symbol::tensile : Symbol::flexural);
  return symbols;
}

Explanation CompressionBending::explain(const CheckInput& input) const {
  const ColumnResistance weak = least_column_resistance(input);
  const Peaks moments = peaks(input.effects);
  const Bent about_y = bent(input, BendingAxis::y, moments.M_y);
  const Bent about_z = bent(input, BendingAxis::z, moments.M_z);
  const double f_b = strength_in_bending(input.material);
  const double N = input.factor * input.effects.compression;
  const double axial = N / weak.load;
  const double u = utilisation(input);
  Explanation text;
  text.line = "Compression with bending: " + number(input.factor) + " x " +
              kilonewtons(input.effects.compression) + " with " + newton_metres(moments.M_y) +
              " about y and " + newton_metres(moments.M_z) + " about z: " + number(axial) + " + " +
              number(about_y.share) + " + " + number(about_z.share) + ", u = " + number(u) + ".";
  text.steps.emplace_back(
      "The largest compression and the largest moments along the member are taken together, "
      "wherever each of them is; lateral-torsional buckling is not looked at.");
  text.steps.push_back(critical_load_step(input, weak));
  for (std::string& step : resistance_steps(input, weak)) {
    text.steps.push_back(std::move(step));
  }
  if (input.limits.column_method == ColumnMethod::euler) {
    text.line += " " + std::string(euler_warning());
    text.steps.emplace_back(euler_warning());
  }
  text.steps.push_back("Compression: " + number(input.factor) + " x " +
                       kilonewtons(input.effects.compression) + " / " + kilonewtons(weak.load) +
                       " = " + number(axial) + ".");
  for (const BendingAxis axis : {BendingAxis::y, BendingAxis::z}) {
    const Bent& part = axis == BendingAxis::y ? about_y : about_z;
    if (part.moment == 0.0) {
      continue;
    }
    const ColumnResistance own = column_resistance(input, axis);
    const double W = axis == BendingAxis::y ? input.section.W_el_y : input.section.W_el_z;
    if (axis != weak.axis) {
      text.steps.push_back(critical_load_step(input, own));
    }
    text.steps.push_back(
        std::isinf(part.amplification)
            ? "The factored compression " + kilonewtons(N) + " reaches N_cr about " +
                  std::string(name(axis)) + " = " + kilonewtons(own.critical) +
                  ": the deflection grows without bound."
            : "Deflection raises the moment by 1 / (1 - " + kilonewtons(N) + " / " +
                  kilonewtons(own.critical) + ") = " + number(part.amplification) + ".");
    text.steps.push_back("Bending about " + std::string(name(axis)) + ": " + number(input.factor) +
                         " x " + newton_metres(part.moment) + " x " + number(part.amplification) +
                         " / (" + cubic_millimetres(W) + " x " + megapascals(f_b) +
                         ") = " + number(part.share) + ".");
  }
  text.steps.push_back("u = " + number(axial) + " + " + number(about_y.share) + " + " +
                       number(about_z.share) + " = " + number(u) + ".");
  return text;
}

}  // namespace

const LimitState& compression_bending_limit_state() {
  static const CompressionBending state;
  return state;
}

}  // namespace bismar::mechanics
