// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/limit_state.hpp>
#include <bismar/sizing/part.hpp>

#include <array>
#include <map>
#include <optional>
#include <set>
#include <span>
#include <string>
#include <utility>
#include <vector>

namespace bismar {

/// Every symbol that a limit state may read.
inline constexpr std::array all_symbols = {Symbol::rho,
                                           Symbol::E,
                                           Symbol::E_05,
                                           Symbol::G,
                                           Symbol::sigma_y,
                                           Symbol::tensile,
                                           Symbol::compressive,
                                           Symbol::flexural,
                                           Symbol::shear,
                                           Symbol::alpha,
                                           Symbol::K_Ic,
                                           Symbol::sigma_e,
                                           Symbol::weld_yield,
                                           Symbol::weld_tensile};

[[nodiscard]] bool is_metal(std::string_view material_class);
/// Whether a steel in this condition owes nothing to hardening, ageing or cold work that a weld
/// would undo: as rolled, normalised, thermomechanically rolled, annealed, hollow sections.
[[nodiscard]] bool steel_keeps_strength_welded(std::string_view condition);
/// Steel, stainless steel.
[[nodiscard]] bool is_steel(const MaterialInfo& material);
[[nodiscard]] bool is_cast(const MaterialInfo& material);
/// Whether a finish is a bath that reaches the bore of a tube.
[[nodiscard]] bool is_bath(const Finish& finish);
/// Whether the condition owes its strength to hardening or tempering.
[[nodiscard]] bool is_hardened(std::string_view condition);
/// Whether its strength comes from hardening and tempering, in a grade sold as bar.
[[nodiscard]] bool is_hardened_bar_grade(const MaterialInfo& material);
/// The mark of a value that was filled in: every use is flagged.
[[nodiscard]] std::string class_median_note(Property property);
/// The table property behind a symbol that a limit state reads.
[[nodiscard]] Property property_of(Symbol symbol);

[[nodiscard]] std::optional<double>& value_of(MemberMaterial& material, Symbol symbol);
[[nodiscard]] const std::optional<double>& value_of(const MemberMaterial& material, Symbol symbol);

/// Reads properties by a study's rules: range ends, and what to do where a value is missing.
class PropertyReader {
 public:
  PropertyReader(const Catalogue& catalogue, const Settings& settings)
      : catalogue_(catalogue), settings_(settings) {}

  [[nodiscard]] RangeEnd end(Property property) const;
  [[nodiscard]] std::optional<double> value(Property property, std::size_t row) const;
  /// What stands in for a missing value under Missing::class_median; nothing under the other
  /// policies.
  [[nodiscard]] std::optional<double> class_median(Property property,
                                                   const std::string& material_class) const;
  [[nodiscard]] const Catalogue& catalogue() const { return catalogue_; }
  [[nodiscard]] const Settings& settings() const { return settings_; }

 private:
  const Catalogue& catalogue_;
  const Settings& settings_;
  mutable std::map<std::pair<std::string, Property>, std::optional<double>> medians_;
};

/// Highest temperature [K] at which the strength is known: the loaded maximum of the row; for a
/// metal without one 100 C, or `temperature` itself where a curve tells what heat leaves in every
/// load case, or its service maximum where that is lower. Nothing: not known.
[[nodiscard]] std::optional<double> highest_temperature(const PropertyReader& reader,
                                                        const MaterialInfo& material,
                                                        std::size_t row,
                                                        double temperature,
                                                        std::span<const LoadCase> load_cases);

/// A material as the limit states see it, in one load case.
struct ResolvedMaterial {
  MemberMaterial member;
  std::set<Property> missing;      ///< Needed by the strength rules and not there.
  std::vector<std::string> notes;  ///< What was done to its values.
  double depth_reference =
      0.0;  ///< LVL: bending strength falls above this depth [m]; 0 = no size effect.
  double depth_exponent = 0.0;

  /// The member at a depth: LVL weakened above its reference depth.
  [[nodiscard]] MemberMaterial at_depth(double depth) const;
};

/// Where and how warm the part serves.
struct Service {
  ServiceClass timber_class = ServiceClass::one;
  std::optional<double> temperature = {};  ///< [K]; absent: room temperature.
};

/// Which strength counts, by rule:
/// - ductile (a yield value, elongation at least 5 %, wrought metal 2 %): von Mises against yield;
/// - anisotropic rows: direct and shear stress apart;
/// - otherwise brittle: largest principal stress.
/// Typical strengths are divided by 1.25 and marked. Graded timber: k_mod / gamma_M of its row.
/// Lasting loads: creep and long-term factors of the row, otherwise undecided beyond an hour.
/// @param filled  Symbols whose gaps the class median fills (under Missing::class_median), before
/// any factor
///   is applied, so that a filled value is treated as the row's own would be.
[[nodiscard]] BISMAR_API ResolvedMaterial resolve(const PropertyReader& reader,
                                                  std::size_t material,
                                                  std::size_t row,
                                                  const LoadCase& load_case,
                                                  const Service& service,
                                                  const std::set<Symbol>& filled = {});

}  // namespace bismar
