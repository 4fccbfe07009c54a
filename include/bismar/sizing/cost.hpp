// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/routes.hpp>
#include <bismar/export.hpp>

#include <cstdint>
#include <optional>

namespace bismar {

/// The resource cost of one part by one process.
///
///     C = m C_m / (1 - f) + (C_t / n) ceil(n / n_t) + (1 / rate) (C_c / (L t_wo) + C_oh)
///
/// Materials, tooling, and time at the machine. ceil() counts whole tool sets; a textbook variant
/// prints Int(n/n_t + 0.51), which differs just above whole multiples.
/// Source: Esawi and Ashby, Materials and Design 24 (2003) 605-616 (formula from memory of the
/// published form).
struct ResourceCost {
  double mass = 0.0;                     ///< m [kg]
  double material_price = 0.0;           ///< C_m [currency/kg]
  double scrap = 0.0;                    ///< f [-], 0 <= f < 1
  double tooling = 0.0;                  ///< C_t [currency] per tool set
  double quantity = 1.0;                 ///< n
  std::optional<double> tool_life = {};  ///< n_t parts per tool set; absent = one set lasts.
  double rate = 1.0;                     ///< parts per time unit, > 0
  double capital = 0.0;                  ///< C_c [currency]
  double load_factor = 1.0;              ///< L [-]
  double write_off = 1.0;                ///< t_wo, in the same time unit as the rate
  double overhead = 0.0;                 ///< C_oh [currency per time unit]

  [[nodiscard]] BISMAR_API double material_term() const;
  [[nodiscard]] BISMAR_API double tooling_term() const;
  [[nodiscard]] BISMAR_API double time_term() const;
  /// @throws bismar::Error  out_of_range: a field outside its range.
  [[nodiscard]] BISMAR_API double total() const;
};

/// Quantity above which the process with the higher fixed cost is the cheaper one, or nothing when
/// it never is.
///
///     n = (F_b - F_a) / (u_a - u_b)
///
/// Fixed cost F per run and unit cost u per part; tool sets beyond the first are not in it.
[[nodiscard]] BISMAR_API std::optional<double> break_even_quantity(double fixed_a,
                                                                   double unit_a,
                                                                   double fixed_b,
                                                                   double unit_b);

/// Parts of `length` out of one bar with a saw cut of `kerf` between them: floor((B + k) / (l +
/// k)), where a quotient within 1e-12 of a whole number counts as that number.
/// @throws bismar::Error  out_of_range: a negative or infinite bar or kerf, a length that is not
/// positive.
[[nodiscard]] BISMAR_API std::uint64_t pieces_per_bar(double bar, double length, double kerf);

/// Which end of every range a cost is reckoned at.
enum class CostEnd : std::uint8_t {
  usual,  ///< The study's own ends.
  cheap,  ///< Low prices and tooling, high rates.
  dear,   ///< The reverse.
};

/// What one process costs a part, material apart.
struct ProcessCost {
  double tooling = 0.0;  ///< [currency]
  double set_up = 0.0;   ///< [currency]
  double time = 0.0;     ///< Machine, labour and overhead [currency].
  double tool_sets = 1.0;
  double tooling_each = 0.0;  ///< One tool set, scaled to the part's mass [currency].
  double seconds = 0.0;       ///< At the machine, per part [s].
  double rate_of_time = 0.0;  ///< Capital write-off and overhead [currency/s].
  [[nodiscard]] double total() const { return tooling + set_up + time; }
};

/// Cost of one route or treatment for a part of mass `mass` [kg] and length `length` [m].
///
/// Tooling = mean (m / m_ref)^p and rate = mean (m_ref / m)^q, each kept inside the range of the
/// row; m is the mass per metre where the rate is in metres. Set-up per batch; for a treatment the
/// set-up cost is the minimum charge of the batch. Each term rises with the mass or stays.
/// @param end  cheap: low end of tooling and high end of the rate; dear: the reverse; usual:
/// `range_end`.
[[nodiscard]] BISMAR_API ProcessCost process_cost(const Route& route,
                                                  double mass,
                                                  double length,
                                                  double quantity,
                                                  double batch,
                                                  RangeEnd range_end,
                                                  CostEnd end = CostEnd::usual);

}  // namespace bismar
