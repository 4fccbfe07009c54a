// SPDX-License-Identifier: MIT
#include "sizing/strength.hpp"

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

class Resolver {
 public:
  Resolver(const PropertyReader& reader,
           std::size_t material,
           std::size_t row,
           const LoadCase& load_case,
           ServiceClass service_class,
           const std::set<Symbol>& filled)
      : reader_(reader),
        info_(reader.catalogue().materials.info(material)),
        row_(row),
        load_case_(load_case),
        service_class_(service_class),
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
  std::array<std::optional<double>*, 5> strengths() {
    auto& m = out_.member;
    return {&m.sigma_y, &m.tensile, &m.compressive, &m.flexural, &m.shear};
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
    m.rho = read(Property::density);
    m.E = read(Property::youngs_modulus);
    m.E_axial = read(Property::youngs_modulus_axial);
    m.E_05 = read(Property::youngs_modulus_05);
    m.G = read(Property::shear_modulus);
    m.sigma_y = read(Property::yield_strength);
    m.tensile = read(Property::tensile_strength);
    m.compressive = read(Property::compressive_strength);
    m.flexural = read(Property::flexural_strength);
    m.shear = read(Property::shear_strength);
    m.ceramic = info_.material_class == "ceramic" || info_.material_class == "glass";
    for (const Symbol symbol : filled_) {
      if (auto& value = value_of(m, symbol); !value) {
        value = need(property_of(symbol));
      }
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
    if (service_class_ == ServiceClass::two && has(info_.group, "panel")) {
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
          need(service_class_ == ServiceClass::one ? Property::k_def_1 : Property::k_def_2);
      if (k_def) {
        *m.E *= at_time(load_case_.duration, std::nullopt, 1.0 / (1.0 + *k_def));
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
  const LoadCase& load_case_;
  ServiceClass service_class_;
  const std::set<Symbol>& filled_;
  ResolvedMaterial out_;
};

}  // namespace

bool is_metal(std::string_view material_class) {
  static constexpr std::array<std::string_view, 5> others = {
      "polymer", "composite", "wood", "ceramic", "glass"};
  return std::find(others.begin(), others.end(), material_class) == others.end();
}

bool is_bath(const Finish& finish) { return contains_word(finish.process_words, "galvanising"); }

bool is_hardened_bar_grade(const MaterialInfo& material) {
  return contains_word(material.forms, "bar") &&
         (has(material.condition, "quenched") || has(material.condition, "hardened") ||
          has(material.condition, "tempered"));
}

bool is_cast(const MaterialInfo& material) {
  return material.forms.size() == 1 && material.forms[0] == "casting";
}

Property property_of(Symbol symbol) {
  switch (symbol) {
    case Symbol::rho:
      return Property::density;
    case Symbol::E:
      return Property::youngs_modulus;
    case Symbol::E_05:
      return Property::youngs_modulus_05;
    case Symbol::G:
      return Property::shear_modulus;
    case Symbol::sigma_y:
      return Property::yield_strength;
    case Symbol::tensile:
      return Property::tensile_strength;
    case Symbol::compressive:
      return Property::compressive_strength;
    case Symbol::flexural:
      return Property::flexural_strength;
    case Symbol::shear:
      return Property::shear_strength;
  }
  throw InternalError("property_of: unknown symbol");
}

std::optional<double> highest_temperature(const PropertyReader& reader,
                                          const MaterialInfo& material,
                                          std::size_t row) {
  if (const auto loaded = reader.value(Property::loaded_temperature_max, row)) {
    return loaded;
  }
  if (!is_metal(material.material_class)) {
    return std::nullopt;  // the service maximum of a polymer is an ageing limit
  }
  // Room-temperature strength of metals: full up to 100 C in EN 1993-1-2, table 3.1, and EN
  // 1999-1-2 (from memory); above, the strength at temperature would be needed.
  constexpr double room_strength_up_to = 373.15;
  const auto service = reader.value(Property::service_temperature_max, row);
  return service ? std::min(*service, room_strength_up_to) : room_strength_up_to;
}

const std::optional<double>& value_of(const MemberMaterial& material, Symbol symbol) {
  switch (symbol) {
    case Symbol::rho:
      return material.rho;
    case Symbol::E:
      return material.E;
    case Symbol::E_05:
      return material.E_05;
    case Symbol::G:
      return material.G;
    case Symbol::sigma_y:
      return material.sigma_y;
    case Symbol::tensile:
      return material.tensile;
    case Symbol::compressive:
      return material.compressive;
    case Symbol::flexural:
      return material.flexural;
    case Symbol::shear:
      return material.shear;
  }
  throw InternalError("value_of: unknown symbol");
}

std::optional<double>& value_of(MemberMaterial& material, Symbol symbol) {
  return const_cast<std::optional<double>&>(value_of(std::as_const(material), symbol));
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
                         ServiceClass service_class,
                         const std::set<Symbol>& filled) {
  return Resolver(reader, material, row, load_case, service_class, filled).run();
}

MemberMaterial ResolvedMaterial::at_depth(double depth) const {
  MemberMaterial out = member;
  if (depth_reference > 0.0 && depth > depth_reference && out.flexural) {
    *out.flexural *= std::pow(depth_reference / depth, depth_exponent);
  }
  return out;
}

}  // namespace bismar
