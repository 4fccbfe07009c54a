// SPDX-License-Identifier: MIT
#include "mechanics/limit_states/list.hpp"
#include "mechanics/limit_states/second_order.hpp"
#include "mechanics/limit_states/value.hpp"
#include "mechanics/stress_points.hpp"
#include "mechanics/text.hpp"

#include <bismar/mechanics/fracture.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <numbers>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar::mechanics {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

bool is_plain_solid(const SectionProperties& section) {
  switch (section.family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_square:
    case SectionFamily::solid_rectangle:
    case SectionFamily::solid_ellipse:
    case SectionFamily::solid_hexagon:
      return true;
    default:
      return false;
  }
}

/// The stresses that a station causes where the crack lies one way [Pa].
struct Opening {
  double tension = 0.0;  ///< The same over the depth.
  double bending = 0.0;  ///< Zero at half the depth.
};

/// One way the crack may lie.
struct Lie {
  bool down = false;        ///< Into the height, else into the width.
  double depth = 0.0;       ///< Of the material that the crack runs into: h, b or the wall [m].
  double half_width = 0.0;  ///< Of the cracked side [m].
  /// K over sqrt(pi a) is the largest of these with the stresses of a station, but not more than
  /// that of a crack along the whole side; +infinity beyond the range of both.
  std::vector<FrontFactors> front = {};
  std::optional<FrontFactors> edge = {};

  [[nodiscard]] double of_edge(const Opening& opening) const {
    if (opening.tension == 0.0 && opening.bending == 0.0) {
      return 0.0;
    }
    return edge ? edge->tension * opening.tension + edge->bending * opening.bending : infinity;
  }
  [[nodiscard]] double stress(const Opening& opening) const {
    double largest = 0.0;
    for (const FrontFactors& place : front) {
      largest =
          std::max(largest, place.tension * opening.tension + place.bending * opening.bending);
    }
    return front.empty() ? of_edge(opening) : std::min(largest, of_edge(opening));
  }
};

Lie lie(const CheckInput& input, bool down) {
  const SectionProperties& s = input.section;
  const Crack& crack = *input.limits.details.crack;
  Lie result;
  result.down = down;
  result.depth = !is_plain_solid(s) ? s.wall : down ? s.height : s.width;
  result.half_width = (down ? s.width : s.height) / 2.0;
  const double alpha = crack.depth / result.depth;
  if (alpha <= edge_crack_polynomial_limit) {
    result.edge = {.tension = edge_crack_factor(alpha),
                   .bending = edge_crack_bending_factor(alpha)};
  }
  const SurfaceCrack shape{.depth_to_half_length = crack.depth / crack.half_length,
                           .relative_depth = alpha,
                           .relative_length = crack.half_length / result.half_width};
  if (crack.kind == Crack::Kind::surface && shape.depth_to_half_length <= 1.0 &&
      shape.relative_depth <= 0.8 && shape.relative_length <= 0.5) {
    const auto front = surface_crack_front(shape);
    result.front.assign(front.begin(), front.end());
  }
  return result;
}

/// In a solid the bending of one plane falls off along its own depth and is uniform along the
/// other; in a wall the stress hardly changes over the thickness.
Opening opening(const SectionProperties& section, const StationStresses& stress, bool down) {
  const double axial = std::max(0.0, stress.axial);
  if (!is_plain_solid(section)) {
    return {.tension = axial + stress.bending};
  }
  if (section.smooth_outline) {
    return {.tension = axial, .bending = stress.bending};
  }
  return down ? Opening{.tension = axial + stress.bending_z, .bending = stress.bending_y}
              : Opening{.tension = axial + stress.bending_y, .bending = stress.bending_z};
}

struct Worst {
  const Station* station = nullptr;
  Lie lie;
  Opening opening;
  double stress = -1.0;     ///< K over sqrt(pi a) [Pa].
  double intensity = -1.0;  ///< K [Pa m^0.5]
};

/// Of a member that is not unstable.
Worst worst_lie(const CheckInput& input, const Amplifications& raised) {
  Worst worst;
  for (const bool down : {true, false}) {
    const Lie one = lie(input, down);
    bool is_worst = false;
    for (const Station& station : input.effects.stations) {
      const Opening here =
          opening(input.section,
                  station_stresses(input.section, amplified_forces(input, station, raised)),
                  down);
      const double stress = one.stress(here);
      if (stress > worst.stress) {
        worst.station = &station;
        worst.opening = here;
        worst.stress = stress;
        is_worst = true;
      }
    }
    if (is_worst) {
      worst.lie = one;
    }
  }
  if (worst.station == nullptr) {
    throw InternalError("load effects without a station");
  }
  worst.intensity = worst.stress * std::sqrt(std::numbers::pi * input.limits.details.crack->depth);
  return worst;
}

std::string_view through(const CheckInput& input, const Lie& lie) {
  return !is_plain_solid(input.section) ? "the wall" : lie.down ? "the height" : "the width";
}

std::string toughness(double value) { return number(value * 1e-6) + " MPa m^0.5"; }

class CrackFracture final : public LimitState {
 public:
  std::string_view id() const override { return "crack"; }
  std::string_view source() const override {
    return "linear elastic fracture, K <= K_Ic: Tada, Paris and Irwin, The Stress Analysis of "
           "Cracks Handbook (edge crack); Newman and Raju, Eng. Fract. Mech. 15 (1981) 185 "
           "(surface crack)";
  }
  double default_factor(const MemberMaterial&) const override { return 2.0; }
  /// Anisotropic materials have other paths and other factors.
  bool applies(const LoadEffects& effects,
               const MemberLimits& limits,
               const MemberMaterial& material,
               const SectionProperties&) const override {
    return limits.details.crack && material.rule != StressRule::direct_and_shear &&
           (effects.tension > 0.0 || effects.bends);
  }
  std::vector<Symbol> needs(const LoadEffects& effects, const MemberMaterial&) const override {
    std::vector<Symbol> symbols = {Symbol::K_Ic};
    if (is_amplified(effects)) {
      symbols.push_back(Symbol::E);
    }
    if (own_mass_acts(effects)) {
      symbols.push_back(Symbol::rho);
    }
    return symbols;
  }
  /// The crack opens across the axis of the member at the most stressed station; shear and torsion
  /// are left out. The stresses are those of the section without crack, notch or hole; compression
  /// closes nothing, but raises the moments by 1 / (1 - N / N_cr). A straight crack in a round or
  /// elliptical bar is taken as one in a flat of the same depth. In tubes and profiles the crack
  /// goes into the wall, whose free bending is not held by the rest of the section: on the safe
  /// side. Where the plastic zone is not small K_Ic is on the safe side too, as long as the net
  /// section does not yield: yield is another limit state.
  double utilisation(const CheckInput& input) const override {
    const double least = needed(input.material.K_Ic, Symbol::K_Ic);
    const Amplifications raised = amplifications(input);
    return raised.unstable ? infinity : input.factor * worst_lie(input, raised).intensity / least;
  }
  Explanation explain(const CheckInput& input) const override;
  /// The crack stays and its relative depth falls, and with it the factor of tension. The factor of
  /// bending may rise meanwhile, but never faster than with the tenth part of the power of the
  /// scale (its logarithmic slope is above -0.1 everywhere) while the stress falls at least with
  /// the first power (own weight; loads with the second and third), and its rise by compression
  /// falls. Of a surface crack the factors
  /// of Newman and Raju behave alike: their products with stresses that fall with the first power
  /// were found to fall over the whole range. A crack beyond the formulas' range is infinite, which
  /// only smaller sections can be.
  Trend trend_with_scale() const override { return Trend::falls; }
  /// The relative depth falls with the depth, the relative length with the width.
  BestSection best_section(const LoadEffects&, const MemberMaterial&) const override {
    return BestSection::cracked;
  }
  Trend trend_with(Symbol symbol) const override {
    switch (symbol) {
      case Symbol::K_Ic:
      case Symbol::E:
        return Trend::falls;
      case Symbol::rho:
        return Trend::rises;
      default:
        return Trend::constant;
    }
  }
};

Explanation CrackFracture::explain(const CheckInput& input) const {
  const Crack& crack = *input.limits.details.crack;
  const double least = needed(input.material.K_Ic, Symbol::K_Ic);
  const Amplifications raised = amplifications(input);
  if (raised.unstable) {
    return unstable_explanation("Crack", raised, input);
  }
  const Worst worst = worst_lie(input, raised);
  const double u = utilisation(input);
  const std::string what = crack.kind == Crack::Kind::edge
                               ? "an edge crack " + millimetres(crack.depth) + " deep"
                               : "a surface crack " + millimetres(crack.depth) + " deep and " +
                                     millimetres(2.0 * crack.half_length) + " long";
  const std::string share = number(crack.depth / worst.lie.depth);
  Explanation text;
  if (std::isinf(worst.stress)) {
    text.line = "Crack: " + what + " takes " + share + " of " +
                std::string(through(input, worst.lie)) + " (" + millimetres(worst.lie.depth) +
                "), more than the formulas hold for: taken as broken, u = infinity.";
    text.steps = {"An edge crack may take " + number(edge_crack_polynomial_limit) +
                  " of the depth, a surface crack 0.8 of the depth and, with its half-length, half "
                  "of the half-width (" +
                  millimetres(worst.lie.half_width) + ")."};
    return text;
  }
  text.line = "Crack: " + number(input.factor) + " x " + toughness(worst.intensity) + " of " +
              what + " into " + std::string(through(input, worst.lie)) +
              " at x = " + millimetres(worst.station->x) + " against a fracture toughness of " +
              toughness(least) + ": u = " + number(u) + ".";
  text.steps = {"Stress without the crack: " + megapascals(worst.opening.tension) +
                    " uniform over the depth, " + megapascals(worst.opening.bending) +
                    " bending along it; compression closes nothing.",
                "The crack takes " + share + " of " + std::string(through(input, worst.lie)) +
                    " (" + millimetres(worst.lie.depth) +
                    "); with the geometry factors the stress is F_t sigma_t + F_b sigma_b = " +
                    megapascals(worst.stress) + ".",
                "K = " + megapascals(worst.stress) + " x root of (pi x " +
                    millimetres(crack.depth) + ") = " + toughness(worst.intensity) + ".",
                "u = factor x K / K_Ic = " + number(input.factor) + " x " +
                    toughness(worst.intensity) + " / " + toughness(least) + " = " + number(u) +
                    "."};
  if (crack.kind == Crack::Kind::surface && worst.stress == worst.lie.of_edge(worst.opening)) {
    text.steps.insert(text.steps.begin() + 1,
                      "The surface crack is taken as one along the whole side: its own formula "
                      "does not hold for this size, or gives more.");
  }
  add_amplification_step(raised, input, text.steps);
  return text;
}

}  // namespace

const LimitState& crack_limit_state() {
  static const CrackFracture state;
  return state;
}

}  // namespace bismar::mechanics
