// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <optional>
#include <string_view>

namespace bismar {

// Temperatures in kelvin. Values between the points of a table by linear interpolation, as the
// standards say; below 20 C those of 20 C, above the last point nothing. The functions throw
// bismar::Error, not_finite or out_of_range, place "temperature", for a temperature that is not
// finite or below 0 K.

/// What heat leaves of carbon steel, each over its value at 20 C [-].
struct SteelReduction {
  double k_y = 1.0;  ///< Effective yield strength, at 2 % strain: for fire, not for stiffness.
  double k_p = 1.0;  ///< Proportional limit: for a 0.2 % or a deflection criterion.
  double k_E = 1.0;  ///< Modulus of elasticity.
};

/// Hot-rolled carbon steel, 20 C to 1200 C.
/// @param temperature  [K], >= 0.  @return nothing above 1200 C.
/// Source: EN 1993-1-2:2005 Table 3.1 (values seen in public listings).
[[nodiscard]] BISMAR_API std::optional<SteelReduction> steel_reduction(double temperature);

/// Modulus of elasticity of aluminium alloys after up to two hours at temperature [Pa]: 70 GPa at
/// 20 C, 0 at 550 C.
/// @param temperature  [K], >= 0.  @return nothing above 550 C.
/// Source: EN 1999-1-2:2007 Table 2 (values seen in public listings).
[[nodiscard]] BISMAR_API std::optional<double> aluminium_modulus(double temperature);

/// 0.2 % proof strength of an aluminium alloy over its value at 20 C, k_o [-], after up to two
/// hours at temperature; not a long-term value, as longer heat ages the alloy.
///
/// Known: 6082 T6 (values seen in print); 6063 T6 and 5083 O (from memory).
/// @param alloy  "6082" or "EN AW-6082"; letter case counts.  @param temper  "T6", "O".
/// @param temperature  [K], >= 0.
/// @return nothing for any other alloy or temper, and above 550 C.
/// Source: EN 1999-1-2:2007 Table 1a.
[[nodiscard]] BISMAR_API std::optional<double> aluminium_proof_ratio(std::string_view alloy,
                                                                     std::string_view temper,
                                                                     double temperature);

}  // namespace bismar
