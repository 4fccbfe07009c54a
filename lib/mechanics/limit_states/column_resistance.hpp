// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

/// What a member carries as a column, for the limit states that read it.
namespace bismar::mechanics {

[[nodiscard]] bool is_timber(ColumnLaw law);
[[nodiscard]] bool is_aluminium(ColumnLaw law);

/// Held against its yield strength; every other column against its compressive strength.
[[nodiscard]] bool is_ductile_column(const MemberMaterial& material);

/// Material values of the resistance below.
[[nodiscard]] std::vector<Symbol> column_symbols(const MemberMaterial& material);

/// The strength that the slenderness is made of [Pa].
[[nodiscard]] double column_strength(const MemberMaterial& material);

/// Share of the strength that a weld across the member leaves; 1 without a weld, and where the
/// material's factor is not known, which the weld zone's own limit state reports.
[[nodiscard]] double weld_share(const CheckInput& input);

/// A column buckles in bending; where the axial modulus is lower it is the safer one [Pa].
[[nodiscard]] double column_modulus(const MemberMaterial& material);

/// Shear modulus that torsion feels where a member buckles [Pa]: stability_shear_modulus(), of
/// timber at most E_0.05 / 16.
[[nodiscard]] double buckling_shear_modulus(const MemberMaterial& material);
/// "80 GPa", with a word where the table has none.
[[nodiscard]] std::string buckling_shear_modulus_text(const MemberMaterial& material);

/// How a column gives way.
enum class ColumnMode : std::uint8_t {
  about_y,
  about_z,
  about_v,  ///< Bending about the weak principal axis, where y and z are none.
  twisting  ///< Torsional or torsional-flexural.
};

/// Resistance in one mode.
struct ColumnResistance {
  ColumnMode mode = ColumnMode::about_y;
  double effective_length = 0.0;
  double second_moment = 0.0;  ///< Of the bending modes.
  double critical = 0.0;       ///< N_cr [N]
  double slenderness = 0.0;    ///< lambda-bar [-], of the curves.
  double factor = 1.0;         ///< chi [-]
  double load = 0.0;           ///< N_b [N]
};

/// In bending about an axis. Where y and z are no principal axes (an angle) both give the weak
/// principal axis with the longer of the effective lengths.
[[nodiscard]] ColumnResistance column_resistance(const CheckInput& input, BendingAxis axis);

/// Of both axes.
[[nodiscard]] ColumnResistance least_column_resistance(const CheckInput& input);

/// Whether a section of this kind may twist as a column: I, channel, T and angle, whose warping
/// constant and shear centre are known.
[[nodiscard]] bool may_twist(const SectionProperties& section);

/// In torsional or torsional-flexural buckling of a section that may twist.
[[nodiscard]] ColumnResistance twisting_resistance(const CheckInput& input);

[[nodiscard]] std::string_view name(BendingAxis axis);
/// "about y", "about the weak principal axis", "by twisting".
[[nodiscard]] std::string_view name(ColumnMode mode);

/// The step N_cr = ... with its numbers.
[[nodiscard]] std::string critical_load_step(const CheckInput& input, const ColumnResistance& r);

/// The steps from N_cr to N_b; of the Euler method there are none.
[[nodiscard]] std::vector<std::string> resistance_steps(const CheckInput& input,
                                                        const ColumnResistance& r);

/// Adds to line and steps what is said whenever Euler's load or Johnson's parabola is taken alone.
void add_method_warning(const CheckInput& input, Explanation& text);

}  // namespace bismar::mechanics
