// SPDX-License-Identifier: MIT
// MaterialTableBuilder::build: checks every row and joins the rows of one id to a material.
#include <bismar/catalogue/materials.hpp>
#include <bismar/error.hpp>
#include <bismar/quantity/currency.hpp>
#include <bismar/quantity/format.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <utility>

#include "catalogue/property_limits.hpp"
#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::quoted;

constexpr double shear_modulus_tolerance = 0.05;  // what rounded handbook values are apart
constexpr double not_a_number = std::numeric_limits<double>::quiet_NaN();

bool is_finite(const Range& range) { return std::isfinite(range.low) && std::isfinite(range.high); }

/// The weaker of two bases; the enumeration runs from the strongest to the weakest.
Basis weaker(Basis a, Basis b) { return std::max(a, b); }

std::string bounds_text(const catalogue::PropertyLimits& limits, double greatest) {
  std::string text;
  if (std::isfinite(limits.least)) {
    text = (limits.above_least ? "above " : "at least ") + format_number(limits.least);
  }
  if (std::isfinite(greatest)) {
    if (!text.empty()) {
      text += " and ";
    }
    text += (limits.below_greatest ? "below " : "at most ") + format_number(greatest);
  }
  return text;
}

}  // namespace

class MaterialAssembly {
 public:
  explicit MaterialAssembly(MaterialTableBuilder& builder) : builder_(builder) {}

  MaterialTable run() {
    if (!is_currency_code(builder_.currency_)) {
      faults_.add(
          Code::unknown_name,
          builder_.table_name_,
          quoted(builder_.currency_) + " is no currency code of ISO 4217, such as \"EUR\".");
    }
    if (builder_.rows_.empty()) {
      faults_.add(
          Code::empty, builder_.table_name_, "the table has no materials: add at least one.");
    }
    for (const Row& row : builder_.rows_) {
      check(row);
    }
    group();
    faults_.throw_if_any();
    fill();
    table_.warnings_ = std::move(builder_.warnings_);
    table_.table_name_ = builder_.table_name_;
    table_.currency_ = builder_.currency_;
    builder_ = MaterialTableBuilder(builder_.table_name_, builder_.currency_);
    return std::move(table_);
  }

 private:
  using Row = MaterialTableBuilder::Row;

  // --- places and texts
  // ---------------------------------------------------------------------------

  [[nodiscard]] std::string place(const Row& row) const {
    if (row.line == 0) {
      return builder_.table_name_ + ": material " + quoted(row.info.id);
    }
    return builder_.table_name_ + ':' + std::to_string(row.line);
  }

  [[nodiscard]] std::string place(const Row& row, Property property) const {
    const auto header = builder_.headers_.find(property);
    if (row.line == 0 || header == builder_.headers_.end() || header->second.column == 0) {
      return place(row);
    }
    return place(row) + ':' + std::to_string(header->second.column);
  }

  [[nodiscard]] std::string header(Property property) const {
    const auto found = builder_.headers_.find(property);
    return found == builder_.headers_.end() ? std::string(info(property).name)
                                            : found->second.header;
  }

  /// In the usual unit, as a person would write it.
  [[nodiscard]] std::string shown(Property property, double value) const {
    const PropertyInfo& known = info(property);
    if (!std::isfinite(value)) {
      return "a value that is not finite";
    }
    if (property == Property::price) {
      return format_number(value) + ' ' + builder_.currency_ + "/kg";
    }
    return format_quantity(value, known.unit);
  }

  void fault(const Row& row, Property property, Code code, std::string message) {
    faults_.add(
        code,
        place(row, property),
        quoted(header(property)) + " of " + quoted(row.info.id) + ": " + std::move(message));
  }

  void fault(const Row& row, Code code, std::string message) {
    faults_.add(code, place(row), std::move(message));
  }

  void warn(const Row& row, Property property, std::string message) {
    builder_.warnings_.push_back(place(row, property) + ": " + quoted(header(property)) + " of " +
                                 quoted(row.info.id) + ": " + std::move(message));
  }

  // --- one row
  // ------------------------------------------------------------------------------------

  void check(const Row& row) {
    if (row.info.id.empty()) {
      fault(row, Code::missing, "the material has no id.");
    }
    if (row.info.material_class.empty()) {
      fault(row,
            Code::missing,
            "the material " + quoted(row.info.id) + " has no class, such as \"steel\".");
    }
    const bool has_limit = row.up_to.has_value();
    if (!std::isfinite(row.above) || row.above < 0.0 ||
        (has_limit && !(std::isfinite(*row.up_to) && *row.up_to > 0.0))) {
      fault(row, Code::out_of_range, "the thickness limits must be above 0 and finite.");
    } else if (has_limit && row.above >= *row.up_to) {
      fault(row, Code::conflict, "the lower thickness limit is not below the upper one.");
    }
    for (const auto& [property, range] : row.values) {
      check_value(row, property, range);
    }
    for (const auto& [name, range] : row.extras) {
      if (!is_finite(range)) {
        fault(row, Code::not_finite, quoted(name) + " is not finite: leave out what is not known.");
      } else if (range.low > range.high) {
        fault(row, Code::conflict, quoted(name) + ": the range is upside down.");
      }
    }
    check_pair(row, Property::service_temperature_min, Property::service_temperature_max);
    if (row.info.isotropic) {
      check_pair(row, Property::yield_strength, Property::tensile_strength);
      check_stiffness(row);
    }
    check_ductility(row);
  }

  void check_value(const Row& row, Property property, const Range& range) {
    const catalogue::PropertyLimits& limits = catalogue::limits(property);
    const bool is_isotropic_poisson =
        property == Property::poisson_ratio && row.info.isotropic && !row.info.in_plane_only;
    const double greatest = is_isotropic_poisson ? 0.5 : limits.greatest;
    const bool below = is_isotropic_poisson || limits.below_greatest;
    if (!is_finite(range)) {
      fault(row, property, Code::not_finite, "not a finite number; leave out what is not known.");
    } else if (range.low > range.high) {
      fault(row,
            property,
            Code::conflict,
            "the range is upside down: " + shown(property, range.low) + " above " +
                shown(property, range.high) + '.');
    } else if (range.low < limits.least || (limits.above_least && range.low <= limits.least) ||
               range.high > greatest || (below && range.high >= greatest)) {
      catalogue::PropertyLimits used = limits;
      used.below_greatest = below;
      const bool is_low =
          range.low < limits.least || (limits.above_least && range.low <= limits.least);
      fault(row,
            property,
            Code::out_of_range,
            shown(property, is_low ? range.low : range.high) + " cannot be; allowed is " +
                bounds_text(used, greatest) +
                (info(property).kind == QuantityKind::ratio || info(property).unit.empty()
                     ? "."
                     : " in SI units."));
    } else if (range.low < limits.unusual_below || range.high > limits.unusual_above) {
      const bool is_low = range.low < limits.unusual_below;
      warn(row,
           property,
           shown(property, is_low ? range.low : range.high) +
               " is outside what known materials have: is the unit in the header right?");
    }
  }

  [[nodiscard]] static const Range* value(const Row& row, Property property) {
    const auto found = row.values.find(property);
    if (found == row.values.end() || !is_finite(found->second)) {
      return nullptr;
    }
    return &found->second;
  }

  /// Lower ends are compared with lower ends; upper ends where both are given.
  void check_pair(const Row& row, Property small, Property large) {
    const Range* low = value(row, small);
    const Range* high = value(row, large);
    if (low == nullptr || high == nullptr) {
      return;
    }
    const bool both_ranges = low->low < low->high && high->low < high->high;
    const bool low_ends = low->low > high->low;
    if (!low_ends && !(both_ranges && low->high > high->high)) {
      return;
    }
    fault(row,
          small,
          Code::conflict,
          shown(small, low_ends ? low->low : low->high) + " is above the " +
              std::string(info(large).name) + " of " +
              shown(large, low_ends ? high->low : high->high) + '.');
  }

  void check_stiffness(const Row& row) {
    const Range* E = value(row, Property::youngs_modulus);
    const Range* G = value(row, Property::shear_modulus);
    const Range* nu = value(row, Property::poisson_ratio);
    if (E == nullptr || G == nullptr || nu == nullptr || row.info.in_plane_only) {
      return;
    }
    const double expected = E->mid() / (2.0 * (1.0 + nu->mid()));
    const double deviation = G->mid() / expected - 1.0;
    if (!std::isfinite(deviation) || std::abs(deviation) <= shear_modulus_tolerance) {
      return;
    }
    warn(row,
         Property::shear_modulus,
         shown(Property::shear_modulus, G->mid()) + " is " +
             format_significant(std::abs(deviation) * 100.0) +
             (deviation > 0.0 ? " % above" : " % below") + " E / (2 (1 + nu)) = " +
             format_engineering(expected, info(Property::shear_modulus).unit) +
             " of an isotropic material.");
  }

  void check_ductility(const Row& row) {
    const Range* elongation = value(row, Property::elongation);
    const Range* E = value(row, Property::youngs_modulus);
    if (elongation != nullptr && elongation->high == 0.0 &&
        value(row, Property::yield_strength) != nullptr) {
      warn(row,
           Property::elongation,
           "0 beside a yield strength: leave the cell empty where the elongation is not known.");
    }
    if (E == nullptr || (elongation != nullptr && elongation->high >= 1.0)) {
      return;
    }
    for (const Property strength : {Property::yield_strength,
                                    Property::tensile_strength,
                                    Property::compressive_strength,
                                    Property::flexural_strength}) {
      const Range* found = value(row, strength);
      if (found == nullptr || found->low <= E->high) {
        continue;
      }
      warn(row,
           strength,
           shown(strength, found->low) +
               " is above Young's modulus: is a unit in the headers right?");
    }
  }

  // --- rows of one id
  // -----------------------------------------------------------------------------

  void group() {
    std::vector<std::vector<std::size_t>> members;
    for (std::size_t i = 0; i < builder_.rows_.size(); ++i) {
      const auto [known, is_new] = table_.by_id_.emplace(builder_.rows_[i].info.id, members.size());
      if (is_new) {
        members.emplace_back();
      }
      members[known->second].push_back(i);
    }
    table_.materials_.resize(members.size());
    table_.rows_.resize(builder_.rows_.size());
    for (std::size_t material = 0; material < members.size(); ++material) {
      join(material, members[material]);
    }
  }

  [[nodiscard]] static double limit(const Row& row) {
    return row.up_to.value_or(std::numeric_limits<double>::infinity());
  }

  void join(std::size_t material, std::vector<std::size_t>& members) {
    const std::vector<Row>& rows = builder_.rows_;
    const Row& first = rows[members.front()];
    for (std::size_t i = 1; i < members.size(); ++i) {
      compare(first, rows[members[i]]);
    }
    std::stable_sort(members.begin(), members.end(), [&](std::size_t a, std::size_t b) {
      return limit(rows[a]) < limit(rows[b]);
    });
    MaterialTable::Material& joined = table_.materials_[material];
    joined.info = first.info;
    joined.info.notes = notes_of(members);
    const Row* before = nullptr;
    for (const std::size_t member : members) {
      const Row& row = rows[member];
      const double reached = before == nullptr ? 0.0 : limit(*before);
      const double above = row.above > 0.0 ? row.above : reached;
      if (before != nullptr && limit(row) == reached) {
        fault(row,
              Code::duplicate,
              quoted(row.info.id) +
                  " is there twice with the same thickness limit: remove one row, "
                  "or give it another id or limit.");
      } else if (above < reached) {
        fault(
            row,
            Code::conflict,
            quoted(row.info.id) + " overlaps in thickness with the row of the next smaller limit.");
      }
      joined.steps.push_back({above, limit(row), member});
      joined.info.basis = weaker(joined.info.basis, row.info.basis);
      table_.rows_[member].material = material;
      before = &row;
    }
  }

  /// One text where all rows say the same, otherwise each with the thickness that it is about.
  [[nodiscard]] std::string notes_of(std::span<const std::size_t> members) const {
    const std::string& first = builder_.rows_[members.front()].info.notes;
    std::string text;
    bool all_same = true;
    for (std::size_t i = 0; i < members.size(); ++i) {
      const Row& row = builder_.rows_[members[i]];
      all_same = all_same && row.info.notes == first;
      const bool goes_on =
          i + 1 < members.size() && builder_.rows_[members[i + 1]].info.notes == row.info.notes;
      if (goes_on || row.info.notes.empty()) {
        continue;
      }
      if (!text.empty()) {
        text += "; ";
      }
      if (row.up_to && std::isfinite(*row.up_to)) {
        text += "up to " + format_quantity(*row.up_to, "mm") + ": ";
      }
      text += row.info.notes;
    }
    return all_same ? first : text;
  }

  void compare(const Row& first, const Row& row) {
    const MaterialInfo& a = first.info;
    const MaterialInfo& b = row.info;
    const std::array<std::pair<bool, const char*>, 10> fields = {{
        {a.name == b.name, "name"},
        {a.standard == b.standard, "standard"},
        {a.condition == b.condition, "condition"},
        {a.material_class == b.material_class, "class"},
        {a.group == b.group, "group"},
        {a.isotropic == b.isotropic && a.in_plane_only == b.in_plane_only, "isotropic"},
        {a.use == b.use, "structural use"},
        {a.forms == b.forms, "forms"},
        {a.processes == b.processes, "processes"},
        {a.corrosion == b.corrosion, "corrosion"},
    }};
    for (const auto& [is_same, name] : fields) {
      if (!is_same) {
        fault(row, Code::conflict, differs(first, row, quoted(name)));
      }
    }
    for (const PropertyInfo& known : properties()) {
      if (known.steps_with_thickness) {
        continue;
      }
      const auto one = first.values.find(known.property);
      const auto other = row.values.find(known.property);
      const bool is_in_one = one != first.values.end();
      const bool is_in_other = other != row.values.end();
      if (is_in_one == is_in_other && (!is_in_one || one->second == other->second)) {
        continue;
      }
      faults_.add(Code::conflict,
                  place(row, known.property),
                  differs(first, row, quoted(header(known.property))));
    }
  }

  [[nodiscard]] std::string differs(const Row& first,
                                    const Row& row,
                                    const std::string& what) const {
    const std::string other =
        first.line == 0 ? "an earlier row" : "line " + std::to_string(first.line);
    return quoted(row.info.id) + " differs from " + other + " in " + what +
           ": rows of one material may differ in strength only; give them ids of their own.";
  }

  // --- columns
  // ------------------------------------------------------------------------------------

  void fill() {
    const std::size_t n = builder_.rows_.size();
    table_.row_count_ = n;
    table_.columns_.resize(property_count);
    for (const PropertyInfo& known : properties()) {
      table_.headers_.push_back(header(known.property));
    }
    std::map<std::string, std::size_t, std::less<>> extra_index;
    std::map<std::string, std::size_t, std::less<>> text_index;
    for (std::size_t i = 0; i < n; ++i) {
      Row& row = builder_.rows_[i];
      for (const auto& [property, range] : row.values) {
        std::vector<Range>& column = table_.columns_[static_cast<std::size_t>(property)];
        if (column.empty()) {
          column.assign(n, {not_a_number, not_a_number});
        }
        column[i] = range;
      }
      for (const auto& [name, range] : row.extras) {
        const auto [known, is_new] = extra_index.emplace(name, table_.extras_.size());
        if (is_new) {
          table_.extras_.push_back({name, std::vector<Range>(n, {not_a_number, not_a_number})});
        }
        table_.extras_[known->second].values[i] = range;
      }
      for (auto& [name, text] : row.texts) {
        const auto [known, is_new] = text_index.emplace(name, table_.texts_.size());
        if (is_new) {
          table_.texts_.push_back({name, std::vector<std::string>(n)});
        }
        table_.texts_[known->second].values[i] = std::move(text);
      }
      MaterialTable::RowInfo& info = table_.rows_[i];
      info.line = row.line;
      info.basis = row.info.basis;
      info.evidence = row.row_evidence;
      info.source = std::move(row.source);
      info.exceptions = std::move(row.evidence);
      info.keys = std::move(row.keys);
    }
  }

  MaterialTableBuilder& builder_;
  MaterialTable table_;
  FaultList faults_;
};

MaterialTable MaterialTableBuilder::build() { return MaterialAssembly(*this).run(); }

}  // namespace bismar
