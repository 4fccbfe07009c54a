// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/load_effects.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/solver/trend.hpp>

#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// Which stress is held against which strength.
enum class StressRule : std::uint8_t {
  von_mises_yield,   ///< Ductile: equivalent stress against yield.
  principal,         ///< Brittle: largest principal stress against the strength for the action.
  direct_and_shear,  ///< Anisotropic: direct and shear stress apart, never von Mises.
};

/// Which column law a material follows.
enum class ColumnLaw : std::uint8_t {
  metal,              ///< EN 1993-1-1 curves by section type.
  aluminium_class_a,  ///< EN 1999-1-1, heat-treated tempers: alpha 0.20, lambda_0 0.10.
  aluminium_class_b,  ///< EN 1999-1-1, other tempers: alpha 0.32, lambda_0 0.
  timber_solid,       ///< EN 1995-1-1, beta_c 0.2.
  timber_glued,       ///< EN 1995-1-1, beta_c 0.1 (glued laminated timber, LVL).
};

/// How column buckling is computed.
enum class ColumnMethod : std::uint8_t {
  curves,  ///< The law of the material (default).
  euler,   ///< N_cr alone, on request: no imperfection, no yielding; always with a warning.
};

/// The material values that limit states read. Absent means: not in the table.
enum class Symbol : std::uint8_t {
  rho,
  E,
  E_05,
  G,
  sigma_y,
  tensile,
  compressive,
  flexural,
  shear,
};
[[nodiscard]] BISMAR_API std::string_view name(Symbol symbol);

/// One material in the state a limit state needs: range ends chosen, strength read at its thickness
/// step, typical strengths divided, k_mod and gamma_M of timber applied. SI.
struct MemberMaterial {
  StressRule rule = StressRule::von_mises_yield;
  ColumnLaw column_law = ColumnLaw::metal;
  bool ceramic = false;               ///< Default factor 5 instead of 3 in brittle fracture.
  std::optional<double> rho;          ///< Density [kg/m^3].
  std::optional<double> E;            ///< Young's modulus for bending, creep included [Pa].
  std::optional<double> E_axial;      ///< For ties and struts where it differs [Pa].
  std::optional<double> E_05;         ///< 5 % value for timber stability [Pa].
  std::optional<double> G;            ///< Shear modulus [Pa].
  std::optional<double> sigma_y;      ///< Yield or proof strength [Pa].
  std::optional<double> tensile;      ///< Tensile strength [Pa].
  std::optional<double> compressive;  ///< Compressive strength [Pa].
  std::optional<double> flexural;     ///< Bending strength [Pa].
  std::optional<double> shear;        ///< Shear strength [Pa].
  double k_cr = 1.0;                  ///< Timber: shear in bending acts on k_cr of the width.
  /// Timber: k_mod / gamma_M as it is in the strengths already. The relative slenderness of a
  /// column is made of characteristic values (EN 1995-1-1 6.21), so that it divides by this. 1
  /// elsewhere.
  double strength_factor = 1.0;
};

/// Limits that the user sets on one member.
struct MemberLimits {
  std::optional<double> deflection;  ///< Largest deflection [m].
  std::optional<double> twist;       ///< Largest twist over the length [rad].
  std::optional<double> height;      ///< Envelope along z [m].
  std::optional<double> width;       ///< Envelope along y [m].
  std::optional<double> wall;        ///< Least wall [m].
  double slenderness = 200.0;        ///< Cap on K L / i of a member in compression.
  ColumnMethod column_method = ColumnMethod::curves;
};

/// All that a limit state may look at. References: valid during the call only.
struct CheckInput {
  const SectionProperties& section;
  const MemberMaterial& material;
  const LoadEffects& effects;
  const MemberLimits& limits;
  double length = 0.0;  ///< [m]
  double factor = 1.0;  ///< The factor of this limit state in this load case, > 0.
};

/// A limit state's own account of one number.
struct Explanation {
  std::string line;                ///< One line with the numbers put in.
  std::vector<std::string> steps;  ///< The formula, its numbers, its result, one step a line.
};

/// One way to fail. Utilisation u = demand / capacity; feasible when u <= 1.
///
/// Adding one: a file in lib/mechanics/limit_states/, its test, and one line in the list.
class BISMAR_API LimitState {
 public:
  LimitState() = default;
  LimitState(const LimitState&) = delete;
  LimitState& operator=(const LimitState&) = delete;
  LimitState(LimitState&&) = delete;
  LimitState& operator=(LimitState&&) = delete;
  virtual ~LimitState();

  /// Short stable word used in jobs, results and messages, e.g. "flexural buckling".
  [[nodiscard]] virtual std::string_view id() const = 0;
  /// Standard and clause, or handbook and edition.
  [[nodiscard]] virtual std::string_view source() const = 0;
  /// Factor used where the load case names none (depends on the material for brittle fracture).
  [[nodiscard]] virtual double default_factor(const MemberMaterial& material) const = 0;
  /// Whether this load case with these limits can cause it for a material of this rule and a
  /// section of this kind (a solid has no walls).
  [[nodiscard]] virtual bool applies(const LoadEffects& effects,
                                     const MemberLimits& limits,
                                     const MemberMaterial& material,
                                     const SectionProperties& section) const = 0;
  /// False for limits on the section alone (envelope, least wall): checked once, not per load case.
  [[nodiscard]] virtual bool reads_loads() const { return true; }
  /// Material values that it reads for this case; a missing one leaves the candidate undecided.
  [[nodiscard]] virtual std::vector<Symbol> needs(const LoadEffects& effects,
                                                  const MemberMaterial& material) const = 0;
  /// u for one load case; every value in needs() is present. Finite or +infinity, never NaN.
  [[nodiscard]] virtual double utilisation(const CheckInput& input) const = 0;
  [[nodiscard]] virtual Explanation explain(const CheckInput& input) const = 0;
  /// When the whole section is scaled up with its ratios fixed.
  [[nodiscard]] virtual Trend trend_with_scale() const = 0;
  /// When one material value grows.
  [[nodiscard]] virtual Trend trend_with(Symbol symbol) const = 0;
};

/// The built-in limit states in the stated order in which exclusions are reported.
[[nodiscard]] BISMAR_API std::span<const LimitState* const> limit_states();
/// The limit state with this id, or nothing.
[[nodiscard]] BISMAR_API const LimitState* limit_state(std::string_view id);

}  // namespace bismar
