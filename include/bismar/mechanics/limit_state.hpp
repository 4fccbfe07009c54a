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
  curves,   ///< The law of the material (default).
  euler,    ///< N_cr alone, on request: no imperfection, no yielding; always with a warning.
  johnson,  ///< Johnson's parabola, Euler's curve beyond it, on request: no imperfection.
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
  alpha,
  K_Ic,
  sigma_e,
  weld_yield,
  weld_tensile,
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
  std::optional<double> alpha;        ///< Thermal expansion [1/K].
  std::optional<double> K_Ic;         ///< Plane-strain fracture toughness [Pa m^0.5].
  std::optional<double> sigma_e;      ///< Fatigue strength of polished specimens, reversed [Pa].
  double endurance_cycles = 1e6;      ///< The cycles that sigma_e was measured at.
  bool steel = false;                 ///< Wrought or cast steel: its sigma_e may be 0.5 sigma_u.
  bool cast_iron = false;             ///< Notch sensitivity 0.2.
  /// Strength in the heat-affected zone of a weld over that of the parent: yield and tensile.
  std::optional<double> weld_yield_factor;
  std::optional<double> weld_tensile_factor;
  double k_cr = 1.0;  ///< Timber: shear in bending acts on k_cr of the width.
  /// Timber: k_mod / gamma_M as it is in the strengths already. The relative slenderness of a
  /// column is made of characteristic values (EN 1995-1-1 6.21), so that it divides by this. 1
  /// elsewhere.
  double strength_factor = 1.0;
};

/// A mass that the member carries where it vibrates, not a load.
struct AttachedMass {
  double mass = 0.0;  ///< [kg], > 0.
  double at = 0.0;    ///< Station [m].
};

/// How the surface was left, for fatigue.
enum class SurfaceFinish : std::uint8_t { polished, ground, machined, hot_rolled, as_forged };

/// How mean stress and amplitude are held together against fatigue.
enum class FatigueCriterion : std::uint8_t { goodman, gerber, soderberg };

/// A crack that inspection may miss.
struct Crack {
  enum class Kind : std::uint8_t {
    edge,     ///< Straight, along the whole edge of the most stressed side, depth a.
    surface,  ///< Semi-elliptical on the most stressed side, depth a, half-length c.
  };
  Kind kind = Kind::edge;
  double depth = 0.0;        ///< a [m], > 0.
  double half_length = 0.0;  ///< c [m], of a surface crack: >= a.
};

/// What the making leaves in a member that its plain section does not show. It is taken at every
/// station.
struct MemberDetails {
  double net_area = 1.0;     ///< A_net / A past holes, keyways, threads, in (0, 1].
  double net_modulus = 1.0;  ///< W_net / W of both axes and of torsion, in (0, 1].
  double k_t_axial = 1.0;    ///< Elastic stress concentration factors on the net section, >= 1.
  double k_t_bending = 1.0;
  double k_t_torsion = 1.0;
  std::optional<double> notch_radius;  ///< r [m]; absent: full notch sensitivity.
  SurfaceFinish surface = SurfaceFinish::machined;
  double reliability = 0.99;  ///< Of the fatigue strength, 0.5 to 0.999999.
  FatigueCriterion criterion = FatigueCriterion::goodman;
  std::optional<double> detail_category;  ///< Welded detail: Delta sigma_C at 2e6 cycles [Pa].
  bool welded = false;                    ///< A weld crosses the member where it is most stressed.
  std::optional<Crack> crack;
  std::vector<AttachedMass> masses;
};

/// Limits that the user sets on one member.
struct MemberLimits {
  std::optional<double> deflection;  ///< Largest deflection [m].
  bool shear_deflection = false;     ///< Shear counts in deflection and frequency.
  std::optional<double> rotation;    ///< Largest slope of the axis [rad].
  std::optional<double> twist;       ///< Largest twist over the length [rad].
  std::optional<double> frequency;   ///< Least first natural frequency [Hz].
  std::optional<double> elongation;  ///< Largest change of length, heat and axial force [m].
  std::optional<double> height;      ///< Envelope along z [m].
  std::optional<double> width;       ///< Envelope along y [m].
  std::optional<double> wall;        ///< Least wall [m].
  double slenderness = 200.0;        ///< Cap on K L / i of a member in compression.
  ColumnMethod column_method = ColumnMethod::curves;
  bool lateral_restraint = false;  ///< The compressed side cannot move across: no lateral buckling.
  MemberDetails details = {};
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

/// Which made-up section bounds a limit state over a box of sections, see section_box.hpp. All have
/// the largest resistances and stiffnesses of the box, the least plate ratios and outline, but for
/// what is said here.
enum class BestSection : std::uint8_t {
  stiff,
  /// For columns that twist: I_t and I_w are raised as far as the polar radius of gyration, made of
  /// the largest I and A, lies above the least one.
  column,
  slim,     ///< For radii of gyration: an area so small that they are the largest.
  swift,    ///< For vibration: the same, for a material whose density is lightened().
  large,    ///< The largest outline: for webs that resist with their height.
  cracked,  ///< The same, the stresses so low that no geometry factor of a smaller depth lies
            ///< below.
  /// For the size factor of fatigue, which jumps up by 4e-4 at 51 mm: 0.8 % less height.
  tired,
  /// Where an axial stress relieves bending: bending, shear and torsion resisted as much better as
  /// the area varies; twisting as for a column.
  relieved,
};

class SeparableBound;

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
  /// The made-up section of a box (section_box.hpp) at which u is nowhere above u of a real section
  /// of the box, held against the same load case and limits, with the material lightened().
  [[nodiscard]] virtual BestSection best_section(const LoadEffects& /*effects*/,
                                                 const MemberMaterial& /*material*/) const {
    return BestSection::stiff;
  }
  /// When one material value grows.
  [[nodiscard]] virtual Trend trend_with(Symbol symbol) const = 0;
  /// Conditions that u <= 1 implies, each a number of the section against a number of the material
  /// (separable_bound.hpp); null where there are none.
  [[nodiscard]] virtual const SeparableBound* separable() const { return nullptr; }
};

/// The built-in limit states in the stated order in which exclusions are reported.
[[nodiscard]] BISMAR_API std::span<const LimitState* const> limit_states();
/// The limit state with this id, or nothing.
[[nodiscard]] BISMAR_API const LimitState* limit_state(std::string_view id);

}  // namespace bismar
