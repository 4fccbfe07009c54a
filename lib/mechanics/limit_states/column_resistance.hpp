// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/mechanics/column.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <string>
#include <string_view>
#include <vector>

/// What a member carries as a column, for the limit states that read it.
namespace bismar::mechanics {

[[nodiscard]] bool is_timber(ColumnLaw law);

/// Held against its yield strength; every other column against its compressive strength.
[[nodiscard]] bool is_ductile_column(const MemberMaterial& material);

/// Material values of the resistance below.
[[nodiscard]] std::vector<Symbol> column_symbols(const MemberMaterial& material);

/// The strength f that the resistance is made of [Pa].
[[nodiscard]] double column_strength(const MemberMaterial& material);

/// A column buckles in bending; where the axial modulus is lower it is the safer one [Pa].
[[nodiscard]] double column_modulus(const MemberMaterial& material);

/// Resistance about one axis.
struct ColumnResistance {
  BendingAxis axis = BendingAxis::y;
  double effective_length = 0.0;
  double second_moment = 0.0;
  double critical = 0.0;     ///< N_cr [N]
  double slenderness = 0.0;  ///< lambda-bar [-]
  double factor = 1.0;       ///< chi [-]
  double load = 0.0;         ///< N_b [N]
};
[[nodiscard]] ColumnResistance column_resistance(const CheckInput& input, BendingAxis axis);

/// Of both axes.
[[nodiscard]] ColumnResistance least_column_resistance(const CheckInput& input);

[[nodiscard]] std::string_view name(BendingAxis axis);

/// The step N_cr = ... with its numbers.
[[nodiscard]] std::string critical_load_step(const CheckInput& input, const ColumnResistance& r);

/// The steps from N_cr to N_b; of the Euler method there are none.
[[nodiscard]] std::vector<std::string> resistance_steps(const CheckInput& input,
                                                        const ColumnResistance& r);

/// What is said whenever the Euler load is taken alone.
[[nodiscard]] std::string_view euler_warning();

}  // namespace bismar::mechanics
