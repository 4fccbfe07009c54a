// SPDX-License-Identifier: MIT
#include "sizing/strength.hpp"

#include "sizing/derating.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cctype>
#include <cmath>

namespace bismar {

namespace {

constexpr double hour = 3600.0;
constexpr double week = 168.0 * hour;
constexpr double year = 8760.0 * hour;
constexpr double typical_divisor = 1.25;

bool has(std::string_view text, std::string_view word) {
  return text.find(word) != std::string_view::npos;
}

/// Heat-treated tempers that EN 1999-1-1 puts into buckling class A: T6 and T7 with their variants
/// (from memory of its table 3.2; every other temper counts as class B, which is on the safe side).
bool is_class_a(std::string_view condition) {
  return starts_word(condition, "T6") || starts_word(condition, "T7");
}

/// Linear in the logarithm of time from 1 at an hour to the given factors.
double at_time(double seconds, std::optional<double> at_1000h, double at_10y) {
  const double t = std::log10(std::max(seconds / hour, 1.0));
  const double t_end = std::log10(10.0 * year / hour);
  if (at_1000h && t <= 3.0) {
    return 1.0 + (*at_1000h - 1.0) * t / 3.0;
  }
  const double t_0 = at_1000h ? 3.0 : 0.0;
  const double f_0 = at_1000h.value_or(1.0);
  return t >= t_end ? at_10y : f_0 + (at_10y - f_0) * (t - t_0) / (t_end - t_0);
}

/// Load-duration class of EN 1995-1-1, table 2.1.
Property k_mod(double seconds) {
  if (seconds <= week) {
    return Property::k_mod_short;
  }
  if (seconds <= 0.5 * year) {
    return Property::k_mod_medium;
  }
  return seconds <= 10.0 * year ? Property::k_mod_long : Property::k_mod_permanent;
}

/// Where a symbol that limit states read comes from and where it is kept.
struct SymbolEntry {
  Symbol symbol;
  Property property;
  std::optional<double> MemberMaterial::*value;
};
constexpr SymbolEntry symbol_table[] = {
    {Symbol::rho, Property::density, &MemberMaterial::rho},
    {Symbol::E, Property::youngs_modulus, &MemberMaterial::E},
    {Symbol::E_05, Property::youngs_modulus_05, &MemberMaterial::E_05},
    {Symbol::G, Property::shear_modulus, &MemberMaterial::G},
    {Symbol::sigma_y, Property::yield_strength, &MemberMaterial::sigma_y},
    {Symbol::tensile, Property::tensile_strength, &MemberMaterial::tensile},
    {Symbol::compressive, Property::compressive_strength, &MemberMaterial::compressive},
    {Symbol::flexural, Property::flexural_strength, &MemberMaterial::flexural},
    {Symbol::shear, Property::shear_strength, &MemberMaterial::shear},
    {Symbol::alpha, Property::thermal_expansion, &MemberMaterial::alpha},
    {Symbol::K_Ic, Property::fracture_toughness, &MemberMaterial::K_Ic},
    {Symbol::sigma_e, Property::endurance_limit, &MemberMaterial::sigma_e},
    {Symbol::weld_yield, Property::weld_yield_factor, &MemberMaterial::weld_yield_factor},
    {Symbol::weld_tensile, Property::weld_tensile_factor, &MemberMaterial::weld_tensile_factor},
};

const SymbolEntry& entry(Symbol symbol) {
  for (const SymbolEntry& one : symbol_table) {
    if (one.symbol == symbol) {
      return one;
    }
  }
  throw InternalError("a symbol without a property");
}

bool is_weldable(const MaterialInfo& material) {
  return contains_word(material.processes, "welding (good)") ||
         contains_word(material.processes, "welding (fair)");
}

double upper_thickness(const MaterialTable& materials, std::size_t material, std::size_t row) {
  for (const ThicknessStep& step : materials.steps(material)) {
    if (step.row == row && std::isfinite(step.up_to)) {
      return step.up_to;
    }
  }
  return 0.0;
}

/// Cycles that the tables' endurance limits hold for: the knee of steels, about 1e7 elsewhere
/// (data/README.md).
double endurance_cycles(const MaterialInfo& material) { return is_steel(material) ? 1e6 : 1e7; }

class Resolver {
 public:
  Resolver(const PropertyReader& reader,
           std::size_t material,
           std::size_t row,
           const LoadCase& load_case,
           const Service& service,
           const std::set<Symbol>& filled)
      : reader_(reader),
        info_(reader.catalogue().materials.info(material)),
        row_(row),
        thickness_(upper_thickness(reader.catalogue().materials, material, row)),
        load_case_(load_case),
        service_(service),
        filled_(filled) {}

  ResolvedMaterial run() {
    read_values();
    choose_rule();
    orientation();
    typical();
    if (read(Property::gamma_M)) {
      timber();
    } else if (info_.material_class == "polymer" || info_.material_class == "composite") {
      lasting_load();
    }
    heat();
    column_law();
    return std::move(out_);
  }

 private:
  std::optional<double> read(Property property) const { return reader_.value(property, row_); }

  std::optional<double> need(Property property) {
    if (const auto value = read(property)) {
      return value;
    }
    const auto median = reader_.class_median(property, info_.material_class);
    if (median) {
      out_.notes.push_back(class_median_note(property));
    } else {
      out_.missing.insert(property);
    }
    return median;
  }

  /// The strengths, whichever of them are there.
  std::array<std::optional<double>*, 6> strengths() {
    auto& m = out_.member;
    return {&m.sigma_y, &m.tensile, &m.compressive, &m.flexural, &m.shear, &m.sigma_e};
  }

  void multiply_strengths(double factor) {
    for (auto* strength : strengths()) {
      if (*strength) {
        **strength *= factor;
      }
    }
  }

  void read_values() {
    auto& m = out_.member;
    for (const SymbolEntry& one : symbol_table) {
      m.*one.value = read(one.property);
    }
    m.E_axial = read(Property::youngs_modulus_axial);
    shear_modulus();
    m.ceramic = info_.material_class == "ceramic" || info_.material_class == "glass";
    m.steel = is_steel(info_);
    m.cast_iron = info_.material_class == "cast iron";
    m.endurance_cycles = endurance_cycles(info_);
    weld_zone();
    for (const Symbol symbol : filled_) {
      if (auto& value = value_of(m, symbol); !value) {
        value = need(property_of(symbol));
      }
    }
  }

  /// An isotropic solid's follows from Young's modulus and Poisson's ratio.
  void shear_modulus() {
    auto& m = out_.member;
    const auto nu = read(Property::poisson_ratio);
    if (!m.G && m.E && nu && info_.isotropic) {
      m.G = *m.E / (2.0 * (1.0 + *nu));
      out_.notes.emplace_back("shear modulus from Young's modulus and Poisson's ratio");
    }
  }

  /// Factors of the row itself; else, of aluminium, those of its alloy and temper in the table of
  /// weld zones; rolled, normalised and annealed steels keep their strength beside a weld with
  /// matching filler (EN 1993-1-8:2005 4.7.1, S235 to S460).
  void weld_zone() {
    auto& m = out_.member;
    if (m.weld_yield_factor && m.weld_tensile_factor) {
      return;
    }
    if (const WeldZone* zone = find_weld_zone(reader_.catalogue().weld_zones, info_, thickness_)) {
      m.weld_yield_factor = zone->yield_factor;
      m.weld_tensile_factor = zone->tensile_factor;
    } else if (is_steel(info_) && steel_keeps_strength_welded(info_.condition) &&
               is_weldable(info_) && m.sigma_y && *m.sigma_y <= 460e6) {
      m.weld_yield_factor = m.weld_tensile_factor = 1.0;
    }
  }

  void choose_rule() {
    auto& m = out_.member;
    if (!info_.isotropic) {
      m.rule = StressRule::direct_and_shear;
      return;
    }
    const bool by_hand = load_case_.hand_loaded || load_case_.impact;
    // Whoever pulls a lever by hand must not meet a brittle one for want of a number.
    const auto elongation =
        by_hand && !m.ceramic ? need(Property::elongation) : read(Property::elongation);
    const bool wrought = is_metal(info_.material_class) && !is_cast(info_);
    if (m.sigma_y && elongation && *elongation >= (wrought ? 0.02 : 0.05)) {
      m.rule = StressRule::von_mises_yield;
      return;
    }
    m.rule = StressRule::principal;
  }

  void orientation() {
    if (const auto factor = read(Property::orientation_factor)) {
      multiply_strengths(*factor);
      for (auto* modulus : {&out_.member.E, &out_.member.E_axial, &out_.member.G}) {
        if (*modulus) {
          **modulus *= *factor;
        }
      }
      out_.notes.emplace_back(
          "short-fibre moulding: strength and stiffness of the test bar times its orientation "
          "factor");
    }
  }

  void typical() {
    if (reader_.catalogue().materials.basis(row_) != Basis::minimum) {
      multiply_strengths(1.0 / typical_divisor);
      out_.notes.emplace_back("typical strength, divided by 1.25");
    }
  }

  void timber() {
    // The table's k_mod hold for service classes 1 and 2 in solid and glued timber, for 1 in
    // boards.
    if (service_.timber_class == ServiceClass::two && has(info_.group, "panel")) {
      out_.missing.insert(k_mod(load_case_.duration));
      return;
    }
    const auto gamma = read(Property::gamma_M);
    const auto modification = need(k_mod(load_case_.duration));
    if (modification) {
      multiply_strengths(*modification / *gamma);
      out_.member.strength_factor = *modification / *gamma;
    }
    auto& m = out_.member;
    m.k_cr = read(Property::k_cr).value_or(1.0);
    if (!m.E_05 && m.E) {
      m.E_05 = *m.E * 2.0 / 3.0;
      out_.notes.emplace_back("5 % modulus taken as two thirds of the mean");
    }
    if (load_case_.duration > hour && m.E) {
      const auto k_def =
          need(service_.timber_class == ServiceClass::one ? Property::k_def_1 : Property::k_def_2);
      if (k_def) {
        // EN 1995-1-1 2.3.2.2: E and G alike.
        const double factor = at_time(load_case_.duration, std::nullopt, 1.0 / (1.0 + *k_def));
        for (auto* modulus : {&m.E, &m.E_axial, &m.G}) {
          if (*modulus) {
            **modulus *= factor;
          }
        }
      }
    }
    const auto reference = read(Property::reference_depth);
    const auto exponent = read(Property::size_exponent);
    // Solid and glued timber gain strength below the reference depth (left out: on the safe side);
    // laminated veneer lumber also loses it above (EN 1995-1-1, 3.4(3)).
    if (reference && exponent && has(info_.group, "panel")) {
      out_.depth_reference = *reference;
      out_.depth_exponent = *exponent;
    }
  }

  void lasting_load() {
    if (load_case_.duration <= hour) {
      return;
    }
    auto& m = out_.member;
    if (const auto creep = need(Property::creep_factor_10y)) {
      const double factor =
          at_time(load_case_.duration, read(Property::creep_factor_1000h), *creep);
      for (auto* modulus : {&m.E, &m.E_axial, &m.G}) {
        if (*modulus) {
          **modulus *= factor;
        }
      }
    }
    if (const auto strength = need(Property::long_term_strength_factor_10y)) {
      multiply_strengths(at_time(load_case_.duration, std::nullopt, *strength));
    }
    out_.notes.emplace_back("lasting load: creep and long-term strength factors of the row");
  }

  void heat() {
    if (!service_.temperature || *service_.temperature <= room_values_up_to ||
        read(Property::loaded_temperature_max)) {
      return;
    }
    const auto left = derating(info_, *service_.temperature, load_case_.duration);
    if (!left) {
      return;  // no curve: the candidate is undecided by its temperature
    }
    multiply_strengths(left->strength);
    for (auto* modulus : {&out_.member.E, &out_.member.E_axial, &out_.member.G}) {
      if (*modulus) {
        **modulus *= left->modulus;
      }
    }
    out_.notes.push_back(left->note);
  }

  void column_law() {
    auto& m = out_.member;
    if (info_.material_class == "aluminium") {
      m.column_law =
          is_class_a(info_.condition) ? ColumnLaw::aluminium_class_a : ColumnLaw::aluminium_class_b;
    } else if (info_.material_class == "wood") {
      const bool glued = has(info_.group, "glued") || has(info_.name, "LVL");
      m.column_law = glued ? ColumnLaw::timber_glued : ColumnLaw::timber_solid;
    }
  }

  const PropertyReader& reader_;
  const MaterialInfo& info_;
  std::size_t row_;
  double thickness_;  ///< The thickest piece that the row holds for; 0 where it is not limited.
  const LoadCase& load_case_;
  const Service& service_;
  const std::set<Symbol>& filled_;
  ResolvedMaterial out_;
};

}  // namespace

bool is_steel(const MaterialInfo& material) {
  return material.material_class == "steel" || material.material_class == "stainless steel";
}

bool is_metal(std::string_view material_class) {
  static constexpr std::array<std::string_view, 5> others = {
      "polymer", "composite", "wood", "ceramic", "glass"};
  return std::find(others.begin(), others.end(), material_class) == others.end();
}

bool steel_keeps_strength_welded(std::string_view condition) {
  static constexpr std::array<std::string_view, 6> delivered = {"as rolled",
                                                                "normalised",
                                                                "hot finished hollow section",
                                                                "cold-formed hollow section",
                                                                "thermomechanically rolled",
                                                                "annealed"};
  return condition == "hot rolled" ||
         (!has(condition, "and aged") &&
          std::any_of(delivered.begin(), delivered.end(), [&](std::string_view words) {
            return has(condition, words);
          }));
}

bool is_bath(const Finish& finish) { return contains_word(finish.process_words, "galvanising"); }

bool is_hardened_bar_grade(const MaterialInfo& material) {
  return contains_word(material.forms, "bar") && is_hardened(material.condition);
}

bool is_hardened(std::string_view condition) {
  return has(condition, "quenched") || has(condition, "hardened") || has(condition, "tempered");
}

bool is_cast(const MaterialInfo& material) {
  return material.forms.size() == 1 && material.forms[0] == "casting";
}

Property property_of(Symbol symbol) { return entry(symbol).property; }

std::optional<double> highest_temperature(const PropertyReader& reader,
                                          const MaterialInfo& material,
                                          std::size_t row,
                                          double temperature,
                                          std::span<const LoadCase> load_cases) {
  if (const auto loaded = reader.value(Property::loaded_temperature_max, row)) {
    return loaded;
  }
  if (!is_metal(material.material_class)) {
    return std::nullopt;  // the service maximum of a polymer is an ageing limit
  }
  const bool has_curve =
      std::all_of(load_cases.begin(), load_cases.end(), [&](const LoadCase& load_case) {
        return derating(material, temperature, load_case.duration).has_value();
      });
  const double values_known = has_curve ? temperature : room_values_up_to;
  const auto service = reader.value(Property::service_temperature_max, row);
  return service ? std::min(*service, values_known) : values_known;
}

const std::optional<double>& value_of(const MemberMaterial& material, Symbol symbol) {
  return material.*entry(symbol).value;
}

std::optional<double>& value_of(MemberMaterial& material, Symbol symbol) {
  return material.*entry(symbol).value;
}

RangeEnd PropertyReader::end(Property property) const {
  const auto own = settings_.range_ends.find(property);
  return own != settings_.range_ends.end() ? own->second : info(property).default_end;
}

std::optional<double> PropertyReader::value(Property property, std::size_t row) const {
  const auto range = catalogue_.materials.value(property, row);
  return range ? std::optional(range->at(end(property))) : std::nullopt;
}

std::string class_median_note(Property property) {
  return "class median used for " + std::string(info(property).name);
}

std::optional<double> PropertyReader::class_median(Property property,
                                                   const std::string& material_class) const {
  if (settings_.missing != Missing::class_median) {
    return std::nullopt;
  }
  const auto [entry, added] = medians_.try_emplace({material_class, property});
  if (added) {
    std::vector<double> values;
    for (std::size_t m = 0; m < catalogue_.materials.size(); ++m) {
      if (catalogue_.materials.info(m).material_class == material_class) {
        if (const auto one = value(property, catalogue_.materials.steps(m)[0].row)) {
          values.push_back(*one);
        }
      }
    }
    if (!values.empty()) {
      // The lower of the two middle values: a value that some material of the class really has.
      const auto middle = values.begin() + static_cast<std::ptrdiff_t>((values.size() - 1) / 2);
      std::nth_element(values.begin(), middle, values.end());
      entry->second = *middle;
    }
  }
  return entry->second;
}

ResolvedMaterial resolve(const PropertyReader& reader,
                         std::size_t material,
                         std::size_t row,
                         const LoadCase& load_case,
                         const Service& service,
                         const std::set<Symbol>& filled) {
  return Resolver(reader, material, row, load_case, service, filled).run();
}

MemberMaterial ResolvedMaterial::at_depth(double depth) const {
  MemberMaterial out = member;
  if (depth_reference > 0.0 && depth > depth_reference && out.flexural) {
    *out.flexural *= std::pow(depth_reference / depth, depth_exponent);
  }
  return out;
}

}  // namespace bismar
