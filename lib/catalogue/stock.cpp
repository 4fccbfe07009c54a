// SPDX-License-Identifier: MIT
#include <bismar/catalogue/stock.hpp>

#include <algorithm>
#include <array>
#include <filesystem>
#include <optional>
#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>
#include <bismar/mechanics/section_builder.hpp>

#include "catalogue/checked_cells.hpp"
#include "catalogue/text.hpp"

namespace bismar {

namespace {

constexpr std::array<std::string_view, 4> availability_words = {
    "seen", "usual", "unconfirmed", "doubtful"};

constexpr std::array<std::string_view, 4> forming_words = {
    "hot finished", "cold formed", "extruded", "sawn"};
constexpr std::array formings = {
    Forming::hot_finished, Forming::cold_formed, Forming::extruded, Forming::sawn};

constexpr std::array families = {SectionFamily::solid_round,
                                 SectionFamily::solid_square,
                                 SectionFamily::solid_rectangle,
                                 SectionFamily::solid_ellipse,
                                 SectionFamily::round_tube,
                                 SectionFamily::rectangular_tube,
                                 SectionFamily::i_section,
                                 SectionFamily::channel,
                                 SectionFamily::solid_hexagon,
                                 SectionFamily::elliptical_tube,
                                 SectionFamily::tee,
                                 SectionFamily::angle};

bool contains(const std::vector<std::string>& words, std::string_view word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

/// Reads the sections of one list. Which dimensions a row needs follows from the shape, so the
/// shape of the first row is read before the other columns are looked up.
class SectionCells {
 public:
  SectionCells(TableReader& table, SectionFamily family) : table_(table), family_(family) {
    for (const SectionDimension& dimension : dimensions(family)) {
      const bool optional = dimension.optional && !dimension.in_tables;
      const auto kind = dimension.is_ratio ? QuantityKind::ratio : QuantityKind::length;
      dimensions_.push_back(
          {dimension.name,
           table.number_column(
               dimension.name, kind, optional ? Presence::optional : Presence::required),
           optional});
    }
  }

  /// The section, or nothing where a cell has a fault or the dimensions make no section.
  std::optional<SectionProperties> read(std::size_t row, Forming forming) {
    std::vector<std::optional<double>> d;
    for (const Dimension& dimension : dimensions_) {
      if (dimension.optional) {
        d.push_back(table_.value(row, dimension.column));
        continue;
      }
      if (!dimension.column.is_present()) {
        return std::nullopt;
      }
      // No bounds here: the section refuses what it cannot have.
      d.push_back(catalogue::needed_value(table_, row, dimension.column));
      if (!d.back()) {
        return std::nullopt;
      }
    }
    try {
      SectionProperties section = make_section(family_, d, forming);
      section.forming = forming;
      return section;
    } catch (const Error& error) {
      report(row, error);
      return std::nullopt;
    }
  }

 private:
  struct Dimension {
    std::string_view name;
    catalogue::NumberColumn column;
    bool optional = false;
  };

  /// What the section refuses, at the cell of the dimension that it names.
  void report(std::size_t row, const Error& error) {
    for (const Fault& fault : error.faults()) {
      const auto named =
          std::find_if(dimensions_.begin(), dimensions_.end(), [&](const Dimension& dimension) {
            return fault.where.find(dimension.name) != std::string::npos;
          });
      const bool has_cell = named != dimensions_.end() && named->column.is_present();
      const Dimension& at = has_cell ? *named : dimensions_.front();
      table_.add_fault(row, at.column.index().value(), fault.code, fault.message);
    }
  }

  TableReader& table_;
  SectionFamily family_;
  std::vector<Dimension> dimensions_;
};

class StockReader {
 public:
  StockReader(TableReader& table, const TableFormat& format, FaultList& faults)
      : table_(table),
        format_(format),
        faults_(faults),
        ids_(table.text_column("id", Presence::required)) {
    shape_ = table.text_column("shape", Presence::required);
    read_shape();
    title_ = table.text_column("list");
    designation_ = table.text_column("designation");
    forming_ = table.text_column("forming");
    classes_ = table.text_column("material classes", Presence::required);
    groups_ = table.text_column("material groups");
    standards_ = table.text_column("material standards");
    forms_ = table.text_column("material forms");
    materials_ = table.text_column("materials");
    lengths_ = table.number_column("stock lengths", QuantityKind::length);
    size_standard_ = table.text_column("size standard");
    other_standards_ = table.text_column("size standards of other classes");
    availability_ = table.text_column("availability");
    evidence_ = table.text_column("evidence");
    note_ = table.text_column("note");
    if (is_sheet_) {
      widths_ = table.number_column("stock widths", QuantityKind::length);
      thickness_ = table.number_column("thickness", QuantityKind::length, Presence::required);
    } else if (family_) {
      sections_.emplace(table, *family_);
    }
    table.finish_columns();
    // Without a shape it is not known which dimensions the table ought to have.
    if (is_sheet_ || family_) {
      catalogue::refuse_misspelt_headers(table, faults);
    }
  }

  StockList read(const std::string& path) {
    StockList list;
    list.id = std::filesystem::path(path).stem().string();
    list.sheet = is_sheet_;
    list.family = family_.value_or(SectionFamily::solid_round);
    list.items.reserve(table_.rows());
    for (std::size_t row = 0; row < table_.rows(); ++row) {
      check_same(row, shape_, "shape");
      check_same(row, title_, "title");
      list.items.push_back(item(row, path));
    }
    list.title = table_.rows() > 0 ? table_.text(0, title_) : "";
    if (list.title.empty()) {
      list.title = list.id;
    }
    return list;
  }

 private:
  void read_shape() {
    if (!shape_.is_present() || table_.rows() == 0) {
      return;
    }
    const std::string_view word = table_.required_text(0, shape_);
    is_sheet_ = word == "sheet";
    family_ = section_family(word);
    if (word.empty() || is_sheet_ || family_) {
      return;
    }
    std::vector<std::string_view> words;
    std::string allowed;
    for (const SectionFamily family : families) {
      words.push_back(name(family));
      allowed += std::string(name(family)) + ", ";
    }
    words.emplace_back("sheet");
    table_.add_fault(0,
                     shape_.index.value(),
                     Code::cell_invalid,
                     "there is no shape " + catalogue::quoted(word) + ": use " + allowed +
                         "or sheet." + did_you_mean(word, words));
  }

  /// One list has one shape and one title.
  void check_same(std::size_t row, const catalogue::Column& column, const std::string& what) {
    if (!column.is_present() || table_.text(row, column) == table_.text(0, column)) {
      return;
    }
    table_.add_fault(row,
                     column.index.value(),
                     Code::conflict,
                     "the list began with the " + what + " " +
                         catalogue::quoted(table_.text(0, column)) + " and has " +
                         catalogue::quoted(table_.text(row, column)) +
                         " here: make two lists of it.");
  }

  StockItem item(std::size_t row, const std::string& path) {
    StockItem item;
    item.id = ids_.read(table_, row);
    item.designation = table_.text(row, designation_);
    if (item.designation.empty()) {
      item.designation = item.id;
    }
    read_size(row, item);
    item.classes = table_.required_list(row, classes_);
    item.groups = table_.list(row, groups_);
    item.standards = table_.list(row, standards_);
    item.forms = table_.list(row, forms_);
    item.material_ids = table_.list(row, materials_);
    item.lengths = repeated_list(row, lengths_, last_lengths_);
    item.widths = repeated_list(row, widths_, last_widths_);
    if (const auto word = table_.word(row, availability_, availability_words)) {
      item.availability = static_cast<Availability>(*word);
    }
    item.standard = table_.text(row, size_standard_);
    read_other_standards(row, item);
    item.evidence = table_.text(row, evidence_);
    item.note = table_.text(row, note_);
    item.table = path;
    item.line = table_.line(row);
    return item;
  }

  /// A faultless list and the cell that it was read from.
  struct LastList {
    std::string_view text;
    std::vector<double> values;
  };

  /// Most rows repeat the lengths of the row before: reading them anew took a quarter of the time
  /// of the whole table.
  std::vector<double> repeated_list(std::size_t row,
                                    const catalogue::NumberColumn& column,
                                    LastList& last) {
    const std::string_view text = table_.text(row, catalogue::Column{column.index()});
    if (text.empty()) {
      return {};
    }
    if (text != last.text) {
      const std::size_t faults_before = faults_.size();
      last.values = catalogue::ascending_list(table_, row, column, format_.decimal);
      last.text = faults_.size() == faults_before ? text : std::string_view();
    }
    return last.values;
  }

  void read_size(std::size_t row, StockItem& item) {
    if (is_sheet_) {
      item.thickness = catalogue::required_value_in(table_, row, thickness_, catalogue::positive);
      return;
    }
    Forming forming = Forming::unknown;
    if (const auto word = table_.word(row, forming_, forming_words)) {
      forming = formings[*word];
    }
    if (!sections_) {
      return;
    }
    if (auto section = sections_->read(row, forming)) {
      item.section = *std::move(section);
    }
  }

  void read_other_standards(std::size_t row, StockItem& item) {
    item.standard_by_class = catalogue::pairs(table_, row, other_standards_);
    for (auto& [material_class, standard] : item.standard_by_class) {
      if (standard == "-") {
        standard.clear();
      }
      if (contains(item.classes, material_class)) {
        continue;
      }
      table_.add_fault(row,
                       other_standards_.index.value(),
                       Code::conflict,
                       "the size is not made of " + catalogue::quoted(material_class) +
                           ": add it to the material classes, or take it out here.");
    }
  }

  TableReader& table_;
  const TableFormat& format_;
  FaultList& faults_;
  catalogue::Ids ids_;
  bool is_sheet_ = false;
  std::optional<SectionFamily> family_;
  std::optional<SectionCells> sections_;
  catalogue::Column shape_, title_, designation_, forming_, classes_, groups_, standards_, forms_,
      materials_, size_standard_, other_standards_, availability_, evidence_, note_;
  catalogue::NumberColumn lengths_, widths_, thickness_;
  LastList last_lengths_, last_widths_;
};

}  // namespace

std::string_view name(Availability availability) {
  return availability_words.at(static_cast<std::size_t>(availability));
}

std::optional<Availability> availability(std::string_view name) {
  const auto found = std::find(availability_words.begin(), availability_words.end(), name);
  if (found == availability_words.end()) {
    return std::nullopt;
  }
  return static_cast<Availability>(found - availability_words.begin());
}

bool made_of(const StockItem& item, const MaterialInfo& material) {
  const auto allows = [](const std::vector<std::string>& words, const std::string& word) {
    return words.empty() || contains(words, word);
  };
  const bool form_agrees =
      item.forms.empty() ||
      std::any_of(material.forms.begin(), material.forms.end(), [&](const std::string& form) {
        return contains(item.forms, form);
      });
  return contains(item.classes, material.material_class) && allows(item.groups, material.group) &&
         allows(item.standards, material.standard) && form_agrees &&
         allows(item.material_ids, material.id);
}

std::string_view size_standard(const StockItem& item, std::string_view material_class) {
  const auto other = item.standard_by_class.find(material_class);
  return other == item.standard_by_class.end() ? item.standard : other->second;
}

StockList read_stock(const std::string& path, const TableFormat& format) {
  FaultList faults;
  TableReader table(read_table_file(path), path, format, faults);
  StockReader reader(table, format, faults);
  StockList list = reader.read(path);
  faults.throw_if_any();
  return list;
}

}  // namespace bismar
